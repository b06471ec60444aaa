import type { AppContext } from '@/server/context';

/** What every command gets from the request that asks for it. */
export interface CommandContext {
  app: AppContext;
  now: Date;
  /** Remembers work for after the commit and the answer, such as a mail; it is not done when the request fails. */
  afterCommit(effect: () => Promise<void>): void;
}
