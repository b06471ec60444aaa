import fc from 'fast-check';
import { addDays, civilDayFromEpochDay, civilDaysFrom, dayOfYear, daysBetween, epochDayOf, isCivilDay, isLeapYear, PhysicsError, weekdayOf } from '@/scheduling/units';

const anyEpochDay = fc.integer({ min: -700_000, max: 2_900_000 });

describe('civil days', () => {
  it('knows the day numbers of FAO-56 annex 2, table 2.5', () => {
    expect(dayOfYear('2015-03-01')).toBe(60);
    expect(dayOfYear('2015-07-01')).toBe(182);
    expect(dayOfYear('2015-10-01')).toBe(274);
    expect(dayOfYear('2016-03-01')).toBe(61);
    expect(dayOfYear('2016-12-31')).toBe(366);
    expect(dayOfYear('2015-12-31')).toBe(365);
  });

  it('refuses days that do not exist', () => {
    for (const bad of ['2015-02-29', '2016-02-30', '1900-02-29', '2015-13-01', '2015-00-10', '2015-04-31', '2015-1-1', '0000-01-01', '', '2015-01-01T00:00', null, 20150101]) {
      expect(isCivilDay(bad)).toBe(false);
    }
    expect(isCivilDay('2016-02-29')).toBe(true);
    expect(isCivilDay('2000-02-29')).toBe(true);
    expect(() => addDays('2015-02-30', 1)).toThrow(PhysicsError);
    expect(() => addDays('2015-02-28', 0.5)).toThrow(PhysicsError);
  });

  it('steps over month ends, leap days and new year', () => {
    expect(addDays('2016-02-28', 1)).toBe('2016-02-29');
    expect(addDays('2015-02-28', 1)).toBe('2015-03-01');
    expect(addDays('2015-12-31', 1)).toBe('2016-01-01');
    expect(addDays('2016-01-01', -1)).toBe('2015-12-31');
    expect(daysBetween('2015-01-01', '2016-01-01')).toBe(365);
    expect(daysBetween('2016-01-01', '2015-12-31')).toBe(-1);
    expect(civilDaysFrom('2015-12-30', '2016-01-02')).toEqual(['2015-12-30', '2015-12-31', '2016-01-01']);
    expect(civilDaysFrom('2016-01-02', '2016-01-02')).toEqual([]);
  });

  it('agrees with the language\'s own UTC calendar on every day', () => {
    fc.assert(fc.property(anyEpochDay, (epochDay) => {
      const on = civilDayFromEpochDay(epochDay);
      const utc = new Date(epochDay * 86_400_000);
      expect(on).toBe(utc.toISOString().slice(0, 10));
      expect(weekdayOf(on)).toBe(utc.getUTCDay());
      expect(epochDayOf(on)).toBe(epochDay);
      const yearStart = new Date(utc);
      yearStart.setUTCMonth(0, 1);
      expect(dayOfYear(on)).toBe((utc.getTime() - yearStart.getTime()) / 86_400_000 + 1);
    }));
  });

  it('adds and subtracts back', () => {
    fc.assert(fc.property(anyEpochDay, fc.integer({ min: -1000, max: 1000 }), (epochDay, days) => {
      const on = civilDayFromEpochDay(epochDay);
      expect(daysBetween(on, addDays(on, days))).toBe(days);
      expect(addDays(addDays(on, days), -days)).toBe(on);
    }));
  });

  it('counts leap years by the Gregorian rule', () => {
    expect([1900, 2000, 2012, 2014, 2100].map(isLeapYear)).toEqual([false, true, true, false, false]);
  });
});
