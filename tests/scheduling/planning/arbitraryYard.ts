import fc from 'fast-check';
import { addDays } from '@/scheduling/units/civilDay';
import type { MinuteWindow, PlanDevice, PlanInput, PlanPriority, PlanRule } from '@/scheduling/planning/types';

/** Real numbers spread evenly over a range: fast-check's own are mostly at the ends, which makes yards where nothing can be watered. */
const real = (min: number, max: number): fc.Arbitrary<number> => fc.integer({ min: 0, max: 996 }).map((step) => min + ((max - min) * ((step * 619) % 997)) / 996);

const window = fc.tuple(real(0, 1300), real(1, 600))
  .map(([from, length]): MinuteWindow => ({ fromMinutes: Math.round(from), toMinutes: Math.min(1440, Math.round(from + length)) }));

const ruleBase = fc.record({
  name: fc.constantFrom('Town', 'Street', 'Well'), source: fc.constantFrom('Town code', null), sourceOn: fc.constant(null),
  season: fc.option(fc.record({ fromMonth: fc.integer({ min: 1, max: 12 }), fromDay: fc.integer({ min: 1, max: 28 }), toMonth: fc.integer({ min: 1, max: 12 }), toDay: fc.integer({ min: 1, max: 28 }) })),
  exemptSeeded: fc.boolean(),
  devices: fc.option(fc.uniqueArray(fc.constantFrom<PlanDevice>('sprinkler', 'soaker', 'hand_held'), { minLength: 1 }), { nil: undefined, freq: 2 }),
  stage: fc.option(fc.integer({ min: 0, max: 3 }), { nil: undefined, freq: 2 }),
});
const weekdays = fc.uniqueArray(fc.integer({ min: 0, max: 6 }), { maxLength: 7 });
const parity = fc.constantFrom<'odd' | 'even'>('odd', 'even');
const ruleKind = fc.oneof(
  fc.record({ kind: fc.constant('weekdays' as const), weekdays }),
  fc.record({ kind: fc.constant('date_parity' as const), parity }),
  fc.record({ kind: fc.constant('hours' as const), allowed: fc.array(window, { maxLength: 3 }) }),
  fc.record({ kind: fc.constant('attended' as const) }),
  fc.record({ kind: fc.constant('address_digit' as const), weekdaysByDigit: fc.array(weekdays, { minLength: 10, maxLength: 10 }) }),
  fc.record({ kind: fc.constant('combination' as const), weekdays: fc.option(weekdays), parity: fc.option(parity), allowed: fc.option(fc.array(window, { maxLength: 2 })) }),
);

const place = fc.record({ eastM: real(0, 60), northM: real(0, 40) });
const seldom = <T>(arbitrary: fc.Arbitrary<T>): fc.Arbitrary<T | undefined> => fc.option(arbitrary, { nil: undefined, freq: 2 });
const span = (dayCount: number) => fc.tuple(fc.integer({ min: -2, max: dayCount }), fc.integer({ min: 0, max: 4 }));

/** Limits and wishes that most yards lack, each present in about half of those that have any. */
const limitsOf = (startOn: string, dayCount: number, zoneCount: number, positionCount: number) => fc.record({
  priority: seldom(fc.constantFrom<PlanPriority>('keep_green', 'spare_water', 'spare_me', 'let_rest')),
  moveMinutesPerM: seldom(real(0, 0.3)), waterStage: seldom(fc.integer({ min: 0, max: 3 })), addressDigit: seldom(fc.integer({ min: 0, max: 9 })),
  supply: seldom(fc.record({ name: fc.constant('Well'), flowLpm: real(5, 50), restMinutes: fc.constantFrom(0, 0, 15, 60), drawMinutesAtMost: fc.option(fc.integer({ min: 5, max: 90 })) })),
  monthCaps: seldom(fc.record({ capLitres: real(0, 12_000), usedLitres: real(0, 4000) }).map((cap) => [{ month: startOn.slice(0, 7), ...cap }])),
  preferredWindows: seldom(fc.array(window, { maxLength: 2 })),
  permits: seldom(fc.record({ span: span(dayCount), blackoutMonths: fc.uniqueArray(fc.integer({ min: 1, max: 12 }), { maxLength: 3 }), allowed: fc.option(fc.array(window, { minLength: 1, maxLength: 2 })), liftsAll: fc.boolean() })
    .map(({ span: [from, length], liftsAll, ...each }) => [{
      id: 'permit', name: 'Permit', source: null, sourceOn: null, zoneIds: Array.from({ length: zoneCount }, (_, index) => `z${index}`), fromOn: addDays(startOn, from), toOn: addDays(startOn, from + length + 3),
      liftsRuleIds: liftsAll ? null : ['r0'], ...each,
    }])),
  holds: seldom(fc.array(fc.record({ zone: fc.nat(), span: span(dayCount), fromMinutes: fc.integer({ min: 0, max: 1440 }), toMinutes: fc.integer({ min: 0, max: 1440 }) }), { maxLength: 2 })
    .map((holds) => (zoneCount === 0 ? [] : holds.map(({ zone, span: [from, length], ...each }) => ({ zoneId: `z${zone % zoneCount}`, name: 'Weed killer', fromOn: addDays(startOn, from), toOn: addDays(startOn, from + length), ...each }))))),
  waterIns: seldom(fc.record({ zone: fc.nat(), span: span(dayCount), depthMm: real(2, 15) })
    .map(({ zone, span: [from, length], depthMm }) => (zoneCount === 0 ? [] : [{ zoneId: `z${zone % zoneCount}`, name: 'Fertilizer', fromOn: addDays(startOn, from), byOn: addDays(startOn, from + length), depthMm }]))),
  lockedSets: seldom(fc.array(fc.record({ position: fc.nat(), day: fc.integer({ min: -1, max: dayCount }), startMinutes: fc.integer({ min: 0, max: 1400 }), minutes: fc.integer({ min: 1, max: 200 }) }), { maxLength: 4 })
    .map((locks) => locks.map(({ position, day, ...each }) => ({ positionId: `p${positionCount === 0 ? 0 : position % positionCount}`, on: addDays(startOn, day), ...each })))),
  previousPlan: seldom(fc.array(fc.record({ position: fc.nat(), day: fc.integer({ min: 0, max: dayCount }) }), { maxLength: 8 })
    .map((sets) => sets.map(({ position, day }) => ({ positionId: `p${positionCount === 0 ? 0 : position % positionCount}`, on: addDays(startOn, day), startMinutes: 400, minutes: 30 })))),
});

/** Yards of every shape a person could enter, from nothing at all to more than the hours can hold. */
export const arbitraryYard: fc.Arbitrary<PlanInput> = fc.record({
  startOn: fc.integer({ min: 0, max: 800 }).map((days) => addDays('2026-01-01', days)),
  dayCount: fc.constantFrom(1, 4, 10, 10),
  tapCount: fc.constantFrom(0, 1, 1, 1, 2, 2, 3), zoneCount: fc.constantFrom(0, 1, 2, 3, 4, 6), positionCount: fc.constantFrom(0, 2, 4, 6, 8, 12),
}).chain(({ startOn, dayCount, tapCount, zoneCount, positionCount }) => {
  const day = fc.record({
    et0Mm: real(0, 9), rainMm: fc.oneof(fc.constant(0), real(0, 40)),
    rainProbabilityPct: fc.option(fc.integer({ min: 0, max: 100 })),
    tminC: fc.oneof({ weight: 4, arbitrary: real(1, 20) }, { weight: 1, arbitrary: real(-8, 3) }), spreadC: real(0, 18),
    windMps: fc.option(real(0, 9)),
    sun: fc.option(fc.tuple(fc.integer({ min: 200, max: 500 }), fc.integer({ min: 900, max: 1300 }))),
    hours: fc.option(fc.record({ rainMm: fc.array(fc.constantFrom(0, 0, 0, 0.2, 2), { minLength: 24, maxLength: 24 }), windMps: fc.array(real(0, 7), { minLength: 24, maxLength: 24 }) }), { nil: undefined, freq: 2 }),
    dayOff: fc.constantFrom(false, false, false, false, true), paceFactor: fc.constantFrom(1, 1, 1.5),
    homeWindows: fc.oneof({ weight: 4, arbitrary: fc.array(window, { minLength: 1, maxLength: 3 }) }, { weight: 1, arbitrary: fc.constant<MinuteWindow[]>([]) }),
  });
  const dose = fc.record({ atMinutes: real(0, 1440).map(Math.round), depthMm: real(0.5, 10) });
  const zone = fc.record({
    areaM2: real(1, 2000), priority: fc.integer({ min: 0, max: 3 }),
    totalAvailableMm: real(3, 80), lineShare: real(0, 1), depletionShare: real(0, 1),
    demandMmByDay: fc.array(real(0, 9), { minLength: dayCount, maxLength: dayCount }),
    intakeMmPerHour: real(0, 40), resting: fc.constantFrom(false, false, false, true),
    seed: fc.option(fc.record({
      dayNumber: fc.integer({ min: 0, max: 60 }), stage: fc.constantFrom('sown' as const, 'rooting' as const, 'taper' as const, 'established' as const),
      dosesByDay: fc.array(fc.array(dose, { maxLength: 4 }), { minLength: dayCount, maxLength: dayCount }),
    }), { freq: 3 }),
  });
  const position = fc.record({
    zone: fc.nat(), tap: fc.option(fc.nat(), { freq: 8 }), rateMmPerHour: fc.option(real(0.5, 60), { freq: 8 }), rateIsDefault: fc.boolean(),
    runTimeMultiplier: real(1, 2.5), zoneShare: real(0, 1), sortOrder: fc.integer({ min: 0, max: 9 }),
    depletionMm: fc.option(real(0, 60)), applied: fc.option(fc.record({ atMinutes: fc.integer({ min: 0, max: 1440 }), depthMm: real(0, 20) }), { freq: 2 }),
    device: fc.constantFrom<PlanDevice | undefined>(undefined, undefined, 'soaker', 'hand_held'), place: seldom(place), heightM: seldom(real(0, 5)), hoseLengthM: seldom(real(10, 60)),
    weekly: fc.option(fc.record({ depthMm: real(5, 40), appliedMm: fc.array(fc.constantFrom(0, 0, 0, 6), { minLength: 6, maxLength: 6 }) }), { freq: 5 }),
    alternate: seldom(fc.record({ lastWasHalfWay: fc.boolean() })),
  });
  return fc.record({
    limits: fc.option(limitsOf(startOn, dayCount, zoneCount, positionCount), { freq: 2 }),
    days: fc.array(day, { minLength: dayCount, maxLength: dayCount }),
    taps: fc.array(fc.record({ flowLpm: real(1, 40), flowIsDefault: fc.boolean(), shutOffTimer: fc.boolean(), place: seldom(place) }), { minLength: tapCount, maxLength: tapCount }),
    zones: fc.array(zone, { minLength: zoneCount, maxLength: zoneCount }),
    positions: fc.array(position, { minLength: zoneCount === 0 ? 0 : positionCount, maxLength: zoneCount === 0 ? 0 : positionCount }),
    rules: fc.integer({ min: 0, max: 3 }).chain((count) => fc.array(fc.tuple(ruleBase, ruleKind), { maxLength: count })),
    moveMinutes: fc.constantFrom(0, 3, 5, 10, 20), leadMinutes: fc.constantFrom(0, 5, 10, 60), maxWindMps: fc.constantFrom(4, 5, 8),
    notBeforeMinutes: fc.option(real(0, 1440).map(Math.round), { freq: 2 }),
  }).map((made): PlanInput => ({
    startOn, dayCount, notBeforeMinutes: made.notBeforeMinutes, moveMinutes: made.moveMinutes, leadMinutes: made.leadMinutes, maxWindMps: made.maxWindMps,
    days: made.days.map(({ spreadC, sun, ...each }, index) => ({
      ...each, on: addDays(startOn, index), tmaxC: each.tminC + spreadC, sunriseMinutes: sun?.[0] ?? null, sunsetMinutes: sun?.[1] ?? null,
    })),
    taps: made.taps.map((tap, index) => ({ id: `t${index}`, name: `Tap ${index}`, ...tap })),
    zones: made.zones.map(({ lineShare, depletionShare, ...each }, index) => ({
      id: `z${index}`, name: `Zone ${index}`, ...each, refillLineMm: lineShare * each.totalAvailableMm, depletionMm: depletionShare * each.totalAvailableMm,
    })),
    positions: made.positions.map(({ zone: zoneNumber, tap, applied: _applied, weekly, ...each }, index) => ({
      id: `p${index}`, name: `Position ${index}`, zoneId: `z${zoneNumber % zoneCount}`, tapId: tap === null || tapCount === 0 ? null : `t${tap % tapCount}`,
      hoseId: null, sprinklerId: null, sprinklerName: 'Oscillating', lowQuarterUniformity: null, ...each,
      ...(weekly && made.limits ? { weeklyLimit: { name: 'Drain field', source: null, ...weekly } } : {}),
    })),
    alreadyApplied: made.positions.flatMap((each, index) => (each.applied === null ? [] : [{ positionId: `p${index}`, ...each.applied }])),
    rules: made.rules.map(([base, kind], index): PlanRule => ({ id: `r${index}`, ...base, ...kind })),
    ...made.limits,
  }));
});
