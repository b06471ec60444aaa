import { useMemo, type ReactElement } from 'react';
import { DataTable } from '@/components/ui/DataTable';
import { Text } from '@/components/ui/Text';
import { sunExposureAnswer, type SunExposureFound, type SunExposureMonth } from '@/scheduling/calculators/sunExposureAnswer';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth, formatNumber } from '@/shared/display';
import { CalculatorScreen, type FieldGroup } from './CalculatorScreen';
import { Drawing, Figures, Headline } from './Drawing';
import { same, type Values } from './rules';
import { areaPath, linePath, percent, roundUp, scale } from './scales';
import { obstaclesOf, outlineOf, type Side, type SunScene } from './sunScene';
import { useCalculator } from './useCalculator';

const sides = (start: string, label: string) => ({
  kind: 'choice', label, start, options: () => [{ value: 'none', label: 'None' }, { value: 'south', label: 'To the south' }, { value: 'west', label: 'To the west' }, { value: 'north', label: 'To the north' }, { value: 'east', label: 'To the east' }],
}) as const;
const length = (label: string, us: string, metric: string, minSi: number, maxSi: number) => ({ kind: 'number', label, quantity: 'length', start: { us, metric }, minSi, maxSi }) as const;
const temperature = (label: string, us: string, metric: string) => ({ kind: 'number', label, quantity: 'temperature', start: { us, metric }, minSi: -60, maxSi: 55 }) as const;
const rules = {
  latitude: { kind: 'number', label: 'Latitude, south negative', quantity: null, unit: '°', start: same('41'), minSi: -90, maxSi: 90 },
  width: length('Zone, west to east', '30', '9', 1, 150),
  long: length('Zone, south to north', '24', '7', 1, 150),
  houseSide: sides('south', 'The house'),
  houseAway: length('House from the zone', '10', '3', 0, 100),
  houseHeight: length('Height of the house', '20', '6', 1, 60),
  houseLength: length('Length of the house', '50', '15', 1, 150),
  treeSide: sides('west', 'A tree'),
  treeAway: length('Trunk from the zone', '15', '4.5', 0, 100),
  treeHeight: length('Height of the tree', '35', '11', 1, 60),
  crown: length('Width of the crown', '25', '8', 0.5, 40),
  leaves: { kind: 'choice', label: 'Leaves', start: 'deciduous', options: () => [{ value: 'deciduous', label: 'Bare in winter' }, { value: 'evergreen', label: 'Evergreen' }] },
  fenceSide: sides('east', 'A fence'),
  fenceAway: length('Fence from the zone', '2', '0.6', 0, 100),
  fenceHeight: length('Height of the fence', '6', '1.8', 0.3, 10),
  warmLow: temperature('Warmest month, lowest', '64', '18'),
  warmHigh: temperature('Warmest month, highest', '84', '29'),
  coldLow: temperature('Coldest month, lowest', '20', '-7'),
  coldHigh: temperature('Coldest month, highest', '35', '2'),
} as const;
type SunValues = Values<typeof rules>;

const sideOf = (text: string): Side | null => (text === 'none' ? null : (text as Side));

function sceneOf(values: SunValues): SunScene {
  const [house, tree, fence] = [sideOf(values.houseSide), sideOf(values.treeSide), sideOf(values.fenceSide)];
  return {
    widthM: values.width, lengthM: values.long,
    house: house === null ? null : { side: house, awayM: values.houseAway, heightM: values.houseHeight, lengthM: values.houseLength },
    tree: tree === null ? null : { side: tree, awayM: values.treeAway, heightM: values.treeHeight, crownM: values.crown, leaves: values.leaves === 'evergreen' ? 'evergreen' : 'deciduous' },
    fence: fence === null ? null : { side: fence, awayM: values.fenceAway, heightM: values.fenceHeight },
  };
}

function answerSun(values: SunValues): SunExposureFound {
  const scene = sceneOf(values);
  return sunExposureAnswer({
    site: { latitudeDeg: values.latitude, elevationM: 100 }, longitudeDeg: 0, obstacles: obstaclesOf(scene), outline: outlineOf(scene),
    temperatures: { warmest: { tminC: values.warmLow, tmaxC: values.warmHigh }, coldest: { tminC: values.coldLow, tmaxC: values.coldHigh } },
  });
}

const monthNames = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'];
const monthName = (month: SunExposureMonth | undefined): string => monthNames[(month?.month ?? 1) - 1] ?? '';

/** Sun and demand of a zone through the months. */
export function SunExposure(): ReactElement {
  const calculator = useCalculator('sun-exposure', rules, answerSun);
  const { units, values } = calculator;
  const scene = useMemo(() => (values === null ? null : sceneOf(values)), [values]);
  const groups: FieldGroup[] = [
    { title: 'The zone', fields: ['latitude', 'width', 'long'] },
    { title: 'A house', fields: ['houseSide', ...(values?.houseSide === 'none' ? [] : ['houseAway', 'houseHeight', 'houseLength'])] },
    { title: 'A tree', fields: ['treeSide', ...(values?.treeSide === 'none' ? [] : ['treeAway', 'treeHeight', 'crown', 'leaves'])] },
    { title: 'A fence', fields: ['fenceSide', ...(values?.fenceSide === 'none' ? [] : ['fenceAway', 'fenceHeight'])] },
    { title: 'How warm it is there', fields: ['warmLow', 'warmHigh', 'coldLow', 'coldHigh'], note: 'For the water that the air draws; the months between follow a wave.' },
  ];
  return (
    <CalculatorScreen title="Sun exposure" question="How much sun does the zone get, and what does that save?" calculator={calculator} groups={groups} assumptions={(found) => found.assumptions}
      impossibleWords={{ 'temperatures.warmest.tminC': 'In the warmest month the lowest temperature cannot lie above the highest.', 'temperatures.coldest.tminC': 'In the coldest month the lowest temperature cannot lie above the highest.' }}
      more={(found) => <Months found={found} units={units} />}>
      {(found) => {
        const [most, least] = [...found.months].sort((a, b) => b.directSunHours - a.directSunHours).filter((_, index, all) => index === 0 || index === all.length - 1);
        const warm = [...found.months].sort((a, b) => (b.et0Mm ?? 0) - (a.et0Mm ?? 0))[0];
        const saved = warm && warm.et0Mm !== null && warm.shadedEt0Mm !== null && warm.et0Mm > 0 ? 1 - warm.shadedEt0Mm / warm.et0Mm : 0;
        return (
          <>
            <Headline>{`${formatNumber(most?.directSunHours ?? 0, 1)} hours of sun in ${monthName(most)}, ${formatNumber(least?.directSunHours ?? 0, 1)} in ${monthName(least)}.`}</Headline>
            <SunBars found={found} />
            <EtLines found={found} units={units} />
            <Figures figures={[
              { value: percent(warm?.radiationShare ?? 1), words: `of the open light in ${monthName(warm)}` },
              { value: formatDepth(warm?.shadedEt0Mm ?? 0, units), words: `drawn a day in ${monthName(warm)}, ${formatDepth(warm?.et0Mm ?? 0, units)} in the open` },
              { value: percent(saved), words: 'less demand than in the open then' },
            ]} />
            {scene === null ? null : <PlanSketch scene={scene} />}
            <Text>{(most?.directSunHours ?? 0) < 4 ? 'With under four hours of sun in the best month, most lawn grasses thin out, and seed fails year after year. Mulch or a ground cover is the honest answer there.' : 'Shade lowers the demand, tree roots raise it again: under a crown probe the ground before you save water.'}</Text>
          </>
        );
      }}
    </CalculatorScreen>
  );
}

/** Hours of direct sun in each month before the length of the day. */
function SunBars({ found }: { found: SunExposureFound }): ReactElement {
  const { months } = found;
  const longest = Math.max(...months.map((month) => month.openSunHours));
  const top = Math.max(4, longest + 2);
  const label = `Hours of direct sun by month: ${months.map((month) => `${monthName(month)} ${formatNumber(month.directSunHours, 1)} of ${formatNumber(month.openSunHours, 1)}`).join(', ')}.`;
  return (
    <Drawing label={label} height={() => 190}>
      {(width, height) => {
        const x = scale(0, 12, 34, width - 6);
        const y = scale(0, top, height - 26, 14);
        const wide = x(1) - x(0);
        return (
          <>
            {[0, 4, 8, 12, 16, 20, 24].filter((tick) => tick <= top).map((tick) => (
              <g key={tick}>
                <line x1={34} x2={width - 6} y1={y(tick)} y2={y(tick)} stroke="var(--line)" />
                <text x={28} y={y(tick) + 4} textAnchor="end">{tick === 0 ? '0' : `${tick} h`}</text>
              </g>
            ))}
            {months.map((month, index) => (
              <g key={month.month}>
                <rect x={x(index) + wide * 0.14} width={wide * 0.72} y={y(month.openSunHours)} height={y(0) - y(month.openSunHours)} fill="var(--shade-tint)" rx={4} />
                <rect x={x(index) + wide * 0.14} width={wide * 0.72} y={y(month.directSunHours)} height={Math.max(0, y(0) - y(month.directSunHours))} fill="var(--sun)" rx={4} />
                <text x={x(index + 0.5)} y={height - 8} textAnchor="middle">{monthName(month).slice(0, width < 420 ? 1 : 3)}</text>
              </g>
            ))}
            <text x={x(6)} y={y(longest) - 6} textAnchor="middle">length of the day</text>
          </>
        );
      }}
    </Drawing>
  );
}

/** Reference ET by month in the open and in the zone's light. */
function EtLines({ found, units }: { found: SunExposureFound; units: UnitSystem }): ReactElement {
  const { months } = found;
  const top = roundUp(Math.max(...months.map((month) => month.et0Mm ?? 0), 0.5));
  const points = (pick: (month: SunExposureMonth) => number | null, x: (value: number) => number, y: (value: number) => number) => months.map((month, index): readonly [number, number] => [x(index + 0.5), y(pick(month) ?? 0)]);
  const peak = months.reduce((best, month, index) => ((month.et0Mm ?? 0) > (months[best]?.et0Mm ?? 0) ? index : best), 0);
  return (
    <Drawing label={`Reference ET a day by month. In the open at most ${formatDepth(months[peak]?.et0Mm ?? 0, units)} in ${monthName(months[peak])}; in the zone's light ${formatDepth(months[peak]?.shadedEt0Mm ?? 0, units)}. The table below has each month.`} height={() => 150}>
      {(width, height) => {
        const x = scale(0, 12, 34, width - 6);
        const y = scale(0, top, height - 26, 16);
        const open = points((month) => month.et0Mm, x, y);
        const zone = points((month) => month.shadedEt0Mm, x, y);
        return (
          <>
            <line x1={34} x2={width - 6} y1={y(0)} y2={y(0)} stroke="var(--line)" />
            <path d={areaPath(zone, y(0))} fill="var(--water-tint)" />
            <path d={linePath(open)} fill="none" stroke="var(--ink-soft)" strokeWidth={2} strokeDasharray="5 4" />
            <path d={linePath(zone)} fill="none" stroke="var(--water)" strokeWidth={2.5} />
            <text x={(open[peak]?.[0] ?? 0) + 4} y={(open[peak]?.[1] ?? 0) - 6} textAnchor="middle">{`ET in the open ${formatDepth(months[peak]?.et0Mm ?? 0, units)} a day`}</text>
            <text x={zone[peak]?.[0] ?? 0} y={(zone[peak]?.[1] ?? 0) + 20} textAnchor="middle" data-tone="water">{`here ${formatDepth(months[peak]?.shadedEt0Mm ?? 0, units)}`}</text>
            {months.map((month, index) => <text key={month.month} x={x(index + 0.5)} y={height - 8} textAnchor="middle">{monthName(month).slice(0, width < 420 ? 1 : 3)}</text>)}
          </>
        );
      }}
    </Drawing>
  );
}

/** The zone and what stands around it, from above. */
function PlanSketch({ scene }: { scene: SunScene }): ReactElement {
  const obstacles = obstaclesOf(scene);
  const points = [...outlineOf(scene), ...obstacles.flatMap((obstacle) => (obstacle.kind === 'building' ? obstacle.footprint : obstacle.kind === 'fence' ? obstacle.line : [
    { eastM: obstacle.at.eastM - obstacle.crownRadiusM, northM: obstacle.at.northM - obstacle.crownRadiusM }, { eastM: obstacle.at.eastM + obstacle.crownRadiusM, northM: obstacle.at.northM + obstacle.crownRadiusM },
  ]))];
  const [west, east] = [Math.min(...points.map((point) => point.eastM)), Math.max(...points.map((point) => point.eastM))];
  const [south, north] = [Math.min(...points.map((point) => point.northM)), Math.max(...points.map((point) => point.northM))];
  const perMetre = (width: number) => Math.min((width - 24) / (east - west), 220 / (north - south));
  const words = [scene.house ? `a house to the ${scene.house.side}` : '', scene.tree ? `a tree to the ${scene.tree.side}` : '', scene.fence ? `a fence to the ${scene.fence.side}` : ''].filter((word) => word !== '');
  return (
    <Drawing label={`The zone from above, north at the top${words.length > 0 ? `, with ${words.join(', ')}` : ', nothing around it'}.`} height={(width) => perMetre(width) * (north - south) + 24}>
      {(width, height) => {
        const scaleM = perMetre(width);
        const left = (width - scaleM * (east - west)) / 2;
        const x = (metres: number) => left + (metres - west) * scaleM;
        const y = (metres: number) => height - 12 - (metres - south) * scaleM;
        return (
          <>
            <rect x={x(0)} y={y(scene.lengthM)} width={scene.widthM * scaleM} height={scene.lengthM * scaleM} rx={4} fill="var(--hose)" fillOpacity={0.26} />
            <text x={x(scene.widthM / 2)} y={y(scene.lengthM / 2) + 5} textAnchor="middle" data-tone="strong">zone</text>
            {obstacles.map((obstacle) => {
              if (obstacle.kind === 'tree') {
                return (
                  <g key="tree">
                    <circle cx={x(obstacle.at.eastM)} cy={y(obstacle.at.northM)} r={obstacle.crownRadiusM * scaleM} fill="var(--hose)" fillOpacity={0.42} />
                    <circle cx={x(obstacle.at.eastM)} cy={y(obstacle.at.northM)} r={3} fill="var(--ink)" />
                  </g>
                );
              }
              const path = linePath((obstacle.kind === 'building' ? obstacle.footprint : obstacle.line).map((point) => [x(point.eastM), y(point.northM)]));
              return obstacle.kind === 'building'
                ? <path key="house" d={`${path} Z`} fill="var(--sheet)" stroke="var(--edge)" strokeWidth={1.5} />
                : <path key="fence" d={path} fill="none" stroke="var(--ink)" strokeWidth={3} strokeDasharray="6 3" />;
            })}
            <text x={width - 4} y={16} textAnchor="end">north ↑</text>
          </>
        );
      }}
    </Drawing>
  );
}

function Months({ found, units }: { found: SunExposureFound; units: UnitSystem }): ReactElement {
  return (
    <>
      <Text variant="heading3" level={2}>Month by month</Text>
      <DataTable caption="Sun, light and reference ET by month" rows={found.months} rowKey={(month) => String(month.month)} empty={<Text>No month yet.</Text>}
        columns={[
          { header: 'Month', cell: monthName },
          { header: 'Sun', align: 'right', cell: (month) => `${formatNumber(month.directSunHours, 1)} h of ${formatNumber(month.openSunHours, 1)} h` },
          { header: 'Light', align: 'right', cell: (month) => percent(month.radiationShare) },
          { header: 'ET in the open', align: 'right', cell: (month) => (month.et0Mm === null ? '–' : formatDepth(month.et0Mm, units)) },
          { header: 'ET here', align: 'right', cell: (month) => (month.shadedEt0Mm === null ? '–' : formatDepth(month.shadedEt0Mm, units)) },
        ]} />
    </>
  );
}
