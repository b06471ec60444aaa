import type { PatchCourse } from './patchCourse';
import type { DayContext } from './planDayContext';
import { planDefaults } from './planDefaults';
import type { PlanWeights } from './planObjective';
import { cycleMinutes } from './planSeedDoses';
import type { PlanSlot } from './planSlots';
import type { PlanInput } from './types';
import { isSeeded, minutesForNetDepth, type Patch } from './yardPatches';

/** The least depth worth a set on a patch [mm]: the default, or half the refill line where the soil holds little. */
export function leastWorthMm(patch: Patch): number {
  return Math.min(planDefaults.leastSetDepthMm, patch.zone.refillLineMm / 2);
}

/** Shortest set worth its walk on a patch [min]: the default and the least depth, but never more than a whole refill takes. */
export function leastMinutesOf(patch: Patch): number {
  const wanted = Math.max(planDefaults.leastSetMinutes, minutesForNetDepth(patch, leastWorthMm(patch)));
  return Math.max(1, Math.min(wanted, minutesForNetDepth(patch, patch.zone.refillLineMm > 0 ? patch.zone.refillLineMm : patch.zone.totalAvailableMm)));
}

/** Longest run of a patch before the soil must soak or the supply must rest [min]. */
export function runMinutesAtMost(input: PlanInput, patch: Patch): number {
  return Math.max(1, Math.floor(Math.min(cycleMinutes(patch), input.supply?.drawMinutesAtMost ?? Infinity)));
}

/** Whether a patch may get its set in a slot. */
function mayUse(input: PlanInput, contexts: readonly DayContext[], patch: Patch, slot: PlanSlot, fixedMm: Float64Array): boolean {
  const context = contexts[slot.index] as DayContext;
  if (!slot.tapIds.includes(patch.tap.id) || (fixedMm[slot.index] as number) > 0) {
    return false;
  }
  if (input.leftOut?.some((left) => left.positionId === patch.position.id && left.on === context.day.on)) {
    return false;
  }
  const ground = context.groundOf(patch.zone.id, isSeeded(patch.zone), patch.position.device);
  return ground.closed === null && ground.openWindows.some((window) => window.fromMinutes <= slot.fromMinutes && slot.toMinutes <= window.toMinutes);
}

/**
 * Puts each patch of grass into the numbers of the search.
 * @param fixedMm - net depth of fixed sets by patch and day [mm]
 */
export function buildCourses(
  input: PlanInput, contexts: readonly DayContext[], patches: readonly Patch[], slots: readonly PlanSlot[], weights: PlanWeights, zoneWeight: ReadonlyMap<string, number>,
  fixedMm: readonly Float64Array[],
): PatchCourse[] {
  const before = new Map<string, Set<string>>();
  for (const set of input.previousPlan ?? []) {
    const days = before.get(set.positionId) ?? new Set<string>();
    before.set(set.positionId, days.add(set.on));
  }
  const indexOf = (on: string): number => contexts.findIndex((context) => context.day.on === on);
  return patches.map((patch, number): PatchCourse => {
    const { zone, position } = patch;
    const fixed = fixedMm[number] as Float64Array;
    const areaM2 = zone.areaM2 * patch.share;
    const mmPerMinute = patch.rateMmPerHour / 60 / position.runTimeMultiplier;
    const own = slots.filter((slot) => mayUse(input, contexts, patch, slot, fixed));
    const priced = areaM2 * (zoneWeight.get(zone.id) ?? 1);
    const litrePerMm = patch.tap.flowLpm / mmPerMinute;
    const last = contexts[contexts.length - 1]?.day.on ?? '';
    return {
      dayCount: contexts.length, startMm: patch.depletionMm, totalAvailableMm: zone.totalAvailableMm, refillLineMm: zone.refillLineMm, areaM2,
      mmPerMinute, grossMmPerMinute: patch.rateMmPerHour / 60, leastMinutes: leastMinutesOf(patch), cycleMinutes: runMinutesAtMost(input, patch),
      demandMm: Float64Array.from(zone.demandMmByDay), rainMm: Float64Array.from(contexts, (context) => context.expectedRainMm),
      fullRainMm: Float64Array.from(contexts, (context) => context.fullRainMm), rainChance: Float64Array.from(contexts, (context) => context.rainChance),
      fixedMm: fixed,
      stressL: weights.stressL * priced, severeL: weights.severeL * priced, severeFrom: weights.severeFrom,
      endMmL: weights.endWater * litrePerMm, endStressDays: weights.endStressDays,
      before: input.previousPlan === undefined ? null : Int8Array.from(contexts, (context) => (before.get(position.id)?.has(context.day.on) ? 1 : 0)),
      changeL: Float64Array.from(contexts, (_, index) => weights.changeL[Math.min(index, weights.changeL.length - 1)] ?? 0),
      waterIns: (input.waterIns ?? []).filter((wanted) => wanted.zoneId === zone.id && wanted.fromOn <= last && wanted.byOn >= input.startOn).map((wanted) => ({
        fromIndex: Math.max(0, indexOf(wanted.fromOn)), toIndex: indexOf(wanted.byOn) < 0 ? contexts.length - 1 : indexOf(wanted.byOn),
        depthMm: wanted.depthMm, missingL: weights.waterInL * areaM2,
      })),
      weekAtMostMm: position.weeklyLimit?.depthMm ?? Infinity,
      weekBeforeMm: Float64Array.from({ length: 6 }, (_, at) => position.weeklyLimit?.appliedMm[at] ?? 0),
      opportunityCount: own.length,
      opportunityDay: Int32Array.from(own, (slot) => slot.index), opportunitySlot: Int32Array.from(own, (slot) => slot.number), opportunityOuting: Int32Array.from(own, (slot) => slot.outing),
      minuteL: Float64Array.from(own, (slot) => patch.tap.flowLpm * (1 - weights.waitingPerDay * slot.index) + weights.offPreferredL * slot.offPreferredShare),
      setL: Float64Array.from(own, (slot) => weights.setL + weights.nightWetL * slot.wetHours * areaM2),
    };
  });
}
