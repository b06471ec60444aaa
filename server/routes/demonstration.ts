import { jumpClock } from '@/server/commands/demonstration/jumpClock';
import type { AppContext } from '@/server/context';
import { notFound } from '@/server/errors';
import { presentMail, presentMailSummary } from '@/server/presenters/mailArchive';
import { idSchema } from '@/shared/contracts/common';
import { clockResponseSchema, demonstrationTimeZone, jumpClockRequestSchema, jumpClockResponseSchema } from '@/shared/contracts/demonstration';
import { mailListResponseSchema, mailResponseSchema } from '@/shared/contracts/messages';
import { z } from '@/shared/zod';
import { defineRoute } from './route';

const clockNow = (app: AppContext) => ({
  now: app.clock.now().toISOString(), isDemonstration: app.clock.isDemonstration, timeZone: app.clock.isDemonstration ? demonstrationTimeZone : 'UTC',
});

function archiveOf(app: AppContext) {
  if (app.mailArchive === null) {
    throw notFound('mail');
  }
  return app.mailArchive;
}

export const demonstrationRoutes = [
  defineRoute({
    method: 'get', path: '/clock', tag: 'Demonstration', summary: 'Tells the time of the service.',
    access: 'public', response: clockResponseSchema,
    handler: ({ app }) => Promise.resolve(clockNow(app)),
  }),
  defineRoute({
    method: 'post', path: '/demo/clock/jump', tag: 'Demonstration', summary: 'Moves the demonstration’s time forward; all that is due in between happens.',
    access: 'demonstration', transaction: false, body: jumpClockRequestSchema, response: jumpClockResponseSchema,
    handler: async ({ app, body }) => {
      const happened = await jumpClock(app, body.to);
      return { ...clockNow(app), happened: happened.map(({ at, what, yardId }) => ({ at: at.toISOString(), what, yardId })) };
    },
  }),
  defineRoute({
    method: 'get', path: '/demo/mails', tag: 'Demonstration', summary: 'Lists mail that the local mail server received, newest first.',
    access: 'demonstration', response: mailListResponseSchema,
    handler: async ({ app }) => ({ mails: (await archiveOf(app).list()).map(presentMailSummary) }),
  }),
  defineRoute({
    method: 'get', path: '/demo/mails/:mailId', tag: 'Demonstration', summary: 'Shows one mail that the local mail server received.',
    access: 'demonstration', params: z.object({ mailId: idSchema }), response: mailResponseSchema,
    handler: async ({ app, params }) => {
      const mail = await archiveOf(app).find(params.mailId);
      if (mail === null) {
        throw notFound('mail');
      }
      return presentMail(mail);
    },
  }),
];
