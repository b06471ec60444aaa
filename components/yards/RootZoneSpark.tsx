import type { ReactElement } from 'react';
import type { PortfolioYard } from './needWords';

const width = 120;
const height = 36;

/** Fourteen days of root-zone water of the zone nearest its refill line, full at the top, with the refill line dashed. `wide` fills its place and is tall. */
export function RootZoneSpark({ yard, wide = false }: { yard: PortfolioYard; wide?: boolean }): ReactElement {
  const days = yard.rootZone;
  if (days.length < 2) {
    return <span className="y-none">no days yet</span>;
  }
  const deepest = Math.max(...days.map((day) => Math.max(day.depletionMm, day.refillLineMm))) * 1.15 || 1;
  const x = (index: number) => (index / (days.length - 1)) * (width - 4) + 2;
  const y = (depletionMm: number) => 3 + (depletionMm / deepest) * (height - 6);
  const last = days[days.length - 1];
  const words = last === undefined ? '' : `${yard.rootZoneName ?? 'Zone'}: ${last.depletionMm >= last.refillLineMm ? 'past' : 'above'} its refill line`;
  const size = wide ? { width: '100%', height: 132, preserveAspectRatio: 'none' } : { width, height };
  return (
    <svg {...size} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={words} className="y-spark">
      <polyline points={days.map((day, index) => `${x(index)},${y(day.refillLineMm)}`).join(' ')} fill="none" stroke="var(--dry)" strokeWidth="1.5" strokeDasharray={wide ? '5 4' : '2 3'} vectorEffect="non-scaling-stroke" />
      <polyline points={days.map((day, index) => `${x(index)},${y(day.depletionMm)}`).join(' ')} fill="none" stroke="var(--water)" strokeWidth="2.25" strokeLinejoin="round" vectorEffect="non-scaling-stroke" />
    </svg>
  );
}
