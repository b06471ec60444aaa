import { requireNonNegative, requirePositive } from '@/scheduling/units';

/** Ratio of evaporation from wet bare soil to ET0 [–]. FAO-56 annex 7. */
export const WET_SOIL_COEFFICIENT = 1.15;

/** Evaporable water of a bare surface layer. */
export interface EvaporableWater {
  rewMm: number;
  tewMm: number;
}

/** Whether the soil under a wetting is coarse, or medium and fine. */
export type BareSoilClass = 'coarse' | 'medium_or_fine';

/** ET0 below which a surface never dries within the interval; the printed forms divide by it [mm/d]. */
const NO_DEMAND_MM = 0.01;
const LIGHT_WETTING_MM = 10;
const HEAVY_WETTING_MM = 40;

/** Evaporable water that a light wetting (10 mm or less) leaves to a bare surface. Source: FAO-56 annex 7 */
export function evaporableAfterLightWetting(et0Mm: number): EvaporableWater {
  return { tewMm: 10, rewMm: Math.min(Math.max(2.5, 6 / Math.sqrt(et0Mm)), 7) };
}

/** Evaporable water that a heavy wetting (40 mm or more) leaves to a bare surface. Source: FAO-56 annex 7 */
export function evaporableAfterHeavyWetting(et0Mm: number, soilClass: BareSoilClass): EvaporableWater {
  const coarse = soilClass === 'coarse';
  const tewMm = coarse ? Math.min(15, 7 * Math.sqrt(et0Mm)) : Math.min(28, 13 * Math.sqrt(et0Mm));
  return { tewMm, rewMm: Math.min(coarse ? 6 : 9, tewMm - 0.01) };
}

/**
 * Coefficient of bare soil from evaporable water and the days between wettings.
 * @param et0Mm - [mm/d]
 * @param intervalDays - tw, days from wetting to wetting [d]
 * @returns Kc, 0-1.15 [–]
 * Equation: FAO-56 annex 7 (7-3), (7-4)
 */
export function bareSoilCoefficient(et0Mm: number, intervalDays: number, { rewMm, tewMm }: EvaporableWater): number {
  requireNonNegative('et0Mm', et0Mm);
  requirePositive('intervalDays', intervalDays);
  if (et0Mm < NO_DEMAND_MM) return WET_SOIL_COEFFICIENT;
  const potentialMm = WET_SOIL_COEFFICIENT * et0Mm;
  const firstStageDays = rewMm / potentialMm;
  if (intervalDays < firstStageDays) return WET_SOIL_COEFFICIENT;
  const exponent = (-(intervalDays - firstStageDays) * potentialMm * (1 + rewMm / (tewMm - rewMm))) / tewMm;
  return Math.min(WET_SOIL_COEFFICIENT, (tewMm - (tewMm - rewMm) * Math.exp(exponent)) / (intervalDays * et0Mm));
}

/** How a bare seedbed is wetted. */
export interface SeedbedWetting {
  et0Mm: number;
  /** Days from wetting to wetting [d]. */
  intervalDays: number;
  /** Depth of one wetting [mm]. */
  depthMm: number;
  soilClass: BareSoilClass;
}

/**
 * Coefficient of a bare seedbed for any wetting depth: light below 10 mm, heavy above 40 mm, in a straight line between.
 * @returns Kc, 0-1.15 [–]
 * Source: FAO-56 annex 7 and (60)
 */
export function seedbedCoefficient({ et0Mm, intervalDays, depthMm, soilClass }: SeedbedWetting): number {
  requireNonNegative('depthMm', depthMm);
  if (et0Mm < NO_DEMAND_MM) return WET_SOIL_COEFFICIENT;
  const light = bareSoilCoefficient(et0Mm, intervalDays, evaporableAfterLightWetting(et0Mm));
  if (depthMm <= LIGHT_WETTING_MM) return light;
  const heavy = bareSoilCoefficient(et0Mm, intervalDays, evaporableAfterHeavyWetting(et0Mm, soilClass));
  const weight = Math.min(1, (depthMm - LIGHT_WETTING_MM) / (HEAVY_WETTING_MM - LIGHT_WETTING_MM));
  return light + weight * (heavy - light);
}
