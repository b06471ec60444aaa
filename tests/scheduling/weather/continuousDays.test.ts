import { continuousDays, temperaturesOfDays, unknownWeather } from '@/scheduling/weather/continuousDays';

const day = (on: string, tminC: number | null, tmaxC: number | null) => ({ ...unknownWeather(on), tminC, tmaxC });

describe('an unbroken row of days', () => {
  it('takes what is stored and leaves the rest unknown', () => {
    const row = continuousDays([day('2026-02-27', 1, 5), day('2026-03-01', 2, 6), day('2027-01-01', 0, 0)], '2026-02-26', '2026-03-02');
    expect(row.map((one) => [one.on, one.tmaxC])).toEqual([['2026-02-26', null], ['2026-02-27', 5], ['2026-02-28', null], ['2026-03-01', 6]]);
  });
});

describe('temperatures of every day', () => {
  it('are its own where known, and say when they are not', () => {
    expect(temperaturesOfDays([day('2026-06-01', 10, 20), day('2026-06-02', 12, 24), day('2026-06-03', null, null)])).toEqual([
      { tminC: 10, tmaxC: 20, carried: false }, { tminC: 12, tmaxC: 24, carried: false }, { tminC: 11, tmaxC: 22, carried: true },
    ]);
  });

  it('come from the days after when none is known before, and from the nearest when none is near', () => {
    const early = temperaturesOfDays([day('2026-06-01', null, null), day('2026-06-02', 12, 24)]);
    expect(early?.[0]).toEqual({ tminC: 12, tmaxC: 24, carried: true });
    const far = temperaturesOfDays([day('2026-06-01', 8, 16), ...Array.from({ length: 30 }, (_, index) => day(`2026-07-${String(index + 1).padStart(2, '0')}`, null, null))]);
    expect(far?.[30]).toEqual({ tminC: 8, tmaxC: 16, carried: true });
  });

  it('of a day with one extreme only are not trusted', () => {
    expect(temperaturesOfDays([day('2026-06-01', 10, 20), day('2026-06-02', 35, null)])?.[1]).toEqual({ tminC: 10, tmaxC: 20, carried: true });
  });

  it('are none when nothing is known', () => {
    expect(temperaturesOfDays([day('2026-06-01', null, 20)])).toBeNull();
  });
});
