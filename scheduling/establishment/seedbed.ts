import { PhysicsError, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units/physicsError';
import { washingLimitMmPerHour, type DropSize } from './washing';

/** One hour above a seedbed. */
export interface SeedbedHour {
  /** Reference ET of the hour in the light and wind of the seedbed, so shade and shelter are in it [mm]. */
  et0Mm: number;
  rainMm: number;
  /** Dew of the hour [mm]. */
  dewMm: number;
  isDaylight: boolean;
}

/** A dose in the forecast. */
export interface SeedbedDose {
  /** Hour in which it is given, 0 for the first. */
  hour: number;
  depthMm: number;
  /** Application rate of the sprinkler [mm/h]. */
  rateMmPerHour: number;
  /** How hard its drops fall; fine when left out. */
  drops?: DropSize;
}

export interface SeedbedInput {
  hours: SeedbedHour[];
  doses: SeedbedDose[];
  /** Water content at field capacity and wilting point [m³/m³]. */
  fieldCapacity: number;
  wiltingPoint: number;
  /** Layer that must stay moist [m], 0.025 when left out (top inch: Iowa State). */
  layerM?: number;
  /** Share of the ground under straw or the like, 0 to 1, none when left out. */
  mulchCover?: number;
  /** Intake of the bare ground [mm/h]. */
  intakeMmPerHour: number;
  /** Water gone from the layer at the start [mm]; a full layer when left out. */
  startDepletionMm?: number;
  /** Share of the evaporable water gone at which seed begins to suffer, 0.6 when left out. Common practice. */
  dryShare?: number;
}

export interface SeedbedHourResult {
  /** Water gone from the layer at the end of the hour [mm]. */
  depletionMm: number;
  evaporationMm: number;
  drainageMm: number;
  runoffMm: number;
  isDry: boolean;
}

export interface SeedbedForecast {
  hours: SeedbedHourResult[];
  /** Evaporable water of the layer, and the part of it that evaporates freely [mm]. */
  evaporableMm: number;
  freelyEvaporableMm: number;
  /** Depletion at which the seedbed counts as dry [mm]. */
  dryLimitMm: number;
  /** Daylight hours that end beyond the limit [h]. */
  dryHours: number;
  /** First such hour, null when there is none. */
  firstDryHour: number | null;
  /** Hours in which seed may wash, because water comes faster than the ground takes it or than its drops allow: place in `hours`. */
  washingHours: number[];
  /** The same with the reason; of both the intake, as the water then runs. */
  washing: { hour: number; because: 'intake' | 'drops' }[];
}

/** Kc of wet bare ground wetted daily (FAO-56 annex 7: about 1.0 to 1.15). */
export const SEEDBED_COEFFICIENT = 1.15;
/** Evaporation falls by half under a full cover of organic mulch (FAO-56 chapter 11: about 5 % for each 10 % of cover, from memory). */
const MULCH_SAVING = 0.5;
/** Freely evaporable part of the evaporable water: 8 to 11 of 20 to 24 mm for loams in FAO-56 table 19, the same share of a thinner layer. */
const FREE_SHARE = 0.42;
const DEFAULT_LAYER_M = 0.025;
const DEFAULT_DRY_SHARE = 0.6;
const NO_DOSE = { depthMm: 0, soakedMm: 0, isTooHard: false } as const;

/**
 * Exact loss in one hour at a steady pull: free down to the readily evaporable water, then falling in proportion to what is left.
 * @param depletionMm - at the start, 0 to TEW
 * @param pullMm - what a wet surface would lose in the hour
 */
function evaporationInHour(depletionMm: number, pullMm: number, freeMm: number, totalMm: number): number {
  const freeLeft = Math.max(0, freeMm - depletionMm);
  if (pullMm <= freeLeft) {
    return pullMm;
  }
  const start = Math.max(depletionMm, freeMm);
  const room = totalMm - freeMm;
  return freeLeft + (totalMm - start) * (1 - Math.exp(-(pullMm - freeLeft) / room));
}

/**
 * Surface water of a seedbed hour by hour under a dose schedule: water first, what the ground cannot take runs off, what the layer cannot hold drains,
 * then the air draws.
 * @throws PhysicsError with the field named for impossible soil, weather or doses
 * Equations: FAO-56 (73) to (77), TEW = 1000 (θFC − ½ θWP) Ze and the falling-rate stage integrated over the hour instead of stepped by the day.
 */
export function seedbedForecast(input: SeedbedInput): SeedbedForecast {
  const layerM = requireRange('layerM', input.layerM ?? DEFAULT_LAYER_M, 0.005, 0.2);
  requireRange('fieldCapacity', input.fieldCapacity, 0.01, 0.7);
  requireRange('wiltingPoint', input.wiltingPoint, 0, 0.6);
  if (input.wiltingPoint >= input.fieldCapacity) {
    throw new PhysicsError('wiltingPoint', input.wiltingPoint, 'must be below field capacity');
  }
  const mulchCover = requireRange('mulchCover', input.mulchCover ?? 0, 0, 1);
  const dryShare = requireRange('dryShare', input.dryShare ?? DEFAULT_DRY_SHARE, 0.05, 1);
  requirePositive('intakeMmPerHour', input.intakeMmPerHour);
  const evaporableMm = 1000 * (input.fieldCapacity - 0.5 * input.wiltingPoint) * layerM;
  const freelyEvaporableMm = FREE_SHARE * evaporableMm;
  const dryLimitMm = dryShare * evaporableMm;
  let depletionMm = requireRange('startDepletionMm', input.startDepletionMm ?? 0, 0, evaporableMm);

  const dosesByHour = new Map<number, { depthMm: number; soakedMm: number; isTooHard: boolean }>();
  input.doses.forEach((dose, index) => {
    if (!Number.isInteger(dose.hour) || dose.hour < 0 || dose.hour >= input.hours.length) {
      throw new PhysicsError(`doses[${index}].hour`, dose.hour, 'must be one of the hours');
    }
    requireNonNegative(`doses[${index}].depthMm`, dose.depthMm);
    requirePositive(`doses[${index}].rateMmPerHour`, dose.rateMmPerHour);
    const soakedShare = Math.min(1, input.intakeMmPerHour / dose.rateMmPerHour);
    const sofar = dosesByHour.get(dose.hour) ?? NO_DOSE;
    const isTooHard = dose.depthMm > 0 && dose.rateMmPerHour > washingLimitMmPerHour({ intakeMmPerHour: input.intakeMmPerHour, drops: dose.drops ?? 'fine', mulchCover }) + 1e-9;
    dosesByHour.set(dose.hour, { depthMm: sofar.depthMm + dose.depthMm, soakedMm: sofar.soakedMm + dose.depthMm * soakedShare, isTooHard: sofar.isTooHard || isTooHard });
  });

  const washing: SeedbedForecast['washing'] = [];
  const hours = input.hours.map((hour, index): SeedbedHourResult => {
    requireNonNegative(`hours[${index}].et0Mm`, hour.et0Mm);
    requireNonNegative(`hours[${index}].rainMm`, hour.rainMm);
    requireNonNegative(`hours[${index}].dewMm`, hour.dewMm);
    const dose = dosesByHour.get(index) ?? NO_DOSE;
    const rainSoakedMm = Math.min(hour.rainMm, input.intakeMmPerHour);
    const runoffMm = hour.rainMm - rainSoakedMm + (dose.depthMm - dose.soakedMm);
    if (runoffMm > 1e-9) {
      washing.push({ hour: index, because: 'intake' });
    } else if (dose.isTooHard) {
      washing.push({ hour: index, because: 'drops' });
    }
    const soaked = depletionMm - rainSoakedMm - dose.soakedMm - hour.dewMm;
    const drainageMm = Math.max(0, -soaked);
    const wetted = Math.max(0, soaked);
    const pullMm = SEEDBED_COEFFICIENT * hour.et0Mm * (1 - MULCH_SAVING * mulchCover);
    const evaporationMm = evaporationInHour(wetted, pullMm, freelyEvaporableMm, evaporableMm);
    depletionMm = Math.min(evaporableMm, wetted + evaporationMm);
    return { depletionMm, evaporationMm, drainageMm, runoffMm, isDry: depletionMm > dryLimitMm };
  });
  const dry = hours.map((hour, index) => (hour.isDry && input.hours[index]?.isDaylight ? index : -1)).filter((index) => index >= 0);
  return { hours, evaporableMm, freelyEvaporableMm, dryLimitMm, dryHours: dry.length, firstDryHour: dry[0] ?? null, washingHours: washing.map((each) => each.hour), washing };
}
