import { setTimeout as pause } from 'node:timers/promises';
import type { ArchivedMail } from '@/server/adapters/mail/mailArchive';
import type { TestContext } from '../setup/testContext';

/** Mails that an address received, oldest first, as soon as there are at least so many of them. Mail follows its request by a moment. */
export async function mailsTo(test: TestContext, address: string, count = 1): Promise<ArchivedMail[]> {
  for (let attempt = 0; ; attempt += 1) {
    const mails = (await test.mails()).filter((mail) => mail.to.includes(address)).reverse();
    if (mails.length >= count) {
      return mails;
    }
    if (attempt === 100) {
      throw new Error(`${address} received ${mails.length} mails and not ${count}: ${mails.map((mail) => mail.subject).join(', ')}`);
    }
    await pause(30);
  }
}

/** The token in the link of a mail. */
export function tokenIn(mail: ArchivedMail | undefined): string {
  const token = /\?token=([\w-]+)/.exec(mail?.text ?? '')?.[1];
  if (token === undefined) {
    throw new Error(`There is no link with a token in: ${mail?.text ?? 'no mail'}`);
  }
  return token;
}
