import { stepRootZoneStore } from '@/scheduling/budget/rootZoneStore';

/** What one day does to the root zone of a patch. */
export interface PatchDay {
  /** Depletion at the start of the day [mm]. */
  depletionMm: number;
  /** Irrigation that reaches the roots [mm]. */
  irrigationMm: number;
  rainMm: number;
  /** Unstressed demand [mm]. */
  demandMm: number;
  totalAvailableMm: number;
  /** Depletion at which stress begins [mm]. */
  refillLineMm: number;
}

/**
 * Depletion of a patch at the end of a day, by the same store as the budget.
 * @returns depletion at the end of the day [mm], 0 to TAW
 * Source: FAO-56 chapter 8, as in `stepRootZoneStore`, with the refill line in the place of RAW.
 */
export function endOfDayDepletionMm({ depletionMm, irrigationMm, rainMm, demandMm, totalAvailableMm, refillLineMm }: PatchDay): number {
  // A patch may carry a little more depletion than the zone's store of the plan's first day holds.
  const { depletionEndMm } = stepRootZoneStore({
    depletionStartMm: Math.min(depletionMm, totalAvailableMm), potentialEtMm: demandMm, effectiveRainMm: rainMm, irrigationMm, totalAvailableMm, readilyAvailableMm: refillLineMm,
  });
  return Math.min(totalAvailableMm, depletionEndMm);
}
