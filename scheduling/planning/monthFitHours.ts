import { addDays, civilDaysFrom, daysBetween, daysInMonth, weekdayOf } from '@/scheduling/units/civilDay';
import { intersectWindows, normalizeWindows } from './minuteWindows';
import { climateMonths, sowingWater, soilByDayOfYear, zoneWaterByMonth, type MonthWater, type SowingWater } from './monthFitDemand';
import type { FitMonth, FitPosition, FitTap, FitZone, MonthFitInput } from './monthFitTypes';
import { planDefaults } from './planDefaults';
import type { MinuteWindow } from './types';
import { mustBeAttended, openingByRules } from './waterRules';

const MONTHS = 12;

/** What zones want, reckoned once for all that is then weighed with it. */
export interface FitDemand {
  months: string[];
  /** By zone: water of its established grass by month of the climate. */
  water: ReadonlyMap<string, ReadonlyMap<string, MonthWater>>;
  /** By zone with a sowing. */
  sowings: ReadonlyMap<string, SowingWater>;
  soil: ReadonlyMap<string, number>;
}

/** The coming twelve months, beginning with that of a day. */
export function comingMonths(startOn: string): string[] {
  const months: string[] = [];
  for (let first = `${startOn.slice(0, 7)}-01`; months.length < MONTHS; first = nextMonth(first)) months.push(first.slice(0, 7));
  return months;
}

function nextMonth(first: string): string {
  return addDays(first, daysInMonth(Number(first.slice(0, 4)), Number(first.slice(5, 7))));
}

/** Civil days of a month, 'YYYY-MM'. */
export function daysOfMonth(month: string): string[] {
  return civilDaysFrom(`${month}-01`, nextMonth(`${month}-01`));
}

export function fitDemand(input: MonthFitInput): FitDemand {
  const soil = soilByDayOfYear(input.climate);
  return {
    months: comingMonths(input.startOn), soil,
    water: new Map(input.zones.map((zone) => [zone.id, zoneWaterByMonth(zone, input.climate)])),
    sowings: new Map(input.zones.flatMap((zone) => (zone.sowing === null ? [] : [[zone.id, sowingWater(zone.sowing, input.startOn, soil)] as const]))),
  };
}

/** What is changed to see what it gains; everything left out stays as it is. */
export interface FitChange {
  /** By tap: its flow over the present one, by position. */
  flowFactor?: (position: FitPosition) => number;
  /** Tap that gets a shut-off timer. */
  timerTapId?: string;
  /** Tap that gets a twin which runs beside it. */
  doubledTapId?: string;
  /** Tap on which a valve is turned instead of a hose moved. */
  secondHoseTapId?: string;
  /** Weekday on which somebody is home for an hour more. */
  helperWeekday?: number;
  /** By zone: part of the present minutes that a pattern of the zone's own size needs. */
  patternShare?: ReadonlyMap<string, number>;
  /** Zones that rest, and the depth that keeps their crowns alive [mm a week]. */
  restingZoneIds?: ReadonlySet<string>;
  restingMmPerWeek?: number;
  /** Sowings instead of the present ones, by zone. */
  sowings?: ReadonlyMap<string, SowingWater>;
}

/** Minutes left of turning a valve where two hoses stand ready. Default, common practice. */
const VALVE_MINUTES = 1;
const HELPER_MINUTES = 60;

/** Part of a month in which a zone is established grass: all of it but for the days of a sowing. */
function establishedShare(month: string, sowing: SowingWater | undefined, zone: FitZone, startOn: string): number {
  if (!sowing || zone.sowing === null) return 1;
  const days = daysOfMonth(month);
  const from = zone.sowing.sownOn > startOn ? zone.sowing.sownOn : startOn;
  const until = sowing.establishedOn;
  const seeded = days.filter((on) => on >= from && (until === null || on < until)).length;
  return 1 - seeded / days.length;
}

/** Minutes of a day when water may run and somebody is home, with what a shut-off timer adds after somebody leaves. */
function dayMinutes(input: MonthFitInput, on: string, tap: FitTap, setMinutes: number, change: FitChange): number {
  const open = openingByRules(input.rules, on, false, input.ruleFacts).windows;
  const home = normalizeWindows([...(input.homeByWeekday[weekdayOf(on)] ?? [])]);
  const work = intersectWindows(open, home);
  const hasTimer = (tap.shutOffTimer || change.timerTapId === tap.id) && !mustBeAttended(input.rules, on, false, input.ruleFacts);
  let minutes = 0;
  for (const window of work) {
    const own = window.toMinutes - window.fromMinutes - input.leadMinutes;
    if (own < planDefaults.leastSetMinutes) continue;
    minutes += own + (hasTimer ? afterLeaving(window, open, work, setMinutes) : 0);
  }
  if (change.helperWeekday === weekdayOf(on)) {
    const away = total(open) - total(work);
    minutes += away >= HELPER_MINUTES ? HELPER_MINUTES - input.leadMinutes : 0;
  }
  return minutes * (change.doubledTapId === tap.id ? 2 : 1);
}

const total = (windows: readonly MinuteWindow[]): number => windows.reduce((sum, window) => sum + window.toMinutes - window.fromMinutes, 0);

/** How long the last set may run on behind a window when nobody is there to end it: until the rules close, the next window begins, or the set is over. */
function afterLeaving(window: MinuteWindow, open: readonly MinuteWindow[], work: readonly MinuteWindow[], setMinutes: number): number {
  const closes = open.find((span) => span.fromMinutes <= window.fromMinutes && span.toMinutes >= window.toMinutes)?.toMinutes ?? window.toMinutes;
  const next = Math.min(...work.map((other) => other.fromMinutes).filter((from) => from >= window.toMinutes), 1440);
  // Somebody starts the last set just before leaving.
  return Math.max(0, Math.min(Math.min(closes, next) - window.toMinutes, setMinutes - 1));
}

interface TapLoad {
  waterMinutes: number;
  doseMinutes: number;
  moveMinutes: number;
  sets: number;
  litres: number;
}

/** What one tap has to do in a month when established grass wants this much. */
function tapLoad(input: MonthFitInput, demand: FitDemand, month: string, tap: FitTap, waterOf: (zoneId: string) => MonthWater, change: FitChange): TapLoad {
  const load: TapLoad = { waterMinutes: 0, doseMinutes: 0, moveMinutes: 0, sets: 0, litres: 0 };
  const perMove = change.secondHoseTapId === tap.id ? Math.min(VALVE_MINUTES, input.moveMinutes) : input.moveMinutes;
  const weeks = daysOfMonth(month).length / 7;
  for (const position of input.positions) {
    const zone = input.zones.find((one) => one.id === position.zoneId);
    if (!zone || position.tapId !== tap.id || position.rateMmPerHour <= 0) continue;
    const flowFactor = change.flowFactor?.(position) ?? 1;
    const minutesPerMm = ((60 * position.runTimeMultiplier) / position.rateMmPerHour / flowFactor) * (change.patternShare?.get(zone.id) ?? 1);
    const sowing = (change.sowings ?? demand.sowings).get(zone.id);
    const rests = change.restingZoneIds?.has(zone.id) === true;
    const wanted = waterOf(zone.id);
    const share = establishedShare(month, sowing, zone, input.startOn);
    const keptMm = (change.restingMmPerWeek ?? 0) * weeks;
    const grassMm = share * (rests ? Math.min(wanted.netMm, keptMm) : wanted.netMm);
    const grassSets = share * (rests ? Math.min(wanted.sets, keptMm > 0 ? weeks / 2 : 0) : wanted.sets);
    const doses = sowing?.dosesByMonth.get(month) ?? { netMm: 0, doses: 0 };
    const doseMinutes = doses.netMm * minutesPerMm;
    load.waterMinutes += grassMm * minutesPerMm;
    load.doseMinutes += doseMinutes + doses.doses * perMove;
    load.moveMinutes += grassSets * perMove;
    load.sets += grassSets;
    load.litres += (grassMm * minutesPerMm + doseMinutes) * tap.flowLpm * flowFactor;
  }
  return load;
}

const loadMinutes = (load: TapLoad): number => load.waterMinutes + load.doseMinutes + load.moveMinutes;

/** Mean of what the years of the climate have for a month of the calendar. */
function meanWater(byMonth: ReadonlyMap<string, MonthWater> | undefined, months: readonly string[]): MonthWater {
  const own = months.map((month) => byMonth?.get(month) ?? { netMm: 0, sets: 0 });
  const mean = (pick: (water: MonthWater) => number) => own.reduce((sum, water) => sum + pick(water), 0) / Math.max(1, own.length);
  return { netMm: mean((water) => water.netMm), sets: mean((water) => water.sets) };
}

/** Hose-hours of every coming month, as things are or with a change. */
export function fitMonths(input: MonthFitInput, demand: FitDemand, change: FitChange = {}): FitMonth[] {
  const all = climateMonths(input.climate);
  return demand.months.map((month): FitMonth => {
    const same = all.filter((one) => one.slice(5) === month.slice(5));
    const days = input.climate.filter((day) => day.on.slice(5, 7) === month.slice(5));
    const usual = (zoneId: string) => meanWater(demand.water.get(zoneId), same);
    const loads = input.taps.filter((tap) => input.positions.some((position) => position.tapId === tap.id)).map((tap) => ({ tap, load: tapLoad(input, demand, month, tap, usual, change) }));
    const taps = loads.map(({ tap, load }) => {
      const setMinutes = load.sets > 0 ? load.waterMinutes / load.sets : planDefaults.leastSetMinutes;
      return { tapId: tap.id, neededHours: loadMinutes(load) / 60, hadHours: daysOfMonth(month).reduce((sum, on) => sum + dayMinutes(input, on, tap, setMinutes, change), 0) / 60 };
    });
    const sum = (pick: (load: TapLoad) => number) => loads.reduce((total_, { load }) => total_ + pick(load), 0);
    const byYear = same.map((year) => loads.reduce((minutes, { tap }) => minutes + loadMinutes(tapLoad(input, demand, month, tap, (zoneId) => demand.water.get(zoneId)?.get(year) ?? { netMm: 0, sets: 0 }, change)), 0) / 60);
    const perYear = (pick: (day: MonthFitInput['climate'][number]) => number) => days.reduce((total_, day) => total_ + pick(day), 0) / Math.max(1, same.length);
    return {
      month, taps, neededHours: sum(loadMinutes) / 60, moveHours: sum((load) => load.moveMinutes) / 60, doseHours: sum((load) => load.doseMinutes) / 60,
      leastHours: byYear.length > 0 ? Math.min(...byYear) : 0, mostHours: byYear.length > 0 ? Math.max(...byYear) : 0,
      hadHours: taps.reduce((hours, tap) => hours + tap.hadHours, 0), shortHours: taps.reduce((hours, tap) => hours + Math.max(0, tap.neededHours - tap.hadHours), 0),
      litres: sum((load) => load.litres), et0Mm: perYear((day) => day.et0Mm), rainMm: perYear((day) => day.rainMm), isEstimated: days.some((day) => day.isEstimated),
    };
  });
}

/** Weeks of a month. */
export function weeksOf(month: string): number {
  return daysBetween(`${month}-01`, nextMonth(`${month}-01`)) / 7;
}
