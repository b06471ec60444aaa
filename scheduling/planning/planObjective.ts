import type { PlanPriority, PlanZone } from './types';

/**
 * What a plan costs, in litres of water: every wish is priced by the water that a person would give for it.
 *
 *   cost = Σ days, patches  area · zone weight · [ stress · E(1 − Ks)  +  severe · E(part of 1 − Ks beyond severeFrom) ]
 *        + Σ sets           water · litres · (1 − waiting · days ahead)  +  set  (per cycle)  +  night wetness  +  off-preferred minutes
 *        + Σ outings        outing
 *        + Σ patch-days     change, where the set of the plan before is gone or a new one came
 *        + Σ water-ins      depth that is lacking by the deadline
 *        + at the end       water left out of the soil · endWater  +  stress that stands then · endStressDays
 *
 * E(…) weighs the day with its rain and the day without it by the believed chance of rain; the soil itself goes by the expected rain. Doses of seed
 * come before all of this: they are placed first, and no set of grass takes their time.
 *
 * All weights are defaults (common practice and our own judgement; a day of full stress costs a lawn far more than the 4 mm it saves).
 */
export interface PlanWeights {
  /** A day of complete stress (Ks = 0) of one square metre [L]. */
  stressL: number;
  /** The same again for what lies beyond `severeFrom`, where crowns begin to die [L]. */
  severeL: number;
  /** 1 − Ks from which stress is severe. */
  severeFrom: number;
  /** Starting or moving to one set, per cycle [L]. */
  setL: number;
  /** Going out once [L]. */
  outingL: number;
  /** Part of its price that a litre saves for each day it is put off: rain that nobody forecasts may yet replace it [1/d]. */
  waitingPerDay: number;
  /** Leaves of one square metre wet for an hour of the night that dew would not have wetted [L]. */
  nightWetL: number;
  /** A minute of water outside the preferred hours [L]. */
  offPreferredL: number;
  /** A patch-day that is not as in the plan before, by days ahead; the last holds for all later ones [L]. */
  changeL: readonly number[];
  /** One millimetre lacking on one square metre when a product should have been watered in [L]. */
  waterInL: number;
  /** Value of a litre in the soil at the end, in litres drawn: below 1 because rain may still bring it. */
  endWater: number;
  /** Days for which the stress that stands at the end is counted [d]. */
  endStressDays: number;
}

const shared = { waitingPerDay: 0.003, nightWetL: 0.15, offPreferredL: 0.5, changeL: [60, 60, 30, 15], waterInL: 60, endWater: 0.9, endStressDays: 1.5 };

export const planWeights: Record<PlanPriority, PlanWeights> = {
  keep_green: { ...shared, stressL: 60, severeL: 30, severeFrom: 0.5, setL: 40, outingL: 80 },
  spare_water: { ...shared, stressL: 14, severeL: 40, severeFrom: 0.5, setL: 40, outingL: 80, endWater: 0.8 },
  spare_me: { ...shared, stressL: 40, severeL: 40, severeFrom: 0.5, setL: 250, outingL: 600 },
  let_rest: { ...shared, stressL: 2, severeL: 120, severeFrom: 0.85, setL: 80, outingL: 160, endWater: 0.7, endStressDays: 0.5 },
};

/** How much more the stress of the first zone counts than that of the last. Default. */
const PRIORITY_SPREAD = 2.5;

/**
 * Weight of each zone's stress by its priority: from 1 for the last rank evenly up to PRIORITY_SPREAD for the first.
 * @returns weights by zone id
 */
export function zoneWeights(zones: readonly PlanZone[]): Map<string, number> {
  const ranks = [...new Set(zones.map((zone) => zone.priority))].sort((a, b) => a - b);
  return new Map(zones.map((zone) => {
    const rank = ranks.indexOf(zone.priority);
    return [zone.id, ranks.length < 2 ? 1 : PRIORITY_SPREAD ** (1 - rank / (ranks.length - 1))];
  }));
}
