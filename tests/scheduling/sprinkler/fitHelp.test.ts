import fc from 'fast-check';
import { fitHelps, RESTING_MM_PER_WEEK } from '@/scheduling/sprinkler/fitHelp';
import { doesItFit, type FitQuestion } from '@/scheduling/sprinkler/hoseHours';
import { lpmFromGpm, m2FromSquareFeet } from '@/scheduling/units/conversions';

// One inch on 5,000 sq ft at 5 gpm is 10.4 h (arithmetic: 0.623 gal per sq ft and inch).
const example: FitQuestion = { areasM2: [m2FromSquareFeet(5000)], depthMmPerWeek: 25.4, flowLpm: lpmFromGpm(5), hoursPerWeek: 6 };

describe('what helps a week that does not fit', () => {
  it('the example needs 10.4 hours; two taps halve it, and the other ways come out at the hours had', () => {
    const helps = fitHelps(example, { lengthM: 30.48, boreMm: 12.7 });
    expect(helps.map(({ kind }) => kind)).toEqual(['fatter_hose', 'second_tap', 'less_area', 'less_depth', 'resting_part']);
    expect(doesItFit(example).neededHours).toBeCloseTo(10.39, 2);
    const [hose, tap, area, depth, rest] = helps;
    expect(hose).toMatchObject({ boreMm: 15.875 });
    expect(hose?.gainHours).toBeGreaterThan(0.5);
    expect(tap).toMatchObject({ fits: true, neededHours: expect.closeTo(10.39 / 2, 2) as number });
    expect(area).toMatchObject({ areaM2: expect.closeTo(m2FromSquareFeet(5000) * 6 / 10.39, 0) as number });
    expect(depth).toMatchObject({ depthMmPerWeek: expect.closeTo(25.4 * 6 / 10.39, 1) as number });
    if (rest?.kind !== 'resting_part') throw new Error('A part may rest.');
    const litres = rest.areaM2 * RESTING_MM_PER_WEEK + (m2FromSquareFeet(5000) - rest.areaM2) * 25.4;
    expect(litres / example.flowLpm / 60).toBeCloseTo(6, 6);
  });

  it('needs no help when it fits', () => {
    expect(fitHelps({ ...example, hoursPerWeek: 11 })).toEqual([]);
  });

  it('knows no fatter hose than the widest, nor one for a flow that the hose cannot carry', () => {
    expect(fitHelps(example, { lengthM: 30, boreMm: 25.4 }).some(({ kind }) => kind === 'fatter_hose')).toBe(false);
    expect(fitHelps({ ...example, flowLpm: 120, hoursPerWeek: 1 }, { lengthM: 60, boreMm: 12.7 }).some(({ kind }) => kind === 'fatter_hose')).toBe(false);
  });

  it('with no hours at all only ways that need none are left out', () => {
    expect(fitHelps({ ...example, hoursPerWeek: 0 }).map(({ kind, fits }) => [kind, fits])).toEqual([['second_tap', false]]);
  });

  it('every way that is said to fit does', () => {
    fc.assert(fc.property(
      fc.double({ min: 20, max: 2000, noNaN: true }), fc.double({ min: 3, max: 60, noNaN: true }), fc.double({ min: 4, max: 60, noNaN: true }), fc.double({ min: 0.5, max: 30, noNaN: true }), fc.integer({ min: 0, max: 20 }),
      (areaM2, depthMmPerWeek, flowLpm, hoursPerWeek, movesPerWeek) => {
        const question = { areasM2: [areaM2], depthMmPerWeek, flowLpm, hoursPerWeek, movesPerWeek };
        for (const help of fitHelps(question)) {
          expect(help.gainHours).toBeGreaterThan(0);
          if (help.kind === 'less_area') expect(doesItFit({ ...question, areasM2: [help.areaM2 * 0.999999] }).fits).toBe(true);
          if (help.kind === 'less_depth') expect(doesItFit({ ...question, depthMmPerWeek: help.depthMmPerWeek * 0.999999 }).fits).toBe(true);
        }
      },
    ));
  });
});
