import * as Astronomy from 'astronomy-engine';
import fc from 'fast-check';
import { apparentSunsetAngleRad, daylight, solarCoordinates, sunDirection, sunPosition } from '@/scheduling/sun';
import { addDays, epochDayOf } from '@/scheduling/units';
import { TOLERANCES } from '../../fixtures/tolerances';

const DEGREE = Math.PI / 180;

/** Apparent place of the sun by an independent library (Astronomy Engine, VSOP87 with nutation and parallax), refraction as it models it. */
function independentSun(at: Date, latitudeDeg: number, longitudeDeg: number) {
  const observer = new Astronomy.Observer(latitudeDeg, longitudeDeg, 0);
  const place = Astronomy.Equator(Astronomy.Body.Sun, at, observer, true, true);
  const seen = Astronomy.Horizon(at, observer, place.ra, place.dec, 'normal');
  return { declinationDeg: place.dec, altitudeDeg: seen.altitude, azimuthDeg: seen.azimuth };
}

const turnBetween = (one: number, other: number) => Math.abs(((one - other + 540) % 360) - 180);
const instants = fc.integer({ min: Date.UTC(1990, 0, 1), max: Date.UTC(2060, 0, 1) });
const latitudes = fc.double({ min: -89, max: 89, noNaN: true });
const longitudes = fc.double({ min: -180, max: 180, noNaN: true });

describe('the sun against a second astronomy library', () => {
  it('stands where that library says, over the globe and seventy years', () => {
    fc.assert(fc.property(instants, latitudes, longitudes, (ms, latitudeDeg, longitudeDeg) => {
      const at = new Date(ms);
      const theirs = independentSun(at, latitudeDeg, longitudeDeg);
      fc.pre(theirs.altitudeDeg > 0.5);
      const ours = sunPosition(at, latitudeDeg, longitudeDeg);
      expect(Math.abs(ours.altitudeDeg - theirs.altitudeDeg)).toBeLessThan(TOLERANCES.sunAltitudeDeg);
      expect(turnBetween(ours.azimuthDeg, theirs.azimuthDeg) * Math.cos(theirs.altitudeDeg * DEGREE)).toBeLessThan(TOLERANCES.sunAzimuthDeg);
    }), { numRuns: 400 });
  });

  it.each([[-33.87, 151.2], [69.65, 18.96], [-77.85, 166.67], [0, 0], [42.36, -71.06], [1.87, -157.4]])('stands there every five days of a leap year at %d, %d', (latitudeDeg, longitudeDeg) => {
    let seen = 0;
    for (let day = 0; day < 366; day += 5) {
      for (const hour of [0, 5, 10, 15, 20]) {
        const at = new Date(Date.UTC(2028, 0, 1 + day, hour));
        const theirs = independentSun(at, latitudeDeg, longitudeDeg);
        if (theirs.altitudeDeg < 0.5) continue;
        seen += 1;
        const ours = sunPosition(at, latitudeDeg, longitudeDeg);
        expect(Math.abs(ours.altitudeDeg - theirs.altitudeDeg)).toBeLessThan(TOLERANCES.sunAltitudeDeg);
        expect(turnBetween(ours.azimuthDeg, theirs.azimuthDeg) * Math.cos(theirs.altitudeDeg * DEGREE)).toBeLessThan(TOLERANCES.sunAzimuthDeg);
      }
    }
    expect(seen).toBeGreaterThan(100);
  });

  it('has the declination of that library, and a hour angle that leads to the same place', () => {
    fc.assert(fc.property(instants, latitudes, longitudes, (ms, latitudeDeg, longitudeDeg) => {
      const { declinationRad, equationOfTimeMinutes } = solarCoordinates(ms);
      const theirs = independentSun(new Date(ms), latitudeDeg, longitudeDeg);
      // Parallax, up to 8.8 seconds of arc, is left out here.
      expect(Math.abs(declinationRad / DEGREE - theirs.declinationDeg)).toBeLessThan(TOLERANCES.declinationDeg);
      fc.pre(theirs.altitudeDeg > 0.5);
      const minutes = (((ms / 60_000) % 1440) + 1440) % 1440;
      const ours = sunDirection(latitudeDeg * DEGREE, declinationRad, ((minutes + equationOfTimeMinutes + 4 * longitudeDeg) / 4 - 180) * DEGREE);
      expect(Math.abs(ours.altitudeRad / DEGREE - theirs.altitudeDeg)).toBeLessThan(TOLERANCES.sunAltitudeDeg);
      expect(turnBetween(ours.azimuthRad / DEGREE, theirs.azimuthDeg) * Math.cos(ours.altitudeRad)).toBeLessThan(TOLERANCES.sunAzimuthDeg);
    }), { numRuns: 400 });
  });

  it('rises and sets when that library says', () => {
    for (const [latitudeDeg, longitudeDeg] of [[42.36, -71.06], [-33.87, 151.2], [60, 25], [-12, -77]] as const) {
      const observer = new Astronomy.Observer(latitudeDeg, longitudeDeg, 0);
      for (let day = 0; day < 366; day += 23) {
        const on = addDays('2028-01-01', day);
        const light = daylight({ latitudeDeg, longitudeDeg, on });
        const noonMs = epochDayOf(on) * 86_400_000 + 43_200_000 - longitudeDeg * 240_000;
        const rise = Astronomy.SearchRiseSet(Astronomy.Body.Sun, observer, 1, new Date(noonMs - 43_200_000), 1);
        const set = Astronomy.SearchRiseSet(Astronomy.Body.Sun, observer, -1, new Date(noonMs), 1);
        expect(Math.abs((light.sunriseAt?.getTime() ?? 0) - (rise?.date.getTime() ?? Infinity)) / 1000).toBeLessThan(TOLERANCES.riseSeconds);
        expect(Math.abs((light.sunsetAt?.getTime() ?? 0) - (set?.date.getTime() ?? Infinity)) / 1000).toBeLessThan(TOLERANCES.riseSeconds);
      }
    }
  });
});

describe('the way of the sun', () => {
  it('is the same before and after noon', () => {
    fc.assert(fc.property(fc.double({ min: -1.5, max: 1.5, noNaN: true }), fc.double({ min: -0.409, max: 0.409, noNaN: true }), fc.double({ min: 0, max: Math.PI, noNaN: true }), (latitude, declination, angle) => {
      const morning = sunDirection(latitude, declination, -angle);
      const evening = sunDirection(latitude, declination, angle);
      expect(morning.altitudeRad).toBeCloseTo(evening.altitudeRad, 12);
      expect(Math.sin(morning.azimuthRad)).toBeCloseTo(-Math.sin(evening.azimuthRad), 9);
    }));
  });

  it('mirrors between the hemispheres', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 1.5, noNaN: true }), fc.double({ min: -0.409, max: 0.409, noNaN: true }), fc.double({ min: -3, max: 3, noNaN: true }), (latitude, declination, angle) => {
      const north = sunDirection(latitude, declination, angle);
      const south = sunDirection(-latitude, -declination, angle);
      expect(south.altitudeRad).toBeCloseTo(north.altitudeRad, 12);
      expect(Math.cos(south.azimuthRad)).toBeCloseTo(-Math.cos(north.azimuthRad), 9);
      expect(apparentSunsetAngleRad(-latitude, -declination)).toBeCloseTo(apparentSunsetAngleRad(latitude, declination), 12);
    }));
  });

  it('knows polar day, polar night and the poles', () => {
    expect(apparentSunsetAngleRad(70 * DEGREE, 23 * DEGREE)).toBe(Math.PI);
    expect(apparentSunsetAngleRad(70 * DEGREE, -23 * DEGREE)).toBe(0);
    expect(apparentSunsetAngleRad(Math.PI / 2, 10 * DEGREE)).toBe(Math.PI);
    expect(apparentSunsetAngleRad(Math.PI / 2, -10 * DEGREE)).toBe(0);
  });
});
