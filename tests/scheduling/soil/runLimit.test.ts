import fc from 'fast-check';
import { soakRain } from '@/scheduling/budget';
import {
  COMPACTION_INTAKE_FACTOR, cycleAndSoak, intakeByMm, intakeCurve, intakeRateMmPerHour, rootDepthOn, runLimit, SEASONAL_ROOT_SHARE, seasonalRootShare, soakPattern, soakSteps, SOIL_COMPACTIONS,
  SOIL_TEXTURES, surfaceStorageMm, timeToRunoffHours, type IntakeCurve, type IntakeSetting,
} from '@/scheduling/soil';
import { GRASS_IDS } from '@/scheduling/grass';
import { addDays, mmPerHourFromInchesPerHour } from '@/scheduling/units';
import { RUNOFF_TRUTH } from '../../fixtures/soilWater';

const CLAY: IntakeSetting = { texture: 'clay', slopePct: 0, compaction: 'loose', moistness: 0.5 };
const settings = fc.record({
  texture: fc.constantFrom(...SOIL_TEXTURES), slopePct: fc.double({ min: 0, max: 30, noNaN: true }), compaction: fc.constantFrom(...SOIL_COMPACTIONS), moistness: fc.double({ min: 0, max: 1, noNaN: true }),
});
const curves: fc.Arbitrary<IntakeCurve> = fc.record({ steady: fc.double({ min: 0.5, max: 30, noNaN: true }), extra: fc.double({ min: 0.5, max: 120, noNaN: true }), decayPerHour: fc.double({ min: 0.5, max: 7, noNaN: true }) })
  .map(({ steady, extra, decayPerHour }) => ({ steadyMmPerHour: steady, initialMmPerHour: steady + extra, decayPerHour }));
const inTotal = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0);

describe('intake that falls with time', () => {
  it('begins at the dry rate, ends at the steady one, and its sum is its integral', () => {
    fc.assert(fc.property(curves, fc.double({ min: 0, max: 6, noNaN: true }), (curve, hours) => {
      expect(intakeRateMmPerHour(curve, 0)).toBeCloseTo(curve.initialMmPerHour, 9);
      expect(intakeRateMmPerHour(curve, 200)).toBeCloseTo(curve.steadyMmPerHour, 6);
      let sum = 0;
      for (let part = 0; part < 400; part += 1) sum += (intakeRateMmPerHour(curve, (hours * (part + 0.5)) / 400) * hours) / 400;
      expect(Math.abs(sum - intakeByMm(curve, hours))).toBeLessThan(1e-3 * Math.max(1, sum));
    }));
  });

  it('falls with slope, compaction and moisture', () => {
    for (const texture of SOIL_TEXTURES) {
      const at = (change: Partial<IntakeSetting>) => intakeCurve({ ...CLAY, texture, ...change });
      expect(at({ slopePct: 10 }).steadyMmPerHour).toBeLessThan(at({}).steadyMmPerHour);
      expect(at({ compaction: 'hard' }).steadyMmPerHour).toBeCloseTo(0.3 * at({}).steadyMmPerHour, 12);
      expect(at({ moistness: 1 }).initialMmPerHour).toBeLessThan(at({ moistness: 0 }).initialMmPerHour);
    }
    expect(SOIL_COMPACTIONS.map((each) => COMPACTION_INTAKE_FACTOR[each])).toEqual([1, 0.6, 0.3]);
    expect([0, 5, 16, 40].map(surfaceStorageMm)).toEqual([5, 5, 2.5, 2.5]);
  });

  it('loses no water: infiltrated, standing and run off add up to what fell', () => {
    fc.assert(fc.property(curves, fc.array(fc.double({ min: 0, max: 20, noNaN: true }), { minLength: 1, maxLength: 40 }), fc.double({ min: 0.02, max: 1, noNaN: true }), fc.double({ min: 0, max: 8, noNaN: true }), (curve, depths, stepHours, storageMm) => {
      const steps = soakSteps(curve, depths, stepHours, storageMm);
      expect(inTotal(steps.map((step) => step.infiltratedMm + step.runoffMm)) + (steps[steps.length - 1]?.pondedMm ?? 0)).toBeCloseTo(inTotal(depths), 6);
      expect(steps.every((step) => step.infiltratedMm >= 0 && step.runoffMm >= -1e-12 && step.pondedMm >= 0 && step.pondedMm <= storageMm)).toBe(true);
      const stricter = soakSteps(curve, depths, stepHours, storageMm / 2);
      expect(inTotal(stricter.map((step) => step.runoffMm))).toBeGreaterThanOrEqual(inTotal(steps.map((step) => step.runoffMm)) - 1e-6);
    }));
  });
});

describe('run limit', () => {
  it('without standing water is the published time to runoff (D01, Hung 1995)', () => {
    const { rateInPerHour, initialInPerHour, steadyInPerHour, decayPerHour, hours } = RUNOFF_TRUTH.hung;
    const curve = { initialMmPerHour: mmPerHourFromInchesPerHour(initialInPerHour), steadyMmPerHour: mmPerHourFromInchesPerHour(steadyInPerHour), decayPerHour };
    expect(timeToRunoffHours({ ...curve, rateMmPerHour: mmPerHourFromInchesPerHour(rateInPerHour) })).toBeCloseTo(hours, 4);
    fc.assert(fc.property(settings, fc.double({ min: 1, max: 300, noNaN: true }), (setting, rateMmPerHour) => {
      const limit = runLimit(setting, rateMmPerHour, 0);
      const published = timeToRunoffHours({ ...limit.curve, rateMmPerHour });
      if (published === null) expect(limit.minutes).toBeNull();
      else expect(limit.minutes).toBeCloseTo(60 * published, 6);
    }));
  });

  it('agrees with letting the water fall in small steps until it runs', () => {
    for (const setting of [CLAY, { ...CLAY, texture: 'loam' as const, slopePct: 10, compaction: 'hard' as const }]) {
      const limit = runLimit(setting, 25);
      const steps = soakSteps(limit.curve, Array.from({ length: 6000 }, () => 25 / 600), 1 / 600, limit.storageMm);
      const first = steps.findIndex((step) => step.runoffMm > 0);
      expect(Math.abs(first / 10 - (limit.minutes ?? Infinity))).toBeLessThan(0.5);
    }
  });

  it('is shorter at higher rates, on slopes, on hard and on moist ground, and longer with room on the surface', () => {
    fc.assert(fc.property(settings, fc.double({ min: 1, max: 80, noNaN: true }), (setting, rate) => {
      const minutes = (change: Partial<IntakeSetting>, more = 0, storageMm?: number) => runLimit({ ...setting, ...change }, rate + more, storageMm).minutes ?? Infinity;
      expect(minutes({}, 5)).toBeLessThanOrEqual(minutes({}) + 1e-6);
      expect(minutes({ slopePct: setting.slopePct + 5 })).toBeLessThanOrEqual(minutes({}) + 1e-6);
      expect(minutes({ compaction: 'hard' })).toBeLessThanOrEqual(minutes({}) + 1e-6);
      expect(minutes({ moistness: 1 })).toBeLessThanOrEqual(minutes({}) + 1e-6);
      expect(minutes({}, 0, 4)).toBeGreaterThanOrEqual(minutes({}, 0, 2) - 1e-6);
    }));
    expect(runLimit({ ...CLAY, slopePct: 10, compaction: 'firm' }, 20).sources).toHaveLength(3);
  });
});

describe('cycle and soak', () => {
  it('cuts an inch in twenty minutes into two cycles of ten (D02, Texas A&M AgriLife)', () => {
    const { totalMinutes, cycles, minutesPerCycle, startsApartMinutes } = RUNOFF_TRUTH.cycles;
    expect(cycleAndSoak(totalMinutes, minutesPerCycle)).toEqual({ cycles, minutesPerCycle, startsApartMinutes: startsApartMinutes[0] });
    const limit = { ...runLimit({ ...CLAY, texture: 'sand' }, 30), minutes: minutesPerCycle, curve: { initialMmPerHour: 90, steadyMmPerHour: 20, decayPerHour: 4 } };
    const pattern = soakPattern(totalMinutes, limit, 60);
    expect(pattern).toEqual({ cycles, minutesPerCycle, startsApartMinutes: 30, startMinutes: [0, 30] });
  });

  it('gives all of the set time, no cycle beyond the limit, and time for each to soak in', () => {
    fc.assert(fc.property(settings, fc.double({ min: 1, max: 60, noNaN: true }), fc.double({ min: 1, max: 240, noNaN: true }), (setting, rate, total) => {
      const limit = runLimit(setting, rate);
      const pattern = soakPattern(total, limit, rate);
      expect(pattern.cycles * pattern.minutesPerCycle).toBeCloseTo(total, 6);
      expect(pattern.startMinutes).toHaveLength(pattern.cycles);
      if (limit.minutes !== null) expect(pattern.minutesPerCycle).toBeLessThanOrEqual(Math.max(1, limit.minutes) + 1e-6);
      if (pattern.cycles > 1) {
        expect(pattern.startsApartMinutes).toBeGreaterThanOrEqual(30);
        const soaksMm = (limit.curve.steadyMmPerHour * pattern.startsApartMinutes) / 60;
        if (pattern.startsApartMinutes < 1440) expect(soaksMm).toBeGreaterThanOrEqual((rate * pattern.minutesPerCycle) / 60 - 1e-6);
      }
    }));
  });

  it('refuses the impossible with the field named', () => {
    for (const [field, call] of [
      ['rateMmPerHour', () => runLimit(CLAY, Number.NaN)], ['slopePct', () => runLimit({ ...CLAY, slopePct: -1 }, 5)], ['moistness', () => runLimit({ ...CLAY, moistness: 2 }, 5)],
      ['storageMm', () => runLimit(CLAY, 5, -1)], ['totalMinutes', () => soakPattern(Infinity, runLimit(CLAY, 5), 5)], ['depthsMm[1]', () => soakSteps(intakeCurve(CLAY), [1, -1], 1, 0)],
      ['initialMmPerHour', () => intakeByMm({ initialMmPerHour: 1, steadyMmPerHour: 2, decayPerHour: 1 }, 1)],
    ] as const) expect(call).toThrow(expect.objectContaining({ field }));
  });
});

describe('rain by how fast it falls', () => {
  const ground = { texture: 'clay' as const, slopePct: 8, compaction: 'firm' as const };

  it('all counts when it is gentle, and a cloudburst runs off', () => {
    const gentle = soakRain({ rainMm: 24, hourlyMm: Array.from({ length: 24 }, () => 1), et0Mm: 3 }, ground, 0.5);
    expect(gentle).toMatchObject({ runoffMm: 0, interceptedMm: 0, assumptions: [] });
    expect(gentle.effectiveRainMm).toBe(24);
    const burst = soakRain({ rainMm: 24, hourlyMm: Array.from({ length: 24 }, (_, hour) => (hour === 15 ? 24 : 0)), et0Mm: 3 }, ground, 0.5);
    expect(burst.runoffMm).toBeGreaterThan(5);
    expect(soakRain({ rainMm: 24, et0Mm: 3 }, ground, 0.5).assumptions.map(({ field }) => field)).toEqual(['hourlyMm']);
    expect(soakRain({ rainMm: 24, et0Mm: 3 }, { ...ground, texture: 'sand', slopePct: 0 }, 0.5).runoffMm).toBe(0);
    expect(soakRain({ rainMm: 0.5, et0Mm: 3 }, ground, 0.5)).toMatchObject({ effectiveRainMm: 0, interceptedMm: 0.5, runoffMm: 0 });
  });

  it('is never lost from the account, and more rain never means less for the soil', () => {
    fc.assert(fc.property(settings, fc.array(fc.double({ min: 0, max: 40, noNaN: true }), { minLength: 24, maxLength: 24 }), fc.double({ min: 0, max: 9, noNaN: true }), ({ moistness, ...soil }, hourlyMm, et0Mm) => {
      const rainMm = inTotal(hourlyMm);
      const soaked = soakRain({ rainMm, hourlyMm, et0Mm }, soil, moistness);
      expect(soaked.effectiveRainMm + soaked.rainLossMm).toBeCloseTo(rainMm, 9);
      expect(soaked.interceptedMm + soaked.runoffMm).toBeCloseTo(soaked.rainLossMm, 9);
      expect(soaked.effectiveRainMm).toBeGreaterThanOrEqual(0);
      const doubled = soakRain({ rainMm: 2 * rainMm, hourlyMm: hourlyMm.map((depth) => 2 * depth), et0Mm }, soil, moistness);
      expect(doubled.effectiveRainMm).toBeGreaterThanOrEqual(soaked.effectiveRainMm - 1e-6);
    }));
  });

  it('refuses hours that do not add up', () => {
    expect(() => soakRain({ rainMm: 5, hourlyMm: [5], et0Mm: 3 }, ground, 0.5)).toThrow(expect.objectContaining({ field: 'hourlyMm' }));
    expect(() => soakRain({ rainMm: 5, hourlyMm: Array.from({ length: 24 }, () => 1), et0Mm: 3 }, ground, 0.5)).toThrow(expect.objectContaining({ field: 'hourlyMm' }));
    expect(() => soakRain({ rainMm: Number.NaN, et0Mm: 3 }, ground, 0.5)).toThrow(expect.objectContaining({ field: 'rainMm' }));
  });
});

describe('roots by species, age and season', () => {
  it.each(GRASS_IDS)('%s keeps within a home lawn in every season of both hemispheres', (grass) => {
    for (const latitudeDeg of [42, -42]) {
      for (let day = 0; day < 366; day += 7) {
        const found = rootDepthOn({ grass, texture: 'loam', on: addDays('2028-01-01', day), latitudeDeg });
        expect(found.rootDepthM).toBeGreaterThanOrEqual(0.1);
        expect(found.rootDepthM).toBeLessThanOrEqual(0.3);
        expect(found.totalAvailableMm).toBeCloseTo(155 * found.rootDepthM, 9);
      }
    }
  });

  it('turns the seasons round in the south, and moves without a jump', () => {
    for (const family of ['cool', 'warm'] as const) {
      expect(seasonalRootShare(family, '2026-07-15', 42)).toBeCloseTo(SEASONAL_ROOT_SHARE[family][6] ?? 0, 9);
      expect(seasonalRootShare(family, '2026-01-15', -42)).toBeCloseTo(SEASONAL_ROOT_SHARE[family][6] ?? 0, 9);
      for (let day = 0; day < 731; day += 1) {
        expect(Math.abs(seasonalRootShare(family, addDays('2027-01-01', day + 1), 42) - seasonalRootShare(family, addDays('2027-01-01', day), 42))).toBeLessThan(0.01);
      }
    }
  });

  it('takes a probe as it is, and grows with a sowing', () => {
    expect(rootDepthOn({ grass: 'tall_fescue', texture: 'loam', probedM: 0.2, on: '2026-08-01', latitudeDeg: 42 })).toMatchObject({ rootDepthM: 0.2, seasonalShare: 1, assumptions: [] });
    const young = rootDepthOn({ grass: 'tall_fescue', texture: 'loam', sownOn: '2026-09-01', on: '2026-09-10', latitudeDeg: 42 });
    expect(young.rootDepthM).toBe(0.025);
    expect(young.assumptions).toHaveLength(3);
    expect(rootDepthOn({ grass: 'bermuda', texture: 'clay', on: '2026-07-15' })).toMatchObject({ rootDepthM: 0.15, seasonalShare: 1 });
    expect(() => rootDepthOn({ grass: 'bermuda', texture: 'clay', on: '2026-07-15', latitudeDeg: 100 })).toThrow(expect.objectContaining({ field: 'latitudeDeg' }));
  });
});
