import type { AppContext } from '@/server/context';

/** Who changes a round, and when. */
export interface RoundChange {
  app: AppContext;
  yardId: string;
  userId: string;
  now: Date;
}
