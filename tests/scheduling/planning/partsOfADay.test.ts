import fc from 'fast-check';
import { believedRainChance, expectedRainMm } from '@/scheduling/planning/expectedRain';
import { intersectWindows, normalizeWindows, totalMinutes, windowHolding } from '@/scheduling/planning/minuteWindows';
import { endOfDayDepletionMm } from '@/scheduling/planning/patchBalance';
import { frostFreeWindows, temperatureAtMinutes } from '@/scheduling/planning/temperatureCurve';
import type { PlanRule } from '@/scheduling/planning/types';
import { isInSeason, openingByRules } from '@/scheduling/planning/waterRules';

const rule = (overrides: Partial<PlanRule> & Pick<PlanRule, 'kind'>): PlanRule =>
  ({ id: overrides.kind, name: overrides.kind, source: null, sourceOn: null, season: null, exemptSeeded: false, ...overrides }) as PlanRule;
const open = (rules: PlanRule[], on: string, isSeeded = false) => openingByRules(rules, on, isSeeded).windows.map((window) => [window.fromMinutes, window.toMinutes]);
const whole = [[0, 1440]];

describe('water rules', () => {
  it('open odd dates to odd addresses and even ones to even', () => {
    expect(open([rule({ kind: 'date_parity', parity: 'odd' })], '2026-06-13')).toEqual(whole);
    expect(open([rule({ kind: 'date_parity', parity: 'even' })], '2026-06-13')).toEqual([]);
    expect(open([rule({ kind: 'date_parity', parity: 'odd' })], '2026-07-31')).toEqual(whole);
    expect(open([rule({ kind: 'date_parity', parity: 'odd' })], '2026-08-01')).toEqual(whole);
  });

  it('count weekdays from Sunday', () => {
    expect(open([rule({ kind: 'weekdays', weekdays: [6] })], '2026-06-13')).toEqual(whole);
    expect(open([rule({ kind: 'weekdays', weekdays: [0] })], '2026-06-13')).toEqual([]);
    expect(open([rule({ kind: 'weekdays', weekdays: [4] })], '2028-02-29')).toEqual([]);
    expect(open([rule({ kind: 'weekdays', weekdays: [2] })], '2028-02-29')).toEqual(whole);
  });

  it('hold together: 6 to 9 in the morning and evening on odd dates (St Charles, Illinois)', () => {
    const town = rule({ kind: 'combination', weekdays: null, parity: 'odd', allowed: [{ fromMinutes: 360, toMinutes: 540 }, { fromMinutes: 1080, toMinutes: 1260 }] });
    expect(open([town], '2026-06-13')).toEqual([[360, 540], [1080, 1260]]);
    expect(open([town, rule({ kind: 'hours', allowed: [{ fromMinutes: 500, toMinutes: 1100 }] })], '2026-06-13')).toEqual([[500, 540], [1080, 1100]]);
    expect(open([town], '2026-06-14')).toEqual([]);
  });

  it('name the rule that closes the day', () => {
    expect(openingByRules([rule({ kind: 'weekdays', weekdays: [1] })], '2026-06-13', false).closedBy?.kind).toBe('weekdays');
  });

  it('bind only in their season, which may run over New Year', () => {
    const summer = { fromMonth: 5, fromDay: 15, toMonth: 10, toDay: 1 };
    expect([isInSeason(summer, '2026-05-14'), isInSeason(summer, '2026-05-15'), isInSeason(summer, '2026-10-01'), isInSeason(summer, '2026-10-02')]).toEqual([false, true, true, false]);
    const winter = { fromMonth: 11, fromDay: 1, toMonth: 2, toDay: 29 };
    expect([isInSeason(winter, '2026-12-31'), isInSeason(winter, '2028-02-29'), isInSeason(winter, '2026-03-01')]).toEqual([true, true, false]);
    expect(open([rule({ kind: 'weekdays', weekdays: [], season: winter })], '2026-06-13')).toEqual(whole);
  });

  it('spare new seed when they exempt it', () => {
    const strict = rule({ kind: 'weekdays', weekdays: [], exemptSeeded: true });
    expect(open([strict], '2026-06-13', false)).toEqual([]);
    expect(open([strict], '2026-06-13', true)).toEqual(whole);
  });
});

describe('windows of minutes', () => {
  const windows = fc.array(fc.tuple(fc.integer({ min: -100, max: 1500 }), fc.integer({ min: -100, max: 1500 })).map(([fromMinutes, toMinutes]) => ({ fromMinutes, toMinutes })), { maxLength: 8 });
  const has = (list: readonly { fromMinutes: number; toMinutes: number }[], minute: number) => list.some((window) => minute >= window.fromMinutes && minute < window.toMinutes);

  it('hold the same minutes after tidying, apart and in order', () => {
    fc.assert(fc.property(windows, fc.integer({ min: 0, max: 1439 }), (list, minute) => {
      const tidy = normalizeWindows(list);
      expect(has(tidy, minute)).toBe(has(list, minute));
      tidy.slice(1).forEach((window, index) => expect(window.fromMinutes).toBeGreaterThan(tidy[index]?.toMinutes ?? 0));
      expect(totalMinutes(tidy)).toBeLessThanOrEqual(1440);
    }));
  });

  it('share exactly the minutes that both hold', () => {
    fc.assert(fc.property(windows, windows, fc.integer({ min: 0, max: 1439 }), (a, b, minute) => {
      expect(has(intersectWindows(normalizeWindows(a), normalizeWindows(b)), minute)).toBe(has(a, minute) && has(b, minute));
    }));
  });

  it('find the one that holds a whole span', () => {
    const two = [{ fromMinutes: 100, toMinutes: 200 }, { fromMinutes: 300, toMinutes: 400 }];
    expect(windowHolding(two, 300, 400)).toBe(two[1]);
    expect(windowHolding(two, 150, 350)).toBeNull();
  });
});

describe('rain to count on', () => {
  it('is the forecast times its chance, less believed the farther off', () => {
    expect(expectedRainMm({ rainMm: 10, et0Mm: 5, rainProbabilityPct: 70 }, 0)).toBeCloseTo(7, 9);
    expect(believedRainChance({ rainProbabilityPct: 100 }, 9)).toBe(0.6);
    expect(believedRainChance({ rainProbabilityPct: null }, 0)).toBe(0.8);
    for (let lead = 1; lead < 12; lead += 1) {
      expect(believedRainChance({ rainProbabilityPct: null }, lead)).toBeLessThanOrEqual(believedRainChance({ rainProbabilityPct: null }, lead - 1));
      expect(believedRainChance({ rainProbabilityPct: 50 }, lead)).toBeLessThanOrEqual(believedRainChance({ rainProbabilityPct: 50 }, lead - 1));
    }
  });

  it('leaves out rain under a fifth of reference ET (FAO-56 chapter 8)', () => {
    expect(expectedRainMm({ rainMm: 0.9, et0Mm: 5, rainProbabilityPct: 100 }, 0)).toBe(0);
    expect(expectedRainMm({ rainMm: 1, et0Mm: 5, rainProbabilityPct: 100 }, 0)).toBe(1);
  });
});

describe('the root zone over a day', () => {
  it('follows FAO-56 example 37 through ten dry days (TAW 160, RAW 64, start 55, demand 6)', () => {
    const printed = [61, 67, 72.8, 78.3, 83.4, 88.2, 92.6, 96.9, 100.8, 104.5];
    let depletionMm = 55;
    for (const wanted of printed) {
      depletionMm = endOfDayDepletionMm({ depletionMm, irrigationMm: 0, rainMm: 0, demandMm: 6, totalAvailableMm: 160, refillLineMm: 64 });
      expect(Math.abs(depletionMm - wanted)).toBeLessThanOrEqual(0.1);
    }
  });

  it('never leaves the soil store, and surplus drains', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 40, noNaN: true }), fc.double({ min: 0, max: 99, noNaN: true }), fc.double({ min: 0, max: 12, noNaN: true }), fc.double({ min: 0, max: 40, noNaN: true }), (depletionMm, waterMm, demandMm, refillLineMm) => {
      const end = endOfDayDepletionMm({ depletionMm, irrigationMm: waterMm, rainMm: 0, demandMm, totalAvailableMm: 40, refillLineMm });
      expect(end).toBeGreaterThanOrEqual(0);
      expect(end).toBeLessThanOrEqual(40);
      expect(end).toBeLessThanOrEqual(Math.max(0, depletionMm - waterMm) + demandMm + 1e-9);
    }));
  });
});

describe('frost', () => {
  const cold = { tminC: -3, tmaxC: 9, sunriseMinutes: 420 };

  it('is coldest at sunrise and warmest at three', () => {
    expect(temperatureAtMinutes(cold, 420)).toBeCloseTo(-3, 9);
    expect(temperatureAtMinutes(cold, 900)).toBeCloseTo(9, 9);
    for (let minute = 0; minute < 1440; minute += 5) {
      expect(temperatureAtMinutes(cold, minute)).toBeGreaterThanOrEqual(-3 - 1e-9);
      expect(temperatureAtMinutes(cold, minute)).toBeLessThanOrEqual(9 + 1e-9);
    }
  });

  it('leaves the warm hours of a cold day, all of a mild one and none of a freezing one', () => {
    const warm = frostFreeWindows(cold);
    expect(warm.some((window) => window.fromMinutes <= 720 && window.toMinutes >= 1000)).toBe(true);
    expect(warm.some((window) => window.fromMinutes <= 420 && window.toMinutes > 420)).toBe(false);
    expect(frostFreeWindows({ ...cold, tminC: 1 })).toEqual([{ fromMinutes: 0, toMinutes: 1440 }]);
    expect(frostFreeWindows({ ...cold, tmaxC: 0 })).toEqual([]);
  });
});
