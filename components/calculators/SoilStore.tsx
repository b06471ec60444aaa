import type { ReactElement } from 'react';
import { DataTable } from '@/components/ui/DataTable';
import { Text } from '@/components/ui/Text';
import { soilStoreAnswer, type SoilStoreFound } from '@/scheduling/calculators/soilStoreAnswer';
import type { SoilCompaction } from '@/scheduling/soil';
import { grassIds, soilCompactions, soilTextures, type GrassId, type SoilTexture } from '@/shared/contracts/zones';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth, formatMinutes, formatNumber, formatRate } from '@/shared/display';
import { compactionWords, grassWords, soilWords } from '@/shared/zoneWords';
import { CalculatorScreen } from './CalculatorScreen';
import { Drawing, Figures, Headline } from './Drawing';
import { same, type Values } from './rules';
import { percent, scale } from './scales';
import { useCalculator } from './useCalculator';

const rules = {
  soil: { kind: 'choice', label: 'Soil', start: 'clay', options: () => soilTextures.map((value) => ({ value, label: soilWords[value] })) },
  grass: { kind: 'choice', label: 'Grass', start: 'tall_fescue', options: () => grassIds.map((value) => ({ value, label: grassWords[value] })) },
  roots: { kind: 'optional', label: 'Rooting depth', quantity: 'bore', start: same(''), minSi: 20, maxSi: 1_500, hint: 'Dig or probe; left empty, the usual one.' },
  slope: { kind: 'number', label: 'Slope', quantity: null, unit: '%', start: same('5'), minSi: 0, maxSi: 60 },
  compaction: { kind: 'choice', label: 'Underfoot', start: 'loose', options: () => soilCompactions.map((value) => ({ value, label: compactionWords[value] })) },
  demand: { kind: 'optional', label: 'The grass uses a day', quantity: 'depth', start: { us: '0.2', metric: '5' }, minSi: 0, maxSi: 20 },
  rate: { kind: 'number', label: 'Application rate', quantity: 'rate', start: { us: '0.8', metric: '20' }, minSi: 0.3, maxSi: 200 },
  multiplier: { kind: 'number', label: 'Run-time multiplier', quantity: null, start: same('1'), minSi: 1, maxSi: 2, hint: 'From a catch-cup test; 1 when unknown.' },
  gone: { kind: 'optional', label: 'Water gone now', quantity: 'depth', start: same(''), minSi: 0, maxSi: 400, hint: 'Left empty: at the refill line.' },
} as const;

function answerStore(values: Values<typeof rules>): SoilStoreFound {
  return soilStoreAnswer({
    texture: values.soil as SoilTexture, grass: values.grass as GrassId, rootDepthM: values.roots === null ? null : values.roots / 1000, slopePct: values.slope, compaction: values.compaction as SoilCompaction, demandMm: values.demand,
    rateMmPerHour: values.rate, runTimeMultiplier: values.multiplier, depletionMm: values.gone,
  });
}

/** What the root zone holds, and how long a set may run. */
export function SoilStore(): ReactElement {
  const calculator = useCalculator('soil-store', rules, answerStore);
  const { units } = calculator;
  return (
    <CalculatorScreen title="Soil store and run limit" question="How much does the soil hold, and how fast may it come?" calculator={calculator} assumptions={(found) => found.assumptions}
      impossibleWords={{ depletionMm: 'More water cannot be gone than the root zone holds.' }}
      groups={[
        { title: 'The ground', fields: ['soil', 'grass', 'roots', 'slope', 'compaction'] },
        { title: 'The water', fields: ['rate', 'multiplier', 'demand', 'gone'] },
      ]}
      more={(found) => <Numbers found={found} units={units} />}>
      {(found) => (
        <>
          <Headline>{headline(found, units)}</Headline>
          <StoreDrawing found={found} units={units} />
          <CycleDrawing found={found} />
          <Figures figures={[
            { value: formatDepth(found.refillLineMm, units), words: `may be used of ${formatDepth(found.totalAvailableMm, units)}` },
            { value: found.daysToRefillLine === null ? '–' : `${formatNumber(found.daysToRefillLine, 1)} days`, words: 'from full to the refill line' },
            { value: formatMinutes(found.fillMinutes), words: `of running water for ${formatDepth(found.depletionMm, units)}` },
          ]} />
          <Text>{detail(found, units)}</Text>
        </>
      )}
    </CalculatorScreen>
  );
}

function headline(found: SoilStoreFound, units: UnitSystem): string {
  const { pattern, depletionMm } = found;
  if (depletionMm <= 0) return 'The root zone is full: nothing to give.';
  return pattern.cycles === 1
    ? `One set of ${formatMinutes(pattern.minutesPerCycle)} brings ${formatDepth(depletionMm, units)}.`
    : `${pattern.cycles} runs of ${formatMinutes(pattern.minutesPerCycle)} bring ${formatDepth(depletionMm, units)}, ${formatMinutes(pattern.startsApartMinutes)} from start to start.`;
}

function detail(found: SoilStoreFound, units: UnitSystem): string {
  const soaked = `Soaked, it takes ${formatRate(found.steadyIntakeMmPerHour, units)}`;
  if (found.runLimitMinutes === null) return `${soaked}, as fast as the water comes or faster: no run is too long for it.`;
  const stands = (found.pondingMinutes ?? 0) < 1 ? 'Water stands at once' : `Water begins to stand after ${formatMinutes(found.pondingMinutes ?? 0)}`;
  const wider = found.runLimitMinutes < 10 ? ' Open the pattern wider, so that the same water falls on more ground.' : '';
  return `${soaked}. ${stands} and runs off after ${formatMinutes(found.runLimitMinutes)}.${wider} With one hose the soaking time is free: water another position meanwhile.`;
}

/** The store from full to empty, with the refill line and where it stands. */
function StoreDrawing({ found, units }: { found: SoilStoreFound; units: UnitSystem }): ReactElement {
  const { totalAvailableMm, refillLineMm, depletionMm } = found;
  const left = totalAvailableMm - depletionMm;
  return (
    <Drawing label={`The root zone holds ${formatDepth(totalAvailableMm, units)} that roots can take. ${formatDepth(left, units)} are left; the refill line lies at ${formatDepth(totalAvailableMm - refillLineMm, units)}.`} height={() => 170}>
      {(width, height) => {
        const y = scale(totalAvailableMm, 0, 14, height - 14);
        const x = Math.min(150, width * 0.36);
        return (
          <>
            <rect x={8} y={y(totalAvailableMm)} width={x} height={y(0) - y(totalAvailableMm)} rx={12} fill="var(--neutral-tint)" stroke="var(--edge)" />
            <clipPath id="k-store"><rect x={8} y={y(totalAvailableMm)} width={x} height={y(0) - y(totalAvailableMm)} rx={12} /></clipPath>
            <rect clipPath="url(#k-store)" x={8} y={y(left)} width={x} height={Math.max(0, y(0) - y(left))} fill="var(--water)" fillOpacity={0.55} />
            <line x1={2} x2={x + 20} y1={y(totalAvailableMm - refillLineMm)} y2={y(totalAvailableMm - refillLineMm)} stroke="var(--dry)" strokeWidth={2} strokeDasharray="5 4" />
            <text x={x + 26} y={y(totalAvailableMm) + 12}>{`full: ${formatDepth(totalAvailableMm, units)} for roots`}</text>
            <text x={x + 26} y={y(totalAvailableMm - refillLineMm) + 4} data-tone="dry">{`refill line, ${percent(found.depletionFraction)} used`}</text>
            {Math.abs(left - (totalAvailableMm - refillLineMm)) < totalAvailableMm * 0.1 ? null : <text x={x + 26} y={Math.min(height - 30, y(left) + 4)} data-tone="water">{`now: ${formatDepth(left, units)} left`}</text>}
            <text x={x + 26} y={y(0)}>empty: wilting</text>
          </>
        );
      }}
    </Drawing>
  );
}

/** Runs and the soaking between them on a line of time. */
function CycleDrawing({ found }: { found: SoilStoreFound }): ReactElement | null {
  const { pattern } = found;
  if (found.depletionMm <= 0) return null;
  const { cycles, minutesPerCycle, startsApartMinutes } = pattern;
  const end = (cycles - 1) * startsApartMinutes + minutesPerCycle;
  const shown = Math.min(cycles, 40);
  return (
    <Drawing label={`${cycles === 1 ? 'One run' : `${cycles} runs`} of ${formatMinutes(minutesPerCycle)}${cycles === 1 ? '' : `, each starting ${formatMinutes(startsApartMinutes)} after the one before`}; done after ${formatMinutes(end)}.`} height={() => 64}>
      {(width) => {
        const x = scale(0, end, 8, width - 8);
        return (
          <>
            <rect x={8} y={14} width={width - 16} height={20} rx={6} fill="var(--neutral-tint)" />
            {Array.from({ length: shown }, (_, index) => <rect key={index} x={x(index * startsApartMinutes)} y={14} width={Math.max(2, x(minutesPerCycle) - x(0))} height={20} rx={4} fill="var(--water)" />)}
            <text x={8} y={54} data-tone="water">{cycles === 1 ? 'one run' : 'run, soak, run'}</text>
            <text x={width - 8} y={54} textAnchor="end">{`done after ${formatMinutes(end)}`}</text>
          </>
        );
      }}
    </Drawing>
  );
}

function Numbers({ found, units }: { found: SoilStoreFound; units: UnitSystem }): ReactElement {
  const rows = [
    { name: 'Field capacity', value: `${formatNumber(found.fieldCapacity * 100, 1)} % of the volume` },
    { name: 'Wilting point', value: `${formatNumber(found.wiltingPoint * 100, 1)} % of the volume` },
    { name: 'Rooting depth', value: `${units === 'us' ? `${formatNumber(found.rootDepthM / 0.0254, 1)} in` : `${formatNumber(found.rootDepthM * 100, 0)} cm`}${found.rootDepthIsDefault ? ' (default)' : ''}` },
    { name: 'Available water', value: formatDepth(found.totalAvailableMm, units) },
    { name: 'Depletion fraction at this demand', value: formatNumber(found.depletionFraction, 2) },
    { name: 'Intake as moist as now', value: formatRate(found.startIntakeMmPerHour, units) },
    { name: 'Intake when soaked', value: formatRate(found.steadyIntakeMmPerHour, units) },
    { name: 'Longest run', value: found.runLimitMinutes === null ? 'no limit' : formatMinutes(found.runLimitMinutes) },
  ];
  return (
    <>
      <Text variant="heading3" level={2}>How it comes about</Text>
      <DataTable caption="Figures of the root zone" rows={rows} rowKey={(row) => row.name} empty={<Text>Nothing yet.</Text>} columns={[{ header: 'Figure', cell: (row) => row.name }, { header: 'Value', align: 'right', cell: (row) => row.value }]} />
    </>
  );
}
