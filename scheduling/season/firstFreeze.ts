import { addDays, civilDayParts, daysBetween, requireRange, type CivilDay } from '@/scheduling/units';
import type { DailyWeather } from '@/scheduling/weather';
import { coolingSeasonStartOn } from './seasonDays';

/** Freezing [°C]. */
export const FREEZE_C = 0;
/** A hose left on a frost-free tap keeps its tube full, and it bursts: unhook so many days before the earliest freeze [d]. Common practice. */
export const HOSE_OFF_DAYS_BEFORE = 7;

/** When the first freeze of a season is to be expected. */
export interface FirstFreeze {
  /** One season in ten froze before this day; with fewer than ten on record the earliest. */
  earlyOn: CivilDay;
  /** Half of the seasons froze before this day. */
  likelyOn: CivilDay;
  /** Nine in ten; with fewer than ten the latest. */
  lateOn: CivilDay;
  /** Unhook, drain and coil the hose by this day. */
  hoseOffBy: CivilDay;
  /** Seasons that froze, and those on record without a freeze. */
  seasons: number;
  frostFreeSeasons: number;
  thresholdC: number;
  source: string;
}

/** Value at a part of the way through sorted numbers, straight between two of them. */
function quantile(sorted: readonly number[], part: number): number {
  const place = part * (sorted.length - 1);
  const below = Math.floor(place);
  const low = sorted[below] ?? 0;
  return low + (place - below) * ((sorted[below + 1] ?? low) - low);
}

/** Records need not be whole, but a hole longer than this before the first freeze could hide an earlier one [d]. */
const LONGEST_HOLE_DAYS = 7;

/** Days from the start of each cooling season on record to its first freeze; null for a whole season without one. */
function freezesBySeason(records: readonly DailyWeather[], latitudeDeg: number, thresholdC: number): (number | null)[] {
  const days = records.filter((day) => day.tminC !== null).map((day) => ({ on: day.on, tminC: day.tminC ?? 0 })).sort((a, b) => a.on.localeCompare(b.on));
  const years = [...new Set(days.map((day) => civilDayParts(day.on).year))];
  return years.flatMap((year): (number | null)[] => {
    const start = coolingSeasonStartOn(latitudeDeg, year);
    const end = coolingSeasonStartOn(latitudeDeg, year + 1);
    let before = addDays(start, -1);
    for (const { on, tminC } of days) {
      if (on < start || on >= end) continue;
      if (daysBetween(before, on) > LONGEST_HOLE_DAYS) return [];
      if (tminC <= thresholdC) return [daysBetween(start, on)];
      before = on;
    }
    return daysBetween(before, end) > LONGEST_HOLE_DAYS ? [] : [null];
  });
}

/**
 * First freeze of a season, from the daily records of past ones.
 * @param records - daily records, in any order; seasons with a hole before their first freeze do not count
 * @param latitudeDeg - north positive; a season begins on July 1 in the north and January 1 in the south
 * @param year - year in which the season asked for begins
 * @param thresholdC - 0 °C when left out
 * @returns null when no season on record froze
 * @throws PhysicsError for a place off the globe
 * Source: order statistics of the records (median, tenth and nine-tenth part).
 */
export function firstFreeze(records: readonly DailyWeather[], latitudeDeg: number, year: number, thresholdC: number = FREEZE_C): FirstFreeze | null {
  requireRange('thresholdC', thresholdC, -30, 10);
  const found = freezesBySeason(records, latitudeDeg, thresholdC);
  const froze = found.filter((days): days is number => days !== null).sort((a, b) => a - b);
  if (froze.length === 0) return null;
  const start = coolingSeasonStartOn(latitudeDeg, year);
  const dated = (part: number): CivilDay => addDays(start, Math.round(quantile(froze, part)));
  const few = froze.length < 10;
  const earlyOn = few ? addDays(start, froze[0] ?? 0) : dated(0.1);
  return {
    earlyOn, likelyOn: dated(0.5), lateOn: few ? addDays(start, froze.at(-1) ?? 0) : dated(0.9), hoseOffBy: addDays(earlyOn, -HOSE_OFF_DAYS_BEFORE),
    seasons: froze.length, frostFreeSeasons: found.length - froze.length, thresholdC,
    source: `daily records of ${froze.length} ${froze.length === 1 ? 'season' : 'seasons'} at this place`,
  };
}

/** First day of a forecast that freezes; null when none does. @param days - in order */
export function nextFreezeOn(days: readonly Pick<DailyWeather, 'on' | 'tminC'>[], thresholdC: number = FREEZE_C): CivilDay | null {
  return days.find((day) => day.tminC !== null && day.tminC <= thresholdC)?.on ?? null;
}
