import fc from 'fast-check';
import {
  actualVapourPressureFromDewPointKpa, dewPointFromVapourPressureC, extraterrestrialRadiationOfPeriodMjM2, hourlyReferenceEt, isEveningWindow, relativeHumidityPct, solarDay,
  solarHourAngleRad, solarShares, spreadOverHours, temperatureAtHourC, type HourlyWeather,
} from '@/scheduling/weather';

const anyLatitude = fc.double({ min: -90, max: 90, noNaN: true });
const anyDay = fc.integer({ min: 1, max: 366 });
const SITE = { latitudeDeg: 40, longitudeDeg: -105, standardUtcOffsetMinutes: -420, elevationM: 1500 };
const HOUR: HourlyWeather = { on: '2015-07-01', midHour: 12.5, temperatureC: 28, rhPct: 40, windMps: 2, windHeightM: 2, solarMjM2: 3, eveningRelativeSolar: null };

describe('hourly reference ET', () => {
  it('counts longitudes eastward: a place east of its meridian has its noon early', () => {
    const at = (longitudeDeg: number) => solarHourAngleRad({ clockHours: 12, longitudeDeg, zoneMeridianDeg: 15, day: 100 });
    expect(at(20)).toBeGreaterThan(at(15));
    expect(at(20) - at(15)).toBeCloseTo((5 / 15) * (Math.PI / 12), 10);
  });

  it('keeps hour angles within half a turn of noon', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 24, noNaN: true }), fc.double({ min: -180, max: 180, noNaN: true }), fc.double({ min: -180, max: 180, noNaN: true }), anyDay, (clockHours, longitudeDeg, zoneMeridianDeg, day) => {
      const angle = solarHourAngleRad({ clockHours, longitudeDeg, zoneMeridianDeg, day });
      expect(angle).toBeGreaterThan(-Math.PI - 1e-9);
      expect(angle).toBeLessThanOrEqual(Math.PI + 1e-9);
    }));
  });

  it('adds up to the daily radiation above the air', () => {
    fc.assert(fc.property(anyLatitude, anyDay, (latitudeDeg, day) => {
      const sun = solarDay(latitudeDeg, day);
      let sum = 0;
      for (let i = 0; i < 24; i += 1) sum += extraterrestrialRadiationOfPeriodMjM2(sun, -Math.PI + (i * Math.PI) / 12, -Math.PI + ((i + 1) * Math.PI) / 12);
      expect(sum).toBeCloseTo(sun.extraterrestrialMjM2, 6);
    }));
  });

  it('uses half of the net radiation for the soil at night and says what sky it took', () => {
    const night = hourlyReferenceEt({ site: SITE, hour: { ...HOUR, midHour: 1.5, solarMjM2: 0, temperatureC: 15 } });
    expect(night.terms.daytime).toBe(false);
    expect(night.terms.soilHeatFluxMjM2).toBeCloseTo(0.5 * night.terms.netRadiationMjM2, 12);
    expect(night.assumptions.map(({ field }) => field)).toEqual(['eveningRelativeSolar']);
    expect(hourlyReferenceEt({ site: { ...SITE, arid: true }, hour: { ...HOUR, midHour: 1.5, solarMjM2: 0 } }).terms.relativeSolar).toBe(0.75);
    expect(hourlyReferenceEt({ site: SITE, hour: { ...HOUR, midHour: 1.5, solarMjM2: 0, eveningRelativeSolar: 0.6 } }).assumptions).toEqual([]);
  });

  it('knows the two to three hours before sunset that stand for the night', () => {
    expect(isEveningWindow(1.2, 1.9)).toBe(true);
    expect(isEveningWindow(1.5, 1.9)).toBe(false);
    expect(isEveningWindow(0.9, 1.9)).toBe(false);
  });

  it('refuses impossible hours', () => {
    for (const [field, change] of [['rhPct', { rhPct: 130 }], ['temperatureC', { temperatureC: Number.NaN }], ['midHour', { midHour: 25 }], ['solarMjM2', { solarMjM2: -1 }], ['windMps', { windMps: -1 }]] as const) {
      expect(() => hourlyReferenceEt({ site: SITE, hour: { ...HOUR, ...change } })).toThrow(expect.objectContaining({ field }));
    }
  });
});

describe('hours from a daily sum', () => {
  it('keep the sum, never fall below zero and put nothing into the night', () => {
    fc.assert(fc.property(anyLatitude, anyDay, fc.double({ min: 0, max: 45, noNaN: true }), (latitudeDeg, day, dailySum) => {
      const hours = spreadOverHours({ latitudeDeg, day, dailySum });
      expect(hours).toHaveLength(24);
      expect(Math.abs(hours.reduce((sum, value) => sum + value, 0) - dailySum)).toBeLessThan(1e-9);
      expect(Math.min(...hours)).toBeGreaterThanOrEqual(0);
      const sun = solarDay(latitudeDeg, day);
      if (sun.daylightHours > 0 && sun.daylightHours < 22) expect(hours[0]).toBe(0);
    }));
  });

  it('are symmetric about noon, highest there, and move with the clock of the place', () => {
    const hours = spreadOverHours({ latitudeDeg: 40, day: 182, dailySum: 28 });
    for (let i = 0; i < 12; i += 1) expect(hours[i]).toBeCloseTo(hours[23 - i] ?? -1, 9);
    expect(Math.max(...hours)).toBe(Math.max(hours[11] ?? 0, hours[12] ?? 0));
    const late = spreadOverHours({ latitudeDeg: 40, day: 182, dailySum: 28, solarNoonHour: 13 });
    expect(late[13]).toBeCloseTo(hours[12] ?? -1, 9);
  });

  it('follow the published ratio at noon (Collares-Pereira and Rabl 1979, closed form at ω = 0)', () => {
    const sun = solarDay(0, 80);
    const ws = sun.sunsetAngleRad;
    const a = 0.409 + 0.5016 * Math.sin(ws - Math.PI / 3);
    const b = 0.6609 - 0.4767 * Math.sin(ws - Math.PI / 3);
    const ratio = ((Math.PI / 24) * (a + b) * (1 - Math.cos(ws))) / (Math.sin(ws) - ws * Math.cos(ws));
    const fine = solarShares(sun, 24 * 60);
    // The formula's own sum over the day is not quite 1; scaling it changes the ratio by less than 2 %.
    expect(((fine[12 * 60] ?? 0) * 60) / ratio).toBeGreaterThan(0.98);
    expect(((fine[12 * 60] ?? 0) * 60) / ratio).toBeLessThan(1.02);
  });

  it('temperature swings between the extremes', () => {
    fc.assert(fc.property(fc.double({ min: -30, max: 30, noNaN: true }), fc.double({ min: 0, max: 20, noNaN: true }), fc.double({ min: 0, max: 24, noNaN: true }), (tminC, range, hour) => {
      const value = temperatureAtHourC(tminC, tminC + range, hour);
      expect(value).toBeGreaterThanOrEqual(tminC - 1e-9);
      expect(value).toBeLessThanOrEqual(tminC + range + 1e-9);
    }));
    expect(temperatureAtHourC(10, 30, 15)).toBeCloseTo(30, 9);
    expect(temperatureAtHourC(10, 30, 5)).toBeCloseTo(10, 9);
    expect(temperatureAtHourC(10, 30, 24)).toBeCloseTo(temperatureAtHourC(10, 30, 0), 9);
  });
});

describe('dew point and humidity', () => {
  it('come back unchanged', () => {
    fc.assert(fc.property(fc.double({ min: -40, max: 40, noNaN: true }), (tdewC) => {
      expect(dewPointFromVapourPressureC(actualVapourPressureFromDewPointKpa(tdewC))).toBeCloseTo(tdewC, 8);
      expect(relativeHumidityPct(actualVapourPressureFromDewPointKpa(tdewC), tdewC)).toBeCloseTo(100, 8);
    }));
  });
});
