import fc from 'fast-check';
import { rowMove, stripPattern } from '@/scheduling/sprinkler/rowMove';
import { PhysicsError } from '@/scheduling/units/physicsError';

const layout = { spacingM: 1, firstDistanceM: 0.5 };

describe('how far to move, from a single row of cups', () => {
  // A triangle that falls evenly to nothing overlaps to an even sheet when moved by its reach (superposition of straight lines).
  it('a strip that falls evenly to nothing is flat when moved by its reach', () => {
    const depthsMm = Array.from({ length: 10 }, (_, index) => 10 - (index + 0.5));
    const found = rowMove({ layout: { ...layout, pattern: 'strip' }, depthsMm, minutes: 60 });
    if (found.kind !== 'found') throw new Error('There is a distance.');
    expect(found.reachM).toBeCloseTo(10.5, 6);
    expect(found.best.lowQuarterUniformity).toBeGreaterThan(0.96);
    // Among distances that are as good the longest is taken.
    expect(found.best.moveM).toBeGreaterThan(9);
    expect(found.best.moveM).toBeLessThan(11.5);
    expect(found.compared.moveM).toBeCloseTo(21, 6);
    expect(found.compared.lowQuarterUniformity).toBeLessThan(found.best.lowQuarterUniformity);
  });

  it('compares with the distance moved today', () => {
    const found = rowMove({ layout, depthsMm: [8, 7, 6, 4, 2, 0], minutes: 30 }, 4);
    expect(found).toMatchObject({ kind: 'found', compared: { moveM: 4 } });
  });

  it('says that there is none when the row is too short or stops in the wet', () => {
    expect(rowMove({ layout, depthsMm: [5, 0, null, 2], minutes: 30 })).toEqual({ kind: 'none', because: 'few_cups' });
    expect(rowMove({ layout, depthsMm: [8, 8, 7, 7], minutes: 30 })).toEqual({ kind: 'none', because: 'edge_not_reached' });
  });

  it('leaves out cups that were not read', () => {
    expect(rowMove({ layout, depthsMm: [8, null, 6, 4, null, 1], minutes: 30 }).kind).toBe('found');
  });

  it('no trial distance is clearly more even than the best', () => {
    fc.assert(fc.property(fc.array(fc.double({ min: 0.5, max: 20, noNaN: true }), { minLength: 3, maxLength: 12 }), fc.double({ min: 0.2, max: 1, noNaN: true }), (wet, share) => {
      const found = rowMove({ layout, depthsMm: [...wet, 0], minutes: 45 });
      if (found.kind !== 'found') throw new Error('There is a distance.');
      const other = rowMove({ layout, depthsMm: [...wet, 0], minutes: 45 }, found.reachM * 2 * share);
      if (other.kind !== 'found') throw new Error('There is a distance.');
      // 0.02 counts as equal; between two trial distances the curve may rise a little more.
      expect(other.compared.lowQuarterUniformity).toBeLessThan(found.best.lowQuarterUniformity + 0.1);
    }), { numRuns: 15 });
  });

  it('a strip is the same all along, and alike on both sides', () => {
    const pattern = stripPattern({ distancesM: [1, 2, 3], ratesMmPerHour: [9, 6, 0] });
    expect(pattern.rateAt(1.5, 0)).toBeCloseTo(7.5, 9);
    expect(pattern.rateAt(-1.5, 40)).toBeCloseTo(7.5, 9);
    expect(pattern.rateAt(3.2, 0)).toBe(0);
    expect(() => stripPattern({ distancesM: [], ratesMmPerHour: [] })).toThrow(PhysicsError);
  });
});
