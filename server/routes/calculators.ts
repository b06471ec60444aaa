import {
  calculateHoseAndBucket, calculateMoveDistance, calculateReferenceEt, calculateSeedbed, calculateSoilStore, calculateSunExposure, calculateWaterBalance,
} from '@/server/commands/calculators/reckon';
import { calculateCupTest, calculateFit, calculateRunLength } from '@/server/commands/measuring/calculate';
import {
  hoseAndBucketRequestSchema, hoseAndBucketResponseSchema, moveDistanceRequestSchema, moveDistanceResponseSchema, referenceEtRequestSchema, referenceEtResponseSchema, seedbedRequestSchema,
  seedbedResponseSchema, soilStoreRequestSchema, soilStoreResponseSchema, sunExposureRequestSchema, sunExposureResponseSchema, waterBalanceRequestSchema, waterBalanceResponseSchema,
} from '@/shared/contracts/calculators';
import {
  cupTestCalculatorRequestSchema, cupTestCalculatorResponseSchema, doesItFitRequestSchema, doesItFitResponseSchema, runLengthRequestSchema, runLengthResponseSchema,
} from '@/shared/contracts/catchTests';
import { defineRoute } from './route';

const tag = 'Calculators';
const shared = { method: 'post', tag, access: 'public', transaction: false } as const;

export const calculatorRoutes = [
  defineRoute({
    ...shared, path: '/calculators/cup-test', summary: 'Reads a catch-cup test without keeping it.', body: cupTestCalculatorRequestSchema, response: cupTestCalculatorResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateCupTest(body)),
  }),
  defineRoute({
    ...shared, path: '/calculators/run-length', summary: 'How long a catch-cup test has to run to be read.', body: runLengthRequestSchema, response: runLengthResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateRunLength(body)),
  }),
  defineRoute({
    ...shared, path: '/calculators/does-it-fit', summary: 'Whether the water of a week fits the hours of one tap.', body: doesItFitRequestSchema, response: doesItFitResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateFit(body)),
  }),
  defineRoute({
    ...shared, path: '/calculators/reference-et', summary: 'Reference evapotranspiration of a day, with every intermediate value and what was assumed.', body: referenceEtRequestSchema, response: referenceEtResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateReferenceEt(body)),
  }),
  defineRoute({
    ...shared, path: '/calculators/move-distance', summary: 'How far to move a sprinkler so that its overlapping pattern is even and little falls outside.', body: moveDistanceRequestSchema, response: moveDistanceResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateMoveDistance(body)),
  }),
  defineRoute({
    ...shared, path: '/calculators/hose-and-bucket', summary: 'Flow by a bucket test, pressure lost in the hose, and the flow through another hose.', body: hoseAndBucketRequestSchema, response: hoseAndBucketResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateHoseAndBucket(body)),
  }),
  defineRoute({
    ...shared, path: '/calculators/soil-store-and-run-limit', summary: 'What a root zone holds, when it is due, and how long a set may run before water runs off.', body: soilStoreRequestSchema, response: soilStoreResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateSoilStore(body)),
  }),
  defineRoute({
    ...shared, path: '/calculators/sun-exposure', summary: 'Hours of sun, light and reference ET of a zone through the months, behind buildings, fences and trees.', body: sunExposureRequestSchema, response: sunExposureResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateSunExposure(body)),
  }),
  defineRoute({
    ...shared, path: '/calculators/water-balance', summary: 'Water of a root zone day by day, term by term.', body: waterBalanceRequestSchema, response: waterBalanceResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateWaterBalance(body)),
  }),
  defineRoute({
    ...shared, path: '/calculators/seedbed', summary: "A seedbed's surface water by the hour under a dose schedule, what keeps it moist, and when it comes up.", body: seedbedRequestSchema, response: seedbedResponseSchema,
    handler: ({ body }) => Promise.resolve(calculateSeedbed(body)),
  }),
];
