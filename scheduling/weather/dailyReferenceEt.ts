import { dayOfYear } from '@/scheduling/units';
import { atmosphericPressureKpa, psychrometricConstantKpaPerC } from './atmosphere';
import { requirePossibleSite, requirePossibleWeather, type Assumption, type DailyWeather, type WeatherSite } from './dailyWeather';
import { solarDay } from './extraterrestrial';
import { resolveSolarMjM2, resolveVapourPressureKpa, resolveWindMps } from './missingData';
import { clearSkyPhysicalMjM2, clearSkySimpleMjM2, netLongwaveMjM2, netShortwaveMjM2 } from './radiation';
import { hargreavesMm, penmanMonteithDay } from './referenceEt';
import { meanSaturationVapourPressureKpa, vapourPressureSlopeKpaPerC } from './vapour';

/** Every intermediate value of one day, so that a screen or a reviewer can follow the sum. */
export interface ReferenceEtTerms {
  tmeanC: number;
  /** P */
  pressureKpa: number;
  /** γ */
  psychrometricKpaPerC: number;
  /** Δ */
  slopeKpaPerC: number;
  /** es */
  saturationVapourKpa: number;
  /** ea */
  actualVapourKpa: number;
  /** es − ea, not below 0 */
  vapourDeficitKpa: number;
  /** u2 */
  windAtTwoMetresMps: number;
  /** Ra */
  extraterrestrialMjM2: number;
  /** N */
  daylightHours: number;
  /** Rso */
  clearSkyMjM2: number;
  /** Rs */
  solarMjM2: number;
  /** Rs/Rso, not above 1 [–] */
  relativeSolar: number;
  netShortwaveMjM2: number;
  netLongwaveMjM2: number;
  netRadiationMjM2: number;
  radiationTermMm: number;
  windTermMm: number;
  /** Penman–Monteith before negative nights are cut to zero [mm]. */
  penmanMonteithMm: number;
  /** Hargreaves–Samani beside it [mm]. */
  hargreavesMm: number;
}

/** Reference evapotranspiration of a day, with how it was reached. */
export interface DailyReferenceEt {
  /** ET0 [mm/d], never negative. */
  et0Mm: number;
  method: 'penman-monteith' | 'hargreaves';
  /** Rs used or estimated [MJ m⁻² d⁻¹]. */
  radiationMjM2: number;
  assumptions: Assumption[];
  terms: ReferenceEtTerms;
}

/** No reference evapotranspiration can be told: an extreme of temperature is missing. */
export interface NoReferenceEt {
  et0Mm: null;
  method: null;
  radiationMjM2: null;
  missing: ('tminC' | 'tmaxC')[];
  assumptions: Assumption[];
  terms: null;
}

/** Input of `dailyReferenceEt`. */
export interface DailyReferenceEtInput {
  site: WeatherSite;
  weather: DailyWeather;
  /** Clear-sky form behind the long-wave loss: 'simple' is FAO-56 as printed and the default, 'physical' avoids its excess in low sun. */
  clearSky?: 'simple' | 'physical';
  /** What to use where only temperatures are known; Hargreaves unless the estimated Penman–Monteith is asked for. */
  temperatureOnly?: 'hargreaves' | 'penman-monteith';
}

const HARGREAVES: Assumption = { field: 'et0Mm', method: 'from temperatures alone, as no humidity, sun or wind is known', source: 'Hargreaves–Samani, FAO-56 (52)' };
const POLAR_NIGHT: Assumption = { field: 'relativeSolar', method: 'half-clouded sky taken in polar night', source: 'FAO-56 chapter 4, 0.4-0.6 for humid air' };
const NIGHT_RELATIVE_SOLAR = 0.5;

function onlyTemperatures(weather: DailyWeather): boolean {
  return weather.tdewC === null && weather.rhMaxPct === null && weather.rhMeanPct === null
    && weather.windMps === null && weather.solarMjM2 === null && weather.sunshineHours === null;
}

/**
 * Daily reference evapotranspiration of short grass.
 * Penman–Monteith with the published procedures for missing data; Hargreaves–Samani as the last resort; a null result without
 * both temperature extremes. Values estimated from temperatures are good as means of several days only (FAO-56 chapter 3).
 * @returns ET0 [mm/d] with Rs [MJ m⁻² d⁻¹], what was assumed and every intermediate term
 * @throws PhysicsError for impossible weather or an impossible site, with the field named
 * Equation: FAO-56 (6), G = 0 for a day
 */
export function dailyReferenceEt({ site, weather, clearSky = 'simple', temperatureOnly = 'hargreaves' }: DailyReferenceEtInput): DailyReferenceEt | NoReferenceEt {
  requirePossibleSite(site);
  requirePossibleWeather(weather);
  const day = dayOfYear(weather.on);
  const { tminC, tmaxC } = weather;
  if (tminC === null || tmaxC === null) {
    const missing: NoReferenceEt['missing'] = [];
    if (tminC === null) missing.push('tminC');
    if (tmaxC === null) missing.push('tmaxC');
    return { et0Mm: null, method: null, radiationMjM2: null, missing, assumptions: [], terms: null };
  }

  const assumptions: Assumption[] = [];
  const useHargreaves = temperatureOnly === 'hargreaves' && onlyTemperatures(weather);
  if (useHargreaves) assumptions.push(HARGREAVES);
  const tmeanC = (tminC + tmaxC) / 2;
  const pressureKpa = atmosphericPressureKpa(site.elevationM);
  const psychrometricKpaPerC = psychrometricConstantKpaPerC(pressureKpa);
  const slopeKpaPerC = vapourPressureSlopeKpaPerC(tmeanC);
  const saturationVapourKpa = meanSaturationVapourPressureKpa(tminC, tmaxC);
  const actualVapourKpa = resolveVapourPressureKpa(weather, tminC, tmaxC, site, assumptions);
  const vapourDeficitKpa = Math.max(0, saturationVapourKpa - actualVapourKpa);
  const windAtTwoMetresMps = resolveWindMps(weather.windMps, weather.windHeightM, assumptions);

  const sun = solarDay(site.latitudeDeg, day);
  const { extraterrestrialMjM2 } = sun;
  const clearSkyMjM2 = clearSky === 'physical'
    ? clearSkyPhysicalMjM2(sun, day, pressureKpa, actualVapourKpa)
    : clearSkySimpleMjM2(site.elevationM, extraterrestrialMjM2);
  const solarMjM2 = resolveSolarMjM2(weather, tminC, tmaxC, site, { extraterrestrialMjM2, clearSkyMjM2, daylightHours: sun.daylightHours }, assumptions);
  const dark = clearSkyMjM2 <= 0;
  if (dark) assumptions.push(POLAR_NIGHT);
  const relativeSolar = dark ? NIGHT_RELATIVE_SOLAR : Math.min(1, solarMjM2 / clearSkyMjM2);

  const shortwave = netShortwaveMjM2(solarMjM2);
  const longwave = netLongwaveMjM2(tminC, tmaxC, actualVapourKpa, relativeSolar);
  const netRadiationMjM2 = shortwave - longwave;
  const sum = penmanMonteithDay({
    temperatureC: tmeanC, windAtTwoMetresMps, availableEnergyMjM2: netRadiationMjM2, vapourDeficitKpa, slopeKpaPerC, psychrometricKpaPerC,
  });
  const fromTemperaturesMm = hargreavesMm(tminC, tmaxC, tmeanC, extraterrestrialMjM2);

  return {
    et0Mm: useHargreaves ? fromTemperaturesMm : Math.max(0, sum.et0Mm),
    method: useHargreaves ? 'hargreaves' : 'penman-monteith',
    radiationMjM2: solarMjM2,
    assumptions,
    terms: {
      tmeanC, pressureKpa, psychrometricKpaPerC, slopeKpaPerC, saturationVapourKpa, actualVapourKpa, vapourDeficitKpa, windAtTwoMetresMps,
      extraterrestrialMjM2, daylightHours: sun.daylightHours, clearSkyMjM2, solarMjM2, relativeSolar,
      netShortwaveMjM2: shortwave, netLongwaveMjM2: longwave, netRadiationMjM2,
      radiationTermMm: sum.radiationTermMm, windTermMm: sum.windTermMm, penmanMonteithMm: sum.et0Mm, hargreavesMm: fromTemperaturesMm,
    },
  };
}

/** How shade changes the energy of a place. */
export interface Shading {
  /** Part of the open radiation that reaches the ground, 0-1 [–]. */
  radiationShare: number;
  /** Part of the sky hemisphere that the ground sees, 0-1 [–]; the rest is about as warm as the ground and takes no heat from it. */
  skyView: number;
}

/**
 * Reference evapotranspiration in the shade: the shaded radiation and the hidden part of the cold sky go into the same equation;
 * wind and humidity stay those of the open. Grass follows today's light, not its history of shade.
 * Never above the open value, which on cold clear days the hidden sky alone would give.
 * A day reached by Hargreaves keeps its value times the ratio that Penman–Monteith gives for shaded and open ground.
 * @returns ET0 in the shade [mm/d], never negative
 * Source: FAO-56 (6); Feldhake, Butler, Danielson 1985, doi 10.1007/BF00262471
 */
export function shadedReferenceEtMm(open: DailyReferenceEt, { radiationShare, skyView }: Shading): number {
  if (radiationShare === 1 && skyView === 1) return open.et0Mm;
  const { terms } = open;
  const availableEnergyMjM2 = terms.netShortwaveMjM2 * radiationShare - terms.netLongwaveMjM2 * skyView;
  const shaded = Math.max(0, penmanMonteithDay({
    temperatureC: terms.tmeanC, windAtTwoMetresMps: terms.windAtTwoMetresMps, availableEnergyMjM2,
    vapourDeficitKpa: terms.vapourDeficitKpa, slopeKpaPerC: terms.slopeKpaPerC, psychrometricKpaPerC: terms.psychrometricKpaPerC,
  }).et0Mm);
  if (open.method === 'penman-monteith') return Math.min(open.et0Mm, shaded);
  return terms.penmanMonteithMm > 0 ? open.et0Mm * Math.min(1, shaded / terms.penmanMonteithMm) : open.et0Mm;
}
