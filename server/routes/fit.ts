import { presentMonthFit } from '@/server/presenters/monthFit';
import { readMonthFit } from '@/server/readModels/monthFit';
import { monthFitResponseSchema } from '@/shared/contracts/fit';
import { defineRoute } from './route';
import { yardPath } from './yardPaths';

export const fitRoutes = [
  defineRoute({
    method: 'get', path: '/yards/:yardId/fit', tag: 'Water', summary: 'Hose-hours needed against had for every month of the coming year, and what would help where they do not do.',
    access: { yard: 'plan.read' }, params: yardPath, response: monthFitResponseSchema,
    handler: async ({ app, yardId, now }) => presentMonthFit(await readMonthFit(app, yardId, now)),
  }),
];
