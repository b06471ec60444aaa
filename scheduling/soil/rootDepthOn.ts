import { GRASSES, type GrassFamily, type GrassId } from '@/scheduling/grass';
import { civilDayParts, daysBetween, requireRange, type CivilDay } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';
import { establishedRootDepth, seededRootDepthM } from './roots';
import { availableWaterMm, type SoilTexture } from './texture';

/**
 * Part of the full rooting depth that works in each month of the northern hemisphere, January first [–]. Roots of cool-season grass die back in hot soil
 * and are longest in spring; those of warm-season grass are longest in summer and work little while it rests (common practice; extension turf guides).
 */
export const SEASONAL_ROOT_SHARE: Readonly<Record<GrassFamily, readonly number[]>> = {
  cool: [0.9, 0.9, 0.95, 1, 1, 0.95, 0.85, 0.8, 0.85, 0.9, 0.95, 0.9],
  warm: [0.7, 0.7, 0.75, 0.85, 0.95, 1, 1, 1, 0.95, 0.85, 0.75, 0.7],
};
export const SEASONAL_ROOT_SOURCE = 'default, common practice: cool-season roots are longest in spring and die back in hot soil, warm-season roots are longest in summer';

const MID_MONTH_DAY = 15;
const MONTH_DAYS = 30.4;

/**
 * Part of the full rooting depth that works on a day, in a straight line between the middles of the months; half a year apart in the southern hemisphere.
 * @returns 0.7-1 [–]
 */
export function seasonalRootShare(family: GrassFamily, on: CivilDay, latitudeDeg: number): number {
  requireRange('latitudeDeg', latitudeDeg, -90, 90);
  const { month, day } = civilDayParts(on);
  const shares = SEASONAL_ROOT_SHARE[family];
  const place = month - 1 + (day - MID_MONTH_DAY) / MONTH_DAYS + (latitudeDeg < 0 ? 6 : 0);
  const before = Math.floor(place);
  const part = place - before;
  const at = (index: number) => shares[((index % 12) + 12) % 12] ?? 1;
  return at(before) * (1 - part) + at(before + 1) * part;
}

/** Input of `rootDepthOn`. */
export interface RootDepthInput {
  grass: GrassId;
  texture: SoilTexture;
  /** Probed depth of the grown lawn [m]. */
  probedM?: number | null;
  /** Day of sowing; null for an established lawn. */
  sownOn?: CivilDay | null;
  on: CivilDay;
  /** Tells the season; null leaves it out. */
  latitudeDeg?: number | null;
}

/** Rooting depth of a lawn on a day, and what it holds. */
export interface RootDepthOn {
  rootDepthM: number;
  /** Full depth of the grown lawn [m]. */
  fullDepthM: number;
  /** Part of it by season [–]. */
  seasonalShare: number;
  /** TAW for that depth [mm]. */
  totalAvailableMm: number;
  assumptions: Assumption[];
}

/**
 * Rooting depth of a home lawn by species, age and season, with the water it holds: 0.10 to 0.30 m where nobody probed.
 * @throws PhysicsError for impossible input, with the field named
 * Sources: the grass's own (`GRASSES`), `seededRootDepthM` for age, `SEASONAL_ROOT_SHARE` for season
 */
export function rootDepthOn({ grass, texture, probedM = null, sownOn = null, on, latitudeDeg = null }: RootDepthInput): RootDepthOn {
  const full = establishedRootDepth(grass, texture, probedM);
  const assumptions: Assumption[] = [];
  if (full.isDefault) assumptions.push({ field: 'rootDepthM', method: `roots of ${full.rootDepthM} m taken for this grass and soil`, source: full.source });
  // A probed depth is what there was on the day of the probe: the season does not come on top of it.
  const seasonalShare = latitudeDeg === null || !full.isDefault ? 1 : seasonalRootShare(GRASSES[grass].family, on, latitudeDeg);
  if (seasonalShare < 1) assumptions.push({ field: 'rootDepthM', method: 'roots shorter by the season', source: SEASONAL_ROOT_SOURCE });
  const grownM = full.rootDepthM * seasonalShare;
  const rootDepthM = sownOn === null ? grownM : seededRootDepthM(daysBetween(sownOn, on), grownM);
  if (rootDepthM < grownM) assumptions.push({ field: 'rootDepthM', method: 'roots grow from the moist inch to full depth in 90 days', source: 'common practice' });
  return { rootDepthM, fullDepthM: full.rootDepthM, seasonalShare, totalAvailableMm: availableWaterMm(texture, rootDepthM), assumptions };
}
