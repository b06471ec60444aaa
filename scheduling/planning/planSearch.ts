import type { CourseScratch } from './patchCourse';
import { LEAST_GAIN_L, MinuteSharing } from './minuteSharing';
import { PatchProgram } from './patchProgram';
import type { PlanSlot } from './planSlots';
import type { SearchResult, SearchTask } from './slotBook';

/** What a program of a patch costs, in evaluations of a course. */
const PROGRAM_EVALUATIONS = 30;
/** How much worse a step of the search may be at first, as a part of the cost. */
const WARMTH = 0.04;
/** How near a step must come before minutes are shared out anew to see whether it gains, as a part of the cost. */
const NEARNESS = 0.05;
/** Price of a minute in a slot that a patch is to leave to others [L]. */
const SHUNNED_L = 1e6;

/**
 * Shares the slots out among the patches. Every patch in turn gets its best course for what the others leave (`PatchProgram`), then minutes go from set to
 * set where they are worth more, then two, three or more patches at a time and whole outings are taken out and put back another way, as long as the
 * budget lasts and something is gained. The same task gives the same result.
 */
export class PlanSearch extends MinuteSharing {
  private readonly program: PatchProgram;
  private readonly price: Float64Array;
  private readonly dearer: Float64Array;
  private readonly scarce: Uint8Array;
  private levelL = 0;
  private shunned = 0;
  private state = 88_172_645;

  constructor(task: SearchTask) {
    super(task);
    const { courses, slots } = task;
    this.program = new PatchProgram(courses[0]?.dayCount ?? 0);
    this.price = new Float64Array(slots.length);
    this.dearer = new Float64Array(slots.length);
    this.scarce = new Uint8Array(slots.length);
  }

  run(): SearchResult {
    const { all } = this;
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

  /** Even numbers from 0 up to 1, the same in every run. */
  private next(): number {
    let x = this.state;
    x ^= x << 13;
    x ^= x >>> 17;
    x ^= x << 5;
    this.state = x;
    return (x >>> 0) / 4_294_967_296;
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
    // Where a month's litres do not do, a dearer litre spreads them over the days instead of cutting the last ones off.
    let litreL = price === this.noPrice ? this.capPriceL / 4 : this.capPriceL;
    for (let tries = 0; tries < 12; tries += 1) {
      this.program.solve(course, limits, litreL > 0 ? this.withCapPrice(patch, price, litreL) : price, this.outings, this.task.outingL, trial);
      this.evaluations += PROGRAM_EVALUATIONS;
      if (this.isWithinCaps(patch, trial)) {
        break;
      }
      litreL = Math.max(0.25, litreL * 2);
    }
    this.serveWaterIns(patch, trial);
    this.keepCaps(patch, trial);
    return this.refine(patch, trial);
  }

  /** Adds the set that a product needs, where it costs least: the program of the patch thinks of the grass only. */
  private serveWaterIns(patch: number, trial: Int32Array): void {
    const course = this.course(patch);
    const limits = this.limits[patch] as Int32Array;
    for (const wanted of course.waterIns) {
      let bestL = this.reckon(patch, trial);
      let bestAt = -1;
      let bestMinutes = 0;
      for (let at = 0; at < course.opportunityCount; at += 1) {
        const day = course.opportunityDay[at] as number;
        const was = trial[at] as number;
        if (day >= wanted.fromIndex && day <= wanted.toIndex && was < (limits[at] as number)) {
          trial[at] = Math.min(limits[at] as number, Math.max(was, course.leastMinutes, Math.ceil(wanted.depthMm / course.mmPerMinute)));
          const costL = this.reckon(patch, trial);
          if (costL < bestL - LEAST_GAIN_L) {
            bestL = costL;
            bestAt = at;
            bestMinutes = trial[at] as number;
          }
          trial[at] = was;
        }
      }
      if (bestAt >= 0) {
        trial[bestAt] = bestMinutes;
      }
    }
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

  private start(all: readonly number[]): void {
    const order = [...all].sort((a, b) => this.course(b).stressL * this.course(b).startMm / this.course(b).totalAvailableMm - this.course(a).stressL * this.course(a).startMm / this.course(a).totalAvailableMm || a - b);
    this.capPriceL = this.findCapPrice(all);
    for (const patch of order) {
      this.respond(patch, this.price);
      (this.minutes[patch] as Int32Array).set(this.trial[patch] as Int32Array);
      this.count(patch, 1);
    }
  }

  /** Lets each patch in turn take its best course for what the others leave. @returns whether anything was gained */
  private answer(patches: readonly number[]): boolean {
    let gained = false;
    for (const patch of patches) {
      this.count(patch, -1);
      const own = this.minutes[patch] as Int32Array;
      const was = this.reckon(patch, own);
      if (this.respond(patch, this.noPrice) < was - LEAST_GAIN_L) {
        own.set(this.trial[patch] as Int32Array);
        gained = true;
      }
      this.count(patch, 1);
    }
    return gained;
  }

  /** Lets every patch answer the others, and minutes go where they are worth more, until nothing is gained. @returns whether anything was */
  private settle(patches: readonly number[]): boolean {
    let gained = false;
    for (let sweep = 0; sweep < 6 && !this.isSpent(); sweep += 1) {
      const answered = this.answer(patches);
      const better = this.exchange() || answered;
      gained = gained || better;
      if (!better) {
        break;
      }
    }
    return gained;
  }

  /** Takes patches out, puts them back in the given order at the given prices, lets them settle, and keeps what is better. */
  private reinsert(group: readonly number[], price: Float64Array, rounds: number, slackL = 0, nearL = 0, invited = -1): boolean {
    const before = this.total(group);
    const kept = group.map((patch) => Int32Array.from(this.minutes[patch] as Int32Array));
    for (const patch of group) {
      this.count(patch, -1);
      (this.minutes[patch] as Int32Array).fill(0);
    }
    // One outing may look as if somebody went out anyway: patches that would pay for it together would not alone.
    if (invited >= 0) {
      this.outings[invited] = (this.outings[invited] as number) + 1;
    }
    for (const patch of group) {
      if (price === this.price) {
        this.rollPrices();
      }
      this.respond(patch, price);
      (this.minutes[patch] as Int32Array).set(this.trial[patch] as Int32Array);
      this.count(patch, 1);
    }
    if (invited >= 0) {
      this.outings[invited] = (this.outings[invited] as number) - 1;
    }
    for (let round = 0; round < rounds; round += 1) {
      if (!this.answer(group)) {
        break;
      }
    }
    const after = this.total(group);
    if (after < before - LEAST_GAIN_L + slackL) {
      return true;
    }
    // Minutes shared out well may still make it the better plan.
    if (after < before + nearL) {
      const touched = this.minutes.map((own) => Int32Array.from(own));
      const costL = this.total(this.all);
      if ((this.exchange() || this.trade()) && costL - this.total(this.all) > after - before - slackL + LEAST_GAIN_L) {
        return true;
      }
      this.putBack(touched);
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

  /** Rolls the prices at which the next patch is put back: scarce slots cost something, and some are shunned altogether. */
  private rollPrices(): void {
    for (let slot = 0; slot < this.price.length; slot += 1) {
      this.price[slot] = this.scarce[slot] === 0 ? 0 : this.next() < this.shunned ? SHUNNED_L : this.levelL * (0.3 + 0.7 * this.next());
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
    const { all } = this;
    // Where no slot is full and no litres are short, patches hardly meet: little is left to find.
    const isTight = this.capPriceL > 0 || this.task.slots.some((slot) => this.isFull(slot.number));
    const patience = isTight ? 300 + 40 * count : 20 + 5 * count;
    let bestL = this.total(all);
    let best = this.minutes.map((own) => Int32Array.from(own));
    const foundCapPriceL = this.capPriceL;
    while (!this.isSpent() && count > 1 && idle < patience) {
      const size = Math.min(count, 2 + Math.floor(this.next() * 4));
      const group: number[] = [Math.floor(this.next() * count)];
      for (let tries = 0; group.length < size && tries < 4 * size; tries += 1) {
        const patch = Math.floor(this.next() * count);
        if (!group.includes(patch) && this.shareSlots(group[0] as number, patch)) {
          group.push(patch);
        }
      }
      this.levelL = this.next() < 0.25 ? 0 : this.minuteWorthL(group) * 2 ** (1 - 7 * this.next());
      for (let slot = 0; slot < this.scarce.length; slot += 1) {
        const { fromMinutes, toMinutes, moveMinutes } = this.task.slots[slot] as PlanSlot;
        this.scarce[slot] = (this.used[slot] as number) > 0.7 * (toMinutes - fromMinutes + moveMinutes) ? 1 : 0;
      }
      this.shunned = this.next() < 0.5 ? 0 : 0.4 * this.next();
      this.capPriceL = foundCapPriceL * 2 ** (3 * this.next() - 2);
      // Early on a little worse is accepted, so that the search leaves a valley; late only what gains.
      const heat = Math.max(0, 1 - this.evaluations / this.task.budget - 0.2);
      const one = Math.floor(this.next() * this.outings.length);
      const fate = this.next();
      this.barred[one] = fate < 0.25 ? 1 : 0;
      const isAccepted = this.reinsert(group, this.price, 1, heat * WARMTH * bestL * this.next(), NEARNESS * bestL, fate > 0.6 ? one : -1);
      this.barred[one] = 0;
      if (isAccepted) {
        if (this.trade()) {
          this.exchange();
        }
        this.exchange();
        let costL = this.total(all);
        if (this.capPriceL > 0 && costL < bestL * 1.01 && this.exchangeLitres()) {
          costL = this.total(all);
        }
        if (costL < bestL - LEAST_GAIN_L) {
          bestL = costL;
          best = this.minutes.map((own) => Int32Array.from(own));
          idle = 0;
        } else if (costL > bestL * (1 + 2 * WARMTH * heat) + LEAST_GAIN_L) {
          this.putBack(best);
        }
      }
      idle += 1;
    }
    this.capPriceL = foundCapPriceL;
    this.putBack(best);
  }
}
