import { requireNonNegative, requirePositive, requireRange } from '@/scheduling/units/physicsError';

/**
 * Application rate of a flow spread over an area.
 * @returns rate [mm/h]: 1 L on 1 m² is 1 mm
 * @throws PhysicsError when the flow is negative or the area not above zero
 * Source: in/h = 96.25 × gpm ÷ sq ft, the same in other units.
 */
export function rateFromFlow(flowLpm: number, areaM2: number): number {
  return (requireNonNegative('flowLpm', flowLpm) * 60) / requirePositive('areaM2', areaM2);
}

/**
 * Minutes of a set for a wanted net depth.
 * @param runTimeMultiplier - from the lower half of a cup test, 1 when unknown
 * @returns minutes, not rounded
 * @throws PhysicsError when the rate is not above zero, the depth negative, the multiplier below 1
 */
export function minutesForDepth(input: { depthMm: number; rateMmPerHour: number; runTimeMultiplier?: number }): number {
  const multiplier = requireRange('runTimeMultiplier', input.runTimeMultiplier ?? 1, 1, 10);
  return ((requireNonNegative('depthMm', input.depthMm) * multiplier) / requirePositive('rateMmPerHour', input.rateMmPerHour)) * 60;
}
