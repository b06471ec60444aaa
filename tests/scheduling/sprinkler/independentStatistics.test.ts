import fc from 'fast-check';
import { mean, probit, quantileSorted, sampleWithReplacement, sum } from 'simple-statistics';
import { gridStatistics, lowestCount } from '@/scheduling/sprinkler/cupStatistics';
import { cupRanges } from '@/scheduling/sprinkler/uncertainty';

/** Low-quarter uniformity with nothing but functions of the independent package. */
const independentUniformity = (cups: number[], part: number) => mean([...cups].sort((a, b) => a - b).slice(0, lowestCount(cups.length, part))) / mean(cups);

/** Even numbers by a generator that the code under test does not use (minimal standard, Park and Miller 1988). */
function otherRandom(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 16807) % 2147483647;
    return state / 2147483647;
  };
}

const asCups = (depths: number[]) => depths.map((depthMm) => ({ depthMm, weight: 1 }));

describe('cup statistics against the package simple-statistics', () => {
  it('agree on mean, both uniformities and the Christiansen coefficient of any cups', () => {
    fc.assert(fc.property(fc.array(fc.double({ min: 0.01, max: 90, noNaN: true }), { minLength: 1, maxLength: 80 }), (cups) => {
      const found = gridStatistics(cups);
      expect(found.meanMm).toBeCloseTo(mean(cups), 9);
      expect(found.lowQuarterUniformity).toBeCloseTo(independentUniformity(cups, 0.25), 9);
      expect(found.lowHalfUniformity).toBeCloseTo(independentUniformity(cups, 0.5), 9);
      expect(found.christiansenPct).toBeCloseTo(100 * (1 - sum(cups.map((cup) => Math.abs(cup - mean(cups)))) / sum(cups)), 6);
    }));
  });

  it('draw ranges as wide as an independent bootstrap with another generator, once the widening for few cups is taken off', () => {
    const cups = [14, 22, 18, 26, 20, 17, 24, 19, 11, 23, 16, 21, 25, 15, 20, 18, 22, 19, 13, 24];
    const count = cups.length;
    const random = otherRandom(48271);
    const draws = Array.from({ length: 4000 }, () => sampleWithReplacement(cups, count, random));
    const means = draws.map((draw) => mean(draw)).sort((a, b) => a - b);
    const uniformities = draws.map((draw) => independentUniformity(draw, 0.25)).sort((a, b) => a - b);
    const found = cupRanges(asCups(cups), 0);
    // Student's t with 19 degrees of freedom over the normal quantile, and the small-sample factor (standard table).
    const widening = (1.729 / probit(0.95)) * Math.sqrt(count / (count - 1));
    const [low, high] = [found.meanMm.low, found.meanMm.high].map((end) => mean(cups) + (end - mean(cups)) / widening);
    const spread = quantileSorted(means, 0.95) - quantileSorted(means, 0.05);
    expect(Math.abs((low ?? 0) - quantileSorted(means, 0.05)) / spread).toBeLessThan(0.08);
    expect(Math.abs((high ?? 0) - quantileSorted(means, 0.95)) / spread).toBeLessThan(0.08);
    const own = independentUniformity(cups, 0.25);
    const lowUniformity = own + ((found.lowQuarterUniformity?.low ?? 0) - own) / widening;
    const uniformitySpread = quantileSorted(uniformities, 0.95) - quantileSorted(uniformities, 0.05);
    expect(Math.abs(lowUniformity - quantileSorted(uniformities, 0.05)) / uniformitySpread).toBeLessThan(0.1);
  });

  it('widen with every reading less sure, and with fewer cups', () => {
    const cups = [14, 22, 18, 26, 20, 17, 24, 19];
    const width = (depths: number[], errorMm: number) => {
      const { meanMm } = cupRanges(asCups(depths), errorMm);
      return meanMm.high - meanMm.low;
    };
    expect(width(cups, 3)).toBeGreaterThan(width(cups, 0.5));
    expect(width(cups.slice(0, 4), 0.5)).toBeGreaterThan(width([...cups, ...cups], 0.5));
  });
});
