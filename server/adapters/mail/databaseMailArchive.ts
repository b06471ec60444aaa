import { randomUUID } from 'node:crypto';
import { QueryTypes, type Sequelize } from 'sequelize';
import type { ArchivedMail, MailArchive } from './mailArchive';

/** A demonstration that runs for months must not fill the disk. */
const KEPT_MAILS = 2_000;

const COLUMNS = 'id, to_address AS "to", from_address AS "from", subject, text, html, message_id AS "messageId", received_at AS "receivedAt"';

export interface WritableMailArchive extends MailArchive {
  add(mail: Omit<ArchivedMail, 'id'>): Promise<void>;
}

/** Keeps received mail in a table that all servers share. */
export function createDatabaseMailArchive(database: Sequelize): WritableMailArchive {
  return {
    async add(mail) {
      await database.query(
        `INSERT INTO archived_mails (id, to_address, from_address, subject, text, html, message_id, received_at) VALUES ($1, $2, $3, $4, $5, $6, $7, $8)`,
        { bind: [randomUUID(), mail.to, mail.from, mail.subject, mail.text, mail.html, mail.messageId, mail.receivedAt], type: QueryTypes.INSERT },
      );
      await database.query(
        'DELETE FROM archived_mails WHERE arrival <= (SELECT max(arrival) FROM archived_mails) - $1', { bind: [KEPT_MAILS], type: QueryTypes.DELETE },
      );
    },
    list: (limit = 200) => database.query<ArchivedMail>(`SELECT ${COLUMNS} FROM archived_mails ORDER BY received_at DESC, arrival DESC LIMIT $1`, { bind: [limit], type: QueryTypes.SELECT }),
    async find(id) {
      const rows = await database.query<ArchivedMail>(`SELECT ${COLUMNS} FROM archived_mails WHERE id = $1`, { bind: [id], type: QueryTypes.SELECT });
      return rows[0] ?? null;
    },
  };
}
