import { cyclesOf, endOfCourseDay, endPriceL, expectedStressL, type PatchCourse } from './patchCourse';

/** Levels of depletion that the program looks at. */
const LEVELS = 33;

/** What a day does to a patch at each level, the day's water in: its price, and the level at its end. */
interface LevelTables {
  stressL: Float64Array;
  endLevel: Float64Array;
}

/**
 * Best course of one patch for itself, by dynamic programming over days and levels of depletion: what a millimetre is worth on every day, given how many
 * minutes each opportunity has left and what a minute of it costs. Levels are coarse; the course that comes out is reckoned and refined exactly afterwards.
 */
export class PatchProgram {
  private readonly value: Float64Array;
  private readonly after: Float64Array;
  private readonly dayFirst: Int32Array;
  private readonly window = new Int32Array(LEVELS + 1);
  private readonly key = new Float64Array(LEVELS);
  private readonly tables = new Map<PatchCourse, LevelTables>();

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

  private tablesOf(course: PatchCourse, step: number): LevelTables {
    const kept = this.tables.get(course);
    if (kept) {
      return kept;
    }
    const made = { stressL: new Float64Array(course.dayCount * LEVELS), endLevel: new Float64Array(course.dayCount * LEVELS) };
    for (let day = 0; day < course.dayCount; day += 1) {
      for (let level = 0; level < LEVELS; level += 1) {
        made.stressL[day * LEVELS + level] = expectedStressL(course, day, level * step);
        made.endLevel[day * LEVELS + level] = endOfCourseDay(course, day, level * step) / step;
      }
    }
    this.tables.set(course, made);
    return made;
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
    const { stressL, endLevel } = this.tablesOf(course, step);
    for (let level = 0; level < LEVELS; level += 1) {
      after[base + level] = (stressL[base + level] as number) + this.readAt(value, day + 1, endLevel[base + level] as number);
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
      const setL = course.setL[at] as number;
      this.improve(course, base, step, 0, limit, perMinute, watered + start, setL);
      if (earlierMm > 0) {
        this.improve(course, base, step, earlierMm, limit, perMinute, watered + start + earlierL, setL);
      }
      earlierMm += limit * course.mmPerMinute;
      earlierL += start + limit * perMinute + cyclesOf(course, limit) * (course.setL[at] as number);
    }
  }

  /**
   * Lowers the value of every level by a set of up to `limit` minutes beside `earlierMm` of earlier sets of the day. A minute costs the same wherever it
   * starts, so the best target of a level is the least of a window that slides along with it.
   */
  private improve(course: PatchCourse, base: number, step: number, earlierMm: number, limit: number, minuteL: number, startL: number, setL: number): void {
    const { value, after, window, key } = this;
    // Cycles beyond the first are spread over the minutes here; the exact reckoning counts them whole.
    const perMinute = limit > course.cycleMinutes ? minuteL + setL / course.cycleMinutes : minuteL;
    const perLevel = (step / course.mmPerMinute) * perMinute;
    const most = Math.floor((earlierMm + limit * course.mmPerMinute) / step + 1e-9);
    const least = Math.max(1, Math.ceil((earlierMm + course.leastMinutes * course.mmPerMinute) / step - 1e-9));
    const fixedL = startL + setL - (earlierMm / course.mmPerMinute) * perMinute;
    let head = 0;
    let tail = 0;
    for (let level = least; level < LEVELS; level += 1) {
      const entering = level - least;
      const entry = (after[base + entering] as number) - entering * perLevel;
      key[entering] = entry;
      while (tail > head && (key[window[tail - 1] as number] as number) >= entry) {
        tail -= 1;
      }
      window[tail] = entering;
      tail += 1;
      while (head < tail && (window[head] as number) < level - most) {
        head += 1;
      }
      if (head < tail) {
        const cost = (key[window[head] as number] as number) + level * perLevel + fixedL;
        if (cost < (value[base + level] as number)) {
          value[base + level] = cost;
        }
      }
    }
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
