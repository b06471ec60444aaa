import type { CreateLockRequest, PlanVersionsResponse, PutDayChangeRequest, PutWishesRequest, WhatIfRequest, WhatIfResponse, WishesResponse } from '@/shared/contracts/wishes';
import { keys } from './keys';
import { useRead, useWrite } from './useApi';

export function useWishes(yardId: string) {
  return useRead<WishesResponse>(keys.wishes(yardId), `/yards/${yardId}/wishes`);
}

export function usePutWishes(yardId: string) {
  return useWrite<WishesResponse, PutWishesRequest>((body) => ({ method: 'PUT', path: `/yards/${yardId}/wishes`, body }), { stale: [keys.yard(yardId)] });
}

export function usePutDayChange(yardId: string) {
  return useWrite<WishesResponse, PutDayChangeRequest & { on: string }>(({ on, ...body }) => ({ method: 'PUT', path: `/yards/${yardId}/days/${on}`, body }), { stale: [keys.yard(yardId)] });
}

export function useLockSet(yardId: string) {
  return useWrite<WishesResponse, CreateLockRequest>((body) => ({ method: 'POST', path: `/yards/${yardId}/locks`, body }), { stale: [keys.yard(yardId)] });
}

export function useUnlockSet(yardId: string) {
  return useWrite<WishesResponse, { lockId: string }>(({ lockId }) => ({ method: 'DELETE', path: `/yards/${yardId}/locks/${lockId}` }), { stale: [keys.yard(yardId)] });
}

/** Weighs changes; nothing is kept, so nothing becomes stale. */
export function useWhatIf(yardId: string) {
  return useWrite<WhatIfResponse, WhatIfRequest>((body) => ({ method: 'POST', path: `/yards/${yardId}/plan/what-if`, body }));
}

export function useKeepChanges(yardId: string) {
  return useWrite<{ done: true }, WhatIfRequest>((body) => ({ method: 'POST', path: `/yards/${yardId}/plan/changes`, body }), { stale: [keys.yard(yardId)] });
}

export function usePlanVersions(yardId: string) {
  return useRead<PlanVersionsResponse>(keys.planVersions(yardId), `/yards/${yardId}/plan/versions`);
}
