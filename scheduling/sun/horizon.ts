import { requireRange } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';

/** Height of what hides the sky, for each whole degree of azimuth from north through east. */
export interface Horizon {
  /** 360 heights [°], 0 where the view is open. */
  heightDeg: readonly number[];
  assumptions: readonly Assumption[];
}

/** An open horizon all round. */
export const OPEN_HORIZON: Horizon = { heightDeg: Array.from({ length: 360 }, () => 0), assumptions: [] };

/** Height of a horizon in a direction [°]. @param azimuthDeg - clockwise from north, any turn */
export function heightAtDeg(horizon: Horizon, azimuthDeg: number): number {
  const degree = Math.floor(((azimuthDeg % 360) + 360) % 360);
  return horizon.heightDeg[degree] ?? 0;
}

/** Refuses heights that no horizon has. @throws PhysicsError with the field named */
export function requireHorizon(field: string, horizon: Horizon): void {
  requireRange(`${field}.heightDeg.length`, horizon.heightDeg.length, 360, 360);
  horizon.heightDeg.forEach((height, index) => requireRange(`${field}.heightDeg[${index}]`, height, 0, 90));
}
