import { PhysicsError, requireNonNegative } from '@/scheduling/units/physicsError';

/** A depth with the area it stands for; equal weights for a grid. */
export interface WeightedDepth {
  depthMm: number;
  weight: number;
}

/** Beyond this a longer run wastes more than it helps; the sprinkler has to move. Common practice. */
export const RUN_TIME_MULTIPLIER_LIMIT = 2;

/** Evenness of a set of depths. */
export interface CupStatistics {
  /** Mean depth, weighted [mm]. */
  meanMm: number;
  /** Mean of the lowest quarter over the mean, 0 to 1; null when all cups are empty. */
  lowQuarterUniformity: number | null;
  /** Mean of the lower half over the mean, 0 to 1; null when all cups are empty. */
  lowHalfUniformity: number | null;
  /** Christiansen's coefficient [%]; can fall below zero for a few full cups among empty ones; null when all are empty. */
  christiansenPct: number | null;
}

/**
 * How many of n cups are the lowest part: n × part to the nearest whole, halves up, at least one. For a quarter of 15 cups 4, for a half 8.
 * Published examples mostly round n/4 (Merriam and Keller 1978: 4 and 8 of 15).
 */
export function lowestCount(count: number, part: number): number {
  return Math.max(1, Math.floor(count * part + 0.5));
}

/** Places of the lowest quarter in a list of equally weighted depths, by the count rule; of equal depths the earlier. */
export function lowQuarterIndexes(depthsMm: readonly number[]): number[] {
  const order = depthsMm.map((_, index) => index).sort((a, b) => (depthsMm[a] ?? 0) - (depthsMm[b] ?? 0) || a - b);
  return order.slice(0, lowestCount(depthsMm.length, 0.25)).sort((a, b) => a - b);
}

function meanOf(cups: readonly WeightedDepth[]): number {
  const weight = cups.reduce((sum, cup) => sum + cup.weight, 0);
  return cups.reduce((sum, cup) => sum + cup.weight * cup.depthMm, 0) / weight;
}

/** Mean of the lowest part: by the count rule when all weights are equal, otherwise the lowest part of the area, the last cup in part. */
function meanOfLowest(sorted: readonly WeightedDepth[], part: number, hasEqualWeights: boolean): number {
  if (hasEqualWeights) {
    return meanOf(sorted.slice(0, lowestCount(sorted.length, part)));
  }
  const wanted = part * sorted.reduce((sum, cup) => sum + cup.weight, 0);
  let left = wanted;
  let water = 0;
  for (const cup of sorted) {
    const taken = Math.min(left, cup.weight);
    water += taken * cup.depthMm;
    left -= taken;
    if (left <= 0) break;
  }
  return water / wanted;
}

/**
 * Mean and evenness of cups.
 * @param cups - at least one; weights above zero
 * @throws PhysicsError when there is no cup, a depth is negative or not finite, a weight is not above zero
 * Source: Christiansen 1942 (Calif. Bull. 670); low-quarter and low-half distribution uniformity as in Merriam and Keller 1978.
 */
export function cupStatistics(cups: readonly WeightedDepth[]): CupStatistics {
  if (cups.length === 0) {
    throw new PhysicsError('values', cups.length, 'must hold at least one cup');
  }
  cups.forEach((cup, index) => {
    requireNonNegative(`values[${index}]`, cup.depthMm);
    if (!(cup.weight > 0) || !Number.isFinite(cup.weight)) {
      throw new PhysicsError(`weights[${index}]`, cup.weight, 'must be above zero');
    }
  });
  return statisticsOfSorted([...cups].sort((a, b) => a.depthMm - b.depthMm || a.weight - b.weight));
}

/** The same for cups already checked and sorted from driest to wettest. */
export function statisticsOfSorted(sorted: readonly WeightedDepth[]): CupStatistics {
  const meanMm = meanOf(sorted);
  if (meanMm <= 0) {
    return { meanMm: 0, lowQuarterUniformity: null, lowHalfUniformity: null, christiansenPct: null };
  }
  const first = sorted[0]?.weight ?? 1;
  const hasEqualWeights = sorted.every((cup) => cup.weight === first);
  const weight = sorted.reduce((sum, cup) => sum + cup.weight, 0);
  const spread = sorted.reduce((sum, cup) => sum + cup.weight * Math.abs(cup.depthMm - meanMm), 0);
  return {
    meanMm,
    lowQuarterUniformity: Math.min(1, meanOfLowest(sorted, 0.25, hasEqualWeights) / meanMm),
    lowHalfUniformity: Math.min(1, meanOfLowest(sorted, 0.5, hasEqualWeights) / meanMm),
    christiansenPct: 100 * (1 - spread / (weight * meanMm)),
  };
}

/** Statistics of equally weighted depths [mm]. */
export function gridStatistics(depthsMm: readonly number[]): CupStatistics {
  return cupStatistics(depthsMm.map((depthMm) => ({ depthMm, weight: 1 })));
}
