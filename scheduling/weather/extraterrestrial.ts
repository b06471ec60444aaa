/** Solar constant [MJ m⁻² min⁻¹]. FAO-56 chapter 3. */
const SOLAR_CONSTANT_MJ_M2_MIN = 0.082;

/** Water evaporated by one MJ/m² [mm]. FAO-56 (20). */
export const MM_PER_MJ_M2 = 0.408;

/** Inverse relative distance between Earth and Sun. @param day - J, 1-366 @returns dr [–]. Equation: FAO-56 (23) */
export function inverseRelativeDistance(day: number): number {
  return 1 + 0.033 * Math.cos((2 * Math.PI * day) / 365);
}

/** Solar declination, good to about half a degree. @param day - J, 1-366 @returns δ [rad]. Equation: FAO-56 (24) */
export function solarDeclinationRad(day: number): number {
  return 0.409 * Math.sin((2 * Math.PI * day) / 365 - 1.39);
}

/**
 * Hour angle of sunset: 0 in polar night, π in polar day.
 * @param latitudeRad - north positive [rad]
 * @param declinationRad - solar declination [rad]
 * @returns ωs [rad]
 * Equation: FAO-56 (25)
 */
export function sunsetHourAngleRad(latitudeRad: number, declinationRad: number): number {
  const cosine = -Math.tan(latitudeRad) * Math.tan(declinationRad);
  return Math.acos(Math.min(1, Math.max(-1, cosine)));
}

/** Daylight hours of a flat horizon. @returns N [h], 0 in polar night and 24 in polar day. Equation: FAO-56 (34) */
export function daylightHours(sunsetAngleRad: number): number {
  return (24 / Math.PI) * sunsetAngleRad;
}

/** The sun's geometry on one day at one latitude. */
export interface SolarDay {
  latitudeRad: number;
  inverseDistance: number;
  declinationRad: number;
  sunsetAngleRad: number;
  /** N [h] */
  daylightHours: number;
  /** Ra [MJ m⁻² d⁻¹] */
  extraterrestrialMjM2: number;
}

/**
 * Daily radiation on a horizontal surface above the air.
 * @returns Ra [MJ m⁻² d⁻¹], never negative
 * Equation: FAO-56 (21)
 */
export function extraterrestrialRadiationMjM2(latitudeRad: number, declinationRad: number, inverseDistance: number, sunsetAngleRad: number): number {
  const geometry = sunsetAngleRad * Math.sin(latitudeRad) * Math.sin(declinationRad)
    + Math.cos(latitudeRad) * Math.cos(declinationRad) * Math.sin(sunsetAngleRad);
  return Math.max(0, ((24 * 60) / Math.PI) * SOLAR_CONSTANT_MJ_M2_MIN * inverseDistance * geometry);
}

/** All daily solar geometry at once. @param latitudeDeg - north positive [°] @param day - J, 1-366 */
export function solarDay(latitudeDeg: number, day: number): SolarDay {
  const latitudeRad = (latitudeDeg * Math.PI) / 180;
  const inverseDistance = inverseRelativeDistance(day);
  const declinationRad = solarDeclinationRad(day);
  const sunsetAngleRad = sunsetHourAngleRad(latitudeRad, declinationRad);
  return {
    latitudeRad,
    inverseDistance,
    declinationRad,
    sunsetAngleRad,
    daylightHours: daylightHours(sunsetAngleRad),
    extraterrestrialMjM2: extraterrestrialRadiationMjM2(latitudeRad, declinationRad, inverseDistance, sunsetAngleRad),
  };
}

/** Seasonal correction of solar time. @returns Sc [h]. Equation: FAO-56 (32), (33) */
export function seasonalTimeCorrectionHours(day: number): number {
  const b = (2 * Math.PI * (day - 81)) / 364;
  return 0.1645 * Math.sin(2 * b) - 0.1255 * Math.cos(b) - 0.025 * Math.sin(b);
}

/** When and where an hour angle is wanted. Longitudes are EAST positive, as on maps; the published formula counts them westward. */
export interface SolarClock {
  /** Middle of the period on the standard (not daylight-saving) clock [h]. */
  clockHours: number;
  longitudeDeg: number;
  /** Longitude of the centre of the time zone, 15 × UTC offset [°], east positive. */
  zoneMeridianDeg: number;
  /** J, 1-366. */
  day: number;
}

/** Solar time angle at the middle of a period, 0 at solar noon, wrapped to (−π, π]. @returns ω [rad]. Equation: FAO-56 (31) */
export function solarHourAngleRad({ clockHours, longitudeDeg, zoneMeridianDeg, day }: SolarClock): number {
  const solarHours = clockHours + (longitudeDeg - zoneMeridianDeg) / 15 + seasonalTimeCorrectionHours(day);
  const angle = (Math.PI / 12) * (solarHours - 12);
  return angle - 2 * Math.PI * Math.ceil((angle - Math.PI) / (2 * Math.PI));
}

/**
 * Radiation above the air during a period, from hour angle to hour angle, cut off at sunrise and sunset.
 * @returns Ra [MJ m⁻² per period], never negative
 * Equation: FAO-56 (28)
 */
export function extraterrestrialRadiationOfPeriodMjM2(sun: SolarDay, fromAngleRad: number, toAngleRad: number): number {
  const from = Math.max(-sun.sunsetAngleRad, Math.min(sun.sunsetAngleRad, fromAngleRad));
  const to = Math.max(-sun.sunsetAngleRad, Math.min(sun.sunsetAngleRad, toAngleRad));
  if (to <= from) return 0;
  const geometry = (to - from) * Math.sin(sun.latitudeRad) * Math.sin(sun.declinationRad)
    + Math.cos(sun.latitudeRad) * Math.cos(sun.declinationRad) * (Math.sin(to) - Math.sin(from));
  return Math.max(0, ((12 * 60) / Math.PI) * SOLAR_CONSTANT_MJ_M2_MIN * sun.inverseDistance * geometry);
}

/** Sine of the sun's height at an hour angle, negative below the horizon. */
export function sineOfSolarAltitude(latitudeRad: number, declinationRad: number, hourAngleRad: number): number {
  return Math.sin(latitudeRad) * Math.sin(declinationRad) + Math.cos(latitudeRad) * Math.cos(declinationRad) * Math.cos(hourAngleRad);
}
