import { leastWorthMm } from './buildCourses';
import { notableRainIndex, standing, whyDue } from './dueReasons';
import type { LaidRun } from './layOutDay';
import { patchOutlook } from './patchOutlook';
import type { DayContext } from './planDayContext';
import { planDefaults } from './planDefaults';
import type { PlanSlot } from './planSlots';
import { reason } from './reasonNumbers';
import type { PlanInput, Reason } from './types';
import type { WaterLedger } from './waterLedger';
import { isSeeded, minutesForNetDepth, netDepthMm, type Patch } from './yardPatches';
import { runMinutesAtMost } from './buildCourses';

/** Minutes of each slot that are taken, moves included. */
export interface SlotUse {
  slots: readonly PlanSlot[];
  usedMinutes: readonly number[];
}

/** What the explanations need to know of the whole plan. */
export interface PlanFacts {
  input: PlanInput;
  contexts: readonly DayContext[];
  use: SlotUse;
  /** Limited volumes after the whole plan. */
  ledger: WaterLedger;
}

function lineSlots(facts: PlanFacts, patch: Patch, fromIndex: number, toIndex: number): PlanSlot[] {
  return facts.use.slots.filter((slot) => slot.index >= fromIndex && slot.index <= toIndex && slot.tapIds.includes(patch.tap.id));
}

const spanOf = (slot: PlanSlot): number => slot.toMinutes - slot.fromMinutes;

/** Minutes that the longest free stretch of a day still has for one more set on a patch's tap. */
export function freeMinutes(facts: PlanFacts, patch: Patch, index: number): number {
  return Math.max(0, ...lineSlots(facts, patch, index, index).map((slot) => spanOf(slot) - (facts.use.usedMinutes[slot.number] ?? 0)));
}

/** Why a patch gets water on this very day. */
function whyToday(facts: PlanFacts, context: DayContext, patch: Patch, minutes: number, isOutingOthers: boolean): Reason {
  const { contexts } = facts;
  const outlook = patchOutlook(patch, contexts, context.index, patch.depletionMm);
  const line = patch.zone.refillLineMm;
  if (patch.depletionMm > line || outlook.dryAtNextMm > line) {
    return whyDue(contexts, context, patch, outlook);
  }
  const until = outlook.deadlineIndex;
  const untilOn = until === null ? '' : contexts[until]?.day.on ?? '';
  if (until !== null && until > context.index) {
    const later = lineSlots(facts, patch, context.index + 1, until);
    const hadMinutes = later.reduce((sum, slot) => sum + spanOf(slot), 0);
    const neededMinutes = later.reduce((sum, slot) => sum + (facts.use.usedMinutes[slot.number] ?? 0), minutes + facts.input.moveMinutes);
    if (neededMinutes > hadMinutes) {
      return reason('brought_forward', { depletionMm: patch.depletionMm, refillLineMm: line, untilOn, neededMinutes, hadMinutes });
    }
    if (isOutingOthers) {
      return reason('same_outing', { depletionMm: patch.depletionMm, refillLineMm: line, untilOn });
    }
  }
  return reason('ahead_of_dry', { depletionMm: patch.depletionMm, refillLineMm: line, crossesOn: outlook.crossesIndex === null ? '' : contexts[outlook.crossesIndex]?.day.on ?? '' });
}

/** Fills in the reasons of the runs of one patch on one day. */
export function explainRuns(facts: PlanFacts, context: DayContext, patch: Patch, runs: readonly LaidRun[], isOutingOthers: boolean): void {
  const { contexts, input } = facts;
  const given = runs.reduce((sum, run) => sum + (run.placed?.job.minutes ?? 0), 0);
  const givenMm = netDepthMm(patch, given);
  const wanted = runs.reduce((sum, run) => sum + run.wantedMinutes, 0);
  const leftMm = patch.depletionMm - givenMm;
  const common = [whyToday(facts, context, patch, given, isOutingOthers)];
  const waterIn = input.waterIns?.find((each) => each.zoneId === patch.zone.id && each.fromOn <= context.day.on && context.day.on <= each.byOn);
  if (waterIn) {
    common.push(reason('water_in', { name: waterIn.name, byOn: waterIn.byOn, depthMm: waterIn.depthMm }));
  }
  const rainIndex = notableRainIndex(contexts, context.index);
  const full = minutesForNetDepth(patch, Math.max(patch.depletionMm, 0.1));
  const isFull = given < full - 2 && freeMinutes(facts, patch, context.index) < 3;
  if (given < wanted || isFull) {
    common.push(reason('cut_by_time', { wantedMm: patch.depletionMm, givenMm, wantedMinutes: Math.max(full, wanted), givenMinutes: given }));
  } else if (leftMm > 0.5 && rainIndex !== null) {
    common.push(reason('room_for_rain', { roomMm: leftMm, rainOn: contexts[rainIndex]?.day.on ?? '', on: context.day.on }));
  } else if (rainIndex === null || rainIndex > context.index) {
    common.push(reason('no_rain_before', { rainOn: rainIndex === null ? '' : contexts[rainIndex]?.day.on ?? '', lastOn: contexts[contexts.length - 1]?.day.on ?? '', on: context.day.on }));
  }
  if (patch.position.runTimeMultiplier >= 1.15) {
    common.push(reason('uneven', { runTimeMultiplier: patch.position.runTimeMultiplier, lowQuarterUniformity: patch.position.lowQuarterUniformity ?? '' }));
  }
  if (patch.position.rateIsDefault) {
    common.push(reason('rate_default', { position: patch.position.name, rateMmPerHour: patch.rateMmPerHour }));
  }
  const laid = runs.filter((run) => run.placed !== null);
  laid.forEach((run, at) => {
    const reasons = run.placed?.job.reasons ?? [];
    if (run.cycle > 1 && at > 0) {
      reasons.push(reason('second_cycle', { number: run.cycle, soakMinutes: planDefaults.soakMinutes }));
    }
    reasons.push(...common);
    if (run.cycles > 1 && run.cycle === 1) {
      reasons.push(reason('cut_by_intake', { rateMmPerHour: patch.rateMmPerHour, intakeMmPerHour: patch.zone.intakeMmPerHour, minutes: runMinutesAtMost(input, patch), soakMinutes: planDefaults.soakMinutes }));
    }
    if (run.placed?.job.halfWay) {
      reasons.push(reason('half_way'));
    }
  });
}

/** Why an open patch of grass has no set on a day, its depletion being that of the day's start. */
export function whyNoSet(facts: PlanFacts, context: DayContext, patch: Patch): Reason[] {
  const { contexts } = facts;
  const outlook = patchOutlook(patch, contexts, context.index, patch.depletionMm);
  const { zone } = patch;
  const state = standing(patch.depletionMm, zone.refillLineMm, context.day.on);
  if (outlook.dryAtNextMm <= zone.refillLineMm || patch.depletionMm < leastWorthMm(patch)) {
    return [state];
  }
  const wantedMinutes = minutesForNetDepth(patch, patch.depletionMm);
  if (outlook.expectedAtNextMm <= zone.refillLineMm) {
    const rain = contexts.slice(context.index, Math.max(outlook.nextIndex, context.index + 1));
    const rainiest = rain.reduce((best, each) => (each.expectedRainMm > best.expectedRainMm ? each : best), context);
    return [reason('held_for_rain', {
      rainMm: rainiest.day.rainMm, probabilityPct: rainiest.day.rainProbabilityPct ?? '', rainOn: rainiest.day.on, on: context.day.on,
      worstMm: outlook.dryAtNextMm, refillLineMm: zone.refillLineMm,
    })];
  }
  const refusal = facts.ledger.refusal(patch, context.index, Math.min(wantedMinutes, 30));
  if (refusal) {
    return [refusal, state];
  }
  if (freeMinutes(facts, patch, context.index) < Math.max(planDefaults.leastSetMinutes, 0.25 * wantedMinutes)) {
    const hadMinutes = context.groundOf(zone.id, isSeeded(zone), patch.position.device).workMinutes;
    return [reason('no_time_left', { wantedMinutes, hadMinutes }), state];
  }
  return [reason('waits_on_priority', { depletionMm: patch.depletionMm, refillLineMm: zone.refillLineMm })];
}
