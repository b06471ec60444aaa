import { archiveZone, createZone, updateZone } from '@/server/commands/yards/changeZones';
import { presentZone } from '@/server/presenters/yard';
import { doneSchema } from '@/shared/contracts/common';
import { createZoneRequestSchema, updateZoneRequestSchema, zoneSchema } from '@/shared/contracts/zones';
import { defineRoute } from './route';
import { changeOf, done, yardPath, zonePath } from './yardPaths';

const tag = 'Zones';
const access = { yard: 'facts.edit' } as const;

export const zoneRoutes = [
  defineRoute({
    method: 'post', path: '/yards/:yardId/zones', tag, summary: 'Adds a zone; what is left out gets a default marked as one.',
    access, params: yardPath, body: createZoneRequestSchema, response: zoneSchema, status: 201,
    handler: async (context) => presentZone(await createZone(changeOf(context), context.body)),
  }),
  defineRoute({
    method: 'patch', path: '/yards/:yardId/zones/:zoneId', tag, summary: 'Changes a zone; null returns a field to its default.',
    access, params: zonePath, body: updateZoneRequestSchema, response: zoneSchema,
    handler: async (context) => presentZone(await updateZone(changeOf(context), context.params.zoneId, context.body)),
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/zones/:zoneId', tag, summary: 'Takes a zone out of use; its history stays.', access, params: zonePath, response: doneSchema,
    handler: async (context) => {
      await archiveZone(changeOf(context), context.params.zoneId);
      return done;
    },
  }),
];
