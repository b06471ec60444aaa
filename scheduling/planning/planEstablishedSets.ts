import { DayTimeline } from './dayTimeline';
import { notableRainIndex, whyDue } from './dueReasons';
import { leastWorthMm, patchOutlook, wantedDepthMm, wateringWish, type PatchOutlook } from './patchOutlook';
import type { DayContext } from './planDayContext';
import { planDefaults } from './planDefaults';
import { cycleMinutes, type PlanJob } from './planSeedDoses';
import { reason } from './reasonNumbers';
import type { PlanInput, Reason } from './types';
import { byText, minutesForNetDepth, netDepthMm, type Patch } from './yardPatches';

interface Candidate {
  patch: Patch;
  outlook: PatchOutlook;
  wantedMm: number;
  reasons: Reason[];
}

export interface EstablishedDay {
  /** Why a patch got nothing, or less than it wanted, by position id. */
  turnedDown: Map<string, Reason[]>;
}

/** Minutes of hose that a patch wants, its move included. */
function hoseMinutes(input: PlanInput, patch: Patch, depthMm: number): number {
  return minutesForNetDepth(patch, depthMm) + input.moveMinutes;
}

/** Minutes a tap has for sets of established grass on a day after its doses and getting ready. */
function tapCapacity(input: PlanInput, context: DayContext, tapId: string, patches: readonly Patch[]): number {
  if (context.established.closed) {
    return 0;
  }
  let doseMinutes = 0;
  for (const patch of patches) {
    if (patch.tap.id === tapId && patch.zone.seed !== null) {
      for (const dose of patch.zone.seed.dosesByDay[context.index] ?? []) {
        doseMinutes += hoseMinutes(input, patch, dose.depthMm);
      }
    }
  }
  return Math.max(0, context.established.workMinutes - input.leadMinutes - doseMinutes);
}

/**
 * Patches to water today although they could wait, because the hours of the coming open days will not do for all that falls due by then.
 * @returns candidates in the order of their deadlines, only as many as the lack of minutes asks for
 */
function broughtForward(input: PlanInput, contexts: readonly DayContext[], context: DayContext, waiting: readonly Candidate[], allPatches: readonly Patch[]): Candidate[] {
  const forward: Candidate[] = [];
  const taps = [...new Set(waiting.map((candidate) => candidate.patch.tap.id))];
  for (const tapId of taps) {
    const own = waiting
      .filter((candidate) => candidate.patch.tap.id === tapId && candidate.outlook.deadlineIndex !== null)
      .sort((a, b) => (a.outlook.deadlineIndex ?? 0) - (b.outlook.deadlineIndex ?? 0) || a.patch.zone.priority - b.patch.zone.priority || byText(a.patch.position.id, b.patch.position.id));
    let hadMinutes = 0;
    let worstLack = 0;
    let worst: { index: number; neededMinutes: number; hadMinutes: number } | null = null;
    for (const later of contexts) {
      if (later.index <= context.index || later.established.closed) {
        continue;
      }
      hadMinutes += tapCapacity(input, later, tapId, allPatches);
      const neededMinutes = own
        .filter((candidate) => (candidate.outlook.deadlineIndex ?? Infinity) <= later.index)
        .reduce((sum, candidate) => sum + hoseMinutes(input, candidate.patch, candidate.patch.zone.refillLineMm), 0);
      if (neededMinutes - hadMinutes > worstLack) {
        worstLack = neededMinutes - hadMinutes;
        worst = { index: later.index, neededMinutes, hadMinutes };
      }
    }
    if (!worst) {
      continue;
    }
    for (const candidate of own) {
      const isRipe = candidate.patch.depletionMm >= planDefaults.bringForwardShare * candidate.patch.zone.refillLineMm;
      if (worstLack <= 0 || (candidate.outlook.deadlineIndex ?? Infinity) > worst.index || !isRipe) {
        continue;
      }
      worstLack -= hoseMinutes(input, candidate.patch, candidate.wantedMm);
      candidate.reasons.push(reason('brought_forward', {
        depletionMm: candidate.patch.depletionMm, refillLineMm: candidate.patch.zone.refillLineMm,
        untilOn: contexts[worst.index]?.day.on ?? '', neededMinutes: worst.neededMinutes, hadMinutes: worst.hadMinutes,
      }));
      forward.push(candidate);
    }
  }
  return forward;
}

function finishReasons(contexts: readonly DayContext[], context: DayContext, candidate: Candidate, roomForRainMm: number): void {
  const { patch, reasons } = candidate;
  const rainIndex = notableRainIndex(contexts, context.index);
  if (roomForRainMm > 0.5 && rainIndex !== null) {
    reasons.push(reason('room_for_rain', { roomMm: roomForRainMm, rainOn: contexts[rainIndex]?.day.on ?? '', on: context.day.on }));
  } else if (rainIndex === null || rainIndex > context.index) {
    reasons.push(reason('no_rain_before', {
      rainOn: rainIndex === null ? '' : contexts[rainIndex]?.day.on ?? '', lastOn: contexts[contexts.length - 1]?.day.on ?? '', on: context.day.on,
    }));
  }
  if (patch.position.runTimeMultiplier >= 1.15) {
    reasons.push(reason('uneven', { runTimeMultiplier: patch.position.runTimeMultiplier, lowQuarterUniformity: patch.position.lowQuarterUniformity ?? '' }));
  }
  if (patch.position.rateIsDefault) {
    reasons.push(reason('rate_default', { position: patch.position.name, rateMmPerHour: patch.rateMmPerHour }));
  }
}

/** One run of a candidate, to be laid out. */
function jobFor(context: DayContext, candidate: Candidate, minutes: number, earliestStartMinutes: number, reasons: Reason[]): PlanJob {
  const { patch } = candidate;
  return {
    patch, kind: 'set', reasons, minutes, earliestStartMinutes,
    positionId: patch.position.id, tapId: patch.tap.id, flowLpm: patch.tap.flowLpm,
    openWindows: context.established.openWindows, homeWindows: context.homeWindows, endsUnattended: patch.tap.shutOffTimer,
    latestStartMinutes: 1440,
  };
}

/** Places a candidate's set, in cycles with soaking between when the soil asks for it. Returns why it got less than it wanted, if it did. */
function admit(context: DayContext, candidate: Candidate, timeline: DayTimeline<PlanJob>): Reason[] {
  const { patch, wantedMm } = candidate;
  const wantedMinutes = minutesForNetDepth(patch, wantedMm);
  const atMost = cycleMinutes(patch);
  const cut = wantedMinutes > atMost
    ? [reason('cut_by_intake', { rateMmPerHour: patch.rateMmPerHour, intakeMmPerHour: patch.zone.intakeMmPerHour, minutes: atMost, soakMinutes: planDefaults.soakMinutes })]
    : [];
  let leftMinutes = wantedMinutes;
  let earliest = 0;
  for (let cycle = 1; cycle <= planDefaults.cyclesAtMost && leftMinutes > 0; cycle += 1) {
    if (cycle > 1 && leftMinutes < planDefaults.leastSetMinutes) {
      // A few minutes left over are not worth another walk; the next set makes up for them.
      return [];
    }
    const minutes = Math.min(leftMinutes, atMost);
    const leastMinutes = Math.min(minutes, Math.max(planDefaults.leastSetMinutes, minutesForNetDepth(patch, leastWorthMm(patch))));
    const reasons = cycle === 1 ? [...candidate.reasons, ...cut] : [reason('second_cycle', { number: cycle, soakMinutes: planDefaults.soakMinutes }), ...candidate.reasons];
    const placed = timeline.placeLongest(jobFor(context, candidate, minutes, earliest, reasons), leastMinutes);
    if (!placed) {
      break;
    }
    leftMinutes -= placed.job.minutes;
    if (placed.job.minutes < minutes) {
      reasons.push(reason('cut_by_time', { wantedMm, givenMm: netDepthMm(patch, placed.job.minutes), wantedMinutes, givenMinutes: placed.job.minutes }));
      break;
    }
    earliest = placed.endMinutes + planDefaults.soakMinutes;
  }
  if (leftMinutes === wantedMinutes) {
    return [reason('no_time_left', { wantedMinutes, hadMinutes: context.established.workMinutes })];
  }
  return leftMinutes > 0 ? (cut.length > 0 ? cut : [reason('cut_by_time', { wantedMm, givenMm: netDepthMm(patch, wantedMinutes - leftMinutes), wantedMinutes, givenMinutes: wantedMinutes - leftMinutes })]) : [];
}

/** The same runs in position order, when they fit that way; otherwise as they were admitted. */
function inPositionOrder(admitted: DayTimeline<PlanJob>): DayTimeline<PlanJob> {
  const placed = admitted.all();
  const ordered = new DayTimeline<PlanJob>(admitted.habits);
  for (const { job, startMinutes } of placed) {
    if (job.kind === 'dose' && !ordered.placeNearest({ ...job, earliestStartMinutes: startMinutes, latestStartMinutes: startMinutes }, startMinutes)) {
      return admitted;
    }
  }
  const sets = placed.filter(({ job }) => job.kind === 'set');
  const runsSoFar = new Map<string, number>();
  const numbered = sets.map(({ job }) => {
    const cycle = (runsSoFar.get(job.positionId) ?? 0) + 1;
    runsSoFar.set(job.positionId, cycle);
    return { job, cycle };
  });
  numbered.sort((a, b) =>
    a.cycle - b.cycle || a.job.patch.position.sortOrder - b.job.patch.position.sortOrder
    || a.job.patch.zone.priority - b.job.patch.zone.priority || byText(a.job.positionId, b.job.positionId));
  const readyAt = new Map<string, number>();
  for (const { job } of numbered) {
    const run = ordered.placeEarliest({ ...job, earliestStartMinutes: readyAt.get(job.positionId) ?? 0 });
    if (!run) {
      return admitted;
    }
    readyAt.set(job.positionId, run.endMinutes + planDefaults.soakMinutes);
  }
  return ordered;
}

/**
 * Plans the sets of established grass of one day around the doses already placed.
 * @param patches - usable patches of zones that are neither seeded nor resting, in the order in which zones are served
 * @param allPatches - all usable patches, for the minutes that doses will take on later days
 * @returns the day's timeline in position order, and why patches got nothing or less
 */
export function planEstablishedSets(
  input: PlanInput, contexts: readonly DayContext[], context: DayContext, patches: readonly Patch[], allPatches: readonly Patch[], timeline: DayTimeline<PlanJob>,
): { timeline: DayTimeline<PlanJob>; turnedDown: Map<string, Reason[]> } {
  const turnedDown = new Map<string, Reason[]>();
  if (context.established.closed) {
    return { timeline, turnedDown };
  }
  const due: Candidate[] = [];
  const waiting: Candidate[] = [];
  for (const patch of patches) {
    const outlook = patchOutlook(patch, contexts, context.index, patch.depletionMm);
    const wish = wateringWish(patch, outlook);
    const { wantedMm, roomForRainMm } = wantedDepthMm(patch, contexts, context.index, outlook);
    const candidate: Candidate = { patch, outlook, wantedMm, reasons: [] };
    if (wish === 'hold_for_rain') {
      const rain = contexts.slice(context.index, outlook.nextIndex);
      const rainiest = rain.reduce<DayContext | null>((best, each) => (best === null || each.expectedRainMm > best.expectedRainMm ? each : best), null);
      turnedDown.set(patch.position.id, [reason('held_for_rain', {
        rainMm: rainiest?.day.rainMm ?? 0, probabilityPct: rainiest?.day.rainProbabilityPct ?? '', rainOn: rainiest?.day.on ?? context.day.on, on: context.day.on,
        worstMm: outlook.dryAtNextMm, refillLineMm: patch.zone.refillLineMm,
      })]);
    } else if (wantedMm <= 0 || wantedMm < leastWorthMm(patch)) {
      continue;
    } else if (wish === 'due') {
      candidate.reasons.push(whyDue(contexts, context, patch, outlook));
      finishReasons(contexts, context, candidate, roomForRainMm);
      due.push(candidate);
    } else {
      waiting.push(candidate);
    }
  }
  const excess = (candidate: Candidate) => candidate.outlook.expectedAtNextMm - candidate.patch.zone.refillLineMm;
  due.sort((a, b) => a.patch.zone.priority - b.patch.zone.priority || excess(b) - excess(a) || byText(a.patch.position.id, b.patch.position.id));
  const forward = broughtForward(input, contexts, context, waiting, allPatches);
  forward.forEach((candidate) => finishReasons(contexts, context, candidate, 0));
  for (const candidate of [...due, ...forward]) {
    const lacking = admit(context, candidate, timeline);
    if (lacking.length > 0) {
      turnedDown.set(candidate.patch.position.id, lacking);
    }
  }
  return { timeline: inPositionOrder(timeline), turnedDown };
}
