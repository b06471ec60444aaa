import { stateAfter, stepZoneDay, zoneDemand, type BudgetZone, type ZoneDay, type ZoneState } from '@/scheduling/budget';
import { availableWaterMm, establishedRootDepth, type SoilCompaction, type SoilTexture } from '@/scheduling/soil';
import type { GrassId } from '@/scheduling/grass';
import { addDays, PhysicsError, requireRange, type CivilDay } from '@/scheduling/units';
import type { Assumption, DailyWeather, WeatherSite } from '@/scheduling/weather';

/** One day of a visitor's balance: weather, or its reference ET when it is known. */
export interface BalanceDay {
  weather: Omit<DailyWeather, 'on'>;
  /** [mm]; overrules the weather. */
  et0Mm: number | null;
  irrigationMm: number;
}

export interface WaterBalanceQuestion {
  site: WeatherSite;
  texture: SoilTexture;
  grass: GrassId;
  rootDepthM: number | null;
  cropCoefficient: number | null;
  /** Hours of direct sun, all year [h]; null for open ground. */
  sunHours: number | null;
  /** Ground on which fast rain may run off; null lets all rain above a sprinkle enter. */
  ground: { slopePct: number; compaction: SoilCompaction } | null;
  startOn: CivilDay;
  startDepletionMm: number;
  days: BalanceDay[];
}

export interface WaterBalanceFound {
  days: ZoneDay[];
  /** Sums over the days [mm]; depletion at the end = at the start + used − rain that counted − irrigation + drained. */
  totals: { usedMm: number; rainMm: number; effectiveRainMm: number; runoffMm: number; irrigationMm: number; drainageMm: number };
  startDepletionMm: number;
  endDepletionMm: number;
  /** First day that ends at or beyond the refill line; null when none does. */
  dueOn: CivilDay | null;
  assumptions: Assumption[];
}

/**
 * The water balance of a visitor's lawn, day by day and term by term.
 * @throws PhysicsError for impossible weather, water or soil, with the field named
 * Equations: FAO-56 (82) to (88).
 */
export function waterBalanceAnswer(question: WaterBalanceQuestion): WaterBalanceFound {
  const { site, texture, grass, rootDepthM, cropCoefficient, sunHours, ground, startOn, days } = question;
  const zone: BudgetZone = { grass, texture, sunHours, sownOn: null, rootDepthM, cropCoefficient, rainGround: ground === null ? null : { texture, ...ground } };
  const weather = days.map((day, index): DailyWeather => ({ ...day.weather, on: addDays(startOn, index) }));
  const demands = zoneDemand({ zone, site, weather });
  days.forEach((day, index) => {
    if (day.et0Mm === null && (day.weather.tminC === null || day.weather.tmaxC === null)) throw new PhysicsError(`days[${index}].tminC`, null, 'must be given with tmaxC, or et0Mm');
  });
  const roots = establishedRootDepth(grass, texture, rootDepthM);
  let state: ZoneState = { depletionMm: requireRange('startDepletionMm', question.startDepletionMm, 0, availableWaterMm(texture, roots.rootDepthM)) };
  const found = days.map((day, index): ZoneDay => {
    const felt = demands[index];
    if (!felt) throw new PhysicsError('days', index, 'must hold this day');
    const given = day.et0Mm === null ? null : requireRange(`days[${index}].et0Mm`, day.et0Mm, 0, 20);
    // A given sum keeps the share that the zone's light leaves of it where the weather tells; else it is taken as it is.
    const share = felt.et0Mm > 0 ? felt.shadedEt0Mm / felt.et0Mm : 1;
    const water = given === null
      ? { et0Mm: felt.et0Mm, shadedEt0Mm: felt.shadedEt0Mm, assumptions: felt.assumptions }
      : { et0Mm: given, shadedEt0Mm: given * share, assumptions: felt.assumptions.filter((each) => each.field === 'precipitationMm') };
    const closed = stepZoneDay(state, zone, { on: felt.on, ...water, rainMm: felt.rainMm, irrigationMm: day.irrigationMm });
    state = stateAfter(closed);
    return closed;
  });
  const sum = (pick: (day: ZoneDay) => number): number => found.reduce((total, day) => total + pick(day), 0);
  const named = new Map(found.flatMap((day) => day.assumptions).map((each) => [`${each.field}: ${each.method}`, each]));
  if (roots.isDefault) named.set('rootDepthM', { field: 'rootDepthM', method: `roots of ${roots.rootDepthM} m taken for this grass and soil`, source: roots.source });
  return {
    days: found,
    totals: { usedMm: sum((day) => day.etcMm), rainMm: sum((day) => day.rainMm), effectiveRainMm: sum((day) => day.effectiveRainMm), runoffMm: sum((day) => day.runoffMm), irrigationMm: sum((day) => day.irrigationMm), drainageMm: sum((day) => day.drainageMm) },
    startDepletionMm: question.startDepletionMm,
    endDepletionMm: state.depletionMm,
    dueOn: found.find((day) => day.depletionEndMm >= day.refillLineMm)?.on ?? null,
    assumptions: [...new Map([...named.values()].map((each) => [`${each.field}: ${each.method}`, each])).values()],
  };
}
