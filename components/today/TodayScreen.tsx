import { useEffect, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { noteServerNow } from '@/components/data/now';
import { useToday } from '@/components/data/useToday';
import { useYard } from '@/components/data/useYard';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { TodayResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay } from '@/shared/display';
import { instantText } from '@/shared/instantText';
import { NextRound } from './NextRound';
import { SetUpSteps } from './SetUpSteps';
import { Timeline } from './Timeline';
import { weatherLine } from './weatherLine';
import { ZonesWithout } from './ZonesWithout';

/** What to do today: the next round with its reason, the day's sets and moves, and what will not happen. */
export function TodayScreen({ yardId }: { yardId: string }): ReactElement {
  const today = useToday(yardId);
  const yard = useYard(yardId);
  const now = today.data?.now;
  useEffect(() => {
    if (now !== undefined) {
      noteServerNow(now);
    }
  }, [now]);
  const failed = today.error ?? yard.error;
  if (failed) {
    return (
      <Screen title="Today">
        <ErrorState title="Today’s plan could not be loaded" detail={errorMessage(failed)} retrying={today.isFetching || yard.isFetching}
          onRetry={() => void Promise.all([today.refetch(), yard.refetch()])} />
      </Screen>
    );
  }
  if (!today.data || !yard.data) {
    return (
      <Screen title="Today">
        <Stack gap={16}>
          <Skeleton label="Loading today’s plan" height={220} />
          <Skeleton label="Loading the day’s sets" lines={4} />
        </Stack>
      </Screen>
    );
  }
  return <Today today={today.data} yard={yard.data} />;
}

function Today({ today, yard }: { today: TodayResponse; yard: YardResponse }): ReactElement {
  const weather = weatherLine(today, yard.units);
  const nothingToWater = yard.zones.length === 0;
  return (
    <Screen title="Today" headline={formatCivilDay(today.today)} kicker={yard.name} aside={weather}>
      <div className="t-columns">
        <Stack gap={20}>
          {nothingToWater ? (
            <EmptyState title="No zone yet" action={<LinkButton kind="sun" label="Set up this yard" href={`/yards/${yard.id}/set-up`} />}>
              A tap, a sprinkler and the size of one zone are enough for a first plan.
            </EmptyState>
          ) : <NextRound today={today} yard={yard} />}
          {today.openProposals > 0 && yard.abilities['proposal.decide'] ? (
            <Notice tone="seed" title="A change waits for your answer" actions={<TextLink kind="standalone" href={`/yards/${yard.id}/proposals`}>Read and answer</TextLink>}>
              Your consultant proposes other doses for seeded ground.
            </Notice>
          ) : null}
          <Timeline today={today} yard={yard} />
        </Stack>
        <Stack gap={20}>
          <ZonesWithout today={today} yard={yard} />
          {nothingToWater ? null : <SetUpSteps yard={yard} today={today} />}
          {today.weather?.sample ? (
            <Text variant="small">Sample weather: recorded days of 2012 to 2015, moved to this date. Not a forecast.</Text>
          ) : null}
          {today.weather?.stale ? (
            <Notice tone="info" title="Weather is out">{`The weather service does not answer. The plan rests on what it said ${today.weather.asOf === null ? 'before, which is nothing yet' : `on ${instantText(today.weather.asOf, yard.timeZone, yard.units)}`}. Dapple asks again by itself.`}</Notice>
          ) : null}
        </Stack>
      </div>
    </Screen>
  );
}
