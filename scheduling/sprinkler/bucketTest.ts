import { requirePositive, requireRange } from '@/scheduling/units/physicsError';

/** '5-gallon' buckets really hold 4.85 to 5.1 gal (ATTRA 2006, quoted): 3 % either way [%]. */
export const BUCKET_TOLERANCE_PCT = 3;

/** Error of starting and stopping a watch by hand [s]. Common practice. */
export const TIMING_ERROR_SECONDS = 0.5;

export interface BucketTestResult {
  flowLpm: number;
  /** Flow if the bucket and the watch are off as far as they may be [L/min]. */
  range: { low: number; high: number };
  /** True when the bucket filled so fast that the watch alone makes an error above 5 %: use a bigger bucket. */
  isTooFast: boolean;
}

/**
 * Flow of a tap or hose from the time a bucket takes to fill.
 * @param input.volumeL - volume of the bucket [L], up to 500
 * @param input.seconds - time to fill it [s], 1 to 3600
 * @param input.bucketTolerancePct - how far the bucket's volume may be off [%], 3 when left out
 * @throws PhysicsError outside those ranges
 * Source: flow = volume ÷ time (University of Idaho: 5 gal in 30 s is 10 gpm).
 */
export function bucketTest(input: { volumeL: number; seconds: number; bucketTolerancePct?: number }): BucketTestResult {
  requirePositive('volumeL', input.volumeL);
  requireRange('volumeL', input.volumeL, 0, 500);
  requireRange('seconds', input.seconds, 1, 3600);
  const tolerance = requireRange('bucketTolerancePct', input.bucketTolerancePct ?? BUCKET_TOLERANCE_PCT, 0, 50) / 100;
  return {
    flowLpm: (input.volumeL / input.seconds) * 60,
    range: {
      low: ((input.volumeL * (1 - tolerance)) / (input.seconds + TIMING_ERROR_SECONDS)) * 60,
      high: ((input.volumeL * (1 + tolerance)) / (input.seconds - TIMING_ERROR_SECONDS)) * 60,
    },
    isTooFast: TIMING_ERROR_SECONDS / input.seconds > 0.05,
  };
}
