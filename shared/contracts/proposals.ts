import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { civilDaySchema, idSchema, instantSchema, minutesOfDaySchema, noteSchema, personSchema, roleSchema, textSchema } from './common';
import { reasonSchema } from './plans';

export const establishmentStages = ['sown', 'coming_up', 'rooting', 'taper', 'established'] as const;
export type EstablishmentStageId = (typeof establishmentStages)[number];
export const proposalStatuses = ['open', 'accepted', 'declined', 'withdrawn'] as const;
export type ProposalStatus = (typeof proposalStatuses)[number];

/** Doses of one stage: how many a day, every how many days, how deep, and when (null: spread over daylight). */
export const stageDosesSchema = z.object({
  stage: z.enum(establishmentStages).exclude(['established']), dosesPerDay: z.number().int().min(1).max(limits.dosesPerDayMax), everyDays: z.number().int().min(1).max(14),
  depthMm: z.number().gt(0, 'A dose has a depth.').max(limits.doseDepthMaxMm), timesMinutes: z.array(minutesOfDaySchema).max(limits.dosesPerDayMax).nullable(),
  forDays: z.number().int().min(1).max(90).nullable(),
}).superRefine((doses, issue) => {
  if (doses.timesMinutes !== null) {
    if (doses.timesMinutes.length !== doses.dosesPerDay) {
      issue.addIssue({ code: 'custom', path: ['timesMinutes'], message: 'Give one time for each dose.' });
    }
    if (doses.timesMinutes.some((time, at, all) => at > 0 && time <= (all[at - 1] ?? 0))) {
      issue.addIssue({ code: 'custom', path: ['timesMinutes'], message: 'Put the times in order.' });
    }
  }
});
export const establishmentScheduleSchema = z.object({ stages: z.array(stageDosesSchema).length(4) }).superRefine(({ stages }, issue) => {
  stages.forEach((doses, at) => {
    if (doses.stage !== establishmentStages[at]) {
      issue.addIssue({ code: 'custom', path: ['stages', at, 'stage'], message: 'The stages come in the order sown, coming up, rooting, taper.' });
    }
  });
});
export type EstablishmentScheduleInput = z.infer<typeof establishmentScheduleSchema>;

export const createProposalRequestSchema = z.object({
  zoneId: idSchema, schedule: establishmentScheduleSchema,
  reason: textSchema(limits.reasonLength).min(1, 'Say why the change is wanted.'),
});
export type CreateProposalRequest = z.infer<typeof createProposalRequestSchema>;
export const decideProposalRequestSchema = z.object({ decision: z.enum(['accept', 'decline']), answer: noteSchema.default('') });
export type DecideProposalRequest = z.input<typeof decideProposalRequestSchema>;
export const proposalSchema = z.object({
  id: idSchema, zoneId: idSchema, zoneName: z.string(), author: personSchema.nullable(), reason: z.string(), scheduleBefore: establishmentScheduleSchema, schedule: establishmentScheduleSchema,
  status: z.enum(proposalStatuses), answer: z.string(), decidedBy: personSchema.nullable(), decidedAt: instantSchema.nullable(), createdAt: instantSchema,
});
export type ProposalResponse = z.infer<typeof proposalSchema>;
export const proposalListResponseSchema = z.object({ proposals: z.array(proposalSchema) });

export const seenStageSchema = z.object({ on: civilDaySchema, stage: z.enum(establishmentStages), person: personSchema.nullable() });
export type SeenStageResponse = z.infer<typeof seenStageSchema>;

/**
 * A seeded zone as its consultant tunes it. `dayNumber` is 0 on the day of sowing and negative before. `stageRange` spans when the first green may show,
 * by soil heat going faster or slower than likely. Doses count for the whole zone: with several positions a dose is done when each of them has it,
 * so a part may be done. `appliedMm` is the mean depth over the zone. `seen` are the stages that people reported, newest first; `stageFrom` says whether the
 * stage of today rests on one of them.
 */
export const establishmentResponseSchema = z.object({
  zoneId: idSchema, zoneName: z.string(), seededOn: civilDaySchema, grass: z.string(), dayNumber: z.number(), stage: z.enum(establishmentStages),
  stageRange: z.object({ emergenceFromOn: civilDaySchema.nullable(), emergenceToOn: civilDaySchema.nullable() }),
  schedule: establishmentScheduleSchema, scheduleIsDefault: z.boolean(),
  days: z.array(z.object({ on: civilDaySchema, stage: z.enum(establishmentStages), plannedDoses: z.number(), doneDoses: z.number(), skippedDoses: z.number(), appliedMm: z.number() })),
  openProposal: proposalSchema.nullable(),
  seen: z.array(seenStageSchema), stageFrom: z.enum(['heat', 'seen']),
});
export type EstablishmentResponse = z.infer<typeof establishmentResponseSchema>;

/**
 * What a yard needs; null when it is on track. The numbers and names that come with each in `values`:
 * water_still_on minutesPast · seed_missed_doses zone, missed, due · not_started sets, startMinutes · past_refill_line zone, depletionMm, refillLineMm ·
 * does_not_fit zones, shortMinutes · set_up_unfinished step · no_catch_test positions · proposal_waiting proposals.
 * `note` tells what holds a yard that needs nothing, as a reason of its plan. `rootZone` is the zone nearest to its refill line, or past it, over fourteen days.
 * `setsPlanned` and `setsDone` count sets and doses of the fourteen days up to now, without those that rain made needless.
 */
export const yardNeeds = ['surface_drying', 'seed_missed_doses', 'water_still_on', 'past_refill_line', 'not_started', 'no_catch_test', 'proposal_waiting', 'does_not_fit', 'set_up_unfinished'] as const;
export const portfolioResponseSchema = z.object({
  now: instantSchema,
  yards: z.array(z.object({
    yardId: idSchema, name: z.string(), placeName: z.string(), role: roleSchema, owners: z.array(z.string()),
    need: z.object({ code: z.enum(yardNeeds), urgent: z.boolean(), values: z.record(z.string(), z.union([z.number(), z.string()])) }).nullable(),
    note: reasonSchema.nullable(),
    rootZone: z.array(z.object({ on: civilDaySchema, depletionMm: z.number(), refillLineMm: z.number(), totalAvailableMm: z.number() })),
    rootZoneName: z.string().nullable(), setsPlanned: z.number(), setsDone: z.number(), seededZones: z.array(z.object({ zoneId: idSchema, name: z.string(), dayNumber: z.number() })),
    openProposals: z.number(),
  })),
});
export type PortfolioResponse = z.infer<typeof portfolioResponseSchema>;
export type ProposalListResponse = z.infer<typeof proposalListResponseSchema>;
