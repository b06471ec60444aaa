import { QueryTypes } from 'sequelize';
import type { AppContext } from '@/server/context';
import { reminderMail, type ClaimedReminder } from './reminderMail';

/** How long a claim holds [s]; well above the mail adapter's time limits, so that it does not run out under a living sender. */
const LEASE_SECONDS = 120;
/** Tries before a reminder is given up. */
export const REMINDER_TRIES = 5;
/** Wait after the first failed try [s]; twice as long after each further one. */
const RETRY_SECONDS = 20;
/** A reminder this much after its time says so [min]. */
const LATE_AFTER_MINUTES = 5;

export type ReminderOutcome =
  /** sent: with what, to whom. dropped: too late by rule. cancelled: no longer needed. retry: the mail server did not take it. failed: given up. */
  | { outcome: 'sent'; subject: string; name: string }
  | { outcome: 'dropped' | 'cancelled' | 'retry' | 'failed' }
  /** Not due, done, or in the hands of another server. */
  | { outcome: 'not_mine' };

/**
 * Takes a due reminder for this server: at most one server gets it. A claim whose server went silent is taken over when its lease is over.
 * Leases run on the database's own clock, which is real time for every server, whatever the demonstration's clock is set to.
 */
export async function claimReminder(context: AppContext, reminderId: string): Promise<ClaimedReminder | null> {
  const rows = await context.database.query<ClaimedReminder>(
    `UPDATE reminders SET status = 'claimed', claimed_by = $2, lease_until = clock_timestamp() + $3 * interval '1 second', attempts = attempts + 1, updated_at = $4
     WHERE id = $1 AND due_at <= $4 AND status IN ('waiting', 'claimed') AND (lease_until IS NULL OR lease_until <= clock_timestamp())
     RETURNING id, yard_id AS "yardId", user_id AS "userId", kind, subject_key AS "subjectKey", due_at AS "dueAt", drop_after AS "dropAfter", message_id AS "messageId", attempts`,
    { bind: [reminderId, context.serverId, LEASE_SECONDS, context.clock.now()], type: QueryTypes.SELECT },
  );
  return rows[0] ?? null;
}

/** Sends a due reminder, unless another server has it, it is too late for it, or nobody needs it any more. Not to be called inside a transaction. */
export async function sendReminder(context: AppContext, reminderId: string): Promise<ReminderOutcome> {
  const reminder = await claimReminder(context, reminderId);
  if (reminder === null) {
    return { outcome: 'not_mine' };
  }
  const now = context.clock.now();
  if (now > reminder.dropAfter) {
    await settle(context, reminder, 'dropped');
    return { outcome: 'dropped' };
  }
  const behindMinutes = (now.getTime() - reminder.dueAt.getTime()) / 60_000;
  const lateMinutes = behindMinutes > LATE_AFTER_MINUTES ? behindMinutes : null;
  try {
    const mail = await reminderMail(context, reminder, lateMinutes);
    if (mail === null) {
      await settle(context, reminder, 'cancelled');
      return { outcome: 'cancelled' };
    }
    await context.mailer.send({ to: mail.to, subject: mail.subject, text: mail.text, html: mail.html, messageId: reminder.messageId });
    await settle(context, reminder, 'sent', { sentAt: now, lateMinutes });
    return { outcome: 'sent', subject: mail.subject, name: mail.name };
  } catch (error) {
    context.log.warn({ err: error, reminderId, attempts: reminder.attempts }, 'a reminder could not be sent');
    return giveBack(context, reminder, error instanceof Error ? error.message : String(error));
  }
}

/** Ends a claim, unless it was lost to another server meanwhile. */
async function settle(context: AppContext, reminder: ClaimedReminder, status: 'sent' | 'dropped' | 'cancelled', sent: { sentAt: Date; lateMinutes: number | null } | null = null): Promise<void> {
  await context.database.query(
    `UPDATE reminders SET status = $3, sent_at = $4, late_minutes = $5, lease_until = NULL, updated_at = $6 WHERE id = $1 AND claimed_by = $2 AND status = 'claimed'`,
    { bind: [reminder.id, context.serverId, status, sent?.sentAt ?? null, sent?.lateMinutes ?? null, context.clock.now()], type: QueryTypes.UPDATE },
  );
}

async function giveBack(context: AppContext, reminder: ClaimedReminder, message: string): Promise<ReminderOutcome> {
  const outcome = reminder.attempts >= REMINDER_TRIES ? 'failed' : 'retry';
  await context.database.query(
    `UPDATE reminders SET status = $3, last_error = $4, lease_until = clock_timestamp() + $5 * interval '1 second', updated_at = $6
     WHERE id = $1 AND claimed_by = $2 AND status = 'claimed'`,
    {
      bind: [reminder.id, context.serverId, outcome === 'failed' ? 'failed' : 'waiting', message.slice(0, 500), RETRY_SECONDS * 2 ** (reminder.attempts - 1), context.clock.now()],
      type: QueryTypes.UPDATE,
    },
  );
  return { outcome };
}
