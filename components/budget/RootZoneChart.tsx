import { useId, type ReactElement } from 'react';
import { VictoryAxis } from 'victory-axis';
import { VictoryBar } from 'victory-bar';
import { VictoryChart } from 'victory-chart';
import { VictoryContainer } from 'victory-core';
import { VictoryArea } from 'victory-area';
import { VictoryLine } from 'victory-line';
import { useElementWidth } from '@/components/ui/useElementWidth';
import { morningDepletionMm } from '@/scheduling/budget/morningDepletion';
import type { UnitSystem } from '@/shared/contracts/common';
import type { BudgetDayResponse } from '@/shared/contracts/water';
import { formatCivilDay, formatDepth } from '@/shared/display';
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

const height = 300;
const margin = { left: 74, right: 14, top: 20, bottom: 32 };
/** Part of the chart's height that the strip of rain and sets takes, and the gap above it. */
const stripShare = 0.22;
const gapShare = 0.1;

/**
 * What each zone's soil lacks at the end of each day, hung from full at the top down past the refill line; below it, on the same days, a strip of rain and sets.
 * The days ahead are dotted, planned sets hollow. Curve and strip have a scale each, and stand apart, so that a dose on shallow roots does not tower over the curve.
 */
export default function RootZoneChart({ name, days, planned, today, units }: RootZoneChartProps): ReactElement {
  const [holder, width] = useElementWidth<HTMLDivElement>();
  const patternId = `rain${useId().replace(/[^\w]/g, '')}`;
  const first = days[0];
  const last = days.at(-1);
  if (!first || !last) {
    return <div ref={holder} />;
  }
  const at = (on: string) => daysBetween(first.on, on);
  const todayRow = days.find((day) => day.on === today) ?? last;
  const past = days.filter((day) => !day.isForecast);
  // All in millimetres; y runs downwards from full.
  const deepest = Math.max(1, ...days.map((day) => Math.max(day.refillLineMm * 1.2, day.isForecast && planned.length > 0 ? 0 : day.depletionEndMm)), ...planned.map((day) => day.depletionMm)) * 1.06;
  const strip = deepest * stripShare / (1 - stripShare - gapShare);
  const floor = -deepest - deepest * gapShare / (1 - stripShare - gapShare) - strip;
  const mostWater = Math.max(...days.map((day) => day.effectiveRainMm + day.irrigationMm), ...planned.map((day) => day.setsMm));
  const bar = (mm: number) => floor + (mostWater > 0 ? mm / mostWater : 0) * strip;
  const left = (day: BudgetDayResponse) => ({ x: at(day.on), y: -Math.max(0, day.depletionEndMm) });
  const expected = planned.length > 0 ? planned.map((day) => ({ x: at(day.on), y: -Math.max(0, day.depletionMm) })) : days.filter((day) => day.isForecast).map(left);
  const newest = past.at(-1);
  const ahead = newest && expected[0] && expected[0].x > at(newest.on) ? [left(newest), ...expected] : expected;
  const line = days.map((day) => ({ x: at(day.on), y: -day.refillLineMm }));
  // A week between two labels, two where they would touch.
  const step = days.length > 12 ? (width < 100 + days.length * 8 ? 14 : 7) : Math.max(1, Math.ceil(days.length / 4));
  const ticks = days.filter((day) => at(day.on) % step === at(today) % step).map((day) => at(day.on));
  const barWidth = Math.max(3, Math.min(16, (width - margin.left - margin.right) / (days.length + 1) * 0.7));
  const soft = { fill: 'var(--ink-soft)', fontSize: 13, fontFamily: 'var(--font-text)', padding: 4 };
  const rained = days.filter((day) => day.effectiveRainMm > 0);
  const watered = days.filter((day) => day.irrigationMm > 0);
  const summary = `Water in the root zone of ${name}, ${formatCivilDay(first.on, 'short')} to ${formatCivilDay(last.on, 'short')}: ${formatDepth(morningDepletionMm(todayRow), units)} short of full this morning, the refill line at ${formatDepth(todayRow.refillLineMm, units)}. The table below has each day.`;
  const labels = new Map([[0, 'full'], [-todayRow.refillLineMm, `refill line\n${formatDepth(todayRow.refillLineMm, units)}`], ...(mostWater > 0 ? [[floor + strip / 2, `rain, sets\nto ${formatDepth(mostWater, units)}`] as const] : [])]);
  return (
    <div ref={holder} className="w-chart">
      <svg width="0" height="0" aria-hidden="true" style={{ position: 'absolute' }}>
        <defs>
          <pattern id={patternId} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
            <rect width="6" height="6" fill="var(--water-tint)" />
            <line x1="0" y1="0" x2="0" y2="6" stroke="var(--water)" strokeWidth="3" />
          </pattern>
        </defs>
      </svg>
      {width > 0 ? (
        <VictoryChart width={width} height={height} padding={margin} domain={{ x: [-0.5, at(last.on) + 0.5], y: [floor, 0] }}
          containerComponent={<VictoryContainer responsive={false} title={summary} />}>
          <VictoryArea data={line.map((point) => ({ ...point, y0: -deepest }))} style={{ data: { fill: 'var(--dry-tint)', opacity: 0.7 } }} />
          <VictoryBar data={rained.map((day) => ({ x: at(day.on), y: bar(day.effectiveRainMm), y0: floor }))} barWidth={barWidth} style={{ data: { fill: `url(#${patternId})` } }} />
          <VictoryBar data={watered.map((day) => ({ x: at(day.on), y: bar(day.effectiveRainMm + day.irrigationMm), y0: bar(day.effectiveRainMm) }))} barWidth={barWidth} style={{ data: { fill: 'var(--water)', opacity: 0.7 } }} />
          <VictoryBar data={planned.filter((day) => day.setsMm > 0).map((day) => ({ x: at(day.on), y: bar(day.setsMm), y0: floor }))} barWidth={barWidth} style={{ data: { fill: 'none', stroke: 'var(--water)', strokeWidth: 1.5 } }} />
          <VictoryLine data={[{ x: -0.5, y: 0 }, { x: at(last.on) + 0.5, y: 0 }]} style={{ data: { stroke: 'var(--line)', strokeWidth: 1 } }} />
          <VictoryLine data={line} style={{ data: { stroke: 'var(--dry)', strokeWidth: 1.5, strokeDasharray: '5 4' } }} />
          {runs(past.map(left)).map((points, index) => <VictoryLine key={`past-${index}`} data={points} style={{ data: { stroke: 'var(--water)', strokeWidth: 2.5 } }} />)}
          {ahead.length > 0 ? <VictoryLine data={ahead} style={{ data: { stroke: 'var(--water)', strokeWidth: 2.5, strokeDasharray: '2 5', strokeLinecap: 'round' } }} /> : null}
          <VictoryLine data={[{ x: at(today), y: floor }, { x: at(today), y: 0 }]} style={{ data: { stroke: 'var(--ink-soft)', strokeWidth: 1 } }} />
          <VictoryAxis orientation="bottom" offsetY={margin.bottom} crossAxis={false} tickValues={ticks} tickFormat={(day: number) => (day === at(today) ? 'today' : formatCivilDay(days.find((one) => at(one.on) === day)?.on ?? first.on, 'short').slice(4))}
            style={{ axis: { stroke: 'var(--line)' }, tickLabels: soft, grid: { stroke: 'none' } }} />
          <VictoryAxis dependentAxis crossAxis={false} offsetX={margin.left} tickValues={[...labels.keys()]} tickFormat={(value: number) => labels.get(value) ?? ''}
            style={{ axis: { stroke: 'none' }, tickLabels: soft, grid: { stroke: 'none' } }} />
        </VictoryChart>
      ) : null}
    </div>
  );
}
