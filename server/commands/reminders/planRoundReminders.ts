import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { endsAtOf, inOrder, type RoundState } from '@/server/commands/rounds/roundStates';
import { loadRound } from '@/server/commands/rounds/roundRows';
import type { ReminderKind } from '@/shared/contracts/messages';
import { messageIdFor } from './messageId';
import type { ReminderPlanning } from './planDayReminders';

/** A set's end is of no use later than this [min]: the hose was moved, or the alarm goes. */
const MOVE_GOOD_FOR_MINUTES = 15;
/** Nobody having said anything for so long after a set's end, everybody is asked whether the water still runs [min]. */
export const STILL_ON_AFTER_MINUTES = 15;
/** Water that nobody turned off is worth telling long after [min]. */
const STILL_ON_GOOD_FOR_MINUTES = 12 * 60;

export interface WantedReminder {
  kind: Exclude<ReminderKind, 'morning'>;
  /** Names the set and its end, so that ten more minutes ask for a reminder of their own. */
  subjectKey: string;
  dueAt: Date;
  dropAfter: Date;
}

const later = (instant: Date, minutes: number): Date => new Date(instant.getTime() + minutes * 60_000);

/** What a round as it stands asks to be reminded of; nothing once the water is off. */
export function remindersOfRound(roundId: string, round: RoundState): WantedReminder[] {
  if (round.status === 'ended') {
    return [];
  }
  const running = inOrder(round.sets).filter((set) => set.status === 'running');
  const wanted: WantedReminder[] = [];
  for (const set of running) {
    const endsAt = endsAtOf(set);
    if (endsAt === null) {
      continue;
    }
    const subjectKey = `${roundId}/${set.id}/${endsAt.getTime()}`;
    const hasNext = round.sets.some((other) => other.tapId === set.tapId && other.status === 'waiting');
    wanted.push({ kind: hasNext ? 'move' : 'water_off', subjectKey, dueAt: endsAt, dropAfter: later(endsAt, MOVE_GOOD_FOR_MINUTES) });
    if (!set.endsByItself) {
      wanted.push(stillOn(subjectKey, endsAt));
    }
  }
  if (running.length === 0) {
    const endedMs = round.sets.flatMap((set) => (set.endedAt === null ? [] : [set.endedAt.getTime()]));
    const last = new Date(Math.max(...endedMs));
    wanted.push(stillOn(`${roundId}/nothing-runs/${last.getTime()}`, last));
  }
  return wanted;
}

function stillOn(subjectKey: string, endedAt: Date): WantedReminder {
  const dueAt = later(endedAt, STILL_ON_AFTER_MINUTES);
  return { kind: 'still_on', subjectKey, dueAt, dropAfter: later(dueAt, STILL_ON_GOOD_FOR_MINUTES) };
}

/** Brings the reminders of a round in line with how it stands, in the transaction that changes it. What was sent stays sent. */
export async function planRoundReminders({ app, yardId, now }: ReminderPlanning, roundId: string): Promise<void> {
  const { database } = app;
  const stored = await loadRound(database, yardId, roundId);
  const wanted = stored === null ? [] : remindersOfRound(roundId, stored.state);
  await database.query(
    `UPDATE reminders SET status = 'cancelled', updated_at = $3 WHERE yard_id = $1 AND kind <> 'morning' AND starts_with(subject_key, $2) AND status = 'waiting'
       AND NOT (kind || ' ' || subject_key = ANY($4::text[]))`,
    { bind: [yardId, `${roundId}/`, now, wanted.map((reminder) => `${reminder.kind} ${reminder.subjectKey}`)], type: QueryTypes.UPDATE },
  );
  if (wanted.length === 0) {
    return;
  }
  const members = await database.query<{ userId: string }>(
    'SELECT user_id AS "userId" FROM memberships WHERE yard_id = $1 AND wants_move_email ORDER BY user_id', { bind: [yardId], type: QueryTypes.SELECT },
  );
  for (const reminder of wanted) {
    for (const { userId } of members) {
      const id = randomUUID();
      await database.query(
        `INSERT INTO reminders (id, yard_id, user_id, kind, subject_key, due_at, drop_after, status, message_id, created_at, updated_at)
         VALUES ($1, $2, $3, $4, $5, $6, $7, 'waiting', $8, $9, $9)
         ON CONFLICT (yard_id, user_id, kind, subject_key) DO UPDATE SET status = 'waiting', updated_at = excluded.updated_at WHERE reminders.status = 'cancelled'`,
        { bind: [id, yardId, userId, reminder.kind, reminder.subjectKey, reminder.dueAt, reminder.dropAfter, messageIdFor(app, id), now], type: QueryTypes.INSERT },
      );
    }
  }
}
