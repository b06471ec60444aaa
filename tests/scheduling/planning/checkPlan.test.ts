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
});
