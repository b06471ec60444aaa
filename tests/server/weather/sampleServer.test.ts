import { readFileSync } from 'node:fs';
import path from 'node:path';
import { pino } from 'pino';
import { addDays, daysBetween, epochDayOf } from '@/scheduling/units/civilDay';
import { createWeatherService } from '@/server/adapters/weather/createWeatherService';
import { nearestSamplePlace, recordedDayFor } from '@/server/adapters/weather/sampleRecords';
import { startSampleServer } from '@/server/adapters/weather/sampleServer';

const log = pino({ level: 'silent' });
const sample = createWeatherService({ WEATHER_SERVICE: 'sample', WEATHER_URL: 'http://nowhere.example', WEATHER_RECORDS_URL: 'http://nowhere.example' }, log);
afterAll(() => sample.close());

const seattle = { latitudeDeg: 47.6, longitudeDeg: -122.3, timeZone: 'America/Los_Angeles' };

/** One row of the published table, read without the code under test. */
function tableRow(place: string, on: string): { precipitationMm: number; tmaxC: number; tminC: number; windMps: number } {
  const file = path.join(__dirname, '../../../node_modules/vega-datasets/data/weather.csv');
  const line = readFileSync(file, 'utf8').split('\n').find((candidate) => candidate.startsWith(`${place},${on},`)) ?? '';
  const [, , precipitation, tmax, tmin, wind] = line.split(',');
  return { precipitationMm: Number(precipitation), tmaxC: Number(tmax), tminC: Number(tmin), windMps: Number(wind) };
}

describe('sample weather through the real client', () => {
  it('replays the recorded days of the nearest place at the day asked for, and says whose they are', async () => {
    const answer = await sample.service.fetchDays({ ...seattle, fromOn: '2026-06-01', toOn: '2026-06-30' });
    expect(answer).toMatchObject({ sample: true, source: 'Sample weather: records of Seattle 2012–2015', elevationM: null });
    expect(answer.days).toHaveLength(30);
    answer.days.forEach((day, index) => {
      // 2026 = 2012 + 14, and 14 mod 4 = 2: records of 2014
      expect(day).toMatchObject({ on: addDays('2026-06-01', index), ...tableRow('Seattle', `2014-06-${String(index + 1).padStart(2, '0')}`) });
      expect(day).toMatchObject({ tdewC: null, rhMaxPct: null, rhMinPct: null, solarMjM2: null, rainProbabilityPct: null, windHeightM: 10 });
    });
  });

  it('takes New York for the east', async () => {
    const answer = await sample.service.fetchDays({ latitudeDeg: 42.4, longitudeDeg: -71.1, timeZone: 'America/New_York', fromOn: '2027-01-05', toOn: '2027-01-05' });
    expect(answer.source).toBe('Sample weather: records of New York 2012–2015');
    expect(answer.days[0]).toMatchObject(tableRow('New York', '2015-01-05'));
  });

  it('takes the 29th of February from 2012 and has no gap in four years', async () => {
    expect((await sample.service.fetchDays({ ...seattle, fromOn: '2028-02-29', toOn: '2028-02-29' })).days[0]).toMatchObject(tableRow('Seattle', '2012-02-29'));
    for (let year = 2025; year <= 2028; year += 1) {
      const { days } = await sample.service.fetchDays({ ...seattle, fromOn: `${year}-01-01`, toOn: `${year}-12-31` });
      expect(days).toHaveLength(daysBetween(`${year}-01-01`, `${year + 1}-01-01`));
      expect(days.every((day) => day.tminC !== null && day.tmaxC !== null && day.precipitationMm !== null && day.windMps !== null)).toBe(true);
    }
  });

  it.each([
    ['America/New_York', '2026-03-06', '2026-03-10'], ['America/New_York', '2026-10-30', '2026-11-03'], ['Pacific/Kiritimati', '2026-06-10', '2026-06-14'],
    ['Pacific/Pago_Pago', '2026-06-10', '2026-06-14'], ['Asia/Kolkata', '2026-06-10', '2026-06-14'], ['Australia/Lord_Howe', '2026-04-03', '2026-04-07'],
  ])('gives each civil day of %s once around %s', async (timeZone, fromOn, toOn) => {
    const { days } = await sample.service.fetchDays({ latitudeDeg: 40, longitudeDeg: -100, timeZone, fromOn, toOn });
    expect(days.map((day) => epochDayOf(day.on) - epochDayOf(fromOn))).toEqual([0, 1, 2, 3, 4]);
  });

  it('moves the seasons by half a year south of the equator and says so', async () => {
    const answer = await sample.service.fetchDays({ latitudeDeg: -36.8, longitudeDeg: 174.8, timeZone: 'Pacific/Auckland', fromOn: '2026-01-15', toOn: '2026-01-15' });
    expect(answer.source).toBe('Sample weather: records of Seattle 2012–2015, moved by half a year');
    expect(answer.days[0]).toMatchObject(tableRow('Seattle', '2014-07-15'));
    expect(recordedDayFor('2026-08-31', -36.8)).toBe('2014-02-28');
  });

  it('finds the nearer place on the globe, not on the map', () => {
    expect(nearestSamplePlace(51.5, -0.1).name).toBe('New York');
    expect(nearestSamplePlace(35.7, 139.7).name).toBe('Seattle');
    expect(nearestSamplePlace(1.87, -157.4).name).toBe('Seattle');
  });

  it('refuses bad questions as the hosted service does', async () => {
    const server = await startSampleServer();
    const good = 'latitude=47&longitude=-122&start_date=2026-06-01&end_date=2026-06-02&timezone=UTC&daily=temperature_2m_max&wind_speed_unit=ms&format=flatbuffers';
    expect((await fetch(`${server.url}?${good}`)).status).toBe(200);
    for (const bad of [good.replace('latitude=47', 'latitude=147'), good.replace('2026-06-01', '2026-02-30'), good.replace('2026-06-02', '2026-05-01'), good.replace('UTC', 'Mars/Base'), good.replace('=ms', '=kn')]) {
      const response = await fetch(`${server.url}?${bad}`);
      expect(response.status).toBe(400);
      expect(await response.json()).toMatchObject({ error: true });
    }
    expect((await fetch(server.url.replace('/v1/forecast', '/v1/other'))).status).toBe(404);
    await server.close();
  });
});
