import { randomUUID } from 'node:crypto';
import { EventRow } from '@/server/models';

export interface EventFacts {
  yardId: string | null;
  userId: string | null;
  /** What happened, as verb and noun: 'zone.created', 'round.started', 'proposal.accepted'. */
  verb: string;
  subjectKind: string;
  subjectId: string | null;
  /** Plain data that the history shows: names, numbers in SI, before and after. Never a secret. */
  data: Record<string, unknown>;
}

/** Adds one line to the trail, in the transaction of the change it tells of. */
export async function recordEvent(facts: EventFacts, now: Date): Promise<void> {
  await EventRow.create({ id: randomUUID(), ...facts, at: now });
}
