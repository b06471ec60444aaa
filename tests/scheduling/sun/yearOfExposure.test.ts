import fc from 'fast-check';
import { exposureDayIndex, skyViewFactor, solarCoordinates, sunDirection, yearOfExposure, type Obstacle, type ZoneExposure } from '@/scheduling/sun';
import { dayOfYear, PhysicsError } from '@/scheduling/units';
import { TOLERANCES } from '../../fixtures/tolerances';
import { bruteDay, daysOfMonth, LOT, LOT_ZONES } from './shadeScene';

const ONE_POINT = [{ id: 'a', points: [{ eastM: 0, northM: 0 }] }];
const BOSTON = { latitudeDeg: 42.36, longitudeDeg: -71.06 };
const only = (exposures: ZoneExposure[]): ZoneExposure => {
  const [first] = exposures;
  if (!first) throw new Error('one zone is given here');
  return first;
};
const yearly = (values: Float32Array) => values.reduce((sum, value) => sum + value, 0);

describe('a year of exposure against testing every ray', () => {
  it.each([['Boston', 42.36, -71.06], ['Sydney', -33.87, 151.2], ['Helsinki', 60.2, 24.9]])('%s: every day and month of a lot with twelve obstacles', (_place, latitudeDeg, longitudeDeg) => {
    const exposures = yearOfExposure({ latitudeDeg, longitudeDeg, obstacles: LOT, zones: LOT_ZONES, year: 2026 });
    for (const zoneAt of [1, 4]) {
      const exposure = exposures[zoneAt];
      const points = LOT_ZONES[zoneAt]?.points ?? [];
      if (!exposure) throw new Error('eight zones are given here');
      for (let month = 1; month <= 12; month += 1) {
        let seen = 0;
        let open = 0;
        let ours = 0;
        let weights = 0;
        for (const on of daysOfMonth(2026, month, 2)) {
          const index = dayOfYear(on) - 1;
          const brute = bruteDay(points, LOT, latitudeDeg, longitudeDeg, on, 10);
          expect(Math.abs((exposure.directSunHours[index] ?? Infinity) - brute.directSunHours) < TOLERANCES.exposureDayHours ? [] : [on, zoneAt, exposure.directSunHours[index], brute.directSunHours]).toEqual([]);
          seen += brute.seen;
          open += brute.open;
          ours += beamOf(exposure, index, latitudeDeg) * brute.open;
          weights += brute.open;
        }
        if (open > 0) expect(Math.abs(ours / weights - seen / open)).toBeLessThan(TOLERANCES.exposureMonthShare);
      }
    }
  });

  it('sees as much sky as the finer quadrature of single points', () => {
    const exposures = yearOfExposure({ ...BOSTON, obstacles: LOT, zones: LOT_ZONES });
    for (const [index, zone] of LOT_ZONES.entries()) {
      const fine = zone.points.reduce((sum, point) => sum + skyViewFactor(point, LOT, 1), 0) / zone.points.length;
      expect(Math.abs((exposures[index]?.skyView[195] ?? Infinity) - fine)).toBeLessThan(TOLERANCES.exposureSkyView);
    }
  });
});

/** Beam share of a day, hours weighed by the mean sine of the sun's height in them. */
function beamOf(exposure: ZoneExposure, index: number, latitudeDeg: number): number {
  const phi = (latitudeDeg * Math.PI) / 180;
  const declination = solarCoordinates(Date.UTC(2026, 0, 1 + index, 12)).declinationRad;
  let seen = 0;
  let open = 0;
  for (let hour = 0; hour < 24; hour += 1) {
    for (let part = 0; part < 12; part += 1) {
      const angle = ((hour + (part + 0.5) / 12) / 12 - 1) * Math.PI;
      const sine = Math.sin(sunDirection(phi, declination, angle).altitudeRad);
      if (sine <= 0) continue;
      open += sine;
      seen += sine * (exposure.beamByHour[index * 24 + hour] ?? 0);
    }
  }
  return open > 0 ? seen / open : 0;
}

describe('an open lawn', () => {
  it('has all of the light, and the hours of a flat horizon', () => {
    for (const latitudeDeg of [-80, -34, 0, 42, 66, 80]) {
      const exposure = only(yearOfExposure({ latitudeDeg, longitudeDeg: 10, obstacles: [], zones: ONE_POINT }));
      expect(exposure.directSunHours).toHaveLength(365);
      expect(exposure.beamByHour.every((share) => share === 1)).toBe(true);
      expect(exposure.skyView.every((share) => share === 1)).toBe(true);
      exposure.directSunHours.forEach((hours, day) => expect(Math.abs(hours - (exposure.openSunHours[day] ?? 0))).toBeLessThan(1e-4));
      expect(exposure.assumptions).toEqual([]);
      // Half of the year is light everywhere on Earth, a little more by refraction and, in the north, by the slow sun of July.
      expect(yearly(exposure.openSunHours)).toBeGreaterThan(4320);
      expect(yearly(exposure.openSunHours)).toBeLessThan(4600);
    }
  });

  it('knows polar day and night, and leap years', () => {
    const north = only(yearOfExposure({ latitudeDeg: 75, longitudeDeg: 0, obstacles: [], zones: ONE_POINT, year: 2028 }));
    expect(north.directSunHours).toHaveLength(366);
    expect(north.openSunHours[dayOfYear('2028-06-21') - 1]).toBeCloseTo(24, 5);
    expect(north.openSunHours[dayOfYear('2028-12-21') - 1]).toBe(0);
    expect(exposureDayIndex(north, 3, 1)).toBe(60);
    expect(exposureDayIndex({ year: 2026 }, 3, 1)).toBe(59);
    expect(exposureDayIndex({ year: 2026 }, 2, 29)).toBe(58);
  });
});

describe('shade', () => {
  const wallToThe = (side: 'north' | 'south' | 'east' | 'west', heightM: number): Obstacle => {
    const at = { north: [0, 4], south: [0, -4], east: [4, 0], west: [-4, 0] }[side];
    const along = side === 'north' || side === 'south' ? [1, 0] : [0, 1];
    const end = (sign: number) => ({ eastM: (at[0] ?? 0) + sign * 200 * (along[0] ?? 0), northM: (at[1] ?? 0) + sign * 200 * (along[1] ?? 0) });
    return { kind: 'fence', line: [end(-1), end(1)], heightM };
  };
  const hours = (latitudeDeg: number, side: 'north' | 'south' | 'east' | 'west', heightM = 6) => yearly(only(yearOfExposure({ latitudeDeg, longitudeDeg: 0, obstacles: [wallToThe(side, heightM)], zones: ONE_POINT })).directSunHours);

  it('falls from the south in the north and from the north in the south, alike', () => {
    expect(hours(42, 'south')).toBeLessThan(hours(42, 'north') - 1000);
    expect(hours(-42, 'north')).toBeLessThan(hours(-42, 'south') - 1000);
    // Not quite alike: the sun stays eight days longer in the north.
    expect(Math.abs(hours(-42, 'north') / hours(42, 'south') - 1)).toBeLessThan(0.06);
  });

  it('is the same from the east as from the west, the day turned round', () => {
    expect(Math.abs(hours(42, 'east') - hours(42, 'west'))).toBeLessThan(15);
    const east = only(yearOfExposure({ ...BOSTON, obstacles: [wallToThe('east', 6)], zones: ONE_POINT }));
    const west = only(yearOfExposure({ ...BOSTON, obstacles: [wallToThe('west', 6)], zones: ONE_POINT }));
    for (let hour = 0; hour < 24; hour += 1) expect(Math.abs((east.beamByHour[171 * 24 + hour] ?? 0) - (west.beamByHour[171 * 24 + 23 - hour] ?? 0))).toBeLessThan(0.1);
  });

  it('grows with height, and never lightens when something is added', () => {
    fc.assert(fc.property(fc.double({ min: -60, max: 60, noNaN: true }), fc.double({ min: 0.5, max: 20, noNaN: true }), fc.double({ min: 0.1, max: 10, noNaN: true }), fc.integer({ min: 0, max: 11 }), (latitudeDeg, heightM, more, added) => {
      const fence = (height: number): Obstacle => ({ kind: 'fence', line: [{ eastM: -7, northM: -5 }, { eastM: 9, northM: -5 }, { eastM: 9, northM: 6 }], heightM: height });
      const at = (obstacles: Obstacle[]) => only(yearOfExposure({ latitudeDeg, longitudeDeg: 0, obstacles, zones: ONE_POINT, stepMinutes: 30 }));
      const low = at([fence(heightM)]);
      const extra = LOT[added];
      for (const darker of [at([fence(heightM + more)]), at([fence(heightM), ...(extra ? [extra] : [])])]) {
        expect(yearly(darker.directSunHours)).toBeLessThanOrEqual(yearly(low.directSunHours) + 1e-3);
        expect(darker.beamByHour.every((share, index) => share <= (low.beamByHour[index] ?? 0) + 1e-6)).toBe(true);
        expect(darker.skyView.every((share, index) => share <= (low.skyView[index] ?? 0) + 1e-6)).toBe(true);
      }
    }), { numRuns: 15 });
  });

  it('does not depend on the order of obstacles or on where the corner of the plan lies', () => {
    const at = (shift: number, obstacles: Obstacle[]) => {
      const moved = obstacles.map((obstacle): Obstacle => {
        const move = (point: { eastM: number; northM: number }) => ({ eastM: point.eastM + shift, northM: point.northM - shift });
        if (obstacle.kind === 'tree') return { ...obstacle, at: move(obstacle.at) };
        return obstacle.kind === 'building' ? { ...obstacle, footprint: obstacle.footprint.map(move) } : { ...obstacle, line: obstacle.line.map(move) };
      });
      return only(yearOfExposure({ ...BOSTON, obstacles: moved, zones: [{ id: 'a', points: [{ eastM: 5 + shift, northM: -8 - shift }] }] }));
    };
    const base = at(0, LOT);
    const turned = at(0, [...LOT].reverse());
    const moved = at(37.5, LOT);
    expect(yearly(turned.directSunHours)).toBeCloseTo(yearly(base.directSunHours), 2);
    expect(Math.abs(yearly(moved.directSunHours) - yearly(base.directSunHours))).toBeLessThan(2);
    expect(moved.skyView[180]).toBeCloseTo(base.skyView[180] ?? 0, 2);
  });

  it('under a roof is complete', () => {
    const exposure = only(yearOfExposure({ ...BOSTON, obstacles: LOT, zones: [{ id: 'a', points: [{ eastM: 7, northM: 4 }] }] }));
    expect(yearly(exposure.directSunHours)).toBe(0);
    expect(Math.max(...exposure.skyView)).toBe(0);
  });

  it('of a bare tree is lighter than of a leafy one, with the seasons turned round in the south', () => {
    const tree: Obstacle = { kind: 'tree', at: { eastM: 0, northM: 0 }, crownBaseM: 2, topM: 12, crownRadiusM: 5, trunkDiameterM: 0, leaves: 'deciduous' };
    const zones = [{ id: 'a', points: [{ eastM: 1, northM: 1 }] }];
    const north = only(yearOfExposure({ latitudeDeg: 45, longitudeDeg: 0, obstacles: [tree], zones }));
    const south = only(yearOfExposure({ latitudeDeg: -45, longitudeDeg: 0, obstacles: [tree], zones }));
    expect(north.skyView[15] ?? 0).toBeGreaterThan((north.skyView[195] ?? 1) + 0.15);
    expect(south.skyView[195] ?? 0).toBeGreaterThan((south.skyView[15] ?? 1) + 0.15);
    expect(north.beamByHour[195 * 24 + 12]).toBeCloseTo(0.2, 5);
    expect(north.assumptions.map(({ field }) => field)).toEqual(['transmissivity', 'leafOutDay']);
    const told = only(yearOfExposure({ latitudeDeg: 45, longitudeDeg: 0, zones, obstacles: [{ ...tree, transmissivity: { inLeaf: 0.05, bare: 0.5 }, leafOutDay: 120, leafFallDay: 310 }] }));
    expect(told.assumptions).toEqual([]);
    expect(told.beamByHour[195 * 24 + 12]).toBeCloseTo(0.05, 5);
  });
});

describe('impossible obstacles', () => {
  const tree = { kind: 'tree' as const, at: { eastM: 0, northM: 5 }, crownBaseM: 2, topM: 9, crownRadiusM: 3, leaves: 'deciduous' as const };
  const at = (obstacle: Obstacle) => () => yearOfExposure({ ...BOSTON, obstacles: [obstacle], zones: ONE_POINT });

  it.each([
    ['obstacles[0].topM', { ...tree, topM: -4 }], ['obstacles[0].topM', { ...tree, topM: Number.NaN }], ['obstacles[0].topM', { ...tree, topM: Infinity }],
    ['obstacles[0].crownBaseM', { ...tree, crownBaseM: -1 }], ['obstacles[0].crownBaseM', { ...tree, crownBaseM: 9 }], ['obstacles[0].crownRadiusM', { ...tree, crownRadiusM: 0 }],
    ['obstacles[0].trunkDiameterM', { ...tree, trunkDiameterM: -0.1 }], ['obstacles[0].transmissivity.bare', { ...tree, transmissivity: { inLeaf: 0.1, bare: 1.2 } }],
    ['obstacles[0].leafOutDay', { ...tree, leafOutDay: 400 }], ['obstacles[0].at.eastM', { ...tree, at: { eastM: Number.NaN, northM: 0 } }],
    ['obstacles[0].heightM', { kind: 'fence' as const, line: [{ eastM: 0, northM: 1 }, { eastM: 1, northM: 1 }], heightM: 0 }],
    ['obstacles[0].line', { kind: 'fence' as const, line: [{ eastM: 0, northM: 1 }], heightM: 2 }],
    ['obstacles[0].footprint', { kind: 'building' as const, footprint: [{ eastM: 0, northM: 1 }, { eastM: 1, northM: 1 }], heightM: 2 }],
  ] satisfies [string, Obstacle][])('names %s', (field, obstacle) => {
    expect(at(obstacle)).toThrow(PhysicsError);
    expect(at(obstacle)).toThrow(expect.objectContaining({ field }));
  });

  it('names places, points and steps that cannot be', () => {
    const base = { ...BOSTON, obstacles: [], zones: ONE_POINT };
    for (const [field, change] of [
      ['latitudeDeg', { latitudeDeg: 91 }], ['longitudeDeg', { longitudeDeg: Number.NaN }], ['stepMinutes', { stepMinutes: 7 }], ['stepMinutes', { stepMinutes: 0 }], ['year', { year: 1492 }],
      ['zones[0].points', { zones: [{ id: 'a', points: [] }] }], ['zones[0].points[0].northM', { zones: [{ id: 'a', points: [{ eastM: 0, northM: Infinity }] }] }],
    ] as const) expect(() => yearOfExposure({ ...base, ...change })).toThrow(expect.objectContaining({ field }));
  });
});
