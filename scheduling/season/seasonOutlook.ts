import { GRASSES, type GrassId } from '@/scheduling/grass';
import { addDays, civilDayParts, civilDaysFrom, type CivilDay } from '@/scheduling/units';
import type { DailyWeather } from '@/scheduling/weather';
import { unknownWeather } from '@/scheduling/weather/continuousDays';
import { firstFreeze, nextFreezeOn, type FirstFreeze } from './firstFreeze';
import { preventerWindow, type PreventerWindow } from './preventerWindow';
import { coolingSeasonStartOn, seasonDays, typicalDays, warmingSeasonStartOn, type SeasonDay } from './seasonDays';
import { dormantFromOn, germinationWindows, sowingWindows, type SeasonWindow, type SowingNeeds, type SowingWindow } from './sowingWindows';

/** Days before today and after it that a season looks at: a window that is open now shows when it opened, and next year's windows end by themselves. */
const DAYS_BACK = 220;
const DAYS_AHEAD = 550;
/** Days within which a window is told; what lies farther comes round again. */
const SHOWN_DAYS = 400;

/** Input of `seasonOutlook`. */
export interface SeasonQuestion {
  /** North positive [°]. */
  latitudeDeg: number;
  today: CivilDay;
  /** Daily records of past whole years, in any order. */
  records: readonly DailyWeather[];
  /** Days of this year that are known, measured or forecast; they take the place of the usual course. */
  known: readonly DailyWeather[];
  grasses: readonly GrassId[];
}

/** When to sow one grass. */
export interface GrassSeason {
  grass: GrassId;
  /** Times from now on in which the soil suits its germination. */
  germination: SeasonWindow[];
  /** Times in which a sowing comes up and roots before winter or heat: for cool-season grass those before winter first, for warm-season grass the next first. */
  sowing: SowingWindow[];
  /** From this day seed may lie until spring; null where it never gets so cold. */
  dormantFromOn: CivilDay | null;
  needs: SowingNeeds;
}

/** What the season holds for a place. */
export interface SeasonOutlook {
  today: CivilDay;
  /** Soil at 10 cm today [°C], and whether today's own weather told it. */
  soilC: number;
  soilIsKnown: boolean;
  grasses: GrassSeason[];
  /** The coming window, or the one that is open. */
  preventer: PreventerWindow;
  /** The coming first freeze by records; null where no season on record froze. */
  freeze: FirstFreeze | null;
  /** First day of the forecast that freezes. */
  nextFreezeOn: CivilDay | null;
}

/** This year as far as it is known, in the usual course before and after. */
function blended({ records, known, today }: SeasonQuestion): { days: SeasonDay[]; knownOn: ReadonlySet<string> } | null {
  const from = addDays(today, -DAYS_BACK);
  const usual = typicalDays(records, from, addDays(today, DAYS_AHEAD));
  if (usual === null) return null;
  const told = new Map(known.filter((day) => day.tminC !== null && day.tmaxC !== null).map((day) => [day.on, day]));
  const days = seasonDays(usual.map((day): DailyWeather => told.get(day.on) ?? { ...unknownWeather(day.on), tminC: day.tminC, tmaxC: day.tmaxC }));
  return { days, knownOn: new Set(told.keys()) };
}

/** Seed that sleeps since longer ago will soon wake [d]. */
const ASLEEP_DAYS = 60;

/** The coming day from which seed sleeps, or a late one of this winter; each cooling half-year by itself. */
function comingDormant(grass: GrassId, days: readonly SeasonDay[], latitudeDeg: number, today: CivilDay): CivilDay | null {
  const { year } = civilDayParts(today);
  for (const each of [year - 1, year, year + 1]) {
    const [from, until] = [coolingSeasonStartOn(latitudeDeg, each), coolingSeasonStartOn(latitudeDeg, each + 1)];
    const on = dormantFromOn(grass, days.filter((day) => day.on >= from && day.on < until));
    if (on !== null && on >= addDays(today, -ASLEEP_DAYS)) return on;
  }
  return null;
}

function grassSeason(grass: GrassId, days: readonly SeasonDay[], latitudeDeg: number, today: CivilDay): GrassSeason {
  const isShown = ({ fromOn, untilOn }: SeasonWindow) => untilOn >= today && fromOn <= addDays(today, SHOWN_DAYS);
  const { windows, needs } = sowingWindows(grass, days);
  // Which of several years has the longest window says nothing: the next one comes first.
  const inTurn = GRASSES[grass].family === 'warm' ? [...windows].sort((a, b) => a.fromOn.localeCompare(b.fromOn)) : windows;
  return { grass, germination: germinationWindows(grass, days).filter(isShown), sowing: inTurn.filter(isShown), dormantFromOn: comingDormant(grass, days, latitudeDeg, today), needs };
}

/** Half-years that warm, from the one before today on: the first that is not over yet. */
function comingPreventer(days: readonly SeasonDay[], latitudeDeg: number, today: CivilDay): PreventerWindow {
  const { year } = civilDayParts(today);
  const years = [year - 1, year, year + 1].filter((each) => addDays(warmingSeasonStartOn(latitudeDeg, each), 183) > today);
  const found = years.map((each) => preventerWindow(days, latitudeDeg, each));
  const isOver = ({ closesOn, isNeverCold }: PreventerWindow) => !isNeverCold && closesOn !== null && closesOn < today;
  return found.find((window) => !isOver(window)) ?? found[found.length - 1] ?? preventerWindow(days, latitudeDeg, year + 1);
}

function comingFreeze({ records, latitudeDeg, today }: SeasonQuestion): FirstFreeze | null {
  const { year } = civilDayParts(today);
  const years = [year - 1, year, year + 1].filter((each) => coolingSeasonStartOn(latitudeDeg, each + 1) > today);
  const found = years.map((each) => firstFreeze(records, latitudeDeg, each));
  return found.find((freeze) => freeze === null || freeze.lateOn >= today) ?? null;
}

/**
 * What the season holds for a place: when to sow, when a weed preventer has its time, when the first freeze is to be expected. This year's own weather as
 * far as it is known, the usual course of the records before and after it.
 * @returns null when the records do not cover the calendar
 * @throws PhysicsError for a place off the globe
 * Sources: those of `sowingWindows`, `preventerWindow` and `firstFreeze`.
 */
export function seasonOutlook(question: SeasonQuestion): SeasonOutlook | null {
  const { latitudeDeg, today, grasses, known } = question;
  const row = blended(question);
  if (row === null) return null;
  const { days, knownOn } = row;
  const at = days[DAYS_BACK];
  // The soil looks back eleven days: it is told by this year's weather when most of those are.
  const lookedAt = civilDaysFrom(addDays(today, -10), addDays(today, 1)).filter((on) => knownOn.has(on)).length;
  return {
    today, soilC: at?.soilC ?? 0, soilIsKnown: lookedAt >= 8, grasses: grasses.map((grass) => grassSeason(grass, days, latitudeDeg, today)), preventer: comingPreventer(days, latitudeDeg, today),
    freeze: comingFreeze(question), nextFreezeOn: nextFreezeOn([...known].filter(({ on }) => on >= today).sort((a, b) => a.on.localeCompare(b.on))),
  };
}
