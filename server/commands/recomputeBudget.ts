import { QueryTypes } from 'sequelize';
import type { BudgetZone } from '@/scheduling/budget';
import { runZoneWithPatches, stateAtStart, type PatchedDay, type PatchedState, type PositionWater, type RunDay } from '@/scheduling/budget/zoneRun';
import { DEFAULT_SCHEDULE, sowingOutlook, type EstablishmentStage } from '@/scheduling/establishment';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import type { Assumption } from '@/scheduling/weather';
import type { AppContext } from '@/server/context';
import { loadApplied, loadBudgetZones, loadGauge, loadStoredStates, loadWeather, type AppliedWater, type BudgetZoneFacts, type StoredState } from './budgetFacts';
import type { LockedYard } from './lockYard';
import { demandOf, isRunningSowing, soilTemperaturesFrom, weatherNeededFrom, yardWeather, type YardWeather } from './yardWeather';

/** Days from today on that the budget and the plan look at. */
export const HORIZON_DAYS = 10;
/** Days before the first day to run from which gaps are filled. */
const GAP_DAYS = 7;

/** A zone's balance from today on. */
export interface ZoneBudget {
  facts: BudgetZoneFacts;
  /** One closed day for each day from today to the end of the horizon, as if nobody watered after now. */
  days: PatchedDay[];
  /** Depletion of each position's patch at the start of today [mm]. */
  patchDepletionMm: Record<string, number>;
}

/** A yard's balance, brought up to date. */
export interface YardBudget {
  today: string;
  /** Weather from at least today to the end of the horizon. */
  weather: YardWeather;
  zones: ZoneBudget[];
}

interface ZoneRun {
  facts: BudgetZoneFacts;
  fromOn: string;
  days: PatchedDay[];
  /** Depletion of the patches before the first day of the run [mm]. */
  patchDepletionMm: Record<string, number>;
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
  const from = weatherNeededFrom(addDays(earliest, -GAP_DAYS), today, zones.map((zone) => zone.seededOn));
  const stored = await loadWeather(database, yard.id, from);
  const gauge = await loadGauge(database, yard.id, from);
  const applied = await loadApplied(database, yard.id, earliest);
  const states = await loadStoredStates(database, yard.id, firstDays);
  const site = { latitudeDeg: yard.latitudeDeg, elevationM: yard.elevationM };
  const weather = yardWeather(site, stored, gauge, from, addDays(today, HORIZON_DAYS));
  if (weather === null) {
    return null;
  }
  const runs = zones.map((facts, index) => runZone(facts, firstDays[index]?.fromOn ?? today, states.get(facts.id) ?? null, weather, applied, today));
  await storeRuns(context, yard.id, runs, weather, today);
  return {
    today, weather,
    zones: runs.map((run) => ({
      facts: run.facts,
      days: run.days.slice(daysBetween(run.fromOn, today)),
      patchDepletionMm: run.days[daysBetween(run.fromOn, today) - 1]?.patchDepletionMm ?? run.patchDepletionMm,
    })),
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

function toBudgetZone(facts: BudgetZoneFacts): BudgetZone {
  return { grass: facts.grass, texture: facts.soil, sunHours: facts.sunHours, sownOn: facts.seededOn };
}

function runZone(facts: BudgetZoneFacts, fromOn: string, stored: StoredState | null, weather: YardWeather, applied: readonly AppliedWater[], today: string): ZoneRun {
  const zone = toBudgetZone(facts);
  const demand = demandOf(weather, zone).slice(daysBetween(weather.days[0]?.on ?? fromOn, fromOn));
  const stages = stagesFrom(facts, fromOn, demand.length, weather, today);
  const water = waterByDay(facts.id, applied);
  const days = demand.map((felt, index): RunDay => ({ demand: felt, water: water.get(felt.on) ?? [], stage: stages[index] ?? null }));
  const first = demand[0];
  let state: PatchedState = stored ?? { depletionMm: 0, patchDepletionMm: {} };
  let opening: Assumption[] = [];
  if (stored === null && first) {
    const start = stateAtStart(zone, first, stages[0] ?? null);
    state = start.state;
    opening = [start.assumption];
  }
  const run = runZoneWithPatches(zone, state, facts.positionIds, days)
    .map((day, index) => (index === 0 ? { ...day, assumptions: [...opening, ...day.assumptions] } : day));
  return {
    facts, fromOn, days: run,
    patchDepletionMm: Object.fromEntries(facts.positionIds.map((id) => [id, state.patchDepletionMm[id] ?? state.depletionMm])),
  };
}

/** Stages of a running sowing by soil heat and schedule; null where the zone is a lawn. */
function stagesFrom(facts: BudgetZoneFacts, fromOn: string, count: number, weather: YardWeather, today: string): (EstablishmentStage | null)[] {
  if (facts.seededOn === null || !isRunningSowing(facts.seededOn, today)) {
    return Array.from({ length: count }, () => null);
  }
  return sowingOutlook({
    sownOn: facts.seededOn, grass: facts.grass, dailySoilTempsC: soilTemperaturesFrom(weather, facts.seededOn), schedule: facts.schedule ?? DEFAULT_SCHEDULE,
    startOn: fromOn, days: Array.from({ length: count }, () => ({ sunriseMinutes: null, sunsetMinutes: null })),
  }).stageByDay;
}

function waterByDay(zoneId: string, applied: readonly AppliedWater[]): Map<string, PositionWater[]> {
  const byDay = new Map<string, PositionWater[]>();
  for (const { on, positionId, grossMm, netMm, zoneShare } of applied.filter((one) => one.zoneId === zoneId)) {
    byDay.set(on, [...(byDay.get(on) ?? []), { positionId, grossMm, netMm, zoneShare }]);
  }
  return byDay;
}

/** Writes the days that were run, in one statement; the database checks that each of them closes. */
async function storeRuns(context: AppContext, yardId: string, runs: readonly ZoneRun[], weather: YardWeather, today: string): Promise<void> {
  const weatherByDay = new Map(weather.days.map((day) => [day.on, day]));
  const rows = runs.flatMap(({ facts, days }) => days.map((day) => {
    const told = weatherByDay.get(day.on);
    return {
      zoneId: facts.id, on: day.on, isForecast: day.on >= today, et0Mm: day.et0Mm, shadedEt0Mm: day.shadedEt0Mm, cropCoefficient: day.cropCoefficient,
      stressCoefficient: day.stressCoefficient, etcMm: day.etcMm, rainMm: day.rainMm, rainLossMm: day.rainLossMm, effectiveRainMm: day.effectiveRainMm,
      irrigationMm: day.irrigationMm, drainageMm: day.drainageMm, rootGrowthMm: day.rootGrowthMm, depletionStartMm: day.depletionStartMm,
      depletionEndMm: day.depletionEndMm, totalAvailableMm: day.totalAvailableMm, refillLineMm: day.refillLineMm, rootDepthM: day.rootDepthM,
      rainSource: told?.rainSource ?? 'none',
      inputs: {
        weather: told?.weather ?? null, gaugeMm: told?.gaugeMm ?? null, sunHours: facts.sunHours, stage: day.stage, depletionFraction: day.depletionFraction,
        potentialEtMm: day.potentialEtMm, grossIrrigationMm: day.grossIrrigationMm, unevenLossMm: day.unevenLossMm,
        patchDepletionMm: day.patchDepletionMm, assumptions: day.assumptions,
      },
    };
  }));
  if (rows.length === 0) {
    return;
  }
  await context.database.query(
    `INSERT INTO budget_days (yard_id, zone_id, "on", is_forecast, et0_mm, shaded_et0_mm, crop_coefficient, stress_coefficient, etc_mm, rain_mm, rain_loss_mm,
       effective_rain_mm, irrigation_mm, drainage_mm, root_growth_mm, depletion_start_mm, depletion_end_mm, total_available_mm, refill_line_mm, root_depth_m,
       rain_source, inputs, computed_at)
     SELECT $1, "zoneId", "on", "isForecast", "et0Mm", "shadedEt0Mm", "cropCoefficient", "stressCoefficient", "etcMm", "rainMm", "rainLossMm", "effectiveRainMm",
       "irrigationMm", "drainageMm", "rootGrowthMm", "depletionStartMm", "depletionEndMm", "totalAvailableMm", "refillLineMm", "rootDepthM", "rainSource", inputs, $3
     FROM jsonb_to_recordset($2::jsonb) AS r("zoneId" uuid, "on" date, "isForecast" boolean, "et0Mm" float8, "shadedEt0Mm" float8, "cropCoefficient" float8,
       "stressCoefficient" float8, "etcMm" float8, "rainMm" float8, "rainLossMm" float8, "effectiveRainMm" float8, "irrigationMm" float8, "drainageMm" float8,
       "rootGrowthMm" float8, "depletionStartMm" float8, "depletionEndMm" float8, "totalAvailableMm" float8, "refillLineMm" float8, "rootDepthM" float8,
       "rainSource" text, inputs jsonb)
     ON CONFLICT (yard_id, zone_id, "on") DO UPDATE SET is_forecast = excluded.is_forecast, et0_mm = excluded.et0_mm, shaded_et0_mm = excluded.shaded_et0_mm,
       crop_coefficient = excluded.crop_coefficient, stress_coefficient = excluded.stress_coefficient, etc_mm = excluded.etc_mm, rain_mm = excluded.rain_mm,
       rain_loss_mm = excluded.rain_loss_mm, effective_rain_mm = excluded.effective_rain_mm, irrigation_mm = excluded.irrigation_mm, drainage_mm = excluded.drainage_mm,
       root_growth_mm = excluded.root_growth_mm, depletion_start_mm = excluded.depletion_start_mm, depletion_end_mm = excluded.depletion_end_mm,
       total_available_mm = excluded.total_available_mm, refill_line_mm = excluded.refill_line_mm, root_depth_m = excluded.root_depth_m,
       rain_source = excluded.rain_source, inputs = excluded.inputs, computed_at = excluded.computed_at`,
    { bind: [yardId, JSON.stringify(rows), context.clock.now()], type: QueryTypes.INSERT },
  );
}
