import { PhysicsError, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units';

/** Climate and height behind the upper limit of evaporation. */
export interface UpperLimitInput {
  /** Kcb [–] */
  basalCoefficient: number;
  /** u2 [m/s] */
  windAtTwoMetresMps: number;
  rhMinPct: number;
  /** Height of the plants [m]. */
  heightM: number;
  /** Wetted every day or every second day: 1.1 stands for 1.2. */
  wettedOften?: boolean;
}

/**
 * Upper limit on evaporation and transpiration together.
 * @returns Kcmax [–]
 * Equation: FAO-56 (72); wind and humidity are kept within 1-6 m/s and 20-80 % as printed with it
 */
export function upperLimitCoefficient({ basalCoefficient, windAtTwoMetresMps, rhMinPct, heightM, wettedOften = false }: UpperLimitInput): number {
  requireNonNegative('basalCoefficient', basalCoefficient);
  requireNonNegative('heightM', heightM);
  requireRange('rhMinPct', rhMinPct, 0, 100);
  requireNonNegative('windAtTwoMetresMps', windAtTwoMetresMps);
  const wind = Math.min(6, Math.max(1, windAtTwoMetresMps));
  const humidity = Math.min(80, Math.max(20, rhMinPct));
  const climate = (0.04 * (wind - 2) - 0.004 * (humidity - 45)) * (heightM / 3) ** 0.3;
  return Math.max((wettedOften ? 1.1 : 1.2) + climate, basalCoefficient + 0.05);
}

/** Least basal coefficient of dry bare soil: the lower of the published 0.15-0.20 [–]. FAO-56 chapter 7. */
export const LEAST_BASAL_COEFFICIENT = 0.15;

/**
 * Part of the ground that leaves cover, from the basal coefficient.
 * @returns fc, 0-0.99 [–]
 * Equation: FAO-56 (76)
 */
export function coverFraction(basalCoefficient: number, upperLimit: number, heightM: number, leastBasal = LEAST_BASAL_COEFFICIENT): number {
  if (upperLimit <= leastBasal) throw new PhysicsError('upperLimit', upperLimit, `must lie above leastBasal ${leastBasal}`);
  const ratio = Math.max(0.01, basalCoefficient - leastBasal) / (upperLimit - leastBasal);
  return Math.min(0.99, ratio ** (1 + 0.5 * heightM));
}

/** Part of the ground that is both bare and wet. @param wettedFraction - fw, 1 for rain and sprinkler @returns few, 0.01-1 [–]. Equation: FAO-56 (75) */
export function exposedWettedFraction(cover: number, wettedFraction: number): number {
  return Math.max(0.01, Math.min(1 - cover, wettedFraction));
}

/** Reduction of evaporation as the surface dries. @returns Kr, 0-1 [–]. Equation: FAO-56 (74) */
export function evaporationReduction(depletionMm: number, tewMm: number, rewMm: number): number {
  if (depletionMm <= rewMm) return 1;
  if (depletionMm >= tewMm) return 0;
  return (tewMm - depletionMm) / (tewMm - rewMm);
}

/** Evaporation coefficient. @returns Ke [–]. Equation: FAO-56 (71) */
export function evaporationCoefficient(reduction: number, upperLimit: number, basalCoefficient: number, exposedWetted: number): number {
  return Math.max(0, Math.min(reduction * (upperLimit - basalCoefficient), exposedWetted * upperLimit));
}

/** One day of a thinly covered surface. */
export interface SurfaceDay {
  /** De at the start of the day [mm]. */
  depletionStartMm: number;
  rainMm: number;
  /** Irrigation as a mean depth over the whole ground [mm]. */
  irrigationMm: number;
  /** Part of the ground that the last irrigation wetted, fw [–]. */
  wettedFraction: number;
  /** fc [–] */
  coverFraction: number;
  /** Kcb [–] */
  basalCoefficient: number;
  /** Kcmax [–] */
  upperLimit: number;
  et0Mm: number;
  tewMm: number;
  rewMm: number;
}

/** What the day did to the surface. */
export interface SurfaceDayResult {
  /** Kr [–] */
  reduction: number;
  /** few [–] */
  exposedWetted: number;
  /** Ke [–] */
  evaporationCoefficient: number;
  /** Kcb + Ke [–] */
  cropCoefficient: number;
  /** E as a mean depth over the whole ground [mm]. */
  evaporationMm: number;
  /** ETc [mm] */
  etcMm: number;
  /** Water that left the surface layer downwards, within the wetted part [mm]. */
  drainageMm: number;
  depletionEndMm: number;
}

/**
 * One daily step of the evaporation layer with the dual coefficient. All water comes early in the day.
 * In the exposed wetted part: depletionEnd = depletionStart − rain − irrigation/fw + E/few + drainage.
 * @throws PhysicsError for impossible input, with the field named
 * Equations: FAO-56 (71), (74), (75), (77), (79); transpiration from the layer is left out as in the printed examples
 */
export function stepSurfaceLayer(day: SurfaceDay): SurfaceDayResult {
  const { depletionStartMm, rainMm, irrigationMm, wettedFraction, basalCoefficient, upperLimit, et0Mm, tewMm, rewMm } = day;
  requirePositive('tewMm', tewMm);
  requireRange('rewMm', rewMm, 0, tewMm);
  requireRange('depletionStartMm', depletionStartMm, 0, tewMm);
  requireNonNegative('rainMm', rainMm);
  requireNonNegative('irrigationMm', irrigationMm);
  requireNonNegative('et0Mm', et0Mm);
  requireRange('coverFraction', day.coverFraction, 0, 1);
  requirePositive('wettedFraction', requireRange('wettedFraction', wettedFraction, 0, 1));
  const exposedWetted = exposedWettedFraction(day.coverFraction, wettedFraction);
  const waterMm = rainMm + irrigationMm / wettedFraction;
  const wettedMm = Math.max(0, depletionStartMm - waterMm);
  const drainageMm = Math.max(0, waterMm - depletionStartMm);
  const reduction = evaporationReduction(wettedMm, tewMm, rewMm);
  const wanted = evaporationCoefficient(reduction, upperLimit, basalCoefficient, exposedWetted);
  const evaporationMm = Math.min(wanted * et0Mm, (tewMm - wettedMm) * exposedWetted);
  const ke = et0Mm > 0 ? evaporationMm / et0Mm : wanted;
  return {
    reduction,
    exposedWetted,
    evaporationCoefficient: ke,
    cropCoefficient: basalCoefficient + ke,
    evaporationMm,
    etcMm: basalCoefficient * et0Mm + evaporationMm,
    drainageMm,
    depletionEndMm: wettedMm + evaporationMm / exposedWetted,
  };
}

/** Rain above which the whole ground counts as wetted, the middle of the published 3-4 mm [mm]. FAO-56 chapter 7. */
export const FULL_WETTING_RAIN_MM = 3.5;

/** Wetted fraction after a day's water: rain wets everything, irrigation its own part, a dry day changes nothing. */
export function wettedFractionAfter(before: number, rainMm: number, irrigationMm: number, irrigationFraction: number): number {
  if (rainMm > FULL_WETTING_RAIN_MM) return 1;
  return irrigationMm > 0 ? irrigationFraction : before;
}
