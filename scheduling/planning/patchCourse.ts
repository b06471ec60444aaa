/**
 * The ten days of one patch as the search sees them: plain numbers by day and by opportunity, so that a course is reckoned in well under a microsecond.
 * An opportunity is one stretch of hours in which the patch could get a set.
 */
export interface PatchCourse {
  dayCount: number;
  startMm: number;
  totalAvailableMm: number;
  refillLineMm: number;
  areaM2: number;
  /** Net depth of a minute [mm]. */
  mmPerMinute: number;
  /** Mean depth laid down in a minute [mm]. */
  grossMmPerMinute: number;
  /** Shortest set [min]. */
  leastMinutes: number;
  /** Longest run before the soil must soak [min]. */
  cycleMinutes: number;
  demandMm: Float64Array;
  /** Rain the plan counts on [mm]. */
  rainMm: Float64Array;
  /** Useful rain when it comes [mm]. */
  fullRainMm: Float64Array;
  /** Believed chance that it comes, 0 where there is none. */
  rainChance: Float64Array;
  /** Net depth of sets that are fixed [mm]. */
  fixedMm: Float64Array;
  /** Price of a day of complete stress [L], and of the part that is severe. */
  stressL: number;
  severeL: number;
  severeFrom: number;
  /** Price of a millimetre lacking at the end [L], and of complete stress then. */
  endMmL: number;
  endStressDays: number;
  /** 1 where the plan before had a set, 0 where not; null without one. */
  before: Int8Array | null;
  changeL: Float64Array;
  /** Water-ins: days from and to (included), depth, price of a millimetre lacking [L]. */
  waterIns: readonly { fromIndex: number; toIndex: number; depthMm: number; missingL: number }[];
  /** Most mean depth in any seven days [mm], Infinity for no such limit; and what the six days before gave. */
  weekAtMostMm: number;
  weekBeforeMm: Float64Array;
  // by opportunity, in order of time
  opportunityCount: number;
  opportunityDay: Int32Array;
  /** Number of the slot that the opportunity draws on. */
  opportunitySlot: Int32Array;
  opportunityOuting: Int32Array;
  minuteL: Float64Array;
  setL: Float64Array;
}

/** Cycles that a set of so many minutes takes. */
export function cyclesOf(course: PatchCourse, minutes: number): number {
  return minutes <= course.cycleMinutes ? 1 : Math.ceil(minutes / course.cycleMinutes);
}

/** Price of a day on which depletion, the day's water already in, is so deep [L]. FAO-56 (84). */
export function stressPriceL(course: PatchCourse, wettedMm: number): number {
  if (wettedMm <= course.refillLineMm) {
    return 0;
  }
  const stress = wettedMm >= course.totalAvailableMm ? 1 : (wettedMm - course.refillLineMm) / (course.totalAvailableMm - course.refillLineMm);
  return stress <= course.severeFrom ? course.stressL * stress : course.stressL * stress + course.severeL * (stress - course.severeFrom);
}

/** Price of the stress to expect on a day [L]: with its rain and without it, by the chance of it. */
export function expectedStressL(course: PatchCourse, index: number, wettedMm: number): number {
  const dry = stressPriceL(course, wettedMm);
  if (dry === 0) {
    return 0;
  }
  const chance = course.rainChance[index] as number;
  return chance === 0 ? dry : (1 - chance) * dry + chance * stressPriceL(course, wettedMm - (course.fullRainMm[index] as number));
}

/**
 * Depletion at the end of a day [mm]: `endOfDayDepletionMm` written out for speed, which a test holds to it.
 * @param depletionMm - at the start of the day, less the day's irrigation [mm]; below zero for a surplus
 */
export function endOfCourseDay(course: PatchCourse, index: number, depletionMm: number): number {
  const taw = course.totalAvailableMm;
  const below = depletionMm - (course.rainMm[index] as number);
  const ks = below <= course.refillLineMm ? 1 : below >= taw ? 0 : (taw - below) / (taw - course.refillLineMm);
  const left = taw > below ? taw - below : 0;
  const wanted = (course.demandMm[index] as number) * ks;
  const end = below + (wanted < left ? wanted : left);
  return end < 0 ? 0 : end > taw ? taw : end;
}

/** Numbers of one reckoning, reused from call to call. */
export interface CourseScratch {
  /** Minutes by opportunity after trimming to the room in the soil. */
  minutes: Int32Array;
  /** Depletion at the start of each day, and after the last [mm]. */
  depletionMm: Float64Array;
  /** Net depth of each day, fixed sets included [mm]. */
  waterMm: Float64Array;
  /** Mean depth of each day as the sprinkler lays it down [mm]. */
  grossMm: Float64Array;
}

export function courseScratch(course: PatchCourse): CourseScratch {
  return {
    minutes: new Int32Array(course.opportunityCount), depletionMm: new Float64Array(course.dayCount + 1),
    waterMm: new Float64Array(course.dayCount), grossMm: new Float64Array(course.dayCount),
  };
}

/** Mean depth that may still be laid down on a day under the weekly limit [mm]: a set counts in every seven days that hold it, fixed sets ahead included. */
function weekRoomMm(course: PatchCourse, index: number, grossMm: Float64Array): number {
  const gross = course.grossMmPerMinute / course.mmPerMinute;
  let most = 0;
  for (let end = index; end <= index + 6; end += 1) {
    let given = 0;
    for (let day = end - 6; day <= end; day += 1) {
      given += day < 0 ? (course.weekBeforeMm[6 + day] as number) : day <= index ? (grossMm[day] as number) : day < course.dayCount ? (course.fixedMm[day] as number) * gross : 0;
    }
    most = Math.max(most, given);
  }
  return course.weekAtMostMm - most;
}

/**
 * Reckons a patch through the plan with so many minutes at each opportunity.
 * Minutes beyond what the soil has room for are cut, and a set too short to be worth it is dropped: `scratch.minutes` holds what is left.
 * @param outingIsOpen - outings that others make anyway, by number
 * @returns the price of the course [L]
 */
export function reckonCourse(course: PatchCourse, minutes: Int32Array, outingIsOpen: Int32Array, outingL: number, scratch: CourseScratch): number {
  const { dayCount, opportunityCount, opportunityDay, mmPerMinute, leastMinutes } = course;
  let depletion = course.startMm;
  let cost = 0;
  let at = 0;
  let lastOuting = -1;
  for (let day = 0; day < dayCount; day += 1) {
    scratch.depletionMm[day] = depletion;
    const fixed = course.fixedMm[day] as number;
    let water = fixed;
    scratch.grossMm[day] = fixed === 0 ? 0 : (fixed / mmPerMinute) * course.grossMmPerMinute;
    if (at < opportunityCount && opportunityDay[at] === day) {
      let room = -1;
      while (at < opportunityCount && opportunityDay[at] === day) {
        let run = minutes[at] as number;
        if (run > 0) {
          if (room < 0) {
            room = roomMinutes(course, day, depletion, fixed, scratch);
          }
          if (run > room) {
            run = room;
          }
          if (run < leastMinutes) {
            run = 0;
          } else {
            room -= run;
            water += run * mmPerMinute;
            scratch.grossMm[day] = (scratch.grossMm[day] as number) + run * course.grossMmPerMinute;
            const outing = course.opportunityOuting[at] as number;
            if (outing !== lastOuting && outingIsOpen[outing] === 0) {
              cost += outingL;
            }
            lastOuting = outing;
            cost += run * (course.minuteL[at] as number) + cyclesOf(course, run) * (course.setL[at] as number);
          }
        }
        scratch.minutes[at] = run;
        at += 1;
      }
    }
    scratch.waterMm[day] = water;
    if (course.before !== null && (water > 0 ? 1 : 0) !== course.before[day]) {
      cost += course.changeL[day] as number;
    }
    const wetted = depletion - water;
    cost += expectedStressL(course, day, wetted);
    depletion = endOfCourseDay(course, day, wetted);
  }
  scratch.depletionMm[dayCount] = depletion;
  for (const wanted of course.waterIns) {
    let given = 0;
    for (let day = wanted.fromIndex; day <= wanted.toIndex; day += 1) {
      given += scratch.waterMm[day] as number;
    }
    cost += Math.max(0, wanted.depthMm - given) * wanted.missingL;
  }
  return cost + endPriceL(course, depletion);
}

/** Price of the depletion that stands after the last day [L]. */
export function endPriceL(course: PatchCourse, depletionMm: number): number {
  return depletionMm * course.endMmL + course.endStressDays * stressPriceL(course, depletionMm);
}

/** Minutes that a day still has room for: to full, to the nearest minute, or what a water-in wants; never beyond the weekly limit. */
function roomMinutes(course: PatchCourse, day: number, depletionMm: number, fixedMm: number, scratch: CourseScratch): number {
  let roomMm = depletionMm - fixedMm;
  for (const wanted of course.waterIns) {
    if (day >= wanted.fromIndex && day <= wanted.toIndex) {
      let given = fixedMm;
      for (let before = wanted.fromIndex; before < day; before += 1) {
        given += scratch.waterMm[before] as number;
      }
      roomMm = Math.max(roomMm, wanted.depthMm - given);
    }
  }
  const room = Math.round(Math.max(0, roomMm) / course.mmPerMinute);
  return course.weekAtMostMm === Infinity ? room : Math.min(room, Math.floor(weekRoomMm(course, day, scratch.grossMm) / course.grossMmPerMinute + 1e-9));
}
