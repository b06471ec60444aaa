import { randomUUID } from 'node:crypto';
import { QueryTypes, type Sequelize } from 'sequelize';
import type { PlannedDay, PlannedSet, PlanResult } from '@/scheduling/planning';
import type { AppContext } from '@/server/context';
import type { SetLine } from '@/shared/contracts/wishes';
import { minutesAt } from '@/shared/time';
import type { LockedYard } from './lockYard';
import { loadPlanFacts, type BegunSet } from './planFacts';
import { planDifference } from './planDifference';
import { buildPlanInput } from './planInput';
import { loadWishes, withWishes } from './planWishes';
import type { YardBudget } from './recomputeBudget';
import { instantFrom } from './wallClock';

/** Versions of a plan that are kept: a month of daily ones. */
const VERSIONS_KEPT = 30;
const MINUTE_MS = 60_000;

interface SetRow {
  id: string;
  zoneId: string;
  positionId: string;
  tapId: string;
  kind: PlannedSet['kind'];
  on: string;
  roundIndex: number;
  sortOrder: number;
  startMinutes: number;
  minutes: number;
  startAt: Date;
  endAt: Date;
  depthMm: number;
  grossMm: number;
  halfWay: boolean;
  reasons: PlannedSet['reasons'];
}

/**
 * Plans ten days on a balance that is up to date and stores the plan as the yard's newest version. Rounds that somebody started or skipped keep
 * their place, their number within the day and their sets; new rounds are numbered after them. Runs inside the transaction that holds the yard's lock.
 * @returns the version
 */
export async function makePlan(context: AppContext, yard: LockedYard, budget: YardBudget, cause: string): Promise<number> {
  const { database } = context;
  const now = context.clock.now();
  const facts = await loadPlanFacts(database, yard.id, budget.today, now);
  const wishes = await loadWishes(database, yard, budget.today);
  const result = context.planner.plan(withWishes(buildPlanInput(yard, budget, facts, now), wishes));
  const [previous] = await database.query<{ id: string; version: number; toOn: string }>(
    'SELECT id, version, to_on::text AS "toOn" FROM plans WHERE yard_id = $1 ORDER BY version DESC LIMIT 1', { bind: [yard.id], type: QueryTypes.SELECT },
  );
  const version = (previous?.version ?? 0) + 1;
  const planId = randomUUID();
  await database.query(
    `INSERT INTO plans (id, yard_id, version, from_on, to_on, cause, planner, facts_version, weather_as_of, result, created_at)
     VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11)`,
    {
      bind: [planId, yard.id, version, budget.today, result.days[result.days.length - 1]?.on ?? budget.today, cause, result.planner, yard.factsVersion, facts.weatherAsOf, JSON.stringify(result), now],
      type: QueryTypes.INSERT,
    },
  );
  if (previous) {
    await database.query(
      `INSERT INTO plan_sets (id, yard_id, plan_id, zone_id, position_id, tap_id, kind, "on", round_index, sort_order, start_minutes, minutes, start_at, end_at, depth_mm, gross_mm, half_way, reasons)
       SELECT gen_random_uuid(), s.yard_id, $3, s.zone_id, s.position_id, s.tap_id, s.kind, s."on", s.round_index, s.sort_order, s.start_minutes, s.minutes, s.start_at, s.end_at, s.depth_mm, s.gross_mm, s.half_way, s.reasons
       FROM plan_sets s WHERE s.yard_id = $1 AND s.plan_id = $2 AND s."on" >= $4
         AND EXISTS (SELECT FROM round_sets r WHERE r.yard_id = s.yard_id AND r."on" = s."on" AND r.round_index = s.round_index)`,
      { bind: [yard.id, previous.id, planId, budget.today], type: QueryTypes.INSERT },
    );
  }
  await storeSets(context, yard.id, planId, setRows(yard, result, facts.begun, now));
  if (previous) {
    await storeDifference(database, yard.id, previous, planId, now);
  }
  await database.query('DELETE FROM plans WHERE yard_id = $1 AND version <= $2', { bind: [yard.id, version - VERSIONS_KEPT], type: QueryTypes.DELETE });
  return version;
}

/** Keeps what the new plan says differently of the time ahead that both plans have. */
async function storeDifference(database: Sequelize, yardId: string, previous: { id: string; toOn: string }, planId: string, now: Date): Promise<void> {
  const lines = await database.query<SetLine & { planId: string }>(
    `SELECT plan_id AS "planId", position_id AS "positionId", zone_id AS "zoneId", "on"::text AS "on", kind, start_minutes AS "startMinutes", minutes FROM plan_sets
     WHERE yard_id = $1 AND plan_id IN ($2, $3) AND start_at > $4 AND "on" <= $5`,
    { bind: [yardId, previous.id, planId, now, previous.toOn], type: QueryTypes.SELECT },
  );
  const of = (id: string): SetLine[] => lines.filter((line) => line.planId === id).map(({ planId: _plan, ...line }) => line);
  await database.query('UPDATE plans SET difference = $3 WHERE yard_id = $1 AND id = $2', { bind: [yardId, planId, JSON.stringify(planDifference(of(previous.id), of(planId)))], type: QueryTypes.UPDATE });
}

/** Numbers the planned rounds of each day after those already begun and gives every set its instants. */
function setRows(yard: LockedYard, result: PlanResult, begun: readonly BegunSet[], now: Date): SetRow[] {
  return result.days.flatMap((day) => {
    const taken = begun.filter((set) => set.on === day.on).map((set) => set.roundIndex);
    const firstIndex = taken.length === 0 ? 0 : Math.max(...taken) + 1;
    return rowsOfDay(yard, day, firstIndex, now);
  });
}

function rowsOfDay(yard: LockedYard, day: PlannedDay, firstIndex: number, now: Date): SetRow[] {
  const lastOnTap = new Map<string, { positionId: string; endAt: Date }>();
  return day.rounds.flatMap((round, index) => round.sets.map((set): SetRow => {
    const wantedAt = instantFrom(day.on, set.startMinutes, yard.timeZone, now);
    const before = lastOnTap.get(set.tapId);
    // Where clocks are put forward between two sets, the hose is free later than the clock face says.
    const freeAt = before === undefined ? wantedAt : new Date(before.endAt.getTime() + (before.positionId === set.positionId ? 0 : yard.moveMinutes * MINUTE_MS));
    const startAt = before !== undefined && before.endAt > wantedAt ? freeAt : wantedAt;
    const endAt = new Date(startAt.getTime() + set.minutes * MINUTE_MS);
    lastOnTap.set(set.tapId, { positionId: set.positionId, endAt });
    return {
      id: randomUUID(), zoneId: set.zoneId, positionId: set.positionId, tapId: set.tapId, kind: set.kind, on: day.on,
      roundIndex: firstIndex + index, sortOrder: set.order, startMinutes: minutesAt(startAt, yard.timeZone), minutes: set.minutes, startAt, endAt,
      depthMm: set.depthMm, grossMm: set.grossMm, halfWay: set.halfWay ?? false, reasons: set.reasons,
    };
  }));
}

async function storeSets(context: AppContext, yardId: string, planId: string, rows: readonly SetRow[]): Promise<void> {
  if (rows.length === 0) {
    return;
  }
  await context.database.query(
    `INSERT INTO plan_sets (id, yard_id, plan_id, zone_id, position_id, tap_id, kind, "on", round_index, sort_order, start_minutes, minutes, start_at, end_at, depth_mm, gross_mm, half_way, reasons)
     SELECT id, $1, $2, "zoneId", "positionId", "tapId", kind, "on", "roundIndex", "sortOrder", "startMinutes", minutes, "startAt", "endAt", "depthMm", "grossMm", "halfWay", reasons
     FROM jsonb_to_recordset($3::jsonb) AS r(id uuid, "zoneId" uuid, "positionId" uuid, "tapId" uuid, kind text, "on" date, "roundIndex" int, "sortOrder" int,
       "startMinutes" int, minutes float8, "startAt" timestamptz, "endAt" timestamptz, "depthMm" float8, "grossMm" float8, "halfWay" boolean, reasons jsonb)`,
    { bind: [yardId, planId, JSON.stringify(rows)], type: QueryTypes.INSERT },
  );
}
