import { refreshYard } from '@/server/commands/refreshYard';
import { ClimateRecord } from '@/server/models';
import type { SeasonResponse } from '@/shared/contracts/season';
import { wateredYard, type WateredYard } from '../../factories/wateredYard';
import { call } from '../../factories/yards';
import { SwitchableWeather } from '../../setup/switchableWeather';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
const weather = new SwitchableWeather();
beforeAll(async () => {
  test = await testContext({ weather });
});
beforeEach(() => {
  test.clock.set('2026-06-13T09:40:00Z');
  weather.isOut = false;
  weather.asked.length = 0;
});
afterAll(async () => {
  await test.close();
  await weather.close();
});

const ask = (yard: WateredYard) => call(test, yard.owner, 'get', `/yards/${yard.id}/season`);
const season = async (yard: WateredYard) => {
  const answer = await ask(yard);
  expect([answer.status, answer.status === 200 ? '' : answer.text]).toEqual([200, '']);
  return answer.body as SeasonResponse;
};

describe('the season of a yard', () => {
  it('tells when to sow its grasses, when a preventer has its time, and the first freeze, from records of New York', async () => {
    const yard = await wateredYard(test, { zones: [{ name: 'Front', grass: 'tall_fescue' }, { name: 'Side', grass: 'tall_fescue' }, { name: 'Back', grass: 'bermuda' }] });
    await refreshYard(test.context, yard.id, { cause: 'test', fetchWeather: true });
    const found = await season(yard);
    expect(found).toMatchObject({ today: '2026-06-13', soilIsKnown: true, sample: true, years: 4 });
    expect(found.source).toMatch(/records of New York/);
    expect(found.grasses.map(({ grass, zones }) => [grass, zones])).toEqual([['tall_fescue', ['Front', 'Side']], ['bermuda', ['Back']]]);
    // mid-August to late September is the extension's window for cool-season seed in the region; the records may let it end later
    const fescue = found.grasses[0]?.sowing[0];
    expect(fescue?.season).toBe('before_winter');
    expect(fescue?.fromOn.slice(0, 7)).toBe('2026-08');
    expect(fescue?.untilOn.slice(0, 7) ?? '').toMatch(/2026-(09|10)/);
    // late spring to midsummer for bermuda
    expect(found.grasses[1]?.sowing[0]?.fromOn ?? '').toMatch(/2026-0[56]/);
    // this spring's preventer is over in June: next year's is told, in April and May
    expect(found.preventer.opensOn ?? '').toMatch(/^2027-04/);
    expect(found.preventer.cautions.join(' ')).toMatch(/label/);
    expect(found.preventer.cautions.join(' ')).toMatch(/seed/);
    expect(found.freeze?.likelyOn ?? '').toMatch(/^2026-11/);
    expect((found.freeze?.hoseOffBy ?? '9') < (found.freeze?.earlyOn ?? '0')).toBe(true);
    expect(found.freeze?.seasons).toBe(4);
    expect(found.nextFreezeOn).toBeNull();
  });

  it('asks for past years once, and again after the yard has moved', async () => {
    const yard = await wateredYard(test);
    await season(yard);
    await season(yard);
    expect(weather.asked).toHaveLength(1);
    expect(weather.asked[0]).toMatchObject({ fromOn: '2022-01-01', toOn: '2025-12-31' });
    const here = await ClimateRecord.findByPk(yard.id);
    await call(test, yard.owner, 'patch', `/yards/${yard.id}`, { latitudeDeg: 47.6, longitudeDeg: -122.3, timeZone: 'America/Los_Angeles' });
    expect(await ClimateRecord.findByPk(yard.id)).toBeNull();
    expect((await season(yard)).source).toMatch(/Seattle/);
    expect((await ClimateRecord.findByPk(yard.id))?.tminC).not.toEqual(here?.tminC);
  });

  it('says so while the service does not answer, and lives on the years it has', async () => {
    const yard = await wateredYard(test);
    weather.isOut = true;
    const out = await ask(yard);
    expect([out.status, (out.body as { error: { code: string } }).error.code]).toEqual([503, 'weather_unavailable']);
    weather.isOut = false;
    await season(yard);
    weather.isOut = true;
    test.clock.set('2027-01-10T15:00:00Z');
    expect((await season(yard)).today).toBe('2027-01-10');
  });

  it('stands for a yard without a zone, and south of the equator', async () => {
    const bare = await wateredYard(test, { zones: [], latitudeDeg: -36.8, longitudeDeg: 174.8, timeZone: 'Pacific/Auckland' });
    const found = await season(bare);
    expect(found.grasses).toHaveLength(1);
    expect(found.grasses[0]?.zones).toEqual([]);
    // autumn there is March and April
    expect(found.grasses[0]?.sowing.some((window) => /-0[1-4]-/.test(window.fromOn))).toBe(true);
  });
});
