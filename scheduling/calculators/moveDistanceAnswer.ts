import { RUN_TIME_MULTIPLIER_LIMIT } from '@/scheduling/sprinkler/cupStatistics';
import { minutesForDepth } from '@/scheduling/sprinkler/depthAndTime';
import { bestMoveDistance, type MoveDistanceOption } from '@/scheduling/sprinkler/moveDistance';
import { bestMoveInZone, zoneRates, type FiniteZone, type ZoneMoveOption } from '@/scheduling/sprinkler/moveInZone';
import { alternateSets, overlap, type Arrangement } from '@/scheduling/sprinkler/overlap';
import { griddedPattern, revolvedPattern, sweptPattern, travelledPattern, type RowProfile, type WettingPattern } from '@/scheduling/sprinkler/wettingPattern';
import { PhysicsError } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';

/** Cups as they stood, and what the sprinkler makes of them. */
export type MovePattern =
  | ({ kind: 'full_circle' } & RowProfile)
  | ({ kind: 'part_circle'; fromDeg: number; toDeg: number } & RowProfile)
  | ({ kind: 'oscillating'; widthM: number } & RowProfile)
  | ({ kind: 'travelling'; speedMPerHour: number } & RowProfile)
  | { kind: 'grid'; rates: number[][]; spacingM: number; sprinkler: { column: number; row: number } };

export interface MoveDistanceQuestion {
  pattern: MovePattern;
  arrangement: Arrangement;
  /** Distances tried; 40 between a fifth of the wetted width and the whole of it when left out. */
  fromM?: number;
  toM?: number;
  count?: number;
  /** A zone with edges, judged by evenness and by what falls outside. */
  zone: FiniteZone | null;
  /** Depth wanted everywhere [mm]. */
  depthMm: number;
}

/** Evenness and run time at one distance. */
export interface MoveEvenness {
  /** Mean where the patterns overlap [mm/h]; of a travelling sprinkler [mm a pass]. */
  meanMmPerHour: number;
  lowQuarterUniformity: number;
  lowHalfUniformity: number;
  christiansenPct: number;
  /** 1/DUlh, 1 to 2: used for the run time. */
  runTimeMultiplier: number;
  /** 1/DUlq beside it, not used: watering by the lowest quarter drowns the rest. Null when the lowest quarter is dry. */
  lowQuarterMultiplier: number | null;
  /** Minutes of each set for the wanted depth; null for a travelling sprinkler, whose speed decides. */
  setMinutes: number | null;
}

export interface MoveDistanceFound {
  bestM: number;
  best: MoveEvenness;
  /** No overlap: the positions stand as far apart as the throw reaches. */
  edgeToEdge: MoveEvenness & { moveM: number };
  /** Standing half-way between the last marks every second round, at the best distance. */
  overTwoRounds: MoveEvenness & { gain: number };
  options: MoveDistanceOption[];
  /** With the rates over the zone, row by row from the corner that positions are counted from [mm per hour of set time]. */
  inZone: { best: ZoneMoveOption & { evenness: MoveEvenness; cell: MoveDistanceFound['cell'] }; options: Omit<ZoneMoveOption, 'positions'>[] } | null;
  /** How far water reaches from the sprinkler [m]. */
  reachXM: number;
  reachYM: number;
  /** Sum of the overlapped pattern over one cell at the best distance, row by row [mm/h]. */
  cell: { columns: number; rows: number; ratesMmPerHour: number[] };
  assumptions: Assumption[];
}

const CELL_SAMPLES = 24;
/** A row whose fullest cup shows less than this was not reached [mm/h]. */
const LEAST_RATE_MM_PER_HOUR = 0.001;

const MULTIPLIER: Assumption = { field: 'runTimeMultiplier', method: 'run time by the lower half of the ground, at most twice the mean', source: 'von Bernuth and Mecham; by the lowest quarter turf is badly over-watered (Mecham 2010)' };
const COUNT_RULE: Assumption = { field: 'lowQuarterUniformity', method: 'lowest quarter of the points, to the nearest whole', source: 'as Merriam and Keller 1978 round it' };
const FALLS_OFF: Assumption = { field: 'distancesM', method: 'straight between cups, to nothing one spacing beyond the last wet cup', source: 'common practice' };
const EDGES_FADE: Assumption = { field: 'widthM', method: 'the sides of the sweep fade over a tenth of its width', source: 'default, common practice' };
const IN_LINE: Assumption = { field: 'arrangement', method: 'tracks side by side: judged in one line', source: 'a travelling sprinkler waters a strip' };

function patternOf(given: MovePattern): WettingPattern {
  switch (given.kind) {
    case 'full_circle':
      return revolvedPattern(given);
    case 'part_circle':
      return revolvedPattern(given, { fromDeg: given.fromDeg, toDeg: given.toDeg });
    case 'oscillating':
      return sweptPattern(given, given.widthM);
    case 'travelling':
      return travelledPattern(given, given.speedMPerHour);
    case 'grid':
      return griddedPattern(given.rates, given.spacingM, given.sprinkler);
  }
}

/**
 * How far to move a sprinkler: the flattest distance, what alternate sets add, and, for a zone with edges, the distance that is even inside and wastes
 * little outside.
 * @throws PhysicsError for an impossible pattern, zone or limits, with the field named
 * Source: superposition as in Merriam and Keller 1978, form II-1.
 */
export function moveDistanceAnswer(question: MoveDistanceQuestion): MoveDistanceFound {
  const { zone, depthMm } = question;
  const pattern = patternOf(question.pattern);
  const fullest = Math.max(...(question.pattern.kind === 'grid' ? question.pattern.rates.flat() : question.pattern.ratesMmPerHour));
  if (fullest < LEAST_RATE_MM_PER_HOUR) throw new PhysicsError('pattern', fullest, 'must wet some ground');
  const arrangement: Arrangement = pattern.isStrip ? 'line' : question.arrangement;
  const isTravelling = question.pattern.kind === 'travelling';
  const rowRatio = arrangement === 'line' ? 1 : pattern.reachYM / pattern.reachXM;
  const limits = { ...(question.fromM === undefined ? {} : { fromM: question.fromM }), ...(question.toM === undefined ? {} : { toM: question.toM }), ...(question.count === undefined ? {} : { count: question.count }) };
  const evenness = (found: { meanMmPerHour: number; lowQuarterUniformity: number | null; lowHalfUniformity: number | null; christiansenPct: number | null }): MoveEvenness => {
    const low = found.lowQuarterUniformity ?? 0;
    const runTimeMultiplier = Math.min(RUN_TIME_MULTIPLIER_LIMIT, Math.max(1, 1 / Math.max(found.lowHalfUniformity ?? 0, 1 / RUN_TIME_MULTIPLIER_LIMIT)));
    return {
      meanMmPerHour: found.meanMmPerHour, lowQuarterUniformity: low, lowHalfUniformity: found.lowHalfUniformity ?? 0, christiansenPct: found.christiansenPct ?? 0,
      runTimeMultiplier, // Beyond a thousandfold the lowest quarter is dry for any purpose.
      lowQuarterMultiplier: low > 0.001 ? Math.max(1, 1 / low) : null,
      setMinutes: isTravelling || found.meanMmPerHour <= 0 ? null : minutesForDepth({ depthMm, rateMmPerHour: found.meanMmPerHour, runTimeMultiplier }),
    };
  };
  const { best, options } = bestMoveDistance({ pattern, arrangement, rowRatio, ...limits });
  const at = (moveM: number) => ({ pattern, arrangement, moveM, rowMoveM: moveM * rowRatio });
  const judged = alternateSets(at(best.moveM));
  const apart = overlap(at(2 * pattern.reachXM));
  const inZone = zone === null ? null : { zone, ...bestMoveInZone({ pattern, arrangement, zone, ...limits }) };
  const named = { sameMarks: { ...judged.sameMarks, meanMmPerHour: judged.sameMarks.meanMm }, overTwoRounds: { ...judged.overTwoRounds, meanMmPerHour: judged.overTwoRounds.meanMm } };
  const { kind } = question.pattern;
  return {
    bestM: best.moveM,
    best: evenness(named.sameMarks),
    edgeToEdge: { moveM: 2 * pattern.reachXM, ...evenness({ ...apart, meanMmPerHour: apart.meanMm }) },
    overTwoRounds: { ...evenness(named.overTwoRounds), gain: judged.gain ?? 0 },
    options,
    inZone: inZone === null ? null : {
      best: {
        ...inZone.best, evenness: evenness(inZone.best),
        cell: { columns: CELL_SAMPLES, rows: CELL_SAMPLES, ratesMmPerHour: zoneRates(pattern, inZone.zone, inZone.best.positions, CELL_SAMPLES) },
      },
      options: inZone.options.map(({ positions: _positions, ...option }) => option),
    },
    reachXM: pattern.reachXM,
    reachYM: pattern.reachYM,
    cell: { columns: CELL_SAMPLES, rows: CELL_SAMPLES, ratesMmPerHour: overlap({ ...at(best.moveM), samples: CELL_SAMPLES }).ratesMmPerHour },
    assumptions: [COUNT_RULE, MULTIPLIER, ...(kind === 'grid' ? [] : [FALLS_OFF]), ...(kind === 'oscillating' ? [EDGES_FADE] : []), ...(isTravelling ? [IN_LINE] : [])],
  };
}
