import fc from 'fast-check';
import { degreeDaysC, degreeDaySumsC, soilTemperaturesC, trailingMeans } from '@/scheduling/weather';
import { recordedWeather } from '../../fixtures/vegaWeather';

const series = fc.array(fc.double({ min: -30, max: 40, noNaN: true }), { minLength: 1, maxLength: 60 });

describe('soil temperature from the air (Zheng, Hunt, Running 1993)', () => {
  it('is the running mean of eleven days on bare ground', () => {
    const air = Array.from({ length: 30 }, (_, index) => index);
    const soil = soilTemperaturesC({ airMeansC: air });
    expect(soil[10]).toBeCloseTo(5, 10);
    expect(soil[29]).toBeCloseTo(24, 10);
    expect(soil[0]).toBe(0);
  });

  it('stays within the air of the window, bare or covered', () => {
    fc.assert(fc.property(series, fc.double({ min: 0, max: 6, noNaN: true }), (air, leafAreaIndex) => {
      const soil = soilTemperaturesC({ airMeansC: air, leafAreaIndex });
      expect(soil).toHaveLength(air.length);
      for (const value of soil) {
        expect(value).toBeGreaterThanOrEqual(Math.min(...air) - 1e-9);
        expect(value).toBeLessThanOrEqual(Math.max(...air) + 1e-9);
      }
    }));
  });

  it('settles on steady air and warms later under leaves', () => {
    const spring = [...Array.from({ length: 20 }, () => 5), ...Array.from({ length: 20 }, () => 15)];
    const bare = soilTemperaturesC({ airMeansC: spring });
    const grass = soilTemperaturesC({ airMeansC: spring, leafAreaIndex: 2 });
    expect(bare[39]).toBeCloseTo(15, 9);
    expect(grass[25] ?? 99).toBeLessThan(bare[25] ?? 0);
    expect(soilTemperaturesC({ airMeansC: Array.from({ length: 300 }, () => 12), leafAreaIndex: 3 })[299]).toBeCloseTo(12, 9);
  });

  it('does not freeze unfrozen soil under snow', () => {
    const air = [...Array.from({ length: 11 }, () => 2), ...Array.from({ length: 30 }, () => -15)];
    const soil = soilTemperaturesC({ airMeansC: air, snow: air.map((value) => value < 0) });
    expect(Math.min(...soil)).toBeGreaterThanOrEqual(0);
  });

  it('is smoother than the air over a recorded year and follows its seasons', () => {
    const air = recordedWeather('New York').slice(0, 366).map(({ tminC, tmaxC }) => ((tminC ?? 0) + (tmaxC ?? 0)) / 2);
    const soil = soilTemperaturesC({ airMeansC: air });
    const swing = (values: number[]) => values.slice(1).reduce((sum, value, index) => sum + Math.abs(value - (values[index] ?? 0)), 0);
    expect(swing(soil)).toBeLessThan(swing(air) / 3);
    expect(soil[200] ?? 0).toBeGreaterThan((soil[30] ?? 0) + 12);
  });

  it('refuses gaps', () => {
    expect(() => soilTemperaturesC({ airMeansC: [1, Number.NaN] })).toThrow(expect.objectContaining({ field: 'airMeansC[1]' }));
    expect(trailingMeans([], 11)).toEqual([]);
  });
});

describe('degree days', () => {
  it('count the mean above the base', () => {
    expect(degreeDaysC(10, 20, 3.6)).toBeCloseTo(11.4, 10);
    expect(degreeDaysC(-5, 3, 3.6)).toBe(0);
    expect(degreeDaySumsC([10, 2, 5], 3.6)).toEqual([6.4, 6.4, 7.800000000000001]);
  });

  it('reach 50 % germination of perennial ryegrass and bluegrass in the published days (Larsen and Bibby 2005, Crop Sci 45:2030)', () => {
    const daysAt = (temperatureC: number, baseC: number, wanted: number) => wanted / degreeDaysC(temperatureC, temperatureC, baseC);
    expect(daysAt(10, 3.6, 63.9)).toBeCloseTo(10.0, 1);
    expect(daysAt(15, 3.6, 63.9)).toBeCloseTo(5.6, 1);
    expect(daysAt(20, 3.6, 63.9)).toBeCloseTo(3.9, 1);
    expect(Math.abs(daysAt(10, 2.6, 115.6) - 15.6)).toBeLessThan(0.051);
    expect(daysAt(15, 2.6, 115.6)).toBeCloseTo(9.3, 1);
    expect(Math.abs(daysAt(20, 2.6, 115.6) - 6.6)).toBeLessThan(0.051);
  });
});
