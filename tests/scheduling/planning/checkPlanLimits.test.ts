import type { PlanInput } from '@/scheduling/planning/types';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import { PhysicsError } from '@/scheduling/units/physicsError';
import { buildDay, buildPlanInput, buildPosition, buildTap } from '../../factories/planInput';

const on = '2026-06-14';
const set = { positionId: 'south-1', on, startMinutes: 360, minutes: 30 };
const dry = Array.from({ length: 24 }, () => 0);
const days = (change: object): PlanInput['days'] => buildPlanInput().days.map((day, index) => (index === 0 ? buildDay(day.on, change) : day));

describe('impossible limits of a plan', () => {
  it.each<[string, Partial<PlanInput>]>([
    ['days[0].paceFactor', { days: days({ paceFactor: 0 }) }],
    ['days[0].hours.rainMm[3]', { days: days({ hours: { rainMm: dry.map((_, hour) => (hour === 3 ? -1 : 0)) } }) }],
    ['days[0].hours.windMps[23]', { days: days({ hours: { windMps: dry.map((_, hour) => (hour === 23 ? Number.NaN : 0)) } }) }],
    ['taps[0].place.eastM', { taps: [buildTap({ place: { eastM: Number.POSITIVE_INFINITY, northM: 0 } })] }],
    ['positions[0].heightM', { positions: [buildPosition({ heightM: Number.NaN })] }],
    ['positions[0].hoseLengthM', { positions: [buildPosition({ hoseLengthM: -1 })] }],
    ['positions[0].weeklyLimit.depthMm', { positions: [buildPosition({ weeklyLimit: { depthMm: -5, name: 'drain field', source: null, appliedMm: [] } })] }],
    ['positions[0].weeklyLimit.appliedMm[1]', { positions: [buildPosition({ weeklyLimit: { depthMm: 5, name: 'drain field', source: null, appliedMm: [0, -2] } })] }],
    ['supply.flowLpm', { supply: { name: 'well', flowLpm: 0, restMinutes: 0, drawMinutesAtMost: null } }],
    ['supply.restMinutes', { supply: { name: 'well', flowLpm: 20, restMinutes: -1, drawMinutesAtMost: null } }],
    ['supply.drawMinutesAtMost', { supply: { name: 'well', flowLpm: 20, restMinutes: 0, drawMinutesAtMost: 0 } }],
    ['moveMinutesPerM', { moveMinutesPerM: -0.1 }], ['waterStage', { waterStage: -1 }], ['addressDigit', { addressDigit: 10 }], ['addressDigit', { addressDigit: 1.5 }], ['workBudget', { workBudget: Number.NaN }],
    ['preferredWindows[0].toMinutes', { preferredWindows: [{ fromMinutes: 0, toMinutes: 1_500 }] }],
    ['holds[0].fromOn', { holds: [{ zoneId: 'south', name: 'feed', fromOn: '2026-02-30', fromMinutes: 0, toOn: on, toMinutes: 600 }] }],
    ['holds[0][0].fromMinutes', { holds: [{ zoneId: 'south', name: 'feed', fromOn: on, fromMinutes: -1, toOn: on, toMinutes: 600 }] }],
    ['waterIns[0].depthMm', { waterIns: [{ zoneId: 'south', name: 'feed', fromOn: on, byOn: on, depthMm: 0 }] }],
    ['permits[0].toOn', { permits: [{ id: 'p', name: 'seed', source: null, sourceOn: null, zoneIds: [], fromOn: on, toOn: 'soon', blackoutMonths: [], allowed: null, liftsRuleIds: null }] }],
    ['monthCaps[0].capLitres', { monthCaps: [{ month: '2026-06', capLitres: -1, usedLitres: 0 }] }], ['monthCaps[0].usedLitres', { monthCaps: [{ month: '2026-06', capLitres: 1, usedLitres: Number.NaN }] }],
    ['lockedSets[0].minutes', { lockedSets: [{ ...set, minutes: 0 }] }], ['lockedSets[0].on', { lockedSets: [{ ...set, on: '2026-13-01' }] }], ['previousPlan[0].startMinutes', { previousPlan: [{ ...set, startMinutes: 1_441 }] }],
  ])('are refused with their field: %s', (field, change) => {
    let thrown: unknown;
    try {
      yardPlanner.plan(buildPlanInput(change));
    } catch (error) {
      thrown = error;
    }
    expect(thrown).toBeInstanceOf(PhysicsError);
    expect(thrown).toMatchObject({ field });
  });

  it('are no fault while they are possible', () => {
    expect(() => yardPlanner.plan(buildPlanInput({
      supply: { name: 'well', flowLpm: 20, restMinutes: 10, drawMinutesAtMost: 60 }, monthCaps: [{ month: '2026-06', capLitres: 0, usedLitres: 0 }], lockedSets: [set], previousPlan: [set], addressDigit: 0, waterStage: 2,
    }))).not.toThrow();
  });
});
