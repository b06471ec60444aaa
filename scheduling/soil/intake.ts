import { mmPerHourFromInchesPerHour, PhysicsError, requireNonNegative, requirePositive } from '@/scheduling/units';
import type { SoilTexture } from './texture';

/** How a figure was come by. */
export type FigureBasis = 'published' | 'between neighbours' | 'common practice';

/** Intake of a bare level soil. All defaults: a real soil differs several times over. */
export interface SoilIntake {
  /** Final rate of a soaked soil [mm/h]. */
  steadyMmPerHour: number;
  steadyBasis: FigureBasis;
  /** Rate at which a dry bare soil starts [mm/h]. */
  initialMmPerHour: number;
  /** How fast the first falls to the last, Horton's constant [1/h]. */
  decayPerHour: number;
  source: string;
}

const STEADY_SOURCE = 'US extension tables of basic intake by texture';
const FAMILY_INITIAL = {
  sandy: mmPerHourFromInchesPerHour(5),
  loamy: mmPerHourFromInchesPerHour(3),
  clayey: mmPerHourFromInchesPerHour(1),
} as const;
/** Middle of the 2-7 per hour of the EPA storm-water manual. */
const DECAY_PER_HOUR = 4;

const STEADY: Readonly<Record<SoilTexture, { inPerHour: number; basis: FigureBasis; family: keyof typeof FAMILY_INITIAL }>> = {
  sand: { inPerHour: 0.8, basis: 'published', family: 'sandy' },
  loamy_sand: { inPerHour: 0.7, basis: 'between neighbours', family: 'sandy' },
  sandy_loam: { inPerHour: 0.6, basis: 'published', family: 'sandy' },
  loam: { inPerHour: 0.3, basis: 'published', family: 'loamy' },
  silt_loam: { inPerHour: 0.3, basis: 'between neighbours', family: 'loamy' },
  silt: { inPerHour: 0.25, basis: 'between neighbours', family: 'loamy' },
  silty_clay_loam: { inPerHour: 0.2, basis: 'between neighbours', family: 'clayey' },
  silty_clay: { inPerHour: 0.15, basis: 'between neighbours', family: 'clayey' },
  clay: { inPerHour: 0.12, basis: 'common practice', family: 'clayey' },
};

/**
 * Default intake of a texture, level and bare.
 * Sand takes the lower bound of its published class (over 0.8 in/h), the others the middle.
 * Sources: US extension intake tables; EPA storm-water manual for the dry rate and the decay.
 */
export function soilIntake(texture: SoilTexture): SoilIntake {
  const { inPerHour, basis, family } = STEADY[texture];
  return {
    steadyMmPerHour: mmPerHourFromInchesPerHour(inPerHour),
    steadyBasis: basis,
    initialMmPerHour: FAMILY_INITIAL[family],
    decayPerHour: DECAY_PER_HOUR,
    source: `${STEADY_SOURCE}; dry rate and decay from the EPA storm-water manual`,
  };
}

/** Source of the slope steps, shown beside every figure that uses them. */
export const SLOPE_REDUCTION_SOURCE = 'common practice: none to 4 %, a fifth to 8 %, two fifths to 12 %, three fifths to 16 %, three quarters beyond';

/**
 * Part of the level intake that is left on a slope.
 * @param slopePct - rise over run [%], 0 or more
 * @returns 1 down to 0.25 [–]
 * @throws PhysicsError for a negative slope
 */
export function slopeIntakeFactor(slopePct: number): number {
  requireNonNegative('slopePct', slopePct);
  if (slopePct <= 4) return 1;
  if (slopePct <= 8) return 0.8;
  if (slopePct <= 12) return 0.6;
  if (slopePct <= 16) return 0.4;
  return 0.25;
}

/** Steady intake of a texture on a slope. @param slopePct - [%] @returns [mm/h] */
export function steadyIntakeMmPerHour(texture: SoilTexture, slopePct: number): number {
  return soilIntake(texture).steadyMmPerHour * slopeIntakeFactor(slopePct);
}

/** What decides when water starts to run off. */
export interface RunoffInput {
  /** Application rate, constant [mm/h]. */
  rateMmPerHour: number;
  /** fo [mm/h] */
  initialMmPerHour: number;
  /** fc [mm/h] */
  steadyMmPerHour: number;
  /** b [1/h] */
  decayPerHour: number;
}

/**
 * Time until water stands on the surface at a constant rate, by Horton's falling intake: the time when the water applied equals what
 * the soil could have taken when its rate has fallen to the application rate.
 * @returns [h]; 0 when the rate is above what even dry soil takes, null when the soil takes it for ever
 * @throws PhysicsError for rates out of order, with the field named
 * Equation: Hung 1995, t = {fo − P + fc ln[(fo − fc)/(P − fc)]} / (P b)
 */
export function timeToRunoffHours({ rateMmPerHour, initialMmPerHour, steadyMmPerHour, decayPerHour }: RunoffInput): number | null {
  requireNonNegative('rateMmPerHour', rateMmPerHour);
  requireNonNegative('steadyMmPerHour', steadyMmPerHour);
  requirePositive('initialMmPerHour', initialMmPerHour);
  requirePositive('decayPerHour', decayPerHour);
  if (initialMmPerHour < steadyMmPerHour) throw new PhysicsError('initialMmPerHour', initialMmPerHour, `must not lie below steadyMmPerHour ${steadyMmPerHour}`);
  if (rateMmPerHour <= steadyMmPerHour) return null;
  if (rateMmPerHour >= initialMmPerHour) return 0;
  const fallen = initialMmPerHour - rateMmPerHour
    + (steadyMmPerHour === 0 ? 0 : steadyMmPerHour * Math.log((initialMmPerHour - steadyMmPerHour) / (rateMmPerHour - steadyMmPerHour)));
  return fallen / (rateMmPerHour * decayPerHour);
}

/** Dry-to-moist factor of the starting intake: divided by 3 at field capacity. EPA storm-water manual. */
const INITIAL_AT_FIELD_CAPACITY = 1 / 3;

/**
 * Time to runoff for a zone: slope lowers both rates, soil that is already moist starts lower.
 * @param moistness - 0 at the wilting point, 1 at field capacity [–]
 * @returns [h]; null when the soil takes it for ever
 */
export function zoneTimeToRunoffHours(texture: SoilTexture, slopePct: number, rateMmPerHour: number, moistness: number): number | null {
  const intake = soilIntake(texture);
  const slope = slopeIntakeFactor(slopePct);
  const steadyMmPerHour = intake.steadyMmPerHour * slope;
  const moist = Math.min(1, Math.max(0, moistness));
  const initial = intake.initialMmPerHour * slope * (1 - moist * (1 - INITIAL_AT_FIELD_CAPACITY));
  return timeToRunoffHours({ rateMmPerHour, initialMmPerHour: Math.max(steadyMmPerHour, initial), steadyMmPerHour, decayPerHour: intake.decayPerHour });
}

/** A set cut into cycles with soaking between. */
export interface CycleAndSoak {
  cycles: number;
  minutesPerCycle: number;
  /** From the start of one cycle to the start of the next, at least [min]; 0 for a single cycle. */
  startsApartMinutes: number;
}

/** Least time from start to start of two cycles [min]. Texas A&M AgriLife: 30-60 min. */
export const CYCLE_STARTS_APART_MINUTES = 30;

/**
 * Cuts a set into equal cycles, none longer than the run limit.
 * @param totalMinutes - set time wanted [min]
 * @param limitMinutes - longest run without runoff [min]; null for no limit
 * @throws PhysicsError for a limit that is not positive
 * Source: Texas A&M AgriLife, cycle and soak
 */
export function cycleAndSoak(totalMinutes: number, limitMinutes: number | null): CycleAndSoak {
  requireNonNegative('totalMinutes', totalMinutes);
  if (limitMinutes === null || totalMinutes <= requirePositive('limitMinutes', limitMinutes)) {
    return { cycles: 1, minutesPerCycle: totalMinutes, startsApartMinutes: 0 };
  }
  const cycles = Math.ceil(totalMinutes / limitMinutes - 1e-9);
  const minutesPerCycle = totalMinutes / cycles;
  return { cycles, minutesPerCycle, startsApartMinutes: Math.max(CYCLE_STARTS_APART_MINUTES, minutesPerCycle) };
}
