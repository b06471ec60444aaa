import { edgesOf, isInside, trunkRadiusM, type Obstacle, type PlanePoint, type Tree } from './obstacles';
import { crownBand } from './rayTest';

/** Directions into which the round of the horizon is cut for a year's sums: every degree, in which the sun moves on for about four minutes. */
export const SKYLINE_BINS = 360;
const BIN_RAD = (2 * Math.PI) / SKYLINE_BINS;

/** Azimuth at the middle of a bin [rad]. */
export function binAzimuthRad(bin: number): number {
  return (bin + 0.5) * BIN_RAD;
}

/** Bin of an azimuth. */
export function binOfAzimuth(azimuthRad: number): number {
  const turns = azimuthRad / (2 * Math.PI);
  return Math.min(SKYLINE_BINS - 1, Math.floor((turns - Math.floor(turns)) * SKYLINE_BINS));
}

/**
 * What hides the sky from a row of points, by direction: the opaque outline of buildings, fences and trunks, and for every tree the band of its crown.
 * Tables are laid out by bin first, so that all points of one direction lie together.
 */
export interface Skyline {
  pointCount: number;
  /** Tangent of the opaque outline, [bin × points + point]. */
  opaque: Float32Array;
  trees: readonly Tree[];
  /** Place of each tree among the obstacles. */
  treeIndex: readonly number[];
  /** Tangents of the crown's band, [(tree × bins + bin) × points + point]; both 0 where the crown is not. */
  crownLow: Float32Array;
  crownHigh: Float32Array;
  /** 1 where a crown stands in a direction for any of the points, [tree × bins + bin]. */
  crownSeen: Uint8Array;
}

const modulo = (bin: number): number => ((bin % SKYLINE_BINS) + SKYLINE_BINS) % SKYLINE_BINS;

/** Bins whose middle lies between two azimuths less than half a turn apart. */
function eachBinBetween(fromRad: number, untilRad: number, visit: (bin: number, azimuthRad: number) => void): void {
  const last = Math.floor(untilRad / BIN_RAD - 0.5);
  for (let bin = Math.ceil(fromRad / BIN_RAD - 0.5); bin <= last; bin += 1) visit(modulo(bin), (bin + 0.5) * BIN_RAD);
}

function raise(opaque: Float32Array, at: number, tangent: number): void {
  if (tangent > (opaque[at] ?? 0)) opaque[at] = tangent;
}

function addEdge(skyline: Skyline, index: number, point: PlanePoint, from: PlanePoint, to: PlanePoint, heightM: number): void {
  const eastM = from.eastM - point.eastM;
  const northM = from.northM - point.northM;
  const alongEast = to.eastM - from.eastM;
  const alongNorth = to.northM - from.northM;
  const cross = eastM * alongNorth - northM * alongEast;
  // A wall seen along its own line has no width.
  if (Math.abs(cross) < 1e-9) return;
  const first = Math.atan2(eastM, northM);
  const turn = Math.atan2(to.eastM - point.eastM, to.northM - point.northM) - first;
  const wrapped = turn - 2 * Math.PI * Math.round(turn / (2 * Math.PI));
  eachBinBetween(Math.min(first, first + wrapped), Math.max(first, first + wrapped), (bin, azimuth) => {
    const tangent = (heightM * (Math.sin(azimuth) * alongNorth - Math.cos(azimuth) * alongEast)) / cross;
    raise(skyline.opaque, bin * skyline.pointCount + index, tangent);
  });
}

function addTree(skyline: Skyline, index: number, point: PlanePoint, tree: Tree, treeAt: number): void {
  const { pointCount, opaque, crownLow, crownHigh, crownSeen } = skyline;
  const eastM = tree.at.eastM - point.eastM;
  const northM = tree.at.northM - point.northM;
  const distanceM = Math.hypot(eastM, northM);
  const towards = Math.atan2(eastM, northM);
  const half = distanceM > tree.crownRadiusM ? Math.asin(tree.crownRadiusM / distanceM) : Math.PI - BIN_RAD / 4;
  eachBinBetween(towards - half, towards + half, (bin, azimuth) => {
    const band = crownBand(point, tree, azimuth);
    if (band === null) return;
    const slot = treeAt * SKYLINE_BINS + bin;
    crownSeen[slot] = 1;
    crownLow[slot * pointCount + index] = band.low;
    crownHigh[slot * pointCount + index] = band.high;
  });
  const radiusM = trunkRadiusM(tree);
  if (radiusM <= 0) return;
  if (distanceM <= radiusM) {
    for (let bin = 0; bin < SKYLINE_BINS; bin += 1) opaque[bin * pointCount + index] = Infinity;
    return;
  }
  const trunkHalf = Math.asin(radiusM / distanceM);
  eachBinBetween(towards - trunkHalf, towards + trunkHalf, (bin, azimuth) => {
    const asideM = distanceM * Math.sin(azimuth - towards);
    const nearM = distanceM * Math.cos(azimuth - towards) - Math.sqrt(Math.max(0, radiusM * radiusM - asideM * asideM));
    raise(opaque, bin * pointCount + index, tree.crownBaseM / Math.max(1e-6, nearM));
  });
}

/** Builds the skyline of a row of points. Obstacles are taken as checked. */
export function skylineOf(points: readonly PlanePoint[], obstacles: readonly Obstacle[]): Skyline {
  const trees: Tree[] = [];
  const treeIndex: number[] = [];
  obstacles.forEach((obstacle, index) => {
    if (obstacle.kind !== 'tree') return;
    trees.push(obstacle);
    treeIndex.push(index);
  });
  const pointCount = points.length;
  const skyline: Skyline = {
    pointCount, trees, treeIndex,
    opaque: new Float32Array(SKYLINE_BINS * pointCount),
    crownLow: new Float32Array(trees.length * SKYLINE_BINS * pointCount),
    crownHigh: new Float32Array(trees.length * SKYLINE_BINS * pointCount),
    crownSeen: new Uint8Array(trees.length * SKYLINE_BINS),
  };
  for (const obstacle of obstacles) {
    if (obstacle.kind === 'tree') continue;
    const edges = edgesOf(obstacle);
    points.forEach((point, index) => {
      if (obstacle.kind === 'building' && isInside(point, obstacle.footprint)) {
        for (let bin = 0; bin < SKYLINE_BINS; bin += 1) skyline.opaque[bin * pointCount + index] = Infinity;
        return;
      }
      for (const [from, to] of edges) addEdge(skyline, index, point, from, to, obstacle.heightM);
    });
  }
  trees.forEach((tree, treeAt) => points.forEach((point, index) => addTree(skyline, index, point, tree, treeAt)));
  return skyline;
}

/** How finely the sky is cut for a sky view. */
export interface SkyQuadrature {
  /** Every how many bins a direction is taken. */
  everyBins: number;
  /** Rings of equal light between the opaque outline and the zenith, where crowns stand. */
  rings: number;
}

/** One degree by 1/48 of the light: for a single point. */
export const FINE_SKY: SkyQuadrature = { everyBins: 1, rings: 48 };
/** Five degrees by 1/12 of the light: for the many points of a year's sums. */
export const COARSE_SKY: SkyQuadrature = { everyBins: 5, rings: 12 };

/**
 * Part of the light of an even sky that reaches each point on level ground: the sky above the opaque outline, dimmed by crowns.
 * The share of a direction above a height h is cos² h; rings between are of equal light.
 * @param transmissivities - of each tree of the skyline
 * @returns one share for each point, 0-1 [–]
 * Source: view factor of an even sky; light scattered by walls and leaves is left out
 */
export function skyViewsOf(skyline: Skyline, transmissivities: readonly number[], { everyBins, rings }: SkyQuadrature): Float64Array {
  const { pointCount, opaque, crownLow, crownHigh, crownSeen, trees } = skyline;
  const views = new Float64Array(pointCount);
  let count = 0;
  for (let bin = everyBins >> 1; bin < SKYLINE_BINS; bin += everyBins) {
    count += 1;
    const slots: number[] = [];
    const throughs: number[] = [];
    for (let tree = 0; tree < trees.length; tree += 1) {
      if (crownSeen[tree * SKYLINE_BINS + bin] !== 1) continue;
      slots.push((tree * SKYLINE_BINS + bin) * pointCount);
      throughs.push(transmissivities[tree] ?? 1);
    }
    for (let point = 0; point < pointCount; point += 1) {
      const tangent = opaque[bin * pointCount + point] ?? 0;
      if (tangent === Infinity) continue;
      const hidden = (tangent * tangent) / (1 + tangent * tangent);
      const open = 1 - hidden;
      let dimmed = false;
      for (const slot of slots) dimmed ||= (crownHigh[slot + point] ?? 0) > tangent;
      if (!dimmed) {
        views[point] = (views[point] ?? 0) + open;
        continue;
      }
      let light = 0;
      for (let ring = 0; ring < rings; ring += 1) {
        const level = hidden + (open * (ring + 0.5)) / rings;
        const height = Math.sqrt(level / (1 - level));
        let share = 1;
        for (let seen = 0; seen < slots.length; seen += 1) {
          const at = (slots[seen] ?? 0) + point;
          if (height > (crownLow[at] ?? 0) && height < (crownHigh[at] ?? 0)) share *= throughs[seen] ?? 1;
        }
        light += share;
      }
      views[point] = (views[point] ?? 0) + (open * light) / rings;
    }
  }
  return views.map((view) => view / count);
}
