import { lockSet, putDayChange, putWishes, unlockSet } from '@/server/commands/wishes/changeWishes';
import { keepChanges, weighChanges } from '@/server/commands/wishes/whatIf';
import type { AppContext } from '@/server/context';
import { presentPlanVersions, presentWishes } from '@/server/presenters/wishes';
import { readPlanVersions, readWishes } from '@/server/readModels/wishes';
import { doneSchema, idSchema } from '@/shared/contracts/common';
import { createLockRequestSchema, planVersionsResponseSchema, putDayChangeRequestSchema, putWishesRequestSchema, whatIfRequestSchema, whatIfResponseSchema, wishesResponseSchema } from '@/shared/contracts/wishes';
import { defineRoute } from './route';
import { changeOf, dayPath, done, yardPath } from './yardPaths';

const tag = 'Plan';
const mayRead = { yard: 'plan.read' } as const;
const mayChange = { yard: 'facts.edit' } as const;
const lockPath = yardPath.extend({ lockId: idSchema });

const wishesOf = async (app: AppContext, yardId: string, now: Date) => presentWishes(await readWishes(app.database, yardId, now));

export const wishRoutes = [
  defineRoute({
    method: 'get', path: '/yards/:yardId/wishes', tag, summary: 'What the people of a yard wish of its plan, the days that are otherwise, and the sets that somebody fixed.',
    access: mayRead, params: yardPath, response: wishesResponseSchema,
    handler: ({ app, yardId, now }) => wishesOf(app, yardId, now),
  }),
  defineRoute({
    method: 'put', path: '/yards/:yardId/wishes', tag, summary: 'Says what counts most, which hours are preferred, and how much water a month may take.',
    access: mayChange, params: yardPath, body: putWishesRequestSchema, response: wishesResponseSchema,
    handler: async (context) => {
      await putWishes(changeOf(context), context.body);
      return wishesOf(context.app, context.yardId, context.now);
    },
  }),
  defineRoute({
    method: 'put', path: '/yards/:yardId/days/:on', tag, summary: 'Makes one day otherwise than its weekday: nobody there, or somebody there for longer. Neither makes it ordinary again.',
    access: mayChange, params: dayPath, body: putDayChangeRequestSchema, response: wishesResponseSchema,
    handler: async (context) => {
      await putDayChange(changeOf(context), context.params.on, context.body);
      return wishesOf(context.app, context.yardId, context.now);
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/locks', tag, summary: 'Fixes a set: every plan keeps it, or says that it cannot.',
    access: mayChange, params: yardPath, body: createLockRequestSchema, response: wishesResponseSchema, status: 201,
    handler: async (context) => {
      await lockSet(changeOf(context), context.body);
      return wishesOf(context.app, context.yardId, context.now);
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/locks/:lockId', tag, summary: 'Lets a fixed set go.',
    access: mayChange, params: lockPath, response: wishesResponseSchema,
    handler: async (context) => {
      await unlockSet(changeOf(context), context.params.lockId);
      return wishesOf(context.app, context.yardId, context.now);
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/plan/what-if', tag, summary: 'How the plan would differ if things were otherwise. Nothing is kept.',
    access: { yard: 'plan.recompute' }, params: yardPath, body: whatIfRequestSchema, response: whatIfResponseSchema, transaction: false,
    handler: (context) => weighChanges(context.app, changeOf(context), context.body.changes),
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/plan/changes', tag, summary: 'Keeps what was weighed: the changes become facts of the yard, and the plan follows.',
    access: mayChange, params: yardPath, body: whatIfRequestSchema, response: doneSchema,
    handler: async (context) => {
      await keepChanges(changeOf(context), context.body.changes);
      return done;
    },
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/plan/versions', tag, summary: 'Versions of the plan, newest first: what made each new, and what it says differently.',
    access: mayRead, params: yardPath, response: planVersionsResponseSchema,
    handler: async ({ app, yardId }) => presentPlanVersions(await readPlanVersions(app.database, yardId)),
  }),
];
