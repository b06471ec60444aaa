import { civilDaysFrom, type CivilDay } from '@/scheduling/units';
import type { DailyWeather } from './dailyWeather';

/** A day of which nothing is known. */
export function unknownWeather(on: CivilDay): DailyWeather {
  return {
    on, tminC: null, tmaxC: null, tdewC: null, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: null, windHeightM: null, solarMjM2: null,
    sunshineHours: null, precipitationMm: null,
  };
}

/**
 * Puts stored days into an unbroken row, with unknown weather where a day is missing.
 * @param from - first day
 * @param until - the day after the last
 */
export function continuousDays(days: readonly DailyWeather[], from: CivilDay, until: CivilDay): DailyWeather[] {
  const byDay = new Map(days.map((day) => [day.on, day]));
  return civilDaysFrom(from, until).map((on) => byDay.get(on) ?? unknownWeather(on));
}

/** Temperatures of a day, with whether they were taken from other days. */
export interface DayTemperatures {
  tminC: number;
  tmaxC: number;
  /** True when the day's own are not known. */
  carried: boolean;
}

const CARRY_DAYS = 7;

/**
 * Temperatures for every day: its own, else the mean of the known days among the seven before, else of the seven after, else of the nearest known day.
 * @returns one entry for each day; null when no day is known at all
 * Source: common practice (persistence)
 */
export function temperaturesOfDays(days: readonly DailyWeather[]): DayTemperatures[] | null {
  const known = days.flatMap((day, index) => (day.tminC === null || day.tmaxC === null ? [] : [{ index, tminC: day.tminC, tmaxC: day.tmaxC }]));
  if (known.length === 0) return null;
  return days.map((day, index) => {
    if (day.tminC !== null && day.tmaxC !== null) return { tminC: day.tminC, tmaxC: day.tmaxC, carried: false };
    const before = known.filter((other) => other.index < index && other.index >= index - CARRY_DAYS);
    const after = known.filter((other) => other.index > index && other.index <= index + CARRY_DAYS);
    const nearest = known.reduce((best, other) => (Math.abs(other.index - index) < Math.abs(best.index - index) ? other : best));
    const used = before.length > 0 ? before : after.length > 0 ? after : [nearest];
    const mean = (pick: (one: (typeof known)[number]) => number) => used.reduce((sum, one) => sum + pick(one), 0) / used.length;
    return { tminC: mean((one) => one.tminC), tmaxC: mean((one) => one.tmaxC), carried: true };
  });
}
