import { setupMinutesBefore, type DayTimeline, type TimelineHabits } from './dayTimeline';
import { intersectWindows } from './minuteWindows';
import type { DayContext, GroundDay } from './planDayContext';
import type { PlanJob } from './planSeedDoses';
import type { MinuteWindow, PlanInput, PlanSupply, PlanTap } from './types';
import { byText, isSeeded, type Patch } from './yardPatches';

/** Leaves wetted later than this before sunset stay wet into the night [min]. Common practice: two hours to dry by day. */
const DRYING_MINUTES = 120;
/** Dew wets the leaves anyway from about this long after sunset [min]. Default. */
const DEW_AFTER_SUNSET_MINUTES = 180;

/** A stretch of a day in which the taps of one line can feed sets of grass, one after the other. */
export interface PlanSlot {
  number: number;
  /** Day of the plan. */
  index: number;
  tapIds: readonly string[];
  /** Number of the outing, shared by all slots of the same hours at home. */
  outing: number;
  homeWindow: MinuteWindow;
  /** Water of the first set may start here. */
  fromMinutes: number;
  /** Water must be off here. */
  toMinutes: number;
  /** Minutes from the first start to the last start at most. */
  startSpanMinutes: number;
  /** Minutes of a move between two sets, with the rest that the supply needs. */
  moveMinutes: number;
  /** Hours of the night that leaves stay wet because of it [h]. */
  wetHours: number;
  /** Part of it outside the hours that people prefer. */
  offPreferredShare: number;
}

export interface SlotPlan {
  slots: PlanSlot[];
  outingCount: number;
  /** Outings that doses or fixed sets make anyway, by number. */
  outingIsMade: Int32Array;
}

/**
 * Taps that feed one sprinkler after the other. Each tap is a line of its own unless the supply cannot feed two of them at once.
 */
export function tapLines(taps: readonly PlanTap[], supply: PlanSupply | undefined): PlanTap[][] {
  const sorted = [...taps].sort((a, b) => byText(a.id, b.id));
  const flows = sorted.map((tap) => tap.flowLpm).sort((a, b) => b - a);
  const fitTogether = !supply || (supply.restMinutes === 0 && (flows[0] ?? 0) + (flows[1] ?? 0) <= supply.flowLpm);
  return fitTogether ? sorted.map((tap) => [tap]) : [sorted];
}

function wetNightHours(toMinutes: number, sunriseMinutes: number | null, sunsetMinutes: number | null): number {
  if (sunsetMinutes === null || toMinutes <= sunsetMinutes - DRYING_MINUTES || (sunriseMinutes !== null && toMinutes <= sunriseMinutes)) {
    return 0;
  }
  return Math.max(0, sunsetMinutes + DEW_AFTER_SUNSET_MINUTES - toMinutes) / 60;
}

/** The open windows of all kinds of ground on a line, cut wherever one of them opens or closes, so that a stretch is open to a kind as a whole or not at all. */
function stretchesOf(grounds: readonly GroundDay[]): MinuteWindow[] {
  const cuts = [...new Set(grounds.flatMap((ground) => ground.openWindows.flatMap((window) => [window.fromMinutes, window.toMinutes])))].sort((a, b) => a - b);
  return cuts.slice(1).flatMap((toMinutes, index) => {
    const fromMinutes = cuts[index] as number;
    const isOpen = grounds.some((ground) => ground.openWindows.some((window) => window.fromMinutes <= fromMinutes && toMinutes <= window.toMinutes));
    return isOpen ? [{ fromMinutes, toMinutes }] : [];
  });
}

interface Busy {
  fromMinutes: number;
  toMinutes: number;
}

/** Spans of a day in which doses and fixed sets take the taps of a line, with the minutes before each. */
function busySpans(timeline: DayTimeline<PlanJob>, tapIds: readonly string[], habits: TimelineHabits): Busy[] {
  const last = new Map<string, { positionId: string; endMinutes: number }>();
  const rest = habits.supply?.restMinutes ?? 0;
  return timeline.all().flatMap(({ job, startMinutes, endMinutes }) => {
    if (!tapIds.includes(job.tapId)) {
      return [];
    }
    const setup = Math.max(setupMinutesBefore(last.get(job.tapId) ?? null, { positionId: job.positionId, startMinutes }, habits), habits.longestMoveMinutes, habits.leadMinutes);
    last.set(job.tapId, { positionId: job.positionId, endMinutes });
    return [{ fromMinutes: startMinutes - Math.max(setup, rest), toMinutes: endMinutes + Math.max(habits.longestMoveMinutes, habits.leadMinutes, rest) }];
  });
}

/** What is left of a span beside the busy ones. */
function freeParts(span: MinuteWindow, busy: readonly Busy[]): MinuteWindow[] {
  let parts = [span];
  for (const each of busy) {
    parts = parts.flatMap((part) => (each.toMinutes <= part.fromMinutes || each.fromMinutes >= part.toMinutes ? [part] : [
      { fromMinutes: part.fromMinutes, toMinutes: each.fromMinutes }, { fromMinutes: each.toMinutes, toMinutes: part.toMinutes },
    ].filter((one) => one.toMinutes > one.fromMinutes)));
  }
  return parts;
}

/**
 * The slots of every day, after doses and fixed sets have taken their place.
 * @param timelines - the days with what is placed already
 * @param leastMinutes - shorter stretches are left out [min]
 */
export function planSlots(input: PlanInput, contexts: readonly DayContext[], patches: readonly Patch[], timelines: readonly DayTimeline<PlanJob>[], leastMinutes: number): SlotPlan {
  const slots: PlanSlot[] = [];
  const made: number[] = [];
  const lines = tapLines(input.taps, input.supply).filter((line) => patches.some((patch) => line.includes(patch.tap)));
  contexts.forEach((context, index) => {
    const timeline = timelines[index] as DayTimeline<PlanJob>;
    const { habits } = timeline;
    const moveMinutes = Math.ceil(Math.max((context.day.paceFactor ?? 1) * input.moveMinutes, typicalMove(habits, patches), habits.supply?.restMinutes ?? 0));
    const firstOuting = made.length;
    context.homeWindows.forEach((home) => made.push(timeline.all().some((run) => run.startMinutes >= home.fromMinutes && run.startMinutes < home.toMinutes) ? 1 : 0));
    lines.forEach((line, lineNumber) => {
      const own = patches.filter((patch) => line.includes(patch.tap));
      const grounds = [...new Set(own.map((patch) => context.groundOf(patch.zone.id, isSeeded(patch.zone), patch.position.device)))].filter((ground) => ground.closed === null);
      if (grounds.length === 0) {
        return;
      }
      const tapIds = line.map((tap) => tap.id);
      const busy = busySpans(timeline, tapIds, habits);
      const endsAlone = line.every((tap) => tap.shutOffTimer) && grounds.every((ground) => !ground.mustBeAttended);
      for (const stretch of stretchesOf(grounds)) {
        context.homeWindows.forEach((home, homeIndex) => {
          const fromMinutes = Math.ceil(Math.max(stretch.fromMinutes, home.fromMinutes + habits.leadMinutes * (1 + lineNumber)));
          const nextHome = context.homeWindows[homeIndex + 1]?.fromMinutes ?? 1440;
          const lastStart = Math.min(home.toMinutes - 1, stretch.toMinutes);
          const toMinutes = Math.floor(endsAlone ? Math.min(stretch.toMinutes, Math.max(home.toMinutes, nextHome)) : Math.min(stretch.toMinutes, home.toMinutes));
          for (const part of freeParts({ fromMinutes, toMinutes }, busy)) {
            const from = Math.ceil(part.fromMinutes);
            const to = Math.floor(part.toMinutes);
            if (to - from < leastMinutes || from > lastStart) {
              continue;
            }
            const preferred = input.preferredWindows === undefined ? to - from
              : intersectWindows([{ fromMinutes: from, toMinutes: to }], [...input.preferredWindows]).reduce((sum, window) => sum + window.toMinutes - window.fromMinutes, 0);
            slots.push({
              number: slots.length, index, tapIds, outing: firstOuting + homeIndex, homeWindow: home, fromMinutes: from, toMinutes: to, moveMinutes,
              startSpanMinutes: Math.floor(endsAlone ? lastStart - from : to - from),
              wetHours: wetNightHours(to, context.day.sunriseMinutes, context.day.sunsetMinutes),
              offPreferredShare: 1 - Math.min(1, preferred / (to - from)),
            });
          }
        });
      }
    });
  });
  return { slots, outingCount: made.length, outingIsMade: Int32Array.from(made) };
}

/** Mean of the moves from each position to its nearest neighbour [min]. */
function typicalMove(habits: TimelineHabits, patches: readonly Patch[]): number {
  let sum = 0;
  let count = 0;
  for (const patch of patches) {
    const others = patches.filter((other) => other !== patch && other.tap === patch.tap).map((other) => habits.moveBetween(patch.position.id, other.position.id));
    if (others.length > 0) {
      sum += Math.min(...others);
      count += 1;
    }
  }
  return count === 0 ? 0 : sum / count;
}
