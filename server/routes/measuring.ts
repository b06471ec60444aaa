import { deleteBucketTest, recordBucketTest } from '@/server/commands/measuring/changeBucketTests';
import { deleteCatchTest, recordCatchTest } from '@/server/commands/measuring/changeCatchTests';
import { deleteRain, putRain } from '@/server/commands/measuring/changeRain';
import { notFound } from '@/server/errors';
import { presentCatchTest } from '@/server/presenters/catchTest';
import { presentBucketTest } from '@/server/presenters/equipment';
import { readRain } from '@/server/readModels/readRain';
import { isInYard, readBucketTests, readCatchTests } from '@/server/readModels/readTests';
import { catchTestListResponseSchema, catchTestSchema, createCatchTestRequestSchema } from '@/shared/contracts/catchTests';
import { doneSchema } from '@/shared/contracts/common';
import { bucketTestListResponseSchema, bucketTestSchema, createBucketTestRequestSchema } from '@/shared/contracts/equipment';
import { putRainRequestSchema, rainEntrySchema, rainListResponseSchema } from '@/shared/contracts/water';
import { defineRoute } from './route';
import { bucketTestPath, catchTestPath, changeOf, dayPath, done, positionPath, tapPath, yardPath } from './yardPaths';

const tag = 'Measuring';
const mayRecord = { yard: 'tests.record' } as const;
const mayRead = { yard: 'yard.read' } as const;

function first<T>(rows: readonly T[], what: string): T {
  const [row] = rows;
  if (row === undefined) {
    throw notFound(what);
  }
  return row;
}

export const measuringRoutes = [
  defineRoute({
    method: 'get', path: '/yards/:yardId/taps/:tapId/bucket-tests', tag, summary: 'Bucket tests of a tap, newest first.',
    access: mayRead, params: tapPath, response: bucketTestListResponseSchema,
    handler: async ({ app, yardId, params }) => {
      if (!await isInYard(app.database, 'taps', yardId, params.tapId)) {
        throw notFound('tap');
      }
      return { bucketTests: (await readBucketTests(app.database, yardId, params.tapId)).map(presentBucketTest) };
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/taps/:tapId/bucket-tests', tag, summary: 'Keeps a timed bucket; its flow is the flow of the tap from now on.',
    access: mayRecord, params: tapPath, body: createBucketTestRequestSchema, response: bucketTestSchema, status: 201,
    handler: async (context) => {
      const { app, yardId, params } = context;
      const testId = await recordBucketTest(changeOf(context), params.tapId, context.body);
      return presentBucketTest(first(await readBucketTests(app.database, yardId, params.tapId, testId), 'bucket test'));
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/taps/:tapId/bucket-tests/:testId', tag, summary: 'Takes a bucket test back.',
    access: mayRecord, params: bucketTestPath, response: doneSchema,
    handler: async (context) => {
      await deleteBucketTest(changeOf(context), context.params.tapId, context.params.testId);
      return done;
    },
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/positions/:positionId/catch-tests', tag, summary: 'Catch-cup tests of a position, newest first.',
    access: mayRead, params: positionPath, response: catchTestListResponseSchema,
    handler: async ({ app, yardId, params, now }) => {
      if (!await isInYard(app.database, 'positions', yardId, params.positionId)) {
        throw notFound('position');
      }
      return { catchTests: (await readCatchTests(app.database, yardId, params.positionId, now)).map(presentCatchTest) };
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/positions/:positionId/catch-tests', tag, summary: 'Keeps a catch-cup test; it sets the rate of the position until something about it changes.',
    access: mayRecord, params: positionPath, body: createCatchTestRequestSchema, response: catchTestSchema, status: 201,
    handler: async (context) => {
      const { app, yardId, params, now } = context;
      const testId = await recordCatchTest(changeOf(context), params.positionId, context.body);
      return presentCatchTest(first(await readCatchTests(app.database, yardId, params.positionId, now, testId), 'catch-cup test'));
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/positions/:positionId/catch-tests/:testId', tag, summary: 'Takes a catch-cup test back.',
    access: mayRecord, params: catchTestPath, response: doneSchema,
    handler: async (context) => {
      await deleteCatchTest(changeOf(context), context.params.positionId, context.params.testId);
      return done;
    },
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/rain', tag, summary: 'Rain gauge readings, newest day first.', access: mayRead, params: yardPath, response: rainListResponseSchema,
    handler: async ({ app, yardId }) => ({ entries: await readRain(app.database, yardId) }),
  }),
  defineRoute({
    method: 'put', path: '/yards/:yardId/rain/:on', tag, summary: 'Keeps what the rain gauge showed for a day; it overrules the weather service.',
    access: { yard: 'rain.record' }, params: dayPath, body: putRainRequestSchema, response: rainEntrySchema,
    handler: async (context) => {
      const { params, body } = context;
      await putRain(changeOf(context), params.on, body.depthMm);
      return { on: params.on, depthMm: body.depthMm };
    },
  }),
  defineRoute({
    method: 'delete', path: '/yards/:yardId/rain/:on', tag, summary: 'Takes a rain gauge reading back.', access: { yard: 'rain.record' }, params: dayPath, response: doneSchema,
    handler: async (context) => {
      await deleteRain(changeOf(context), context.params.on);
      return done;
    },
  }),
];
