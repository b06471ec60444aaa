import { GRASSES, type GrassId } from '@/scheduling/grass';
import {
  adjustedDepletionFraction, availableWaterMm, cycleAndSoak, establishedRootDepth, readilyAvailableWaterMm, slopeIntakeFactor, SLOPE_REDUCTION_SOURCE, soilIntake, soilWater, zoneTimeToRunoffHours,
  type CycleAndSoak, type SoilTexture,
} from '@/scheduling/soil';
import { minutesForDepth } from '@/scheduling/sprinkler';
import { requireRange } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';

export interface SoilStoreQuestion {
  texture: SoilTexture;
  grass: GrassId;
  /** Probed [m]; the default of grass and soil when null. */
  rootDepthM: number | null;
  slopePct: number;
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
  /** Longest run before water stands [min]; null when the ground takes it for ever. */
  runLimitMinutes: number | null;
  pattern: CycleAndSoak | null;
  /** True when even dry ground takes less than is applied: no run is short enough. */
  isTooFast: boolean;
  assumptions: Assumption[];
}

const DEMAND_MM = 5;
/** Shorter runs than this are not worth the walk [min]. Common practice. */
const LEAST_RUN_MINUTES = 1;

/**
 * How much a root zone holds, when it is due, how long a set may run before water runs off, and in how many cycles to give it.
 * @throws PhysicsError for impossible numbers, with the field named
 * Equations: FAO-56 (82), (83) and chapter 8 for the fraction; Horton's intake after Hung 1995; cycle and soak after Texas A&M AgriLife.
 */
export function soilStoreAnswer(question: SoilStoreQuestion): SoilStoreFound {
  const { texture, grass, slopePct, rateMmPerHour, runTimeMultiplier } = question;
  const soil = soilWater(texture);
  const roots = establishedRootDepth(grass, texture, question.rootDepthM);
  const demandMm = requireRange('demandMm', question.demandMm ?? DEMAND_MM, 0, 20);
  const totalAvailableMm = availableWaterMm(texture, roots.rootDepthM);
  const depletionFraction = adjustedDepletionFraction(GRASSES[grass].depletionFraction, demandMm, soil.soilClass);
  const refillLineMm = readilyAvailableWaterMm(totalAvailableMm, depletionFraction);
  const depletionMm = requireRange('depletionMm', question.depletionMm ?? refillLineMm, 0, totalAvailableMm);
  const moistness = 1 - depletionMm / totalAvailableMm;
  const fillMinutes = minutesForDepth({ depthMm: depletionMm, rateMmPerHour, runTimeMultiplier });
  const limitHours = zoneTimeToRunoffHours(texture, slopePct, rateMmPerHour, moistness);
  const runLimitMinutes = limitHours === null ? null : limitHours * 60;
  const isTooFast = runLimitMinutes !== null && runLimitMinutes < LEAST_RUN_MINUTES;
  const intake = soilIntake(texture);
  const slope = slopeIntakeFactor(slopePct);
  const steadyIntakeMmPerHour = intake.steadyMmPerHour * slope;
  const assumptions: Assumption[] = [
    { field: 'texture', method: 'field capacity and available water from the middle of their published ranges', source: soil.source },
    { field: 'steadyIntakeMmPerHour', method: 'intake by texture; a real soil differs several times over', source: intake.source },
  ];
  if (roots.isDefault) assumptions.push({ field: 'rootDepthM', method: `roots of ${roots.rootDepthM} m taken for this grass and soil`, source: roots.source });
  if (question.demandMm === null) assumptions.push({ field: 'demandMm', method: `${DEMAND_MM} mm a day taken as demand`, source: 'the demand for which depletion fractions are tabled: FAO-56 table 22' });
  if (question.depletionMm === null) assumptions.push({ field: 'depletionMm', method: 'root zone taken as at its refill line', source: 'the day on which a set is due' });
  if (slope < 1) assumptions.push({ field: 'slopePct', method: 'intake lowered on the slope', source: SLOPE_REDUCTION_SOURCE });
  return {
    fieldCapacity: soil.fieldCapacity, wiltingPoint: soil.wiltingPoint, availableMmPerM: soil.availableMmPerM, rootDepthM: roots.rootDepthM, rootDepthIsDefault: roots.isDefault,
    totalAvailableMm, refillLineMm, depletionFraction, demandMm, depletionMm, daysToRefillLine: demandMm > 0 ? refillLineMm / demandMm : null, fillMinutes,
    steadyIntakeMmPerHour, startIntakeMmPerHour: Math.max(steadyIntakeMmPerHour, intake.initialMmPerHour * slope * (1 - (moistness * 2) / 3)),
    runLimitMinutes, isTooFast, pattern: isTooFast ? null : cycleAndSoak(fillMinutes, runLimitMinutes), assumptions,
  };
}
