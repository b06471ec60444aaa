import type { RoundSetView, RoundView } from '@/server/readModels/rounds';
import type { RoundResponse, RoundSetResponse } from '@/shared/contracts/rounds';

const iso = (instant: Date | string | null): string | null => (instant === null ? null : new Date(instant).toISOString());
const isoOf = (instant: Date | string): string => new Date(instant).toISOString();

function presentSet(set: RoundSetView): RoundSetResponse {
  const runs = set.status === 'running' && set.startedAt !== null;
  return {
    id: set.id, roundId: set.roundId, zoneId: set.zoneId, positionId: set.positionId, tapId: set.tapId, kind: set.kind, sortOrder: set.sortOrder,
    plannedStartAt: isoOf(set.plannedStartAt), plannedMinutes: set.plannedMinutes, addedMinutes: set.addedMinutes, status: set.status, skipCause: set.skipCause,
    startedAt: iso(set.startedAt), endedAt: iso(set.endedAt),
    endsAt: runs ? new Date(new Date(set.startedAt ?? 0).getTime() + (set.plannedMinutes + set.addedMinutes) * 60_000).toISOString() : null,
    minutesRun: set.minutesRun, rateMmPerHour: set.rateMmPerHour, halfWay: set.halfWay,
    wantedMm: ((set.plannedMinutes + set.addedMinutes) * set.rateMmPerHour) / 60 / set.runTimeMultiplier,
    gaveMm: set.appliedMm === null ? null : set.appliedMm / set.runTimeMultiplier,
  };
}

/** A round for the screens, with the server's time, so that every device counts down to the same moment. */
export function presentRound(round: RoundView, now: Date): RoundResponse {
  return {
    id: round.id, on: round.on, roundIndex: round.roundIndex, status: round.status,
    startedBy: round.startedBy && { id: round.startedBy.id, name: round.startedBy.name }, startedAt: isoOf(round.startedAt),
    waterOffBy: round.waterOffBy && { id: round.waterOffBy.id, name: round.waterOffBy.name }, waterOffAt: iso(round.waterOffAt), endedAt: iso(round.endedAt),
    sets: round.sets.map(presentSet), now: now.toISOString(),
  };
}
