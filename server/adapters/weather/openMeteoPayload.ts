import { Aggregation } from '@openmeteo/sdk/aggregation';
import { Unit } from '@openmeteo/sdk/unit';
import { Variable } from '@openmeteo/sdk/variable';
import { Builder } from 'flatbuffers';

/** A daily variable of the service: how it is asked for, and how the answer marks it. */
export interface DailyVariable {
  /** Name in the query. */
  name: string;
  variable: Variable;
  aggregation: Aggregation;
  /** Units in which the value is what Dapple takes it for. */
  units: readonly Unit[];
}

/**
 * The daily variables that Dapple asks for. Wind is the mean of the day, as FAO-56 wants it, at 10 m.
 * Source: documentation of the Open-Meteo forecast API, daily parameters.
 */
export const dailyVariables = {
  tmaxC: { name: 'temperature_2m_max', variable: Variable.temperature, aggregation: Aggregation.maximum, units: [Unit.celsius] },
  tminC: { name: 'temperature_2m_min', variable: Variable.temperature, aggregation: Aggregation.minimum, units: [Unit.celsius] },
  tdewC: { name: 'dew_point_2m_mean', variable: Variable.dew_point, aggregation: Aggregation.mean, units: [Unit.celsius] },
  rhMaxPct: { name: 'relative_humidity_2m_max', variable: Variable.relative_humidity, aggregation: Aggregation.maximum, units: [Unit.percentage] },
  rhMinPct: { name: 'relative_humidity_2m_min', variable: Variable.relative_humidity, aggregation: Aggregation.minimum, units: [Unit.percentage] },
  windMps: { name: 'wind_speed_10m_mean', variable: Variable.wind_speed, aggregation: Aggregation.mean, units: [Unit.metre_per_second, Unit.metre_per_second_not_unit_converted] },
  solarMjM2: { name: 'shortwave_radiation_sum', variable: Variable.shortwave_radiation, aggregation: Aggregation.sum, units: [Unit.megajoule_per_square_metre] },
  precipitationMm: { name: 'precipitation_sum', variable: Variable.precipitation, aggregation: Aggregation.sum, units: [Unit.millimetre] },
  rainProbabilityPct: { name: 'precipitation_probability_max', variable: Variable.precipitation_probability, aggregation: Aggregation.maximum, units: [Unit.percentage] },
} as const satisfies Record<string, DailyVariable>;

export type DailyField = keyof typeof dailyVariables;
export const dailyFields = Object.keys(dailyVariables) as DailyField[];

/** One daily variable with its values, NaN where nothing is known. */
export interface DailySeries {
  variable: Variable;
  aggregation: Aggregation;
  unit: Unit;
  values: readonly number[];
}

/** An answer of the service about one place. */
export interface WeatherPayload {
  latitudeDeg: number;
  longitudeDeg: number;
  /** NaN when not known. */
  elevationM: number;
  timeZone: string;
  utcOffsetSeconds: number;
  /** Instant of local midnight at the start of the first day [s since 1970]. */
  startSeconds: number;
  series: readonly DailySeries[];
}

const SECONDS_PER_DAY = 86_400;

function offsetVector(builder: Builder, offsets: readonly number[]): number {
  builder.startVector(4, offsets.length, 4);
  [...offsets].reverse().forEach((offset) => builder.addOffset(offset));
  return builder.endVector();
}

function writeSeries(builder: Builder, series: DailySeries): number {
  builder.startVector(4, series.values.length, 4);
  [...series.values].reverse().forEach((value) => builder.addFloat32(value));
  const values = builder.endVector();
  builder.startObject(13);
  builder.addFieldInt8(0, series.variable, 0);
  builder.addFieldInt8(1, series.unit, 0);
  builder.addFieldOffset(3, values, 0);
  builder.addFieldInt8(6, series.aggregation, 0);
  return builder.endObject();
}

/**
 * Writes an answer in the service's own wire format, size-prefixed FlatBuffers. The SDK only reads; the slot numbers are those of its readers.
 * Source: weather_api.fbs of @openmeteo/sdk 1.28
 */
export function encodeWeather(payload: WeatherPayload): Uint8Array {
  const builder = new Builder(4096);
  const timeZone = builder.createString(payload.timeZone);
  const dayCount = Math.max(0, ...payload.series.map((series) => series.values.length));
  const series = offsetVector(builder, payload.series.map((one) => writeSeries(builder, one)));
  builder.startObject(4);
  builder.addFieldInt64(0, BigInt(payload.startSeconds), 0n);
  builder.addFieldInt64(1, BigInt(payload.startSeconds + dayCount * SECONDS_PER_DAY), 0n);
  builder.addFieldInt32(2, SECONDS_PER_DAY, 0);
  builder.addFieldOffset(3, series, 0);
  const daily = builder.endObject();
  builder.startObject(15);
  builder.addFieldFloat32(0, payload.latitudeDeg, 0);
  builder.addFieldFloat32(1, payload.longitudeDeg, 0);
  builder.addFieldFloat32(2, payload.elevationM, 0);
  builder.addFieldInt32(6, payload.utcOffsetSeconds, 0);
  builder.addFieldOffset(7, timeZone, 0);
  builder.addFieldOffset(10, daily, 0);
  builder.finishSizePrefixed(builder.endObject());
  return builder.asUint8Array();
}
