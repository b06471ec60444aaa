import { changeRound } from '@/server/commands/rounds/changeRound';
import { skipPlannedRound } from '@/server/commands/rounds/skipPlannedRound';
import { startRound } from '@/server/commands/rounds/startRound';
import type { AppContext } from '@/server/context';
import { notFound } from '@/server/errors';
import { presentRound } from '@/server/presenters/round';
import { findRound, recentRounds } from '@/server/readModels/rounds';
import { doneSchema, idSchema } from '@/shared/contracts/common';
import { roundActionRequestSchema, roundListResponseSchema, roundSchema, skipPlannedRequestSchema, startRoundRequestSchema } from '@/shared/contracts/rounds';
import { z } from '@/shared/zod';
import { defineRoute } from './route';

const yardParams = z.object({ yardId: idSchema });
const roundParams = z.object({ yardId: idSchema, roundId: idSchema });

async function answer(app: AppContext, yardId: string, roundId: string, now: Date) {
  const round = await findRound(app.database, yardId, roundId);
  if (round === null) {
    throw notFound('round');
  }
  return presentRound(round, now);
}

export const roundRoutes = [
  defineRoute({
    method: 'post', path: '/yards/:yardId/rounds', tag: 'Rounds', summary: 'Starts a planned round; the id made on the device makes it harmless to send twice.',
    access: { yard: 'round.run' }, params: yardParams, body: startRoundRequestSchema, response: roundSchema, status: 201,
    handler: async ({ app, yardId, user, now, body }) => answer(app, yardId, await startRound({ app, yardId, userId: user.id, now }, body), now),
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/rounds', tag: 'Rounds', summary: 'Lists recent rounds, newest first.',
    access: { yard: 'plan.read' }, params: yardParams, response: roundListResponseSchema,
    handler: async ({ app, yardId, now }) => ({ rounds: (await recentRounds(app.database, yardId)).map((round) => presentRound(round, now)) }),
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/rounds/skip', tag: 'Rounds', summary: 'Leaves a planned round out, with a cause, before it starts.',
    access: { yard: 'round.run' }, params: yardParams, body: skipPlannedRequestSchema, response: doneSchema,
    handler: async ({ app, yardId, user, now, body }) => {
      await skipPlannedRound({ app, yardId, userId: user.id, now }, body);
      return { done: true as const };
    },
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/rounds/:roundId', tag: 'Rounds', summary: 'Shows one round as it stands.',
    access: { yard: 'plan.read' }, params: roundParams, response: roundSchema,
    handler: ({ app, yardId, now, params }) => answer(app, yardId, params.roundId, now),
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/rounds/:roundId/actions', tag: 'Rounds', summary: 'Moved, more minutes, cut short, set left out, water off.',
    access: { yard: 'round.run' }, params: roundParams, body: roundActionRequestSchema, response: roundSchema,
    handler: async ({ app, yardId, user, now, params, body }) => {
      await changeRound({ app, yardId, userId: user.id, now }, params.roundId, body);
      return answer(app, yardId, params.roundId, now);
    },
  }),
];
