import type { CupReading } from './cupReading';
import type { CupLayout } from './cupTest';

export type CupProblemCode =
  | 'all_empty' | 'too_shallow' | 'too_few_cups' | 'cups_missing' | 'poor_coverage' | 'odd_cup' | 'multiplier_limited';

/** Something that makes a catch-cup test doubtful; its numbers are in SI. The words are in `shared/cupProblems.ts`. */
export interface CupProblem {
  code: CupProblemCode;
  /** Places, in the list of readings, of the cups concerned; empty when it is the whole test. */
  cups: number[];
  values: Record<string, number | string>;
}

/** Fewer cups than this cannot describe a portable sprinkler (hand-moved systems needed 6 to over 50: J. Am. Water Resour. Assoc. 2007). */
export const LEAST_CUPS = 6;

/** A reading counts as readable when its error is within this share of it. */
export const READABLE_SHARE = 0.1;

/** A cup this far from its neighbours' mean, as a multiple of the ordinary difference, is odd. Common practice. */
const ODD_MULTIPLE = 6;

/** A nearly empty cup holds less than this share of the mean. Common practice. */
const NEARLY_EMPTY_SHARE = 0.15;

interface ProblemInput {
  layout: CupLayout;
  reading: CupReading;
  minutes: number;
  depthsMm: readonly (number | null)[];
  meanMm: number;
  lowHalfUniformity: number | null;
  errorMm: number;
}

/** Places of the cups next to one: left, right, above and below in a grid, before and after in a row. */
function neighbours(layout: CupLayout, index: number, count: number): number[] {
  if (layout.kind === 'row') {
    return [index - 1, index + 1].filter((place) => place >= 0 && place < count);
  }
  const row = Math.floor(index / layout.columns);
  const column = index % layout.columns;
  const places: number[] = [];
  if (column > 0) places.push(index - 1);
  if (column < layout.columns - 1) places.push(index + 1);
  if (row > 0) places.push(index - layout.columns);
  if (row < layout.rows - 1) places.push(index + layout.columns);
  return places;
}

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = Math.floor(sorted.length / 2);
  return sorted.length % 2 === 1 ? sorted[middle] ?? 0 : ((sorted[middle - 1] ?? 0) + (sorted[middle] ?? 0)) / 2;
}

/** Cups far from what their neighbours hold, where the others are close to theirs: tipped over, splashed, or misread. */
function oddCups({ layout, depthsMm, errorMm }: ProblemInput): number[] {
  const gaps = new Map<number, number>();
  depthsMm.forEach((depthMm, index) => {
    const around = neighbours(layout, index, depthsMm.length).map((place) => depthsMm[place]).filter((each): each is number => typeof each === 'number');
    if (depthMm !== null && around.length >= 2) {
      gaps.set(index, Math.abs(depthMm - around.reduce((sum, each) => sum + each, 0) / around.length));
    }
  });
  if (gaps.size < LEAST_CUPS) {
    return [];
  }
  const ordinary = Math.max(median([...gaps.values()]), errorMm);
  return [...gaps].filter(([, gap]) => gap > ODD_MULTIPLE * ordinary).map(([index]) => index);
}

/** What is doubtful about a test, worst first. */
export function cupProblems(input: ProblemInput): CupProblem[] {
  const { layout, reading, minutes, depthsMm, meanMm, lowHalfUniformity, errorMm } = input;
  const read = depthsMm.filter((depthMm): depthMm is number => depthMm !== null);
  const problems: CupProblem[] = [];
  if (meanMm <= 0) {
    return [{ code: 'all_empty', cups: [], values: { minutes } }];
  }
  const neededMm = errorMm / READABLE_SHARE;
  if (meanMm < neededMm) {
    problems.push({ code: 'too_shallow', cups: [], values: { reading: reading.kind, meanMm, neededMm, minutes, neededMinutes: Math.ceil((minutes * neededMm) / meanMm) } });
  }
  if (read.length < LEAST_CUPS) {
    problems.push({ code: 'too_few_cups', cups: [], values: { count: read.length, wanted: LEAST_CUPS } });
  }
  const missing = depthsMm.map((depthMm, index) => (depthMm === null ? index : -1)).filter((index) => index >= 0);
  if (missing.length > 0) {
    problems.push({ code: 'cups_missing', cups: missing, values: { count: missing.length, of: depthsMm.length } });
  }
  const dryBesideWet: number[] = [];
  depthsMm.forEach((depthMm, index) => {
    const isDry = depthMm !== null && depthMm < NEARLY_EMPTY_SHARE * meanMm;
    if (isDry && neighbours(layout, index, depthsMm.length).some((place) => (depthsMm[place] ?? 0) >= meanMm)) {
      dryBesideWet.push(index);
    }
  });
  if (dryBesideWet.length > 0) {
    problems.push({ code: 'poor_coverage', cups: dryBesideWet, values: { count: dryBesideWet.length, meanMm } });
  }
  const odd = oddCups(input);
  if (odd.length > 0) {
    problems.push({ code: 'odd_cup', cups: odd, values: { count: odd.length } });
  }
  if (lowHalfUniformity !== null && lowHalfUniformity < 0.5) {
    problems.push({ code: 'multiplier_limited', cups: [], values: { lowHalfUniformity } });
  }
  return problems;
}
