import { GRASSES, type GrassId } from '@/scheduling/grass';
import { requirePositive, requireRange } from '@/scheduling/units';
import { soilWater, type SoilTexture } from './texture';

/** Depth from which a seedling drinks: the moist inch of a seedbed [m]. Iowa State Extension. */
export const SEEDBED_DEPTH_M = 0.025;
/** Roots of a fine soil in a home lawn stop about here [m]. Texas A&M: a clay root zone is often 6 in. */
export const FINE_SOIL_ROOT_LIMIT_M = 0.15;
/** Days from sowing during which roots stay in the moist inch [d]. Common practice. */
export const SEEDLING_DAYS = 14;
/** Days from sowing to full rooting depth: two months of tending and one more [d]. Common practice. */
export const FULL_ROOT_DAYS = 90;

/** A rooting depth with where it comes from. */
export interface RootDepth {
  rootDepthM: number;
  isDefault: boolean;
  source: string;
}

/**
 * Rooting depth of an established zone: what was probed, else the default of the grass, no deeper than a fine soil lets roots go.
 * @param probedM - measured depth [m], null when nobody looked
 * @throws PhysicsError for a depth outside 0.02-1.5 m
 */
export function establishedRootDepth(grass: GrassId, texture: SoilTexture, probedM: number | null): RootDepth {
  if (probedM !== null) return { rootDepthM: requireRange('rootDepthM', probedM, 0.02, 1.5), isDefault: false, source: 'probed' };
  const { rootDepthM, rootDepthSource } = GRASSES[grass];
  if (soilWater(texture).soilClass === 'fine' && rootDepthM > FINE_SOIL_ROOT_LIMIT_M) {
    return { rootDepthM: FINE_SOIL_ROOT_LIMIT_M, isDefault: true, source: 'a clay root zone is often 6 in (Texas A&M)' };
  }
  return { rootDepthM, isDefault: true, source: rootDepthSource };
}

/**
 * Rooting depth of a sowing: the moist inch for two weeks, then in a straight line to the full depth at 90 days.
 * @param daysSinceSowing - 0 on the day of sowing; negative before it (bare ground) [d]
 * @param fullDepthM - depth of the same zone when established [m]
 * @returns [m]
 */
export function seededRootDepthM(daysSinceSowing: number, fullDepthM: number): number {
  requirePositive('fullDepthM', fullDepthM);
  const start = Math.min(SEEDBED_DEPTH_M, fullDepthM);
  const grown = Math.min(1, Math.max(0, (daysSinceSowing - SEEDLING_DAYS) / (FULL_ROOT_DAYS - SEEDLING_DAYS)));
  return start + (fullDepthM - start) * grown;
}
