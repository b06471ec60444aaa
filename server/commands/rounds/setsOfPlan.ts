import { randomUUID } from 'node:crypto';
import type { Sequelize } from 'sequelize';
import { notFound } from '@/server/errors';
import { RoundSet } from '@/server/models';
import { plannedDaySets, type PlannedDaySet } from '@/server/readModels/plannedDay';
import { positionRates } from '@/server/readModels/positionRates';

/**
 * Rows for the sets of a planned round, with the numbers they were planned with: from here on a new plan does not change them.
 * @throws AppError not_found when the newest plan has no such round
 */
export async function setsOfPlan(
  database: Sequelize, yardId: string, now: Date, { on, roundIndex }: { on: string; roundIndex: number }, roundId: string | null,
): Promise<{ planId: string; sets: RoundSet[] }> {
  const planned = (await plannedDaySets(database, yardId, on)).filter((set) => set.roundIndex === roundIndex);
  const [first] = planned;
  if (first === undefined) {
    throw notFound('round');
  }
  const rates = await positionRates(database, yardId, now);
  return {
    planId: first.planId,
    sets: planned.map((set) => RoundSet.build({
      id: randomUUID(), yardId, roundId, zoneId: set.zoneId, positionId: set.positionId, kind: set.kind, on, roundIndex, sortOrder: set.sortOrder,
      plannedStartAt: set.startAt, plannedMinutes: set.minutes, addedMinutes: 0, ...ratesOf(set), zoneShare: rates.get(set.positionId)?.zoneShare ?? 1, halfWay: set.halfWay, status: 'waiting',
    })),
  };
}

/** The plan's own application rate and multiplier, read back from its minutes and depths. */
function ratesOf(set: PlannedDaySet): { rateMmPerHour: number; runTimeMultiplier: number } {
  return { rateMmPerHour: (set.grossMm * 60) / set.minutes, runTimeMultiplier: Math.max(1, set.grossMm / set.depthMm) };
}
