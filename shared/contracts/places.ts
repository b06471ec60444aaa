import { z } from '@/shared/zod';

export const placeQuerySchema = z.object({ q: z.string().trim().min(2, 'Type at least two letters.').max(80) });
export const placeSchema = z.object({
  id: z.number().int(), name: z.string(), region: z.string(), country: z.string(), latitudeDeg: z.number(), longitudeDeg: z.number(),
  timeZone: z.string(), population: z.number(),
});
export type Place = z.infer<typeof placeSchema>;
export const placeListResponseSchema = z.object({ places: z.array(placeSchema) });
export type PlaceListResponse = z.infer<typeof placeListResponseSchema>;
