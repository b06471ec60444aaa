import { PhysicsError, requirePositive } from '@/scheduling/units/physicsError';
import { gridStatistics, type CupStatistics } from './cupStatistics';
import type { WettingPattern } from './wettingPattern';

/** A reading's place across the line of moves may be off by this much and still count as the same place [m]. */
const SAME_PLACE_M = 1e-6;

/**
 * Readings across one line of sprinklers, folded at a move distance: what the ground between two lines gets from all of them.
 * @param rows - readings, one list for each row of cups across the line
 * @param offsetsM - place of each reading from the line, evenly spaced [m]
 * @param moveM - distance between two lines, a whole number of cup spacings [m]
 * @returns rows of sums, from the line outwards to the next
 * @throws PhysicsError when the distance is no whole number of spacings: use an interpolated pattern then
 * Source: superposition as in Merriam and Keller 1978, form II-1.
 */
export function foldRows(rows: readonly (readonly number[])[], offsetsM: readonly number[], moveM: number): number[][] {
  requirePositive('moveM', moveM);
  const spacingM = (offsetsM[1] ?? 0) - (offsetsM[0] ?? 0);
  requirePositive('offsetsM', spacingM);
  const cells = Math.round(moveM / spacingM);
  if (Math.abs(cells * spacingM - moveM) > SAME_PLACE_M) {
    throw new PhysicsError('moveM', moveM, 'must be a whole number of cup spacings');
  }
  const firstM = Math.min(...offsetsM.map((offset) => ((offset % moveM) + moveM) % moveM));
  return rows.map((row) => {
    if (row.length !== offsetsM.length) {
      throw new PhysicsError('rows', row.length, `must hold ${offsetsM.length} readings each`);
    }
    const sums = Array.from({ length: cells }, () => 0);
    row.forEach((reading, index) => {
      const folded = ((((offsetsM[index] ?? 0) % moveM) + moveM) % moveM) - firstM;
      const cell = Math.round(folded / spacingM) % cells;
      sums[cell] = (sums[cell] ?? 0) + reading;
    });
    return sums;
  });
}

/** How positions are set out: along one line, in squares, or in rows shifted by half. */
export type Arrangement = 'line' | 'square' | 'triangle';

export interface OverlapQuestion {
  pattern: WettingPattern;
  arrangement: Arrangement;
  /** Distance between two positions in a row [m]. */
  moveM: number;
  /** Distance between two rows [m]; the same as moveM when left out. */
  rowMoveM?: number;
  /** Sample points along each side of one cell, 12 when left out. */
  samples?: number;
  /** Every second round stands half-way between the marks of the first; the result is the mean of two rounds. */
  isAlternating?: boolean;
}

export interface OverlapAnswer extends CupStatistics {
  /** Rates over one cell between positions, row by row [mm/h]. */
  ratesMmPerHour: number[];
}

/** Rate at a point of an endless lawn from all positions within reach. */
function sumAt(question: OverlapQuestion, xM: number, yM: number): number {
  const { pattern, arrangement, moveM } = question;
  const rowMoveM = question.rowMoveM ?? moveM;
  const isLine = arrangement === 'line';
  const firstRow = isLine ? 0 : Math.ceil((yM - pattern.reachYM) / rowMoveM);
  const lastRow = isLine ? 0 : Math.floor((yM + pattern.reachYM) / rowMoveM);
  let sum = 0;
  for (let row = firstRow; row <= lastRow; row += 1) {
    const shift = arrangement === 'triangle' && row % 2 !== 0 ? moveM / 2 : 0;
    const lastColumn = Math.floor((xM - shift + pattern.reachXM) / moveM);
    for (let column = Math.ceil((xM - shift - pattern.reachXM) / moveM); column <= lastColumn; column += 1) {
      sum += pattern.rateAt(xM - column * moveM - shift, yM - row * rowMoveM);
    }
  }
  return sum;
}

/**
 * What the ground gets when positions repeat at a move distance: the single pattern laid over itself, wrapped at the distance, and its evenness.
 * A line is judged over the middle half of its width, where neighbours in the row meet; its rim is not ground that the row is meant for.
 * @throws PhysicsError when a distance or the number of samples is not above zero
 * Source: superposition on a grid wrapped at the spacing, the method of Merriam and Keller 1978 form II-1.
 */
export function overlap(question: OverlapQuestion): OverlapAnswer {
  const { pattern, arrangement, isAlternating = false } = question;
  const moveM = requirePositive('moveM', question.moveM);
  const rowMoveM = requirePositive('rowMoveM', question.rowMoveM ?? moveM);
  const samples = Math.round(requirePositive('samples', question.samples ?? 12));
  if (samples < 1 || samples > 200) {
    throw new PhysicsError('samples', samples, 'must be 1 to 200');
  }
  const heightM = arrangement === 'line' ? pattern.reachYM : arrangement === 'triangle' ? 2 * rowMoveM : rowMoveM;
  const fromYM = arrangement === 'line' ? -heightM / 2 : 0;
  const ratesMmPerHour: number[] = [];
  for (let row = 0; row < samples; row += 1) {
    const y = fromYM + ((row + 0.5) / samples) * heightM;
    for (let column = 0; column < samples; column += 1) {
      const x = ((column + 0.5) / samples) * moveM;
      const marks = sumAt(question, x, y);
      const between = isAlternating ? sumAt(question, x - moveM / 2, arrangement === 'square' ? y - rowMoveM / 2 : y) : marks;
      ratesMmPerHour.push((marks + between) / 2);
    }
  }
  return { ...gridStatistics(ratesMmPerHour), ratesMmPerHour };
}

/** The same marks every round beside marks that shift half-way every second round. */
export interface AlternateSets {
  /** Standing on the same marks every round. */
  sameMarks: OverlapAnswer;
  /** Mean of two rounds, the second half-way between the marks of the first. */
  overTwoRounds: OverlapAnswer;
  /** Low-quarter uniformity gained over two rounds, below zero when it is lost; null when nothing is wet. */
  gain: number | null;
}

/**
 * Alternate sets, judged over two rounds: what the grass gets when the sprinkler stands half-way between its last marks the next time.
 * @throws PhysicsError as `overlap`
 * Source: sprinklers placed midway between their previous positions at the next irrigation (USDA-NRCS glossary).
 */
export function alternateSets(question: Omit<OverlapQuestion, 'isAlternating'>): AlternateSets {
  const sameMarks = overlap(question);
  const overTwoRounds = overlap({ ...question, isAlternating: true });
  const { lowQuarterUniformity: before } = sameMarks;
  const { lowQuarterUniformity: after } = overTwoRounds;
  return { sameMarks, overTwoRounds, gain: before === null || after === null ? null : after - before };
}
