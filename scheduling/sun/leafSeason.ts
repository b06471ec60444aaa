import { requireRange } from '@/scheduling/units';
import type { Tree } from './obstacles';

/** When deciduous trees are in leaf. */
export interface LeafSeason {
  /** In leaf all year. */
  evergreen: boolean;
  /** Day of the year on which half of the leaves are out. */
  leafOutDay: number;
  /** Day of the year on which half of the leaves are down. */
  leafFallDay: number;
  source: string;
}

/** Days from the first leaf to full leaf, and from full leaf to bare [d]. Common practice. */
export const LEAF_OUT_DAYS = 20;
export const LEAF_FALL_DAYS = 24;
/** Nearer to the equator than this, trees are taken as in leaf all year [°]. Common practice. */
export const LEAF_ALL_YEAR_LATITUDE_DEG = 25;
export const LEAF_SEASON_SOURCE = 'default: half in leaf about 25 April and half bare about 30 October at 40°, spring three days later and autumn two days earlier for every two degrees toward the pole (common practice)';

const YEAR_DAYS = 365.25;
const HALF_YEAR_DAYS = YEAR_DAYS / 2;
const wrapDay = (day: number): number => ((day % YEAR_DAYS) + YEAR_DAYS) % YEAR_DAYS;

/**
 * Default leaf season of deciduous trees by latitude; half a year apart in the southern hemisphere.
 * @param latitudeDeg - north positive [°]
 */
export function leafSeasonAt(latitudeDeg: number): LeafSeason {
  requireRange('latitudeDeg', latitudeDeg, -90, 90);
  const toPole = Math.min(66, Math.abs(latitudeDeg)) - 40;
  const shift = latitudeDeg < 0 ? HALF_YEAR_DAYS : 0;
  return {
    evergreen: Math.abs(latitudeDeg) < LEAF_ALL_YEAR_LATITUDE_DEG,
    leafOutDay: wrapDay(115 + 1.5 * toPole + shift),
    leafFallDay: wrapDay(303 - toPole + shift),
    source: LEAF_SEASON_SOURCE,
  };
}

/** Leaf season of a tree: what its keeper said, else the default of the latitude. */
export function leafSeasonOf(tree: Tree, latitudeDeg: number): LeafSeason {
  const season = leafSeasonAt(latitudeDeg);
  if (tree.leaves === 'evergreen') return { ...season, evergreen: true, source: 'evergreen' };
  const leafOutDay = tree.leafOutDay ?? null;
  const leafFallDay = tree.leafFallDay ?? null;
  if (leafOutDay === null && leafFallDay === null) return season;
  return { evergreen: false, leafOutDay: leafOutDay ?? season.leafOutDay, leafFallDay: leafFallDay ?? season.leafFallDay, source: 'entered' };
}

/**
 * Share of the leaves that are on the tree on a day: rising in a straight line around leaf-out, falling around leaf-fall.
 * @param day - day of the year, 1-366
 * @returns 0-1 [–]
 */
export function leafShare(season: LeafSeason, day: number): number {
  if (season.evergreen) return 1;
  const firstLeaf = season.leafOutDay - LEAF_OUT_DAYS / 2;
  const length = wrapDay(season.leafFallDay + LEAF_FALL_DAYS / 2 - firstLeaf);
  const since = wrapDay(day - firstLeaf);
  if (since >= length) return 0;
  return Math.min(1, since / LEAF_OUT_DAYS, (length - since) / LEAF_FALL_DAYS);
}
