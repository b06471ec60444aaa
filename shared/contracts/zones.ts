import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { civilDaySchema, idSchema, nameSchema } from './common';

export const grassIds = [
  'kentucky_bluegrass', 'perennial_ryegrass', 'tall_fescue', 'fine_fescue', 'cool_mix', 'bermuda', 'zoysia', 'st_augustine', 'buffalo', 'warm_mix',
] as const;
export type GrassId = (typeof grassIds)[number];
export const soilTextures = ['sand', 'loamy_sand', 'sandy_loam', 'loam', 'silt_loam', 'silt', 'silty_clay_loam', 'silty_clay', 'clay'] as const;
export type SoilTexture = (typeof soilTextures)[number];
export const mulches = ['none', 'straw', 'peat', 'compost'] as const;
export type Mulch = (typeof mulches)[number];
/** How hard the ground is underfoot: loose takes water as its texture does, hard has been driven on. */
export const soilCompactions = ['loose', 'firm', 'hard'] as const;
export type SoilCompaction = (typeof soilCompactions)[number];

const sunHours = z.number().min(0).max(24);
/** Part of the ground that roots of trees reach. */
const treeRootShare = z.number().min(0).max(1);
/** Part of the ground that leaves of the grass cover; a seeded zone's follows from its age. */
const coverFraction = z.number().min(0.1, 'Barer than that it is a seedbed: seed it.').max(1);
const areaM2 = z.number().gt(0, 'A zone has an area.').max(limits.areaMaxM2);
const sideM = z.number().gt(0, 'A side has a length.').max(limits.sideMaxM);

/** Anything left out gets a default that the screens mark as one. Size: an area, or two sides of a rectangle. */
export const createZoneRequestSchema = z.object({
  name: nameSchema,
  areaM2: areaM2.optional(), sideAM: sideM.optional(), sideBM: sideM.optional(),
  grass: z.enum(grassIds).optional(), soil: z.enum(soilTextures).optional(),
  slopePct: z.number().min(0).max(60).optional(), sunHours: sunHours.optional(), sunHoursOn: civilDaySchema.optional(),
  compaction: z.enum(soilCompactions).optional(), treeRootShare: treeRootShare.optional(), coverFraction: coverFraction.optional(),
  seededOn: civilDaySchema.nullable().default(null), mulch: z.enum(mulches).default('none'),
  resting: z.boolean().default(false), priority: z.number().int().min(1).max(1000).optional(),
}).superRefine((zone, issue) => {
  const hasSides = zone.sideAM !== undefined && zone.sideBM !== undefined;
  if (zone.areaM2 === undefined && !hasSides) {
    issue.addIssue({ code: 'custom', path: ['areaM2'], message: 'Give the area, or both sides.' });
  }
  if (hasSides && (zone.sideAM ?? 0) * (zone.sideBM ?? 0) > limits.areaMaxM2) {
    issue.addIssue({ code: 'custom', path: ['sideBM'], message: 'That is larger than a yard.' });
  }
});
export type CreateZoneRequest = z.input<typeof createZoneRequestSchema>;

/** Left out leaves a field as it is; null on a defaulted field returns it to its default. */
export const updateZoneRequestSchema = z.object({
  name: nameSchema.optional(), areaM2: areaM2.optional(), sideAM: sideM.nullable().optional(), sideBM: sideM.nullable().optional(),
  grass: z.enum(grassIds).nullable().optional(), soil: z.enum(soilTextures).nullable().optional(),
  slopePct: z.number().min(0).max(60).nullable().optional(), sunHours: sunHours.nullable().optional(), sunHoursOn: civilDaySchema.nullable().optional(),
  compaction: z.enum(soilCompactions).nullable().optional(), treeRootShare: treeRootShare.nullable().optional(), coverFraction: coverFraction.nullable().optional(),
  seededOn: civilDaySchema.nullable().optional(), mulch: z.enum(mulches).optional(), resting: z.boolean().optional(),
  priority: z.number().int().min(1).max(1000).optional(),
});
export type UpdateZoneRequest = z.infer<typeof updateZoneRequestSchema>;

/** `sunHoursOn` is the day on which the hours were seen; null lets them hold on every day. With a sun diary the hours are not used. */
export const zoneSchema = z.object({
  id: idSchema, name: z.string(), areaM2: z.number(), sideAM: z.number().nullable(), sideBM: z.number().nullable(),
  grass: z.enum(grassIds), grassIsDefault: z.boolean(), soil: z.enum(soilTextures), soilIsDefault: z.boolean(),
  slopePct: z.number(), slopeIsDefault: z.boolean(), sunHours: z.number(), sunHoursIsDefault: z.boolean(), sunHoursOn: civilDaySchema.nullable(), sunHoursOnIsDefault: z.boolean(), hasSunDiary: z.boolean(),
  compaction: z.enum(soilCompactions), compactionIsDefault: z.boolean(), treeRootShare: z.number(), treeRootShareIsDefault: z.boolean(),
  coverFraction: z.number(), coverFractionIsDefault: z.boolean(),
  seededOn: civilDaySchema.nullable(), mulch: z.enum(mulches), resting: z.boolean(), priority: z.number(),
});
export type ZoneResponse = z.infer<typeof zoneSchema>;
