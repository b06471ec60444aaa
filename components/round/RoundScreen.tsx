import { useEffect, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { noteServerNow } from '@/components/data/now';
import { useRound } from '@/components/data/useRound';
import { useYard } from '@/components/data/useYard';
import { ErrorState } from '@/components/ui/ErrorState';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { RoundSummary } from './RoundSummary';
import { RunningRound } from './RunningRound';

/** A round while it runs, and what it came to once the water is off. */
export function RoundScreen({ yardId, roundId }: { yardId: string; roundId: string }): ReactElement {
  const round = useRound(yardId, roundId);
  const yard = useYard(yardId);
  const now = round.data?.now;
  useEffect(() => {
    if (now !== undefined) {
      noteServerNow(now);
    }
  }, [now]);
  // A round that was shown stays shown when the connection goes: the countdown needs no signal.
  if ((round.error && !round.data) || (yard.error && !yard.data)) {
    return (
      <Screen title="Round" width="form">
        <ErrorState title="The round could not be loaded" detail={errorMessage(round.error ?? yard.error)} kept="If water is running, it runs on: close the tap by hand when the set is over."
          retrying={round.isFetching} onRetry={() => void Promise.all([round.refetch(), yard.refetch()])} />
      </Screen>
    );
  }
  if (!round.data || !yard.data) {
    return <Screen title="Round" width="form"><Skeleton label="Loading the round" height={420} /></Screen>;
  }
  return round.data.status === 'running'
    ? <RunningRound round={round.data} yard={yard.data} offline={round.error !== null} />
    : <RoundSummary round={round.data} yard={yard.data} />;
}
