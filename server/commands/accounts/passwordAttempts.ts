import { createHash } from 'node:crypto';
import { QueryTypes, type Sequelize } from 'sequelize';
import { AppError } from '@/server/errors';

/** Attempts that an address may have before it is slowed down. ASVS 4.0.3 V2.2.1 allows up to 100 an hour; this is far below. */
export const attemptsBeforeDelay = 10;
const firstDelayS = 60;
const longestDelayS = 15 * 60;
/** Attempts older than this are forgotten. */
const memoryMs = 60 * 60_000;

const keyOf = (email: string) => createHash('sha256').update(`password:${email.toLowerCase()}`).digest('hex');

/**
 * Counts one attempt at the password of an address before it is checked, so that many at once, on however many servers, are all counted.
 * Addresses without an account are counted alike. After ten attempts each further one costs a minute's wait, doubling up to a quarter of an hour.
 * Must run outside a transaction, since the count has to stay when the request fails.
 * @throws AppError too_many_requests while the address has to wait
 */
export async function takePasswordAttempt(database: Sequelize, email: string, now: Date): Promise<void> {
  await database.query('DELETE FROM sign_in_failures WHERE last_failed_at < $1', { bind: [new Date(now.getTime() - memoryMs)], type: QueryTypes.DELETE });
  const taken = await database.query<{ failures: number }>(
    `INSERT INTO sign_in_failures AS f (address_hash, failures, last_failed_at) VALUES ($1, 1, $2::timestamptz)
     ON CONFLICT (address_hash) DO UPDATE SET failures = f.failures + 1, last_failed_at = $2::timestamptz,
       blocked_until = CASE WHEN f.failures + 1 >= $3 THEN $2::timestamptz + make_interval(secs => LEAST($4 * power(2, LEAST(f.failures + 1 - $3, 20)), $5)) END
     WHERE f.blocked_until IS NULL OR f.blocked_until <= $2::timestamptz
     RETURNING failures`,
    { bind: [keyOf(email), now, attemptsBeforeDelay, firstDelayS, longestDelayS], type: QueryTypes.SELECT },
  );
  if (taken.length === 0) {
    throw new AppError('too_many_requests', 'That was tried very often. Wait a quarter of an hour, or set a new password.');
  }
}

/** Forgets the attempts after the right password or a new one. */
export async function forgetPasswordAttempts(database: Sequelize, email: string): Promise<void> {
  await database.query('DELETE FROM sign_in_failures WHERE address_hash = $1', { bind: [keyOf(email)], type: QueryTypes.DELETE });
}
