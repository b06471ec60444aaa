import { checkPlan } from '@/scheduling/planning/checkPlan';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import { planCostL } from '../scheduling/planning/planCost';
import { referee } from '../scheduling/planning/referee';
import { lagrangeBound } from '../scheduling/planning/refereeBound';
import { refereeYard } from '../scheduling/planning/refereeYards';

/** Proven yards that are compared, and the most that are tried for them. */
const provenWanted = 100;
const triedAtMost = 150;
const largeYards = 3;
/** Rounds in which the prices of the bound are moved. */
const boundRounds = 12;

/** Compares the planner with proven optima of small yards and with a bound of large ones, and prints one JSON line: gaps [–], breaches, yards not proven. */
async function measure(): Promise<void> {
  const gaps: number[] = [];
  let unproven = 0;
  let breaches = 0;
  let refereeSeconds = 0;
  let tried = 0;
  for (; tried < triedAtMost && gaps.length < provenWanted; tried += 1) {
    const input = refereeYard(tried);
    const plan = yardPlanner.plan(input);
    breaches += checkPlan(input, plan).length;
    const verdict = await referee(input, { secondsAtMost: 20, gap: 0.0005 });
    refereeSeconds += verdict.seconds;
    if (verdict.status === 'Optimal') {
      gaps.push((planCostL(input, plan) - verdict.costL) / verdict.costL);
    } else {
      unproven += 1;
    }
  }
  const overBound: number[] = [];
  for (let seed = 0; seed < largeYards; seed += 1) {
    const input = refereeYard(1000 + seed, { positions: 14, days: 10 });
    const plan = yardPlanner.plan(input);
    breaches += checkPlan(input, plan).length;
    const planL = planCostL(input, plan);
    overBound.push(planL / (await lagrangeBound(input, planL, boundRounds)));
  }
  console.log(JSON.stringify({ planner: yardPlanner.name, gaps, unproven, breaches, refereeSeconds, overBound }));
}

void measure();
