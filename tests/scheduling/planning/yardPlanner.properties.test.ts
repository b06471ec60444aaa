import fc from 'fast-check';
import { checkPlan } from '@/scheduling/planning/checkPlan';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import { arbitraryYard } from './arbitraryYard';

describe('the planner on random yards', () => {
  it('never makes a plan that breaks a limit, and explains every set and every zone without one', () => {
    fc.assert(fc.property(arbitraryYard, (input) => {
      expect(checkPlan(input, yardPlanner.plan(input))).toEqual([]);
    }), { numRuns: 300 });
  });

  it('gives the same plan for the same yard', () => {
    fc.assert(fc.property(arbitraryYard, (input) => {
      expect(yardPlanner.plan(input)).toEqual(yardPlanner.plan(structuredClone(input)));
    }), { numRuns: 40 });
  });

  it('does not depend on the order in which zones, positions, taps are listed', () => {
    fc.assert(fc.property(arbitraryYard, (input) => {
      const turned = { ...input, zones: [...input.zones].reverse(), positions: [...input.positions].reverse(), taps: [...input.taps].reverse() };
      const setsOf = (plan: ReturnType<typeof yardPlanner.plan>) => plan.days.map((day) => day.rounds.flatMap((round) => round.sets.map((set) => [set.positionId, set.startMinutes, set.minutes])));
      expect(setsOf(yardPlanner.plan(turned))).toEqual(setsOf(yardPlanner.plan(input)));
    }), { numRuns: 50 });
  });

  it('leaves its input as it was', () => {
    fc.assert(fc.property(arbitraryYard, (input) => {
      const before = structuredClone(input);
      yardPlanner.plan(input);
      expect(input).toEqual(before);
    }), { numRuns: 40 });
  });
});
