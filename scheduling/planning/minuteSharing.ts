import type { CourseScratch } from './patchCourse';
import { SlotBook } from './slotBook';

/** A gain smaller than this is rounding [L]. */
export const LEAST_GAIN_L = 1e-6;

/** Shares minutes out among sets that are chosen already: from set to set of a full slot, crosswise between two slots, and under a month's cap between any two. */
export class MinuteSharing extends SlotBook {
  /** Gives minutes of one set to another of the same slot where they are worth more. */
  protected exchange(): boolean {
    let gained = false;
    for (let slot = 0; slot < this.members.length; slot += 1) {
      // Where there is time left, a set takes it without anybody giving.
      if (!this.isFull(slot)) {
        continue;
      }
      const users = (this.members[slot] ?? []).filter(({ patch, at }) => ((this.minutes[patch] as Int32Array)[at] as number) > 0);
      for (const from of users) {
        for (const to of users) {
          if (from.patch !== to.patch && !this.isSpent()) {
            gained = this.give(from, to) || gained;
          }
        }
      }
    }
    return gained;
  }

  /** Gives litres of a capped month from one set to another, whatever the slot. */
  protected exchangeLitres(): boolean {
    let gained = false;
    if (this.capPriceL > 0) {
      const sets = this.members.flatMap((users) => users.filter(({ patch, at }) => ((this.minutes[patch] as Int32Array)[at] as number) > 0));
      for (const from of sets) {
        for (const to of sets) {
          const isOtherSlot = this.course(from.patch).opportunitySlot[from.at] !== this.course(to.patch).opportunitySlot[to.at];
          if (from.patch !== to.patch && isOtherSlot && !this.isSpent()) {
            gained = this.give(from, to) || gained;
          }
        }
      }
    }
    return gained;
  }

  protected give(from: { patch: number; at: number }, to: { patch: number; at: number }): boolean {
    const giver = this.minutes[from.patch] as Int32Array;
    const taker = this.minutes[to.patch] as Int32Array;
    let gained = false;
    for (const step of [24, 6, 1]) {
      for (;;) {
        const given = giver[from.at] as number;
        if (given - step < this.course(from.patch).leastMinutes || (taker[to.at] as number) === 0) {
          break;
        }
        this.count(from.patch, -1);
        this.count(to.patch, -1);
        const before = this.reckonBoth(from.patch, to.patch, giver, taker);
        const giverTrial = this.trial[from.patch] as Int32Array;
        const takerTrial = this.trial[to.patch] as Int32Array;
        giverTrial.set(giver);
        takerTrial.set(taker);
        giverTrial[from.at] = given - step;
        // The giver's set stays in its place, so what it gives is what the taker may take.
        takerTrial[to.at] = (taker[to.at] as number) + step;
        const after = this.reckonTrials(from.patch, to.patch, giverTrial, takerTrial);
        if (after < before - LEAST_GAIN_L && this.fitsAfter(from, to, giverTrial, takerTrial)) {
          giver.set(giverTrial);
          taker.set(takerTrial);
          gained = true;
          this.count(from.patch, 1);
          this.count(to.patch, 1);
        } else {
          this.count(from.patch, 1);
          this.count(to.patch, 1);
          break;
        }
      }
    }
    return gained;
  }

  protected reckonBoth(a: number, b: number, minutesA: Int32Array, minutesB: Int32Array): number {
    const first = this.reckon(a, minutesA);
    this.count(a, 1);
    const second = this.reckon(b, minutesB);
    this.count(a, -1);
    return first + second;
  }

  /** As reckonBoth, with trimmed minutes left in the trials. */
  protected reckonTrials(a: number, b: number, trialA: Int32Array, trialB: Int32Array): number {
    const first = this.reckon(a, trialA);
    trialA.set((this.scratch[a] as CourseScratch).minutes);
    const own = this.minutes[a] as Int32Array;
    const kept = this.kept[a] as Int32Array;
    kept.set(own);
    own.set(trialA);
    this.count(a, 1);
    const second = this.reckon(b, trialB);
    trialB.set((this.scratch[b] as CourseScratch).minutes);
    this.count(a, -1);
    own.set(kept);
    return first + second;
  }

  protected fitsAfter(from: { patch: number; at: number }, to: { patch: number; at: number }, giverTrial: Int32Array, takerTrial: Int32Array): boolean {
    const own = this.minutes[from.patch] as Int32Array;
    const kept = this.kept[from.patch] as Int32Array;
    kept.set(own);
    own.set(giverTrial);
    this.count(from.patch, 1);
    const fits = (takerTrial[to.at] as number) <= this.limitOf(to.patch, to.at) && this.isWithinCaps(to.patch, takerTrial);
    this.count(from.patch, -1);
    own.set(kept);
    return fits;
  }

  /** Two patches trade minutes of one slot for minutes of another: what neither would give for nothing. */
  protected trade(): boolean {
    let gained = false;
    const { courses } = this.task;
    for (let first = 0; first < courses.length; first += 1) {
      for (let second = first + 1; second < courses.length && !this.isSpent(); second += 1) {
        const shared = this.sharedSets(first, second);
        for (const give of shared) {
          for (const take of shared) {
            if (give !== take && (this.isFull(this.course(first).opportunitySlot[give.first] as number) || this.isFull(this.course(first).opportunitySlot[take.first] as number))) {
              gained = this.tradeBetween(first, second, give, take) || gained;
            }
          }
        }
      }
    }
    return gained;
  }

  /** Slots in which both patches have a set, as places among the opportunities of each. */
  protected sharedSets(first: number, second: number): { first: number; second: number }[] {
    const a = this.course(first);
    const b = this.course(second);
    const shared: { first: number; second: number }[] = [];
    for (let at = 0; at < a.opportunityCount; at += 1) {
      if (((this.minutes[first] as Int32Array)[at] as number) > 0) {
        const other = b.opportunitySlot.indexOf(a.opportunitySlot[at] as number);
        if (other >= 0 && ((this.minutes[second] as Int32Array)[other] as number) > 0) {
          shared.push({ first: at, second: other });
        }
      }
    }
    return shared;
  }

  protected tradeBetween(first: number, second: number, give: { first: number; second: number }, take: { first: number; second: number }): boolean {
    const a = this.minutes[first] as Int32Array;
    const b = this.minutes[second] as Int32Array;
    let gained = false;
    for (const step of [12, 3]) {
      for (;;) {
        if ((a[give.first] as number) - step < this.course(first).leastMinutes || (b[take.second] as number) - step < this.course(second).leastMinutes
          || (b[give.second] as number) === 0 || (a[take.first] as number) === 0) {
          break;
        }
        const trialA = this.trial[first] as Int32Array;
        const trialB = this.trial[second] as Int32Array;
        trialA.set(a);
        trialB.set(b);
        trialA[give.first] = (a[give.first] as number) - step;
        trialA[take.first] = (a[take.first] as number) + step;
        trialB[give.second] = (b[give.second] as number) + step;
        trialB[take.second] = (b[take.second] as number) - step;
        this.count(first, -1);
        this.count(second, -1);
        const before = this.reckonBoth(first, second, a, b);
        const after = this.reckonTrials(first, second, trialA, trialB);
        const isBetter = after < before - LEAST_GAIN_L && this.fitsAfter({ patch: first, at: give.first }, { patch: second, at: give.second }, trialA, trialB)
          && this.fitsAfter({ patch: second, at: take.second }, { patch: first, at: take.first }, trialB, trialA);
        if (isBetter) {
          a.set(trialA);
          b.set(trialB);
          gained = true;
        }
        this.count(first, 1);
        this.count(second, 1);
        if (!isBetter) {
          break;
        }
      }
    }
    return gained;
  }
}
