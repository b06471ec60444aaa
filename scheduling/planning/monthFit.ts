import { GRASSES } from '@/scheduling/grass';
import { SOWING_NEEDS } from '@/scheduling/season/sowingWindows';
import { RESTING_MM_PER_WEEK } from '@/scheduling/sprinkler/fitHelp';
import { flowThroughHose, SOLD_BORES_MM } from '@/scheduling/sprinkler/hoseLoss';
import { weekdayOf } from '@/scheduling/units/civilDay';
import { PhysicsError, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units/physicsError';
import { sowingWater } from './monthFitDemand';
import { daysOfMonth, fitDemand, fitMonths, weeksOf, type FitChange, type FitDemand } from './monthFitHours';
import type { FitMonth, FitPosition, FitRemedy, FitTap, MonthFit, MonthFitInput } from './monthFitTypes';

/** Less than this is lost in rounding [h a month]. */
const LEAST_HOURS = 0.25;
/** Wetted area counts as larger than its zone from this ratio on. Measuring both is no better. */
const PATTERN_OVER_ZONE = 1.05;

type RemedyKind = FitRemedy extends infer R ? (R extends FitRemedy ? Omit<R, 'gainHours' | 'leftHours' | 'leftYearHours' | 'fits'> : never) : never;

const shortOf = (months: readonly FitMonth[]): number => months.reduce((sum, month) => sum + month.shortHours, 0);
const spareOf = (month: FitMonth): number => month.hadHours - month.neededHours;
const loadOf = (month: FitMonth): number => (month.hadHours > 0 ? month.neededHours / month.hadHours : Infinity);

/** The month that lacks most, else the one that takes the greatest part of its hours. */
function tightestOf(months: readonly FitMonth[]): FitMonth | null {
  const thirsty = months.filter((month) => month.neededHours >= LEAST_HOURS);
  return thirsty.reduce<FitMonth | null>((worst, month) => {
    if (worst === null) return month;
    return month.shortHours > worst.shortHours + 1e-9 || (Math.abs(month.shortHours - worst.shortHours) <= 1e-9 && loadOf(month) > loadOf(worst)) ? month : worst;
  }, null);
}

const doesFit = (months: readonly FitMonth[]): boolean => months.every((month) => month.shortHours < LEAST_HOURS);

/** Flow of a position through the next fatter hose over its present flow; null where the hose is not known or no fatter one is sold. */
function fatter(tap: FitTap, position: FitPosition): { boreMm: number; factor: number } | null {
  const { hose } = position;
  const boreMm = hose && SOLD_BORES_MM.find((sold) => sold > hose.boreMm + 0.5);
  if (!hose || !boreMm) return null;
  try {
    return { boreMm, factor: flowThroughHose({ measuredLpm: tap.flowLpm, measuredHose: hose, newHose: { ...hose, boreMm } }).flowLpm / tap.flowLpm };
  } catch (error) {
    // A flow that cannot come through that hose at an ordinary pressure was not measured through it.
    if (error instanceof PhysicsError && error.field === 'measuredLpm') return null;
    throw error;
  }
}

interface Idea {
  remedy: RemedyKind;
  change: FitChange;
}

function equipmentIdeas(input: MonthFitInput, tap: FitTap): Idea[] {
  const own = input.positions.filter((position) => position.tapId === tap.id);
  const hoses = own.map((position) => ({ position, better: fatter(tap, position) })).filter(({ better }) => better !== null);
  const best = hoses.reduce<(typeof hoses)[number] | null>((found, one) => ((one.better?.factor ?? 0) > (found?.better?.factor ?? 0) ? one : found), null);
  const factors = new Map(hoses.map(({ position, better }) => [position.id, better?.factor ?? 1]));
  return [
    ...(best?.better ? [{
      remedy: { kind: 'fatter_hose' as const, tapId: tap.id, boreMm: best.better.boreMm, flowLpm: tap.flowLpm * best.better.factor },
      change: { flowFactor: (position: FitPosition) => factors.get(position.id) ?? 1 },
    }] : []),
    ...(own.length > 1 ? [{ remedy: { kind: 'second_hose' as const, tapId: tap.id }, change: { secondHoseTapId: tap.id } }] : []),
    ...(tap.shutOffTimer ? [] : [{ remedy: { kind: 'shut_off_timer' as const, tapId: tap.id }, change: { timerTapId: tap.id } }]),
    { remedy: { kind: 'second_tap', tapId: tap.id }, change: { doubledTapId: tap.id } },
  ];
}

/** The weekday on which an hour more frees most each time. */
function helperIdea(input: MonthFitInput, demand: FitDemand, tightest: FitMonth): Idea {
  const days = daysOfMonth(tightest.month);
  const hadOn = (weekday: number) => {
    const then = fitMonths(input, { ...demand, months: [tightest.month] }, { helperWeekday: weekday })[0]?.hadHours ?? 0;
    return (then - tightest.hadHours) / days.filter((on) => weekdayOf(on) === weekday).length;
  };
  // Saturday first: of equal days the one on which helpers are found.
  const weekday = [6, 0, 1, 2, 3, 4, 5].reduce((best, one) => (hadOn(one) > hadOn(best) + 1e-9 ? one : best));
  const taps = Math.max(1, tightest.taps.filter((tap) => tap.neededHours > tap.hadHours).length);
  return { remedy: { kind: 'helper_hour', weekday, neededHoursAWeek: tightest.shortHours / taps / weeksOf(tightest.month) }, change: { helperWeekday: weekday } };
}

function patternIdea(input: MonthFitInput): Idea[] {
  const shares = new Map(input.zones.flatMap((zone) => {
    const wetted = input.positions.filter((position) => position.zoneId === zone.id).reduce((sum, position) => sum + position.wettedAreaM2, 0);
    return wetted > PATTERN_OVER_ZONE * zone.areaM2 ? [[zone.id, zone.areaM2 / wetted] as const] : [];
  }));
  return shares.size === 0 ? [] : [{ remedy: { kind: 'smaller_pattern', zoneIds: [...shares.keys()] }, change: { patternShare: shares } }];
}

/** The least important zones, as many as it takes, but never seed and never all. */
function restIdea(input: MonthFitInput, demand: FitDemand): Idea[] {
  const candidates = [...input.zones].filter((zone) => !zone.resting && zone.sowing === null && input.positions.some((position) => position.zoneId === zone.id)).sort((a, b) => b.priority - a.priority);
  const others = input.zones.filter((zone) => !zone.resting).length;
  const chosen: string[] = [];
  for (const zone of candidates) {
    if (chosen.length >= others - 1) break;
    chosen.push(zone.id);
    if (doesFit(fitMonths(input, demand, restOf(chosen)))) break;
  }
  return chosen.length === 0 ? [] : [{ remedy: { kind: 'rest_zones', zoneIds: chosen }, change: restOf(chosen) }];
}

const restOf = (zoneIds: readonly string[]): FitChange => ({ restingZoneIds: new Set(zoneIds), restingMmPerWeek: RESTING_MM_PER_WEEK });

/** For a sowing still to come: the month of those with warm enough soil in which the year lacks least. */
function sowingIdeas(input: MonthFitInput, demand: FitDemand): Idea[] {
  return input.zones.flatMap((zone): Idea[] => {
    const { sowing } = zone;
    if (sowing === null || sowing.sownOn <= input.startOn) return [];
    const needs = SOWING_NEEDS[GRASSES[sowing.grass].family];
    const ideas = demand.months.slice(1).filter((month) => month !== sowing.sownOn.slice(0, 7)).flatMap((month) => {
      const sownOn = `${month}-01`;
      const soilC = demand.soil.get(sownOn.slice(5)) ?? -99;
      if (soilC < needs.leastSoilC || soilC > needs.mostSoilC) return [];
      const change: FitChange = { sowings: new Map([...demand.sowings, [zone.id, sowingWater({ ...sowing, sownOn }, input.startOn, demand.soil)]]) };
      return [{ idea: { remedy: { kind: 'sow_another_month' as const, zoneId: zone.id, month }, change }, short: shortOf(fitMonths(input, demand, change)) }];
    });
    const best = ideas.reduce<(typeof ideas)[number] | null>((found, one) => (found === null || one.short < found.short - 1e-9 ? one : found), null);
    return best ? [best.idea] : [];
  });
}

function requireYard(input: MonthFitInput): void {
  if (input.climate.length < 365) throw new PhysicsError('climate', input.climate.length, 'must hold at least a whole year');
  input.zones.forEach((zone, index) => {
    requirePositive(`zones[${index}].areaM2`, zone.areaM2);
    requirePositive(`zones[${index}].totalAvailableMm`, zone.totalAvailableMm);
    requireRange(`zones[${index}].refillLineMm`, zone.refillLineMm, 0, zone.totalAvailableMm);
    zone.demandShareByMonth.forEach((share, month) => requireNonNegative(`zones[${index}].demandShareByMonth[${month}]`, share));
  });
  input.positions.forEach((position, index) => {
    requireNonNegative(`positions[${index}].rateMmPerHour`, position.rateMmPerHour);
    requireRange(`positions[${index}].runTimeMultiplier`, position.runTimeMultiplier, 1, 10);
  });
  input.taps.forEach((tap, index) => requirePositive(`taps[${index}].flowLpm`, tap.flowLpm));
  requireNonNegative('moveMinutes', input.moveMinutes);
  requireNonNegative('leadMinutes', input.leadMinutes);
}

/**
 * Does a year fit? Hose-hours needed against had for each of the coming twelve months, within the water rules and the hours at home, and what would help.
 * Needed: every zone is filled whenever its depletion passes the refill line under the climate's days, each set with its move, and the doses of a sowing.
 * Had: minutes when rules allow water and somebody is home, less those to get ready, at every tap in use.
 * @throws PhysicsError with the field named when a number is impossible; a yard without zones, taps or hours is not an error
 */
export function monthFit(input: MonthFitInput): MonthFit {
  requireYard(input);
  const demand = fitDemand(input);
  const months = fitMonths(input, demand);
  const tightest = tightestOf(months);
  const years = Math.max(1, Math.round(input.climate.length / 365.25));
  if (tightest === null || doesFit(months)) {
    return { months, tightestMonth: tightest?.month ?? null, fits: true, remedies: [], years };
  }
  const lacking = input.taps.filter((tap) => months.some((month) => month.taps.some((one) => one.tapId === tap.id && one.neededHours - one.hadHours >= LEAST_HOURS)));
  const ideas = [
    ...lacking.flatMap((tap) => equipmentIdeas(input, tap)), helperIdea(input, demand, tightest), ...patternIdea(input), ...restIdea(input, demand), ...sowingIdeas(input, demand),
  ];
  const remedies = ideas.map(({ remedy, change }): FitRemedy => {
    const changed = fitMonths(input, demand, change);
    const then = changed.find((month) => month.month === tightest.month) ?? tightest;
    return { ...remedy, gainHours: spareOf(then) - spareOf(tightest), leftHours: then.shortHours, leftYearHours: shortOf(changed), fits: doesFit(changed) };
  });
  return {
    months, tightestMonth: tightest.month, fits: false, years,
    remedies: remedies.filter((remedy) => remedy.gainHours >= LEAST_HOURS || remedy.leftYearHours < shortOf(months) - LEAST_HOURS)
      .sort((a, b) => a.leftYearHours - b.leftYearHours || b.gainHours - a.gainHours),
  };
}
