import type { ReactElement } from 'react';
import { DataTable, type Column } from '@/components/ui/DataTable';
import type { FitMonthResponse } from '@/shared/contracts/fit';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth, formatVolume } from '@/shared/display';
import { isShort, monthHours, monthName, yearRange } from './monthFitWords';

/** The months in numbers. */
export function MonthTable({ months, units }: { months: readonly FitMonthResponse[]; units: UnitSystem }): ReactElement {
  const columns: Column<FitMonthResponse>[] = [
    { header: 'Month', cell: (month) => `${monthName(month.month)} ${month.month.slice(0, 4)}` },
    { header: 'Needed [h]', align: 'right', cell: (month) => monthHours(month.neededHours) },
    { header: 'Wet to dry year [h]', align: 'right', cell: yearRange },
    { header: 'Of it moves [h]', align: 'right', cell: (month) => monthHours(month.moveHours) },
    ...(months.some((month) => month.doseHours > 0) ? [{ header: 'Of it for new seed [h]', align: 'right' as const, cell: (month: FitMonthResponse) => monthHours(month.doseHours) }] : []),
    { header: 'Had [h]', align: 'right', cell: (month) => monthHours(month.hadHours) },
    { header: 'Lacking [h]', align: 'right', cell: (month) => (isShort(month) ? monthHours(month.shortHours) : 'none') },
    { header: 'Water', align: 'right', cell: (month) => formatVolume(month.litres, units) },
    { header: 'Reference ET', align: 'right', cell: (month) => formatDepth(month.et0Mm, units) },
    { header: 'Rain', align: 'right', cell: (month) => (month.isEstimated ? `${formatDepth(month.rainMm, units)} known` : formatDepth(month.rainMm, units)) },
  ];
  return <DataTable caption="Hose-hours of the coming twelve months" columns={columns} rows={months} rowKey={(month) => month.month} empty={null} />;
}
