import http from 'node:http';
import type { AddressInfo } from 'node:net';
import { Aggregation } from '@openmeteo/sdk/aggregation';
import { Unit } from '@openmeteo/sdk/unit';
import { Variable } from '@openmeteo/sdk/variable';
import { pino } from 'pino';
import { openMeteoService, type OpenMeteoOptions } from '@/server/adapters/weather/openMeteoService';
import { dailyFields, dailyVariables, encodeWeather, type DailyField, type WeatherPayload } from '@/server/adapters/weather/openMeteoPayload';
import type { WeatherQuery } from '@/server/adapters/weather/weatherService';

const log = pino({ level: 'silent' });
const query: WeatherQuery = { latitudeDeg: 47.5, longitudeDeg: 8.25, timeZone: 'Europe/Zurich', fromOn: '2026-06-01', toOn: '2026-06-03' };
/** Local midnight of 1 June in Zurich, two hours before that of Greenwich. */
const startSeconds = Date.UTC(2026, 4, 31, 22) / 1000;
const values: Record<DailyField, number[]> = {
  tmaxC: [24.1, 25.2, 26.3], tminC: [12.1, 13.2, 14.3], tdewC: [11, 12, 13], rhMaxPct: [90, 91, 92], rhMinPct: [40, 41, 42], windMps: [2.5, 3.5, 4.5],
  solarMjM2: [20.5, 21.5, 22.5], precipitationMm: [0, 4.2, 0.3], rainProbabilityPct: [5, 80, 30],
};
const payload = (change: Partial<WeatherPayload> = {}, fields: readonly DailyField[] = dailyFields): WeatherPayload => ({
  latitudeDeg: 47.48, longitudeDeg: 8.2, elevationM: 391, timeZone: 'Europe/Zurich', utcOffsetSeconds: 7200, startSeconds,
  series: fields.map((field) => ({ variable: dailyVariables[field].variable, aggregation: dailyVariables[field].aggregation, unit: dailyVariables[field].units[0], values: values[field] })),
  ...change,
});

type Handler = (request: http.IncomingMessage, response: http.ServerResponse) => void;
const servers: http.Server[] = [];
async function serverWith(handler: Handler): Promise<{ url: string; seen: URL[] }> {
  const seen: URL[] = [];
  const server = http.createServer((request, response) => {
    seen.push(new URL(request.url ?? '/', 'http://local'));
    handler(request, response);
  });
  servers.push(server);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return { url: `http://127.0.0.1:${(server.address() as AddressInfo).port}/v1/forecast`, seen };
}
const answering = (bytes: () => Uint8Array) => serverWith((_request, response) => response.end(bytes()));
const ask = (url: string, options: Partial<OpenMeteoOptions> = {}) => openMeteoService({ url, timeoutMs: 300, pausesMs: [5, 5], ...options }, log).fetchDays(query);

afterAll(() => {
  servers.forEach((server) => {
    server.close();
    server.closeAllConnections();
  });
});

describe('the client of the hosted forecast service', () => {
  it('asks for the place, its days and the daily variables in SI, and reads them by day', async () => {
    const { url, seen } = await answering(() => encodeWeather(payload()));
    const answer = await ask(url, { apiKey: 'key-of-a-subscription' });
    const asked = seen[0]?.searchParams;
    expect(Object.fromEntries(asked ?? [])).toMatchObject({
      latitude: '47.5', longitude: '8.25', timezone: 'Europe/Zurich', start_date: '2026-06-01', end_date: '2026-06-03', wind_speed_unit: 'ms', format: 'flatbuffers', apikey: 'key-of-a-subscription',
    });
    expect(asked?.get('daily')?.split(',')).toEqual(expect.arrayContaining(['temperature_2m_max', 'wind_speed_10m_mean', 'shortwave_radiation_sum', 'precipitation_probability_max']));
    expect(answer).toMatchObject({ source: 'Open-Meteo', sample: false, elevationM: 391 });
    expect(answer.days).toHaveLength(3);
    expect(answer.days[1]).toEqual({
      on: '2026-06-02', tminC: 13.2, tmaxC: 25.2, tdewC: 12, rhMaxPct: 91, rhMinPct: 41, windMps: 3.5, windHeightM: 10, solarMjM2: 21.5, precipitationMm: 4.2, rainProbabilityPct: 80,
    });
  });

  it.each([
    ['half of the variables', dailyFields.filter((_, index) => index % 2 === 0)],
    ['the variables in another order', [...dailyFields].reverse()],
  ])('reads an answer with %s by what each is, not by its place', async (_name, fields) => {
    // tminC, which no day can do without, is always among them
    const sent = fields.includes('tminC') ? fields : [...fields, 'tminC' as const];
    const { url } = await answering(() => encodeWeather(payload({}, sent)));
    const [day] = (await ask(url)).days;
    for (const field of dailyFields) {
      expect(day?.[field]).toBe(sent.includes(field) ? values[field][0] : null);
    }
    expect(day?.windHeightM).toBe(sent.includes('windMps') ? 10 : null);
  });

  it('keeps a gap as a gap', async () => {
    const series = payload().series.map((one) => (one.variable === Variable.precipitation ? { ...one, values: [0, NaN, 0.3] } : one));
    const { url } = await answering(() => encodeWeather(payload({ series })));
    expect((await ask(url)).days.map((day) => day.precipitationMm)).toEqual([0, null, 0.3]);
  });

  it('drops a pair of temperatures that cannot be, and days that nobody asked for', async () => {
    const series = payload().series.map((one) => (one.aggregation === Aggregation.minimum && one.variable === Variable.temperature ? { ...one, values: [12.1, 99, 14.3, 15] } : one));
    const { url } = await answering(() => encodeWeather(payload({ series })));
    const { days } = await ask(url);
    expect(days.map((day) => [day.on, day.tminC])).toEqual([['2026-06-01', 12.1], ['2026-06-02', null], ['2026-06-03', 14.3]]);
  });

  it.each<[string, Handler]>([
    ['503', (_request, response) => response.writeHead(503).end('busy')],
    ['500', (_request, response) => response.writeHead(500).end('broken')],
    ['404', (_request, response) => response.writeHead(404).end('{"error":true,"reason":"Not Found"}')],
    ['429 with a reason', (_request, response) => response.writeHead(429).end('{"error":true,"reason":"Minutely API request limit exceeded."}')],
    ['400 with a reason', (_request, response) => response.writeHead(400).end('{"error":true,"reason":"Cannot resolve the time zone."}')],
    ['an HTML page with status 200', (_request, response) => response.writeHead(200, { 'content-type': 'text/html' }).end('<!doctype html><html><body>Sign in to this network</body></html>')],
    ['an empty body', (_request, response) => response.end()],
    ['no answer at all', () => undefined],
    ['a closed connection', (request) => request.socket.destroy()],
    ['another place', (_request, response) => response.end(encodeWeather(payload({ latitudeDeg: 12 })))],
    ['another hemisphere', (_request, response) => response.end(encodeWeather(payload({ longitudeDeg: -171.75 })))],
    ['no temperatures', (_request, response) => response.end(encodeWeather(payload({}, ['precipitationMm', 'windMps'])))],
    ['temperatures that are all unknown', (_request, response) => response.end(encodeWeather(payload({ series: payload().series.map((one) => ({ ...one, values: [NaN, NaN, NaN] })) })))],
    ['days of another year', (_request, response) => response.end(encodeWeather(payload({ startSeconds: startSeconds - 400 * 86_400 })))],
    ['wind in miles per hour', (_request, response) => response.end(encodeWeather(payload({ series: payload().series.map((one) => (one.variable === Variable.wind_speed ? { ...one, unit: Unit.miles_per_hour } : one)) })))],
  ])('gives up after three attempts on %s', async (_name, handler) => {
    const { url, seen } = await serverWith(handler);
    await expect(ask(url)).rejects.toMatchObject({ code: 'weather_unavailable', status: 503 });
    expect(seen).toHaveLength(3);
  });

  it('gives up on a server that is not there', async () => {
    await expect(ask('http://127.0.0.1:9/v1/forecast')).rejects.toMatchObject({ code: 'weather_unavailable' });
  });

  it('takes the answer that comes at the second attempt', async () => {
    let count = 0;
    const { url } = await serverWith((_request, response) => {
      count += 1;
      if (count === 1) {
        response.writeHead(503).end();
      } else {
        response.end(encodeWeather(payload()));
      }
    });
    expect((await ask(url)).days).toHaveLength(3);
  });

  it('takes a place on the other side of the date line for near', async () => {
    const { url } = await answering(() => encodeWeather(payload({ latitudeDeg: -16.8, longitudeDeg: -179.9, utcOffsetSeconds: 12 * 3600, startSeconds: Date.UTC(2026, 4, 31, 12) / 1000 })));
    const answer = await openMeteoService({ url, pausesMs: [] }, log).fetchDays({ ...query, latitudeDeg: -16.8, longitudeDeg: 179.8, timeZone: 'Pacific/Fiji' });
    expect(answer.days.map((day) => day.on)).toEqual(['2026-06-01', '2026-06-02', '2026-06-03']);
  });

  it('does not lose or double a day when clocks change inside the answer', async () => {
    const days = ['2026-03-28', '2026-03-29', '2026-03-30'];
    // the service gives one offset for the whole answer: here that of the summer, for days that begin in winter
    const { url } = await answering(() => encodeWeather(payload({ startSeconds: Date.UTC(2026, 2, 27, 23) / 1000, utcOffsetSeconds: 7200 })));
    const answer = await openMeteoService({ url, pausesMs: [] }, log).fetchDays({ ...query, fromOn: '2026-03-28', toOn: '2026-03-30' });
    expect(answer.days.map((day) => day.on)).toEqual(days);
  });
});
