import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { idSchema, instantSchema, nameSchema, noteSchema, personSchema } from './common';

export const sprinklerKinds = ['oscillating', 'impact', 'fixed', 'rotary', 'travelling', 'soaker', 'hand_wand'] as const;
export type SprinklerKind = (typeof sprinklerKinds)[number];

const flowLpmSchema = z.number().min(limits.flowMinLpm).max(limits.flowMaxLpm);

/** Flow left out means: use the default, marked as one until a bucket test is done. */
export const createTapRequestSchema = z.object({ name: nameSchema, flowLpm: flowLpmSchema.optional(), shutOffTimer: z.boolean().default(false) });
export type CreateTapRequest = z.input<typeof createTapRequestSchema>;
export const updateTapRequestSchema = z.object({ name: nameSchema.optional(), flowLpm: flowLpmSchema.optional(), shutOffTimer: z.boolean().optional() });
export type UpdateTapRequest = z.infer<typeof updateTapRequestSchema>;
export const tapSchema = z.object({
  id: idSchema, name: z.string(), flowLpm: z.number(), flowIsDefault: z.boolean(), shutOffTimer: z.boolean(), lastTestedAt: instantSchema.nullable(),
});
export type TapResponse = z.infer<typeof tapSchema>;

export const createHoseRequestSchema = z.object({
  name: nameSchema,
  lengthM: z.number().gt(0, 'A hose has a length.').max(limits.hoseLengthMaxM),
  boreMm: z.number().min(limits.hoseBoreMinMm).max(limits.hoseBoreMaxMm),
});
export type CreateHoseRequest = z.infer<typeof createHoseRequestSchema>;
export const updateHoseRequestSchema = createHoseRequestSchema.partial();
export type UpdateHoseRequest = z.infer<typeof updateHoseRequestSchema>;
export const hoseSchema = z.object({ id: idSchema, name: z.string(), lengthM: z.number(), boreMm: z.number() });
export type HoseResponse = z.infer<typeof hoseSchema>;

export const createSprinklerRequestSchema = z.object({ name: nameSchema, kind: z.enum(sprinklerKinds) });
export type CreateSprinklerRequest = z.infer<typeof createSprinklerRequestSchema>;
export const updateSprinklerRequestSchema = createSprinklerRequestSchema.partial();
export type UpdateSprinklerRequest = z.infer<typeof updateSprinklerRequestSchema>;
export const sprinklerSchema = z.object({ id: idSchema, name: z.string(), kind: z.enum(sprinklerKinds) });
export type SprinklerResponse = z.infer<typeof sprinklerSchema>;

export const testExpiryCauses = ['tap_changed', 'hose_changed', 'sprinkler_changed', 'season_changed'] as const;
export type TestExpiryCause = (typeof testExpiryCauses)[number];
export const rateSources = ['catch_test', 'flow_and_area', 'default'] as const;
/** catch_test: measured. flow_and_area: from a known flow and the wetted area. default: the same with a flow that nobody measured. */
export type RateSource = (typeof rateSources)[number];

/** Ground that takes only so much water: the drain field of a septic system, and the surroundings of a well. */
export const guardedGrounds = ['drain_field', 'well_head'] as const;
export type GuardedGround = (typeof guardedGrounds)[number];
/** Most that may be laid down there in any seven days [mm], 0 for none at all, and who says so. */
export const weeklyLimitSchema = z.object({
  over: z.enum(guardedGrounds), depthMm: z.number().min(0).max(limits.weeklyLimitMaxMm), source: noteSchema.min(1, 'Say who gave the limit, or where it is written.'),
});
export type WeeklyLimit = z.infer<typeof weeklyLimitSchema>;
const heightMSchema = z.number().min(0).max(limits.positionHeightMaxM);

/** Wetted area left out means: the zone's area shared evenly among its positions, marked as a default. */
export const createPositionRequestSchema = z.object({
  name: nameSchema, zoneId: idSchema, tapId: idSchema, hoseId: idSchema.nullable().default(null), sprinklerId: idSchema,
  mark: noteSchema.default(''), wettedAreaM2: z.number().gt(0).max(limits.areaMaxM2).optional(),
  heightM: heightMSchema.nullable().optional(), weeklyLimit: weeklyLimitSchema.nullable().optional(), alternateSets: z.boolean().optional(),
});
export type CreatePositionRequest = z.input<typeof createPositionRequestSchema>;
export const updatePositionRequestSchema = z.object({
  name: nameSchema.optional(), tapId: idSchema.optional(), hoseId: idSchema.nullable().optional(), sprinklerId: idSchema.optional(),
  mark: noteSchema.optional(), wettedAreaM2: z.number().gt(0).max(limits.areaMaxM2).nullable().optional(), sortOrder: z.number().int().min(0).max(10_000).optional(),
  heightM: heightMSchema.nullable().optional(), weeklyLimit: weeklyLimitSchema.nullable().optional(), alternateSets: z.boolean().optional(),
});
export type UpdatePositionRequest = z.infer<typeof updatePositionRequestSchema>;
export const positionSchema = z.object({
  id: idSchema, name: z.string(), zoneId: idSchema, tapId: idSchema, hoseId: idSchema.nullable(), sprinklerId: idSchema, mark: z.string(),
  wettedAreaM2: z.number(), wettedAreaIsDefault: z.boolean(), sortOrder: z.number(),
  /** Height above the lowest position [m]; null while nobody told it. */
  heightM: z.number().nullable(),
  weeklyLimit: weeklyLimitSchema.nullable(),
  /** The sprinkler stands on its marks and half-way between them in turns. */
  alternateSets: z.boolean(),
  rateMmPerHour: z.number(), rateSource: z.enum(rateSources),
  lowQuarterUniformity: z.number().nullable(), runTimeMultiplier: z.number(),
  lastCatchTestId: idSchema.nullable(), lastTestedAt: instantSchema.nullable(),
  /** Why the last test no longer describes this position: the tap, hose, sprinkler or season changed. */
  testExpiredBecause: z.enum(testExpiryCauses).nullable(),
});
/** Every position of the yard once, in the order in which the hose is to visit them. */
export const putPositionOrderRequestSchema = z.object({ positionIds: z.array(idSchema).min(1).max(limits.positionsPerYard) })
  .refine(({ positionIds }) => new Set(positionIds).size === positionIds.length, { message: 'Name every position once.', path: ['positionIds'] });
export const positionListResponseSchema = z.object({ positions: z.array(positionSchema) });
export type PositionResponse = z.infer<typeof positionSchema>;

export const createBucketTestRequestSchema = z.object({
  volumeL: z.number().gt(0, 'The bucket holds something.').max(limits.bucketMaxL),
  seconds: z.number().min(1, 'Time it for at least a second.').max(limits.bucketMaxSeconds),
  hoseId: idSchema.nullable().default(null), sprinklerId: idSchema.nullable().default(null),
});
export type CreateBucketTestRequest = z.input<typeof createBucketTestRequestSchema>;
export const bucketTestSchema = z.object({
  id: idSchema, tapId: idSchema, hoseId: idSchema.nullable(), sprinklerId: idSchema.nullable(), volumeL: z.number(), seconds: z.number(),
  flowLpm: z.number(), flowLowLpm: z.number(), flowHighLpm: z.number(), testedAt: instantSchema, testedBy: personSchema.nullable(),
});
export type BucketTestResponse = z.infer<typeof bucketTestSchema>;
export const bucketTestListResponseSchema = z.object({ bucketTests: z.array(bucketTestSchema) });
