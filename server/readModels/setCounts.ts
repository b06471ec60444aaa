import { QueryTypes, type Sequelize } from 'sequelize';
import type { SetKind } from '@/shared/contracts/plans';

/** A set that has not begun so long after its start counts as missed [min]: time to get up, not time to forget. */
export const lateAfterMinutes = 30;

/** What was planned and what was done for one position on one civil day. */
export interface SetCount {
  yardId: string;
  zoneId: string;
  positionId: string;
  on: string;
  kind: SetKind;
  /** Wanted over the whole day, without those that rain made needless. */
  planned: number;
  done: number;
  /** Left out by a person for another cause than rain. */
  skipped: number;
  /** Wanted by now, and neither begun nor left out for rain. What somebody left out for another cause is missed all the same. */
  missed: number;
  /** Of the missed ones those that nobody left out. */
  notStarted: number;
  /** First planned start of the day [minutes after local midnight]; null when only what was done is known. */
  firstStartMinutes: number | null;
  /** Mean depth over the zone by what was applied [mm]. */
  appliedMm: number;
}

interface CountRow {
  yardId: string;
  zoneId: string;
  positionId: string;
  on: string;
  kind: SetKind;
  inForce: number;
  most: number;
  due: number;
  ahead: number;
  firstStartMinutes: number | null;
  done: number;
  skipped: number;
  rained: number;
  open: number;
  appliedMm: number;
}

/**
 * Planned against done, by position and day, in one query for any number of yards. A plan is in force until a newer one takes its place, so what
 * counts as planned is what the plan in force said when the set should have begun. What was missed and planned again later that day counts once:
 * never more than any one plan wanted on the day.
 * @param fromOn - first civil day, `toOn` the last one, both included
 */
export async function readSetCounts(database: Sequelize, yardIds: readonly string[], fromOn: string, toOn: string, now: Date): Promise<SetCount[]> {
  const rows = await database.query<CountRow>(
    `WITH versions AS (
       SELECT yard_id, id, created_at, lead(created_at) OVER (PARTITION BY yard_id ORDER BY version) AS replaced_at FROM plans WHERE yard_id = ANY($1::uuid[])
     ), timed AS (
       SELECT s.yard_id, s.zone_id, s.position_id, s."on", s.kind, s.plan_id, s.start_at, s.start_minutes, v.replaced_at IS NULL AS newest,
         -- the minute of the start may lie a few seconds before the plan that was made in it
         v.created_at < s.start_at + interval '1 minute' AND (v.replaced_at IS NULL OR v.replaced_at >= s.start_at + interval '1 minute') AS in_force
       FROM versions v JOIN plan_sets s ON s.yard_id = v.yard_id AND s.plan_id = v.id WHERE s."on" BETWEEN $2::date AND $3::date
     ), by_plan AS (
       SELECT yard_id, zone_id, position_id, "on", kind, plan_id, count(*) AS total, count(*) FILTER (WHERE in_force) AS in_force,
         count(*) FILTER (WHERE in_force AND start_at <= $4::timestamptz - make_interval(mins => $5)) AS due,
         count(*) FILTER (WHERE newest AND start_at > $4::timestamptz - make_interval(mins => $5)) AS ahead,
         min(start_minutes) FILTER (WHERE in_force) AS first_start
       FROM timed GROUP BY yard_id, zone_id, position_id, "on", kind, plan_id
     ), wanted AS (
       SELECT yard_id, zone_id, position_id, "on", kind, sum(in_force)::int AS in_force, max(total)::int AS most, sum(due)::int AS due, sum(ahead)::int AS ahead,
         min(first_start) AS first_start
       FROM by_plan GROUP BY yard_id, zone_id, position_id, "on", kind
     ), begun AS (
       SELECT yard_id, zone_id, position_id, "on", kind, (count(*) FILTER (WHERE status IN ('done', 'cut_short')))::int AS done,
         (count(*) FILTER (WHERE status = 'skipped' AND NOT COALESCE(skip_cause IN ('rain', 'ground_wet'), false)))::int AS skipped,
         (count(*) FILTER (WHERE status = 'skipped' AND skip_cause IN ('rain', 'ground_wet')))::int AS rained,
         (count(*) FILTER (WHERE status IN ('waiting', 'running')))::int AS open, COALESCE(sum(applied_mm * zone_share), 0) AS applied_mm
       FROM round_sets WHERE yard_id = ANY($1::uuid[]) AND "on" BETWEEN $2::date AND $3::date GROUP BY yard_id, zone_id, position_id, "on", kind
     )
     SELECT yard_id AS "yardId", zone_id AS "zoneId", position_id AS "positionId", "on"::text AS "on", kind, COALESCE(w.in_force, 0) AS "inForce", COALESCE(w.most, 0) AS most,
       COALESCE(w.due, 0) AS due, COALESCE(w.ahead, 0) AS ahead, w.first_start AS "firstStartMinutes", COALESCE(b.done, 0) AS done, COALESCE(b.skipped, 0) AS skipped,
       COALESCE(b.rained, 0) AS rained, COALESCE(b.open, 0) AS open, COALESCE(b.applied_mm, 0) AS "appliedMm"
     FROM wanted w FULL JOIN begun b USING (yard_id, zone_id, position_id, "on", kind)
     ORDER BY yard_id, "on", zone_id, position_id, kind`,
    { bind: [yardIds, fromOn, toOn, now, lateAfterMinutes], type: QueryTypes.SELECT },
  );
  return rows.flatMap((row): SetCount[] => {
    const begun = row.done + row.skipped + row.rained + row.open;
    const wanted = Math.max(Math.min(row.inForce, row.most), begun);
    if (wanted === 0) {
      return [];
    }
    const missed = Math.max(0, Math.min(row.due, row.most - row.ahead) - row.done - row.rained - row.open);
    return [{
      yardId: row.yardId, zoneId: row.zoneId, positionId: row.positionId, on: row.on, kind: row.kind, planned: wanted - row.rained, done: row.done, skipped: row.skipped,
      missed, notStarted: Math.max(0, missed - row.skipped), firstStartMinutes: row.firstStartMinutes, appliedMm: row.appliedMm,
    }];
  });
}
