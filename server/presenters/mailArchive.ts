import type { ArchivedMail } from '@/server/adapters/mail/mailArchive';
import type { MailListResponse, MailResponse } from '@/shared/contracts/messages';

/** A caught mail as a row of the mail page. */
export function presentMailSummary(mail: ArchivedMail): MailListResponse['mails'][number] {
  return { id: mail.id, to: mail.to, from: mail.from, subject: mail.subject, receivedAt: mail.receivedAt.toISOString() };
}

/** A caught mail with its bodies. */
export function presentMail(mail: ArchivedMail): MailResponse {
  return { ...presentMailSummary(mail), text: mail.text, html: mail.html, messageId: mail.messageId };
}
