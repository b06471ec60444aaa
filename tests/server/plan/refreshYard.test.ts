import { randomUUID } from 'node:crypto';
import { checkPlan } from '@/scheduling/planning/checkPlan';
import { morningDepletionMm } from '@/scheduling/budget';
import { addDays } from '@/scheduling/units/civilDay';
import { factsChanged } from '@/server/commands/factsChanged';
import { ensureFresh, refreshYard } from '@/server/commands/refreshYard';
import type { AppContext } from '@/server/context';
import { BudgetDay, Plan, PlanSet, Reminder, Round, RoundSet, WeatherFetch, Yard, Zone } from '@/server/models';
import type { PlanInput, PlanResult } from '@/scheduling/planning';
import { civilDayAt, minutesAt } from '@/shared/time';
import { wateredYard, type WateredYard } from '../../factories/wateredYard';
import { SwitchableWeather } from '../../setup/switchableWeather';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
const weather = new SwitchableWeather();
/** A dry warm spell, so that established grass comes due within the plan. */
const dry = (day: Parameters<typeof weather.change>[0]) => ({ ...day, precipitationMm: 0, tminC: 15, tmaxC: 29, windMps: 2 });
beforeAll(async () => {
  test = await testContext({ weather });
});
beforeEach(() => {
  // Saturday 13 June 2026, 05:00 in New York
  test.clock.set('2026-06-13T09:00:00Z');
  weather.isOut = false;
  weather.change = dry;
});
afterAll(async () => {
  await test.close();
  await weather.close();
});

const refresh = (yard: WateredYard, cause = 'test') => refreshYard(test.context, yard.id, { cause });
const newest = async (yard: WateredYard): Promise<Plan> => {
  const plan = await Plan.findOne({ where: { yardId: yard.id }, order: [['version', 'DESC']] });
  if (!plan) {
    throw new Error('there is no plan');
  }
  return plan;
};
const setsOf = async (yard: WateredYard, on?: string) => PlanSet.findAll({
  where: { yardId: yard.id, planId: (await newest(yard)).id, ...(on === undefined ? {} : { on }) }, order: [['startAt', 'ASC']],
});
/** Makes every zone of the yard thirsty at the start of today. */
const thirsty = async (yard: WateredYard) => {
  await Zone.update({ createdAt: new Date(test.clock.now().getTime() - 12 * 86_400_000) }, { where: { yardId: yard.id } });
};
/** The same server with a planner that keeps what it was asked and what it answered. */
function listening(): { context: AppContext; heard: { input: PlanInput; result: PlanResult }[] } {
  const heard: { input: PlanInput; result: PlanResult }[] = [];
  const { planner } = test.context;
  const context: AppContext = {
    ...test.context,
    planner: {
      name: planner.name,
      plan(input) {
        const result = planner.plan(input);
        heard.push({ input, result });
        return result;
      },
    },
  };
  return { context, heard };
}
/** Sets of one tap never overlap in real time and leave the minutes of a move. */
function expectNoOverlap(sets: readonly PlanSet[], moveMinutes = 5): void {
  sets.slice(1).forEach((set, index) => {
    const before = sets[index];
    if (before && before.tapId === set.tapId) {
      const gapMinutes = (set.startAt.getTime() - before.endAt.getTime()) / 60_000;
      expect(gapMinutes).toBeGreaterThanOrEqual(before.positionId === set.positionId ? 0 : moveMinutes);
    }
  });
}

describe('a plan', () => {
  it('covers ten days from today in the yard\'s own hours, with instants, reasons, weather and facts it rests on', async () => {
    const yard = await wateredYard(test, { zones: [{}, { seededOn: '2026-06-08' }] });
    await thirsty(yard);
    const { context, heard } = listening();
    expect(await refreshYard(context, yard.id, { cause: 'morning' })).toEqual({ planVersion: 1, weatherAnswered: true });
    const plan = await newest(yard);
    expect(plan).toMatchObject({ version: 1, fromOn: '2026-06-13', toOn: '2026-06-22', cause: 'morning', planner: test.context.planner.name, factsVersion: 0, weatherAsOf: test.clock.now() });
    const sets = await setsOf(yard);
    expect(sets.filter((set) => set.kind === 'set').length).toBeGreaterThan(3);
    expect(sets.filter((set) => set.kind === 'dose').length).toBeGreaterThan(9);
    for (const set of sets) {
      expect(set.reasons.length).toBeGreaterThan(0);
      expect(civilDayAt(set.startAt, yard.timeZone)).toBe(set.on);
      expect(minutesAt(set.startAt, yard.timeZone)).toBe(set.startMinutes);
      expect(set.endAt.getTime() - set.startAt.getTime()).toBe(set.minutes * 60_000);
      expect(set.startMinutes).toBeGreaterThanOrEqual(330);
      expect(set.startMinutes + set.minutes).toBeLessThanOrEqual(480);
    }
    expectNoOverlap(sets);
    // the independent checker of plans finds nothing against it
    const [asked] = heard;
    expect(asked && checkPlan(asked.input, asked.result)).toEqual([]);
    expect(asked?.input.days.map((day) => day.on)).toEqual(Array.from({ length: 10 }, (_, index) => addDays('2026-06-13', index)));
    const budget = await BudgetDay.findOne({ where: { yardId: yard.id, zoneId: yard.zones[0]?.id ?? '', on: '2026-06-13' } });
    expect(asked?.input.zones[0]).toMatchObject({ depletionMm: budget && morningDepletionMm(budget), refillLineMm: budget?.refillLineMm, totalAvailableMm: budget?.totalAvailableMm });
    // sunrise and sunset of 13 June at 40.93 N 73.90 W: 5:23 and 20:28 EDT to a few minutes (checked with the almanac's rule of thumb, from memory)
    expect(Math.abs((asked?.input.days[0]?.sunriseMinutes ?? 0) - 323)).toBeLessThanOrEqual(4);
    expect(Math.abs((asked?.input.days[0]?.sunsetMinutes ?? 0) - 1228)).toBeLessThanOrEqual(4);
  });

  it('follows patches apart: what was watered yesterday waits, its dry neighbour does not', async () => {
    const yard = await wateredYard(test, { zones: [{ createdAt: '2026-06-03T12:00:00Z' }] });
    await yard.water({ on: '2026-06-12', position: 0, appliedMm: 25 });
    const { context, heard } = listening();
    await refreshYard(context, yard.id, { cause: 'test' });
    const [wet, dryOne] = heard[0]?.input.positions ?? [];
    expect(wet?.depletionMm).toBeLessThan(10);
    expect(dryOne?.depletionMm).toBeGreaterThan((wet?.depletionMm ?? 0) + 15);
    expect(new Set((await setsOf(yard, '2026-06-13')).map((set) => set.positionId))).toEqual(new Set([yard.zones[0]?.positionIds[1]]));
  });

  it('keeps thirty versions', async () => {
    const yard = await wateredYard(test);
    for (let count = 0; count < 33; count += 1) {
      await refresh(yard);
    }
    const plans = await Plan.findAll({ where: { yardId: yard.id }, order: [['version', 'ASC']] });
    expect(plans.map((plan) => plan.version)).toEqual(Array.from({ length: 30 }, (_, index) => index + 4));
    expect(await PlanSet.count({ where: { yardId: yard.id, planId: plans.map((plan) => plan.id) } })).toBe(await PlanSet.count({ where: { yardId: yard.id } }));
  }, 30_000);

  it('of a yard that lacks everything says what is missing', async () => {
    const id = randomUUID();
    await Yard.create({
      id, name: 'Bare', placeName: 'Nowhere', latitudeDeg: 44, longitudeDeg: -90, elevationM: 200, elevationIsDefault: true, timeZone: 'America/Chicago', units: 'us',
      moveMinutes: 5, moveMinutesIsDefault: true, reminderLeadMinutes: 20,
    });
    await refreshYard(test.context, id, { cause: 'test' });
    const plan = await Plan.findOne({ where: { yardId: id } });
    expect(plan?.result.missing.map((reason) => reason.code)).toEqual(expect.arrayContaining(['no_zones', 'no_taps', 'no_home_hours']));
  });
});

describe('a round that was started or skipped', () => {
  /** Starts the first round of today as the round's own command does. */
  async function start(yard: WateredYard): Promise<Round> {
    const first = (await setsOf(yard, '2026-06-13')).filter((set) => set.roundIndex === 0);
    const now = test.clock.now();
    const round = await Round.create({ id: randomUUID(), yardId: yard.id, on: '2026-06-13', roundIndex: 0, status: 'running', startedAt: now });
    for (const [index, set] of first.entries()) {
      await RoundSet.create({
        id: randomUUID(), yardId: yard.id, roundId: round.id, zoneId: set.zoneId, positionId: set.positionId, kind: set.kind, on: set.on, roundIndex: 0, sortOrder: set.sortOrder,
        plannedStartAt: set.startAt, plannedMinutes: set.minutes, rateMmPerHour: (set.grossMm * 60) / set.minutes, runTimeMultiplier: set.grossMm / set.depthMm, zoneShare: 0.5,
        status: index === 0 ? 'running' : 'waiting', startedAt: index === 0 ? now : null,
      });
    }
    return round;
  }

  it('keeps its place, number and sets in every later plan of the day, and nothing is laid into its time', async () => {
    const yard = await wateredYard(test, { hours: [{ fromMinutes: 330, toMinutes: 480 }, { fromMinutes: 1080, toMinutes: 1200 }], zones: [{ soil: 'sand' }] });
    await thirsty(yard);
    await refresh(yard);
    const planned = (await setsOf(yard, '2026-06-13')).filter((set) => set.roundIndex === 0);
    expect(planned.length).toBeGreaterThan(1);
    test.clock.set(planned[0]?.startAt ?? '');
    await start(yard);
    test.clock.advance(5);
    await factsChanged(test.context.database, yard.id, '2026-06-13');
    await ensureFresh(test.context, yard.id);
    const again = await setsOf(yard, '2026-06-13');
    const kept = again.filter((set) => set.roundIndex === 0);
    const essence = (set: PlanSet) => [set.positionId, set.startAt, set.endAt, set.minutes, set.depthMm, set.sortOrder];
    expect(kept.map(essence)).toEqual(planned.map(essence));
    const end = Math.max(...kept.map((set) => set.endAt.getTime()));
    for (const set of again.filter((one) => one.roundIndex > 0)) {
      expect(set.startAt.getTime()).toBeGreaterThan(end);
    }
    // the water that is running counts: the same ground is not planned again today
    expect(again.filter((set) => set.roundIndex > 0 && planned.some((one) => one.positionId === set.positionId))).toEqual([]);
  });

  it('that was skipped is not planned again on its day, today or later, and comes back after it', async () => {
    const yard = await wateredYard(test, { hours: [{ fromMinutes: 330, toMinutes: 480 }, { fromMinutes: 1080, toMinutes: 1200 }] });
    await thirsty(yard);
    await refresh(yard);
    const planned = await setsOf(yard);
    const [firstOn = '', laterOn = ''] = [...new Set(planned.filter((set) => set.kind === 'set').map((set) => set.on))];
    expect(firstOn).toBe('2026-06-13');
    for (const on of [firstOn, laterOn]) {
      for (const set of planned.filter((one) => one.on === on)) {
        const place = yard.zones[0]?.positionIds.indexOf(set.positionId) ?? 0;
        await yard.water({ on, position: place, status: 'skipped', roundIndex: set.roundIndex, startMinutes: set.startMinutes });
      }
    }
    await factsChanged(test.context.database, yard.id, null);
    await ensureFresh(test.context, yard.id);
    const again = await setsOf(yard);
    for (const on of [firstOn, laterOn]) {
      const essence = (set: PlanSet) => `${set.roundIndex} ${set.positionId} ${set.startMinutes}`;
      expect(again.filter((set) => set.on === on).map(essence)).toEqual(planned.filter((set) => set.on === on).map(essence));
    }
    expect(again.some((set) => set.on > firstOn && set.on < addDays(firstOn, 4) && set.on !== laterOn)).toBe(true);
  });

  it('of a seedbed leaves the other doses of its day', async () => {
    const yard = await wateredYard(test, {
      hours: [{ fromMinutes: 330, toMinutes: 1200 }],
      zones: [{ seededOn: '2026-06-12', positions: 1, schedule: { stages: [{ stage: 'sown', dosesPerDay: 3, everyDays: 1, depthMm: 2, timesMinutes: [480, 720, 960], forDays: 30 }] } }],
    });
    await refresh(yard);
    const tomorrow = (await setsOf(yard, '2026-06-14')).map((set) => [set.roundIndex, set.startMinutes]);
    expect(tomorrow.map(([, start]) => start)).toEqual([480, 720, 960]);
    await yard.water({ on: '2026-06-13', kind: 'dose', status: 'skipped', roundIndex: 0, startMinutes: 480 });
    await yard.water({ on: '2026-06-14', kind: 'dose', status: 'skipped', roundIndex: 1, startMinutes: 720 });
    await factsChanged(test.context.database, yard.id, null);
    await ensureFresh(test.context, yard.id);
    for (const on of ['2026-06-13', '2026-06-14']) {
      expect((await setsOf(yard, on)).map((set) => set.startMinutes).sort((a, b) => a - b)).toEqual([480, 720, 960]);
    }
    // the skipped ones are those carried over, the others were planned anew after them
    expect((await setsOf(yard, '2026-06-14')).filter((set) => set.roundIndex === 1).map((set) => set.startMinutes)).toEqual([720]);
  });
});

describe('bringing up to date', () => {
  it('does nothing for a yard that is up to date, and plans anew when a fact, the day or the plan itself calls for it', async () => {
    const yard = await wateredYard(test);
    expect(await ensureFresh(test.context, yard.id)).toBe(true);
    expect(await newest(yard)).toMatchObject({ version: 1, cause: 'first plan' });
    expect(await ensureFresh(test.context, yard.id)).toBe(false);
    await factsChanged(test.context.database, yard.id, null);
    expect(await ensureFresh(test.context, yard.id)).toBe(true);
    expect(await newest(yard)).toMatchObject({ version: 2, cause: 'facts changed', factsVersion: 1 });
    test.clock.advance(1440);
    expect(await ensureFresh(test.context, yard.id)).toBe(true);
    expect(await newest(yard)).toMatchObject({ version: 3, cause: 'new day', fromOn: '2026-06-14' });
    expect(await ensureFresh(test.context, yard.id)).toBe(false);
  });

  it('is done once when two servers find a yard behind at the same moment', async () => {
    const yard = await wateredYard(test);
    await refresh(yard);
    await factsChanged(test.context.database, yard.id, '2026-06-13');
    const other = test.secondServer();
    const done = await Promise.all([ensureFresh(test.context, yard.id), ensureFresh(other, yard.id), ensureFresh(test.context, yard.id), ensureFresh(other, yard.id)]);
    expect(done).toContain(true);
    expect((await newest(yard)).version).toBe(2);
    expect((await Yard.findByPk(yard.id))?.budgetStaleFrom).toBeNull();
  });

  it('is whole when two servers are told to do it at the same moment', async () => {
    const yard = await wateredYard(test);
    const other = test.secondServer();
    const outcomes = await Promise.all([refreshYard(test.context, yard.id, { cause: 'a', fetchWeather: true }), refreshYard(other, yard.id, { cause: 'b', fetchWeather: true })]);
    expect(outcomes.map((outcome) => outcome.planVersion).sort()).toEqual([1, 2]);
    expect(await BudgetDay.count({ where: { yardId: yard.id } })).toBe(10);
  });

  it('does not lose a change that is made while it plans', async () => {
    const yard = await wateredYard(test);
    await refresh(yard);
    let changed: Promise<void> = Promise.resolve();
    const context: AppContext = {
      ...test.context,
      planner: {
        name: 'watched',
        plan(input) {
          // made on another connection in the middle of planning; it waits for the yard's row
          changed = new Promise((resolve, reject) => {
            setImmediate(() => factsChanged(test.context.database, yard.id, '2026-06-13').then(resolve, reject));
          });
          return test.context.planner.plan(input);
        },
      },
    };
    await refreshYard(context, yard.id, { cause: 'slow' });
    await changed;
    expect(await ensureFresh(test.context, yard.id)).toBe(true);
    expect(await newest(yard)).toMatchObject({ factsVersion: 1, cause: 'facts changed' });
  });

  it('moves today\'s morning reminder with the plan, and takes it back when nothing is left to do', async () => {
    const yard = await wateredYard(test);
    await thirsty(yard);
    await refresh(yard);
    const [first] = await setsOf(yard, '2026-06-13');
    const reminder = () => Reminder.findOne({ where: { yardId: yard.id, kind: 'morning', subjectKey: '2026-06-13' } });
    expect(await reminder()).toMatchObject({ status: 'waiting', dueAt: new Date((first?.startAt.getTime() ?? 0) - 20 * 60_000) });
    await Zone.update({ resting: true }, { where: { yardId: yard.id } });
    await factsChanged(test.context.database, yard.id, null);
    await ensureFresh(test.context, yard.id);
    expect(await setsOf(yard, '2026-06-13')).toEqual([]);
    expect((await reminder())?.status).toBe('cancelled');
  });
});

describe('when the weather service is out', () => {
  it('plans on what is stored and says from when that is', async () => {
    const yard = await wateredYard(test);
    await refresh(yard);
    const answeredAt = test.clock.now();
    weather.isOut = true;
    test.clock.advance(3 * 1440);
    expect(await refreshYard(test.context, yard.id, { cause: 'morning', fetchWeather: true })).toEqual({ planVersion: 2, weatherAnswered: false });
    expect(await newest(yard)).toMatchObject({ fromOn: '2026-06-16', toOn: '2026-06-25', weatherAsOf: answeredAt });
    expect(await WeatherFetch.findByPk(yard.id)).toMatchObject({ answeredAt, askedAt: test.clock.now(), lastError: 'The weather service gave no usable answer.', sample: true });
    // the last two days lie beyond what the service had told
    const days = await BudgetDay.findAll({ where: { yardId: yard.id, zoneId: yard.zones[0]?.id ?? '' }, order: [['on', 'DESC']], limit: 2 });
    expect(days.map((day) => day.on)).toEqual(['2026-06-25', '2026-06-24']);
    expect(days.every((day) => day.et0Mm > 1 && day.rainSource === 'none')).toBe(true);
    weather.isOut = false;
    await refreshYard(test.context, yard.id, { cause: 'morning', fetchWeather: true });
    expect(await WeatherFetch.findByPk(yard.id)).toMatchObject({ answeredAt: test.clock.now(), lastError: null });
  });

  it('asks again only after a while for a yard of which no weather is known', async () => {
    const yard = await wateredYard(test);
    weather.isOut = true;
    const before = weather.asked.length;
    expect(await ensureFresh(test.context, yard.id)).toBe(true);
    expect(await ensureFresh(test.context, yard.id)).toBe(false);
    expect(weather.asked.length).toBe(before + 1);
    expect(await Plan.count({ where: { yardId: yard.id } })).toBe(0);
    test.clock.advance(15);
    weather.isOut = false;
    expect(await ensureFresh(test.context, yard.id)).toBe(true);
    expect((await newest(yard)).version).toBe(1);
  });

  it('keeps an error of our own an error', async () => {
    const yard = await wateredYard(test);
    const context: AppContext = { ...test.context, weather: { ...test.context.weather, fetchDays: () => Promise.reject(new TypeError('broken')) } };
    await expect(refreshYard(context, yard.id, { cause: 'test', fetchWeather: true })).rejects.toThrow('broken');
  });
});

describe('clocks and places', () => {
  it.each([
    ['spring, clocks put forward', '2026-03-07T12:00:00Z', '2026-03-08'],
    ['autumn, clocks put back', '2026-10-31T12:00:00Z', '2026-11-01'],
  ])('plans the night of the change in %s without a set in an hour that is not there, or two at once', async (_name, now, changeOn) => {
    test.clock.set(now);
    const yard = await wateredYard(test, { hours: [{ fromMinutes: 0, toMinutes: 300 }], shutOffTimer: true, zones: [{ grass: 'bermuda', soil: 'sand', positions: 3 }, { soil: 'sand', positions: 3 }] });
    await thirsty(yard);
    await refresh(yard);
    const sets = await setsOf(yard, changeOn);
    expect(sets.length).toBeGreaterThan(2);
    const all = await setsOf(yard);
    expectNoOverlap(all);
    for (const set of all) {
      expect(civilDayAt(set.startAt, yard.timeZone)).toBe(set.on);
      expect(minutesAt(set.startAt, yard.timeZone)).toBe(set.startMinutes);
      expect(set.startMinutes).toBeLessThan(300);
      expect(set.endAt.getTime() - set.startAt.getTime()).toBe(set.minutes * 60_000);
    }
    if (changeOn === '2026-03-08') {
      expect(sets.every((set) => set.startMinutes < 120 || set.startMinutes >= 180)).toBe(true);
    }
  });

  it('made in the second coming of an autumn hour plans nothing into the past', async () => {
    // 01:40 for the second time
    test.clock.set('2026-11-01T06:40:00Z');
    const yard = await wateredYard(test, { hours: [{ fromMinutes: 60, toMinutes: 300 }], zones: [{ soil: 'sand' }] });
    await thirsty(yard);
    await refresh(yard);
    const sets = await setsOf(yard, '2026-11-01');
    expect(sets.length).toBeGreaterThan(0);
    for (const set of sets) {
      expect(set.startAt.getTime()).toBeGreaterThanOrEqual(test.clock.now().getTime());
    }
    expectNoOverlap(sets);
  });

  it('takes the day of the yard across the date line', async () => {
    // Friday 12 June 11:00 in Greenwich is Saturday 13 June 01:00 on Kiritimati
    test.clock.set('2026-06-12T11:00:00Z');
    weather.change = (day) => day;
    const yard = await wateredYard(test, { latitudeDeg: 1.87, longitudeDeg: -157.4, timeZone: 'Pacific/Kiritimati', zones: [{ grass: 'st_augustine' }] });
    await thirsty(yard);
    const { context, heard } = listening();
    await refreshYard(context, yard.id, { cause: 'test' });
    const plan = await newest(yard);
    expect(plan.fromOn).toBe('2026-06-13');
    const input = heard[0]?.input;
    expect(input?.notBeforeMinutes).toBe(60);
    // near the equator and in the middle of its zone's clock the sun is up from about six to about six
    expect(Math.abs((input?.days[0]?.sunriseMinutes ?? 0) - 387)).toBeLessThan(20);
    expect(Math.abs((input?.days[0]?.sunsetMinutes ?? 0) - 1115)).toBeLessThan(20);
    for (const set of await setsOf(yard)) {
      expect(civilDayAt(set.startAt, 'Pacific/Kiritimati')).toBe(set.on);
    }
  });

  it('gives a yard south of the equator its summer in January', async () => {
    weather.change = (day) => day;
    test.clock.set('2026-01-12T15:00:00Z');
    const south = await wateredYard(test, { latitudeDeg: -36.85, longitudeDeg: 174.76, timeZone: 'Pacific/Auckland' });
    const north = await wateredYard(test, { latitudeDeg: 47.6, longitudeDeg: -122.3, timeZone: 'America/Los_Angeles' });
    await refresh(south);
    await refresh(north);
    const sum = async (yard: WateredYard) => (await BudgetDay.findAll({ where: { yardId: yard.id } })).reduce((total, day) => total + day.et0Mm, 0) / 10;
    expect(await sum(south)).toBeGreaterThan(3);
    expect(await sum(north)).toBeLessThan(1.5);
    expect((await newest(south)).fromOn).toBe('2026-01-13');
  });
});
