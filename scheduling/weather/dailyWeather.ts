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

const LIMITS = {
  tminC: [-95, 65],
  tmaxC: [-95, 65],
  tdewC: [-110, 45],
  rhMaxPct: [0, 100],
  rhMinPct: [0, 100],
  rhMeanPct: [0, 100],
  windMps: [0, 120],
  windHeightM: [0.25, 300],
  solarMjM2: [0, 50],
  sunshineHours: [0, 24],
  precipitationMm: [0, 2000],
} as const satisfies Record<Exclude<keyof DailyWeather, 'on'>, readonly [number, number]>;

type MeasuredField = keyof typeof LIMITS;

function requireWithin(field: MeasuredField, value: number | null, min: number, max: number): void {
  if (value !== null && !(value >= min && value <= max)) requireRange(field, value, min, max);
}

/**
 * Refuses weather that cannot exist: values off the scale of nature, a minimum above the maximum, a dew point above the maximum temperature.
 * Bounds lie a little beyond the records of the World Meteorological Organization.
 * @throws PhysicsError with the field named
 */
export function requirePossibleWeather(weather: DailyWeather): void {
  const { tminC, tmaxC, tdewC, rhMinPct, rhMaxPct } = weather;
  // Field by field rather than in a loop: ten thousand days pass here in a season of planning.
  requireWithin('tminC', tminC, LIMITS.tminC[0], LIMITS.tminC[1]);
  requireWithin('tmaxC', tmaxC, LIMITS.tmaxC[0], LIMITS.tmaxC[1]);
  requireWithin('tdewC', tdewC, LIMITS.tdewC[0], LIMITS.tdewC[1]);
  requireWithin('rhMaxPct', rhMaxPct, LIMITS.rhMaxPct[0], LIMITS.rhMaxPct[1]);
  requireWithin('rhMinPct', rhMinPct, LIMITS.rhMinPct[0], LIMITS.rhMinPct[1]);
  requireWithin('rhMeanPct', weather.rhMeanPct, LIMITS.rhMeanPct[0], LIMITS.rhMeanPct[1]);
  requireWithin('windMps', weather.windMps, LIMITS.windMps[0], LIMITS.windMps[1]);
  requireWithin('windHeightM', weather.windHeightM, LIMITS.windHeightM[0], LIMITS.windHeightM[1]);
  requireWithin('solarMjM2', weather.solarMjM2, LIMITS.solarMjM2[0], LIMITS.solarMjM2[1]);
  requireWithin('sunshineHours', weather.sunshineHours, LIMITS.sunshineHours[0], LIMITS.sunshineHours[1]);
  requireWithin('precipitationMm', weather.precipitationMm, LIMITS.precipitationMm[0], LIMITS.precipitationMm[1]);
  if (tminC !== null && tmaxC !== null && tminC > tmaxC) throw new PhysicsError('tminC', tminC, `must not lie above tmaxC ${tmaxC}`);
  if (tdewC !== null && tmaxC !== null && tdewC > tmaxC) throw new PhysicsError('tdewC', tdewC, `must not lie above tmaxC ${tmaxC}`);
  if (rhMinPct !== null && rhMaxPct !== null && rhMinPct > rhMaxPct) throw new PhysicsError('rhMinPct', rhMinPct, `must not lie above rhMaxPct ${rhMaxPct}`);
}

/** Refuses a place that is not on Earth. @throws PhysicsError with the field named */
export function requirePossibleSite(site: WeatherSite): void {
  requireRange('latitudeDeg', site.latitudeDeg, -90, 90);
  requireRange('elevationM', site.elevationM, -450, 6000);
}
