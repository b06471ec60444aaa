import highsLoader, { type Highs } from 'highs';
import type { PlanInput } from '@/scheduling/planning/types';
import { openings, refereeModel } from './referee';

/** What one patch does by itself at given prices of the minutes. */
interface Answer {
  costL: number;
  /** Minutes of each opening that it takes, its moves included. */
  minutes: number[];
}

function askPatch(highs: Highs, input: PlanInput, position: number, minuteL: readonly number[], outingShare: number): Answer {
  const own = input.positions[position];
  const { monthCaps: _cap, ...alone } = input;
  const solution = highs.solve(refereeModel({ ...alone, positions: own ? [own] : [] }, { minuteL, outingShare }), { mip_rel_gap: 1e-6, output_flag: false });
  if (solution.Status !== 'Optimal') {
    throw new Error(`A single patch was not solved: ${solution.Status}`);
  }
  const columns = solution.Columns as Record<string, { Primal?: number }>;
  const value = (name: string): number => columns[name]?.Primal ?? 0;
  return { costL: solution.ObjectiveValue, minutes: minuteL.map((_, k) => value(`x_0_${k}`) + input.moveMinutes * Math.round(value(`y_0_${k}`))) };
}

/**
 * A lower bound of the cost of every plan of a yard that is too large to be solved (Lagrange): the patches no longer share the minutes of an opening but buy
 * them at a price, and each pays its part of an outing when it takes part. Whatever the prices, the sum of the patches' best costs less the worth of all minutes
 * is never above the cost of a plan; the prices are moved by subgradients (Polyak's step) to make it as high as they can. A cap on the month's water is left
 * out, which can only lower the bound.
 * @param planL - cost of a plan of the yard [L]
 * @param rounds - how often the prices are moved
 * @returns the highest bound found [L]
 */
export async function lagrangeBound(input: PlanInput, planL: number, rounds: number): Promise<number> {
  const highs = await highsLoader();
  const room = openings(input).map(({ fromMinutes, toMinutes }) => toMinutes - fromMinutes + input.moveMinutes);
  // An outing is paid once; each of its patches is charged at most its equal part of it.
  const outingShare = 1 / Math.max(1, input.positions.length);
  let minuteL = room.map(() => 0);
  let best = Number.NEGATIVE_INFINITY;
  let pace = 1;
  for (let round = 0; round < rounds; round += 1) {
    const answers = input.positions.map((_, position) => askPatch(highs, input, position, minuteL, outingShare));
    const bound = answers.reduce((sum, { costL }) => sum + costL, 0) - room.reduce((sum, minutes, k) => sum + minutes * (minuteL[k] ?? 0), 0);
    pace = bound > best ? pace : pace * 0.8;
    best = Math.max(best, bound);
    const over = room.map((minutes, k) => answers.reduce((sum, answer) => sum + (answer.minutes[k] ?? 0), 0) - minutes);
    const length = over.reduce((sum, each) => sum + each * each, 0);
    if (length === 0) {
      break;
    }
    const step = (pace * Math.max(0, planL - bound)) / length;
    minuteL = minuteL.map((price, k) => Math.max(0, price + step * (over[k] ?? 0)));
  }
  return best;
}

