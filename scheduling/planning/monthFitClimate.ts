import { addDays, civilDaysFrom, dayOfYear } from '@/scheduling/units/civilDay';
import { PhysicsError, requireRange } from '@/scheduling/units/physicsError';
import { dailyReferenceEts, hargreavesMm, solarDay, type DailyWeather, type WeatherSite } from '@/scheduling/weather';
import type { FitDay } from './monthFitTypes';

/** How much warmer than its mean the warmest day of the year is, by degree of latitude [°C/°]. A default, from memory: about 10 °C at 45°. */
const SEASON_SWING_C_PER_DEG = 0.22;
/** Warmest day of the year in the north and in the south. From memory: a month after the longest day. */
const WARMEST_DAY = { north: 205, south: 22 } as const;
/** Widest range between night and day that is taken from few days [°C]. */
const LEAST_RANGE_C = 2;

/** Climate of recorded days; a day without temperatures is left out. */
export function recordedClimate(site: WeatherSite, days: readonly DailyWeather[]): FitDay[] {
  const reference = dailyReferenceEts(site, days);
  return days.flatMap((day, index): FitDay[] => {
    const et0 = reference[index];
    if (!et0 || et0.method === null || day.tminC === null || day.tmaxC === null) return [];
    return [{ on: day.on, et0Mm: et0.et0Mm, rainMm: day.precipitationMm ?? 0, tminC: day.tminC, tmaxC: day.tmaxC, isEstimated: false }];
  });
}

/** Height of the season on a day, −1 at its coldest to 1 at its warmest. */
function seasonHeight(latitudeDeg: number, on: string): number {
  const warmest = latitudeDeg >= 0 ? WARMEST_DAY.north : WARMEST_DAY.south;
  return Math.cos((2 * Math.PI * (dayOfYear(on) - warmest)) / 365.25);
}

/**
 * A year from a day on by what few days tell: recorded days as they are, all others by Hargreaves with the usual swing of the season around their mean,
 * and without rain.
 * @param fromOn - first day of the year
 * @param known - recorded days, at least one; those of other years stand for their day of the year
 * @throws PhysicsError when no day is known
 * Source: FAO-56 (52) for ET0 from temperatures alone; the swing of the season is a default.
 */
export function estimatedYear(site: WeatherSite, fromOn: string, known: readonly FitDay[]): FitDay[] {
  requireRange('latitudeDeg', site.latitudeDeg, -66.5, 66.5);
  if (known.length === 0) throw new PhysicsError('known', 0, 'must hold at least one day');
  const mean = (pick: (day: FitDay) => number) => known.reduce((sum, day) => sum + pick(day), 0) / known.length;
  const swingC = SEASON_SWING_C_PER_DEG * Math.abs(site.latitudeDeg);
  const levelC = mean((day) => (day.tminC + day.tmaxC) / 2 - swingC * seasonHeight(site.latitudeDeg, day.on));
  const halfRangeC = Math.max(LEAST_RANGE_C, mean((day) => day.tmaxC - day.tminC)) / 2;
  const byDay = new Map(known.map((day) => [day.on.slice(5), day]));
  return civilDaysFrom(fromOn, addDays(fromOn, 365)).map((on): FitDay => {
    const told = byDay.get(on.slice(5));
    if (told) return { ...told, on };
    const meanC = levelC + swingC * seasonHeight(site.latitudeDeg, on);
    const { extraterrestrialMjM2 } = solarDay(site.latitudeDeg, dayOfYear(on));
    return {
      on, rainMm: 0, tminC: meanC - halfRangeC, tmaxC: meanC + halfRangeC, isEstimated: true,
      et0Mm: Math.max(0, hargreavesMm(meanC - halfRangeC, meanC + halfRangeC, meanC, extraterrestrialMjM2)),
    };
  });
}
