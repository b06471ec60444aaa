import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import type { AppContext } from '@/server/context';
import type { CommandContext } from './commandContext';

export interface MailText {
  subject: string;
  text: string;
  html: string;
}

interface WaitingMail extends MailText {
  id: string;
  to: string;
  messageId: string;
  attempts: number;
}

/** How long a sender holds a mail [s]; well above the mail adapter's time limits. */
const LEASE_SECONDS = 120;
/** Tries before a mail is given up: the last one comes a little over an hour after the first. */
export const MAIL_TRIES = 8;
/** Wait after the first failed try [s]; twice as long after each further one. */
const RETRY_SECONDS = 30;
/** More than this is left to the next look. */
const AT_ONCE = 500;

/**
 * Puts a mail into the outbox, in the transaction of what it tells of, and sends it once the answer is out. A server that is killed in between, or a
 * mail server that does not answer, leaves it to the next look of any server; every try carries the same Message-ID.
 */
export async function queueMail(context: Pick<CommandContext, 'app' | 'now' | 'afterCommit'>, to: string, mail: MailText): Promise<void> {
  const { app, now } = context;
  const id = randomUUID();
  await app.database.query(
    `INSERT INTO outgoing_mails (id, message_id, "to", subject, text, html, created_at) VALUES ($1, $2, $3, $4, $5, $6, $7)`,
    { bind: [id, `<${id}@${new URL(app.publicUrl).hostname}>`, to, mail.subject, mail.text, mail.html, now], type: QueryTypes.INSERT },
  );
  context.afterCommit(() => sendWaitingMail(app, id));
}

/** Mails in the outbox that no server holds and whose time to be tried has come, the oldest first. */
export async function mailsDue(app: AppContext): Promise<{ mailId: string }[]> {
  return app.database.query<{ mailId: string }>(
    `SELECT id AS "mailId" FROM outgoing_mails WHERE lease_until <= clock_timestamp() ORDER BY created_at, id LIMIT ${AT_ONCE}`, { type: QueryTypes.SELECT },
  );
}

/** Sends a mail of the outbox unless another server has it, and takes it out: its text may hold a link that opens an account. Not to be called inside a transaction. */
export async function sendWaitingMail(app: AppContext, mailId: string): Promise<void> {
  const [mail] = await app.database.query<WaitingMail>(
    `UPDATE outgoing_mails SET lease_until = clock_timestamp() + $2 * interval '1 second', attempts = attempts + 1
     WHERE id = $1 AND (lease_until <= clock_timestamp() OR attempts = 0) RETURNING id, message_id AS "messageId", "to", subject, text, html, attempts`,
    { bind: [mailId, LEASE_SECONDS], type: QueryTypes.SELECT },
  );
  if (mail === undefined) {
    return;
  }
  try {
    await app.mailer.send({ to: mail.to, subject: mail.subject, text: mail.text, html: mail.html, messageId: mail.messageId });
    await app.database.query('DELETE FROM outgoing_mails WHERE id = $1', { bind: [mailId], type: QueryTypes.DELETE });
  } catch (error) {
    const given = mail.attempts >= MAIL_TRIES;
    app.log.error({ err: error, messageId: mail.messageId, subject: mail.subject, attempts: mail.attempts }, given ? 'a mail was given up' : 'a mail could not be sent and will be tried again');
    await (given
      ? app.database.query('DELETE FROM outgoing_mails WHERE id = $1', { bind: [mailId], type: QueryTypes.DELETE })
      : app.database.query(`UPDATE outgoing_mails SET lease_until = clock_timestamp() + $2 * interval '1 second' WHERE id = $1`, { bind: [mailId, RETRY_SECONDS * 2 ** (mail.attempts - 1)], type: QueryTypes.UPDATE }));
  }
}
