import fc from 'fast-check';
import { monthsOfSunHours } from '@/scheduling/sun';

describe('months of a zone of which only hours of sun are known', () => {
  it('are open where nothing shades it', () => {
    for (const month of monthsOfSunHours(41, null, null)) {
      expect(month.radiationShare).toBeCloseTo(1, 12);
      expect(month.directSunHours).toBeCloseTo(month.openSunHours, 9);
    }
  });

  it('give back the hours in the month in which they were seen, and less of the day in a lower sun', () => {
    const months = monthsOfSunHours(41, 8, '2026-06-15');
    expect(months[5]?.directSunHours).toBeCloseTo(8, 6);
    expect(months[11]?.directSunHours).toBeLessThan(4);
    // The same hours seen in December mean a low horizon: the summer has nearly all of its sun.
    const winter = monthsOfSunHours(41, 8, '2026-12-15');
    expect(winter[5]?.directSunHours).toBeGreaterThan(11);
  });

  it('stay within their days, everywhere on the globe', () => {
    fc.assert(fc.property(fc.double({ min: -66, max: 66, noNaN: true }), fc.double({ min: 0, max: 24, noNaN: true }), fc.constantFrom('2026-01-10', '2026-06-20', '2026-09-30', null), (latitudeDeg, hours, on) => {
      for (const month of monthsOfSunHours(latitudeDeg, hours, on)) {
        expect(month.directSunHours).toBeGreaterThanOrEqual(0);
        expect(month.directSunHours).toBeLessThanOrEqual(month.openSunHours + 1e-9);
        expect(month.radiationShare).toBeGreaterThan(0);
        expect(month.radiationShare).toBeLessThanOrEqual(1);
      }
    }), { numRuns: 60 });
    expect(() => monthsOfSunHours(95, 8, null)).toThrow(expect.objectContaining({ field: 'latitudeDeg' }));
    expect(() => monthsOfSunHours(41, 8, null, 2)).toThrow(expect.objectContaining({ field: 'clearness' }));
  });
});
