import { statisticsOfSorted, type WeightedDepth } from './cupStatistics';
import { seededRandom } from './seededRandom';

/** A range that holds the true value nine times in ten, as far as cups placed like these can tell. */
export interface Range {
  low: number;
  high: number;
}

const DRAWS = 500;
const SEED = 20260613;
const NORMAL_95 = 1.645;

/** With a single cup nothing is known of the spread: half to double. Common practice. */
const ONE_CUP: Range = { low: 0.5, high: 2 };

/** 95 % quantiles of Student's t for 1 to 30 degrees of freedom (standard table). */
const STUDENT_95 = [
  6.314, 2.92, 2.353, 2.132, 2.015, 1.943, 1.895, 1.86, 1.833, 1.812, 1.796, 1.782, 1.771, 1.761, 1.753,
  1.746, 1.74, 1.734, 1.729, 1.725, 1.721, 1.717, 1.714, 1.711, 1.708, 1.706, 1.703, 1.701, 1.699, 1.697,
];

function percentile(sorted: readonly number[], part: number): number {
  const place = part * (sorted.length - 1);
  const below = Math.floor(place);
  const low = sorted[below] ?? 0;
  const high = sorted[below + 1] ?? low;
  return low + (high - low) * (place - below);
}

/**
 * Ranges of mean depth and low-quarter uniformity by drawing the cups again and again with replacement, widened for few cups by Student's t over the
 * normal quantile and the small-sample factor √(n/(n−1)), and by the error of one reading. The generator is seeded: same cups, same range.
 * @param cups - checked cups
 * @param readingErrorMm - error of one reading [mm]
 * @returns 90 % ranges; uniformity null when all cups are empty or there is only one
 * Source: percentile bootstrap (Efron 1979); that hand-moved sprinklers need 6 to over 50 cups for ±25 %: J. Am. Water Resour. Assoc. 2007.
 */
export function cupRanges(cups: readonly WeightedDepth[], readingErrorMm: number): { meanMm: Range; lowQuarterUniformity: Range | null } {
  const sorted = [...cups].sort((a, b) => a.depthMm - b.depthMm || a.weight - b.weight);
  const estimate = statisticsOfSorted(sorted);
  const count = sorted.length;
  if (count === 1) {
    const { meanMm } = estimate;
    return { meanMm: { low: Math.max(0, Math.min(ONE_CUP.low * meanMm, meanMm - readingErrorMm)), high: Math.max(ONE_CUP.high * meanMm, meanMm + readingErrorMm) }, lowQuarterUniformity: null };
  }
  const random = seededRandom(SEED + count);
  const means: number[] = [];
  const uniformities: number[] = [];
  for (let draw = 0; draw < DRAWS; draw += 1) {
    const chosen: number[] = [];
    for (let cup = 0; cup < count; cup += 1) {
      chosen.push(Math.floor(random() * count));
    }
    // Cups are sorted already, so sorting their places sorts the draw.
    const drawn = statisticsOfSorted(chosen.sort((a, b) => a - b).map((place) => sorted[place] as WeightedDepth));
    means.push(drawn.meanMm);
    if (drawn.lowQuarterUniformity !== null) {
      uniformities.push(drawn.lowQuarterUniformity);
    }
  }
  means.sort((a, b) => a - b);
  uniformities.sort((a, b) => a - b);
  const student = STUDENT_95[count - 2] ?? NORMAL_95 * (1 + 1 / (4 * (count - 1)));
  const widen = (student / NORMAL_95) * Math.sqrt(count / (count - 1));
  const readingOfMean = (NORMAL_95 * readingErrorMm) / Math.sqrt(3 * count);
  const meanLow = Math.hypot(widen * (estimate.meanMm - percentile(means, 0.05)), readingOfMean);
  const meanHigh = Math.hypot(widen * (percentile(means, 0.95) - estimate.meanMm), readingOfMean);
  const meanMm = { low: Math.max(0, estimate.meanMm - meanLow), high: estimate.meanMm + meanHigh };
  const uniformity = estimate.lowQuarterUniformity;
  if (uniformity === null || uniformities.length === 0) {
    return { meanMm, lowQuarterUniformity: null };
  }
  const low = uniformity - widen * Math.max(0, uniformity - percentile(uniformities, 0.05));
  const high = uniformity + widen * Math.max(0, percentile(uniformities, 0.95) - uniformity);
  return { meanMm, lowQuarterUniformity: { low: Math.max(0, low), high: Math.min(1, high) } };
}
