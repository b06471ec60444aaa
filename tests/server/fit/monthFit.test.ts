import { randomUUID } from 'node:crypto';
import supertest from 'supertest';
import { Hose, Position, WaterRule } from '@/server/models';
import type { MonthFitResponse } from '@/shared/contracts/fit';
import { wateredYard, type WateredYard, type YardWish } from '../../factories/wateredYard';
import { SwitchableWeather } from '../../setup/switchableWeather';
import { testContext, type TestContext } from '../../setup/testContext';

jest.setTimeout(120_000);
let test: TestContext;
const weather = new SwitchableWeather();
beforeAll(async () => { test = await testContext({ weather }); });
beforeEach(() => {
  // Saturday 13 June 2026, 05:00 in New York
  test.clock.set('2026-06-13T09:00:00Z');
  weather.isOut = false;
});
afterAll(async () => {
  await test.close();
  await weather.close();
});

const ask = (yard: WateredYard) => supertest(test.app).get(`/api/yards/${yard.id}/fit`).set(yard.owner.headers);
async function fitOf(yard: WateredYard): Promise<MonthFitResponse> {
  const answer = await ask(yard);
  expect([answer.status, (answer.body as { error?: unknown }).error]).toEqual([200, undefined]);
  return answer.body as MonthFitResponse;
}
/** A lawn that the tap cannot keep up with in an hour a day. */
const large: YardWish = { zones: [{ areaM2: 400, name: 'Front' }, { areaM2: 300, name: 'Back', priority: 300 }], hours: [{ fromMinutes: 360, toMinutes: 420 }] };

describe('the year of a yard', () => {
  it('has twelve months from this one, more water wanted in July than in October, and the hours at home of each', async () => {
    const fit = await fitOf(await wateredYard(test, { zones: [{ areaM2: 120 }] }));
    expect(fit.months.map((month) => month.month)).toEqual(['2026-06', '2026-07', '2026-08', '2026-09', '2026-10', '2026-11', '2026-12', '2027-01', '2027-02', '2027-03', '2027-04', '2027-05']);
    const [, july, , , october] = fit.months;
    expect(july?.neededHours).toBeGreaterThan(3 * (october?.neededHours ?? 0));
    // 31 mornings from 5:30 to 8:00, less five minutes to get ready.
    expect(july?.hadHours).toBeCloseTo((31 * 145) / 60, 6);
    expect(fit).toMatchObject({ fits: true, remedies: [], leftOut: { zoneIds: [] } });
  });

  it('rests on the years on record, and counts their rain', async () => {
    const fit = await fitOf(await wateredYard(test));
    expect(fit.climate).toMatchObject({ years: 4, sample: true, isEstimated: false, asOfYear: 2025 });
    expect(fit.climate.source).toContain('New York');
    // New York has some 1,100 to 1,200 mm of rain a year (National Weather Service normals, from memory).
    const rainMm = fit.months.reduce((sum, month) => sum + month.rainMm, 0);
    expect(rainMm).toBeGreaterThan(900);
    expect(rainMm).toBeLessThan(1_500);
    expect(fit.months.some((month) => month.mostHours > month.leastHours + 1)).toBe(true);
  });

  it('that does not fit says what would help, each with its gain, the best first', async () => {
    const yard = await wateredYard(test, large);
    const hoseId = randomUUID();
    await Hose.create({ id: hoseId, yardId: yard.id, name: 'Old hose', lengthM: 30, boreMm: 12.7 });
    await Position.update({ hoseId }, { where: { yardId: yard.id } });
    const fit = await fitOf(yard);
    expect(fit.fits).toBe(false);
    expect(fit.tightestMonth).not.toBeNull();
    const kinds = fit.remedies.map((remedy) => remedy.kind);
    expect(kinds).toEqual(expect.arrayContaining(['fatter_hose', 'shut_off_timer', 'second_tap', 'helper_hour', 'rest_zones']));
    fit.remedies.slice(1).forEach((remedy, index) => expect(remedy.leftYearHours).toBeGreaterThanOrEqual(fit.remedies[index]?.leftYearHours ?? 0));
    expect(fit.remedies.find((remedy) => remedy.kind === 'rest_zones')).toMatchObject({ zoneIds: [yard.zones[1]?.id] });
  });

  it('keeps to the water rules', async () => {
    const yard = await wateredYard(test, large);
    const before = await fitOf(yard);
    await WaterRule.create({ id: randomUUID(), yardId: yard.id, name: 'Two days', weekdays: [2, 6], source: 'Town code', sourceOn: '2026-05-01' });
    const after = await fitOf(yard);
    const july = (fit: MonthFitResponse) => fit.months.find((month) => month.month === '2026-07');
    expect(july(after)?.hadHours).toBeCloseTo(((july(before)?.hadHours ?? 0) * 8) / 31, 6);
    expect(july(after)?.neededHours).toBeCloseTo(july(before)?.neededHours ?? 0, 6);
  });

  it('counts the doses of a sowing to come and offers another month for it', async () => {
    const yard = await wateredYard(test, { ...large, zones: [{ areaM2: 300 }, { areaM2: 150, seededOn: '2026-07-01' }] });
    const fit = await fitOf(yard);
    expect(fit.months.find((month) => month.month === '2026-07')?.doseHours).toBeGreaterThan(2);
    const sow = fit.remedies.find((remedy) => remedy.kind === 'sow_another_month');
    expect(sow).toMatchObject({ zoneId: yard.zones[1]?.id });
  });

  it('marks what nobody told, and names zones without a position', async () => {
    const yard = await wateredYard(test, { zones: [{}, { positions: 0 }] });
    const fit = await fitOf(yard);
    expect(fit.defaults).toEqual({ hours: false, flow: false, rates: 2, moveMinutes: 5 });
    expect(fit.leftOut.zoneIds).toEqual([yard.zones[1]?.id]);
  });

  it('is estimated from the days that are known while the service has no past years, and asked again later', async () => {
    const yard = await wateredYard(test);
    await supertest(test.app).get(`/api/yards/${yard.id}/plan`).set(yard.owner.headers).expect(200);
    weather.isOut = true;
    const fit = await fitOf(yard);
    expect(fit.climate).toMatchObject({ years: 1, isEstimated: true });
    expect(fit.months.some((month) => month.isEstimated)).toBe(true);
    weather.isOut = false;
    expect((await fitOf(yard)).climate.isEstimated).toBe(false);
  });

  it('is refused with a sentence while nothing at all is known of the weather', async () => {
    const yard = await wateredYard(test);
    weather.isOut = true;
    const answer = await ask(yard);
    expect([answer.status, (answer.body as { error: { code: string } }).error.code]).toEqual([503, 'weather_unavailable']);
  });

  it('of a yard without anything is empty and fits', async () => {
    const fit = await fitOf(await wateredYard(test, { zones: [] }));
    expect(fit).toMatchObject({ fits: true, tightestMonth: null, remedies: [] });
  });
});
