import { daylightMinutes, instantFrom, skippedWindows, withoutWindows } from '@/server/commands/wallClock';

describe('hours that clocks leave out', () => {
  it.each([
    ['America/New_York', '2026-03-08', [{ fromMinutes: 120, toMinutes: 180 }]],
    ['America/New_York', '2026-11-01', []],
    ['America/New_York', '2026-06-13', []],
    ['Australia/Lord_Howe', '2026-10-04', [{ fromMinutes: 120, toMinutes: 150 }]],
    ['Europe/Berlin', '2026-03-29', [{ fromMinutes: 120, toMinutes: 180 }]],
    // clocks go from 24:00 to 1:00, so that the day begins at one
    ['America/Santiago', '2026-09-06', [{ fromMinutes: 0, toMinutes: 60 }]],
    ['Asia/Kolkata', '2026-03-29', []],
  ])('in %s on %s are %j', (timeZone, on, expected) => {
    expect(skippedWindows(on, timeZone)).toEqual(expected);
  });

  it('are taken out of hours at home', () => {
    const hole = [{ fromMinutes: 120, toMinutes: 180 }];
    expect(withoutWindows([{ fromMinutes: 60, toMinutes: 300 }], hole)).toEqual([{ fromMinutes: 60, toMinutes: 120 }, { fromMinutes: 180, toMinutes: 300 }]);
    expect(withoutWindows([{ fromMinutes: 120, toMinutes: 180 }, { fromMinutes: 400, toMinutes: 500 }], hole)).toEqual([{ fromMinutes: 400, toMinutes: 500 }]);
    expect(withoutWindows([{ fromMinutes: 60, toMinutes: 130 }], [])).toEqual([{ fromMinutes: 60, toMinutes: 130 }]);
  });
});

describe('the instant of a wall-clock time', () => {
  it('that comes twice is the first unless that has gone by', () => {
    const on = '2026-11-01';
    expect(instantFrom(on, 90, 'America/New_York', new Date('2026-11-01T04:00:00Z')).toISOString()).toBe('2026-11-01T05:30:00.000Z');
    expect(instantFrom(on, 90, 'America/New_York', new Date('2026-11-01T05:45:00Z')).toISOString()).toBe('2026-11-01T06:30:00.000Z');
    expect(instantFrom(on, 90, 'America/New_York', new Date('2026-11-01T09:00:00Z')).toISOString()).toBe('2026-11-01T06:30:00.000Z');
  });

  it('that has gone by and comes once stays in the past', () => {
    expect(instantFrom('2026-06-13', 90, 'America/New_York', new Date('2026-06-13T12:00:00Z')).toISOString()).toBe('2026-06-13T05:30:00.000Z');
  });
});

describe('daylight on the clocks of a place', () => {
  it('of Golden, Colorado agrees with the Naval Observatory', () => {
    // United States Naval Observatory, Golden CO, 2 January: 7:22 and 16:48 MST (quoted in the tests of pvlib)
    const { sunriseMinutes, sunsetMinutes } = daylightMinutes({ latitudeDeg: 39.74, longitudeDeg: -105.18, timeZone: 'America/Denver' }, '2015-01-02');
    expect(Math.abs((sunriseMinutes ?? 0) - (7 * 60 + 22))).toBeLessThanOrEqual(1);
    expect(Math.abs((sunsetMinutes ?? 0) - (16 * 60 + 48))).toBeLessThanOrEqual(1);
  });

  it('follows the clock when it changes', () => {
    const place = { latitudeDeg: 40.93, longitudeDeg: -73.9, timeZone: 'America/New_York' };
    const before = daylightMinutes(place, '2026-03-07');
    const after = daylightMinutes(place, '2026-03-08');
    expect((after.sunriseMinutes ?? 0) - (before.sunriseMinutes ?? 0)).toBeGreaterThan(55);
    expect((after.sunriseMinutes ?? 0) - (before.sunriseMinutes ?? 0)).toBeLessThan(62);
  });
});
