import fc from 'fast-check';
import { defaultSkyView, erbsDiffuseFraction, horizonSineFromSunHours, orgillHollandsDiffuseFraction, radiationShare, splitRadiation, sunHoursAboveHorizon } from '@/scheduling/sun';
import { addDays } from '@/scheduling/units';
import { solarDay } from '@/scheduling/weather';
import { DIFFUSE_TRUTH } from '../../fixtures/sun';

const anyLatitude = fc.double({ min: -66, max: 66, noNaN: true });
const anyDay = fc.integer({ min: 0, max: 364 }).map((days) => addDays('2025-01-01', days));

describe('diffuse light', () => {
  it.each(DIFFUSE_TRUTH.fits)('follows both published fits at clearness $clearness (F02)', ({ clearness, erbs, orgill }) => {
    expect(Math.abs(erbsDiffuseFraction(clearness) - erbs)).toBeLessThan(6e-5);
    expect(Math.abs(orgillHollandsDiffuseFraction(clearness) - orgill)).toBeLessThan(6e-5);
  });

  it.each(DIFFUSE_TRUTH.splits)('splits $global W/m² at zenith $zenithDeg° as a public solar library does (F01)', ({ global, zenithDeg, directNormal, diffuse, clearness }) => {
    const split = splitRadiation(global, DIFFUSE_TRUTH.extraterrestrialNormal, Math.cos((zenithDeg * Math.PI) / 180));
    expect(Math.abs(split.clearness / clearness - 1)).toBeLessThan(1e-4);
    expect(Math.abs(split.diffuse / diffuse - 1)).toBeLessThan(1e-4);
    expect(Math.abs(split.directNormal / directNormal - 1)).toBeLessThan(2e-4);
  });

  it('never exceeds the whole nor falls below zero, and all is diffuse without the sun', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 1400, noNaN: true }), fc.double({ min: -1, max: 1, noNaN: true }), (global, sine) => {
      const split = splitRadiation(global, 1367, sine);
      expect(split.diffuse).toBeGreaterThanOrEqual(0);
      expect(split.beam).toBeGreaterThanOrEqual(-1e-9);
      expect(split.diffuse + split.beam).toBeCloseTo(global, 9);
      if (sine <= 0) expect(split.directNormal).toBe(0);
    }));
  });
});

describe('horizon from hours of sun', () => {
  it('gives the hours back on the same day', () => {
    fc.assert(fc.property(anyLatitude, fc.integer({ min: 1, max: 365 }), fc.double({ min: 0, max: 1, noNaN: true }), (latitudeDeg, day, part) => {
      const sun = solarDay(latitudeDeg, day);
      const hours = part * sun.daylightHours;
      expect(Math.abs(sunHoursAboveHorizon(sun, horizonSineFromSunHours(sun, hours)) - hours)).toBeLessThan(1e-4);
    }));
  });

  it('gives fewer hours in winter and more in summer', () => {
    const june = solarDay(42, 172);
    const sine = horizonSineFromSunHours(june, 6);
    expect(sunHoursAboveHorizon(solarDay(42, 355), sine)).toBe(0);
    expect(sunHoursAboveHorizon(solarDay(42, 100), sine)).toBeLessThan(6);
    expect(defaultSkyView(0)).toBe(1);
    expect(defaultSkyView(1)).toBe(0.5);
  });
});

describe('share of the radiation that reaches a zone', () => {
  const base = { latitudeDeg: 42, on: '2025-06-21', solarMjM2: 26 } as const;

  it('is whole in the open and assumes nothing', () => {
    expect(radiationShare({ ...base, sunHours: null })).toMatchObject({ radiationShare: 1, beamShare: 1, skyView: 1, shadedMjM2: 26, horizonDeg: 0, assumptions: [] });
    expect(radiationShare({ ...base, sunHours: 24 }).radiationShare).toBe(1);
  });

  it('leaves only diffuse light where no sun comes', () => {
    const dark = radiationShare({ ...base, sunHours: 0, skyView: 0.6 });
    expect(dark.beamShare).toBe(0);
    expect(dark.radiationShare).toBeCloseTo(0.6 * dark.diffuseFraction, 12);
    expect(dark.sunHours).toBe(0);
  });

  it('weighs noon hours more than their number: 6 of 15 hours bring over half of the direct light', () => {
    const six = radiationShare({ ...base, sunHours: 6 });
    expect(six.daylightHours).toBeGreaterThan(14.9);
    expect(six.beamShare).toBeGreaterThan(0.5);
    expect(six.beamShare).toBeLessThan(0.75);
    expect(six.assumptions.map(({ field }) => field)).toEqual(['sunHours', 'skyView']);
  });

  it('matters less under cloud', () => {
    const clear = radiationShare({ ...base, sunHours: 4 });
    const cloudy = radiationShare({ ...base, solarMjM2: 8, sunHours: 4 });
    expect(cloudy.diffuseFraction).toBeGreaterThan(clear.diffuseFraction);
    expect(cloudy.radiationShare).toBeGreaterThan(clear.radiationShare);
  });

  it('carries the horizon of one day to the others', () => {
    const winter = radiationShare({ ...base, on: '2025-12-21', solarMjM2: 6, sunHours: 6, sunHoursOn: '2025-06-21' });
    expect(winter.sunHours).toBe(0);
    expect(winter.beamShare).toBe(0);
    expect(winter.horizonDeg).toBeGreaterThan(30);
    const same = radiationShare({ ...base, sunHours: 6, sunHoursOn: '2025-06-21' });
    expect(same.radiationShare).toBeCloseTo(radiationShare({ ...base, sunHours: 6 }).radiationShare, 12);
  });

  it('lies between nothing and the whole, and grows with hours and sky', () => {
    fc.assert(fc.property(anyLatitude, anyDay, fc.double({ min: 0, max: 20, noNaN: true }), fc.double({ min: 0, max: 30, noNaN: true }), fc.double({ min: 0, max: 0.9, noNaN: true }), (latitudeDeg, on, sunHours, solarMjM2, skyView) => {
      const at = (change: object) => radiationShare({ latitudeDeg, on, solarMjM2, sunHours, skyView, ...change });
      const { radiationShare: share, shadedMjM2 } = at({});
      expect(share).toBeGreaterThanOrEqual(0);
      expect(share).toBeLessThanOrEqual(1);
      expect(shadedMjM2).toBeLessThanOrEqual(solarMjM2);
      expect(at({ sunHours: sunHours + 1 }).radiationShare).toBeGreaterThanOrEqual(share - 1e-9);
      expect(at({ skyView: skyView + 0.1 }).radiationShare).toBeGreaterThanOrEqual(share - 1e-9);
    }));
  });

  it('survives the poles', () => {
    for (const latitudeDeg of [90, -90, 69.65]) {
      for (const on of ['2025-06-21', '2025-12-21', '2025-03-21']) {
        const { radiationShare: share } = radiationShare({ latitudeDeg, on, solarMjM2: 0, sunHours: 3 });
        expect(share).toBeGreaterThanOrEqual(0);
        expect(share).toBeLessThanOrEqual(1);
      }
    }
  });

  it('refuses impossible input', () => {
    for (const [field, change] of [['sunHours', { sunHours: 25 }], ['sunHours', { sunHours: Number.NaN }], ['skyView', { skyView: 1.2 }], ['solarMjM2', { solarMjM2: -1 }], ['latitudeDeg', { latitudeDeg: 100 }]] as const) {
      expect(() => radiationShare({ ...base, ...{ sunHours: 4 }, ...change })).toThrow(expect.objectContaining({ field }));
    }
  });
});
