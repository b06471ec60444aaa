import fc from 'fast-check';
import { endOfDayDepletionMm } from '@/scheduling/planning/patchBalance';
import { courseScratch, endOfCourseDay, reckonCourse, type PatchCourse } from '@/scheduling/planning/patchCourse';

const dayCount = 6;

function course(overrides: Partial<PatchCourse> = {}): PatchCourse {
  return {
    dayCount, startMm: 10, totalAvailableMm: 30, refillLineMm: 12, areaM2: 50, mmPerMinute: 0.2, grossMmPerMinute: 0.24, leastMinutes: 10, cycleMinutes: 1440,
    demandMm: Float64Array.from({ length: dayCount }, () => 4), rainMm: new Float64Array(dayCount), fullRainMm: new Float64Array(dayCount), rainChance: new Float64Array(dayCount), fixedMm: new Float64Array(dayCount),
    stressL: 3000, severeL: 0, severeFrom: 0.5, endMmL: 0, endStressDays: 0, before: null, changeL: new Float64Array(dayCount), waterIns: [],
    weekAtMostMm: Infinity, weekBeforeMm: new Float64Array(6), opportunityCount: dayCount,
    opportunityDay: Int32Array.from({ length: dayCount }, (_, day) => day), opportunitySlot: Int32Array.from({ length: dayCount }, (_, day) => day), opportunityOuting: Int32Array.from({ length: dayCount }, (_, day) => day),
    minuteL: new Float64Array(dayCount), setL: new Float64Array(dayCount), ...overrides,
  };
}
const noOutings = new Int32Array(dayCount);
const real = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('the course of a patch as the search reckons it', () => {
  it('ends each day as the budget does', () => {
    fc.assert(fc.property(real(1, 60), real(0, 1), real(0, 1), real(0, 40), real(0, 30), real(0, 12), (totalAvailableMm, lineShare, depletionShare, irrigationMm, rainMm, demandMm) => {
      const refillLineMm = lineShare * totalAvailableMm;
      const depletionMm = depletionShare * totalAvailableMm;
      const own = course({ totalAvailableMm, refillLineMm, demandMm: Float64Array.of(demandMm), rainMm: Float64Array.of(rainMm) });
      expect(endOfCourseDay(own, 0, depletionMm - irrigationMm)).toBeCloseTo(endOfDayDepletionMm({ depletionMm, irrigationMm, rainMm, demandMm, totalAvailableMm, refillLineMm }), 9);
    }), { numRuns: 500 });
  });

  it('never lays down more than the soil has room for, nor a set too short to be worth it', () => {
    const scratch = courseScratch(course());
    reckonCourse(course(), Int32Array.of(300, 300, 0, 5, 0, 0), noOutings, 80, scratch);
    // 10 mm at 0.2 mm a minute, then the 4 mm of the day.
    expect([...scratch.minutes]).toEqual([50, 20, 0, 0, 0, 0]);
  });

  it('counts stress with and without the rain by its chance', () => {
    const wet = course({ startMm: 21, fullRainMm: Float64Array.of(9, 0, 0, 0, 0, 0), rainChance: Float64Array.of(0.4, 0, 0, 0, 0, 0), demandMm: new Float64Array(dayCount), rainMm: Float64Array.of(30, 0, 0, 0, 0, 0) });
    // Half of the stress range without rain, none with it: 0.6 × 0.5 × 3,000 L; the soil itself goes by the expected rain and is full afterwards.
    expect(reckonCourse(wet, new Int32Array(dayCount), noOutings, 80, courseScratch(wet))).toBeCloseTo(900, 9);
  });

  it('prices an outing only where nobody goes out anyway, and a change against the plan before', () => {
    const price = (overrides: Partial<PatchCourse>, outings: Int32Array, minutes: Int32Array) => reckonCourse(course({ demandMm: new Float64Array(dayCount), ...overrides }), minutes, outings, 80, courseScratch(course()));
    const once = Int32Array.of(20, 0, 0, 0, 0, 0);
    expect(price({}, noOutings, once)).toBe(80);
    expect(price({}, Int32Array.of(1, 0, 0, 0, 0, 0), once)).toBe(0);
    const before = { before: Int8Array.of(0, 1, 0, 0, 0, 0), changeL: Float64Array.of(60, 30, 15, 15, 15, 15) };
    expect(price(before, Int32Array.of(1, 0, 0, 0, 0, 0), once)).toBe(90);
  });

  it('keeps within a depth in seven days, what went before included', () => {
    const guarded = course({ startMm: 25, weekAtMostMm: 12, weekBeforeMm: Float64Array.of(0, 0, 0, 0, 0, 4.8), demandMm: Float64Array.from({ length: dayCount }, () => 0) });
    const scratch = courseScratch(guarded);
    reckonCourse(guarded, Int32Array.of(100, 100, 0, 0, 0, 0), noOutings, 80, scratch);
    expect([...scratch.minutes.slice(0, 2)]).toEqual([30, 0]);
  });

  it('prices what a product lacks by its deadline', () => {
    const wanted = course({ startMm: 0, demandMm: new Float64Array(dayCount), waterIns: [{ fromIndex: 0, toIndex: 1, depthMm: 6, missingL: 100 }] });
    const scratch = courseScratch(wanted);
    expect(reckonCourse(wanted, new Int32Array(dayCount), noOutings, 0, scratch)).toBeCloseTo(600, 9);
    expect(reckonCourse(wanted, Int32Array.of(30, 0, 0, 0, 0, 0), noOutings, 0, scratch)).toBeCloseTo(0, 9);
  });
});
