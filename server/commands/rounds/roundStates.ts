import { AppError, invalidField } from '@/server/errors';
import type { RoundSetStatus, RoundStatus, SkipCause } from '@/shared/contracts/rounds';

/** One set of a started round. Times are instants; lengths are minutes of running water. */
export interface RoundSetState {
  id: string;
  /** Sets of different taps run beside each other; a tap feeds one at a time. */
  tapId: string;
  /** The tap shuts itself off when the set time is over. */
  endsByItself: boolean;
  status: RoundSetStatus;
  sortOrder: number;
  plannedMinutes: number;
  addedMinutes: number;
  rateMmPerHour: number;
  startedAt: Date | null;
  endedAt: Date | null;
  minutesRun: number | null;
  /** Mean depth laid down on the position's patch, before any loss [mm]. */
  appliedMm: number | null;
  skipCause: SkipCause | null;
}

export interface RoundState {
  status: RoundStatus;
  endedAt: Date | null;
  sets: RoundSetState[];
}

export type RoundAction =
  | { action: 'moved'; setId: string }
  | { action: 'add_minutes'; setId: string; minutes: number }
  | { action: 'cut_short'; setId: string }
  | { action: 'skip'; setId: string; cause: SkipCause }
  | { action: 'water_off' };

/** A set that ends less than this before its time is done, not cut short [min]: nobody stands there with a stopwatch. */
const AS_GOOD_AS_DONE_MINUTES = 1;
/** A set cannot be made longer than a day [min]. */
const LONGEST_SET_MINUTES = 1_440;

/** When the running set's time is over; null for a set that does not run. */
export function endsAtOf(set: RoundSetState): Date | null {
  return set.status === 'running' && set.startedAt !== null ? new Date(set.startedAt.getTime() + (set.plannedMinutes + set.addedMinutes) * 60_000) : null;
}

/** Sets in the order in which they are to be done. */
export function inOrder(sets: readonly RoundSetState[]): RoundSetState[] {
  return [...sets].sort((a, b) => a.sortOrder - b.sortOrder);
}

/** A round as it begins: the water of its first set is on. */
export function startedRound(sets: readonly RoundSetState[], at: Date): RoundState {
  const first = inOrder(sets)[0];
  return { status: 'running', endedAt: null, sets: sets.map((set) => (set.id === first?.id ? running(set, at) : set)) };
}

/**
 * The round after somebody said what happened at an instant. What ran is reckoned from the instants alone.
 * A second telling of the same thing changes nothing.
 * @throws AppError round_not_running after the water is off, set_not_in_state when the set cannot do that, not_found for a set of another round
 */
export function afterAction(round: RoundState, action: RoundAction, at: Date): RoundState {
  if (round.status === 'ended') {
    if (action.action === 'water_off') {
      return round;
    }
    throw new AppError('round_not_running', 'This round has ended: the water is off.');
  }
  switch (action.action) {
    case 'moved':
      return moved(round, action.setId, at);
    case 'add_minutes': {
      const set = setIn(round, action.setId, ['running']);
      if (set.plannedMinutes + set.addedMinutes + action.minutes > LONGEST_SET_MINUTES) {
        throw invalidField('minutes', 'A set cannot run for more than a day.');
      }
      return withSets(round, { ...set, addedMinutes: set.addedMinutes + action.minutes });
    }
    case 'cut_short': {
      const set = setIn(round, action.setId, ['running', 'cut_short', 'done']);
      return set.status === 'running' ? withSets(round, ended(set, at)) : round;
    }
    case 'skip': {
      const set = setIn(round, action.setId, ['waiting', 'skipped']);
      return set.status === 'skipped' ? round : withSets(round, { ...set, status: 'skipped', skipCause: action.cause });
    }
    case 'water_off':
      return {
        status: 'ended', endedAt: at,
        sets: round.sets.map((set) => (set.status === 'running' ? ended(set, at) : set.status === 'waiting' ? { ...set, status: 'skipped', skipCause: 'other' } : set)),
      };
  }
}

/** The hose stands at the position of the set that begins; what ran on its tap until now has ended. */
function moved(round: RoundState, setId: string, at: Date): RoundState {
  const next = setIn(round, setId, ['waiting', 'running']);
  if (next.status === 'running') {
    return round;
  }
  const before = round.sets.find((set) => set.tapId === next.tapId && set.status === 'running');
  return withSets(round, running(next, at), ...(before ? [ended(before, at)] : []));
}

function running(set: RoundSetState, at: Date): RoundSetState {
  return { ...set, status: 'running', startedAt: at };
}

/** The set after its water went to another position or off. */
function ended(set: RoundSetState, at: Date): RoundSetState {
  const wantedMinutes = set.plannedMinutes + set.addedMinutes;
  const elapsedMinutes = Math.max(0, (at.getTime() - (set.startedAt ?? at).getTime()) / 60_000);
  const minutesRun = set.endsByItself ? Math.min(elapsedMinutes, wantedMinutes) : elapsedMinutes;
  return {
    ...set,
    status: minutesRun > wantedMinutes - AS_GOOD_AS_DONE_MINUTES ? 'done' : 'cut_short',
    endedAt: at, minutesRun, appliedMm: (set.rateMmPerHour * minutesRun) / 60,
  };
}

function setIn(round: RoundState, setId: string, statuses: readonly RoundSetStatus[]): RoundSetState {
  const set = round.sets.find((candidate) => candidate.id === setId);
  if (set === undefined) {
    throw new AppError('not_found', 'That set is not part of this round.');
  }
  if (!statuses.includes(set.status)) {
    throw new AppError('set_not_in_state', `That set is ${set.status.replace('_', ' ')}, so this cannot be done with it.`);
  }
  return set;
}

function withSets(round: RoundState, ...changed: RoundSetState[]): RoundState {
  return { ...round, sets: round.sets.map((set) => changed.find((candidate) => candidate.id === set.id) ?? set) };
}
