import { z } from '@/shared/zod';
import { idSchema, instantSchema } from './common';

/** Zone in which the demonstration's time is told: that of its main yard. */
export const demonstrationTimeZone = 'America/New_York';
/** Where the demonstration begins: a Saturday in June at 5:40, before anyone has to go out. In its sample weather a dry one, after a dry week. */
export const demonstrationStart = { on: '2026-06-20', minutes: 5 * 60 + 40 };

export const clockResponseSchema = z.object({ now: instantSchema, isDemonstration: z.boolean(), timeZone: z.string() });
export type ClockResponse = z.infer<typeof clockResponseSchema>;
/** hour and day move by as much; next_event to the next moment at which something is due. All that is due in between happens. */
export const jumpClockRequestSchema = z.object({ to: z.enum(['hour', 'day', 'next_event']) });
export const jumpClockResponseSchema = clockResponseSchema.extend({ happened: z.array(z.object({ at: instantSchema, what: z.string(), yardId: idSchema.nullable() })) });
export type JumpClockResponse = z.infer<typeof jumpClockResponseSchema>;
