import type { PlanRow } from '@/server/readModels/readPlan';
import type { PlannedSetRow } from '@/server/readModels/readToday';
import type { PlannedSetResponse, PlanResponse } from '@/shared/contracts/plans';

const iso = (instant: Date | string): string => new Date(instant).toISOString();

/** A planned set as the screens read it. */
export function presentPlannedSet(set: PlannedSetRow): PlannedSetResponse {
  return {
    id: set.id, positionId: set.positionId, zoneId: set.zoneId, tapId: set.tapId, kind: set.kind, on: set.on, roundIndex: set.roundIndex, sortOrder: set.sortOrder,
    startMinutes: set.startMinutes, minutes: set.minutes, startAt: iso(set.startAt), endAt: iso(set.endAt), depthMm: set.depthMm, grossMm: set.grossMm, halfWay: set.halfWay, reasons: set.reasons,
  };
}

/** The sets of one round: from the first start to the last end, with the moves between positions of one tap. */
export interface PresentedRound {
  roundIndex: number;
  startMinutes: number;
  endMinutes: number;
  moves: number;
  sets: PlannedSetResponse[];
}

/** Groups the sets of one day, given by start, into its rounds. */
export function presentRounds(sets: readonly PlannedSetRow[]): PresentedRound[] {
  const rounds = new Map<number, PresentedRound>();
  const lastPosition = new Map<string, string>();
  for (const row of sets) {
    const set = presentPlannedSet(row);
    const endMinutes = set.startMinutes + set.minutes;
    const round = rounds.get(set.roundIndex) ?? { roundIndex: set.roundIndex, startMinutes: set.startMinutes, endMinutes, moves: 0, sets: [] };
    const place = `${set.roundIndex}/${set.tapId}`;
    const before = lastPosition.get(place);
    if (before !== undefined && before !== set.positionId) {
      round.moves += 1;
    }
    lastPosition.set(place, set.positionId);
    round.endMinutes = Math.max(round.endMinutes, endMinutes);
    round.sets.push(set);
    rounds.set(set.roundIndex, round);
  }
  return [...rounds.values()];
}

/** Zones without a set on a day, less those that a round already begun waters. */
export function zonesStillWithout<T extends { zoneId: string }>(without: readonly T[], sets: readonly { zoneId: string }[]): T[] {
  const watered = new Set(sets.map((set) => set.zoneId));
  return without.filter((zone) => !watered.has(zone.zoneId));
}

/** The newest plan of a yard. */
export function presentPlan(plan: PlanRow): PlanResponse {
  const sets = plan.sets ?? [];
  return {
    version: plan.version, createdAt: iso(plan.createdAt), cause: plan.cause, planner: plan.planner, fromOn: plan.fromOn, toOn: plan.toOn,
    weatherAsOf: plan.weatherAsOf === null ? null : iso(plan.weatherAsOf),
    days: plan.result.days.map((day) => {
      const own = sets.filter((set) => set.on === day.on);
      return {
        on: day.on, rounds: presentRounds(own),
        endDepletions: Object.entries(day.endDepletionMm).map(([zoneId, depletionMm]) => ({ zoneId, depletionMm })),
        zonesWithout: zonesStillWithout(day.zonesWithout, own).map(({ zoneId, reasons }) => ({ zoneId, reasons })),
      };
    }),
    missing: plan.result.missing,
    shortages: plan.result.shortages.map(({ zoneId, on, shortMm, shortMinutes, litres, reasons }) => ({ zoneId, on, shortMm, shortMinutes, litres, reasons })),
  };
}
