import { checkPlanInput } from './checkPlanInput';
import { DayTimeline } from './dayTimeline';
import { dayHabits } from './dayHabits';
import { standing } from './dueReasons';
import { endOfDayDepletionMm } from './patchBalance';
import { dayContexts, type DayContext } from './planDayContext';
import { planEstablishedSets } from './planEstablishedSets';
import { planSeedDoses, type PlanJob } from './planSeedDoses';
import { reason } from './reasonNumbers';
import { roundsOfDay } from './roundsOfDay';
import type { MissedDose, PlanInput, PlannedDay, Planner, PlanResult, PlanShortage, PlanZone, Reason } from './types';
import { WaterLedger } from './waterLedger';
import { whatIsMissing } from './whatIsMissing';
import { isSeeded, minutesForNetDepth, netDepthMm, yardState, type Patch, type YardState } from './yardPatches';

/** A shortage smaller than this is noise of rounding [mm]. */
const LEAST_SHORTAGE_MM = 0.5;

/** Depletion of the driest patch of a zone, or of the whole zone when no position serves it [mm]. */
function driestMm(state: YardState, zone: PlanZone): number {
  const patches = state.patchesByZone.get(zone.id) ?? [];
  return patches.length > 0 ? Math.max(...patches.map((patch) => patch.depletionMm)) : state.unservedDepletionMm.get(zone.id) ?? zone.depletionMm;
}

/** Whether somebody skipped the patch's position on this day. */
function isLeftOut(input: PlanInput, context: DayContext, patch: Patch): boolean {
  return input.leftOut?.some((left) => left.positionId === patch.position.id && left.on === context.day.on) ?? false;
}

/** Why an established zone has no set on a day. */
function whyWithout(input: PlanInput, context: DayContext, yard: YardState, zone: PlanZone, turnedDown: ReadonlyMap<string, Reason[]>): Reason[] {
  const patches = yard.patchesByZone.get(zone.id) ?? [];
  const depletionMm = driestMm(yard, zone);
  const state = standing(depletionMm, zone.refillLineMm, context.day.on);
  if (zone.resting) {
    return [reason('resting', { depletionMm, refillLineMm: zone.refillLineMm })];
  }
  if (patches.length === 0) {
    const own = input.positions.filter((position) => position.zoneId === zone.id);
    const lacking = own.length === 0 ? reason('zone_without_position', { zone: zone.name, zoneId: zone.id })
      : own.every((position) => position.tapId === null) ? reason('position_without_tap', { position: own[0]?.name ?? '', positionId: own[0]?.id ?? '' })
      : reason('position_without_rate', { position: own.find((position) => position.rateMmPerHour === null)?.name ?? '', positionId: own[0]?.id ?? '' });
    return [lacking, state];
  }
  const isWateredAlready = context.index === 0 && input.alreadyApplied.some((applied) => patches.some((patch) => patch.position.id === applied.positionId));
  if (context.established.closed) {
    return isWateredAlready ? [reason('already_watered'), state] : [context.established.closed, state];
  }
  if (patches.some((patch) => isLeftOut(input, context, patch))) {
    return [reason('left_out'), state];
  }
  for (const patch of patches) {
    const refusal = turnedDown.get(patch.position.id);
    if (refusal) {
      return [...refusal, standing(patch.depletionMm, zone.refillLineMm, context.day.on)];
    }
  }
  return isWateredAlready ? [reason('already_watered'), state] : [state];
}

/** How far a zone ends the day below its refill line, in depth, minutes of hose and litres. */
function shortageOf(context: DayContext, zone: PlanZone, patches: readonly Patch[], reasons: readonly Reason[]): PlanShortage | null {
  let shortMm = 0;
  let shortMinutes = 0;
  let litres = 0;
  for (const patch of patches) {
    const excessMm = patch.depletionMm - zone.refillLineMm;
    if (excessMm > 0) {
      const minutes = minutesForNetDepth(patch, excessMm);
      shortMm += excessMm * patch.share;
      shortMinutes += minutes;
      litres += minutes * patch.tap.flowLpm;
    }
  }
  if (shortMm <= LEAST_SHORTAGE_MM) {
    return null;
  }
  return { zoneId: zone.id, on: context.day.on, shortMm, shortMinutes, litres, reasons: [...reasons] };
}

function doseShortage(context: DayContext, zone: PlanZone, patches: readonly Patch[], missed: readonly MissedDose[]): PlanShortage | null {
  if (missed.length === 0) {
    return null;
  }
  let shortMm = 0;
  let shortMinutes = 0;
  let litres = 0;
  for (const dose of missed) {
    shortMm += dose.depthMm;
    for (const patch of patches) {
      const minutes = minutesForNetDepth(patch, dose.depthMm);
      shortMinutes += minutes;
      litres += minutes * patch.tap.flowLpm;
    }
  }
  return { zoneId: zone.id, on: context.day.on, shortMm, shortMinutes, litres, reasons: missed.flatMap((dose) => dose.reasons) };
}

/** Moves every patch, and the ground no position serves, to the end of the day; returns each zone's mean depletion [mm]. */
function endTheDay(state: YardState, context: DayContext, depthByPosition: ReadonlyMap<string, number>): Record<string, number> {
  const endDepletionMm: Record<string, number> = {};
  for (const zone of state.zones) {
    const shared = {
      rainMm: context.expectedRainMm, demandMm: zone.demandMmByDay[context.index] ?? 0,
      totalAvailableMm: zone.totalAvailableMm, refillLineMm: zone.refillLineMm,
    };
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

function planDay(input: PlanInput, contexts: readonly DayContext[], context: DayContext, state: YardState, shortages: PlanShortage[]): PlannedDay {
  const on = context.day.on;
  const allPatches = [...state.patchesByZone.values()].flat();
  const dosed = new DayTimeline<PlanJob>(dayHabits(input, context.day));
  const missedDoses: MissedDose[] = [];
  const seedWithout = new Map<string, Reason[]>();
  const missedByZone = new Map<string, MissedDose[]>();
  for (const zone of state.zones.filter(isSeeded)) {
    const seedDay = planSeedDoses(input, contexts, context, zone, state.patchesByZone.get(zone.id) ?? [], dosed, new WaterLedger(input));
    missedDoses.push(...seedDay.missed);
    missedByZone.set(zone.id, seedDay.missed);
    seedWithout.set(zone.id, seedDay.without);
  }
  const grass = state.zones.filter((zone) => !isSeeded(zone) && !zone.resting).flatMap((zone) => (state.patchesByZone.get(zone.id) ?? []).filter((patch) => !isLeftOut(input, context, patch)));
  const { timeline, turnedDown } = planEstablishedSets(input, contexts, context, grass, allPatches, dosed);
  const placed = timeline.all();
  const depthByPosition = new Map<string, number>();
  for (const { job } of placed) {
    depthByPosition.set(job.positionId, (depthByPosition.get(job.positionId) ?? 0) + netDepthMm(job.patch, job.minutes));
  }
  const zonesWithout = state.zones
    .filter((zone) => !placed.some(({ job }) => job.patch.zone.id === zone.id))
    .map((zone) => {
      if (!isSeeded(zone)) {
        return { zoneId: zone.id, reasons: whyWithout(input, context, state, zone, turnedDown) };
      }
      const reasons = seedWithout.get(zone.id) ?? [];
      return { zoneId: zone.id, reasons: reasons.length > 0 ? reasons : [reason('already_watered')] };
    });
  const endDepletionMm = endTheDay(state, context, depthByPosition);
  for (const zone of state.zones) {
    const patches = state.patchesByZone.get(zone.id) ?? [];
    const without = zonesWithout.find((entry) => entry.zoneId === zone.id)?.reasons;
    const cut = patches.flatMap((patch) => turnedDown.get(patch.position.id) ?? []);
    const shortage = isSeeded(zone) ? doseShortage(context, zone, patches, missedByZone.get(zone.id) ?? [])
      : zone.resting ? null
      : shortageOf(context, zone, patches, without ?? (cut.length > 0 ? cut : [standing(driestMm(state, zone), zone.refillLineMm, on)]));
    if (shortage) {
      shortages.push(shortage);
    }
  }
  return { on, rounds: roundsOfDay(dayHabits(input, context.day), on, placed), zonesWithout, missedDoses, endDepletionMm };
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

/**
 * The first planner: seeded zones get their doses first; a patch of grass is watered to full when its forecast depletion would pass its refill line
 * before the next day that offers hours; what does not fit is brought forward or named. It decides day by day and never takes a decision back, so
 * it is quick and its reasons are short, but where hours are scarce a planner that weighs all days together can do better.
 *
 * Simplifications: one rate per position whatever other tap is open; forecasts of rain and wind by the day, not the hour.
 */
export const refillLinePlanner: Planner = {
  name: 'refill-line-1',
  plan(input: PlanInput): PlanResult {
    checkPlanInput(input);
    const contexts = dayContexts(input);
    const state = yardState(input);
    const shortages: PlanShortage[] = [];
    const days = contexts.map((context) => planDay(input, contexts, context, state, shortages));
    fillNextDays(days);
    return { planner: refillLinePlanner.name, days, shortages, missing: whatIsMissing(input) };
  },
};
