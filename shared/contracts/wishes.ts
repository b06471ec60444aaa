import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { civilDaySchema, idSchema, instantSchema, minuteWindowSchema, minutesOfDaySchema, personSchema, textSchema } from './common';
import { setKinds } from './plans';

/** What counts most in a plan; the planner's weights for each are in scheduling/planning/planObjective. */
export const planPriorities = ['keep_green', 'spare_water', 'spare_me', 'let_rest'] as const;
export type PlanPriorityId = (typeof planPriorities)[number];

const windows = z.array(minuteWindowSchema).max(limits.windowsPerDay);
const windowsOut = z.array(z.object({ fromMinutes: z.number(), toMinutes: z.number() }));
const capLitres = z.number().positive('Give more than nothing, or leave it out.').max(limits.monthCapMaxL);

/** What people of a yard wish of its plan. Preferred hours are a wish within the hours at home; the cap is a limit. */
export const putWishesRequestSchema = z.object({ priority: z.enum(planPriorities), preferredWindows: windows, monthCapLitres: capLitres.nullable() });
export type PutWishesRequest = z.infer<typeof putWishesRequestSchema>;

/** How one day differs from its weekday: nobody there, or somebody there for longer. Both left out makes it an ordinary day again. */
export const putDayChangeRequestSchema = z.object({ dayOff: z.boolean(), extraWindows: windows })
  .refine((change) => !change.dayOff || change.extraWindows.length === 0, { message: 'A day off has no hours.', path: ['extraWindows'] });
export type PutDayChangeRequest = z.infer<typeof putDayChangeRequestSchema>;

export const createLockRequestSchema = z.object({
  positionId: idSchema, on: civilDaySchema, startMinutes: minutesOfDaySchema, minutes: z.number().int().min(1).max(720), reason: textSchema(limits.noteLength).default(''),
});
export type CreateLockRequest = z.input<typeof createLockRequestSchema>;

export const wishesResponseSchema = z.object({
  priority: z.enum(planPriorities), preferredWindows: windowsOut, monthCapLitres: z.number().nullable(),
  /** True when nobody has said anything: the lawn's health counts most. */
  isDefault: z.boolean(),
  /** Water drawn in this civil month so far [L]. */
  usedThisMonthLitres: z.number(),
  dayChanges: z.array(z.object({ on: civilDaySchema, dayOff: z.boolean(), extraWindows: windowsOut })),
  locks: z.array(z.object({ id: idSchema, positionId: idSchema, on: civilDaySchema, startMinutes: z.number(), minutes: z.number(), reason: z.string(), person: personSchema.nullable() })),
});
export type WishesResponse = z.infer<typeof wishesResponseSchema>;

/** One thing that could be otherwise. */
export const planChangeSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('day_off'), on: civilDaySchema }),
  z.object({ kind: z.literal('more_hours'), on: civilDaySchema, fromMinutes: minutesOfDaySchema, toMinutes: z.number().int().min(1).max(1440) }),
  z.object({ kind: z.literal('let_rest'), zoneId: idSchema }),
  z.object({ kind: z.literal('month_cap'), litres: capLitres.nullable() }),
  z.object({ kind: z.literal('priority'), priority: z.enum(planPriorities) }),
]).refine((change) => change.kind !== 'more_hours' || change.fromMinutes < change.toMinutes, { message: 'The end must come after the start.', path: ['toMinutes'] });
export type PlanChange = z.infer<typeof planChangeSchema>;
export const whatIfRequestSchema = z.object({ changes: z.array(planChangeSchema).min(1, 'Say what would be otherwise.').max(20) });
export type WhatIfRequest = z.infer<typeof whatIfRequestSchema>;

/** A set as the comparison of two plans names it. */
export const setLineSchema = z.object({ positionId: idSchema, zoneId: idSchema, on: civilDaySchema, kind: z.enum(setKinds), startMinutes: z.number(), minutes: z.number() });
export type SetLine = z.infer<typeof setLineSchema>;
export const planDifferenceSchema = z.object({
  added: z.array(setLineSchema), dropped: z.array(setLineSchema),
  /** The same set at another time or length. */
  changed: z.array(z.object({ before: setLineSchema, after: setLineSchema })),
});
export type PlanDifference = z.infer<typeof planDifferenceSchema>;

const planSumsSchema = z.object({
  sets: z.number(), doses: z.number(), outings: z.number(), moves: z.number(), minutes: z.number(), litres: z.number(),
  /** Water that was wanted and found no time [L]. */
  shortLitres: z.number(), missedDoses: z.number(),
});
export type PlanSums = z.infer<typeof planSumsSchema>;
export const whatIfResponseSchema = z.object({
  before: planSumsSchema, after: planSumsSchema, difference: planDifferenceSchema,
  /** How dry each zone gets: days of the plan that end past the refill line, and the worst end of a day as depletion ÷ refill line. */
  risk: z.array(z.object({ zoneId: idSchema, daysPastBefore: z.number(), daysPastAfter: z.number(), worstBefore: z.number(), worstAfter: z.number() })),
});
export type WhatIfResponse = z.infer<typeof whatIfResponseSchema>;

/** A version of the plan: what made it new, and how it differs from the one before in the days that both have. */
export const planVersionSchema = z.object({
  version: z.number(), createdAt: instantSchema, cause: z.string(), difference: planDifferenceSchema,
  events: z.array(z.object({ id: idSchema, at: instantSchema, person: personSchema.nullable(), verb: z.string(), subjectKind: z.string(), subjectId: idSchema.nullable(), data: z.record(z.string(), z.unknown()) })),
});
export const planVersionsResponseSchema = z.object({ versions: z.array(planVersionSchema) });
export type PlanVersionsResponse = z.infer<typeof planVersionsResponseSchema>;
