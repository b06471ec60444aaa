import type { ReactElement } from 'react';
import { DataTable } from '@/components/ui/DataTable';
import { Notice } from '@/components/ui/Notice';
import { Text } from '@/components/ui/Text';
import { seedbedAnswer, type SeedbedFound } from '@/scheduling/calculators/seedbedAnswer';
import { doseFractions, DROPS_OF_SPRINKLER } from '@/scheduling/establishment';
import { addDays } from '@/scheduling/units/civilDay';
import type { UnitSystem } from '@/shared/contracts/common';
import { sprinklerKinds, type SprinklerKind } from '@/shared/contracts/equipment';
import { grassIds, soilTextures, type GrassId, type SoilTexture } from '@/shared/contracts/zones';
import { formatCivilDay, formatClock, formatDepth, formatNumber, formatRate } from '@/shared/display';
import { grassWords, soilWords, sprinklerKindWords } from '@/shared/zoneWords';
import { CalculatorScreen } from './CalculatorScreen';
import { Drawing, Figures, Headline } from './Drawing';
import { same, type Values } from './rules';
import { linePath, scale } from './scales';
import { useCalculator } from './useCalculator';

const DAYS = 4;
const temperature = (label: string, us: string, metric: string) => ({ kind: 'number', label, quantity: 'temperature', start: { us, metric }, minSi: -30, maxSi: 50 }) as const;
const rules = {
  latitude: { kind: 'number', label: 'Latitude, south negative', quantity: null, unit: '°', start: same('41'), minSi: -66, maxSi: 66 },
  on: { kind: 'day', label: 'Sown on', start: '2026-09-01' },
  low: temperature('Lowest temperature', '57', '14'),
  high: temperature('Highest temperature', '82', '28'),
  dew: { kind: 'optional', label: 'Dew point', quantity: 'temperature', start: { us: '54', metric: '12' }, minSi: -40, maxSi: 35 },
  wind: { kind: 'optional', label: 'Wind', quantity: 'speed', start: { us: '4', metric: '2' }, minSi: 0, maxSi: 30 },
  soil: { kind: 'choice', label: 'Soil', start: 'loam', options: () => soilTextures.map((value) => ({ value, label: soilWords[value] })) },
  slope: { kind: 'number', label: 'Slope', quantity: null, unit: '%', start: same('2'), minSi: 0, maxSi: 60 },
  grass: { kind: 'choice', label: 'Grass', start: 'tall_fescue', options: () => grassIds.map((value) => ({ value, label: grassWords[value] })) },
  cover: { kind: 'number', label: 'Straw over the ground', quantity: null, unit: '%', start: same('0'), minSi: 0, maxSi: 100 },
  light: { kind: 'number', label: 'Light that reaches it', quantity: null, unit: '%', start: same('100'), minSi: 5, maxSi: 100 },
  doses: { kind: 'number', label: 'Doses a day', quantity: null, start: same('2'), minSi: 0, maxSi: 8, whole: true },
  depth: { kind: 'number', label: 'Depth of one', quantity: 'depth', start: { us: '0.06', metric: '1.5' }, minSi: 0.2, maxSi: 25 },
  sprinkler: { kind: 'choice', label: 'Sprinkler', start: 'oscillating', options: () => sprinklerKinds.map((value) => ({ value, label: sprinklerKindWords[value] })) },
  rate: { kind: 'number', label: 'Application rate', quantity: 'rate', start: { us: '0.2', metric: '5' }, minSi: 0.3, maxSi: 200 },
} as const;

const unknown = { rhMaxPct: null, rhMinPct: null, rhMeanPct: null, solarMjM2: null, sunshineHours: null };

/** Doses spread over a day that is light from six to eighteen. */
const doseMinutes = (count: number): number[] => doseFractions(count).map((fraction) => Math.round((6 + fraction * 12) * 60));

function answerSeedbed(values: Values<typeof rules>): SeedbedFound {
  const day = { ...unknown, tminC: values.low, tmaxC: values.high, tdewC: values.dew, windMps: values.wind, windHeightM: values.wind === null ? null : 2, precipitationMm: 0 };
  return seedbedAnswer({
    site: { latitudeDeg: values.latitude, elevationM: 100 }, startOn: values.on, days: Array.from({ length: DAYS }, () => day), solarNoonHour: 12, texture: values.soil as SoilTexture, slopePct: values.slope,
    mulchCover: values.cover / 100, radiationShare: values.light / 100, skyView: Math.min(1, 0.3 + (0.7 * values.light) / 100), windShare: 1,
    doses: { timesMinutes: doseMinutes(values.doses), depthMm: values.depth, rateMmPerHour: values.rate, drops: DROPS_OF_SPRINKLER[values.sprinkler as SprinklerKind] },
    startDepletionMm: 0, grass: values.grass as GrassId,
  });
}

/** Whether doses keep a seedbed moist. */
export function Seedbed(): ReactElement {
  const calculator = useCalculator('seedbed', rules, answerSeedbed);
  const { units, values } = calculator;
  return (
    <CalculatorScreen title="Seedbed" question="Do your doses keep the seed moist?" calculator={calculator} assumptions={(found) => found.assumptions}
      impossibleWords={{ tminC: 'The lowest temperature cannot lie above the highest.', tdewC: 'The dew point cannot lie above the highest temperature.' }}
      groups={[
        { title: 'Where and when', fields: ['latitude', 'on'] },
        { title: 'Such days', fields: ['low', 'high', 'dew', 'wind'], note: 'The same dry day four times over, to see what the doses do.' },
        { title: 'The bed', fields: ['soil', 'slope', 'grass', 'cover', 'light'] },
        { title: 'The doses', fields: ['doses', 'depth', 'sprinkler', 'rate'] },
      ]}
      caution="Keep feet and paws off the bed, and keep wet hoses off paths where somebody may trip or slip."
      more={(found) => <ByDay found={found} units={units} />}>
      {(found) => (
        <>
          <Headline>{headline(found, units)}</Headline>
          <SurfaceLine found={found} units={units} />
          <Figures figures={[
            { value: formatDepth((found.et0MmByDay[0] ?? 0) * 1.15, units), words: 'a wet bare bed loses on such a day' },
            { value: `${formatNumber(found.forecast.dryHours / DAYS, 1)} h`, words: 'of daylight too dry, each day' },
            { value: formatRate(found.washingLimitMmPerHour, units), words: 'at most, or seed may wash' },
          ]} />
          <Text>{advice(found, units, values?.doses ?? 0)}</Text>
          {found.emergence === null ? null : <Text>{emergenceWords(found.emergence)}</Text>}
          {found.forecast.washing.length === 0 ? null : (
            <Notice tone="seed" title="This may wash the seed">
              {found.forecast.washing.some((each) => each.because === 'intake') ? 'Water comes faster than the ground takes it. Open the pattern wider, or give shorter doses more often.' : 'Its drops strike too hard for bare ground. Put straw over it, open the pattern wider, or take a finer sprinkler until the grass is up.'}
            </Notice>
          )}
        </>
      )}
    </CalculatorScreen>
  );
}

/** Hour of the clock after the start of the first day. */
const clockOf = (hour: number, units: UnitSystem): string => formatClock((hour % 24) * 60, units);

function headline({ forecast, doses }: SeedbedFound, units: UnitSystem): string {
  const { dryHours, firstDryHour } = forecast;
  if (dryHours === 0) return doses.length === 0 ? 'It stays moist without a dose.' : 'The doses keep it moist all day.';
  return `Too dry from ${clockOf(firstDryHour ?? 0, units)}${(firstDryHour ?? 0) >= 24 ? ` on day ${Math.floor((firstDryHour ?? 0) / 24) + 1}` : ''}.`;
}

function advice({ kept, forecast, doses }: SeedbedFound, units: UnitSystem, given: number): string {
  if (forecast.dryHours === 0) return doses.length === 0 ? 'On such days dew and the water in the ground are enough for the top inch.' : `Depth before minutes: ${formatDepth(doses.reduce((sum, dose) => sum + dose.depthMm, 0) / DAYS, units)} a day in all.`;
  if (!kept.isKept) return 'Not even eight doses of this depth a day keep it moist. Give more at a time, or cover it with straw.';
  const perDay = kept.added.length / DAYS;
  const lastDay = kept.added.filter((dose) => Math.floor(dose.hour / 24) === DAYS - 1).map((dose) => clockOf(dose.hour, units));
  return `${Math.ceil(perDay + given)} doses of this depth a day keep it moist: besides yours at about ${lastDay.join(', ')}. Straw over the ground or a little more depth saves some of them.`;
}

function emergenceWords({ firstUpOn, mostlyUpOn, assumed }: NonNullable<SeedbedFound['emergence']>): string {
  const day = (on: string | null): string => (on === null ? 'not within a year' : formatCivilDay(on, 'long'));
  if (firstUpOn.likely === null) return 'At this temperature it does not come up.';
  return `First green about ${day(firstUpOn.likely)} (${day(firstUpOn.fast)} to ${day(firstUpOn.slow)}), most of it by ${day(mostlyUpOn.likely)}${assumed === null ? '' : ', if it stays as warm'}.`;
}

/** Surface water hour by hour over the bands of daylight, doses on top. */
function SurfaceLine({ found, units }: { found: SeedbedFound; units: UnitSystem }): ReactElement {
  const { forecast, hours, doses } = found;
  const label = `Water in the top inch over ${DAYS} days: full is ${formatDepth(forecast.evaporableMm, units)}, too dry below ${formatDepth(forecast.evaporableMm - forecast.dryLimitMm, units)}. ${headline(found, units)} The table below has each day.`;
  return (
    <Drawing label={label} height={() => 230}>
      {(width, height) => {
        const x = scale(0, hours.length, 44, width - 8);
        const y = scale(0, forecast.evaporableMm, 34, height - 30);
        const bands = hours.flatMap((hour, index) => (hour.isDaylight && !hours[index - 1]?.isDaylight ? [{ from: index, until: index + hours.slice(index).findIndex((each) => !each.isDaylight) }] : []));
        const line = forecast.hours.map((hour, index): readonly [number, number] => [x(index + 1), y(hour.depletionMm)]);
        return (
          <>
            {bands.map(({ from, until }) => <rect key={from} x={x(from)} y={14} width={x(until < from ? hours.length : until) - x(from)} height={y(forecast.evaporableMm) - 14} fill="var(--sun-tint)" />)}
            <rect x={44} y={y(forecast.dryLimitMm)} width={x(hours.length) - 44} height={y(forecast.evaporableMm) - y(forecast.dryLimitMm)} fill="var(--dry-tint)" fillOpacity={0.7} />
            <line x1={44} x2={x(hours.length)} y1={y(forecast.dryLimitMm)} y2={y(forecast.dryLimitMm)} stroke="var(--dry)" strokeWidth={1.5} strokeDasharray="5 4" />
            <path d={linePath([[x(0), y(0)], ...line])} fill="none" stroke="var(--seed)" strokeWidth={2.5} strokeLinejoin="round" />
            {doses.map((dose, index) => <circle key={index} cx={x(dose.hour + 0.5)} cy={22} r={5} fill="var(--water)" />)}
            <text x={38} y={27} textAnchor="end" data-tone="water">dose</text>
            <text x={38} y={y(0) + 8} textAnchor="end">wet</text>
            <text x={38} y={y(forecast.dryLimitMm) + 4} textAnchor="end" data-tone="dry">limit</text>
            {Array.from({ length: DAYS }, (_, day) => <text key={day} x={x(day * 24 + 12)} y={height - 8} textAnchor="middle">{formatCivilDay(addDays(hours[0]?.on ?? '2026-09-01', day), 'short').slice(0, width < 480 ? 3 : undefined)}</text>)}
          </>
        );
      }}
    </Drawing>
  );
}

function ByDay({ found, units }: { found: SeedbedFound; units: UnitSystem }): ReactElement {
  const depth = (mm: number) => formatDepth(mm, units);
  const rows = found.et0MmByDay.map((et0Mm, day) => {
    const from = day * 24;
    const surface = found.forecast.hours.slice(from, from + 24);
    const above = found.hours.slice(from, from + 24);
    const given = found.doses.filter((dose) => Math.floor(dose.hour / 24) === day).reduce((sum, dose) => sum + dose.depthMm, 0);
    return {
      on: above[0]?.on ?? '', et0Mm, given, dew: above.reduce((sum, hour) => sum + hour.dewMm, 0), lost: surface.reduce((sum, hour) => sum + hour.evaporationMm, 0),
      drained: surface.reduce((sum, hour) => sum + hour.drainageMm + hour.runoffMm, 0), dry: surface.filter((hour, index) => hour.isDry && above[index]?.isDaylight).length, end: surface.at(-1)?.depletionMm ?? 0,
    };
  });
  return (
    <>
      <Text variant="heading3" level={2}>Day by day</Text>
      <DataTable caption="Surface water of the seedbed by day" rows={rows} rowKey={(row) => row.on} empty={<Text>No day yet.</Text>}
        columns={[
          { header: 'Day', cell: (row) => formatCivilDay(row.on, 'short') },
          { header: 'Doses', align: 'right', cell: (row) => depth(row.given) },
          { header: 'Dew', align: 'right', cell: (row) => depth(row.dew) },
          { header: 'Dried away', align: 'right', cell: (row) => depth(row.lost) },
          { header: 'Drained or ran off', align: 'right', cell: (row) => depth(row.drained) },
          { header: 'Hours too dry', align: 'right', cell: (row) => String(row.dry) },
        ]} />
    </>
  );
}
