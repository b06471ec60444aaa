import { keys } from '@/components/data/keys';
import { useWrite } from '@/components/data/useApi';

interface Fact { path: string; id: string | null; body: unknown }

/** Adds or changes one fact of a yard: a zone, tap, hose, sprinkler, position or rule. Budget and plan follow. */
export function useSaveFact(yardId: string) {
  return useWrite<unknown, Fact>(
    ({ path, id, body }) => ({ method: id === null ? 'POST' : 'PATCH', path: `/yards/${yardId}/${path}${id === null ? '' : `/${id}`}`, body }),
    { stale: [keys.yard(yardId), keys.yards, keys.portfolio] },
  );
}

/** Takes one fact out of use. */
export function useRemoveFact(yardId: string) {
  return useWrite<unknown, { path: string; id: string }>(
    ({ path, id }) => ({ method: 'DELETE', path: `/yards/${yardId}/${path}/${id}` }),
    { stale: [keys.yard(yardId), keys.yards, keys.portfolio] },
  );
}
