import { z } from '@/shared/zod';
import { civilDaySchema, idSchema, personSchema } from './common';
import { establishmentStages } from './proposals';

// What people see on the ground of a zone: how wet it is, how far a sowing has come, when the sun falls on it.

/** How a screwdriver of a hand's length goes in: easily, with force, hardly or not at all. */
export const screwdriverFeels = ['easy', 'firm', 'hard'] as const;
export type ScrewdriverFeelId = (typeof screwdriverFeels)[number];
export const waterContentMax = 0.6;

/** What was found in the root zone on the morning of a day, before its water. A probe tells water over ground by volume [m³/m³]. */
export const putObservationRequestSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('screwdriver'), feel: z.enum(screwdriverFeels) }),
  z.object({ kind: z.literal('probe'), waterContent: z.number().min(0).max(waterContentMax, 'No soil holds that much water.') }),
]);
export type PutObservationRequest = z.infer<typeof putObservationRequestSchema>;
/** `weight` is how much of the difference to the reckoning is believed, 0 to 1. */
export const observationSchema = z.object({
  zoneId: idSchema, on: civilDaySchema, kind: z.enum(['screwdriver', 'probe']), feel: z.enum(screwdriverFeels).nullable(), waterContent: z.number().nullable(), weight: z.number(),
  person: personSchema.nullable(),
});
export type ObservationResponse = z.infer<typeof observationSchema>;
export const observationListResponseSchema = z.object({ observations: z.array(observationSchema) });
export type ObservationListResponse = z.infer<typeof observationListResponseSchema>;

/** A stage of a sowing that somebody saw; it overrules the heat sum from that day on. */
export const putSeenStageRequestSchema = z.object({ stage: z.enum(establishmentStages) });
export type PutSeenStageRequest = z.infer<typeof putSeenStageRequestSchema>;

/** Hours of the clock, 0 to 23, in which the sun fell on the zone on that day; 9 is from nine to ten. */
export const putSunDiaryRequestSchema = z.object({
  sunnyHours: z.array(z.number().int().min(0).max(23)).max(24).refine((hours) => new Set(hours).size === hours.length, 'Name each hour once.'),
});
export type PutSunDiaryRequest = z.infer<typeof putSunDiaryRequestSchema>;
/** `months` tell the light of the zone through the year under a typical sky: by the diary where there is one, else by the hours of sun. */
export const zoneSunResponseSchema = z.object({
  zoneId: idSchema, zoneName: z.string(), sunFrom: z.enum(['diary', 'hours']), today: civilDaySchema,
  pages: z.array(z.object({ on: civilDaySchema, sunnyHours: z.array(z.number()), person: personSchema.nullable() })),
  months: z.array(z.object({ month: z.number(), directSunHours: z.number(), openSunHours: z.number(), radiationShare: z.number() })),
});
export type ZoneSunResponse = z.infer<typeof zoneSunResponseSchema>;
