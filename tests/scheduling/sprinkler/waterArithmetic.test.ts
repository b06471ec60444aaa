import fc from 'fast-check';
import { bucketTest } from '@/scheduling/sprinkler/bucketTest';
import { doesItFit, hoseHours } from '@/scheduling/sprinkler/hoseHours';
import { flowThroughHose, hoseLoss, hoseLossPsi } from '@/scheduling/sprinkler/hoseLoss';
import { minutesForDepth, rateFromFlow, runLengthAdvice } from '@/scheduling/sprinkler/runTimes';
import { feetFromM, gallonsFromL, gpmFromLpm, inchesPerHourFromMmPerHour, lFromGallons, lpmFromGpm, m2FromSquareFeet, mFromFeet, mmFromInches, mmPerHourFromInchesPerHour, mphFromMps } from '@/scheduling/units';

describe('a bucket test', () => {
  it('makes 5 gal in 30 s 10 gpm (H04, University of Idaho)', () => {
    expect(gpmFromLpm(bucketTest({ volumeL: lFromGallons(5), seconds: 30 }).flowLpm)).toBeCloseTo(10, 9);
  });

  it('knows that a 5-gallon bucket holds 4.85 to 5.1 gal (ATTRA 2006) and that hands are slow', () => {
    const { range } = bucketTest({ volumeL: lFromGallons(5), seconds: 30 });
    expect(gpmFromLpm(range.low)).toBeLessThanOrEqual((4.85 / 30) * 60);
    expect(gpmFromLpm(range.high)).toBeGreaterThanOrEqual((5.1 / 30) * 60);
  });

  it('asks for a bigger bucket when it fills in seconds', () => {
    expect(bucketTest({ volumeL: 2, seconds: 5 }).isTooFast).toBe(true);
    expect(bucketTest({ volumeL: 10, seconds: 40 }).isTooFast).toBe(false);
  });

  it.each([['volumeL', 0, 10], ['volumeL', 501, 10], ['seconds', 10, 0], ['seconds', 10, 3601], ['volumeL', Number.NaN, 10]])('refuses impossible %s', (field, volumeL, seconds) => {
    expect(() => bucketTest({ volumeL, seconds })).toThrow(expect.objectContaining({ field }));
  });

  it('has a range that holds the flow and narrows with a slower fill', () => {
    fc.assert(fc.property(fc.double({ min: 0.5, max: 500, noNaN: true }), fc.double({ min: 1, max: 1800, noNaN: true }), (volumeL, seconds) => {
      const one = bucketTest({ volumeL, seconds });
      const two = bucketTest({ volumeL, seconds: seconds * 2 });
      expect(one.range.low).toBeLessThan(one.flowLpm);
      expect(one.range.high).toBeGreaterThan(one.flowLpm);
      expect((two.range.high - two.range.low) / two.flowLpm).toBeLessThan((one.range.high - one.range.low) / one.flowLpm);
    }));
  });
});

describe('rate, depth and minutes', () => {
  it('spreads 10 gpm on 1,000 sq ft as 0.9625 in/h (C05, public utility page)', () => {
    expect(inchesPerHourFromMmPerHour(rateFromFlow(lpmFromGpm(10), m2FromSquareFeet(1000)))).toBeCloseTo(0.9625, 4);
  });

  it('needs 20 min for 1 in at a quarter inch in 5 min, and 100 min at a tenth in 10 (C06, Texas A&M)', () => {
    expect(minutesForDepth({ depthMm: 25.4, rateMmPerHour: mmPerHourFromInchesPerHour(0.25 * 12) })).toBeCloseTo(20, 9);
    expect(minutesForDepth({ depthMm: 25.4, rateMmPerHour: mmPerHourFromInchesPerHour(0.1 * 6) })).toBeCloseTo(100, 9);
  });

  it('gives back the depth it was asked for', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 60, noNaN: true }), fc.double({ min: 0.5, max: 60, noNaN: true }), fc.double({ min: 1, max: 2, noNaN: true }), (depthMm, rateMmPerHour, runTimeMultiplier) => {
      const minutes = minutesForDepth({ depthMm, rateMmPerHour, runTimeMultiplier });
      expect((minutes / 60) * rateMmPerHour).toBeCloseTo(depthMm * runTimeMultiplier, 6);
    }));
  });

  it('refuses a rate of nothing', () => {
    expect(() => minutesForDepth({ depthMm: 10, rateMmPerHour: 0 })).toThrow(expect.objectContaining({ field: 'rateMmPerHour' }));
    expect(() => rateFromFlow(10, 0)).toThrow(expect.objectContaining({ field: 'areaM2' }));
  });

  it('lets a slow sprinkler run for hours with a ruler and minutes with a jug', () => {
    const expectedRateMmPerHour = mmPerHourFromInchesPerHour(0.17);
    const ruler = runLengthAdvice({ expectedRateMmPerHour, reading: { kind: 'depth' } });
    expect(ruler.minutes).toBeGreaterThan(180);
    expect((ruler.minutes / 60) * expectedRateMmPerHour).toBeGreaterThanOrEqual(ruler.readingErrorMm / 0.1);
    const jug = runLengthAdvice({ expectedRateMmPerHour, reading: { kind: 'volume', mouthAreaCm2: 50 } });
    expect(jug.minutes).toBe(15);
    expect(runLengthAdvice({ flowLpm: 1, areaM2: 200, reading: { kind: 'depth' } })).toMatchObject({ minutes: 600, isTooSlowToRead: true });
  });
});

describe('hose hours', () => {
  it('are 623 gal for 1 in on 1,000 sq ft (H05)', () => {
    expect(gallonsFromL(hoseHours({ areaM2: m2FromSquareFeet(1000), depthMm: 25.4, flowLpm: 10 }).volumeL)).toBeCloseTo(623.4, 1);
  });

  it('are 10.4 for 1 in on 5,000 sq ft at 5 gpm', () => {
    expect(hoseHours({ areaM2: m2FromSquareFeet(5000), depthMm: 25.4, flowLpm: lpmFromGpm(5) }).hours).toBeCloseTo(10.4, 1);
  });

  it('tell what fits and what the hours could do', () => {
    const question = { areasM2: [m2FromSquareFeet(3000), m2FromSquareFeet(2000)], depthMmPerWeek: 25.4, flowLpm: lpmFromGpm(5), hoursPerWeek: 6, movesPerWeek: 12, moveMinutes: 5 };
    const found = doesItFit(question);
    expect(found.neededHours).toBeCloseTo(11.39, 2);
    expect(found.fits).toBe(false);
    expect(found.load).toBeCloseTo(1.9, 1);
    expect(doesItFit({ ...question, depthMmPerWeek: found.affordableDepthMm }).load).toBeCloseTo(1, 9);
    expect(doesItFit({ ...question, areasM2: [found.affordableAreaM2] }).load).toBeCloseTo(1, 9);
    expect(doesItFit({ ...question, hoursPerWeek: 0 })).toMatchObject({ load: null, fits: false, affordableDepthMm: 0 });
  });

  it('refuse no area and negative hours', () => {
    expect(() => doesItFit({ areasM2: [], depthMmPerWeek: 25, flowLpm: 10, hoursPerWeek: 5 })).toThrow(expect.objectContaining({ field: 'areasM2' }));
    expect(() => doesItFit({ areasM2: [10], depthMmPerWeek: 25, flowLpm: 10, hoursPerWeek: -1 })).toThrow(expect.objectContaining({ field: 'hoursPerWeek' }));
  });
});

describe('pressure lost in a hose', () => {
  it('is 9 ft per 100 ft at 200 gpm in 3.048 in (H01, engineeringtoolbox.com)', () => {
    expect(feetFromM(hoseLoss(lpmFromGpm(200), { boreMm: mmFromInches(3.048), lengthM: mFromFeet(100) }).headM)).toBeCloseTo(9.007, 2);
    expect(feetFromM(hoseLoss(lpmFromGpm(200), { boreMm: mmFromInches(3.048), lengthM: mFromFeet(30) }).headM)).toBeCloseTo(2.7, 1);
  });

  it.each([[0.5, 13.9], [0.625, 4.7], [0.75, 1.9]])('at 5 gpm in 50 ft of %f in is %f psi (H02, computed from the formula)', (boreInches, psi) => {
    expect(hoseLossPsi(lpmFromGpm(5), { boreMm: mmFromInches(boreInches), lengthM: mFromFeet(50) })).toBeCloseTo(psi, 1);
  });

  it('at 8 gpm in 100 ft of ⅝ in is 22.4 psi at 8.4 ft/s (H03, computed from the formula)', () => {
    const hose = { boreMm: mmFromInches(0.625), lengthM: mFromFeet(100) };
    expect(hoseLossPsi(lpmFromGpm(8), hose)).toBeCloseTo(22.4, 1);
    expect(feetFromM(hoseLoss(lpmFromGpm(8), hose).speedMps)).toBeCloseTo(8.4, 1);
    expect(mphFromMps(hoseLoss(0, hose).speedMps)).toBe(0);
  });

  it('agrees within 1.5 % with the same law in SI units, whose exponent of the bore is rounded', () => {
    fc.assert(fc.property(fc.double({ min: 2, max: 40, noNaN: true }), fc.double({ min: 10, max: 25, noNaN: true }), fc.double({ min: 1, max: 100, noNaN: true }), (flowLpm, boreMm, lengthM) => {
      const headM = (10.67 * lengthM * (flowLpm / 60000) ** 1.852) / (140 ** 1.852 * (boreMm / 1000) ** 4.87);
      expect(hoseLoss(flowLpm, { boreMm, lengthM }).headM / headM).toBeGreaterThan(0.985);
      expect(hoseLoss(flowLpm, { boreMm, lengthM }).headM / headM).toBeLessThan(1.015);
    }));
  });

  it('changes the flow: the same hose gives the same, a longer or thinner one less, and pressures add up', () => {
    const measuredHose = { boreMm: 15.9, lengthM: 15 };
    const same = flowThroughHose({ measuredLpm: 15, measuredHose, newHose: measuredHose, tapPressureKpa: 350 });
    expect(same.flowLpm).toBeCloseTo(15, 6);
    const longer = flowThroughHose({ measuredLpm: 15, measuredHose, newHose: { boreMm: 15.9, lengthM: 60 }, tapPressureKpa: 350 });
    expect(longer.flowLpm).toBeLessThan(15);
    expect(longer.pressureAfterKpa + hoseLoss(longer.flowLpm, { boreMm: 15.9, lengthM: 60 }).lossKpa).toBeCloseTo(350, 6);
    expect(flowThroughHose({ measuredLpm: 15, measuredHose, newHose: { boreMm: 19, lengthM: 15 } }).flowLpm).toBeGreaterThan(15);
    expect(() => flowThroughHose({ measuredLpm: 150, measuredHose, newHose: measuredHose })).toThrow(expect.objectContaining({ field: 'measuredLpm' }));
  });
});
