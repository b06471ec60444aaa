/** Offset between the Celsius and Kelvin scales as FAO-56 uses it [K]. */
export const KELVIN_OFFSET = 273.16;

/**
 * Mean atmospheric pressure at a height.
 * @param elevationM - height above sea level [m]
 * @returns [kPa]
 * Equation: FAO-56 (7)
 */
export function atmosphericPressureKpa(elevationM: number): number {
  return 101.3 * ((293 - 0.0065 * elevationM) / 293) ** 5.26;
}

/**
 * Psychrometric constant with the latent heat of vaporization fixed at 2.45 MJ/kg.
 * @param pressureKpa - atmospheric pressure [kPa]
 * @returns [kPa/°C]
 * Equation: FAO-56 (8)
 */
export function psychrometricConstantKpaPerC(pressureKpa: number): number {
  return 0.665e-3 * pressureKpa;
}

/** Lowest wind speed that the reference equation takes: light air still carries vapour away [m/s]. FAO-56 chapter 3. */
export const MIN_WIND_MPS = 0.5;

/** Wind speed taken where none is known: the mean of over 2,000 stations [m/s]. FAO-56 chapter 3. */
export const DEFAULT_WIND_MPS = 2;

/**
 * Factor that brings a wind speed down (or up) to 2 m above grass by the logarithmic profile.
 * @param heightM - height of the measurement [m], above 0.1
 * @returns [–]
 * Equation: FAO-56 (47)
 */
export function windFactorToTwoMetres(heightM: number): number {
  return 4.87 / Math.log(67.8 * heightM - 5.42);
}

/**
 * Wind speed at 2 m above grass.
 * @param windMps - measured wind [m/s]
 * @param heightM - height of the measurement [m]
 * @returns [m/s]
 * Equation: FAO-56 (47)
 */
export function windAtTwoMetresMps(windMps: number, heightM: number): number {
  return windMps * windFactorToTwoMetres(heightM);
}
