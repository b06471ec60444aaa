import { BudgetDay, EventRow, Yard } from '@/server/models';
import { refreshYard } from '@/server/commands/refreshYard';
import type { ObservationListResponse } from '@/shared/contracts/ground';
import type { BudgetResponse } from '@/shared/contracts/water';
import { signedIn } from '../../factories/people';
import { wateredYard, type WateredYard } from '../../factories/wateredYard';
import { call, memberOf } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());
beforeEach(() => test.clock.set('2026-06-13T09:40:00Z'));

const only = <T>(value: T | undefined): T => {
  if (value === undefined) throw new Error('nothing there');
  return value;
};
const path = (yard: WateredYard, on: string, zone = 0) => `/yards/${yard.id}/zones/${only(yard.zones[zone]).id}/observations/${on}`;
const daysOf = (yard: WateredYard) => BudgetDay.findAll({ where: { yardId: yard.id, zoneId: only(yard.zones[0]).id }, order: [['on', 'ASC']] });
const dayOf = async (yard: WateredYard, on: string) => only((await daysOf(yard)).find((day) => day.on === on));
const budgetOf = async (yard: WateredYard) => (await call(test, yard.owner, 'get', `/yards/${yard.id}/budget`)).body as BudgetResponse;

async function running(): Promise<WateredYard> {
  const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-01T12:00:00Z' }] });
  await refreshYard(test.context, yard.id, { cause: 'test', fetchWeather: true });
  return yard;
}

describe('what somebody finds in the ground', () => {
  it('moves the balance on the morning of its day by its weight; the days after follow, the days before stay', async () => {
    const yard = await running();
    const before = await daysOf(yard);
    expect((await call(test, yard.owner, 'put', path(yard, '2026-06-10'), { kind: 'screwdriver', feel: 'hard' })).body).toEqual({ done: true });
    const shown = await budgetOf(yard);
    const after = await daysOf(yard);
    const [was, is] = [only(before.find((day) => day.on === '2026-06-10')), only(after.find((day) => day.on === '2026-06-10'))];
    // hardly: half-way from the refill line to the wilting point; a screwdriver counts for 0.4 (defaults, common practice)
    const reckonedMm = is.depletionStartMm + is.rootGrowthMm;
    const foundMm = (is.refillLineMm + is.totalAvailableMm) / 2;
    expect(is.depletionStartMm).toBeCloseTo(was.depletionStartMm, 9);
    expect(is.observationMm).toBeCloseTo(0.4 * (foundMm - reckonedMm), 6);
    expect(after.filter((day) => day.on < '2026-06-10').map((day) => day.depletionEndMm)).toEqual(before.filter((day) => day.on < '2026-06-10').map((day) => day.depletionEndMm));
    expect(only(after.find((day) => day.on === '2026-06-11')).depletionStartMm).toBeCloseTo(is.depletionEndMm, 9);
    const told = only(only(shown.zones[0]).days.find((day) => day.on === '2026-06-10'));
    expect(told.observationMm).toBeCloseTo(is.observationMm, 9);
    expect(told.assumptions.map((each) => each.method).join()).toMatch(/counts for 40 %/);
    expect(told.depletionEndMm).toBeCloseTo(
      told.depletionStartMm + told.rootGrowthMm + told.observationMm + told.etcMm - told.effectiveRainMm - told.irrigationMm + told.drainageMm, 6,
    );
  });

  it('today changes what the plan starts from, and Today says how dry it is with it', async () => {
    const yard = await running();
    const dry = await dayOf(yard, '2026-06-13');
    await call(test, yard.owner, 'put', path(yard, '2026-06-13'), { kind: 'probe', waterContent: 0.14 });
    const today = (await call(test, yard.owner, 'get', `/yards/${yard.id}/today`)).body as { zones: { depletionMm: number }[] };
    const day = await dayOf(yard, '2026-06-13');
    expect(day.observationMm).toBeGreaterThan(0);
    expect(only(today.zones[0]).depletionMm).toBeCloseTo(day.depletionStartMm + day.rootGrowthMm + day.observationMm, 6);
    expect(only(today.zones[0]).depletionMm).toBeGreaterThan(dry.depletionStartMm);
  });

  it('is listed newest first with who saw it and how much it counts, corrected, and taken back', async () => {
    const yard = await running();
    const helper = await memberOf(test, yard.id, 'helper');
    await call(test, yard.owner, 'put', path(yard, '2026-06-08'), { kind: 'screwdriver', feel: 'firm' });
    await call(test, helper, 'put', path(yard, '2026-06-11'), { kind: 'probe', waterContent: 0.2 });
    await call(test, helper, 'put', path(yard, '2026-06-08'), { kind: 'screwdriver', feel: 'easy' });
    const { observations } = (await call(test, yard.owner, 'get', `/yards/${yard.id}/observations`)).body as ObservationListResponse;
    const zoneId = only(yard.zones[0]).id;
    const person = { id: helper.user.id, name: helper.user.name };
    expect(observations).toEqual([
      { zoneId, on: '2026-06-11', kind: 'probe', feel: null, waterContent: 0.2, weight: 0.7, person },
      { zoneId, on: '2026-06-08', kind: 'screwdriver', feel: 'easy', waterContent: null, weight: 0.4, person },
    ]);
    const version = (await Yard.findByPk(yard.id))?.factsVersion;
    await call(test, helper, 'put', path(yard, '2026-06-08'), { kind: 'screwdriver', feel: 'easy' });
    expect((await Yard.findByPk(yard.id))?.factsVersion).toBe(version);
    expect((await call(test, helper, 'delete', path(yard, '2026-06-08'))).status).toBe(200);
    expect((await call(test, helper, 'delete', path(yard, '2026-06-08'))).status).toBe(404);
    await budgetOf(yard);
    expect((await dayOf(yard, '2026-06-08')).observationMm).toBe(0);
    expect(await EventRow.count({ where: { yardId: yard.id, verb: 'observation.recorded' } })).toBe(3);
    expect(await EventRow.count({ where: { yardId: yard.id, verb: 'observation.deleted' } })).toBe(1);
  });

  it.each<[string, string, object, string]>([
    ['tomorrow', '2026-06-14', { kind: 'screwdriver', feel: 'easy' }, 'on'], ['long ago', '2026-04-01', { kind: 'screwdriver', feel: 'easy' }, 'on'],
    ['by no tool', '2026-06-12', { kind: 'finger' }, 'kind'], ['with no feel', '2026-06-12', { kind: 'screwdriver' }, 'feel'], ['as a lake', '2026-06-12', { kind: 'probe', waterContent: 0.9 }, 'waterContent'],
  ])('is refused %s', async (_what, on, body, field) => {
    const yard = await wateredYard(test);
    const answer = await call(test, yard.owner, 'put', path(yard, on), body);
    expect([answer.status, (answer.body as { error: { fields: { path: string }[] } }).error.fields.map((each) => each.path)]).toEqual([400, [field]]);
  });

  it('of a zone in another yard is not there', async () => {
    const [yard, other] = [await wateredYard(test), await wateredYard(test)];
    const foreign = `/yards/${yard.id}/zones/${only(other.zones[0]).id}/observations/2026-06-12`;
    expect((await call(test, yard.owner, 'put', foreign, { kind: 'screwdriver', feel: 'easy' })).status).toBe(404);
    expect((await call(test, await signedIn(test), 'get', `/yards/${yard.id}/observations`)).status).toBe(404);
  });
});
