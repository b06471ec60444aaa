import fc from 'fast-check';
import { afterAction, endsAtOf, startedRound, type RoundAction, type RoundSetState, type RoundState } from '@/server/commands/rounds/roundStates';
import { AppError } from '@/server/errors';

const start = new Date('2026-06-13T10:00:00Z');
const at = (minutes: number) => new Date(start.getTime() + minutes * 60_000);

function waitingSet(id: string, sortOrder: number, changes: Partial<RoundSetState> = {}): RoundSetState {
  return {
    id, tapId: 'tap', endsByItself: false, status: 'waiting', sortOrder, plannedMinutes: 45, addedMinutes: 0, rateMmPerHour: 12, startedAt: null, endedAt: null,
    minutesRun: null, appliedMm: null, skipCause: null, ...changes,
  };
}

const round = (...sets: RoundSetState[]): RoundState => startedRound(sets, start);
const setOf = (state: RoundState, id: string) => state.sets.find((set) => set.id === id)!;
const codeOf = (work: () => unknown): string => {
  try {
    work();
    return 'nothing thrown';
  } catch (error) {
    return error instanceof AppError ? error.code : String(error);
  }
};

describe('a round', () => {
  it('begins with the water of its first set on', () => {
    const state = round(waitingSet('b', 2), waitingSet('a', 1));
    expect(setOf(state, 'a')).toMatchObject({ status: 'running', startedAt: start });
    expect(setOf(state, 'b').status).toBe('waiting');
    expect(endsAtOf(setOf(state, 'a'))).toEqual(at(45));
  });

  it('ends the set that ran when the hose was moved, with the minutes of the clock and their depth', () => {
    const state = afterAction(round(waitingSet('a', 1), waitingSet('b', 2)), { action: 'moved', setId: 'b' }, at(46));
    // 46 min at 12 mm/h are 46 × 12 / 60 = 9.2 mm
    expect(setOf(state, 'a')).toMatchObject({ status: 'done', endedAt: at(46), minutesRun: 46 });
    expect(setOf(state, 'a').appliedMm).toBeCloseTo(9.2, 10);
    expect(setOf(state, 'b')).toMatchObject({ status: 'running', startedAt: at(46) });
  });

  it('is not changed by a second tap on moved', () => {
    const once = afterAction(round(waitingSet('a', 1), waitingSet('b', 2), waitingSet('c', 3)), { action: 'moved', setId: 'b' }, at(46));
    expect(afterAction(once, { action: 'moved', setId: 'b' }, at(46.1))).toBe(once);
  });

  it('counts a move long before the time as cut short', () => {
    const state = afterAction(round(waitingSet('a', 1), waitingSet('b', 2)), { action: 'moved', setId: 'b' }, at(20));
    expect(setOf(state, 'a')).toMatchObject({ status: 'cut_short', minutesRun: 20 });
  });

  it('runs ten minutes longer when asked', () => {
    const state = afterAction(round(waitingSet('a', 1)), { action: 'add_minutes', setId: 'a', minutes: 10 }, at(30));
    expect(endsAtOf(setOf(state, 'a'))).toEqual(at(55));
    expect(setOf(afterAction(state, { action: 'water_off' }, at(45)), 'a').status).toBe('cut_short');
  });

  it('lets a set be cut short and the next begin with the move', () => {
    const cut = afterAction(round(waitingSet('a', 1), waitingSet('b', 2)), { action: 'cut_short', setId: 'a' }, at(12));
    expect(setOf(cut, 'a')).toMatchObject({ status: 'cut_short', minutesRun: 12 });
    expect(cut.status).toBe('running');
    const on = afterAction(cut, { action: 'moved', setId: 'b' }, at(15));
    expect(setOf(on, 'a')).toMatchObject({ minutesRun: 12 });
    expect(setOf(on, 'b')).toMatchObject({ status: 'running', startedAt: at(15) });
  });

  it('counts a set as done that is ended at its time, with the move still to come', () => {
    const over = afterAction(round(waitingSet('a', 1), waitingSet('b', 2)), { action: 'cut_short', setId: 'a' }, at(45));
    expect(setOf(over, 'a')).toMatchObject({ status: 'done', minutesRun: 45 });
  });

  it('ends when the water is off; what still waited was left out', () => {
    const state = afterAction(round(waitingSet('a', 1), waitingSet('b', 2)), { action: 'water_off' }, at(45));
    expect(state).toMatchObject({ status: 'ended', endedAt: at(45) });
    expect(setOf(state, 'b')).toMatchObject({ status: 'skipped', minutesRun: null, appliedMm: null });
    expect(afterAction(state, { action: 'water_off' }, at(50))).toBe(state);
    expect(codeOf(() => afterAction(state, { action: 'moved', setId: 'b' }, at(50)))).toBe('round_not_running');
  });

  it('counts no more than its time where the tap shuts itself off', () => {
    const state = afterAction(round(waitingSet('a', 1, { endsByItself: true })), { action: 'water_off' }, at(300));
    expect(setOf(state, 'a')).toMatchObject({ status: 'done', minutesRun: 45, endedAt: at(300) });
    const open = afterAction(round(waitingSet('a', 1)), { action: 'water_off' }, at(300));
    expect(setOf(open, 'a').minutesRun).toBe(300);
  });

  it('keeps two taps apart: a move on one leaves the other running', () => {
    const state = round(waitingSet('a', 1), waitingSet('b', 2, { tapId: 'other' }), waitingSet('c', 3));
    const both = afterAction(state, { action: 'moved', setId: 'b' }, at(5));
    expect(setOf(both, 'a').status).toBe('running');
    expect(setOf(both, 'b').status).toBe('running');
    const later = afterAction(both, { action: 'moved', setId: 'c' }, at(45));
    expect([setOf(later, 'a').status, setOf(later, 'b').status, setOf(later, 'c').status]).toEqual(['done', 'running', 'running']);
  });

  it('refuses what a set cannot do', () => {
    const state = round(waitingSet('a', 1), waitingSet('b', 2));
    expect(codeOf(() => afterAction(state, { action: 'add_minutes', setId: 'b', minutes: 10 }, at(1)))).toBe('set_not_in_state');
    expect(codeOf(() => afterAction(state, { action: 'cut_short', setId: 'b' }, at(1)))).toBe('set_not_in_state');
    expect(codeOf(() => afterAction(state, { action: 'skip', setId: 'a', cause: 'rain' }, at(1)))).toBe('set_not_in_state');
    expect(codeOf(() => afterAction(state, { action: 'moved', setId: 'elsewhere' }, at(1)))).toBe('not_found');
    const skipped = afterAction(state, { action: 'skip', setId: 'b', cause: 'rain' }, at(1));
    expect(codeOf(() => afterAction(skipped, { action: 'moved', setId: 'b' }, at(1)))).toBe('set_not_in_state');
    expect(codeOf(() => afterAction(state, { action: 'add_minutes', setId: 'a', minutes: 1_440 }, at(1)))).toBe('invalid_input');
  });

  it('holds its invariants whatever is said in whatever order', () => {
    const ids = ['a', 'b', 'c', 'd'];
    const action: fc.Arbitrary<RoundAction> = fc.oneof(
      fc.constantFrom(...ids).map((setId) => ({ action: 'moved' as const, setId })),
      fc.record({ action: fc.constant('add_minutes' as const), setId: fc.constantFrom(...ids), minutes: fc.integer({ min: 1, max: 120 }) }),
      fc.constantFrom(...ids).map((setId) => ({ action: 'cut_short' as const, setId })),
      fc.constantFrom(...ids).map((setId) => ({ action: 'skip' as const, setId, cause: 'rain' as const })),
      fc.constant({ action: 'water_off' as const }),
    );
    fc.assert(fc.property(fc.array(fc.tuple(action, fc.double({ min: 0, max: 90, noNaN: true })), { maxLength: 20 }), (steps) => {
      let state = round(waitingSet('a', 1), waitingSet('b', 2, { tapId: 'other' }), waitingSet('c', 3), waitingSet('d', 4, { tapId: 'other' }));
      let minutes = 0;
      for (const [step, wait] of steps) {
        minutes += wait;
        try {
          state = afterAction(state, step, at(minutes));
        } catch (error) {
          expect(error).toBeInstanceOf(AppError);
        }
        for (const tapId of ['tap', 'other']) {
          expect(state.sets.filter((set) => set.tapId === tapId && set.status === 'running').length).toBeLessThanOrEqual(1);
          const run = state.sets.filter((set) => set.tapId === tapId).reduce((sum, set) => sum + (set.minutesRun ?? 0), 0);
          // one tap cannot have run for longer than the round
          expect(run).toBeLessThanOrEqual(minutes + 1e-6);
        }
        for (const set of state.sets) {
          const over = set.status === 'done' || set.status === 'cut_short';
          expect(set.minutesRun !== null && set.appliedMm !== null && set.endedAt !== null).toBe(over);
          expect(set.appliedMm ?? 0).toBeCloseTo(((set.minutesRun ?? 0) * set.rateMmPerHour) / 60, 9);
        }
        if (state.status === 'ended') {
          expect(state.sets.some((set) => set.status === 'running' || set.status === 'waiting')).toBe(false);
        }
      }
    }), { numRuns: 300 });
  });
});
