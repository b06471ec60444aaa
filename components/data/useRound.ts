import { useQueryClient } from '@tanstack/react-query';
import type { RoundActionRequest, RoundResponse, StartRoundRequest } from '@/shared/contracts/rounds';
import { keys } from './keys';
import { noteServerNow } from './now';
import { useRead, useWrite } from './useApi';

/** A round that runs or has run; asked again often, since somebody else may move the hose. */
export function useRound(yardId: string, roundId: string) {
  return useRead<RoundResponse>(keys.round(yardId, roundId), `/yards/${yardId}/rounds/${roundId}`, { everyMs: 10_000 });
}

function useShowRound(yardId: string) {
  const client = useQueryClient();
  return (round: RoundResponse) => {
    noteServerNow(round.now);
    client.setQueryData(keys.round(yardId, round.id), round);
  };
}

/** Starts a round; the id is made by the caller so that a second tap starts the same one. */
export function useStartRound(yardId: string) {
  const show = useShowRound(yardId);
  return useWrite<RoundResponse, StartRoundRequest>(
    (body) => ({ method: 'POST', path: `/yards/${yardId}/rounds`, body }),
    { stale: [keys.today(yardId)], onDone: show },
  );
}

/** Moved, more minutes, cut short, skip, water off. */
export function useRoundAction(yardId: string, roundId: string) {
  const show = useShowRound(yardId);
  return useWrite<RoundResponse, RoundActionRequest>(
    (body) => ({ method: 'POST', path: `/yards/${yardId}/rounds/${roundId}/actions`, body }),
    { stale: [keys.today(yardId), keys.budget(yardId), keys.plan(yardId), keys.rounds(yardId)], onDone: show },
  );
}
