import { PhysicsError, requireFinite, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units/physicsError';
import { cupProblems, type CupProblem } from './cupProblems';
import { depthFromReading, readingErrorMm, type CupReading } from './cupReading';
import { cupStatistics, lowQuarterIndexes, RUN_TIME_MULTIPLIER_LIMIT, type WeightedDepth } from './cupStatistics';
import { cupRanges, type Range } from './uncertainty';

/** Where the cups stood. A grid is listed row by row; a row from the sprinkler outwards. */
export type CupLayout =
  | { kind: 'grid'; rows: number; columns: number; spacingM: number }
  | { kind: 'row'; spacingM: number; /** from the sprinkler to the first cup */ firstDistanceM: number; /** what the row stands for; a full circle when left out */ pattern?: 'full_circle' | 'strip' };

export interface CupTestInput {
  layout: CupLayout;
  /** How long the water ran [min]. */
  minutes: number;
  reading: CupReading;
  /** One reading a cup [mm], [mL] or [g]; null for a cup that was lost or not read. */
  values: (number | null)[];
}

export interface CupTestResult {
  /** Depth in each cup [mm], null where there was no reading. */
  depthsMm: (number | null)[];
  /** Cups read. */
  cupCount: number;
  /** Mean depth, each cup weighted by the area it stands for [mm]. */
  meanMm: number;
  rateMmPerHour: number;
  rateRange: Range;
  lowQuarterUniformity: number | null;
  lowQuarterRange: Range | null;
  lowHalfUniformity: number | null;
  christiansenPct: number | null;
  /** From the lower half, 1 to RUN_TIME_MULTIPLIER_LIMIT: how much longer to run than the mean asks for. */
  runTimeMultiplier: number;
  /** What the low quarter would ask for: shown beside it, not used, because it drowns the rest. Null when the low quarter is dry. */
  lowQuarterMultiplier: number | null;
  /** Places, in `values`, of the cups in the lowest quarter. */
  lowQuarterCups: number[];
  problems: CupProblem[];
}

export { RUN_TIME_MULTIPLIER_LIMIT };

function expectedCount(layout: CupLayout): number | null {
  if (layout.kind === 'row') {
    return null;
  }
  for (const side of ['rows', 'columns'] as const) {
    if (!Number.isInteger(layout[side])) {
      throw new PhysicsError(`layout.${side}`, layout[side], 'must be a whole number');
    }
    requireRange(`layout.${side}`, layout[side], 1, 100);
  }
  return layout.rows * layout.columns;
}

/**
 * Area that each cup stands for, in any unit. In a row from a full-circle sprinkler a cup stands for the ring half-way to its neighbours, the first
 * one from the sprinkler itself on, so outer cups count for more. In a grid and for a strip all count alike.
 */
export function cupWeights(layout: CupLayout, count: number): number[] {
  if (layout.kind === 'grid' || layout.pattern === 'strip') {
    return Array.from({ length: count }, () => 1);
  }
  const { firstDistanceM, spacingM } = layout;
  return Array.from({ length: count }, (_, index) => {
    const distance = firstDistanceM + index * spacingM;
    const inner = index === 0 ? 0 : distance - spacingM / 2;
    const outer = distance + spacingM / 2;
    return outer * outer - inner * inner;
  });
}

/** Cups of the lowest quarter of the area, from the driest on, for unequal weights. */
function lowQuarterByArea(cups: readonly WeightedDepth[]): number[] {
  const order = cups.map((_, index) => index).sort((a, b) => (cups[a]?.depthMm ?? 0) - (cups[b]?.depthMm ?? 0) || a - b);
  let left = 0.25 * cups.reduce((sum, cup) => sum + cup.weight, 0);
  const lowest: number[] = [];
  for (const index of order) {
    if (left <= 0) break;
    lowest.push(index);
    left -= cups[index]?.weight ?? 0;
  }
  return lowest.sort((a, b) => a - b);
}

/**
 * Reads a catch-cup test: application rate, evenness, ranges that are wide when cups are few, and what is wrong with it.
 * The lowest quarter of a grid is n/4 cups to the nearest whole, halves up, at least one; of a full-circle row the lowest quarter of the area.
 * @throws PhysicsError for impossible input: no reading at all, negative depths, a run of no length, a count that does not match the grid
 * Sources: rate = mean depth ÷ time (trade practice); run-time multiplier 1/DUlh from the lower half (von Bernuth and Mecham; Mecham 2010 on why not the low quarter).
 */
export function cupTest(input: CupTestInput): CupTestResult {
  const { layout, minutes, reading, values } = input;
  requirePositive('minutes', minutes);
  requirePositive('layout.spacingM', layout.spacingM);
  if (layout.kind === 'row') {
    requireNonNegative('layout.firstDistanceM', layout.firstDistanceM);
  }
  if (reading.kind !== 'depth') {
    requirePositive('reading.mouthAreaCm2', reading.mouthAreaCm2);
  }
  const count = expectedCount(layout);
  if (count !== null && values.length !== count) {
    throw new PhysicsError('values', values.length, `must hold ${count} cups`);
  }
  const depthsMm = values.map((value, index) => {
    if (value === null) {
      return null;
    }
    requireNonNegative(`values[${index}]`, value);
    return requireFinite(`values[${index}]`, depthFromReading(reading, value));
  });
  const weights = cupWeights(layout, values.length);
  const read: number[] = [];
  const cups: WeightedDepth[] = [];
  depthsMm.forEach((depthMm, index) => {
    if (depthMm !== null) {
      read.push(index);
      cups.push({ depthMm, weight: weights[index] ?? 1 });
    }
  });
  const statistics = cupStatistics(cups);
  const errorMm = readingErrorMm(reading);
  const ranges = cupRanges(cups, errorMm);
  const perHour = 60 / minutes;
  const isWeighted = layout.kind === 'row' && layout.pattern !== 'strip';
  const lowest = isWeighted ? lowQuarterByArea(cups) : lowQuarterIndexes(cups.map((cup) => cup.depthMm));
  const { lowHalfUniformity, lowQuarterUniformity } = statistics;
  return {
    depthsMm,
    cupCount: cups.length,
    meanMm: statistics.meanMm,
    rateMmPerHour: statistics.meanMm * perHour,
    rateRange: { low: ranges.meanMm.low * perHour, high: ranges.meanMm.high * perHour },
    lowQuarterUniformity,
    lowQuarterRange: ranges.lowQuarterUniformity,
    lowHalfUniformity,
    christiansenPct: statistics.christiansenPct,
    runTimeMultiplier: lowHalfUniformity === null ? 1 : Math.min(RUN_TIME_MULTIPLIER_LIMIT, 1 / Math.max(lowHalfUniformity, 1 / RUN_TIME_MULTIPLIER_LIMIT)),
    lowQuarterMultiplier: lowQuarterUniformity === null || lowQuarterUniformity <= 0 ? null : 1 / lowQuarterUniformity,
    lowQuarterCups: lowest.map((index) => read[index] ?? 0),
    problems: cupProblems({ layout, reading, minutes, depthsMm, meanMm: statistics.meanMm, lowHalfUniformity, errorMm }),
  };
}
