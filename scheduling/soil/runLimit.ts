import { PhysicsError, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units';
import { CYCLE_STARTS_APART_MINUTES, slopeIntakeFactor, SLOPE_REDUCTION_SOURCE, soilIntake, type RunoffInput } from './intake';
import type { SoilTexture } from './texture';

/** How hard the ground is underfoot. */
export const SOIL_COMPACTIONS = ['loose', 'firm', 'hard'] as const;
export type SoilCompaction = (typeof SOIL_COMPACTIONS)[number];

/**
 * Part of the intake that is left where the ground is trodden or driven on. Building traffic took 70 to 99 % of the intake of sandy lots (Gregory et al.
 * 2006, J. Soil Water Conserv. 61:117, from memory); hard ground takes the mild end, firm ground lies between. Defaults.
 */
export const COMPACTION_INTAKE_FACTOR: Readonly<Record<SoilCompaction, number>> = { loose: 1, firm: 0.6, hard: 0.3 };
export const COMPACTION_SOURCE = 'default after Gregory et al. 2006: traffic takes 70 % of the intake and more';

/** Water that may stand in the unevenness of a lawn before it runs: 5 mm to 5 % of slope, falling in a straight line to 2.5 mm at 16 % [mm]. The careful half of the trade's .2-.5 in and .1 in, from memory. */
export function surfaceStorageMm(slopePct: number): number {
  requireNonNegative('slopePct', slopePct);
  return 5 - 2.5 * Math.min(1, Math.max(0, (slopePct - 5) / 11));
}

/** Intake that falls as the soil wets: Horton's curve of one piece of ground. */
export type IntakeCurve = Omit<RunoffInput, 'rateMmPerHour'>;

/** What decides how fast a piece of ground takes water. */
export interface IntakeSetting {
  texture: SoilTexture;
  /** Rise over run [%]. */
  slopePct: number;
  compaction: SoilCompaction;
  /** 0 at the wilting point, 1 at field capacity [–]. */
  moistness: number;
}

const INITIAL_AT_FIELD_CAPACITY = 1 / 3;

/**
 * Intake curve of a piece of ground: slope and compaction lower both ends, moist soil starts lower.
 * @throws PhysicsError for impossible ground, with the field named
 * Sources: `soilIntake`, `slopeIntakeFactor`, `COMPACTION_INTAKE_FACTOR`; a third of the dry rate at field capacity (EPA storm-water manual)
 */
export function intakeCurve({ texture, slopePct, compaction, moistness }: IntakeSetting): IntakeCurve {
  requireRange('moistness', moistness, 0, 1);
  const intake = soilIntake(texture);
  const factor = slopeIntakeFactor(slopePct) * COMPACTION_INTAKE_FACTOR[compaction];
  const steadyMmPerHour = intake.steadyMmPerHour * factor;
  const initial = intake.initialMmPerHour * factor * (1 - moistness * (1 - INITIAL_AT_FIELD_CAPACITY));
  return { initialMmPerHour: Math.max(steadyMmPerHour, initial), steadyMmPerHour, decayPerHour: intake.decayPerHour };
}

function requireCurve({ initialMmPerHour, steadyMmPerHour, decayPerHour }: IntakeCurve): void {
  requireNonNegative('steadyMmPerHour', steadyMmPerHour);
  requirePositive('initialMmPerHour', initialMmPerHour);
  requirePositive('decayPerHour', decayPerHour);
  if (initialMmPerHour < steadyMmPerHour) throw new PhysicsError('initialMmPerHour', initialMmPerHour, `must not lie below steadyMmPerHour ${steadyMmPerHour}`);
}

/** Rate at which ponded ground takes water after a time. @returns [mm/h]. Horton 1941: f = fc + (fo − fc) e^(−bt) */
export function intakeRateMmPerHour(curve: IntakeCurve, hours: number): number {
  requireCurve(curve);
  requireNonNegative('hours', hours);
  return curve.steadyMmPerHour + (curve.initialMmPerHour - curve.steadyMmPerHour) * Math.exp(-curve.decayPerHour * hours);
}

/** Water that ponded ground has taken after a time, the integral of the rate. @returns [mm] */
export function intakeByMm(curve: IntakeCurve, hours: number): number {
  requireCurve(curve);
  requireNonNegative('hours', hours);
  return curve.steadyMmPerHour * hours + ((curve.initialMmPerHour - curve.steadyMmPerHour) / curve.decayPerHour) * (1 - Math.exp(-curve.decayPerHour * hours));
}

/** Time on the ponded curve by which it has taken a depth. @returns [h] */
function timeOnCurve(curve: IntakeCurve, takenMm: number): number {
  const { initialMmPerHour, steadyMmPerHour, decayPerHour } = curve;
  const extra = (initialMmPerHour - steadyMmPerHour) / decayPerHour;
  if (steadyMmPerHour === 0) return takenMm >= extra ? Infinity : -Math.log(1 - takenMm / extra) / decayPerHour;
  let low = Math.max(0, (takenMm - extra) / steadyMmPerHour);
  let high = takenMm / steadyMmPerHour;
  for (let turn = 0; turn < 60; turn += 1) {
    const middle = (low + high) / 2;
    const taken = steadyMmPerHour * middle + extra * (1 - Math.exp(-decayPerHour * middle));
    if (taken < takenMm) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** What became of water that fell at a rate for a time. */
export interface IntakeStep {
  infiltratedMm: number;
  /** Water that stands on the surface at the end [mm]. */
  pondedMm: number;
  runoffMm: number;
}

/**
 * Lets ground take water that falls in steps. Between steps the curve goes by what the ground has taken (time compression), standing water soaks in
 * first, and what the surface cannot hold runs off.
 * @param depthsMm - water in each step [mm]
 * @param stepHours - length of a step [h]
 * @param storageMm - water that the surface holds [mm]
 * @returns one entry for each step; infiltrated + runoff + change of ponding = water of the step
 * @throws PhysicsError for impossible input, with the field named
 * Source: Horton 1941 with time compression, as in the EPA storm-water manual
 */
export function soakSteps(curve: IntakeCurve, depthsMm: readonly number[], stepHours: number, storageMm: number): IntakeStep[] {
  requireCurve(curve);
  requirePositive('stepHours', stepHours);
  requireNonNegative('storageMm', storageMm);
  let takenMm = 0;
  let pondedMm = 0;
  return depthsMm.map((depthMm, index) => {
    requireNonNegative(`depthsMm[${index}]`, depthMm);
    const at = timeOnCurve(curve, takenMm);
    const canTakeMm = at === Infinity ? 0 : Math.max(0, intakeByMm(curve, at + stepHours) - takenMm);
    const infiltratedMm = Math.min(pondedMm + depthMm, canTakeMm);
    const leftMm = pondedMm + depthMm - infiltratedMm;
    takenMm += infiltratedMm;
    pondedMm = Math.min(leftMm, storageMm);
    return { infiltratedMm, pondedMm, runoffMm: leftMm - pondedMm };
  });
}

/** How long water may run on a piece of ground. */
export interface RunLimit {
  /** Longest run before water leaves the surface [min]; null when the ground takes it for ever. */
  minutes: number | null;
  /** Time until water begins to stand [min]; null when it never does. */
  pondingMinutes: number | null;
  curve: IntakeCurve;
  storageMm: number;
  sources: string[];
}

/**
 * Longest run at a steady rate: until water stands, and until what stands fills the unevenness of the surface.
 * @param rateMmPerHour - application rate [mm/h]
 * @param storageMm - water that may stand [mm]; left out, `surfaceStorageMm` of the slope; 0 gives the published time to runoff (Hung 1995)
 * @throws PhysicsError for impossible ground or rates, with the field named
 * Sources: Horton 1941; Hung 1995 for the time until water stands
 */
export function runLimit(setting: IntakeSetting, rateMmPerHour: number, storageMm?: number): RunLimit {
  requireNonNegative('rateMmPerHour', rateMmPerHour);
  const curve = intakeCurve(setting);
  const storage = requireNonNegative('storageMm', storageMm ?? surfaceStorageMm(setting.slopePct));
  const sources = [soilIntake(setting.texture).source];
  if (slopeIntakeFactor(setting.slopePct) < 1) sources.push(SLOPE_REDUCTION_SOURCE);
  if (setting.compaction !== 'loose') sources.push(COMPACTION_SOURCE);
  const { initialMmPerHour, steadyMmPerHour, decayPerHour } = curve;
  if (rateMmPerHour <= steadyMmPerHour) return { minutes: null, pondingMinutes: null, curve, storageMm: storage, sources };
  const meeting = rateMmPerHour >= initialMmPerHour ? 0 : Math.log((initialMmPerHour - steadyMmPerHour) / (rateMmPerHour - steadyMmPerHour)) / decayPerHour;
  const pondingHours = meeting === 0 ? 0 : intakeByMm(curve, meeting) / rateMmPerHour;
  // From then on the ground takes as on the ponded curve: find when the surplus fills the surface.
  const surplus = (hours: number) => rateMmPerHour * (pondingHours + hours) - intakeByMm(curve, meeting + hours);
  let low = 0;
  let high = storage / (rateMmPerHour - steadyMmPerHour) + (initialMmPerHour - steadyMmPerHour) / decayPerHour / (rateMmPerHour - steadyMmPerHour);
  for (let turn = 0; turn < 60 && storage > 0; turn += 1) {
    const middle = (low + high) / 2;
    if (surplus(middle) < storage) low = middle;
    else high = middle;
  }
  return { minutes: 60 * (pondingHours + (storage > 0 ? high : 0)), pondingMinutes: 60 * pondingHours, curve, storageMm: storage, sources };
}

/** A set cut into cycles that the ground can take. */
export interface SoakPattern {
  cycles: number;
  minutesPerCycle: number;
  /** From the start of one cycle to the start of the next [min]; 0 for a single cycle. */
  startsApartMinutes: number;
  /** Start of each cycle [min after the start of the first]. */
  startMinutes: number[];
}

/**
 * Cycle-and-soak pattern of a set: equal cycles, none longer than the run limit, far enough apart that each has soaked in at the steady rate and never
 * nearer than half an hour.
 * @param totalMinutes - set time [min]
 * @param limit - run limit of the ground
 * @param rateMmPerHour - application rate [mm/h]
 * @throws PhysicsError for a negative set time
 * Source: Texas A&M AgriLife: cycles start 30 to 60 min apart; the soaking time by the steady intake is conservation of water
 */
export function soakPattern(totalMinutes: number, limit: RunLimit, rateMmPerHour: number): SoakPattern {
  requireNonNegative('totalMinutes', totalMinutes);
  requireNonNegative('rateMmPerHour', rateMmPerHour);
  // Ground that ponds at once still takes short bursts: a minute is the shortest.
  const limitMinutes = limit.minutes === null ? Infinity : Math.max(1, limit.minutes);
  if (totalMinutes <= limitMinutes) return { cycles: 1, minutesPerCycle: totalMinutes, startsApartMinutes: 0, startMinutes: [0] };
  const cycles = Math.ceil(totalMinutes / limitMinutes - 1e-9);
  const minutesPerCycle = totalMinutes / cycles;
  const { steadyMmPerHour } = limit.curve;
  const soakedAfter = steadyMmPerHour > 0 ? (minutesPerCycle * rateMmPerHour) / steadyMmPerHour : Infinity;
  const startsApartMinutes = Math.max(CYCLE_STARTS_APART_MINUTES, minutesPerCycle, Math.min(soakedAfter, 24 * 60));
  return { cycles, minutesPerCycle, startsApartMinutes, startMinutes: Array.from({ length: cycles }, (_, index) => index * startsApartMinutes) };
}
