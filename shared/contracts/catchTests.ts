import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { idSchema, instantSchema, noteSchema, personSchema } from './common';

export const windWords = ['calm', 'light', 'breezy'] as const;
export type WindWord = (typeof windWords)[number];

export const cupLayoutSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('grid'), rows: z.number().int().min(1).max(40), columns: z.number().int().min(1).max(40), spacingM: z.number().gt(0).max(30) }),
  z.object({ kind: z.literal('row'), spacingM: z.number().gt(0).max(30), firstDistanceM: z.number().min(0).max(30) }),
]);
export type CupLayout = z.infer<typeof cupLayoutSchema>;

/** Depth readings are in mm, volumes in mL, weights in g of water; the mouth is the inside width of a round cup. */
export const cupReadingSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('depth') }),
  z.object({ kind: z.literal('volume'), mouthDiameterMm: z.number().min(limits.cupMouthMinMm, 'That is narrower than a cup.').max(limits.cupMouthMaxMm, 'That is wider than a cup.') }),
  z.object({ kind: z.literal('weight'), mouthDiameterMm: z.number().min(limits.cupMouthMinMm, 'That is narrower than a cup.').max(limits.cupMouthMaxMm, 'That is wider than a cup.') }),
]);
export type CupReading = z.infer<typeof cupReadingSchema>;

const readingValue = z.number().min(0, 'A cup cannot hold less than nothing.').max(limits.cupVolumeMaxMl).nullable();

/** Cup readings in row order; null is a cup that was not read (knocked over, lost). */
export const cupTestInputSchema = z.object({
  layout: cupLayoutSchema, reading: cupReadingSchema, minutes: z.number().gt(0, 'Give the minutes it ran.').max(limits.testMinutesMax),
  readings: z.array(readingValue).min(1).max(limits.cupsMax),
}).superRefine((test, issue) => {
  if (test.layout.kind === 'grid' && test.readings.length !== test.layout.rows * test.layout.columns) {
    issue.addIssue({ code: 'custom', path: ['readings'], message: `A grid of ${test.layout.rows} by ${test.layout.columns} has ${test.layout.rows * test.layout.columns} cups.` });
  }
  if (test.reading.kind === 'depth') {
    test.readings.forEach((value, index) => {
      if (value !== null && value > limits.cupDepthMaxMm) {
        issue.addIssue({ code: 'custom', path: ['readings', index], message: 'That is deeper than a cup.' });
      }
    });
  }
});
export type CupTestInput = z.infer<typeof cupTestInputSchema>;

export const createCatchTestRequestSchema = cupTestInputSchema.safeExtend({ wind: z.enum(windWords), note: noteSchema.default('') });
export type CreateCatchTestRequest = z.input<typeof createCatchTestRequestSchema>;

export const cupProblemSchema = z.object({ code: z.string(), severity: z.enum(['stops', 'doubts']), cups: z.array(z.number().int()), values: z.record(z.string(), z.union([z.number(), z.string()])) });
export const cupTestResultSchema = z.object({
  cupCount: z.number(), depthsMm: z.array(z.number().nullable()), meanDepthMm: z.number(), rateMmPerHour: z.number(), rateLowMmPerHour: z.number(), rateHighMmPerHour: z.number(),
  lowQuarterUniformity: z.number(), lowQuarterLow: z.number(), lowQuarterHigh: z.number(), lowHalfUniformity: z.number(), christiansenPct: z.number(),
  lowestQuarterCups: z.array(z.number().int()), runTimeMultiplier: z.number(), lowQuarterMultiplier: z.number(), problems: z.array(cupProblemSchema),
});
export type CupTestResultResponse = z.infer<typeof cupTestResultSchema>;

export const catchTestSchema = z.object({
  id: idSchema, positionId: idSchema, layout: cupLayoutSchema, reading: cupReadingSchema, readings: z.array(z.number().nullable()), minutes: z.number(),
  wind: z.enum(windWords), note: z.string(), result: cupTestResultSchema, testedAt: instantSchema, testedBy: personSchema.nullable(),
});
export type CatchTestResponse = z.infer<typeof catchTestSchema>;
export const catchTestListResponseSchema = z.object({ catchTests: z.array(catchTestSchema) });

/** Public calculator: the same computation without an account. `problems` with severity 'stops' leave `result` null. */
export const cupTestCalculatorResponseSchema = z.object({
  result: cupTestResultSchema.nullable(), problems: z.array(cupProblemSchema),
  minutesFor: z.array(z.object({ depthMm: z.number(), minutes: z.number() })),
});
export const runLengthRequestSchema = z.object({
  rateMmPerHour: z.number().gt(0).max(500).optional(), flowLpm: z.number().min(limits.flowMinLpm).max(limits.flowMaxLpm).optional(),
  wettedAreaM2: z.number().gt(0).max(limits.areaMaxM2).optional(), reading: cupReadingSchema,
});
export const runLengthResponseSchema = z.object({ minutes: z.number(), expectedRateMmPerHour: z.number(), rateSource: z.enum(['given', 'flow_and_area', 'default']), expectedDepthMm: z.number() });

export const doesItFitRequestSchema = z.object({
  areaM2: z.number().gt(0).max(limits.areaMaxM2), depthMmPerWeek: z.number().gt(0).max(200), flowLpm: z.number().min(limits.flowMinLpm).max(limits.flowMaxLpm),
  hoursPerWeek: z.number().min(0).max(168), movesPerWeek: z.number().int().min(0).max(500).default(0), moveMinutes: z.number().min(0).max(60).default(5),
});
export type DoesItFitRequest = z.input<typeof doesItFitRequestSchema>;
export const doesItFitResponseSchema = z.object({
  hoursNeeded: z.number(), runHours: z.number(), moveHours: z.number(), hoursHad: z.number(), fits: z.boolean(), shareServed: z.number(), volumeL: z.number(), shortHours: z.number(),
});
export type DoesItFitResponse = z.infer<typeof doesItFitResponseSchema>;
