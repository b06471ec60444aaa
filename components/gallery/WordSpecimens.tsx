import Sprout from 'lucide-react-native/icons/sprout';
import type { ReactElement } from 'react';
import { Section } from '@/components/gallery/Section';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { ProgressBar } from '@/components/ui/ProgressBar';
import { Row } from '@/components/ui/Row';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';

/** Short labels, messages, waiting, nothing there. */
export function WordSpecimens(): ReactElement {
  return (
    <>
      <Section title="Tags">
        <Row>
          <Tag label="On track" />
          <Tag tone="hose" label="Done by 7:25" />
          <Tag tone="water" label="Watered today" />
          <Tag tone="dry" label="Seeded strip drying by 3 pm" />
          <Tag tone="seed" label="Day 9" icon={Sprout} />
          <Tag tone="shade" label="54% of open-sky demand" />
        </Row>
      </Section>
      <Section title="Notices">
        <Stack>
          <Notice>Sample weather: the daily records of Seattle, moved to this month.</Notice>
          <Notice tone="water" title="Move 11 ft, not 16">Overlapping two positions 11 ft apart lifts the low quarter from 0.64 to 0.79.</Notice>
          <Notice tone="seed">Day 6 of about 10 until it is up.</Notice>
          <Notice tone="caution">A hose across the walk is a trip hazard. Mark it, or ask whoever comes home late to use the other door.</Notice>
          <Notice tone="problem" announce={false} actions={<Button size="small" label="Send it again" />}>The reminder to Ana could not be delivered.</Notice>
        </Stack>
      </Section>
      <Section title="Toasts">
        <Row>
          <Button label="Say that it went well" onPress={() => void showToast({ message: 'Saved. The plan is new from Tuesday.' })} />
          <Button label="Say that it failed" onPress={() => void showToast({ tone: 'problem', message: 'Not saved: no connection. Your entry is still here.', action: { label: 'Try again', onPress: () => undefined } })} />
        </Row>
      </Section>
      <Section title="Waiting">
        <Card>
          <Skeleton label="Loading the plan" />
          <Skeleton label="Loading the chart" height={80} />
          <ProgressBar label="Days planned" value={3} max={10} valueText="3 of 10 days" />
          <ProgressBar label="Hose-hours used" value={82} color="water" />
        </Card>
      </Section>
      <Section title="Nothing there, and what failed">
        <Card>
          <EmptyState level={3} title="No catch-cup test yet" action={<LinkButton kind="hose" label="Try the cup test" href="/cup-test" />}>
            Nine cups and half an hour tell how much your sprinkler really applies.
          </EmptyState>
        </Card>
        <ErrorState title="The plan could not be loaded" detail="The server did not answer." onRetry={() => undefined} />
        <Text variant="small">Trying again shows the button at work:</Text>
        <ErrorState title="The plan could not be loaded" onRetry={() => undefined} retrying />
      </Section>
    </>
  );
}
