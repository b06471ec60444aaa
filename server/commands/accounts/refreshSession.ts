import type { CommandContext } from '@/server/commands/commandContext';
import { AppError, signInRequired } from '@/server/errors';
import { Session, User } from '@/server/models';
import { hashToken, successorOf } from './secretToken';
import { readRefreshToken, refreshTokenOf, sessionExpiry, type SessionEnd } from './sessions';

/** So long a token that was just replaced still gives its successor: two tabs renew at once, or an answer was lost on a bad line outdoors [s]. */
export const replacedTokenGraceS = 60;

const sessionOver = () => new AppError('session_ended', 'Your session has ended. Sign in again.');

/**
 * Takes a refresh token and gives the one that replaces it. A token that was replaced longer ago is in two hands: the session ends for both.
 * Runs its own transaction, since the end of a session has to stay although the request fails.
 * @throws AppError sign_in_required without a token, session_ended when its session is over or has just been ended
 */
export async function refreshSession({ app, now }: CommandContext, refreshToken: string | undefined): Promise<{ user: User; sessionId: string; refreshToken: string }> {
  const parts = readRefreshToken(refreshToken);
  if (parts === null) {
    throw signInRequired();
  }
  const result = await app.database.transaction(async () => {
    const session = await Session.findByPk(parts.sessionId, { lock: true });
    if (session === null || session.endedAt !== null || session.expiresAt <= now) {
      return null;
    }
    const hash = hashToken(parts.secret);
    const next = successorOf(parts.secret, app.env.TOKEN_SECRET);
    if (hash === session.tokenHash) {
      await session.update({ tokenHash: hashToken(next), previousTokenHash: hash, replacedAt: now, lastUsedAt: now, expiresAt: sessionExpiry(session.createdAt, now) });
    } else {
      const justReplaced = hash === session.previousTokenHash && session.replacedAt !== null
        && now.getTime() - session.replacedAt.getTime() <= replacedTokenGraceS * 1000;
      if (!justReplaced) {
        await session.update({ endedAt: now, endedBecause: 'token_reused' satisfies SessionEnd });
        return null;
      }
    }
    const user = await User.findByPk(session.userId);
    return user && { user, sessionId: session.id, refreshToken: refreshTokenOf(session.id, next) };
  });
  if (result === null) {
    throw sessionOver();
  }
  return result;
}
