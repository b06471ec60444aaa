import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { addDays } from '@/scheduling/units/civilDay';
import { EventRow, PlanWishes, RoundSet, Zone } from '@/server/models';
import type { PlanResponse } from '@/shared/contracts/plans';
import type { PlanVersionsResponse, WhatIfResponse, WishesResponse } from '@/shared/contracts/wishes';
import { wateredYard, type WateredYard } from '../../factories/wateredYard';
import { signedIn, type SignedIn } from '../../factories/people';
import { SwitchableWeather } from '../../setup/switchableWeather';
import { testContext, type TestContext } from '../../setup/testContext';

const today = '2026-06-13';

describe('wishes, fixed sets and what if', () => {
  let test: TestContext;
  const weather = new SwitchableWeather();
  let yard: WateredYard;
  beforeAll(async () => { test = await testContext({ weather }); });
  afterAll(async () => {
    await test.close();
    await weather.close();
  });
  beforeEach(async () => {
    // Saturday 13 June 2026, 05:00 in New York; a dry warm spell, so that grass comes due within the plan
    test.clock.set('2026-06-13T09:00:00Z');
    weather.change = (day) => ({ ...day, precipitationMm: 0, tminC: 15, tmaxC: 29, windMps: 2 });
    yard = await wateredYard(test, { zones: [{ name: 'Front', createdAt: '2026-06-02T09:00:00Z' }, { name: 'Back', createdAt: '2026-06-02T09:00:00Z' }] });
  });

  const call = (method: 'get' | 'post' | 'put' | 'delete', path: string, body?: object, person: SignedIn = yard.owner) => {
    const asked = request(test.app)[method](`/api/yards/${yard.id}${path}`).set(person.headers);
    return body === undefined ? asked : asked.send(body);
  };
  const plan = async (): Promise<PlanResponse> => (await call('get', '/plan').expect(200)).body as PlanResponse;
  const setsOf = (made: PlanResponse) => made.days.flatMap((day) => day.rounds.flatMap((round) => round.sets));
  const whatIf = async (changes: object[]): Promise<WhatIfResponse> => (await call('post', '/plan/what-if', { changes }).expect(200)).body as WhatIfResponse;
  const wishes = async (): Promise<WishesResponse> => (await call('get', '/wishes').expect(200)).body as WishesResponse;
  /** A planned set of a later day, so that nobody runs it meanwhile. */
  const laterSet = async () => {
    const set = setsOf(await plan()).find((one) => one.on > today);
    if (set === undefined) {
      throw new Error('the plan has no set after today');
    }
    return set;
  };

  it('start with the lawn’s health, marked as a default, and keep what is said', async () => {
    expect(await wishes()).toEqual({ priority: 'keep_green', preferredWindows: [], monthCapLitres: null, isDefault: true, usedThisMonthLitres: 0, dayChanges: [], locks: [] });
    const said = { priority: 'spare_me', preferredWindows: [{ fromMinutes: 360, toMinutes: 450 }], monthCapLitres: 11_000 };
    expect((await call('put', '/wishes', said).expect(200)).body).toMatchObject({ ...said, isDefault: false });
    await call('put', '/wishes', said).expect(200);
    expect(await EventRow.count({ where: { yardId: yard.id, verb: 'wishes.changed' } })).toBe(1);
  });

  it('refuse what cannot be', async () => {
    const bad = async (method: 'post' | 'put', path: string, body: object) => {
      const answer = await call(method, path, body);
      return [answer.status, (answer.body as { error: { code: string; fields?: { path: string }[] } }).error.fields?.[0]?.path];
    };
    expect(await bad('put', '/wishes', { priority: 'shine', preferredWindows: [], monthCapLitres: null })).toEqual([400, 'priority']);
    expect(await bad('put', '/wishes', { priority: 'spare_me', preferredWindows: [], monthCapLitres: 0 })).toEqual([400, 'monthCapLitres']);
    expect(await bad('put', '/wishes', { priority: 'spare_me', preferredWindows: [{ fromMinutes: 500, toMinutes: 400 }], monthCapLitres: null })).toEqual([400, 'preferredWindows.0.toMinutes']);
    expect(await bad('put', '/days/2026-02-30', { dayOff: true, extraWindows: [] })).toEqual([400, 'on']);
    expect(await bad('put', '/days/2026-06-12', { dayOff: true, extraWindows: [] })).toEqual([400, 'on']);
    expect(await bad('put', '/days/2027-06-12', { dayOff: true, extraWindows: [] })).toEqual([400, 'on']);
    expect(await bad('put', `/days/${today}`, { dayOff: true, extraWindows: [{ fromMinutes: 300, toMinutes: 400 }] })).toEqual([400, 'extraWindows']);
    expect(await bad('post', '/plan/what-if', { changes: [] })).toEqual([400, 'changes']);
    expect((await bad('post', '/plan/what-if', { changes: [{ kind: 'more_hours', on: today, fromMinutes: 400, toMinutes: 300 }] }))[0]).toBe(400);
    const position = yard.zones[0]!.positionIds[0]!;
    expect(await bad('post', '/locks', { positionId: position, on: today, startMinutes: 1_400, minutes: 100 })).toEqual([400, 'minutes']);
    expect((await bad('post', '/locks', { positionId: randomUUID(), on: today, startMinutes: 400, minutes: 60 }))[0]).toBe(404);
    expect((await bad('post', '/plan/what-if', { changes: [{ kind: 'let_rest', zoneId: randomUUID() }] }))[0]).toBe(404);
    expect(await EventRow.count({ where: { yardId: yard.id } })).toBe(0);
  });

  it('do not let another yard’s position, zone or fixed set be touched', async () => {
    const other = await wateredYard(test);
    await call('post', '/locks', { positionId: other.zones[0]!.positionIds[0]!, on: addDays(today, 1), startMinutes: 360, minutes: 60 }).expect(404);
    await call('post', '/plan/changes', { changes: [{ kind: 'let_rest', zoneId: other.zones[0]!.id }] }).expect(404);
    const set = await laterSet();
    const made = (await call('post', '/locks', { positionId: set.positionId, on: set.on, startMinutes: set.startMinutes, minutes: set.minutes }).expect(201)).body as WishesResponse;
    await request(test.app).delete(`/api/yards/${other.id}/locks/${made.locks[0]!.id}`).set(other.owner.headers).expect(404);
    await call('get', '/wishes', undefined, await signedIn(test)).expect(404);
  });

  it('keep a fixed set through a new plan, say who fixed it, and let it go', async () => {
    const set = await laterSet();
    const body = { positionId: set.positionId, on: set.on, startMinutes: set.startMinutes, minutes: set.minutes, reason: 'The sprinkler is lent out after that.' };
    const first = (await call('post', '/locks', body).expect(201)).body as WishesResponse;
    const again = (await call('post', '/locks', body).expect(201)).body as WishesResponse;
    expect(again.locks).toEqual(first.locks);
    expect(first.locks).toEqual([{ id: expect.any(String), ...body, person: { id: yard.owner.user.id, name: yard.owner.user.name } }]);
    await call('post', '/locks', { ...body, minutes: body.minutes + 5 }).expect(409);
    await call('put', '/wishes', { priority: 'let_rest', preferredWindows: [], monthCapLitres: null }).expect(200);
    const kept = setsOf(await plan()).find((one) => one.positionId === set.positionId && one.on === set.on);
    expect(kept).toMatchObject({ startMinutes: set.startMinutes, minutes: set.minutes });
    expect(kept?.reasons.map((reason) => reason.code)).toContain('locked');
    expect(((await call('delete', `/locks/${first.locks[0]!.id}`).expect(200)).body as WishesResponse).locks).toEqual([]);
    await call('delete', `/locks/${first.locks[0]!.id}`).expect(404);
  });

  it('plan nothing on a day off, and say why', async () => {
    const set = await laterSet();
    await call('put', `/days/${set.on}`, { dayOff: true, extraWindows: [] }).expect(200);
    const day = (await plan()).days.find((one) => one.on === set.on);
    expect(day?.rounds).toEqual([]);
    expect(day?.zonesWithout.flatMap((zone) => zone.reasons.map((reason) => reason.code))).toContain('day_off');
    const ordinary = (await call('put', `/days/${set.on}`, { dayOff: false, extraWindows: [] }).expect(200)).body as WishesResponse;
    expect(ordinary.dayChanges).toEqual([]);
  });

  it('show what would come of changes, keep nothing of it, and plan just that when it is kept', async () => {
    const before = await plan();
    const set = await laterSet();
    const changes = [{ kind: 'day_off', on: set.on }, { kind: 'priority', priority: 'spare_me' }];
    const shown = await whatIf(changes);
    expect(shown.difference.dropped.length + shown.difference.changed.length).toBeGreaterThan(0);
    expect([...shown.difference.added, ...shown.difference.changed.map((one) => one.after)].every((line) => line.on !== set.on)).toBe(true);
    expect(shown.risk.map((risk) => risk.zoneId).sort()).toEqual(yard.zones.map((zone) => zone.id).sort());
    expect(await plan()).toMatchObject({ version: before.version });
    expect(await PlanWishes.count({ where: { yardId: yard.id } })).toBe(0);
    expect(await EventRow.count({ where: { yardId: yard.id } })).toBe(0);
    await call('post', '/plan/changes', { changes }).expect(200);
    const after = await plan();
    const sets = setsOf(after);
    expect({ sets: sets.length, minutes: sets.reduce((sum, one) => sum + one.minutes, 0) }).toEqual({ sets: shown.after.sets + shown.after.doses, minutes: shown.after.minutes });
    expect(after.days.find((day) => day.on === set.on)?.rounds).toEqual([]);
  });

  it('let a zone rest when asked what if, and only then', async () => {
    const zoneId = yard.zones[1]!.id;
    const shown = await whatIf([{ kind: 'let_rest', zoneId }]);
    expect(shown.after.litres).toBeLessThan(shown.before.litres);
    expect([...shown.difference.added, ...shown.difference.changed.map((one) => one.after)].some((line) => line.zoneId === zoneId)).toBe(false);
    expect(await Zone.findByPk(zoneId)).toMatchObject({ resting: false });
  });

  it('hold a month to its cap, water drawn before counted', async () => {
    const free = await whatIf([{ kind: 'month_cap', litres: null }]);
    // 60 minutes at 18 L/min on the 12th
    await yard.water({ on: '2026-06-12', position: 0 });
    expect((await wishes()).usedThisMonthLitres).toBeCloseTo(1_080, 6);
    expect(free.before.litres).toBeGreaterThan(1_000);
    const capped = await whatIf([{ kind: 'month_cap', litres: 1_080 + 600 }]);
    expect(capped.after.litres).toBeLessThanOrEqual(600 + 1e-6);
    expect(capped.after.shortLitres).toBeGreaterThan(capped.before.shortLitres);
  });

  it('tell for each version what made it new and what it says differently', async () => {
    const set = await laterSet();
    test.clock.advance(1);
    await call('put', `/days/${set.on}`, { dayOff: true, extraWindows: [] }).expect(200);
    test.clock.advance(1);
    await plan();
    const { versions } = (await call('get', '/plan/versions').expect(200)).body as PlanVersionsResponse;
    expect(versions[0]!.version).toBeGreaterThan(versions[1]!.version);
    expect(versions[0]!.events.map((event) => [event.verb, event.person?.name])).toEqual([['day.changed', yard.owner.user.name]]);
    const { difference } = versions[0]!;
    expect([...difference.dropped, ...difference.changed.map((one) => one.before)].some((line) => line.on === set.on)).toBe(true);
    expect([...difference.added, ...difference.changed.map((one) => one.after)].every((line) => line.on !== set.on)).toBe(true);
  });

  it('let a fixed set rest once its round was begun', async () => {
    const set = await laterSet();
    await call('post', '/locks', { positionId: set.positionId, on: set.on, startMinutes: set.startMinutes, minutes: set.minutes }).expect(201);
    test.clock.set(set.endAt);
    await RoundSet.create({
      id: randomUUID(), yardId: yard.id, roundId: null, zoneId: set.zoneId, positionId: set.positionId, kind: 'set', on: set.on, roundIndex: set.roundIndex, sortOrder: 1, plannedStartAt: new Date(set.startAt),
      plannedMinutes: set.minutes, rateMmPerHour: 9, runTimeMultiplier: 1, zoneShare: 0.5, status: 'skipped', skipCause: 'no_time',
    });
    await call('put', '/wishes', { priority: 'keep_green', preferredWindows: [], monthCapLitres: null }).expect(200);
    const made = await plan();
    expect(made.missing.map((reason) => reason.code)).not.toContain('lock_impossible');
  });
});
