import { runLengthAdvice, DEFAULT_PORTABLE_RATE_MM_PER_HOUR } from '@/scheduling/sprinkler/runTimes';
import type { CupTestResult } from '@/scheduling/sprinkler/cupTest';
import type { CupReading } from '@/shared/contracts/catchTests';
import type { UnitSystem } from '@/shared/contracts/common';
import type { RateSource } from '@/shared/contracts/equipment';
import { formatDepth, formatLength, formatMinutes, formatNumber, formatRange, formatRate } from '@/shared/display';
import { draftQuantity, readingUnit, type CupDraft, type ReadCups } from './cupDraft';
import { reckonedReading } from './useCupResult';

/** What the position is thought to apply before this test, and how that is known. */
export interface ExpectedRate { rateMmPerHour: number; source: RateSource }

/** The rate to reckon the run length with: the position's, else flow over area as typed, else the default. */
export function expectedRate(given: ExpectedRate | null, draft: CupDraft, units: UnitSystem): ExpectedRate {
  if (given !== null) {
    return given;
  }
  const flowLpm = draftQuantity(draft, 'flow', units);
  const areaM2 = draftQuantity(draft, 'area', units);
  return flowLpm !== null && areaM2 !== null
    ? { rateMmPerHour: (flowLpm * 60) / areaM2, source: 'flow_and_area' }
    : { rateMmPerHour: DEFAULT_PORTABLE_RATE_MM_PER_HOUR, source: 'default' };
}

const sourceWords: Record<RateSource, string> = {
  catch_test: 'the last test here', flow_and_area: 'the flow over the area it wets', default: 'a default for a wide-open portable sprinkler, or for a flow nobody measured',
};

export interface RunAdvice {
  /** [min] */
  minutes: number;
  headline: string;
  why: string;
  /** What a better way to read the cups would save; null when nothing would. */
  instead: string | null;
}

/** How long to run before the cups can be read within a tenth, and why. */
export function runAdvice(expected: ExpectedRate, reading: CupReading, units: UnitSystem): RunAdvice {
  const advice = runLengthAdvice({ expectedRateMmPerHour: expected.rateMmPerHour, reading: reckonedReading(reading) });
  // A cup as wide as a drinking glass, where nobody has told the mouth yet.
  const finer = runLengthAdvice({ expectedRateMmPerHour: expected.rateMmPerHour, reading: reckonedReading({ kind: 'volume', mouthDiameterMm: reading.kind === 'depth' ? 75 : reading.mouthDiameterMm }) });
  const leaves = `At ${formatRate(expected.rateMmPerHour, units)} (${sourceWords[expected.source]})`;
  return {
    minutes: advice.minutes,
    headline: advice.isTooSlowToRead ? 'A ruler cannot read this sprinkler: measure millilitres or weigh the cups.' : `Let it run about ${formatMinutes(advice.minutes)}.`,
    why: `${leaves}, a cup then holds ${formatDepth((advice.expectedRateMmPerHour * advice.minutes) / 60, units)}${advice.isTooSlowToRead ? `, and it takes ${formatDepth(advice.readableDepthMm, units)} to be read within a tenth` : ', enough to be read within a tenth'}.`,
    instead: reading.kind === 'depth' && finer.minutes < advice.minutes ? `Measured in millilitres or weighed in grams, ${formatMinutes(finer.minutes)} would do.` : null,
  };
}

/** How the cups stand, in a line. */
export function setUpText(draft: CupDraft, read: ReadCups, units: UnitSystem): string {
  if (read.layout === null) {
    return 'How the cups stand needs another look';
  }
  const apart = formatLength(read.layout.spacingM, units);
  const where = read.layout.kind === 'grid' ? `${read.layout.rows} × ${read.layout.columns} cups, ${apart} apart` : `${read.shape?.count ?? 0} cups in a row, ${apart} apart`;
  return `${where}, read in ${readingUnit(draft)}`;
}

function listed(words: readonly string[]): string {
  return words.length <= 1 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1) ?? ''}`;
}

/** Places of cups in words: 'row 1, cups 1, 2 and 6; row 4, cup 1'. */
export function placesText(kind: CupDraft['kind'], columns: number, places: readonly number[]): string {
  const cups = (numbers: readonly number[]): string => `cup${numbers.length === 1 ? '' : 's'} ${listed(numbers.map(String))}`;
  if (kind === 'row') {
    return cups(places.map((place) => place + 1));
  }
  const rows = new Map<number, number[]>();
  for (const place of places) {
    const row = Math.floor(place / columns) + 1;
    rows.set(row, [...(rows.get(row) ?? []), (place % columns) + 1]);
  }
  return [...rows].map(([row, numbers]) => `row ${row}, ${cups(numbers)}`).join('; ');
}

/** Which cups are the lowest quarter. */
export function lowQuarterText(kind: CupDraft['kind'], columns: number, result: CupTestResult, isByArea: boolean): string {
  const count = result.lowQuarterCups.length;
  const what = isByArea ? 'Lowest quarter of the area' : `Lowest quarter, ${count} of ${result.cupCount} cups`;
  return `${what}: ${placesText(kind, columns, result.lowQuarterCups)}.`;
}

/** How sure the result is, in words. */
export function certaintyText(result: CupTestResult, units: UnitSystem): string {
  const { cupCount, rateRange } = result;
  const cups = `${cupCount} cup${cupCount === 1 ? '' : 's'}`;
  const range = `the true rate lies between ${formatRange('rate', rateRange.low, rateRange.high, units).replace(' to ', ' and ')} nine times in ten`;
  const lead = cupCount < 6 ? `With only ${cups} this is a guess` : cupCount < 20 ? `With ${cups} this is a rough picture` : `With ${cups} this is a fair picture`;
  return `${lead}: ${range}.`;
}

/** How even, in words and beside what is usual. New in-ground systems are asked for 0.65, those in homes averaged 0.45 (Florida); trade practice. */
export function evennessWord(lowQuarterUniformity: number): string {
  return lowQuarterUniformity >= 0.65 ? 'even' : lowQuarterUniformity >= 0.45 ? 'uneven' : 'very uneven';
}

/** A factor or a share with two decimals: '0.64', '1.23'. */
export const twoDecimals = (value: number): string => formatNumber(value, 2);
