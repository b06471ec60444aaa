import fc from 'fast-check';
import { mean, sum } from 'simple-statistics';
import { cupStatistics, gridStatistics, lowestCount, lowQuarterIndexes } from '@/scheduling/sprinkler/cupStatistics';
import { rateFromFlow } from '@/scheduling/sprinkler/runTimes';
import { inchesFromMm, inchesPerHourFromMmPerHour, lpmFromGpm, m2FromSquareFeet, mmFromInches } from '@/scheduling/units';
import { C01, C02, C04 } from './publishedCases';

const inMm = (inches: readonly number[]) => inches.map(mmFromInches);

describe('statistics of catch cups against published tests', () => {
  it('reads the textbook example C01', () => {
    const found = gridStatistics(inMm(C01.inches));
    expect(inchesFromMm(found.meanMm)).toBeCloseTo(C01.meanInches, 6);
    expect(found.lowQuarterUniformity).toBeCloseTo(C01.lowQuarterUniformity, 6);
    expect((found.lowQuarterUniformity ?? 0) * inchesFromMm(found.meanMm)).toBeCloseTo(C01.lowQuarterInches, 6);
    expect(found.christiansenPct).toBeCloseTo(C01.christiansenPct, 1);
  });

  it('reads the sprinkler lateral C02 with four cups in the lowest quarter of fifteen and eight in the lower half', () => {
    expect(lowestCount(15, 0.25)).toBe(C02.lowQuarterCups);
    expect(lowestCount(15, 0.5)).toBe(C02.lowHalfCups);
    const found = gridStatistics(C02.inchesPerHour);
    expect(found.meanMm).toBeCloseTo(0.2647, 4);
    expect(found.christiansenPct).toBeCloseTo(87.04, 2);
    expect((found.lowQuarterUniformity ?? 0) * 100).toBeCloseTo(82.18, 2);
    expect((found.lowHalfUniformity ?? 0) * 100).toBeCloseTo(87.85, 2);
    expect(Math.round(found.christiansenPct ?? 0)).toBe(C02.christiansenPct);
    expect(Math.round((found.lowQuarterUniformity ?? 0) * 100)).toBe(C02.lowQuarterPct);
    expect(Math.round((found.lowHalfUniformity ?? 0) * 100)).toBe(C02.lowHalfPct);
    const applied = inchesPerHourFromMmPerHour(rateFromFlow(lpmFromGpm(C02.gpm), m2FromSquareFeet(C02.squareFeet)));
    expect(applied).toBeCloseTo(C02.appliedInchesPerHour, 3);
    expect(((found.lowQuarterUniformity ?? 0) * found.meanMm * 100) / C02.appliedInchesPerHour).toBeCloseTo(C02.pelqPct, 0);
  });

  it('reads the solid set C04', () => {
    const found = gridStatistics(inMm(C04.inches));
    expect(inchesFromMm(found.meanMm)).toBeCloseTo(C04.meanInches, 6);
    expect(found.christiansenPct).toBeCloseTo(C04.christiansenPct, 1);
    expect((found.lowQuarterUniformity ?? 0) * 100).toBeCloseTo(C04.lowQuarterPct, 1);
    expect((found.lowHalfUniformity ?? 0) * 100).toBeCloseTo(C04.lowHalfPct, 2);
    expect(inchesFromMm(found.meanMm) / C04.hours).toBeCloseTo(C04.inchesPerHour, 4);
  });
});

describe('the count rule of the lowest part', () => {
  it.each([[1, 1], [2, 1], [3, 1], [5, 1], [6, 2], [9, 2], [10, 3], [15, 4], [18, 5], [20, 5], [30, 8]])('of %i cups takes %i as the lowest quarter', (count, wanted) => {
    expect(lowestCount(count, 0.25)).toBe(wanted);
  });

  it('names the driest cups by their places, the earlier of two alike', () => {
    expect(lowQuarterIndexes([5, 1, 4, 1, 9, 1, 7, 8])).toEqual([1, 3]);
  });
});

describe('statistics of any cups', () => {
  const depths = fc.array(fc.double({ min: 0, max: 80, noNaN: true }), { minLength: 1, maxLength: 60 });

  it('do not depend on the order of the cups', () => {
    fc.assert(fc.property(depths, fc.infiniteStream(fc.nat()), (cups, keys) => {
      const shuffled = cups.map((cup) => ({ cup, key: keys.next().value ?? 0 })).sort((a, b) => a.key - b.key).map(({ cup }) => cup);
      const a = gridStatistics(cups);
      const b = gridStatistics(shuffled);
      expect(b.meanMm).toBeCloseTo(a.meanMm, 9);
      expect(b.lowQuarterUniformity ?? -1).toBeCloseTo(a.lowQuarterUniformity ?? -1, 9);
    }));
  });

  it('scale: twice the water is the same evenness and twice the mean', () => {
    fc.assert(fc.property(depths, fc.double({ min: 0.1, max: 10, noNaN: true }), (cups, factor) => {
      fc.pre(cups.some((cup) => cup > 1e-6));
      const a = gridStatistics(cups);
      const b = gridStatistics(cups.map((cup) => cup * factor));
      expect(b.meanMm / factor).toBeCloseTo(a.meanMm, 6);
      expect(b.lowQuarterUniformity ?? -1).toBeCloseTo(a.lowQuarterUniformity ?? -1, 6);
      expect(b.lowHalfUniformity ?? -1).toBeCloseTo(a.lowHalfUniformity ?? -1, 6);
      expect(b.christiansenPct ?? -1).toBeCloseTo(a.christiansenPct ?? -1, 4);
    }));
  });

  it('stay in bounds, the lower half never below the lowest quarter, and agree with an independent mean', () => {
    fc.assert(fc.property(depths, (cups) => {
      const found = gridStatistics(cups);
      expect(found.meanMm).toBeCloseTo(mean(cups), 9);
      if (found.lowQuarterUniformity !== null && found.lowHalfUniformity !== null && found.christiansenPct !== null) {
        expect(found.lowQuarterUniformity).toBeGreaterThanOrEqual(0);
        expect(found.lowHalfUniformity).toBeLessThanOrEqual(1);
        expect(found.lowQuarterUniformity).toBeLessThanOrEqual(found.lowHalfUniformity + 1e-12);
        const m = mean(cups);
        expect(found.christiansenPct).toBeCloseTo(100 * (1 - sum(cups.map((cup) => Math.abs(cup - m))) / (cups.length * m)), 6);
      } else {
        expect(Math.max(...cups)).toBe(0);
      }
    }));
  });

  it('take the lowest quarter of the area when cups stand for unlike areas', () => {
    const found = cupStatistics([{ depthMm: 2, weight: 1 }, { depthMm: 4, weight: 1 }, { depthMm: 10, weight: 6 }]);
    expect(found.meanMm).toBeCloseTo(66 / 8, 9);
    expect((found.lowQuarterUniformity ?? 0) * found.meanMm).toBeCloseTo(3, 9);
    expect((found.lowHalfUniformity ?? 0) * found.meanMm).toBeCloseTo((2 + 4 + 20) / 4, 9);
  });

  it('refuse no cups, negative depths and weights of nothing', () => {
    expect(() => gridStatistics([])).toThrow(expect.objectContaining({ field: 'values' }));
    expect(() => gridStatistics([3, -1])).toThrow(expect.objectContaining({ field: 'values[1]' }));
    expect(() => cupStatistics([{ depthMm: 1, weight: 0 }])).toThrow(expect.objectContaining({ field: 'weights[0]' }));
    expect(() => gridStatistics([Number.NaN])).toThrow(expect.objectContaining({ field: 'values[0]' }));
  });
});
