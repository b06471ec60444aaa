import type { PositionResponse } from '@/shared/contracts/equipment';
import { call, memberOf, ownedYard, readyYard, yardOf } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

const firstField = (body: unknown): string | undefined => (body as { error: { fields: { path: string }[] } }).error.fields[0]?.path;

describe('what a yard tells of its water', () => {
  it('begins with no house number, no shortage as a default, and no limit of the supply', async () => {
    const owned = await ownedYard(test);
    expect(await yardOf(test, owned)).toMatchObject({ addressDigit: null, waterStage: 0, waterStageIsDefault: true, supply: null });
  });

  it('takes the digit and the stage, and goes back to their defaults', async () => {
    const owned = await ownedYard(test);
    const path = `/yards/${owned.yardId}`;
    expect((await call(test, owned.owner, 'patch', path, { addressDigit: 0, waterStage: 0 })).body).toMatchObject({ addressDigit: 0, waterStage: 0, waterStageIsDefault: false });
    expect((await call(test, owned.owner, 'patch', path, { waterStage: 3 })).body).toMatchObject({ addressDigit: 0, waterStage: 3, waterStageIsDefault: false });
    expect((await call(test, owned.owner, 'patch', path, { addressDigit: null, waterStage: null })).body).toMatchObject({ addressDigit: null, waterStage: 0, waterStageIsDefault: true });
  });

  it('takes a well with its rest, and lets go of it', async () => {
    const owned = await ownedYard(test);
    const well = { kind: 'well', flowLpm: 15, restMinutes: 45, drawMinutesAtMost: 90 };
    expect((await call(test, owned.owner, 'patch', `/yards/${owned.yardId}`, { supply: well })).body).toMatchObject({ supply: well });
    const pipe = { kind: 'house', flowLpm: 25, restMinutes: 0, drawMinutesAtMost: null };
    expect((await call(test, owned.owner, 'patch', `/yards/${owned.yardId}`, { supply: pipe })).body).toMatchObject({ supply: pipe });
    expect((await call(test, owned.owner, 'patch', `/yards/${owned.yardId}`, { supply: null })).body).toMatchObject({ supply: null });
  });

  it.each<[string, object, string]>([
    ['a digit of two places', { addressDigit: 10 }, 'addressDigit'],
    ['half a digit', { addressDigit: 4.5 }, 'addressDigit'],
    ['a sixth stage', { waterStage: 6 }, 'waterStage'],
    ['a supply without a flow', { supply: { kind: 'well', restMinutes: 0, drawMinutesAtMost: null } }, 'supply.flowLpm'],
    ['a supply that gives nothing', { supply: { kind: 'well', flowLpm: 0, restMinutes: 0, drawMinutesAtMost: null } }, 'supply.flowLpm'],
    ['a rest before the end', { supply: { kind: 'well', flowLpm: 10, restMinutes: -1, drawMinutesAtMost: null } }, 'supply.restMinutes'],
    ['draws of a minute', { supply: { kind: 'well', flowLpm: 10, restMinutes: 5, drawMinutesAtMost: 1 } }, 'supply.drawMinutesAtMost'],
    ['a lake', { supply: { kind: 'lake', flowLpm: 10, restMinutes: 5, drawMinutesAtMost: null } }, 'supply.kind'],
  ])('refuses %s', async (_what, change, field) => {
    const owned = await ownedYard(test);
    const before = await yardOf(test, owned);
    const response = await call(test, owned.owner, 'patch', `/yards/${owned.yardId}`, change);
    expect([response.status, firstField(response.body)]).toEqual([400, field]);
    expect(await yardOf(test, owned)).toEqual(before);
  });

  it('is the owner’s to change', async () => {
    const { yardId } = await ownedYard(test);
    expect((await call(test, await memberOf(test, yardId, 'helper'), 'patch', `/yards/${yardId}`, { waterStage: 2 })).status).toBe(403);
  });
});

describe('what a position tells of its ground', () => {
  const limit = { over: 'drain_field', depthMm: 12, source: 'Letter of the health office, read 2 May 2026' };

  it('is nothing at first, and is kept and taken back', async () => {
    const ready = await readyYard(test);
    const [position] = ready.yard.positions;
    expect(position).toMatchObject({ heightM: null, weeklyLimit: null, alternateSets: false });
    const path = `/yards/${ready.yardId}/positions/${position?.id}`;
    const changed = (await call(test, ready.owner, 'patch', path, { heightM: 2.5, weeklyLimit: limit, alternateSets: true })).body as PositionResponse;
    expect(changed).toMatchObject({ id: position?.id, heightM: 2.5, weeklyLimit: limit, alternateSets: true });
    expect((await call(test, ready.owner, 'patch', path, { weeklyLimit: null, heightM: null })).body).toMatchObject({ heightM: null, weeklyLimit: null, alternateSets: true });
  });

  it('comes with a new position', async () => {
    const ready = await readyYard(test);
    const { zoneId, tapId, hoseId, sprinklerId } = ready.yard.positions[0] as PositionResponse;
    const made = await call(test, ready.owner, 'post', `/yards/${ready.yardId}/positions`, {
      name: 'By the well', zoneId, tapId, hoseId, sprinklerId, heightM: 0, weeklyLimit: { ...limit, over: 'well_head', depthMm: 0 }, alternateSets: true,
    });
    expect([made.status, made.body]).toEqual([201, expect.objectContaining({ heightM: 0, weeklyLimit: { ...limit, over: 'well_head', depthMm: 0 }, alternateSets: true })]);
  });

  it.each<[string, object, string]>([
    ['a limit without a source', { weeklyLimit: { ...limit, source: '' } }, 'weeklyLimit.source'],
    ['a limit below nothing', { weeklyLimit: { ...limit, depthMm: -1 } }, 'weeklyLimit.depthMm'],
    ['a limit of a flood', { weeklyLimit: { ...limit, depthMm: 201 } }, 'weeklyLimit.depthMm'],
    ['a limit over a pond', { weeklyLimit: { ...limit, over: 'pond' } }, 'weeklyLimit.over'],
    ['a height below the lowest', { heightM: -0.1 }, 'heightM'],
  ])('refuses %s', async (_what, change, field) => {
    const ready = await readyYard(test);
    const response = await call(test, ready.owner, 'patch', `/yards/${ready.yardId}/positions/${ready.yard.positions[0]?.id}`, change);
    expect([response.status, firstField(response.body)]).toEqual([400, field]);
    expect((await yardOf(test, ready)).positions).toEqual(ready.yard.positions);
  });
});
