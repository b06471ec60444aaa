import { refreshYard } from '@/server/commands/refreshYard';
import { factsChanged } from '@/server/commands/factsChanged';
import { BudgetDay, RainEntry, Zone } from '@/server/models';
import type { ZoneResponse } from '@/shared/contracts/zones';
import { wateredYard, type WateredYard, type ZoneWish } from '../../factories/wateredYard';
import { call, ownedYard } from '../../factories/yards';
import { SwitchableWeather } from '../../setup/switchableWeather';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
const weather = new SwitchableWeather();
beforeAll(async () => {
  test = await testContext({ weather });
});
beforeEach(() => {
  test.clock.set('2026-06-13T09:40:00Z');
  weather.change = (day) => day;
});
afterAll(async () => {
  await test.close();
  await weather.close();
});

interface Inputs { condition: string; winter: { isFrosted: boolean; snowMm: number }; patchSurfaceMm: Record<string, number | null>; assumptions: { field: string }[] }
const inputsOf = (day: BudgetDay) => day.inputs as Inputs;
const refresh = (yard: WateredYard) => refreshYard(test.context, yard.id, { cause: 'test', fetchWeather: true });
const again = async (yard: WateredYard, from: string) => {
  await factsChanged(test.context.database, yard.id, from);
  await refreshYard(test.context, yard.id, { cause: 'test' });
};
const daysOf = (yard: WateredYard, zone = 0) => BudgetDay.findAll({ where: { yardId: yard.id, zoneId: yard.zones[zone]?.id ?? '' }, order: [['on', 'ASC']] });
const twins = (...zones: ZoneWish[]) => wateredYard(test, { zones: zones.map((zone) => ({ createdAt: '2026-05-20T12:00:00Z', positions: 1, ...zone })) });
const sum = (days: readonly BudgetDay[], pick: (day: BudgetDay) => number) => days.reduce((total, day) => total + pick(day), 0);

describe('the facts of the ground', () => {
  it('are kept with a mark where they are defaults, and go back to them', async () => {
    const { yardId, owner } = await ownedYard(test);
    const plain = (await call(test, owner, 'post', `/yards/${yardId}/zones`, { name: 'Lawn', areaM2: 80 })).body as ZoneResponse;
    expect(plain).toMatchObject({ compaction: 'loose', compactionIsDefault: true, treeRootShare: 0, treeRootShareIsDefault: true, coverFraction: 1, coverFractionIsDefault: true, hasSunDiary: false });
    const path = `/yards/${yardId}/zones/${plain.id}`;
    const told = (await call(test, owner, 'patch', path, { compaction: 'hard', treeRootShare: 0.5, coverFraction: 0.7 })).body as ZoneResponse;
    expect(told).toMatchObject({ compaction: 'hard', compactionIsDefault: false, treeRootShare: 0.5, treeRootShareIsDefault: false, coverFraction: 0.7, coverFractionIsDefault: false });
    expect((await call(test, owner, 'patch', path, { compaction: null, treeRootShare: null, coverFraction: null })).body).toMatchObject({ compaction: 'loose', compactionIsDefault: true, treeRootShare: 0, coverFraction: 1 });
    for (const bad of [{ compaction: 'rock' }, { treeRootShare: 1.1 }, { coverFraction: 0.05 }]) {
      expect((await call(test, owner, 'patch', path, bad)).status).toBe(400);
    }
  });

  it('let a cloudburst run off hard clay on a slope, and none off loose level sand', async () => {
    const yard = await twins({ soil: 'clay' }, { soil: 'sand' });
    await Zone.update({ slopePct: 14, compaction: 'hard' }, { where: { id: yard.zones[0]?.id ?? '' } });
    await RainEntry.create({ yardId: yard.id, on: '2026-06-09', depthMm: 40, updatedAt: test.clock.now() });
    await refresh(yard);
    const on = async (zone: number) => (await daysOf(yard, zone)).find((day) => day.on === '2026-06-09');
    const [clay, sand] = [await on(0), await on(1)];
    expect(clay?.runoffMm).toBeGreaterThan(15);
    expect(clay?.effectiveRainMm).toBeCloseTo(40 - (clay?.runoffMm ?? 0), 6);
    expect(sand?.runoffMm).toBeCloseTo(0, 6);
  });

  it('let trees drink from the lawn, and a lawn at rest use little', async () => {
    const yard = await twins({}, {}, { resting: true });
    await Zone.update({ treeRootShare: 0.6 }, { where: { id: yard.zones[1]?.id ?? '' } });
    await refresh(yard);
    const [lawn, treed, resting] = [await daysOf(yard, 0), await daysOf(yard, 1), await daysOf(yard, 2)];
    expect(sum(lawn, (day) => day.treeUptakeMm)).toBe(0);
    expect(sum(treed, (day) => day.treeUptakeMm)).toBeGreaterThan(1);
    expect(sum(treed.slice(0, 5), (day) => day.etcMm)).toBeGreaterThan(sum(lawn.slice(0, 5), (day) => day.etcMm));
    expect(resting.every((day) => inputsOf(day).condition === 'resting' && day.cropCoefficient <= 0.3)).toBe(true);
  });

  it('dry thin ground by its surface, which is carried over from day to day and from run to run', async () => {
    const yard = await twins({}, {});
    await Zone.update({ coverFraction: 0.5 }, { where: { id: yard.zones[1]?.id ?? '' } });
    await refresh(yard);
    const [full, thin] = [await daysOf(yard, 0), await daysOf(yard, 1)];
    expect(full.every((day) => day.surfaceDepletionMm === null && day.evaporationMm === 0)).toBe(true);
    expect(thin.every((day) => (day.surfaceDepletionMm ?? -1) >= 0)).toBe(true);
    expect(sum(thin, (day) => day.evaporationMm)).toBeGreaterThan(1);
    const assumed = inputsOf(thin[0] as BudgetDay).assumptions.map((each) => each.field);
    expect(assumed).toEqual(expect.arrayContaining(['surfaceLayer', 'coverFraction', 'compaction']));
    // running again from the middle changes nothing, in the zone and in its patches
    await again(yard, '2026-06-05');
    const rerun = await daysOf(yard, 1);
    rerun.forEach((day, index) => {
      expect(day.depletionEndMm).toBeCloseTo(thin[index]?.depletionEndMm ?? Number.NaN, 6);
      expect(day.surfaceDepletionMm).toBeCloseTo(thin[index]?.surfaceDepletionMm ?? Number.NaN, 6);
      expect(inputsOf(day).patchSurfaceMm).toEqual(inputsOf(thin[index] as BudgetDay).patchSurfaceMm);
    });
  });
});

describe('winter', () => {
  it('browns the grass for weeks after the frost that did it, however often the budget is run from the middle', async () => {
    test.clock.set('2026-02-20T15:00:00Z');
    const yard = await wateredYard(test, { zones: [{ grass: 'bermuda', createdAt: '2026-01-10T12:00:00Z', positions: 1 }] });
    // one hard night on 20 January, cool without frost before and after
    weather.change = (day) => ({ ...day, tminC: day.on === '2026-01-20' ? -9 : 3, tmaxC: 9, precipitationMm: 0 });
    const conditions = async () => (await daysOf(yard)).map((day) => [day.on, inputsOf(day).condition] as const);
    await refresh(yard);
    const first = await conditions();
    const at = (on: string) => new Map(first).get(on);
    expect([at('2026-01-19'), at('2026-01-20'), at('2026-02-15')]).toEqual(['growing', 'frosted', 'frosted']);
    await again(yard, '2026-02-15');
    expect(await conditions()).toEqual(first);
    // a zone that is new in February finds the frost in the weather before it
    const late = await wateredYard(test, { zones: [{ grass: 'bermuda', createdAt: '2026-02-18T12:00:00Z', positions: 1 }] });
    await refresh(late);
    expect((await daysOf(late)).every((day) => inputsOf(day).condition === 'frosted')).toBe(true);
  });
});
