import type { SoilObservation, WinterDay } from '@/scheduling/budget';
import { runZoneWithPatches, stateAtStart, type PatchedDay, type PatchedState, type PositionWater, type RunDay } from '@/scheduling/budget/zoneRun';
import type { ZoneExposure } from '@/scheduling/sun';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import type { Assumption } from '@/scheduling/weather';
import type { AppContext } from '@/server/context';
import {
  loadApplied, loadBudgetZones, loadGauge, loadObservations, loadStoredStates, loadWeather, observationKey, type AppliedWater, type BudgetZoneFacts, type StoredState,
} from './budgetFacts';
import { defaultsOf, stagesFrom, toBudgetZone, winterFrom } from './budgetOfZone';
import type { LockedYard } from './lockYard';
import { storeBudget } from './storeBudget';
import { demandOf, weatherNeededFrom, weatherSince, yardWeather, type YardWeather } from './yardWeather';
import { zoneExposures } from './zoneExposures';

/** Days from today on that the budget and the plan look at. */
export const HORIZON_DAYS = 10;
/** Days before the first day to run from which gaps are filled and the soil's warmth is known. */
const LEAD_DAYS = 11;
/** Days before the start of a record from which it is told whether frost has browned the grass: as far as weather is fetched. */
const WINTER_LEAD_DAYS = 60;

/** A zone's balance from today on. */
export interface ZoneBudget {
  facts: BudgetZoneFacts;
  /** One closed day for each day from today to the end of the horizon, as if nobody watered after now. */
  days: PatchedDay[];
  /** Depletion of each position's patch in the morning of today, what somebody found in the ground counted [mm]. */
  patchDepletionMm: Record<string, number>;
}

/** A yard's balance, brought up to date. */
export interface YardBudget {
  today: string;
  /** Weather from at least today to the end of the horizon. */
  weather: YardWeather;
  zones: ZoneBudget[];
}

/** A zone's days as they were run. */
export interface ZoneRun {
  facts: BudgetZoneFacts;
  fromOn: string;
  days: PatchedDay[];
  /** Frost and snow of the same days. */
  winter: WinterDay[];
}

/** What all zones of a yard are run with. */
interface YardRun {
  weather: YardWeather;
  applied: readonly AppliedWater[];
  observations: ReadonlyMap<string, SoilObservation>;
  exposures: ReadonlyMap<string, ZoneExposure>;
  today: string;
}

/**
 * Brings the stored balance of every zone up to date: from the first day behind the facts, or the last one that was not over, through today and the
 * days of the forecast. Forecast days show what happens if nobody waters. Irrigation is credited as applied ÷ run-time multiplier × share of the
 * zone (see zoneWaterMm); the rest is kept beside the day as its uneven loss. Runs inside the transaction that holds the yard's lock.
 * @returns null when no weather is known at all
 */
export async function recomputeBudget(context: AppContext, yard: LockedYard, today: string): Promise<YardBudget | null> {
  const { database } = context;
  const zones = await loadBudgetZones(database, yard.id, yard.timeZone);
  const firstDays = zones.map((facts) => ({ zoneId: facts.id, fromOn: firstDayToRun(facts, yard.budgetStaleFrom, today) }));
  const earliest = firstDays.reduce((least, { fromOn }) => (fromOn < least ? fromOn : least), today);
  const states = await loadStoredStates(database, yard.id, firstDays);
  const isNew = zones.some((zone) => !states.has(zone.id));
  const from = weatherNeededFrom(addDays(earliest, -(isNew ? WINTER_LEAD_DAYS : LEAD_DAYS)), today, zones.map((zone) => zone.seededOn));
  const stored = await loadWeather(database, yard.id, from);
  const gauge = await loadGauge(database, yard.id, from);
  const applied = await loadApplied(database, yard.id, earliest);
  const observations = await loadObservations(database, yard.id, earliest);
  const site = { latitudeDeg: yard.latitudeDeg, elevationM: yard.elevationM };
  const weather = yardWeather(site, stored, gauge, from, addDays(today, HORIZON_DAYS));
  if (weather === null) {
    return null;
  }
  const exposures = zoneExposures(yard, zones.flatMap(({ id, horizonDeg }) => (horizonDeg === null ? [] : [{ id, horizonDeg }])));
  const shared: YardRun = { weather, applied, observations, exposures, today };
  const runs = zones.map((facts, index) => runZone(facts, firstDays[index]?.fromOn ?? today, states.get(facts.id) ?? null, shared));
  await storeBudget(context, yard.id, runs, weather, today);
  return {
    today, weather,
    zones: runs.map(({ facts, fromOn, days }) => {
      const ahead = days.slice(daysBetween(fromOn, today));
      return { facts, days: ahead, patchDepletionMm: ahead[0]?.patchMorningMm ?? {} };
    }),
  };
}

/** The first day whose balance must be run again: never before the zone's record, never after today. */
function firstDayToRun(facts: BudgetZoneFacts, staleFrom: string | null, today: string): string {
  const recordFrom = facts.recordFrom < today ? facts.recordFrom : today;
  if (facts.settledTo === null || facts.storedFrom === null || facts.storedFrom > recordFrom) {
    return recordFrom;
  }
  const next = addDays(facts.settledTo, 1);
  const due = staleFrom !== null && staleFrom < next ? staleFrom : next;
  const bounded = due > today ? today : due;
  return bounded < recordFrom ? recordFrom : bounded;
}

function runZone(facts: BudgetZoneFacts, fromOn: string, stored: StoredState | null, { weather, applied, observations, exposures, today }: YardRun): ZoneRun {
  const zone = toBudgetZone(facts, weather.site.latitudeDeg, exposures.get(facts.id) ?? null);
  // Days before the first serve to fill its gaps only.
  const near = weatherSince(weather, addDays(fromOn, -LEAD_DAYS));
  const lead = daysBetween(near.days[0]?.on ?? fromOn, fromOn);
  const winter = winterFrom(facts, weather, fromOn, stored);
  const still: WinterDay = { condition: 'growing', isFrosted: false, snowMm: 0 };
  const demand = demandOf(near, zone, [...Array.from({ length: lead }, () => still), ...winter]).slice(lead);
  const stages = stagesFrom(facts, fromOn, demand.length, weather, today);
  const water = waterByDay(facts.id, applied);
  const taken = defaultsOf(facts);
  const days = demand.map((felt, index): RunDay => ({
    demand: { ...felt, assumptions: [...felt.assumptions, ...taken] }, water: water.get(felt.on) ?? [], stage: stages[index] ?? null,
    observation: observations.get(observationKey(facts.id, felt.on)) ?? null,
  }));
  const first = days[0];
  let state: PatchedState = stored ?? { depletionMm: 0, patchDepletionMm: {} };
  let opening: Assumption[] = [];
  if (stored === null && first) {
    const start = stateAtStart(zone, first.demand, first.stage);
    state = start.state;
    opening = [start.assumption];
  }
  const run = runZoneWithPatches(zone, state, facts.positionIds, days)
    .map((day, index) => (index === 0 ? { ...day, assumptions: [...opening, ...day.assumptions] } : day));
  return { facts, fromOn, days: run, winter };
}

function waterByDay(zoneId: string, applied: readonly AppliedWater[]): Map<string, PositionWater[]> {
  const byDay = new Map<string, PositionWater[]>();
  for (const { on, positionId, grossMm, netMm, zoneShare } of applied.filter((one) => one.zoneId === zoneId)) {
    byDay.set(on, [...(byDay.get(on) ?? []), { positionId, grossMm, netMm, zoneShare }]);
  }
  return byDay;
}
