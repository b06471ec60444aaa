import { dailyProgress, FIELD_FACTORS, grassesOf } from '@/scheduling/establishment/thermalClock';
import { GRASSES, type GrassFamily, type GrassId } from '@/scheduling/grass';
import type { CivilDay } from '@/scheduling/units';
import type { SeasonDay } from './seasonDays';

/** What a family of grasses wants of the soil when it is sown. */
export interface SowingNeeds {
  /** Soil at which seed comes up in fair time [°C]. */
  leastSoilC: number;
  /** Soil above which it hangs back or young plants fail [°C]. */
  mostSoilC: number;
  /** Growing days wanted after most is up, before winter or heat [d]. */
  rootingDays: number;
  /** Soil below which roots stand still [°C]. */
  restSoilC: number;
  sources: string[];
}

export const SOWING_NEEDS: Readonly<Record<GrassFamily, SowingNeeds>> = {
  cool: {
    leastSoilC: 12.8, mostSoilC: 25, rootingDays: 42, restSoilC: 5,
    sources: [
      'soil of 55 °F and up: Iowa State and Nebraska extension', 'bluegrass hangs back near 25 °C: Larsen et al.',
      'about six weeks of roots before winter: Kansas State', 'roots at rest below 5 °C, and not in high summer, four weeks to each side of the warmest soil: common practice',
    ],
  },
  warm: {
    leastSoilC: 18.3, mostSoilC: 40, rootingDays: 76, restSoilC: 10,
    sources: [
      'bermuda soil above 65 to 70 °F: seed sellers, weak', 'none at 40 °C and above in the day: Sandlin 2006', '90 days from sowing to full roots: common practice', 'at rest below 10 °C: common practice',
    ],
  },
};

/** An unbroken row of days. */
export interface SeasonWindow {
  fromOn: CivilDay;
  /** Last day of it. */
  untilOn: CivilDay;
  days: number;
  /** False when the row runs into the end of what is known, and may go on. */
  isClosed: boolean;
}

/** Shorter breaks than this do not end a window, shorter windows are chance [d]. */
const BREAK_DAYS = 3;
const LEAST_DAYS = 5;

/** Rows of days on which something holds, small breaks passed over, chance days left out. */
export function windowsWhere(days: readonly SeasonDay[], holds: (index: number) => boolean): SeasonWindow[] {
  const rows: { first: number; last: number }[] = [];
  days.forEach((_, index) => {
    if (!holds(index)) return;
    const row = rows.at(-1);
    if (row && index - row.last <= BREAK_DAYS) row.last = index;
    else rows.push({ first: index, last: index });
  });
  return rows.filter((row) => row.last - row.first + 1 >= LEAST_DAYS).map(({ first, last }) => ({
    fromOn: days[first]?.on ?? '', untilOn: days[last]?.on ?? '', days: last - first + 1, isClosed: last < days.length - 1,
  }));
}

/** Windows in which the soil suits germination of a grass. @param days - consecutive days with soil temperatures */
export function germinationWindows(grass: GrassId, days: readonly SeasonDay[]): SeasonWindow[] {
  const { leastSoilC, mostSoilC } = SOWING_NEEDS[GRASSES[grass].family];
  return windowsWhere(days, (index) => {
    const soilC = days[index]?.soilC ?? Number.NaN;
    return soilC >= leastSoilC && soilC <= mostSoilC;
  });
}

export interface SowingWindow extends SeasonWindow {
  /** What ends it: too cold or too hot later for roots, or the soil leaves the range. */
  season: 'before_winter' | 'before_heat' | 'open';
}

export interface SowingWindows {
  /** Best first: the one before winter for cool-season grass, the longest for warm-season grass. */
  windows: SowingWindow[];
  /** From this day seed may lie until spring: soil under 4.4 °C for good; null for warm-season grass and where it never gets so cold. */
  dormantFromOn: CivilDay | null;
  needs: SowingNeeds;
}

/** Below this the seed sleeps until spring [°C]: 40 °F, Nebraska extension. */
export const DORMANT_SOIL_C = 4.4;
/** A change of season shows when it holds for so long [d]. */
const HOLDS_DAYS = 7;
/** Seed that is not up after so long is not reckoned with [d]. */
const LONGEST_EMERGENCE_DAYS = 120;

/** First index from `from` on at which something begins to hold for a week. */
function firstHeld(days: readonly SeasonDay[], from: number, holds: (day: SeasonDay, index: number) => boolean): number | null {
  let held = 0;
  for (let index = from; index < days.length; index += 1) {
    const day = days[index];
    held = day && holds(day, index) ? held + 1 : 0;
    if (held === HOLDS_DAYS) return index - HOLDS_DAYS + 1;
  }
  return null;
}

/** High summer lies this near the warmest soil of a year, where that is warm at all [d], [°C]. Extension windows begin in mid-August, four weeks after it. */
const HIGH_SUMMER_DAYS = 28;
const HIGH_SUMMER_SOIL_C = 20;
const SEASON_DAYS = 120;

/** Which days lie in high summer; a row that begins or ends on its warmest day does not show that it was the warmest of the year. */
function highSummer(days: readonly SeasonDay[]): boolean[] {
  const found = days.map(() => false);
  days.forEach((day, index) => {
    if (index === 0 || index === days.length - 1 || day.soilC < HIGH_SUMMER_SOIL_C) return;
    for (let other = Math.max(0, index - SEASON_DAYS); other <= Math.min(days.length - 1, index + SEASON_DAYS); other += 1) {
      if ((days[other]?.soilC ?? 0) > day.soilC) return;
    }
    found.fill(true, Math.max(0, index - HIGH_SUMMER_DAYS), index + HIGH_SUMMER_DAYS + 1);
  });
  return found;
}

/** Index of the day on which most of a sowing is up, at the likely pace; null beyond what is known. */
function mostlyUpIndex(grass: GrassId, days: readonly SeasonDay[], sown: number): number | null {
  const grasses = grassesOf(grass);
  const progress = grasses.map(() => 0);
  for (let index = sown; index < Math.min(days.length, sown + LONGEST_EMERGENCE_DAYS); index += 1) {
    if (Math.min(...progress) >= FIELD_FACTORS.likely.mostlyUp) return index;
    grasses.forEach((each, at) => {
      progress[at] = (progress[at] ?? 0) + dailyProgress(each, days[index]?.soilC ?? 0);
    });
  }
  return null;
}

/**
 * Windows for sowing or overseeding by soil temperature: the soil suits germination, the thermal clock brings most of it up, and enough growing days
 * are left before winter and before heat.
 * @param grass - what is sown
 * @param days - consecutive days with soil temperatures, records or a typical year; two years let every window end by itself
 * Sources: those of `SOWING_NEEDS`; thermal clock after Larsen and Bibby 2005, slower in the field.
 */
export function sowingWindows(grass: GrassId, days: readonly SeasonDay[]): SowingWindows {
  const { family } = GRASSES[grass];
  const needs = SOWING_NEEDS[family];
  const isSummer = family === 'cool' ? highSummer(days) : [];
  const isTooHot = (day: SeasonDay, index: number): boolean => family === 'cool' && (day.soilC > needs.mostSoilC || isSummer[index] === true);
  const isAtRest = (day: SeasonDay): boolean => day.soilC < needs.restSoilC;
  const nextEnd = (index: number): { at: number; season: SowingWindow['season'] } => {
    const cold = firstHeld(days, index, isAtRest) ?? Infinity;
    const hot = firstHeld(days, index, isTooHot) ?? Infinity;
    return cold === Infinity && hot === Infinity ? { at: Infinity, season: 'open' } : cold <= hot ? { at: cold, season: 'before_winter' } : { at: hot, season: 'before_heat' };
  };
  // Null where the days end too soon to tell.
  const suits = days.map((day, index): boolean | null => {
    if (day.soilC < needs.leastSoilC || day.soilC > needs.mostSoilC || isTooHot(day, index)) return false;
    const up = mostlyUpIndex(grass, days, index);
    const end = nextEnd(index).at;
    if (up === null || (end === Infinity && days.length - up < needs.rootingDays)) return days.length - index < LONGEST_EMERGENCE_DAYS + needs.rootingDays ? null : false;
    return end - up >= needs.rootingDays;
  });
  const indexOn = new Map(days.map((day, index) => [day.on, index]));
  const windows = windowsWhere(days, (index) => suits[index] === true).map((window) => {
    const last = indexOn.get(window.untilOn) ?? 0;
    return { ...window, isClosed: last < days.length - 1 && suits[last + 1] !== null, season: nextEnd(last).season };
  });
  const order: Record<SowingWindow['season'], number> = { before_winter: 0, open: 1, before_heat: 2 };
  windows.sort((a, b) => (family === 'cool' ? order[a.season] - order[b.season] : b.days - a.days) || a.fromOn.localeCompare(b.fromOn));
  return { windows, dormantFromOn: dormantFromOn(grass, days), needs };
}

/** From which day seed may lie until spring: soil under 4.4 °C for good after the warmest of the days; null for warm-season grass and where it never gets so cold. */
export function dormantFromOn(grass: GrassId, days: readonly SeasonDay[]): CivilDay | null {
  if (GRASSES[grass].family === 'warm') return null;
  const warmest = days.reduce((best, day, index) => (day.soilC > (days[best]?.soilC ?? -Infinity) ? index : best), 0);
  const dormant = firstHeld(days, warmest, (day) => day.soilC < DORMANT_SOIL_C);
  return dormant === null ? null : days[dormant]?.on ?? null;
}
