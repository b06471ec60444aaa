import { z } from '@/shared/zod';
import { civilDaySchema, idSchema, instantSchema, personSchema } from './common';
import { plannedSetSchema, reasonSchema, setKinds } from './plans';
import { zoneSchema } from './zones';

export const roundStatuses = ['running', 'ended'] as const;
export type RoundStatus = (typeof roundStatuses)[number];
export const roundSetStatuses = ['waiting', 'running', 'done', 'cut_short', 'skipped'] as const;
export type RoundSetStatus = (typeof roundSetStatuses)[number];
export const skipCauses = ['rain', 'wind', 'no_time', 'not_at_home', 'tap_trouble', 'ground_wet', 'other'] as const;
export type SkipCause = (typeof skipCauses)[number];

export const roundSetSchema = z.object({
  id: idSchema, roundId: idSchema.nullable(), zoneId: idSchema, positionId: idSchema, tapId: idSchema, kind: z.enum(setKinds), sortOrder: z.number(), plannedStartAt: instantSchema,
  plannedMinutes: z.number(), addedMinutes: z.number(), status: z.enum(roundSetStatuses), skipCause: z.enum(skipCauses).nullable(),
  startedAt: instantSchema.nullable(), endsAt: instantSchema.nullable(), endedAt: instantSchema.nullable(), minutesRun: z.number().nullable(), rateMmPerHour: z.number(),
  /** Stands half-way between the marks of its position. */
  halfWay: z.boolean(),
  /** Net depth that the set time gives, minutes that were added included, as the plan and the budget count it [mm]. */
  wantedMm: z.number(),
  /** Net depth that it gave [mm]; null until it has ended. */
  gaveMm: z.number().nullable(),
});
export type RoundSetResponse = z.infer<typeof roundSetSchema>;
export const roundSchema = z.object({
  id: idSchema, on: civilDaySchema, roundIndex: z.number(), status: z.enum(roundStatuses), startedBy: personSchema.nullable(), startedAt: instantSchema,
  waterOffBy: personSchema.nullable(), waterOffAt: instantSchema.nullable(), endedAt: instantSchema.nullable(), sets: z.array(roundSetSchema), now: instantSchema,
});
export type RoundResponse = z.infer<typeof roundSchema>;
export const roundListResponseSchema = z.object({ rounds: z.array(roundSchema) });

/** The id is made on the device, so that a second tap or a replay starts the same round. */
export const startRoundRequestSchema = z.object({ id: idSchema, on: civilDaySchema, roundIndex: z.number().int().min(0).max(50) });
export type StartRoundRequest = z.infer<typeof startRoundRequestSchema>;
/**
 * moved: the set that ran on this tap has ended, the hose stands at the next position; setId names the set that begins.
 * add_minutes: ten more minutes (or the number given) on the running set. skip: leave a waiting set out, with a cause.
 * cut_short: end the running set without water off (the next begins with moved); at its time it counts as done. water_off: the tap is closed; ends the round.
 */
export const roundActionRequestSchema = z.discriminatedUnion('action', [
  z.object({ action: z.literal('moved'), setId: idSchema }),
  z.object({ action: z.literal('add_minutes'), setId: idSchema, minutes: z.number().int().min(1).max(120).default(10) }),
  z.object({ action: z.literal('cut_short'), setId: idSchema }),
  z.object({ action: z.literal('skip'), setId: idSchema, cause: z.enum(skipCauses) }),
  z.object({ action: z.literal('water_off') }),
]);
export type RoundActionRequest = z.input<typeof roundActionRequestSchema>;
export const skipPlannedRequestSchema = z.object({ on: civilDaySchema, roundIndex: z.number().int().min(0).max(50), cause: z.enum(skipCauses) });

export const todayRoundSchema = z.object({
  roundIndex: z.number(), startMinutes: z.number(), endMinutes: z.number(), moves: z.number(), kind: z.enum(setKinds), sets: z.array(plannedSetSchema),
  state: z.enum(['waiting', 'running', 'done', 'skipped', 'missed']), roundId: idSchema.nullable(), skipCause: z.enum(skipCauses).nullable(),
});
export const todayResponseSchema = z.object({
  now: instantSchema, today: civilDaySchema, nowMinutes: z.number(), yardName: z.string(), timeZone: z.string(),
  weather: z.object({ tminC: z.number().nullable(), tmaxC: z.number().nullable(), windMps: z.number().nullable(), rainTodayMm: z.number().nullable(), nextRainOn: civilDaySchema.nullable(), sample: z.boolean(), asOf: instantSchema.nullable(), stale: z.boolean() }).nullable(),
  rounds: z.array(todayRoundSchema), runningRoundId: idSchema.nullable(),
  zonesWithout: z.array(z.object({ zoneId: idSchema, reasons: z.array(reasonSchema) })), missing: z.array(reasonSchema),
  nextSet: z.object({ on: civilDaySchema, startMinutes: z.number(), zoneId: idSchema }).nullable(),
  zones: z.array(zoneSchema.pick({ id: true, name: true }).extend({ depletionMm: z.number().nullable(), refillLineMm: z.number().nullable(), totalAvailableMm: z.number().nullable(), isSeeded: z.boolean() })),
  openProposals: z.number(),
});
export type TodayResponse = z.infer<typeof todayResponseSchema>;
export type RoundListResponse = z.infer<typeof roundListResponseSchema>;
