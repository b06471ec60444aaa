import { cupTest, mouthAreaCm2, type CupTestResult } from '@/scheduling/sprinkler';
import { stoppingCupProblems, type CupTestInput } from '@/shared/contracts/catchTests';

/** Reads a catch-cup test as people tell it: cups by the width of their mouth. @throws PhysicsError for impossible input */
export function reckonCupTest({ layout, reading, minutes, readings }: CupTestInput): CupTestResult {
  return cupTest({
    layout, minutes, values: readings,
    reading: reading.kind === 'depth' ? reading : { kind: reading.kind, mouthAreaCm2: mouthAreaCm2(reading.mouthDiameterMm) },
  });
}

/** The problems that leave no result. */
export function stopsOf(result: CupTestResult): CupTestResult['problems'] {
  return result.problems.filter((problem) => stoppingCupProblems.includes(problem.code));
}
