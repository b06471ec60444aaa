import { PhysicsError, requirePositive, requireRange } from '@/scheduling/units/physicsError';
import { gridStatistics } from './cupStatistics';
import type { Arrangement } from './overlap';
import type { WettingPattern } from './wettingPattern';

/** A rectangle to be watered. */
export interface FiniteZone {
  /** Along a row of positions, x [m]. */
  widthM: number;
  /** From row to row, y [m]. */
  lengthM: number;
}

/** A place for the sprinkler, from the lower left corner of the zone [m]. */
export interface ZonePosition {
  xM: number;
  yM: number;
}

/** What one move distance does to a zone with edges. */
export interface ZoneMoveOption {
  moveM: number;
  rowMoveM: number;
  /** Where the sprinkler stands, in the order of walking: up one row and back the next. */
  positions: ZonePosition[];
  /** Mean over the zone when every position runs for an hour [mm per hour of set time]. */
  meanMmPerHour: number;
  lowQuarterUniformity: number;
  lowHalfUniformity: number;
  christiansenPct: number;
  /** Water that falls outside the zone, of all that is thrown, 0 to 1. */
  wastedShare: number;
  /** Water that the driest quarter of the zone would need everywhere, of all that is thrown: evenness and waste in one figure, 0 to 1. */
  lowQuarterEfficiency: number;
}

export interface ZoneMoveAnswer {
  best: ZoneMoveOption;
  /** Every distance tried, rising, each with its best number of positions. */
  options: ZoneMoveOption[];
}

export interface ZoneMoveQuestion {
  pattern: WettingPattern;
  arrangement: Arrangement;
  zone: FiniteZone;
  /** Shortest distance tried [m]; a fifth of the wetted width when left out. */
  fromM?: number;
  /** Longest [m]; the wetted width when left out. */
  toM?: number;
  /** Distances tried, 40 when left out. */
  count?: number;
  /** Distance between two rows as a multiple of that in a row; as the pattern is long to wide when left out. */
  rowRatio?: number;
  /** Sample points along each side of the zone, 12 when left out. */
  samples?: number;
}

/** Distances whose efficiency differs by less than this are equal, and fewer positions save moves. Common practice. */
const AS_GOOD = 0.02;
const OUTPUT_STEPS = 60;
/** More positions than this nobody walks in one round. */
const MOST_POSITIONS = 400;

/**
 * All the water that a pattern throws in an hour at one position.
 * @param lengthM - length of the zone, which a pattern that is the same all along (a strip) is laid over [m]
 * @returns [L/h], as 1 mm on 1 m² is 1 L
 */
export function patternOutputLph(pattern: WettingPattern, lengthM: number): number {
  const stepX = (2 * pattern.reachXM) / OUTPUT_STEPS;
  const stepY = (2 * pattern.reachYM) / OUTPUT_STEPS;
  let sum = 0;
  for (let column = 0; column < OUTPUT_STEPS; column += 1) {
    const x = -pattern.reachXM + (column + 0.5) * stepX;
    if (pattern.isStrip) {
      sum += pattern.rateAt(x, 0) * stepX * lengthM;
    } else {
      for (let row = 0; row < OUTPUT_STEPS; row += 1) {
        sum += pattern.rateAt(x, -pattern.reachYM + (row + 0.5) * stepY) * stepX * stepY;
      }
    }
  }
  return sum;
}

/** Positions at a distance, in the middle of the zone, row by row and back the next; every second row of a triangle is shifted by half. */
function positionsOf(question: ZoneMoveQuestion, moveM: number, rowMoveM: number, columns: number, rows: number): ZonePosition[] {
  const { zone, arrangement } = question;
  return Array.from({ length: rows }, (_, row) => {
    const shift = arrangement === 'triangle' && rows > 1 ? (row % 2 === 0 ? -moveM / 4 : moveM / 4) : 0;
    const line = Array.from({ length: columns }, (__, column) => ({
      xM: zone.widthM / 2 + (column - (columns - 1) / 2) * moveM + shift,
      yM: zone.lengthM / 2 + (row - (rows - 1) / 2) * rowMoveM,
    }));
    return row % 2 === 0 ? line : line.reverse();
  }).flat();
}

/**
 * What each part of a zone gets when every position runs for an hour.
 * @param samples - points along each side
 * @returns rates, row by row from the corner of the zone that positions are counted from [mm per hour of set time]
 */
export function zoneRates(pattern: WettingPattern, zone: FiniteZone, positions: readonly ZonePosition[], samples: number): number[] {
  const { reachXM, reachYM, isStrip } = pattern;
  const rates = new Array<number>(samples * samples).fill(0);
  const stepX = zone.widthM / samples;
  const stepY = zone.lengthM / samples;
  for (const { xM, yM } of positions) {
    // Only the sample points within reach of the position.
    const firstColumn = Math.max(0, Math.ceil((xM - reachXM) / stepX - 0.5));
    const lastColumn = Math.min(samples - 1, Math.floor((xM + reachXM) / stepX - 0.5));
    const firstRow = isStrip ? 0 : Math.max(0, Math.ceil((yM - reachYM) / stepY - 0.5));
    const lastRow = isStrip ? samples - 1 : Math.min(samples - 1, Math.floor((yM + reachYM) / stepY - 0.5));
    for (let row = firstRow; row <= lastRow; row += 1) {
      const y = isStrip ? 0 : (row + 0.5) * stepY - yM;
      for (let column = firstColumn; column <= lastColumn; column += 1) {
        rates[row * samples + column] = (rates[row * samples + column] ?? 0) + pattern.rateAt((column + 0.5) * stepX - xM, y);
      }
    }
  }
  return rates;
}

/** Evenness and waste of positions in a zone. */
function judge({ pattern, zone }: ZoneMoveQuestion, outputLph: number, samples: number, positions: ZonePosition[], moveM: number, rowMoveM: number): ZoneMoveOption {
  const { meanMm, lowQuarterUniformity, lowHalfUniformity, christiansenPct } = gridStatistics(zoneRates(pattern, zone, positions, samples));
  const arrivedShare = Math.min(1, (meanMm * zone.widthM * zone.lengthM) / (positions.length * outputLph));
  return {
    moveM, rowMoveM, positions, meanMmPerHour: meanMm,
    lowQuarterUniformity: lowQuarterUniformity ?? 0, lowHalfUniformity: lowHalfUniformity ?? 0, christiansenPct: christiansenPct ?? 0,
    wastedShare: 1 - arrivedShare, lowQuarterEfficiency: (lowQuarterUniformity ?? 0) * arrivedShare,
  };
}

/** Counts of positions along a side worth trying: the outer ones near the edge, or one fewer. */
function countsAlong(sideM: number, moveM: number): number[] {
  const most = Math.floor(sideM / moveM + 1e-9) + 1;
  return most > 1 ? [most, most - 1] : [1];
}

/**
 * The move distance that serves a zone with edges best: even inside, little water outside. Positions lie in the middle of the zone; for each distance
 * the number of positions that does best is taken. The measure is the low-quarter efficiency, low-quarter uniformity times the share of the water
 * that arrives; among distances as good the one with the fewest positions wins, then the longest.
 * @throws PhysicsError for an impossible zone or limits, a distance that would take more than 400 positions, or a dry pattern
 * Source: potential efficiency of the low quarter, lowest quarter over water applied (Merriam and Keller 1978); superposition as in its form II-1.
 */
export function bestMoveInZone(question: ZoneMoveQuestion): ZoneMoveAnswer {
  const { pattern, zone, arrangement } = question;
  requirePositive('zone.widthM', zone.widthM);
  requirePositive('zone.lengthM', zone.lengthM);
  const widthM = 2 * pattern.reachXM;
  const fromM = requirePositive('fromM', question.fromM ?? widthM / 5);
  const toM = requirePositive('toM', question.toM ?? Math.max(fromM, widthM));
  if (toM < fromM) throw new PhysicsError('toM', toM, 'must not be below fromM');
  const count = requireRange('count', question.count ?? 40, 1, 1000);
  const samples = Math.round(requireRange('samples', question.samples ?? 12, 1, 200));
  const isLine = arrangement === 'line' || pattern.isStrip === true;
  const rowRatio = requirePositive('rowRatio', question.rowRatio ?? pattern.reachYM / pattern.reachXM);
  const outputLph = patternOutputLph(pattern, zone.lengthM);
  if (outputLph <= 0) throw new PhysicsError('pattern', outputLph, 'must wet some ground');
  const options: ZoneMoveOption[] = [];
  for (let index = 0; index < Math.round(count); index += 1) {
    const moveM = count === 1 ? fromM : fromM + ((toM - fromM) * index) / (Math.round(count) - 1);
    const rowMoveM = moveM * rowRatio;
    const columns = countsAlong(zone.widthM, moveM);
    const rows = isLine ? [1] : countsAlong(zone.lengthM, rowMoveM);
    if ((columns[0] ?? 1) * (rows[0] ?? 1) > MOST_POSITIONS) throw new PhysicsError('fromM', moveM, `would take more than ${MOST_POSITIONS} positions`);
    const tried = columns.flatMap((across) => rows.map((along) => judge(question, outputLph, samples, positionsOf(question, moveM, rowMoveM, across, along), moveM, rowMoveM)));
    options.push(tried.reduce((best, each) => (each.lowQuarterEfficiency > best.lowQuarterEfficiency + 1e-12 ? each : best)));
  }
  const top = Math.max(...options.map((option) => option.lowQuarterEfficiency));
  const asGood = options.filter((option) => option.lowQuarterEfficiency >= top - AS_GOOD);
  const fewest = Math.min(...asGood.map((option) => option.positions.length));
  const best = asGood.filter((option) => option.positions.length === fewest).at(-1);
  if (!best) throw new PhysicsError('count', count, 'must try a distance');
  return { best, options };
}
