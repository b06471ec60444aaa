import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatClock } from '@/shared/display';
import { weekdays } from './weekdays';

/** Neighbouring weekdays with the same hours stand in one line. */
function alikeDays(yard: YardResponse): { from: string; to: string; words: string[] }[] {
  const found: { from: string; to: string; words: string[] }[] = [];
  for (const { day, name } of weekdays) {
    const words = yard.hours.filter((window) => window.weekday === day).sort((a, b) => a.fromMinutes - b.fromMinutes)
      .map((window) => `${formatClock(window.fromMinutes, yard.units)} to ${formatClock(window.toMinutes, yard.units)}`);
    const last = found.at(-1);
    if (last && last.words.join() === words.join()) {
      last.to = name;
    } else {
      found.push({ from: name, to: name, words });
    }
  }
  return found;
}

/** When somebody is at home, through the week. */
export function HoursSummary({ yard }: { yard: YardResponse }): ReactElement {
  const isDefault = yard.hours.length > 0 && yard.hours.every((window) => window.isDefault);
  return (
    <Card padding={20} gap={8}>
      <Text variant="heading3" level={2}>Hours at home</Text>
      {isDefault ? <Tag label="Default, common practice" /> : null}
      <dl className="v-hours">
        {alikeDays(yard).map(({ from, to, words }) => (
          <div key={from}>
            <dt>{from === to ? from : `${from} to ${to}`}</dt>
            <dd>{words.length === 0 ? 'nobody' : words.map((window) => <span key={window}>{window}</span>)}</dd>
          </div>
        ))}
      </dl>
      {yard.abilities['facts.edit'] ? <TextLink kind="standalone" href={`/yards/${yard.id}/hours` as Href}>Change the hours</TextLink> : null}
      <TextLink kind="standalone" href={`/yards/${yard.id}/fit` as Href}>Does the year fit?</TextLink>
    </Card>
  );
}
