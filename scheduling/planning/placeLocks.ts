import type { DayTimeline } from './dayTimeline';
import type { DayContext } from './planDayContext';
import type { PlanJob } from './planSeedDoses';
import { reason } from './reasonNumbers';
import type { PlanInput, PlanLock, Reason } from './types';
import { windowHolding } from './minuteWindows';
import type { WaterLedger } from './waterLedger';
import { byText, isSeeded, type Patch } from './yardPatches';

/** What stands in the way of a fixed set. */
export type LockObstacle = 'position' | 'past' | 'closed' | 'home' | 'taken' | 'volume';

/**
 * Places the sets that people fixed, exactly where they fixed them. What is impossible is named and left out.
 * @param timelines - the days; changed
 * @returns reasons for sets that cannot be kept
 */
export function placeLocks(input: PlanInput, contexts: readonly DayContext[], patches: readonly Patch[], timelines: readonly DayTimeline<PlanJob>[], ledger: WaterLedger): Reason[] {
  const impossible: Reason[] = [];
  const locks = [...(input.lockedSets ?? [])].sort((a, b) => byText(a.on, b.on) || a.startMinutes - b.startMinutes || byText(a.positionId, b.positionId));
  for (const lock of locks) {
    const obstacle = placeLock(input, contexts, patches, timelines, ledger, lock);
    if (obstacle) {
      const position = input.positions.find((each) => each.id === lock.positionId);
      impossible.push(reason('lock_impossible', { position: position?.name ?? lock.positionId, positionId: lock.positionId, on: lock.on, startMinutes: lock.startMinutes, limit: obstacle }));
    }
  }
  return impossible;
}

function placeLock(input: PlanInput, contexts: readonly DayContext[], patches: readonly Patch[], timelines: readonly DayTimeline<PlanJob>[], ledger: WaterLedger, lock: PlanLock): LockObstacle | null {
  const context = contexts.find((each) => each.day.on === lock.on);
  const patch = patches.find((each) => each.position.id === lock.positionId);
  if (!patch) {
    return 'position';
  }
  if (!context || (context.index === 0 && lock.startMinutes < (input.notBeforeMinutes ?? 0))) {
    return 'past';
  }
  const ground = context.groundOf(patch.zone.id, isSeeded(patch.zone), patch.position.device);
  const endMinutes = lock.startMinutes + lock.minutes;
  if (ground.closed !== null || !windowHolding(ground.openWindows, lock.startMinutes, endMinutes)) {
    return 'closed';
  }
  const endsUnattended = patch.tap.shutOffTimer && !ground.mustBeAttended;
  if (!windowHolding(context.homeWindows, lock.startMinutes - input.leadMinutes, endsUnattended ? lock.startMinutes + 1 : endMinutes)) {
    return 'home';
  }
  if (ledger.refusal(patch, context.index, lock.minutes)) {
    return 'volume';
  }
  const seeded = isSeeded(patch.zone);
  const placed = timelines[context.index]?.placeEarliest({
    patch, kind: seeded ? 'dose' : 'set', locked: true, minutes: lock.minutes, positionId: patch.position.id, tapId: patch.tap.id, flowLpm: patch.tap.flowLpm,
    reasons: [reason('locked', { minutes: lock.minutes, startMinutes: lock.startMinutes })],
    openWindows: ground.openWindows, homeWindows: context.homeWindows, endsUnattended, earliestStartMinutes: lock.startMinutes, latestStartMinutes: lock.startMinutes,
  });
  if (!placed) {
    return 'taken';
  }
  ledger.take(patch, context.index, lock.minutes);
  return null;
}
