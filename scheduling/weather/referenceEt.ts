import { MM_PER_MJ_M2 } from './extraterrestrial';

/** Numerator of the wind term for a day [K mm s³ Mg⁻¹ d⁻¹]. FAO-56 (6). */
const DAY_AERODYNAMIC = 900;

/** What the Penman–Monteith equation needs for one period. */
export interface PenmanMonteithInput {
  /** Mean air temperature [°C]. */
  temperatureC: number;
  /** Wind at 2 m [m/s]. */
  windAtTwoMetresMps: number;
  /** Rn − G [MJ m⁻² per period]. */
  availableEnergyMjM2: number;
  /** es − ea [kPa]. */
  vapourDeficitKpa: number;
  /** Δ [kPa/°C]. */
  slopeKpaPerC: number;
  /** γ [kPa/°C]. */
  psychrometricKpaPerC: number;
}

/** The two parts of the result. */
export interface PenmanMonteithTerms {
  /** Part driven by radiation [mm]. */
  radiationTermMm: number;
  /** Part driven by dry moving air [mm]. */
  windTermMm: number;
  /** Their sum, which can fall a little below zero on cold humid nights [mm]. */
  et0Mm: number;
}

/**
 * Writes both parts of a day's reference evapotranspiration on a sheet that many days share.
 * Equation: FAO-56 (6)
 */
export function penmanMonteithDayOnto(
  sheet: { radiationTermMm: number; windTermMm: number }, temperatureC: number, windAtTwoMetresMps: number, availableEnergyMjM2: number, vapourDeficitKpa: number, slopeKpaPerC: number,
  psychrometricKpaPerC: number,
): void {
  const denominator = slopeKpaPerC + psychrometricKpaPerC * (1 + 0.34 * windAtTwoMetresMps);
  sheet.radiationTermMm = (MM_PER_MJ_M2 * slopeKpaPerC * availableEnergyMjM2) / denominator;
  sheet.windTermMm = (psychrometricKpaPerC * (DAY_AERODYNAMIC / (temperatureC + 273)) * windAtTwoMetresMps * vapourDeficitKpa) / denominator;
}

function penmanMonteith(input: PenmanMonteithInput, aerodynamic: number): PenmanMonteithTerms {
  const { temperatureC, windAtTwoMetresMps, availableEnergyMjM2, vapourDeficitKpa, slopeKpaPerC, psychrometricKpaPerC } = input;
  const sheet = { radiationTermMm: 0, windTermMm: 0 };
  penmanMonteithDayOnto(sheet, temperatureC, windAtTwoMetresMps, availableEnergyMjM2, vapourDeficitKpa, slopeKpaPerC, psychrometricKpaPerC);
  const windTermMm = (sheet.windTermMm * aerodynamic) / DAY_AERODYNAMIC;
  return { radiationTermMm: sheet.radiationTermMm, windTermMm, et0Mm: sheet.radiationTermMm + windTermMm };
}

/** Reference evapotranspiration of a day. @returns [mm/d]. Equation: FAO-56 (6) */
export function penmanMonteithDay(input: PenmanMonteithInput): PenmanMonteithTerms {
  return penmanMonteith(input, DAY_AERODYNAMIC);
}

/** Reference evapotranspiration of an hour, with surface resistance 70 s/m by day and night. @returns [mm/h]. Equation: FAO-56 (53) */
export function penmanMonteithHour(input: PenmanMonteithInput): PenmanMonteithTerms {
  return penmanMonteith(input, 37);
}

/**
 * Reference evapotranspiration from temperatures alone (Hargreaves–Samani).
 * @param tmeanC - mean temperature, half-way between the extremes unless measured [°C]
 * @param extraterrestrialMjM2 - Ra [MJ m⁻² d⁻¹]
 * @returns [mm/d], never negative
 * Equation: FAO-56 (52)
 */
export function hargreavesMm(tminC: number, tmaxC: number, tmeanC: number, extraterrestrialMjM2: number): number {
  return Math.max(0, 0.0023 * (tmeanC + 17.8) * Math.sqrt(Math.max(0, tmaxC - tminC)) * MM_PER_MJ_M2 * extraterrestrialMjM2);
}
