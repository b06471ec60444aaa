import { soilWater, type SoilTexture } from '@/scheduling/soil';
import { requireNonNegative, requireRange } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';

/** How a screwdriver of a hand's length goes into the ground. */
export const SCREWDRIVER_FEELS = ['easy', 'firm', 'hard'] as const;
export type ScrewdriverFeel = (typeof SCREWDRIVER_FEELS)[number];

/** What somebody found in the ground. `weight` overrules the default of its kind. */
export type SoilObservation =
  /** A moisture probe: water content of the root zone [m³/m³]. */
  | { kind: 'probe'; waterContent: number; weight?: number }
  | { kind: 'screwdriver'; feel: ScrewdriverFeel; weight?: number }
  /** A depletion known by other means, such as a soil sample weighed wet and dry [mm]. */
  | { kind: 'depletion'; depletionMm: number; weight?: number };

/**
 * How much of the difference between what was found and what was reckoned is believed [–]. A probe reads one spot, a screwdriver a feeling; the
 * reckoning has its own error. Defaults, common practice.
 */
export const OBSERVATION_WEIGHT: Readonly<Record<SoilObservation['kind'], number>> = { probe: 0.7, screwdriver: 0.4, depletion: 0.7 };
export const OBSERVATION_SOURCE = 'default weights: probe 0.7, screwdriver 0.4 (common practice)';

/** Root zone at the time of an observation. */
export interface ObservedZone {
  texture: SoilTexture;
  rootDepthM: number;
  totalAvailableMm: number;
  refillLineMm: number;
}

/**
 * Depletion that an observation tells.
 * A screwdriver goes in easily in soil that has given a quarter of what it may, firmly at the refill line, hardly half-way from there to the wilting
 * point; a default after the trade's screwdriver test.
 * @returns 0 to TAW [mm]
 * @throws PhysicsError for impossible readings, with the field named
 */
export function observedDepletionMm(observation: SoilObservation, zone: ObservedZone): number {
  if (observation.kind === 'probe') {
    requireRange('observation.waterContent', observation.waterContent, 0, 0.7);
    const gone = 1000 * (soilWater(zone.texture).fieldCapacity - observation.waterContent) * zone.rootDepthM;
    return Math.min(zone.totalAvailableMm, Math.max(0, gone));
  }
  if (observation.kind === 'depletion') return Math.min(zone.totalAvailableMm, requireNonNegative('observation.depletionMm', observation.depletionMm));
  if (observation.feel === 'easy') return zone.refillLineMm / 4;
  return observation.feel === 'firm' ? zone.refillLineMm : (zone.refillLineMm + zone.totalAvailableMm) / 2;
}

/** A correction of the reckoning. */
export interface ObservationStep {
  /** Change of the depletion, negative where the soil was found wetter [mm]. */
  observationMm: number;
  observedMm: number;
  weight: number;
  assumption: Assumption;
}

/**
 * Moves the reckoned depletion toward what was found by the weight of the observation, as a term of its own, so that the day still closes.
 * @param reckonedMm - depletion before the observation [mm]
 * @throws PhysicsError for impossible readings or weights, with the field named
 */
export function stepObservation(reckonedMm: number, observation: SoilObservation, zone: ObservedZone): ObservationStep {
  const weight = requireRange('observation.weight', observation.weight ?? OBSERVATION_WEIGHT[observation.kind], 0, 1);
  const observedMm = observedDepletionMm(observation, zone);
  return {
    observationMm: weight * (observedMm - reckonedMm), observedMm, weight,
    assumption: {
      field: 'observation', method: `what was found in the ground counts for ${Math.round(weight * 100)} %, the reckoning for the rest`,
      source: observation.weight === undefined ? OBSERVATION_SOURCE : 'entered',
    },
  };
}
