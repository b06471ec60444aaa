import { isTimeZone } from '@/shared/time';
import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { emailSchema, idSchema, instantSchema, minuteWindowSchema, nameSchema, personSchema, roleSchema, unitSystemSchema } from './common';
import {
  createBucketTestRequestSchema, createHoseRequestSchema, createPositionRequestSchema, createSprinklerRequestSchema, createTapRequestSchema,
  hoseSchema, positionSchema, sprinklerSchema, tapSchema,
} from './equipment';
import { addressDigitSchema, permitSchema, supplySchema, waterRuleSchema, waterStageSchema } from './waterRules';
import { createZoneRequestSchema, zoneSchema } from './zones';

/** Everything a person may or may not do with a yard; computed by the same policy that guards the routes. */
export const yardActions = [
  'yard.read', 'yard.update', 'yard.delete', 'facts.edit', 'tests.record', 'rain.record', 'round.run', 'plan.read', 'plan.recompute',
  'members.read', 'members.manage', 'proposal.write', 'proposal.decide', 'history.read', 'preferences.edit',
] as const;
export type YardAction = (typeof yardActions)[number];
export const abilitiesSchema = z.record(z.enum(yardActions), z.boolean());
export type Abilities = z.infer<typeof abilitiesSchema>;

const latitude = z.number().min(-limits.latitudeMaxDeg, 'Dapple works between the polar circles.').max(limits.latitudeMaxDeg, 'Dapple works between the polar circles.');
const placeFields = {
  placeName: nameSchema, latitudeDeg: latitude, longitudeDeg: z.number().min(-180).max(180),
  timeZone: z.string().max(60).refine(isTimeZone, 'That time zone is not known.'),
};

/** Elevation left out means the weather service's own, or sea level until it is known; marked as a default. */
export const createYardRequestSchema = z.object({ name: nameSchema, ...placeFields, elevationM: z.number().min(-430).max(6000).optional(), units: unitSystemSchema });
export type CreateYardRequest = z.infer<typeof createYardRequestSchema>;
export const updateYardRequestSchema = z.object({
  name: nameSchema.optional(), placeName: nameSchema.optional(), latitudeDeg: latitude.optional(), longitudeDeg: z.number().min(-180).max(180).optional(),
  timeZone: placeFields.timeZone.optional(), elevationM: z.number().min(-430).max(6000).nullable().optional(), units: unitSystemSchema.optional(),
  moveMinutes: z.number().int().min(1).max(60).nullable().optional(), reminderLeadMinutes: z.number().int().min(0).max(720).optional(),
  /** Null: not known. */
  addressDigit: addressDigitSchema.nullable().optional(),
  waterStage: waterStageSchema.nullable().optional(),
  /** Null: nothing but the taps limits the flow. */
  supply: supplySchema.nullable().optional(),
});
export type UpdateYardRequest = z.infer<typeof updateYardRequestSchema>;

export const homeWindowSchema = z.object({ weekday: z.number().int().min(0).max(6), fromMinutes: z.number(), toMinutes: z.number(), isDefault: z.boolean() });
/** Hours at home: 0 is Sunday. Windows of one weekday may not overlap. */
export const putHoursRequestSchema = z.object({
  windows: z.array(z.object({ weekday: z.number().int().min(0).max(6) }).and(minuteWindowSchema)).max(7 * limits.windowsPerDay),
}).superRefine(({ windows }, issue) => {
  windows.forEach((window, index) => {
    const clash = windows.some((other, at) => at < index && other.weekday === window.weekday && other.fromMinutes < window.toMinutes && window.fromMinutes < other.toMinutes);
    if (clash) {
      issue.addIssue({ code: 'custom', path: ['windows', index, 'fromMinutes'], message: 'Two times of one day overlap.' });
    }
  });
});
export type PutHoursRequest = z.infer<typeof putHoursRequestSchema>;
export const hoursResponseSchema = z.object({ hours: z.array(homeWindowSchema) });

/** Deleting takes everything of the yard with it, so its name has to be written out. */
export const deleteYardRequestSchema = z.object({ name: z.string().trim().min(1, 'Write the name of the yard.').max(limits.nameLength) });

export const yardSummarySchema = z.object({
  id: idSchema, name: z.string(), placeName: z.string(), role: roleSchema, timeZone: z.string(), units: unitSystemSchema,
});
export type YardSummary = z.infer<typeof yardSummarySchema>;
export const yardListResponseSchema = z.object({ yards: z.array(yardSummarySchema) });
export type YardListResponse = z.infer<typeof yardListResponseSchema>;

/** What is still to do before the plan rests on the yard's own measurements. */
export const setUpStepSchema = z.object({ step: z.enum(['tap', 'bucket_test', 'hose', 'sprinkler', 'zone', 'position', 'catch_test', 'hours']), done: z.boolean() });
export const yardResponseSchema = yardSummarySchema.extend({
  latitudeDeg: z.number(), longitudeDeg: z.number(), elevationM: z.number(), elevationIsDefault: z.boolean(),
  moveMinutes: z.number(), moveMinutesIsDefault: z.boolean(), reminderLeadMinutes: z.number(),
  addressDigit: z.number().nullable(), waterStage: z.number(), waterStageIsDefault: z.boolean(), supply: supplySchema.nullable(),
  taps: z.array(tapSchema), hoses: z.array(hoseSchema), sprinklers: z.array(sprinklerSchema), zones: z.array(zoneSchema), positions: z.array(positionSchema),
  hours: z.array(homeWindowSchema), rules: z.array(waterRuleSchema), permits: z.array(permitSchema), setUp: z.array(setUpStepSchema), abilities: abilitiesSchema,
  preferences: z.object({ wantsMorningEmail: z.boolean(), wantsMoveEmail: z.boolean() }),
});
export type YardResponse = z.infer<typeof yardResponseSchema>;

/**
 * All that a first plan needs, saved together or not at all: a tap with its bucket test, a hose, a sprinkler, the zones with a position in
 * each, and the hours at home (null keeps the default hours).
 */
export const setUpYardRequestSchema = z.object({
  tap: createTapRequestSchema.extend({ bucketTest: createBucketTestRequestSchema.pick({ volumeL: true, seconds: true }).nullable().default(null) }),
  hose: createHoseRequestSchema.nullable().default(null),
  sprinkler: createSprinklerRequestSchema,
  zones: z.array(createZoneRequestSchema.safeExtend({
    position: createPositionRequestSchema.pick({ mark: true, wettedAreaM2: true }).extend({ name: nameSchema.optional() }).default({ mark: '' }),
  })).min(1, 'Add at least one zone.').max(limits.zonesPerYard),
  hours: putHoursRequestSchema.nullable().default(null),
});
export type SetUpYardRequest = z.input<typeof setUpYardRequestSchema>;
export const updatePreferencesRequestSchema = z.object({ wantsMorningEmail: z.boolean().optional(), wantsMoveEmail: z.boolean().optional() });
export type UpdatePreferencesRequest = z.infer<typeof updatePreferencesRequestSchema>;
export const preferencesResponseSchema = z.object({ wantsMorningEmail: z.boolean(), wantsMoveEmail: z.boolean() });
export type PreferencesResponse = z.infer<typeof preferencesResponseSchema>;

export const memberSchema = personSchema.extend({ email: z.string(), role: roleSchema, since: instantSchema, isYou: z.boolean() });
export const createInvitationRequestSchema = z.object({ email: emailSchema, role: roleSchema });
export type CreateInvitationRequest = z.infer<typeof createInvitationRequestSchema>;
export const invitationSchema = z.object({ id: idSchema, email: z.string(), role: roleSchema, createdAt: instantSchema, expiresAt: instantSchema });
export const memberListResponseSchema = z.object({ members: z.array(memberSchema), invitations: z.array(invitationSchema) });
export type MemberListResponse = z.infer<typeof memberListResponseSchema>;
export const changeRoleRequestSchema = z.object({ role: roleSchema });
export type ChangeRoleRequest = z.infer<typeof changeRoleRequestSchema>;
/** What answers the acceptance of an invitation: where to go now. */
export const acceptInvitationResponseSchema = z.object({ yardId: idSchema, yardName: z.string(), role: roleSchema });
export type AcceptInvitationResponse = z.infer<typeof acceptInvitationResponseSchema>;
/** What the link in an invitation shows before anyone signs in. */
export const invitationPreviewResponseSchema = z.object({ yardName: z.string(), role: roleSchema, invitedBy: z.string().nullable(), email: z.string(), expiresAt: instantSchema });
export type InvitationPreviewResponse = z.infer<typeof invitationPreviewResponseSchema>;

export const historyEntrySchema = z.object({
  id: idSchema, at: instantSchema, person: personSchema.nullable(), verb: z.string(), subjectKind: z.string(), subjectId: idSchema.nullable(),
  data: z.record(z.string(), z.unknown()),
});
/** `before` takes the `nextBefore` of the page before: instant and id of its last entry, since one change may write several entries at one instant. */
export const historyQuerySchema = z.object({
  before: z.string().regex(/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z~[0-9a-f-]{36}$/, 'Give the nextBefore of the page before.')
    .refine((text) => instantSchema.safeParse(text.split('~')[0]).success && idSchema.safeParse(text.split('~')[1]).success, 'Give the nextBefore of the page before.').optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});
export const historyResponseSchema = z.object({ entries: z.array(historyEntrySchema), nextBefore: z.string().nullable() });
export type HistoryResponse = z.infer<typeof historyResponseSchema>;
