import { useId, useState, type ReactElement } from 'react';
import { DataTable } from '@/components/ui/DataTable';
import { TermList } from '@/components/ui/TermList';
import { Text } from '@/components/ui/Text';
import { explainZoneDay } from '@/scheduling/budget/explainZoneDay';
import type { ZoneDay } from '@/scheduling/budget/zoneDay';
import { waterBalanceAnswer, type WaterBalanceFound } from '@/scheduling/calculators/waterBalanceAnswer';
import { grassIds, soilCompactions, soilTextures, type GrassId, type SoilCompaction, type SoilTexture } from '@/shared/contracts/zones';
import type { UnitSystem } from '@/shared/contracts/common';
import { dayTermWords } from '@/shared/dayTerms';
import { formatCivilDay, formatDepth, formatNumber, unitLabel } from '@/shared/display';
import { compactionWords, grassWords, soilWords } from '@/shared/zoneWords';
import { CalculatorScreen } from './CalculatorScreen';
import { Drawing, Figures, Headline } from './Drawing';
import { same, type Values } from './rules';
import { linePath, scale } from './scales';
import { useCalculator } from './useCalculator';

const list = (label: string, us: string, metric: string, least: number, hint?: string) => ({
  kind: 'list', label, quantity: 'depth', start: { us, metric }, minSi: 0, maxSi: 150, least, most: 31, ...(hint === undefined ? {} : { hint }),
}) as const;
const rules = {
  soil: { kind: 'choice', label: 'Soil', start: 'loam', options: () => soilTextures.map((value) => ({ value, label: soilWords[value] })) },
  grass: { kind: 'choice', label: 'Grass', start: 'kentucky_bluegrass', options: () => grassIds.map((value) => ({ value, label: grassWords[value] })) },
  roots: { kind: 'optional', label: 'Rooting depth', quantity: 'bore', start: same(''), minSi: 20, maxSi: 1_500, hint: 'Left empty, the usual one.' },
  coefficient: { kind: 'optional', label: 'Grass coefficient', quantity: null, start: same(''), minSi: 0.1, maxSi: 1.3, hint: 'Left empty, that of the grass.' },
  slope: { kind: 'number', label: 'Slope', quantity: null, unit: '%', start: same('2'), minSi: 0, maxSi: 60 },
  compaction: { kind: 'choice', label: 'Ground underfoot', start: 'loose', options: () => soilCompactions.map((value) => ({ value, label: compactionWords[value] })) },
  startOn: { kind: 'day', label: 'First day', start: '2026-07-01' },
  gone: { kind: 'number', label: 'Water gone at the start', quantity: 'depth', start: { us: '0.1', metric: '2.5' }, minSi: 0, maxSi: 400 },
  et0: list('Reference ET of each day', '0.20 0.22 0.24 0.18 0.12 0.20 0.22 0.24 0.25 0.20', '5.1 5.6 6.1 4.6 3.0 5.1 5.6 6.1 6.4 5.1', 1, 'One number a day, with a blank between two. It says how many days there are.'),
  rain: list('Rain of each day', '0 0 0 0.05 0.6 0 0 0 0 0', '0 0 0 1.3 15 0 0 0 0 0', 0, 'Days that are left out had none.'),
  irrigation: list('Water given on each day', '0 0 0.3 0 0 0 0 0 0 0', '0 0 7.6 0 0 0 0 0 0 0', 0),
} as const;

const unknown = { tminC: null, tmaxC: null, tdewC: null, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: null, windHeightM: null, solarMjM2: null, sunshineHours: null };

function answerBalance(values: Values<typeof rules>): WaterBalanceFound {
  return waterBalanceAnswer({
    // Reference ET is given day by day, so the place decides nothing here.
    site: { latitudeDeg: 40, elevationM: 100 }, texture: values.soil as SoilTexture, grass: values.grass as GrassId, rootDepthM: values.roots === null ? null : values.roots / 1000,
    cropCoefficient: values.coefficient, sunHours: null, ground: { slopePct: values.slope, compaction: values.compaction as SoilCompaction }, startOn: values.startOn, startDepletionMm: values.gone,
    days: values.et0.map((et0Mm, index) => ({ et0Mm, weather: { ...unknown, precipitationMm: values.rain[index] ?? 0 }, irrigationMm: values.irrigation[index] ?? 0 })),
  });
}

/** A lawn's water day by day. */
export function WaterBalance(): ReactElement {
  const calculator = useCalculator('water-balance', rules, answerBalance);
  const { units } = calculator;
  return (
    <CalculatorScreen title="Water balance" question="When does the lawn run short?" calculator={calculator} assumptions={(found) => found.assumptions}
      impossibleWords={{ startDepletionMm: 'More water cannot be gone than the root zone holds.', 'days[0].et0Mm': 'No day draws as much as that.' }}
      groups={[
        { title: 'The zone', fields: ['soil', 'grass', 'roots', 'coefficient', 'slope', 'compaction'] },
        { title: 'The days', fields: ['startOn', 'gone', 'et0', 'rain', 'irrigation'] },
      ]}
      more={(found) => <><OneDay found={found} units={units} /><Days found={found} units={units} /></>}>
      {(found) => (
        <>
          <Headline>{headline(found)}</Headline>
          <Band found={found} units={units} />
          <Figures figures={[
            { value: formatDepth(found.totals.usedMm, units), words: 'used by the grass' },
            { value: formatDepth(found.totals.effectiveRainMm, units), words: `of ${formatDepth(found.totals.rainMm, units)} rain counted${found.totals.runoffMm > 0.05 ? `, ${formatDepth(found.totals.runoffMm, units)} ran off` : ''}` },
            { value: formatDepth(found.totals.drainageMm, units), words: 'drained below the roots' },
          ]} />
          <Text>{`${formatDepth(found.startDepletionMm, units)} were gone at the start, ${formatDepth(found.endDepletionMm, units)} at the end: used − rain that counted − water given + drained.`}</Text>
        </>
      )}
    </CalculatorScreen>
  );
}

function headline({ dueOn, days }: WaterBalanceFound): string {
  const last = days.at(-1);
  if (dueOn === null) return last ? `Not short before ${formatCivilDay(last.on, 'long')}.` : '';
  return `Reaches its refill line on ${formatCivilDay(dueOn, 'long')}.`;
}

/** Water left from full at the top, rain and sets as bars from below, the ground under the refill line marked. */
function Band({ found, units }: { found: WaterBalanceFound; units: UnitSystem }): ReactElement {
  const { days } = found;
  const full = Math.max(...days.map((day) => day.totalAvailableMm), 1);
  const first = days[0];
  const last = days.at(-1);
  const label = `Water in the root zone over ${days.length} days, full is ${formatDepth(full, units)}. ${headline(found)} The table below has each day.`;
  return (
    <Drawing label={label} height={() => 230}>
      {(width, height) => {
        const x = scale(0, days.length, 46, width - 10);
        const y = scale(full, 0, 14, height - 28);
        const wide = x(1) - x(0);
        const level = (depletionMm: number) => y(full - depletionMm);
        const line = days.flatMap((day, index): (readonly [number, number])[] => [[x(index), level(day.refillLineMm)], [x(index + 1), level(day.refillLineMm)]]);
        const points: (readonly [number, number])[] = [[x(0), level(found.startDepletionMm)], ...days.map((day, index): readonly [number, number] => [x(index + 1), level(day.depletionEndMm)])];
        return (
          <>
            <defs>
              <pattern id="k-rain" width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
                <rect width="6" height="6" fill="var(--water-tint)" />
                <line x1="0" y1="0" x2="0" y2="6" stroke="var(--water)" strokeWidth="3" />
              </pattern>
            </defs>
            <rect x={46} y={y(full)} width={x(days.length) - 46} height={y(0) - y(full)} fill="var(--water-tint)" fillOpacity={0.5} />
            <path d={`${linePath(line)} L${x(days.length)} ${y(0)} L46 ${y(0)} Z`} fill="var(--dry-tint)" />
            <path d={linePath(line)} fill="none" stroke="var(--dry)" strokeWidth={1.5} strokeDasharray="5 4" />
            {days.map((day, index) => (
              <g key={day.on}>
                {day.effectiveRainMm > 0 ? <rect x={x(index) + wide * 0.2} width={wide * 0.6} y={y(Math.min(full, day.effectiveRainMm))} height={y(0) - y(Math.min(full, day.effectiveRainMm))} fill="url(#k-rain)" /> : null}
                {day.irrigationMm > 0 ? <rect x={x(index) + wide * 0.2} width={wide * 0.6} y={y(Math.min(full, day.effectiveRainMm + day.irrigationMm))} height={y(Math.min(full, day.effectiveRainMm)) - y(Math.min(full, day.effectiveRainMm + day.irrigationMm))} fill="var(--water)" fillOpacity={0.55} /> : null}
              </g>
            ))}
            <path d={linePath(points)} fill="none" stroke="var(--water)" strokeWidth={2.5} strokeLinejoin="round" />
            <text x={40} y={y(full) + 5} textAnchor="end">full</text>
            <text x={40} y={(line[0]?.[1] ?? 0) + 4} textAnchor="end" data-tone="dry">refill</text>
            <text x={40} y={y(0)} textAnchor="end">empty</text>
            <text x={46} y={height - 8}>{first ? formatCivilDay(first.on, 'short') : ''}</text>
            <text x={width - 10} y={height - 8} textAnchor="end">{last ? formatCivilDay(last.on, 'short') : ''}</text>
          </>
        );
      }}
    </Drawing>
  );
}

/** The day that decides: the one that reaches the refill line, else the one with most rain. */
function tellingDay({ days, dueOn }: WaterBalanceFound): ZoneDay | undefined {
  return days.find((day) => day.on === dueOn) ?? days.reduce<ZoneDay | undefined>((best, day) => (best === undefined || day.rainMm > best.rainMm ? day : best), undefined);
}

/** One day line by line, any of them by choice. */
function OneDay({ found, units }: { found: WaterBalanceFound; units: UnitSystem }): ReactElement | null {
  const [chosenOn, setChosenOn] = useState<string | null>(null);
  const day = found.days.find((one) => one.on === chosenOn) ?? tellingDay(found);
  const id = useId();
  return day === undefined ? null : (
    <>
      <Text variant="heading3" level={2}>One day, line by line</Text>
      <div className="k-day">
        <label htmlFor={id}>Day</label>
        <select id={id} className="d-input d-select" value={day.on} onChange={(event) => setChosenOn(event.target.value)}>
          {found.days.map(({ on }) => <option key={on} value={on}>{formatCivilDay(on, 'long')}</option>)}
        </select>
      </div>
      <TermList terms={dayTermWords(explainZoneDay(day), day, units)} />
    </>
  );
}

function Days({ found, units }: { found: WaterBalanceFound; units: UnitSystem }): ReactElement {
  const unit = unitLabel('depth', units);
  // The unit stands in the head of the column, so that ten days of eight terms fit side by side.
  const depth = (mm: number) => formatDepth(mm, units).replace(` ${unit}`, '');
  return (
    <>
      <Text variant="heading3" level={2}>Every day, term by term</Text>
      <DataTable caption="Water balance by day" rows={found.days} rowKey={(day) => day.on} {...(found.dueOn === null ? {} : { selectedKey: found.dueOn })} empty={<Text>No day yet.</Text>}
        columns={[
          { header: 'Day', cell: (day) => <span className="k-nowrap">{formatCivilDay(day.on, 'short').replace(/ \w+$/, '')}</span> },
          { header: `Gone at start, ${unit}`, align: 'right', wideOnly: true, cell: (day) => depth(day.depletionStartMm) },
          { header: `ET, ${unit}`, align: 'right', wideOnly: true, cell: (day) => depth(day.et0Mm) },
          { header: 'Grass × stress', align: 'right', wideOnly: true, cell: (day) => <span className="k-nowrap">{`${formatNumber(day.cropCoefficient, 2)} × ${formatNumber(day.stressCoefficient, 2)}`}</span> },
          { header: `Used, ${unit}`, align: 'right', cell: (day) => depth(day.etcMm) },
          { header: `Rain that counted, ${unit}`, align: 'right', cell: (day) => depth(day.effectiveRainMm) },
          { header: `Given, ${unit}`, align: 'right', cell: (day) => depth(day.irrigationMm) },
          { header: `Drained, ${unit}`, align: 'right', cell: (day) => depth(day.drainageMm) },
          { header: `Gone at end, ${unit}`, align: 'right', cell: (day) => depth(day.depletionEndMm) },
        ]} />
    </>
  );
}
