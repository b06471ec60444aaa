import { endOfDayDepletionMm } from './patchBalance';
import type { DayContext } from './planDayContext';
import { planDefaults } from './planDefaults';
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

export type WateringWish = 'due' | 'hold_for_rain' | 'wait';

/**
 * Whether a patch wants water today: yes when with expected rain it would pass its refill line before the next day that offers hours; held when only
 * dry weather would take it there and being wrong costs little.
 */
export function wateringWish(patch: Patch, outlook: PatchOutlook): WateringWish {
  const line = patch.zone.refillLineMm;
  if (outlook.expectedAtNextMm > line) {
    return 'due';
  }
  if (outlook.dryAtNextMm <= line) {
    return 'wait';
  }
  const bearable = line + planDefaults.holdRiskShare * (patch.zone.totalAvailableMm - line);
  return outlook.dryAtNextMm <= bearable ? 'hold_for_rain' : 'due';
}

/** The least depth worth a set on a patch [mm]: the default, or half the refill line where the soil holds little. */
export function leastWorthMm(patch: Patch): number {
  return Math.min(planDefaults.leastSetDepthMm, patch.zone.refillLineMm / 2);
}

/**
 * Depth to give today: up to full, less room for rain expected today and tomorrow, but enough to reach the next open day without any rain and to be
 * worth the walk.
 * @returns net depth [mm], 0 to the depletion
 */
export function wantedDepthMm(patch: Patch, contexts: readonly DayContext[], index: number, outlook: PatchOutlook): { wantedMm: number; roomForRainMm: number } {
  const today = contexts[index];
  const tomorrow = contexts[index + 1];
  const demandMm = patch.zone.demandMmByDay[index] ?? 0;
  const rainTodayMm = today?.expectedRainMm ?? 0;
  const rainBothMm = rainTodayMm + (tomorrow?.expectedRainMm ?? 0);
  const roomForRainMm = Math.max(0, rainTodayMm, rainBothMm - demandMm);
  const needMm = Math.max(0, Math.min(patch.depletionMm, outlook.dryAtNextMm - patch.zone.refillLineMm));
  const wantedMm = Math.min(patch.depletionMm, Math.max(needMm, leastWorthMm(patch), patch.depletionMm - roomForRainMm));
  return { wantedMm, roomForRainMm: patch.depletionMm - wantedMm };
}
