import { checkPlan } from '@/scheduling/planning/checkPlan';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import type { PlanInput } from '@/scheduling/planning/types';
import { planCostL } from './planCost';
import { referee, refereeModel } from './referee';
import { lagrangeBound } from './refereeBound';
import { refereeYard } from './refereeYards';

describe('the planner before a referee that proves what is best', () => {
  it('comes close to the proven optimum of small yards, never below it, and keeps every limit', async () => {
    const gaps: number[] = [];
    for (let seed = 200; seed < 220; seed += 1) {
      const input = refereeYard(seed, { positions: 3, days: 5 });
      const verdict = await referee(input, { secondsAtMost: 30, gap: 0.0005 });
      if (verdict.status !== 'Optimal') {
        continue;
      }
      const plan = yardPlanner.plan(input);
      expect(checkPlan(input, plan)).toEqual([]);
      gaps.push((planCostL(input, plan) - verdict.costL) / verdict.costL);
    }
    expect(gaps.length).toBeGreaterThanOrEqual(16);
    expect(Math.min(...gaps)).toBeGreaterThan(-0.001);
    expect(gaps.reduce((sum, gap) => sum + gap, 0) / gaps.length).toBeLessThan(0.02);
    expect(Math.max(...gaps)).toBeLessThan(0.06);
  }, 600_000);

  it('would see a plan that is worse than it need be', async () => {
    const input = refereeYard(205, { positions: 3, days: 5 });
    const verdict = await referee(input, { secondsAtMost: 30, gap: 0.0005 });
    const idle: PlanInput = { ...input, leftOut: input.days.flatMap((day) => input.positions.map((position) => ({ positionId: position.id, on: day.on }))) };
    expect(verdict.status).toBe('Optimal');
    expect(planCostL(input, yardPlanner.plan(idle))).toBeGreaterThan(1.1 * verdict.costL);
  }, 120_000);

  it('gives a bound for large yards that no plan goes below', async () => {
    const input = refereeYard(300, { positions: 12, days: 10 });
    const planL = planCostL(input, yardPlanner.plan(input));
    const boundL = await lagrangeBound(input, planL, 4);
    expect(planL).toBeGreaterThan(boundL);
    expect(boundL).toBeGreaterThan(planL / 2);
  }, 120_000);

  it.each([201, 202, 203, 204])('gives a bound that is never above what is proven best: yard %i', async (seed) => {
    const input = refereeYard(seed, { positions: 3, days: 5 });
    const verdict = await referee(input, { secondsAtMost: 30, gap: 0.0001 });
    expect(verdict.status).toBe('Optimal');
    const boundL = await lagrangeBound(input, verdict.costL, 15);
    expect(boundL).toBeLessThanOrEqual(verdict.costL * 1.0002);
    expect(boundL).toBeGreaterThan(verdict.costL / 2);
  }, 120_000);

  it('is not taken at its word when its text cannot be read', () => {
    expect(refereeModel(refereeYard(1))).toMatch(/^Minimize\n obj: [+-]/);
    expect(refereeModel(refereeYard(1))).not.toMatch(/NaN|undefined|Infinity/);
  });
});
