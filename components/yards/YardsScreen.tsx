import { useEffect, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { noteServerNow } from '@/components/data/now';
import { keys } from '@/components/data/keys';
import { useRead } from '@/components/data/useApi';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import type { PortfolioResponse } from '@/shared/contracts/proposals';
import { portfolioHeadline } from './needWords';
import { Portfolio } from './Portfolio';

/** All yards a person belongs to, the one that needs somebody first. */
export function YardsScreen({ yardId }: { yardId?: string }): ReactElement {
  const portfolio = useRead<PortfolioResponse>(keys.portfolio, '/portfolio', { everyMs: 60_000 });
  const now = portfolio.data?.now;
  useEffect(() => {
    if (now !== undefined) {
      noteServerNow(now);
    }
  }, [now]);
  if (portfolio.error && !portfolio.data) {
    return (
      <Screen title="Yards">
        <ErrorState title="Your yards could not be loaded" detail={errorMessage(portfolio.error)} onRetry={() => void portfolio.refetch()} retrying={portfolio.isFetching} />
      </Screen>
    );
  }
  if (!portfolio.data) {
    return <Screen title="Yards"><Skeleton label="Loading your yards" lines={8} /></Screen>;
  }
  const { yards } = portfolio.data;
  if (yards.length === 0) {
    return (
      <Screen title="Yards" headline="No yard yet" width="form">
        <EmptyState title="Start with your own" action={<LinkButton kind="sun" label="Set up a yard" href="/yards/new" />}>
          Where it is, a tap, a hose, a sprinkler and the size of the lawn: under five minutes to a first plan. Invited to somebody’s yard? Open the link in that mail.
        </EmptyState>
      </Screen>
    );
  }
  return (
    <Screen title="Yards" headline={portfolioHeadline(yards)} actions={<LinkButton label="Set up another yard" href="/yards/new" />}>
      <Portfolio portfolio={portfolio.data} chosenId={yardId ?? null} />
    </Screen>
  );
}
