import { createProposal } from '@/server/commands/proposals/createProposal';
import { decideProposal, withdrawProposal } from '@/server/commands/proposals/decideProposal';
import { notFound } from '@/server/errors';
import { presentProposal } from '@/server/presenters/proposals';
import { readEstablishment } from '@/server/readModels/establishment';
import { readPortfolio } from '@/server/readModels/portfolio';
import { readProposals } from '@/server/readModels/proposals';
import { idSchema } from '@/shared/contracts/common';
import {
  createProposalRequestSchema, decideProposalRequestSchema, establishmentResponseSchema, portfolioResponseSchema, proposalListResponseSchema, proposalSchema, type ProposalResponse,
} from '@/shared/contracts/proposals';
import { z } from '@/shared/zod';
import { defineRoute, type RequestContext } from './route';

const tag = 'Consulting';
const yardParams = z.object({ yardId: idSchema });
const proposalParams = z.object({ yardId: idSchema, proposalId: idSchema });

async function answerProposal({ app, yardId }: RequestContext<unknown, unknown, unknown>, proposalId: string): Promise<ProposalResponse> {
  const [row] = await readProposals(app.database, yardId, proposalId);
  if (row === undefined) {
    throw notFound('proposal');
  }
  return presentProposal(row);
}

export const consultRoutes = [
  defineRoute({
    method: 'get', path: '/portfolio', tag, summary: 'All yards of the signed-in person with what each needs, those they consult first, the most pressing need first.',
    access: 'signed_in', response: portfolioResponseSchema,
    handler: ({ app, user, now }) => readPortfolio(app.database, user.id, now),
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/zones/:zoneId/establishment', tag, summary: 'How a seeded zone stands: stage, schedule, doses planned and done by day.',
    access: { yard: 'plan.read' }, params: z.object({ yardId: idSchema, zoneId: idSchema }), response: establishmentResponseSchema,
    handler: ({ app, yardId, params, now }) => readEstablishment(app.database, yardId, params.zoneId, now),
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/proposals', tag, summary: 'Proposals of the yard, open ones first.',
    access: { yard: 'plan.read' }, params: yardParams, response: proposalListResponseSchema,
    handler: async ({ app, yardId }) => ({ proposals: (await readProposals(app.database, yardId)).map(presentProposal) }),
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/proposals', tag, summary: 'Proposes other doses for a seeded zone, with a reason; an owner decides.',
    access: { yard: 'proposal.write' }, params: yardParams, body: createProposalRequestSchema, response: proposalSchema, status: 201,
    handler: async (context) => answerProposal(context, await createProposal(context, context.body)),
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/proposals/:proposalId/decision', tag, summary: 'Accepts or declines a proposal; accepted doses are in force from now on.',
    access: { yard: 'proposal.decide' }, params: proposalParams, body: decideProposalRequestSchema, response: proposalSchema,
    handler: async (context) => {
      await decideProposal(context, context.params.proposalId, context.body);
      return answerProposal(context, context.params.proposalId);
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/proposals/:proposalId/withdraw', tag, summary: 'Takes back one\'s own proposal.',
    access: { yard: 'proposal.write' }, params: proposalParams, response: proposalSchema,
    handler: async (context) => {
      await withdrawProposal(context, context.params.proposalId);
      return answerProposal(context, context.params.proposalId);
    },
  }),
];
