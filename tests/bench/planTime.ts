import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import type { PlanInput } from '@/scheduling/planning/types';
import { fourfoldYard, referenceYard } from './referenceYard';

const variants = 40;
const rounds = 4;

/** Time of one core that planning takes [ms]: what else the machine does meanwhile does not count. */
function coreTimeMs(input: PlanInput): number {
  const from = process.cpuUsage();
  yardPlanner.plan(input);
  const { user, system } = process.cpuUsage(from);
  return (user + system) / 1000;
}

/** Times planning of the reference yard, and of a yard four times as large, and prints one JSON line: times [ms] of every plan, and how much was planned. */
function measure(): void {
  const inputs = Array.from({ length: variants }, (_, index) => referenceYard(index));
  let sets = 0;
  let doses = 0;
  // The first pass compiles; its plans show that there was something to plan.
  for (const input of inputs) {
    for (const set of yardPlanner.plan(input).days.flatMap((day) => day.rounds.flatMap((round) => round.sets))) {
      if (set.kind === 'dose') doses += 1;
      else sets += 1;
    }
  }
  const times = Array.from({ length: rounds }, () => inputs.map(coreTimeMs)).flat();
  const fourfoldTimes = Array.from({ length: 10 }, (_, index) => coreTimeMs(fourfoldYard(index)));
  console.log(JSON.stringify({ planner: yardPlanner.name, setsPerPlan: sets / variants, dosesPerPlan: doses / variants, times, fourfoldTimes }));
}

measure();
