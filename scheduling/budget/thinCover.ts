import { soilWater, totalEvaporableWaterMm, type SoilTexture } from '@/scheduling/soil';
import { requireRange } from '@/scheduling/units';
import { LEAST_BASAL_COEFFICIENT, stepSurfaceLayer, upperLimitCoefficient, type SurfaceDayResult } from './dualCoefficient';

/** Kc less Kcb of full turf: 0.95 and 0.90 in tables 12 and 17 of FAO-56 [–]. */
export const BASAL_BELOW_SINGLE = 0.05;
/** Cover from which the single coefficient of full turf serves [–]. Common practice. */
export const FULL_COVER = 0.9;
/** Depth of the layer that dries by evaporation, the shallow end of the published 0.10-0.15 [m]. FAO-56 chapter 7. */
export const EVAPORATION_LAYER_M = 0.1;
/** Height of mown grass [m]. FAO-56 table 12. */
const GRASS_HEIGHT_M = 0.1;
/** Wind and humidity under which the published coefficients hold. FAO-56 chapter 7. */
const STANDARD_WIND_MPS = 2;
const STANDARD_RH_MIN_PCT = 45;

/**
 * Basal coefficient of thin grass.
 * @param fullBasal - Kcb of full cover [–]
 * @param cover - fc, 0-1 [–]
 * @returns Kcb [–]
 * Equation: FAO-56 (98), from memory: Kcmin + (Kcb full − Kcmin) min(1, 2 fc, fc^(1/(1+h)))
 */
export function thinBasalCoefficient(fullBasal: number, cover: number): number {
  requireRange('coverFraction', cover, 0, 1);
  const density = Math.min(1, 2 * cover, cover ** (1 / (1 + GRASS_HEIGHT_M)));
  return LEAST_BASAL_COEFFICIENT + (Math.max(fullBasal, LEAST_BASAL_COEFFICIENT) - LEAST_BASAL_COEFFICIENT) * density;
}

/** Evaporable water of the surface above a rooting depth. */
export interface SurfaceStore {
  tewMm: number;
  rewMm: number;
}

/** Evaporable water of the surface layer, no deeper than the roots whose store it is part of. Source: FAO-56 (73) and table 19 */
export function surfaceStore(texture: SoilTexture, rootDepthM: number): SurfaceStore {
  const water = soilWater(texture);
  const layerM = Math.min(EVAPORATION_LAYER_M, rootDepthM);
  const tewMm = totalEvaporableWaterMm(water.fieldCapacity, water.wiltingPoint, layerM);
  return { tewMm, rewMm: Math.min((water.rewMm * layerM) / EVAPORATION_LAYER_M, tewMm) };
}

/** One day of thin ground. */
export interface ThinCoverDay {
  texture: SoilTexture;
  rootDepthM: number;
  /** fc [–] */
  coverFraction: number;
  /** Kc of the grown lawn [–]. */
  grownCoefficient: number;
  /** De at the start of the day [mm]. */
  surfaceDepletionMm: number;
  /** ET0 in the zone's own light [mm]. */
  et0Mm: number;
  effectiveRainMm: number;
  irrigationMm: number;
  windAtTwoMetresMps: number | null;
  rhMinPct: number | null;
  /** Wetted every day or every second day. */
  wettedOften: boolean;
}

/** What the day did to thin ground. */
export interface ThinCoverResult extends SurfaceDayResult {
  basalCoefficient: number;
  upperLimit: number;
  store: SurfaceStore;
  standardClimate: boolean;
}

/**
 * Demand of thin grass and seedbeds with the dual coefficient: what the leaves draw, and what bare ground between them evaporates from its wet surface.
 * @throws PhysicsError for impossible input, with the field named
 * Equations: FAO-56 (71)-(79), (98)
 */
export function stepThinCover(day: ThinCoverDay): ThinCoverResult {
  const store = surfaceStore(day.texture, day.rootDepthM);
  const basalCoefficient = thinBasalCoefficient(day.grownCoefficient - BASAL_BELOW_SINGLE, day.coverFraction);
  const upperLimit = upperLimitCoefficient({
    basalCoefficient, windAtTwoMetresMps: day.windAtTwoMetresMps ?? STANDARD_WIND_MPS, rhMinPct: day.rhMinPct ?? STANDARD_RH_MIN_PCT, heightM: GRASS_HEIGHT_M, wettedOften: day.wettedOften,
  });
  const surface = stepSurfaceLayer({
    depletionStartMm: Math.min(store.tewMm, day.surfaceDepletionMm), rainMm: day.effectiveRainMm, irrigationMm: day.irrigationMm, wettedFraction: 1,
    coverFraction: day.coverFraction, basalCoefficient, upperLimit, et0Mm: day.et0Mm, ...store,
  });
  return { ...surface, basalCoefficient, upperLimit, store, standardClimate: day.windAtTwoMetresMps === null || day.rhMinPct === null };
}

