import { endOfDayDepletionMm } from './patchBalance';
import type { DayContext } from './planDayContext';
import { isSeeded, type Patch } from './yardPatches';

/** What lies ahead of a patch that could be watered on a given day. */
export interface PatchOutlook {
  /** Index of the next day, after this one, on which the patch could be watered; the day after the plan when there is none. */
  nextIndex: number;
  /** Depletion when that day begins, without water and without rain [mm]. */
  dryAtNextMm: number;
  /** The same with the rain the plan counts on [mm]. */
  expectedAtNextMm: number;
  /** First day at whose end depletion passes the refill line, with expected rain; null when not within the plan. */
  crossesIndex: number | null;
  /** Last day on which watering still comes before the refill line is passed; null when no watering is needed within the plan. */
  deadlineIndex: number | null;
}

/** Whether rules, hours and weather let the patch be watered on a day at all. */
function isOpen(patch: Patch, context: DayContext): boolean {
  return context.groundOf(patch.zone.id, isSeeded(patch.zone), patch.position.device).closed === null;
}

function endOfDay(patch: Patch, context: DayContext, depletionMm: number, rainMm: number): number {
  return endOfDayDepletionMm({
    depletionMm, rainMm, irrigationMm: 0,
    demandMm: patch.zone.demandMmByDay[context.index] ?? 0,
    totalAvailableMm: patch.zone.totalAvailableMm,
    refillLineMm: patch.zone.refillLineMm,
  });
}

/**
 * Looks ahead from the start of a day.
 * @param contexts - all days of the plan
 * @param index - the day
 * @param depletionMm - depletion at its start [mm]
 */
export function patchOutlook(patch: Patch, contexts: readonly DayContext[], index: number, depletionMm: number): PatchOutlook {
  const next = contexts.find((context) => context.index > index && isOpen(patch, context));
  const nextIndex = next?.index ?? contexts.length;
  let dry = depletionMm;
  let expected = depletionMm;
  let dryAtNextMm = depletionMm;
  let expectedAtNextMm = depletionMm;
  let crossesIndex: number | null = depletionMm > patch.zone.refillLineMm ? index : null;
  let deadlineIndex: number | null = null;
  let lastOpen = index;
  for (const context of contexts) {
    if (context.index < index) {
      continue;
    }
    if (crossesIndex === null && isOpen(patch, context)) {
      lastOpen = context.index;
    }
    dry = endOfDay(patch, context, dry, 0);
    expected = endOfDay(patch, context, expected, context.expectedRainMm);
    if (crossesIndex === null && expected > patch.zone.refillLineMm) {
      crossesIndex = context.index;
    }
    if (context.index === nextIndex - 1) {
      dryAtNextMm = dry;
      expectedAtNextMm = expected;
    }
  }
  if (crossesIndex !== null) {
    deadlineIndex = lastOpen;
  }
  return { nextIndex, dryAtNextMm, expectedAtNextMm, crossesIndex, deadlineIndex };
}
