import { windowHolding } from './minuteWindows';
import type { MinuteWindow, PlanSupply } from './types';

/** After a pause longer than this on a tap [min], the next set is a new outing and needs its minutes to get ready again. */
export const NEW_OUTING_MINUTES = 45;

/** One run of one sprinkler position, wanted somewhere in a day. */
export interface TimelineJob {
  positionId: string;
  tapId: string;
  /** Flow of the tap [L/min]. */
  flowLpm: number;
  /** Whole minutes of water. */
  minutes: number;
  /** Minutes when water may run. */
  openWindows: readonly MinuteWindow[];
  /** Minutes when somebody is there to start, move and stop. */
  homeWindows: readonly MinuteWindow[];
  /** The tap shuts itself off, so nobody has to be there at the end. */
  endsUnattended: boolean;
  earliestStartMinutes: number;
  latestStartMinutes: number;
}

export interface PlacedJob<J extends TimelineJob = TimelineJob> {
  job: J;
  startMinutes: number;
  endMinutes: number;
}

export interface TimelineHabits {
  leadMinutes: number;
  /** The longest move there is [min]. */
  longestMoveMinutes: number;
  /** Minutes to shift the hose from one position to another; 0 to the same one. */
  moveBetween(fromPositionId: string, toPositionId: string): number;
  /** What the taps draw from together; null where nothing limits it. */
  supply: PlanSupply | null;
}

/**
 * Minutes of work before a set: getting ready for the first set of an outing, a move to another position, nothing for the same position again.
 * @param before - the set before it on the same tap that day, null for none
 */
export function setupMinutesBefore(
  before: { positionId: string; endMinutes: number } | null,
  set: { positionId: string; startMinutes: number },
  habits: TimelineHabits,
): number {
  if (before === null) {
    return habits.leadMinutes;
  }
  const move = habits.moveBetween(before.positionId, set.positionId);
  const isNewOuting = set.startMinutes - before.endMinutes > Math.max(NEW_OUTING_MINUTES, habits.leadMinutes);
  return isNewOuting ? Math.max(move, habits.leadMinutes) : move;
}

/**
 * The sets of one day, laid out so that a tap feeds one sprinkler at a time, every move and every getting ready has its minutes while somebody is
 * at home, and one person does one such thing at a time, even with two taps.
 */
export class DayTimeline<J extends TimelineJob = TimelineJob> {
  /** By start. */
  private readonly placed: PlacedJob<J>[] = [];

  constructor(readonly habits: TimelineHabits) {}

  /** Everything placed so far, by start. */
  all(): PlacedJob<J>[] {
    return [...this.placed];
  }

  /** Places the job as early as it can be, or returns null and changes nothing. */
  placeEarliest(job: J): PlacedJob<J> | null {
    const start = this.earliestStart(job);
    return start === null ? null : this.add(job, start);
  }

  /** Places the job as near as can be to a wanted start; of two equally near the earlier. */
  placeNearest(job: J, atMinutes: number): PlacedJob<J> | null {
    const starts = [...this.candidateStarts(job), ...this.latestStarts(job), Math.round(atMinutes)];
    starts.sort((a, b) => Math.abs(a - atMinutes) - Math.abs(b - atMinutes) || a - b);
    const start = starts.find((candidate) => this.canStart(job, candidate));
    return start === undefined ? null : this.add(job, start);
  }

  /** Places as many whole minutes of the job as fit in one run, at least `leastMinutes`, or returns null. */
  placeLongest(job: J, leastMinutes: number): PlacedJob<J> | null {
    const whole = job.minutes >= leastMinutes ? this.placeEarliest(job) : null;
    if (whole) {
      return whole;
    }
    let low = leastMinutes;
    if (low > job.minutes || this.earliestStart({ ...job, minutes: low }) === null) {
      return null;
    }
    let high = job.minutes;
    while (low < high) {
      const middle = Math.ceil((low + high) / 2);
      if (this.earliestStart({ ...job, minutes: middle }) === null) {
        high = middle - 1;
      } else {
        low = middle;
      }
    }
    return this.placeEarliest({ ...job, minutes: low });
  }

  private add(job: J, startMinutes: number): PlacedJob<J> {
    const placed = { job, startMinutes, endMinutes: startMinutes + job.minutes };
    const isBefore = (other: PlacedJob<J>) => other.startMinutes < startMinutes || (other.startMinutes === startMinutes && other.job.positionId < job.positionId);
    this.placed.splice(this.placed.filter(isBefore).length, 0, placed);
    return placed;
  }

  private earliestStart(job: J): number | null {
    const starts = this.candidateStarts(job).sort((a, b) => a - b);
    return starts.find((start) => this.canStart(job, start)) ?? null;
  }

  private candidateStarts(job: J): number[] {
    const bases = [job.earliestStartMinutes];
    for (const window of job.openWindows) {
      bases.push(window.fromMinutes);
    }
    for (const window of job.homeWindows) {
      bases.push(window.fromMinutes);
    }
    const rest = this.habits.supply?.restMinutes ?? 0;
    const starts = new Set<number>();
    for (const base of bases) {
      starts.add(Math.ceil(base)).add(Math.ceil(base + this.habits.leadMinutes));
    }
    for (const placed of this.placed) {
      const move = this.habits.moveBetween(placed.job.positionId, job.positionId);
      for (const base of placed.job.tapId === job.tapId ? [placed.endMinutes] : [placed.startMinutes, placed.endMinutes]) {
        starts.add(Math.ceil(base)).add(Math.ceil(base + this.habits.leadMinutes)).add(Math.ceil(base + move));
      }
      if (rest > 0) {
        starts.add(Math.ceil(placed.endMinutes + rest));
      }
    }
    return [...starts];
  }

  private latestStarts(job: J): number[] {
    const ends = [...job.openWindows, ...job.homeWindows].map((window) => window.toMinutes);
    for (const placed of this.placed) {
      const move = this.habits.moveBetween(job.positionId, placed.job.positionId);
      ends.push(placed.startMinutes, placed.startMinutes - move, placed.startMinutes - this.habits.leadMinutes, placed.startMinutes - (this.habits.supply?.restMinutes ?? 0));
    }
    return [...ends.map((end) => Math.floor(end - job.minutes)), Math.floor(job.latestStartMinutes)];
  }

  private canStart(job: J, startMinutes: number): boolean {
    const endMinutes = startMinutes + job.minutes;
    if (startMinutes < job.earliestStartMinutes || startMinutes > job.latestStartMinutes) {
      return false;
    }
    if (!windowHolding(job.openWindows, startMinutes, endMinutes)) {
      return false;
    }
    if (!this.isSupplyFree(job, startMinutes, endMinutes)) {
      return false;
    }
    let before: PlacedJob<J> | null = null;
    let after: PlacedJob<J> | null = null;
    for (const placed of this.placed) {
      if (placed.job.tapId !== job.tapId) {
        continue;
      }
      if (placed.startMinutes < endMinutes && startMinutes < placed.endMinutes) {
        return false;
      }
      if (placed.endMinutes <= startMinutes && (before === null || placed.endMinutes > before.endMinutes)) {
        before = placed;
      }
      if (placed.startMinutes >= endMinutes && (after === null || placed.startMinutes < after.startMinutes)) {
        after = placed;
      }
    }
    const setup = this.setupBefore(before, job.positionId, startMinutes);
    const workFrom = startMinutes - setup;
    if (before !== null && workFrom < before.endMinutes) {
      return false;
    }
    if (!windowHolding(job.homeWindows, workFrom, job.endsUnattended ? startMinutes + 1 : endMinutes)) {
      return false;
    }
    if (!this.isPersonFree(job.tapId, workFrom, startMinutes)) {
      return false;
    }
    if (after === null) {
      return true;
    }
    const afterSetup = setupMinutesBefore({ positionId: job.positionId, endMinutes }, { positionId: after.job.positionId, startMinutes: after.startMinutes }, this.habits);
    const afterFrom = after.startMinutes - afterSetup;
    return afterFrom >= endMinutes
      && windowHolding(after.job.homeWindows, afterFrom, after.startMinutes + 1) !== null
      && this.isPersonFree(job.tapId, afterFrom, after.startMinutes);
  }

  /** Whether pipe or well can feed a run beside those already there: not too much at once, and with its rest between draws. */
  private isSupplyFree(job: J, startMinutes: number, endMinutes: number): boolean {
    const { supply } = this.habits;
    if (supply === null) {
      return true;
    }
    let flowLpm = job.flowLpm;
    for (const placed of this.placed) {
      if (placed.startMinutes < endMinutes + supply.restMinutes && startMinutes < placed.endMinutes + supply.restMinutes) {
        if (supply.restMinutes > 0) {
          return false;
        }
        flowLpm += placed.job.flowLpm;
      }
    }
    return flowLpm <= Math.max(supply.flowLpm, job.flowLpm) + 1e-9;
  }

  private setupBefore(before: PlacedJob<J> | null, positionId: string, startMinutes: number): number {
    return setupMinutesBefore(
      before === null ? null : { positionId: before.job.positionId, endMinutes: before.endMinutes },
      { positionId, startMinutes },
      this.habits,
    );
  }

  /** Whether no getting ready or move on another tap overlaps [fromMinutes, toMinutes); an empty span is the moment of opening a tap. */
  private isPersonFree(tapId: string, fromMinutes: number, toMinutes: number): boolean {
    const longestSetup = Math.max(this.habits.leadMinutes, this.habits.longestMoveMinutes);
    return this.placed.every((placed, index) => {
      const isNear = placed.job.tapId !== tapId && placed.startMinutes - longestSetup < toMinutes && fromMinutes < placed.startMinutes;
      if (!isNear) {
        return true;
      }
      let before: PlacedJob<J> | null = null;
      for (let earlier = index - 1; earlier >= 0 && before === null; earlier -= 1) {
        before = this.placed[earlier]?.job.tapId === placed.job.tapId ? this.placed[earlier] ?? null : null;
      }
      return placed.startMinutes - this.setupBefore(before, placed.job.positionId, placed.startMinutes) >= toMinutes;
    });
  }
}
