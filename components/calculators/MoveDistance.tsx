import type { ReactElement } from 'react';
import { DataTable } from '@/components/ui/DataTable';
import { Text } from '@/components/ui/Text';
import { moveDistanceAnswer, type MoveDistanceFound, type MovePattern } from '@/scheduling/calculators/moveDistanceAnswer';
import type { Arrangement } from '@/scheduling/sprinkler';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth, formatLength, formatMinutes, formatNumber } from '@/shared/display';
import { CalculatorScreen, type FieldGroup } from './CalculatorScreen';
import { Drawing, Figures, Headline } from './Drawing';
import { same, type Values } from './rules';
import { linePath, percent, scale } from './scales';
import { useCalculator } from './useCalculator';

const length = (label: string, us: string, metric: string, minSi: number, maxSi: number) => ({ kind: 'number', label, quantity: 'length', start: { us, metric }, minSi, maxSi }) as const;
const rules = {
  sprinkler: {
    kind: 'choice', label: 'The sprinkler', start: 'full_circle',
    options: () => [
      { value: 'full_circle', label: 'Full circle' }, { value: 'part_circle', label: 'Part of a circle' }, { value: 'oscillating', label: 'Oscillating (swinging bar)' }, { value: 'travelling', label: 'Travelling' },
    ],
  },
  readings: {
    kind: 'list', label: 'Depth in each cup, outwards', hint: 'One row of cups from the sprinkler to the last wet grass, with a blank between two numbers.', quantity: 'depth',
    start: { us: '0.30 0.26 0.20 0.11 0.03', metric: '7.6 6.6 5.1 2.8 0.8' }, minSi: 0, maxSi: 300, least: 3, most: 40,
  },
  first: length('First cup from the sprinkler', '3', '1', 0, 30),
  spacing: length('From cup to cup', '6', '1.8', 0.1, 30),
  minutes: { kind: 'number', label: 'The water ran', quantity: null, unit: 'min', start: same('60'), minSi: 1, maxSi: 600 },
  spray: length('Width across the sweep', '30', '9', 0.5, 60),
  sector: { kind: 'number', label: 'Width of the sector', quantity: null, unit: 'degrees', start: same('180'), minSi: 10, maxSi: 359 },
  speed: length('Way in an hour', '30', '9', 0.5, 100),
  arrangement: {
    kind: 'choice', label: 'How the positions lie', start: 'square', options: () => [{ value: 'square', label: 'In squares' }, { value: 'triangle', label: 'Staggered' }, { value: 'line', label: 'One line' }],
  },
  width: length('Zone width', '60', '18', 1, 150),
  depthOfZone: length('Zone length', '40', '12', 1, 150),
  depth: { kind: 'number', label: 'Depth wanted', quantity: 'depth', start: { us: '0.5', metric: '12' }, minSi: 0.5, maxSi: 100 },
} as const;
type MoveValues = Values<typeof rules>;

function patternOf(values: MoveValues): MovePattern {
  const row = { distancesM: values.readings.map((_, index) => values.first + index * values.spacing), ratesMmPerHour: values.readings.map((depthMm) => (depthMm * 60) / values.minutes) };
  switch (values.sprinkler) {
    case 'part_circle':
      return { kind: 'part_circle', ...row, fromDeg: -values.sector / 2, toDeg: values.sector / 2 };
    case 'oscillating':
      return { kind: 'oscillating', ...row, widthM: values.spray };
    case 'travelling':
      return { kind: 'travelling', ...row, speedMPerHour: values.speed };
    default:
      return { kind: 'full_circle', ...row };
  }
}

function answerMove(values: MoveValues): MoveDistanceFound {
  return moveDistanceAnswer({ pattern: patternOf(values), arrangement: values.arrangement as Arrangement, zone: { widthM: values.width, lengthM: values.depthOfZone }, depthMm: values.depth });
}

/** How far to move the sprinkler, by a row of cups. */
export function MoveDistance(): ReactElement {
  const calculator = useCalculator('move-distance', rules, answerMove);
  const { units, values } = calculator;
  const kind = values?.sprinkler ?? 'full_circle';
  const groups: FieldGroup[] = [
    { title: 'The cups', fields: ['sprinkler', 'readings', 'first', 'spacing', 'minutes', ...(kind === 'oscillating' ? ['spray'] : kind === 'part_circle' ? ['sector'] : kind === 'travelling' ? ['speed'] : [])] },
    { title: 'The zone', fields: ['width', 'depthOfZone', ...(kind === 'travelling' ? [] : ['arrangement', 'depth'])] },
  ];
  return (
    <CalculatorScreen title="Move distance" question="How far should you move the sprinkler?" calculator={calculator} groups={groups} assumptions={(found) => found.assumptions}
      impossibleWords={{ pattern: 'No cup caught any water: the pattern is dry.', fromM: 'The zone would take more than 400 positions. Take a smaller zone, or a sprinkler that throws farther.' }}
      more={(found) => <Distances found={found} units={units} />}>
      {(found) => {
        const { inZone, overTwoRounds, best } = found;
        if (inZone === null || values === null) return null;
        const zone = inZone.best;
        const count = zone.positions.length;
        const isTravelling = kind === 'travelling';
        return (
          <>
            <Headline>{headline(found, units, isTravelling)}</Headline>
            <ZonePlan found={found} widthM={values.width} lengthM={values.depthOfZone} kind={kind} units={units} />
            <Figures figures={[
              { value: formatNumber(zone.lowQuarterUniformity, 2), words: 'low-quarter uniformity in the zone' },
              { value: percent(zone.wastedShare), words: 'of the water falls outside it' },
              ...(zone.evenness.setMinutes === null ? [{ value: formatDepth(zone.meanMmPerHour, units), words: 'mean depth of all passes' }] : [{ value: formatMinutes(zone.evenness.setMinutes), words: `each set for ${formatDepth(values.depth, units)}` }]),
            ]} />
            <Text>{`${count === 1 ? 'From one position' : `From ${count} ${isTravelling ? 'tracks' : 'positions'}`} the driest quarter gets ${percent(zone.lowQuarterUniformity)} of the mean. On a lawn without edges the flattest distance is ${formatLength(found.bestM, units)}, with ${formatNumber(best.lowQuarterUniformity, 2)}; edge to edge it would be ${formatNumber(found.edgeToEdge.lowQuarterUniformity, 2)}.`}</Text>
            {overTwoRounds.gain > 0.01 ? <Text>{`Stand half-way between the marks the next time: over two rounds ${formatNumber(best.lowQuarterUniformity, 2)} becomes ${formatNumber(overTwoRounds.lowQuarterUniformity, 2)}, for no more water.`}</Text> : null}
            {isTravelling ? null : <Text color="inkSoft">{`Minutes go by the lower half of the ground (×\u00a0${formatNumber(zone.evenness.runTimeMultiplier, 2)}). By the lowest quarter it would be ${zone.evenness.lowQuarterMultiplier === null ? 'without end' : `×\u00a0${formatNumber(zone.evenness.lowQuarterMultiplier, 2)}`}, which drowns the rest.`}</Text>}
          </>
        );
      }}
    </CalculatorScreen>
  );
}

function headline({ inZone }: MoveDistanceFound, units: UnitSystem, isTravelling: boolean): string {
  if (inZone === null) return '';
  const { moveM, rowMoveM, positions } = inZone.best;
  if (positions.length === 1) return isTravelling ? 'One track down the middle.' : 'One position in the middle, no move.';
  const rows = new Set(positions.map((position) => position.yM.toFixed(3))).size;
  const apart = rows > 1 && Math.abs(rowMoveM - moveM) > 0.1 && positions.length > rows ? `, rows ${formatLength(rowMoveM, units)} apart` : '';
  const distance = positions.length === rows ? rowMoveM : moveM;
  return isTravelling ? `Lay ${positions.length} tracks ${formatLength(moveM, units)} apart.` : `Move ${formatLength(distance, units)}${apart}: ${positions.length} positions.`;
}

/** The zone from above: depth by the strength of the water, reach and number of each position, the way between them. */
function ZonePlan({ found, widthM, lengthM, kind, units }: { found: MoveDistanceFound; widthM: number; lengthM: number; kind: string; units: UnitSystem }): ReactElement | null {
  if (found.inZone === null) return null;
  const { best } = found.inZone;
  const { columns, rows, ratesMmPerHour } = best.cell;
  const most = Math.max(...ratesMmPerHour, 1e-9);
  const margin = 40;
  const isTravelling = kind === 'travelling';
  const label = `The zone from above, ${formatLength(widthM, units)} by ${formatLength(lengthM, units)}, with ${best.positions.length} ${isTravelling ? 'tracks' : 'positions'}. The more water, the stronger the colour; ${percent(best.wastedShare)} falls outside the zone.`;
  const perMetre = (width: number) => Math.min((width - 2 * margin) / widthM, 340 / lengthM);
  return (
    <Drawing label={label} height={(width) => perMetre(width) * lengthM + 2 * margin}>
      {(width, height) => {
        const scaleM = perMetre(width);
        const left = (width - scaleM * widthM) / 2;
        const x = (metres: number) => left + metres * scaleM;
        const y = (metres: number) => height - margin - metres * scaleM;
        return (
          <>
            <clipPath id="k-page"><rect x={0} y={0} width={width} height={height} /></clipPath>
            <g clipPath="url(#k-page)">
              {best.positions.map(({ xM, yM }) => (kind === 'full_circle' || kind === 'part_circle'
                ? <circle key={`${xM} ${yM}`} cx={x(xM)} cy={y(yM)} r={found.reachXM * scaleM} fill="var(--water)" fillOpacity={0.1} stroke="var(--water)" strokeOpacity={0.4} strokeDasharray="3 5" />
                : <rect key={`${xM} ${yM}`} x={x(xM - found.reachXM)} y={isTravelling ? 0 : y(yM + found.reachYM)} width={2 * found.reachXM * scaleM} height={isTravelling ? height : 2 * found.reachYM * scaleM} fill="var(--water)" fillOpacity={0.1} stroke="var(--water)" strokeOpacity={0.4} strokeDasharray="3 5" />))}
            </g>
            <rect x={x(0)} y={y(lengthM)} width={widthM * scaleM} height={lengthM * scaleM} fill="var(--sheet)" />
            {ratesMmPerHour.map((rate, index) => {
              const column = index % columns;
              const row = Math.floor(index / columns);
              const wide = (widthM * scaleM) / columns;
              const tall = (lengthM * scaleM) / rows;
              return <rect key={index} x={x(0) + column * wide} y={y(0) - (row + 1) * tall} width={wide} height={tall} shapeRendering="crispEdges" fill="var(--water)" fillOpacity={0.06 + 0.6 * (rate / most)} />;
            })}
            <rect x={x(0)} y={y(lengthM)} width={widthM * scaleM} height={lengthM * scaleM} fill="none" stroke="var(--hose)" strokeWidth={2} />
            {isTravelling
              ? best.positions.map(({ xM }) => <line key={xM} x1={x(xM)} x2={x(xM)} y1={y(0)} y2={y(lengthM)} stroke="var(--ink)" strokeWidth={2} strokeDasharray="2 6" strokeLinecap="round" />)
              : <path d={linePath(best.positions.map(({ xM, yM }) => [x(xM), y(yM)]))} fill="none" stroke="var(--ink)" strokeWidth={1.5} strokeDasharray="2 6" strokeLinecap="round" />}
            {best.positions.length > 60 ? null : best.positions.map(({ xM, yM }, index) => (
              <g key={`${xM} ${yM}`}>
                <circle cx={x(xM)} cy={y(yM)} r={best.positions.length > 20 ? 8 : 11} fill="var(--sheet)" stroke="var(--water)" strokeWidth={2} />
                <text x={x(xM)} y={y(yM) + 4.5} textAnchor="middle" data-tone="strong" fontSize={best.positions.length > 20 ? 10 : 13}>{index + 1}</text>
              </g>
            ))}
            <text x={x(0)} y={height - margin + 18}>{formatLength(widthM, units)}</text>
          </>
        );
      }}
    </Drawing>
  );
}

/** Evenness and waste by distance, drawn and as a table. */
function Distances({ found, units }: { found: MoveDistanceFound; units: UnitSystem }): ReactElement | null {
  if (found.inZone === null) return null;
  const { options, best } = found.inZone;
  const first = options[0]?.moveM ?? 0;
  const last = options.at(-1)?.moveM ?? 1;
  const shown = options.filter((option, index) => index % 5 === 0 || option.moveM === best.moveM);
  return (
    <>
      <Text variant="heading3" level={2}>Every distance that was tried</Text>
      <Drawing label={`Low-quarter uniformity and the share that falls outside, for moves from ${formatLength(first, units)} to ${formatLength(last, units)}. Best for this zone is ${formatLength(best.moveM, units)}. The table below has the numbers.`} height={() => 180}>
        {(width, height) => {
          const x = scale(first, last, 36, width - 12);
          const y = scale(0, 1, height - 28, 14);
          const atLeft = x(best.moveM) < width * 0.55;
          return (
            <>
              {[0, 0.5, 1].map((tick) => (
                <g key={tick}>
                  <line x1={36} x2={width - 12} y1={y(tick)} y2={y(tick)} stroke="var(--line)" />
                  <text x={30} y={y(tick) + 4} textAnchor="end">{percent(tick)}</text>
                </g>
              ))}
              <line x1={x(best.moveM)} x2={x(best.moveM)} y1={y(0)} y2={y(1)} stroke="var(--ink-soft)" />
              <path d={linePath(options.map((option) => [x(option.moveM), y(option.lowQuarterUniformity)]))} fill="none" stroke="var(--water)" strokeWidth={2.5} />
              <path d={linePath(options.map((option) => [x(option.moveM), y(option.wastedShare)]))} fill="none" stroke="var(--dry)" strokeWidth={2.5} strokeDasharray="6 4" />
              <text x={x(best.moveM) + (atLeft ? 8 : -8)} y={y(best.lowQuarterUniformity) - 8} textAnchor={atLeft ? 'start' : 'end'} data-tone="water">{`low quarter ${formatNumber(best.lowQuarterUniformity, 2)}`}</text>
              <text x={x(best.moveM) + (atLeft ? 8 : -8)} y={y(best.wastedShare) + (best.wastedShare > 0.12 ? 18 : -8)} textAnchor={atLeft ? 'start' : 'end'} data-tone="dry">{`outside ${percent(best.wastedShare)}`}</text>
              <text x={36} y={height - 8}>{formatLength(first, units)}</text>
              <text x={x(best.moveM)} y={height - 8} textAnchor="middle" data-tone="strong">{formatLength(best.moveM, units)}</text>
              <text x={width - 12} y={height - 8} textAnchor="end">{formatLength(last, units)}</text>
            </>
          );
        }}
      </Drawing>
      <DataTable caption="Evenness and waste by move distance" rows={shown} rowKey={(option) => option.moveM.toFixed(4)} selectedKey={best.moveM.toFixed(4)} empty={<Text>No distance was tried.</Text>}
        columns={[
          { header: 'Move', cell: (option) => formatLength(option.moveM, units) },
          { header: 'Low-quarter uniformity', align: 'right', cell: (option) => formatNumber(option.lowQuarterUniformity, 2) },
          { header: 'Falls outside', align: 'right', cell: (option) => percent(option.wastedShare) },
        ]} />
    </>
  );
}
