import { z } from '@/shared/zod';
import { readFloor } from '@/server/readModels/floor';
import { defineRoute } from './route';

export const healthRoutes = [
  defineRoute({
    method: 'get', path: '/health', tag: 'Service', summary: 'Tells whether the server answers and reaches its database.',
    access: 'public', response: z.object({ ok: z.literal(true), mode: z.string() }),
    handler: async ({ app }) => {
      await readFloor(app.database);
      return { ok: true as const, mode: app.env.DAPPLE_MODE };
    },
  }),
  defineRoute({
    method: 'get', path: '/floor', tag: 'Service', summary: 'The barest read: one select of one number. Other reads are measured against it.',
    access: 'public', response: z.object({ one: z.number() }),
    handler: async ({ app }) => ({ one: await readFloor(app.database) }),
  }),
];
