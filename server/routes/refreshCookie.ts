import type { CookieOptions, Request, Response } from 'express';
import type { AppContext } from '@/server/context';
import { AppError } from '@/server/errors';

/** Name of the cookie that carries the refresh token. It goes to the routes under /api/auth only, and no script can read it. */
export const refreshCookieName = 'dapple_refresh';

const optionsFor = (app: AppContext): CookieOptions => ({ httpOnly: true, sameSite: 'strict', path: '/api/auth', secure: app.publicUrl.startsWith('https:') });

export function setRefreshCookie(app: AppContext, response: Response, token: string, days: number): void {
  response.cookie(refreshCookieName, token, { ...optionsFor(app), maxAge: days * 86_400_000 });
}

export function clearRefreshCookie(app: AppContext, response: Response): void {
  response.clearCookie(refreshCookieName, optionsFor(app));
}

export function refreshCookieOf(request: Request): string | undefined {
  const value = (request.cookies as Record<string, unknown> | undefined)?.[refreshCookieName];
  return typeof value === 'string' ? value : undefined;
}

/**
 * Refuses what another site's page could send with our cookie: a foreign page cannot set this header without asking first.
 * @throws AppError forbidden
 */
export function requireOwnPage(request: Request): void {
  if (request.get('x-requested-with') !== 'dapple') {
    throw new AppError('forbidden', 'That request did not come from Dapple.');
  }
}
