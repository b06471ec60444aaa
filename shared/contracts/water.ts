import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { civilDaySchema, idSchema, instantSchema } from './common';

export const rainSources = ['gauge', 'weather', 'forecast', 'none'] as const;
export type RainSource = (typeof rainSources)[number];

/** What a default or missing-data rule put in the place of a measurement. */
export const assumptionSchema = z.object({ field: z.string(), method: z.string(), source: z.string() });

export const putRainRequestSchema = z.object({ depthMm: z.number().min(0).max(limits.rainDepthMaxMm, 'That is more rain than a day can bring.') });
export const rainEntrySchema = z.object({ on: civilDaySchema, depthMm: z.number() });
export type RainEntryResponse = z.infer<typeof rainEntrySchema>;
export const rainListResponseSchema = z.object({ entries: z.array(rainEntrySchema) });
export type RainListResponse = z.infer<typeof rainListResponseSchema>;

export const weatherDaySchema = z.object({
  on: civilDaySchema, isForecast: z.boolean(), tminC: z.number().nullable(), tmaxC: z.number().nullable(), windMps: z.number().nullable(),
  precipitationMm: z.number().nullable(), rainProbabilityPct: z.number().nullable(), et0Mm: z.number().nullable(), source: z.string(),
});
/** `sample` marks the replayed records of the demonstration; `asOf` is when the service last answered. */
export const weatherResponseSchema = z.object({
  days: z.array(weatherDaySchema), asOf: instantSchema.nullable(), source: z.string().nullable(), sample: z.boolean(), stale: z.boolean(),
});
export type WeatherResponse = z.infer<typeof weatherResponseSchema>;

/** What state the grass is in, as far as its use of water goes. */
export const grassConditions = ['growing', 'resting', 'frosted', 'snow'] as const;
/**
 * depletionEndMm = depletionStartMm + rootGrowthMm + observationMm + etcMm − effectiveRainMm − irrigationMm + drainageMm. Of etcMm, evaporationMm came from
 * bare ground and treeUptakeMm went to trees; of rainLossMm, runoffMm ran off. surfaceDepletionMm is that of the surface of thin or seeded ground.
 */
export const budgetDaySchema = z.object({
  on: civilDaySchema, isForecast: z.boolean(), et0Mm: z.number(), shadedEt0Mm: z.number(), cropCoefficient: z.number(), stressCoefficient: z.number(),
  etcMm: z.number(), rainMm: z.number(), rainLossMm: z.number(), effectiveRainMm: z.number(), irrigationMm: z.number(), drainageMm: z.number(), rootGrowthMm: z.number(),
  evaporationMm: z.number(), treeUptakeMm: z.number(), runoffMm: z.number(), observationMm: z.number(), surfaceDepletionMm: z.number().nullable(),
  condition: z.enum(grassConditions), depletionFraction: z.number(),
  depletionStartMm: z.number(), depletionEndMm: z.number(), totalAvailableMm: z.number(), refillLineMm: z.number(), rootDepthM: z.number(),
  rainSource: z.enum(rainSources), assumptions: z.array(assumptionSchema),
});
export type BudgetDayResponse = z.infer<typeof budgetDaySchema>;
export const budgetResponseSchema = z.object({
  today: civilDaySchema, zones: z.array(z.object({ zoneId: idSchema, name: z.string(), days: z.array(budgetDaySchema) })),
});
export type BudgetResponse = z.infer<typeof budgetResponseSchema>;

/** Days of the budget to show, both included; the last thirty days and the forecast when left out. */
export const budgetQuerySchema = z.object({ from: civilDaySchema.optional(), to: civilDaySchema.optional() });
