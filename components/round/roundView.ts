import type { RoundResponse, RoundSetResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';

export interface RoundView {
  /** The set whose water runs; null between two sets. */
  running: RoundSetResponse | null;
  /** The set that comes when the hose is moved. */
  next: RoundSetResponse | null;
  /** Place of the running (or the last) set, from 1. */
  place: number;
  count: number;
  /** Time until the running set ends; below zero when it is over [s]. */
  secondsLeft: number | null;
  /** Part of the running set's time that has passed, 0 to 1. */
  share: number;
}

/** What of a round counts at this moment. */
export function viewRound(round: RoundResponse, now: Date): RoundView {
  const sets = [...round.sets].sort((a, b) => a.sortOrder - b.sortOrder);
  const running = sets.find((set) => set.status === 'running') ?? null;
  const next = sets.find((set) => set.status === 'waiting') ?? null;
  const finished = sets.filter((set) => set.status !== 'waiting' && set.status !== 'running').length;
  const counted = sets.filter((set) => set.status !== 'skipped');
  const place = running ? counted.indexOf(running) + 1 : Math.min(finished, counted.length);
  const startMs = running?.startedAt ? Date.parse(running.startedAt) : null;
  const endMs = running?.endsAt ? Date.parse(running.endsAt) : null;
  const secondsLeft = endMs === null ? null : Math.round((endMs - now.getTime()) / 1000);
  const share = startMs === null || endMs === null || endMs <= startMs ? 0 : Math.min(1, Math.max(0, (now.getTime() - startMs) / (endMs - startMs)));
  return { running, next, place, count: counted.length, secondsLeft, share };
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
