/**
 * Saturation vapour pressure of air.
 * @param temperatureC - air temperature [°C]
 * @returns e° [kPa]
 * Equation: FAO-56 (11)
 */
export function saturationVapourPressureKpa(temperatureC: number): number {
  return 0.6108 * Math.exp((17.27 * temperatureC) / (temperatureC + 237.3));
}

/**
 * Slope of the saturation vapour pressure curve.
 * @param temperatureC - air temperature [°C]
 * @returns Δ [kPa/°C]
 * Equation: FAO-56 (13)
 */
export function vapourPressureSlopeKpaPerC(temperatureC: number): number {
  return (4098 * saturationVapourPressureKpa(temperatureC)) / (temperatureC + 237.3) ** 2;
}

/**
 * Mean saturation vapour pressure of a day: the mean of both extremes, since e° of the mean temperature is too low.
 * @returns es [kPa]
 * Equation: FAO-56 (12)
 */
export function meanSaturationVapourPressureKpa(tminC: number, tmaxC: number): number {
  return (saturationVapourPressureKpa(tmaxC) + saturationVapourPressureKpa(tminC)) / 2;
}

/** Actual vapour pressure from the dew point. @returns ea [kPa]. Equation: FAO-56 (14) */
export function actualVapourPressureFromDewPointKpa(tdewC: number): number {
  return saturationVapourPressureKpa(tdewC);
}

/** How the wet bulb is aired. */
export type PsychrometerKind = 'aspirated' | 'natural' | 'indoor';

const PSYCHROMETER_COEFFICIENT: Record<PsychrometerKind, number> = { aspirated: 0.000662, natural: 0.0008, indoor: 0.0012 };

/**
 * Actual vapour pressure from a psychrometer.
 * @param dryC - dry-bulb temperature [°C]
 * @param wetC - wet-bulb temperature [°C]
 * @param pressureKpa - atmospheric pressure [kPa]
 * @returns ea [kPa]
 * Equation: FAO-56 (15), (16)
 */
export function actualVapourPressureFromPsychrometerKpa(dryC: number, wetC: number, pressureKpa: number, kind: PsychrometerKind): number {
  return saturationVapourPressureKpa(wetC) - PSYCHROMETER_COEFFICIENT[kind] * pressureKpa * (dryC - wetC);
}

/** Humidity and temperature extremes of one day. */
export interface HumidityExtremes {
  tminC: number;
  tmaxC: number;
  /** Highest relative humidity, reached near dawn [%]. */
  rhMaxPct: number;
  /** Lowest relative humidity, reached in the afternoon [%]. */
  rhMinPct: number;
}

/** Actual vapour pressure from both humidity extremes. @returns ea [kPa]. Equation: FAO-56 (17) */
export function actualVapourPressureFromExtremesKpa({ tminC, tmaxC, rhMaxPct, rhMinPct }: HumidityExtremes): number {
  return (saturationVapourPressureKpa(tminC) * rhMaxPct + saturationVapourPressureKpa(tmaxC) * rhMinPct) / 200;
}

/** Actual vapour pressure from the highest humidity alone. @returns ea [kPa]. Equation: FAO-56 (18) */
export function actualVapourPressureFromMaxHumidityKpa(tminC: number, rhMaxPct: number): number {
  return (saturationVapourPressureKpa(tminC) * rhMaxPct) / 100;
}

/** Actual vapour pressure from the mean humidity. @returns ea [kPa]. Equation: FAO-56 (19) */
export function actualVapourPressureFromMeanHumidityKpa(tminC: number, tmaxC: number, rhMeanPct: number): number {
  return (rhMeanPct / 100) * meanSaturationVapourPressureKpa(tminC, tmaxC);
}

/** Degrees by which the dew point stays below the minimum temperature where the air is arid: the middle of the published 2-3 °C. FAO-56 annex 6. */
export const ARID_DEW_POINT_DEPRESSION_C = 2.5;

/**
 * Dew point where no humidity was measured: near the minimum temperature, lower in arid places.
 * @returns [°C]
 * Equation: FAO-56 (48) and annex 6
 */
export function dewPointFromMinimumC(tminC: number, arid: boolean): number {
  return arid ? tminC - ARID_DEW_POINT_DEPRESSION_C : tminC;
}

/** Dew point of a vapour pressure, the inverse of FAO-56 (11). @param vapourKpa - above zero [kPa] @returns [°C] */
export function dewPointFromVapourPressureC(vapourKpa: number): number {
  const logRatio = Math.log(vapourKpa / 0.6108);
  return (237.3 * logRatio) / (17.27 - logRatio);
}

/** Relative humidity of air, at most 100. @returns [%]. Equation: FAO-56 (10) */
export function relativeHumidityPct(vapourKpa: number, temperatureC: number): number {
  return Math.min(100, (100 * vapourKpa) / saturationVapourPressureKpa(temperatureC));
}
