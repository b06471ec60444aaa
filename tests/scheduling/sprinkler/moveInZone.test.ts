import fc from 'fast-check';
import { bestMoveInZone, patternOutputLph } from '@/scheduling/sprinkler/moveInZone';
import { alternateSets, overlap } from '@/scheduling/sprinkler/overlap';
import { stripPattern } from '@/scheduling/sprinkler/rowMove';
import { griddedPattern, revolvedPattern, sweptPattern, travelledDepthMm, travelledPattern } from '@/scheduling/sprinkler/wettingPattern';

const triangle = { distancesM: [0.5, 2, 4, 6, 7.5], ratesMmPerHour: [15, 12, 8, 4, 1] };
const circle = revolvedPattern(triangle);

describe('water that a pattern throws', () => {
  it('is a third of its peak over the circle for a cone (volume of a cone)', () => {
    const cone = revolvedPattern({ distancesM: [0, 2, 4, 6, 8], ratesMmPerHour: [12, 9, 6, 3, 0] });
    expect(patternOutputLph(cone, 1) / ((Math.PI * 8 ** 2 * 12) / 3)).toBeCloseTo(1, 2);
  });

  it('is rate times area for a flat rectangle with its fading edges, and per metre of zone for a strip', () => {
    const flat = { distancesM: [0, 1, 2, 3, 4, 5], ratesMmPerHour: [10, 10, 10, 10, 10, 10] };
    // Along the sweep 10 m flat and two half-filled metres; across 8 m less one fading tenth on each side, half full.
    expect(patternOutputLph(sweptPattern(flat, 8), 1) / (10 * 11 * 8 * 0.9)).toBeCloseTo(1, 1);
    expect(patternOutputLph(stripPattern(flat), 20) / (10 * 11 * 20)).toBeCloseTo(1, 2);
  });
});

describe('the best move distance in a zone with edges', () => {
  it('wastes less the larger the zone, as only its rim is passed', () => {
    const square = (sideM: number) => bestMoveInZone({ pattern: circle, arrangement: 'square', zone: { widthM: sideM, lengthM: sideM }, fromM: 7, toM: 9, count: 9, samples: 60 }).best;
    const [small, middling, large] = [square(18), square(50), square(120)];
    expect(small.wastedShare).toBeGreaterThan(middling.wastedShare);
    expect(middling.wastedShare).toBeGreaterThan(large.wastedShare);
    expect(large.wastedShare).toBeLessThan(0.1);
    expect(large.lowQuarterUniformity).toBeGreaterThan(0.75);
  });

  it('wastes most of the water on a strip narrower than the throw, and an oscillating pattern of its width wastes far less', () => {
    const zone = { widthM: 24, lengthM: 3 };
    const round = bestMoveInZone({ pattern: circle, arrangement: 'square', zone }).best;
    expect(round.wastedShare).toBeGreaterThan(0.5);
    const bar = sweptPattern({ distancesM: [0, 0.5, 1, 1.5], ratesMmPerHour: [10, 10, 10, 5] }, 8);
    const narrow = bestMoveInZone({ pattern: bar, arrangement: 'line', zone }).best;
    expect(narrow.wastedShare).toBeLessThan(round.wastedShare - 0.2);
  });

  it('accounts for all the water: what arrives and what is wasted is what is thrown', () => {
    fc.assert(fc.property(fc.double({ min: 4, max: 30, noNaN: true }), fc.double({ min: 4, max: 30, noNaN: true }), fc.double({ min: 3, max: 12, noNaN: true }), (widthM, lengthM, moveM) => {
      const { best } = bestMoveInZone({ pattern: circle, arrangement: 'square', zone: { widthM, lengthM }, fromM: moveM, toM: moveM, count: 1, samples: 40 });
      expect(best.wastedShare).toBeGreaterThanOrEqual(0);
      expect(best.wastedShare).toBeLessThan(1);
      const thrown = best.positions.length * patternOutputLph(circle, lengthM);
      expect(best.meanMmPerHour * widthM * lengthM).toBeLessThanOrEqual(thrown * 1.02);
      expect(best.lowQuarterEfficiency).toBeCloseTo(best.lowQuarterUniformity * (1 - best.wastedShare), 9);
    }), { numRuns: 40 });
  });

  it('is the same when the zone and a round pattern are turned', () => {
    const one = bestMoveInZone({ pattern: circle, arrangement: 'square', zone: { widthM: 20, lengthM: 9 } }).best;
    const turned = bestMoveInZone({ pattern: circle, arrangement: 'square', zone: { widthM: 9, lengthM: 20 } }).best;
    expect(turned.lowQuarterEfficiency).toBeCloseTo(one.lowQuarterEfficiency, 9);
    expect(turned.positions).toHaveLength(one.positions.length);
  });

  it('walks up one row and back the next, every position near the zone', () => {
    const { best } = bestMoveInZone({ pattern: circle, arrangement: 'square', zone: { widthM: 30, lengthM: 24 }, fromM: 8, toM: 8, count: 1 });
    for (let index = 1; index < best.positions.length; index += 1) {
      const [a, b] = [best.positions[index - 1], best.positions[index]];
      expect(Math.hypot((a?.xM ?? 0) - (b?.xM ?? 0), (a?.yM ?? 0) - (b?.yM ?? 0))).toBeCloseTo(8, 9);
    }
    best.positions.forEach(({ xM, yM }) => {
      expect(Math.abs(xM - 15)).toBeLessThanOrEqual(15);
      expect(Math.abs(yM - 12)).toBeLessThanOrEqual(12);
    });
  });

  it('takes one position where the throw covers the zone as well as two would', () => {
    const flat = griddedPattern([[9, 9, 9], [9, 9, 9], [9, 9, 9]], 3, { column: 1, row: 1 });
    expect(bestMoveInZone({ pattern: flat, arrangement: 'square', zone: { widthM: 5, lengthM: 5 } }).best.positions).toHaveLength(1);
  });

  it.each<[string, Partial<Parameters<typeof bestMoveInZone>[0]>]>([
    ['zone.widthM', { zone: { widthM: 0, lengthM: 5 } }], ['zone.lengthM', { zone: { widthM: 5, lengthM: Number.NaN } }], ['toM', { fromM: 6, toM: 3 }],
    ['fromM', { fromM: 0.1, toM: 5 }], ['count', { count: 0 }], ['pattern', { pattern: revolvedPattern({ distancesM: [1, 2], ratesMmPerHour: [0, 0] }) }],
  ])('refuses impossible %s', (field, change) => {
    expect(() => bestMoveInZone({ pattern: circle, arrangement: 'square', zone: { widthM: 20, lengthM: 20 }, ...change })).toThrow(expect.objectContaining({ field }));
  });
});

describe('a travelling sprinkler', () => {
  it('leaves beside its track what the sum along the way leaves', () => {
    const pattern = travelledPattern(triangle, 9);
    for (const offset of [0, 1.3, -3, 6.2, 8.9]) {
      expect(pattern.rateAt(offset, 5)).toBeCloseTo(travelledDepthMm(triangle, offset, 9), 1);
    }
    expect(pattern.rateAt(pattern.reachXM + 0.01, 0)).toBe(0);
  });

  it('leaves 0.40 in a pass 40 ft wide at 30 ft/h and 5 gpm (arithmetic of the trade)', () => {
    // 5 gpm = 18.927 L/min over 30 ft/h × 40 ft = 111.48 m²/h.
    const mmPerPass = (18.92705892 * 60) / (30 * 0.3048 * 40 * 0.3048);
    expect(mmPerPass / 25.4).toBeCloseTo(0.4, 2);
    const halfWidthM = 20 * 0.3048;
    const distancesM = Array.from({ length: 25 }, (_, index) => ((index + 0.5) / 26) * halfWidthM);
    // A profile revolved whose output is 5 gpm: any shape leaves on average the same depth over the width.
    const shape = distancesM.map((distance) => 1 - distance / halfWidthM);
    const unscaled = revolvedPattern({ distancesM, ratesMmPerHour: shape });
    const scale = (18.92705892 * 60) / patternOutputLph(unscaled, 1);
    const pattern = travelledPattern({ distancesM, ratesMmPerHour: shape.map((rate) => rate * scale) }, 30 * 0.3048);
    const tracks = overlap({ pattern, arrangement: 'line', moveM: 40 * 0.3048, samples: 60 });
    expect(tracks.meanMm / 25.4).toBeCloseTo(0.4, 2);
  });
});

describe('alternate sets over two rounds', () => {
  it('even out moves that are too far apart, and bring the same water', () => {
    const far = alternateSets({ pattern: circle, arrangement: 'square', moveM: 13 });
    expect(far.gain).toBeGreaterThan(0.2);
    expect(far.overTwoRounds.meanMm).toBeCloseTo(far.sameMarks.meanMm, 6);
  });

  it('gain nothing where a single round is even already', () => {
    const flat = griddedPattern(Array.from({ length: 9 }, () => Array.from({ length: 9 }, () => 6)), 2, { column: 4, row: 4 });
    expect(Math.abs(alternateSets({ pattern: flat, arrangement: 'square', moveM: 2 }).gain ?? 1)).toBeLessThan(1e-9);
  });
});
