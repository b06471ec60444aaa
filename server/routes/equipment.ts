import { archiveHose, createHose, updateHose } from '@/server/commands/equipment/changeHoses';
import { archivePosition, createPosition, putPositionOrder, updatePosition } from '@/server/commands/equipment/changePositions';
import { archiveSprinkler, createSprinkler, updateSprinkler } from '@/server/commands/equipment/changeSprinklers';
import { archiveTap, createTap, updateTap } from '@/server/commands/equipment/changeTaps';
import { presentHose, presentPositions, presentSprinkler, presentTap } from '@/server/presenters/equipment';
import { readYard, type YardRow } from '@/server/readModels/readYard';
import { doneSchema } from '@/shared/contracts/common';
import {
  createHoseRequestSchema, createPositionRequestSchema, createSprinklerRequestSchema, createTapRequestSchema, hoseSchema, positionListResponseSchema, positionSchema,
  putPositionOrderRequestSchema, sprinklerSchema, tapSchema, updateHoseRequestSchema, updatePositionRequestSchema, updateSprinklerRequestSchema, updateTapRequestSchema,
} from '@/shared/contracts/equipment';
import { defineRoute, type RequestContext } from './route';
import { changeOf, done, hosePath, positionPath, present, sprinklerPath, tapPath, yardPath } from './yardPaths';

const tag = 'Equipment and positions';
const access = { yard: 'facts.edit' } as const;

type Context = RequestContext<unknown, unknown, unknown>;

async function show<T>({ app, yardId, user, now }: Context, what: string, find: (yard: YardRow) => T | undefined): Promise<T> {
  return present(await readYard(app.database, yardId, user.id, now), find, what);
}

const showTap = (context: Context, tapId: string) => show(context, 'tap', ({ taps }) => taps.map(presentTap).find((tap) => tap.id === tapId));
const showPositions = (context: Context) => show(context, 'yard', ({ positions }) => presentPositions(positions));
const showPosition = (context: Context, positionId: string) => show(context, 'position', ({ positions }) => presentPositions(positions).find((position) => position.id === positionId));

export const equipmentRoutes = [
  defineRoute({
    method: 'post', path: '/yards/:yardId/taps', tag, summary: 'Adds a tap; a flow left out is a default until a bucket test.',
    access, params: yardPath, body: createTapRequestSchema, response: tapSchema, status: 201,
    handler: async (context) => showTap(context, (await createTap(changeOf(context), context.body)).id),
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId/taps/:tapId', tag, summary: 'Changes a tap.', access, params: tapPath, body: updateTapRequestSchema, response: tapSchema,
    handler: async (context) => showTap(context, (await updateTap(changeOf(context), context.params.tapId, context.body)).id),
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/taps/:tapId', tag, summary: 'Takes a tap out of use.', access, params: tapPath, response: doneSchema,
    handler: async (context) => {
      await archiveTap(changeOf(context), context.params.tapId);
      return done;
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/hoses', tag, summary: 'Adds a hose.', access, params: yardPath, body: createHoseRequestSchema, response: hoseSchema, status: 201,
    handler: async (context) => presentHose(await createHose(changeOf(context), context.body)),
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId/hoses/:hoseId', tag, summary: 'Changes a hose; another length or bore ends the catch-cup tests made through it.',
    access, params: hosePath, body: updateHoseRequestSchema, response: hoseSchema,
    handler: async (context) => presentHose(await updateHose(changeOf(context), context.params.hoseId, context.body)),
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/hoses/:hoseId', tag, summary: 'Takes a hose out of use.', access, params: hosePath, response: doneSchema,
    handler: async (context) => {
      await archiveHose(changeOf(context), context.params.hoseId);
      return done;
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/sprinklers', tag, summary: 'Adds a sprinkler.',
    access, params: yardPath, body: createSprinklerRequestSchema, response: sprinklerSchema, status: 201,
    handler: async (context) => presentSprinkler(await createSprinkler(changeOf(context), context.body)),
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId/sprinklers/:sprinklerId', tag, summary: 'Changes a sprinkler; another kind ends the catch-cup tests made with it.',
    access, params: sprinklerPath, body: updateSprinklerRequestSchema, response: sprinklerSchema,
    handler: async (context) => presentSprinkler(await updateSprinkler(changeOf(context), context.params.sprinklerId, context.body)),
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/sprinklers/:sprinklerId', tag, summary: 'Takes a sprinkler out of use.', access, params: sprinklerPath, response: doneSchema,
    handler: async (context) => {
      await archiveSprinkler(changeOf(context), context.params.sprinklerId);
      return done;
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/positions', tag, summary: 'Adds a position at the end of the order; a wetted area left out is an even share of the zone.',
    access, params: yardPath, body: createPositionRequestSchema, response: positionSchema, status: 201,
    handler: async (context) => showPosition(context, await createPosition(changeOf(context), context.body)),
  }),
  defineRoute({
    method: 'put', path: '/yards/:yardId/positions/order', tag, summary: 'Puts the positions in the order in which the hose visits them.',
    access, params: yardPath, body: putPositionOrderRequestSchema, response: positionListResponseSchema,
    handler: async (context) => {
      await putPositionOrder(changeOf(context), context.body.positionIds);
      return { positions: await showPositions(context) };
    },
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId/positions/:positionId', tag, summary: 'Changes a position; another tap, hose or sprinkler ends its catch-cup tests.',
    access, params: positionPath, body: updatePositionRequestSchema, response: positionSchema,
    handler: async (context) => {
      await updatePosition(changeOf(context), context.params.positionId, context.body);
      return showPosition(context, context.params.positionId);
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/positions/:positionId', tag, summary: 'Takes a position out of use.', access, params: positionPath, response: doneSchema,
    handler: async (context) => {
      await archivePosition(changeOf(context), context.params.positionId);
      return done;
    },
  }),
];
