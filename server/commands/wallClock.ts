import { daylight } from '@/scheduling/sun';
import { addDays, epochDayOf } from '@/scheduling/units/civilDay';
import type { MinuteWindow } from '@/shared/contracts/common';
import { civilDayAt, instantAt, minutesAt } from '@/shared/time';

const DAY_MINUTES = 1440;
/** Clocks change by quarter hours at the finest. */
const STEP_MINUTES = 15;
const MINUTE_MS = 60_000;

/** Wall-clock time that a civil day does not have because clocks are put forward; empty on other days. */
export function skippedWindows(on: string, timeZone: string): MinuteWindow[] {
  const lengthMinutes = (instantAt(addDays(on, 1), 0, timeZone).getTime() - instantAt(on, 0, timeZone).getTime()) / MINUTE_MS;
  if (lengthMinutes >= DAY_MINUTES && minutesAt(instantAt(on, 0, timeZone), timeZone) === 0) {
    return [];
  }
  const windows: MinuteWindow[] = [];
  for (let fromMinutes = 0; fromMinutes < DAY_MINUTES; fromMinutes += STEP_MINUTES) {
    if (minutesAt(instantAt(on, fromMinutes, timeZone), timeZone) === fromMinutes) {
      continue;
    }
    const last = windows[windows.length - 1];
    if (last && last.toMinutes === fromMinutes) {
      last.toMinutes = fromMinutes + STEP_MINUTES;
    } else {
      windows.push({ fromMinutes, toMinutes: fromMinutes + STEP_MINUTES });
    }
  }
  return windows;
}

/** Windows without the minutes of others. */
export function withoutWindows(windows: readonly MinuteWindow[], taken: readonly MinuteWindow[]): MinuteWindow[] {
  return taken.reduce<MinuteWindow[]>((left, hole) => left.flatMap((window) => [
    { fromMinutes: window.fromMinutes, toMinutes: Math.min(window.toMinutes, hole.fromMinutes) },
    { fromMinutes: Math.max(window.fromMinutes, hole.toMinutes), toMinutes: window.toMinutes },
  ].filter((part) => part.fromMinutes < part.toMinutes)), [...windows]);
}

/**
 * The instant at which clocks show a time, not before another instant where that can be: a time that comes twice in autumn may mean its second coming.
 */
export function instantFrom(on: string, minutes: number, timeZone: string, notBefore: Date): Date {
  const first = instantAt(on, minutes, timeZone);
  if (first >= notBefore) {
    return first;
  }
  for (const laterMinutes of [30, 60]) {
    const second = new Date(first.getTime() + laterMinutes * MINUTE_MS);
    if (civilDayAt(second, timeZone) === on && minutesAt(second, timeZone) === minutes) {
      return second;
    }
  }
  return first;
}

/** Sunrise and sunset of a civil day on the clocks of the place [minutes after local midnight]; null when there is none. */
export function daylightMinutes(place: { latitudeDeg: number; longitudeDeg: number; timeZone: string }, on: string): { sunriseMinutes: number | null; sunsetMinutes: number | null } {
  const noonMinutes = epochDayOf(on) * DAY_MINUTES + DAY_MINUTES / 2;
  const utcOffsetMinutes = noonMinutes - instantAt(on, DAY_MINUTES / 2, place.timeZone).getTime() / MINUTE_MS;
  const { sunriseAt, sunsetAt } = daylight({ latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, on, utcOffsetMinutes });
  const onDay = (instant: Date | null): number | null => {
    if (instant === null) {
      return null;
    }
    const day = civilDayAt(instant, place.timeZone);
    return day < on ? 0 : day > on ? DAY_MINUTES : minutesAt(instant, place.timeZone);
  };
  return { sunriseMinutes: onDay(sunriseAt), sunsetMinutes: onDay(sunsetAt) };
}
