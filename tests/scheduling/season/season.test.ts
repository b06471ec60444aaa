import fc from 'fast-check';
import { max, median, min } from 'simple-statistics';
import {
  coolingSeasonStartOn, firstFreeze, germinationWindows, nextFreezeOn, preventerWindow, PREVENTER_CLOSES_C, PREVENTER_OPENS_C, seasonDays, seasonOutlook, sowingWindows, SOWING_NEEDS, typicalDays, warmingSeasonStartOn,
  type SeasonDay,
} from '@/scheduling/season';
import { GRASS_IDS } from '@/scheduling/grass';
import { addDays, civilDaysFrom, dayOfYear, daysBetween } from '@/scheduling/units';
import type { DailyWeather } from '@/scheduling/weather';
import { unknownWeather } from '@/scheduling/weather/continuousDays';
import { recordedWeather, RECORD_SITES, seattleWeather } from '../../fixtures/vegaWeather';

/** A climate as a pure wave: coldest on the given day of the year. */
function wave(from: string, until: string, meanC: number, swingC: number, coldestDay: number): DailyWeather[] {
  return civilDaysFrom(from, until).map((on) => {
    const mean = meanC - swingC * Math.cos((2 * Math.PI * (dayOfYear(on) - coldestDay)) / 365.25);
    return { ...unknownWeather(on), tminC: mean - 6, tmaxC: mean + 6 };
  });
}
const north = (from = '2026-01-01', until = '2028-01-01') => wave(from, until, 12, 13, 20);
const south = (from = '2026-01-01', until = '2028-01-01') => wave(from, until, 12, 13, 203);
const newYork = recordedWeather('New York');
const seattle = recordedWeather('Seattle');
const between = (on: string | null | undefined, from: string, until: string) => {
  // In order of time the day stands between both: the failure then shows all three.
  expect([from, on, until]).toEqual([from, on ?? 'no day', until].sort());
};

describe('the halves of a year', () => {
  it('change sides at the equator', () => {
    expect([coolingSeasonStartOn(40, 2026), coolingSeasonStartOn(-40, 2026)]).toEqual(['2026-07-01', '2026-01-01']);
    expect([warmingSeasonStartOn(40, 2026), warmingSeasonStartOn(-40, 2026)]).toEqual(['2026-01-01', '2026-07-01']);
    expect(warmingSeasonStartOn(0, 2026)).toBe('2026-01-01');
    expect(() => coolingSeasonStartOn(91, 2026)).toThrow(expect.objectContaining({ field: 'latitudeDeg' }));
  });
});

describe('a typical year from records', () => {
  it('is unbroken over leap days and lies between the extremes on record (vega-datasets, New York 2012 to 2015)', () => {
    const days = typicalDays(newYork, '2027-12-01', '2028-03-05') ?? [];
    expect(days).toHaveLength(95);
    expect(days.some((day) => day.on === '2028-02-29')).toBe(true);
    for (const day of days) {
      expect(day.tminC).toBeGreaterThanOrEqual(min(newYork.map((each) => each.tminC ?? 0)));
      expect(day.tmaxC).toBeLessThanOrEqual(max(newYork.map((each) => each.tmaxC ?? 0)));
      expect(day.tminC).toBeLessThan(day.tmaxC);
    }
  });

  it('is the wave itself when every year is that wave', () => {
    const days = typicalDays(north('2020-01-01', '2024-01-01'), '2025-01-01', '2026-01-01') ?? [];
    const truth = north('2025-01-01', '2026-01-01');
    days.forEach((day, index) => expect(day.tminC).toBeCloseTo(truth[index]?.tminC ?? 99, 0));
  });

  it('is not made up where a part of the year has no record', () => {
    expect(typicalDays(newYork.filter((day) => day.on.slice(5, 7) !== '08'), '2026-01-01', '2027-01-01')).toBeNull();
  });
});

describe('the first freeze', () => {
  it.each([['New York', newYork], ['Seattle', seattle]] as const)('of %s is the one in its records', (city, records) => {
    const found = firstFreeze(records, RECORD_SITES[city].latitudeDeg, 2026);
    // Straight from the records, season by season.
    const days = [2012, 2013, 2014, 2015].map((year) => {
      const first = records.find((day) => day.on >= `${year}-07-01` && (day.tminC ?? 99) <= 0);
      return daysBetween(`${year}-07-01`, first?.on ?? '');
    });
    expect(found?.seasons).toBe(4);
    expect(found?.earlyOn).toBe(addDays('2026-07-01', min(days)));
    expect(found?.lateOn).toBe(addDays('2026-07-01', max(days)));
    expect(Math.abs(daysBetween('2026-07-01', found?.likelyOn ?? '') - median(days))).toBeLessThanOrEqual(0.5);
    // Both stations are known to freeze first in November (from memory).
    between(found?.likelyOn, '2026-11-01', '2026-11-30');
    expect(daysBetween(found?.hoseOffBy ?? '', found?.earlyOn ?? '')).toBe(7);
  });

  it('comes sooner for a lower bar, in order early, likely, late', () => {
    fc.assert(fc.property(fc.double({ min: -3, max: 6, noNaN: true }), fc.double({ min: 0, max: 3, noNaN: true }), (thresholdC, warmer) => {
      const cold = firstFreeze(newYork, 40.78, 2026, thresholdC);
      const mild = firstFreeze(newYork, 40.78, 2026, thresholdC + warmer);
      expect((mild?.likelyOn ?? '') <= (cold?.likelyOn ?? '9')).toBe(true);
      expect((cold?.earlyOn ?? '9') <= (cold?.likelyOn ?? '') && (cold?.likelyOn ?? '9') <= (cold?.lateOn ?? '')).toBe(true);
    }), { numRuns: 40 });
  });

  it('lies half a year away in the other hemisphere', () => {
    const inNorth = firstFreeze(north('2018-01-01', '2026-01-01'), 45, 2026);
    const inSouth = firstFreeze(south('2018-01-01', '2026-01-01'), -45, 2026);
    const gap = daysBetween(inSouth?.likelyOn ?? '', inNorth?.likelyOn ?? '');
    expect(Math.abs(gap - 182)).toBeLessThanOrEqual(3);
  });

  it('is not told from seasons with holes, and is none where it never freezes', () => {
    const holed = newYork.filter((day) => !(day.on.slice(5) >= '10-01' && day.on.slice(5) <= '11-30'));
    expect(firstFreeze(holed, 40.78, 2026)).toBeNull();
    const warm = wave('2018-01-01', '2026-01-01', 24, 4, 20);
    expect(firstFreeze(warm, 20, 2026)).toBeNull();
    expect(nextFreezeOn([{ on: '2026-11-01', tminC: 3 }, { on: '2026-11-02', tminC: null }, { on: '2026-11-03', tminC: -0.4 }])).toBe('2026-11-03');
    expect(nextFreezeOn([{ on: '2026-11-01', tminC: 3 }])).toBeNull();
  });
});

describe('the preventer window', () => {
  it('opens when the soil reaches 53 °F and closes before crabgrass comes up at 60 °F (Georgia, Indiana)', () => {
    const days = typicalDays(newYork, '2026-01-01', '2027-01-01') ?? [];
    const found = preventerWindow(days, 40.78, 2026);
    between(found.opensOn, '2026-04-01', '2026-05-10');
    between(found.closesOn, found.opensOn ?? '', '2026-06-10');
    const soilOn = (on: string | null) => days.find((day) => day.on === on)?.soilC ?? Number.NaN;
    expect(soilOn(found.opensOn)).toBeGreaterThanOrEqual(PREVENTER_OPENS_C);
    expect(soilOn(addDays(found.opensOn ?? '', -3))).toBeLessThan(PREVENTER_OPENS_C + 0.2);
    expect(soilOn(found.closesOn)).toBeGreaterThanOrEqual(PREVENTER_CLOSES_C);
    expect(daysBetween(found.opensOn ?? '', found.lastsUntilOn?.least ?? '')).toBe(60);
    expect(found.cautions[0]).toMatch(/label/);
  });

  it('comes earlier in a warmer spring, in both hemispheres', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 4, noNaN: true }), fc.boolean(), (warmerC, isSouth) => {
      const latitude = isSouth ? -45 : 45;
      const weather = isSouth ? south() : north();
      const plain = preventerWindow(seasonDays(weather), latitude, 2026);
      const warm = preventerWindow(seasonDays(weather.map((day) => ({ ...day, tminC: (day.tminC ?? 0) + warmerC, tmaxC: (day.tmaxC ?? 0) + warmerC }))), latitude, 2026);
      expect((warm.opensOn ?? '9') <= (plain.opensOn ?? '')).toBe(true);
      expect((warm.closesOn ?? '9') <= (plain.closesOn ?? '')).toBe(true);
      expect((plain.opensOn ?? '') >= (isSouth ? '2026-07-01' : '2026-01-01')).toBe(true);
    }), { numRuns: 20 });
  });

  it('says when the ground never was cold, and wants days of the right half-year', () => {
    const warm = seasonDays(wave('2026-01-01', '2027-01-01', 24, 3, 20));
    expect(preventerWindow(warm, 25, 2026)).toMatchObject({ isNeverCold: true, opensOn: null, closesOn: null, lastsUntilOn: null });
    expect(() => preventerWindow(warm, 25, 2030)).toThrow(expect.objectContaining({ field: 'days' }));
  });
});

describe('windows for sowing and overseeding', () => {
  it('lie before winter near New York about as Maryland has them, August 20 to October 15 (extension)', () => {
    const [best] = sowingWindows('tall_fescue', typicalDays(newYork, '2026-01-01', '2028-01-01') ?? []).windows;
    expect(best).toMatchObject({ season: 'before_winter', isClosed: true });
    between(best?.fromOn, '2026-08-10', '2026-09-05');
    between(best?.untilOn, '2026-09-25', '2026-11-05');
  });

  it('end sooner in a colder place: about September 15 where winter is that of Minnesota (extension: August 15 to September 15)', () => {
    // Monthly means of Minneapolis as a wave: 8 °C over the year, −9 °C in mid-January, 23 °C in mid-July (from memory).
    const minnesota = seasonDays(wave('2026-01-01', '2028-01-01', 7.5, 16.5, 17));
    const [best] = sowingWindows('kentucky_bluegrass', minnesota).windows;
    expect(best?.season).toBe('before_winter');
    between(best?.fromOn, '2026-08-05', '2026-08-25');
    between(best?.untilOn, '2026-09-01', '2026-09-29');
  });

  it('lie half a year apart in both hemispheres', () => {
    const find = (weather: DailyWeather[]) => sowingWindows('kentucky_bluegrass', seasonDays(weather)).windows.filter((window) => window.season === 'before_winter' && window.isClosed);
    const inNorth = find(north())[0];
    const inSouth = find(south())[0];
    const gap = daysBetween(inSouth?.untilOn ?? '', inNorth?.untilOn ?? '');
    expect(Math.min(Math.abs(gap - 182), Math.abs(gap + 183))).toBeLessThanOrEqual(4);
  });

  it('keep to the soil that the grass wants and leave the growing days that it needs', () => {
    const days = typicalDays(newYork, '2026-01-01', '2028-01-01') ?? [];
    for (const grass of GRASS_IDS) {
      const { windows, needs } = sowingWindows(grass, days);
      expect(windows.length).toBeGreaterThan(0);
      for (const window of windows) {
        const inside = days.filter((day) => day.on >= window.fromOn && day.on <= window.untilOn);
        const outside = inside.filter((day) => day.soilC < needs.leastSoilC || day.soilC > needs.mostSoilC);
        expect(outside.length).toBeLessThan(inside.length / 3);
        if (window.season === 'before_winter') {
          const rest = days.find((day, index) => day.on > window.untilOn && days.slice(index, index + 7).every((each) => each.soilC < needs.restSoilC));
          expect(daysBetween(window.untilOn, rest?.on ?? '9999-12-31')).toBeGreaterThan(needs.rootingDays);
        }
      }
    }
  });

  it('ask warmer soil of warm-season grass, in late spring and early summer, and let cool-season seed sleep through winter', () => {
    const days = typicalDays(newYork, '2026-01-01', '2028-01-01') ?? [];
    const bermuda = sowingWindows('bermuda', days);
    between(bermuda.windows[0]?.fromOn, '2026-05-01', '2026-06-30');
    expect(bermuda.dormantFromOn).toBeNull();
    const dormant = sowingWindows('kentucky_bluegrass', days).dormantFromOn;
    between(dormant, '2026-11-15', '2027-01-31');
  });

  it('let the record run out without guessing', () => {
    const cut = typicalDays(newYork, '2026-01-01', '2026-09-15') ?? [];
    expect(sowingWindows('tall_fescue', cut).windows.filter((window) => window.season === 'before_winter')).toEqual([]);
  });

  it('name germination days that suit, but for breaks of up to three (recorded years)', () => {
    const days = seasonDays(seattleWeather());
    const needs = SOWING_NEEDS.cool;
    const windows = germinationWindows('perennial_ryegrass', days);
    expect(windows.length).toBeGreaterThan(3);
    const suits = (day: SeasonDay) => day.soilC >= needs.leastSoilC && day.soilC <= needs.mostSoilC;
    for (const window of windows) {
      const inside = days.filter((day) => day.on >= window.fromOn && day.on <= window.untilOn);
      expect(inside).toHaveLength(window.days);
      for (let index = 0; index + 3 <= inside.length; index += 1) {
        expect(inside.slice(index, index + 3).some(suits)).toBe(true);
      }
    }
  });

  it('refuse days that do not follow each other and days without temperatures', () => {
    expect(() => seasonDays([...north('2026-01-01', '2026-01-03'), ...north('2026-01-05', '2026-01-06')])).toThrow(expect.objectContaining({ field: 'days[2].on' }));
    expect(() => seasonDays([unknownWeather('2026-01-01')])).toThrow(expect.objectContaining({ field: 'days' }));
  });
});

describe('the outlook of a season', () => {
  const years = newYork;
  const outlook = (today: string, known: DailyWeather[] = [], records = years, latitudeDeg = 40.8) => seasonOutlook({ latitudeDeg, today, records, known, grasses: ['tall_fescue', 'bermuda'] });

  it('shows what is open or comes, and nothing that is over', () => {
    for (const today of ['2026-01-05', '2026-04-25', '2026-06-20', '2026-09-10', '2026-12-01']) {
      const found = outlook(today);
      if (!found) throw new Error('the records cover the calendar');
      for (const { sowing, germination, dormantFromOn } of found.grasses) {
        [...sowing, ...germination].forEach((window) => expect(window.untilOn >= today && window.fromOn <= window.untilOn).toBe(true));
        expect(sowing.length).toBeGreaterThan(0);
        if (dormantFromOn !== null) expect(daysBetween(today, dormantFromOn)).toBeGreaterThanOrEqual(-60);
      }
      expect(found.preventer.closesOn === null || found.preventer.closesOn >= today).toBe(true);
      expect((found.freeze?.lateOn ?? today) >= today).toBe(true);
      expect(daysBetween(today, found.freeze?.likelyOn ?? today)).toBeLessThan(400);
    }
    expect(outlook('2026-04-25')?.preventer.opensOn?.slice(0, 4)).toBe('2026');
    expect(outlook('2026-06-20')?.preventer.opensOn?.slice(0, 4)).toBe('2027');
    expect(outlook('2026-12-01')?.grasses[0]?.dormantFromOn ?? '').toMatch(/^(2026-12|2027-01)/);
  });

  it('takes this year as it is: a warm spring brings the preventer sooner, and the soil of today is told by it', () => {
    const usual = outlook('2026-04-01');
    const warm = outlook('2026-04-01', civilDaysFrom('2026-02-01', '2026-04-11').map((on) => ({ ...unknownWeather(on), tminC: 10, tmaxC: 18 })));
    expect(usual?.soilIsKnown).toBe(false);
    expect(warm?.soilIsKnown).toBe(true);
    // an 11-day mean of 14 degrees (Zheng, Hunt, Running 1993)
    expect(warm?.soilC).toBeCloseTo(14, 6);
    expect((warm?.preventer.opensOn ?? '9') < (usual?.preventer.opensOn ?? '0')).toBe(true);
  });

  it('names the first freeze of the forecast', () => {
    const known = ['2026-10-20', '2026-10-21', '2026-10-22'].map((on, index) => ({ ...unknownWeather(on), tminC: 2 - index * 1.5, tmaxC: 9 }));
    expect(outlook('2026-10-20', known)?.nextFreezeOn).toBe('2026-10-22');
    expect(outlook('2026-10-20')?.nextFreezeOn).toBeNull();
  });

  it('is half a year apart in the south, and null where the records have a hole', () => {
    const found = outlook('2026-06-13', [], south('2020-01-01', '2024-01-01'), -37);
    expect(found?.grasses[0]?.sowing[0]?.season).toBe('before_winter');
    expect(found?.grasses[0]?.sowing[0]?.fromOn.slice(5, 7) ?? '').toMatch(/0[1-4]/);
    expect(outlook('2026-06-13', [], newYork.filter((day) => day.on.slice(5, 7) !== '08'))).toBeNull();
  });
});
