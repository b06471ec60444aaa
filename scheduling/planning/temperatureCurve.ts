import { normalizeWindows } from './minuteWindows';
import type { MinuteWindow, PlanDay } from './types';

/** Water is not started at or below this air temperature [°C]. Default: a little above freezing (trade practice: not at or below freezing). */
export const FROST_LIMIT_C = 0.5;

/** Warmest minute of an ordinary day, 15:00 by the clock. Common practice. */
const WARMEST_MINUTES = 900;
const DEFAULT_SUNRISE_MINUTES = 360;
const STEP_MINUTES = 10;

/**
 * Air temperature at a minute of the day from the day's extremes: a cosine from the minimum at sunrise to the maximum at 15:00 and back to the
 * minimum at the next sunrise. The previous afternoon is taken to have been as warm as this one.
 * @param day - extremes [°C] and sunrise [minutes after local midnight], 6:00 when there is none
 * @param minutes - minutes after local midnight
 * @returns air temperature [°C]
 * Source: sinusoidal interpolation between daily extremes, common practice in crop models (after de Wit 1978, from memory).
 */
export function temperatureAtMinutes(day: Pick<PlanDay, 'tminC' | 'tmaxC' | 'sunriseMinutes'>, minutes: number): number {
  const sunrise = Math.min(day.sunriseMinutes ?? DEFAULT_SUNRISE_MINUTES, WARMEST_MINUTES - 60);
  const rangeC = day.tmaxC - day.tminC;
  if (minutes >= sunrise && minutes <= WARMEST_MINUTES) {
    const part = (minutes - sunrise) / (WARMEST_MINUTES - sunrise);
    return day.tminC + (rangeC * (1 - Math.cos(Math.PI * part))) / 2;
  }
  const coolingMinutes = 1440 - (WARMEST_MINUTES - sunrise);
  const sinceWarmest = minutes > WARMEST_MINUTES ? minutes - WARMEST_MINUTES : minutes + 1440 - WARMEST_MINUTES;
  return day.tminC + (rangeC * (1 + Math.cos((Math.PI * sinceWarmest) / coolingMinutes))) / 2;
}

/** The parts of a day warm enough to water, in steps of ten minutes. */
export function frostFreeWindows(day: Pick<PlanDay, 'tminC' | 'tmaxC' | 'sunriseMinutes'>): MinuteWindow[] {
  if (day.tminC > FROST_LIMIT_C) {
    return [{ fromMinutes: 0, toMinutes: 1440 }];
  }
  const warm: MinuteWindow[] = [];
  for (let from = 0; from < 1440; from += STEP_MINUTES) {
    const to = from + STEP_MINUTES;
    if (temperatureAtMinutes(day, from) > FROST_LIMIT_C && temperatureAtMinutes(day, to) > FROST_LIMIT_C) {
      warm.push({ fromMinutes: from, toMinutes: to });
    }
  }
  return normalizeWindows(warm);
}
