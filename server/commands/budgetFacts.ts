import { QueryTypes, type Sequelize } from 'sequelize';
import type { SoilObservation } from '@/scheduling/budget';
import type { EstablishmentSchedule, SeenStage } from '@/scheduling/establishment';
import { addDays } from '@/scheduling/units/civilDay';
import type { DailyWeather } from '@/scheduling/weather';
import type { GrassId, SoilCompaction, SoilTexture } from '@/shared/contracts/zones';

/** A zone with where its stored balance stands. */
export interface BudgetZoneFacts {
  id: string;
  name: string;
  areaM2: number;
  grass: GrassId;
  soil: SoilTexture;
  slopePct: number;
  sunHours: number;
  /** Day on which the hours were seen; null lets them hold on every day. */
  sunHoursOn: string | null;
  sunHoursOnIsDefault: boolean;
  /** What hides the sky, from the sun diary; null without one [°]. */
  horizonDeg: number[] | null;
  compaction: SoilCompaction;
  compactionIsDefault: boolean;
  treeRootShare: number;
  coverFraction: number;
  seededOn: string | null;
  resting: boolean;
  priority: number;
  /** First civil day of the zone's record: when it was set up, or its first watering if that was earlier. */
  recordFrom: string;
  storedFrom: string | null;
  /** Last stored day that is over. */
  settledTo: string | null;
  /** Newest establishment schedule, null for none. */
  schedule: EstablishmentSchedule | null;
  /** Stages of the present sowing that somebody saw, oldest first. */
  seenStages: SeenStage[];
  positionIds: string[];
}

/** Zones of a yard that are in use, in the order in which they are served. */
export async function loadBudgetZones(database: Sequelize, yardId: string, timeZone: string): Promise<BudgetZoneFacts[]> {
  return database.query<BudgetZoneFacts>(
    `SELECT z.id, z.name, z.area_m2 AS "areaM2", z.grass, z.soil, z.slope_pct AS "slopePct", z.sun_hours AS "sunHours",
       z.sun_hours_on::text AS "sunHoursOn", z.sun_hours_on_is_default AS "sunHoursOnIsDefault", z.horizon_deg AS "horizonDeg", z.compaction, z.compaction_is_default AS "compactionIsDefault",
       z.tree_root_share AS "treeRootShare", z.cover_fraction AS "coverFraction", z.seeded_on::text AS "seededOn",
       z.resting, z.priority,
       LEAST((z.created_at AT TIME ZONE $2)::date, (SELECT min(s."on") FROM round_sets s WHERE s.yard_id = z.yard_id AND s.zone_id = z.id AND s.applied_mm > 0))::text AS "recordFrom",
       b.stored_from::text AS "storedFrom", b.settled_to::text AS "settledTo",
       (SELECT e.schedule FROM establishment_schedules e WHERE e.yard_id = z.yard_id AND e.zone_id = z.id ORDER BY e.valid_from DESC, e.created_at DESC LIMIT 1) AS schedule,
       COALESCE((SELECT jsonb_agg(jsonb_build_object('stage', g.stage, 'on', g."on") ORDER BY g."on") FROM seen_stages g
         WHERE g.yard_id = z.yard_id AND g.zone_id = z.id AND g."on" >= z.seeded_on), '[]'::jsonb) AS "seenStages",
       ARRAY(SELECT p.id::text FROM positions p WHERE p.yard_id = z.yard_id AND p.zone_id = z.id AND p.archived_at IS NULL ORDER BY p.sort_order, p.id) AS "positionIds"
     FROM zones z
     LEFT JOIN LATERAL (
       SELECT min(d."on") AS stored_from, max(d."on") FILTER (WHERE NOT d.is_forecast) AS settled_to FROM budget_days d WHERE d.yard_id = z.yard_id AND d.zone_id = z.id
     ) b ON true
     WHERE z.yard_id = $1 AND z.archived_at IS NULL ORDER BY z.priority, z.created_at, z.id`,
    { bind: [yardId, timeZone], type: QueryTypes.SELECT },
  );
}

/** Where a zone stood at the end of a stored day. */
export interface StoredState {
  zoneId: string;
  depletionMm: number;
  rootDepthM: number;
  surfaceDepletionMm: number | null;
  patchDepletionMm: Record<string, number>;
  patchSurfaceMm: Record<string, number | null>;
  /** Frost and snow at the end of that day. */
  winter: { isFrosted: boolean; snowMm: number };
}

/** States at the end of the day before each zone's first day to run; a zone without such a day is left out. */
export async function loadStoredStates(database: Sequelize, yardId: string, firstDays: readonly { zoneId: string; fromOn: string }[]): Promise<Map<string, StoredState>> {
  const rows = await database.query<StoredState>(
    `SELECT d.zone_id AS "zoneId", d.depletion_end_mm AS "depletionMm", d.root_depth_m AS "rootDepthM", d.surface_depletion_mm AS "surfaceDepletionMm",
       COALESCE(d.inputs->'patchDepletionMm', '{}'::jsonb) AS "patchDepletionMm", COALESCE(d.inputs->'patchSurfaceMm', '{}'::jsonb) AS "patchSurfaceMm",
       COALESCE(d.inputs->'winter', '{"isFrosted": false, "snowMm": 0}'::jsonb) AS winter
     FROM jsonb_to_recordset($2::jsonb) AS f("zoneId" uuid, "on" date)
     JOIN budget_days d ON d.yard_id = $1 AND d.zone_id = f."zoneId" AND d."on" = f."on"`,
    { bind: [yardId, JSON.stringify(firstDays.map(({ zoneId, fromOn }) => ({ zoneId, on: addDays(fromOn, -1) })))], type: QueryTypes.SELECT },
  );
  return new Map(rows.map((row) => [row.zoneId, row]));
}

/** A stored day of weather, as the reference evapotranspiration takes it, with what only forecasts tell. */
export interface StoredWeatherDay extends DailyWeather {
  isForecast: boolean;
  rainProbabilityPct: number | null;
}

/** Stored weather from a day on, oldest first. */
export async function loadWeather(database: Sequelize, yardId: string, fromOn: string): Promise<StoredWeatherDay[]> {
  return database.query<StoredWeatherDay>(
    `SELECT "on"::text AS "on", is_forecast AS "isForecast", tmin_c AS "tminC", tmax_c AS "tmaxC", tdew_c AS "tdewC", rh_max_pct AS "rhMaxPct", rh_min_pct AS "rhMinPct",
       NULL::float8 AS "rhMeanPct", wind_mps AS "windMps", wind_height_m AS "windHeightM", solar_mj_m2 AS "solarMjM2", NULL::float8 AS "sunshineHours",
       precipitation_mm AS "precipitationMm", rain_probability_pct AS "rainProbabilityPct"
     FROM weather_days WHERE yard_id = $1 AND "on" >= $2 ORDER BY "on"`,
    { bind: [yardId, fromOn], type: QueryTypes.SELECT },
  );
}

/** The yard's own rain gauge by day [mm]. */
export async function loadGauge(database: Sequelize, yardId: string, fromOn: string): Promise<Map<string, number>> {
  const rows = await database.query<{ on: string; depthMm: number }>(
    'SELECT "on"::text AS "on", depth_mm AS "depthMm" FROM rain_entries WHERE yard_id = $1 AND "on" >= $2',
    { bind: [yardId, fromOn], type: QueryTypes.SELECT },
  );
  return new Map(rows.map((row) => [row.on, row.depthMm]));
}

/** What people found in the ground, from a day on, by zone and day. */
export async function loadObservations(database: Sequelize, yardId: string, fromOn: string): Promise<Map<string, SoilObservation>> {
  const rows = await database.query<{ zoneId: string; on: string } & ({ kind: 'screwdriver'; feel: 'easy' | 'firm' | 'hard' } | { kind: 'probe'; waterContent: number })>(
    `SELECT zone_id AS "zoneId", "on"::text AS "on", kind, feel, water_content AS "waterContent" FROM observations WHERE yard_id = $1 AND "on" >= $2`,
    { bind: [yardId, fromOn], type: QueryTypes.SELECT },
  );
  return new Map(rows.map((row) => [observationKey(row.zoneId, row.on), row.kind === 'probe' ? { kind: row.kind, waterContent: row.waterContent } : { kind: row.kind, feel: row.feel }]));
}

/** Names a zone's day. */
export const observationKey = (zoneId: string, on: string): string => `${zoneId} ${on}`;

/** What the sets of one position laid down on one day. */
export interface AppliedWater {
  zoneId: string;
  positionId: string;
  on: string;
  grossMm: number;
  netMm: number;
  zoneShare: number;
}

/** Water that was really applied, from a day on, by position and day. */
export async function loadApplied(database: Sequelize, yardId: string, fromOn: string): Promise<AppliedWater[]> {
  return database.query<AppliedWater>(
    `SELECT zone_id AS "zoneId", position_id AS "positionId", "on"::text AS "on", sum(applied_mm) AS "grossMm", sum(applied_mm / run_time_multiplier) AS "netMm",
       max(zone_share) AS "zoneShare"
     FROM round_sets WHERE yard_id = $1 AND "on" >= $2 AND applied_mm > 0 GROUP BY zone_id, position_id, "on", zone_share`,
    { bind: [yardId, fromOn], type: QueryTypes.SELECT },
  );
}
