import type { EstablishmentStage } from '@/scheduling/establishment/establishmentSchedule';
import { GRASSES, type GrassId } from '@/scheduling/grass';
import { adjustedDepletionFraction, availableWaterMm, establishedRootDepth, readilyAvailableWaterMm, seededRootDepthM, soilWater, type SoilTexture } from '@/scheduling/soil';
import { daysBetween, PhysicsError, requireNonNegative, requireRange, type CivilDay } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';
import { effectiveRain } from './effectiveRain';
import { establishmentDemand } from './establishmentDemand';
import { stepRootZoneStore } from './rootZoneStore';

/** What the budget needs to know of a zone. Null takes the marked default. */
export interface BudgetZone {
  grass: GrassId;
  texture: SoilTexture;
  /** Hours of direct sun [h]; null where nothing shades the zone. */
  sunHours: number | null;
  /** Day on which those hours were seen; null lets them hold on every day as they are. */
  sunHoursOn?: CivilDay | null;
  /** Part of the sky seen, 0-1; null takes the default of the sun hours. */
  skyView?: number | null;
  /** Day of sowing; null for an established lawn. */
  sownOn: CivilDay | null;
  /** Probed rooting depth of the grown lawn [m]. */
  rootDepthM?: number | null;
  /** Kc of the grown lawn, where somebody tuned it [–]. */
  cropCoefficient?: number | null;
  /** Management-allowed depletion, where somebody set it [–]; it is then taken as it is, without adjustment for demand. */
  depletionFraction?: number | null;
}

/** What is carried from one day to the next. */
export interface ZoneState {
  /** Dr at the end of the day before [mm]. */
  depletionMm: number;
  /** Rooting depth of the day before [m]; null or left out takes that of the day itself. */
  rootDepthM?: number | null;
}

/** Weather and water of one zone on one day. */
export interface ZoneDayInput {
  on: CivilDay;
  /** ET0 in the open [mm]. */
  et0Mm: number;
  /** ET0 in the zone's own light [mm]. */
  shadedEt0Mm: number;
  rainMm: number;
  /** Irrigation that reached the soil [mm]. */
  irrigationMm: number;
  /** Stage of a sowing, where known. */
  stage?: EstablishmentStage | null;
  /** What was assumed on the way to the numbers above. */
  assumptions?: readonly Assumption[];
}

/** One closed day of a zone. depletionEndMm = depletionStartMm + rootGrowthMm + etcMm − effectiveRainMm − irrigationMm + drainageMm. */
export interface ZoneDay {
  on: CivilDay;
  et0Mm: number;
  shadedEt0Mm: number;
  /** Kc [–] */
  cropCoefficient: number;
  /** Ks [–] */
  stressCoefficient: number;
  /** Kc × shaded ET0 [mm]. */
  potentialEtMm: number;
  /** What the zone really used, Ks × Kc × shaded ET0 [mm]. */
  etcMm: number;
  rainMm: number;
  effectiveRainMm: number;
  rainLossMm: number;
  irrigationMm: number;
  drainageMm: number;
  /** Change of the depletion because roots reached new soil or lost some [mm]; 0 for an established lawn. */
  rootGrowthMm: number;
  depletionStartMm: number;
  depletionEndMm: number;
  /** TAW [mm] */
  totalAvailableMm: number;
  /** Depletion at which the zone is due, RAW [mm]. */
  refillLineMm: number;
  /** p after adjustment [–] */
  depletionFraction: number;
  rootDepthM: number;
  /** Null for an established lawn. */
  stage: EstablishmentStage | null;
  /** What is left when the identity above is summed again; 0 but for rounding of the machine [mm]. */
  closingErrorMm: number;
  assumptions: Assumption[];
}

/** Depletion of the soil that growing roots reach, as a part of its available water: ground is soaked before sowing and kept moist by doses. University of California, seedbed soaked to 6-8 in. */
export const NEW_LAYER_DEPLETION_FRACTION = 0;

/** What is carried from a closed day to the next. */
export function stateAfter(day: ZoneDay): ZoneState {
  return { depletionMm: day.depletionEndMm, rootDepthM: day.rootDepthM };
}

/** Demand, store and refill line of a zone on a day, before its water. */
interface ZoneSetting {
  cropCoefficient: number;
  rootDepthM: number;
  totalAvailableMm: number;
  stage: EstablishmentStage | null;
  assumptions: Assumption[];
}

function zoneSetting(zone: BudgetZone, day: ZoneDayInput): ZoneSetting {
  const probedM = zone.rootDepthM ?? null;
  const full = establishedRootDepth(zone.grass, zone.texture, probedM);
  const tuned = zone.cropCoefficient ?? null;
  if (tuned !== null) requireRange('cropCoefficient', tuned, 0, 2);
  const assumptions: Assumption[] = [];
  if (full.isDefault) assumptions.push({ field: 'rootDepthM', method: `roots of ${full.rootDepthM} m taken for this grass and soil`, source: full.source });
  if (zone.sownOn === null) {
    const grass = GRASSES[zone.grass];
    if (tuned === null) assumptions.push({ field: 'cropCoefficient', method: `coefficient ${grass.cropCoefficient} taken for this grass`, source: grass.cropCoefficientSource });
    return {
      cropCoefficient: tuned ?? grass.cropCoefficient, rootDepthM: full.rootDepthM,
      totalAvailableMm: availableWaterMm(zone.texture, full.rootDepthM), stage: null, assumptions,
    };
  }
  const daysSinceSowing = daysBetween(zone.sownOn, day.on);
  const demand = establishmentDemand({
    grass: zone.grass, texture: zone.texture, daysSinceSowing, stage: day.stage ?? null, et0Mm: day.shadedEt0Mm, grownCoefficient: tuned,
  });
  const rootDepthM = seededRootDepthM(daysSinceSowing, full.rootDepthM);
  if (rootDepthM < full.rootDepthM) assumptions.push({ field: 'rootDepthM', method: 'roots grow from the moist inch to full depth in 90 days', source: 'common practice' });
  assumptions.push(...demand.assumptions);
  return {
    cropCoefficient: demand.cropCoefficient, rootDepthM, totalAvailableMm: availableWaterMm(zone.texture, rootDepthM), stage: demand.stage, assumptions,
  };
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

/**
 * One day of a zone's root-zone balance.
 * @param state - what the day before left
 * @param zone - grass, soil, exposure, sowing
 * @param day - weather and water
 * @returns the closed day
 * @throws PhysicsError for impossible input, with the field named
 * Equations: FAO-56 (82)-(88); (58) for Kc × ET0 with ET0 in the zone's own light
 */
export function stepZoneDay(state: ZoneState, zone: BudgetZone, day: ZoneDayInput): ZoneDay {
  requireNonNegative('depletionMm', state.depletionMm);
  requireNonNegative('et0Mm', day.et0Mm);
  requireNonNegative('shadedEt0Mm', day.shadedEt0Mm);
  requireNonNegative('rainMm', day.rainMm);
  requireNonNegative('irrigationMm', day.irrigationMm);
  const setting = zoneSetting(zone, day);
  const { totalAvailableMm, cropCoefficient } = setting;
  const assumptions: Assumption[] = [...(day.assumptions ?? []), ...setting.assumptions];

  const potentialEtMm = cropCoefficient * day.shadedEt0Mm;
  const given = zone.depletionFraction ?? null;
  const depletionFraction = given !== null
    ? requireRange('depletionFraction', given, 0.05, 0.95)
    : adjustedDepletionFraction(GRASSES[zone.grass].depletionFraction, potentialEtMm, soilWater(zone.texture).soilClass);
  if (given === null) assumptions.push({ field: 'depletionFraction', method: 'depletion fraction of the grass, adjusted for the demand of the day', source: GRASSES[zone.grass].depletionFractionSource });
  const refillLineMm = readilyAvailableWaterMm(totalAvailableMm, depletionFraction);

  const rootGrowthMm = rootGrowthOf(state, zone, setting);
  const { effectiveRainMm, rainLossMm } = effectiveRain(day.rainMm, day.et0Mm);
  const step = stepRootZoneStore({
    depletionStartMm: Math.max(0, state.depletionMm + rootGrowthMm), potentialEtMm, effectiveRainMm, irrigationMm: day.irrigationMm,
    totalAvailableMm, readilyAvailableMm: refillLineMm,
  });
  const expectedEndMm = state.depletionMm + rootGrowthMm + step.etcMm - effectiveRainMm - day.irrigationMm + step.drainageMm;
  const closingErrorMm = step.depletionEndMm - expectedEndMm;
  if (!(Math.abs(closingErrorMm) <= 0.01)) throw new PhysicsError('closingErrorMm', closingErrorMm, 'must stay within 0.01 mm');
  return {
    on: day.on, et0Mm: day.et0Mm, shadedEt0Mm: day.shadedEt0Mm, cropCoefficient, stressCoefficient: step.stressCoefficient, potentialEtMm,
    etcMm: step.etcMm, rainMm: day.rainMm, effectiveRainMm, rainLossMm, irrigationMm: day.irrigationMm, drainageMm: step.drainageMm, rootGrowthMm,
    depletionStartMm: state.depletionMm, depletionEndMm: step.depletionEndMm, totalAvailableMm, refillLineMm, depletionFraction,
    rootDepthM: setting.rootDepthM, stage: setting.stage, closingErrorMm, assumptions,
  };
}
