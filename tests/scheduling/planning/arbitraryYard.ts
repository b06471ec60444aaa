import fc from 'fast-check';
import { addDays } from '@/scheduling/units/civilDay';
import type { MinuteWindow, PlanInput, PlanRule } from '@/scheduling/planning/types';

const window = fc.tuple(fc.integer({ min: 0, max: 1439 }), fc.integer({ min: 1, max: 600 }))
  .map(([from, length]): MinuteWindow => ({ fromMinutes: from, toMinutes: Math.min(1440, from + length) }));

const ruleBase = fc.record({
  name: fc.constantFrom('Town', 'Street', 'Well'), source: fc.constantFrom('Town code', null), sourceOn: fc.constant(null),
  season: fc.option(fc.record({ fromMonth: fc.integer({ min: 1, max: 12 }), fromDay: fc.integer({ min: 1, max: 28 }), toMonth: fc.integer({ min: 1, max: 12 }), toDay: fc.integer({ min: 1, max: 28 }) })),
  exemptSeeded: fc.boolean(),
});
const weekdays = fc.uniqueArray(fc.integer({ min: 0, max: 6 }), { maxLength: 7 });
const parity = fc.constantFrom<'odd' | 'even'>('odd', 'even');
const ruleKind = fc.oneof(
  fc.record({ kind: fc.constant('weekdays' as const), weekdays }),
  fc.record({ kind: fc.constant('date_parity' as const), parity }),
  fc.record({ kind: fc.constant('hours' as const), allowed: fc.array(window, { maxLength: 3 }) }),
  fc.record({ kind: fc.constant('combination' as const), weekdays: fc.option(weekdays), parity: fc.option(parity), allowed: fc.option(fc.array(window, { maxLength: 2 })) }),
);

/** Yards of every shape a person could enter, from nothing at all to more than the hours can hold. */
export const arbitraryYard: fc.Arbitrary<PlanInput> = fc.record({
  startOn: fc.integer({ min: 0, max: 800 }).map((days) => addDays('2026-01-01', days)),
  dayCount: fc.constantFrom(1, 4, 10),
  tapCount: fc.integer({ min: 0, max: 3 }), zoneCount: fc.integer({ min: 0, max: 6 }), positionCount: fc.integer({ min: 0, max: 10 }),
}).chain(({ startOn, dayCount, tapCount, zoneCount, positionCount }) => {
  const day = fc.record({
    et0Mm: fc.double({ min: 0, max: 9, noNaN: true }), rainMm: fc.oneof(fc.constant(0), fc.double({ min: 0, max: 40, noNaN: true })),
    rainProbabilityPct: fc.option(fc.integer({ min: 0, max: 100 })),
    tminC: fc.double({ min: -6, max: 20, noNaN: true }), spreadC: fc.double({ min: 0, max: 18, noNaN: true }),
    windMps: fc.option(fc.double({ min: 0, max: 9, noNaN: true })),
    sun: fc.option(fc.tuple(fc.integer({ min: 200, max: 500 }), fc.integer({ min: 900, max: 1300 }))),
    homeWindows: fc.array(window, { maxLength: 3 }),
  });
  const dose = fc.record({ atMinutes: fc.integer({ min: 0, max: 1440 }), depthMm: fc.double({ min: 0.5, max: 10, noNaN: true }) });
  const zone = fc.record({
    areaM2: fc.double({ min: 1, max: 2000, noNaN: true }), priority: fc.integer({ min: 0, max: 3 }),
    totalAvailableMm: fc.double({ min: 3, max: 80, noNaN: true }), lineShare: fc.double({ min: 0, max: 1, noNaN: true }), depletionShare: fc.double({ min: 0, max: 1, noNaN: true }),
    demandMmByDay: fc.array(fc.double({ min: 0, max: 9, noNaN: true }), { minLength: dayCount, maxLength: dayCount }),
    intakeMmPerHour: fc.double({ min: 0, max: 40, noNaN: true }), resting: fc.boolean(),
    seed: fc.option(fc.record({
      dayNumber: fc.integer({ min: 0, max: 60 }), stage: fc.constantFrom('sown' as const, 'rooting' as const, 'taper' as const, 'established' as const),
      dosesByDay: fc.array(fc.array(dose, { maxLength: 4 }), { minLength: dayCount, maxLength: dayCount }),
    }), { freq: 3 }),
  });
  const position = fc.record({
    zone: fc.nat(), tap: fc.option(fc.nat(), { freq: 8 }), rateMmPerHour: fc.option(fc.double({ min: 0.5, max: 60, noNaN: true }), { freq: 8 }), rateIsDefault: fc.boolean(),
    runTimeMultiplier: fc.double({ min: 1, max: 2.5, noNaN: true }), zoneShare: fc.double({ min: 0, max: 1, noNaN: true }), sortOrder: fc.integer({ min: 0, max: 9 }),
    depletionMm: fc.option(fc.double({ min: 0, max: 60, noNaN: true })), applied: fc.option(fc.record({ atMinutes: fc.integer({ min: 0, max: 1440 }), depthMm: fc.double({ min: 0, max: 20, noNaN: true }) }), { freq: 4 }),
  });
  return fc.record({
    days: fc.array(day, { minLength: dayCount, maxLength: dayCount }),
    taps: fc.array(fc.record({ flowLpm: fc.double({ min: 1, max: 40, noNaN: true }), flowIsDefault: fc.boolean(), shutOffTimer: fc.boolean() }), { minLength: tapCount, maxLength: tapCount }),
    zones: fc.array(zone, { minLength: zoneCount, maxLength: zoneCount }),
    positions: fc.array(position, { minLength: zoneCount === 0 ? 0 : positionCount, maxLength: zoneCount === 0 ? 0 : positionCount }),
    rules: fc.array(fc.tuple(ruleBase, ruleKind), { maxLength: 3 }),
    moveMinutes: fc.integer({ min: 0, max: 20 }), leadMinutes: fc.integer({ min: 0, max: 60 }), maxWindMps: fc.constantFrom(4, 5, 8),
    notBeforeMinutes: fc.option(fc.integer({ min: 0, max: 1440 })),
  }).map((made): PlanInput => ({
    startOn, dayCount, notBeforeMinutes: made.notBeforeMinutes, moveMinutes: made.moveMinutes, leadMinutes: made.leadMinutes, maxWindMps: made.maxWindMps,
    days: made.days.map(({ spreadC, sun, ...each }, index) => ({
      ...each, on: addDays(startOn, index), tmaxC: each.tminC + spreadC, sunriseMinutes: sun?.[0] ?? null, sunsetMinutes: sun?.[1] ?? null,
    })),
    taps: made.taps.map((tap, index) => ({ id: `t${index}`, name: `Tap ${index}`, ...tap })),
    zones: made.zones.map(({ lineShare, depletionShare, ...each }, index) => ({
      id: `z${index}`, name: `Zone ${index}`, ...each, refillLineMm: lineShare * each.totalAvailableMm, depletionMm: depletionShare * each.totalAvailableMm,
    })),
    positions: made.positions.map(({ zone: zoneNumber, tap, applied: _applied, ...each }, index) => ({
      id: `p${index}`, name: `Position ${index}`, zoneId: `z${zoneNumber % zoneCount}`, tapId: tap === null || tapCount === 0 ? null : `t${tap % tapCount}`,
      hoseId: null, sprinklerId: null, sprinklerName: 'Oscillating', lowQuarterUniformity: null, ...each,
    })),
    alreadyApplied: made.positions.flatMap((each, index) => (each.applied === null ? [] : [{ positionId: `p${index}`, ...each.applied }])),
    rules: made.rules.map(([base, kind], index): PlanRule => ({ id: `r${index}`, ...base, ...kind })),
  }));
});
