import { effectiveRain } from '@/scheduling/budget/effectiveRain';
import { sowingOutlook } from '@/scheduling/establishment/dosesForDay';
import { addDays, civilDayParts, daysBetween } from '@/scheduling/units/civilDay';
import { soilTemperaturesC } from '@/scheduling/weather/soilTemperature';
import type { FitDay, FitSowing, FitZone } from './monthFitTypes';
import { FROST_LIMIT_C } from './temperatureCurve';

/** Longest that a sowing is followed [days]: from the slowest seed in cool soil to the end of the taper. */
const SOWING_DAYS_AT_MOST = 150;

/** Water that a zone wants in one month of one year. */
export interface MonthWater {
  /** Net depth on the established grass [mm]. */
  netMm: number;
  /** Sets on each of its positions [count]. */
  sets: number;
}

/** Doses of a sowing in one month. */
export interface MonthDoses {
  netMm: number;
  doses: number;
}

/** Month of a day, 0 for January. */
export function monthOf(on: string): number {
  return civilDayParts(on).month - 1;
}

/** Months of the climate in order, 'YYYY-MM'. */
export function climateMonths(climate: readonly FitDay[]): string[] {
  return [...new Set(climate.map((day) => day.on.slice(0, 7)))];
}

/**
 * Water of an established zone in each month of the climate: it is filled whenever its depletion passes the refill line, on the first day without frost,
 * by the balance of the budget without its finer losses.
 * @returns by 'YYYY-MM'
 */
export function zoneWaterByMonth(zone: FitZone, climate: readonly FitDay[]): Map<string, MonthWater> {
  const months = new Map<string, MonthWater>(climateMonths(climate).map((month) => [month, { netMm: 0, sets: 0 }]));
  if (zone.resting) return months;
  let depletionMm = zone.refillLineMm / 2;
  for (const day of climate) {
    const { effectiveRainMm } = effectiveRain(day.rainMm, day.et0Mm);
    depletionMm = Math.min(zone.totalAvailableMm, Math.max(0, depletionMm + (zone.demandShareByMonth[monthOf(day.on)] ?? 0) * day.et0Mm - effectiveRainMm));
    const month = months.get(day.on.slice(0, 7));
    if (month && depletionMm > zone.refillLineMm && day.tminC > FROST_LIMIT_C) {
      month.netMm += depletionMm;
      month.sets += 1;
      depletionMm = 0;
    }
  }
  return months;
}

/** Soil temperature at seed depth of each day of the year, mean of the climate's years, by 'MM-DD' [°C]. */
export function soilByDayOfYear(climate: readonly FitDay[]): Map<string, number> {
  const soil = soilTemperaturesC({ airMeansC: climate.map((day) => (day.tminC + day.tmaxC) / 2) });
  const sums = new Map<string, { sum: number; count: number }>();
  climate.forEach((day, index) => {
    const key = day.on.slice(5);
    const before = sums.get(key) ?? { sum: 0, count: 0 };
    sums.set(key, { sum: before.sum + (soil[index] ?? 0), count: before.count + 1 });
  });
  return new Map([...sums].map(([key, { sum, count }]) => [key, sum / count]));
}

/** A sowing's doses from a day on. */
export interface SowingWater {
  /** By 'YYYY-MM' of the coming year. */
  dosesByMonth: Map<string, MonthDoses>;
  /** First day on which the zone is an established lawn; null when that lies beyond what is followed. */
  establishedOn: string | null;
}

/** Doses that a sowing wants from a day on, by the usual soil temperatures. */
export function sowingWater(sowing: FitSowing, startOn: string, soil: ReadonlyMap<string, number>): SowingWater {
  const fromOn = sowing.sownOn > startOn ? sowing.sownOn : startOn;
  const usualC = (on: string): number => soil.get(on.slice(5)) ?? soil.get(addDays(on, -1).slice(5)) ?? 0;
  const followed = Math.max(0, daysBetween(sowing.sownOn, fromOn)) + SOWING_DAYS_AT_MOST;
  const outlook = sowingOutlook({
    sownOn: sowing.sownOn, grass: sowing.grass, schedule: sowing.schedule, startOn: fromOn,
    dailySoilTempsC: Array.from({ length: followed }, (_, index) => usualC(addDays(sowing.sownOn, index))),
    days: Array.from({ length: SOWING_DAYS_AT_MOST }, () => ({ sunriseMinutes: null, sunsetMinutes: null })),
  });
  const dosesByMonth = new Map<string, MonthDoses>();
  outlook.dosesByDay.forEach((doses, index) => {
    const month = addDays(fromOn, index).slice(0, 7);
    const before = dosesByMonth.get(month) ?? { netMm: 0, doses: 0 };
    dosesByMonth.set(month, { netMm: before.netMm + doses.reduce((sum, dose) => sum + dose.depthMm, 0), doses: before.doses + doses.length });
  });
  const established = outlook.stageByDay.indexOf('established');
  return { dosesByMonth, establishedOn: established < 0 ? null : addDays(fromOn, established) };
}
