import { bestMoveDistance } from './moveDistance';
import { overlap } from './overlap';
import { checkProfile, profileRate, profileReachM, revolvedPattern, type RowProfile, type WettingPattern } from './wettingPattern';

/** Fewer wet cups than this do not show how a pattern falls off. Common practice. */
export const LEAST_WET_CUPS_IN_ROW = 3;

/** The last cup counts as standing at the edge of the wet grass when it holds less than this share of the fullest. Common practice. */
export const EDGE_SHARE = 0.25;

/** Evenness of a line of positions at one distance between them. */
export interface RowMoveOption {
  /** Distance between two positions [m]. */
  moveM: number;
  /** Mean rate where the patterns overlap [mm/h]. */
  rateMmPerHour: number;
  lowQuarterUniformity: number;
  /** 1/DUlh, at least 1, not limited. */
  runTimeMultiplier: number;
}

export type RowMove =
  | { kind: 'found'; best: RowMoveOption; compared: RowMoveOption; /** from the sprinkler to the last water [m] */ reachM: number }
  /** Why there is no distance: too few wet cups, or a last cup still so full that the pattern goes on beyond it. */
  | { kind: 'none'; because: 'few_cups' | 'edge_not_reached' };

/**
 * The pattern of a row that stands for a strip: the same at every place across it, as under a long oscillating bar.
 * @throws PhysicsError for an impossible profile
 */
export function stripPattern(profile: RowProfile): WettingPattern {
  checkProfile(profile);
  return { rateAt: (x) => profileRate(profile, Math.abs(x)), reachXM: profileReachM(profile), reachYM: 1, isStrip: true };
}

/**
 * How far to move a sprinkler along one line of positions, from a single row of cups out to the last wet grass.
 * @param test.layout - the row: spacing and distance of the first cup [m], and what it stands for
 * @param test.depthsMm - depth in each cup [mm], null where it was not read
 * @param test.minutes - how long the water ran [min]
 * @param currentMoveM - distance moved today [m]; edge to edge when left out
 * @returns the flattest distance beside the present one, or why there is none
 * @throws PhysicsError for impossible distances
 * Source: the row added to itself at trial distances (teaching slides on sprinkler design).
 */
export function rowMove(test: { layout: { spacingM: number; firstDistanceM: number; pattern?: 'full_circle' | 'strip' }; depthsMm: readonly (number | null)[]; minutes: number }, currentMoveM?: number): RowMove {
  const { spacingM, firstDistanceM, pattern: standsFor } = test.layout;
  const profile: RowProfile = { distancesM: [], ratesMmPerHour: [] };
  test.depthsMm.forEach((depthMm, index) => {
    if (depthMm !== null) {
      profile.distancesM.push(firstDistanceM + index * spacingM);
      profile.ratesMmPerHour.push((depthMm * 60) / test.minutes);
    }
  });
  const wet = profile.ratesMmPerHour.filter((rate) => rate > 0);
  if (wet.length < LEAST_WET_CUPS_IN_ROW) {
    return { kind: 'none', because: 'few_cups' };
  }
  if ((profile.ratesMmPerHour.at(-1) ?? 0) > EDGE_SHARE * Math.max(...wet)) {
    return { kind: 'none', because: 'edge_not_reached' };
  }
  const pattern = standsFor === 'strip' ? stripPattern(profile) : revolvedPattern(profile);
  const { best } = bestMoveDistance({ pattern, arrangement: 'line' });
  const option = (moveM: number): RowMoveOption => {
    const { meanMm, lowQuarterUniformity, lowHalfUniformity } = overlap({ pattern, arrangement: 'line', moveM });
    return { moveM, rateMmPerHour: meanMm, lowQuarterUniformity: lowQuarterUniformity ?? 0, runTimeMultiplier: Math.max(1, 1 / Math.max(lowHalfUniformity ?? 0, 1e-9)) };
  };
  return { kind: 'found', best: option(best.moveM), compared: option(currentMoveM ?? 2 * pattern.reachXM), reachM: pattern.reachXM };
}
