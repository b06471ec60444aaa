import { GRASSES, type GrassId } from '@/scheduling/grass';
import {
  adjustedDepletionFraction, availableWaterMm, COMPACTION_SOURCE, establishedRootDepth, readilyAvailableWaterMm, runLimit, slopeIntakeFactor, SLOPE_REDUCTION_SOURCE, soakPattern, soilIntake, soilWater,
  type SoakPattern, type SoilCompaction, type SoilTexture,
} from '@/scheduling/soil';
import { minutesForDepth } from '@/scheduling/sprinkler/depthAndTime';
import { requireRange } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';

export interface SoilStoreQuestion {
  texture: SoilTexture;
  grass: GrassId;
  /** Probed [m]; the default of grass and soil when null. */
  rootDepthM: number | null;
  slopePct: number;
  /** How hard the ground is underfoot. */
  compaction: SoilCompaction;
  /** What the grass uses in a day [mm]; 5 when null. */
  demandMm: number | null;
  /** Application rate of the sprinkler [mm/h]. */
  rateMmPerHour: number;
  runTimeMultiplier: number;
  /** Water gone from the root zone [mm]; at the refill line when null. */
  depletionMm: number | null;
}

export interface SoilStoreFound {
  fieldCapacity: number;
  wiltingPoint: number;
  availableMmPerM: number;
  rootDepthM: number;
  rootDepthIsDefault: boolean;
  /** Full store, and the depletion at which the zone is due [mm]. */
  totalAvailableMm: number;
  refillLineMm: number;
  depletionFraction: number;
  demandMm: number;
  depletionMm: number;
  /** Days from full to the refill line at this demand [d]; null without demand. */
  daysToRefillLine: number | null;
  /** Set that fills the store, with the run-time multiplier [min]. */
  fillMinutes: number;
  /** Intake of the slope when soaked, and when as moist as it is now at the start [mm/h]. */
  steadyIntakeMmPerHour: number;
  startIntakeMmPerHour: number;
  /** Longest run before water runs off, and until it begins to stand [min]; null when the ground takes it for ever. */
  runLimitMinutes: number | null;
  pondingMinutes: number | null;
  /** Water that may stand in the unevenness of the surface [mm]. */
  surfaceStorageMm: number;
  pattern: SoakPattern;
  assumptions: Assumption[];
}

const DEMAND_MM = 5;
/** Less than this is no demand: a store would last for ever [mm/d]. */
const LEAST_DEMAND_MM = 0.01;

/**
 * How much a root zone holds, when it is due, how long a set may run before water runs off, and in how many cycles to give it.
 * @throws PhysicsError for impossible numbers, with the field named
 * Equations: FAO-56 (82), (83) and chapter 8 for the fraction; Horton's intake as in `runLimit`; cycle and soak after Texas A&M AgriLife.
 */
export function soilStoreAnswer(question: SoilStoreQuestion): SoilStoreFound {
  const { texture, grass, slopePct, compaction, rateMmPerHour, runTimeMultiplier } = question;
  const soil = soilWater(texture);
  const roots = establishedRootDepth(grass, texture, question.rootDepthM);
  const demandMm = requireRange('demandMm', question.demandMm ?? DEMAND_MM, 0, 20);
  const totalAvailableMm = availableWaterMm(texture, roots.rootDepthM);
  const depletionFraction = adjustedDepletionFraction(GRASSES[grass].depletionFraction, demandMm, soil.soilClass);
  const refillLineMm = readilyAvailableWaterMm(totalAvailableMm, depletionFraction);
  const depletionMm = requireRange('depletionMm', question.depletionMm ?? refillLineMm, 0, totalAvailableMm);
  const moistness = 1 - depletionMm / totalAvailableMm;
  const fillMinutes = minutesForDepth({ depthMm: depletionMm, rateMmPerHour, runTimeMultiplier });
  const limit = runLimit({ texture, slopePct, compaction, moistness }, rateMmPerHour);
  const assumptions: Assumption[] = [
    { field: 'texture', method: 'field capacity and available water from the middle of their published ranges', source: soil.source },
    { field: 'steadyIntakeMmPerHour', method: 'intake by texture; a real soil differs several times over', source: soilIntake(texture).source },
  ];
  if (roots.isDefault) assumptions.push({ field: 'rootDepthM', method: `roots of ${roots.rootDepthM} m taken for this grass and soil`, source: roots.source });
  if (question.demandMm === null) assumptions.push({ field: 'demandMm', method: `${DEMAND_MM} mm a day taken as demand`, source: 'the demand for which depletion fractions are tabled: FAO-56 table 22' });
  if (question.depletionMm === null) assumptions.push({ field: 'depletionMm', method: 'root zone taken as at its refill line', source: 'the day on which a set is due' });
  if (compaction !== 'loose') assumptions.push({ field: 'compaction', method: 'intake lowered on trodden ground', source: COMPACTION_SOURCE });
  assumptions.push({ field: 'surfaceStorageMm', method: 'a few millimetres may stand in the unevenness of the lawn', source: 'the careful half of common allowances, from memory' });
  if (slopeIntakeFactor(slopePct) < 1) assumptions.push({ field: 'slopePct', method: 'intake lowered on the slope', source: SLOPE_REDUCTION_SOURCE });
  return {
    fieldCapacity: soil.fieldCapacity, wiltingPoint: soil.wiltingPoint, availableMmPerM: soil.availableMmPerM, rootDepthM: roots.rootDepthM, rootDepthIsDefault: roots.isDefault,
    totalAvailableMm, refillLineMm, depletionFraction, demandMm, depletionMm, daysToRefillLine: demandMm > LEAST_DEMAND_MM ? refillLineMm / demandMm : null, fillMinutes,
    steadyIntakeMmPerHour: limit.curve.steadyMmPerHour, startIntakeMmPerHour: limit.curve.initialMmPerHour, runLimitMinutes: limit.minutes, pondingMinutes: limit.pondingMinutes,
    surfaceStorageMm: limit.storageMm, pattern: soakPattern(fillMinutes, limit, rateMmPerHour), assumptions,
  };
}
