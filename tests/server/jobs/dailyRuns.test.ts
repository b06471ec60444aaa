import { AppError } from '@/server/errors';
import { dailyRunsDue, nextDailyRunAfter, yardsBehind } from '@/server/jobs/dueWork';
import { DAILY_TRIES, runDaily } from '@/server/jobs/runDaily';
import { DailyRun, Plan, Reminder, Yard } from '@/server/models';
import type { WeatherService } from '@/server/adapters/weather/weatherService';
import { instantAt } from '@/shared/time';
import { wateredYard, type WateredYard } from '../../factories/wateredYard';
import { dryWeather } from '../../setup/switchableWeather';
import { testContext, type TestContext } from '../../setup/testContext';

const on = '2026-06-13';

describe('the daily run', () => {
  let test: TestContext;
  let yard: WateredYard;
  const weather = dryWeather();
  beforeAll(async () => { test = await testContext({ weather }); });
  afterAll(async () => {
    await test.close();
    await weather.close();
  });
  beforeEach(async () => {
    await test.context.database.query('DELETE FROM yards');
    test.clock.set(instantAt(on, 180, 'America/New_York'));
    // sandy ground that nobody watered for weeks: there is something to plan on the first day
    yard = await wateredYard(test, { zones: [{ soil: 'sand', createdAt: '2026-05-20T12:00:00Z' }] });
  });
  const letLeasesRunOut = () => test.context.database.query(`UPDATE daily_runs SET lease_until = clock_timestamp() - interval '1 second'`);

  it('is due from three in the morning by the yard’s own clocks, once a day', async () => {
    const west = await wateredYard(test, { timeZone: 'America/Los_Angeles', latitudeDeg: 47.6, longitudeDeg: -122.3 });
    test.clock.set(instantAt(on, 179, 'America/New_York'));
    // in the west it is still the day before, which was not planned either
    expect(await dailyRunsDue(test.context)).toEqual([{ yardId: west.id, on: '2026-06-12' }]);
    expect(await runDaily(test.context, { yardId: west.id, on: '2026-06-12' })).toBe('done');
    test.clock.set(instantAt(on, 180, 'America/New_York'));
    expect(await dailyRunsDue(test.context)).toEqual([{ yardId: yard.id, on }]);
    expect(await runDaily(test.context, { yardId: yard.id, on })).toBe('done');
    expect(await dailyRunsDue(test.context)).toEqual([]);
    test.clock.set(instantAt(on, 180, 'America/Los_Angeles'));
    expect(await dailyRunsDue(test.context)).toEqual([{ yardId: west.id, on }]);
  });

  it('keeps to the yard’s day across the date line', async () => {
    const east = await wateredYard(test, { timeZone: 'Pacific/Auckland', latitudeDeg: -36.8, longitudeDeg: 174.8 });
    // 03:00 on the 14th in Auckland is 11:00 on the 13th in New York
    test.clock.set(instantAt('2026-06-14', 180, 'Pacific/Auckland'));
    expect(await dailyRunsDue(test.context)).toEqual(expect.arrayContaining([{ yardId: east.id, on: '2026-06-14' }, { yardId: yard.id, on }]));
  });

  it('leaves a plan and the morning’s reminder', async () => {
    await runDaily(test.context, { yardId: yard.id, on });
    const [plan] = await Plan.findAll({ where: { yardId: yard.id } });
    expect(plan).toMatchObject({ version: 1, fromOn: on, cause: 'morning' });
    const reminders = await Reminder.findAll({ where: { yardId: yard.id } });
    const first = plan!.result.days[0]?.rounds[0]?.sets[0];
    expect(first).toBeDefined();
    expect(reminders.map((row) => [row.kind, row.subjectKey, row.dueAt])).toEqual([['morning', on, instantAt(on, first!.startMinutes - 20, 'America/New_York')]]);
    expect(await DailyRun.findOne({ where: { yardId: yard.id } })).toMatchObject({ status: 'done', attempts: 1 });
  });

  it('is done by one of many servers that begin it at the same moment', async () => {
    const servers = [test.context, test.secondServer()];
    const outcomes = await Promise.all(Array.from({ length: 6 }, (_, index) => runDaily(servers[index % 2]!, { yardId: yard.id, on })));
    expect(outcomes.sort()).toEqual(['done', 'not_mine', 'not_mine', 'not_mine', 'not_mine', 'not_mine']);
    expect(await Plan.count({ where: { yardId: yard.id } })).toBe(1);
  });

  it('is taken over from a server that was killed in the middle', async () => {
    await DailyRun.create({ yardId: yard.id, on, status: 'claimed', claimedBy: 'a killed server', leaseUntil: new Date('2100-01-01'), attempts: 1 });
    expect(await runDaily(test.context, { yardId: yard.id, on })).toBe('not_mine');
    await letLeasesRunOut();
    expect(await dailyRunsDue(test.context)).toEqual([{ yardId: yard.id, on }]);
    expect(await runDaily(test.context, { yardId: yard.id, on })).toBe('done');
    expect(await DailyRun.findOne({ where: { yardId: yard.id } })).toMatchObject({ status: 'done', attempts: 2, claimedBy: test.context.serverId });
  });

  it('plans on the weather it has when the service is out, keeps the error, and asks again a few times', async () => {
    await runDaily(test.context, { yardId: yard.id, on });
    const nobody = () => Promise.reject(new AppError('weather_unavailable', 'Nobody answers.'));
    const out: WeatherService = { fetchDays: nobody, fetchRecords: nobody, recordYears: 1 };
    const without = { ...test.context, weather: out };
    const next = '2026-06-14';
    test.clock.set(instantAt(next, 180, 'America/New_York'));
    for (let attempt = 1; attempt <= DAILY_TRIES; attempt += 1) {
      expect(await runDaily(without, { yardId: yard.id, on: next })).toBe('failed');
      expect(await dailyRunsDue(test.context)).toEqual([]);
      await letLeasesRunOut();
    }
    expect(await dailyRunsDue(test.context)).toEqual([]);
    expect(await DailyRun.findOne({ where: { yardId: yard.id, on: next } })).toMatchObject({ status: 'failed', attempts: DAILY_TRIES, lastError: 'The weather service gave nothing usable.' });
    const newest = await Plan.findOne({ where: { yardId: yard.id }, order: [['version', 'DESC']] });
    expect(newest).toMatchObject({ fromOn: next });
    expect(newest?.weatherAsOf).toEqual(instantAt(on, 180, 'America/New_York'));
  });

  it('finds yards whose facts changed after their plan', async () => {
    await runDaily(test.context, { yardId: yard.id, on });
    expect(await yardsBehind(test.context)).toEqual([]);
    await Yard.increment('factsVersion', { where: { id: yard.id } });
    expect(await yardsBehind(test.context)).toEqual([{ yardId: yard.id }]);
  });
});

describe('the next daily run', () => {
  const zones = ['America/New_York', 'America/Los_Angeles'];
  it('is the earliest three o’clock of any zone', () => {
    expect(nextDailyRunAfter(new Date('2026-06-13T09:40:00Z'), zones)).toEqual(new Date('2026-06-13T10:00:00Z'));
    expect(nextDailyRunAfter(new Date('2026-06-13T10:00:00Z'), zones)).toEqual(new Date('2026-06-14T07:00:00Z'));
    expect(nextDailyRunAfter(new Date('2026-06-13T10:00:00Z'), [])).toBeNull();
  });

  it('follows the clocks when they change', () => {
    // clocks in New York go forward on 8 March 2026 at two in the morning, and back on 1 November 2026
    expect(nextDailyRunAfter(new Date('2026-03-07T12:00:00Z'), ['America/New_York'])).toEqual(new Date('2026-03-08T07:00:00Z'));
    expect(nextDailyRunAfter(new Date('2026-10-31T12:00:00Z'), ['America/New_York'])).toEqual(new Date('2026-11-01T08:00:00Z'));
  });
});
