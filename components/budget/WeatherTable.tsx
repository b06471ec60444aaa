import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { TableScroll } from '@/components/ui/TableScroll';
import { Text } from '@/components/ui/Text';
import type { WeatherResponse } from '@/shared/contracts/water';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatDepth, formatTemperature } from '@/shared/display';
import { instantText } from '@/shared/instantText';

type Day = WeatherResponse['days'][number];

/** The days ahead as the plan counts them. A table on a phone too: four short columns say more side by side than as eleven cards. */
export function WeatherTable({ weather, yard, today }: { weather: WeatherResponse; yard: YardResponse; today: string }): ReactElement {
  const { units } = yard;
  const days = weather.days.filter((day) => day.on >= today);
  const asOf = weather.asOf === null ? null : instantText(weather.asOf, yard.timeZone, units);
  const range = (day: Day) => (day.tminC === null || day.tmaxC === null ? '–' : `${formatTemperature(day.tminC, units).replace(/\s?°.*/, '')} to ${formatTemperature(day.tmaxC, units)}`);
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Weather ahead</Text>
      {days.length === 0 ? <Text color="inkSoft">No weather yet. It is asked for with the first plan.</Text> : (
        <TableScroll label="Weather of the coming days" className="w-weather">
          <table className="d-table">
            <caption className="d-hidden">Weather of the coming days</caption>
            <thead>
              <tr>
                <th scope="col">Day</th>
                <th scope="col" data-align="right">Low, high</th>
                <th scope="col" data-align="right">Rain</th>
                <th scope="col" data-align="right">Reference ET</th>
              </tr>
            </thead>
            <tbody>
              {days.map((day) => (
                <tr key={day.on}>
                  <th scope="row"><span className="w-nowrap">{formatCivilDay(day.on, 'short').replace(/ \w+$/, '')}</span></th>
                  <td data-align="right">{range(day)}</td>
                  <td data-align="right">{day.precipitationMm === null ? '–' : day.precipitationMm < 0.1 ? 'none' : formatDepth(day.precipitationMm, units)}</td>
                  <td data-align="right">{day.et0Mm === null ? '–' : formatDepth(day.et0Mm, units)}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </TableScroll>
      )}
      <Text variant="small">{`${weather.source ?? 'No source yet'}${asOf === null ? '' : `, as of ${asOf}`}${weather.stale ? '. The service does not answer just now' : ''}.`}</Text>
    </Card>
  );
}
