import fc from 'fast-check';
import { gridStatistics } from '@/scheduling/sprinkler/cupStatistics';
import { bestMoveDistance } from '@/scheduling/sprinkler/moveDistance';
import { foldRows, overlap } from '@/scheduling/sprinkler/overlap';
import { griddedPattern, profileReachM, revolvedPattern, sweptPattern, travelledDepthMm } from '@/scheduling/sprinkler/wettingPattern';
import { mFromFeet } from '@/scheduling/units';
import { C03 } from './publishedCases';

const offsetsM = C03.offsetsFeet.map(mFromFeet);
const triangle = { distancesM: [0.5, 2, 4, 6, 7.5], ratesMmPerHour: [15, 12, 8, 4, 1] };

describe('overlap by superposition', () => {
  const folded = foldRows(C03.rows, offsetsM, mFromFeet(C03.moveFeet));

  it('folds the published lateral C03 at 50 ft into the published cells', () => {
    folded.forEach((row, at) => row.forEach((cell, column) => expect(cell).toBeCloseTo(C03.folded[at]?.[column] ?? -1, 9)));
    expect(folded.flat()).toHaveLength(30);
  });

  it.each([['upper', folded.slice(0, 3)], ['lower', folded.slice(3)]] as const)('finds the published evenness of its %s rows', (half, rows) => {
    const found = gridStatistics(rows.flat());
    expect(Math.round(found.christiansenPct ?? 0)).toBe(C03[half].christiansenPct);
    expect(Math.round((found.lowQuarterUniformity ?? 0) * 100)).toBe(C03[half].lowQuarterPct);
    expect(Math.round((found.lowHalfUniformity ?? 0) * 100)).toBe(C03[half].lowHalfPct);
  });

  it('finds the evenness of all its cells', () => {
    const found = gridStatistics(folded.flat());
    expect(found.meanMm).toBeCloseTo(C03.all.mean, 3);
    expect(found.christiansenPct).toBeCloseTo(C03.all.christiansenPct, 2);
    expect((found.lowQuarterUniformity ?? 0) * 100).toBeCloseTo(C03.all.lowQuarterPct, 2);
    expect((found.lowHalfUniformity ?? 0) * 100).toBeCloseTo(C03.all.lowHalfPct, 2);
  });

  it('keeps all the water when it folds, at any whole number of spacings', () => {
    const water = C03.rows.flat().reduce((sum, each) => sum + each, 0);
    for (const feet of [10, 20, 30, 50, 70]) {
      expect(foldRows(C03.rows, offsetsM, mFromFeet(feet)).flat().reduce((sum, each) => sum + each, 0)).toBeCloseTo(water, 9);
    }
    expect(() => foldRows(C03.rows, offsetsM, mFromFeet(47))).toThrow(expect.objectContaining({ field: 'moveM' }));
  });

  it('keeps all the water of a revolved profile in squares, whatever the distance', () => {
    const pattern = revolvedPattern(triangle);
    const reach = profileReachM(triangle);
    let perHour = 0;
    const steps = 4000;
    for (let step = 0; step < steps; step += 1) {
      const radius = ((step + 0.5) / steps) * reach;
      perHour += pattern.rateAt(radius, 0) * 2 * Math.PI * radius * (reach / steps);
    }
    for (const moveM of [3, 6, 9, 14]) {
      expect(overlap({ pattern, arrangement: 'square', moveM, samples: 60 }).meanMm * moveM * moveM / perHour).toBeCloseTo(1, 2);
    }
  });

  it('gives the same lawn as the cups when a gridded pattern is laid at the cup spacing', () => {
    const rates = [[1, 2, 1], [2, 8, 2], [1, 2, 1]];
    const pattern = griddedPattern(rates, 2, { column: 1, row: 1 });
    expect(pattern.rateAt(0, 0)).toBe(8);
    expect(pattern.rateAt(-2, 2)).toBe(1);
    expect(overlap({ pattern, arrangement: 'square', moveM: 2 }).meanMm).toBeCloseTo(20, 6);
  });

  it('never makes the ground less even by alternating sets half-way over two rounds, in squares', () => {
    fc.assert(fc.property(fc.double({ min: 4, max: 14, noNaN: true }), (moveM) => {
      const pattern = revolvedPattern(triangle);
      const plain = overlap({ pattern, arrangement: 'square', moveM });
      const alternating = overlap({ pattern, arrangement: 'square', moveM, isAlternating: true });
      expect(alternating.christiansenPct ?? 0).toBeGreaterThanOrEqual((plain.christiansenPct ?? 0) - 1e-6);
      expect(alternating.meanMm).toBeCloseTo(plain.meanMm, 6);
    }), { numRuns: 20 });
  });

  it('wets a sector as much as its share of the circle', () => {
    const half = revolvedPattern(triangle, { fromDeg: -90, toDeg: 90 });
    expect(half.rateAt(0, 3)).toBeCloseTo(10, 9);
    expect(half.rateAt(0, -3)).toBe(0);
    expect(half.rateAt(3, 0.1)).toBeGreaterThan(0);
  });

  it('leaves with a traveller the depth that its rate and its time over a place make', () => {
    const flat = { distancesM: [1, 2, 3, 4, 5], ratesMmPerHour: [10, 10, 10, 10, 10] };
    const slow = travelledDepthMm(flat, 0, 2);
    expect(slow).toBeCloseTo(travelledDepthMm(flat, 0, 4) * 2, 9);
    expect(slow).toBeCloseTo((10 * (2 * 5 + 2 * 0.5)) / 2, 1);
    expect(travelledDepthMm(flat, 7, 2)).toBe(0);
  });
});

describe('the best move distance', () => {
  it('is about half the wetted width of a triangular profile, as practice has it, and beats no overlap', () => {
    const pattern = revolvedPattern(triangle);
    const { best, options } = bestMoveDistance({ pattern, arrangement: 'square' });
    expect(best.moveM / (2 * pattern.reachXM)).toBeGreaterThan(0.35);
    expect(best.moveM / (2 * pattern.reachXM)).toBeLessThan(0.65);
    expect(best.lowQuarterUniformity).toBeGreaterThan(0.8);
    expect(best.lowQuarterUniformity).toBeGreaterThan((options[options.length - 1]?.lowQuarterUniformity ?? 1) + 0.3);
  });

  it('takes the longest of distances that are as even', () => {
    const flat = sweptPattern({ distancesM: [1, 4, 7], ratesMmPerHour: [10, 10, 10] }, 10);
    const { best, options } = bestMoveDistance({ pattern: flat, arrangement: 'line', count: 60 });
    const top = Math.max(...options.map((option) => option.lowQuarterUniformity));
    expect(options.filter((option) => option.moveM > best.moveM).every((option) => option.lowQuarterUniformity < top - 0.02)).toBe(true);
    expect(best.lowQuarterUniformity).toBeGreaterThanOrEqual(top - 0.02);
  });

  it('refuses a dry pattern and limits the wrong way round', () => {
    expect(() => bestMoveDistance({ pattern: revolvedPattern({ distancesM: [1, 2], ratesMmPerHour: [0, 0] }), arrangement: 'square' })).toThrow(expect.objectContaining({ field: 'pattern' }));
    expect(() => bestMoveDistance({ pattern: revolvedPattern(triangle), arrangement: 'square', fromM: 5, toM: 2 })).toThrow(expect.objectContaining({ field: 'toM' }));
  });

  it.each([
    ['distancesM[1]', { distancesM: [2, 1], ratesMmPerHour: [1, 1] }],
    ['ratesMmPerHour[0]', { distancesM: [1, 2], ratesMmPerHour: [-1, 1] }],
    ['ratesMmPerHour', { distancesM: [1, 2], ratesMmPerHour: [1] }],
    ['ratesMmPerHour', { distancesM: [], ratesMmPerHour: [] }],
  ])('refuses a profile with impossible %s', (field, profile) => {
    expect(() => revolvedPattern(profile)).toThrow(expect.objectContaining({ field }));
  });
});
