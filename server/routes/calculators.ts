import { calculateCupTest, calculateFit, calculateRunLength } from '@/server/commands/measuring/calculate';
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
];
