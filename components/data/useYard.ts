import type { YardListResponse, YardResponse } from '@/shared/contracts/yards';
import { keys } from './keys';
import { useRead } from './useApi';

/** A yard with its taps, hoses, sprinklers, zones, positions, hours, rules and what the reader may do. */
export function useYard(yardId: string) {
  return useRead<YardResponse>(keys.facts(yardId), `/yards/${yardId}`);
}

/** The yards the signed-in person belongs to. */
export function useYards(enabled = true) {
  return useRead<YardListResponse>(keys.yards, '/yards', { enabled });
}
