import { refreshYard } from '@/server/commands/refreshYard';
import { BudgetDay, Zone } from '@/server/models';
import type { ZoneSunResponse } from '@/shared/contracts/ground';
import type { ZoneResponse } from '@/shared/contracts/zones';
import { wateredYard, type WateredYard } from '../../factories/wateredYard';
import { call, ownedYard } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());
beforeEach(() => test.clock.set('2026-06-13T09:40:00Z'));

const zoneIdOf = (yard: WateredYard) => yard.zones[0]?.id ?? '';
const page = (yard: WateredYard, on: string) => `/yards/${yard.id}/zones/${zoneIdOf(yard)}/sun-diary/${on}`;
const sunOf = async (yard: WateredYard) => (await call(test, yard.owner, 'get', `/yards/${yard.id}/zones/${zoneIdOf(yard)}/sun`)).body as ZoneSunResponse;
const todayOf = async (yard: WateredYard) => {
  await call(test, yard.owner, 'get', `/yards/${yard.id}/budget`);
  return BudgetDay.findOne({ where: { yardId: yard.id, zoneId: zoneIdOf(yard), on: '2026-06-13' }, rejectOnEmpty: true });
};

describe('a sun diary', () => {
  it('of one day in June tells the light of every month, and the budget goes by it', async () => {
    const yard = await wateredYard(test);
    await refreshYard(test.context, yard.id, { cause: 'test', fetchWeather: true });
    const open = await todayOf(yard);
    expect(open.shadedEt0Mm).toBeCloseTo(open.et0Mm, 9);
    expect(await sunOf(yard)).toMatchObject({ sunFrom: 'hours', pages: [], today: '2026-06-13' });
    // a wall to the south hides the sun from ten to three; mornings and evenings are open
    const sunnyHours = [5, 6, 7, 8, 9, 15, 16, 17, 18, 19];
    const told = (await call(test, yard.owner, 'put', page(yard, '2026-06-10'), { sunnyHours })).body as ZoneSunResponse;
    expect(told).toMatchObject({ sunFrom: 'diary', pages: [{ on: '2026-06-10', sunnyHours, person: { name: yard.owner.user.name } }] });
    const [june, december] = [told.months[5], told.months[11]];
    expect(june?.directSunHours).toBeGreaterThan(8.5);
    expect(june?.directSunHours).toBeLessThan(11.5);
    // the low winter sun stays behind that wall longer: a smaller part of its shorter day is left
    expect((december?.directSunHours ?? 1) / (december?.openSunHours ?? 1)).toBeLessThan((june?.directSunHours ?? 0) / (june?.openSunHours ?? 1));
    expect(december?.radiationShare).toBeLessThan(june?.radiationShare ?? 0);
    const shaded = await todayOf(yard);
    expect(shaded.shadedEt0Mm).toBeLessThan(open.shadedEt0Mm);
    expect((shaded.inputs as { assumptions: { field: string }[] }).assumptions.map((each) => each.field)).toContain('horizon');
    expect((await call(test, yard.owner, 'get', `/yards/${yard.id}`)).body).toMatchObject({ zones: [{ hasSunDiary: true }] });
    const gone = (await call(test, yard.owner, 'delete', page(yard, '2026-06-10'))).body as ZoneSunResponse;
    expect(gone).toMatchObject({ sunFrom: 'hours', pages: [] });
    expect((await todayOf(yard)).shadedEt0Mm).toBeCloseTo(open.shadedEt0Mm, 9);
  });

  it('with sun all day leaves the zone open', async () => {
    const yard = await wateredYard(test);
    const told = (await call(test, yard.owner, 'put', page(yard, '2026-06-10'), { sunnyHours: Array.from({ length: 24 }, (_, hour) => hour) })).body as ZoneSunResponse;
    for (const month of told.months) {
      expect(month.radiationShare).toBeCloseTo(1, 2);
      expect(month.directSunHours).toBeCloseTo(month.openSunHours, 1);
    }
  });

  it('moves with the yard: the same hours under another sun are another horizon', async () => {
    const yard = await wateredYard(test);
    await call(test, yard.owner, 'put', page(yard, '2026-06-10'), { sunnyHours: [10, 11, 12, 13] });
    const before = (await Zone.findByPk(zoneIdOf(yard)))?.horizonDeg;
    await call(test, yard.owner, 'patch', `/yards/${yard.id}`, { latitudeDeg: 30.3, longitudeDeg: -97.7, timeZone: 'America/Chicago', placeName: 'Austin' });
    const after = (await Zone.findByPk(zoneIdOf(yard)))?.horizonDeg;
    expect(after).toHaveLength(360);
    expect(after).not.toEqual(before);
  });

  it.each<[string, string, object, string]>([
    ['a day to come', '2026-06-14', { sunnyHours: [9] }, 'on'], ['a day of another decade', '2016-06-14', { sunnyHours: [9] }, 'on'],
    ['an hour that is none', '2026-06-12', { sunnyHours: [24] }, 'sunnyHours.0'], ['an hour twice', '2026-06-12', { sunnyHours: [9, 9] }, 'sunnyHours'],
  ])('refuses %s', async (_what, on, body, field) => {
    const yard = await wateredYard(test);
    const answer = await call(test, yard.owner, 'put', page(yard, on), body);
    expect([answer.status, (answer.body as { error: { fields: { path: string }[] } }).error.fields[0]?.path]).toEqual([400, field]);
  });
});

describe('typed hours of sun', () => {
  it('hold for the day they were seen on: that of telling by default, the equinox for default hours', async () => {
    const { yardId, owner } = await ownedYard(test);
    const zones = `/yards/${yardId}/zones`;
    const make = async (body: object) => (await call(test, owner, 'post', zones, { name: 'Lawn', areaM2: 80, ...body })).body as ZoneResponse;
    expect(await make({})).toMatchObject({ sunHours: 8, sunHoursIsDefault: true, sunHoursOn: '2026-03-20', sunHoursOnIsDefault: true });
    const told = await make({ sunHours: 5 });
    expect(told).toMatchObject({ sunHours: 5, sunHoursIsDefault: false, sunHoursOn: '2026-06-13', sunHoursOnIsDefault: true });
    expect(await make({ sunHours: 5, sunHoursOn: '2026-04-02' })).toMatchObject({ sunHoursOn: '2026-04-02', sunHoursOnIsDefault: false });
    const change = async (body: object) => (await call(test, owner, 'patch', `${zones}/${told.id}`, body)).body as ZoneResponse;
    test.clock.set('2026-07-01T18:00:00Z');
    expect(await change({ sunHours: 5, name: 'Lawn by the wall' })).toMatchObject({ sunHoursOn: '2026-06-13' });
    expect(await change({ sunHours: 6 })).toMatchObject({ sunHours: 6, sunHoursOn: '2026-07-01', sunHoursOnIsDefault: true });
    expect(await change({ sunHoursOn: '2026-05-05' })).toMatchObject({ sunHours: 6, sunHoursOn: '2026-05-05', sunHoursOnIsDefault: false });
    expect(await change({ sunHours: null, sunHoursOn: null })).toMatchObject({ sunHours: 8, sunHoursIsDefault: true, sunHoursOn: '2026-03-20', sunHoursOnIsDefault: true });
    expect((await call(test, owner, 'patch', `${zones}/${told.id}`, { sunHoursOn: '2026-08-01' })).status).toBe(400);
  });

  it('seen in June leave less sun in winter', async () => {
    const yard = await wateredYard(test, { zones: [{ sunHours: 9 }] });
    await Zone.update({ sunHoursOn: '2026-06-10' }, { where: { yardId: yard.id } });
    const { months } = await sunOf(yard);
    expect(months[5]?.directSunHours).toBeCloseTo(9, 0);
    expect(months[11]?.directSunHours).toBeLessThan(6);
  });
});
