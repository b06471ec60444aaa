import { PhysicsError, requirePositive } from '@/scheduling/units/physicsError';
import { overlap, type Arrangement } from './overlap';
import type { WettingPattern } from './wettingPattern';

export interface MoveDistanceOption {
  moveM: number;
  /** Mean rate where the patterns overlap [mm/h]. */
  meanMmPerHour: number;
  lowQuarterUniformity: number;
  lowHalfUniformity: number;
  christiansenPct: number;
}

export interface MoveDistanceAnswer {
  best: MoveDistanceOption;
  /** Every distance tried, rising. */
  options: MoveDistanceOption[];
}

/** Two distances whose evenness differs by less than this are equal, and the longer saves moves. Common practice. */
const AS_GOOD = 0.02;

/**
 * The move distance that waters most evenly: the pattern is laid over itself at each trial distance and the flattest sum wins; among equals the longest.
 * @param input.fromM - shortest distance tried [m]; a fifth of the wetted width when left out
 * @param input.toM - longest [m]; the wetted width when left out
 * @param input.count - distances tried, 40 when left out
 * @param input.rowRatio - distance between two rows as a multiple of that in a row, 1 when left out
 * @throws PhysicsError when a limit is impossible or the pattern is dry
 * Source: the row of cups added to itself at trial distances (teaching slides on sprinkler design; trade practice of about half the wetted diameter).
 */
export function bestMoveDistance(input: { pattern: WettingPattern; arrangement: Arrangement; fromM?: number; toM?: number; count?: number; rowRatio?: number; samples?: number; isAlternating?: boolean }): MoveDistanceAnswer {
  const widthM = 2 * input.pattern.reachXM;
  const fromM = requirePositive('fromM', input.fromM ?? widthM / 5);
  const toM = requirePositive('toM', input.toM ?? widthM);
  const count = input.count ?? 40;
  const rowRatio = requirePositive('rowRatio', input.rowRatio ?? 1);
  if (toM < fromM || !Number.isInteger(count) || count < 1 || count > 1000) {
    throw new PhysicsError(toM < fromM ? 'toM' : 'count', toM < fromM ? toM : count, toM < fromM ? 'must not be below fromM' : 'must be 1 to 1000');
  }
  const options: MoveDistanceOption[] = [];
  for (let index = 0; index < count; index += 1) {
    const moveM = count === 1 ? fromM : fromM + ((toM - fromM) * index) / (count - 1);
    const { meanMm, lowQuarterUniformity, lowHalfUniformity, christiansenPct } = overlap({ ...input, moveM, rowMoveM: moveM * rowRatio });
    if (lowQuarterUniformity === null || lowHalfUniformity === null || christiansenPct === null) {
      throw new PhysicsError('pattern', meanMm, 'must wet some ground');
    }
    options.push({ moveM, meanMmPerHour: meanMm, lowQuarterUniformity, lowHalfUniformity, christiansenPct });
  }
  const top = Math.max(...options.map((option) => option.lowQuarterUniformity));
  const best = [...options].reverse().find((option) => option.lowQuarterUniformity >= top - AS_GOOD) as MoveDistanceOption;
  return { best, options };
}
