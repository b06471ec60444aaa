import { createHash, createHmac, randomBytes } from 'node:crypto';

/** A token that cannot be guessed: 32 random bytes, safe in addresses. */
export function newSecretToken(): string {
  return randomBytes(32).toString('base64url');
}

/** What is stored of a token. A plain hash is enough, since the token itself is as long as the hash. */
export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

/**
 * The token that takes the place of a used refresh token. It follows from the used one and the server's secret, so that two tabs
 * that renew at once, or a renewal whose answer was lost, are given the same one.
 */
export function successorOf(token: string, secret: string): string {
  return createHmac('sha256', secret).update(`refresh:${token}`).digest('base64url');
}
