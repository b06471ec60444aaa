import { randomUUID } from 'node:crypto';
import { EventRow, HomeWindow, Membership, WeatherDay, Yard } from '@/server/models';
import { defaultHours } from '@/server/commands/yards/yardDefaults';
import { limits } from '@/shared/limits';
import type { YardListResponse, YardResponse } from '@/shared/contracts/yards';
import { signedIn } from '../../factories/people';
import { call, memberOf, ownedYard, readyYard, yardOf, yardRequest } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

const fieldsOf = (body: unknown) => (body as { error: { fields?: { path: string }[] } }).error.fields?.map((field) => field.path);

describe('a new yard', () => {
  it('belongs to its maker and starts with defaults that are marked', async () => {
    const owner = await signedIn(test);
    const response = await call(test, owner, 'post', '/yards', yardRequest);
    expect(response.status).toBe(201);
    const yard = response.body as YardResponse;
    expect(yard).toMatchObject({ ...yardRequest, role: 'owner', elevationM: 0, elevationIsDefault: true, moveMinutes: 5, moveMinutesIsDefault: true, taps: [], zones: [], rules: [] });
    expect(yard.hours).toHaveLength(defaultHours.length);
    expect(yard.hours.every((window) => window.isDefault)).toBe(true);
    expect(yard.hours.filter((window) => window.weekday === 1)).toMatchObject([{ fromMinutes: 360, toMinutes: 450 }, { fromMinutes: 1080, toMinutes: 1200 }]);
    expect(yard.hours.filter((window) => window.weekday === 0)).toMatchObject([{ fromMinutes: 420, toMinutes: 660 }]);
    expect(yard.setUp.every((step) => !step.done)).toBe(true);
    expect(yard.abilities['yard.delete']).toBe(true);
    expect(await EventRow.count({ where: { yardId: yard.id, verb: 'yard.created', userId: owner.user.id } })).toBe(1);
    // the budget starts on the yard's own day: 02:40 in Seattle on 13 June
    expect((await Yard.findByPk(yard.id))?.budgetStaleFrom).toBe('2026-06-13');
  });

  it('keeps a height that is told', async () => {
    const { yardId, owner } = await ownedYard(test, { elevationM: 56 });
    expect(await yardOf(test, { yardId, owner })).toMatchObject({ elevationM: 56, elevationIsDefault: false });
  });

  it.each<[string, object, string]>([
    ['at the pole', { latitudeDeg: 90 }, 'latitudeDeg'],
    ['beyond the polar circle', { latitudeDeg: -66.6 }, 'latitudeDeg'],
    ['off the globe', { longitudeDeg: 181 }, 'longitudeDeg'],
    ['in no time zone', { timeZone: 'America/Nowhere' }, 'timeZone'],
    ['without a name', { name: '   ' }, 'name'],
    ['with half a character in its name', { name: 'A\ud800' }, 'name'],
    ['with a null byte in its name', { name: 'A\u0000B' }, 'name'],
    ['with a long name', { name: 'y'.repeat(81) }, 'name'],
    ['in furlongs', { units: 'furlongs' }, 'units'],
    ['with words for numbers', { latitudeDeg: '47' }, 'latitudeDeg'],
  ])('%s is refused', async (_where, change, field) => {
    const owner = await signedIn(test);
    const response = await call(test, owner, 'post', '/yards', { ...yardRequest, ...change });
    expect(response.status).toBe(400);
    expect(response.body).toMatchObject({ error: { code: 'invalid_input' } });
    expect(fieldsOf(response.body)).toContain(field);
    expect(await Membership.count({ where: { userId: owner.user.id } })).toBe(0);
  });

  it('is refused as 5 MB of text', async () => {
    const owner = await signedIn(test);
    const response = await call(test, owner, 'post', '/yards', { ...yardRequest, name: 'y'.repeat(5_000_000) });
    expect(response.status).toBe(413);
    expect(response.body).toMatchObject({ error: { code: 'body_too_large' } });
  });

  it('is made once however often the request arrives', async () => {
    const owner = await signedIn(test);
    const key = randomUUID();
    const send = () => call(test, owner, 'post', '/yards', yardRequest, { 'Idempotency-Key': key });
    const [first, second] = await Promise.all([send(), send()]);
    const third = await send();
    expect([first.status, second.status, third.status]).toEqual([201, 201, 201]);
    expect(second.body).toEqual(first.body);
    expect(third.body).toEqual(first.body);
    expect(await Membership.count({ where: { userId: owner.user.id } })).toBe(1);
    const other = await call(test, owner, 'post', '/yards', { ...yardRequest, name: 'Another' }, { 'Idempotency-Key': key });
    expect(other.status).toBe(409);
    expect(other.body).toMatchObject({ error: { code: 'idempotency_mismatch' } });
  });

  it('needs somebody who is signed in', async () => {
    expect((await call(test, null, 'post', '/yards', yardRequest)).status).toBe(401);
  });
});

describe('the list of yards', () => {
  it('has one\'s own and those one was invited to, by name', async () => {
    const { yardId, owner } = await ownedYard(test, { name: 'Willow Road' });
    const other = await ownedYard(test, { name: 'aspen court' });
    await Membership.create({ id: randomUUID(), yardId: other.yardId, userId: owner.user.id, role: 'helper' });
    const { yards } = (await call(test, owner, 'get', '/yards')).body as YardListResponse;
    expect(yards.map((yard) => [yard.id, yard.role])).toEqual([[other.yardId, 'helper'], [yardId, 'owner']]);
  });
});

describe('a yard is changed', () => {
  it('field by field; null returns to the default', async () => {
    const owned = await ownedYard(test);
    const path = `/yards/${owned.yardId}`;
    expect((await call(test, owned.owner, 'patch', path, { elevationM: 56, moveMinutes: 8, units: 'metric' })).body)
      .toMatchObject({ elevationM: 56, elevationIsDefault: false, moveMinutes: 8, moveMinutesIsDefault: false, units: 'metric', name: yardRequest.name });
    expect((await call(test, owned.owner, 'patch', path, { elevationM: null, moveMinutes: null })).body)
      .toMatchObject({ elevationM: 0, elevationIsDefault: true, moveMinutes: 5, moveMinutesIsDefault: true, units: 'metric' });
  });

  it('by two people at once without losing either change', async () => {
    const owned = await ownedYard(test);
    const path = `/yards/${owned.yardId}`;
    const answers = await Promise.all([
      call(test, owned.owner, 'patch', path, { name: 'Renamed' }), call(test, owned.owner, 'patch', path, { moveMinutes: 9 }), call(test, owned.owner, 'patch', path, { units: 'metric' }),
    ]);
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200]);
    expect(await yardOf(test, owned)).toMatchObject({ name: 'Renamed', moveMinutes: 9, units: 'metric' });
  });

  it('to another place, whose weather is another', async () => {
    const owned = await ownedYard(test);
    await WeatherDay.create({ yardId: owned.yardId, on: '2026-05-20', isForecast: false, tminC: 9, tmaxC: 20, source: 'test', fetchedAt: test.clock.now() });
    const response = await call(test, owned.owner, 'patch', `/yards/${owned.yardId}`, { placeName: 'Tacoma', latitudeDeg: 47.25 });
    expect(response.status).toBe(200);
    expect(await WeatherDay.count({ where: { yardId: owned.yardId } })).toBe(0);
    expect((await Yard.findByPk(owned.yardId))?.budgetStaleFrom).toBe('2026-05-20');
  });

  it('and nothing is told when nothing changed', async () => {
    const owned = await ownedYard(test);
    const before = (await Yard.findByPk(owned.yardId))?.factsVersion;
    await call(test, owned.owner, 'patch', `/yards/${owned.yardId}`, { name: yardRequest.name });
    expect((await Yard.findByPk(owned.yardId))?.factsVersion).toBe(before);
    expect(await EventRow.count({ where: { yardId: owned.yardId, verb: 'yard.updated' } })).toBe(0);
  });
});

describe('a yard is deleted', () => {
  it('with all that belongs to it when its name is written out', async () => {
    const { yardId, owner } = await readyYard(test);
    const wrong = await call(test, owner, 'delete', `/yards/${yardId}`, { name: 'Elder Street' });
    expect(wrong.status).toBe(400);
    expect(fieldsOf(wrong.body)).toEqual(['name']);
    expect((await call(test, owner, 'delete', `/yards/${yardId}`)).status).toBe(400);
    expect((await call(test, owner, 'delete', `/yards/${yardId}`, { name: yardRequest.name })).status).toBe(200);
    expect(await Yard.count({ where: { id: yardId } })).toBe(0);
    expect((await call(test, owner, 'get', `/yards/${yardId}`)).status).toBe(404);
    expect(await EventRow.count({ where: { verb: 'yard.deleted', subjectId: yardId, yardId: null } })).toBe(1);
  });
});

describe('what a part in the yard allows', () => {
  it.each([
    ['owner', { read: 200, rename: 200, edit: 200 }],
    ['consultant', { read: 200, rename: 403, edit: 200 }],
    ['helper', { read: 200, rename: 403, edit: 403 }],
  ] as const)('%s', async (role, expected) => {
    const { yardId } = await ownedYard(test);
    const person = await memberOf(test, yardId, role);
    expect({
      read: (await call(test, person, 'get', `/yards/${yardId}`)).status,
      rename: (await call(test, person, 'patch', `/yards/${yardId}`, { name: 'Other' })).status,
      edit: (await call(test, person, 'put', `/yards/${yardId}/hours`, { windows: [] })).status,
    }).toEqual(expected);
    expect((await call(test, person, 'delete', `/yards/${yardId}`, { name: 'x' })).status).toBe(role === 'owner' ? 400 : 403);
  });

  it('nothing to somebody else: the yard is not there', async () => {
    const { yardId } = await ownedYard(test);
    const stranger = await signedIn(test);
    for (const [method, path, body] of [['get', '', undefined], ['patch', '', { name: 'Mine' }], ['delete', '', { name: yardRequest.name }], ['put', '/hours', { windows: [] }]] as const) {
      expect((await call(test, stranger, method, `/yards/${yardId}${path}`, body)).status).toBe(404);
    }
    expect((await call(test, stranger, 'get', '/yards/not-an-id')).status).toBe(404);
  });
});

describe('hours at home', () => {
  it('take the place of the defaults', async () => {
    const owned = await ownedYard(test);
    const windows = [{ weekday: 2, fromMinutes: 300, toMinutes: 420 }, { weekday: 2, fromMinutes: 420, toMinutes: 480 }, { weekday: 5, fromMinutes: 1200, toMinutes: 1440 }];
    const response = await call(test, owned.owner, 'put', `/yards/${owned.yardId}/hours`, { windows });
    expect(response.status).toBe(200);
    expect(response.body).toEqual({ hours: windows.map((window) => ({ ...window, isDefault: false })) });
    expect((await yardOf(test, owned)).setUp).toContainEqual({ step: 'hours', done: true });
  });

  it.each<[string, object]>([
    ['that overlap', { windows: [{ weekday: 1, fromMinutes: 300, toMinutes: 420 }, { weekday: 1, fromMinutes: 400, toMinutes: 500 }] }],
    ['that end before they start', { windows: [{ weekday: 1, fromMinutes: 420, toMinutes: 300 }] }],
    ['on an eighth weekday', { windows: [{ weekday: 7, fromMinutes: 300, toMinutes: 420 }] }],
    ['after midnight', { windows: [{ weekday: 1, fromMinutes: 1380, toMinutes: 1500 }] }],
    ['in too many pieces', { windows: Array.from({ length: limits.windowsPerDay + 1 }, (_, index) => ({ weekday: 1, fromMinutes: index * 60, toMinutes: index * 60 + 30 })) }],
  ])('%s are refused and the old ones stay', async (_what, body) => {
    const { yardId, owner } = await ownedYard(test);
    expect((await call(test, owner, 'put', `/yards/${yardId}/hours`, body)).status).toBe(400);
    expect(await HomeWindow.count({ where: { yardId } })).toBe(defaultHours.length);
  });

  it('written by two people at once are those of one of them, whole', async () => {
    const owned = await ownedYard(test);
    const path = `/yards/${owned.yardId}/hours`;
    const windowsOf = (weekday: number) => [6, 9, 12].map((hour) => ({ weekday, fromMinutes: hour * 60, toMinutes: hour * 60 + 60 }));
    await Promise.all([call(test, owned.owner, 'put', path, { windows: windowsOf(1) }), call(test, owned.owner, 'put', path, { windows: windowsOf(3) })]);
    const { hours } = await yardOf(test, owned);
    expect(hours).toHaveLength(3);
    expect(new Set(hours.map((window) => window.weekday)).size).toBe(1);
  });
});
