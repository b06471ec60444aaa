import fc from 'fast-check';
import { DEFAULT_SCHEDULE } from '@/scheduling/establishment';
import { monthFit } from '@/scheduling/planning/monthFit';
import { estimatedYear, recordedClimate } from '@/scheduling/planning/monthFitClimate';
import { zoneWaterByMonth } from '@/scheduling/planning/monthFitDemand';
import { comingMonths } from '@/scheduling/planning/monthFitHours';
import type { FitDay, FitPosition, FitRemedy, FitTap, FitZone, MonthFitInput } from '@/scheduling/planning/monthFitTypes';
import { hoseHours } from '@/scheduling/sprinkler/hoseHours';
import { addDays, civilDaysFrom } from '@/scheduling/units/civilDay';
import { m2FromSquareFeet, lpmFromGpm, mmFromInches } from '@/scheduling/units/conversions';
import { RECORD_SITES, recordedWeather } from '../../fixtures/vegaWeather';

/** A year of equal days. */
const evenYear = (day: Partial<FitDay> = {}): FitDay[] => civilDaysFrom('2025-01-01', '2026-01-01').map((on) => ({ on, et0Mm: 0, rainMm: 0, tminC: 10, tmaxC: 24, isEstimated: false, ...day }));
/** Dry days of one ET0 in one month, none in the others. */
const oneMonth = (month: string, et0Mm: number): FitDay[] => evenYear().map((day) => (day.on.slice(5, 7) === month ? { ...day, et0Mm } : day));

const tap = (overrides: Partial<FitTap> = {}): FitTap => ({ id: 'tap', name: 'Tap', flowLpm: 18, shutOffTimer: false, ...overrides });
const zone = (overrides: Partial<FitZone> = {}): FitZone => ({
  id: 'zone', name: 'Lawn', areaM2: 90, priority: 1, demandShareByMonth: Array.from({ length: 12 }, () => 1), totalAvailableMm: 30, refillLineMm: 12, resting: false, sowing: null, ...overrides,
});
const position = (overrides: Partial<FitPosition> = {}): FitPosition => ({ id: 'spot', zoneId: 'zone', tapId: 'tap', rateMmPerHour: 12, runTimeMultiplier: 1, wettedAreaM2: 90, hose: null, ...overrides });
const input = (overrides: Partial<MonthFitInput> = {}): MonthFitInput => ({
  startOn: '2026-03-10', climate: oneMonth('07', 5), zones: [zone()], positions: [position()], taps: [tap()], rules: [],
  homeByWeekday: Array.from({ length: 7 }, () => [{ fromMinutes: 360, toMinutes: 480 }]), moveMinutes: 5, leadMinutes: 5, ...overrides,
});
const monthNamed = (asked: MonthFitInput, month: string) => {
  const found = monthFit(asked).months.find((one) => one.month === month);
  if (!found) throw new Error(`No month ${month}.`);
  return found;
};
const remedy = <K extends FitRemedy['kind']>(asked: MonthFitInput, kind: K): Extract<FitRemedy, { kind: K }> | undefined => monthFit(asked).remedies.find((one): one is Extract<FitRemedy, { kind: K }> => one.kind === kind);

describe('hours needed', () => {
  it('are those of the trade\'s example, one inch on 5,000 sq ft at 5 gpm in 10.4 h (hose-hours arithmetic)', () => {
    const areaM2 = m2FromSquareFeet(5_000);
    const flowLpm = lpmFromGpm(5);
    const inch = mmFromInches(1);
    // A lawn that reaches a line of one inch once in July: half-way filled at the start, then 5.08 mm a day on 3 days.
    const climate = evenYear().map((day) => (day.on >= '2025-07-10' && day.on < '2025-07-13' ? { ...day, et0Mm: (inch / 2 + 0.001) / 3 } : day));
    const asked = input({
      climate, taps: [tap({ flowLpm })], zones: [zone({ areaM2, totalAvailableMm: 60, refillLineMm: inch })],
      positions: [position({ rateMmPerHour: (flowLpm * 60) / areaM2, wettedAreaM2: areaM2 })], moveMinutes: 0,
    });
    expect(monthNamed(asked, '2026-07').neededHours).toBeCloseTo(hoseHours({ areaM2, depthMm: inch, flowLpm }).hours, 2);
    expect(monthNamed(asked, '2026-07').neededHours).toBeCloseTo(10.4, 1);
  });

  it('are those of a plain sum: what a month dries, less its rain, by the rate, with a move for each set', () => {
    // 31 days of 5 mm and half a line to begin with: 6 + 155 mm, filled each time it passes 12 mm.
    const july = monthNamed(input(), '2026-07');
    const sets = Math.floor((6 + 155) / 15);
    expect(july.moveHours).toBeCloseTo((sets * 5) / 60, 6);
    expect(july.neededHours - july.moveHours).toBeGreaterThan((155 - 15) / 12);
    expect(july.neededHours - july.moveHours).toBeLessThan((155 + 6) / 12 + 0.01);
    expect(monthNamed(input(), '2026-06').neededHours).toBe(0);
  });

  it('leave no water unaccounted for: depletion at the end is what dried less what was given (recorded Seattle days)', () => {
    const climate = recordedClimate(RECORD_SITES.Seattle, recordedWeather('Seattle').map((day) => ({ ...day, precipitationMm: 0 })));
    const water = zoneWaterByMonth(zone(), climate);
    const given = [...water.values()].reduce((sum, month) => sum + month.netMm, 0);
    const dried = climate.reduce((sum, day) => sum + day.et0Mm, 0);
    expect(6 + dried - given).toBeGreaterThanOrEqual(0);
    expect(6 + dried - given).toBeLessThanOrEqual(30);
  });

  it('come with the least and the most of the years, and the mean between them', () => {
    const climate = recordedClimate(RECORD_SITES['New York'], recordedWeather('New York'));
    const fit = monthFit(input({ climate }));
    expect(fit.years).toBe(4);
    for (const month of fit.months) {
      expect(month.neededHours).toBeGreaterThanOrEqual(month.leastHours - 1e-9);
      expect(month.neededHours).toBeLessThanOrEqual(month.mostHours + 1e-9);
    }
    const july = fit.months.find((month) => month.month === '2026-07');
    expect(july?.mostHours).toBeGreaterThan((july?.leastHours ?? 0) + 1);
  });

  it('are none for a zone at rest, and none where frost forbids', () => {
    expect(monthNamed(input({ zones: [zone({ resting: true })] }), '2026-07').neededHours).toBe(0);
    expect(monthNamed(input({ climate: oneMonth('07', 5).map((day) => ({ ...day, tminC: -3 })) }), '2026-07').neededHours).toBe(0);
  });
});

describe('hours had', () => {
  it('count the days of each month that the rules open, less the minutes to get ready', () => {
    const weekdays = { id: 'r', name: 'Two days', source: null, sourceOn: null, season: { fromMonth: 5, fromDay: 1, toMonth: 9, toDay: 30 }, exemptSeeded: false, kind: 'weekdays' as const, weekdays: [2, 6] };
    const asked = input({ rules: [weekdays] });
    // July 2026 has four Tuesdays and four Saturdays; April is out of season and has 30 days.
    expect(monthNamed(asked, '2026-07').hadHours).toBeCloseTo((8 * 115) / 60, 6);
    expect(monthNamed(asked, '2026-04').hadHours).toBeCloseTo((30 * 115) / 60, 6);
  });

  it('are counted at every tap in use, and time at one does not help the other', () => {
    const both = input({ taps: [tap(), tap({ id: 'second' }), tap({ id: 'unused' })], zones: [zone(), zone({ id: 'other' })], positions: [position({ rateMmPerHour: 2.5 }), position({ id: 'b', zoneId: 'other', tapId: 'second' })] });
    const july = monthNamed(both, '2026-07');
    expect(july.taps).toHaveLength(2);
    expect(july.hadHours).toBeCloseTo((2 * 31 * 115) / 60, 6);
    expect(july.neededHours).toBeLessThan(july.hadHours);
    expect(july.shortHours).toBeGreaterThan(0);
    expect(monthFit(both).fits).toBe(false);
  });

  it('are none with nobody at home, and the year then does not fit', () => {
    const fit = monthFit(input({ homeByWeekday: Array.from({ length: 7 }, () => []) }));
    expect(fit.months.every((month) => month.hadHours === 0)).toBe(true);
    expect(fit).toMatchObject({ fits: false, tightestMonth: '2026-07' });
  });
});

describe('the year', () => {
  it('begins with this month and has twelve, over New Year', () => {
    expect(comingMonths('2026-11-30')).toEqual(['2026-11', '2026-12', '2027-01', '2027-02', '2027-03', '2027-04', '2027-05', '2027-06', '2027-07', '2027-08', '2027-09', '2027-10']);
  });

  it('that fits names the month that takes most of its hours and no remedy', () => {
    expect(monthFit(input())).toMatchObject({ fits: true, tightestMonth: '2026-07', remedies: [] });
  });

  it('of a yard without zones or positions is empty and fits', () => {
    expect(monthFit(input({ zones: [], positions: [] }))).toMatchObject({ fits: true, tightestMonth: null, remedies: [] });
    expect(monthFit(input({ positions: [], taps: [] }))).toMatchObject({ fits: true, tightestMonth: null });
  });

  it('refuses numbers that cannot be, with the field named', () => {
    expect(() => monthFit(input({ climate: evenYear().slice(0, 100) }))).toThrow('climate');
    expect(() => monthFit(input({ taps: [tap({ flowLpm: 0 })] }))).toThrow('taps[0].flowLpm');
  });
});

describe('what would help', () => {
  /** 155 mm at 2.5 mm/h: some 65 hours where 59 are had. */
  const tight = (overrides: Partial<MonthFitInput> = {}) => input({ positions: [position({ rateMmPerHour: 2 })], ...overrides });

  it('is ranked by what is left lacking', () => {
    const { remedies } = monthFit(tight({ positions: [position({ rateMmPerHour: 2, hose: { lengthM: 30, boreMm: 12.7 } })] }));
    expect(remedies.length).toBeGreaterThan(2);
    remedies.slice(1).forEach((one, index) => expect(one.leftYearHours).toBeGreaterThanOrEqual(remedies[index]?.leftYearHours ?? 0));
  });

  it('of a fatter hose is the water\'s part of the hours, by the flow it then has (Hazen–Williams)', () => {
    const asked = tight({ positions: [position({ rateMmPerHour: 2, hose: { lengthM: 30, boreMm: 12.7 } })] });
    const found = remedy(asked, 'fatter_hose');
    const july = monthNamed(asked, '2026-07');
    expect(found).toMatchObject({ boreMm: 15.875 });
    const factor = (found?.flowLpm ?? 0) / 18;
    expect(factor).toBeGreaterThan(1.1);
    expect(found?.gainHours).toBeCloseTo((july.neededHours - july.moveHours) * (1 - 1 / factor), 6);
  });

  it('of a second tap is the hours of the first again', () => {
    const asked = tight();
    expect(remedy(asked, 'second_tap')?.gainHours).toBeCloseTo(monthNamed(asked, '2026-07').hadHours, 6);
    expect(remedy(asked, 'second_tap')?.fits).toBe(true);
  });

  it('of a shut-off timer is what the last set runs on behind somebody who leaves, and nothing where hoses must be attended', () => {
    const asked = tight();
    const july = monthNamed(asked, '2026-07');
    const setMinutes = ((july.neededHours - july.moveHours) * 60) / ((july.moveHours * 60) / 5);
    expect(remedy(asked, 'shut_off_timer')?.gainHours).toBeCloseTo((31 * (setMinutes - 1)) / 60, 6);
    const attended = { id: 'a', name: 'Stay with it', source: null, sourceOn: null, season: null, exemptSeeded: false, kind: 'attended' as const };
    expect(remedy(tight({ rules: [attended] }), 'shut_off_timer')).toBeUndefined();
    const closing = { id: 'h', name: 'Until eight', source: null, sourceOn: null, season: null, exemptSeeded: false, kind: 'hours' as const, allowed: [{ fromMinutes: 300, toMinutes: 480 }] };
    expect(remedy(tight({ rules: [closing] }), 'shut_off_timer')).toBeUndefined();
  });

  it('of a helper is an hour on one weekday, and says how many would close the gap', () => {
    const asked = tight();
    const found = remedy(asked, 'helper_hour');
    // All days are alike, so it is the one on which helpers are found: July 2026 has four Saturdays.
    expect(found?.gainHours).toBeCloseTo((4 * 55) / 60, 6);
    expect(found?.weekday).toBe(6);
    expect((found?.neededHoursAWeek ?? 0) * (31 / 7)).toBeCloseTo(monthNamed(asked, '2026-07').shortHours, 6);
  });

  it('of a second hose is the moves', () => {
    const asked = tight({ positions: [position({ rateMmPerHour: 4 }), position({ id: 'b', rateMmPerHour: 4 })] });
    expect(remedy(asked, 'second_hose')?.gainHours).toBeCloseTo(monthNamed(asked, '2026-07').moveHours * (4 / 5), 6);
  });

  it('of a smaller pattern is what falls outside the zone', () => {
    const asked = tight({ positions: [position({ rateMmPerHour: 2, wettedAreaM2: 120 })] });
    const july = monthNamed(asked, '2026-07');
    expect(remedy(asked, 'smaller_pattern')?.gainHours).toBeCloseTo((july.neededHours - july.moveHours) / 4, 6);
    expect(remedy(tight(), 'smaller_pattern')).toBeUndefined();
  });

  it('lets the least important zones rest, as few as it takes, never seed and never all', () => {
    const zones = [zone(), zone({ id: 'b', priority: 2 }), zone({ id: 'c', priority: 3 }), zone({ id: 'd', priority: 4, sowing: { sownOn: '2026-03-01', grass: 'tall_fescue', schedule: DEFAULT_SCHEDULE } })];
    const positions = zones.map((one) => position({ id: one.id, zoneId: one.id, rateMmPerHour: 5 }));
    const found = remedy(tight({ zones, positions }), 'rest_zones');
    expect(found?.zoneIds[0]).toBe('c');
    expect(found?.zoneIds).not.toContain('d');
    const alone = tight();
    expect(remedy(alone, 'rest_zones')).toBeUndefined();
  });

  it('offers another month for a sowing that is still to come, where the soil is warm enough and more hours are left', () => {
    const warm = civilDaysFrom('2025-01-01', '2026-01-01').map((on): FitDay => {
      const month = Number(on.slice(5, 7));
      const tmeanC = month >= 5 && month <= 9 ? 17 : 6;
      return { on, et0Mm: month >= 6 && month <= 8 ? 5 : 1, rainMm: 0, tminC: tmeanC - 5, tmaxC: tmeanC + 5, isEstimated: false };
    });
    const sowing = { sownOn: '2026-07-01', grass: 'perennial_ryegrass' as const, schedule: DEFAULT_SCHEDULE };
    const asked = tight({ climate: warm, zones: [zone(), zone({ id: 'bed', sowing })], positions: [position({ rateMmPerHour: 3 }), position({ id: 'b', zoneId: 'bed', rateMmPerHour: 3 })] });
    const found = remedy(asked, 'sow_another_month');
    expect(found?.month).not.toBe('2026-07');
    expect(['2026-05', '2026-09']).toContain(found?.month);
    const sown = { ...asked, startOn: '2026-07-10' };
    expect(remedy(sown, 'sow_another_month')).toBeUndefined();
    expect(monthNamed(asked, '2026-07').doseHours).toBeGreaterThan(5);
  });
});

describe('a year from few days', () => {
  const site = { latitudeDeg: 45, elevationM: 100 };
  const june = civilDaysFrom('2025-06-01', '2025-07-01').map((on): FitDay => ({ on, et0Mm: 5, rainMm: 2, tminC: 12, tmaxC: 26, isEstimated: false }));

  it('keeps the days it knows and marks the others', () => {
    const year = estimatedYear(site, '2026-03-01', june);
    expect(year).toHaveLength(365);
    expect(year.filter((day) => !day.isEstimated)).toHaveLength(30);
    expect(year.filter((day) => !day.isEstimated).every((day) => day.rainMm === 2 && day.on.slice(5, 7) === '06')).toBe(true);
  });

  it('has its summer in summer, on both sides of the equator', () => {
    const meanEt0 = (latitudeDeg: number, month: string) => {
      const days = estimatedYear({ latitudeDeg, elevationM: 0 }, '2026-01-01', [{ on: '2025-10-01', et0Mm: 3, rainMm: 0, tminC: 10, tmaxC: 20, isEstimated: false }]).filter((day) => day.on.slice(5, 7) === month && day.isEstimated);
      return days.reduce((sum, day) => sum + day.et0Mm, 0) / days.length;
    };
    expect(meanEt0(45, '07')).toBeGreaterThan(3 * meanEt0(45, '01'));
    expect(meanEt0(-45, '01')).toBeGreaterThan(3 * meanEt0(-45, '07'));
  });

  it('comes near the recorded year where a spring is all that is known (Seattle and New York, temperatures of 2012 to 2015)', () => {
    for (const city of ['Seattle', 'New York'] as const) {
      const record = recordedClimate(RECORD_SITES[city], recordedWeather(city));
      const spring = record.filter((day) => day.on >= '2014-04-01' && day.on < '2014-06-01');
      const guessed = estimatedYear(RECORD_SITES[city], '2014-06-01', spring).filter((day) => day.isEstimated);
      const sumGuessed = guessed.reduce((sum, day) => sum + day.et0Mm, 0);
      const sumRecorded = record.filter((day) => day.on >= '2014-06-01' && day.on < addDays('2014-06-01', 365) && !(day.on >= '2015-04-01' && day.on < '2015-06-01')).reduce((sum, day) => sum + day.et0Mm, 0);
      expect(sumGuessed / sumRecorded).toBeGreaterThan(0.7);
      expect(sumGuessed / sumRecorded).toBeLessThan(1.35);
    }
  });
});

describe('any yard', () => {
  it('gets whole and finite numbers, needs no less with a drier climate, and no remedy makes it worse', () => {
    const real = (min: number, max: number) => fc.integer({ min: 0, max: 1000 }).map((step) => min + ((max - min) * step) / 1000);
    fc.assert(fc.property(
      fc.record({ rate: real(1, 30), area: real(20, 300), et0: real(0.5, 8), rain: real(0, 4), line: real(4, 20), move: fc.integer({ min: 0, max: 20 }), until: fc.integer({ min: 380, max: 1400 }), timer: fc.boolean(), bore: fc.constantFrom(12.7, 15.875, 25.4) }),
      ({ rate, area, et0, rain, line, move, until, timer, bore }) => {
        const asked = input({
          climate: evenYear({ et0Mm: et0, rainMm: rain }), moveMinutes: move, taps: [tap({ shutOffTimer: timer })],
          zones: [zone({ areaM2: area, refillLineMm: line, totalAvailableMm: line * 2.5 }), zone({ id: 'b', priority: 2 })],
          positions: [position({ rateMmPerHour: rate, wettedAreaM2: area * 1.3, hose: { lengthM: 25, boreMm: bore } }), position({ id: 'b', zoneId: 'b' })],
          homeByWeekday: Array.from({ length: 7 }, () => [{ fromMinutes: 360, toMinutes: until }]),
        });
        const fit = monthFit(asked);
        const drier = monthFit({ ...asked, climate: evenYear({ et0Mm: et0 }) });
        const hours = (of: typeof fit) => of.months.reduce((sum, month) => sum + month.neededHours, 0);
        expect(fit.months.flatMap((month) => [month.neededHours, month.hadHours, month.shortHours, month.litres, month.leastHours, month.mostHours]).every((value) => Number.isFinite(value) && value >= 0)).toBe(true);
        expect(hours(drier)).toBeGreaterThanOrEqual(hours(fit) - 1e-6);
        const short = fit.months.reduce((sum, month) => sum + month.shortHours, 0);
        for (const one of fit.remedies) expect(one.leftYearHours).toBeLessThanOrEqual(short + 1e-6);
        expect(fit.fits ? fit.remedies.length : 1).toBe(fit.fits ? 0 : 1);
      },
    ), { numRuns: 60 });
  });
});
