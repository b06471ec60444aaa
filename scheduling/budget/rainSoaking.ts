import { PhysicsError, requireNonNegative, requirePositive } from '@/scheduling/units';
import { intakeCurve, soakSteps, surfaceStorageMm, type IntakeSetting } from '@/scheduling/soil';
import type { Assumption } from '@/scheduling/weather';
import { IGNORED_RAIN_PER_ET0, type EffectiveRain } from './effectiveRain';

/** Ground on which rain falls. */
export type RainGround = Omit<IntakeSetting, 'moistness'>;

/** A day's rain with what is known of its hours. */
export interface RainOfDay {
  rainMm: number;
  /** Rain by the hour [mm], 24 figures that add up to the day; null where only the day's sum is known. */
  hourlyMm?: readonly number[] | null;
  /** ET0 of the day in the open [mm]. */
  et0Mm: number;
}

/** Rain of a day taken apart by intensity. */
export interface SoakedRain extends EffectiveRain {
  /** Rain that wets leaves and is gone within the day [mm]. */
  interceptedMm: number;
  /** Rain that left over the surface [mm]. */
  runoffMm: number;
  assumptions: Assumption[];
}

/** Time over which a day's rain is taken to have fallen where no hours are known [h]. Common practice: a typical wet spell. */
export const DEFAULT_RAIN_HOURS = 4;
const STEPS_PER_HOUR = 6;

/**
 * Rain that counts, by how fast it fell on which ground: leaves keep a sprinkle, the soil takes what its falling intake allows, the unevenness of the
 * surface holds some, the rest runs off. What the root zone cannot hold drains later in the balance itself.
 * @param moistness - 0 at the wilting point, 1 at field capacity, at the start of the rain [–]
 * @returns effectiveRainMm + rainLossMm = rainMm, and rainLossMm = interceptedMm + runoffMm
 * @throws PhysicsError for impossible rain or ground, with the field named
 * Sources: FAO-56 chapter 8 for the sprinkle; Horton 1941 with `intakeCurve` and `surfaceStorageMm`
 */
export function soakRain(rain: RainOfDay, ground: RainGround, moistness: number): SoakedRain {
  requireNonNegative('rainMm', rain.rainMm);
  requireNonNegative('et0Mm', rain.et0Mm);
  const hourly = rain.hourlyMm ?? null;
  if (hourly !== null) {
    if (hourly.length !== 24) throw new PhysicsError('hourlyMm', hourly.length, 'must have 24 hours');
    hourly.forEach((depthMm, hour) => requireNonNegative(`hourlyMm[${hour}]`, depthMm));
    const sum = hourly.reduce((total, depthMm) => total + depthMm, 0);
    if (Math.abs(sum - rain.rainMm) > 0.05 + 0.01 * rain.rainMm) throw new PhysicsError('hourlyMm', sum, `must add up to rainMm ${rain.rainMm}`);
  }
  const assumptions: Assumption[] = [];
  if (rain.rainMm < IGNORED_RAIN_PER_ET0 * rain.et0Mm || rain.rainMm === 0) {
    return { effectiveRainMm: 0, rainLossMm: rain.rainMm, interceptedMm: rain.rainMm, runoffMm: 0, assumptions };
  }
  const hours = hourly ?? Array.from({ length: DEFAULT_RAIN_HOURS }, () => rain.rainMm / DEFAULT_RAIN_HOURS);
  if (hourly === null) assumptions.push({ field: 'hourlyMm', method: `rain taken to have fallen evenly within ${DEFAULT_RAIN_HOURS} hours`, source: 'common practice' });
  const sum = hours.reduce((total, depthMm) => total + depthMm, 0);
  // Hours rounded to nothing hold no rain that could run off.
  const scale = sum > 1e-6 ? rain.rainMm / sum : 0;
  const steps = hours.flatMap((depthMm) => Array.from({ length: STEPS_PER_HOUR }, () => (depthMm * scale) / STEPS_PER_HOUR));
  const curve = intakeCurve({ ...ground, moistness });
  const runoffMm = soakSteps(curve, steps, requirePositive('stepHours', 1 / STEPS_PER_HOUR), surfaceStorageMm(ground.slopePct)).reduce((total, step) => total + step.runoffMm, 0);
  const kept = Math.max(0, rain.rainMm - runoffMm);
  return { effectiveRainMm: kept, rainLossMm: rain.rainMm - kept, interceptedMm: 0, runoffMm: rain.rainMm - kept, assumptions };
}
