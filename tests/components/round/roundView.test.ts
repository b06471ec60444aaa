import { countdownText, viewRound } from '@/components/round/roundView';
import type { RoundResponse, RoundSetResponse } from '@/shared/contracts/rounds';

const id = (n: number): string => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;
const at = (clock: string): string => `2026-06-13T${clock}:00.000Z`;
const front = id(101);
const back = id(102);

function set(n: number, tapId: string, plannedAt: string, change: Partial<RoundSetResponse> = {}): RoundSetResponse {
  return {
    id: id(n), roundId: id(1), zoneId: id(50 + n), positionId: id(70 + n), tapId, kind: 'set', sortOrder: n, plannedStartAt: at(plannedAt), plannedMinutes: 40, addedMinutes: 0,
    status: 'waiting', skipCause: null, startedAt: null, endsAt: null, endedAt: null, minutesRun: null, rateMmPerHour: 6, halfWay: false, wantedMm: 4, gaveMm: null, ...change,
  };
}

function round(sets: RoundSetResponse[], startedAt = '10:00'): RoundResponse {
  return { id: id(1), on: '2026-06-13', roundIndex: 0, status: 'running', startedBy: null, startedAt: at(startedAt), waterOffBy: null, waterOffAt: null, endedAt: null, sets, now: at(startedAt) };
}

const runs = (from: string, until: string): Partial<RoundSetResponse> => ({ status: 'running', startedAt: at(from), endsAt: at(until) });

describe('a round as a person sees it', () => {
  it('counts down the running set and names the next on one tap', () => {
    const view = viewRound(round([set(1, front, '10:00', runs('10:00', '10:40')), set(2, front, '10:45')]), new Date(at('10:30')));
    expect(view).toMatchObject({ place: 1, count: 2, taps: [{ tapId: front, secondsLeft: 600, share: 0.75, running: { id: id(1) }, next: { id: id(2) } }] });
  });

  it('puts the tap that needs a hand first in front, and keeps the other beside it', () => {
    const sets = [set(1, front, '10:00', runs('10:00', '10:40')), set(2, back, '10:00', runs('10:05', '10:35')), set(3, front, '10:45')];
    const view = viewRound(round(sets), new Date(at('10:20')));
    expect(view.taps.map((tap) => [tap.tapId, tap.running?.id, tap.next?.id])).toEqual([[back, id(2), undefined], [front, id(1), id(3)]]);
    expect(view.place).toBe(2);
  });

  it('moves the planned start of a second tap by as much as the round was late', () => {
    const sets = [set(1, front, '10:00', runs('10:20', '11:00')), set(2, back, '10:10')];
    const [first] = viewRound(round(sets, '10:20'), new Date(at('10:21'))).taps;
    expect(first).toMatchObject({ tapId: back, running: null, secondsLeft: null, wantedAtMs: Date.parse(at('10:30')) });
  });

  it('leaves a tap out when it has nothing more to do, and has none when all is done', () => {
    const done = { status: 'done', startedAt: at('10:00'), endedAt: at('10:40'), minutesRun: 40, gaveMm: 4 } as const;
    expect(viewRound(round([set(1, front, '10:00', done), set(2, back, '10:00', runs('10:05', '10:45'))]), new Date(at('10:41'))).taps.map((tap) => tap.tapId)).toEqual([back]);
    expect(viewRound(round([set(1, front, '10:00', done), set(2, front, '10:45', { status: 'skipped', skipCause: 'rain' })]), new Date(at('10:41')))).toEqual({ taps: [], place: 1, count: 1 });
  });

  it('writes time as people read it', () => {
    expect([0, 59, 760, 3_760, -65].map(countdownText)).toEqual(['0:00', '0:59', '12:40', '1:02:40', '1:05']);
  });
});
