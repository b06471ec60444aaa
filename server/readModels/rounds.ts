import { QueryTypes, type Sequelize } from 'sequelize';
import type { SetKind } from '@/shared/contracts/plans';
import type { RoundSetStatus, RoundStatus, SkipCause } from '@/shared/contracts/rounds';

/** Instants come as PostgreSQL writes them in JSON; the presenter makes them ISO. */
export interface RoundSetView {
  id: string;
  roundId: string | null;
  zoneId: string;
  positionId: string;
  tapId: string;
  kind: SetKind;
  sortOrder: number;
  plannedStartAt: string;
  plannedMinutes: number;
  addedMinutes: number;
  status: RoundSetStatus;
  skipCause: SkipCause | null;
  startedAt: string | null;
  endedAt: string | null;
  minutesRun: number | null;
  appliedMm: number | null;
  rateMmPerHour: number;
  runTimeMultiplier: number;
  halfWay: boolean;
}

interface Person {
  id: string;
  name: string;
}

export interface RoundView {
  id: string;
  on: string;
  roundIndex: number;
  status: RoundStatus;
  startedBy: Person | null;
  startedAt: Date;
  waterOffBy: Person | null;
  waterOffAt: Date | null;
  endedAt: Date | null;
  sets: RoundSetView[];
}

const RECENT_ROUNDS = 60;

const SELECT = `
  SELECT r.id, r."on"::text AS "on", r.round_index AS "roundIndex", r.status, r.started_at AS "startedAt", r.water_off_at AS "waterOffAt", r.ended_at AS "endedAt",
    (SELECT json_build_object('id', u.id, 'name', u.name) FROM users u WHERE u.id = r.started_by) AS "startedBy",
    (SELECT json_build_object('id', u.id, 'name', u.name) FROM users u WHERE u.id = r.water_off_by) AS "waterOffBy",
    (SELECT json_agg(json_build_object('id', s.id, 'roundId', s.round_id, 'zoneId', s.zone_id, 'positionId', s.position_id, 'tapId', p.tap_id, 'kind', s.kind,
        'sortOrder', s.sort_order, 'plannedStartAt', s.planned_start_at, 'plannedMinutes', s.planned_minutes, 'addedMinutes', s.added_minutes, 'status', s.status,
        'skipCause', s.skip_cause, 'startedAt', s.started_at, 'endedAt', s.ended_at, 'minutesRun', s.minutes_run, 'appliedMm', s.applied_mm,
        'rateMmPerHour', s.rate_mm_per_hour, 'runTimeMultiplier', s.run_time_multiplier, 'halfWay', s.half_way) ORDER BY s.sort_order)
      FROM round_sets s JOIN positions p ON p.yard_id = s.yard_id AND p.id = s.position_id WHERE s.yard_id = r.yard_id AND s.round_id = r.id) AS sets
  FROM rounds r`;

/** A yard's rounds, newest first. */
export function recentRounds(database: Sequelize, yardId: string): Promise<RoundView[]> {
  return database.query<RoundView>(`${SELECT} WHERE r.yard_id = $1 ORDER BY r.started_at DESC LIMIT ${RECENT_ROUNDS}`, { bind: [yardId], type: QueryTypes.SELECT });
}

/** One round of a yard, or null. */
export async function findRound(database: Sequelize, yardId: string, roundId: string): Promise<RoundView | null> {
  const rows = await database.query<RoundView>(`${SELECT} WHERE r.yard_id = $1 AND r.id = $2`, { bind: [yardId, roundId], type: QueryTypes.SELECT });
  return rows[0] ?? null;
}
