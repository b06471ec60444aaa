import { randomUUID } from 'node:crypto';
import { BucketTest, EstablishmentScheduleRow, EventRow, Hose, HomeWindow, Position, Sprinkler, Tap, Yard, Zone } from '@/server/models';
import { defaultHours } from '@/server/commands/yards/yardDefaults';
import type { YardResponse } from '@/shared/contracts/yards';
import { call, memberOf, ownedYard, setUpRequest, yardOf } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

async function rowsOf(yardId: string) {
  const where = { where: { yardId } };
  return {
    taps: await Tap.count(where), bucketTests: await BucketTest.count(where), hoses: await Hose.count(where), sprinklers: await Sprinkler.count(where),
    zones: await Zone.count(where), positions: await Position.count(where),
    ownHours: await HomeWindow.count({ where: { yardId, isDefault: false } }), hours: await HomeWindow.count(where), events: await EventRow.count(where),
  };
}

const nothing = { taps: 0, bucketTests: 0, hoses: 0, sprinklers: 0, zones: 0, positions: 0, ownHours: 0, hours: defaultHours.length, events: 1 };

describe('setting a yard up in one go', () => {
  it('saves everything that a first plan needs', async () => {
    const { yardId, owner } = await ownedYard(test);
    const zones = [
      { name: 'Front lawn', sideAM: 12, sideBM: 10, position: { name: 'By the maple', mark: 'two steps from the trunk', wettedAreaM2: 90 } },
      { name: 'Side strip', areaM2: 40, grass: 'tall_fescue', soil: 'clay', slopePct: 4, sunHours: 5, seededOn: '2026-06-10', mulch: 'straw' },
    ];
    const response = await call(test, owner, 'post', `/yards/${yardId}/set-up`, { ...setUpRequest, zones });
    expect(response.status).toBe(201);
    const yard = response.body as YardResponse;
    expect(yard.taps).toMatchObject([{ name: 'Front tap', flowLpm: 15, flowIsDefault: false, shutOffTimer: false, lastTestedAt: '2026-06-13T09:40:00.000Z' }]);
    expect(yard.hoses).toMatchObject([{ name: 'Green hose', lengthM: 25, boreMm: 16 }]);
    expect(yard.sprinklers).toMatchObject([{ name: 'Swinging bar', kind: 'oscillating' }]);
    expect(yard.zones).toMatchObject([
      { name: 'Front lawn', areaM2: 120, sideAM: 12, sideBM: 10, grass: 'cool_mix', grassIsDefault: true, soil: 'loam', soilIsDefault: true, slopeIsDefault: true, sunHours: 8, sunHoursIsDefault: true },
      { name: 'Side strip', areaM2: 40, sideAM: null, grass: 'tall_fescue', grassIsDefault: false, soil: 'clay', soilIsDefault: false, slopePct: 4, slopeIsDefault: false, sunHours: 5, seededOn: '2026-06-10', mulch: 'straw' },
    ]);
    // 15 L/min on 90 m² is 10 mm/h, on 40 m² 22.5 mm/h
    expect(yard.positions).toMatchObject([
      { name: 'By the maple', mark: 'two steps from the trunk', wettedAreaM2: 90, wettedAreaIsDefault: false, rateSource: 'flow_and_area', runTimeMultiplier: 1, lowQuarterUniformity: null },
      { name: 'Side strip', wettedAreaM2: 40, wettedAreaIsDefault: true, rateSource: 'flow_and_area' },
    ]);
    expect(yard.positions.map((position) => position.rateMmPerHour)).toEqual([expect.closeTo(10, 9), expect.closeTo(22.5, 9)]);
    expect(yard.hours).toEqual([{ weekday: 6, fromMinutes: 420, toMinutes: 660, isDefault: false }]);
    expect(Object.fromEntries(yard.setUp.map(({ step, done }) => [step, done]))).toEqual({
      tap: true, bucket_test: true, hose: true, sprinkler: true, zone: true, position: true, catch_test: false, hours: true,
    });
    expect(await EstablishmentScheduleRow.count({ where: { yardId, zoneId: yard.zones[1]?.id, isDefault: true } })).toBe(1);
    expect((await Yard.findByPk(yardId))?.budgetStaleFrom).toBe('2026-06-10');
  });

  it('needs no hose, no bucket and no hours: the defaults are marked', async () => {
    const { yardId, owner } = await ownedYard(test, { latitudeDeg: -33.9, longitudeDeg: 151.2, timeZone: 'Australia/Sydney' });
    const response = await call(test, owner, 'post', `/yards/${yardId}/set-up`, { tap: { name: 'Tap' }, sprinkler: setUpRequest.sprinkler, zones: setUpRequest.zones });
    expect(response.status).toBe(201);
    const yard = response.body as YardResponse;
    expect(yard.taps).toMatchObject([{ flowLpm: 18.9, flowIsDefault: true, lastTestedAt: null }]);
    expect(yard.zones).toMatchObject([{ grass: 'warm_mix', grassIsDefault: true }]);
    expect(yard.positions).toMatchObject([{ hoseId: null, rateSource: 'default', wettedAreaM2: 120 }]);
    expect(yard.hours.every((window) => window.isDefault)).toBe(true);
  });

  it.each<[string, object, string]>([
    ['a bucket that no tap fills', { tap: { name: 'Tap', bucketTest: { volumeL: 400, seconds: 2 } } }, 'tap.bucketTest.seconds'],
    ['a second zone larger than a yard', { zones: [setUpRequest.zones[0], { name: 'Meadow', sideAM: 400, sideBM: 400 }] }, 'zones.1.sideBM'],
    ['a zone sown too long ago', { zones: [setUpRequest.zones[0], { name: 'Old', areaM2: 20, seededOn: '1999-04-01' }] }, 'zones.1.seededOn'],
    ['hours in too many pieces', { hours: { windows: Array.from({ length: 7 }, (_, index) => ({ weekday: 1, fromMinutes: index * 60, toMinutes: index * 60 + 30 })) } }, 'hours.windows'],
    ['no zone', { zones: [] }, 'zones'],
    ['a zone without a size', { zones: [{ name: 'Lawn' }] }, 'zones.0.areaM2'],
  ])('saves nothing with %s', async (_what, change, field) => {
    const { yardId, owner } = await ownedYard(test);
    const before = await Yard.findByPk(yardId);
    const response = await call(test, owner, 'post', `/yards/${yardId}/set-up`, { ...setUpRequest, ...change });
    expect(response.status).toBe(400);
    expect((response.body as { error: { fields: { path: string }[] } }).error.fields.map((each) => each.path)).toContain(field);
    expect(await rowsOf(yardId)).toEqual(nothing);
    expect((await Yard.findByPk(yardId))?.factsVersion).toBe(before?.factsVersion);
  });

  it('happens once when the request arrives twice, with a key or without', async () => {
    const { yardId, owner } = await ownedYard(test);
    const key = { 'Idempotency-Key': randomUUID() };
    const path = `/yards/${yardId}/set-up`;
    const [first, again] = await Promise.all([call(test, owner, 'post', path, setUpRequest, key), call(test, owner, 'post', path, setUpRequest, key)]);
    expect([first.status, again.status]).toEqual([201, 201]);
    expect(again.body).toEqual(first.body);
    const third = await call(test, owner, 'post', path, setUpRequest);
    expect(third.status).toBe(409);
    expect(third.body).toMatchObject({ error: { code: 'conflict' } });
    expect((await yardOf(test, { yardId, owner })).taps).toHaveLength(1);
  });

  it('is for owners and consultants', async () => {
    const { yardId } = await ownedYard(test);
    expect((await call(test, await memberOf(test, yardId, 'helper'), 'post', `/yards/${yardId}/set-up`, setUpRequest)).status).toBe(403);
    expect((await call(test, await memberOf(test, yardId, 'consultant'), 'post', `/yards/${yardId}/set-up`, setUpRequest)).status).toBe(201);
  });
});
