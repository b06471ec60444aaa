import { dayOfYear, PhysicsError, requireRange, type CivilDay } from '@/scheduling/units';
import { atmosphericPressureKpa, psychrometricConstantKpaPerC } from './atmosphere';
import { requirePossibleSite, type Assumption, type WeatherSite } from './dailyWeather';
import { extraterrestrialRadiationOfPeriodMjM2, solarDay, solarHourAngleRad } from './extraterrestrial';
import { resolveWindMps } from './missingData';
import { clearSkySimpleMjM2, netLongwaveHourMjM2, netShortwaveMjM2, soilHeatFluxOfHourMjM2 } from './radiation';
import { penmanMonteithHour } from './referenceEt';
import { saturationVapourPressureKpa, vapourPressureSlopeKpaPerC } from './vapour';

/** A place for hourly sums. */
export interface HourlySite extends WeatherSite {
  /** East positive [°]. */
  longitudeDeg: number;
  /** Standard time of the zone, without daylight saving [min east of UTC]. */
  standardUtcOffsetMinutes: number;
}

/** Weather of one hour. */
export interface HourlyWeather {
  on: CivilDay;
  /** Middle of the hour on the standard clock: 14.5 for 14-15 h [h]. */
  midHour: number;
  temperatureC: number;
  rhPct: number;
  windMps: number | null;
  windHeightM: number | null;
  /** Rs [MJ m⁻² h⁻¹]. */
  solarMjM2: number;
  /** Rs/Rso of the late afternoon before, for hours of night [–]; null takes the middle of the published range. */
  eveningRelativeSolar: number | null;
}

/** Every intermediate value of one hour. */
export interface HourlyReferenceEtTerms {
  slopeKpaPerC: number;
  psychrometricKpaPerC: number;
  saturationVapourKpa: number;
  actualVapourKpa: number;
  vapourDeficitKpa: number;
  windAtTwoMetresMps: number;
  /** ω at the middle of the hour */
  hourAngleRad: number;
  extraterrestrialMjM2: number;
  clearSkyMjM2: number;
  relativeSolar: number;
  daytime: boolean;
  netShortwaveMjM2: number;
  netLongwaveMjM2: number;
  netRadiationMjM2: number;
  soilHeatFluxMjM2: number;
  radiationTermMm: number;
  windTermMm: number;
}

/** Reference evapotranspiration of one hour. */
export interface HourlyReferenceEt {
  /** [mm/h]; a little below zero where dew falls. */
  et0Mm: number;
  assumptions: Assumption[];
  terms: HourlyReferenceEtTerms;
}

/** Hour angles before sunset between which Rs/Rso stands for the coming night [rad]. FAO-56 chapter 4. */
export const EVENING_WINDOW_RAD = { from: 0.79, until: 0.52 } as const;
const NIGHT_RELATIVE_SOLAR = { humid: 0.5, arid: 0.75 } as const;

/** True when an hour angle lies in the window 2-3 h before sunset whose cloudiness stands for the night. FAO-56 chapter 4. */
export function isEveningWindow(hourAngleRad: number, sunsetAngleRad: number): boolean {
  return hourAngleRad >= sunsetAngleRad - EVENING_WINDOW_RAD.from && hourAngleRad <= sunsetAngleRad - EVENING_WINDOW_RAD.until;
}

/**
 * Hourly reference evapotranspiration of short grass.
 * @returns ET0 [mm/h] with its terms
 * @throws PhysicsError for impossible weather, with the field named
 * Equation: FAO-56 (53); longitudes are counted east positive here and turned for the published formula.
 */
export function hourlyReferenceEt({ site, hour }: { site: HourlySite; hour: HourlyWeather }): HourlyReferenceEt {
  requirePossibleSite(site);
  requireRange('longitudeDeg', site.longitudeDeg, -180, 180);
  requireRange('midHour', hour.midHour, 0, 24);
  requireRange('temperatureC', hour.temperatureC, -95, 65);
  requireRange('rhPct', hour.rhPct, 0, 100);
  requireRange('solarMjM2', hour.solarMjM2, 0, 6);
  if (hour.windMps !== null) requireRange('windMps', hour.windMps, 0, 120);
  if (hour.windHeightM !== null) requireRange('windHeightM', hour.windHeightM, 0.25, 300);
  if (Math.abs(site.standardUtcOffsetMinutes) > 15 * 60) throw new PhysicsError('standardUtcOffsetMinutes', site.standardUtcOffsetMinutes, 'must lie within 15 hours of UTC');

  const assumptions: Assumption[] = [];
  const day = dayOfYear(hour.on);
  const sun = solarDay(site.latitudeDeg, day);
  const hourAngleRad = solarHourAngleRad({
    clockHours: hour.midHour, longitudeDeg: site.longitudeDeg, zoneMeridianDeg: site.standardUtcOffsetMinutes / 4, day,
  });
  const extraterrestrialMjM2 = extraterrestrialRadiationOfPeriodMjM2(sun, hourAngleRad - Math.PI / 24, hourAngleRad + Math.PI / 24);
  const clearSkyMjM2 = clearSkySimpleMjM2(site.elevationM, extraterrestrialMjM2);
  const psychrometricKpaPerC = psychrometricConstantKpaPerC(atmosphericPressureKpa(site.elevationM));
  const slopeKpaPerC = vapourPressureSlopeKpaPerC(hour.temperatureC);
  const saturationVapourKpa = saturationVapourPressureKpa(hour.temperatureC);
  const actualVapourKpa = (saturationVapourKpa * hour.rhPct) / 100;
  const vapourDeficitKpa = saturationVapourKpa - actualVapourKpa;
  const windAtTwoMetresMps = resolveWindMps(hour.windMps, hour.windHeightM, assumptions);

  // Near sunrise and sunset the ratio of two small numbers says nothing about the sky.
  const sunIsUsable = Math.abs(hourAngleRad) < sun.sunsetAngleRad - EVENING_WINDOW_RAD.until && clearSkyMjM2 > 0;
  let relativeSolar: number;
  if (sunIsUsable) {
    relativeSolar = Math.min(1, hour.solarMjM2 / clearSkyMjM2);
  } else if (hour.eveningRelativeSolar !== null) {
    relativeSolar = requireRange('eveningRelativeSolar', hour.eveningRelativeSolar, 0, 1.2);
  } else {
    relativeSolar = site.arid === true ? NIGHT_RELATIVE_SOLAR.arid : NIGHT_RELATIVE_SOLAR.humid;
    assumptions.push({ field: 'eveningRelativeSolar', method: `night sky taken at Rs/Rso ${relativeSolar}`, source: 'FAO-56 chapter 4' });
  }
  const netShortwave = netShortwaveMjM2(hour.solarMjM2);
  const netLongwave = netLongwaveHourMjM2(hour.temperatureC, actualVapourKpa, relativeSolar);
  const netRadiationMjM2 = netShortwave - netLongwave;
  const daytime = extraterrestrialMjM2 > 0;
  const soilHeatFluxMjM2 = soilHeatFluxOfHourMjM2(netRadiationMjM2, daytime);
  const sum = penmanMonteithHour({
    temperatureC: hour.temperatureC, windAtTwoMetresMps, availableEnergyMjM2: netRadiationMjM2 - soilHeatFluxMjM2,
    vapourDeficitKpa, slopeKpaPerC, psychrometricKpaPerC,
  });
  return {
    et0Mm: sum.et0Mm,
    assumptions,
    terms: {
      slopeKpaPerC, psychrometricKpaPerC, saturationVapourKpa, actualVapourKpa, vapourDeficitKpa, windAtTwoMetresMps, hourAngleRad,
      extraterrestrialMjM2, clearSkyMjM2, relativeSolar, daytime, netShortwaveMjM2: netShortwave, netLongwaveMjM2: netLongwave,
      netRadiationMjM2, soilHeatFluxMjM2, radiationTermMm: sum.radiationTermMm, windTermMm: sum.windTermMm,
    },
  };
}
