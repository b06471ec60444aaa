import { randomUUID } from 'node:crypto';
import { QueryTypes, type Sequelize } from 'sequelize';
import { notFound } from '@/server/errors';
import { RoundSet } from '@/server/models';
import { plannedDaySets, type PlannedDaySet } from '@/server/readModels/plannedDay';

/**
 * Rows for the sets of a planned round, with the numbers they were planned with: from here on a new plan does not change them.
 * @throws AppError not_found when the newest plan has no such round
 */
export async function setsOfPlan(database: Sequelize, yardId: string, on: string, roundIndex: number, roundId: string | null): Promise<{ planId: string; sets: RoundSet[] }> {
  const planned = (await plannedDaySets(database, yardId, on)).filter((set) => set.roundIndex === roundIndex);
  const [first] = planned;
  if (first === undefined) {
    throw notFound('round');
  }
  const shares = await zoneShares(database, yardId);
  return {
    planId: first.planId,
    sets: planned.map((set) => RoundSet.build({
      id: randomUUID(), yardId, roundId, zoneId: set.zoneId, positionId: set.positionId, kind: set.kind, on, roundIndex, sortOrder: set.sortOrder,
      plannedStartAt: set.startAt, plannedMinutes: set.minutes, addedMinutes: 0, ...ratesOf(set), zoneShare: shares.get(set.positionId) ?? 1, status: 'waiting',
    })),
  };
}

/** The plan's own application rate and multiplier, read back from its minutes and depths. */
function ratesOf(set: PlannedDaySet): { rateMmPerHour: number; runTimeMultiplier: number } {
  return { rateMmPerHour: (set.grossMm * 60) / set.minutes, runTimeMultiplier: Math.max(1, set.grossMm / set.depthMm) };
}

/** Part of its zone that each position serves; the positions of a zone never add up to more than the zone. */
async function zoneShares(database: Sequelize, yardId: string): Promise<Map<string, number>> {
  const rows = await database.query<{ positionId: string; share: number }>(
    `SELECT id AS "positionId", part / GREATEST(1, sum(part) OVER (PARTITION BY zone_id)) AS share
     FROM (SELECT p.id, p.zone_id, LEAST(1, p.wetted_area_m2 / z.area_m2) AS part FROM positions p JOIN zones z ON z.yard_id = p.yard_id AND z.id = p.zone_id
       WHERE p.yard_id = $1 AND p.archived_at IS NULL) AS parts`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  return new Map(rows.map((row) => [row.positionId, row.share]));
}
