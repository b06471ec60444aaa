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
 * Depletion of a patch at the end of a day: water first, surplus drains, then the grass draws with the stress coefficient
 * Ks = (TAW − Dr) / (TAW − RAW) beyond the refill line.
 * @returns depletion at the end of the day [mm], 0 to TAW
 * Source: FAO-56 chapter 8, equations 84 and 85, with the refill line in the place of RAW.
 */
export function endOfDayDepletionMm(day: PatchDay): number {
  const wetted = Math.max(0, day.depletionMm - day.irrigationMm - day.rainMm);
  const room = day.totalAvailableMm - day.refillLineMm;
  const stress = wetted <= day.refillLineMm ? 1 : room <= 0 ? 0 : Math.max(0, (day.totalAvailableMm - wetted) / room);
  return Math.min(day.totalAvailableMm, wetted + day.demandMm * stress);
}
