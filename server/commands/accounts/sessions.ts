import { randomUUID } from 'node:crypto';
import { Op, QueryTypes, type Sequelize } from 'sequelize';
import { notFound } from '@/server/errors';
import { Session } from '@/server/models';
import { hashToken, newSecretToken } from './secretToken';

const dayMs = 86_400_000;
/** A session that nobody uses ends after this long [days]. */
export const sessionIdleDays = 30;
/** No session lives longer, however often it is used [days]. */
export const sessionLongestDays = 180;

/** Why a session ended, as stored. */
export type SessionEnd = 'signed_out' | 'ended_by_person' | 'password_changed' | 'token_reused';

/** End of a session that is used now. */
export function sessionExpiry(createdAt: Date, now: Date): Date {
  return new Date(Math.min(now.getTime() + sessionIdleDays * dayMs, createdAt.getTime() + sessionLongestDays * dayMs));
}

/** A refresh token names its session, so that an old one can be told from a stranger's and ends the session it was taken from. */
export const refreshTokenOf = (sessionId: string, secret: string) => `${sessionId}.${secret}`;

/** @returns the parts of a refresh token, or null when it is none */
export function readRefreshToken(token: string | undefined): { sessionId: string; secret: string } | null {
  const match = /^([0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12})\.([\w-]{43})$/.exec(token ?? '');
  return match?.[1] !== undefined && match[2] !== undefined ? { sessionId: match[1], secret: match[2] } : null;
}

/** Begins a session on a device, inside the caller's transaction, and clears away the person's sessions that are long over. */
export async function startSession(database: Sequelize, userId: string, device: string, now: Date): Promise<{ sessionId: string; refreshToken: string }> {
  await database.query('DELETE FROM sessions WHERE user_id = $1 AND (expires_at < $2 OR ended_at < $2)', {
    bind: [userId, new Date(now.getTime() - sessionIdleDays * dayMs)], type: QueryTypes.DELETE,
  });
  const sessionId = randomUUID();
  const secret = newSecretToken();
  await Session.create({ id: sessionId, userId, tokenHash: hashToken(secret), device, createdAt: now, lastUsedAt: now, expiresAt: sessionExpiry(now, now) });
  return { sessionId, refreshToken: refreshTokenOf(sessionId, secret) };
}

/**
 * Ends one of a person's own sessions.
 * @throws AppError not_found for a session that is not theirs
 */
export async function endSession(userId: string, sessionId: string, because: SessionEnd, now: Date): Promise<void> {
  const session = await Session.findOne({ where: { id: sessionId, userId } });
  if (session === null) {
    throw notFound('session');
  }
  if (session.endedAt === null) {
    await session.update({ endedAt: now, endedBecause: because });
  }
}

/** Ends all sessions of a person, but for the one given. */
export async function endSessions(userId: string, because: SessionEnd, now: Date, exceptSessionId?: string): Promise<void> {
  await Session.update(
    { endedAt: now, endedBecause: because },
    { where: { userId, endedAt: null, ...(exceptSessionId === undefined ? {} : { id: { [Op.ne]: exceptSessionId } }) } },
  );
}

/** Ends the session of a refresh token, if it still is its token. A stranger's token changes nothing. */
export async function signOut(refreshToken: string | undefined, now: Date): Promise<void> {
  const parts = readRefreshToken(refreshToken);
  if (parts === null) {
    return;
  }
  const hash = hashToken(parts.secret);
  await Session.update(
    { endedAt: now, endedBecause: 'signed_out' satisfies SessionEnd },
    { where: { id: parts.sessionId, endedAt: null, [Op.or]: [{ tokenHash: hash }, { previousTokenHash: hash }] } },
  );
}
