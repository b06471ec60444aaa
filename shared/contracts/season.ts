import { z } from '@/shared/zod';
import { civilDaySchema } from './common';
import { grassIds } from './zones';

const windowSchema = z.object({ fromOn: civilDaySchema, untilOn: civilDaySchema });

/**
 * What the season holds for a yard: times to sow its grasses, the time of a weed preventer, the first freeze. Past years tell the usual course, this
 * year's weather as far as it is known takes its place. `soilIsKnown` is false while the soil of today follows from past years only.
 */
export const seasonResponseSchema = z.object({
  today: civilDaySchema, soilC: z.number(), soilIsKnown: z.boolean(), source: z.string(), sample: z.boolean(), years: z.number(),
  grasses: z.array(z.object({
    grass: z.enum(grassIds), zones: z.array(z.string()), germination: z.array(windowSchema), sowing: z.array(windowSchema.extend({ season: z.enum(['before_winter', 'before_heat', 'open']) })),
    dormantFromOn: civilDaySchema.nullable(), leastSoilC: z.number(), mostSoilC: z.number(), sources: z.array(z.string()),
  })),
  preventer: z.object({
    opensOn: civilDaySchema.nullable(), closesOn: civilDaySchema.nullable(), lastsUntilOn: z.object({ least: civilDaySchema, most: civilDaySchema }).nullable(), isNeverCold: z.boolean(),
    cautions: z.array(z.string()), sources: z.array(z.string()),
  }),
  freeze: z.object({
    earlyOn: civilDaySchema, likelyOn: civilDaySchema, lateOn: civilDaySchema, hoseOffBy: civilDaySchema, seasons: z.number(), frostFreeSeasons: z.number(), source: z.string(),
  }).nullable(),
  nextFreezeOn: civilDaySchema.nullable(),
});
export type SeasonResponse = z.infer<typeof seasonResponseSchema>;
