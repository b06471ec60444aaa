import type { TodayResponse } from '@/shared/contracts/rounds';
import { keys } from './keys';
import { useRead } from './useApi';

/** What is to do today; asked again every half minute while the screen is up. */
export function useToday(yardId: string) {
  return useRead<TodayResponse>(keys.today(yardId), `/yards/${yardId}/today`, { everyMs: 30_000 });
}
