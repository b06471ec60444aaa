import { PhysicsError, requireRange, type CivilDay } from '@/scheduling/units';

/** One day of weather at a place. Null means: not known. */
export interface DailyWeather {
  on: CivilDay;
  /** Lowest air temperature [°C]. */
  tminC: number | null;
  /** Highest air temperature [°C]. */
  tmaxC: number | null;
  /** Mean dew point [°C]. */
  tdewC: number | null;
  rhMaxPct: number | null;
  rhMinPct: number | null;
  rhMeanPct: number | null;
  /** Mean wind [m/s]. */
  windMps: number | null;
  /** Height at which the wind was measured [m]. */
  windHeightM: number | null;
  /** Solar radiation Rs [MJ m⁻² d⁻¹]. */
  solarMjM2: number | null;
  /** Hours of bright sunshine n [h]. */
  sunshineHours: number | null;
  precipitationMm: number | null;
}

/** Where the weather happens. */
export interface WeatherSite {
  /** North positive [°]. */
  latitudeDeg: number;
  elevationM: number;
  /** Air masses come from a nearby water body: raises the radiation estimated from temperatures. */
  coastal?: boolean;
  /** Nights do not reach the dew point: lowers the dew point estimated from the minimum temperature. */
  arid?: boolean;
}

/** An input that was not measured: what it was taken for and who says so. */
export interface Assumption {
  field: string;
  /** In plain words, for a screen. */
  method: string;
  source: string;
}

/**
 * Refuses weather that cannot exist: values off the scale of nature, a minimum above the maximum, a dew point above the maximum temperature.
 * Bounds lie a little beyond the records of the World Meteorological Organization.
 * @throws PhysicsError with the field named
 */
export function requirePossibleWeather(weather: DailyWeather): void {
  const { tminC, tmaxC, tdewC, rhMinPct, rhMaxPct, rhMeanPct, windMps, windHeightM, solarMjM2, sunshineHours, precipitationMm } = weather;
  // Field by field with plain figures rather than in a loop over a table: ten thousand days pass here in a season of planning.
  if (tminC !== null && !(tminC >= -95 && tminC <= 65)) requireRange('tminC', tminC, -95, 65);
  if (tmaxC !== null && !(tmaxC >= -95 && tmaxC <= 65)) requireRange('tmaxC', tmaxC, -95, 65);
  if (tdewC !== null && !(tdewC >= -110 && tdewC <= 45)) requireRange('tdewC', tdewC, -110, 45);
  if (rhMaxPct !== null && !(rhMaxPct >= 0 && rhMaxPct <= 100)) requireRange('rhMaxPct', rhMaxPct, 0, 100);
  if (rhMinPct !== null && !(rhMinPct >= 0 && rhMinPct <= 100)) requireRange('rhMinPct', rhMinPct, 0, 100);
  if (rhMeanPct !== null && !(rhMeanPct >= 0 && rhMeanPct <= 100)) requireRange('rhMeanPct', rhMeanPct, 0, 100);
  if (windMps !== null && !(windMps >= 0 && windMps <= 120)) requireRange('windMps', windMps, 0, 120);
  if (windHeightM !== null && !(windHeightM >= 0.25 && windHeightM <= 300)) requireRange('windHeightM', windHeightM, 0.25, 300);
  if (solarMjM2 !== null && !(solarMjM2 >= 0 && solarMjM2 <= 50)) requireRange('solarMjM2', solarMjM2, 0, 50);
  if (sunshineHours !== null && !(sunshineHours >= 0 && sunshineHours <= 24)) requireRange('sunshineHours', sunshineHours, 0, 24);
  if (precipitationMm !== null && !(precipitationMm >= 0 && precipitationMm <= 2000)) requireRange('precipitationMm', precipitationMm, 0, 2000);
  if (tminC !== null && tmaxC !== null && tminC > tmaxC) throw new PhysicsError('tminC', tminC, `must not lie above tmaxC ${tmaxC}`);
  if (tdewC !== null && tmaxC !== null && tdewC > tmaxC) throw new PhysicsError('tdewC', tdewC, `must not lie above tmaxC ${tmaxC}`);
  if (rhMinPct !== null && rhMaxPct !== null && rhMinPct > rhMaxPct) throw new PhysicsError('rhMinPct', rhMinPct, `must not lie above rhMaxPct ${rhMaxPct}`);
}

/** Refuses a place that is not on Earth. @throws PhysicsError with the field named */
export function requirePossibleSite(site: WeatherSite): void {
  requireRange('latitudeDeg', site.latitudeDeg, -90, 90);
  requireRange('elevationM', site.elevationM, -450, 6000);
}
