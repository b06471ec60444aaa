import { acceptInvitation, declineInvitation } from '@/server/commands/members/answerInvitation';
import { changeRole, removeMember, updatePreferences } from '@/server/commands/members/changeMembers';
import { invite, withdrawInvitation } from '@/server/commands/members/invite';
import { mayInYard } from '@/server/policies/yardPolicy';
import { presentInvitation, presentInvitationPreview, presentMembers, presentPreferences } from '@/server/presenters/members';
import { readHistory } from '@/server/readModels/history';
import { readOpenInvitation } from '@/server/readModels/invitation';
import { readInvitationPreview, readMembers, readOpenInvitations } from '@/server/readModels/members';
import { tokenRequestSchema } from '@/shared/contracts/accounts';
import { doneSchema, idSchema } from '@/shared/contracts/common';
import {
  acceptInvitationResponseSchema, changeRoleRequestSchema, createInvitationRequestSchema, historyQuerySchema, historyResponseSchema, invitationPreviewResponseSchema,
  invitationSchema, memberListResponseSchema, preferencesResponseSchema, updatePreferencesRequestSchema,
} from '@/shared/contracts/yards';
import { z } from '@/shared/zod';
import { defineRoute } from './route';

const tag = 'Members';
const done = { done: true as const };
const yardParams = z.object({ yardId: idSchema });
const memberParams = z.object({ yardId: idSchema, userId: idSchema });

export const memberRoutes = [
  defineRoute({
    method: 'get', path: '/yards/:yardId/members', tag, summary: 'Members of the yard; for an owner also the invitations that wait for an answer.',
    access: { yard: 'members.read' }, params: yardParams, response: memberListResponseSchema,
    handler: async ({ app, yardId, user, role, now }) => presentMembers(
      await readMembers(app.database, yardId), mayInYard(role, 'members.manage') ? await readOpenInvitations(yardId, now) : [], user.id,
    ),
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId/members/:userId', tag, summary: 'Gives a member another role.',
    access: { yard: 'members.manage' }, params: memberParams, body: changeRoleRequestSchema, response: doneSchema,
    handler: async (context) => {
      await changeRole(context, context.params.userId, context.body.role);
      return done;
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/members/:userId', tag, summary: 'Removes a member; a member may leave.',
    access: { yard: 'members.manage', orSelf: 'userId' }, params: memberParams, response: doneSchema,
    handler: async (context) => {
      await removeMember(context, context.params.userId);
      return done;
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/invitations', tag, summary: 'Invites an address by mail; an earlier invitation of the address is replaced.',
    access: { yard: 'members.manage' }, params: yardParams, body: createInvitationRequestSchema, response: invitationSchema, status: 201,
    handler: async (context) => presentInvitation(await invite(context, context.body)),
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/invitations/:invitationId', tag, summary: 'Takes back an invitation.',
    access: { yard: 'members.manage' }, params: z.object({ yardId: idSchema, invitationId: idSchema }), response: doneSchema,
    handler: async (context) => {
      await withdrawInvitation(context, context.params.invitationId);
      return done;
    },
  }),
  defineRoute({
    method: 'get', path: '/invitations/:token', tag, summary: 'What an invitation\'s link shows before anybody signs in.',
    access: 'public', params: tokenRequestSchema, response: invitationPreviewResponseSchema, limit: 'auth',
    handler: async ({ app, params, now }) => {
      const invitation = await readOpenInvitation(params.token, now);
      return presentInvitationPreview(invitation, await readInvitationPreview(app.database, invitation));
    },
  }),
  defineRoute({
    method: 'post', path: '/invitations/accept', tag, summary: 'Joins the yard that invited the signed-in person\'s address.',
    access: 'signed_in', body: tokenRequestSchema, response: acceptInvitationResponseSchema, limit: 'auth',
    handler: (context) => acceptInvitation(context, context.user.id, context.body.token),
  }),
  defineRoute({
    method: 'post', path: '/invitations/decline', tag, summary: 'Declines an invitation; the link is enough.',
    access: 'public', body: tokenRequestSchema, response: doneSchema, limit: 'auth',
    handler: async (context) => {
      await declineInvitation(context, context.body.token);
      return done;
    },
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId/preferences', tag, summary: 'Which mails the signed-in member wants from this yard.',
    access: { yard: 'preferences.edit' }, params: yardParams, body: updatePreferencesRequestSchema, response: preferencesResponseSchema,
    handler: async (context) => presentPreferences(await updatePreferences(context, context.body)),
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/history', tag, summary: 'What was done in the yard, by whom and when; newest first, a page at a time.',
    access: { yard: 'history.read' }, params: yardParams, query: historyQuerySchema, response: historyResponseSchema,
    handler: ({ app, yardId, query }) => readHistory(app.database, yardId, query.before, query.limit),
  }),
];
