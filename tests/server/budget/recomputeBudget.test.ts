import { QueryTypes } from 'sequelize';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import { factsChanged } from '@/server/commands/factsChanged';
import { refreshYard } from '@/server/commands/refreshYard';
import { BudgetDay, Observation, RainEntry, WeatherDay, Yard, Zone } from '@/server/models';
import { civilDayAt } from '@/shared/time';
import { wateredYard, type WateredYard } from '../../factories/wateredYard';
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
  weather.elevationM = null;
  weather.change = (day) => day;
});
afterAll(async () => {
  await test.close();
  await weather.close();
});

const refresh = (yard: WateredYard) => refreshYard(test.context, yard.id, { cause: 'test', fetchWeather: true });
const daysOf = (yard: WateredYard, zone = 0) => BudgetDay.findAll({ where: { yardId: yard.id, zoneId: yard.zones[zone]?.id ?? '' }, order: [['on', 'ASC']] });
interface Inputs { grossIrrigationMm: number; unevenLossMm: number; patchDepletionMm: Record<string, number>; assumptions: { field: string }[]; stage: string | null }
const inputsOf = (day: BudgetDay | undefined) => day?.inputs as Inputs;
const only = <T>(value: T | undefined): T => {
  if (value === undefined) {
    throw new Error('nothing there');
  }
  return value;
};

describe('the water budget over a season of sample weather', () => {
  it('has every day of every zone once, closed and chained, through daily runs, a pause and two kinds of ground', async () => {
    test.clock.set('2026-04-01T10:00:00Z');
    const yard = await wateredYard(test, { zones: [{ name: 'Old lawn', soil: 'sandy_loam' }, { name: 'New seed', seededOn: '2026-04-03', sunHours: 6 }, { name: 'Shade', sunHours: 3, soil: 'clay' }] });
    const pauses = [1, 1, 1, 2, 1, 14, 3, 1, 7];
    let step = 0;
    while (civilDayAt(test.clock.now(), yard.timeZone) < '2026-09-30') {
      const today = civilDayAt(test.clock.now(), yard.timeZone);
      if (step % 3 === 0) {
        await yard.water({ zone: step % 2, on: today, position: step % 2, appliedMm: 9 + (step % 5), runTimeMultiplier: 1 + (step % 4) / 10, roundIndex: step });
        await factsChanged(test.context.database, yard.id, today);
      }
      if (step % 7 === 2) {
        await Observation.create({ yardId: yard.id, zoneId: only(yard.zones[step % 3]).id, on: today, kind: 'screwdriver', feel: step % 2 === 0 ? 'hard' : 'easy', updatedAt: test.clock.now() });
        await factsChanged(test.context.database, yard.id, today);
      }
      await refresh(yard);
      test.clock.advance(only(pauses[step % pauses.length]) * 1440);
      step += 1;
    }
    await refresh(yard);
    const today = civilDayAt(test.clock.now(), yard.timeZone);

    // Summed by the database alone: what every row and the whole season took and gave.
    const zones = await test.context.database.query<{ days: number; first: string; last: string; forecast: number; worstRowMm: number; brokenChain: number; seasonMm: number; irrigationMm: number; observations: number; outOfBounds: number }>(
      `SELECT count(*)::int AS days, min("on")::text AS first, max("on")::text AS last, count(*) FILTER (WHERE is_forecast)::int AS forecast,
         max(abs(depletion_start_mm + etc_mm + root_growth_mm + observation_mm - effective_rain_mm - irrigation_mm + drainage_mm - depletion_end_mm)) AS "worstRowMm",
         count(*) FILTER (WHERE before_mm IS NOT NULL AND abs(before_mm - depletion_start_mm) > 1e-9)::int AS "brokenChain",
         abs((array_agg(depletion_end_mm ORDER BY "on" DESC))[1] - (array_agg(depletion_start_mm ORDER BY "on"))[1]
           - sum(etc_mm + root_growth_mm + observation_mm - effective_rain_mm - irrigation_mm + drainage_mm)) AS "seasonMm",
         sum(irrigation_mm) AS "irrigationMm", count(*) FILTER (WHERE observation_mm <> 0)::int AS observations,
         count(*) FILTER (WHERE depletion_end_mm < 0 OR depletion_end_mm > total_available_mm + 1e-9 OR refill_line_mm > total_available_mm OR shaded_et0_mm > et0_mm + 1e-9)::int AS "outOfBounds"
       FROM (SELECT *, lag(depletion_end_mm) OVER (PARTITION BY zone_id ORDER BY "on") AS before_mm FROM budget_days WHERE yard_id = $1) d GROUP BY zone_id`,
      { bind: [yard.id], type: QueryTypes.SELECT },
    );
    expect(zones).toHaveLength(3);
    for (const zone of zones) {
      expect(zone).toMatchObject({ first: '2026-04-01', last: addDays(today, 9), days: daysBetween('2026-04-01', today) + 10, forecast: 10, brokenChain: 0, outOfBounds: 0 });
      expect(zone.worstRowMm).toBeLessThanOrEqual(1e-6);
      expect(zone.seasonMm).toBeLessThanOrEqual(1e-4);
    }
    expect(zones.filter((zone) => zone.irrigationMm > 0)).toHaveLength(2);
    expect(zones.every((zone) => zone.observations > 1)).toBe(true);
    const sown = await daysOf(yard, 1);
    const stages = sown.map((day) => inputsOf(day).stage);
    expect([...new Set(stages)]).toEqual(['sown', 'coming_up', 'rooting', 'taper', 'established']);
    expect(only(sown[0]).rootDepthM).toBeLessThan(only(sown[150]).rootDepthM);
    // less light, less water: the same weather over shade
    const used = (days: BudgetDay[]) => days.reduce((sum, day) => sum + day.shadedEt0Mm, 0);
    expect(used(await daysOf(yard, 2))).toBeLessThan(0.9 * used(await daysOf(yard, 0)));
  }, 120_000);
});

describe('a changed fact', () => {
  it('is reckoned from its day on; the days before stay as they were written', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-05-10T12:00:00Z' }] });
    await refresh(yard);
    const before = await daysOf(yard);
    test.clock.advance(60);
    await RainEntry.create({ yardId: yard.id, on: '2026-06-01', depthMm: 7, updatedAt: test.clock.now() });
    await factsChanged(test.context.database, yard.id, '2026-06-01');
    await refreshYard(test.context, yard.id, { cause: 'test' });
    const after = await daysOf(yard);
    expect(after).toHaveLength(before.length);
    after.forEach((day, index) => {
      const isBefore = day.on < '2026-06-01';
      expect(day.computedAt).toEqual(isBefore ? only(before[index]).computedAt : test.clock.now());
      if (isBefore) {
        expect(day.get()).toEqual(only(before[index]).get());
      }
    });
    expect((await Yard.findByPk(yard.id))?.budgetStaleFrom).toBeNull();
  });

  it('from before the record began is taken from its beginning', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-05T12:00:00Z' }] });
    await refresh(yard);
    await factsChanged(test.context.database, yard.id, '2026-01-01');
    await refreshYard(test.context, yard.id, { cause: 'test' });
    expect(only((await daysOf(yard))[0]).on).toBe('2026-06-05');
  });

  it('of the soil keeps the chain of days although the root zone holds less', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-04-20T12:00:00Z', soil: 'silt', grass: 'tall_fescue' }] });
    await refresh(yard);
    await Zone.update({ soil: 'sand' }, { where: { id: only(yard.zones[0]).id } });
    await factsChanged(test.context.database, yard.id, '2026-06-10');
    await refreshYard(test.context, yard.id, { cause: 'test' });
    const days = await daysOf(yard);
    days.slice(1).forEach((day, index) => expect(day.depletionStartMm).toBeCloseTo(only(days[index]).depletionEndMm, 9));
    expect(only(days.find((day) => day.on === '2026-06-10')).totalAvailableMm).toBeLessThan(only(days.find((day) => day.on === '2026-06-09')).totalAvailableMm);
  });
});

describe('rain', () => {
  it('from the yard\'s own gauge overrules the weather, and gives way again when it is taken back', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-01T12:00:00Z' }] });
    await refresh(yard);
    const told = only((await daysOf(yard)).find((day) => day.on === '2026-06-08'));
    await RainEntry.create({ yardId: yard.id, on: '2026-06-08', depthMm: told.rainMm + 11.5, updatedAt: test.clock.now() });
    await factsChanged(test.context.database, yard.id, '2026-06-08');
    await refreshYard(test.context, yard.id, { cause: 'test' });
    const measured = only((await daysOf(yard)).find((day) => day.on === '2026-06-08'));
    expect(measured).toMatchObject({ rainSource: 'gauge', rainMm: told.rainMm + 11.5 });
    expect(measured.depletionEndMm).toBeLessThan(told.depletionEndMm + 1e-9);
    await RainEntry.destroy({ where: { yardId: yard.id } });
    await factsChanged(test.context.database, yard.id, '2026-06-08');
    await refreshYard(test.context, yard.id, { cause: 'test' });
    expect(only((await daysOf(yard)).find((day) => day.on === '2026-06-08'))).toMatchObject({ rainSource: 'weather', rainMm: told.rainMm, depletionEndMm: told.depletionEndMm });
  });

  it('says where it comes from: the weather before today, the forecast from today on, nothing where nobody knows', async () => {
    weather.change = (day) => (day.on === '2026-06-11' ? { ...day, precipitationMm: null } : day);
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-10T12:00:00Z' }] });
    await refresh(yard);
    const days = await daysOf(yard);
    expect(days.slice(0, 5).map((day) => [day.on, day.rainSource])).toEqual([
      ['2026-06-10', 'weather'], ['2026-06-11', 'none'], ['2026-06-12', 'weather'], ['2026-06-13', 'forecast'], ['2026-06-14', 'forecast'],
    ]);
    expect(inputsOf(days[1]).assumptions.map((one) => one.field)).toContain('precipitationMm');
  });
});

describe('irrigation', () => {
  it('is credited net of unevenness and by share of the zone; the rest is kept beside the day', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-01T12:00:00Z' }] });
    await yard.water({ on: '2026-06-12', position: 0, appliedMm: 12, runTimeMultiplier: 1.2 });
    await refresh(yard);
    const days = await daysOf(yard);
    const day = only(days.find((one) => one.on === '2026-06-12'));
    // 12 mm on one half of the zone: 6 over the zone, of which 12 ÷ 1.2 × ½ = 5 count
    expect(day.irrigationMm).toBeCloseTo(5, 9);
    expect(inputsOf(day)).toMatchObject({ grossIrrigationMm: 6 });
    expect(inputsOf(day).unevenLossMm).toBeCloseTo(1, 9);
    const [wet = '', dry = ''] = only(yard.zones[0]).positionIds;
    const { patchDepletionMm } = inputsOf(day);
    expect(only(patchDepletionMm[wet])).toBeLessThan(day.depletionEndMm);
    expect(only(patchDepletionMm[dry])).toBeGreaterThan(day.depletionEndMm);
  });

  it('of a set that was skipped is none', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-10T12:00:00Z' }] });
    await yard.water({ on: '2026-06-12', status: 'skipped' });
    await refresh(yard);
    expect((await daysOf(yard)).every((day) => day.irrigationMm === 0)).toBe(true);
  });
});

describe('the start of a record', () => {
  it('takes the root zone for half-way to its refill line and says so', async () => {
    const yard = await wateredYard(test);
    await refresh(yard);
    const [first, second] = await daysOf(yard);
    expect(only(first).on).toBe('2026-06-13');
    expect(only(first).depletionStartMm).toBeCloseTo(only(first).refillLineMm / 2, 9);
    expect(inputsOf(first).assumptions.map((one) => one.field)).toContain('depletionStartMm');
    expect(inputsOf(second).assumptions.map((one) => one.field)).not.toContain('depletionStartMm');
  });
});

describe('the database', () => {
  it('refuses a day that does not close', async () => {
    const yard = await wateredYard(test);
    await refresh(yard);
    const day = only((await daysOf(yard))[0]);
    await expect(day.update({ depletionEndMm: day.depletionEndMm + 0.02 })).rejects.toThrow(/budget_day_closes/);
    await expect(day.update({ rainLossMm: day.rainLossMm + 0.02 })).rejects.toThrow(/budget_rain_splits/);
  });
});

describe('stored weather', () => {
  it('is asked for sixty days back and ten ahead, and farther back once for an older sowing', async () => {
    const yard = await wateredYard(test, { zones: [{ seededOn: '2026-04-10' }] });
    await refresh(yard);
    await refresh(yard);
    const asked = weather.asked.slice(-2);
    expect(asked[0]).toMatchObject({ fromOn: '2026-03-30', toOn: '2026-06-23', timeZone: 'America/New_York' });
    expect(asked[1]).toMatchObject({ fromOn: '2026-04-14' });
    expect(await WeatherDay.count({ where: { yardId: yard.id } })).toBe(daysBetween('2026-03-30', '2026-06-24'));
    expect(await WeatherDay.count({ where: { yardId: yard.id, isForecast: true } })).toBe(11);
  });

  it('that the service corrects for a past day is reckoned from that day', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-05-20T12:00:00Z' }] });
    await refresh(yard);
    const before = await daysOf(yard);
    test.clock.advance(30);
    weather.change = (day) => (day.on === '2026-06-05' ? { ...day, precipitationMm: (day.precipitationMm ?? 0) + 20 } : day);
    await refresh(yard);
    const after = await daysOf(yard);
    const changed = after.filter((day, index) => day.computedAt > only(before[index]).computedAt);
    expect(only(changed[0]).on).toBe('2026-06-05');
    expect(only(after.find((day) => day.on === '2026-06-05')).rainMm).toBeCloseTo(only(before.find((day) => day.on === '2026-06-05')).rainMm + 20, 9);
  });

  it('brings the height of the place when nobody told it, and reckons everything with it', async () => {
    weather.elevationM = 1610;
    const yard = await wateredYard(test, { elevationIsDefault: true, zones: [{ createdAt: '2026-06-01T12:00:00Z' }] });
    const told = await wateredYard(test, { elevationIsDefault: false, zones: [{ createdAt: '2026-06-01T12:00:00Z' }] });
    await refresh(yard);
    await refresh(told);
    expect(await Yard.findByPk(yard.id)).toMatchObject({ elevationM: 1610, elevationIsDefault: true });
    expect(await Yard.findByPk(told.id)).toMatchObject({ elevationM: 20 });
    expect(only((await daysOf(yard))[0]).et0Mm).not.toBeCloseTo(only((await daysOf(told))[0]).et0Mm, 3);
  });

  it('with a hole of days is bridged from the days near it, and the day says so', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-01T12:00:00Z' }] });
    await refresh(yard);
    await WeatherDay.destroy({ where: { yardId: yard.id, on: ['2026-06-06', '2026-06-07'] } });
    await factsChanged(test.context.database, yard.id, '2026-06-02');
    await refreshYard(test.context, yard.id, { cause: 'test' });
    const days = await daysOf(yard);
    const hole = only(days.find((day) => day.on === '2026-06-06'));
    const five = days.filter((day) => day.on >= '2026-05-30' && day.on <= '2026-06-05');
    expect(hole.et0Mm).toBeGreaterThan(0.5 * Math.min(...five.map((day) => day.et0Mm)));
    expect(hole.rainSource).toBe('none');
    expect(inputsOf(hole).assumptions.map((one) => one.field)).toEqual(expect.arrayContaining(['et0Mm', 'precipitationMm']));
  });
});
