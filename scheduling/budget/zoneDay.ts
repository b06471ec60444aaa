import type { EstablishmentStage } from '@/scheduling/establishment/establishmentSchedule';
import { GRASSES } from '@/scheduling/grass';
import { adjustedDepletionFraction, availableWaterMm, readilyAvailableWaterMm, soilWater } from '@/scheduling/soil';
import { PhysicsError, requireNonNegative, requireRange, type CivilDay } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';
import { TREE_ROOT_COEFFICIENT, TREE_ROOT_SOURCE, zoneSetting, type BudgetZone, type ZoneSetting } from './budgetZone';
import { effectiveRain } from './effectiveRain';
import { STAGE_WETTING_INTERVAL_DAYS } from './establishmentDemand';
import { FROSTED_COEFFICIENT, RESTING_COEFFICIENT, SNOW_ET_MM, type GrassCondition } from './grassCondition';
import { soakRain, type SoakedRain } from './rainSoaking';
import { stepRootZoneStore } from './rootZoneStore';
import { stepObservation, type SoilObservation } from './soilObservation';
import { stepThinCover, surfaceStore, type ThinCoverResult } from './thinCover';

/** What is carried from one day to the next. */
export interface ZoneState {
  /** Dr at the end of the day before [mm]. */
  depletionMm: number;
  /** Rooting depth of the day before [m]; null or left out takes that of the day itself. */
  rootDepthM?: number | null;
  /** De of the surface layer [mm]; null or left out takes the same part of its store as the root zone has lost. */
  surfaceDepletionMm?: number | null;
}

/** Weather and water of one zone on one day. */
export interface ZoneDayInput {
  on: CivilDay;
  /** ET0 in the open [mm]. */
  et0Mm: number;
  /** ET0 in the zone's own light [mm]. */
  shadedEt0Mm: number;
  rainMm: number;
  /** Rain by the hour [mm], where known. */
  hourlyRainMm?: readonly number[] | null;
  /** Irrigation that reached the soil [mm]. */
  irrigationMm: number;
  /** Stage of a sowing, where known. */
  stage?: EstablishmentStage | null;
  /** State of the grass; growing when left out, unless the zone rests. */
  condition?: GrassCondition | null;
  /** u2 [m/s] and lowest humidity [%], for the surface layer. */
  windAtTwoMetresMps?: number | null;
  rhMinPct?: number | null;
  /** What somebody found in the ground on the morning of the day. */
  observation?: SoilObservation | null;
  /** What was assumed on the way to the numbers above. */
  assumptions?: readonly Assumption[];
}

/** One closed day of a zone. depletionEndMm = depletionStartMm + rootGrowthMm + observationMm + etcMm − effectiveRainMm − irrigationMm + drainageMm. */
export interface ZoneDay {
  on: CivilDay;
  et0Mm: number;
  shadedEt0Mm: number;
  /** Kc of the ground as a whole, surface evaporation included, trees left out; not above 1 under snow, whose loss is a depth of its own [–] */
  cropCoefficient: number;
  /** Ks [–] */
  stressCoefficient: number;
  /** What the zone would use without stress, trees included [mm]. */
  potentialEtMm: number;
  /** What the zone really used [mm]. */
  etcMm: number;
  /** Part of it that bare ground evaporated, where a surface layer is reckoned with [mm]. */
  evaporationMm: number;
  /** Part of it that tree roots took [mm]. */
  treeUptakeMm: number;
  rainMm: number;
  effectiveRainMm: number;
  rainLossMm: number;
  /** Part of the loss that ran off over the surface [mm]. */
  runoffMm: number;
  irrigationMm: number;
  drainageMm: number;
  /** Change of the depletion because roots reached new soil or lost some [mm]; 0 for an established lawn. */
  rootGrowthMm: number;
  /** Change of the depletion because somebody looked [mm]; 0 on days without. */
  observationMm: number;
  depletionStartMm: number;
  depletionEndMm: number;
  /** De of the surface layer at the end of the day [mm]; null where none is reckoned with. */
  surfaceDepletionMm: number | null;
  /** TAW [mm] */
  totalAvailableMm: number;
  /** Depletion at which the zone is due, RAW [mm]. */
  refillLineMm: number;
  /** p after adjustment [–] */
  depletionFraction: number;
  rootDepthM: number;
  /** Null for an established lawn. */
  stage: EstablishmentStage | null;
  condition: GrassCondition;
  /** What is left when the identity above is summed again; 0 but for rounding of the machine [mm]. */
  closingErrorMm: number;
  assumptions: Assumption[];
}

/** Depletion of the soil that growing roots reach, as a part of its available water: ground is soaked before sowing and kept moist by doses. University of California, seedbed soaked to 6-8 in. */
export const NEW_LAYER_DEPLETION_FRACTION = 0;

/** What is carried from a closed day to the next. */
export function stateAfter(day: ZoneDay): ZoneState {
  return { depletionMm: day.depletionEndMm, rootDepthM: day.rootDepthM, surfaceDepletionMm: day.surfaceDepletionMm };
}

/** Change of depletion when the rooted soil becomes deeper or shallower than the day before [mm]. */
function rootGrowthOf(state: ZoneState, zone: BudgetZone, setting: ZoneSetting): number {
  const beforeM = state.rootDepthM ?? null;
  const beforeMm = beforeM === null ? setting.totalAvailableMm : availableWaterMm(zone.texture, beforeM);
  // Roots that die back leave their share of the depletion behind; new roots take on the depletion of the new layer.
  const growth = setting.totalAvailableMm >= beforeMm
    ? (setting.totalAvailableMm - beforeMm) * NEW_LAYER_DEPLETION_FRACTION
    : -state.depletionMm * (1 - setting.totalAvailableMm / beforeMm);
  return Math.min(growth, setting.totalAvailableMm - state.depletionMm);
}

/** What grass and ground want on a day. */
interface Demand {
  /** Drawn by roots of grass, subject to stress [mm]. */
  transpirationMm: number;
  /** Evaporated by bare ground [mm]. */
  evaporationMm: number;
  cropCoefficient: number;
  surface: ThinCoverResult | null;
}

const CONDITION_ASSUMPTIONS: Readonly<Record<Exclude<GrassCondition, 'growing'>, Assumption>> = {
  resting: { field: 'condition', method: `a lawn at rest uses ${RESTING_COEFFICIENT} of reference ET`, source: 'common practice, the low end for grass killed by frost in FAO-56 table 18' },
  frosted: { field: 'condition', method: `grass browned by frost uses ${FROSTED_COEFFICIENT} of reference ET`, source: 'FAO-56 table 18 and Wright 1993, 0.30-0.40' },
  snow: { field: 'condition', method: `ground under snow loses ${SNOW_ET_MM} mm a day`, source: 'FAO-56 chapter 11' },
};

function demandOf(setting: ZoneSetting, zone: BudgetZone, day: ZoneDayInput, condition: GrassCondition, rain: SoakedRain, surfaceDepletionMm: number): Demand {
  const { shadedEt0Mm } = day;
  if (condition === 'snow') {
    return { transpirationMm: 0, evaporationMm: SNOW_ET_MM, cropCoefficient: shadedEt0Mm > SNOW_ET_MM ? SNOW_ET_MM / shadedEt0Mm : 1, surface: null };
  }
  if (condition !== 'growing') {
    const coefficient = Math.min(setting.grownCoefficient, condition === 'resting' ? RESTING_COEFFICIENT : FROSTED_COEFFICIENT);
    return { transpirationMm: coefficient * shadedEt0Mm, evaporationMm: 0, cropCoefficient: coefficient, surface: null };
  }
  if (setting.thinCover === null) return { transpirationMm: setting.cropCoefficient * shadedEt0Mm, evaporationMm: 0, cropCoefficient: setting.cropCoefficient, surface: null };
  const surface = stepThinCover({
    texture: zone.texture, rootDepthM: setting.rootDepthM, coverFraction: setting.thinCover, grownCoefficient: setting.grownCoefficient, surfaceDepletionMm, et0Mm: shadedEt0Mm,
    effectiveRainMm: rain.effectiveRainMm, irrigationMm: day.irrigationMm, windAtTwoMetresMps: day.windAtTwoMetresMps ?? null, rhMinPct: day.rhMinPct ?? null,
    wettedOften: setting.stage !== null && STAGE_WETTING_INTERVAL_DAYS[setting.stage] <= 2,
  });
  return { transpirationMm: surface.basalCoefficient * shadedEt0Mm, evaporationMm: surface.evaporationMm, cropCoefficient: surface.cropCoefficient, surface };
}

function rainOf(zone: BudgetZone, day: ZoneDayInput, moistness: number): SoakedRain {
  const ground = zone.rainGround ?? null;
  if (ground !== null) return soakRain({ rainMm: day.rainMm, hourlyMm: day.hourlyRainMm ?? null, et0Mm: day.et0Mm }, ground, moistness);
  const plain = effectiveRain(day.rainMm, day.et0Mm);
  return { ...plain, interceptedMm: plain.rainLossMm, runoffMm: 0, assumptions: [] };
}

/** De of the surface layer at the end of the day: less dry where the root zone had less to give than the surface wanted. */
function surfaceAfter(demand: Demand, evaporationMm: number): number | null {
  if (demand.surface === null) return null;
  const { depletionEndMm, exposedWetted } = demand.surface;
  return Math.max(0, depletionEndMm - (demand.evaporationMm - evaporationMm) / exposedWetted);
}

/**
 * One day of a zone's root-zone balance.
 * @param state - what the day before left
 * @param zone - grass, soil, exposure, sowing
 * @param day - weather and water
 * @returns the closed day
 * @throws PhysicsError for impossible input, with the field named
 * Equations: FAO-56 (82)-(88); (58) for Kc × ET0 with ET0 in the zone's own light; (71)-(79) where a surface layer is reckoned with
 */
export function stepZoneDay(state: ZoneState, zone: BudgetZone, day: ZoneDayInput): ZoneDay {
  requireNonNegative('depletionMm', state.depletionMm);
  requireNonNegative('et0Mm', day.et0Mm);
  requireNonNegative('shadedEt0Mm', day.shadedEt0Mm);
  requireNonNegative('rainMm', day.rainMm);
  requireNonNegative('irrigationMm', day.irrigationMm);
  const setting = zoneSetting(zone, day.on, day.stage ?? null, day.shadedEt0Mm);
  const { totalAvailableMm } = setting;
  const condition = day.condition ?? (zone.resting === true ? 'resting' : 'growing');
  const assumptions: Assumption[] = [...(day.assumptions ?? []), ...setting.assumptions];
  if (condition !== 'growing') assumptions.push(CONDITION_ASSUMPTIONS[condition]);

  const rootGrowthMm = rootGrowthOf(state, zone, setting);
  const reckonedMm = Math.min(totalAvailableMm, Math.max(0, state.depletionMm + rootGrowthMm));
  const rain = rainOf(zone, day, 1 - reckonedMm / totalAvailableMm);
  assumptions.push(...rain.assumptions);
  const surfaceMm = state.surfaceDepletionMm ?? (reckonedMm / totalAvailableMm) * surfaceStore(zone.texture, setting.rootDepthM).tewMm;
  const demand = demandOf(setting, zone, day, condition, rain, surfaceMm);
  const trees = zone.treeRoots ?? null;
  const treeShare = trees === null ? 0 : requireRange('treeRoots.share', trees.share, 0, 1);
  const treeCoefficient = requireRange('treeRoots.coefficient', trees?.coefficient ?? TREE_ROOT_COEFFICIENT, 0, 1.5);
  const treesWantMm = condition === 'snow' ? 0 : treeShare * treeCoefficient * day.et0Mm;
  if (treeShare > 0 && (trees?.coefficient ?? null) === null) assumptions.push({ field: 'treeRoots', method: `trees take ${TREE_ROOT_COEFFICIENT} of reference ET where their roots reach`, source: TREE_ROOT_SOURCE });

  const drawnMm = demand.transpirationMm + treesWantMm;
  const potentialEtMm = drawnMm + demand.evaporationMm;
  const given = zone.depletionFraction ?? null;
  const depletionFraction = given !== null
    ? requireRange('depletionFraction', given, 0.05, 0.95)
    : adjustedDepletionFraction(GRASSES[zone.grass].depletionFraction, potentialEtMm, soilWater(zone.texture).soilClass);
  if (given === null) assumptions.push({ field: 'depletionFraction', method: 'depletion fraction of the grass, adjusted for the demand of the day', source: GRASSES[zone.grass].depletionFractionSource });
  const refillLineMm = readilyAvailableWaterMm(totalAvailableMm, depletionFraction);

  const seen = day.observation ? stepObservation(reckonedMm, day.observation, { texture: zone.texture, rootDepthM: setting.rootDepthM, totalAvailableMm, refillLineMm }) : null;
  if (seen) assumptions.push(seen.assumption);
  const observationMm = seen?.observationMm ?? 0;
  const step = stepRootZoneStore({
    depletionStartMm: Math.min(totalAvailableMm, Math.max(0, reckonedMm + observationMm)), potentialEtMm: drawnMm, evaporationMm: demand.evaporationMm,
    effectiveRainMm: rain.effectiveRainMm, irrigationMm: day.irrigationMm, totalAvailableMm, readilyAvailableMm: refillLineMm,
  });
  const expectedEndMm = state.depletionMm + rootGrowthMm + observationMm + step.etcMm - rain.effectiveRainMm - day.irrigationMm + step.drainageMm;
  const closingErrorMm = step.depletionEndMm - expectedEndMm;
  if (!(Math.abs(closingErrorMm) <= 0.01)) throw new PhysicsError('closingErrorMm', closingErrorMm, 'must stay within 0.01 mm');
  return {
    on: day.on, et0Mm: day.et0Mm, shadedEt0Mm: day.shadedEt0Mm, cropCoefficient: demand.cropCoefficient, stressCoefficient: step.stressCoefficient, potentialEtMm,
    etcMm: step.etcMm, evaporationMm: step.evaporationMm, treeUptakeMm: drawnMm > 0 ? ((step.etcMm - step.evaporationMm) * treesWantMm) / drawnMm : 0,
    rainMm: day.rainMm, effectiveRainMm: rain.effectiveRainMm, rainLossMm: rain.rainLossMm, runoffMm: rain.runoffMm, irrigationMm: day.irrigationMm,
    drainageMm: step.drainageMm, rootGrowthMm, observationMm, depletionStartMm: state.depletionMm, depletionEndMm: step.depletionEndMm,
    surfaceDepletionMm: surfaceAfter(demand, step.evaporationMm), totalAvailableMm, refillLineMm, depletionFraction,
    rootDepthM: setting.rootDepthM, stage: setting.stage, condition, closingErrorMm, assumptions,
  };
}
