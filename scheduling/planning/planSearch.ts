import { cyclesOf, courseScratch, reckonCourse, type CourseScratch, type PatchCourse } from './patchCourse';
import { PatchProgram } from './patchProgram';
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

/** What a program of a patch costs, in evaluations of a course. */
const PROGRAM_EVALUATIONS = 60;
const LEAST_GAIN_L = 1e-6;
/** How much worse a step of the search may be at first, as a part of the cost. */
const WARMTH = 0.03;

/**
 * Shares the slots out among the patches. Every patch in turn gets its best course for what the others leave (`PatchProgram`), then minutes go from set to
 * set where they are worth more, then two, three or more patches at a time and whole outings are taken out and put back another way, as long as the
 * budget lasts and something is gained. The same task gives the same result.
 */
export class PlanSearch {
  evaluations = 0;
  private readonly minutes: Int32Array[];
  private readonly scratch: CourseScratch[];
  private readonly trial: Int32Array[];
  private readonly limits: Int32Array[];
  private readonly used: Float64Array;
  private readonly outings: Int32Array;
  private readonly capLeft: Float64Array;
  private readonly noPrice: Float64Array;
  private readonly price: Float64Array;
  private readonly dearer: Float64Array;
  private capPriceL = 0;
  private readonly barred: Uint8Array;
  private readonly program: PatchProgram;
  /** Patches and opportunities by slot. */
  private readonly members: { patch: number; at: number }[][];
  private state = 88_172_645;

  constructor(private readonly task: SearchTask) {
    const { courses, slots } = task;
    this.minutes = courses.map((course) => new Int32Array(course.opportunityCount));
    this.trial = courses.map((course) => new Int32Array(course.opportunityCount));
    this.limits = courses.map((course) => new Int32Array(course.opportunityCount));
    this.scratch = courses.map(courseScratch);
    this.used = new Float64Array(slots.length);
    this.outings = Int32Array.from(task.outingIsMade);
    this.capLeft = Float64Array.from(task.capLeftL);
    this.noPrice = new Float64Array(slots.length);
    this.price = new Float64Array(slots.length);
    this.dearer = new Float64Array(slots.length);
    this.barred = new Uint8Array(task.outingIsMade.length);
    this.program = new PatchProgram(courses[0]?.dayCount ?? 0);
    this.members = slots.map(() => []);
    courses.forEach((course, patch) => {
      for (let at = 0; at < course.opportunityCount; at += 1) {
        this.members[course.opportunitySlot[at] as number]?.push({ patch, at });
      }
    });
  }

  run(): SearchResult {
    const all = this.task.courses.map((_, patch) => patch);
    if (all.length > 0) {
      this.start(all);
      this.settle(all);
      this.tryPairs();
      this.tryOutings();
      this.settle(all);
      this.tryGroups();
    }
    return { minutes: this.minutes, costL: this.total(all), evaluations: this.evaluations };
  }

  private isSpent(): boolean {
    return this.evaluations >= this.task.budget;
  }

  /** Even numbers from 0 up to 1, the same in every run. */
  private next(): number {
    let x = this.state;
    x ^= x << 13;
    x ^= x >>> 17;
    x ^= x << 5;
    this.state = x;
    return (x >>> 0) / 4_294_967_296;
  }

  private reckon(patch: number, minutes: Int32Array): number {
    this.evaluations += 1;
    return reckonCourse(this.course(patch), minutes, this.outings, this.task.outingL, this.scratch[patch] as CourseScratch);
  }

  private course(patch: number): PatchCourse {
    return this.task.courses[patch] as PatchCourse;
  }

  /** Counts a patch's sets in (+1) or out (−1). */
  private count(patch: number, sign: number): void {
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
  private limitOf(patch: number, at: number): number {
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

  private longestIn(slot: number): number {
    let longest = 0;
    for (const { patch, at } of this.members[slot] ?? []) {
      const run = (this.minutes[patch] as Int32Array)[at] as number;
      if (run > longest) {
        longest = run / cyclesOf(this.course(patch), run);
      }
    }
    return longest;
  }

  /** Whether litres under a cap would be passed by several sets of one patch together; then its last sets are cut. */
  private keepCaps(patch: number, minutes: Int32Array): void {
    if (this.capLeft.length === 0) {
      return;
    }
    const course = this.course(patch);
    const left = Float64Array.from(this.capLeft);
    const flow = this.task.flowLpm[patch] as number;
    for (let at = 0; at < course.opportunityCount; at += 1) {
      const cap = this.task.capOfSlot[course.opportunitySlot[at] as number] as number;
      if (cap >= 0 && (minutes[at] as number) > 0) {
        const most = Math.floor(Math.max(0, left[cap] as number) / flow + 1e-9);
        minutes[at] = Math.min(minutes[at] as number, most) < course.leastMinutes ? 0 : Math.min(minutes[at] as number, most);
        left[cap] = (left[cap] as number) - (minutes[at] as number) * flow;
      }
    }
  }

  /** Best course found for a patch whose sets are counted out; leaves it in `trial`. @returns its price [L] */
  private respond(patch: number, price: Float64Array): number {
    const course = this.course(patch);
    const limits = this.limits[patch] as Int32Array;
    const trial = this.trial[patch] as Int32Array;
    for (let at = 0; at < course.opportunityCount; at += 1) {
      limits[at] = this.limitOf(patch, at);
    }
    this.program.solve(course, limits, this.capPriceL > 0 && price !== this.noPrice ? this.withCapPrice(patch, price, this.capPriceL) : price, this.outings, this.task.outingL, trial);
    this.evaluations += PROGRAM_EVALUATIONS;
    // Where a month's litres do not do, a dearer litre spreads them over the days instead of cutting the last ones off.
    for (let litreL = 0.25; litreL < 100 && !this.isWithinCaps(patch, trial); litreL *= 1.6) {
      this.program.solve(course, limits, this.withCapPrice(patch, price, litreL), this.outings, this.task.outingL, trial);
      this.evaluations += PROGRAM_EVALUATIONS;
    }
    this.keepCaps(patch, trial);
    return this.refine(patch, trial);
  }

  /** Prices of a minute by slot with the litres of a capped month made dearer. */
  private withCapPrice(patch: number, price: Float64Array, litreL: number): Float64Array {
    for (let slot = 0; slot < price.length; slot += 1) {
      this.dearer[slot] = (price[slot] as number) + ((this.task.capOfSlot[slot] as number) >= 0 ? litreL * (this.task.flowLpm[patch] as number) : 0);
    }
    return this.dearer;
  }

  /** The price of a capped litre at which all patches together, each answering alone, keep within the caps; 0 when they do so anyway. */
  private findCapPrice(all: readonly number[]): number {
    if (this.capLeft.length === 0) {
      return 0;
    }
    for (let litreL = 0; litreL < 100; litreL = litreL === 0 ? 0.2 : litreL * 1.35) {
      const left = Float64Array.from(this.capLeft);
      for (const patch of all) {
        const course = this.course(patch);
        const limits = this.limits[patch] as Int32Array;
        const trial = this.trial[patch] as Int32Array;
        for (let at = 0; at < course.opportunityCount; at += 1) {
          limits[at] = this.limitOf(patch, at);
        }
        this.program.solve(course, limits, this.withCapPrice(patch, this.noPrice, litreL), this.outings, this.task.outingL, trial);
        this.evaluations += PROGRAM_EVALUATIONS;
        for (let at = 0; at < course.opportunityCount; at += 1) {
          const cap = this.task.capOfSlot[course.opportunitySlot[at] as number] as number;
          if (cap >= 0) {
            left[cap] = (left[cap] as number) - (trial[at] as number) * (this.task.flowLpm[patch] as number);
          }
        }
      }
      if (left.every((litres) => litres >= 0)) {
        return litreL;
      }
    }
    return 100;
  }

  /** Moves the minutes of single sets, exactly, as long as that gains. */
  private refine(patch: number, trial: Int32Array): number {
    const course = this.course(patch);
    const limits = this.limits[patch] as Int32Array;
    const scratch = this.scratch[patch] as CourseScratch;
    let cost = this.reckon(patch, trial);
    trial.set(scratch.minutes);
    for (const step of [12, 4, 1]) {
      for (let at = 0; at < course.opportunityCount; at += 1) {
        if ((trial[at] as number) === 0) {
          continue;
        }
        for (const sign of [1, -1]) {
          for (;;) {
            const was = trial[at] as number;
            const wanted = Math.min(limits[at] as number, was + sign * step);
            if (wanted === was || wanted < course.leastMinutes) {
              break;
            }
            trial[at] = wanted;
            const found = this.reckon(patch, trial);
            if (found < cost - LEAST_GAIN_L && this.isWithinCaps(patch, scratch.minutes)) {
              cost = found;
              const isKept = scratch.minutes[at] === wanted;
              trial.set(scratch.minutes);
              if (!isKept) {
                break;
              }
            } else {
              trial[at] = was;
              break;
            }
          }
        }
        const was = trial[at] as number;
        if (step === 12 && was > 0) {
          trial[at] = 0;
          const without = this.reckon(patch, trial);
          if (without < cost - LEAST_GAIN_L) {
            cost = without;
            trial.set(scratch.minutes);
          } else {
            trial[at] = was;
          }
        }
      }
    }
    return cost;
  }

  private isWithinCaps(patch: number, minutes: Int32Array): boolean {
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
  private total(patches: readonly number[]): number {
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

  private start(all: readonly number[]): void {
    const order = [...all].sort((a, b) => this.course(b).stressL * this.course(b).startMm / this.course(b).totalAvailableMm - this.course(a).stressL * this.course(a).startMm / this.course(a).totalAvailableMm || a - b);
    this.capPriceL = this.findCapPrice(all);
    for (const patch of order) {
      this.respond(patch, this.price);
      (this.minutes[patch] as Int32Array).set(this.trial[patch] as Int32Array);
      this.count(patch, 1);
    }
  }

  /** Lets every patch answer the others, and minutes go where they are worth more, until nothing is gained. @returns whether anything was */
  private settle(patches: readonly number[]): boolean {
    let gained = false;
    for (let sweep = 0; sweep < 6 && !this.isSpent(); sweep += 1) {
      let better = false;
      for (const patch of patches) {
        this.count(patch, -1);
        const own = this.minutes[patch] as Int32Array;
        const was = this.reckon(patch, own);
        if (this.respond(patch, this.noPrice) < was - LEAST_GAIN_L) {
          own.set(this.trial[patch] as Int32Array);
          better = true;
        }
        this.count(patch, 1);
      }
      better = this.exchange() || better;
      gained = gained || better;
      if (!better) {
        break;
      }
    }
    return gained;
  }

  /** Gives minutes of one set to another of the same slot where they are worth more. */
  private exchange(): boolean {
    let gained = false;
    for (let slot = 0; slot < this.members.length; slot += 1) {
      const users = (this.members[slot] ?? []).filter(({ patch, at }) => ((this.minutes[patch] as Int32Array)[at] as number) > 0);
      for (const from of users) {
        for (const to of users) {
          if (from.patch !== to.patch && !this.isSpent()) {
            gained = this.give(from, to) || gained;
          }
        }
      }
    }
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

  private give(from: { patch: number; at: number }, to: { patch: number; at: number }): boolean {
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
        const fits = this.fitsAfter(from, to, giverTrial, takerTrial);
        if (fits && after < before - LEAST_GAIN_L) {
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

  private reckonBoth(a: number, b: number, minutesA: Int32Array, minutesB: Int32Array): number {
    const first = this.reckon(a, minutesA);
    this.count(a, 1);
    const second = this.reckon(b, minutesB);
    this.count(a, -1);
    return first + second;
  }

  /** As reckonBoth, with trimmed minutes left in the trials. */
  private reckonTrials(a: number, b: number, trialA: Int32Array, trialB: Int32Array): number {
    const first = this.reckon(a, trialA);
    trialA.set((this.scratch[a] as CourseScratch).minutes);
    const own = this.minutes[a] as Int32Array;
    const kept = Int32Array.from(own);
    own.set(trialA);
    this.count(a, 1);
    const second = this.reckon(b, trialB);
    trialB.set((this.scratch[b] as CourseScratch).minutes);
    this.count(a, -1);
    own.set(kept);
    return first + second;
  }

  private fitsAfter(from: { patch: number; at: number }, to: { patch: number; at: number }, giverTrial: Int32Array, takerTrial: Int32Array): boolean {
    const own = this.minutes[from.patch] as Int32Array;
    const kept = Int32Array.from(own);
    own.set(giverTrial);
    this.count(from.patch, 1);
    const fits = (takerTrial[to.at] as number) <= this.limitOf(to.patch, to.at) && this.isWithinCaps(to.patch, takerTrial);
    this.count(from.patch, -1);
    own.set(kept);
    return fits;
  }

  /** Takes patches out, puts them back in the given order at the given prices, lets them settle, and keeps what is better. */
  private reinsert(group: readonly number[], price: Float64Array, rounds: number, slackL = 0): boolean {
    const before = this.total(group);
    const kept = group.map((patch) => Int32Array.from(this.minutes[patch] as Int32Array));
    for (const patch of group) {
      this.count(patch, -1);
      (this.minutes[patch] as Int32Array).fill(0);
    }
    for (const patch of group) {
      this.respond(patch, price);
      (this.minutes[patch] as Int32Array).set(this.trial[patch] as Int32Array);
      this.count(patch, 1);
    }
    for (let round = 0; round < rounds; round += 1) {
      let better = false;
      for (const patch of group) {
        this.count(patch, -1);
        const own = this.minutes[patch] as Int32Array;
        const was = this.reckon(patch, own);
        if (this.respond(patch, this.noPrice) < was - LEAST_GAIN_L) {
          own.set(this.trial[patch] as Int32Array);
          better = true;
        }
        this.count(patch, 1);
      }
      if (!better) {
        break;
      }
    }
    if (this.total(group) < before - LEAST_GAIN_L + slackL) {
      return true;
    }
    group.forEach((patch, index) => {
      this.count(patch, -1);
      (this.minutes[patch] as Int32Array).set(kept[index] as Int32Array);
      this.count(patch, 1);
    });
    return false;
  }

  private shareSlots(a: number, b: number): boolean {
    const slots = this.course(a).opportunitySlot;
    return this.course(b).opportunitySlot.some((slot) => slots.includes(slot));
  }

  private tryPairs(): void {
    const count = this.task.courses.length;
    for (let first = 0; first < count; first += 1) {
      for (let second = 0; second < count && !this.isSpent(); second += 1) {
        if (first !== second && this.shareSlots(first, second)) {
          this.reinsert([first, second], this.noPrice, 1);
        }
      }
    }
  }

  /** Does without one outing after the other. */
  private tryOutings(): void {
    for (let outing = 0; outing < this.outings.length && !this.isSpent(); outing += 1) {
      if ((this.outings[outing] as number) > 0 && this.task.outingIsMade[outing] === 0) {
        const users = this.task.courses.flatMap((course, patch) => ((this.minutes[patch] as Int32Array).some((run, at) => run > 0 && course.opportunityOuting[at] === outing) ? [patch] : []));
        this.barred[outing] = 1;
        this.reinsert(users, this.noPrice, 2);
        this.barred[outing] = 0;
      }
    }
  }

  /** What a minute can be worth at most to a group on a day of stress [L]. */
  private minuteWorthL(group: readonly number[]): number {
    return Math.max(...group.map((patch) => {
      const course = this.course(patch);
      return (course.stressL * course.mmPerMinute) / Math.max(1, course.totalAvailableMm - course.refillLineMm);
    }));
  }

  /** Takes out a few patches at a time, in changing order and at changing prices of scarce slots. */
  private tryGroups(): void {
    const count = this.task.courses.length;
    let idle = 0;
    const all = this.task.courses.map((_, patch) => patch);
    let bestL = this.total(all);
    let best = this.minutes.map((own) => Int32Array.from(own));
    const foundCapPriceL = this.capPriceL;
    while (!this.isSpent() && count > 1 && idle < 300 + 40 * count) {
      const size = Math.min(count, 2 + Math.floor(this.next() * 4));
      const group: number[] = [Math.floor(this.next() * count)];
      for (let tries = 0; group.length < size && tries < 4 * size; tries += 1) {
        const patch = Math.floor(this.next() * count);
        if (!group.includes(patch) && this.shareSlots(group[0] as number, patch)) {
          group.push(patch);
        }
      }
      const level = this.next() < 0.25 ? 0 : this.minuteWorthL(group) * 2 ** (1 - 7 * this.next());
      for (let slot = 0; slot < this.price.length; slot += 1) {
        const { fromMinutes, toMinutes, moveMinutes } = this.task.slots[slot] as PlanSlot;
        const isScarce = (this.used[slot] as number) > 0.8 * (toMinutes - fromMinutes + moveMinutes);
        this.price[slot] = isScarce ? level * (0.3 + 0.7 * this.next()) : 0;
      }
      this.capPriceL = foundCapPriceL * 2 ** (2 * this.next() - 1);
      // Early on a little worse is accepted, so that the search leaves a valley; late only what gains.
      const heat = Math.max(0, 1 - this.evaluations / this.task.budget - 0.2);
      if (this.reinsert(group, this.price, 1, heat * WARMTH * bestL * this.next())) {
        this.exchange();
        const costL = this.total(all);
        if (costL < bestL - LEAST_GAIN_L) {
          bestL = costL;
          best = this.minutes.map((own) => Int32Array.from(own));
          idle = 0;
        }
      }
      idle += 1;
    }
    this.capPriceL = foundCapPriceL;
    best.forEach((own, patch) => {
      this.count(patch, -1);
      (this.minutes[patch] as Int32Array).set(own);
      this.count(patch, 1);
    });
  }
}
