import type { FitMonthResponse, FitRemedyResponse, MonthFitResponse } from '@/shared/contracts/fit';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth, formatFlow } from '@/shared/display';
import { hoseBoreLabel } from '@/shared/hoseBores';
import { capital, countWord } from '@/shared/roundWords';
import { hoursText } from './fitWords';

const MONTHS = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'] as const;
const WEEKDAYS = ['Sunday', 'Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday'] as const;
/** Keeps the crowns of a resting lawn alive: half an inch every two weeks (Purdue, Indiana) [mm]. */
const RESTING_MM = 12.7;

/** 'July' for '2026-07'. */
export function monthName(month: string): string {
  return MONTHS[Number(month.slice(5)) - 1] ?? month;
}

/** Hours of a month for reading: one decimal under ten, none above. */
export function monthHours(hours: number): string {
  return hours < 9.95 ? hoursText(hours) : hoursText(Math.round(hours));
}

const hoursWord = (hours: number): string => `${monthHours(hours)} hour${monthHours(hours) === '1' ? '' : 's'}`;

/** Names in a sentence: 'June, July and August'. */
export function namesIn(names: readonly string[]): string {
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;
}

/** Whether a month lacks hours worth speaking of. */
export function isShort(month: FitMonthResponse): boolean {
  return month.shortHours >= 0.25;
}

/** 'May to September' for months one after the other, over the end of the twelve too; else 'May, July and August', in the order of the calendar. */
function monthsIn(all: readonly FitMonthResponse[], short: readonly FitMonthResponse[]): string {
  const isIn = (index: number) => short.includes(all[(index + all.length) % all.length] as FitMonthResponse);
  const starts = all.flatMap((_, index) => (isIn(index) && !isIn(index - 1) ? [index] : []));
  if (short.length === all.length) return 'All months';
  if (starts.length === 1 && short.length > 2) {
    const first = all[starts[0] ?? 0]?.month ?? '';
    const last = all[((starts[0] ?? 0) + short.length - 1) % all.length]?.month ?? '';
    return `${monthName(first)} to ${monthName(last)}`;
  }
  return namesIn(short.map((month) => month.month.slice(5)).sort().map((number) => monthName(`0000-${number}`)));
}

/** The answer in words: 'July does not fit: 62 hours needed, 40 had.' */
export function yearHeadline({ months, tightestMonth, fits }: MonthFitResponse): string {
  const tightest = months.find((month) => month.month === tightestMonth);
  if (!tightest) return 'No month wants more water than the rain brings.';
  const name = monthName(tightest.month);
  if (fits) return `It fits in every month. ${name} is the tightest: ${monthHours(tightest.neededHours)} of ${hoursWord(tightest.hadHours)}.`;
  const short = months.filter(isShort);
  // Time at one tap does not help another, so that the sums alone may look as if they did.
  const numbers = tightest.neededHours > tightest.hadHours
    ? `${hoursWord(tightest.neededHours)} needed, ${monthHours(tightest.hadHours)} had`
    : `one tap lacks ${hoursWord(tightest.shortHours)}`;
  return short.length === 1 ? `${name} does not fit: ${numbers}.` : `${monthsIn(months, short)} do not fit; ${name} lacks ${hoursWord(tightest.shortHours)}.`;
}

/** The chart in words. */
export function chartWords(months: readonly FitMonthResponse[]): string {
  return `Hose-hours by month. ${months.map((month) => `${monthName(month.month)}: ${monthHours(month.neededHours)} needed, ${monthHours(month.hadHours)} had`).join('; ')}.`;
}

/** 'Needed: 51 to 70 hours, by the year.' for a month; nothing where the years agree. */
export function yearRange(month: FitMonthResponse): string {
  const [least, most] = [monthHours(month.leastHours), monthHours(month.mostHours)];
  return least === most ? least : `${least} to ${most}`;
}

/** Names of what an answer speaks of by id. */
export interface FitNames {
  tap(id: string): string;
  zone(id: string): string;
  /** Flow of a tap [L/min]. */
  flowLpm(id: string): number;
  units: UnitSystem;
}

/** One way to make the year fit: what to do, and what it comes to in the tightest month. */
export function remedyWords(remedy: FitRemedyResponse, tightestMonth: string, names: FitNames): { title: string; text: string } {
  const name = monthName(tightestMonth);
  const freed = `${hoursWord(Math.max(0, remedy.gainHours))} in ${name}.`;
  const gain = `Frees ${freed}`;
  const then = remedy.fits ? 'The year fits then.'
    : remedy.leftHours >= 0.25 ? `${name} still lacks ${hoursWord(remedy.leftHours)}.`
    : `${name} fits then, other months still lack ${hoursWord(remedy.leftYearHours)}.`;
  switch (remedy.kind) {
    case 'fatter_hose':
      return {
        title: `A fatter hose at ${names.tap(remedy.tapId)}: ${hoseBoreLabel(remedy.boreMm, names.units)}`,
        text: `${gain} ${then} About ${formatFlow(remedy.flowLpm, names.units)} instead of ${formatFlow(names.flowLpm(remedy.tapId), names.units)}, reckoned for 50 psi (345 kPa) at the tap, a default.`,
      };
    case 'second_hose':
      return { title: `A second hose at ${names.tap(remedy.tapId)}`, text: `${gain} ${then} With both laid out and a valve for each, one turns a valve instead of moving the hose: a minute, a default. A hose across a path is easy to trip over.` };
    case 'shut_off_timer':
      return { title: `A shut-off timer on ${names.tap(remedy.tapId)}`, text: `${gain} ${then} The last set runs on when you have to leave. Some places forbid a hose that nobody watches: ask your water company.` };
    case 'second_tap':
      return { title: `A second tap beside ${names.tap(remedy.tapId)}`, text: `Frees at best ${freed} ${then} The house pipe often gives less: time a bucket with both taps open.` };
    case 'helper_hour':
      return {
        title: `An hour more at home each ${WEEKDAYS[remedy.weekday] ?? 'week'}`,
        text: `${gain} ${then}${remedy.fits ? '' : ` To close ${name} that way takes ${hoursWord(remedy.neededHoursAWeek)} more a week.`}`,
      };
    case 'smaller_pattern':
      return { title: `A smaller pattern on ${namesIn(remedy.zoneIds.map((id) => names.zone(id)))}`, text: `${gain} ${then} What falls beyond the edge waters nothing: turn the sprinkler down until its pattern ends where the zone does.` };
    case 'rest_zones':
      return {
        title: `Let ${namesIn(remedy.zoneIds.map((id) => names.zone(id)))} rest`,
        text: `${gain} ${then} A resting lawn goes brown and lives on ${formatDepth(RESTING_MM, names.units)} every two weeks. Not for grass sown within the last year.`,
      };
    case 'sow_another_month':
      return { title: `Sow ${names.zone(remedy.zoneId)} in ${monthName(remedy.month)}`, text: `${gain} ${then} The soil is warm enough then in most years; look at the season before you buy seed.` };
  }
}

/** What the answer takes for granted because nobody told it, in one sentence; null when nothing. */
export function defaultsSentence({ hours, flow, rates, moveMinutes }: MonthFitResponse['defaults']): string | null {
  const taken = [
    ...(hours ? ['hours at home'] : []), ...(flow ? ['the flow of a tap'] : []),
    ...(rates > 0 ? [`the rate of ${rates === 1 ? 'one position' : `${countWord(rates)} positions`} without a catch-cup test`] : []),
    ...(moveMinutes === null ? [] : [`${moveMinutes} minutes for a move`]),
  ];
  return taken.length === 0 ? null : `${capital(namesIn(taken))} ${taken.length === 1 && !hours ? 'is a default' : 'are defaults'}.`;
}

/** Where the weather behind the answer comes from. */
export function climateSentence({ years, source, asOfYear, isEstimated }: MonthFitResponse['climate']): string {
  if (isEstimated) {
    return 'No past years are known for this place yet. The months are reckoned from the days that are, with the season’s usual swing of temperature, reference ET from temperatures alone (Hargreaves, FAO-56), and no rain where none is known: a default, and the most it may take.';
  }
  return years > 1
    ? `By the weather of ${years} years, to ${asOfYear}. ${source}. Hours are the mean of the years; a coming year may be wetter or drier.`
    : `By the weather of ${asOfYear} alone. ${source}.`;
}
