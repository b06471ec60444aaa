import type { DayTimeline, PlacedJob, TimelineHabits } from './dayTimeline';
import { leastMinutesOf, runMinutesAtMost } from './buildCourses';
import type { DayContext } from './planDayContext';
import { planDefaults } from './planDefaults';
import type { PlanJob } from './planSeedDoses';
import type { PlanSlot } from './planSlots';
import type { PlanInput } from './types';
import { byText, isSeeded, type Patch } from './yardPatches';

/** One set that the search chose for a slot. */
export interface ChosenSet {
  patch: Patch;
  slot: PlanSlot;
  minutes: number;
}

/** A run laid out in the day, with the set it belongs to. */
export interface LaidRun {
  chosen: ChosenSet;
  cycle: number;
  cycles: number;
  /** Whole minutes wanted for this run. */
  wantedMinutes: number;
  placed: PlacedJob<PlanJob> | null;
}

/**
 * The order in which the hose goes round: from the top of a slope down, along the shortest drags from position to position where places are known, otherwise
 * as the positions are numbered. When somebody must leave before the water is off, the longest set comes last.
 */
export function orderOfRound(sets: readonly ChosenSet[], habits: TimelineHabits): ChosenSet[] {
  const height = (set: ChosenSet): number => set.patch.position.heightM ?? 0;
  const byNumber = (a: ChosenSet, b: ChosenSet): number => a.patch.position.sortOrder - b.patch.position.sortOrder || a.patch.zone.priority - b.patch.zone.priority || byText(a.patch.position.id, b.patch.position.id);
  const left = [...sets].sort((a, b) => height(b) - height(a) || byNumber(a, b));
  const ordered: ChosenSet[] = [];
  const hasPlaces = sets.every((set) => set.patch.position.place !== undefined);
  while (left.length > 0) {
    const last = ordered[ordered.length - 1];
    let best = 0;
    if (last && hasPlaces) {
      for (let at = 1; at < left.length; at += 1) {
        const candidate = left[at] as ChosenSet;
        const isLevel = height(candidate) > height(left[0] as ChosenSet) - 0.5;
        if (isLevel && habits.moveBetween(last.patch.position.id, candidate.patch.position.id) < habits.moveBetween(last.patch.position.id, (left[best] as ChosenSet).patch.position.id)) {
          best = at;
        }
      }
    }
    ordered.push(...left.splice(best, 1));
  }
  const first = ordered[0];
  if (first && first.slot.startSpanMinutes < first.slot.toMinutes - first.slot.fromMinutes) {
    const work = ordered.reduce((sum, set) => sum + set.minutes + first.slot.moveMinutes, 0);
    const longest = ordered.reduce((a, b) => (b.minutes > a.minutes ? b : a), first);
    if (work - first.slot.moveMinutes - (ordered[ordered.length - 1] as ChosenSet).minutes > first.slot.startSpanMinutes) {
      return [...ordered.filter((set) => set !== longest), longest];
    }
  }
  return ordered;
}

/**
 * Gives the chosen sets of a day their times. Where the soil asks for cycles, the hose goes on to the next position while the first soaks.
 * @param timeline - the day with doses and fixed sets; changed
 */
export function layOutDay(input: PlanInput, context: DayContext, sets: readonly ChosenSet[], timeline: DayTimeline<PlanJob>): LaidRun[] {
  const laid: LaidRun[] = [];
  const slots = [...new Set(sets.map((set) => set.slot))].sort((a, b) => a.fromMinutes - b.fromMinutes || a.number - b.number);
  for (const slot of slots) {
    const ordered = orderOfRound(sets.filter((set) => set.slot === slot), timeline.habits);
    const cyclesOf = (set: ChosenSet): number => Math.ceil(set.minutes / runMinutesAtMost(input, set.patch));
    const most = Math.max(...ordered.map(cyclesOf));
    const readyAt = new Map<ChosenSet, number>();
    for (let cycle = 1; cycle <= most; cycle += 1) {
      for (const chosen of ordered) {
        const cycles = cyclesOf(chosen);
        if (cycle > cycles) {
          continue;
        }
        const { patch } = chosen;
        // Cycles of even length: the rest of a division goes to the first ones.
        const wantedMinutes = Math.floor(chosen.minutes / cycles) + (cycle <= chosen.minutes % cycles ? 1 : 0);
        const ground = context.groundOf(patch.zone.id, isSeeded(patch.zone), patch.position.device);
        const placed = timeline.placeLongest({
          patch, kind: 'set', reasons: [], minutes: wantedMinutes, positionId: patch.position.id, tapId: patch.tap.id, flowLpm: patch.tap.flowLpm,
          openWindows: [{ fromMinutes: slot.fromMinutes, toMinutes: slot.toMinutes }], homeWindows: context.homeWindows, endsUnattended: patch.tap.shutOffTimer && !ground.mustBeAttended,
          earliestStartMinutes: readyAt.get(chosen) ?? slot.fromMinutes, latestStartMinutes: 1440,
        }, Math.min(wantedMinutes, Math.ceil(leastMinutesOf(patch) / cycles)));
        laid.push({ chosen, cycle, cycles, wantedMinutes, placed });
        readyAt.set(chosen, (placed?.endMinutes ?? slot.fromMinutes) + planDefaults.soakMinutes);
      }
    }
  }
  return laid;
}
