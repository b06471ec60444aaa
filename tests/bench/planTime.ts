import { refillLinePlanner } from '@/scheduling/planning/refillLinePlanner';
import { referenceYard } from './referenceYard';

const variants = 40;
const rounds = 10;

/** Times planning of the reference yard and prints one JSON line: times [ms] of every plan, and how much was planned. */
function measure(): void {
  const inputs = Array.from({ length: variants }, (_, index) => referenceYard(index));
  let sets = 0;
  let doses = 0;
  // The first pass compiles; its plans show that there was something to plan.
  for (const input of inputs) {
    for (const set of refillLinePlanner.plan(input).days.flatMap((day) => day.rounds.flatMap((round) => round.sets))) {
      if (set.kind === 'dose') doses += 1;
      else sets += 1;
    }
  }
  const times: number[] = [];
  for (let round = 0; round < rounds; round += 1) {
    for (const input of inputs) {
      const from = performance.now();
      refillLinePlanner.plan(input);
      times.push(performance.now() - from);
    }
  }
  console.log(JSON.stringify({ planner: refillLinePlanner.name, setsPerPlan: sets / variants, dosesPerPlan: doses / variants, times }));
}

measure();
