import { NEW_OUTING_MINUTES, setupMinutesBefore, type PlacedJob, type TimelineHabits } from './dayTimeline';
import type { PlanJob } from './planSeedDoses';
import type { PlannedRound, PlannedSet } from './types';
import { netDepthMm } from './yardPatches';

/**
 * Groups the runs of a day into rounds: a run belongs to the round before it unless the pause since that round ended is longer than NEW_OUTING_MINUTES.
 * @param placed - the day's runs by start
 */
export function roundsOfDay(habits: TimelineHabits, on: string, placed: readonly PlacedJob<PlanJob>[]): PlannedRound[] {
  const rounds: PlannedRound[] = [];
  const lastOnTap = new Map<string, { positionId: string; endMinutes: number; round: PlannedRound }>();
  const pause = Math.max(NEW_OUTING_MINUTES, habits.leadMinutes);
  placed.forEach(({ job, startMinutes, endMinutes }, index) => {
    const before = lastOnTap.get(job.tapId) ?? null;
    const setup = setupMinutesBefore(before, { positionId: job.positionId, startMinutes }, habits);
    const netMm = netDepthMm(job.patch, job.minutes);
    const set: PlannedSet = {
      positionId: job.positionId, zoneId: job.patch.zone.id, tapId: job.tapId, kind: job.kind,
      startMinutes, minutes: job.minutes,
      depthMm: netMm, grossMm: netMm * job.patch.position.runTimeMultiplier, litres: job.minutes * job.patch.tap.flowLpm,
      order: index + 1, reasons: job.reasons, ...(job.halfWay ? { halfWay: true } : {}), ...(job.locked ? { locked: true } : {}),
    };
    let round = rounds[rounds.length - 1];
    if (!round || startMinutes - round.endMinutes > pause) {
      round = { on, startMinutes: startMinutes - setup, endMinutes, sets: [], moves: [] };
      rounds.push(round);
    }
    round.startMinutes = Math.min(round.startMinutes, startMinutes - setup);
    round.endMinutes = Math.max(round.endMinutes, endMinutes);
    round.sets.push(set);
    if (before && before.round === round && before.positionId !== job.positionId) {
      round.moves.push({ tapId: job.tapId, startMinutes: startMinutes - setup, minutes: setup, fromPositionId: before.positionId, toPositionId: job.positionId });
    }
    lastOnTap.set(job.tapId, { positionId: job.positionId, endMinutes, round });
  });
  return rounds;
}
