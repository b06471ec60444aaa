import { z } from '@/shared/zod';
import { civilDaySchema, idSchema, instantSchema } from './common';

export const setKinds = ['set', 'dose'] as const;
export type SetKind = (typeof setKinds)[number];

/** A reason is a code with its numbers in SI; shared/reasons renders it as a sentence in the yard's units. */
export const reasonSchema = z.object({ code: z.string(), values: z.record(z.string(), z.union([z.number(), z.string()])) });

export const plannedSetSchema = z.object({
  id: idSchema, positionId: idSchema, zoneId: idSchema, tapId: idSchema, kind: z.enum(setKinds), on: civilDaySchema, roundIndex: z.number(), sortOrder: z.number(),
  startMinutes: z.number(), minutes: z.number(), startAt: instantSchema, endAt: instantSchema, depthMm: z.number(), grossMm: z.number(), reasons: z.array(reasonSchema),
  /** Stands half-way between the marks of its position this time. */
  halfWay: z.boolean(),
});
export type PlannedSetResponse = z.infer<typeof plannedSetSchema>;
export const planDaySchema = z.object({
  on: civilDaySchema, rounds: z.array(z.object({ roundIndex: z.number(), startMinutes: z.number(), endMinutes: z.number(), moves: z.number(), sets: z.array(plannedSetSchema) })),
  zonesWithout: z.array(z.object({ zoneId: idSchema, reasons: z.array(reasonSchema) })),
  /** Depletion to expect at the end of the day with the planned sets and the rain that the planner counts on [mm]. */
  endDepletions: z.array(z.object({ zoneId: idSchema, depletionMm: z.number() })),
});
export const planResponseSchema = z.object({
  version: z.number(), createdAt: instantSchema, cause: z.string(), planner: z.string(), fromOn: civilDaySchema, toOn: civilDaySchema, weatherAsOf: instantSchema.nullable(),
  days: z.array(planDaySchema), missing: z.array(reasonSchema),
  shortages: z.array(z.object({ zoneId: idSchema, on: civilDaySchema, shortMm: z.number(), shortMinutes: z.number(), litres: z.number(), reasons: z.array(reasonSchema) })),
});
export type PlanResponse = z.infer<typeof planResponseSchema>;
