import fc from 'fast-check';
import { seedbedForecast, SEEDBED_COEFFICIENT, type SeedbedHour, type SeedbedInput } from '@/scheduling/establishment/seedbed';

const hour = (overrides: Partial<SeedbedHour> = {}): SeedbedHour => ({ et0Mm: 0, rainMm: 0, dewMm: 0, isDaylight: true, ...overrides });
const clearDay = (): SeedbedHour[] => Array.from({ length: 24 }, (_, at) => hour({ et0Mm: at > 5 && at < 20 ? 0.56 * Math.sin((Math.PI * (at - 5)) / 15) : 0, isDaylight: at > 5 && at < 20 }));
const bed = (overrides: Partial<SeedbedInput> = {}): SeedbedInput => ({ hours: clearDay(), doses: [], fieldCapacity: 0.28, wiltingPoint: 0.14, intakeMmPerHour: 15, ...overrides });

describe('a seedbed hour by hour', () => {
  it('dries like the falling-rate law of FAO-56 solved on paper', () => {
    const pull = 0.2;
    const found = seedbedForecast(bed({ hours: Array.from({ length: 200 }, () => hour({ et0Mm: pull / SEEDBED_COEFFICIENT })) }));
    const { evaporableMm: tew, freelyEvaporableMm: rew } = found;
    const freeHours = rew / pull;
    [5, 10, 12, 30, 80, 150].forEach((after) => {
      const onPaper = after <= freeHours ? after * pull : tew - (tew - rew) * Math.exp((-pull * (after - freeHours)) / (tew - rew));
      expect(found.hours[after - 1]?.depletionMm).toBeCloseTo(onPaper, 9);
    });
  });

  it('takes the evaporable water of FAO-56 example 35 for its sandy loam of 0.1 m: 18 mm', () => {
    expect(seedbedForecast(bed({ fieldCapacity: 0.23, wiltingPoint: 0.1, layerM: 0.1 })).evaporableMm).toBeCloseTo(18, 9);
  });

  it('goes dry on a clear afternoon without a dose, and stays moist with four light ones', () => {
    const without = seedbedForecast(bed({ startDepletionMm: 1 }));
    expect(without.firstDryHour).toBeGreaterThan(9);
    expect(without.dryHours).toBeGreaterThan(2);
    const doses = [9, 12, 14, 16].map((at) => ({ hour: at, depthMm: 1.5, rateMmPerHour: 12 }));
    expect(seedbedForecast(bed({ startDepletionMm: 1, doses }))).toMatchObject({ dryHours: 0, firstDryHour: null, washingHours: [] });
  });

  it('washes when water comes faster than the ground takes it', () => {
    const found = seedbedForecast(bed({ doses: [{ hour: 9, depthMm: 6, rateMmPerHour: 30 }] }));
    expect(found.washingHours).toEqual([9]);
    expect(found.hours[9]?.runoffMm).toBeCloseTo(3, 9);
  });

  it('is drier never with mulch, with another dose, or with dew', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 1, noNaN: true }), fc.integer({ min: 0, max: 23 }), fc.double({ min: 0, max: 0.1, noNaN: true }), (mulchCover, at, dewMm) => {
      const plain = seedbedForecast(bed());
      const better = seedbedForecast(bed({ mulchCover, doses: [{ hour: at, depthMm: 1, rateMmPerHour: 10 }], hours: clearDay().map((each) => ({ ...each, dewMm: each.isDaylight ? 0 : dewMm })) }));
      better.hours.forEach((each, index) => expect(each.depletionMm).toBeLessThanOrEqual((plain.hours[index]?.depletionMm ?? 0) + 1e-9));
    }), { numRuns: 60 });
  });

  it('loses and makes no water', () => {
    const anyHour = fc.record({ et0Mm: fc.double({ min: 0, max: 1, noNaN: true }), rainMm: fc.double({ min: 0, max: 30, noNaN: true }), dewMm: fc.double({ min: 0, max: 0.2, noNaN: true }), isDaylight: fc.boolean() });
    fc.assert(fc.property(fc.array(anyHour, { minLength: 1, maxLength: 72 }), fc.array(fc.record({ hour: fc.nat(), depthMm: fc.double({ min: 0, max: 8, noNaN: true }), rateMmPerHour: fc.double({ min: 1, max: 50, noNaN: true }) }), { maxLength: 8 }), (hours, doses) => {
      const placed = doses.map((dose) => ({ ...dose, hour: dose.hour % hours.length }));
      const found = seedbedForecast(bed({ hours, doses: placed, startDepletionMm: 2 }));
      const sum = (pick: (index: number) => number) => hours.reduce((total, _, index) => total + pick(index), 0);
      const came = sum((index) => (hours[index]?.rainMm ?? 0) + (hours[index]?.dewMm ?? 0)) + placed.reduce((total, dose) => total + dose.depthMm, 0);
      const went = sum((index) => (found.hours[index]?.evaporationMm ?? 0) + (found.hours[index]?.drainageMm ?? 0) + (found.hours[index]?.runoffMm ?? 0));
      const last = found.hours[found.hours.length - 1]?.depletionMm ?? Number.NaN;
      expect(2 - came + went).toBeCloseTo(last, 6);
      found.hours.forEach((each) => {
        expect(each.depletionMm).toBeGreaterThanOrEqual(0);
        expect(each.depletionMm).toBeLessThanOrEqual(found.evaporableMm);
      });
    }));
  });

  it.each<[string, Partial<SeedbedInput>]>([
    ['wiltingPoint', { wiltingPoint: 0.3 }], ['layerM', { layerM: 0 }], ['mulchCover', { mulchCover: 1.2 }], ['intakeMmPerHour', { intakeMmPerHour: 0 }],
    ['doses[0].hour', { doses: [{ hour: 24, depthMm: 1, rateMmPerHour: 5 }] }], ['doses[0].depthMm', { doses: [{ hour: 2, depthMm: -1, rateMmPerHour: 5 }] }],
    ['hours[0].et0Mm', { hours: [hour({ et0Mm: Number.NaN })] }], ['startDepletionMm', { startDepletionMm: 50 }],
  ])('refuses impossible %s', (field, overrides) => {
    expect(() => seedbedForecast(bed(overrides))).toThrow(expect.objectContaining({ field }));
  });
});
