import { createSecretKey, type KeyObject } from 'node:crypto';
import jwt from 'jsonwebtoken';
import { signInRequired } from '@/server/errors';

/** Short, because an access token is not asked of the database for its own validity beyond its session. */
export const accessTokenMinutes = 10;

const keys = new Map<string, KeyObject>();

/** A ready key: given the bare text, the library first tries at every call to read it as a public key, which takes longer than everything else together. */
function keyOf(secret: string): KeyObject {
  const known = keys.get(secret);
  if (known) {
    return known;
  }
  const key = createSecretKey(Buffer.from(secret, 'utf8'));
  keys.set(secret, key);
  return key;
}

/**
 * Signs a short-lived token for one session.
 * @returns the token and the instant it ends
 */
export function signAccessToken(user: { id: string; sessionId: string }, secret: string, now: Date): { token: string; expiresAt: Date } {
  const issuedS = Math.floor(now.getTime() / 1000);
  const expiresS = issuedS + accessTokenMinutes * 60;
  const token = jwt.sign({ sub: user.id, sid: user.sessionId, iat: issuedS, exp: expiresS }, keyOf(secret), { algorithm: 'HS256', issuer: 'dapple' });
  return { token, expiresAt: new Date(expiresS * 1000) };
}

/** @throws AppError sign_in_required when the token is forged, foreign, malformed or over */
export function verifyAccessToken(token: string, secret: string, now: Date): { id: string; sessionId: string } {
  try {
    const claims = jwt.verify(token, keyOf(secret), { algorithms: ['HS256'], issuer: 'dapple', clockTimestamp: Math.floor(now.getTime() / 1000) });
    if (typeof claims === 'object' && typeof claims.sub === 'string' && typeof claims['sid'] === 'string') {
      return { id: claims.sub, sessionId: claims['sid'] };
    }
  } catch {
    // falls through to the one answer for every kind of bad token
  }
  throw signInRequired();
}
