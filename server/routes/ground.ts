import { deleteObservation, putObservation } from '@/server/commands/ground/changeObservations';
import { deleteSeenStage, putSeenStage } from '@/server/commands/ground/changeSeenStages';
import { deleteSunDiaryPage, putSunDiaryPage } from '@/server/commands/ground/changeSunDiary';
import type { AppContext } from '@/server/context';
import { notFound } from '@/server/errors';
import { presentObservation, presentZoneSun } from '@/server/presenters/ground';
import { readObservations } from '@/server/readModels/readGround';
import { readSunOfZone } from '@/server/readModels/zoneSun';
import { doneSchema } from '@/shared/contracts/common';
import {
  observationListResponseSchema, putObservationRequestSchema, putSeenStageRequestSchema, putSunDiaryRequestSchema, zoneSunResponseSchema, type ZoneSunResponse,
} from '@/shared/contracts/ground';
import { defineRoute } from './route';
import { changeOf, done, yardPath, zoneDayPath, zonePath } from './yardPaths';

const tag = 'Ground';
const mayRead = { yard: 'yard.read' } as const;
const mayRecord = { yard: 'tests.record' } as const;
/** As many as a season brings. */
const OBSERVATIONS_SHOWN = 200;

async function sunOf(app: AppContext, yardId: string, zoneId: string, now: Date): Promise<ZoneSunResponse> {
  const sun = await readSunOfZone(app.database, yardId, zoneId);
  if (sun === null) {
    throw notFound('zone');
  }
  return presentZoneSun(sun, now);
}

export const groundRoutes = [
  defineRoute({
    method: 'get', path: '/yards/:yardId/observations', tag, summary: 'What people found in the ground of the zones, newest day first.',
    access: mayRead, params: yardPath, response: observationListResponseSchema,
    handler: async ({ app, yardId }) => ({ observations: (await readObservations(app.database, yardId, OBSERVATIONS_SHOWN)).map(presentObservation) }),
  }),
  defineRoute({
    method: 'put', path: '/yards/:yardId/zones/:zoneId/observations/:on', tag, summary: 'Keeps what a screwdriver or a probe told on the morning of a day; it moves the balance by its weight.',
    access: mayRecord, params: zoneDayPath, body: putObservationRequestSchema, response: doneSchema,
    handler: async (context) => {
      await putObservation(changeOf(context), context.params.zoneId, context.params.on, context.body);
      return done;
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/zones/:zoneId/observations/:on', tag, summary: 'Takes an observation back.', access: mayRecord, params: zoneDayPath, response: doneSchema,
    handler: async (context) => {
      await deleteObservation(changeOf(context), context.params.zoneId, context.params.on);
      return done;
    },
  }),
  defineRoute({
    method: 'put', path: '/yards/:yardId/zones/:zoneId/seen-stages/:on', tag, summary: 'Keeps the stage of a sowing that somebody saw on a day; it overrules the heat sum.',
    access: mayRecord, params: zoneDayPath, body: putSeenStageRequestSchema, response: doneSchema,
    handler: async (context) => {
      await putSeenStage(changeOf(context), context.params.zoneId, context.params.on, context.body.stage);
      return done;
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/zones/:zoneId/seen-stages/:on', tag, summary: 'Takes a reported stage back.', access: mayRecord, params: zoneDayPath, response: doneSchema,
    handler: async (context) => {
      await deleteSeenStage(changeOf(context), context.params.zoneId, context.params.on);
      return done;
    },
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/zones/:zoneId/sun', tag, summary: 'The sun diary of a zone and its light in every month.',
    access: mayRead, params: zonePath, response: zoneSunResponseSchema,
    handler: ({ app, yardId, params, now }) => sunOf(app, yardId, params.zoneId, now),
  }),
  defineRoute({
    method: 'put', path: '/yards/:yardId/zones/:zoneId/sun-diary/:on', tag, summary: 'Keeps the hours of one day in which the sun fell on the zone; the light of every month follows.',
    access: mayRecord, params: zoneDayPath, body: putSunDiaryRequestSchema, response: zoneSunResponseSchema,
    handler: async (context) => {
      const { app, yardId, params, body, now } = context;
      await putSunDiaryPage(changeOf(context), params.zoneId, params.on, body.sunnyHours);
      return sunOf(app, yardId, params.zoneId, now);
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/zones/:zoneId/sun-diary/:on', tag, summary: 'Takes a day out of the sun diary.', access: mayRecord, params: zoneDayPath, response: zoneSunResponseSchema,
    handler: async (context) => {
      const { app, yardId, params, now } = context;
      await deleteSunDiaryPage(changeOf(context), params.zoneId, params.on);
      return sunOf(app, yardId, params.zoneId, now);
    },
  }),
];
