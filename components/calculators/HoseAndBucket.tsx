import type { ReactElement } from 'react';
import { DataTable } from '@/components/ui/DataTable';
import { Text } from '@/components/ui/Text';
import { hoseAndBucketAnswer, type HoseAndBucketFound } from '@/scheduling/calculators/hoseAndBucketAnswer';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth, formatFlow, formatLength, formatMinutes, formatQuantity, formatRange, formatRate } from '@/shared/display';
import { hoseBoreLabel, hoseBores } from '@/shared/hoseBores';
import { CalculatorScreen } from './CalculatorScreen';
import { Drawing, Figures, Headline } from './Drawing';
import { same, type Values } from './rules';
import { linePath, roundUp, scale } from './scales';
import { useCalculator } from './useCalculator';

const bores = (units: UnitSystem) => hoseBores.map(({ mm, [units]: label }) => ({ value: String(mm), label }));
const rules = {
  bucket: { kind: 'number', label: 'The bucket holds', quantity: 'volume', start: { us: '5', metric: '20' }, minSi: 0.5, maxSi: 500 },
  seconds: { kind: 'number', label: 'Full after', quantity: null, unit: 's', start: same('60'), minSi: 1, maxSi: 3_600 },
  hose: { kind: 'number', label: 'Hose length', quantity: 'length', start: { us: '50', metric: '15' }, minSi: 0.3, maxSi: 300 },
  bore: { kind: 'choice', label: 'Inside width', start: '15.875', options: bores },
  newHose: { kind: 'number', label: 'Hose length', quantity: 'length', start: { us: '100', metric: '30' }, minSi: 0.3, maxSi: 300 },
  newBore: { kind: 'choice', label: 'Inside width', start: '15.875', options: bores },
  pressure: { kind: 'optional', label: 'Pressure at the tap', quantity: 'pressure', start: same(''), minSi: 50, maxSi: 1_200, hint: 'Left empty, 50 psi (345 kPa) is taken.' },
  area: { kind: 'optional', label: 'Ground that it wets', quantity: 'area', start: { us: '1500', metric: '140' }, minSi: 1, maxSi: 20_000 },
  depth: { kind: 'number', label: 'Depth wanted', quantity: 'depth', start: { us: '0.5', metric: '12' }, minSi: 0.5, maxSi: 200 },
} as const;

function answerHose(values: Values<typeof rules>): HoseAndBucketFound {
  return hoseAndBucketAnswer({
    bucketL: values.bucket, seconds: values.seconds, hose: { lengthM: values.hose, boreMm: Number(values.bore) }, newHose: { lengthM: values.newHose, boreMm: Number(values.newBore) },
    tapPressureKpa: values.pressure, wettedAreaM2: values.area, depthMm: values.depth,
  });
}

const hoseWords = (hose: { lengthM: number; boreMm: number }, units: UnitSystem): string => `${formatLength(hose.lengthM, units)} of ${hoseBoreLabel(hose.boreMm, units)}`;

/** What a bucket tells, and what another hose would bring. */
export function HoseAndBucket(): ReactElement {
  const calculator = useCalculator('hose-and-bucket', rules, answerHose);
  const { units, values } = calculator;
  return (
    <CalculatorScreen title="Hose and bucket" question="What does your hose bring?" calculator={calculator} assumptions={(found) => found.assumptions}
      impossibleWords={{ measuredLpm: 'That much water cannot come through that hose at that pressure: look at the bucket, the time and the hose again.' }}
      groups={[
        { title: 'The bucket', fields: ['bucket', 'seconds'], note: 'Fill it at the end of the hose with the sprinkler on, nothing else open in the house.' },
        { title: 'The hose it came through', fields: ['hose', 'bore'] },
        { title: 'Another hose to the same sprinkler', fields: ['newHose', 'newBore', 'pressure'] },
        { title: 'What it waters', fields: ['area', 'depth'] },
      ]}
      caution="Never leave a hose shut at its end under pressure in the sun: it can burst, and its water can scald."
      more={(found) => <ByHose found={found} units={units} />}>
      {(found) => {
        const next = found.newHose;
        return (
          <>
            <Headline>{`${formatFlow(found.flowLpm, units)} now${next === null ? '.' : `, ${formatFlow(next.flowLpm, units)} through the other hose.`}`}</Headline>
            <PressureLine found={found} units={units} />
            <Figures figures={[
              { value: formatRange('flow', found.flowRange.low, found.flowRange.high, units), words: 'as far as bucket and watch can tell' },
              { value: formatQuantity('pressure', found.measured.lossKpa, units), words: `lost in ${hoseWords(found.measured, units)}` },
              ...(next === null ? [] : [{ value: `${next.changePct > 0 ? '+' : '−'}${Math.abs(next.changePct).toFixed(0)} %`, words: `flow through ${hoseWords(next, units)}` }]),
            ]} />
            {found.rateMmPerHour === null || values === null || found.setMinutes === null ? null : (
              <Text>{`On that ground it applies ${formatRate(found.rateMmPerHour, units)}: ${formatDepth(values.depth, units)} takes ${formatMinutes(found.setMinutes)}${found.newSetMinutes === null ? '' : `, through the other hose ${formatMinutes(found.newSetMinutes)}`}.`}</Text>
            )}
            {found.isTooFast ? <Text color="dryInk">The bucket fills too fast to be timed by hand: take a larger one, or count two fillings.</Text> : null}
          </>
        );
      }}
    </CalculatorScreen>
  );
}

/** Pressure from the tap along both hoses to the sprinkler. */
function PressureLine({ found, units }: { found: HoseAndBucketFound; units: UnitSystem }): ReactElement {
  const hoses = found.newHose === null ? [found.measured] : [found.measured, found.newHose];
  const longest = Math.max(...hoses.map((hose) => hose.lengthM), 1);
  const top = roundUp(found.tapPressureKpa);
  const label = hoses.map((hose, index) => `${index === 0 ? 'Now' : 'The other hose'}: ${formatQuantity('pressure', found.tapPressureKpa, units)} at the tap, ${formatQuantity('pressure', hose.pressureAtSprinklerKpa, units)} at the sprinkler after ${hoseWords(hose, units)}.`).join(' ');
  return (
    <Drawing label={label} height={() => 190}>
      {(width, height) => {
        const x = scale(0, longest, 28, width - 28);
        const y = scale(0, top, height - 30, 18);
        return (
          <>
            <line x1={x(0)} x2={x(longest)} y1={y(0)} y2={y(0)} stroke="var(--line)" strokeWidth={2} />
            <circle cx={x(0)} cy={y(found.tapPressureKpa)} r={7} fill="var(--hose)" />
            <text x={x(0) + 12} y={y(found.tapPressureKpa) - 8} data-tone="strong">{`tap ${formatQuantity('pressure', found.tapPressureKpa, units)}`}</text>
            {hoses.map((hose, index) => {
              const ends = [[x(0), y(found.tapPressureKpa)], [x(hose.lengthM), y(hose.pressureAtSprinklerKpa)]] as const;
              const below = index === (hoses.length > 1 && (hoses[0]?.pressureAtSprinklerKpa ?? 0) > (hoses[1]?.pressureAtSprinklerKpa ?? 0) ? 1 : 0);
              const right = hose.lengthM > longest * 0.7;
              return (
                <g key={index === 0 ? 'now' : 'other'}>
                  <path d={linePath(ends)} fill="none" stroke={index === 0 ? 'var(--hose)' : 'var(--water)'} strokeWidth={4} strokeLinecap="round" strokeDasharray={index === 0 ? undefined : '2 8'} />
                  <circle cx={ends[1][0]} cy={ends[1][1]} r={7} fill="var(--sheet)" stroke={index === 0 ? 'var(--hose)' : 'var(--water)'} strokeWidth={3} />
                  <text x={ends[1][0] + (right ? 8 : 0)} y={ends[1][1] + (below ? 24 : -14)} textAnchor={right ? 'end' : 'middle'} data-tone="strong">{`${index === 0 ? 'now' : 'other'} ${formatQuantity('pressure', hose.pressureAtSprinklerKpa, units)}`}</text>
                </g>
              );
            })}
            <text x={x(0)} y={height - 8}>the tap</text>
            <text x={x(longest)} y={height - 8} textAnchor="end">{formatLength(longest, units)} away</text>
          </>
        );
      }}
    </Drawing>
  );
}

function ByHose({ found, units }: { found: HoseAndBucketFound; units: UnitSystem }): ReactElement {
  const lengths = [...new Set(found.byHose.map((hose) => hose.lengthM))];
  const flowOf = (lengthM: number, boreMm: number) => formatFlow(found.byHose.find((hose) => hose.lengthM === lengthM && hose.boreMm === boreMm)?.flowLpm ?? 0, units);
  return (
    <>
      <Text variant="heading3" level={2}>The same sprinkler through any hose</Text>
      <DataTable<number> caption="Flow at the sprinkler by length and inside width of the hose" rows={lengths} rowKey={String} empty={<Text>No hose.</Text>}
        columns={[
          { header: 'Length', cell: (lengthM) => formatLength(lengthM, units) },
          ...hoseBores.map(({ mm, [units]: header }) => ({ header, align: 'right' as const, cell: (lengthM: number) => flowOf(lengthM, mm) })),
        ]} />
    </>
  );
}
