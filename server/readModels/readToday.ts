import type { Sequelize } from 'sequelize';
import { planDefaults } from '@/scheduling/planning/planDefaults';
import type { Reason, ZoneWithout } from '@/scheduling/planning/types';
import { preparedRead } from '@/server/adapters/database/preparedRead';
import type { SetKind } from '@/shared/contracts/plans';
import type { RoundStatus, SkipCause } from '@/shared/contracts/rounds';
import { freshnessColumns, type Freshness } from './freshness';

/** A planned set as JSON brings it: instants are text. */
export interface PlannedSetRow {
  id: string;
  positionId: string;
  zoneId: string;
  tapId: string;
  kind: SetKind;
  on: string;
  roundIndex: number;
  sortOrder: number;
  startMinutes: number;
  minutes: number;
  startAt: string;
  endAt: string;
  depthMm: number;
  grossMm: number;
  halfWay: boolean;
  reasons: Reason[];
}

/** Columns of `plan_sets s` as one JSON object. */
export const plannedSetJson = `json_build_object('id', s.id, 'positionId', s.position_id, 'zoneId', s.zone_id, 'tapId', s.tap_id, 'kind', s.kind, 'on', s."on",
  'roundIndex', s.round_index, 'sortOrder', s.sort_order, 'startMinutes', s.start_minutes, 'minutes', s.minutes, 'startAt', s.start_at, 'endAt', s.end_at,
  'depthMm', s.depth_mm, 'grossMm', s.gross_mm, 'halfWay', s.half_way, 'reasons', s.reasons)`;

/** What became of a planned round that somebody started or skipped. */
export interface BegunRound {
  roundIndex: number;
  roundId: string | null;
  status: RoundStatus | null;
  skipCause: SkipCause | null;
}

export interface TodayRow extends Freshness {
  yardName: string;
  missing: Reason[] | null;
  zonesWithout: ZoneWithout[] | null;
  sets: PlannedSetRow[] | null;
  begun: BegunRound[] | null;
  runningRoundId: string | null;
  nextSet: { on: string; startMinutes: number; zoneId: string } | null;
  zones: { id: string; name: string; depletionMm: number | null; refillLineMm: number | null; totalAvailableMm: number | null; stage: string | null }[] | null;
  weather: { tminC: number | null; tmaxC: number | null; windMps: number | null; rainMm: number | null } | null;
  nextRainOn: string | null;
  sample: boolean | null;
  weatherFailed: boolean | null;
  openProposals: number;
}

// One statement, because this is what every morning begins with. The day is the first of the newest plan: a plan that holds begins today.
const sql = `
  SELECT y.name AS "yardName", ${freshnessColumns},
    p.missing, p.without_today AS "zonesWithout",
    (SELECT json_agg(${plannedSetJson} ORDER BY s.start_at, s.sort_order) FROM plan_sets s WHERE s.yard_id = y.id AND s.plan_id = p.id AND s."on" = p.from_on) AS sets,
    (SELECT json_agg(b) FROM (
      SELECT r.round_index AS "roundIndex", max(r.round_id::text) AS "roundId", max(o.status) AS status, max(r.skip_cause) AS "skipCause"
      FROM round_sets r LEFT JOIN rounds o ON o.yard_id = r.yard_id AND o.id = r.round_id
      WHERE r.yard_id = y.id AND r."on" = p.from_on GROUP BY r.round_index) b) AS begun,
    (SELECT o.id FROM rounds o WHERE o.yard_id = y.id AND o.status = 'running') AS "runningRoundId",
    (SELECT json_build_object('on', s."on", 'startMinutes', s.start_minutes, 'zoneId', s.zone_id) FROM plan_sets s
      WHERE s.yard_id = y.id AND s.plan_id = p.id AND s.start_at > $2
        AND NOT EXISTS (SELECT FROM round_sets r WHERE r.yard_id = s.yard_id AND r."on" = s."on" AND r.round_index = s.round_index)
      ORDER BY s.start_at, s.sort_order LIMIT 1) AS "nextSet",
    (SELECT json_agg(json_build_object('id', z.id, 'name', z.name, 'refillLineMm', d.refill_line_mm, 'totalAvailableMm', d.total_available_mm, 'stage', d.inputs->>'stage',
        'depletionMm', CASE WHEN d.zone_id IS NOT NULL THEN GREATEST(0, d.depletion_start_mm + d.root_growth_mm + d.observation_mm - d.irrigation_mm - CASE d.rain_source WHEN 'gauge' THEN d.effective_rain_mm ELSE 0 END) END)
        ORDER BY z.priority, z.created_at, z.id)
      FROM zones z LEFT JOIN budget_days d ON d.yard_id = z.yard_id AND d.zone_id = z.id AND d."on" = p.from_on
      WHERE z.yard_id = y.id AND z.archived_at IS NULL) AS zones,
    (SELECT json_build_object('tminC', w.tmin_c, 'tmaxC', w.tmax_c, 'windMps', w.wind_mps, 'rainMm', COALESCE(
        (SELECT e.depth_mm FROM rain_entries e WHERE e.yard_id = w.yard_id AND e."on" = w."on"), w.precipitation_mm))
      FROM weather_days w WHERE w.yard_id = y.id AND w."on" = p.from_on) AS weather,
    (SELECT min(w."on")::text FROM weather_days w WHERE w.yard_id = y.id AND w."on" > p.from_on AND w.precipitation_mm >= ${planDefaults.notableRainMm}) AS "nextRainOn",
    f.sample, f.last_error IS NOT NULL AS "weatherFailed",
    (SELECT count(*)::int FROM proposals q WHERE q.yard_id = y.id AND q.status = 'open') AS "openProposals"
  FROM yards y
  LEFT JOIN weather_fetches f ON f.yard_id = y.id
  LEFT JOIN LATERAL (SELECT l.id, l.version, l.from_on, l.facts_version, l.weather_as_of, l.missing, l.without_today, l.created_at FROM plans l WHERE l.yard_id = y.id ORDER BY l.version DESC LIMIT 1) p ON true
  WHERE y.id = $1`;

/** Everything that the day's first screen shows of a yard, as the newest plan has it. Null when the yard is gone. */
export async function readToday(database: Sequelize, yardId: string, now: Date): Promise<TodayRow | null> {
  const [row] = await preparedRead<TodayRow>(database, 'today', sql, [yardId, now]);
  return row ?? null;
}
