import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatClock } from '@/shared/display';
import { weekdays } from './weekdays';

/** When somebody is at home, weekday by weekday. */
export function HoursSummary({ yard }: { yard: YardResponse }): ReactElement {
  const isDefault = yard.hours.length > 0 && yard.hours.every((window) => window.isDefault);
  return (
    <Card padding={20} gap={8}>
      <Text variant="heading3" level={2}>Hours at home</Text>
      {isDefault ? <Tag label="Default, common practice" /> : null}
      <dl className="v-hours">
        {weekdays.map(({ day, name }) => {
          const windows = yard.hours.filter((window) => window.weekday === day).sort((a, b) => a.fromMinutes - b.fromMinutes);
          return (
            <div key={day}>
              <dt>{name}</dt>
              <dd>{windows.length === 0 ? 'nobody' : windows.map((window) => `${formatClock(window.fromMinutes, yard.units)} to ${formatClock(window.toMinutes, yard.units)}`).join(', ')}</dd>
            </div>
          );
        })}
      </dl>
      {yard.abilities['facts.edit'] ? <TextLink kind="standalone" href={`/yards/${yard.id}/hours` as Href}>Change the hours</TextLink> : null}
    </Card>
  );
}
