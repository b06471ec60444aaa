import { signAccessToken } from '@/server/commands/accessToken';
import { confirmEmail, type StartedSession } from '@/server/commands/accounts/confirmEmail';
import { describeDevice } from '@/server/commands/accounts/describeDevice';
import { requestPasswordReset, resetPassword } from '@/server/commands/accounts/passwordReset';
import { refreshSession } from '@/server/commands/accounts/refreshSession';
import { sessionIdleDays, signOut } from '@/server/commands/accounts/sessions';
import { signIn } from '@/server/commands/accounts/signIn';
import { resendConfirmation, signUp } from '@/server/commands/accounts/signUp';
import { AppError } from '@/server/errors';
import { presentSignedIn } from '@/server/presenters/account';
import {
  forgotPasswordRequestSchema, resetPasswordRequestSchema, signedInResponseSchema, signInRequestSchema, signUpRequestSchema, tokenRequestSchema, type SignedInResponse,
} from '@/shared/contracts/accounts';
import { doneSchema } from '@/shared/contracts/common';
import { clearRefreshCookie, refreshCookieOf, requireOwnPage, setRefreshCookie } from './refreshCookie';
import { defineRoute, type RequestContext } from './route';

const tag = 'Accounts';
const done = { done: true as const };

/** Puts the refresh token into its cookie and answers with a fresh access token. */
function answerSession({ app, now, response }: RequestContext<unknown, unknown, unknown>, session: StartedSession): SignedInResponse {
  setRefreshCookie(app, response, session.refreshToken, sessionIdleDays);
  return presentSignedIn(session.user, signAccessToken({ id: session.user.id, sessionId: session.sessionId }, app.env.TOKEN_SECRET, now));
}

export const accountRoutes = [
  defineRoute({
    method: 'post', path: '/auth/sign-up', tag, summary: 'Makes an account; the link that confirms it goes to the address. Answers the same for every address.',
    access: 'public', body: signUpRequestSchema, response: doneSchema, status: 202, limit: 'auth', transaction: false,
    handler: async (context) => {
      await signUp(context, context.body);
      return done;
    },
  }),
  defineRoute({
    method: 'post', path: '/auth/confirm', tag, summary: 'Confirms an address with the token from the mail, and signs in.',
    access: 'public', body: tokenRequestSchema, response: signedInResponseSchema, limit: 'auth',
    handler: async (context) => answerSession(context, await confirmEmail(context, context.body.token, describeDevice(context.request.get('user-agent')))),
  }),
  defineRoute({
    method: 'post', path: '/auth/resend-confirmation', tag, summary: 'Sends the confirmation link again. Answers the same for every address.',
    access: 'public', body: forgotPasswordRequestSchema, response: doneSchema, status: 202, limit: 'auth',
    handler: async (context) => {
      await resendConfirmation(context, context.body.email);
      return done;
    },
  }),
  defineRoute({
    method: 'post', path: '/auth/sign-in', tag, summary: 'Begins a session with address and password.',
    access: 'public', body: signInRequestSchema, response: signedInResponseSchema, limit: 'auth', transaction: false,
    handler: async (context) => answerSession(context, await signIn(context, context.body, describeDevice(context.request.get('user-agent')))),
  }),
  defineRoute({
    method: 'post', path: '/auth/refresh', tag, summary: 'Gives a new access token for the refresh token in the cookie, which is replaced. Needs the header X-Requested-With: dapple.',
    access: 'public', response: signedInResponseSchema, transaction: false,
    handler: async (context) => {
      requireOwnPage(context.request);
      try {
        return answerSession(context, await refreshSession(context, refreshCookieOf(context.request)));
      } catch (error) {
        if (error instanceof AppError && error.code === 'session_ended') {
          clearRefreshCookie(context.app, context.response);
        }
        throw error;
      }
    },
  }),
  defineRoute({
    method: 'post', path: '/auth/sign-out', tag, summary: 'Ends the session of the refresh token in the cookie. Needs the header X-Requested-With: dapple.',
    access: 'public', response: doneSchema,
    handler: async ({ app, now, request, response }) => {
      requireOwnPage(request);
      await signOut(refreshCookieOf(request), now);
      clearRefreshCookie(app, response);
      return done;
    },
  }),
  defineRoute({
    method: 'post', path: '/auth/forgot', tag, summary: 'Sends a link for a new password. Answers the same for every address.',
    access: 'public', body: forgotPasswordRequestSchema, response: doneSchema, status: 202, limit: 'auth',
    handler: async (context) => {
      await requestPasswordReset(context, context.body.email);
      return done;
    },
  }),
  defineRoute({
    method: 'post', path: '/auth/reset', tag, summary: 'Sets a new password with the token from the mail, and ends all sessions.',
    access: 'public', body: resetPasswordRequestSchema, response: doneSchema, limit: 'auth', transaction: false,
    handler: async (context) => {
      await resetPassword(context, context.body);
      return done;
    },
  }),
];
