import { buildCourses, leastMinutesOf } from './buildCourses';
import { checkPlanInput } from './checkPlanInput';
import { dayHabits } from './dayHabits';
import { DayTimeline } from './dayTimeline';
import { closeDays } from './closeDays';
import { layOutDay, type ChosenSet, type LaidRun } from './layOutDay';
import { placeLocks } from './placeLocks';
import { dayContexts, type DayContext } from './planDayContext';
import { planWeights, zoneWeights } from './planObjective';
import { PlanSearch } from './planSearch';
import { planSeedDoses, type PlanJob, type SeedDay } from './planSeedDoses';
import { planSlots } from './planSlots';
import type { PlanInput, Planner, PlanResult } from './types';
import { WaterLedger } from './waterLedger';
import { whatIsMissing } from './whatIsMissing';
import { isSeeded, netDepthMm, yardState, type Patch } from './yardPatches';

/** Evaluations that the search may spend when the input names no budget: for each patch, and in all. */
const EVALUATIONS_PER_PATCH = 1_500;
const EVALUATIONS_AT_LEAST = 120_000;

/** Sets of the first day that were done already count for their position's turns on and between the marks. */
function markTurns(laid: readonly LaidRun[], turns: Map<string, boolean>): void {
  const seen = new Set<ChosenSet>();
  for (const { chosen, placed } of laid) {
    const { alternate, id } = chosen.patch.position;
    if (!alternate || !placed) {
      continue;
    }
    const last = turns.get(id) ?? alternate.lastWasHalfWay;
    const halfWay = seen.has(chosen) ? last : !last;
    seen.add(chosen);
    turns.set(id, halfWay);
    if (halfWay) {
      placed.job.halfWay = true;
    }
  }
}

function doseDays(input: PlanInput, contexts: readonly DayContext[], patchesByZone: ReadonlyMap<string, Patch[]>, zones: readonly PlanInput['zones'][number][], timelines: readonly DayTimeline<PlanJob>[], ledger: WaterLedger): Map<string, SeedDay>[] {
  return contexts.map((context, index) => {
    const byZone = new Map<string, SeedDay>();
    for (const zone of zones.filter(isSeeded)) {
      byZone.set(zone.id, planSeedDoses(input, contexts, context, zone, patchesByZone.get(zone.id) ?? [], timelines[index] as DayTimeline<PlanJob>, ledger));
    }
    return byZone;
  });
}

/**
 * The planner: what a person fixed comes first, then the doses of seed; the hours that are left are shared out among the patches of grass so that the
 * documented cost of the whole plan (`planObjective.ts`) is as low as the search finds within its budget; then each day is laid out and explained.
 *
 * Simplifications: one rate per position whatever other tap is open; an outing is one stretch of hours at home, however long the pauses within it.
 */
export const yardPlanner: Planner = {
  name: 'yard-1',
  plan(input: PlanInput): PlanResult {
    checkPlanInput(input);
    const contexts = dayContexts(input);
    const state = yardState(input);
    const ledger = new WaterLedger(input);
    const timelines = contexts.map((context) => new DayTimeline<PlanJob>(dayHabits(input, context.day)));
    const usable = state.zones.flatMap((zone) => state.patchesByZone.get(zone.id) ?? []);
    const impossible = placeLocks(input, contexts, usable, timelines, ledger);
    const seedDays = doseDays(input, contexts, state.patchesByZone, state.zones, timelines, ledger);
    const grass = usable.filter((patch) => !isSeeded(patch.zone) && !patch.zone.resting);

    const weights = planWeights[input.priority ?? 'keep_green'];
    const { slots, outingIsMade } = planSlots(input, contexts, grass, timelines, Math.min(...grass.map(leastMinutesOf), 1440));
    const fixedMm = grass.map((patch) => Float64Array.from(timelines, (timeline) =>
      timeline.all().reduce((sum, { job }) => (job.positionId === patch.position.id ? sum + netDepthMm(patch, job.minutes) : sum), 0)));
    const courses = buildCourses(input, contexts, grass, slots, weights, zoneWeights(state.zones), fixedMm);
    const caps = (input.monthCaps ?? []).filter((cap, at, every) => every.findIndex((other) => other.month === cap.month) === at);
    const search = new PlanSearch({
      courses, slots, outingIsMade, outingL: weights.outingL, flowLpm: grass.map((patch) => patch.tap.flowLpm),
      capOfSlot: Int32Array.from(slots, (slot) => caps.findIndex((cap) => cap.month === contexts[slot.index]?.day.on.slice(0, 7))),
      capLeftL: caps.map((cap) => ledger.leftLitres(`${cap.month}-01`)),
      budget: input.workBudget ?? EVALUATIONS_AT_LEAST + EVALUATIONS_PER_PATCH * grass.length,
    });
    const { minutes } = search.run();

    const chosen = grass.flatMap((patch, number) => {
      const course = courses[number];
      return [...(minutes[number] ?? [])].flatMap((run, at): ChosenSet[] => {
        const slot = slots[course?.opportunitySlot[at] ?? -1];
        return run > 0 && slot ? [{ patch, slot, minutes: run }] : [];
      });
    });
    const turns = new Map<string, boolean>();
    const laidByDay = contexts.map((context, index) => {
      const laid = layOutDay(input, context, chosen.filter((set) => set.slot.index === index), timelines[index] as DayTimeline<PlanJob>);
      markTurns(laid, turns);
      for (const { chosen: { patch }, placed } of laid) {
        if (placed) {
          ledger.take(patch, index, placed.job.minutes);
        }
      }
      return laid;
    });
    const { days, shortages } = closeDays({ input, contexts, state, timelines, laidByDay, seedDays, slots, ledger });
    return { planner: yardPlanner.name, days, shortages, missing: [...whatIsMissing(input), ...impossible] };
  },
};
