import { feetFromM, gpmFromLpm, inchesFromMm, kpaFromPsi, mFromFeet, psiFromKpa } from '@/scheduling/units/conversions';
import { PhysicsError, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units/physicsError';

/** Smoothness of plastic and rubber hose in the Hazen–Williams formula. Default. */
export const HOSE_SMOOTHNESS = 140;
const PSI_PER_FOOT_OF_WATER = 0.4335;

/** Inside diameters in which garden hose is sold [mm]: 1/2, 5/8, 3/4 and 1 in. */
export const SOLD_BORES_MM = [12.7, 15.875, 19.05, 25.4] as const;

export interface Hose {
  lengthM: number;
  boreMm: number;
  /** Hazen–Williams C, 140 when left out. */
  smoothness?: number;
}

/**
 * Pressure lost in a hose.
 * @returns loss [kPa], head [m of water] and speed of the water [m/s]
 * @throws PhysicsError when bore is not above zero, length or flow is negative
 * Equation: head ft per 100 ft = 0.2083 (100/C)^1.852 q^1.852 / d^4.8655 with gpm and inches; speed ft/s = 0.408709 q/d².
 * Source: Hazen–Williams as given by engineeringtoolbox.com.
 */
export function hoseLoss(flowLpm: number, hose: Hose): { lossKpa: number; headM: number; speedMps: number } {
  const gpm = gpmFromLpm(requireNonNegative('flowLpm', flowLpm));
  const boreInches = inchesFromMm(requirePositive('boreMm', hose.boreMm));
  const lengthFeet = feetFromM(requireNonNegative('lengthM', hose.lengthM));
  const smoothness = requireRange('smoothness', hose.smoothness ?? HOSE_SMOOTHNESS, 40, 160);
  const headFeetPer100 = (0.2083 * (100 / smoothness) ** 1.852 * gpm ** 1.852) / boreInches ** 4.8655;
  const headFeet = (headFeetPer100 * lengthFeet) / 100;
  return { lossKpa: kpaFromPsi(headFeet * PSI_PER_FOOT_OF_WATER), headM: mFromFeet(headFeet), speedMps: mFromFeet((0.408709 * gpm) / boreInches ** 2) };
}

/** Pressure in a house main behind an open tap when nobody measured it [kPa]: 50 psi. A default, common practice. */
export const DEFAULT_TAP_PRESSURE_KPA = kpaFromPsi(50);

/**
 * Flow to expect when the hose between a tap and the same sprinkler changes. The sprinkler is taken as an opening whose flow goes with the square
 * root of the pressure at it, the tap as a constant pressure.
 * @param input.measuredLpm - flow measured at the sprinkler [L/min]
 * @param input.measuredHose - hose it was measured through
 * @param input.newHose - hose to be used
 * @param input.tapPressureKpa - 345 kPa (50 psi) when left out
 * @returns flow [L/min], and the pressures at the sprinkler before and after [kPa]
 * @throws PhysicsError when the measured flow cannot come through the measured hose at that pressure
 */
export function flowThroughHose(input: { measuredLpm: number; measuredHose: Hose; newHose: Hose; tapPressureKpa?: number }): { flowLpm: number; pressureBeforeKpa: number; pressureAfterKpa: number } {
  const tapKpa = requirePositive('tapPressureKpa', input.tapPressureKpa ?? DEFAULT_TAP_PRESSURE_KPA);
  const measuredLpm = requirePositive('measuredLpm', input.measuredLpm);
  const pressureBeforeKpa = tapKpa - hoseLoss(measuredLpm, input.measuredHose).lossKpa;
  if (pressureBeforeKpa <= 0) {
    throw new PhysicsError('measuredLpm', measuredLpm, 'cannot come through that hose at that pressure');
  }
  const opening = measuredLpm / Math.sqrt(pressureBeforeKpa);
  let low = 0;
  let high = opening * Math.sqrt(tapKpa);
  for (let step = 0; step < 60; step += 1) {
    const flow = (low + high) / 2;
    if (hoseLoss(flow, input.newHose).lossKpa + (flow / opening) ** 2 > tapKpa) {
      high = flow;
    } else {
      low = flow;
    }
  }
  return { flowLpm: low, pressureBeforeKpa, pressureAfterKpa: (low / opening) ** 2 };
}

/** Loss in psi, for comparison with tables in US units. */
export function hoseLossPsi(flowLpm: number, hose: Hose): number {
  return psiFromKpa(hoseLoss(flowLpm, hose).lossKpa);
}
