import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { idSchema, instantSchema, noteSchema, personSchema } from './common';
import { testExpiryCauses } from './equipment';

export const windWords = ['calm', 'light', 'breezy'] as const;
export type WindWord = (typeof windWords)[number];

export const cupLayoutSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('grid'), rows: z.number().int().min(1).max(40), columns: z.number().int().min(1).max(40), spacingM: z.number().gt(0).max(30) }),
  /** From the sprinkler outwards; pattern says what the row stands for, a full circle when left out. */
  z.object({ kind: z.literal('row'), spacingM: z.number().gt(0).max(30), firstDistanceM: z.number().min(0).max(30), pattern: z.enum(['full_circle', 'strip']).optional() }),
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
  if (test.readings.every((value) => value === null)) {
    issue.addIssue({ code: 'custom', path: ['readings'], message: 'Give what at least one cup held.' });
  }
  // 1 mL or 1 g spread over the mouth: 4000 / π mm for a mouth of 1 mm across.
  const mmPerUnit = test.reading.kind === 'depth' ? 1 : 4_000 / (Math.PI * test.reading.mouthDiameterMm ** 2);
  test.readings.forEach((value, index) => {
    if (value !== null && value * mmPerUnit > limits.cupDepthMaxMm) {
      issue.addIssue({ code: 'custom', path: ['readings', index], message: 'That would stand deeper than a cup.' });
    }
  });
});
export type CupTestInput = z.infer<typeof cupTestInputSchema>;

export const createCatchTestRequestSchema = cupTestInputSchema.safeExtend({ wind: z.enum(windWords), note: noteSchema.default('') });
export type CreateCatchTestRequest = z.input<typeof createCatchTestRequestSchema>;

/** What can be wrong with a test. The screens say it in words. */
export const cupProblemCodes = ['all_empty', 'too_shallow', 'too_few_cups', 'cups_missing', 'poor_coverage', 'odd_cup', 'multiplier_limited'] as const;
/** With one of these there is no result; the others make it doubtful and stay with it. */
export const stoppingCupProblems: readonly (typeof cupProblemCodes)[number][] = ['all_empty'];
export const cupProblemSchema = z.object({ code: z.enum(cupProblemCodes), cups: z.array(z.number().int()), values: z.record(z.string(), z.union([z.number(), z.string()])) });
const rangeSchema = z.object({ low: z.number(), high: z.number() });
/** The shape of scheduling/sprinkler's CupTestResult. */
export const cupTestResultSchema = z.object({
  depthsMm: z.array(z.number().nullable()), cupCount: z.number(), meanMm: z.number(), rateMmPerHour: z.number(), rateRange: rangeSchema,
  lowQuarterUniformity: z.number().nullable(), lowQuarterRange: rangeSchema.nullable(), lowHalfUniformity: z.number().nullable(), christiansenPct: z.number().nullable(),
  runTimeMultiplier: z.number(), lowQuarterMultiplier: z.number().nullable(), lowQuarterCups: z.array(z.number().int()), problems: z.array(cupProblemSchema),
});
export type CupTestResultResponse = z.infer<typeof cupTestResultSchema>;

export const catchTestSchema = z.object({
  id: idSchema, positionId: idSchema, layout: cupLayoutSchema, reading: cupReadingSchema, readings: z.array(z.number().nullable()), minutes: z.number(),
  wind: z.enum(windWords), note: z.string(), result: cupTestResultSchema, testedAt: instantSchema, testedBy: personSchema.nullable(),
  /** Why it no longer describes its position; null while it does. */
  expiredBecause: z.enum(testExpiryCauses).nullable(),
});
export type CatchTestResponse = z.infer<typeof catchTestSchema>;
export const catchTestListResponseSchema = z.object({ catchTests: z.array(catchTestSchema) });

/** Public calculator: the same computation without an account, and the minutes for the depths asked for. */
export const cupTestCalculatorRequestSchema = cupTestInputSchema.safeExtend({ wantedDepthsMm: z.array(z.number().gt(0).max(200)).max(8).default([12.7, 25.4]) }).superRefine((test, issue) => {
  const read = test.readings.filter((value) => value !== null);
  if (read.length === 1) {
    issue.addIssue({ code: 'custom', path: ['readings'], message: 'One cup says nothing about evenness: set out two or more.' });
  } else if (read.length > 1 && read.every((value) => value === 0)) {
    issue.addIssue({ code: 'custom', path: ['readings'], message: 'No cup caught any water: check that the sprinkler reached them.' });
  }
});
export type CupTestCalculatorRequest = z.input<typeof cupTestCalculatorRequestSchema>;
/** A problem that stops leaves `result` null and no minutes. `minutes` are for the mean, `evenedMinutes` with the run-time multiplier. */
export const cupTestCalculatorResponseSchema = z.object({
  result: cupTestResultSchema.nullable(), problems: z.array(cupProblemSchema),
  minutesFor: z.array(z.object({ depthMm: z.number(), minutes: z.number(), evenedMinutes: z.number() })),
});
export type CupTestCalculatorResponse = z.infer<typeof cupTestCalculatorResponseSchema>;
/** The expected rate, or a flow and the area it wets; with neither, the rate of a wide-open portable sprinkler is taken and marked as a default. */
export const runLengthRequestSchema = z.object({
  rateMmPerHour: z.number().gt(0).max(500).optional(), flowLpm: z.number().min(limits.flowMinLpm).max(limits.flowMaxLpm).optional(),
  wettedAreaM2: z.number().gt(0).max(limits.areaMaxM2).optional(), reading: cupReadingSchema,
}).superRefine((question, issue) => {
  if (question.rateMmPerHour === undefined && (question.flowLpm === undefined) !== (question.wettedAreaM2 === undefined)) {
    issue.addIssue({ code: 'custom', path: [question.flowLpm === undefined ? 'flowLpm' : 'wettedAreaM2'], message: 'Give the flow and the area that it wets, or neither.' });
  }
});
export type RunLengthRequest = z.infer<typeof runLengthRequestSchema>;
export const runLengthResponseSchema = z.object({
  minutes: z.number(), readableDepthMm: z.number(), readingErrorMm: z.number(), expectedRateMmPerHour: z.number(), isTooSlowToRead: z.boolean(),
  rateSource: z.enum(['given', 'flow_and_area', 'default']),
});
export type RunLengthResponse = z.infer<typeof runLengthResponseSchema>;

export const doesItFitRequestSchema = z.object({
  areaM2: z.number().gt(0).max(limits.areaMaxM2), depthMmPerWeek: z.number().gt(0).max(200), flowLpm: z.number().min(limits.flowMinLpm).max(limits.flowMaxLpm),
  hoursPerWeek: z.number().min(0).max(168), movesPerWeek: z.number().int().min(0).max(500).default(0), moveMinutes: z.number().min(0).max(60).default(5),
});
export type DoesItFitRequest = z.input<typeof doesItFitRequestSchema>;
/** The shape of scheduling/sprinkler's FitAnswer; load is needed over had, null when there are no hours at all. */
export const doesItFitResponseSchema = z.object({
  volumeLPerWeek: z.number(), waterHours: z.number(), moveHours: z.number(), neededHours: z.number(), hadHours: z.number(), load: z.number().nullable(), fits: z.boolean(),
  affordableDepthMm: z.number(), affordableAreaM2: z.number(),
});
export type DoesItFitResponse = z.infer<typeof doesItFitResponseSchema>;
