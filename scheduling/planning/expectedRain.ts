import type { PlanDay } from './types';

/** Chance given to forecast rain when the forecast names none, by days ahead [%]. Default, common practice: skill fades with lead time. */
export const DEFAULT_RAIN_CHANCE_PCT: readonly number[] = [80, 70, 60, 50, 40, 30];

/** Share of a named chance that is still believed, by days ahead. Default, common practice. */
const BELIEF_BY_LEAD: readonly number[] = [1, 0.95, 0.9, 0.8, 0.7, 0.6];

/** Rain below this share of reference ET wets only leaves (FAO-56 chapter 8: rain under 0.2 ET0 may be ignored). */
const LIGHT_RAIN_SHARE = 0.2;

function atLead(table: readonly number[], leadDays: number): number {
  return table[Math.min(leadDays, table.length - 1)] ?? 0;
}

/**
 * Chance that the forecast rain of a day comes, as the plan believes it.
 * @param leadDays - days between the first day of the plan and that day
 * @returns probability, 0 to 1
 */
export function believedRainChance(day: Pick<PlanDay, 'rainProbabilityPct'>, leadDays: number): number {
  if (day.rainProbabilityPct === null) {
    return atLead(DEFAULT_RAIN_CHANCE_PCT, leadDays) / 100;
  }
  return (day.rainProbabilityPct / 100) * atLead(BELIEF_BY_LEAD, leadDays);
}

/** Forecast rain that would reach the roots if it came [mm]: nothing when it is lighter than 0.2 ET0. */
export function usefulRainMm(day: Pick<PlanDay, 'rainMm' | 'et0Mm'>): number {
  return day.rainMm < LIGHT_RAIN_SHARE * day.et0Mm ? 0 : day.rainMm;
}

/**
 * Rain that the plan counts on for a day: useful rain times the believed chance.
 * @returns expected rain [mm]
 */
export function expectedRainMm(day: Pick<PlanDay, 'rainMm' | 'et0Mm' | 'rainProbabilityPct'>, leadDays: number): number {
  return usefulRainMm(day) * believedRainChance(day, leadDays);
}
