import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useYard } from '@/components/data/useYard';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Text } from '@/components/ui/Text';
import { formatFlow } from '@/shared/display';
import { BucketForm } from './BucketForm';
import { BucketHistory } from './BucketHistory';

/** One tap: what it gives, a bucket test, and its earlier ones. */
export function TapScreen({ yardId, tapId }: { yardId: string; tapId: string }): ReactElement {
  const yard = useYard(yardId);
  if (yard.error) {
    return <Screen title="Tap"><ErrorState title="The yard could not be loaded" detail={errorMessage(yard.error)} onRetry={() => void yard.refetch()} retrying={yard.isFetching} /></Screen>;
  }
  if (!yard.data) {
    return <Screen title="Tap"><Skeleton label="Loading the tap" height={400} /></Screen>;
  }
  const tap = yard.data.taps.find(({ id }) => id === tapId);
  if (!tap) {
    return (
      <Screen title="Tap" headline="This tap is not in use." width="form">
        <Text>It may have been taken out of use since the link was made.</Text>
        <LinkButton label="Go to the yard" href={`/yards/${yardId}/yard` as Href} />
      </Screen>
    );
  }
  const flow = formatFlow(tap.flowLpm, yard.data.units);
  const headline = tap.flowIsDefault ? `What does it give? ${flow} is a default.` : `It gives ${flow}.`;
  return (
    <Screen title={tap.name} headline={headline} kicker={`${yard.data.name} · ${tap.name}`}>
      <div className="b-columns">
        {yard.data.abilities['tests.record'] ? <BucketForm key={tap.id} yard={yard.data} tap={tap} /> : null}
        <BucketHistory yard={yard.data} tap={tap} />
      </div>
    </Screen>
  );
}
