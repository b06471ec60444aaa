import { PhysicsError, requireFinite, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units';

/** A place in the yard's own metric plane: x to the east, y to the north, from any fixed corner. */
export interface PlanePoint {
  eastM: number;
  northM: number;
}

/** A house, shed or garage: a flat-topped block over its outline. */
export interface Building {
  kind: 'building';
  /** Corners in order, at least three; the last joins the first. */
  footprint: readonly PlanePoint[];
  /** Height of eaves or ridge above the lawn, whichever stands for the block [m]. */
  heightM: number;
}

/** A fence, wall or hedge: an upright sheet along a line, opaque. */
export interface Fence {
  kind: 'fence';
  /** Points in order, at least two. */
  line: readonly PlanePoint[];
  heightM: number;
}

/** Light that passes a crown, 0-1 [–]. */
export interface CrownTransmissivity {
  inLeaf: number;
  /** Without leaves; the same as in leaf for an evergreen. */
  bare: number;
}

/** A tree: an upright trunk under a crown that lets part of the light through. */
export interface Tree {
  kind: 'tree';
  at: PlanePoint;
  /** Where the crown begins above the lawn [m]. */
  crownBaseM: number;
  /** Height of the tree [m]. */
  topM: number;
  crownRadiusM: number;
  /** Left out, a trunk of `DEFAULT_TRUNK_PER_TOP` of the height. */
  trunkDiameterM?: number | null;
  /** Ellipsoid when left out. */
  crownShape?: 'ellipsoid' | 'cylinder';
  leaves: 'deciduous' | 'evergreen';
  /** Where somebody knows better than the defaults by kind. */
  transmissivity?: CrownTransmissivity | null;
  /** Day of the year on which half of the leaves are out, and on which half are down; left out, the default of the latitude. */
  leafOutDay?: number | null;
  leafFallDay?: number | null;
}

export type Obstacle = Building | Fence | Tree;

/**
 * Light through a crown: about 80 % of it is cut in leaf and 40 % without leaves, as measured under a sugar maple in clear weather (Heisler 1986,
 * Urban Ecology 9:337). Street trees let 1-5 % of the straight beam through in leaf and 40-52 % bare (Konarska et al. 2014, from memory). A default.
 */
export const DEFAULT_TRANSMISSIVITY: Readonly<Record<Tree['leaves'], CrownTransmissivity>> = {
  deciduous: { inLeaf: 0.2, bare: 0.6 },
  evergreen: { inLeaf: 0.2, bare: 0.2 },
};
export const TRANSMISSIVITY_SOURCE = 'Heisler 1986, Urban Ecology 9:337: a crown cuts about 80 % in leaf and 40 % bare';

/** Trunk diameter over tree height where nobody measured [–]. Common practice. */
export const DEFAULT_TRUNK_PER_TOP = 0.03;

/** Trunk radius of a tree [m]. */
export function trunkRadiusM(tree: Tree): number {
  return (tree.trunkDiameterM ?? DEFAULT_TRUNK_PER_TOP * tree.topM) / 2;
}

/** Transmissivity of a tree's crown, its own or the default of its kind. */
export function crownTransmissivity(tree: Tree): CrownTransmissivity {
  return tree.transmissivity ?? DEFAULT_TRANSMISSIVITY[tree.leaves];
}

/** Farthest corner of a yard from its origin [m]: beyond it a coordinate is a mistake. */
const FARTHEST_M = 10_000;
const TALLEST_M = 300;

/** Refuses a point that is not a place in the yard. @throws PhysicsError with the field named */
export function requirePoint(field: string, point: PlanePoint): void {
  requireRange(`${field}.eastM`, point.eastM, -FARTHEST_M, FARTHEST_M);
  requireRange(`${field}.northM`, point.northM, -FARTHEST_M, FARTHEST_M);
}

function requireHeight(field: string, heightM: number): void {
  requirePositive(field, heightM);
  requireRange(field, heightM, 0, TALLEST_M);
}

function requirePoints(field: string, points: readonly PlanePoint[], least: number): void {
  if (points.length < least) throw new PhysicsError(field, points.length, `must have at least ${least} points`);
  points.forEach((point, index) => requirePoint(`${field}[${index}]`, point));
}

function requireTree(field: string, tree: Tree): void {
  requirePoint(`${field}.at`, tree.at);
  requireHeight(`${field}.topM`, tree.topM);
  requireNonNegative(`${field}.crownBaseM`, tree.crownBaseM);
  if (tree.crownBaseM >= tree.topM) throw new PhysicsError(`${field}.crownBaseM`, tree.crownBaseM, `must lie below topM ${tree.topM}`);
  requirePositive(`${field}.crownRadiusM`, tree.crownRadiusM);
  requireRange(`${field}.crownRadiusM`, tree.crownRadiusM, 0, 60);
  if (tree.trunkDiameterM !== null && tree.trunkDiameterM !== undefined) requireRange(`${field}.trunkDiameterM`, tree.trunkDiameterM, 0, 10);
  if (tree.transmissivity) {
    requireRange(`${field}.transmissivity.inLeaf`, tree.transmissivity.inLeaf, 0, 1);
    requireRange(`${field}.transmissivity.bare`, tree.transmissivity.bare, 0, 1);
  }
  for (const name of ['leafOutDay', 'leafFallDay'] as const) {
    const day = tree[name] ?? null;
    if (day !== null) requireRange(`${field}.${name}`, day, 1, 366);
  }
}

/**
 * Refuses obstacles that cannot stand: heights that are not above zero, a crown that begins above its top, outlines without an area, numbers that are
 * not finite.
 * @throws PhysicsError with the field named, such as `obstacles[2].heightM`
 */
export function requireObstacles(obstacles: readonly Obstacle[]): void {
  obstacles.forEach((obstacle, index) => {
    const field = `obstacles[${index}]`;
    if (obstacle.kind === 'tree') requireTree(field, obstacle);
    else {
      requireHeight(`${field}.heightM`, obstacle.heightM);
      if (obstacle.kind === 'building') requirePoints(`${field}.footprint`, obstacle.footprint, 3);
      else requirePoints(`${field}.line`, obstacle.line, 2);
    }
  });
}

/** True when a point lies inside an outline (crossing rule); points on the edge may count either way. */
export function isInside(point: PlanePoint, outline: readonly PlanePoint[]): boolean {
  let inside = false;
  let before = outline[outline.length - 1];
  for (const corner of outline) {
    if (before && (corner.northM > point.northM) !== (before.northM > point.northM)) {
      const crossingM = corner.eastM + ((point.northM - corner.northM) * (before.eastM - corner.eastM)) / (before.northM - corner.northM);
      if (point.eastM < crossingM) inside = !inside;
    }
    before = corner;
  }
  return inside;
}

/** Sides of a building's outline or parts of a fence, from corner to corner. */
export function edgesOf(obstacle: Building | Fence): (readonly [PlanePoint, PlanePoint])[] {
  const corners = obstacle.kind === 'building' ? obstacle.footprint : obstacle.line;
  const edges: (readonly [PlanePoint, PlanePoint])[] = [];
  let before = obstacle.kind === 'building' ? corners[corners.length - 1] : undefined;
  for (const corner of corners) {
    if (before) edges.push([before, corner]);
    before = corner;
  }
  return edges;
}

/**
 * An even grid of points inside an outline, about as many as wanted: the places for which the light of a zone is reckoned.
 * @param outline - corners in order, at least three
 * @param wanted - number of points aimed at
 * @returns at least one point; the middle of the outline's corners when the outline is too thin for the grid
 * @throws PhysicsError for an outline without an area
 */
export function gridInOutline(outline: readonly PlanePoint[], wanted = 25): PlanePoint[] {
  requirePoints('outline', outline, 3);
  requireRange('wanted', requireFinite('wanted', wanted), 1, 10_000);
  const easts = outline.map((point) => point.eastM);
  const norths = outline.map((point) => point.northM);
  const westM = Math.min(...easts);
  const southM = Math.min(...norths);
  const widthM = Math.max(...easts) - westM;
  const depthM = Math.max(...norths) - southM;
  if (!(widthM * depthM > 0)) throw new PhysicsError('outline', 0, 'must enclose an area');
  let areaM2 = 0;
  outline.forEach((corner, index) => {
    const next = outline[(index + 1) % outline.length] ?? corner;
    areaM2 += (corner.eastM * next.northM - next.eastM * corner.northM) / 2;
  });
  const spacingM = Math.sqrt(Math.max(Math.abs(areaM2), widthM * depthM * 0.02) / wanted);
  const columns = Math.max(1, Math.round(widthM / spacingM));
  const rows = Math.max(1, Math.round(depthM / spacingM));
  const points: PlanePoint[] = [];
  for (let row = 0; row < rows; row += 1) {
    for (let column = 0; column < columns; column += 1) {
      const point = { eastM: westM + ((column + 0.5) * widthM) / columns, northM: southM + ((row + 0.5) * depthM) / rows };
      if (isInside(point, outline)) points.push(point);
    }
  }
  if (points.length > 0) return points;
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  return [{ eastM: mean(easts), northM: mean(norths) }];
}
