import type { ReactElement } from 'react';
import { DataTable } from '@/components/ui/DataTable';
import { Text } from '@/components/ui/Text';
import { referenceEtAnswer, type ReferenceEtAnswer } from '@/scheduling/calculators/referenceEtAnswer';
import { CLEAR_SKY } from '@/scheduling/weather/dailyReferenceEt';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth, formatNumber, formatSpeed, formatTemperature } from '@/shared/display';
import { CalculatorScreen } from './CalculatorScreen';
import { Drawing, Figures, Headline } from './Drawing';
import { same, type Values } from './rules';
import { percent, scale } from './scales';
import { useCalculator } from './useCalculator';

const temperature = (label: string, us: string, metric: string) => ({ kind: 'number', label, quantity: 'temperature', start: { us, metric }, minSi: -50, maxSi: 60 }) as const;
const rules = {
  latitude: { kind: 'number', label: 'Latitude, south negative', quantity: null, unit: '°', start: same('41'), minSi: -90, maxSi: 90 },
  on: { kind: 'day', label: 'Day', start: '2026-07-06' },
  elevation: { kind: 'optional', label: 'Height above the sea', quantity: 'length', start: { us: '330', metric: '100' }, minSi: -450, maxSi: 6_000 },
  low: temperature('Lowest temperature', '60', '16'),
  high: temperature('Highest temperature', '84', '29'),
  dew: { kind: 'optional', label: 'Dew point', quantity: 'temperature', start: { us: '57', metric: '14' }, minSi: -60, maxSi: 45 },
  wind: { kind: 'optional', label: 'Wind', quantity: 'speed', start: { us: '5', metric: '2.2' }, minSi: 0, maxSi: 60 },
  windHeight: { kind: 'number', label: 'Wind measured at', quantity: 'length', start: { us: '33', metric: '10' }, minSi: 0.25, maxSi: 300 },
  sunshine: { kind: 'optional', label: 'Bright sunshine', quantity: null, unit: 'h', start: same('10'), minSi: 0, maxSi: 24 },
  coast: { kind: 'choice', label: 'Near a coast or a great lake', start: 'inland', options: () => [{ value: 'inland', label: 'No' }, { value: 'coast', label: 'Yes' }] },
} as const;

function answerEt(values: Values<typeof rules>): ReferenceEtAnswer {
  return referenceEtAnswer({
    latitudeDeg: values.latitude, elevationM: values.elevation, coastal: values.coast === 'coast', arid: false, clearSky: CLEAR_SKY,
    weather: {
      on: values.on, tminC: values.low, tmaxC: values.high, tdewC: values.dew, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: values.wind, windHeightM: values.wind === null ? null : values.windHeight,
      solarMjM2: null, sunshineHours: values.sunshine, precipitationMm: null,
    },
  });
}

/** Reference ET of one day. */
export function ReferenceEt(): ReactElement {
  const calculator = useCalculator('reference-et', rules, answerEt);
  const { units } = calculator;
  return (
    <CalculatorScreen title="Reference ET" question="How much water did the day draw?" calculator={calculator} assumptions={(found) => found.assumptions}
      impossibleWords={{ tminC: 'The lowest temperature cannot lie above the highest.', tdewC: 'The dew point cannot lie above the highest temperature.' }}
      groups={[
        { title: 'Where and when', fields: ['latitude', 'elevation', 'on'] },
        { title: 'The air', fields: ['low', 'high', 'dew'] },
        { title: 'Wind and sun', fields: ['wind', 'windHeight', 'sunshine', 'coast'], note: 'What is left empty is taken by the published rules, and said below the answer.' },
      ]}
      more={(found) => <Terms found={found} units={units} />}>
      {(found) => {
        const { radiationTermMm, windTermMm } = found.terms;
        const sun = Math.max(0, radiationTermMm) / Math.max(1e-9, Math.max(0, radiationTermMm) + Math.max(0, windTermMm));
        return (
          <>
            <Headline>{`${formatDepth(found.et0Mm, units)} of water from short, well-watered grass.`}</Headline>
            <Hours found={found} units={units} />
            <Figures figures={[
              { value: found.method === 'hargreaves' ? '–' : percent(sun), words: 'drawn by the sun' },
              { value: found.method === 'hargreaves' ? '–' : percent(1 - sun), words: 'by dry moving air' },
              { value: formatDepth(found.et0Mm * 7, units), words: 'in a week of such days' },
            ]} />
            <Text>{found.method === 'hargreaves'
              ? 'Only temperatures are known, so this is the Hargreaves–Samani estimate: good as a mean of several days, not of one.'
              : `A cool-season lawn in full sun uses about ${formatDepth(found.et0Mm * 0.85, units)} of it. Values made without measured sun are good as means of several days.`}</Text>
          </>
        );
      }}
    </CalculatorScreen>
  );
}

/** The day's sum by the hours of solar time. */
function Hours({ found, units }: { found: ReferenceEtAnswer; units: UnitSystem }): ReactElement {
  const most = Math.max(...found.byHourMm, 1e-6);
  const noon = found.byHourMm.indexOf(most);
  const { daylightHours } = found.terms;
  return (
    <Drawing label={`Water drawn in each hour of solar time, most of it around noon: ${formatDepth(found.et0Mm, units)} in all. The sun is up for ${formatNumber(daylightHours, 1)} hours.`} height={() => 170}>
      {(width, height) => {
        const x = scale(0, 24, 8, width - 8);
        const y = scale(0, most, height - 28, 22);
        const wide = x(1) - x(0);
        return (
          <>
            <rect x={x(12 - daylightHours / 2)} y={4} width={x(12 + daylightHours / 2) - x(12 - daylightHours / 2)} height={height - 32} fill="var(--sun-tint)" rx={6} />
            {found.byHourMm.map((mm, hour) => <rect key={hour} x={x(hour) + wide * 0.15} y={y(mm)} width={wide * 0.7} height={Math.max(0, y(0) - y(mm))} fill="var(--water)" rx={2} />)}
            <line x1={8} x2={width - 8} y1={y(0)} y2={y(0)} stroke="var(--line)" />
            <text x={x(noon + 0.5)} y={y(most) - 6} textAnchor="middle" data-tone="water">{`${formatDepth(most, units)} in an hour`}</text>
            {[0, 6, 12, 18, 24].map((hour) => <text key={hour} x={x(hour)} y={height - 8} textAnchor={hour === 0 ? 'start' : hour === 24 ? 'end' : 'middle'}>{hour === 12 ? 'solar noon' : `${hour} h`}</text>)}
          </>
        );
      }}
    </Drawing>
  );
}

function Terms({ found, units }: { found: ReferenceEtAnswer; units: UnitSystem }): ReactElement {
  const { terms } = found;
  const mj = (value: number) => `${formatNumber(value, 2)} MJ/m²`;
  const kpa = (value: number) => `${formatNumber(value, 3)} kPa`;
  const rows: { name: string; symbol: string; value: string }[] = [
    { name: 'Mean temperature', symbol: 'T', value: formatTemperature(terms.tmeanC, units) },
    { name: 'Air pressure', symbol: 'P', value: kpa(terms.pressureKpa) },
    { name: 'Saturated vapour', symbol: 'es', value: kpa(terms.saturationVapourKpa) },
    { name: 'Vapour in the air', symbol: 'ea', value: kpa(terms.actualVapourKpa) },
    { name: 'Wind at 2 m', symbol: 'u2', value: formatSpeed(terms.windAtTwoMetresMps, units) },
    { name: 'Light above the air', symbol: 'Ra', value: mj(terms.extraterrestrialMjM2) },
    { name: 'Light under a clear sky', symbol: 'Rso', value: mj(terms.clearSkyMjM2) },
    { name: 'Light at the ground', symbol: 'Rs', value: mj(terms.solarMjM2) },
    { name: 'Kept of it by grass', symbol: 'Rns', value: mj(terms.netShortwaveMjM2) },
    { name: 'Lost as heat to the sky', symbol: 'Rnl', value: mj(terms.netLongwaveMjM2) },
    { name: 'Part drawn by the sun', symbol: '', value: formatDepth(terms.radiationTermMm, units) },
    { name: 'Part drawn by the air', symbol: '', value: formatDepth(terms.windTermMm, units) },
    { name: 'Hargreaves–Samani beside it', symbol: '', value: formatDepth(terms.hargreavesMm, units) },
  ];
  return (
    <details className="k-more">
      <summary>Every step of the sum, and the hours</summary>
      <DataTable caption="Terms of the Penman–Monteith equation (FAO-56)" rows={rows} rowKey={(row) => row.name} empty={<Text>Nothing yet.</Text>}
        columns={[{ header: 'Term', cell: (row) => row.name }, { header: 'Sign', cell: (row) => row.symbol, wideOnly: true }, { header: 'Value', align: 'right', cell: (row) => row.value }]} />
      <Text color="inkSoft">{`By hour of solar time: ${found.byHourMm.map((mm, hour) => (mm < 0.005 ? null : `${hour} h ${formatDepth(mm, units)}`)).filter(Boolean).join(', ')}.`}</Text>
    </details>
  );
}
