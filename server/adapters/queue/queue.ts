/** Jobs that the queue knows; each payload is plain data. */
export interface JobPayloads {
  /** Fetch weather, bring the budget up to date and plan one yard for one civil day. */
  daily_run: { yardId: string; on: string };
  /** Bring budget and plan of one yard up to its newest facts. */
  refresh: { yardId: string };
  /** Send one reminder that is due. */
  reminder: { reminderId: string };
  /** Send one mail of the outbox. */
  mail: { mailId: string };
}

export type JobName = keyof JobPayloads;
export const jobNames: readonly JobName[] = ['daily_run', 'refresh', 'reminder', 'mail'];

/** A job queue kept in PostgreSQL, so that an accepted job survives a killed server. Jobs may run twice and must bear it. */
export interface Queue {
  /** Adds a job unless one with the same key waits already. */
  enqueue<N extends JobName>(name: N, payload: JobPayloads[N], key: string): Promise<void>;
  /** Takes jobs of one name until the queue is stopped. */
  work<N extends JobName>(name: N, handler: (payload: JobPayloads[N]) => Promise<void>): Promise<void>;
  start(): Promise<void>;
  stop(): Promise<void>;
}
