import { randomUUID } from 'node:crypto';
import { EventRow, Hose, Position, Round, RoundSet, Tap, Yard } from '@/server/models';
import { limits } from '@/shared/limits';
import type { HoseResponse, PositionResponse, TapResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import { call, memberOf, ownedYard, readyYard, yardOf } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

const errorOf = (body: unknown) => (body as { error: { code: string; message: string; fields?: { path: string }[] } }).error;
const firstOf = <T>(things: readonly T[]): T => {
  const [thing] = things;
  if (thing === undefined) {
    throw new Error('There is none.');
  }
  return thing;
};

describe('a tap', () => {
  it('has a default flow until somebody tells one', async () => {
    const owned = await ownedYard(test);
    const path = `/yards/${owned.yardId}/taps`;
    const made = await call(test, owned.owner, 'post', path, { name: 'Back tap' });
    expect(made.status).toBe(201);
    const tap = made.body as TapResponse;
    expect(tap).toEqual({ id: tap.id, name: 'Back tap', flowLpm: 18.9, flowIsDefault: true, shutOffTimer: false, lastTestedAt: null });
    expect((await call(test, owned.owner, 'patch', `${path}/${tap.id}`, { flowLpm: 12, shutOffTimer: true })).body).toMatchObject({ flowLpm: 12, flowIsDefault: false, shutOffTimer: true, name: 'Back tap' });
    expect((await call(test, owned.owner, 'delete', `${path}/${tap.id}`)).status).toBe(200);
    expect((await call(test, owned.owner, 'patch', `${path}/${tap.id}`, { name: 'Gone' })).status).toBe(404);
    expect((await yardOf(test, owned)).taps).toEqual([]);
    const verbs = (await EventRow.findAll({ where: { yardId: owned.yardId, subjectId: tap.id } })).map((event) => event.verb);
    expect(verbs.sort()).toEqual(['tap.archived', 'tap.created', 'tap.updated']);
  });

  it.each([{ name: '' }, { name: 'Tap', flowLpm: -1 }, { name: 'Tap', flowLpm: 1e6 }, { name: 'Tap', shutOffTimer: 'yes' }, { flowLpm: 10 }, []])('%p is refused', async (body) => {
    const { yardId, owner } = await ownedYard(test);
    const response = await call(test, owner, 'post', `/yards/${yardId}/taps`, body);
    expect(response.status).toBe(400);
    expect(errorOf(response.body).code).toBe('invalid_input');
    expect(await Tap.count({ where: { yardId } })).toBe(0);
  });

  it('is one of a limited number', async () => {
    const { yardId, owner } = await ownedYard(test);
    await Tap.bulkCreate(Array.from({ length: limits.equipmentPerYard - 1 }, (_, index) => ({ id: randomUUID(), yardId, name: `Tap ${index}`, flowLpm: 10, flowIsDefault: true })));
    const answers = await Promise.all([1, 2, 3].map((index) => call(test, owner, 'post', `/yards/${yardId}/taps`, { name: `One more ${index}` })));
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409, 409]);
    expect(answers.filter((answer) => answer.status === 409).map((answer) => errorOf(answer.body).code)).toEqual(['limit_reached', 'limit_reached']);
  });
});

describe('a thing that positions stand on', () => {
  it('is not removed; the answer names them', async () => {
    const { yardId, owner, yard } = await readyYard(test);
    for (const path of [`taps/${firstOf(yard.taps).id}`, `hoses/${firstOf(yard.hoses).id}`, `sprinklers/${firstOf(yard.sprinklers).id}`, `zones/${firstOf(yard.zones).id}`]) {
      const response = await call(test, owner, 'delete', `/yards/${yardId}/${path}`);
      expect(response.status).toBe(409);
      expect(errorOf(response.body).code).toBe('in_use');
      expect(errorOf(response.body).message).toContain('the position Front lawn.');
    }
    expect((await call(test, owner, 'delete', `/yards/${yardId}/positions/${firstOf(yard.positions).id}`)).status).toBe(200);
    expect((await call(test, owner, 'delete', `/yards/${yardId}/taps/${firstOf(yard.taps).id}`)).status).toBe(200);
  });
});

describe('a position', () => {
  it('stands on what is in use in its own yard', async () => {
    const mine = await readyYard(test);
    const other = await readyYard(test);
    const parts = (yard: YardResponse) => ({ zoneId: firstOf(yard.zones).id, tapId: firstOf(yard.taps).id, hoseId: firstOf(yard.hoses).id, sprinklerId: firstOf(yard.sprinklers).id });
    for (const field of ['zoneId', 'tapId', 'hoseId', 'sprinklerId'] as const) {
      const body = { name: 'Corner', ...parts(mine.yard), [field]: parts(other.yard)[field] };
      const response = await call(test, mine.owner, 'post', `/yards/${mine.yardId}/positions`, body);
      expect(response.status).toBe(400);
      expect(errorOf(response.body).fields?.map((each) => each.path)).toEqual([field]);
      if (field !== 'zoneId') {
        const patched = await call(test, mine.owner, 'patch', `/yards/${mine.yardId}/positions/${firstOf(mine.yard.positions).id}`, { [field]: parts(other.yard)[field] });
        expect(errorOf(patched.body).fields?.map((each) => each.path)).toEqual([field]);
      }
    }
    expect(await Position.count({ where: { yardId: mine.yardId } })).toBe(1);
    expect((await call(test, mine.owner, 'patch', `/yards/${mine.yardId}/positions/${firstOf(other.yard.positions).id}`, { name: 'Mine' })).status).toBe(404);
    expect((await call(test, mine.owner, 'delete', `/yards/${mine.yardId}/positions/${firstOf(other.yard.positions).id}`)).status).toBe(404);
  });

  it('shares its zone evenly with the others until its wetted area is told', async () => {
    const owned = await readyYard(test);
    const { zones, taps, sprinklers, positions } = owned.yard;
    const path = `/yards/${owned.yardId}/positions`;
    const parts = { zoneId: firstOf(zones).id, tapId: firstOf(taps).id, sprinklerId: firstOf(sprinklers).id };
    const second = (await call(test, owned.owner, 'post', path, { name: 'Second', ...parts })).body as PositionResponse;
    expect(second).toMatchObject({ wettedAreaM2: 60, wettedAreaIsDefault: true, sortOrder: 2, hoseId: null });
    expect((await yardOf(test, owned)).positions.map((position) => position.wettedAreaM2)).toEqual([60, 60]);
    // the rate follows: 15 L/min on 60 m² is 15 mm/h
    expect(second.rateMmPerHour).toBeCloseTo(15, 9);
    await call(test, owned.owner, 'patch', `${path}/${second.id}`, { wettedAreaM2: 45 });
    await call(test, owned.owner, 'patch', `/yards/${owned.yardId}/zones/${firstOf(zones).id}`, { areaM2: 200 });
    expect((await yardOf(test, owned)).positions.map((position) => position.wettedAreaM2)).toEqual([100, 45]);
    expect((await call(test, owned.owner, 'patch', `${path}/${second.id}`, { wettedAreaM2: null })).body).toMatchObject({ wettedAreaM2: 100, wettedAreaIsDefault: true });
    await call(test, owned.owner, 'delete', `${path}/${firstOf(positions).id}`);
    expect((await yardOf(test, owned)).positions).toMatchObject([{ id: second.id, wettedAreaM2: 200 }]);
  });

  it('has a place in the order of the round', async () => {
    const owned = await readyYard(test);
    const { zones, taps, sprinklers } = owned.yard;
    const path = `/yards/${owned.yardId}/positions`;
    for (const name of ['B', 'C']) {
      await call(test, owned.owner, 'post', path, { name, zoneId: firstOf(zones).id, tapId: firstOf(taps).id, sprinklerId: firstOf(sprinklers).id });
    }
    const ids = (await yardOf(test, owned)).positions.map((position) => position.id);
    const turned = [...ids].reverse();
    const response = await call(test, owned.owner, 'put', `${path}/order`, { positionIds: turned });
    expect(response.status).toBe(200);
    expect((response.body as { positions: PositionResponse[] }).positions.map((position) => position.id)).toEqual(turned);
    for (const positionIds of [ids.slice(1), [...ids.slice(1), ids[1]], [...ids.slice(1), randomUUID()], []]) {
      expect((await call(test, owned.owner, 'put', `${path}/order`, { positionIds })).status).toBe(400);
    }
    expect((await yardOf(test, owned)).positions.map((position) => position.id)).toEqual(turned);
  });

  it('is not removed while the running round still goes there', async () => {
    const { yardId, owner, yard } = await readyYard(test);
    const position = firstOf(yard.positions);
    const now = test.clock.now();
    const roundId = randomUUID();
    await Round.create({ id: roundId, yardId, on: '2026-06-13', roundIndex: 0, status: 'running', startedBy: owner.user.id, startedAt: now });
    await RoundSet.create({
      id: randomUUID(), yardId, roundId, zoneId: position.zoneId, positionId: position.id, kind: 'set', on: '2026-06-13', roundIndex: 0, sortOrder: 1, plannedStartAt: now,
      plannedMinutes: 60, rateMmPerHour: 10, runTimeMultiplier: 1, zoneShare: 1, status: 'running', startedAt: now,
    });
    const response = await call(test, owner, 'delete', `/yards/${yardId}/positions/${position.id}`);
    expect(response.status).toBe(409);
    expect(errorOf(response.body)).toMatchObject({ code: 'in_use', message: 'Front lawn is used by the round that is running. End the round first.' });
  });
});

describe('hoses and sprinklers', () => {
  it('are added, changed and removed', async () => {
    const owned = await ownedYard(test);
    const hose = (await call(test, owned.owner, 'post', `/yards/${owned.yardId}/hoses`, { name: 'Long', lengthM: 30, boreMm: 12.7 })).body as HoseResponse;
    expect(hose).toEqual({ id: hose.id, name: 'Long', lengthM: 30, boreMm: 12.7 });
    expect((await call(test, owned.owner, 'patch', `/yards/${owned.yardId}/hoses/${hose.id}`, { boreMm: 19 })).body).toEqual({ ...hose, boreMm: 19 });
    const sprinkler = (await call(test, owned.owner, 'post', `/yards/${owned.yardId}/sprinklers`, { name: 'Impact', kind: 'impact' })).body as { id: string };
    expect((await call(test, owned.owner, 'patch', `/yards/${owned.yardId}/sprinklers/${sprinkler.id}`, { kind: 'rotary' })).body).toEqual({ id: sprinkler.id, name: 'Impact', kind: 'rotary' });
    expect((await call(test, owned.owner, 'delete', `/yards/${owned.yardId}/hoses/${hose.id}`)).status).toBe(200);
    expect((await call(test, owned.owner, 'delete', `/yards/${owned.yardId}/sprinklers/${sprinkler.id}`)).status).toBe(200);
    expect(await yardOf(test, owned)).toMatchObject({ hoses: [], sprinklers: [] });
  });

  it.each<[string, object]>([
    ['hoses', { name: 'Hose', lengthM: 0, boreMm: 16 }], ['hoses', { name: 'Hose', lengthM: 301, boreMm: 16 }], ['hoses', { name: 'Hose', lengthM: 10, boreMm: 1.6 }],
    ['hoses', { lengthM: 10, boreMm: 16 }], ['sprinklers', { name: 'Thing', kind: 'cannon' }], ['sprinklers', { name: '\n', kind: 'impact' }],
  ])('%s of %p are refused', async (thing, body) => {
    const { yardId, owner } = await ownedYard(test);
    expect((await call(test, owner, 'post', `/yards/${yardId}/${thing}`, body)).status).toBe(400);
    expect(await Hose.count({ where: { yardId } })).toBe(0);
  });

  it('keep both changes of two people', async () => {
    const owned = await readyYard(test);
    const path = `/yards/${owned.yardId}/hoses/${firstOf(owned.yard.hoses).id}`;
    await Promise.all([call(test, owned.owner, 'patch', path, { lengthM: 40 }), call(test, owned.owner, 'patch', path, { boreMm: 19 }), call(test, owned.owner, 'patch', path, { name: 'Grey hose' })]);
    expect((await yardOf(test, owned)).hoses).toMatchObject([{ lengthM: 40, boreMm: 19, name: 'Grey hose' }]);
  });
});

describe('changing equipment', () => {
  it('is for owners and consultants', async () => {
    const { yardId } = await ownedYard(test);
    const body = { name: 'Tap' };
    expect((await call(test, await memberOf(test, yardId, 'helper'), 'post', `/yards/${yardId}/taps`, body)).status).toBe(403);
    expect((await call(test, await memberOf(test, yardId, 'consultant'), 'post', `/yards/${yardId}/taps`, body)).status).toBe(201);
  });

  it('puts the plan behind the facts', async () => {
    const { yardId, owner } = await ownedYard(test);
    const before = (await Yard.findByPk(yardId))?.factsVersion ?? 0;
    await call(test, owner, 'post', `/yards/${yardId}/taps`, { name: 'Tap' });
    expect((await Yard.findByPk(yardId))?.factsVersion).toBe(before + 1);
  });

  it('happens once for a replayed request', async () => {
    const { yardId, owner } = await ownedYard(test);
    const key = { 'Idempotency-Key': randomUUID() };
    const send = () => call(test, owner, 'post', `/yards/${yardId}/hoses`, { name: 'Hose', lengthM: 10, boreMm: 16 }, key);
    const answers = await Promise.all([send(), send(), send()]);
    expect(new Set(answers.map((answer) => (answer.body as HoseResponse).id)).size).toBe(1);
    expect(await Hose.count({ where: { yardId } })).toBe(1);
  });
});
