import type { EstablishmentStage } from '@/scheduling/establishment/establishmentSchedule';
import { PhysicsError, requireRange } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';
import type { BudgetZone } from './budgetZone';
import type { GrassCondition } from './grassCondition';
import { morningDepletionMm } from './morningDepletion';
import { conditionOf, type ZoneDemand } from './runBudget';
import type { SoilObservation } from './soilObservation';
import { stateAfter, stepZoneDay, type ZoneDay, type ZoneState } from './zoneDay';

/** Water that one position brought on one day. */
export interface PositionWater {
  positionId: string;
  /** Mean depth that the sprinkler laid down on its patch [mm]. */
  grossMm: number;
  /** Depth credited to its patch: gross ÷ run-time multiplier [mm]. */
  netMm: number;
  /** Part of the zone's area that the patch covers, 0-1 [–]. */
  zoneShare: number;
}

/** A zone's state with that of the patches inside it, which differ by the water they were given. */
export interface PatchedState extends ZoneState {
  /** Depletion by position [mm]; a position left out stands where the zone stands. */
  patchDepletionMm: Readonly<Record<string, number>>;
  /** De of the surface layer by position [mm]; null where none is reckoned with. */
  patchSurfaceMm?: Readonly<Record<string, number | null>>;
}

/** One day to run. */
export interface RunDay {
  demand: ZoneDemand;
  water: readonly PositionWater[];
  stage: EstablishmentStage | null;
  /** State of the grass where somebody told it. */
  condition?: GrassCondition | null;
  /** What somebody found in the ground on the morning of the day; it moves the zone and its patches alike. */
  observation?: SoilObservation | null;
}

/** A closed day of the zone with what lies behind its irrigation and how its patches ended. */
export interface PatchedDay extends ZoneDay {
  /** Mean depth laid down over the zone [mm]. */
  grossIrrigationMm: number;
  /** Gross less credited: surplus of the well-watered spots, which passes below the roots there and is not counted as irrigation [mm]. */
  unevenLossMm: number;
  patchDepletionMm: Record<string, number>;
  patchSurfaceMm: Record<string, number | null>;
  /** Depletion of the patches in the morning, with new roots and what somebody found, before the day's water [mm]. */
  patchMorningMm: Record<string, number>;
}

/**
 * Depth credited to a zone for the sets of a day, with what was laid down.
 * A sprinkler waters unevenly; the run-time multiplier of its catch-cup test says how much more must be laid down for the drier half to get its due.
 * What is credited is therefore applied ÷ multiplier, spread over the zone by the patch's share; the rest never enters the balance, so the balance closes.
 */
export function zoneWaterMm(water: readonly PositionWater[]): { netMm: number; grossMm: number } {
  let netMm = 0;
  let grossMm = 0;
  for (const one of water) {
    requireRange('zoneShare', one.zoneShare, 0, 1);
    if (one.netMm > one.grossMm + 1e-9) throw new PhysicsError('netMm', one.netMm, `must not lie above grossMm ${one.grossMm}`);
    netMm += one.netMm * one.zoneShare;
    grossMm += one.grossMm * one.zoneShare;
  }
  return { netMm, grossMm };
}

/**
 * Runs the budget of a zone and, beside it, of the patches that its positions water.
 * @param positionIds - positions whose patches are followed
 * @throws PhysicsError for impossible input, with the field named
 */
export function runZoneWithPatches(zone: BudgetZone, start: PatchedState, positionIds: readonly string[], days: readonly RunDay[]): PatchedDay[] {
  let state: ZoneState = start;
  let patches: ReadonlyMap<string, ZoneState> = new Map(positionIds.map((id) => [
    id, {
      depletionMm: start.patchDepletionMm[id] ?? start.depletionMm, rootDepthM: start.rootDepthM ?? null, surfaceDepletionMm: start.patchSurfaceMm?.[id] ?? start.surfaceDepletionMm ?? null,
    },
  ]));
  return days.map(({ demand, water, stage, condition, observation }) => {
    const { netMm, grossMm } = zoneWaterMm(water);
    const { on, et0Mm, shadedEt0Mm, rainMm, windAtTwoMetresMps, rhMinPct, assumptions } = demand;
    const felt = {
      on, et0Mm, shadedEt0Mm, rainMm, windAtTwoMetresMps, rhMinPct, stage, observation: observation ?? null, condition: conditionOf(zone, condition ?? null, demand.condition ?? null),
    };
    const closed = stepZoneDay(state, zone, { ...felt, assumptions, irrigationMm: netMm });
    const ofPatches = [...patches].map(([id, patch]): readonly [string, ZoneDay] => {
      const own = water.filter((one) => one.positionId === id).reduce((sum, one) => sum + one.netMm, 0);
      return [id, stepZoneDay(patch, zone, { ...felt, irrigationMm: own })];
    });
    patches = new Map(ofPatches.map(([id, day]) => [id, stateAfter(day)]));
    state = stateAfter(closed);
    return {
      ...closed, grossIrrigationMm: grossMm, unevenLossMm: grossMm - netMm,
      patchDepletionMm: Object.fromEntries(ofPatches.map(([id, day]) => [id, day.depletionEndMm])),
      patchSurfaceMm: Object.fromEntries(ofPatches.map(([id, day]) => [id, day.surfaceDepletionMm])),
      patchMorningMm: Object.fromEntries(ofPatches.map(([id, day]) => [id, morningDepletionMm(day)])),
    };
  });
}

const HALF_WAY: Assumption = { field: 'depletionStartMm', method: 'root zone taken as half-way to the refill line at the start of its record', source: 'common practice' };

/**
 * State of a zone at the start of its record, when nobody knows how wet it is: half of the refill line of the first day.
 * @returns the state and the assumption to show with the first day
 */
export function stateAtStart(zone: BudgetZone, first: ZoneDemand, stage: EstablishmentStage | null): { state: PatchedState; assumption: Assumption } {
  const { on, et0Mm, shadedEt0Mm, rainMm } = first;
  const wet = stepZoneDay({ depletionMm: 0 }, zone, { on, et0Mm, shadedEt0Mm, rainMm, irrigationMm: 0, stage });
  return { state: { depletionMm: wet.refillLineMm / 2, rootDepthM: wet.rootDepthM, patchDepletionMm: {} }, assumption: HALF_WAY };
}
