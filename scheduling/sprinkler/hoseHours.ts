import { requireNonNegative, requirePositive } from '@/scheduling/units/physicsError';

/**
 * Hours of tap that a depth on an area takes. It depends on area, depth and flow only, not on the sprinkler.
 * @returns volume [L] and hours, moves not counted
 * @throws PhysicsError when area or flow is not above zero or the depth negative
 * Source: 1 mm on 1 m² is 1 L; 1 in on 5,000 sq ft at 5 gpm is 10.4 h.
 */
export function hoseHours(input: { areaM2: number; depthMm: number; flowLpm: number }): { volumeL: number; hours: number } {
  const volumeL = requirePositive('areaM2', input.areaM2) * requireNonNegative('depthMm', input.depthMm);
  return { volumeL, hours: volumeL / requirePositive('flowLpm', input.flowLpm) / 60 };
}

export interface FitQuestion {
  /** Area of each part to be watered [m²]. */
  areasM2: number[];
  depthMmPerWeek: number;
  flowLpm: number;
  /** Hours a week when water may run and somebody is at home. */
  hoursPerWeek: number;
  /** Moves in a week [count], none when left out. */
  movesPerWeek?: number;
  /** Minutes for one move [min], 5 when left out. */
  moveMinutes?: number;
}

export interface FitAnswer {
  volumeLPerWeek: number;
  /** Hours of running water wanted in a week [h]. */
  waterHours: number;
  /** Hours for moves in a week [h]. */
  moveHours: number;
  neededHours: number;
  hadHours: number;
  /** Needed over had: above 1 it does not fit. Null when no hours are there at all. */
  load: number | null;
  fits: boolean;
  /** Depth that the hours allow after the moves [mm per week]. */
  affordableDepthMm: number;
  /** Area that the hours allow at the wanted depth [m²]. */
  affordableAreaM2: number;
}

const DEFAULT_MOVE_MINUTES = 5;

/**
 * Whether a week's water fits the hours.
 * @throws PhysicsError for a negative or impossible number; no area at all is refused as `areasM2`
 */
export function doesItFit(question: FitQuestion): FitAnswer {
  question.areasM2.forEach((area, index) => requirePositive(`areasM2[${index}]`, area));
  const areaM2 = requirePositive('areasM2', question.areasM2.reduce((sum, area) => sum + area, 0));
  requireNonNegative('depthMmPerWeek', question.depthMmPerWeek);
  requireNonNegative('hoursPerWeek', question.hoursPerWeek);
  const { volumeL, hours: waterHours } = hoseHours({ areaM2, depthMm: question.depthMmPerWeek, flowLpm: question.flowLpm });
  const moveHours = (requireNonNegative('movesPerWeek', question.movesPerWeek ?? 0) * requireNonNegative('moveMinutes', question.moveMinutes ?? DEFAULT_MOVE_MINUTES)) / 60;
  const neededHours = waterHours + moveHours;
  const litresAffordable = Math.max(0, question.hoursPerWeek - moveHours) * 60 * question.flowLpm;
  return {
    volumeLPerWeek: volumeL, waterHours, moveHours, neededHours, hadHours: question.hoursPerWeek,
    load: question.hoursPerWeek > 0 ? neededHours / question.hoursPerWeek : null,
    fits: neededHours <= question.hoursPerWeek,
    affordableDepthMm: litresAffordable / areaM2,
    affordableAreaM2: question.depthMmPerWeek > 0 ? litresAffordable / question.depthMmPerWeek : areaM2,
  };
}
