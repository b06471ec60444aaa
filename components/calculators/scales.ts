/** A straight scale from numbers to places on the screen. */
export function scale(from: number, to: number, first: number, last: number): (value: number) => number {
  return (value) => (to === from ? first : first + ((value - from) / (to - from)) * (last - first));
}

/** A line through points. */
export function linePath(points: readonly (readonly [number, number])[]): string {
  return points.map(([x, y], index) => `${index === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join(' ');
}

/** The ground between a line and a level. */
export function areaPath(points: readonly (readonly [number, number])[], level: number): string {
  const first = points[0];
  const last = points.at(-1);
  return first && last ? `${linePath(points)} L${last[0].toFixed(1)} ${level.toFixed(1)} L${first[0].toFixed(1)} ${level.toFixed(1)} Z` : '';
}

/** A round number at or above a value: 1, 2, 2.5 or 5 times a power of ten. */
export function roundUp(value: number): number {
  if (!(value > 0)) return 1;
  const power = 10 ** Math.floor(Math.log10(value));
  return ([1, 2, 2.5, 5, 10].find((step) => step * power >= value - 1e-9) ?? 10) * power;
}

export const percent = (share: number): string => `${Math.round(share * 100)} %`;
