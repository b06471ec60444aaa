import { createTransport } from 'nodemailer';
import type { Clock } from '@/server/adapters/clock/clock';
import type { Mailer } from './mailer';

/** A mail server that is slower than this is taken to be down; the job that sends is retried later [ms]. */
const TIMEOUTS = { connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 20_000, dnsTimeout: 10_000 };

/**
 * Sends mail through an SMTP server over a few kept connections.
 * @param url - smtp:// or smtps:// with user and password where the server wants them
 * @param from - address in the From line
 */
export function createSmtpMailer(url: string, from: string, clock: Clock): Mailer {
  const transport = createTransport({ url, pool: true, maxConnections: 4, maxRequeues: 1, ...TIMEOUTS });
  return {
    async send(mail) {
      await transport.sendMail({ from, to: mail.to, subject: mail.subject, text: mail.text, html: mail.html, messageId: mail.messageId, date: clock.now() });
    },
    close: () => transport.close(),
  };
}
