import { getPosition, getTimes } from 'suncalc';
import { epochDayOf, requireRange, type CivilDay } from '@/scheduling/units';

const DAY_MS = 86_400_000;
const HOUR_MS = 3_600_000;
const MINUTE_MS = 60_000;

/** Input of `daylight`. */
export interface DaylightInput {
  /** North positive [°]. */
  latitudeDeg: number;
  /** East positive [°]. */
  longitudeDeg: number;
  /** Civil day at the place. */
  on: CivilDay;
  /** Clock of the place at noon of that day, minutes east of UTC. Left out, the clock is taken as mean solar time, which is wrong near the date line only. */
  utcOffsetMinutes?: number;
}

/** Light of one civil day. Absent events are null with the reason beside them. */
export interface Daylight {
  /** Upper edge of the sun on the horizon, standard refraction. */
  sunriseAt: Date | null;
  sunsetAt: Date | null;
  solarNoonAt: Date;
  /** Polar day. */
  alwaysUp: boolean;
  /** Polar night. */
  alwaysDown: boolean;
  /** From sunrise to sunset [h]; 24 in polar day, 0 in polar night. */
  daylightHours: number;
}

/**
 * Sunrise, noon and sunset of a civil day at a place.
 * The solar day asked for is the one whose noon lies nearest to noon on the place's own clock, so that a zone far from its meridian or
 * across the date line gets its own day.
 * @throws PhysicsError for a place off the globe or an unreal day
 * Source: suncalc 2 (Meeus, Astronomical Algorithms, chapters 15 and 25)
 */
export function daylight({ latitudeDeg, longitudeDeg, on, utcOffsetMinutes }: DaylightInput): Daylight {
  requireRange('latitudeDeg', latitudeDeg, -90, 90);
  requireRange('longitudeDeg', longitudeDeg, -180, 180);
  const offsetMinutes = requireRange('utcOffsetMinutes', utcOffsetMinutes ?? longitudeDeg * 4, -15 * 60, 15 * 60);
  const localNoonMs = epochDayOf(on) * DAY_MS + 12 * HOUR_MS - offsetMinutes * MINUTE_MS;
  const times = getTimes(new Date(localNoonMs), latitudeDeg, longitudeDeg);
  const { sunrise, sunset } = times;
  const alwaysUp = times.alwaysUp === true;
  const alwaysDown = times.alwaysDown === true;
  return {
    sunriseAt: sunrise,
    sunsetAt: sunset,
    solarNoonAt: times.solarNoon,
    alwaysUp,
    alwaysDown,
    daylightHours: sunrise && sunset ? (sunset.getTime() - sunrise.getTime()) / HOUR_MS : alwaysUp ? 24 : 0,
  };
}

/** Where the sun stands. */
export interface SunPosition {
  /** Above the horizon, refraction included [°]. */
  altitudeDeg: number;
  /** Clockwise from north [°], 0 to below 360. */
  azimuthDeg: number;
}

/**
 * Place of the sun in the sky at an instant.
 * @throws PhysicsError for a place off the globe
 * Source: suncalc 2 (Meeus, chapter 25)
 */
export function sunPosition(at: Date, latitudeDeg: number, longitudeDeg: number): SunPosition {
  requireRange('latitudeDeg', latitudeDeg, -90, 90);
  requireRange('longitudeDeg', longitudeDeg, -180, 180);
  requireRange('at', at.getTime(), -8.64e15, 8.64e15);
  const position = getPosition(at, latitudeDeg, longitudeDeg);
  return { altitudeDeg: position.altitude, azimuthDeg: ((position.azimuth % 360) + 360) % 360 };
}
