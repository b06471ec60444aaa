import { courseScratch, cyclesOf, reckonCourse, type CourseScratch, type PatchCourse } from './patchCourse';
import { planDefaults } from './planDefaults';
import type { PlanSlot } from './planSlots';

/** What the search has to share out. */
export interface SearchTask {
  courses: readonly PatchCourse[];
  slots: readonly PlanSlot[];
  outingIsMade: Int32Array;
  outingL: number;
  /** Flow of each patch's tap [L/min]. */
  flowLpm: readonly number[];
  /** Number of the month's cap that a slot counts for, -1 for none. */
  capOfSlot: Int32Array;
  /** Litres left under each cap. */
  capLeftL: readonly number[];
  /** Evaluations of a patch's course that may be spent. */
  budget: number;
}

export interface SearchResult {
  /** Minutes by patch and opportunity. */
  minutes: Int32Array[];
  /** Price of the whole [L]. */
  costL: number;
  evaluations: number;
}

/** A slot with less than this left is full [min]. */
const FULL_MINUTES = 8;

/**
 * Who has how many minutes of which slot: the state of the search. It keeps count of what is left of slots, outings and litres, and reckons patches beside
 * one another.
 */
export class SlotBook {
  evaluations = 0;
  protected readonly minutes: Int32Array[];
  protected readonly scratch: CourseScratch[];
  protected readonly trial: Int32Array[];
  protected readonly limits: Int32Array[];
  protected readonly kept: Int32Array[];
  protected readonly used: Float64Array;
  protected readonly outings: Int32Array;
  protected readonly capLeft: Float64Array;
  protected readonly noPrice: Float64Array;
  protected readonly all: readonly number[];
  protected capPriceL = 0;
  protected readonly barred: Uint8Array;
  /** Patches and opportunities by slot. */
  protected readonly members: { patch: number; at: number }[][];


  constructor(protected readonly task: SearchTask) {
    const { courses, slots } = task;
    this.all = courses.map((_, patch) => patch);
    this.minutes = courses.map((course) => new Int32Array(course.opportunityCount));
    this.trial = courses.map((course) => new Int32Array(course.opportunityCount));
    this.kept = courses.map((course) => new Int32Array(course.opportunityCount));
    this.limits = courses.map((course) => new Int32Array(course.opportunityCount));
    this.scratch = courses.map(courseScratch);
    this.used = new Float64Array(slots.length);
    this.outings = Int32Array.from(task.outingIsMade);
    this.capLeft = Float64Array.from(task.capLeftL);
    this.noPrice = new Float64Array(slots.length);
    this.barred = new Uint8Array(task.outingIsMade.length);
    this.members = slots.map(() => []);
    courses.forEach((course, patch) => {
      for (let at = 0; at < course.opportunityCount; at += 1) {
        this.members[course.opportunitySlot[at] as number]?.push({ patch, at });
      }
    });
  }

  protected reckon(patch: number, minutes: Int32Array): number {
    this.evaluations += 1;
    return reckonCourse(this.course(patch), minutes, this.outings, this.task.outingL, this.scratch[patch] as CourseScratch);
  }

  protected course(patch: number): PatchCourse {
    return this.task.courses[patch] as PatchCourse;
  }

  /** Counts a patch's sets in (+1) or out (−1). */
  protected count(patch: number, sign: number): void {
    const course = this.course(patch);
    const own = this.minutes[patch] as Int32Array;
    for (let at = 0; at < course.opportunityCount; at += 1) {
      const run = own[at] as number;
      if (run > 0) {
        const slot = course.opportunitySlot[at] as number;
        this.used[slot] = (this.used[slot] as number) + sign * (run + cyclesOf(course, run) * (this.task.slots[slot] as PlanSlot).moveMinutes);
        const outing = course.opportunityOuting[at] as number;
        this.outings[outing] = (this.outings[outing] as number) + sign;
        const cap = this.task.capOfSlot[slot] as number;
        if (cap >= 0) {
          this.capLeft[cap] = (this.capLeft[cap] as number) - sign * run * (this.task.flowLpm[patch] as number);
        }
      }
    }
  }

  /** Most minutes that a patch, its own sets counted out, can get at an opportunity. */
  protected limitOf(patch: number, at: number): number {
    const course = this.course(patch);
    const number = course.opportunitySlot[at] as number;
    const slot = this.task.slots[number] as PlanSlot;
    if (this.barred[slot.outing] === 1) {
      return 0;
    }
    const span = slot.toMinutes - slot.fromMinutes;
    const used = this.used[number] as number;
    const move = slot.moveMinutes;
    const longest = slot.startSpanMinutes < span ? this.longestIn(number) : 0;
    let best = 0;
    for (let cycles = 1; cycles <= planDefaults.cyclesAtMost; cycles += 1) {
      let most = Math.min(cycles * course.cycleMinutes, span + move - used - cycles * move);
      if (cycles > 1) {
        most = Math.min(most, span - (cycles - 1) * Math.max(planDefaults.soakMinutes, move));
      }
      if (slot.startSpanMinutes < span) {
        const asLast = used > slot.startSpanMinutes ? 0 : cycles === 1 ? Infinity : ((slot.startSpanMinutes - used - (cycles - 1) * move) * cycles) / (cycles - 1);
        const before = longest > 0 ? slot.startSpanMinutes - used + longest + move - cycles * move : 0;
        most = Math.min(most, Math.max(asLast, before));
      }
      best = Math.max(best, most);
      if (course.cycleMinutes >= span) {
        break;
      }
    }
    const cap = this.task.capOfSlot[number] as number;
    if (cap >= 0) {
      best = Math.min(best, (this.capLeft[cap] as number) / (this.task.flowLpm[patch] as number) + 1e-9);
    }
    return best < course.leastMinutes ? 0 : Math.floor(best);
  }

  protected longestIn(slot: number): number {
    let longest = 0;
    for (const { patch, at } of this.members[slot] ?? []) {
      const run = (this.minutes[patch] as Int32Array)[at] as number;
      if (run > longest) {
        longest = run / cyclesOf(this.course(patch), run);
      }
    }
    return longest;
  }

  protected isWithinCaps(patch: number, minutes: Int32Array): boolean {
    if (this.capLeft.length === 0) {
      return true;
    }
    const course = this.course(patch);
    const left = Float64Array.from(this.capLeft);
    for (let at = 0; at < course.opportunityCount; at += 1) {
      const cap = this.task.capOfSlot[course.opportunitySlot[at] as number] as number;
      if (cap >= 0) {
        left[cap] = (left[cap] as number) - (minutes[at] as number) * (this.task.flowLpm[patch] as number);
      }
    }
    return left.every((litres) => litres >= -1e-6);
  }

  /** Price of the given patches together, beside the others [L]. */
  protected total(patches: readonly number[]): number {
    for (const patch of patches) {
      this.count(patch, -1);
    }
    let sum = 0;
    for (const patch of patches) {
      sum += this.reckon(patch, this.minutes[patch] as Int32Array);
      this.count(patch, 1);
    }
    return sum;
  }

  protected isSpent(): boolean {
    return this.evaluations >= this.task.budget;
  }

  protected isFull(slot: number): boolean {
    const { fromMinutes, toMinutes, moveMinutes } = this.task.slots[slot] as PlanSlot;
    return (this.used[slot] as number) > toMinutes - fromMinutes + moveMinutes - FULL_MINUTES;
  }

  protected putBack(minutes: readonly Int32Array[]): void {
    minutes.forEach((own, patch) => {
      this.count(patch, -1);
      (this.minutes[patch] as Int32Array).set(own);
      this.count(patch, 1);
    });
  }

}
