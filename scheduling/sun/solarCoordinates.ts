/** Where the sun stands among the stars, and how far the sundial is ahead of the clock. */
export interface SolarCoordinates {
  /** δ [rad] */
  declinationRad: number;
  /** Apparent less mean solar time [min]; positive when the sundial is ahead. */
  equationOfTimeMinutes: number;
}

const DEGREE = Math.PI / 180;
const DAY_MS = 86_400_000;
/** Noon of 1 January 2000 [ms since 1970]. */
const J2000_MS = 946_728_000_000;
/** Terrestrial less universal time in these decades [s]; half a minute of error moves the sun by a hundred-thousandth of a degree of declination. */
const DELTA_T_SECONDS = 69;

/**
 * Declination of the sun and equation of time at an instant, good to 0.01° and a second of time for 1900-2100.
 * @param epochMs - milliseconds since 1970-01-01 UTC
 * Source: Meeus, Astronomical Algorithms, chapters 22, 25 and 28 (low accuracy)
 */
export function solarCoordinates(epochMs: number): SolarCoordinates {
  const t = ((epochMs - J2000_MS) / DAY_MS + DELTA_T_SECONDS / 86_400) / 36_525;
  const meanLongitudeDeg = 280.46646 + t * (36_000.76983 + t * 0.0003032);
  const anomaly = (357.52911 + t * (35_999.05029 - t * 0.0001537)) * DEGREE;
  const centreDeg = (1.914602 - t * (0.004817 + t * 0.000014)) * Math.sin(anomaly)
    + (0.019993 - 0.000101 * t) * Math.sin(2 * anomaly) + 0.000289 * Math.sin(3 * anomaly);
  const node = (125.04 - 1934.136 * t) * DEGREE;
  const longitude = (meanLongitudeDeg + centreDeg - 0.00569 - 0.00478 * Math.sin(node)) * DEGREE;
  const obliquity = (23.439291 - 0.0130042 * t + 0.00256 * Math.cos(node)) * DEGREE;
  const rightAscensionDeg = Math.atan2(Math.cos(obliquity) * Math.sin(longitude), Math.cos(longitude)) / DEGREE;
  const nutationDeg = -0.00478 * Math.sin(node);
  const difference = meanLongitudeDeg - 0.0057183 - rightAscensionDeg + nutationDeg * Math.cos(obliquity);
  const wrapped = difference - 360 * Math.round(difference / 360);
  return { declinationRad: Math.asin(Math.sin(obliquity) * Math.sin(longitude)), equationOfTimeMinutes: 4 * wrapped };
}

/**
 * Lift of the sun by the air.
 * @param altitudeRad - geometric height [rad]; below the horizon the lift at the horizon is taken
 * @returns [rad]
 * Source: Meeus (16.4), for 1010 hPa and 10 °C
 */
export function refractionRad(altitudeRad: number): number {
  const h = Math.max(0, altitudeRad);
  return 0.0002967 / Math.tan(h + 0.00312536 / (h + 0.08901179));
}

/** Geometric height of the sun's centre when it seems to stand on a flat horizon [rad]. */
export const APPARENT_HORIZON_RAD = -refractionRad(0);

/** Direction of the sun in the local frame. */
export interface SunDirection {
  /** Clockwise from north [rad], −π to π. */
  azimuthRad: number;
  /** Apparent height, refraction included [rad]. */
  altitudeRad: number;
}

/** Direction of the sun from its hour angle. @param hourAngleRad - 0 at solar noon, positive in the afternoon */
export function sunDirection(latitudeRad: number, declinationRad: number, hourAngleRad: number): SunDirection {
  const east = -Math.cos(declinationRad) * Math.sin(hourAngleRad);
  const north = Math.sin(declinationRad) * Math.cos(latitudeRad) - Math.cos(declinationRad) * Math.cos(hourAngleRad) * Math.sin(latitudeRad);
  const up = Math.sin(latitudeRad) * Math.sin(declinationRad) + Math.cos(latitudeRad) * Math.cos(declinationRad) * Math.cos(hourAngleRad);
  const geometric = Math.asin(Math.min(1, Math.max(-1, up)));
  return { azimuthRad: Math.atan2(east, north), altitudeRad: geometric + refractionRad(geometric) };
}

/** Hour angle at which the sun's centre seems to touch a flat horizon: 0 in polar night, π in polar day [rad]. */
export function apparentSunsetAngleRad(latitudeRad: number, declinationRad: number): number {
  const along = Math.cos(latitudeRad) * Math.cos(declinationRad);
  const constant = Math.sin(latitudeRad) * Math.sin(declinationRad);
  const wanted = Math.sin(APPARENT_HORIZON_RAD);
  if (along < 1e-9) return constant > wanted ? Math.PI : 0;
  return Math.acos(Math.min(1, Math.max(-1, (wanted - constant) / along)));
}
