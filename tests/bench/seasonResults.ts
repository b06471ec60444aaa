import { CLAIRVOYANTS, CURVE_SCALES, DAPPLE, FURTHER_SCALES, thumbName, type SeasonRow, type Thumb } from './seasonRows';
import { SEASON_YARDS, type SeasonYard } from './seasonYards';

/** Mean of all replayed seasons under one controller. */
export type MeanSeason = Omit<SeasonRow, 'yard' | 'station' | 'year' | 'controller' | 'closingErrorMm'>;

export interface CurvePoint {
  scale: number;
  waterM3: number;
  stressDays: number;
}

/** What the replay says about one yard. */
export interface YardResult {
  yard: SeasonYard;
  seasons: number;
  dapple: MeanSeason;
  clairvoyant: MeanSeason;
  /** Which of those who know the weather was the best. */
  clairvoyantName: string;
  thumbs: Record<Thumb, { mean: MeanSeason; curve: CurvePoint[]; beyond: CurvePoint[] }>;
}

/** Where next to nobody suffers, this much stress counts as equal: a thousandth of the season's 214 patch-days [days]. */
export const EQUAL_STRESS_DAYS = 0.2;

function meanOf(rows: readonly SeasonRow[]): MeanSeason {
  if (rows.length === 0) throw new Error('No season to take the mean of.');
  const mean = (pick: (row: SeasonRow) => number) => rows.reduce((sum, row) => sum + pick(row), 0) / rows.length;
  const priorities = [...new Set(rows.flatMap((row) => Object.keys(row.stressDaysByPriority)))].sort();
  return {
    waterM3: mean((row) => row.waterM3), stressDays: mean((row) => row.stressDays), drainageMm: mean((row) => row.drainageMm), runoffMm: mean((row) => row.runoffMm),
    outings: mean((row) => row.outings), moves: mean((row) => row.moves), dosesWanted: mean((row) => row.dosesWanted), dosesKept: mean((row) => row.dosesKept),
    stressDaysByPriority: Object.fromEntries(priorities.map((priority) => [priority, mean((row) => row.stressDaysByPriority[priority] ?? 0)])),
  };
}

/** The least water among those whose stress is as low as anybody's who knows the weather. */
function bestKnowing(rows: readonly SeasonRow[]): { name: string; mean: MeanSeason } {
  const found = CLAIRVOYANTS.flatMap((name) => {
    const own = rows.filter((row) => row.controller === name);
    return own.length === 0 ? [] : [{ name, mean: meanOf(own) }];
  });
  const least = Math.min(...found.map(({ mean }) => mean.stressDays));
  const good = found.filter(({ mean }) => mean.stressDays <= least * 1.02 + EQUAL_STRESS_DAYS / 10).sort((a, b) => a.mean.waterM3 - b.mean.waterM3);
  const best = good[0];
  if (!best) throw new Error('Nobody knew the weather.');
  return best;
}

/** Gathers the rows of all seasons by yard. */
export function yardResults(rows: readonly SeasonRow[]): YardResult[] {
  return SEASON_YARDS.map((yard) => {
    const own = rows.filter((row) => row.yard === yard.id);
    const of = (controller: string) => meanOf(own.filter((row) => row.controller === controller));
    const best = bestKnowing(own);
    const thumb = (name: Thumb) => {
      const points = (scales: readonly number[]) => scales.map((scale): CurvePoint => {
        const { waterM3, stressDays } = of(thumbName(name, scale));
        return { scale, waterM3, stressDays };
      });
      return { mean: of(thumbName(name, 1)), curve: points(CURVE_SCALES), beyond: points(FURTHER_SCALES) };
    };
    return {
      yard, seasons: own.filter((row) => row.controller === DAPPLE).length, dapple: of(DAPPLE), clairvoyant: best.mean, clairvoyantName: best.name,
      thumbs: { fixed: thumb('fixed'), inch: thumb('inch') },
    };
  });
}

/**
 * Stress of a rule of thumb at an amount of water, between the points of its curve [days]. Beyond the least and the greatest amount it is drawn from there on
 * level, which for more water is too much stress: carry the curve on before you ask.
 */
export function stressAt(curve: readonly CurvePoint[], waterM3: number): number {
  const points = [...curve].sort((a, b) => a.waterM3 - b.waterM3);
  const first = points[0];
  const last = points[points.length - 1];
  if (!first || !last) throw new Error('The curve has no points.');
  if (waterM3 <= first.waterM3) return first.stressDays;
  for (let index = 1; index < points.length; index += 1) {
    const low = points[index - 1] ?? first;
    const high = points[index] ?? last;
    if (waterM3 <= high.waterM3) {
      return low.stressDays + ((high.stressDays - low.stressDays) * (waterM3 - low.waterM3)) / Math.max(1e-9, high.waterM3 - low.waterM3);
    }
  }
  return last.stressDays;
}

/** A figure held to a limit. */
export interface Figure {
  name: string;
  value: number;
  unit: string;
  bound: 'most' | 'least';
  limit: number;
}

/** Pairs of priorities of which the more important one suffers more. */
export function priorityInversions(stressDaysByPriority: Readonly<Record<string, number>>): number {
  const byRank = Object.entries(stressDaysByPriority).sort(([a], [b]) => Number(a) - Number(b)).map(([, days]) => days);
  return byRank.reduce((count, days, index) => count + byRank.slice(index + 1).filter((later) => later < days - 1e-9).length, 0);
}

/** What the replay is held to. */
export function seasonFigures(results: readonly YardResult[]): Figure[] {
  return results.flatMap(({ yard, dapple, clairvoyant, thumbs }): Figure[] => {
    const below = (Object.keys(thumbs) as Thumb[]).map((thumb): Figure => ({
      name: `seasons-${yard.id}-stress-over-${thumb}-curve`, unit: 'ratio at equal water', bound: 'most', limit: 1,
      value: dapple.stressDays / stressAt([...thumbs[thumb].curve, ...thumbs[thumb].beyond], dapple.waterM3),
    }));
    if (!yard.fits) {
      return [
        ...below,
        { name: `seasons-${yard.id}-priorities-out-of-order`, value: priorityInversions(dapple.stressDaysByPriority), unit: 'pairs', bound: 'most', limit: 0 },
        { name: `seasons-${yard.id}-doses-kept`, value: (100 * dapple.dosesKept) / dapple.dosesWanted, unit: '%', bound: 'least', limit: 95 },
      ];
    }
    return [
      { name: `seasons-${yard.id}-water-over-clairvoyant`, value: dapple.waterM3 / clairvoyant.waterM3, unit: 'ratio', bound: 'most', limit: 1.12 },
      { name: `seasons-${yard.id}-stress-above-clairvoyant`, value: dapple.stressDays - clairvoyant.stressDays, unit: 'days a season', bound: 'most', limit: Math.max(0.02 * clairvoyant.stressDays, EQUAL_STRESS_DAYS) },
      ...below,
    ];
  });
}
