import { cyclesOf, endOfCourseDay, endPriceL, expectedStressL, type PatchCourse } from './patchCourse';

/** Levels of depletion that the program looks at. */
const LEVELS = 33;

/**
 * Best course of one patch for itself, by dynamic programming over days and levels of depletion: what a millimetre is worth on every day, given how many
 * minutes each opportunity has left and what a minute of it costs. Levels are coarse; the course that comes out is reckoned and refined exactly afterwards.
 */
export class PatchProgram {
  private readonly value: Float64Array;
  private readonly after: Float64Array;
  private readonly dayFirst: Int32Array;

  constructor(dayCount: number) {
    this.value = new Float64Array((dayCount + 1) * LEVELS);
    this.after = new Float64Array(dayCount * LEVELS);
    this.dayFirst = new Int32Array(dayCount + 1);
  }

  /**
   * @param limits - most minutes by opportunity, 0 where there are none
   * @param extraMinuteL - extra price of a minute by slot [L]
   * @param outingIsOpen - outings that others make anyway
   * @param minutes - filled with minutes by opportunity
   */
  solve(course: PatchCourse, limits: Int32Array, extraMinuteL: Float64Array, outingIsOpen: Int32Array, outingL: number, minutes: Int32Array): void {
    const { dayCount, opportunityCount, opportunityDay } = course;
    let at = 0;
    for (let day = 0; day <= dayCount; day += 1) {
      while (at < opportunityCount && (opportunityDay[at] as number) < day) {
        at += 1;
      }
      this.dayFirst[day] = at;
    }
    const step = course.totalAvailableMm / (LEVELS - 1);
    for (let level = 0; level < LEVELS; level += 1) {
      this.value[dayCount * LEVELS + level] = endPriceL(course, level * step);
    }
    for (let day = dayCount - 1; day >= 0; day -= 1) {
      this.solveDay(course, day, step, limits, extraMinuteL, outingIsOpen, outingL);
    }
    this.follow(course, step, limits, extraMinuteL, outingIsOpen, outingL, minutes);
  }

  private readAt(table: Float64Array, row: number, levels: number): number {
    if (levels <= 0) {
      // A surplus is worth no more than full ground.
      return table[row * LEVELS] as number;
    }
    const low = levels >= LEVELS - 1 ? LEVELS - 2 : levels | 0;
    const from = table[row * LEVELS + low] as number;
    return from + (levels - low) * ((table[row * LEVELS + low + 1] as number) - from);
  }

  private changeL(course: PatchCourse, day: number, isWatered: boolean): number {
    return course.before === null || (isWatered ? 1 : 0) === course.before[day] ? 0 : (course.changeL[day] as number);
  }

  private solveDay(course: PatchCourse, day: number, step: number, limits: Int32Array, extraMinuteL: Float64Array, outingIsOpen: Int32Array, outingL: number): void {
    const { value, after } = this;
    const base = day * LEVELS;
    for (let level = 0; level < LEVELS; level += 1) {
      const wetted = level * step;
      after[base + level] = expectedStressL(course, day, wetted) + this.readAt(value, day + 1, endOfCourseDay(course, day, wetted) / step);
    }
    const fixedLevels = (course.fixedMm[day] as number) / step;
    const untouched = this.changeL(course, day, fixedLevels > 0);
    for (let level = 0; level < LEVELS; level += 1) {
      value[base + level] = untouched + (fixedLevels > 0 ? this.readAt(after, day, level - fixedLevels) : (after[base + level] as number));
    }
    const last = this.dayFirst[day + 1] as number;
    const watered = this.changeL(course, day, true);
    let earlierMm = 0;
    let earlierL = 0;
    for (let at = this.dayFirst[day] as number; at < last; at += 1) {
      const limit = limits[at] as number;
      if (limit < course.leastMinutes) {
        continue;
      }
      const perMinute = (course.minuteL[at] as number) + (extraMinuteL[course.opportunitySlot[at] as number] as number);
      const start = outingIsOpen[course.opportunityOuting[at] as number] === 0 ? outingL : 0;
      this.improve(course, base, step, 0, limit, perMinute, watered + start);
      if (earlierMm > 0) {
        this.improve(course, base, step, earlierMm, limit, perMinute, watered + start + earlierL);
      }
      earlierMm += limit * course.mmPerMinute;
      earlierL += start + limit * perMinute + cyclesOf(course, limit) * (course.setL[at] as number);
    }
  }

  /** Lowers the value of every level by a set of up to `limit` minutes beside `earlierMm` of earlier sets of the day. */
  private improve(course: PatchCourse, base: number, step: number, earlierMm: number, limit: number, perMinute: number, startL: number): void {
    const { value, after } = this;
    const levelsAtMost = (earlierMm + limit * course.mmPerMinute) / step;
    const levelsAtLeast = (earlierMm + course.leastMinutes * course.mmPerMinute) / step;
    const minutesPerLevel = step / course.mmPerMinute;
    const earlierMinutes = earlierMm / course.mmPerMinute;
    for (let level = 1; level < LEVELS; level += 1) {
      let best = value[base + level] as number;
      const from = Math.max(0, Math.ceil(level - levelsAtMost - 1e-9));
      const to = Math.floor(level - levelsAtLeast + 1e-9);
      for (let target = from; target <= to; target += 1) {
        const minutes = (level - target) * minutesPerLevel - earlierMinutes;
        const cost = (after[base + target] as number) + startL + minutes * perMinute + this.setL(course, minutes);
        if (cost < best) {
          best = cost;
        }
      }
      value[base + level] = best;
    }
  }

  private setL(course: PatchCourse, minutes: number): number {
    // One price of a set stands for all opportunities here; the exact reckoning tells them apart.
    return cyclesOf(course, minutes) * (course.opportunityCount > 0 ? (course.setL[0] as number) : 0);
  }

  /** Walks the best course from the first day, with the depletion as it really comes. */
  private follow(course: PatchCourse, step: number, limits: Int32Array, extraMinuteL: Float64Array, outingIsOpen: Int32Array, outingL: number, minutes: Int32Array): void {
    let depletion = course.startMm;
    minutes.fill(0);
    for (let day = 0; day < course.dayCount; day += 1) {
      const fixed = course.fixedMm[day] as number;
      let best = this.changeL(course, day, fixed > 0) + this.readAt(this.after, day, (depletion - fixed) / step);
      let bestAt = -1;
      let bestMinutes = 0;
      let bestPair = -1;
      const first = this.dayFirst[day] as number;
      const last = this.dayFirst[day + 1] as number;
      const watered = this.changeL(course, day, true);
      let pairMinutes = 0;
      let pairL = 0;
      for (let at = first; at < last; at += 1) {
        const limit = limits[at] as number;
        if (limit < course.leastMinutes) {
          continue;
        }
        const perMinute = (course.minuteL[at] as number) + (extraMinuteL[course.opportunitySlot[at] as number] as number);
        const startL = outingIsOpen[course.opportunityOuting[at] as number] === 0 ? outingL : 0;
        for (let joined = 0; joined < (pairMinutes > 0 ? 2 : 1); joined += 1) {
          const earlier = joined === 1 ? pairMinutes : 0;
          const room = Math.round(depletion / course.mmPerMinute) - earlier;
          const most = Math.min(limit, room);
          for (let run = most; run >= course.leastMinutes; run = nextRun(run, most, step / course.mmPerMinute, course.leastMinutes)) {
            const wetted = depletion - (earlier + run) * course.mmPerMinute;
            const cost = watered + startL + (joined === 1 ? pairL : 0) + run * perMinute + cyclesOf(course, run) * (course.setL[at] as number) + this.readAt(this.after, day, wetted / step);
            if (cost < best - 1e-9) {
              best = cost;
              bestAt = at;
              bestMinutes = run;
              bestPair = joined === 1 ? first : -1;
            }
          }
        }
        pairMinutes += limit;
        pairL += startL + limit * perMinute + cyclesOf(course, limit) * (course.setL[at] as number);
      }
      let water = fixed;
      if (bestAt >= 0) {
        if (bestPair >= 0) {
          for (let at = bestPair; at < bestAt; at += 1) {
            const limit = limits[at] as number;
            if (limit >= course.leastMinutes) {
              minutes[at] = limit;
              water += limit * course.mmPerMinute;
            }
          }
        }
        minutes[bestAt] = bestMinutes;
        water += bestMinutes * course.mmPerMinute;
      }
      depletion = endOfCourseDay(course, day, depletion - water);
    }
  }
}

/** The next shorter run to look at: by whole levels, and the shortest last. */
function nextRun(run: number, most: number, minutesPerLevel: number, leastMinutes: number): number {
  if (run === leastMinutes) {
    return 0;
  }
  const next = Math.floor(run - Math.max(1, minutesPerLevel));
  return next < leastMinutes && run > leastMinutes && most > leastMinutes ? leastMinutes : next;
}
