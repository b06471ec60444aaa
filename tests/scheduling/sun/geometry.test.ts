import fc from 'fast-check';
import {
  beamShareAt, crownBand, gridInOutline, isInside, LEAF_ALL_YEAR_LATITUDE_DEG, leafSeasonAt, leafSeasonOf, leafShare, skyViewFactor, trunkTangent, wallTangent, type Obstacle, type PlanePoint, type Tree,
} from '@/scheduling/sun';
import { CANYON_TRUTH } from '../../fixtures/sun';
import { TOLERANCES } from '../../fixtures/tolerances';

const HERE: PlanePoint = { eastM: 0, northM: 0 };
const DEGREE = Math.PI / 180;
const tree = (change: Partial<Tree> = {}): Tree => ({ kind: 'tree', at: { eastM: 0, northM: 10 }, crownBaseM: 3, topM: 11, crownRadiusM: 4, trunkDiameterM: 0.4, leaves: 'deciduous', ...change });
const blockOf = (westM: number, southM: number, eastM: number, northM: number, heightM: number): Obstacle => ({
  kind: 'building', heightM, footprint: [{ eastM: westM, northM: southM }, { eastM, northM: southM }, { eastM, northM }, { eastM: westM, northM }],
});

describe('sky view', () => {
  it('is one in the open and nothing under a roof', () => {
    expect(skyViewFactor(HERE, [])).toBe(1);
    expect(skyViewFactor(HERE, [blockOf(-5, -5, 5, 5, 3)])).toBe(0);
  });

  it.each(CANYON_TRUTH.views)('in the middle of a street with H/W $heightOverWidth is $skyView (Oke 1981)', ({ heightOverWidth, skyView }) => {
    const heightM = 10;
    const half = heightM / heightOverWidth / 2;
    const street = [blockOf(-3000, half, 3000, half + 20, heightM), blockOf(-3000, -half - 20, 3000, -half, heightM)];
    expect(Math.abs(skyViewFactor(HERE, street) - skyView)).toBeLessThan(TOLERANCES.skyView);
    expect(Math.abs(skyViewFactor(HERE, street) - Math.cos(Math.atan(2 * heightOverWidth)))).toBeLessThan(TOLERANCES.skyView);
  });

  it('of an even wall all round is cos² of its height', () => {
    const ring: Obstacle = { kind: 'fence', heightM: 8, line: Array.from({ length: 181 }, (_, index) => ({ eastM: 10 * Math.cos(index * 2 * DEGREE), northM: 10 * Math.sin(index * 2 * DEGREE) })) };
    expect(skyViewFactor(HERE, [ring])).toBeCloseTo(1 / (1 + 0.64), 3);
  });

  it('under a wide thin roof of leaves is about what the leaves let through', () => {
    const roof = tree({ at: HERE, crownShape: 'cylinder', crownBaseM: 2, topM: 2.5, crownRadiusM: 59, trunkDiameterM: 0, transmissivity: { inLeaf: 0.3, bare: 0.8 } });
    expect(Math.abs(skyViewFactor(HERE, [roof], 1) - 0.3)).toBeLessThan(0.01);
    expect(Math.abs(skyViewFactor(HERE, [roof], 0) - 0.8)).toBeLessThan(0.01);
    expect(Math.abs(skyViewFactor(HERE, [roof], 0.5) - 0.55)).toBeLessThan(0.01);
  });
});

describe('rays', () => {
  const noon = (altitudeDeg: number, azimuthDeg = 180) => ({ azimuthRad: azimuthDeg * DEGREE, altitudeRad: altitudeDeg * DEGREE });

  it('pass over a wall by its height over its distance', () => {
    const wall: Obstacle = { kind: 'fence', line: [{ eastM: -50, northM: -4 }, { eastM: 50, northM: -4 }], heightM: 3 };
    expect(wallTangent(HERE, wall, Math.PI)).toBeCloseTo(0.75, 12);
    expect(wallTangent(HERE, wall, Math.PI * 0.75)).toBeCloseTo(0.75 * Math.SQRT1_2, 12);
    expect(wallTangent(HERE, wall, 0)).toBe(0);
    expect(beamShareAt(HERE, noon(36.8), [wall], [1])).toBe(0);
    expect(beamShareAt(HERE, noon(36.9), [wall], [1])).toBe(1);
    expect(beamShareAt(HERE, noon(-1), [], [])).toBe(0);
  });

  it('touch an ellipsoid crown where its tangents are: every ray inside the band meets it, none outside (by solving the quadratic in space)', () => {
    fc.assert(fc.property(
      fc.double({ min: -15, max: 15, noNaN: true }), fc.double({ min: -15, max: 15, noNaN: true }), fc.double({ min: 0, max: 6, noNaN: true }), fc.double({ min: 0.5, max: 9, noNaN: true }),
      fc.double({ min: 0.5, max: 7, noNaN: true }), fc.double({ min: 0, max: 360, noNaN: true }), fc.double({ min: 0.5, max: 89.5, noNaN: true }),
      (eastM, northM, crownBaseM, depthM, crownRadiusM, azimuthDeg, altitudeDeg) => {
        const oak = tree({ at: { eastM, northM }, crownBaseM, topM: crownBaseM + depthM, crownRadiusM });
        const [x, y, z] = [Math.cos(altitudeDeg * DEGREE) * Math.sin(azimuthDeg * DEGREE), Math.cos(altitudeDeg * DEGREE) * Math.cos(azimuthDeg * DEGREE), Math.sin(altitudeDeg * DEGREE)];
        const half = depthM / 2;
        const a = (x * x + y * y) / crownRadiusM ** 2 + (z * z) / half ** 2;
        const b = -2 * ((x * eastM + y * northM) / crownRadiusM ** 2 + (z * (crownBaseM + half)) / half ** 2);
        const c = (eastM * eastM + northM * northM) / crownRadiusM ** 2 + (crownBaseM + half) ** 2 / half ** 2 - 1;
        const discriminant = b * b - 4 * a * c;
        // A graze within rounding of the tangent may count either way.
        fc.pre(Math.abs(discriminant) > 1e-6 * b * b);
        const meets = discriminant > 0 && -b > 0;
        const band = crownBand(HERE, oak, azimuthDeg * DEGREE);
        const tangent = Math.tan(altitudeDeg * DEGREE);
        expect(band !== null && tangent > band.low && tangent < band.high).toBe(meets);
      },
    ), { numRuns: 500 });
  });

  it('meet a cylinder crown in its rectangle, a trunk below the crown only, and more than one crown by the product', () => {
    const box = tree({ crownShape: 'cylinder' });
    expect(crownBand(HERE, box, 0)).toEqual({ low: 3 / 14, high: 11 / 6 });
    expect(crownBand(HERE, box, Math.PI)).toBeNull();
    expect(crownBand(HERE, tree({ at: HERE, crownShape: 'cylinder' }), 1)).toEqual({ low: 0.75, high: Infinity });
    expect(trunkTangent(HERE, tree(), 0)).toBeCloseTo(3 / 9.8, 12);
    expect(trunkTangent(HERE, tree(), 0.05)).toBe(0);
    expect(trunkTangent(HERE, tree({ at: HERE }), 1)).toBe(Infinity);
    const two = [box, tree({ at: { eastM: 0, northM: 12 }, crownShape: 'cylinder' })];
    expect(beamShareAt(HERE, noon(35, 0), [box], [1])).toBeCloseTo(0.2, 12);
    expect(beamShareAt(HERE, noon(35, 0), two, [1, 1])).toBeCloseTo(0.04, 12);
    expect(beamShareAt(HERE, noon(35, 0), two, [0, 0])).toBeCloseTo(0.36, 12);
    expect(beamShareAt(HERE, noon(35, 0), [box], [0.5])).toBeCloseTo(0.4, 12);
    expect(beamShareAt(HERE, noon(10, 0), [box], [1])).toBe(0);
  });
});

describe('leaves', () => {
  it('are full in summer and gone in winter, half a year apart in the south', () => {
    for (const latitudeDeg of [30, 42, 50, 60]) {
      const season = leafSeasonAt(latitudeDeg);
      expect(leafShare(season, 196)).toBe(1);
      expect(leafShare(season, 15)).toBe(0);
      const south = leafSeasonAt(-latitudeDeg);
      expect(leafShare(south, 196)).toBe(0);
      expect(leafShare(south, 15)).toBe(1);
      for (let day = 1; day <= 365; day += 1) expect(Math.abs(leafShare(south, day) - leafShare(season, day + 182.625))).toBeLessThan(1e-9);
      expect(leafShare(season, season.leafOutDay)).toBeCloseTo(0.5, 12);
      expect(leafShare(season, season.leafFallDay)).toBeCloseTo(0.5, 12);
    }
  });

  it('come later and go earlier toward the pole, and stay all year in the tropics', () => {
    for (let latitudeDeg = 26; latitudeDeg < 65; latitudeDeg += 1) {
      expect(leafSeasonAt(latitudeDeg + 1).leafOutDay).toBeGreaterThan(leafSeasonAt(latitudeDeg).leafOutDay);
      expect(leafSeasonAt(latitudeDeg + 1).leafFallDay).toBeLessThan(leafSeasonAt(latitudeDeg).leafFallDay);
    }
    for (let day = 1; day <= 366; day += 1) expect(leafShare(leafSeasonAt(LEAF_ALL_YEAR_LATITUDE_DEG - 1), day)).toBe(1);
  });

  it('follow what the keeper of a tree said', () => {
    expect(leafSeasonOf(tree({ leafOutDay: 90 }), 42)).toMatchObject({ evergreen: false, leafOutDay: 90, source: 'entered' });
    expect(leafShare(leafSeasonOf(tree({ leaves: 'evergreen' }), 42), 15)).toBe(1);
    fc.assert(fc.property(fc.integer({ min: 1, max: 366 }), fc.integer({ min: 1, max: 366 }), fc.integer({ min: 1, max: 366 }), (leafOutDay, leafFallDay, day) => {
      const share = leafShare(leafSeasonOf(tree({ leafOutDay, leafFallDay }), 42), day);
      expect(share).toBeGreaterThanOrEqual(0);
      expect(share).toBeLessThanOrEqual(1);
    }));
  });
});

describe('points of a zone', () => {
  it('lie inside its outline, evenly, about as many as wanted', () => {
    const bean: PlanePoint[] = [{ eastM: 0, northM: 0 }, { eastM: 20, northM: 0 }, { eastM: 20, northM: 4 }, { eastM: 6, northM: 4 }, { eastM: 6, northM: 15 }, { eastM: 0, northM: 15 }];
    const points = gridInOutline(bean, 25);
    expect(points.length).toBeGreaterThan(15);
    expect(points.length).toBeLessThan(40);
    expect(points.every((point) => isInside(point, bean))).toBe(true);
    expect(gridInOutline([{ eastM: 0, northM: 0 }, { eastM: 10, northM: 0 }, { eastM: 10, northM: 10 }, { eastM: 0, northM: 10 }], 25)).toHaveLength(25);
  });

  it('are one at least, even in a sliver', () => {
    fc.assert(fc.property(fc.double({ min: 0.01, max: 50, noNaN: true }), fc.double({ min: 0.01, max: 50, noNaN: true }), fc.integer({ min: 1, max: 60 }), (widthM, depthM, wanted) => {
      const points = gridInOutline([{ eastM: 0, northM: 0 }, { eastM: widthM, northM: 0 }, { eastM: widthM, northM: depthM }], wanted);
      expect(points.length).toBeGreaterThan(0);
      expect(points.every(({ eastM, northM }) => eastM >= 0 && northM >= 0 && eastM <= widthM && northM <= depthM)).toBe(true);
    }));
  });

  it('need an area', () => {
    expect(() => gridInOutline([{ eastM: 0, northM: 0 }, { eastM: 10, northM: 0 }], 25)).toThrow(expect.objectContaining({ field: 'outline' }));
    expect(() => gridInOutline([{ eastM: 0, northM: 0 }, { eastM: 10, northM: 0 }, { eastM: 5, northM: 0 }], 25)).toThrow(expect.objectContaining({ field: 'outline' }));
    expect(() => gridInOutline([{ eastM: 0, northM: 0 }, { eastM: Number.NaN, northM: 0 }, { eastM: 5, northM: 0 }], 25)).toThrow(expect.objectContaining({ field: 'outline[1].eastM' }));
  });
});
