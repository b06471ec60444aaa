import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { DataTable } from '@/components/ui/DataTable';
import { Text } from '@/components/ui/Text';
import type { WeatherResponse } from '@/shared/contracts/water';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatDepth, formatTemperature } from '@/shared/display';
import { instantText } from '@/shared/instantText';

type Day = WeatherResponse['days'][number];

/** The days ahead as the plan counts them. */
export function WeatherTable({ weather, yard, today }: { weather: WeatherResponse; yard: YardResponse; today: string }): ReactElement {
  const days = weather.days.filter((day) => day.on >= today);
  const asOf = weather.asOf === null ? null : instantText(weather.asOf, yard.timeZone, yard.units);
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Weather ahead</Text>
      <div className="w-weather"><DataTable<Day>
        caption="Weather of the coming days"
        rows={days}
        rowKey={(day) => day.on}
        empty={<Text color="inkSoft">No weather yet. It is asked for with the first plan.</Text>}
        columns={[
          { header: 'Day', cell: (day) => <span className="w-nowrap">{formatCivilDay(day.on, 'short').replace(/ \w+$/, '')}</span> },
          { header: 'Low, high', align: 'right', cell: (day) => (day.tminC === null || day.tmaxC === null ? '–' : `${formatTemperature(day.tminC, yard.units).replace(/\s?°.*/, '')} to ${formatTemperature(day.tmaxC, yard.units)}`) },
          { header: 'Rain', align: 'right', cell: (day) => (day.precipitationMm === null ? '–' : day.precipitationMm < 0.1 ? 'none' : formatDepth(day.precipitationMm, yard.units)) },
          { header: 'Reference ET', align: 'right', cell: (day) => (day.et0Mm === null ? '–' : formatDepth(day.et0Mm, yard.units)) },
        ]}
      /></div>
      <Text variant="small">{`${weather.source ?? 'No source yet'}${asOf === null ? '' : `, as of ${asOf}`}${weather.stale ? '. The service does not answer just now' : ''}.`}</Text>
    </Card>
  );
}
