import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { LinkButton } from '@/components/ui/LinkButton';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { Reason } from '@/scheduling/planning/types';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth } from '@/shared/display';
import { reasonText } from '@/shared/reasons';
import { needText, type PortfolioYard } from './needWords';
import { RootZoneSpark } from './RootZoneSpark';

/** The chosen yard beside the list: how it stands and where to go on. */
export function YardDetail({ yard, units }: { yard: PortfolioYard; units: UnitSystem }): ReactElement {
  const last = yard.rootZone[yard.rootZone.length - 1];
  const to = (part: string): Href => `/yards/${yard.yardId}/${part}` as Href;
  return (
    <Card padding={20} gap={16}>
      <Stack gap={4}>
        <Text variant="heading2">{yard.name}</Text>
        <Text color="inkSoft">{[yard.placeName, yard.owners.length > 0 ? `of ${yard.owners.join(' and ')}` : ''].filter(Boolean).join(' · ')}</Text>
      </Stack>
      {yard.need ? <Tag label={needText(yard.need, units)} tone={yard.need.urgent ? 'dry' : 'seed'} /> : <Text>{yard.note === null ? 'On track.' : reasonText(yard.note as Reason, units)}</Text>}
      {yard.rootZone.length > 1 ? (
        <figure className="y-figure">
          <RootZoneSpark yard={yard} wide />
          <figcaption>{`Water in the root zone of ${yard.rootZoneName ?? 'the driest zone'} over fourteen days, full at the top; its refill line is dashed.`}</figcaption>
        </figure>
      ) : null}
      {last ? <Text>{`${yard.rootZoneName ?? 'The driest zone'} is expected to be ${formatDepth(last.depletionMm, units)} short tonight; its refill line is ${formatDepth(last.refillLineMm, units)}.`}</Text> : null}
      <Text color="inkSoft">{yard.setsPlanned === 0 ? 'No set was planned in the last fourteen days.' : `${yard.setsDone} of ${yard.setsPlanned} sets of the last fourteen days were done.`}</Text>
      {yard.seededZones.map((zone) => (
        <Row key={zone.zoneId} gap={8}>
          <Tag label={`Day ${zone.dayNumber}`} tone="seed" />
          <TextLink kind="standalone" href={to(`zones/${zone.zoneId}/establishment`)}>{`${zone.name}: doses and stages`}</TextLink>
        </Row>
      ))}
      <Row>
        <LinkButton kind="hose" label="Open the yard" href={to('today')} />
        <LinkButton label="Water budget" href={to('water')} />
        {yard.openProposals > 0 ? <LinkButton label="Proposals" href={to('proposals')} /> : null}
      </Row>
    </Card>
  );
}
