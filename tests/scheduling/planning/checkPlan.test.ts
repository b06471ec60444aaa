import { checkPlan } from '@/scheduling/planning/checkPlan';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import type { PlanInput, PlannedSet, PlanResult } from '@/scheduling/planning/types';
import { buildPlanInput, buildPosition, buildZone } from '@/tests/factories/planInput';

const input: PlanInput = buildPlanInput({
  zones: [
    buildZone({ depletionMm: 12 }),
    buildZone({ id: 'strip', name: 'Seeded strip', seed: { dayNumber: 6, stage: 'sown', dosesByDay: Array.from({ length: 10 }, () => [{ atMinutes: 460, depthMm: 1.5 }]) } }),
  ],
  positions: [buildPosition(), buildPosition({ id: 'strip-1', zoneId: 'strip', sortOrder: 2 })],
  rules: [{ id: 'town', name: 'Town rule', source: null, sourceOn: null, season: null, exemptSeeded: false, kind: 'hours', allowed: [{ fromMinutes: 300, toMinutes: 600 }] }],
});

function broken(change: (plan: PlanResult, set: PlannedSet, dose: PlannedSet) => void, changedInput = input): string[] {
  const plan = structuredClone(yardPlanner.plan(input));
  const sets = plan.days.flatMap((day) => day.rounds.flatMap((round) => round.sets));
  change(plan, sets.find((set) => set.kind === 'set') as PlannedSet, sets.find((set) => set.kind === 'dose') as PlannedSet);
  return checkPlan(changedInput, plan).map((breach) => breach.limit);
}

describe('the checker of plans', () => {
  it('passes the plan as it was made', () => {
    expect(broken(() => undefined)).toEqual([]);
  });

  it.each<[string, (plan: PlanResult, set: PlannedSet, dose: PlannedSet) => void]>([
    ['hours at home', (_, set) => { set.startMinutes = 332; }],
    ['water rule', (_, set) => { set.startMinutes = 580; }],
    ['one sprinkler a tap', (_, set, dose) => { dose.startMinutes = set.startMinutes + 2; }],
    ['depth from minutes', (_, set) => { set.minutes += 1; }],
    ['litres', (_, set) => { set.litres += 1; }],
    ['whole minutes', (_, set) => { set.startMinutes += 0.5; }],
    ['reasons', (_, set) => { set.reasons = []; }],
    ['dose or set', (_, set) => { set.kind = 'dose'; }],
    ['references', (_, set) => { set.tapId = 'front'; }],
    ['water balance', (plan) => { (plan.days[3] as { endDepletionMm: Record<string, number> }).endDepletionMm.south = 1; }],
    ['a reason for every zone', (plan) => { (plan.days[1] as { zonesWithout: unknown[] }).zonesWithout = []; }],
    ['a dose is kept or named', (plan) => { for (const day of plan.days) for (const round of day.rounds) round.sets = round.sets.filter((set) => set.kind === 'set'); }],
    ['moves', (plan) => { for (const day of plan.days) for (const round of day.rounds) round.moves = [...round.moves, { tapId: 'tap', startMinutes: 1, minutes: 5, fromPositionId: 'a', toPositionId: 'b' }]; }],
    ['round', (plan) => { for (const day of plan.days) for (const round of day.rounds) round.endMinutes += 3; }],
    ['finite', (_, set) => { set.depthMm = Number.NaN; }],
    ['days', (plan) => { plan.days.pop(); }],
    ['shortage', (plan) => { plan.shortages.push({ zoneId: 'south', on: '2026-06-13', shortMm: 0, shortMinutes: 0, litres: 0, reasons: [] }); }],
  ])('finds a breach of %s', (limit, change) => {
    expect(broken(change)).toContain(limit);
  });

  it.each<[string, Partial<PlanInput>]>([
    ['wind', { days: input.days.map((day) => ({ ...day, windMps: 8 })) }],
    ['frost', { days: input.days.map((day) => ({ ...day, tminC: -4, tmaxC: 2 })) }],
    ['resting', { zones: input.zones.map((zone) => ({ ...zone, resting: true })) }],
    ['not before now', { notBeforeMinutes: 460 }],
    ['intake', { zones: input.zones.map((zone) => ({ ...zone, intakeMmPerHour: 1 })) }],
    ['daylight', { days: input.days.map((day) => ({ ...day, sunriseMinutes: 480 })) }],
    ['no more than the soil has room for', { zones: input.zones.map((zone) => ({ ...zone, depletionMm: 5 })) }],
    ['hours at home', { days: input.days.map((day) => ({ ...day, homeWindows: [{ fromMinutes: 340, toMinutes: 480 }] })) }],
  ])('finds a breach of %s when the yard is another', (limit, overrides) => {
    expect(broken(() => undefined, { ...input, ...overrides })).toContain(limit);
  });

  it.each<[string, Partial<PlanInput>]>([
    ['hold', { holds: [{ zoneId: 'south', name: 'Weed killer', fromOn: '2026-06-01', fromMinutes: 0, toOn: '2026-07-01', toMinutes: 0 }] }],
    ['rain or wind', { days: input.days.map((day) => ({ ...day, hours: { rainMm: Array.from({ length: 24 }, () => 3) } })) }],
    ['day off', { days: input.days.map((day) => ({ ...day, dayOff: true })) }],
    ['month cap', { monthCaps: [{ month: '2026-06', capLitres: 900, usedLitres: 800 }] }],
    ['weekly limit', { positions: input.positions.map((position) => ({ ...position, weeklyLimit: { depthMm: 2, name: 'Drain field', source: null, appliedMm: [0, 0, 0, 0, 0, 0] } })) }],
    ['reach', { taps: input.taps.map((tap) => ({ ...tap, place: { eastM: 0, northM: 0 } })), positions: input.positions.map((position) => ({ ...position, place: { eastM: 50, northM: 0 }, hoseLengthM: 20 })) }],
    ['draw', { supply: { name: 'Well', flowLpm: 30, restMinutes: 0, drawMinutesAtMost: 3 } }],
    ['rest of the supply', { supply: { name: 'Well', flowLpm: 30, restMinutes: 240, drawMinutesAtMost: null } }],
    ['fixed set', { lockedSets: [{ positionId: 'south-1', on: '2026-06-18', startMinutes: 340, minutes: 12 }] }],
    ['water rule', { rules: [{ id: 'town', name: 'Town rule', source: null, sourceOn: null, season: null, exemptSeeded: false, kind: 'address_digit', weekdaysByDigit: Array.from({ length: 10 }, () => []) }], addressDigit: 3 }],
    ['one sprinkler a tap', { moveMinutesPerM: 60, positions: input.positions.map((position, index) => ({ ...position, place: { eastM: 10 * index, northM: 0 } })) }],
  ])('finds a breach of %s that the plan knew nothing of', (limit, overrides) => {
    expect(broken(() => undefined, { ...input, ...overrides })).toContain(limit);
  });

  it('finds two hoses on a pipe that feeds one', () => {
    const wide: PlanInput = {
      ...input, taps: [...input.taps, { id: 'front', name: 'Front tap', flowLpm: 16, flowIsDefault: false, shutOffTimer: false }],
      zones: [buildZone({ depletionMm: 16 }), buildZone({ id: 'north', name: 'North', depletionMm: 16 })],
      positions: [buildPosition(), buildPosition({ id: 'north-1', zoneId: 'north', tapId: 'front' })],
    };
    const limits = checkPlan({ ...wide, supply: { name: 'Pipe', flowLpm: 20, restMinutes: 0, drawMinutesAtMost: null } }, yardPlanner.plan(wide)).map((breach) => breach.limit);
    expect(limits).toContain('supply');
  });

  it('finds a shut-off timer that is trusted where somebody must stay', () => {
    const leaving: PlanInput = { ...input, taps: input.taps.map((tap) => ({ ...tap, shutOffTimer: true })), days: input.days.map((day) => ({ ...day, homeWindows: [{ fromMinutes: 330, toMinutes: 350 }] })) };
    const attended: PlanInput = { ...leaving, rules: [...input.rules, { id: 'stay', name: 'Stay', source: null, sourceOn: null, season: null, exemptSeeded: false, kind: 'attended' }] };
    expect(checkPlan(leaving, yardPlanner.plan(leaving))).toEqual([]);
    expect(checkPlan(attended, yardPlanner.plan(leaving)).map((breach) => breach.limit)).toContain('hours at home');
  });
});
