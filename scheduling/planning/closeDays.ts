import type { DayTimeline } from './dayTimeline';
import { standing } from './dueReasons';
import { explainRuns, whyNoSet, type PlanFacts } from './explainSets';
import type { LaidRun } from './layOutDay';
import { endOfDayDepletionMm } from './patchBalance';
import type { DayContext } from './planDayContext';
import type { PlanJob, SeedDay } from './planSeedDoses';
import type { PlanSlot } from './planSlots';
import { reason } from './reasonNumbers';
import { roundsOfDay } from './roundsOfDay';
import type { MissedDose, PlanInput, PlannedDay, PlanShortage, PlanZone, Reason } from './types';
import type { WaterLedger } from './waterLedger';
import { outOfReach } from './whatIsMissing';
import { isSeeded, minutesForNetDepth, netDepthMm, type Patch, type YardState } from './yardPatches';

/** A shortage smaller than this is noise of rounding [mm]. */
const LEAST_SHORTAGE_MM = 0.5;

/** A plan laid out, before it is explained. */
export interface OpenPlan {
  input: PlanInput;
  contexts: readonly DayContext[];
  /** At the start of the first day; changed day by day. */
  state: YardState;
  timelines: readonly DayTimeline<PlanJob>[];
  laidByDay: readonly LaidRun[][];
  seedDays: readonly Map<string, SeedDay>[];
  slots: readonly PlanSlot[];
  ledger: WaterLedger;
}

/** Depletion of the driest patch of a zone, or of the whole zone when no position serves it [mm]. */
function driestMm(state: YardState, zone: PlanZone): number {
  const patches = state.patchesByZone.get(zone.id) ?? [];
  return patches.length > 0 ? Math.max(...patches.map((patch) => patch.depletionMm)) : state.unservedDepletionMm.get(zone.id) ?? zone.depletionMm;
}

/** Why a zone has no position that can be used. */
function whyUnusable(input: PlanInput, zone: PlanZone): Reason {
  const own = input.positions.filter((position) => position.zoneId === zone.id);
  const first = own[0];
  if (!first) {
    return reason('zone_without_position', { zone: zone.name, zoneId: zone.id });
  }
  const rateless = own.find((position) => position.tapId !== null && position.rateMmPerHour === null);
  const far = own.find((position) => position.tapId !== null && position.rateMmPerHour !== null);
  if (rateless) {
    return reason('position_without_rate', { position: rateless.name, positionId: rateless.id });
  }
  return far ? outOfReach(input, far) : reason('position_without_tap', { position: first.name, positionId: first.id });
}

function whyWithout(facts: PlanFacts, context: DayContext, state: YardState, zone: PlanZone): Reason[] {
  const { input } = facts;
  const patches = state.patchesByZone.get(zone.id) ?? [];
  const depletionMm = driestMm(state, zone);
  const stands = standing(depletionMm, zone.refillLineMm, context.day.on);
  if (zone.resting) {
    return [reason('resting', { depletionMm, refillLineMm: zone.refillLineMm })];
  }
  if (patches.length === 0) {
    return [whyUnusable(input, zone), stands];
  }
  const isWateredAlready = context.index === 0 && input.alreadyApplied.some((applied) => patches.some((patch) => patch.position.id === applied.positionId));
  const grounds = patches.map((patch) => context.groundOf(zone.id, false, patch.position.device));
  const closed = grounds.every((ground) => ground.closed !== null) ? grounds[0]?.closed : null;
  if (closed) {
    return isWateredAlready ? [reason('already_watered'), stands] : [closed, stands];
  }
  if (input.leftOut?.some((left) => left.on === context.day.on && patches.some((patch) => patch.position.id === left.positionId))) {
    return [reason('left_out'), stands];
  }
  // The patch that stands worst speaks for its zone.
  const worst = patches.filter((_, at) => grounds[at]?.closed === null).reduce((a, b) => (b.depletionMm > a.depletionMm ? b : a));
  const reasons = whyNoSet(facts, context, worst);
  return isWateredAlready ? [reason('already_watered'), ...reasons] : reasons;
}

/**
 * How far a zone stays below its refill line on a day with the day's water and expected rain in, in depth, minutes of hose and litres: what stress is judged
 * by. Called before the day's end.
 */
function shortageOf(context: DayContext, zone: PlanZone, patches: readonly Patch[], depthByPosition: ReadonlyMap<string, number>, reasons: readonly Reason[]): PlanShortage | null {
  let shortMm = 0;
  let shortMinutes = 0;
  let litres = 0;
  for (const patch of patches) {
    const excessMm = patch.depletionMm - (depthByPosition.get(patch.position.id) ?? 0) - context.expectedRainMm - zone.refillLineMm;
    if (excessMm > 0) {
      const minutes = minutesForNetDepth(patch, excessMm);
      shortMm += excessMm * patch.share;
      shortMinutes += minutes;
      litres += minutes * patch.tap.flowLpm;
    }
  }
  return shortMm <= LEAST_SHORTAGE_MM ? null : { zoneId: zone.id, on: context.day.on, shortMm, shortMinutes, litres, reasons: [...reasons] };
}

function doseShortage(context: DayContext, zone: PlanZone, patches: readonly Patch[], missed: readonly MissedDose[]): PlanShortage | null {
  if (missed.length === 0) {
    return null;
  }
  const minutes = missed.flatMap((dose) => patches.map((patch) => ({ minutes: minutesForNetDepth(patch, dose.depthMm), flowLpm: patch.tap.flowLpm })));
  return {
    zoneId: zone.id, on: context.day.on, shortMm: missed.reduce((sum, dose) => sum + dose.depthMm, 0),
    shortMinutes: minutes.reduce((sum, each) => sum + each.minutes, 0), litres: minutes.reduce((sum, each) => sum + each.minutes * each.flowLpm, 0),
    reasons: missed.flatMap((dose) => dose.reasons),
  };
}

/** Moves every patch, and the ground no position serves, to the end of the day; returns each zone's mean depletion [mm]. */
function endTheDay(state: YardState, context: DayContext, depthByPosition: ReadonlyMap<string, number>): Record<string, number> {
  const endDepletionMm: Record<string, number> = {};
  for (const zone of state.zones) {
    const shared = { rainMm: context.expectedRainMm, demandMm: zone.demandMmByDay[context.index] ?? 0, totalAvailableMm: zone.totalAvailableMm, refillLineMm: zone.refillLineMm };
    let mean = 0;
    let served = 0;
    for (const patch of state.patchesByZone.get(zone.id) ?? []) {
      patch.depletionMm = endOfDayDepletionMm({ ...shared, depletionMm: patch.depletionMm, irrigationMm: depthByPosition.get(patch.position.id) ?? 0 });
      mean += patch.share * patch.depletionMm;
      served += patch.share;
    }
    const dry = endOfDayDepletionMm({ ...shared, depletionMm: state.unservedDepletionMm.get(zone.id) ?? 0, irrigationMm: 0 });
    state.unservedDepletionMm.set(zone.id, dry);
    endDepletionMm[zone.id] = Math.min(zone.totalAvailableMm, mean + Math.max(0, 1 - served) * dry);
  }
  return endDepletionMm;
}

/** Water-ins whose deadline is this day and that did not get their depth. */
function missedWaterIns(plan: OpenPlan, context: DayContext, depths: readonly ReadonlyMap<string, number>[]): PlanShortage[] {
  const { input, state, contexts } = plan;
  return (input.waterIns ?? []).filter((each) => each.byOn === context.day.on).flatMap((wanted): PlanShortage[] => {
    const zone = state.zones.find((each) => each.id === wanted.zoneId);
    const patches = state.patchesByZone.get(wanted.zoneId) ?? [];
    let shortMm = 0;
    let shortMinutes = 0;
    let litres = 0;
    for (const patch of patches) {
      const given = contexts.reduce((sum, each) => (each.day.on >= wanted.fromOn && each.index <= context.index ? sum + (depths[each.index]?.get(patch.position.id) ?? 0) : sum), 0);
      const lacking = wanted.depthMm - given;
      if (lacking > LEAST_SHORTAGE_MM) {
        const minutes = minutesForNetDepth(patch, lacking);
        shortMm = Math.max(shortMm, lacking);
        shortMinutes += minutes;
        litres += minutes * patch.tap.flowLpm;
      }
    }
    return zone && shortMm > 0
      ? [{ zoneId: zone.id, on: context.day.on, shortMm, shortMinutes, litres, reasons: [reason('water_in_missed', { name: wanted.name, byOn: wanted.byOn, shortMm, depthMm: wanted.depthMm })] }]
      : [];
  });
}

/** Fills in, for each zone that gets nothing on a day, the next day on which it does. */
function fillNextDays(days: readonly PlannedDay[]): void {
  days.forEach((day, index) => {
    for (const { zoneId, reasons } of day.zonesWithout) {
      const next = days.slice(index + 1).find((later) => later.rounds.some((round) => round.sets.some((set) => set.zoneId === zoneId)));
      for (const each of reasons) {
        if (each.code === 'above_line') {
          each.values.nextOn = next?.on ?? '';
        }
      }
    }
  });
}

/** Explains a plan that is laid out, follows the water through its days and names what is short. */
export function closeDays(plan: OpenPlan): { days: PlannedDay[]; shortages: PlanShortage[] } {
  const { input, contexts, state, timelines, laidByDay, seedDays, slots, ledger } = plan;
  const usedMinutes = slots.map(() => 0);
  for (const { chosen: { slot }, placed } of laidByDay.flat()) {
    usedMinutes[slot.number] = (usedMinutes[slot.number] ?? 0) + (placed ? placed.job.minutes + slot.moveMinutes : 0);
  }
  const facts: PlanFacts = { input, contexts, use: { slots, usedMinutes }, ledger };
  const shortages: PlanShortage[] = [];
  const depths: Map<string, number>[] = [];
  const days = contexts.map((context, index): PlannedDay => {
    const laid = laidByDay[index] ?? [];
    const timeline = timelines[index] as DayTimeline<PlanJob>;
    const placed = timeline.all();
    const depthByPosition = new Map<string, number>();
    for (const { job } of placed) {
      depthByPosition.set(job.positionId, (depthByPosition.get(job.positionId) ?? 0) + netDepthMm(job.patch, job.minutes));
    }
    depths.push(depthByPosition);
    for (const patch of new Set(laid.map((run) => run.chosen.patch))) {
      const own = laid.filter((run) => run.chosen.patch === patch);
      const others = laid.some((run) => run.chosen.patch !== patch && own.some((mine) => mine.chosen.slot.outing === run.chosen.slot.outing));
      explainRuns(facts, context, patch, own, others);
    }
    const missedDoses = state.zones.flatMap((zone) => seedDays[index]?.get(zone.id)?.missed ?? []);
    const zonesWithout = state.zones.filter((zone) => !placed.some(({ job }) => job.patch.zone.id === zone.id)).map((zone) => {
      const reasons = isSeeded(zone) ? seedDays[index]?.get(zone.id)?.without ?? [] : whyWithout(facts, context, state, zone);
      return { zoneId: zone.id, reasons: reasons.length > 0 ? reasons : [reason('already_watered')] };
    });
    for (const zone of state.zones) {
      const patches = state.patchesByZone.get(zone.id) ?? [];
      const without = zonesWithout.find((entry) => entry.zoneId === zone.id)?.reasons;
      const cut = placed.filter(({ job }) => job.patch.zone.id === zone.id).flatMap(({ job }) => job.reasons.filter((each) => each.code === 'cut_by_time'));
      const shortage = isSeeded(zone) ? doseShortage(context, zone, patches, seedDays[index]?.get(zone.id)?.missed ?? [])
        : zone.resting ? null
        : shortageOf(context, zone, patches, depthByPosition, without ?? (cut.length > 0 ? cut : [standing(driestMm(state, zone), zone.refillLineMm, context.day.on)]));
      if (shortage) {
        shortages.push(shortage);
      }
    }
    const endDepletionMm = endTheDay(state, context, depthByPosition);
    shortages.push(...missedWaterIns(plan, context, depths));
    return { on: context.day.on, rounds: roundsOfDay(timeline.habits, context.day.on, placed), zonesWithout, missedDoses, endDepletionMm };
  });
  fillNextDays(days);
  return { days, shortages };
}
