import { PhysicsError, requirePositive } from '@/scheduling/units/physicsError';
import { mmFromInches } from '@/scheduling/units/conversions';
import { doesItFit, type FitAnswer, type FitQuestion } from './hoseHours';
import { flowThroughHose, SOLD_BORES_MM } from './hoseLoss';

export { SOLD_BORES_MM };

/** Keeps the crowns of a resting lawn alive [mm per week]: half an inch every two weeks (Purdue, Indiana). */
export const RESTING_MM_PER_WEEK = mmFromInches(0.5) / 2;

/** One way to make a week fit, and what it comes to. */
export type FitHelp =
  /** A hose of the next bore between the same tap and sprinkler. */
  | { kind: 'fatter_hose'; boreMm: number; flowLpm: number; neededHours: number; gainHours: number; fits: boolean }
  /** Two taps at once; the best case, when the house pipe gives both the full flow. */
  | { kind: 'second_tap'; neededHours: number; gainHours: number; fits: boolean }
  | { kind: 'less_area'; areaM2: number; neededHours: number; gainHours: number; fits: true }
  | { kind: 'less_depth'; depthMmPerWeek: number; neededHours: number; gainHours: number; fits: true }
  /** This part of the area rests, on what keeps its crowns alive, and the remainder gets the whole depth. */
  | { kind: 'resting_part'; areaM2: number; share: number; neededHours: number; gainHours: number; fits: true };

/**
 * What would help a week that does not fit, each by itself and computed.
 * @param question - area, depth, flow, hours and moves
 * @param hose - the hose that the flow was measured through; left out, a fatter one is not reckoned
 * @returns nothing when the week fits
 * @throws PhysicsError for an impossible number
 */
export function fitHelps(question: FitQuestion, hose?: { lengthM: number; boreMm: number }): FitHelp[] {
  const answer = doesItFit(question);
  if (answer.fits) {
    return [];
  }
  const helps: FitHelp[] = [];
  const weigh = (next: FitAnswer) => ({ neededHours: next.neededHours, gainHours: answer.neededHours - next.neededHours, fits: next.fits });
  const boreMm = hose && SOLD_BORES_MM.find((sold) => sold > hose.boreMm + 0.5);
  if (hose && boreMm) {
    const flowLpm = fatterFlow(question.flowLpm, hose, boreMm);
    if (flowLpm !== null) {
      helps.push({ kind: 'fatter_hose', boreMm, flowLpm, ...weigh(doesItFit({ ...question, flowLpm })) });
    }
  }
  helps.push({ kind: 'second_tap', ...weigh(doesItFit({ ...question, flowLpm: 2 * question.flowLpm })) });
  const areaM2 = question.areasM2.reduce((sum, area) => sum + area, 0);
  const litres = answer.affordableDepthMm * areaM2;
  if (litres > 0) {
    const fitting = { neededHours: answer.hadHours, gainHours: answer.neededHours - answer.hadHours, fits: true } as const;
    helps.push({ kind: 'less_area', areaM2: answer.affordableAreaM2, ...fitting }, { kind: 'less_depth', depthMmPerWeek: answer.affordableDepthMm, ...fitting });
    const spared = question.depthMmPerWeek - RESTING_MM_PER_WEEK;
    const share = spared > 0 ? (areaM2 * question.depthMmPerWeek - litres) / (areaM2 * spared) : Number.POSITIVE_INFINITY;
    if (share <= 1) {
      helps.push({ kind: 'resting_part', areaM2: share * areaM2, share, ...fitting });
    }
  }
  return helps;
}

/** Flow through a fatter hose [L/min]; null when the flow told cannot come through the hose told at an ordinary pressure. */
function fatterFlow(measuredLpm: number, measuredHose: { lengthM: number; boreMm: number }, boreMm: number): number | null {
  requirePositive('lengthM', measuredHose.lengthM);
  try {
    return flowThroughHose({ measuredLpm, measuredHose, newHose: { ...measuredHose, boreMm } }).flowLpm;
  } catch (error) {
    if (error instanceof PhysicsError && error.field === 'measuredLpm') {
      return null;
    }
    throw error;
  }
}
