import { createPermit, deletePermit, updatePermit } from '@/server/commands/yards/changePermits';
import { presentPermit } from '@/server/presenters/yard';
import { doneSchema } from '@/shared/contracts/common';
import { createPermitRequestSchema, permitSchema, updatePermitRequestSchema } from '@/shared/contracts/waterRules';
import { defineRoute } from './route';
import { changeOf, done, permitPath, yardPath } from './yardPaths';

const tag = 'Yards';

export const permitRoutes = [
  defineRoute({
    method: 'post', path: '/yards/:yardId/permits', tag, summary: 'Adds a permit for newly seeded ground; it ends by itself after its last day.',
    access: { yard: 'facts.edit' }, params: yardPath, body: createPermitRequestSchema, response: permitSchema, status: 201,
    handler: async (context) => presentPermit(await createPermit(changeOf(context), context.body)),
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId/permits/:permitId', tag, summary: 'Changes a permit.',
    access: { yard: 'facts.edit' }, params: permitPath, body: updatePermitRequestSchema, response: permitSchema,
    handler: async (context) => presentPermit(await updatePermit(changeOf(context), context.params.permitId, context.body)),
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/permits/:permitId', tag, summary: 'Removes a permit.',
    access: { yard: 'facts.edit' }, params: permitPath, response: doneSchema,
    handler: async (context) => {
      await deletePermit(changeOf(context), context.params.permitId);
      return done;
    },
  }),
];
