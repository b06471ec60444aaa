import { render, screen } from '@testing-library/react';
import { MonthBars } from '@/components/fit/MonthBars';
import { MonthTable } from '@/components/fit/MonthTable';
import { climateSentence, defaultsSentence, remedyWords, yearHeadline, type FitNames } from '@/components/fit/monthFitWords';
import type { FitMonthResponse, FitRemedyResponse, MonthFitResponse } from '@/shared/contracts/fit';

const names: FitNames = { units: 'us', tap: () => 'Back tap', zone: (id) => ({ a: 'Front', b: 'Side', c: 'Back' })[id] ?? 'Lawn', flowLpm: () => 18.9 };

function months(short: readonly number[], startMonth = 6): FitMonthResponse[] {
  return Array.from({ length: 12 }, (_, index): FitMonthResponse => {
    const number = ((startMonth - 1 + index) % 12) + 1;
    const year = 2026 + Math.floor((startMonth - 1 + index) / 12);
    const lacks = short.includes(number) ? (number === 7 ? 22 : 5) : 0;
    return {
      month: `${year}-${String(number).padStart(2, '0')}`, neededHours: lacks > 0 ? 40 + lacks : 10, leastHours: 8, mostHours: 40 + lacks + 4, moveHours: 2, doseHours: 0, hadHours: 40, shortHours: lacks,
      litres: 9_000, et0Mm: 120, rainMm: 60, isEstimated: false, taps: [],
    };
  });
}
const yearOf = (short: readonly number[], startMonth?: number): MonthFitResponse => ({
  months: months(short, startMonth), tightestMonth: short.includes(7) ? '2026-07' : short.length > 0 ? null : '2026-07', fits: short.length === 0, remedies: [],
  climate: { years: 4, source: 'Records', sample: false, isEstimated: false, asOfYear: 2025 }, defaults: { hours: false, flow: false, rates: 0, moveMinutes: null }, leftOut: { zoneIds: [] },
});

describe('the year in words', () => {
  it('says that it fits, and which month is the tightest', () => {
    expect(yearHeadline(yearOf([]))).toBe('It fits in every month. July is the tightest: 10 of 40 hours.');
  });

  it('says what one month lacks with both numbers, and several as a span or a list in the order of the calendar', () => {
    expect(yearHeadline(yearOf([7]))).toBe('July does not fit: 62 hours needed, 40 had.');
    expect(yearHeadline(yearOf([6, 7, 8]))).toBe('June to August do not fit; July lacks 22 hours.');
    expect(yearHeadline(yearOf([5, 6, 7, 8, 9]))).toBe('May to September do not fit; July lacks 22 hours.');
    expect(yearHeadline(yearOf([5, 7, 9]))).toBe('May, July and September do not fit; July lacks 22 hours.');
    expect(yearHeadline(yearOf([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12]))).toBe('All months do not fit; July lacks 22 hours.');
  });

  it('says so when one tap lacks what another has to spare', () => {
    const uneven = yearOf([7]);
    const july = uneven.months.find((month) => month.month === '2026-07');
    if (july) july.neededHours = 30;
    expect(yearHeadline(uneven)).toBe('July does not fit: one tap lacks 22 hours.');
  });

  it('says where nothing is wanted', () => {
    expect(yearHeadline({ ...yearOf([]), tightestMonth: null })).toBe('No month wants more water than the rain brings.');
  });
});

describe('what would help', () => {
  const effect = { gainHours: 8.24, leftHours: 13.76, leftYearHours: 20, fits: false };
  it('says its gain, what is still lacking, and the caution that belongs to it', () => {
    const words = (remedy: FitRemedyResponse) => remedyWords(remedy, '2026-07', names);
    expect(words({ kind: 'fatter_hose', tapId: 't', boreMm: 19.05, flowLpm: 22.7, ...effect })).toEqual({
      title: 'A fatter hose at Back tap: 3/4 in',
      text: 'Frees 8.2 hours in July. July still lacks 14 hours. About 6.0 gpm instead of 5.0 gpm, reckoned for 50 psi (345 kPa) at the tap, a default.',
    });
    expect(words({ kind: 'second_tap', tapId: 't', ...effect, fits: true }).text).toMatch(/^Frees at best 8\.2 hours in July\. The year fits then\./);
    expect(words({ kind: 'shut_off_timer', tapId: 't', ...effect, leftHours: 0 }).text).toMatch(/July fits then, other months still lack 20 hours\..*ask your water company\.$/);
    expect(words({ kind: 'rest_zones', zoneIds: ['b', 'c'], ...effect })).toMatchObject({ title: 'Let Side and Back rest', text: expect.stringContaining('0.50 in every two weeks') as string });
    expect(words({ kind: 'helper_hour', weekday: 6, neededHoursAWeek: 3.1, ...effect })).toMatchObject({ title: 'An hour more at home each Saturday', text: expect.stringContaining('3.1 hours more a week') as string });
    expect(words({ kind: 'sow_another_month', zoneId: 'a', month: '2026-09', ...effect }).title).toBe('Sow Front in September');
  });
});

describe('what the year rests on', () => {
  it('names defaults and their number, and nothing where nothing is taken', () => {
    expect(defaultsSentence({ hours: true, flow: true, rates: 2, moveMinutes: 5 })).toBe('Hours at home, the flow of a tap, the rate of two positions without a catch-cup test and 5 minutes for a move are defaults.');
    expect(defaultsSentence({ hours: false, flow: true, rates: 0, moveMinutes: null })).toBe('The flow of a tap is a default.');
    expect(defaultsSentence({ hours: false, flow: false, rates: 0, moveMinutes: null })).toBeNull();
  });

  it('says when a climate is an estimate', () => {
    expect(climateSentence({ years: 1, source: '', sample: false, isEstimated: true, asOfYear: 2026 })).toMatch(/Hargreaves, FAO-56.*a default/);
    expect(climateSentence({ years: 4, source: 'Records', sample: false, isEstimated: false, asOfYear: 2025 })).toBe('By the weather of 4 years, to 2025. Records. Hours are the mean of the years; a coming year may be wetter or drier.');
  });
});

test('the bars say their numbers to who cannot see them, and the table has the same months', () => {
  const shown = months([6, 7]);
  render(<><MonthBars months={shown} tightestMonth="2026-07" /><MonthTable months={shown} units="metric" /></>);
  const name = screen.getByRole('img').getAttribute('aria-label') ?? '';
  expect(name).toContain('July: 62 needed, 40 had');
  expect(name.split(';')).toHaveLength(12);
  expect(screen.getByText('July 2026')).toBeTruthy();
  expect(screen.getAllByText('8 to 66')).toHaveLength(1);
});
