import { QueryTypes } from 'sequelize';
import type { AppContext } from '@/server/context';
import type { ZoneRun } from './recomputeBudget';
import type { YardWeather } from './yardWeather';

/** Columns of a stored day by the name that its value has in the row that is sent. */
const columns = {
  is_forecast: ['isForecast', 'boolean'], et0_mm: ['et0Mm', 'float8'], shaded_et0_mm: ['shadedEt0Mm', 'float8'], crop_coefficient: ['cropCoefficient', 'float8'],
  stress_coefficient: ['stressCoefficient', 'float8'], etc_mm: ['etcMm', 'float8'], evaporation_mm: ['evaporationMm', 'float8'], tree_uptake_mm: ['treeUptakeMm', 'float8'],
  rain_mm: ['rainMm', 'float8'], rain_loss_mm: ['rainLossMm', 'float8'], runoff_mm: ['runoffMm', 'float8'], effective_rain_mm: ['effectiveRainMm', 'float8'],
  irrigation_mm: ['irrigationMm', 'float8'], drainage_mm: ['drainageMm', 'float8'], root_growth_mm: ['rootGrowthMm', 'float8'], observation_mm: ['observationMm', 'float8'],
  depletion_start_mm: ['depletionStartMm', 'float8'], depletion_end_mm: ['depletionEndMm', 'float8'], total_available_mm: ['totalAvailableMm', 'float8'],
  refill_line_mm: ['refillLineMm', 'float8'], root_depth_m: ['rootDepthM', 'float8'], surface_depletion_mm: ['surfaceDepletionMm', 'float8'], rain_source: ['rainSource', 'text'], inputs: ['inputs', 'jsonb'],
} as const;
const names = Object.keys(columns);
const fields = Object.values(columns);

const storeSql = `INSERT INTO budget_days (yard_id, zone_id, "on", ${names.join(', ')}, computed_at)
  SELECT $1, "zoneId", "on", ${fields.map(([field]) => `"${field}"`).join(', ')}, $3
  FROM jsonb_to_recordset($2::jsonb) AS r("zoneId" uuid, "on" date, ${fields.map(([field, type]) => `"${field}" ${type}`).join(', ')})
  ON CONFLICT (yard_id, zone_id, "on") DO UPDATE SET ${[...names, 'computed_at'].map((name) => `${name} = excluded.${name}`).join(', ')}`;

type StoredField = (typeof fields)[number][0];

/** Writes the days that were run, in one statement; the database checks that each of them closes. */
export async function storeBudget(context: AppContext, yardId: string, runs: readonly ZoneRun[], weather: YardWeather, today: string): Promise<void> {
  const weatherByDay = new Map(weather.days.map((day) => [day.on, day]));
  const rows = runs.flatMap(({ facts, days, winter }) => days.map((day, index): Record<StoredField | 'zoneId' | 'on', unknown> => {
    const told = weatherByDay.get(day.on);
    const left = winter[index];
    return {
      zoneId: facts.id, on: day.on, isForecast: day.on >= today, et0Mm: day.et0Mm, shadedEt0Mm: day.shadedEt0Mm, cropCoefficient: day.cropCoefficient,
      stressCoefficient: day.stressCoefficient, etcMm: day.etcMm, evaporationMm: day.evaporationMm, treeUptakeMm: day.treeUptakeMm, rainMm: day.rainMm, rainLossMm: day.rainLossMm,
      runoffMm: day.runoffMm, effectiveRainMm: day.effectiveRainMm, irrigationMm: day.irrigationMm, drainageMm: day.drainageMm, rootGrowthMm: day.rootGrowthMm, observationMm: day.observationMm,
      depletionStartMm: day.depletionStartMm, depletionEndMm: day.depletionEndMm, totalAvailableMm: day.totalAvailableMm, refillLineMm: day.refillLineMm, rootDepthM: day.rootDepthM,
      surfaceDepletionMm: day.surfaceDepletionMm, rainSource: told?.rainSource ?? 'none',
      inputs: {
        weather: told?.weather ?? null, gaugeMm: told?.gaugeMm ?? null, sunHours: facts.sunHours, stage: day.stage, condition: day.condition, depletionFraction: day.depletionFraction,
        potentialEtMm: day.potentialEtMm, grossIrrigationMm: day.grossIrrigationMm, unevenLossMm: day.unevenLossMm, patchDepletionMm: day.patchDepletionMm, patchSurfaceMm: day.patchSurfaceMm,
        winter: { isFrosted: left?.isFrosted ?? false, snowMm: left?.snowMm ?? 0 }, assumptions: day.assumptions,
      },
    };
  }));
  if (rows.length > 0) {
    await context.database.query(storeSql, { bind: [yardId, JSON.stringify(rows), context.clock.now()], type: QueryTypes.INSERT });
  }
}
