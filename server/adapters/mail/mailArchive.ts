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

/** Mail received by the local SMTP servers on this database, newest first. Kept in the database, so it survives a restart. */
export interface MailArchive {
  list(limit?: number): Promise<ArchivedMail[]>;
  find(id: string): Promise<ArchivedMail | null>;
}
