import { QueryTypes, type Sequelize } from 'sequelize';
import { DayChange, PlanWishes } from '@/server/models';
import { civilDayAt } from '@/shared/time';
import { notFound } from '@/server/errors';
import type { PlanDifference } from '@/shared/contracts/wishes';

/** Versions of the plan that are told of. */
const VERSIONS_TOLD = 12;
/** Things that made one version new; more would be a history. */
const EVENTS_TOLD = 6;

/**
 * Water drawn in a civil month, by the minutes that sets ran and the flow of their tap [L].
 * @param month - 'YYYY-MM'
 */
export async function litresOfMonth(database: Sequelize, yardId: string, month: string): Promise<number> {
  const [row] = await database.query<{ litres: number }>(
    `SELECT COALESCE(sum(s.minutes_run * t.flow_lpm), 0)::float8 AS litres FROM round_sets s JOIN positions p ON p.yard_id = s.yard_id AND p.id = s.position_id
     JOIN taps t ON t.yard_id = p.yard_id AND t.id = p.tap_id
     WHERE s.yard_id = $1 AND s."on" >= ($2 || '-01')::date AND s."on" < ($2 || '-01')::date + interval '1 month' AND s.minutes_run IS NOT NULL`,
    { bind: [yardId, month], type: QueryTypes.SELECT },
  );
  return row?.litres ?? 0;
}

export interface LockRow {
  id: string;
  positionId: string;
  on: string;
  startMinutes: number;
  minutes: number;
  reason: string;
  person: { id: string; name: string } | null;
}

export interface WishesRow {
  wishes: PlanWishes | null;
  usedThisMonthLitres: number;
  dayChanges: DayChange[];
  locks: LockRow[];
}

/** What a yard's people wish of its plan from today on. @throws AppError not_found */
export async function readWishes(database: Sequelize, yardId: string, now: Date): Promise<WishesRow> {
  const [yard] = await database.query<{ timeZone: string }>('SELECT time_zone AS "timeZone" FROM yards WHERE id = $1', { bind: [yardId], type: QueryTypes.SELECT });
  if (!yard) {
    throw notFound('yard');
  }
  const today = civilDayAt(now, yard.timeZone);
  const locks = await database.query<LockRow>(
    `SELECT l.id, l.position_id AS "positionId", l."on"::text AS "on", l.start_minutes AS "startMinutes", l.minutes, l.reason,
       CASE WHEN u.id IS NULL THEN NULL ELSE json_build_object('id', u.id, 'name', u.name) END AS person
     FROM set_locks l LEFT JOIN users u ON u.id = l.locked_by WHERE l.yard_id = $1 AND l."on" >= $2 ORDER BY l."on", l.start_minutes, l.id`,
    { bind: [yardId, today], type: QueryTypes.SELECT },
  );
  const dayChanges = await DayChange.findAll({ where: { yardId }, order: [['on', 'ASC']] });
  return {
    wishes: await PlanWishes.findByPk(yardId), locks, dayChanges: dayChanges.filter((change) => change.on >= today),
    usedThisMonthLitres: await litresOfMonth(database, yardId, today.slice(0, 7)),
  };
}

export interface PlanVersionRow {
  version: number;
  createdAt: Date;
  cause: string;
  difference: PlanDifference;
  events: { id: string; at: string; person: { id: string; name: string } | null; verb: string; subjectKind: string; subjectId: string | null; data: Record<string, unknown> }[];
}

/** The newest versions of a yard's plan, newest first, each with what happened in the yard since the one before. */
export async function readPlanVersions(database: Sequelize, yardId: string): Promise<PlanVersionRow[]> {
  return database.query<PlanVersionRow>(
    `SELECT p.version, p.created_at AS "createdAt", p.cause, p.difference,
       COALESCE((SELECT json_agg(e ORDER BY e.at DESC) FROM (
         SELECT e.id, e.at, e.verb, e.subject_kind AS "subjectKind", e.subject_id AS "subjectId", e.data,
           CASE WHEN u.id IS NULL THEN NULL ELSE json_build_object('id', u.id, 'name', u.name) END AS person
         FROM events e LEFT JOIN users u ON u.id = e.user_id
         WHERE e.yard_id = p.yard_id AND e.at > COALESCE(before.created_at, '-infinity') AND e.at <= p.created_at AND e.verb NOT LIKE 'invitation.%' AND e.verb NOT LIKE 'member.%'
           AND e.verb NOT IN ('round.started', 'round.moved', 'round.minutes_added')
         ORDER BY e.at DESC LIMIT ${EVENTS_TOLD}) e), '[]'::json) AS events
     FROM plans p LEFT JOIN plans before ON before.yard_id = p.yard_id AND before.version = p.version - 1
     WHERE p.yard_id = $1 ORDER BY p.version DESC LIMIT ${VERSIONS_TOLD}`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
}
