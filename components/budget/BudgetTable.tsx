import type { ReactElement } from 'react';
import { DataTable } from '@/components/ui/DataTable';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { UnitSystem } from '@/shared/contracts/common';
import type { BudgetDayResponse } from '@/shared/contracts/water';
import { formatCivilDay, formatDepth, formatNumber } from '@/shared/display';
import { rainWords } from './groundWords';

/** The chart's twin: every day term by term, so that each number can be followed. */
export function BudgetTable({ days, today, units, name }: { days: readonly BudgetDayResponse[]; today: string; units: UnitSystem; name: string }): ReactElement {
  const depth = (mm: number) => formatDepth(mm, units);
  const signed = (mm: number) => (Math.abs(mm) < 0.005 ? depth(0) : `${mm < 0 ? '−' : '+'}${depth(Math.abs(mm))}`);
  const rows = [...days].reverse();
  const assumed = new Map(days.flatMap((day) => day.assumptions).map((assumption) => [`${assumption.field}: ${assumption.method}`, assumption]));
  return (
    <Stack gap={12}>
      <DataTable<BudgetDayResponse>
        caption={`Water budget of ${name} by day`}
        rows={rows}
        rowKey={(day) => day.on}
        selectedKey={today}
        empty={<Text>No day yet.</Text>}
        columns={[
          { header: 'Day', cell: (day) => `${formatCivilDay(day.on, 'short')}${day.isForecast ? ' (forecast)' : ''}` },
          { header: 'Short at start', align: 'right', cell: (day) => depth(day.depletionStartMm) },
          { header: 'Reference ET', align: 'right', cell: (day) => depth(day.et0Mm) },
          { header: 'In its shade', align: 'right', cell: (day) => depth(day.shadedEt0Mm) },
          { header: 'Grass × stress', align: 'right', cell: (day) => `${formatNumber(day.cropCoefficient, 2)} × ${formatNumber(day.stressCoefficient, 2)}` },
          { header: 'Used', align: 'right', cell: (day) => depth(day.etcMm) },
          { header: 'Rain that counted', align: 'right', cell: (day) => (day.rainMm > 0 ? `${depth(day.effectiveRainMm)} of ${depth(day.rainMm)}, ${rainWords[day.rainSource]}` : depth(0)) },
          { header: 'Sets', align: 'right', cell: (day) => depth(day.irrigationMm) },
          { header: 'Roots, soil check', align: 'right', cell: (day) => signed(day.rootGrowthMm + day.observationMm) },
          { header: 'Drained', align: 'right', cell: (day) => depth(day.drainageMm) },
          { header: 'Short at end', align: 'right', cell: (day) => depth(day.depletionEndMm) },
        ]}
      />
      {assumed.size > 0 ? (
        <Stack gap={4}>
          <Text variant="label">Assumed where nothing was measured</Text>
          {[...assumed.values()].map((assumption) => (
            <Text key={`${assumption.field}-${assumption.method}`} variant="small">{`${assumption.field}: ${assumption.method} (${assumption.source})`}</Text>
          ))}
        </Stack>
      ) : null}
    </Stack>
  );
}
