import { Redirect } from 'expo-router';
import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead } from '@/components/data/useApi';
import { ErrorState } from '@/components/ui/ErrorState';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import type { YardListResponse } from '@/shared/contracts/yards';

/** Where a person starts: in the only yard, on what there is to do today; with several yards, on their list. */
export function HomeScreen(): ReactElement {
  const yards = useRead<YardListResponse>(keys.yards, '/yards');
  if (yards.error && !yards.data) {
    return (
      <Screen title="Home">
        <ErrorState title="Your yards could not be loaded" detail={errorMessage(yards.error)} onRetry={() => void yards.refetch()} retrying={yards.isFetching} />
      </Screen>
    );
  }
  if (!yards.data) {
    return <Screen title="Home"><Skeleton label="Loading your yards" lines={8} /></Screen>;
  }
  const [first, second] = yards.data.yards;
  return <Redirect href={first !== undefined && second === undefined ? `/yards/${first.id}/today` : '/yards'} />;
}
