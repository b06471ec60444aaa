import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { addDays } from '@/scheduling/units/civilDay';
import { factsChanged } from '@/server/commands/factsChanged';
import { Membership, Plan, Proposal, Round, RoundSet, Zone } from '@/server/models';
import type { PlanResponse } from '@/shared/contracts/plans';
import type { TodayResponse } from '@/shared/contracts/rounds';
import type { BudgetResponse, WeatherResponse } from '@/shared/contracts/water';
import { signedIn } from '../../factories/people';
import { wateredYard, type WateredYard } from '../../factories/wateredYard';
import { SwitchableWeather } from '../../setup/switchableWeather';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
const weather = new SwitchableWeather();
beforeAll(async () => {
  test = await testContext({ weather });
});
beforeEach(() => {
  test.clock.set('2026-06-13T09:00:00Z');
  weather.isOut = false;
  weather.change = (day) => ({ ...day, precipitationMm: day.on === '2026-06-18' ? 12 : 0, tminC: 15, tmaxC: 29, windMps: 2 });
});
afterAll(async () => {
  await test.close();
  await weather.close();
});

const get = async <T>(yard: WateredYard, path: string, status = 200): Promise<T> => {
  const answer = await request(test.app).get(`/api/yards/${yard.id}${path}`).set(yard.owner.headers);
  expect([answer.status, answer.body]).toEqual([status, answer.body]);
  return answer.body as T;
};
const thirsty = async (yard: WateredYard) => {
  await Zone.update({ createdAt: new Date('2026-06-01T12:00:00Z') }, { where: { yardId: yard.id } });
};

describe('GET today', () => {
  it('makes the first plan by itself and shows the day whole', async () => {
    const yard = await wateredYard(test, { zones: [{ name: 'Back lawn', soil: 'sand' }, { name: 'New seed', seededOn: '2026-06-09', positions: 1 }, { name: 'Slope', resting: true }] });
    await thirsty(yard);
    const today = await get<TodayResponse>(yard, '/today');
    expect(today).toMatchObject({
      today: '2026-06-13', nowMinutes: 300, now: '2026-06-13T09:00:00.000Z', yardName: 'Fern Hollow', timeZone: 'America/New_York', runningRoundId: null, openProposals: 0,
      weather: { tminC: 15, tmaxC: 29, windMps: 2, rainTodayMm: 0, nextRainOn: '2026-06-18', sample: true, asOf: '2026-06-13T09:00:00.000Z', stale: false },
    });
    const [back, seed, slope] = yard.zones;
    const sets = today.rounds.flatMap((round) => round.sets);
    expect(new Set(sets.map((set) => set.zoneId))).toEqual(new Set([back?.id, seed?.id]));
    expect(today.rounds.every((round) => round.state === 'waiting' && round.roundId === null)).toBe(true);
    const first = today.rounds[0];
    expect(first?.startMinutes).toBe(first?.sets[0]?.startMinutes);
    expect(today.nextSet).toEqual({ on: '2026-06-13', startMinutes: first?.startMinutes, zoneId: first?.sets[0]?.zoneId });
    expect(today.zonesWithout).toMatchObject([{ zoneId: slope?.id, reasons: [{ code: 'resting' }] }]);
    expect(today.zones.map((zone) => [zone.name, zone.isSeeded])).toEqual([['Back lawn', false], ['New seed', true], ['Slope', false]]);
    expect(today.zones[0]?.depletionMm).toBeGreaterThan(today.zones[0]?.refillLineMm ?? Infinity);
    expect(sets.every((set) => set.reasons.length > 0)).toBe(true);
  });

  it('follows a round: running, done with the ground wetter, and the rest of the day', async () => {
    const yard = await wateredYard(test, { zones: [{ soil: 'sand' }] });
    await thirsty(yard);
    const before = await get<TodayResponse>(yard, '/today');
    const first = before.rounds[0];
    test.clock.set(first?.sets[0]?.startAt ?? '');
    const round = { id: randomUUID(), on: before.today, roundIndex: first?.roundIndex ?? -1 };
    expect((await request(test.app).post(`/api/yards/${yard.id}/rounds`).set(yard.owner.headers).send(round)).status).toBe(201);
    const during = await get<TodayResponse>(yard, '/today');
    expect(during.runningRoundId).toBe(round.id);
    expect(during.rounds[0]).toMatchObject({ state: 'running', roundId: round.id });
    test.clock.advance(first?.sets[0]?.minutes ?? 0);
    expect((await request(test.app).post(`/api/yards/${yard.id}/rounds/${round.id}/actions`).set(yard.owner.headers).send({ action: 'water_off' })).status).toBe(200);
    const after = await get<TodayResponse>(yard, '/today');
    expect(after.runningRoundId).toBeNull();
    expect(after.rounds[0]).toMatchObject({ state: 'done', roundId: round.id, sets: first?.sets.map((set) => ({ positionId: set.positionId, startAt: set.startAt })) });
    // one of two halves of the zone got the depth of its set
    expect((before.zones[0]?.depletionMm ?? 0) - (after.zones[0]?.depletionMm ?? 0)).toBeCloseTo((first?.sets[0]?.depthMm ?? 0) / 2, 6);
    expect(after.zonesWithout).toEqual([]);
  });

  it('shows a round that was skipped with its cause, and one whose time went by as missed', async () => {
    const yard = await wateredYard(test, { zones: [{ soil: 'sand' }], hours: [{ fromMinutes: 330, toMinutes: 480 }] });
    await thirsty(yard);
    const before = await get<TodayResponse>(yard, '/today');
    test.clock.set('2026-06-13T13:00:00Z');
    expect((await get<TodayResponse>(yard, '/today')).rounds.map((round) => round.state)).toEqual(before.rounds.map(() => 'missed'));
    test.clock.set('2026-06-13T09:05:00Z');
    const skip = { on: before.today, roundIndex: 0, cause: 'ground_wet' };
    expect((await request(test.app).post(`/api/yards/${yard.id}/rounds/skip`).set(yard.owner.headers).send(skip)).status).toBe(200);
    const after = await get<TodayResponse>(yard, '/today');
    expect(after.rounds[0]).toMatchObject({ state: 'skipped', roundId: null, skipCause: 'ground_wet' });
    expect(after.nextSet?.on).not.toBe(before.today);
  });

  it('shows the yard\'s own gauge in the place of the forecast, and the ground wetter by it', async () => {
    const yard = await wateredYard(test, { zones: [{ soil: 'silt' }] });
    await thirsty(yard);
    const before = await get<TodayResponse>(yard, '/today');
    expect((await request(test.app).put(`/api/yards/${yard.id}/rain/2026-06-13`).set(yard.owner.headers).send({ depthMm: 8 })).status).toBe(200);
    const after = await get<TodayResponse>(yard, '/today');
    expect(after.weather?.rainTodayMm).toBe(8);
    expect((before.zones[0]?.depletionMm ?? 0) - (after.zones[0]?.depletionMm ?? 0)).toBeCloseTo(8, 6);
  });

  it('of a yard without weather says so, and stands', async () => {
    weather.isOut = true;
    const yard = await wateredYard(test);
    const today = await get<TodayResponse>(yard, '/today');
    expect(today).toMatchObject({ today: '2026-06-13', weather: null, rounds: [], nextSet: null, missing: [{ code: 'no_weather', values: {} }] });
    expect(today.zones).toMatchObject([{ name: 'Lawn 1', depletionMm: null, refillLineMm: null }]);
    await get(yard, '/plan', 503);
    expect((await request(test.app).post(`/api/yards/${yard.id}/plan`).set(yard.owner.headers)).body).toMatchObject({ error: { code: 'weather_unavailable' } });
    expect(await get<WeatherResponse>(yard, '/weather')).toEqual({ days: [], asOf: null, source: null, sample: false, stale: true });
    expect((await get<BudgetResponse>(yard, '/budget')).zones).toMatchObject([{ days: [] }]);
  });

  it('says that the weather is old while the service is out', async () => {
    const yard = await wateredYard(test);
    await get(yard, '/today');
    weather.isOut = true;
    test.clock.advance(1440);
    expect((await request(test.app).post(`/api/yards/${yard.id}/plan`).set(yard.owner.headers)).body).toMatchObject({ cause: 'asked for', weatherAsOf: '2026-06-13T09:00:00.000Z' });
    expect((await get<TodayResponse>(yard, '/today')).weather).toMatchObject({ stale: true, asOf: '2026-06-13T09:00:00.000Z' });
    expect(await get<WeatherResponse>(yard, '/weather')).toMatchObject({ stale: true, asOf: '2026-06-13T09:00:00.000Z', source: 'Sample weather: records of New York 2012–2015', sample: true });
  });

  it('counts open proposals', async () => {
    const yard = await wateredYard(test, { zones: [{ seededOn: '2026-06-09' }] });
    const schedule = { stages: [] };
    await Proposal.create({ id: randomUUID(), yardId: yard.id, zoneId: yard.zones[0]?.id ?? '', reason: 'windy spell', scheduleBefore: schedule, schedule, status: 'open' });
    expect((await get<TodayResponse>(yard, '/today')).openProposals).toBe(1);
  });
});

describe('the plan', () => {
  it('is told by day with rounds, moves and a reason for every zone without water', async () => {
    const yard = await wateredYard(test, { zones: [{ soil: 'sand' }, {}] });
    await thirsty(yard);
    const plan = await get<PlanResponse>(yard, '/plan');
    expect(plan).toMatchObject({ version: 1, cause: 'first plan', fromOn: '2026-06-13', toOn: '2026-06-22', weatherAsOf: '2026-06-13T09:00:00.000Z' });
    expect(plan.days.map((day) => day.on)).toEqual(Array.from({ length: 10 }, (_, index) => addDays('2026-06-13', index)));
    for (const day of plan.days) {
      const watered = new Set(day.rounds.flatMap((round) => round.sets.map((set) => set.zoneId)));
      const without = day.zonesWithout.map((zone) => zone.zoneId);
      expect([...watered, ...without].sort()).toEqual(yard.zones.map((zone) => zone.id).sort());
      expect(day.zonesWithout.every((zone) => zone.reasons.length > 0)).toBe(true);
      for (const round of day.rounds) {
        const changes = round.sets.slice(1).filter((set, index) => set.positionId !== round.sets[index]?.positionId).length;
        expect(round.moves).toBe(changes);
        expect(round.endMinutes).toBe(Math.max(...round.sets.map((set) => set.startMinutes + set.minutes)));
      }
    }
    expect(plan.days.some((day) => day.rounds.some((round) => round.moves > 0))).toBe(true);
  });

  it('is made anew on asking, by those who may', async () => {
    const yard = await wateredYard(test);
    const path = `/api/yards/${yard.id}/plan`;
    const asked = weather.asked.length;
    expect((await request(test.app).post(path).set(yard.owner.headers)).body).toMatchObject({ version: 1, cause: 'asked for' });
    expect((await request(test.app).post(path).set(yard.owner.headers)).body).toMatchObject({ version: 2 });
    expect(weather.asked.length).toBe(asked + 2);
    const helper = await signedIn(test);
    await Membership.create({ id: randomUUID(), yardId: yard.id, userId: helper.user.id, role: 'helper' });
    expect((await request(test.app).post(path).set(helper.headers)).status).toBe(403);
    expect((await request(test.app).get(path).set(helper.headers)).status).toBe(200);
  });

  it('is nobody else\'s', async () => {
    const yard = await wateredYard(test);
    const stranger = await signedIn(test);
    for (const path of ['/today', '/plan', '/budget', '/weather']) {
      expect((await request(test.app).get(`/api/yards/${yard.id}${path}`).set(stranger.headers)).status).toBe(404);
      expect((await request(test.app).get(`/api/yards/${yard.id}${path}`)).status).toBe(401);
    }
    expect((await request(test.app).post(`/api/yards/${yard.id}/plan`).set(stranger.headers)).status).toBe(404);
    expect(await Plan.count({ where: { yardId: yard.id } })).toBe(0);
  });
});

describe('the water budget', () => {
  it('shows thirty days and the forecast by zone, or the days asked for', async () => {
    const yard = await wateredYard(test, { zones: [{ name: 'Old', createdAt: '2026-04-20T12:00:00Z' }, { name: 'Newer', createdAt: '2026-06-10T12:00:00Z' }] });
    const budget = await get<BudgetResponse>(yard, '/budget');
    expect(budget.today).toBe('2026-06-13');
    expect(budget.zones.map((zone) => [zone.name, zone.days[0]?.on, zone.days.length])).toEqual([['Old', '2026-05-14', 40], ['Newer', '2026-06-10', 13]]);
    expect(budget.zones[0]?.days.filter((day) => day.isForecast).map((day) => day.on)[0]).toBe('2026-06-13');
    expect(budget.zones[0]?.days[5]?.assumptions.map((one) => one.field)).toContain('solarMjM2');
    const asked = await get<BudgetResponse>(yard, '/budget?from=2026-04-20&to=2026-04-22');
    expect(asked.zones[0]?.days.map((day) => day.on)).toEqual(['2026-04-20', '2026-04-21', '2026-04-22']);
    expect(asked.zones[1]?.days).toEqual([]);
  });

  it.each([
    ['?from=2026-02-30', 'from'], ['?to=tomorrow', 'to'], ['?from=2026-06-10&to=2026-06-01', 'to'], ['?from=2020-01-01', 'from'], ['?to=0001-01-01', 'to'],
  ])('refuses %s', async (query, field) => {
    const yard = await wateredYard(test);
    const answer = await request(test.app).get(`/api/yards/${yard.id}/budget${query}`).set(yard.owner.headers);
    expect(answer.status).toBe(400);
    expect(answer.body).toMatchObject({ error: { code: 'invalid_input', ...(field === null ? {} : { fields: [{ path: field }] }) } });
  });

  it('moves with water that was applied, and with a change of facts, at the next read', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-01T12:00:00Z' }] });
    const before = await get<BudgetResponse>(yard, '/budget');
    await yard.water({ on: '2026-06-11', appliedMm: 10 });
    await factsChanged(test.context.database, yard.id, '2026-06-11');
    const after = await get<BudgetResponse>(yard, '/budget');
    const dayIn = (budget: BudgetResponse) => budget.zones[0]?.days.find((day) => day.on === '2026-06-11');
    const [dry, wet] = [dayIn(before), dayIn(after)];
    // half of the zone got 10 mm; grass that is less short of water then uses a little more of it
    expect(wet?.irrigationMm).toBeCloseTo(5, 9);
    expect((dry?.depletionEndMm ?? NaN) - (wet?.depletionEndMm ?? NaN)).toBeCloseTo(5 - ((wet?.etcMm ?? NaN) - (dry?.etcMm ?? NaN)), 9);
  });
});

describe('the weather', () => {
  it('is shown by day with its source and the reference evapotranspiration reckoned from it', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-01T12:00:00Z' }] });
    const shown = await get<WeatherResponse>(yard, '/weather');
    expect(shown).toMatchObject({ sample: true, stale: false, asOf: '2026-06-13T09:00:00.000Z' });
    expect(shown.days.map((day) => day.on)).toEqual(Array.from({ length: 41 }, (_, index) => addDays('2026-05-14', index)));
    expect(shown.days.find((day) => day.on === '2026-06-13')).toMatchObject({ isForecast: true, tmaxC: 29, precipitationMm: 0, rainProbabilityPct: null });
    expect(shown.days.find((day) => day.on === '2026-06-05')?.et0Mm).toBeGreaterThan(3);
    expect(shown.days[0]?.et0Mm).toBeNull();
  });
});

describe('a running round of yesterday', () => {
  it('is still named, and today\'s plan begins after it', async () => {
    test.clock.set('2026-06-14T04:10:00Z');
    const yard = await wateredYard(test, { hours: [{ fromMinutes: 0, toMinutes: 300 }], zones: [{ soil: 'sand', createdAt: '2026-06-01T12:00:00Z' }] });
    const roundId = randomUUID();
    await Round.create({ id: roundId, yardId: yard.id, on: '2026-06-13', roundIndex: 0, status: 'running', startedAt: new Date('2026-06-14T03:50:00Z') });
    await RoundSet.create({
      id: randomUUID(), yardId: yard.id, roundId, zoneId: yard.zones[0]?.id ?? '', positionId: yard.zones[0]?.positionIds[0] ?? '', kind: 'set', on: '2026-06-13', roundIndex: 0, sortOrder: 1,
      plannedStartAt: new Date('2026-06-14T03:50:00Z'), plannedMinutes: 60, rateMmPerHour: 18, runTimeMultiplier: 1, zoneShare: 0.5, status: 'running', startedAt: new Date('2026-06-14T03:50:00Z'),
    });
    const today = await get<TodayResponse>(yard, '/today');
    expect(today).toMatchObject({ today: '2026-06-14', runningRoundId: roundId });
    expect(today.rounds[0]?.startMinutes).toBeGreaterThanOrEqual(50);
  });
});
