import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import type { ProposalListResponse } from '@/shared/contracts/proposals';
import { capital, counted } from '@/shared/roundWords';
import { ProposalCard } from './ProposalCard';

/** Every proposal of a yard with its reason and answer, newest first. */
export function ProposalsScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  const list = useRead<ProposalListResponse>(keys.proposals(yardId), `/yards/${yardId}/proposals`);
  const failed = yard.error ?? list.error;
  if (failed) {
    return (
      <Screen title="Proposals">
        <ErrorState title="The proposals could not be loaded" detail={errorMessage(failed)} onRetry={() => void Promise.all([yard.refetch(), list.refetch()])} retrying={list.isFetching} />
      </Screen>
    );
  }
  if (!yard.data || !list.data) {
    return <Screen title="Proposals"><Skeleton label="Loading the proposals" height={280} /></Screen>;
  }
  const { data } = yard;
  const open = list.data.proposals.filter((proposal) => proposal.status === 'open').length;
  return (
    <Screen title="Proposals" headline={open === 0 ? 'No proposal waits.' : `${capital(counted(open, 'proposal'))} waiting for an answer.`} kicker={data.name} width="text">
      <Stack gap={20}>
        {list.data.proposals.length === 0 ? (
          <EmptyState title="No proposal yet">A consultant proposes other doses from the page of a seeded zone. The owner’s answer is kept here with its reason.</EmptyState>
        ) : list.data.proposals.map((proposal) => <ProposalCard key={proposal.id} yard={data} proposal={proposal} />)}
      </Stack>
    </Screen>
  );
}
