import type { ZoneDay } from './zoneDay';

/** Depletion in the morning of a day, with new roots and what somebody found in the ground, before the day's water [mm]. */
export function morningDepletionMm(day: Pick<ZoneDay, 'depletionStartMm' | 'rootGrowthMm' | 'observationMm' | 'totalAvailableMm'>): number {
  return Math.min(day.totalAvailableMm, Math.max(0, day.depletionStartMm + day.rootGrowthMm + day.observationMm));
}
