import { refreshYard } from '@/server/commands/refreshYard';
import { BudgetDay, Yard } from '@/server/models';
import type { EstablishmentResponse } from '@/shared/contracts/proposals';
import { wateredYard, type WateredYard } from '../../factories/wateredYard';
import { call, memberOf } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());
beforeEach(() => test.clock.set('2026-06-13T09:40:00Z'));

async function sown(seededOn = '2026-06-10'): Promise<WateredYard & { zoneId: string }> {
  const yard = await wateredYard(test, { zones: [{ seededOn, createdAt: `${seededOn}T12:00:00Z`, positions: 1 }] });
  await refreshYard(test.context, yard.id, { cause: 'test', fetchWeather: true });
  return { ...yard, zoneId: yard.zones[0]?.id ?? '' };
}
const path = (yard: { id: string; zoneId: string }, on: string) => `/yards/${yard.id}/zones/${yard.zoneId}/seen-stages/${on}`;
const standing = async (yard: WateredYard & { zoneId: string }) => (await call(test, yard.owner, 'get', `/yards/${yard.id}/zones/${yard.zoneId}/establishment`)).body as EstablishmentResponse;
const stagesOf = async (yard: { id: string; zoneId: string }) => (await BudgetDay.findAll({ where: { yardId: yard.id, zoneId: yard.zoneId }, order: [['on', 'ASC']] }))
  .map((day) => [day.on, (day.inputs as { stage: string }).stage] as const);

describe('a stage that somebody saw', () => {
  it('overrules the heat sum from its day on: in what is shown, in the balance, and in the doses', async () => {
    const yard = await sown();
    const byHeat = await standing(yard);
    expect(byHeat).toMatchObject({ stage: 'sown', stageFrom: 'heat', seen: [] });
    const helper = await memberOf(test, yard.id, 'helper');
    expect((await call(test, helper, 'put', path(yard, '2026-06-12'), { stage: 'coming_up' })).status).toBe(200);
    const seen = await standing(yard);
    expect(seen).toMatchObject({ stage: 'coming_up', stageFrom: 'seen', seen: [{ on: '2026-06-12', stage: 'coming_up', person: { id: helper.user.id, name: helper.user.name } }] });
    await call(test, yard.owner, 'get', `/yards/${yard.id}/budget`);
    const stages = new Map(await stagesOf(yard));
    expect([stages.get('2026-06-11'), stages.get('2026-06-12'), stages.get('2026-06-14')]).toEqual(['sown', 'coming_up', 'coming_up']);
    expect((await call(test, helper, 'delete', path(yard, '2026-06-12'))).status).toBe(200);
    expect(await standing(yard)).toMatchObject({ stage: 'sown', stageFrom: 'heat', seen: [] });
    await call(test, yard.owner, 'get', `/yards/${yard.id}/budget`);
    expect(new Map(await stagesOf(yard)).get('2026-06-12')).toBe('sown');
  });

  it('of an earlier sowing does not count for a later one', async () => {
    const yard = await sown();
    await call(test, yard.owner, 'put', path(yard, '2026-06-11'), { stage: 'rooting' });
    expect((await standing(yard)).stage).toBe('rooting');
    await call(test, yard.owner, 'patch', `/yards/${yard.id}/zones/${yard.zoneId}`, { seededOn: '2026-06-12' });
    expect(await standing(yard)).toMatchObject({ stage: 'sown', seen: [] });
  });

  it('told twice the same changes nothing', async () => {
    const yard = await sown();
    await call(test, yard.owner, 'put', path(yard, '2026-06-12'), { stage: 'coming_up' });
    const before = (await Yard.findByPk(yard.id))?.factsVersion;
    await call(test, yard.owner, 'put', path(yard, '2026-06-12'), { stage: 'coming_up' });
    expect((await Yard.findByPk(yard.id))?.factsVersion).toBe(before);
  });

  it('is refused before the sowing, ahead of time, by an unknown name, and where nothing is sown', async () => {
    const yard = await sown();
    expect((await call(test, yard.owner, 'put', path(yard, '2026-06-09'), { stage: 'coming_up' })).status).toBe(400);
    expect((await call(test, yard.owner, 'put', path(yard, '2026-06-14'), { stage: 'coming_up' })).status).toBe(400);
    expect((await call(test, yard.owner, 'put', path(yard, '2026-06-12'), { stage: 'flowering' })).status).toBe(400);
    const lawn = await wateredYard(test);
    expect((await call(test, lawn.owner, 'put', path({ id: lawn.id, zoneId: lawn.zones[0]?.id ?? '' }, '2026-06-12'), { stage: 'coming_up' })).status).toBe(404);
  });
});
