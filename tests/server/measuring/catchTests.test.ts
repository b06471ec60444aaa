import { randomUUID } from 'node:crypto';
import { positionRates } from '@/server/readModels/positionRates';
import { CatchTest, EventRow, Yard } from '@/server/models';
import { cupTest } from '@/scheduling/sprinkler';
import type { CatchTestResponse } from '@/shared/contracts/catchTests';
import type { PositionResponse } from '@/shared/contracts/equipment';
import { call, gridTestRequest, memberOf, readyYard, yardOf } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

async function yardWithPosition() {
  const ready = await readyYard(test);
  const position = ready.yard.positions[0];
  if (position === undefined) {
    throw new Error('The yard has no position.');
  }
  const path = `/yards/${ready.yardId}/positions/${position.id}`;
  return {
    ...ready, position, path, tests: `${path}/catch-tests`,
    now: async (): Promise<PositionResponse | undefined> => (await yardOf(test, ready)).positions.find((each) => each.id === position.id),
  };
}

describe('a catch-cup test', () => {
  it('sets the rate of its position, with result, doubts and who did it', async () => {
    const { tests, owner, now, yardId } = await yardWithPosition();
    const versionBefore = (await Yard.findByPk(yardId))?.factsVersion ?? 0;
    const response = await call(test, owner, 'post', tests, { ...gridTestRequest, note: 'no wind at all' });
    expect(response.status).toBe(201);
    const made = response.body as CatchTestResponse;
    const { layout, readings, minutes } = gridTestRequest;
    expect(made.result).toEqual(JSON.parse(JSON.stringify(cupTest({ layout: { ...layout, kind: 'grid' }, minutes, reading: { kind: 'depth' }, values: readings }))));
    expect(made).toMatchObject({ layout, readings, minutes, wind: 'calm', note: 'no wind at all', testedBy: { id: owner.user.id } });
    expect(await now()).toMatchObject({
      rateSource: 'catch_test', rateMmPerHour: expect.closeTo(12.5, 9) as number, lowQuarterUniformity: expect.closeTo(0.84, 9) as number, runTimeMultiplier: expect.closeTo(12.5 / 11.25, 9) as number,
      lastCatchTestId: made.id, lastTestedAt: made.testedAt, testExpiredBecause: null,
    });
    expect((await call(test, owner, 'get', tests)).body).toEqual({ catchTests: [made] });
    expect((await Yard.findByPk(yardId))?.factsVersion).toBe(versionBefore + 1);
    expect(await EventRow.count({ where: { yardId, verb: 'catch_test.recorded', subjectId: made.id } })).toBe(1);
  });

  it('is kept with what is doubtful about it', async () => {
    const { tests, owner, now } = await yardWithPosition();
    const made = (await call(test, owner, 'post', tests, {
      ...gridTestRequest, layout: { kind: 'row', spacingM: 1, firstDistanceM: 1 }, readings: [3, null, 2],
    })).body as CatchTestResponse;
    const codes = made.result.problems.map((problem) => problem.code);
    expect(codes).toEqual(expect.arrayContaining(['too_shallow', 'too_few_cups', 'cups_missing']));
    expect(await now()).toMatchObject({ rateSource: 'catch_test', lastCatchTestId: made.id });
  });

  it('of empty cups is refused with the code of the problem', async () => {
    const { tests, owner, position, now } = await yardWithPosition();
    const response = await call(test, owner, 'post', tests, { ...gridTestRequest, readings: gridTestRequest.readings.map(() => 0) });
    expect(response.status).toBe(400);
    expect(response.body).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: 'readings', code: 'all_empty' }] } });
    expect(await CatchTest.count({ where: { positionId: position.id } })).toBe(0);
    expect(await now()).toMatchObject({ rateSource: 'flow_and_area' });
  });

  it.each<[string, object, string]>([
    ['a cup three metres wide', { reading: { kind: 'weight', mouthDiameterMm: 3000 } }, 'reading.mouthDiameterMm'],
    ['a negative run', { minutes: -10 }, 'minutes'],
    ['ten thousand cups', { readings: Array.from({ length: 10_000 }, () => 3), layout: { kind: 'row', spacingM: 1, firstDistanceM: 0 } }, 'readings'],
    ['a depth of a barrel', { readings: gridTestRequest.readings.map(() => 900) }, 'readings.0'],
    ['an unknown wind', { wind: 'storm' }, 'wind'],
    ['a note with a null byte', { note: 'a\u0000' }, 'note'],
    ['a reading in words', { readings: gridTestRequest.readings.map(() => 'half') }, 'readings.0'],
  ])('with %s is refused', async (_what, change, field) => {
    const { tests, owner, position } = await yardWithPosition();
    const response = await call(test, owner, 'post', tests, { ...gridTestRequest, ...change });
    expect(response.status).toBe(400);
    expect((response.body as { error: { fields: { path: string }[] } }).error.fields.map((each) => each.path)).toContain(field);
    expect(await CatchTest.count({ where: { positionId: position.id } })).toBe(0);
  });

  it('counts once however often it arrives', async () => {
    const { tests, owner, position } = await yardWithPosition();
    const key = { 'Idempotency-Key': randomUUID() };
    const [first, second] = await Promise.all([call(test, owner, 'post', tests, gridTestRequest, key), call(test, owner, 'post', tests, gridTestRequest, key)]);
    expect(second.body).toEqual(first.body);
    expect(await CatchTest.count({ where: { positionId: position.id } })).toBe(1);
  });

  it('may be recorded by a helper, on a position of the own yard only', async () => {
    const { tests, yardId, owner } = await yardWithPosition();
    expect((await call(test, await memberOf(test, yardId, 'helper'), 'post', tests, gridTestRequest)).status).toBe(201);
    const other = await yardWithPosition();
    const foreign = `/yards/${yardId}/positions/${other.position.id}/catch-tests`;
    expect((await call(test, owner, 'post', foreign, gridTestRequest)).status).toBe(404);
    expect((await call(test, owner, 'get', foreign)).status).toBe(404);
    const theirs = (await call(test, other.owner, 'post', other.tests, gridTestRequest)).body as CatchTestResponse;
    expect((await call(test, owner, 'delete', `${tests}/${theirs.id}`)).status).toBe(404);
    expect(await CatchTest.count({ where: { id: theirs.id } })).toBe(1);
  });

  it('taken back leaves the rate to the test before, then to flow and area', async () => {
    const { tests, owner, now } = await yardWithPosition();
    const first = (await call(test, owner, 'post', tests, gridTestRequest)).body as CatchTestResponse;
    test.clock.advance(1);
    const second = (await call(test, owner, 'post', tests, { ...gridTestRequest, minutes: 30 })).body as CatchTestResponse;
    expect(await now()).toMatchObject({ lastCatchTestId: second.id, rateMmPerHour: expect.closeTo(25, 9) as number });
    await call(test, owner, 'delete', `${tests}/${second.id}`);
    expect(await now()).toMatchObject({ lastCatchTestId: first.id, rateMmPerHour: expect.closeTo(12.5, 9) as number });
    await call(test, owner, 'delete', `${tests}/${first.id}`);
    expect(await now()).toMatchObject({ rateSource: 'flow_and_area', lastCatchTestId: null, lastTestedAt: null, testExpiredBecause: null });
  });
});

describe('a test holds until something about it changes', () => {
  async function tested() {
    const yard = await yardWithPosition();
    await call(test, yard.owner, 'post', yard.tests, gridTestRequest);
    test.clock.advance(60);
    return yard;
  }
  const expired = (cause: string) => ({ testExpiredBecause: cause, rateSource: 'flow_and_area', runTimeMultiplier: 1, lowQuarterUniformity: null });

  it('another hose', async () => {
    const { yardId, owner, path, now } = await tested();
    const hoseId = ((await call(test, owner, 'post', `/yards/${yardId}/hoses`, { name: 'New', lengthM: 30, boreMm: 12.7 })).body as { id: string }).id;
    await call(test, owner, 'patch', path, { hoseId });
    expect(await now()).toMatchObject(expired('hose_changed'));
  });

  it('the old hose back again: the test holds again', async () => {
    const { owner, path, now, position, tests } = await tested();
    const listed = async () => ((await call(test, owner, 'get', tests)).body as { catchTests: CatchTestResponse[] }).catchTests.map(({ expiredBecause }) => expiredBecause);
    expect(await listed()).toEqual([null]);
    await call(test, owner, 'patch', path, { hoseId: null });
    expect(await now()).toMatchObject(expired('hose_changed'));
    expect(await listed()).toEqual(['hose_changed']);
    await call(test, owner, 'patch', path, { hoseId: position.hoseId });
    expect(await now()).toMatchObject({ testExpiredBecause: null, rateSource: 'catch_test' });
  });

  it('the hose made longer, but not renamed', async () => {
    const { yardId, owner, now, position } = await tested();
    await call(test, owner, 'patch', `/yards/${yardId}/hoses/${position.hoseId}`, { name: 'Still the green one' });
    expect(await now()).toMatchObject({ testExpiredBecause: null });
    await call(test, owner, 'patch', `/yards/${yardId}/hoses/${position.hoseId}`, { lengthM: 50 });
    expect(await now()).toMatchObject(expired('hose_changed'));
  });

  it('another sprinkler, or another kind of it', async () => {
    const { yardId, owner, now, position } = await tested();
    await call(test, owner, 'patch', `/yards/${yardId}/sprinklers/${position.sprinklerId}`, { kind: 'impact' });
    expect(await now()).toMatchObject(expired('sprinkler_changed'));
  });

  it('another tap', async () => {
    const { yardId, owner, path, now } = await tested();
    const tapId = ((await call(test, owner, 'post', `/yards/${yardId}/taps`, { name: 'Back', flowLpm: 10 })).body as { id: string }).id;
    await call(test, owner, 'patch', path, { tapId });
    // 10 L/min on 120 m²
    expect(await now()).toMatchObject({ ...expired('tap_changed'), rateMmPerHour: expect.closeTo(5, 9) as number });
  });

  it('half a year', async () => {
    const { now, owner, tests } = await tested();
    test.clock.advance(179 * 24 * 60);
    expect(await now()).toMatchObject({ testExpiredBecause: null });
    test.clock.advance(24 * 60);
    expect(await now()).toMatchObject(expired('season_changed'));
    await call(test, owner, 'post', tests, gridTestRequest);
    expect(await now()).toMatchObject({ testExpiredBecause: null, rateSource: 'catch_test' });
  });
});

describe('the rates that plans and rounds take', () => {
  it('are those that the yard shows, with the share of the zone that each position wets', async () => {
    const { yardId, owner, yard, position, tests, path } = await yardWithPosition();
    const rates = async () => positionRates(test.context.database, yardId, test.clock.now());
    const parts = { zoneId: position.zoneId, tapId: position.tapId, sprinklerId: position.sprinklerId };
    await call(test, owner, 'patch', path, { wettedAreaM2: 60 });
    expect((await rates()).get(position.id)).toEqual({
      positionId: position.id, zoneId: position.zoneId, rateMmPerHour: expect.closeTo(15, 9) as number, rateIsDefault: true, rateSource: 'flow_and_area', runTimeMultiplier: 1,
      lowQuarterUniformity: null, zoneShare: 0.5,
    });
    const second = (await call(test, owner, 'post', `/yards/${yardId}/positions`, { name: 'Wide', ...parts, wettedAreaM2: 180 })).body as PositionResponse;
    await call(test, owner, 'post', tests, gridTestRequest);
    const both = await rates();
    // together they wet twice the zone of 120 m², so the shares are of 240 m²
    expect(yard.zones[0]?.areaM2).toBe(120);
    expect(both.get(position.id)).toMatchObject({ zoneShare: 0.25, rateIsDefault: false, rateSource: 'catch_test', rateMmPerHour: expect.closeTo(12.5, 9) as number });
    expect(both.get(second.id)).toMatchObject({ zoneShare: 0.75, rateIsDefault: true, rateMmPerHour: expect.closeTo(5, 9) as number });
    const shown = (await yardOf(test, { yardId, owner })).positions;
    expect(shown.map((each) => each.rateMmPerHour)).toEqual(shown.map((each) => both.get(each.id)?.rateMmPerHour));
  });
});
