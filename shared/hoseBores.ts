import type { DisplayUnits } from './display';

/** Garden hose is sold by these inside diameters [mm]. */
export const hoseBores: readonly { mm: number; us: string; metric: string }[] = [
  { mm: 12.7, us: '1/2 in', metric: '13 mm (1/2 in)' }, { mm: 15.875, us: '5/8 in', metric: '16 mm (5/8 in)' },
  { mm: 19.05, us: '3/4 in', metric: '19 mm (3/4 in)' }, { mm: 25.4, us: '1 in', metric: '25 mm (1 in)' },
];

/** How a sold bore is called: '5/8 in' or '16 mm (5/8 in)'. */
export function hoseBoreLabel(boreMm: number, units: DisplayUnits): string {
  const sold = hoseBores.find(({ mm }) => Math.abs(mm - boreMm) < 0.3);
  return sold === undefined ? `${boreMm} mm` : sold[units];
}
