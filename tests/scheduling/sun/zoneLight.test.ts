import fc from 'fast-check';
import { exposureMonths, hourlyLight, skyViewFactor, yearOfExposure, zoneLight, zoneReferenceEtMm, type Obstacle, type ZoneExposure } from '@/scheduling/sun';
import { addDays } from '@/scheduling/units';
import { dailyReferenceEt, shadedReferenceEtMm, solarDay, type DailyWeather } from '@/scheduling/weather';
import { LOT, LOT_ZONES } from './shadeScene';

const BOSTON = { latitudeDeg: 42.36, longitudeDeg: -71.06 };
const WEATHER: DailyWeather = {
  on: '2026-07-15', tminC: 17, tmaxC: 29, tdewC: 15, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: 2, windHeightM: 2, solarMjM2: 25, sunshineHours: null, precipitationMm: 0,
};
const open = yearOfExposure({ ...BOSTON, obstacles: [], zones: [{ id: 'open', points: [{ eastM: 0, northM: 0 }] }] })[0] as ZoneExposure;
const lot = yearOfExposure({ ...BOSTON, obstacles: LOT, zones: LOT_ZONES });

describe('light by the hour', () => {
  it('keeps the sum of the day and has no straight light in the dark', () => {
    fc.assert(fc.property(fc.double({ min: -89, max: 89, noNaN: true }), fc.integer({ min: 1, max: 366 }), fc.double({ min: 0, max: 35, noNaN: true }), (latitudeDeg, day, solarMjM2) => {
      const sun = solarDay(latitudeDeg, day);
      const { beamMjM2, diffuseMjM2 } = hourlyLight(sun, solarMjM2);
      const sum = [...beamMjM2, ...diffuseMjM2].reduce((total, value) => total + value, 0);
      expect(sum).toBeCloseTo(sun.sunsetAngleRad > 0 ? solarMjM2 : 0, 9);
      expect([...beamMjM2, ...diffuseMjM2].every((value) => value >= 0)).toBe(true);
    }));
  });
});

describe('light of a zone', () => {
  it('is whole in the open, whatever the weather', () => {
    for (const solarMjM2 of [0, 5, 15, 30]) {
      const light = zoneLight({ exposure: open, latitudeDeg: BOSTON.latitudeDeg, on: '2026-07-15', solarMjM2 });
      expect(light.radiationShare).toBeCloseTo(1, 12);
      expect(light.skyView).toBe(1);
    }
    expect(exposureMonths(open, BOSTON.latitudeDeg).every((month) => Math.abs(month.radiationShare - 1) < 1e-9)).toBe(true);
  });

  it('leaves the scattered light of the sky that is seen, where a house hides the sun', () => {
    const house: Obstacle = { kind: 'building', heightM: 8, footprint: [{ eastM: -80, northM: -12 }, { eastM: 80, northM: -12 }, { eastM: 80, northM: -1 }, { eastM: -80, northM: -1 }] };
    const [north] = yearOfExposure({ ...BOSTON, obstacles: [house], zones: [{ id: 'north', points: [{ eastM: 0, northM: 0 }] }] });
    if (!north) throw new Error('one zone is given here');
    const winter = zoneLight({ exposure: north, latitudeDeg: BOSTON.latitudeDeg, on: '2026-01-10', solarMjM2: 7 });
    expect(winter.beamShare).toBeLessThan(0.01);
    expect(winter.radiationShare).toBeCloseTo(winter.skyView * winter.diffuseFraction + winter.beamShare * (1 - winter.diffuseFraction), 9);
    expect(Math.abs(winter.skyView - skyViewFactor({ eastM: 0, northM: 0 }, [house]))).toBeLessThan(0.015);
  });

  it('matters less under cloud, and its hours follow the season', () => {
    const exposure = lot[1] as ZoneExposure;
    const at = (solarMjM2: number) => zoneLight({ exposure, latitudeDeg: BOSTON.latitudeDeg, on: '2026-01-15', solarMjM2 }).diffuseFraction;
    expect(at(2)).toBeGreaterThan(at(8));
    const months = exposureMonths(exposure, BOSTON.latitudeDeg);
    expect(months).toHaveLength(12);
    expect(months[5]?.directSunHours ?? 0).toBeGreaterThan(months[11]?.directSunHours ?? 24);
    for (const month of months) {
      expect(month.directSunHours).toBeLessThanOrEqual(month.openSunHours);
      expect(month.radiationShare).toBeGreaterThan(0);
      expect(month.radiationShare).toBeLessThan(1);
    }
  });

  it('goes into Penman–Monteith as radiation', () => {
    const reference = dailyReferenceEt({ site: { latitudeDeg: BOSTON.latitudeDeg, elevationM: 20 }, weather: WEATHER });
    if (reference.method === null) throw new Error('temperatures are given here');
    expect(zoneReferenceEtMm(reference, open, BOSTON.latitudeDeg, WEATHER.on)).toBeCloseTo(reference.et0Mm, 9);
    for (const exposure of lot) {
      const light = zoneLight({ exposure, latitudeDeg: BOSTON.latitudeDeg, on: WEATHER.on, solarMjM2: reference.radiationMjM2 });
      const shaded = zoneReferenceEtMm(reference, exposure, BOSTON.latitudeDeg, WEATHER.on);
      expect(shaded).toBe(shadedReferenceEtMm(reference, light));
      expect(shaded).toBeLessThan(reference.et0Mm);
      // The air keeps its drying power: demand falls less than light.
      expect(shaded / reference.et0Mm).toBeGreaterThan(light.radiationShare);
    }
  });

  it('stays between nothing and the whole on every day of every zone', () => {
    for (const exposure of lot) {
      for (let day = 0; day < 365; day += 9) {
        const on = addDays('2026-01-01', day);
        for (const solarMjM2 of [0, 4, 20]) {
          const { radiationShare, beamShare } = zoneLight({ exposure, latitudeDeg: BOSTON.latitudeDeg, on, solarMjM2 });
          expect(radiationShare >= 0 && radiationShare <= 1 && beamShare >= 0 && beamShare <= 1).toBe(true);
        }
      }
    }
  });

  it('refuses impossible input', () => {
    expect(() => zoneLight({ exposure: open, latitudeDeg: 91, on: '2026-01-01', solarMjM2: 5 })).toThrow(expect.objectContaining({ field: 'latitudeDeg' }));
    expect(() => zoneLight({ exposure: open, latitudeDeg: 0, on: '2026-01-01', solarMjM2: Number.NaN })).toThrow(expect.objectContaining({ field: 'solarMjM2' }));
    expect(() => exposureMonths(open, 0, 1.4)).toThrow(expect.objectContaining({ field: 'clearness' }));
    expect(() => exposureMonths(open, 0, [0.5])).toThrow(expect.objectContaining({ field: 'clearness' }));
  });
});
