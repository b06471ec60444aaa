import { KELVIN_OFFSET } from './atmosphere';
import type { SolarDay } from './extraterrestrial';

/** Stefan-Boltzmann constant for a day [MJ K⁻⁴ m⁻² d⁻¹]. FAO-56 chapter 3. */
export const STEFAN_BOLTZMANN_DAY = 4.903e-9;
/** Stefan-Boltzmann constant for an hour [MJ K⁻⁴ m⁻² h⁻¹]. FAO-56 chapter 4. */
export const STEFAN_BOLTZMANN_HOUR = 2.043e-10;
/** Light that the reference grass sends back [–]. FAO-56 (38). */
export const GRASS_ALBEDO = 0.23;

/** Coefficient of the temperature-range estimate, inland and near a coast [°C⁻⁰·⁵]. FAO-56 (50). */
export const TEMPERATURE_RANGE_COEFFICIENT = { inland: 0.16, coast: 0.19 } as const;

/**
 * Solar radiation from the hours of bright sunshine.
 * @param sunshineHours - n [h]
 * @param possibleHours - N [h]; 0 in polar night
 * @param extraterrestrialMjM2 - Ra
 * @returns Rs [MJ m⁻² d⁻¹]
 * Equation: FAO-56 (35) with the default a 0.25, b 0.50
 */
export function solarFromSunshineMjM2(sunshineHours: number, possibleHours: number, extraterrestrialMjM2: number): number {
  if (possibleHours <= 0) return 0;
  return (0.25 + 0.5 * Math.min(1, sunshineHours / possibleHours)) * extraterrestrialMjM2;
}

/**
 * Solar radiation from the range of air temperature, not more than under a clear sky.
 * @param rangeCoefficient - kRs, see TEMPERATURE_RANGE_COEFFICIENT
 * @param clearSkyMjM2 - Rso, the cap
 * @returns Rs [MJ m⁻² d⁻¹]
 * Equation: FAO-56 (50)
 */
export function solarFromTemperatureRangeMjM2(tminC: number, tmaxC: number, rangeCoefficient: number, extraterrestrialMjM2: number, clearSkyMjM2: number): number {
  return Math.min(clearSkyMjM2, rangeCoefficient * Math.sqrt(Math.max(0, tmaxC - tminC)) * extraterrestrialMjM2);
}

/** Clear-sky radiation, simple form. @returns Rso [MJ m⁻² d⁻¹]. Equation: FAO-56 (37) */
export function clearSkySimpleMjM2(elevationM: number, extraterrestrialMjM2: number): number {
  return (0.75 + 2e-5 * elevationM) * extraterrestrialMjM2;
}

/**
 * Clear-sky radiation from sun height, pressure and water in the air. The simple form overstates it in low sun.
 * @param sun - solar geometry of the day
 * @param day - J, 1-366
 * @param pressureKpa - atmospheric pressure [kPa]
 * @param vapourKpa - ea [kPa]
 * @returns Rso [MJ m⁻² d⁻¹]
 * Equation: ASCE-EWRI 2005, appendix D, with clean air (turbidity 1); the sine of the mean sun height is not taken below 0.1.
 */
export function clearSkyPhysicalMjM2(sun: SolarDay, day: number, pressureKpa: number, vapourKpa: number): number {
  const phi = sun.latitudeRad;
  const seasonal = Math.sin((2 * Math.PI * day) / 365 - 1.39);
  const height = 0.85 + 0.3 * phi * seasonal - 0.42 * phi * phi;
  const sine = Math.max(0.1, Math.sin(height));
  const waterMm = 0.14 * vapourKpa * pressureKpa + 2.1;
  const beam = 0.98 * Math.exp((-0.00146 * pressureKpa) / sine - 0.075 * (waterMm / sine) ** 0.4);
  const diffuse = beam >= 0.15 ? 0.35 - 0.36 * beam : 0.18 + 0.82 * beam;
  return (beam + diffuse) * sun.extraterrestrialMjM2;
}

/** Net short-wave radiation of grass. @returns Rns [MJ m⁻² per period]. Equation: FAO-56 (38) */
export function netShortwaveMjM2(solarMjM2: number): number {
  return (1 - GRASS_ALBEDO) * solarMjM2;
}

/** Black-body radiation at one temperature over a day. @returns σT⁴ [MJ m⁻² d⁻¹]. FAO-56 table 2.8 */
export function blackBodyMjM2(temperatureC: number): number {
  // Squared twice: a general power takes several times as long, and every day of weather asks for two.
  const squared = (temperatureC + KELVIN_OFFSET) * (temperatureC + KELVIN_OFFSET);
  return STEFAN_BOLTZMANN_DAY * squared * squared;
}

/** Part of the long-wave loss that humidity lets through. @returns [–], never negative */
export function longwaveHumidityFactor(vapourKpa: number): number {
  return Math.max(0, 0.34 - 0.14 * Math.sqrt(vapourKpa));
}

/** Part of the long-wave loss that cloud lets through. @param relativeSolar - Rs/Rso, counted as 1 at most @returns [–], not below 0.055 */
export function longwaveCloudFactor(relativeSolar: number): number {
  // Below Rs/Rso 0.3 the published line turns towards zero; ASCE-EWRI 2005 stops at 0.3, where the factor is 0.055.
  return Math.max(0.055, 1.35 * Math.min(1, relativeSolar) - 0.35);
}

/**
 * Net long-wave loss of a day.
 * @param relativeSolar - Rs/Rso [–]
 * @returns Rnl [MJ m⁻² d⁻¹]
 * Equation: FAO-56 (39)
 */
export function netLongwaveMjM2(tminC: number, tmaxC: number, vapourKpa: number, relativeSolar: number): number {
  const meanBlackBody = (blackBodyMjM2(tmaxC) + blackBodyMjM2(tminC)) / 2;
  return meanBlackBody * longwaveHumidityFactor(vapourKpa) * longwaveCloudFactor(relativeSolar);
}

/** Net long-wave loss of an hour. @returns Rnl [MJ m⁻² h⁻¹]. Equation: FAO-56 (39) with the hourly constant */
export function netLongwaveHourMjM2(temperatureC: number, vapourKpa: number, relativeSolar: number): number {
  return STEFAN_BOLTZMANN_HOUR * (temperatureC + KELVIN_OFFSET) ** 4 * longwaveHumidityFactor(vapourKpa) * longwaveCloudFactor(relativeSolar);
}

/** Heat into the soil over a month, when the next month is known. @returns G [MJ m⁻² d⁻¹]. Equation: FAO-56 (43) */
export function soilHeatFluxOfMonthMjM2(previousMonthC: number, nextMonthC: number): number {
  return 0.07 * (nextMonthC - previousMonthC);
}

/** Heat into the soil over a month, when only the month before is known. @returns G [MJ m⁻² d⁻¹]. Equation: FAO-56 (44) */
export function soilHeatFluxOfLastMonthMjM2(previousMonthC: number, thisMonthC: number): number {
  return 0.14 * (thisMonthC - previousMonthC);
}

/** Heat into the soil over an hour. @returns G [MJ m⁻² h⁻¹]. Equation: FAO-56 (45), (46) */
export function soilHeatFluxOfHourMjM2(netRadiationMjM2: number, daytime: boolean): number {
  return (daytime ? 0.1 : 0.5) * netRadiationMjM2;
}
