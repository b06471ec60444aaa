import { PhysicsError, requireNonNegative } from '@/scheduling/units';
import { stressCoefficient } from '@/scheduling/soil';

/** One day of a root zone, all depths in mm. */
export interface StoreDay {
  /** Dr at the start of the day, already with root growth [mm]. */
  depletionStartMm: number;
  /** What roots would take without stress [mm]. */
  potentialEtMm: number;
  /** Evaporation from bare ground, which stress of the roots does not lower [mm]; none when left out. */
  evaporationMm?: number;
  /** Rain that enters the soil [mm]. */
  effectiveRainMm: number;
  /** Irrigation that enters the soil [mm]. */
  irrigationMm: number;
  /** TAW [mm] */
  totalAvailableMm: number;
  /** RAW, the refill line [mm]. */
  readilyAvailableMm: number;
}

/** What the day did. */
export interface StoreDayResult {
  /** Ks [–] */
  stressCoefficient: number;
  /** ETc with stress, evaporation included [mm]. */
  etcMm: number;
  /** Part of it that evaporated from bare ground [mm]. */
  evaporationMm: number;
  /** Water that left below the roots [mm]. */
  drainageMm: number;
  depletionEndMm: number;
}

/**
 * One daily step of a root zone: depletionEnd = depletionStart + ETc − effective rain − irrigation + drainage. The budget and the planner's outlook both
 * go by it.
 * Water comes early in the day, so stress is judged with the day's water already in; what is more than the day uses and the soil holds drains.
 * @throws PhysicsError for negative depths or a depletion beyond the store, with the field named
 * Equations: FAO-56 (84), (85), (88)
 */
export function stepRootZoneStore(day: StoreDay): StoreDayResult {
  const { depletionStartMm, potentialEtMm, effectiveRainMm, irrigationMm, totalAvailableMm, readilyAvailableMm } = day;
  const evaporationWantedMm = day.evaporationMm ?? 0;
  requireNonNegative('potentialEtMm', potentialEtMm);
  requireNonNegative('evaporationMm', evaporationWantedMm);
  requireNonNegative('effectiveRainMm', effectiveRainMm);
  requireNonNegative('irrigationMm', irrigationMm);
  requireNonNegative('totalAvailableMm', totalAvailableMm);
  requireNonNegative('readilyAvailableMm', readilyAvailableMm);
  requireNonNegative('depletionStartMm', depletionStartMm);
  if (depletionStartMm > totalAvailableMm + 1e-9) {
    throw new PhysicsError('depletionStartMm', depletionStartMm, `must not lie above totalAvailableMm ${totalAvailableMm}`);
  }
  const waterMm = effectiveRainMm + irrigationMm;
  const wettedMm = Math.max(0, depletionStartMm - waterMm);
  const ks = stressCoefficient(wettedMm, totalAvailableMm, readilyAvailableMm);
  // Nothing can take more than what is left, counting the surplus of the day before it drains.
  const leftMm = Math.max(0, totalAvailableMm - depletionStartMm + waterMm);
  const evaporationMm = Math.min(evaporationWantedMm, leftMm);
  const etcMm = evaporationMm + Math.min(potentialEtMm * ks, leftMm - evaporationMm);
  const drainageMm = Math.max(0, waterMm - etcMm - depletionStartMm);
  const depletionEndMm = Math.max(0, depletionStartMm + etcMm - waterMm + drainageMm);
  return { stressCoefficient: ks, etcMm, evaporationMm, drainageMm, depletionEndMm };
}
