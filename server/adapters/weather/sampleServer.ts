import http from 'node:http';
import type { AddressInfo } from 'node:net';
import { civilDaysFrom, addDays, epochDayOf, isCivilDay } from '@/scheduling/units/civilDay';
import { instantAt, isTimeZone } from '@/shared/time';
import { dailyFields, dailyVariables, encodeWeather, type DailyField, type DailySeries } from './openMeteoPayload';
import { nearestSamplePlace, readSampleRecords, recordedDayFor, type SampleDay } from './sampleRecords';

export interface SampleServer {
  /** Addresses that take the place of the hosted service's, for the forecast and for past years. */
  url: string;
  recordsUrl: string;
  close(): Promise<void>;
}

/** Days that each address gives at once. */
const paths: Record<string, number> = { '/v1/forecast': 400, '/v1/archive': 6 * 366 };

class BadQuery extends Error {}

function asNumber(query: URLSearchParams, name: string, least: number, most: number): number {
  const text = query.get(name) ?? '';
  const value = Number(text);
  if (text.trim() === '' || !(value >= least && value <= most)) {
    throw new BadQuery(`Parameter '${name}' must lie between ${least} and ${most}.`);
  }
  return value;
}

function asDay(query: URLSearchParams, name: string): string {
  const value = query.get(name) ?? '';
  if (!isCivilDay(value)) {
    throw new BadQuery(`Parameter '${name}' must be a day written YYYY-MM-DD.`);
  }
  return value;
}

function recorded(day: SampleDay | undefined, field: DailyField): number {
  if (day === undefined) {
    return NaN;
  }
  switch (field) {
    case 'tmaxC': return day.tmaxC;
    case 'tminC': return day.tminC;
    case 'windMps': return day.windMps;
    case 'precipitationMm': return day.precipitationMm;
    default: return NaN;
  }
}

function answer(query: URLSearchParams, daysAtMost: number, records: ReadonlyMap<string, ReadonlyMap<string, SampleDay>>): Uint8Array {
  const latitudeDeg = asNumber(query, 'latitude', -90, 90);
  const longitudeDeg = asNumber(query, 'longitude', -180, 180);
  const timeZone = query.get('timezone') ?? 'UTC';
  if (!isTimeZone(timeZone)) {
    throw new BadQuery('Invalid timezone');
  }
  const fromOn = asDay(query, 'start_date');
  const toOn = asDay(query, 'end_date');
  const on = civilDaysFrom(fromOn, addDays(toOn, 1));
  if (on.length === 0 || on.length > daysAtMost) {
    throw new BadQuery(`Between 1 and ${daysAtMost} days can be asked for.`);
  }
  if (query.get('wind_speed_unit') !== 'ms' || query.get('format') !== 'flatbuffers') {
    throw new BadQuery('Only m/s and flatbuffers are spoken here.');
  }
  const wanted = (query.get('daily') ?? '').split(',');
  const ofPlace = records.get(nearestSamplePlace(latitudeDeg, longitudeDeg).name);
  const series: DailySeries[] = dailyFields.filter((field) => wanted.includes(dailyVariables[field].name)).map((field) => {
    const { variable, aggregation, units } = dailyVariables[field];
    return { variable, aggregation, unit: units[0], values: on.map((day) => recorded(ofPlace?.get(recordedDayFor(day, latitudeDeg)), field)) };
  });
  const midnightSeconds = instantAt(fromOn, 0, timeZone).getTime() / 1000;
  const utcOffsetSeconds = epochDayOf(fromOn) * 86_400 - midnightSeconds;
  return encodeWeather({ latitudeDeg, longitudeDeg, elevationM: NaN, timeZone, utcOffsetSeconds, startSeconds: midnightSeconds, series });
}

/**
 * A local server that speaks the hosted service's protocol and replays recorded days. Variables that nobody recorded come as missing,
 * so that the rules for missing data fill them in as they would for a real gap.
 */
export async function startSampleServer(): Promise<SampleServer> {
  const records = readSampleRecords();
  const server = http.createServer((request, response) => {
    const url = new URL(request.url ?? '/', 'http://127.0.0.1');
    const daysAtMost = paths[url.pathname];
    if (daysAtMost === undefined) {
      response.writeHead(404, { 'content-type': 'application/json' }).end(JSON.stringify({ error: true, reason: 'Not Found' }));
      return;
    }
    try {
      const body = answer(url.searchParams, daysAtMost, records);
      response.writeHead(200, { 'content-type': 'application/octet-stream' }).end(body);
    } catch (error) {
      const isBadQuery = error instanceof BadQuery;
      response.writeHead(isBadQuery ? 400 : 500, { 'content-type': 'application/json' })
        .end(JSON.stringify({ error: true, reason: isBadQuery ? error.message : 'The sample server failed.' }));
    }
  });
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(0, '127.0.0.1', resolve);
  });
  server.unref();
  const { port } = server.address() as AddressInfo;
  return {
    url: `http://127.0.0.1:${port}/v1/forecast`,
    recordsUrl: `http://127.0.0.1:${port}/v1/archive`,
    close: () => new Promise((resolve) => {
      server.close(() => resolve());
      server.closeAllConnections();
    }),
  };
}
