import { checkPlan } from '@/scheduling/planning/checkPlan';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import type { PlanInput, PlannedDay, PlannedSet, PlanResult, PlanRule, Reason } from '@/scheduling/planning/types';
import { addDays } from '@/scheduling/units/civilDay';
import { buildDay, buildPlanInput, buildPosition, buildTap, buildZone } from '@/tests/factories/planInput';

function plan(input: PlanInput): PlanResult {
  const result = yardPlanner.plan(input);
  expect(checkPlan(input, result)).toEqual([]);
  return result;
}
const day = (result: PlanResult, index: number): PlannedDay => result.days[index] as PlannedDay;
const setsOn = (result: PlanResult, index: number): PlannedSet[] => day(result, index).rounds.flatMap((round) => round.sets);
const allSets = (result: PlanResult): PlannedSet[] => result.days.flatMap((each) => each.rounds.flatMap((round) => round.sets));
const codes = (reasons: readonly Reason[] | undefined): string[] => (reasons ?? []).map((reason) => reason.code);
const without = (result: PlanResult, index: number, zoneId = 'south') => day(result, index).zonesWithout.find((entry) => entry.zoneId === zoneId)?.reasons;
const days = (change: (index: number, on: string) => Parameters<typeof buildDay>[1]) =>
  Array.from({ length: 10 }, (_, index) => buildDay(addDays('2026-06-13', index), change(index, addDays('2026-06-13', index))));
const rule = (overrides: Partial<PlanRule> & Pick<PlanRule, 'kind'>): PlanRule =>
  ({ id: 'town', name: 'Town rule', source: 'Town code 14-2', sourceOn: '2026-05-01', season: null, exemptSeeded: false, ...overrides }) as PlanRule;

describe('when a zone is watered', () => {
  it('waters on the last morning on which the grass is not yet short, and deeply', () => {
    const result = plan(buildPlanInput());
    // 8 mm, 12 mm, and on the third morning 16 mm: stress would begin on that day.
    expect([setsOn(result, 0), setsOn(result, 1)]).toEqual([[], []]);
    const first = setsOn(result, 2)[0];
    expect(first?.depthMm).toBeGreaterThan(12);
    expect(first?.depthMm).toBeCloseTo(((first?.minutes ?? 0) * 14) / 60, 9);
    expect(first?.startMinutes).toBe(335);
    expect(first?.litres).toBe((first?.minutes ?? 0) * 16);
    expect(codes(first?.reasons)).toEqual(['past_line', 'no_rain_before']);
    expect(first?.reasons[0]?.values).toMatchObject({ depletionMm: 16, refillLineMm: 12 });
  });

  it('follows what the person wants most: fewer rounds, less water, or a lawn that rests', () => {
    const twoPlaces = { positions: [buildPosition({ zoneShare: 0.5, depletionMm: 11 }), buildPosition({ id: 'south-2', zoneShare: 0.5, sortOrder: 2, depletionMm: 2 })] };
    const green = plan(buildPlanInput({ ...twoPlaces, priority: 'keep_green' }));
    const easy = plan(buildPlanInput({ ...twoPlaces, priority: 'spare_me' }));
    const asleep = plan(buildPlanInput({ ...twoPlaces, priority: 'let_rest' }));
    const runs = (result: PlanResult): number => allSets(result).length;
    const litres = (result: PlanResult): number => allSets(result).reduce((sum, set) => sum + set.litres, 0);
    expect(runs(easy)).toBeLessThanOrEqual(runs(green));
    expect(litres(asleep)).toBeLessThan(litres(green));
    expect(day(asleep, 9).endDepletionMm.south).toBeGreaterThan(day(green, 9).endDepletionMm.south ?? 0);
    expect(day(asleep, 9).endDepletionMm.south).toBeLessThan(30);
  });

  it('keeps to the plan before unless something is gained', () => {
    const before = plan(buildPlanInput());
    const previousPlan = before.days.flatMap((each) => each.rounds.flatMap((round) => round.sets.map(({ positionId, startMinutes, minutes }) => ({ positionId, on: each.on, startMinutes, minutes }))));
    const warmer = buildZone({ demandMmByDay: Array.from({ length: 10 }, () => 4.2) });
    expect(setsOn(plan(buildPlanInput({ zones: [warmer], previousPlan })), 2)).toHaveLength(1);
    expect(codes(setsOn(plan(buildPlanInput({ previousPlan: [{ positionId: 'south-1', on: '2026-06-14', startMinutes: 335, minutes: 51 }] })), 1)[0]?.reasons)).toEqual(['due', 'no_rain_before']);
  });

  it('says of a zone without a set how it stands and when it is next', () => {
    expect(without(plan(buildPlanInput()), 0)).toEqual([{ code: 'above_line', values: { depletionMm: 8, refillLineMm: 12, on: '2026-06-13', nextOn: '2026-06-15' } }]);
  });

  it('lays down more than the net depth where the pattern is uneven, and says so', () => {
    const even = setsOn(plan(buildPlanInput()), 2)[0];
    const uneven = setsOn(plan(buildPlanInput({ positions: [buildPosition({ runTimeMultiplier: 1.3, lowQuarterUniformity: 0.55 })] })), 2)[0];
    expect((even?.minutes ?? 0) / (even?.depthMm ?? 0)).toBeCloseTo(60 / 14, 6);
    expect((uneven?.minutes ?? 0) / (uneven?.depthMm ?? 0)).toBeCloseTo((60 / 14) * 1.3, 6);
    expect(uneven?.grossMm).toBeCloseTo((uneven?.depthMm ?? 0) * 1.3, 6);
    expect(uneven?.reasons.find((reason) => reason.code === 'uneven')?.values).toEqual({ runTimeMultiplier: 1.3, lowQuarterUniformity: 0.55 });
  });

  it('waters earlier when the next open day comes too late', () => {
    const result = plan(buildPlanInput({ rules: [rule({ kind: 'weekdays', weekdays: [6, 3] })] }));
    expect(setsOn(result, 0)).toHaveLength(1);
    expect(setsOn(result, 0)[0]?.reasons[0]).toMatchObject({ code: 'due', values: { crossesOn: '2026-06-14', nextOpenOn: '2026-06-17' } });
    expect(without(result, 1)?.[0]).toEqual({ code: 'closed_by_rule', values: { rule: 'Town rule', source: 'Town code 14-2' } });
    expect(setsOn(result, 4)).toHaveLength(1);
  });

  it('takes off what was already applied today', () => {
    const input = buildPlanInput({ zones: [buildZone({ depletionMm: 11 })], alreadyApplied: [{ positionId: 'south-1', atMinutes: 300, depthMm: 11 }], notBeforeMinutes: 400 });
    const result = plan(input);
    expect(setsOn(result, 0)).toEqual([]);
    expect(codes(without(result, 0))).toEqual(['already_watered', 'above_line']);
    expect(day(result, 0).endDepletionMm.south).toBeCloseTo(4, 9);
  });

  it('starts nothing before now and plans the late zone for what is left of the day', () => {
    const late = plan(buildPlanInput({ zones: [buildZone({ depletionMm: 13 })], notBeforeMinutes: 400 }));
    expect(setsOn(late, 0)[0]?.startMinutes).toBe(405);
    const tooLate = plan(buildPlanInput({ zones: [buildZone({ depletionMm: 13 })], notBeforeMinutes: 900 }));
    expect(codes(without(tooLate, 0))).toEqual(['past_for_today', 'past_line']);
  });

  it('leaves a resting zone alone', () => {
    const result = plan(buildPlanInput({ zones: [buildZone({ resting: true, depletionMm: 25 })] }));
    expect(allSets(result)).toEqual([]);
    expect(result.shortages).toEqual([]);
    expect(codes(without(result, 3))).toEqual(['resting']);
  });
});

describe('rain ahead', () => {
  it('holds a set when rain is likely and being wrong costs little, and gives the numbers', () => {
    const result = plan(buildPlanInput({ zones: [buildZone({ depletionMm: 10 })], days: days((index) => (index === 0 ? { rainMm: 10, rainProbabilityPct: 90 } : {})) }));
    expect(setsOn(result, 0)).toEqual([]);
    expect(without(result, 0)?.[0]).toMatchObject({ code: 'held_for_rain', values: { rainMm: 10, probabilityPct: 90, worstMm: 14, refillLineMm: 12, rainOn: '2026-06-13' } });
  });

  it('waters all the same when the zone would suffer should the rain not come', () => {
    const result = plan(buildPlanInput({ zones: [buildZone({ depletionMm: 14 })], days: days((index) => (index === 0 ? { rainMm: 10, rainProbabilityPct: 70 } : {})) }));
    const set = setsOn(result, 0)[0];
    expect(codes(set?.reasons)).toContain('room_for_rain');
    expect(set?.depthMm).toBeLessThan(11);
    expect(set?.depthMm).toBeGreaterThan(4);
  });

  it('counts a rain whose chance nobody gave for less the farther off it is', () => {
    const dry = plan(buildPlanInput());
    const at = (index: number) => plan(buildPlanInput({ days: days((each) => (each === index ? { rainMm: 8, rainProbabilityPct: null } : { rainProbabilityPct: null })) }));
    expect((day(dry, 0).endDepletionMm.south ?? 0) - (day(at(0), 0).endDepletionMm.south ?? 0)).toBeCloseTo(0.8 * 8, 6);
    const late = at(6);
    expect((day(late, 5).endDepletionMm.south ?? 0) + 4 - (day(late, 6).endDepletionMm.south ?? 0)).toBeGreaterThanOrEqual(0.3 * 8 - 1e-9);
  });

  it('names the day of the next rain in the reason of a set', () => {
    const result = plan(buildPlanInput({ days: days((index) => (index === 4 ? { rainMm: 20, rainProbabilityPct: 90 } : {})) }));
    // Two days before a good rain the set leaves room for it.
    expect(setsOn(result, 2)[0]?.reasons[1]).toMatchObject({ code: 'room_for_rain', values: { rainOn: '2026-06-17', on: '2026-06-15' } });
    expect(setsOn(result, 2)[0]?.depthMm).toBeLessThan(15);
  });
});

describe('one tap, one sprinkler, one pair of hands', () => {
  const twoZones = () => ({
    zones: [buildZone({ depletionMm: 13 }), buildZone({ id: 'north', name: 'North shade', priority: 2, depletionMm: 13 })],
    positions: [buildPosition({ sortOrder: 2 }), buildPosition({ id: 'north-1', zoneId: 'north', sortOrder: 1 })],
  });

  it('waters position after position with a move between them, in position order', () => {
    const result = plan(buildPlanInput(twoZones()));
    const round = day(result, 0).rounds[0];
    expect(round?.sets.map((set) => set.positionId)).toEqual(['north-1', 'south-1']);
    expect(round?.startMinutes).toBe(330);
    expect(round?.sets[1]?.startMinutes).toBe((round?.sets[0]?.startMinutes ?? 0) + (round?.sets[0]?.minutes ?? 0) + 5);
    const north = round?.sets[0];
    expect(round?.moves).toEqual([{ tapId: 'tap', startMinutes: 335 + (north?.minutes ?? 0), minutes: 5, fromPositionId: 'north-1', toPositionId: 'south-1' }]);
    expect(round?.endMinutes).toBe(340 + (north?.minutes ?? 0) + (round?.sets[1]?.minutes ?? 0));
  });

  it('runs two taps at once, but never two moves at once', () => {
    const { zones, positions } = twoZones();
    const result = plan(buildPlanInput({ zones, taps: [buildTap(), buildTap({ id: 'front' })], positions: positions.map((each, index) => ({ ...each, tapId: index === 0 ? 'tap' : 'front' })) }));
    const [first, second] = setsOn(result, 0);
    expect(first?.tapId).not.toBe(second?.tapId);
    expect(second?.startMinutes).toBe((first?.startMinutes ?? 0) + 5);
  });

  it('lets the zone of the lower priority go short when the hours do not hold both, and names its shortage', () => {
    const result = plan(buildPlanInput({ ...twoZones(), days: days(() => ({ homeWindows: [{ fromMinutes: 330, toMinutes: 360 }] })) }));
    const short = (zoneId: string): number => result.shortages.filter((each) => each.zoneId === zoneId).reduce((sum, each) => sum + each.shortMm, 0);
    expect(short('north')).toBeGreaterThan(2 * short('south'));
    const shortage = result.shortages.find((each) => each.zoneId === 'north' && codes(each.reasons).includes('no_time_left'));
    expect(shortage?.shortMinutes).toBe(Math.round(((shortage?.shortMm ?? 0) * 60) / 14));
    expect(shortage?.litres).toBe((shortage?.shortMinutes ?? 0) * 16);
    const on = result.days.findIndex((each) => each.on === shortage?.on);
    expect(codes(without(result, on, 'north'))).toContain('no_time_left');
  });

  it('gives part of a set when only part fits, and says how much', () => {
    const result = plan(buildPlanInput({ zones: [buildZone({ depletionMm: 26 })], days: days(() => ({ homeWindows: [{ fromMinutes: 330, toMinutes: 380 }] })) }));
    const set = setsOn(result, 0)[0];
    expect(set?.minutes).toBe(45);
    expect(set?.reasons.find((reason) => reason.code === 'cut_by_time')?.values).toMatchObject({ wantedMinutes: 111, givenMinutes: 45 });
  });

  it('lets a tap with a shut-off timer run on after everybody has left, but not past the hours of the rule', () => {
    const leaving = days(() => ({ homeWindows: [{ fromMinutes: 330, toMinutes: 350 }] }));
    const attended = plan(buildPlanInput({ zones: [buildZone({ depletionMm: 13 })], days: leaving }));
    expect(setsOn(attended, 0)[0]?.minutes).toBe(15);
    const timed = buildPlanInput({ zones: [buildZone({ depletionMm: 13 })], days: leaving, taps: [buildTap({ shutOffTimer: true })] });
    expect(setsOn(plan(timed), 0)[0]?.minutes).toBeGreaterThan(40);
    const bounded = plan({ ...timed, rules: [rule({ kind: 'hours', allowed: [{ fromMinutes: 300, toMinutes: 365 }] })] });
    expect(setsOn(bounded, 0)[0]?.minutes).toBeGreaterThan(20);
    expect(setsOn(bounded, 0)[0]?.minutes).toBeLessThanOrEqual(30);
  });

  it('brings a zone forward when the later hours will not hold all that falls due', () => {
    const zones = ['a', 'b', 'c'].map((id, index) => buildZone({ id, name: id, depletionMm: 8.5, priority: index + 1, demandMmByDay: Array.from({ length: 10 }, () => 3) }));
    const positions = zones.map((zone, index) => buildPosition({ id: `${zone.id}-1`, zoneId: zone.id, sortOrder: index }));
    const result = plan(buildPlanInput({ zones, positions, days: days(() => ({ homeWindows: [{ fromMinutes: 330, toMinutes: 375 }] })) }));
    // All three would be short on the third morning, whose 40 minutes hold one of them.
    expect(setsOn(result, 0)).toHaveLength(1);
    expect(setsOn(result, 1)).toHaveLength(1);
    const early = setsOn(result, 0)[0];
    expect(codes(early?.reasons)).toContain('brought_forward');
    expect(early?.reasons[0]?.values.neededMinutes).toBeGreaterThan(Number(early?.reasons[0]?.values.hadMinutes));
  });

  it('breaks a set into cycles that the soil can take, with time to soak', () => {
    const result = plan(buildPlanInput({ zones: [buildZone({ depletionMm: 18, intakeMmPerHour: 4 })], positions: [buildPosition({ rateMmPerHour: 16 })] }));
    const sets = setsOn(result, 0);
    expect(sets.length).toBeGreaterThan(1);
    expect(Math.max(...sets.map((set) => set.minutes))).toBeLessThanOrEqual(25);
    expect((sets[1]?.startMinutes ?? 0) - (sets[0]?.startMinutes ?? 0) - (sets[0]?.minutes ?? 0)).toBeGreaterThanOrEqual(30);
    expect(codes(sets[0]?.reasons)).toContain('cut_by_intake');
    expect(codes(sets[1]?.reasons)).toContain('second_cycle');
  });
});

describe('weather that forbids', () => {
  it('puts no grass set into high wind but keeps the doses of seed', () => {
    const seeded = buildZone({ id: 'strip', name: 'Seeded strip', seed: { dayNumber: 6, stage: 'sown', dosesByDay: Array.from({ length: 10 }, () => [{ atMinutes: 400, depthMm: 1.5 }]) } });
    const result = plan(buildPlanInput({
      zones: [buildZone({ depletionMm: 14 }), seeded], positions: [buildPosition(), buildPosition({ id: 'strip-1', zoneId: 'strip' })],
      days: days(() => ({ windMps: 7 })),
    }));
    expect(codes(without(result, 0))).toEqual(['windy', 'past_line']);
    expect(setsOn(result, 0).map((set) => set.kind)).toEqual(['dose']);
  });

  it('waits for the frost to go', () => {
    const cold = days(() => ({ tminC: -3, tmaxC: 9, homeWindows: [{ fromMinutes: 330, toMinutes: 900 }] }));
    const set = setsOn(plan(buildPlanInput({ zones: [buildZone({ depletionMm: 13 })], days: cold })), 0)[0];
    expect(set?.startMinutes).toBeGreaterThan(500);
    const early = plan(buildPlanInput({ zones: [buildZone({ depletionMm: 13 })], days: days(() => ({ tminC: -3, tmaxC: 9 })) }));
    expect(codes(without(early, 0))).toEqual(['frost', 'past_line']);
  });
});

describe('doses of a seedbed', () => {
  const doses = [570, 720, 840, 960].map((atMinutes) => ({ atMinutes, depthMm: 1.5 }));
  const seeded = (overrides: Parameters<typeof buildPlanInput>[0] = {}) => buildPlanInput({
    zones: [buildZone({ seed: { dayNumber: 6, stage: 'sown', dosesByDay: Array.from({ length: 10 }, () => doses) } })],
    days: days(() => ({ homeWindows: [{ fromMinutes: 330, toMinutes: 1200 }] })), ...overrides,
  });

  it('are kept at their times and numbered', () => {
    const sets = setsOn(plan(seeded()), 0);
    expect(sets.map((set) => set.startMinutes)).toEqual([570, 720, 840, 960]);
    expect(sets[2]?.reasons[0]).toEqual({ code: 'dose', values: { stage: 'sown', dayNumber: 6, number: 3, of: 4, depthMm: 1.5 } });
    expect(sets[0]?.minutes).toBe(6);
  });

  it('come before the sets of grass on the same tap', () => {
    const input = seeded();
    const result = plan({
      ...input, zones: [...input.zones, buildZone({ id: 'front', name: 'Front', priority: 0, depletionMm: 25 })],
      positions: [...input.positions, buildPosition({ id: 'front-1', zoneId: 'front' })],
      days: days(() => ({ homeWindows: [{ fromMinutes: 555, toMinutes: 700 }] })),
    });
    expect(setsOn(result, 0).find((set) => set.kind === 'dose')?.startMinutes).toBe(570);
    expect(setsOn(result, 0).some((set) => set.kind === 'set')).toBe(true);
  });

  it('move to when somebody is at home, and are named when nobody is', () => {
    const result = plan(seeded({ days: days(() => ({ homeWindows: [{ fromMinutes: 330, toMinutes: 540 }, { fromMinutes: 1000, toMinutes: 1200 }] })) }));
    const [first, last] = setsOn(result, 0);
    expect(first?.startMinutes).toBe(534);
    expect(codes(first?.reasons)).toEqual(['dose', 'dose_moved']);
    expect(last?.startMinutes).toBe(1005);
    expect(day(result, 0).missedDoses.map((dose) => dose.atMinutes)).toEqual([720, 840]);
    expect(codes(day(result, 0).missedDoses[0]?.reasons)).toEqual(['dose_not_kept', 'nobody_home']);
    expect(result.shortages[0]).toMatchObject({ zoneId: 'south', on: '2026-06-13', shortMm: 3, shortMinutes: 12 });
  });

  it('follow a rule unless it exempts new seed', () => {
    const noon = { kind: 'hours' as const, allowed: [{ fromMinutes: 0, toMinutes: 600 }] };
    expect(setsOn(plan(seeded({ rules: [rule(noon)] })), 0)).toHaveLength(1);
    expect(setsOn(plan(seeded({ rules: [rule({ ...noon, exemptSeeded: true })] })), 0)).toHaveLength(4);
  });

  it('are left to rain only when it is as good as certain and plenty', () => {
    const rain = (rainProbabilityPct: number) => plan(seeded({ days: days((index) => ({ homeWindows: [{ fromMinutes: 330, toMinutes: 1200 }], rainMm: index === 0 ? 15 : 0, rainProbabilityPct })) }));
    expect(codes(without(rain(90), 0))).toEqual(['doses_left_to_rain']);
    expect(setsOn(rain(60), 0)).toHaveLength(4);
  });

  it('are not repeated when done, and a day without doses says when the next is', () => {
    const done = plan(seeded({ alreadyApplied: [{ positionId: 'south-1', atMinutes: 575, depthMm: 1.5 }], notBeforeMinutes: 600 }));
    expect(setsOn(done, 0).map((set) => set.startMinutes)).toEqual([720, 840, 960]);
    const taper = plan(seeded({ zones: [buildZone({ seed: { dayNumber: 30, stage: 'taper', dosesByDay: Array.from({ length: 10 }, (_, index) => (index % 3 === 1 ? [{ atMinutes: 400, depthMm: 10 }] : [])) } })] }));
    expect(without(taper, 0)).toEqual([{ code: 'no_dose_today', values: { stage: 'taper', nextOn: '2026-06-14' } }]);
  });
});

describe('a yard that lacks something', () => {
  it.each<[string, Partial<PlanInput>, string]>([
    ['no zones', { zones: [], positions: [] }, 'no_zones'],
    ['no taps', { taps: [], positions: [buildPosition({ tapId: null })] }, 'no_taps'],
    ['no positions', { positions: [] }, 'no_positions'],
    ['no hours at home', { days: days(() => ({ homeWindows: [] })) }, 'no_home_hours'],
    ['rules that exclude one another', { rules: [rule({ kind: 'weekdays', weekdays: [1] }), rule({ id: 'street', name: 'Street', kind: 'weekdays', weekdays: [2] })] }, 'rules_exclude_all'],
    ['a position without a tap', { positions: [buildPosition({ tapId: null })] }, 'position_without_tap'],
    ['a position without a rate', { positions: [buildPosition({ rateMmPerHour: null })] }, 'position_without_rate'],
    ['a default rate', { positions: [buildPosition({ rateIsDefault: true })] }, 'rate_default'],
    ['a default flow', { taps: [buildTap({ flowIsDefault: true })] }, 'flow_default'],
    ['a zone larger than its positions', { positions: [buildPosition({ zoneShare: 0.6 })] }, 'zone_part_unserved'],
  ])('with %s gets a plan that says so', (_, overrides, code) => {
    const input = buildPlanInput(overrides);
    expect(codes(plan(input).missing)).toContain(code);
  });

  it('says how much of a zone no position serves, and lets that part dry', () => {
    const result = plan(buildPlanInput({ positions: [buildPosition({ zoneShare: 0.6 })] }));
    expect(result.missing[0]?.values).toMatchObject({ zone: 'South lawn', servedPct: 60, areaM2: 36 });
    expect(day(result, 5).endDepletionMm.south).toBeGreaterThan(12);
  });

  it('waters both positions of a zone that has two', () => {
    const result = plan(buildPlanInput({ zones: [buildZone({ depletionMm: 13 })], positions: [buildPosition({ zoneShare: 0.5 }), buildPosition({ id: 'south-2', zoneShare: 0.5, sortOrder: 2 })] }));
    expect(setsOn(result, 0).map((set) => set.positionId)).toEqual(['south-1', 'south-2']);
  });

  it('waters only the drier position when the two differ', () => {
    const result = plan(buildPlanInput({ positions: [buildPosition({ zoneShare: 0.5, depletionMm: 14 }), buildPosition({ id: 'south-2', zoneShare: 0.5, sortOrder: 2, depletionMm: 2 })] }));
    expect(setsOn(result, 0).map((set) => set.positionId)).toEqual(['south-1']);
  });

  it.each<[string, Partial<PlanInput>]>([
    ['dayCount', { dayCount: 0, days: [] }],
    ['days', { days: [] }],
    ['days[1].on', { days: days(() => ({})).map((each, index) => (index === 1 ? { ...each, on: '2026-07-01' } : each)) }],
    ['days[0].tminC', { days: days(() => ({ tminC: 40 })) }],
    ['zones[0].demandMmByDay', { zones: [buildZone({ demandMmByDay: [1] })] }],
    ['zones[0].areaM2', { zones: [buildZone({ areaM2: Number.NaN })] }],
    ['zones[0].depletionMm', { zones: [buildZone({ depletionMm: 99 })] }],
    ['positions[0].zoneId', { positions: [buildPosition({ zoneId: 'nowhere' })] }],
    ['positions[0].rateMmPerHour', { positions: [buildPosition({ rateMmPerHour: -2 })] }],
    ['zones[1].id', { zones: [buildZone(), buildZone()] }],
    ['startOn', { startOn: '2026-02-30' }],
  ])('refuses impossible %s', (field, overrides) => {
    const { startOn: _startOn, ...rest } = overrides;
    const input = { ...buildPlanInput(rest), ...overrides };
    expect(() => yardPlanner.plan(input)).toThrow(expect.objectContaining({ field }));
  });
});
