import { randomUUID } from 'node:crypto';
import type { AppContext } from '@/server/context';

export interface MailText {
  subject: string;
  text: string;
  html: string;
}

/** Sends one mail. A mail server that does not answer is written to the log: what the mail tells of has happened all the same. */
export async function sendMail(app: AppContext, to: string, mail: MailText): Promise<void> {
  const messageId = `<${randomUUID()}@${new URL(app.publicUrl).hostname}>`;
  try {
    await app.mailer.send({ to, subject: mail.subject, text: mail.text, html: mail.html, messageId });
  } catch (error) {
    app.log.error({ err: error, messageId, subject: mail.subject }, 'a mail could not be sent');
  }
}
