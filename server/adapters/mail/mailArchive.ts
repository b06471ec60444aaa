export interface ArchivedMail {
  id: string;
  to: string;
  from: string;
  subject: string;
  text: string;
  html: string | null;
  messageId: string;
  receivedAt: Date;
}

/** Mail received by the local SMTP server, newest first. */
export interface MailArchive {
  list(): ArchivedMail[];
  find(id: string): ArchivedMail | null;
}
