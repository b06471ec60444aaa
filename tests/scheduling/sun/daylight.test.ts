import fc from 'fast-check';
import { daylight, sunPosition } from '@/scheduling/sun';
import { addDays, dayOfYear, epochDayOf } from '@/scheduling/units';
import { solarDay } from '@/scheduling/weather';
import { SUN_TRUTH } from '../../fixtures/sun';
import { TOLERANCES } from '../../fixtures/tolerances';

describe('place of the sun (I01)', () => {
  it.each(SUN_TRUTH.positions)('$id agrees with the NREL algorithm', ({ at, latitudeDeg, longitudeDeg, refractedAltitudeDeg, azimuthDeg }) => {
    const sun = sunPosition(new Date(at), latitudeDeg, longitudeDeg);
    expect(Math.abs(sun.altitudeDeg - refractedAltitudeDeg)).toBeLessThan(TOLERANCES.sunPositionDeg);
    expect(Math.abs(sun.azimuthDeg - azimuthDeg)).toBeLessThan(TOLERANCES.sunPositionDeg);
  });

  it('stands in the north at noon on the southern hemisphere', () => {
    const { solarNoonAt } = daylight({ latitudeDeg: -33.87, longitudeDeg: 151.2, on: '2026-06-21', utcOffsetMinutes: 600 });
    const { azimuthDeg } = sunPosition(solarNoonAt, -33.87, 151.2);
    expect(Math.min(azimuthDeg, 360 - azimuthDeg)).toBeLessThan(0.5);
  });

  it('refuses an unreal instant', () => {
    expect(() => sunPosition(new Date(Number.NaN), 0, 0)).toThrow(expect.objectContaining({ field: 'at' }));
  });
});

describe('sunrise and sunset (I02)', () => {
  it.each(SUN_TRUTH.riseAndSet)('$id $on agrees to the minute', ({ on, sunrise, noon, sunset }) => {
    const light = daylight({ ...SUN_TRUTH.golden, on });
    const seconds = (at: Date | null, clock: string) => Math.abs((at?.getTime() ?? 0) - Date.parse(`${on}T${clock}-07:00`)) / 1000;
    expect(seconds(light.sunriseAt, sunrise)).toBeLessThanOrEqual(TOLERANCES.riseSeconds);
    expect(seconds(light.solarNoonAt, noon)).toBeLessThanOrEqual(TOLERANCES.riseSeconds);
    expect(seconds(light.sunsetAt, sunset)).toBeLessThanOrEqual(TOLERANCES.riseSeconds);
    expect(light.alwaysUp || light.alwaysDown).toBe(false);
  });

  it('says why there is none', () => {
    const tromsoe = { latitudeDeg: 69.65, longitudeDeg: 18.96, utcOffsetMinutes: 60 };
    expect(daylight({ ...tromsoe, on: '2026-06-21' })).toMatchObject({ sunriseAt: null, sunsetAt: null, alwaysUp: true, alwaysDown: false, daylightHours: 24 });
    expect(daylight({ ...tromsoe, on: '2026-12-21' })).toMatchObject({ sunriseAt: null, sunsetAt: null, alwaysUp: false, alwaysDown: true, daylightHours: 0 });
  });

  it('gives every place its own civil day, on both sides of the date line', () => {
    for (const place of [
      { latitudeDeg: 1.87, longitudeDeg: -157.4, utcOffsetMinutes: 14 * 60 }, { latitudeDeg: -13.8, longitudeDeg: -172, utcOffsetMinutes: 13 * 60 },
      { latitudeDeg: 21.3, longitudeDeg: -157.8, utcOffsetMinutes: -600 }, { latitudeDeg: -36.85, longitudeDeg: 174.76, utcOffsetMinutes: 13 * 60 },
      { latitudeDeg: 39.4, longitudeDeg: 75.99, utcOffsetMinutes: 480 },
    ]) {
      const light = daylight({ ...place, on: '2026-03-15' });
      const localDay = (at: Date | null) => new Date((at?.getTime() ?? 0) + place.utcOffsetMinutes * 60_000).toISOString().slice(0, 10);
      expect(localDay(light.sunriseAt)).toBe('2026-03-15');
      expect(localDay(light.solarNoonAt)).toBe('2026-03-15');
      expect(localDay(light.sunsetAt)).toBe('2026-03-15');
    }
  });

  it('orders sunrise, noon and sunset, and agrees with the FAO-56 day length within half an hour away from the poles', () => {
    fc.assert(fc.property(fc.double({ min: -55, max: 55, noNaN: true }), fc.double({ min: -180, max: 180, noNaN: true }), fc.integer({ min: 0, max: 3000 }), (latitudeDeg, longitudeDeg, days) => {
      const on = addDays('2020-01-01', days);
      const light = daylight({ latitudeDeg, longitudeDeg, on });
      expect(light.sunriseAt?.getTime() ?? Infinity).toBeLessThan(light.solarNoonAt.getTime());
      expect(light.solarNoonAt.getTime()).toBeLessThan(light.sunsetAt?.getTime() ?? -Infinity);
      const meanNoon = epochDayOf(on) * 86_400_000 + 43_200_000 - longitudeDeg * 240_000;
      expect(Math.abs(light.solarNoonAt.getTime() - meanNoon)).toBeLessThan(18 * 60_000);
      // Refraction and the sun's disc lengthen the day by 7 minutes at the equator and 13 at 55°; the declination of FAO-56 is up to half a degree off.
      expect(light.daylightHours - solarDay(latitudeDeg, dayOfYear(on)).daylightHours).toBeGreaterThan(-0.1);
      expect(light.daylightHours - solarDay(latitudeDeg, dayOfYear(on)).daylightHours).toBeLessThan(0.5);
    }));
  });
});
