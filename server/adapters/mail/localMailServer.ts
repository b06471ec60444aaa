import type { AddressInfo } from 'node:net';
import { simpleParser, type AddressObject } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import type { Logger } from 'pino';
import type { Clock } from '@/server/adapters/clock/clock';
import type { WritableMailArchive } from './databaseMailArchive';

export interface LocalMailServer {
  /** smtp://127.0.0.1:port */
  url: string;
  close(): Promise<void>;
}

const addresses = (field: AddressObject | AddressObject[] | undefined): string => [field ?? []].flat().map((part) => part.text).join(', ');

/** An SMTP server on loopback that delivers nothing: every mail it takes goes into the archive. A mail is acknowledged once it is kept. */
export async function startLocalMailServer(archive: WritableMailArchive, clock: Clock, log: Logger): Promise<LocalMailServer> {
  const server = new SMTPServer({
    name: 'localhost', banner: 'Dapple local mail', disabledCommands: ['AUTH', 'STARTTLS'], disableReverseLookup: true, size: 2_000_000,
    onData(stream, session, callback) {
      const keep = async () => {
        const mail = await simpleParser(stream);
        await archive.add({
          to: addresses(mail.to) || session.envelope.rcptTo.map((recipient) => recipient.address).join(', '),
          from: addresses(mail.from), subject: mail.subject ?? '', text: mail.text ?? '', html: typeof mail.html === 'string' ? mail.html : null,
          messageId: mail.messageId ?? '', receivedAt: clock.now(),
        });
      };
      keep().then(() => callback(), (error: unknown) => {
        log.error({ err: error }, 'a mail could not be kept');
        callback(new Error('The mail could not be kept.'));
      });
    },
  });
  server.on('error', (error: Error) => log.warn({ err: error }, 'local mail server'));
  const port = await new Promise<number>((resolve, reject) => {
    server.once('error', reject);
    const listener = server.listen(0, '127.0.0.1', () => resolve((listener.address() as AddressInfo).port));
  });
  return {
    url: `smtp://127.0.0.1:${port}`,
    close: () => new Promise((resolve) => { server.close(() => resolve()); }),
  };
}
