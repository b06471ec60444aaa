import fc from 'fast-check';
import { GRASS_IDS } from '@/scheduling/grass';
import {
  adjustedDepletionFraction, availableWaterMm, cycleAndSoak, establishedRootDepth, readilyAvailableWaterMm, seededRootDepthM, slopeIntakeFactor, SOIL_TEXTURES, soilIntake, soilWater,
  steadyIntakeMmPerHour, stressCoefficient, timeToRunoffHours, totalAvailableWaterMm, totalEvaporableWaterMm, zoneTimeToRunoffHours,
} from '@/scheduling/soil';
import { mmPerHourFromInchesPerHour } from '@/scheduling/units';
import { FAO56_WATER } from '../../fixtures/fao56Water';

describe('soil textures (FAO-56 table 19)', () => {
  it.each(SOIL_TEXTURES)('%s takes its figures from within the published ranges', (texture) => {
    const water = soilWater(texture);
    const inside = (value: number, [low, high]: readonly [number, number]) => expect(value >= low - 1e-9 && value <= high + 1e-9).toBe(true);
    inside(water.fieldCapacity, water.ranges.fieldCapacity);
    inside(water.wiltingPoint, water.ranges.wiltingPoint);
    inside(water.availableMmPerM / 1000, water.ranges.available);
    inside(water.rewMm, water.ranges.rewMm);
    inside(water.tewMm, water.ranges.tewMm);
    expect(water.rewMm).toBeLessThan(water.tewMm);
  });

  it('gives the soils of the worked examples', () => {
    expect(soilWater('sandy_loam').fieldCapacity).toBeCloseTo(0.23, 12);
    expect(soilWater('sandy_loam').wiltingPoint).toBeCloseTo(0.1, 12);
    expect(soilWater('loamy_sand').fieldCapacity).toBeCloseTo(0.15, 12);
    expect(soilWater('loamy_sand').wiltingPoint).toBeCloseTo(0.06, 12);
    expect(totalEvaporableWaterMm(0.23, 0.1, 0.1)).toBeCloseTo(18, 10);
    expect(availableWaterMm('sandy_loam', 0.2)).toBeCloseTo(26, 10);
  });
});

describe('available water (A36, FAO-56 example 36)', () => {
  it.each(FAO56_WATER.example36)('$soil under $crop', ({ fieldCapacity, wiltingPoint, rootDepthM, p, taw, raw }) => {
    const computed = totalAvailableWaterMm(fieldCapacity, wiltingPoint, rootDepthM);
    expect(Math.round(computed)).toBe(taw);
    // Printed whole; a half is rounded either way there.
    expect(Math.abs(readilyAvailableWaterMm(computed, p) - raw)).toBeLessThanOrEqual(0.5 + 1e-9);
  });

  it('refuses contents out of order and depths of nothing', () => {
    expect(() => totalAvailableWaterMm(0.2, 0.3, 1)).toThrow(expect.objectContaining({ field: 'wiltingPoint' }));
    expect(() => totalAvailableWaterMm(0.2, 0.1, 0)).toThrow(expect.objectContaining({ field: 'rootDepthM' }));
    expect(() => totalAvailableWaterMm(Number.NaN, 0.1, 1)).toThrow(expect.objectContaining({ field: 'fieldCapacity' }));
  });
});

describe('depletion fraction', () => {
  it('is the table value at 5 mm/d, moves by .04 a millimetre and stays in its bounds', () => {
    expect(adjustedDepletionFraction(0.4, 5)).toBe(0.4);
    expect(adjustedDepletionFraction(0.4, 3)).toBeCloseTo(0.48, 12);
    expect(adjustedDepletionFraction(0.5, 8)).toBeCloseTo(0.38, 12);
    expect(adjustedDepletionFraction(0.4, 20)).toBe(0.1);
    expect(adjustedDepletionFraction(0.8, 0)).toBe(0.8);
    expect(adjustedDepletionFraction(0.4, 5, 'fine')).toBeLessThan(0.4);
    expect(adjustedDepletionFraction(0.4, 5, 'coarse')).toBeGreaterThan(0.4);
  });

  it('stress is one to the refill line and falls to nothing at the wilting point', () => {
    fc.assert(fc.property(fc.double({ min: 1, max: 300, noNaN: true }), fc.double({ min: 0.05, max: 0.95, noNaN: true }), fc.double({ min: 0, max: 1.5, noNaN: true }), (taw, p, part) => {
      const ks = stressCoefficient(part * taw, taw, p * taw);
      expect(ks).toBeGreaterThanOrEqual(0);
      expect(ks).toBeLessThanOrEqual(1);
      if (part <= p) expect(ks).toBe(1);
      if (part >= 1) expect(ks).toBe(0);
    }));
  });
});

describe('intake and runoff', () => {
  it('reaches runoff after 34 minutes (D01, Hung 1995)', () => {
    const inches = (value: number) => mmPerHourFromInchesPerHour(value);
    const hours = timeToRunoffHours({ rateMmPerHour: inches(1.5), initialMmPerHour: inches(3), steadyMmPerHour: inches(0.25), decayPerHour: 2 });
    expect(hours).toBeCloseTo(0.5657, 4);
  });

  it('agrees with time compression: the water given by then is what Horton could have taken when its rate met the application', () => {
    fc.assert(fc.property(fc.double({ min: 1, max: 40, noNaN: true }), fc.double({ min: 1, max: 60, noNaN: true }), fc.double({ min: 0.02, max: 0.98, noNaN: true }), fc.double({ min: 0.5, max: 7, noNaN: true }), (steady, extra, part, decay) => {
      const initial = steady + extra;
      const rate = steady + part * extra;
      const hours = timeToRunoffHours({ rateMmPerHour: rate, initialMmPerHour: initial, steadyMmPerHour: steady, decayPerHour: decay }) ?? -1;
      const meeting = Math.log((initial - steady) / (rate - steady)) / decay;
      const taken = steady * meeting + ((initial - steady) / decay) * (1 - Math.exp(-decay * meeting));
      expect(hours * rate).toBeCloseTo(taken, 6);
    }));
  });

  it('never runs off at or below the steady rate, and at once above the dry one', () => {
    const soil = { initialMmPerHour: 50, steadyMmPerHour: 10, decayPerHour: 3 };
    expect(timeToRunoffHours({ ...soil, rateMmPerHour: 10 })).toBeNull();
    expect(timeToRunoffHours({ ...soil, rateMmPerHour: 50 })).toBe(0);
    expect(() => timeToRunoffHours({ ...soil, initialMmPerHour: 5, rateMmPerHour: 20 })).toThrow(expect.objectContaining({ field: 'initialMmPerHour' }));
  });

  it('is shorter on slopes, on moist ground and on finer soil', () => {
    const time = (...input: Parameters<typeof zoneTimeToRunoffHours>) => zoneTimeToRunoffHours(...input) ?? Infinity;
    expect(time('clay', 10, 15, 0.2)).toBeLessThan(time('clay', 0, 15, 0.2));
    expect(time('clay', 0, 8, 1)).toBeLessThan(time('clay', 0, 8, 0));
    expect(time('clay', 0, 15, 0.2)).toBeLessThan(time('loam', 0, 15, 0.2));
    expect([0, 4, 5, 8, 12, 16, 30].map(slopeIntakeFactor)).toEqual([1, 1, 0.8, 0.8, 0.6, 0.4, 0.25]);
    expect(() => slopeIntakeFactor(-1)).toThrow(expect.objectContaining({ field: 'slopePct' }));
  });

  it('takes less from coarse to fine, and lets a wide-open hose sprinkler run on all but fine soils', () => {
    const rates = SOIL_TEXTURES.map((texture) => soilIntake(texture).steadyMmPerHour);
    expect([...rates].sort((a, b) => b - a)).toEqual(rates);
    expect(steadyIntakeMmPerHour('loam', 0)).toBeCloseTo(7.62, 10);
    expect(zoneTimeToRunoffHours('loam', 0, mmPerHourFromInchesPerHour(0.25), 0.5)).toBeNull();
  });

  it('cuts twenty minutes into two cycles of ten, thirty minutes apart (D02, Texas A&M AgriLife)', () => {
    expect(cycleAndSoak(20, 10)).toEqual({ cycles: 2, minutesPerCycle: 10, startsApartMinutes: 30 });
    expect(cycleAndSoak(9, 10)).toEqual({ cycles: 1, minutesPerCycle: 9, startsApartMinutes: 0 });
    expect(cycleAndSoak(90, null).cycles).toBe(1);
    expect(cycleAndSoak(100, 40)).toMatchObject({ cycles: 3 });
    expect(() => cycleAndSoak(100, 0)).toThrow(expect.objectContaining({ field: 'limitMinutes' }));
  });
});

describe('roots', () => {
  it.each(GRASS_IDS)('%s stays within a home lawn and within six inches on clay', (grass) => {
    const loam = establishedRootDepth(grass, 'loam', null);
    expect(loam.isDefault).toBe(true);
    expect(loam.rootDepthM).toBeGreaterThanOrEqual(0.1);
    expect(loam.rootDepthM).toBeLessThanOrEqual(0.3);
    expect(establishedRootDepth(grass, 'clay', null).rootDepthM).toBeLessThanOrEqual(0.15);
    expect(establishedRootDepth(grass, 'clay', 0.22)).toEqual({ rootDepthM: 0.22, isDefault: false, source: 'probed' });
  });

  it('of a sowing grow from the moist inch to full depth and never shrink', () => {
    expect(seededRootDepthM(-5, 0.2)).toBe(0.025);
    expect(seededRootDepthM(0, 0.2)).toBe(0.025);
    expect(seededRootDepthM(14, 0.2)).toBe(0.025);
    expect(seededRootDepthM(52, 0.2)).toBeCloseTo(0.1125, 10);
    expect(seededRootDepthM(400, 0.2)).toBe(0.2);
    fc.assert(fc.property(fc.integer({ min: -20, max: 300 }), fc.double({ min: 0.02, max: 0.5, noNaN: true }), (days, full) => {
      expect(seededRootDepthM(days + 1, full)).toBeGreaterThanOrEqual(seededRootDepthM(days, full));
      expect(seededRootDepthM(days, full)).toBeLessThanOrEqual(full);
    }));
    expect(() => establishedRootDepth('bermuda', 'loam', -1)).toThrow(expect.objectContaining({ field: 'rootDepthM' }));
  });
});
