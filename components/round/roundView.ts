import type { RoundResponse, RoundSetResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';

/** What one tap does in a round: it feeds one set after another, beside the other taps. */
export interface TapView {
  tapId: string;
  /** The set whose water runs; null between two sets. */
  running: RoundSetResponse | null;
  /** The set that comes when the hose is moved. */
  next: RoundSetResponse | null;
  /** Time until the running set ends; below zero when it is over [s]. */
  secondsLeft: number | null;
  /** Part of the running set's time that has passed, 0 to 1. */
  share: number;
  /** When somebody has to be at this tap: the end of the running set, or the time at which the next was planned to begin. */
  wantedAtMs: number;
}

export interface RoundView {
  /** Taps that still have something to do, the one that needs a hand first at the front. */
  taps: TapView[];
  /** Place of the front tap's running set (or of the last set done), from 1. */
  place: number;
  count: number;
}

function tapView(tapId: string, sets: readonly RoundSetResponse[], now: Date, lateMs: number): TapView | null {
  const running = sets.find((set) => set.status === 'running') ?? null;
  const next = sets.find((set) => set.status === 'waiting') ?? null;
  if (running === null && next === null) {
    return null;
  }
  const startMs = running?.startedAt ? Date.parse(running.startedAt) : null;
  const endMs = running?.endsAt ? Date.parse(running.endsAt) : null;
  const share = startMs === null || endMs === null || endMs <= startMs ? 0 : Math.min(1, Math.max(0, (now.getTime() - startMs) / (endMs - startMs)));
  return {
    tapId, running, next, share, secondsLeft: endMs === null ? null : Math.round((endMs - now.getTime()) / 1000),
    wantedAtMs: endMs ?? Date.parse(next?.plannedStartAt ?? '') + lateMs,
  };
}

/** What of a round counts at this moment. A round that was started late, or early, is later or earlier in all its parts. */
export function viewRound(round: RoundResponse, now: Date): RoundView {
  const sets = [...round.sets].sort((a, b) => a.sortOrder - b.sortOrder);
  const lateMs = Date.parse(round.startedAt) - Math.min(...sets.map((set) => Date.parse(set.plannedStartAt)));
  const taps = [...new Set(sets.map((set) => set.tapId))]
    .map((tapId) => tapView(tapId, sets.filter((set) => set.tapId === tapId), now, lateMs))
    .filter((tap) => tap !== null)
    .sort((a, b) => a.wantedAtMs - b.wantedAtMs);
  const running = taps[0]?.running ?? null;
  const counted = sets.filter((set) => set.status !== 'skipped');
  const finished = counted.filter((set) => set.status === 'done' || set.status === 'cut_short').length;
  return { taps, place: running ? counted.indexOf(running) + 1 : finished, count: counted.length };
}

/** 'Zone, position' of a set, or the position alone when both carry one name. */
export function setTitle(set: RoundSetResponse, yard: YardResponse): string {
  const zone = yard.zones.find((one) => one.id === set.zoneId)?.name;
  const position = yard.positions.find((one) => one.id === set.positionId)?.name;
  if (zone === undefined || position === undefined) {
    return position ?? zone ?? 'Position';
  }
  return zone === position ? zone : `${zone}, ${position}`;
}

/** Minutes and seconds as a countdown shows them: '12:40', and '1:02:40' from an hour on. Sign left out. */
export function countdownText(seconds: number): string {
  const whole = Math.abs(Math.trunc(seconds));
  const pad = (value: number) => String(value).padStart(2, '0');
  const hours = Math.floor(whole / 3600);
  const minutes = Math.floor((whole % 3600) / 60);
  return hours > 0 ? `${hours}:${pad(minutes)}:${pad(whole % 60)}` : `${minutes}:${pad(whole % 60)}`;
}
