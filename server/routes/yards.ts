import { createWaterRule, deleteWaterRule, updateWaterRule } from '@/server/commands/yards/changeWaterRules';
import { createYard } from '@/server/commands/yards/createYard';
import { deleteYard } from '@/server/commands/yards/deleteYard';
import { putHours } from '@/server/commands/yards/putHours';
import { setUpYard } from '@/server/commands/yards/setUpYard';
import { updateYard } from '@/server/commands/yards/updateYard';
import { presentRule, presentYard } from '@/server/presenters/yard';
import { readYard, readYards } from '@/server/readModels/readYard';
import { doneSchema } from '@/shared/contracts/common';
import { createWaterRuleRequestSchema, updateWaterRuleRequestSchema, waterRuleSchema } from '@/shared/contracts/waterRules';
import {
  createYardRequestSchema, deleteYardRequestSchema, hoursResponseSchema, putHoursRequestSchema, setUpYardRequestSchema,
  updateYardRequestSchema, yardListResponseSchema, yardResponseSchema,
} from '@/shared/contracts/yards';
import { defineRoute, type RequestContext } from './route';
import { changeOf, done, present, rulePath, yardPath } from './yardPaths';

const tag = 'Yards';

async function wholeYard({ app, user, now }: Pick<RequestContext<unknown, unknown, unknown>, 'app' | 'user' | 'now'>, yardId: string) {
  return present(await readYard(app.database, yardId, user.id, now), presentYard);
}

export const yardRoutes = [
  defineRoute({
    method: 'get', path: '/yards', tag, summary: 'Yards that the person belongs to.', access: 'signed_in', response: yardListResponseSchema,
    handler: async ({ app, user }) => ({ yards: await readYards(app.database, user.id) }),
  }),
  defineRoute({
    method: 'post', path: '/yards', tag, summary: 'Makes a yard with default hours at home; its maker owns it.',
    access: 'signed_in', body: createYardRequestSchema, response: yardResponseSchema, status: 201,
    handler: async (context) => wholeYard(context, await createYard(context.app.database, context.user.id, context.body, context.now)),
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId', tag, summary: 'A yard with its facts, what is still to set up, and what the person may do.',
    access: { yard: 'yard.read' }, params: yardPath, response: yardResponseSchema,
    handler: async (context) => wholeYard(context, context.yardId),
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId', tag, summary: 'Changes what is told of a yard; null returns a field to its default.',
    access: { yard: 'yard.update' }, params: yardPath, body: updateYardRequestSchema, response: yardResponseSchema,
    handler: async (context) => {
      await updateYard(changeOf(context), context.body);
      return wholeYard(context, context.yardId);
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId', tag, summary: 'Deletes a yard with all that belongs to it. The body names the yard, so that it is meant.',
    access: { yard: 'yard.delete' }, params: yardPath, body: deleteYardRequestSchema, response: doneSchema,
    handler: async (context) => {
      await deleteYard(changeOf(context), context.body.name);
      return done;
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/set-up', tag, summary: 'Saves a tap, hose, sprinkler, zones with a position each, and hours at home: all together or none of it.',
    access: { yard: 'facts.edit' }, params: yardPath, body: setUpYardRequestSchema, response: yardResponseSchema, status: 201,
    handler: async (context) => {
      await setUpYard(changeOf(context), context.body);
      return wholeYard(context, context.yardId);
    },
  }),
  defineRoute({
    method: 'put', path: '/yards/:yardId/hours', tag, summary: 'Puts the hours at home in the place of those before.',
    access: { yard: 'facts.edit' }, params: yardPath, body: putHoursRequestSchema, response: hoursResponseSchema,
    handler: async (context) => {
      await putHours(changeOf(context), context.body);
      return { hours: (await wholeYard(context, context.yardId)).hours };
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/rules', tag, summary: 'Adds a water rule.',
    access: { yard: 'facts.edit' }, params: yardPath, body: createWaterRuleRequestSchema, response: waterRuleSchema, status: 201,
    handler: async (context) => presentRule(await createWaterRule(changeOf(context), context.body)),
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId/rules/:ruleId', tag, summary: 'Changes a water rule.',
    access: { yard: 'facts.edit' }, params: rulePath, body: updateWaterRuleRequestSchema, response: waterRuleSchema,
    handler: async (context) => presentRule(await updateWaterRule(changeOf(context), context.params.ruleId, context.body)),
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/rules/:ruleId', tag, summary: 'Removes a water rule.',
    access: { yard: 'facts.edit' }, params: rulePath, response: doneSchema,
    handler: async (context) => {
      await deleteWaterRule(changeOf(context), context.params.ruleId);
      return done;
    },
  }),
];
