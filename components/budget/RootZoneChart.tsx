import { useId, type ReactElement } from 'react';
import { VictoryAxis } from 'victory-axis';
import { VictoryBar } from 'victory-bar';
import { VictoryChart } from 'victory-chart';
import { VictoryContainer } from 'victory-core';
import { VictoryArea } from 'victory-area';
import { VictoryLine } from 'victory-line';
import { useElementWidth } from '@/components/ui/useElementWidth';
import type { UnitSystem } from '@/shared/contracts/common';
import type { BudgetDayResponse } from '@/shared/contracts/water';
import { formatCivilDay, formatDepth, toShown } from '@/shared/display';
import { daysBetween } from '@/scheduling/units/civilDay';

export interface RootZoneChartProps {
  name: string;
  days: readonly BudgetDayResponse[];
  /** The days ahead as the plan expects them; empty without a plan. */
  planned: readonly { on: string; depletionMm: number; setsMm: number }[];
  today: string;
  units: UnitSystem;
}

interface Point { x: number; y: number }

/** Runs of days without a gap, so that a gap in the record stays a gap in the curve. */
function runs(points: readonly Point[]): Point[][] {
  const found: Point[][] = [];
  for (const point of points) {
    const last = found.at(-1);
    if (last && point.x - (last.at(-1)?.x ?? 0) <= 1) {
      last.push(point);
    } else {
      found.push([point]);
    }
  }
  return found;
}

/** Water in the root zone at the end of each day, from full at the top; rain and sets as bars in the same unit; the days ahead dotted, planned sets hollow. */
export default function RootZoneChart({ name, days, planned, today, units }: RootZoneChartProps): ReactElement {
  const [holder, width] = useElementWidth<HTMLDivElement>();
  const patternId = `rain${useId().replace(/[^\w]/g, '')}`;
  const first = days[0];
  const last = days.at(-1);
  if (!first || !last) {
    return <div ref={holder} />;
  }
  const at = (on: string) => daysBetween(first.on, on);
  const shown = (mm: number) => toShown('depth', mm, units);
  const left = (day: BudgetDayResponse) => ({ x: at(day.on), y: Math.max(0, shown(day.totalAvailableMm - day.depletionEndMm)) });
  const past = days.filter((day) => !day.isForecast);
  const full = Math.max(...days.map((day) => shown(day.totalAvailableMm)));
  const barWidth = Math.max(3, Math.min(16, (width - 60) / (days.length + 1) * 0.7));
  const storeOn = (on: string) => (days.find((day) => day.on === on) ?? last).totalAvailableMm;
  const unwatered = days.filter((day) => day.isForecast).map(left);
  const expected = planned.length > 0 ? planned.map((day) => ({ x: at(day.on), y: Math.max(0, shown(storeOn(day.on) - day.depletionMm)) })) : unwatered;
  const newest = past.at(-1);
  const ahead = newest && expected[0] && expected[0].x > at(newest.on) ? [left(newest), ...expected] : expected;
  const line = days.map((day) => ({ x: at(day.on), y: shown(day.totalAvailableMm - day.refillLineMm) }));
  const weeks = days.filter((day) => at(day.on) % 7 === at(today) % 7).map((day) => at(day.on));
  const height = 230;
  const domainTop = full * 1.05;
  const soft = { fill: 'var(--ink-soft)', fontSize: 13, fontFamily: 'var(--font-text)', padding: 4 };
  const summary = `Water in the root zone of ${name}, ${formatCivilDay(first.on, 'short')} to ${formatCivilDay(last.on, 'short')}: full is ${formatDepth(last.totalAvailableMm, units)}, the refill line lies ${formatDepth(last.totalAvailableMm - last.refillLineMm, units)} above empty. The table below has each day.`;
  return (
    <div ref={holder} className="w-chart" role="img" aria-label={summary}>
      <svg width="0" height="0" aria-hidden="true" style={{ position: 'absolute' }}>
        <defs>
          <pattern id={patternId} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
            <rect width="6" height="6" fill="var(--water-tint)" />
            <line x1="0" y1="0" x2="0" y2="6" stroke="var(--water)" strokeWidth="3" />
          </pattern>
        </defs>
      </svg>
      {width > 0 ? (
        <VictoryChart width={width} height={height} padding={{ left: 48, right: 12, top: 16, bottom: 32 }} domain={{ x: [-0.5, at(last.on) + 0.5], y: [0, domainTop] }}
          containerComponent={<VictoryContainer responsive={false} />}>
          <VictoryArea data={line} style={{ data: { fill: 'var(--dry-tint)', opacity: 0.7 } }} />
          <VictoryBar data={days.filter((day) => day.effectiveRainMm > 0).map((day) => ({ x: at(day.on), y: shown(day.effectiveRainMm) }))} barWidth={barWidth} style={{ data: { fill: `url(#${patternId})` } }} />
          <VictoryBar data={days.filter((day) => day.irrigationMm > 0).map((day) => ({ x: at(day.on), y: shown(day.effectiveRainMm + day.irrigationMm), y0: shown(day.effectiveRainMm) }))} barWidth={barWidth} style={{ data: { fill: 'var(--water)', opacity: 0.55 } }} />
          <VictoryBar data={planned.filter((day) => day.setsMm > 0).map((day) => ({ x: at(day.on), y: shown(day.setsMm) }))} barWidth={barWidth} style={{ data: { fill: 'none', stroke: 'var(--water)', strokeWidth: 1.5 } }} />
          <VictoryLine data={line} style={{ data: { stroke: 'var(--dry)', strokeWidth: 1.5, strokeDasharray: '5 4' } }} />
          {runs(past.map(left)).map((points, index) => <VictoryLine key={`past-${index}`} data={points} style={{ data: { stroke: 'var(--water)', strokeWidth: 2.5 } }} />)}
          {ahead.length > 0 ? <VictoryLine data={ahead} style={{ data: { stroke: 'var(--water)', strokeWidth: 2.5, strokeDasharray: '2 5', strokeLinecap: 'round' } }} /> : null}
          <VictoryLine data={[{ x: at(today), y: 0 }, { x: at(today), y: domainTop }]} style={{ data: { stroke: 'var(--ink-soft)', strokeWidth: 1 } }} />
          <VictoryAxis tickValues={weeks} tickFormat={(day: number) => (day === at(today) ? 'today' : formatCivilDay(days.find((one) => at(one.on) === day)?.on ?? first.on, 'short').slice(4))}
            style={{ axis: { stroke: 'var(--line)' }, tickLabels: soft, grid: { stroke: 'none' } }} />
          <VictoryAxis dependentAxis crossAxis={false} offsetX={48} tickValues={[0, (line.at(-1)?.y ?? 0), full]} tickFormat={(value: number) => (value === 0 ? 'empty' : value === full ? 'full' : 'refill')}
            style={{ axis: { stroke: 'none' }, tickLabels: soft, grid: { stroke: 'none' } }} />
        </VictoryChart>
      ) : null}
    </div>
  );
}
