import { randomUUID } from 'node:crypto';
import { checkPlan } from '@/scheduling/planning/checkPlan';
import { checkPlanInput } from '@/scheduling/planning/checkPlanInput';
import type { PlanInput, PlanResult } from '@/scheduling/planning';
import { deviceOf } from '@/server/commands/planLimits';
import { partsOfRule } from '@/server/commands/planRules';
import { refreshYard } from '@/server/commands/refreshYard';
import { Hose, Permit, PlanSet, Plan, Position, Round, RoundSet, Sprinkler, WaterRule, Yard, Zone } from '@/server/models';
import type { RoundResponse, TodayResponse } from '@/shared/contracts/rounds';
import type { PlanResponse } from '@/shared/contracts/plans';
import { call } from '../../factories/yards';
import { wateredYard, type WateredYard, type YardWish } from '../../factories/wateredYard';
import { SwitchableWeather } from '../../setup/switchableWeather';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
const weather = new SwitchableWeather();
beforeAll(async () => {
  test = await testContext({ weather });
});
beforeEach(() => {
  // Saturday 13 June 2026, 05:00 in New York
  test.clock.set('2026-06-13T09:00:00Z');
  weather.change = (day) => ({ ...day, precipitationMm: 0, tminC: 15, tmaxC: 29, windMps: 2 });
});
afterAll(async () => {
  await test.close();
  await weather.close();
});

/** A yard whose grass is thirsty, so that sets are due. */
async function thirstyYard(wish: YardWish = {}): Promise<WateredYard> {
  const yard = await wateredYard(test, wish);
  await Zone.update({ createdAt: new Date(test.clock.now().getTime() - 12 * 86_400_000) }, { where: { yardId: yard.id, seededOn: null } });
  return yard;
}

/** Plans a yard and tells what the planner was asked and what it answered. By the word of the independent checker the plan keeps every limit. */
async function planned(yard: WateredYard): Promise<{ input: PlanInput; result: PlanResult }> {
  const heard: { input: PlanInput; result: PlanResult }[] = [];
  const { planner } = test.context;
  await refreshYard({
    ...test.context,
    planner: {
      name: planner.name,
      plan(input) {
        const result = planner.plan(input);
        heard.push({ input, result });
        return result;
      },
    },
  }, yard.id, { cause: 'test' });
  const [only] = heard;
  if (!only) {
    throw new Error('nothing was planned');
  }
  checkPlanInput(only.input);
  expect(checkPlan(only.input, only.result)).toEqual([]);
  return only;
}

const setsOf = (result: PlanResult) => result.days.flatMap((day) => day.rounds.flatMap((round) => round.sets.map((set) => ({ ...set, on: day.on }))));
const source = { source: 'a sign', sourceOn: '2026-05-01' };
const positionOf = (yard: WateredYard, place = 0): string => yard.zones[0]?.positionIds[place] ?? '';

describe('the planner is told of a yard', () => {
  it('no limits where nobody entered any', async () => {
    const { input } = await planned(await thirstyYard());
    expect(input).toMatchObject({ waterStage: 0, permits: [], rules: [] });
    expect('addressDigit' in input || 'supply' in input).toBe(false);
    for (const position of input.positions) {
      expect(position.device).toBe('sprinkler');
      expect(['heightM', 'hoseLengthM', 'weeklyLimit', 'alternate'].filter((field) => field in position)).toEqual([]);
    }
  });

  it('its digit and stage, and a rule by digit holds from its stage on', async () => {
    const yard = await thirstyYard();
    // digit 7 may water on Wednesdays only
    await WaterRule.create({ id: randomUUID(), yardId: yard.id, name: 'By number', weekdaysByDigit: Array.from({ length: 10 }, (_, digit) => (digit === 7 ? [3] : [1])), stage: 2, ...source });
    await Yard.update({ addressDigit: 7, waterStage: 2, waterStageIsDefault: false }, { where: { id: yard.id } });
    const bound = await planned(yard);
    expect(bound.input).toMatchObject({ addressDigit: 7, waterStage: 2 });
    const days = [...new Set(setsOf(bound.result).map((set) => set.on))];
    expect(days).toEqual(['2026-06-17']);
    await Yard.update({ waterStage: 1 }, { where: { id: yard.id } });
    expect(setsOf((await planned(yard)).result).map((set) => set.on)).toContain('2026-06-13');
  });

  it('that a rule asks for a digit that nobody told: the plan says so', async () => {
    const yard = await thirstyYard();
    await WaterRule.create({ id: randomUUID(), yardId: yard.id, name: 'By number', weekdaysByDigit: Array.from({ length: 10 }, () => [3]), ...source });
    const { result } = await planned(yard);
    expect(result.missing).toContainEqual({ code: 'no_address_digit', values: expect.objectContaining({ rule: 'By number' }) as Record<string, string> });
  });

  it('what device stands at a position, so that a rule for sprinklers leaves a soaker hose alone', async () => {
    expect([deviceOf('soaker'), deviceOf('oscillating'), deviceOf('travelling'), deviceOf('hand_wand')]).toEqual(['soaker', 'sprinkler', 'sprinkler', 'hand_held']);
    const yard = await thirstyYard({ zones: [{ positions: 1 }] });
    await WaterRule.create({ id: randomUUID(), yardId: yard.id, name: 'No sprinklers on Saturday', weekdays: [0, 1, 2, 3, 4, 5], devices: ['sprinkler'], ...source });
    expect(setsOf((await planned(yard)).result).filter((set) => set.on === '2026-06-13')).toEqual([]);
    await Sprinkler.update({ kind: 'soaker' }, { where: { yardId: yard.id } });
    expect(setsOf((await planned(yard)).result).filter((set) => set.on === '2026-06-13')).not.toEqual([]);
  });

  it('that no hose may run unattended, timer or not', async () => {
    const yard = await thirstyYard({ shutOffTimer: true, hours: [{ fromMinutes: 330, toMinutes: 345 }] });
    expect(setsOf((await planned(yard)).result).some((set) => set.startMinutes + set.minutes > 345)).toBe(true);
    await WaterRule.create({ id: randomUUID(), yardId: yard.id, name: 'Stay by it', attended: true, ...source });
    expect(setsOf((await planned(yard)).result).some((set) => set.startMinutes + set.minutes > 345)).toBe(false);
  });

  it('its permits: seed is watered outside the rules to the last day and not after', async () => {
    const yard = await wateredYard(test, { zones: [{ seededOn: '2026-06-11', positions: 1 }], hours: [{ fromMinutes: 330, toMinutes: 1260 }] });
    const ruleId = randomUUID();
    await WaterRule.create({ id: ruleId, yardId: yard.id, name: 'Mondays', weekdays: [1], ...source });
    const permitId = randomUUID();
    await Permit.create({ id: permitId, yardId: yard.id, name: 'Seed permit', zoneIds: [yard.zones[0]?.id ?? ''], fromOn: '2026-06-12', toOn: '2026-06-14', blackoutMonths: [8], liftsRuleIds: [ruleId], ...source });
    const { input, result } = await planned(yard);
    expect(input.permits).toEqual([{
      id: permitId, name: 'Seed permit', zoneIds: [yard.zones[0]?.id], fromOn: '2026-06-12', toOn: '2026-06-14', blackoutMonths: [8], allowed: null, liftsRuleIds: partsOfRule(ruleId), ...source,
    }]);
    const days = [...new Set(setsOf(result).map((set) => set.on))].filter((on) => on < '2026-06-22');
    expect(days).toEqual(['2026-06-13', '2026-06-14', '2026-06-15']);
    test.clock.set('2026-06-15T09:00:00Z');
    expect((await planned(yard)).input.permits).toEqual([]);
  });

  it('its well: draws are short and the well rests between them', async () => {
    const yard = await thirstyYard();
    await Yard.update({ supplyKind: 'well', supplyFlowLpm: 18, supplyRestMinutes: 25, supplyDrawMinutes: 20 }, { where: { id: yard.id } });
    const { input, result } = await planned(yard);
    expect(input.supply).toEqual({ name: 'The well', flowLpm: 18, restMinutes: 25, drawMinutesAtMost: 20 });
    const today = setsOf(result).filter((set) => set.on === '2026-06-13').sort((a, b) => a.startMinutes - b.startMinutes);
    expect(today.length).toBeGreaterThan(1);
    expect(today.every((set) => set.minutes <= 20)).toBe(true);
    today.slice(1).forEach((set, index) => expect(set.startMinutes - (today[index]?.startMinutes ?? 0) - (today[index]?.minutes ?? 0)).toBeGreaterThanOrEqual(25));
  });

  it('heights and the reach of hoses', async () => {
    const yard = await thirstyYard();
    const hoseId = randomUUID();
    await Hose.create({ id: hoseId, yardId: yard.id, name: 'Long', lengthM: 30, boreMm: 16 });
    await Position.update({ hoseId, heightM: 3.5 }, { where: { id: positionOf(yard, 1) } });
    const { input, result } = await planned(yard);
    expect(input.positions.find((position) => position.id === positionOf(yard, 1))).toMatchObject({ hoseLengthM: 30, heightM: 3.5 });
    const [first] = setsOf(result).filter((set) => set.on === '2026-06-13').sort((a, b) => a.startMinutes - b.startMinutes);
    expect(first?.positionId).toBe(positionOf(yard, 1));
  });

  it('a weekly limit with what was laid down on the six days before', async () => {
    const yard = await thirstyYard({ zones: [{ positions: 1 }] });
    await Position.update({ weeklyLimitOver: 'drain_field', weeklyLimitMm: 12, weeklyLimitSource: 'the installer' }, { where: { id: positionOf(yard) } });
    await yard.water({ on: '2026-06-06', appliedMm: 9 });
    await yard.water({ on: '2026-06-07', appliedMm: 5 });
    await yard.water({ on: '2026-06-12', appliedMm: 2, roundIndex: 0 });
    await yard.water({ on: '2026-06-12', appliedMm: 1, roundIndex: 1 });
    const { input } = await planned(yard);
    expect(input.positions[0]?.weeklyLimit).toEqual({ depthMm: 12, name: 'The drain field', source: 'the installer', appliedMm: [5, 0, 0, 0, 0, 3] });
    await Position.update({ weeklyLimitMm: 0 }, { where: { id: positionOf(yard) } });
    expect(setsOf((await planned(yard)).result)).toEqual([]);
  });
});

describe('alternate sets', () => {
  const alternating = async (): Promise<WateredYard> => {
    const yard = await thirstyYard({ zones: [{ positions: 1 }] });
    await Position.update({ alternateSets: true }, { where: { yardId: yard.id } });
    return yard;
  };
  const lastWasHalfWay = async (yard: WateredYard) => (await planned(yard)).input.positions[0]?.alternate?.lastWasHalfWay;

  it('begin on the marks', async () => {
    const yard = await alternating();
    const { result } = await planned(yard);
    expect(setsOf(result)[0]?.halfWay ?? false).toBe(false);
  });

  it('go by what was really done: a set that was skipped does not count', async () => {
    const yard = await alternating();
    await yard.water({ on: '2026-06-08' });
    expect(await lastWasHalfWay(yard)).toBe(false);
    await yard.water({ on: '2026-06-10' });
    await RoundSet.update({ halfWay: true }, { where: { yardId: yard.id, on: '2026-06-10' } });
    expect(await lastWasHalfWay(yard)).toBe(true);
    await yard.water({ on: '2026-06-11', status: 'skipped' });
    expect(await lastWasHalfWay(yard)).toBe(true);
    await yard.water({ on: '2026-06-12', status: 'cut_short', appliedMm: 3 });
    expect(await lastWasHalfWay(yard)).toBe(false);
  });

  it('carry where they stand from the plan to the day and into the round', async () => {
    const yard = await alternating();
    await yard.water({ on: '2026-06-09', appliedMm: 2 });
    await planned(yard);
    const plan = await Plan.findOne({ where: { yardId: yard.id }, order: [['version', 'DESC']], rejectOnEmpty: true });
    const [stored] = await PlanSet.findAll({ where: { yardId: yard.id, planId: plan.id }, order: [['startAt', 'ASC']] });
    expect(stored).toMatchObject({ halfWay: true, on: '2026-06-13' });
    const today = (await call(test, yard.owner, 'get', `/yards/${yard.id}/today`)).body as TodayResponse;
    expect(today.rounds[0]?.sets[0]?.halfWay).toBe(true);
    const shown = (await call(test, yard.owner, 'get', `/yards/${yard.id}/plan`)).body as PlanResponse;
    expect(shown.days[0]?.rounds[0]?.sets[0]?.halfWay).toBe(true);
    const id = randomUUID();
    const started = (await call(test, yard.owner, 'post', `/yards/${yard.id}/rounds`, { id, on: '2026-06-13', roundIndex: stored?.roundIndex ?? 0 })).body as RoundResponse;
    expect(started.sets.map((set) => set.halfWay)).toEqual(started.sets.map(() => true));
    // A new plan keeps the begun round as it stands, and counts it as the last.
    const { input } = await planned(yard);
    expect(input.positions[0]?.alternate).toEqual({ lastWasHalfWay: true });
    const newest = await Plan.findOne({ where: { yardId: yard.id }, order: [['version', 'DESC']], rejectOnEmpty: true });
    expect((await PlanSet.findAll({ where: { yardId: yard.id, planId: newest.id, on: '2026-06-13', roundIndex: stored?.roundIndex ?? 0 } })).every((set) => set.halfWay)).toBe(true);
    expect(await Round.count({ where: { id } })).toBe(1);
  });
});
