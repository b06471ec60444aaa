import { crownTransmissivity, edgesOf, isInside, trunkRadiusM, type Building, type Fence, type Obstacle, type PlanePoint, type Tree } from './obstacles';
import type { SunDirection } from './solarCoordinates';

/** Tangents of the heights between which something stands before the sky in one direction; high may be infinite. */
export interface SkyBand {
  low: number;
  high: number;
}

/** Nearest distance at which a ray from a point crosses a line [m]; infinite when it does not. */
function distanceToEdge(point: PlanePoint, sinAzimuth: number, cosAzimuth: number, from: PlanePoint, to: PlanePoint): number {
  const eastM = from.eastM - point.eastM;
  const northM = from.northM - point.northM;
  const alongEast = to.eastM - from.eastM;
  const alongNorth = to.northM - from.northM;
  const denominator = sinAzimuth * alongNorth - cosAzimuth * alongEast;
  if (Math.abs(denominator) < 1e-12) return Infinity;
  const distanceM = (eastM * alongNorth - northM * alongEast) / denominator;
  const part = (eastM * cosAzimuth - northM * sinAzimuth) / denominator;
  return distanceM > 0 && part >= 0 && part <= 1 ? distanceM : Infinity;
}

/**
 * Tangent of the height to which a building or a fence hides the sky in one direction.
 * @returns 0 for an open direction, infinite for a point inside the building
 */
export function wallTangent(point: PlanePoint, obstacle: Building | Fence, azimuthRad: number): number {
  if (obstacle.kind === 'building' && isInside(point, obstacle.footprint)) return Infinity;
  const sine = Math.sin(azimuthRad);
  const cosine = Math.cos(azimuthRad);
  let nearestM = Infinity;
  for (const [from, to] of edgesOf(obstacle)) nearestM = Math.min(nearestM, distanceToEdge(point, sine, cosine, from, to));
  return nearestM === Infinity ? 0 : obstacle.heightM / nearestM;
}

/**
 * Band of heights in which a crown stands in one direction, seen from the ground.
 * The upright plane through the point cuts an ellipsoid in an ellipse, whose two tangents from the point bound the band; a cylinder in a rectangle.
 * From under the crown the band reaches over the zenith.
 * @returns null when the crown does not stand in that direction
 */
export function crownBand(point: PlanePoint, tree: Tree, azimuthRad: number): SkyBand | null {
  const eastM = tree.at.eastM - point.eastM;
  const northM = tree.at.northM - point.northM;
  const alongM = eastM * Math.sin(azimuthRad) + northM * Math.cos(azimuthRad);
  const asideM = eastM * Math.cos(azimuthRad) - northM * Math.sin(azimuthRad);
  const radius2 = tree.crownRadiusM ** 2 - asideM * asideM;
  if (radius2 <= 0) return null;
  const halfM = Math.sqrt(radius2);
  if (alongM + halfM <= 0) return null;
  if (tree.crownShape === 'cylinder') {
    const nearM = alongM - halfM;
    return { low: tree.crownBaseM / (alongM + halfM), high: nearM > 0 ? tree.topM / nearM : Infinity };
  }
  const middleM = (tree.topM + tree.crownBaseM) / 2;
  const upM = (((tree.topM - tree.crownBaseM) / 2) * halfM) / tree.crownRadiusM;
  // Tangents t of lines z = u t that touch ((u − u0)/a)² + ((z − zc)/c)² = 1: (u0² − a²) t² − 2 u0 zc t + zc² − c² = 0.
  const lead = alongM * alongM - radius2;
  const product = middleM * middleM - upM * upM;
  if (Math.abs(lead) < 1e-9) return alongM > 0 ? { low: product / (2 * alongM * middleM), high: Infinity } : null;
  const root = Math.sqrt(Math.max(0, (alongM * middleM) ** 2 - lead * product));
  if (lead > 0) {
    const high = (alongM * middleM + root) / lead;
    return { low: Math.max(0, product / (lead * high)), high };
  }
  // Under the crown: one tangent ahead, one behind. The form without cancellation where u0 is positive.
  const low = alongM > 0 ? product / (alongM * middleM + root) : (alongM * middleM - root) / lead;
  return { low: Math.max(0, low), high: Infinity };
}

/** Tangent of the height to which a trunk hides the sky in one direction: up to the crown. */
export function trunkTangent(point: PlanePoint, tree: Tree, azimuthRad: number): number {
  const radiusM = trunkRadiusM(tree);
  if (radiusM <= 0) return 0;
  const eastM = tree.at.eastM - point.eastM;
  const northM = tree.at.northM - point.northM;
  if (eastM * eastM + northM * northM <= radiusM * radiusM) return Infinity;
  const alongM = eastM * Math.sin(azimuthRad) + northM * Math.cos(azimuthRad);
  const asideM = eastM * Math.cos(azimuthRad) - northM * Math.sin(azimuthRad);
  const half2 = radiusM * radiusM - asideM * asideM;
  if (half2 <= 0 || alongM <= 0) return 0;
  return tree.crownBaseM / Math.max(1e-6, alongM - Math.sqrt(half2));
}

/**
 * Part of the straight sunlight that reaches a point on the ground, by testing the ray against every obstacle.
 * @param leafShares - share of the leaves on each obstacle that is a tree, in the order of the obstacles; 1 for others
 * @returns 0 behind something opaque or with the sun down, 1 in the open, the product of the crowns' transmissivities between [–]
 */
export function beamShareAt(point: PlanePoint, sun: SunDirection, obstacles: readonly Obstacle[], leafShares: readonly number[]): number {
  if (sun.altitudeRad <= 0) return 0;
  const tangent = Math.tan(Math.min(sun.altitudeRad, Math.PI / 2 - 1e-9));
  let share = 1;
  for (const [index, obstacle] of obstacles.entries()) {
    if (obstacle.kind !== 'tree') {
      if (wallTangent(point, obstacle, sun.azimuthRad) > tangent) return 0;
      continue;
    }
    if (trunkTangent(point, obstacle, sun.azimuthRad) > tangent) return 0;
    const band = crownBand(point, obstacle, sun.azimuthRad);
    if (band !== null && tangent > band.low && tangent < band.high) {
      const { inLeaf, bare } = crownTransmissivity(obstacle);
      share *= bare + (inLeaf - bare) * (leafShares[index] ?? 1);
    }
  }
  return share;
}
