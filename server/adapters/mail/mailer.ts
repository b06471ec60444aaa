export interface OutgoingMail {
  to: string;
  subject: string;
  text: string;
  html: string;
  /** Chosen by the sender of the mail, so that a retry carries the same one. With angle brackets. */
  messageId: string;
}

/** Hands one mail to the mail server. Throws when the server did not take it. */
export interface Mailer {
  send(mail: OutgoingMail): Promise<void>;
  close(): void;
}
