import { z } from '@/shared/zod';
import { idSchema } from './common';

const monthSchema = z.string().regex(/^\d{4}-(0[1-9]|1[0-2])$/);
const effect = {
  /** Hours that it frees in the tightest month, what that month and the year then still lack [h]. */
  gainHours: z.number(), leftHours: z.number(), leftYearHours: z.number(), fits: z.boolean(),
};

/** One way to make the year fit, by itself. */
export const fitRemedySchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('fatter_hose'), tapId: idSchema, boreMm: z.number(), flowLpm: z.number(), ...effect }),
  z.object({ kind: z.literal('second_hose'), tapId: idSchema, ...effect }),
  z.object({ kind: z.literal('shut_off_timer'), tapId: idSchema, ...effect }),
  z.object({ kind: z.literal('second_tap'), tapId: idSchema, ...effect }),
  z.object({ kind: z.literal('helper_hour'), weekday: z.number().int().min(0).max(6), neededHoursAWeek: z.number(), ...effect }),
  z.object({ kind: z.literal('smaller_pattern'), zoneIds: z.array(idSchema), ...effect }),
  z.object({ kind: z.literal('rest_zones'), zoneIds: z.array(idSchema), ...effect }),
  z.object({ kind: z.literal('sow_another_month'), zoneId: idSchema, month: monthSchema, ...effect }),
]);
export type FitRemedyResponse = z.infer<typeof fitRemedySchema>;

/** Hose-hours of one month; `leastHours` and `mostHours` are those of the wettest and the driest year on record. */
export const fitMonthSchema = z.object({
  month: monthSchema, neededHours: z.number(), leastHours: z.number(), mostHours: z.number(), moveHours: z.number(), doseHours: z.number(), hadHours: z.number(), shortHours: z.number(),
  litres: z.number(), et0Mm: z.number(), rainMm: z.number(), isEstimated: z.boolean(),
  taps: z.array(z.object({ tapId: idSchema, neededHours: z.number(), hadHours: z.number() })),
});
export type FitMonthResponse = z.infer<typeof fitMonthSchema>;

export const monthFitResponseSchema = z.object({
  months: z.array(fitMonthSchema).length(12), tightestMonth: monthSchema.nullable(), fits: z.boolean(), remedies: z.array(fitRemedySchema),
  /** Whole years of weather behind it, and who recorded them; an estimate from few days counts as one. */
  climate: z.object({ years: z.number().int(), source: z.string(), sample: z.boolean(), isEstimated: z.boolean(), asOfYear: z.number().int() }),
  /** What nobody has told or measured. */
  defaults: z.object({ hours: z.boolean(), flow: z.boolean(), rates: z.number().int(), moveMinutes: z.number().nullable() }),
  /** Positions that no rate is known for, and zones that no position serves: they count for nothing. */
  leftOut: z.object({ zoneIds: z.array(idSchema) }),
});
export type MonthFitResponse = z.infer<typeof monthFitResponseSchema>;
