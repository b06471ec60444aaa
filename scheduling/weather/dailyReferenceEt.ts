import { dayOfYear } from '@/scheduling/units';
import { atmosphericPressureKpa, psychrometricConstantKpaPerC } from './atmosphere';
import { requirePossibleSite, requirePossibleWeather, type Assumption, type DailyWeather, type WeatherSite } from './dailyWeather';
import { solarDay, type SolarDay } from './extraterrestrial';
import { resolveSolarMjM2, resolveVapourPressureKpa, resolveWindMps } from './missingData';
import { clearSkyPhysicalMjM2, clearSkySimpleMjM2, netLongwaveMjM2, netShortwaveMjM2 } from './radiation';
import { hargreavesMm, penmanMonteithDay, penmanMonteithDayOnto } from './referenceEt';
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

/**
 * Clear-sky form by which everything in the product reckons. The simple form overstates ET0 in low sun, by up to 0.12 mm/d in the October of the Ref-ET
 * comparison (Fallon 2015); the physical one meets its figures. `dailyReferenceEt` itself keeps FAO-56 as printed, so that its examples come out.
 */
export const CLEAR_SKY = 'physical';

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

/** What is the same on every day of a place, and the sun's geometry of the days already asked for. */
interface SiteSums {
  site: WeatherSite;
  pressureKpa: number;
  psychrometricKpaPerC: number;
  /** By day of the year. */
  sunByDay: (SolarDay | undefined)[];
}

function siteSums(site: WeatherSite): SiteSums {
  requirePossibleSite(site);
  const pressureKpa = atmosphericPressureKpa(site.elevationM);
  return { site, pressureKpa, psychrometricKpaPerC: psychrometricConstantKpaPerC(pressureKpa), sunByDay: new Array<SolarDay | undefined>(367) };
}

function sunOn(sums: SiteSums, day: number): SolarDay {
  const known = sums.sunByDay[day];
  if (known) return known;
  const sun = solarDay(sums.site.latitudeDeg, day);
  sums.sunByDay[day] = sun;
  return sun;
}

/** How the reference ET of a day is to be reached. */
export type ReferenceEtChoices = Pick<DailyReferenceEtInput, 'clearSky' | 'temperatureOnly'>;

type MutableTerms = { -readonly [Key in keyof ReferenceEtTerms]: ReferenceEtTerms[Key] };

/** A sheet on which a day is worked out; a row of days uses one sheet. */
interface WorkSheet {
  terms: MutableTerms;
  et0Mm: number;
  assumptions: Assumption[];
}

function emptySheet(): WorkSheet {
  return {
    et0Mm: 0, assumptions: [],
    terms: {
      tmeanC: 0, pressureKpa: 0, psychrometricKpaPerC: 0, slopeKpaPerC: 0, saturationVapourKpa: 0, actualVapourKpa: 0, vapourDeficitKpa: 0, windAtTwoMetresMps: 0,
      extraterrestrialMjM2: 0, daylightHours: 0, clearSkyMjM2: 0, solarMjM2: 0, relativeSolar: 0, netShortwaveMjM2: 0, netLongwaveMjM2: 0, netRadiationMjM2: 0,
      radiationTermMm: 0, windTermMm: 0, penmanMonteithMm: 0, hargreavesMm: 0,
    },
  };
}

/** Works out a day with both temperatures on a sheet. @returns the method used */
function workOut(sheet: WorkSheet, sums: SiteSums, weather: DailyWeather, tminC: number, tmaxC: number, choices: ReferenceEtChoices): DailyReferenceEt['method'] {
  const { terms, assumptions } = sheet;
  const { site, pressureKpa, psychrometricKpaPerC } = sums;
  const day = dayOfYear(weather.on);
  const useHargreaves = choices.temperatureOnly !== 'penman-monteith' && onlyTemperatures(weather);
  if (useHargreaves) assumptions.push(HARGREAVES);
  const tmeanC = (tminC + tmaxC) / 2;
  const slopeKpaPerC = vapourPressureSlopeKpaPerC(tmeanC);
  const saturationVapourKpa = meanSaturationVapourPressureKpa(tminC, tmaxC);
  const actualVapourKpa = resolveVapourPressureKpa(weather, tminC, tmaxC, site, assumptions);
  const vapourDeficitKpa = Math.max(0, saturationVapourKpa - actualVapourKpa);
  const windAtTwoMetresMps = resolveWindMps(weather.windMps, weather.windHeightM, assumptions);

  const sun = sunOn(sums, day);
  const { extraterrestrialMjM2, daylightHours } = sun;
  const clearSkyMjM2 = choices.clearSky === 'physical'
    ? clearSkyPhysicalMjM2(sun, day, pressureKpa, actualVapourKpa)
    : clearSkySimpleMjM2(site.elevationM, extraterrestrialMjM2);
  const solarMjM2 = resolveSolarMjM2(weather, tminC, tmaxC, site, extraterrestrialMjM2, clearSkyMjM2, daylightHours, assumptions);
  const dark = clearSkyMjM2 <= 0;
  if (dark) assumptions.push(POLAR_NIGHT);
  const relativeSolar = dark ? NIGHT_RELATIVE_SOLAR : Math.min(1, solarMjM2 / clearSkyMjM2);

  const shortwave = netShortwaveMjM2(solarMjM2);
  const longwave = netLongwaveMjM2(tminC, tmaxC, actualVapourKpa, relativeSolar);
  const netRadiationMjM2 = shortwave - longwave;
  penmanMonteithDayOnto(terms, tmeanC, windAtTwoMetresMps, netRadiationMjM2, vapourDeficitKpa, slopeKpaPerC, psychrometricKpaPerC);
  const penmanMonteithMm = terms.radiationTermMm + terms.windTermMm;
  const fromTemperaturesMm = hargreavesMm(tminC, tmaxC, tmeanC, extraterrestrialMjM2);

  terms.tmeanC = tmeanC;
  terms.pressureKpa = pressureKpa;
  terms.psychrometricKpaPerC = psychrometricKpaPerC;
  terms.slopeKpaPerC = slopeKpaPerC;
  terms.saturationVapourKpa = saturationVapourKpa;
  terms.actualVapourKpa = actualVapourKpa;
  terms.vapourDeficitKpa = vapourDeficitKpa;
  terms.windAtTwoMetresMps = windAtTwoMetresMps;
  terms.extraterrestrialMjM2 = extraterrestrialMjM2;
  terms.daylightHours = daylightHours;
  terms.clearSkyMjM2 = clearSkyMjM2;
  terms.solarMjM2 = solarMjM2;
  terms.relativeSolar = relativeSolar;
  terms.netShortwaveMjM2 = shortwave;
  terms.netLongwaveMjM2 = longwave;
  terms.netRadiationMjM2 = netRadiationMjM2;
  terms.penmanMonteithMm = penmanMonteithMm;
  terms.hargreavesMm = fromTemperaturesMm;
  sheet.et0Mm = useHargreaves ? fromTemperaturesMm : Math.max(0, penmanMonteithMm);
  return useHargreaves ? 'hargreaves' : 'penman-monteith';
}

function referenceEtOfDay(sums: SiteSums, weather: DailyWeather, choices: ReferenceEtChoices): DailyReferenceEt | NoReferenceEt {
  requirePossibleWeather(weather);
  const { tminC, tmaxC } = weather;
  if (tminC === null || tmaxC === null) {
    const missing: NoReferenceEt['missing'] = [];
    if (tminC === null) missing.push('tminC');
    if (tmaxC === null) missing.push('tmaxC');
    return { et0Mm: null, method: null, radiationMjM2: null, missing, assumptions: [], terms: null };
  }
  const sheet = emptySheet();
  const method = workOut(sheet, sums, weather, tminC, tmaxC, choices);
  return { et0Mm: sheet.et0Mm, method, radiationMjM2: sheet.terms.solarMjM2, assumptions: sheet.assumptions, terms: sheet.terms };
}

/**
 * Daily reference evapotranspiration of short grass.
 * Penman–Monteith with the published procedures for missing data; Hargreaves–Samani as the last resort; a null result without
 * both temperature extremes. Values estimated from temperatures are good as means of several days only (FAO-56 chapter 3).
 * @returns ET0 [mm/d] with Rs [MJ m⁻² d⁻¹], what was assumed and every intermediate term
 * @throws PhysicsError for impossible weather or an impossible site, with the field named
 * Equation: FAO-56 (6), G = 0 for a day
 */
export function dailyReferenceEt({ site, weather, ...choices }: DailyReferenceEtInput): DailyReferenceEt | NoReferenceEt {
  return referenceEtOfDay(siteSums(site), weather, choices);
}

/**
 * Reference evapotranspiration of many days of one place, as `dailyReferenceEt` gives it for each; what the days share is worked out once.
 * @throws PhysicsError for impossible weather or an impossible site, with the field named
 */
export function dailyReferenceEts(site: WeatherSite, weather: readonly DailyWeather[], choices: ReferenceEtChoices = {}): (DailyReferenceEt | NoReferenceEt)[] {
  const sums = siteSums(site);
  return weather.map((day) => referenceEtOfDay(sums, day, choices));
}

/** ET0 of a row of days without its terms. */
export interface DailyEt0Row {
  /** [mm/d]; 0 on the days named as missing. */
  et0Mm: Float64Array;
  /** Places of the days without an extreme of temperature. */
  missing: number[];
}

/**
 * The bare ET0 of many days of one place, by the same sums without their terms: for statistics over years.
 * @throws PhysicsError for impossible weather or an impossible site, with the field named
 */
export function dailyEt0Row(site: WeatherSite, weather: readonly DailyWeather[], choices: ReferenceEtChoices = {}): DailyEt0Row {
  const sums = siteSums(site);
  const sheet = emptySheet();
  const row: DailyEt0Row = { et0Mm: new Float64Array(weather.length), missing: [] };
  for (let index = 0; index < weather.length; index += 1) {
    const day = weather[index];
    if (!day) continue;
    requirePossibleWeather(day);
    if (day.tminC === null || day.tmaxC === null) {
      row.missing.push(index);
      continue;
    }
    if (sheet.assumptions.length > 0) sheet.assumptions.length = 0;
    workOut(sheet, sums, day, day.tminC, day.tmaxC, choices);
    row.et0Mm[index] = sheet.et0Mm;
  }
  return row;
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
