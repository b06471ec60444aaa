import { QueryTypes, type Sequelize } from 'sequelize';
import type { ExportResponse } from '@/shared/contracts/accounts';

type Rows = Record<string, unknown>[];

/** Columns of each table of a yard that are its people's data; hashes of tokens and the machinery of claims are not. */
const yardTables: Record<string, string> = {
  yards: 'id, name, place_name, latitude_deg, longitude_deg, elevation_m, elevation_is_default, time_zone, units, move_minutes, move_minutes_is_default, reminder_lead_minutes, address_digit, water_stage, water_stage_is_default, supply_kind, supply_flow_lpm, supply_rest_minutes, supply_draw_minutes, created_at, updated_at',
  home_windows: 'weekday, from_minutes, to_minutes, is_default',
  water_rules: 'id, name, weekdays, date_parity, windows, weekdays_by_digit, attended, devices, stage, exempt_seeded, season_from, season_to, source, source_on, created_at, updated_at',
  permits: 'name, zone_ids, from_on, to_on, blackout_months, windows, lifts_rule_ids, source, source_on, created_at, updated_at',
  plan_wishes: 'priority, preferred_windows, month_cap_litres, updated_at',
  day_changes: '"on", day_off, extra_windows',
  set_locks: 'id, position_id, "on", start_minutes, minutes, reason, locked_by, created_at',
  taps: 'id, name, flow_lpm, flow_is_default, shut_off_timer, archived_at, created_at, updated_at',
  hoses: 'id, name, length_m, bore_mm, archived_at, created_at, updated_at',
  sprinklers: 'id, name, kind, archived_at, created_at, updated_at',
  zones: 'id, name, area_m2, side_a_m, side_b_m, grass, grass_is_default, soil, soil_is_default, slope_pct, slope_is_default, sun_hours, sun_hours_is_default, sun_hours_on, sun_hours_on_is_default, compaction, compaction_is_default, tree_root_share, tree_root_share_is_default, cover_fraction, cover_fraction_is_default, horizon_deg, seeded_on, mulch, resting, priority, archived_at, created_at, updated_at',
  positions: 'id, zone_id, tap_id, hose_id, sprinkler_id, name, mark, wetted_area_m2, wetted_area_is_default, height_m, weekly_limit_over, weekly_limit_mm, weekly_limit_source, alternate_sets, sort_order, archived_at, created_at, updated_at',
  bucket_tests: 'id, tap_id, hose_id, sprinkler_id, volume_l, seconds, flow_lpm, flow_low_lpm, flow_high_lpm, tested_at, tested_by',
  catch_tests: 'id, position_id, layout, reading, readings, minutes, wind, note, rate_mm_per_hour, low_quarter_uniformity, run_time_multiplier, result, hose_id, sprinkler_id, tested_at, tested_by',
  rain_entries: '"on", depth_mm, entered_by, updated_at',
  observations: 'zone_id, "on", kind, feel, water_content, seen_by, updated_at',
  seen_stages: 'zone_id, "on", stage, seen_by, updated_at',
  sun_diary_pages: 'zone_id, "on", sunny_hours, noted_by, updated_at',
  weather_days: '"on", is_forecast, tmin_c, tmax_c, tdew_c, rh_max_pct, rh_min_pct, wind_mps, wind_height_m, solar_mj_m2, precipitation_mm, rain_probability_pct, source, fetched_at',
  budget_days: 'zone_id, "on", is_forecast, et0_mm, etc_mm, rain_mm, effective_rain_mm, irrigation_mm, drainage_mm, root_growth_mm, observation_mm, depletion_start_mm, depletion_end_mm, total_available_mm, refill_line_mm, rain_source',
  establishment_schedules: 'id, zone_id, schedule, is_default, proposal_id, valid_from',
  proposals: 'id, zone_id, author_id, reason, schedule_before, schedule, status, answer, decided_by, decided_at, created_at',
  rounds: 'id, "on", round_index, status, started_by, started_at, ended_at, water_off_by, water_off_at',
  round_sets: 'id, round_id, zone_id, position_id, kind, "on", round_index, sort_order, planned_start_at, planned_minutes, added_minutes, status, skip_cause, started_at, ended_at, minutes_run, applied_mm, rate_mm_per_hour, half_way',
  invitations: 'id, email, role, invited_by, created_at, expires_at, accepted_at, withdrawn_at',
  events: 'id, user_id, verb, subject_kind, subject_id, data, at',
};

/** What the person did, in whatever yard, by the column that names them. */
const doneByPerson: Record<string, { columns: string; person: string }> = {
  events: { columns: 'id, yard_id, verb, subject_kind, subject_id, data, at', person: 'user_id' },
  bucket_tests: { columns: 'id, yard_id, tap_id, volume_l, seconds, flow_lpm, tested_at', person: 'tested_by' },
  catch_tests: { columns: 'id, yard_id, position_id, layout, reading, readings, minutes, wind, note, tested_at', person: 'tested_by' },
  rain_entries: { columns: 'yard_id, "on", depth_mm, updated_at', person: 'entered_by' },
  observations: { columns: 'yard_id, zone_id, "on", kind, feel, water_content, updated_at', person: 'seen_by' },
  seen_stages: { columns: 'yard_id, zone_id, "on", stage, updated_at', person: 'seen_by' },
  sun_diary_pages: { columns: 'yard_id, zone_id, "on", sunny_hours, updated_at', person: 'noted_by' },
  proposals: { columns: 'id, yard_id, zone_id, reason, schedule_before, schedule, status, answer, decided_at, created_at', person: 'author_id' },
  set_locks: { columns: 'yard_id, position_id, "on", start_minutes, minutes, reason, created_at', person: 'locked_by' },
  rounds: { columns: 'id, yard_id, "on", round_index, status, started_at, ended_at', person: 'started_by' },
};

/** Everything about one person but the account and its sessions: memberships, the yards they own in full, and what they did in the yards of others. */
export async function readAccountExport(database: Sequelize, userId: string): Promise<Pick<ExportResponse, 'memberships' | 'ownedYards' | 'doneElsewhere'>> {
  const memberships = await database.query<Omit<ExportResponse['memberships'][number], 'since'> & { since: Date }>(
    `SELECT m.yard_id AS "yardId", y.name AS "yardName", m.role, m.created_at AS since, m.wants_morning_email AS "wantsMorningEmail", m.wants_move_email AS "wantsMoveEmail"
     FROM memberships m JOIN yards y ON y.id = m.yard_id WHERE m.user_id = $1 ORDER BY m.created_at, m.yard_id`,
    { bind: [userId], type: QueryTypes.SELECT },
  );
  const owned = memberships.filter((membership) => membership.role === 'owner').map((membership) => membership.yardId);
  const tablesByYard = new Map<string, Record<string, Rows>>(owned.map((id) => [id, {}]));
  for (const [table, columns] of Object.entries(yardTables)) {
    const key = table === 'yards' ? 'id' : 'yard_id';
    const rows = await database.query<{ yard: string; row: Record<string, unknown> }>(
      `SELECT t.${key} AS yard, (SELECT to_jsonb(c) FROM (SELECT ${columns.split(', ').map((column) => `t.${column}`).join(', ')}) c) AS row FROM ${table} t WHERE t.${key} = ANY($1::uuid[])`,
      { bind: [owned], type: QueryTypes.SELECT },
    );
    for (const [yardId, tables] of tablesByYard) {
      tables[table] = rows.filter((row) => row.yard === yardId).map((row) => row.row);
    }
  }
  const doneElsewhere: Record<string, Rows> = {};
  for (const [table, { columns, person }] of Object.entries(doneByPerson)) {
    doneElsewhere[table] = (await database.query<{ row: Record<string, unknown> }>(
      `SELECT to_jsonb(t) AS row FROM (SELECT ${columns} FROM ${table} WHERE ${person} = $1 AND NOT (yard_id = ANY($2::uuid[]))) t`,
      { bind: [userId, owned], type: QueryTypes.SELECT },
    )).map(({ row }) => row);
  }
  return {
    memberships: memberships.map((membership) => ({ ...membership, since: membership.since.toISOString() })),
    ownedYards: owned.map((id) => ({ id, name: memberships.find((membership) => membership.yardId === id)?.yardName ?? '', tables: tablesByYard.get(id) ?? {} })),
    doneElsewhere,
  };
}
