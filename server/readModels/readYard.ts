import { QueryTypes, type Sequelize } from 'sequelize';
import type { Role, UnitSystem } from '@/shared/contracts/common';
import type { HoseResponse, SprinklerResponse } from '@/shared/contracts/equipment';
import type { PermitResponse, SupplyKind, WaterRuleResponse } from '@/shared/contracts/waterRules';
import type { YardResponse, YardSummary } from '@/shared/contracts/yards';
import type { ZoneResponse } from '@/shared/contracts/zones';
import { positionSql, type PositionRow } from './positionRates';

export interface TapRow {
  id: string;
  name: string;
  flowLpm: number;
  flowIsDefault: boolean;
  shutOffTimer: boolean;
  lastTestedAt: string | Date | null;
}

/** A yard with all its facts, as one member sees it. */
export interface YardRow {
  id: string;
  name: string;
  placeName: string;
  role: Role;
  timeZone: string;
  units: UnitSystem;
  latitudeDeg: number;
  longitudeDeg: number;
  elevationM: number;
  elevationIsDefault: boolean;
  moveMinutes: number;
  moveMinutesIsDefault: boolean;
  reminderLeadMinutes: number;
  addressDigit: number | null;
  waterStage: number;
  waterStageIsDefault: boolean;
  supplyKind: SupplyKind | null;
  supplyFlowLpm: number | null;
  supplyRestMinutes: number | null;
  supplyDrawMinutes: number | null;
  wantsMorningEmail: boolean;
  wantsMoveEmail: boolean;
  taps: TapRow[];
  hoses: HoseResponse[];
  sprinklers: SprinklerResponse[];
  zones: ZoneResponse[];
  positions: PositionRow[];
  hours: YardResponse['hours'];
  rules: WaterRuleResponse[];
  permits: PermitResponse[];
}

const listOf = (columns: string, from: string, order: string) => `COALESCE((SELECT json_agg(json_build_object(${columns}) ORDER BY ${order}) FROM ${from}), '[]'::json)`;

// One statement, so that what a screen shows belongs together and costs one trip.
const yardSql = `
  SELECT y.id, y.name, y.place_name AS "placeName", m.role, y.time_zone AS "timeZone", y.units, y.latitude_deg AS "latitudeDeg", y.longitude_deg AS "longitudeDeg",
    y.elevation_m AS "elevationM", y.elevation_is_default AS "elevationIsDefault", y.move_minutes AS "moveMinutes", y.move_minutes_is_default AS "moveMinutesIsDefault",
    y.reminder_lead_minutes AS "reminderLeadMinutes", y.address_digit AS "addressDigit", y.water_stage AS "waterStage", y.water_stage_is_default AS "waterStageIsDefault",
    y.supply_kind AS "supplyKind", y.supply_flow_lpm AS "supplyFlowLpm", y.supply_rest_minutes AS "supplyRestMinutes", y.supply_draw_minutes AS "supplyDrawMinutes", m.wants_morning_email AS "wantsMorningEmail", m.wants_move_email AS "wantsMoveEmail",
    ${listOf(`'id', t.id, 'name', t.name, 'flowLpm', t.flow_lpm, 'flowIsDefault', t.flow_is_default, 'shutOffTimer', t.shut_off_timer,
      'lastTestedAt', (SELECT max(b.tested_at) FROM bucket_tests b WHERE b.yard_id = t.yard_id AND b.tap_id = t.id)`,
    'taps t WHERE t.yard_id = y.id AND t.archived_at IS NULL', 't.created_at, t.id')} AS taps,
    ${listOf(`'id', h.id, 'name', h.name, 'lengthM', h.length_m, 'boreMm', h.bore_mm`, 'hoses h WHERE h.yard_id = y.id AND h.archived_at IS NULL', 'h.created_at, h.id')} AS hoses,
    ${listOf(`'id', s.id, 'name', s.name, 'kind', s.kind`, 'sprinklers s WHERE s.yard_id = y.id AND s.archived_at IS NULL', 's.created_at, s.id')} AS sprinklers,
    ${listOf(`'id', z.id, 'name', z.name, 'areaM2', z.area_m2, 'sideAM', z.side_a_m, 'sideBM', z.side_b_m, 'grass', z.grass, 'grassIsDefault', z.grass_is_default,
      'soil', z.soil, 'soilIsDefault', z.soil_is_default, 'slopePct', z.slope_pct, 'slopeIsDefault', z.slope_is_default, 'sunHours', z.sun_hours,
      'sunHoursIsDefault', z.sun_hours_is_default, 'sunHoursOn', z.sun_hours_on, 'sunHoursOnIsDefault', z.sun_hours_on_is_default,
      'hasSunDiary', z.horizon_deg IS NOT NULL, 'compaction', z.compaction, 'compactionIsDefault', z.compaction_is_default, 'treeRootShare', z.tree_root_share,
      'treeRootShareIsDefault', z.tree_root_share_is_default, 'coverFraction', z.cover_fraction, 'coverFractionIsDefault', z.cover_fraction_is_default,
      'seededOn', z.seeded_on, 'mulch', z.mulch, 'resting', z.resting, 'priority', z.priority`,
    'zones z WHERE z.yard_id = y.id AND z.archived_at IS NULL', 'z.priority, z.created_at, z.id')} AS zones,
    COALESCE((SELECT json_agg(q ORDER BY q."sortOrder", q.id) FROM (${positionSql}) q), '[]'::json) AS positions,
    ${listOf(`'weekday', w.weekday, 'fromMinutes', w.from_minutes, 'toMinutes', w.to_minutes, 'isDefault', w.is_default`,
    'home_windows w WHERE w.yard_id = y.id', 'w.weekday, w.from_minutes')} AS hours,
    ${listOf(`'id', r.id, 'name', r.name, 'weekdays', r.weekdays, 'dateParity', r.date_parity, 'windows', r.windows, 'seasonFrom', r.season_from, 'seasonTo', r.season_to,
      'weekdaysByDigit', r.weekdays_by_digit, 'attended', r.attended, 'devices', r.devices, 'stage', r.stage, 'exemptSeeded', r.exempt_seeded,
      'source', r.source, 'sourceOn', r.source_on`, 'water_rules r WHERE r.yard_id = y.id', 'r.created_at, r.id')} AS rules,
    ${listOf(`'id', e.id, 'name', e.name, 'zoneIds', e.zone_ids, 'fromOn', e.from_on, 'toOn', e.to_on, 'blackoutMonths', e.blackout_months, 'windows', e.windows,
      'liftsRuleIds', e.lifts_rule_ids, 'source', e.source, 'sourceOn', e.source_on`, 'permits e WHERE e.yard_id = y.id', 'e.from_on, e.created_at, e.id')} AS permits
  FROM yards y JOIN memberships m ON m.yard_id = y.id AND m.user_id = $3
  WHERE y.id = $1`;

/** @returns null when the yard is gone or the person is no member */
export async function readYard(database: Sequelize, yardId: string, userId: string, now: Date): Promise<YardRow | null> {
  const [row] = await database.query<YardRow>(yardSql, { bind: [yardId, now, userId], type: QueryTypes.SELECT });
  return row ?? null;
}

/** Yards of a person, by name. */
export async function readYards(database: Sequelize, userId: string): Promise<YardSummary[]> {
  return database.query<YardSummary>(
    `SELECT y.id, y.name, y.place_name AS "placeName", m.role, y.time_zone AS "timeZone", y.units
     FROM memberships m JOIN yards y ON y.id = m.yard_id WHERE m.user_id = $1 ORDER BY lower(y.name), y.created_at, y.id`,
    { bind: [userId], type: QueryTypes.SELECT },
  );
}
