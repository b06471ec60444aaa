import { createHash } from 'node:crypto';
import { QueryTypes, type Sequelize } from 'sequelize';
import { AppError } from '@/server/errors';
import { IdempotencyKey } from '@/server/models';

/**
 * Runs a write at most once for a person's key, inside the caller's transaction: a replay gets the first answer again.
 * @throws AppError idempotency_mismatch when the key came with another request before
 */
export async function onceForKey<T>(
  database: Sequelize, userId: string, key: string, request: { method: string; path: string; body: unknown }, now: Date, status: number, run: () => Promise<T>,
): Promise<T> {
  const requestHash = createHash('sha256').update(JSON.stringify([request.method, request.path, request.body ?? null])).digest('hex');
  // A replay that arrives while the first is still running waits here for its outcome.
  await database.query('SELECT pg_advisory_xact_lock(hashtextextended($1, 0))', { bind: [`${userId}:${key}`], type: QueryTypes.SELECT });
  const earlier = await IdempotencyKey.findOne({ where: { userId, key } });
  if (earlier) {
    if (earlier.requestHash !== requestHash) {
      throw new AppError('idempotency_mismatch', 'That key was used for another request.');
    }
    return earlier.response as T;
  }
  const answer = await run();
  await IdempotencyKey.create({ userId, key, requestHash, status, response: answer as object, createdAt: now });
  return answer;
}
