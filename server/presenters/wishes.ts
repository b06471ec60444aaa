import type { PlanVersionRow, WishesRow } from '@/server/readModels/wishes';
import type { PlanVersionsResponse, WishesResponse } from '@/shared/contracts/wishes';

/** What a yard's people wish of its plan. */
export function presentWishes({ wishes, usedThisMonthLitres, dayChanges, locks }: WishesRow): WishesResponse {
  return {
    priority: wishes?.priority ?? 'keep_green', preferredWindows: (wishes?.preferredWindows ?? []).map(({ fromMinutes, toMinutes }) => ({ fromMinutes, toMinutes })),
    monthCapLitres: wishes?.monthCapLitres ?? null, isDefault: wishes === null, usedThisMonthLitres,
    dayChanges: dayChanges.map(({ on, dayOff, extraWindows }) => ({ on, dayOff, extraWindows: extraWindows.map(({ fromMinutes, toMinutes }) => ({ fromMinutes, toMinutes })) })),
    locks: locks.map(({ id, positionId, on, startMinutes, minutes, reason, person }) => ({ id, positionId, on, startMinutes, minutes, reason, person })),
  };
}

/** Versions of the plan with what made each new. */
export function presentPlanVersions(versions: readonly PlanVersionRow[]): PlanVersionsResponse {
  return {
    versions: versions.map(({ version, createdAt, cause, difference, events }) => ({
      version, createdAt: createdAt.toISOString(), cause, difference,
      events: events.map(({ id, at, person, verb, subjectKind, subjectId, data }) => ({ id, at: new Date(at).toISOString(), person, verb, subjectKind, subjectId, data })),
    })),
  };
}
