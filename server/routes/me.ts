import { changePassword } from '@/server/commands/accounts/changePassword';
import { deleteAccount } from '@/server/commands/accounts/deleteAccount';
import { endSession, endSessions } from '@/server/commands/accounts/sessions';
import { updateMe } from '@/server/commands/accounts/updateMe';
import { presentMe, presentSessions } from '@/server/presenters/account';
import { readMe, readSessions } from '@/server/readModels/account';
import { readAccountExport } from '@/server/readModels/accountExport';
import {
  changePasswordRequestSchema, deleteMeRequestSchema, exportResponseSchema, meResponseSchema, sessionListResponseSchema, updateMeRequestSchema,
} from '@/shared/contracts/accounts';
import { doneSchema, idSchema } from '@/shared/contracts/common';
import { z } from '@/shared/zod';
import { clearRefreshCookie } from './refreshCookie';
import { defineRoute } from './route';

const tag = 'Own account';
const done = { done: true as const };

export const meRoutes = [
  defineRoute({
    method: 'get', path: '/me', tag, summary: 'Who is signed in.', access: 'signed_in', response: meResponseSchema,
    handler: async ({ user }) => presentMe(await readMe(user.id)),
  }),
  defineRoute({
    method: 'patch', path: '/me', tag, summary: 'Changes the name.', access: 'signed_in', body: updateMeRequestSchema, response: meResponseSchema,
    handler: async ({ user, body }) => presentMe(await updateMe(user.id, body)),
  }),
  defineRoute({
    method: 'post', path: '/me/password', tag, summary: 'Changes the password and ends the other sessions.',
    access: 'signed_in', body: changePasswordRequestSchema, response: doneSchema, limit: 'auth', transaction: false,
    handler: async (context) => {
      await changePassword(context, context.user, context.body);
      return done;
    },
  }),
  defineRoute({
    method: 'get', path: '/me/sessions', tag, summary: 'Where the person is signed in.', access: 'signed_in', response: sessionListResponseSchema,
    handler: async ({ user, now }) => presentSessions(await readSessions(user.id, now), user.sessionId),
  }),
  defineRoute({
    method: 'delete', path: '/me/sessions/:sessionId', tag, summary: 'Ends one session.',
    access: 'signed_in', params: z.object({ sessionId: idSchema }), response: doneSchema,
    handler: async ({ user, params, now }) => {
      await endSession(user.id, params.sessionId, 'ended_by_person', now);
      return done;
    },
  }),
  defineRoute({
    method: 'delete', path: '/me/sessions', tag, summary: 'Ends all other sessions.', access: 'signed_in', response: doneSchema,
    handler: async ({ user, now }) => {
      await endSessions(user.id, 'ended_by_person', now, user.sessionId);
      return done;
    },
  }),
  defineRoute({
    method: 'delete', path: '/me', tag, summary: 'Deletes the account and what is the person\'s alone, with the password given again.',
    access: 'signed_in', body: deleteMeRequestSchema, response: doneSchema, limit: 'auth', transaction: false,
    handler: async (context) => {
      await deleteAccount(context, context.user.id, context.body.password);
      clearRefreshCookie(context.app, context.response);
      return done;
    },
  }),
  defineRoute({
    method: 'get', path: '/me/export', tag, summary: 'Everything that is kept about the person, as JSON.', access: 'signed_in', response: exportResponseSchema,
    handler: async ({ app, user, now }) => ({
      exportedAt: now.toISOString(), account: presentMe(await readMe(user.id)),
      sessions: presentSessions(await readSessions(user.id, now), user.sessionId).sessions, ...(await readAccountExport(app.database, user.id)),
    }),
  }),
];
