import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { usePlanVersions } from '@/components/data/useWishes';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Row } from '@/components/ui/Row';
import { Skeleton } from '@/components/ui/Skeleton';
import { Text } from '@/components/ui/Text';
import type { YardResponse } from '@/shared/contracts/yards';
import { historySentence } from '@/shared/historyWords';
import { instantText } from '@/shared/instantText';
import { DifferenceList } from './Difference';
import { causeText } from './wishWords';

/** How the plan came to be what it is: its versions, what made each, and what each says differently. */
export function VersionsCard({ yard, todayOn }: { yard: YardResponse; todayOn: string }): ReactElement {
  const [open, setOpen] = useState(false);
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>How the plan changed</Text>
      {open ? <Versions yard={yard} todayOn={todayOn} /> : (
        <>
          <Text>The plan is made anew every night at three, and at once when something changes.</Text>
          <Row><Button size="small" label="Show what changed and why" onPress={() => setOpen(true)} /></Row>
        </>
      )}
    </Card>
  );
}

function Versions({ yard, todayOn }: { yard: YardResponse; todayOn: string }): ReactElement {
  const versions = usePlanVersions(yard.id);
  if (versions.error && !versions.data) {
    return <Text>{errorMessage(versions.error)}</Text>;
  }
  if (!versions.data) {
    return <Skeleton label="Loading the versions" lines={4} />;
  }
  return (
    <ol className="p-versions">
      {versions.data.versions.map((version) => (
        <li key={version.version}>
          <Text variant="label">{`${causeText(version.cause)}, ${instantText(version.createdAt, yard.timeZone, yard.units)}`}</Text>
          {version.events.map((event) => <Text key={event.id} variant="small">{`${historySentence(event, yard)}${event.person ? `, ${event.person.name}` : ''}.`}</Text>)}
          {version.difference.added.length + version.difference.dropped.length + version.difference.changed.length === 0 ? <Text variant="small">No set changed.</Text> : <DifferenceList yard={yard} todayOn={todayOn} difference={version.difference} />}
        </li>
      ))}
    </ol>
  );
}
