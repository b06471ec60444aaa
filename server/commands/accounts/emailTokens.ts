import { randomUUID } from 'node:crypto';
import { QueryTypes, type Sequelize } from 'sequelize';
import { AppError } from '@/server/errors';
import { EmailToken, type EmailTokenPurpose } from '@/server/models';
import { hashToken, newSecretToken } from './secretToken';

const hourMs = 3_600_000;
const lifeMs: Record<EmailTokenPurpose, number> = { confirm_email: 48 * hourMs, reset_password: hourMs };
/** More mails of one kind are not sent to one person in an hour, so that nobody's mailbox can be flooded. */
export const tokenMailsPerHour = 5;

/**
 * Makes the token for a link in a mail; earlier ones of its kind stop working.
 * @returns the token, of which only a hash is kept, or null when enough were sent within the hour
 */
export async function issueEmailToken(database: Sequelize, userId: string, purpose: EmailTokenPurpose, now: Date): Promise<string | null> {
  // one at a time for a person, so that the count holds
  await database.query('SELECT 1 FROM users WHERE id = $1 FOR UPDATE', { bind: [userId], type: QueryTypes.SELECT });
  const [sent] = await database.query<{ count: number }>(
    'SELECT count(*)::int AS count FROM email_tokens WHERE user_id = $1 AND purpose = $2 AND created_at > $3',
    { bind: [userId, purpose, new Date(now.getTime() - hourMs)], type: QueryTypes.SELECT },
  );
  if ((sent?.count ?? 0) >= tokenMailsPerHour) {
    return null;
  }
  await database.query('UPDATE email_tokens SET expires_at = $3 WHERE user_id = $1 AND purpose = $2 AND used_at IS NULL AND expires_at > $3', {
    bind: [userId, purpose, now], type: QueryTypes.UPDATE,
  });
  const token = newSecretToken();
  await EmailToken.create({ id: randomUUID(), userId, purpose, tokenHash: hashToken(token), createdAt: now, expiresAt: new Date(now.getTime() + lifeMs[purpose]) });
  return token;
}

/**
 * Finds a token that still works and locks it when inside a transaction.
 * @throws AppError token_invalid, token_used, token_expired
 */
export async function findEmailToken(purpose: EmailTokenPurpose, token: string, now: Date, lock: boolean): Promise<EmailToken> {
  const found = await EmailToken.findOne({ where: { tokenHash: hashToken(token), purpose }, ...(lock ? { lock: true } : {}) });
  if (found === null) {
    throw new AppError('token_invalid', 'That link is not one of ours. Take the whole link from the mail.');
  }
  if (found.usedAt !== null) {
    throw new AppError('token_used', 'That link was used already.');
  }
  if (found.expiresAt <= now) {
    throw new AppError('token_expired', 'That link is too old. Ask for a new one.');
  }
  return found;
}

/** Marks a token as used, inside the caller's transaction. */
export async function useEmailToken(purpose: EmailTokenPurpose, token: string, now: Date): Promise<EmailToken> {
  const found = await findEmailToken(purpose, token, now, true);
  return found.update({ usedAt: now });
}
