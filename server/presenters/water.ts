import type { BudgetZoneRow } from '@/server/readModels/readBudget';
import type { WeatherRow } from '@/server/readModels/readWeather';
import type { BudgetResponse, WeatherResponse } from '@/shared/contracts/water';

/** Weather is asked for every morning; older than this it missed one [h]. */
const STALE_AFTER_HOURS = 26;

/** Whether screens say from when the weather is: the service failed last time, or was not asked for longer than a day. */
export function isWeatherStale(answeredAt: Date | null, failed: boolean, now: Date): boolean {
  return failed || answeredAt === null || now.getTime() - answeredAt.getTime() > STALE_AFTER_HOURS * 3_600_000;
}

/** Stored weather of a yard. */
export function presentWeather(row: WeatherRow, now: Date): WeatherResponse {
  return {
    days: (row.days ?? []).map((day) => ({
      on: day.on, isForecast: day.isForecast, tminC: day.tminC, tmaxC: day.tmaxC, windMps: day.windMps, precipitationMm: day.precipitationMm,
      rainProbabilityPct: day.rainProbabilityPct, et0Mm: day.et0Mm, source: day.source,
    })),
    asOf: row.answeredAt?.toISOString() ?? null, source: row.source, sample: row.sample ?? false, stale: isWeatherStale(row.answeredAt, row.failed ?? false, now),
  };
}

/** Stored balance of a yard's zones. */
export function presentBudget(zones: readonly BudgetZoneRow[], today: string): BudgetResponse {
  return {
    today,
    zones: zones.map((zone) => ({
      zoneId: zone.zoneId, name: zone.name,
      days: (zone.days ?? []).map((day) => ({
        on: day.on, isForecast: day.isForecast, et0Mm: day.et0Mm, shadedEt0Mm: day.shadedEt0Mm, cropCoefficient: day.cropCoefficient,
        stressCoefficient: day.stressCoefficient, etcMm: day.etcMm, rainMm: day.rainMm, rainLossMm: day.rainLossMm, effectiveRainMm: day.effectiveRainMm,
        irrigationMm: day.irrigationMm, drainageMm: day.drainageMm, rootGrowthMm: day.rootGrowthMm, observationMm: day.observationMm, evaporationMm: day.evaporationMm, treeUptakeMm: day.treeUptakeMm,
        runoffMm: day.runoffMm, surfaceDepletionMm: day.surfaceDepletionMm, condition: day.condition, depletionFraction: day.depletionFraction, depletionStartMm: day.depletionStartMm,
        depletionEndMm: day.depletionEndMm, totalAvailableMm: day.totalAvailableMm, refillLineMm: day.refillLineMm, rootDepthM: day.rootDepthM,
        rainSource: day.rainSource, assumptions: day.assumptions.map(({ field, method, source }) => ({ field, method, source })),
      })),
    })),
  };
}
