import { beyondReachM } from './dayHabits';
import type { PlanInput, PlanPosition, PlanTap, PlanZone } from './types';

/** The ground that one position serves, with its state during planning. */
export interface Patch {
  position: PlanPosition;
  zone: PlanZone;
  tap: PlanTap;
  /** Mean application rate [mm/h]. */
  rateMmPerHour: number;
  /** Part of the zone's area, scaled so that a zone's patches never add up to more than 1. */
  share: number;
  /** Depletion at the start of the day being planned [mm]. */
  depletionMm: number;
}

export interface YardState {
  /** Positions that can be used (tap and rate known), by zone, in position order. */
  patchesByZone: Map<string, Patch[]>;
  /** Depletion of the ground in a zone that no usable position serves, at the start of the day being planned [mm]. */
  unservedDepletionMm: Map<string, number>;
  /** Zones in the order in which they are served: priority, then id. */
  zones: PlanZone[];
}

/** Whether the zone's water follows a running sowing. */
export function isSeeded(zone: PlanZone): boolean {
  return zone.seed !== null && zone.seed.stage !== 'established';
}

export function byText(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

/** Gathers zones and usable positions from a checked input, with what was already applied on the first day taken off. */
export function yardState(input: PlanInput): YardState {
  const taps = new Map(input.taps.map((tap) => [tap.id, tap]));
  const patchesByZone = new Map<string, Patch[]>();
  const unservedDepletionMm = new Map<string, number>();
  const zones = [...input.zones].sort((a, b) => a.priority - b.priority || byText(a.id, b.id));
  for (const zone of zones) {
    const own = input.positions.filter((position) => position.zoneId === zone.id);
    const shareSum = own.reduce((sum, position) => sum + position.zoneShare, 0);
    const patches: Patch[] = [];
    for (const position of own.sort((a, b) => a.sortOrder - b.sortOrder || byText(a.id, b.id))) {
      const tap = position.tapId === null ? undefined : taps.get(position.tapId);
      if (!tap || position.rateMmPerHour === null || beyondReachM(position.place, tap.place, position.hoseLengthM) > 0) {
        continue;
      }
      const applied = input.alreadyApplied.filter((entry) => entry.positionId === position.id).reduce((sum, entry) => sum + entry.depthMm, 0);
      patches.push({
        position, zone, tap,
        rateMmPerHour: position.rateMmPerHour,
        share: shareSum > 1 ? position.zoneShare / shareSum : position.zoneShare,
        depletionMm: Math.max(0, Math.min(zone.totalAvailableMm, position.depletionMm ?? zone.depletionMm) - applied),
      });
    }
    patchesByZone.set(zone.id, patches);
    unservedDepletionMm.set(zone.id, zone.depletionMm);
  }
  return { patchesByZone, unservedDepletionMm, zones };
}

/** Depth that reaches the roots of a patch in so many minutes [mm]. */
export function netDepthMm(patch: Patch, minutes: number): number {
  return (minutes * patch.rateMmPerHour) / 60 / patch.position.runTimeMultiplier;
}

/** Whole minutes, to the nearest and at least one, that bring a net depth to a patch. */
export function minutesForNetDepth(patch: Patch, depthMm: number): number {
  return Math.max(1, Math.round((depthMm * patch.position.runTimeMultiplier * 60) / patch.rateMmPerHour));
}
