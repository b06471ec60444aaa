import { mmFromInches, requireNonNegative } from '@/scheduling/units';

/** Rain of a day taken apart. */
export interface EffectiveRain {
  /** Rain that reaches the roots' store [mm]; what the store cannot hold drains later. */
  effectiveRainMm: number;
  /** Rain that wets leaves and is gone within the day [mm]. */
  rainLossMm: number;
}

/** A day's rain below this part of ET0 is ignored. FAO-56 chapter 8. */
export const IGNORED_RAIN_PER_ET0 = 0.2;

/**
 * Rain that counts: none below a fifth of the day's ET0, all of it above. The balance itself lets the surplus drain, so no flat
 * percentage is taken.
 * @throws PhysicsError for negative depths
 * Source: FAO-56 chapter 8
 */
export function effectiveRain(rainMm: number, et0Mm: number): EffectiveRain {
  requireNonNegative('rainMm', rainMm);
  requireNonNegative('et0Mm', et0Mm);
  return rainMm < IGNORED_RAIN_PER_ET0 * et0Mm ? { effectiveRainMm: 0, rainLossMm: rainMm } : { effectiveRainMm: rainMm, rainLossMm: 0 };
}

/**
 * Rain that counts by a published rule of thumb, offered beside the balance: the first 0.1 in is lost, then all counts to 1 in,
 * two thirds from 1 to 2 in, nothing beyond.
 * @returns [mm]
 * Source: Texas A&M AgriLife Extension
 */
export function effectiveRainByRuleMm(rainMm: number): number {
  requireNonNegative('rainMm', rainMm);
  const lost = mmFromInches(0.1);
  const inch = mmFromInches(1);
  const full = Math.max(0, Math.min(rainMm, inch) - lost);
  const part = Math.max(0, Math.min(rainMm, 2 * inch) - inch);
  return full + (2 / 3) * part;
}
