import { DEFAULT_WIND_MPS, MIN_WIND_MPS, windAtTwoMetresMps } from './atmosphere';
import type { Assumption, DailyWeather, WeatherSite } from './dailyWeather';
import { solarFromSunshineMjM2, solarFromTemperatureRangeMjM2, TEMPERATURE_RANGE_COEFFICIENT } from './radiation';
import {
  actualVapourPressureFromDewPointKpa, actualVapourPressureFromExtremesKpa, actualVapourPressureFromMaxHumidityKpa,
  actualVapourPressureFromMeanHumidityKpa, dewPointFromMinimumC,
} from './vapour';

const HUMIDITY_FROM_MAX: Assumption = { field: 'rhMinPct', method: 'humidity from the highest reading alone', source: 'FAO-56 (18)' };
const HUMIDITY_FROM_MEAN: Assumption = { field: 'rhMaxPct', method: 'humidity from the mean of the day', source: 'FAO-56 (19)' };
const DEW_AT_MINIMUM: Assumption = { field: 'tdewC', method: 'dew point taken at the lowest temperature', source: 'FAO-56 (48)' };
const DEW_BELOW_MINIMUM: Assumption = { field: 'tdewC', method: 'dew point taken 2.5 °C below the lowest temperature, arid air', source: 'FAO-56 annex 6' };
const SUN_FROM_HOURS: Assumption = { field: 'solarMjM2', method: 'radiation from the hours of sunshine', source: 'FAO-56 (35)' };
const SUN_FROM_RANGE_INLAND: Assumption = { field: 'solarMjM2', method: 'radiation from the temperature range, inland', source: 'FAO-56 (50)' };
const SUN_FROM_RANGE_COAST: Assumption = { field: 'solarMjM2', method: 'radiation from the temperature range, near a coast', source: 'FAO-56 (50)' };
const SUN_CAPPED: Assumption = { field: 'solarMjM2', method: 'radiation cut to what arrives above the air', source: 'conservation of energy' };
const WIND_DEFAULT: Assumption = { field: 'windMps', method: 'wind taken as 2 m/s', source: 'FAO-56 chapter 3, mean of 2,000 stations' };
const WIND_HEIGHT_DEFAULT: Assumption = { field: 'windHeightM', method: 'wind taken as measured at 2 m', source: 'FAO-56 chapter 3' };
const WIND_RAISED: Assumption = { field: 'windMps', method: 'wind raised to 0.5 m/s', source: 'FAO-56 chapter 3' };

/**
 * Actual vapour pressure by the best data at hand, in the published order: dew point, both humidity extremes, highest humidity,
 * mean humidity, lowest temperature.
 * @param assumed - receives what was assumed
 * @returns ea [kPa]
 * Source: FAO-56 chapter 3 and (48)
 */
export function resolveVapourPressureKpa(weather: DailyWeather, tminC: number, tmaxC: number, site: WeatherSite, assumed: Assumption[]): number {
  const { tdewC, rhMaxPct, rhMinPct, rhMeanPct } = weather;
  if (tdewC !== null) return actualVapourPressureFromDewPointKpa(tdewC);
  if (rhMaxPct !== null && rhMinPct !== null) return actualVapourPressureFromExtremesKpa({ tminC, tmaxC, rhMaxPct, rhMinPct });
  if (rhMaxPct !== null) {
    assumed.push(HUMIDITY_FROM_MAX);
    return actualVapourPressureFromMaxHumidityKpa(tminC, rhMaxPct);
  }
  if (rhMeanPct !== null) {
    assumed.push(HUMIDITY_FROM_MEAN);
    return actualVapourPressureFromMeanHumidityKpa(tminC, tmaxC, rhMeanPct);
  }
  const arid = site.arid === true;
  assumed.push(arid ? DEW_BELOW_MINIMUM : DEW_AT_MINIMUM);
  return actualVapourPressureFromDewPointKpa(dewPointFromMinimumC(tminC, arid));
}

/**
 * Solar radiation by the best data at hand, in the published order: measured, hours of sunshine, temperature range.
 * @param extraterrestrialMjM2 - Ra
 * @param clearSkyMjM2 - Rso
 * @param daylightHours - N [h]
 * @param assumed - receives what was assumed
 * @returns Rs [MJ m⁻² d⁻¹]
 * Source: FAO-56 chapter 3, (35) and (50)
 */
export function resolveSolarMjM2(
  weather: DailyWeather, tminC: number, tmaxC: number, site: WeatherSite, extraterrestrialMjM2: number, clearSkyMjM2: number, daylightHours: number, assumed: Assumption[],
): number {
  const { solarMjM2, sunshineHours } = weather;
  if (solarMjM2 !== null) {
    if (solarMjM2 <= extraterrestrialMjM2) return solarMjM2;
    assumed.push(SUN_CAPPED);
    return extraterrestrialMjM2;
  }
  if (sunshineHours !== null) {
    assumed.push(SUN_FROM_HOURS);
    return solarFromSunshineMjM2(sunshineHours, daylightHours, extraterrestrialMjM2);
  }
  const coastal = site.coastal === true;
  assumed.push(coastal ? SUN_FROM_RANGE_COAST : SUN_FROM_RANGE_INLAND);
  const coefficient = coastal ? TEMPERATURE_RANGE_COEFFICIENT.coast : TEMPERATURE_RANGE_COEFFICIENT.inland;
  return solarFromTemperatureRangeMjM2(tminC, tmaxC, coefficient, extraterrestrialMjM2, clearSkyMjM2);
}

/**
 * Wind at 2 m: measured and brought down the logarithmic profile, else 2 m/s; never below 0.5 m/s.
 * @param assumed - receives what was assumed
 * @returns u2 [m/s]
 * Source: FAO-56 chapter 3, (47)
 */
export function resolveWindMps(windMps: number | null, windHeightM: number | null, assumed: Assumption[]): number {
  if (windMps === null) {
    assumed.push(WIND_DEFAULT);
    return DEFAULT_WIND_MPS;
  }
  if (windHeightM === null) assumed.push(WIND_HEIGHT_DEFAULT);
  const atTwoMetres = windHeightM === null || windHeightM === 2 ? windMps : windAtTwoMetresMps(windMps, windHeightM);
  if (atTwoMetres >= MIN_WIND_MPS) return atTwoMetres;
  assumed.push(WIND_RAISED);
  return MIN_WIND_MPS;
}
