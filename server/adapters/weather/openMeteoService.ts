import { setTimeout as pause } from 'node:timers/promises';
import type { VariablesWithTime } from '@openmeteo/sdk/variables-with-time';
import type { WeatherApiResponse } from '@openmeteo/sdk/weather-api-response';
import { Unit } from '@openmeteo/sdk/unit';
import { fetchWeatherApi } from 'openmeteo';
import type { Logger } from 'pino';
import { civilDayFromEpochDay } from '@/scheduling/units/civilDay';
import { AppError } from '@/server/errors';
import { dailyFields, dailyVariables, type DailyField } from './openMeteoPayload';
import type { WeatherAnswer, WeatherQuery, WeatherService, WeatherServiceDay } from './weatherService';

export interface OpenMeteoOptions {
  /** Address of the forecast endpoint, and of the one for records of past years. */
  url: string;
  recordsUrl?: string;
  apiKey?: string;
  /** Time for one attempt [ms]. */
  timeoutMs?: number;
  /** Pauses between the attempts [ms]; one more attempt than pauses. */
  pausesMs?: readonly number[];
  /** Name of the origin, stored with each day. */
  sourceOf?: (query: WeatherQuery) => string;
  /** True for replayed records. */
  sample?: boolean;
  /** Past years worth asking for; ten when left out. */
  recordYears?: number;
}

/** The service answers for the nearest point of its grid; farther than this is another place [°]. */
const PLACE_TOLERANCE_DEG = 0.5;
/** Ten years show how early a freeze may come. Common practice for a gardener's calendar. */
const RECORD_YEARS = 10;
/** Years of days take longer than a forecast [ms]. */
const RECORDS_TIMEOUT_MS = 20_000;
const recordFields = ['tmaxC', 'tminC', 'precipitationMm'] as const satisfies readonly DailyField[];
/** Height of the wind in the service's answers [m]. */
const WIND_HEIGHT_M = 10;
const SECONDS_PER_DAY = 86_400;

/** The answer is not what was asked for. */
class UnusableAnswer extends Error {}

/** Distance of two longitudes, across the date line too [°]. */
function longitudeApartDeg(a: number, b: number): number {
  const apart = Math.abs(a - b) % 360;
  return Math.min(apart, 360 - apart);
}

/** The service's values are 32-bit; two decimals are more than it knows. */
function known(value: number | undefined): number | null {
  return value === undefined || !Number.isFinite(value) ? null : Math.round(value * 100) / 100;
}

/** Clips what rounding pushed over the edge of the possible, and drops what lies far outside it. */
function within(value: number | null, least: number, most: number, slack: number): number | null {
  if (value === null || value < least - slack || value > most + slack) {
    return null;
  }
  return Math.min(most, Math.max(least, value));
}

function readSeries(daily: VariablesWithTime): Map<DailyField, Float32Array> {
  const found = new Map<DailyField, Float32Array>();
  for (let index = 0; index < daily.variablesLength(); index += 1) {
    const series = daily.variables(index);
    const values = series?.valuesArray();
    if (!series || !values) {
      continue;
    }
    const field = dailyFields.find((name) => dailyVariables[name].variable === series.variable() && dailyVariables[name].aggregation === series.aggregation());
    if (field === undefined) {
      continue;
    }
    const units: readonly Unit[] = dailyVariables[field].units;
    if (series.unit() !== Unit.undefined && !units.includes(series.unit())) {
      throw new UnusableAnswer(`${dailyVariables[field].name} came in unit ${Unit[series.unit()] ?? series.unit()}`);
    }
    found.set(field, values);
  }
  return found;
}

function dayOf(on: string, series: ReadonlyMap<DailyField, Float32Array>, index: number): WeatherServiceDay {
  const value = (field: DailyField) => known(series.get(field)?.[index]);
  const tmin = within(value('tminC'), -90, 60, 0);
  const tmax = within(value('tmaxC'), -90, 60, 0);
  const isOrdered = tmin === null || tmax === null || tmin <= tmax;
  const rhMin = within(value('rhMinPct'), 0, 100, 1);
  const rhMax = within(value('rhMaxPct'), 0, 100, 1);
  const tdew = within(value('tdewC'), -100, 40, 0);
  const windMps = within(value('windMps'), 0, 120, 0.05);
  return {
    on,
    tminC: isOrdered ? tmin : null,
    tmaxC: isOrdered ? tmax : null,
    tdewC: tdew !== null && tmax !== null ? Math.min(tdew, tmax) : tdew,
    rhMaxPct: rhMin !== null && rhMax !== null ? Math.max(rhMin, rhMax) : rhMax,
    rhMinPct: rhMin,
    windMps,
    windHeightM: windMps === null ? null : WIND_HEIGHT_M,
    solarMjM2: within(value('solarMjM2'), 0, 50, 0.05),
    precipitationMm: within(value('precipitationMm'), 0, 2000, 0.05),
    rainProbabilityPct: within(value('rainProbabilityPct'), 0, 100, 1),
  };
}

/** Makes days of an answer, or refuses it. */
function readAnswer(results: readonly WeatherApiResponse[], query: WeatherQuery): Pick<WeatherAnswer, 'elevationM' | 'days'> {
  const result = results[0];
  if (results.length !== 1 || !result) {
    throw new UnusableAnswer(`${results.length} places came where one was asked for`);
  }
  const latitudeDeg = result.latitude();
  const longitudeDeg = result.longitude();
  if (!(Math.abs(latitudeDeg - query.latitudeDeg) <= PLACE_TOLERANCE_DEG) || !(longitudeApartDeg(longitudeDeg, query.longitudeDeg) <= PLACE_TOLERANCE_DEG)) {
    throw new UnusableAnswer(`the answer is about ${latitudeDeg}, ${longitudeDeg}`);
  }
  const daily = result.daily();
  if (!daily || daily.interval() !== SECONDS_PER_DAY) {
    throw new UnusableAnswer('no daily values came');
  }
  const series = readSeries(daily);
  const count = series.get('tmaxC')?.length ?? 0;
  if (!series.has('tmaxC') || !series.has('tminC') || count === 0) {
    throw new UnusableAnswer('no temperatures came');
  }
  // Days begin at local midnight; the service tells one offset for the whole answer, so a clock change inside it shifts a start by an hour at most.
  const firstEpochDay = Math.round((Number(daily.time()) + result.utcOffsetSeconds()) / SECONDS_PER_DAY);
  const days = Array.from({ length: count }, (_, index) => dayOf(civilDayFromEpochDay(firstEpochDay + index), series, index))
    .filter((day) => day.on >= query.fromOn && day.on <= query.toOn);
  if (days.every((day) => day.tminC === null || day.tmaxC === null)) {
    throw new UnusableAnswer('no day of those asked for came');
  }
  return { elevationM: known(result.elevation()), days };
}

/**
 * The hosted forecast service through its SDK. The SDK takes any body for an answer and never gives up waiting, so place, variables, units and
 * time are checked here.
 * @throws AppError weather_unavailable after its last attempt
 */
export function openMeteoService(options: OpenMeteoOptions, log: Logger): WeatherService {
  const { url, apiKey, timeoutMs = 5_000, pausesMs = [300, 900], sample = false } = options;
  const sourceOf = options.sourceOf ?? (() => 'Open-Meteo');
  const ask = async (address: string, query: WeatherQuery, fields: readonly DailyField[], limitMs: number): Promise<WeatherAnswer> => {
    const parameters = {
      latitude: query.latitudeDeg, longitude: query.longitudeDeg, timezone: query.timeZone,
      start_date: query.fromOn, end_date: query.toOn, daily: fields.map((field) => dailyVariables[field].name).join(','),
      temperature_unit: 'celsius', wind_speed_unit: 'ms', precipitation_unit: 'mm',
      ...(apiKey === undefined ? {} : { apikey: apiKey }),
    };
    for (let attempt = 0; ; attempt += 1) {
      try {
        // One try of the SDK's own: it repeats three statuses only.
        const results = await fetchWeatherApi(address, parameters, 1, 0, 0, { signal: AbortSignal.timeout(limitMs) });
        return { source: sourceOf(query), sample, ...readAnswer(results, query) };
      } catch (error) {
        const because = error instanceof Error ? `${error.name}: ${error.message}` : String(error);
        log.warn({ attempt: attempt + 1, because }, 'the weather service gave no usable answer');
        const pauseMs = pausesMs[attempt];
        if (pauseMs === undefined) {
          throw new AppError('weather_unavailable', 'The weather service gave no usable answer.');
        }
        await pause(pauseMs);
      }
    }
  };
  return {
    recordYears: options.recordYears ?? RECORD_YEARS,
    fetchDays: (query) => ask(url, query, dailyFields, timeoutMs),
    fetchRecords: (query) => ask(options.recordsUrl ?? url, query, recordFields, options.timeoutMs ?? RECORDS_TIMEOUT_MS),
  };
}
