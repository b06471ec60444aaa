import { useInfiniteQuery } from '@tanstack/react-query';
import type { ReactElement } from 'react';
import { send } from '@/components/data/apiClient';
import { errorMessage, type ApiError } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useYard } from '@/components/data/useYard';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { HistoryResponse, YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatClock } from '@/shared/display';
import { civilDayAt, minutesAt } from '@/shared/time';
import { historySentence } from '@/shared/historyWords';

/** Who did what in the yard, newest first. */
export function HistoryScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  const pages = useInfiniteQuery<HistoryResponse, ApiError, { pages: HistoryResponse[] }, readonly string[], string | null>({
    queryKey: keys.history(yardId),
    initialPageParam: null,
    queryFn: ({ pageParam, signal }) => send<HistoryResponse>('GET', `/yards/${yardId}/history${pageParam === null ? '' : `?before=${encodeURIComponent(pageParam)}`}`, { signal }),
    getNextPageParam: (last) => last.nextBefore,
  });
  const failed = yard.error ?? pages.error;
  if (failed) {
    return (
      <Screen title="History">
        <ErrorState title="The history could not be loaded" detail={errorMessage(failed)} onRetry={() => void Promise.all([yard.refetch(), pages.refetch()])} />
      </Screen>
    );
  }
  if (!yard.data || !pages.data) {
    return <Screen title="History"><Skeleton label="Loading the history" lines={8} /></Screen>;
  }
  const entries = pages.data.pages.flatMap((page) => page.entries);
  return (
    <Screen title="History" headline="Who did what, and when" kicker={yard.data.name} width="text">
      <Stack gap={16}>
        {entries.length === 0 ? <EmptyState title="Nothing yet">What people do in this yard is written here.</EmptyState> : <Entries entries={entries} yard={yard.data} />}
        {pages.hasNextPage ? <Button label="Older entries" pending={pages.isFetchingNextPage} onPress={() => void pages.fetchNextPage()} /> : null}
      </Stack>
    </Screen>
  );
}

function Entries({ entries, yard }: { entries: HistoryResponse['entries']; yard: YardResponse }): ReactElement {
  const days = new Map<string, HistoryResponse['entries']>();
  for (const entry of entries) {
    const on = civilDayAt(new Date(entry.at), yard.timeZone);
    days.set(on, [...(days.get(on) ?? []), entry]);
  }
  return (
    <>
      {[...days].map(([on, ofDay]) => (
        <Card key={on} padding={20} gap={12}>
          <Text variant="heading3" level={2}>{formatCivilDay(on, 'long')}</Text>
          {ofDay.map((entry) => (
            <Stack key={entry.id} gap={4}>
              <Text>{historySentence(entry, yard)}</Text>
              <Text variant="small">{`${entry.person?.name ?? 'Dapple'} · ${formatClock(minutesAt(new Date(entry.at), yard.timeZone), yard.units)}`}</Text>
            </Stack>
          ))}
        </Card>
      ))}
    </>
  );
}
