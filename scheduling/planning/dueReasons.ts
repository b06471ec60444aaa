import type { PatchOutlook } from './patchOutlook';
import type { DayContext } from './planDayContext';
import { planDefaults } from './planDefaults';
import { reason } from './reasonNumbers';
import type { Reason } from './types';
import type { Patch } from './yardPatches';

/** The first day from a given one on which the plan counts on notable rain; null when none does. */
export function notableRainIndex(contexts: readonly DayContext[], index: number): number | null {
  return contexts.find((context) => context.index >= index && context.expectedRainMm >= planDefaults.notableRainMm)?.index ?? null;
}

/** Why a patch is due: already past its refill line, or about to pass it before the next open day. */
export function whyDue(contexts: readonly DayContext[], context: DayContext, patch: Patch, outlook: PatchOutlook): Reason {
  const numbers = { depletionMm: patch.depletionMm, refillLineMm: patch.zone.refillLineMm, on: context.day.on };
  if (patch.depletionMm > patch.zone.refillLineMm) {
    return reason('past_line', numbers);
  }
  return reason('due', {
    ...numbers,
    crossesOn: outlook.crossesIndex === null ? '' : contexts[outlook.crossesIndex]?.day.on ?? '',
    nextOpenOn: contexts[outlook.nextIndex]?.day.on ?? '',
  });
}

/** How a patch that gets nothing stands against its refill line. `nextOn` is filled in when the whole plan is known. */
export function standing(depletionMm: number, refillLineMm: number, on: string): Reason {
  const numbers = { depletionMm, refillLineMm, on };
  return depletionMm > refillLineMm ? reason('past_line', numbers) : reason('above_line', { ...numbers, nextOn: '' });
}
