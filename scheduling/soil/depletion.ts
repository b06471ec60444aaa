import { requireNonNegative, requireRange } from '@/scheduling/units';
import type { SoilClass } from './texture';

/** By how much fine soils lower and coarse soils raise the depletion fraction: the careful end of the published 5-10 %. FAO-56 table 22 notes. */
export const SOIL_CLASS_DEPLETION_FACTOR: Readonly<Record<SoilClass, number>> = { coarse: 1.05, medium: 1, fine: 0.95 };

/** Bounds of the adjusted fraction. FAO-56 chapter 8. */
export const DEPLETION_FRACTION_BOUNDS = { least: 0.1, greatest: 0.8 } as const;

/**
 * Part of the available water that grass may use without stress, adjusted for demand: less on hot days, more on mild ones.
 * @param tableFraction - p at 5 mm/d [–]
 * @param etcMm - demand of the day, unstressed [mm/d]
 * @param soilClass - fine and coarse soils shift it by 5 %; left out means no shift
 * @returns p, 0.1-0.8 [–]
 * Equation: FAO-56 chapter 8, p = p_tab + 0.04 (5 − ETc)
 */
export function adjustedDepletionFraction(tableFraction: number, etcMm: number, soilClass: SoilClass = 'medium'): number {
  requireRange('depletionFraction', tableFraction, 0, 1);
  requireNonNegative('etcMm', etcMm);
  const adjusted = tableFraction * SOIL_CLASS_DEPLETION_FACTOR[soilClass] + 0.04 * (5 - etcMm);
  return Math.min(DEPLETION_FRACTION_BOUNDS.greatest, Math.max(DEPLETION_FRACTION_BOUNDS.least, adjusted));
}

/** Readily available water, the depletion at which stress begins and the zone is due. @returns RAW [mm]. Equation: FAO-56 (83) */
export function readilyAvailableWaterMm(totalAvailableMm: number, depletionFraction: number): number {
  return depletionFraction * totalAvailableMm;
}

/**
 * Stress coefficient: 1 down to the refill line, then falling in a straight line to 0 at the wilting point.
 * @param depletionMm - Dr [mm]
 * @returns Ks, 0-1 [–]
 * Equation: FAO-56 (84)
 */
export function stressCoefficient(depletionMm: number, totalAvailableMm: number, readilyAvailableMm: number): number {
  if (depletionMm <= readilyAvailableMm) return 1;
  if (depletionMm >= totalAvailableMm) return 0;
  return (totalAvailableMm - depletionMm) / (totalAvailableMm - readilyAvailableMm);
}
