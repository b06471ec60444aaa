import { QueryTypes, type Sequelize } from 'sequelize';
import type { PlanTap } from '@/scheduling/planning';
import { HomeWindow, WaterRule } from '@/server/models';
import { positionSql, ratesOf, type PositionRate, type PositionRow } from '@/server/readModels/positionRates';
import type { SetKind } from '@/shared/contracts/plans';
import type { RoundSetStatus, RoundStatus } from '@/shared/contracts/rounds';
import { loadPlanLimits, type PlanLimits } from './planLimits';

/** A set of today or later that somebody began, did or skipped. */
export interface BegunSet {
  roundId: string | null;
  roundStatus: RoundStatus | null;
  zoneId: string;
  positionId: string;
  kind: SetKind;
  on: string;
  roundIndex: number;
  status: RoundSetStatus;
  plannedStartAt: Date;
  plannedMinutes: number;
  addedMinutes: number;
  startedAt: Date | null;
  appliedMm: number | null;
  rateMmPerHour: number;
  runTimeMultiplier: number;
}

/** Everything a plan rests on besides the balance and the weather. */
export interface PlanFacts {
  taps: PlanTap[];
  positions: (PositionRow & { rate: PositionRate | null; sprinklerName: string })[];
  hours: { weekday: number; fromMinutes: number; toMinutes: number }[];
  rules: WaterRule[];
  limits: PlanLimits;
  begun: BegunSet[];
  /** When the weather service last answered. */
  weatherAsOf: Date | null;
}

/** Reads what a plan from a day on rests on. */
export async function loadPlanFacts(database: Sequelize, yardId: string, today: string, now: Date): Promise<PlanFacts> {
  const taps = await database.query<PlanTap>(
    `SELECT id, name, flow_lpm AS "flowLpm", flow_is_default AS "flowIsDefault", shut_off_timer AS "shutOffTimer"
     FROM taps WHERE yard_id = $1 AND archived_at IS NULL ORDER BY created_at, name, id`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  const rows = await database.query<PositionRow>(positionSql, { bind: [yardId, now], type: QueryTypes.SELECT });
  const sprinklers = await database.query<{ id: string; name: string }>('SELECT id, name FROM sprinklers WHERE yard_id = $1', { bind: [yardId], type: QueryTypes.SELECT });
  const names = new Map(sprinklers.map((sprinkler) => [sprinkler.id, sprinkler.name]));
  const rates = ratesOf(rows);
  const begun = await database.query<BegunSet>(
    `SELECT s.round_id AS "roundId", r.status AS "roundStatus", s.zone_id AS "zoneId", s.position_id AS "positionId", s.kind, s."on"::text AS "on",
       s.round_index AS "roundIndex", s.status, s.planned_start_at AS "plannedStartAt", s.planned_minutes AS "plannedMinutes", s.added_minutes AS "addedMinutes",
       s.started_at AS "startedAt", s.applied_mm AS "appliedMm", s.rate_mm_per_hour AS "rateMmPerHour", s.run_time_multiplier AS "runTimeMultiplier"
     FROM round_sets s LEFT JOIN rounds r ON r.yard_id = s.yard_id AND r.id = s.round_id
     WHERE s.yard_id = $1 AND (s."on" >= $2 OR r.status = 'running') ORDER BY s."on", s.round_index, s.sort_order`,
    { bind: [yardId, today], type: QueryTypes.SELECT },
  );
  const [asked] = await database.query<{ answeredAt: Date | null }>(
    'SELECT answered_at AS "answeredAt" FROM weather_fetches WHERE yard_id = $1', { bind: [yardId], type: QueryTypes.SELECT },
  );
  return {
    taps, begun,
    positions: rows.map((row) => ({ ...row, rate: rates.get(row.id) ?? null, sprinklerName: names.get(row.sprinklerId) ?? '' })),
    hours: await HomeWindow.findAll({ where: { yardId }, order: [['weekday', 'ASC'], ['fromMinutes', 'ASC']] }),
    rules: await WaterRule.findAll({ where: { yardId }, order: [['createdAt', 'ASC'], ['id', 'ASC']] }),
    limits: await loadPlanLimits(database, yardId, today),
    weatherAsOf: asked?.answeredAt ?? null,
  };
}
