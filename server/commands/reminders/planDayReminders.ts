import { randomUUID } from 'node:crypto';
import { QueryTypes, type Sequelize } from 'sequelize';
import type { AppContext } from '@/server/context';
import type { Yard } from '@/server/models';
import { plannedDaySets } from '@/server/readModels/plannedDay';
import { messageIdFor } from './messageId';

export interface ReminderPlanning {
  app: AppContext;
  yardId: string;
  now: Date;
}

/**
 * Brings the morning reminders of a yard's civil day in line with its newest plan: one for each member who wants it, some minutes before the first
 * set that nobody has begun. A reminder that was sent stays sent; without a round to come there is none. Its words are made when it is sent.
 */
export async function planDayReminders({ app, yardId, now }: ReminderPlanning, yard: Pick<Yard, 'reminderLeadMinutes'>, on: string): Promise<void> {
  const { database } = app;
  const sets = (await plannedDaySets(database, yardId, on)).filter((set) => !set.begun && set.endAt > now);
  const [first] = sets;
  if (first === undefined || first.startAt <= now) {
    await cancelMorning(database, yardId, on, now);
    return;
  }
  const endOfRoundMs = Math.max(...sets.filter((set) => set.roundIndex === first.roundIndex).map((set) => set.endAt.getTime()));
  const wantedMs = first.startAt.getTime() - yard.reminderLeadMinutes * 60_000;
  const dueAt = new Date(Math.max(wantedMs, now.getTime()));
  const members = await database.query<{ userId: string }>(
    'SELECT user_id AS "userId" FROM memberships WHERE yard_id = $1 AND wants_morning_email ORDER BY user_id', { bind: [yardId], type: QueryTypes.SELECT },
  );
  for (const { userId } of members) {
    const id = randomUUID();
    await database.query(
      // One that is overdue keeps its time: planning again must not hide that it is late.
      `INSERT INTO reminders (id, yard_id, user_id, kind, subject_key, due_at, drop_after, status, message_id, created_at, updated_at)
       VALUES ($1, $2, $3, 'morning', $4, $5, $6, 'waiting', $7, $8, $8)
       ON CONFLICT (yard_id, user_id, kind, subject_key) DO UPDATE SET drop_after = excluded.drop_after, updated_at = excluded.updated_at,
         due_at = CASE WHEN reminders.status = 'waiting' AND reminders.due_at <= excluded.updated_at THEN reminders.due_at ELSE excluded.due_at END,
         status = 'waiting', lease_until = CASE WHEN reminders.status = 'waiting' THEN reminders.lease_until END, attempts = CASE WHEN reminders.status = 'waiting' THEN reminders.attempts ELSE 0 END
       WHERE reminders.status IN ('waiting', 'cancelled') OR (reminders.status = 'dropped' AND excluded.due_at > reminders.drop_after)`,
      { bind: [id, yardId, userId, on, dueAt, new Date(endOfRoundMs), messageIdFor(app, id), now], type: QueryTypes.INSERT },
    );
  }
  await database.query(
    `UPDATE reminders SET status = 'cancelled', updated_at = $3 WHERE yard_id = $1 AND kind = 'morning' AND subject_key = $2 AND status = 'waiting' AND NOT (user_id = ANY($4::uuid[]))`,
    { bind: [yardId, on, now, members.map((member) => member.userId)], type: QueryTypes.UPDATE },
  );
}

async function cancelMorning(database: Sequelize, yardId: string, on: string, now: Date): Promise<void> {
  // One that is overdue is left to be dropped or sent late by rule.
  await database.query(
    `UPDATE reminders SET status = 'cancelled', updated_at = $3 WHERE yard_id = $1 AND kind = 'morning' AND subject_key = $2 AND status = 'waiting' AND due_at > $3`,
    { bind: [yardId, on, now], type: QueryTypes.UPDATE },
  );
}
