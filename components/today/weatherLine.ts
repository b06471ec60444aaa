import type { UnitSystem } from '@/shared/contracts/common';
import type { TodayResponse } from '@/shared/contracts/rounds';
import { formatDepth, formatSpeed, formatTemperature } from '@/shared/display';

/** Wind below this is calm to a person and to a sprinkler [m/s]; common practice, 5 mph. */
const calmBelowMps = 2.2;

/** The day's weather in one short line, or nothing when it is not known. */
export function weatherLine(today: TodayResponse, units: UnitSystem): string | undefined {
  const { weather } = today;
  if (weather === null) {
    return undefined;
  }
  const parts: string[] = [];
  if (weather.tminC !== null && weather.tmaxC !== null) {
    parts.push(`${formatTemperature(weather.tminC, units)} to ${formatTemperature(weather.tmaxC, units)}`);
  }
  if (weather.windMps !== null) {
    parts.push(weather.windMps < calmBelowMps ? 'calm' : `wind ${formatSpeed(weather.windMps, units)}`);
  }
  if (weather.rainTodayMm !== null && weather.rainTodayMm >= 0.2) {
    parts.push(`rain ${formatDepth(weather.rainTodayMm, units)}`);
  }
  return parts.length > 0 ? parts.join(' · ') : undefined;
}
