import { requirePositive } from '@/scheduling/units/physicsError';
import { READABLE_SHARE } from './cupProblems';
import { readingErrorMm, type CupReading } from './cupReading';
import { minutesForDepth, rateFromFlow } from './depthAndTime';

export { minutesForDepth, rateFromFlow };

/** A test shorter than this misses whole sweeps and gusts [min] (15 min is what bulletins run at least). */
export const LEAST_TEST_MINUTES = 15;
/** Nobody waits longer [min]. Common practice. */
export const LONGEST_TEST_MINUTES = 600;

/**
 * Rate of a wide-open portable sprinkler [mm/h]: 0.17 in/h, within the 0.1 to 0.25 in/h that flow ÷ wetted area gives for the usual sizes. A default
 * for a test before anything is measured.
 */
export const DEFAULT_PORTABLE_RATE_MM_PER_HOUR = 4.3;

export interface RunLengthAdvice {
  /** How long to run [min], whole, 15 to 600. */
  minutes: number;
  /** Depth that can be read within 10 % [mm]. */
  readableDepthMm: number;
  readingErrorMm: number;
  expectedRateMmPerHour: number;
  /** True when even the longest test will not be readable: weigh the cups or measure millilitres. */
  isTooSlowToRead: boolean;
}

/**
 * How long a catch-cup test has to run until one reading is good within 10 %.
 * @param input - the expected rate [mm/h], or a flow [L/min] and the area it wets [m²]; and how the cups are read
 * @throws PhysicsError when rate, flow, area or mouth is not above zero
 * Source: at 0.17 in/h a quarter of an hour leaves 0.04 in, below a 1/8 in ruler.
 */
export function runLengthAdvice(input: ({ expectedRateMmPerHour: number } | { flowLpm: number; areaM2: number }) & { reading: CupReading }): RunLengthAdvice {
  const expectedRateMmPerHour = 'expectedRateMmPerHour' in input
    ? requirePositive('expectedRateMmPerHour', input.expectedRateMmPerHour)
    : rateFromFlow(requirePositive('flowLpm', input.flowLpm), input.areaM2);
  const errorMm = readingErrorMm(input.reading);
  const readableDepthMm = errorMm / READABLE_SHARE;
  const needed = Math.ceil(minutesForDepth({ depthMm: readableDepthMm, rateMmPerHour: expectedRateMmPerHour }));
  return {
    minutes: Math.min(LONGEST_TEST_MINUTES, Math.max(LEAST_TEST_MINUTES, needed)),
    readableDepthMm, readingErrorMm: errorMm, expectedRateMmPerHour,
    isTooSlowToRead: needed > LONGEST_TEST_MINUTES,
  };
}
