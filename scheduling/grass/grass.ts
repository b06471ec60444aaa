/** The grasses that a zone can have. */
export const GRASS_IDS = [
  'kentucky_bluegrass', 'perennial_ryegrass', 'tall_fescue', 'fine_fescue', 'cool_mix',
  'bermuda', 'zoysia', 'st_augustine', 'buffalo', 'warm_mix',
] as const;

export type GrassId = (typeof GRASS_IDS)[number];
export type GrassFamily = 'cool' | 'warm';

/** What is taken for a grass until somebody measures it. Every figure is a default. */
export interface Grass {
  id: GrassId;
  family: GrassFamily;
  /** Kc of a full mown lawn [–]. */
  cropCoefficient: number;
  cropCoefficientSource: string;
  /** p, part of the available water that may be used without stress at 5 mm/d [–]. */
  depletionFraction: number;
  depletionFractionSource: string;
  /** Depth of most roots in an established home lawn [m]. */
  rootDepthM: number;
  rootDepthSource: string;
}

const FAMILY = {
  cool: {
    family: 'cool',
    cropCoefficient: 0.85,
    cropCoefficientSource: 'FAO-56 table 12, cool-season turf 0.95 less 0.10 by its footnote for lawns without need for fast growth',
    depletionFraction: 0.4,
    depletionFractionSource: 'FAO-56 table 22, cool-season turf',
  },
  warm: {
    family: 'warm',
    cropCoefficient: 0.75,
    cropCoefficientSource: 'FAO-56 table 12, warm-season turf 0.85 less 0.10 by its footnote for lawns without need for fast growth',
    depletionFraction: 0.5,
    depletionFractionSource: 'FAO-56 table 22, warm-season turf',
  },
} as const;

const ROOTS = 'home lawns keep most roots in the top 0.3 m (UF/IFAS AE144); split by grass is common practice';

/** Defaults for every grass. FAO-56 roots of 0.5-1.0 m are far deeper than those of a home lawn, so shallower ones are taken. */
export const GRASSES: Readonly<Record<GrassId, Grass>> = {
  kentucky_bluegrass: { id: 'kentucky_bluegrass', ...FAMILY.cool, rootDepthM: 0.15, rootDepthSource: ROOTS },
  perennial_ryegrass: { id: 'perennial_ryegrass', ...FAMILY.cool, rootDepthM: 0.15, rootDepthSource: ROOTS },
  tall_fescue: { id: 'tall_fescue', ...FAMILY.cool, rootDepthM: 0.25, rootDepthSource: 'deepest roots of the grasses compared by Qian, Fry, Upham 1997 (Crop Sci 37:905); depth in a home lawn is common practice' },
  fine_fescue: { id: 'fine_fescue', ...FAMILY.cool, rootDepthM: 0.2, rootDepthSource: ROOTS },
  cool_mix: { id: 'cool_mix', ...FAMILY.cool, rootDepthM: 0.2, rootDepthSource: ROOTS },
  bermuda: { id: 'bermuda', ...FAMILY.warm, rootDepthM: 0.3, rootDepthSource: ROOTS },
  zoysia: { id: 'zoysia', ...FAMILY.warm, rootDepthM: 0.25, rootDepthSource: ROOTS },
  st_augustine: { id: 'st_augustine', ...FAMILY.warm, rootDepthM: 0.2, rootDepthSource: ROOTS },
  buffalo: { id: 'buffalo', ...FAMILY.warm, rootDepthM: 0.3, rootDepthSource: ROOTS },
  warm_mix: { id: 'warm_mix', ...FAMILY.warm, rootDepthM: 0.25, rootDepthSource: ROOTS },
};

/** Months of measured turf coefficients from a Southern California trial, January first [–]. Meyer et al. 1985, University of California. */
export const MONTHLY_TURF_COEFFICIENTS: Readonly<Record<GrassFamily, readonly number[]>> = {
  cool: [0.61, 0.64, 0.75, 1.04, 0.95, 0.88, 0.94, 0.86, 0.74, 0.75, 0.69, 0.6],
  warm: [0.61, 0.54, 0.76, 0.72, 0.79, 0.68, 0.71, 0.71, 0.62, 0.54, 0.58, 0.55],
};

/** True for a known grass id. */
export function isGrassId(value: unknown): value is GrassId {
  return typeof value === 'string' && (GRASS_IDS as readonly string[]).includes(value);
}
