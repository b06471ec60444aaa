import { randomUUID } from 'node:crypto';
import { EstablishmentScheduleRow, Proposal, Yard, Zone } from '@/server/models';
import type { ZoneResponse } from '@/shared/contracts/zones';
import { call, ownedYard, readyYard, yardOf, type OwnedYard } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

const zonesPath = ({ yardId }: OwnedYard) => `/yards/${yardId}/zones`;

async function zoneIn(owned: OwnedYard, body: object = {}): Promise<ZoneResponse> {
  const response = await call(test, owned.owner, 'post', zonesPath(owned), { name: 'Lawn', areaM2: 80, ...body });
  expect(response.status).toBe(201);
  return response.body as ZoneResponse;
}

/** The budget counts as up to date, as after a recomputation. */
async function settle({ yardId }: OwnedYard): Promise<void> {
  await Yard.update({ budgetStaleFrom: null }, { where: { id: yardId } });
}

const staleFrom = async ({ yardId }: OwnedYard) => (await Yard.findByPk(yardId))?.budgetStaleFrom ?? null;

describe('a zone', () => {
  it('gets defaults for what is not told, and goes back to them for null', async () => {
    const owned = await ownedYard(test);
    const zone = await zoneIn(owned, { soil: 'sand', grass: 'bermuda', slopePct: 9, sunHours: 3 });
    expect(zone).toMatchObject({ soil: 'sand', soilIsDefault: false, grass: 'bermuda', grassIsDefault: false, slopePct: 9, slopeIsDefault: false, sunHours: 3, sunHoursIsDefault: false });
    const back = await call(test, owned.owner, 'patch', `${zonesPath(owned)}/${zone.id}`, { soil: null, grass: null, slopePct: null, sunHours: null });
    expect(back.body).toMatchObject({
      soil: 'loam', soilIsDefault: true, grass: 'cool_mix', grassIsDefault: true, slopePct: 1, slopeIsDefault: true, sunHours: 8, sunHoursIsDefault: true, name: 'Lawn', areaM2: 80,
    });
  });

  it.each([[47, 'cool_mix'], [36, 'cool_mix'], [30, 'warm_mix'], [-34, 'warm_mix'], [-41, 'cool_mix']])('at %d° of latitude is taken for %s', async (latitudeDeg, grass) => {
    expect(await zoneIn(await ownedYard(test, { latitudeDeg }))).toMatchObject({ grass, grassIsDefault: true });
  });

  it('has its area from its sides until an area is told', async () => {
    const owned = await ownedYard(test);
    const { id } = await zoneIn(owned, { areaM2: undefined, sideAM: 8, sideBM: 5 });
    const change = async (body: object) => (await call(test, owned.owner, 'patch', `${zonesPath(owned)}/${id}`, body)).body as unknown;
    expect(await change({ name: 'Long lawn' })).toMatchObject({ areaM2: 40, sideAM: 8, sideBM: 5 });
    expect(await change({ sideAM: 10 })).toMatchObject({ areaM2: 50, sideAM: 10, sideBM: 5 });
    expect(await change({ areaM2: 33 })).toMatchObject({ areaM2: 33, sideAM: null, sideBM: null });
    expect(await change({ sideAM: 500, sideBM: 500 })).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: 'sideBM' }] } });
  });

  it.each<[string, object, string]>([
    ['without a size', { areaM2: undefined }, 'areaM2'], ['of nothing', { areaM2: 0 }, 'areaM2'], ['as large as a farm', { areaM2: 1e7 }, 'areaM2'],
    ['seeded on February 30', { seededOn: '2026-02-30' }, 'seededOn'], ['seeded in the year 1', { seededOn: '0001-01-01' }, 'seededOn'], ['of plastic', { grass: 'plastic' }, 'grass'],
    ['steeper than a roof', { slopePct: 61 }, 'slopePct'], ['with 25 hours of sun', { sunHours: 25 }, 'sunHours'], ['without a name', { name: '' }, 'name'],
  ])('%s is refused', async (_what, change, field) => {
    const owned = await ownedYard(test);
    const response = await call(test, owned.owner, 'post', zonesPath(owned), { name: 'Lawn', areaM2: 80, ...change });
    expect(response.status).toBe(400);
    expect((response.body as { error: { fields: { path: string }[] } }).error.fields.map((each) => each.path)).toContain(field);
    expect(await Zone.count({ where: { yardId: owned.yardId } })).toBe(0);
  });

  it('gets an establishment schedule when it is seeded, at once or later', async () => {
    const owned = await ownedYard(test);
    const seeded = await zoneIn(owned, { seededOn: '2026-06-13' });
    const plain = await zoneIn(owned);
    const schedules = (zoneId: string) => EstablishmentScheduleRow.count({ where: { yardId: owned.yardId, zoneId } });
    expect([await schedules(seeded.id), await schedules(plain.id)]).toEqual([1, 0]);
    await call(test, owned.owner, 'patch', `${zonesPath(owned)}/${plain.id}`, { seededOn: '2026-06-12' });
    expect(await schedules(plain.id)).toBe(1);
  });

  it('of another yard is not there', async () => {
    const mine = await ownedYard(test);
    const other = await readyYard(test);
    const id = other.yard.zones[0]?.id ?? '';
    expect((await call(test, mine.owner, 'patch', `${zonesPath(mine)}/${id}`, { name: 'Mine' })).status).toBe(404);
    expect((await call(test, mine.owner, 'delete', `${zonesPath(mine)}/${id}`)).status).toBe(404);
    expect((await yardOf(test, other)).zones).toHaveLength(1);
  });

  it('is not removed while a proposal for it waits', async () => {
    const owned = await ownedYard(test);
    const { id } = await zoneIn(owned, { seededOn: '2026-06-13' });
    const schedule = (await EstablishmentScheduleRow.findOne({ where: { yardId: owned.yardId, zoneId: id } }))?.schedule ?? { stages: [] };
    const proposal = await Proposal.create({ id: randomUUID(), yardId: owned.yardId, zoneId: id, authorId: owned.owner.user.id, reason: 'Dry wind', scheduleBefore: schedule, schedule, status: 'open' });
    expect((await call(test, owned.owner, 'delete', `${zonesPath(owned)}/${id}`)).body).toMatchObject({ error: { code: 'in_use' } });
    await proposal.update({ status: 'declined' });
    expect((await call(test, owned.owner, 'delete', `${zonesPath(owned)}/${id}`)).status).toBe(200);
    expect((await yardOf(test, owned)).zones).toEqual([]);
    expect((await Zone.findByPk(id))?.archivedAt).toEqual(test.clock.now());
  });
});

describe('what a change of a zone does to the budget', () => {
  it.each<[string, object, string | null]>([
    ['another soil counts from today', { soil: 'clay' }, '2026-06-13'],
    ['resting counts from today', { resting: true }, '2026-06-13'],
    ['another name touches only the plan', { name: 'Renamed' }, null],
    ['another place in the order touches only the plan', { priority: 1 }, null],
    ['a sowing counts from its day', { seededOn: '2026-06-01' }, '2026-06-01'],
    ['a sowing long ago counts from the earliest day that facts are taken for', { seededOn: '2025-10-01' }, '2026-04-14'],
  ])('%s', async (_what, change, expected) => {
    const owned = await ownedYard(test);
    const { id } = await zoneIn(owned);
    await settle(owned);
    const before = (await Yard.findByPk(owned.yardId))?.factsVersion ?? 0;
    expect((await call(test, owned.owner, 'patch', `${zonesPath(owned)}/${id}`, change)).status).toBe(200);
    expect(await staleFrom(owned)).toBe(expected);
    expect((await Yard.findByPk(owned.yardId))?.factsVersion).toBe(before + 1);
  });

  it('a sowing taken back counts from its day too', async () => {
    const owned = await ownedYard(test);
    const { id } = await zoneIn(owned, { seededOn: '2026-06-03' });
    await settle(owned);
    await call(test, owned.owner, 'patch', `${zonesPath(owned)}/${id}`, { seededOn: null });
    expect(await staleFrom(owned)).toBe('2026-06-03');
  });
});
