import type { ReactElement } from 'react';
import { DataTable } from '@/components/ui/DataTable';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { PlanDifference, WhatIfResponse } from '@/shared/contracts/wishes';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatMinutes, formatNumber, formatVolume } from '@/shared/display';
import { capital, counted } from '@/shared/roundWords';
import { lineText } from './wishWords';

interface SumRow {
  name: string;
  before: string;
  after: string;
}

/** What would come of a change: sums side by side, the sets that differ, and how dry each zone gets. */
export function Difference({ yard, todayOn, found }: { yard: YardResponse; todayOn: string; found: WhatIfResponse }): ReactElement {
  const { before, after, difference, risk } = found;
  const rows: SumRow[] = [
    { name: 'Outings', before: formatNumber(before.outings, 0), after: formatNumber(after.outings, 0) },
    { name: 'Sets', before: formatNumber(before.sets, 0), after: formatNumber(after.sets, 0) },
    ...(before.doses + after.doses > 0 ? [{ name: 'Doses on seed', before: formatNumber(before.doses, 0), after: formatNumber(after.doses, 0) }] : []),
    { name: 'Moves', before: formatNumber(before.moves, 0), after: formatNumber(after.moves, 0) },
    { name: 'Time of water', before: formatMinutes(before.minutes), after: formatMinutes(after.minutes) },
    { name: 'Water', before: formatVolume(before.litres, yard.units), after: formatVolume(after.litres, yard.units) },
    { name: 'Wanted, but no room', before: formatVolume(before.shortLitres, yard.units), after: formatVolume(after.shortLitres, yard.units) },
  ];
  return (
    <Stack gap={12}>
      <Text variant="label">{headline(found)}</Text>
      <DataTable<SumRow> caption="Ten days as planned, and with it" rows={rows} rowKey={(row) => row.name} empty={null}
        columns={[{ header: 'Ten days', cell: (row) => row.name }, { header: 'As planned', align: 'right', cell: (row) => row.before }, { header: 'With it', align: 'right', cell: (row) => (row.before === row.after ? row.after : <strong>{row.after}</strong>) }]} />
      <ul className="p-risk" aria-label="How dry each zone gets">
        {risk.map(({ zoneId, daysPastBefore, daysPastAfter, worstAfter }) => (
          <li key={zoneId} data-worse={daysPastAfter > daysPastBefore ? '' : undefined}>
            {`${yard.zones.find((zone) => zone.id === zoneId)?.name ?? 'A zone'}: ${daysPastAfter === 0 ? 'stays above its refill line' : `${counted(daysPastAfter, 'day')} past its refill line, at worst ${formatNumber(worstAfter * 100, 0)} % of it`}${daysPastAfter === daysPastBefore ? ', as planned' : daysPastAfter > daysPastBefore ? `, ${daysPastAfter - daysPastBefore} more than planned` : `, ${daysPastBefore - daysPastAfter} fewer than planned`}.`}
          </li>
        ))}
      </ul>
      <DifferenceList yard={yard} todayOn={todayOn} difference={difference} />
    </Stack>
  );
}

function headline({ before, after, difference }: WhatIfResponse): string {
  if (difference.added.length + difference.dropped.length + difference.changed.length === 0) {
    return 'The plan stays as it is.';
  }
  const litres = after.litres - before.litres;
  const share = before.litres <= 0 ? 0 : Math.round((litres / before.litres) * 100);
  const water = share === 0 ? 'about the same water' : `${Math.abs(share)} % ${share > 0 ? 'more' : 'less'} water`;
  const outings = after.outings - before.outings;
  return `${outings === 0 ? 'As many outings' : `${capital(counted(Math.abs(outings), 'outing'))} ${outings > 0 ? 'more' : 'fewer'}`}, ${water}.`;
}

/** The sets that two plans have differently, behind a fold. */
export function DifferenceList({ yard, todayOn, difference: { added, dropped, changed } }: { yard: YardResponse; todayOn: string; difference: PlanDifference }): ReactElement | null {
  const count = added.length + dropped.length + changed.length;
  if (count === 0) {
    return null;
  }
  return (
    <details className="p-diff">
      <summary>{`${capital(counted(count, 'set'))} otherwise`}</summary>
      <ul>
        {dropped.map((line) => <li key={`- ${line.on} ${line.positionId} ${line.startMinutes}`}>{`Not any more: ${lineText(line, yard, todayOn)}.`}</li>)}
        {added.map((line) => <li key={`+ ${line.on} ${line.positionId} ${line.startMinutes}`}>{`New: ${lineText(line, yard, todayOn)}.`}</li>)}
        {changed.map(({ before, after }) => <li key={`= ${before.on} ${before.positionId} ${before.startMinutes}`}>{`Otherwise: ${lineText(after, yard, todayOn)}; before, ${formatMinutes(before.minutes)}.`}</li>)}
      </ul>
    </details>
  );
}
