import { checkPlan } from '@/scheduling/planning/checkPlan';
import type { PlanInput, PlannedSet, PlanResult } from '@/scheduling/planning/types';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import { buildPlanInput, buildPosition, buildTap, buildZone } from '@/tests/factories/planInput';

const zones = [buildZone({ depletionMm: 14 }), buildZone({ id: 'north', name: 'North', depletionMm: 14 })];
const positions = [buildPosition({ zoneShare: 1 }), buildPosition({ id: 'north-1', name: 'By the gate', zoneId: 'north', sortOrder: 2 })];
const rule = { id: 'town', name: 'Town rule', source: 'Town code', sourceOn: '2026-05-01', season: null, exemptSeeded: false };
const seededZone = buildZone({ seed: { dayNumber: 6, stage: 'sown', dosesByDay: Array.from({ length: 10 }, () => [{ atMinutes: 400, depthMm: 1.5 }]) } });

function plan(overrides: Partial<PlanInput>): PlanResult {
  const input = buildPlanInput({ zones, positions, workBudget: 20_000, ...overrides });
  const result = yardPlanner.plan(input);
  expect(checkPlan(input, result)).toEqual([]);
  return result;
}
const sets = (result: PlanResult): (PlannedSet & { on: string })[] => result.days.flatMap((day) => day.rounds.flatMap((round) => round.sets.map((set) => ({ ...set, on: day.on }))));
const codesOf = (result: PlanResult): Set<string> => new Set([
  ...result.missing, ...result.shortages.flatMap((each) => each.reasons), ...result.days.flatMap((day) => [...day.zonesWithout, ...day.missedDoses].flatMap((each) => each.reasons)), ...sets(result).flatMap((set) => set.reasons),
].map((reason) => reason.code));

describe('limits of a plan', () => {
  it('keeps a zone dry while a product must not be washed off, and says until when', () => {
    const result = plan({ holds: [{ zoneId: 'north', name: 'Weed killer', fromOn: '2026-06-12', fromMinutes: 600, toOn: '2026-06-15', toMinutes: 600 }] });
    expect(sets(result).filter((set) => set.zoneId === 'north').every((set) => set.on > '2026-06-15' || (set.on === '2026-06-15' && set.startMinutes >= 600))).toBe(true);
    expect(result.days[0]?.zonesWithout.find((each) => each.zoneId === 'north')?.reasons[0]).toEqual({ code: 'on_hold', values: { name: 'Weed killer', toOn: '2026-06-15', toMinutes: 600 } });
  });

  it('waters a product in by its deadline though the grass is not thirsty, and names what it cannot', () => {
    const wet = { zones: [buildZone({ depletionMm: 1 })], positions: [buildPosition()] };
    const waterIns = [{ zoneId: 'south', name: 'Fertilizer', fromOn: '2026-06-13', byOn: '2026-06-14', depthMm: 6 }];
    const given = sets(plan({ ...wet, waterIns })).filter((set) => set.on <= '2026-06-14').reduce((sum, set) => sum + set.depthMm, 0);
    expect(given).toBeGreaterThan(5.5);
    expect(codesOf(plan({ ...wet, waterIns, rules: [{ ...rule, kind: 'weekdays', weekdays: [3] }] })).has('water_in_missed')).toBe(true);
  });

  it('never draws more in a month than is left, and says what holds it back', () => {
    const result = plan({ monthCaps: [{ month: '2026-06', capLitres: 3000, usedLitres: 1800 }] });
    expect(sets(result).reduce((sum, set) => sum + set.litres, 0)).toBeLessThanOrEqual(1200);
    expect(sets(result).length).toBeGreaterThan(0);
    expect(codesOf(result).has('month_cap')).toBe(true);
  });

  it('spares the ground over a drain field', () => {
    const result = plan({ positions: [buildPosition({ weeklyLimit: { depthMm: 10, name: 'Drain field', source: null, appliedMm: [0, 0, 0, 0, 4, 0] } }), buildPosition({ id: 'north-1', zoneId: 'north' })] });
    const first = sets(result).filter((set) => set.zoneId === 'south' && set.on < '2026-06-18').reduce((sum, set) => sum + set.grossMm, 0);
    expect(first).toBeGreaterThan(3);
    expect(first).toBeLessThanOrEqual(6);
  });

  it('lets a well rest between draws and feeds one hose at a time from it', () => {
    const result = plan({
      taps: [buildTap(), buildTap({ id: 'front' })], positions: [buildPosition(), buildPosition({ id: 'north-1', zoneId: 'north', tapId: 'front' })],
      supply: { name: 'Well', flowLpm: 20, restMinutes: 20, drawMinutesAtMost: 30 },
    });
    expect(Math.max(...sets(result).map((set) => set.minutes))).toBeLessThanOrEqual(30);
    expect(sets(result).some((set) => set.tapId === 'front')).toBe(true);
  });

  it('stays by the hose where the town forbids to leave it', () => {
    const leaving = { days: buildPlanInput().days.map((day) => ({ ...day, homeWindows: [{ fromMinutes: 330, toMinutes: 350 }] })), taps: [buildTap({ shutOffTimer: true })] };
    const longest = (result: PlanResult): number => Math.max(...sets(result).map((set) => set.minutes));
    expect(longest(plan(leaving))).toBeGreaterThan(30);
    expect(longest(plan({ ...leaving, rules: [{ ...rule, kind: 'attended' }] }))).toBeLessThanOrEqual(15);
  });

  it.each<[string, Partial<PlanInput>, boolean]>([
    ['binds other devices only', { rules: [{ ...rule, kind: 'weekdays', weekdays: [], devices: ['soaker'] }] }, true],
    ['spares what is held in the hand', { rules: [{ ...rule, kind: 'weekdays', weekdays: [], devices: ['sprinkler', 'soaker'] }], positions: positions.map((each) => ({ ...each, device: 'hand_held' as const })) }, true],
    ['begins with a later stage of shortage', { rules: [{ ...rule, kind: 'weekdays', weekdays: [], stage: 2 }], waterStage: 1 }, true],
    ['holds in this stage of shortage', { rules: [{ ...rule, kind: 'weekdays', weekdays: [], stage: 2 }], waterStage: 2 }, false],
    ['opens no weekday to this house number', { rules: [{ ...rule, kind: 'address_digit', weekdaysByDigit: Array.from({ length: 10 }, (_, digit) => (digit === 4 ? [] : [1])) }], addressDigit: 4 }, false],
    ['opens a weekday to this house number', { rules: [{ ...rule, kind: 'address_digit', weekdaysByDigit: Array.from({ length: 10 }, (_, digit) => (digit === 4 ? [] : [1])) }], addressDigit: 5 }, true],
  ])('reads a rule that %s', (_, overrides, isWatered) => {
    expect(sets(plan(overrides)).length > 0).toBe(isWatered);
  });

  it('names a rule by house number when none is known', () => {
    expect(codesOf(plan({ rules: [{ ...rule, kind: 'address_digit', weekdaysByDigit: Array.from({ length: 10 }, () => []) }] })).has('no_address_digit')).toBe(true);
  });

  it('uses a permit for seed on its days, not in its closed months, and within its hours', () => {
    const base = { zones: [seededZone], positions: [buildPosition()], rules: [{ ...rule, kind: 'weekdays' as const, weekdays: [] }] };
    const permit = { id: 'permit', name: 'Seed permit', source: 'Town', sourceOn: null, zoneIds: ['south'], fromOn: '2026-06-01', toOn: '2026-06-15', blackoutMonths: [] as number[], allowed: null, liftsRuleIds: null };
    expect(sets(plan(base))).toEqual([]);
    expect(sets(plan({ ...base, permits: [permit] })).map((set) => set.on)).toEqual(['2026-06-13', '2026-06-14', '2026-06-15']);
    expect(sets(plan({ ...base, permits: [{ ...permit, blackoutMonths: [6] }] }))).toEqual([]);
    expect(sets(plan({ ...base, permits: [{ ...permit, allowed: [{ fromMinutes: 410, toMinutes: 500 }] }] })).every((set) => set.startMinutes >= 410)).toBe(true);
  });

  it('waits for the dry and calm hours of a day', () => {
    const rainMm = Array.from({ length: 24 }, (_, hour) => (hour < 6 ? 2 : 0));
    const days = buildPlanInput().days.map((day) => ({ ...day, hours: { rainMm }, rainMm: 0 }));
    expect(sets(plan({ days })).every((set) => set.startMinutes >= 360)).toBe(true);
    const windMps = Array.from({ length: 24 }, () => 9);
    expect(codesOf(plan({ days: days.map((day) => ({ ...day, hours: { windMps } })) })).has('rain_or_wind_hours')).toBe(true);
  });

  it('leaves a day off alone', () => {
    const result = plan({ days: buildPlanInput().days.map((day, index) => ({ ...day, dayOff: index === 0 })) });
    expect(result.days[0]?.rounds).toEqual([]);
    expect(result.days[0]?.zonesWithout[0]?.reasons[0]?.code).toBe('day_off');
  });

  it('plans nothing for a place beyond the end of its hose, and says so', () => {
    const result = plan({ taps: [buildTap({ place: { eastM: 0, northM: 0 } })], positions: [buildPosition({ place: { eastM: 30, northM: 0 }, hoseLengthM: 23 }), buildPosition({ id: 'north-1', zoneId: 'north' })] });
    expect(sets(result).every((set) => set.positionId !== 'south-1')).toBe(true);
    expect(result.missing.find((each) => each.code === 'out_of_reach')?.values).toMatchObject({ distanceM: 30, hoseLengthM: 23 });
  });

  it('keeps a fixed set to the minute, and names one that is impossible', () => {
    const kept = { positionId: 'north-1', on: '2026-06-13', startMinutes: 400, minutes: 25 };
    const result = plan({ lockedSets: [kept, { ...kept, on: '2026-06-14', startMinutes: 900 }] });
    expect(sets(result).find((set) => set.locked)).toMatchObject({ positionId: 'north-1', on: '2026-06-13', startMinutes: 400, minutes: 25 });
    expect(result.missing).toContainEqual({ code: 'lock_impossible', values: { position: 'By the gate', positionId: 'north-1', on: '2026-06-14', startMinutes: 900, limit: 'home' } });
  });

  it('stands on the marks and half-way between them in turns', () => {
    const result = plan({ positions: [buildPosition({ alternate: { lastWasHalfWay: false } }), buildPosition({ id: 'north-1', zoneId: 'north' })] });
    const turns = sets(result).filter((set) => set.positionId === 'south-1').map((set) => set.halfWay === true);
    expect(turns.slice(0, 2)).toEqual([true, false]);
  });

  it('goes round from the top of the slope down', () => {
    const result = plan({ positions: [buildPosition({ heightM: 0, sortOrder: 1 }), buildPosition({ id: 'north-1', zoneId: 'north', sortOrder: 2, heightM: 3 })] });
    expect(result.days[0]?.rounds[0]?.sets.map((set) => set.positionId)).toEqual(['north-1', 'south-1']);
  });

  it('takes longer for a move over a longer way and with slower helpers', () => {
    const places = [buildPosition({ place: { eastM: 0, northM: 0 } }), buildPosition({ id: 'north-1', zoneId: 'north', sortOrder: 2, place: { eastM: 40, northM: 0 } })];
    const move = (overrides: Partial<PlanInput>): number => plan({ positions: places, ...overrides }).days[0]?.rounds[0]?.moves[0]?.minutes ?? 0;
    expect(move({})).toBe(5);
    expect(move({ moveMinutesPerM: 0.1 })).toBeCloseTo(9, 9);
    expect(move({ moveMinutesPerM: 0.1, days: buildPlanInput().days.map((day) => ({ ...day, paceFactor: 1.5 })) })).toBeCloseTo(13.5, 9);
  });
});
