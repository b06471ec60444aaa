import { isCivilDay } from '@/scheduling/units/civilDay';
import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';

export const roles = ['owner', 'helper', 'consultant'] as const;
export type Role = (typeof roles)[number];
export const roleSchema = z.enum(roles);

export const unitSystems = ['us', 'metric'] as const;
export type UnitSystem = (typeof unitSystems)[number];
export const unitSystemSchema = z.enum(unitSystems);

export const idSchema = z.uuid();
/** Calendar day 'YYYY-MM-DD'; 30 February is refused, and what no yard's record can hold: days can be counted on from any of them. */
export const civilDaySchema = z.string().refine(isCivilDay, 'Give a day of the calendar as YYYY-MM-DD.').refine((on) => !isCivilDay(on) || (on >= '1900-01-01' && on <= '2199-12-31'), 'Give a day from 1900 to 2199.');
export const instantSchema = z.iso.datetime();

/** One line of text: trimmed, not empty, no control characters and no halves of characters, which no database keeps. */
export const nameSchema = z.string().trim().min(1, 'Give a name.').max(limits.nameLength, `Keep it under ${limits.nameLength} characters.`)
  .regex(/^[^\p{Cc}\p{Cs}]*$/u, 'Use letters, digits and ordinary signs only.');
/** Text of several lines without control characters but tabs and line ends. */
export const textSchema = (maxLength: number) => z.string().trim().max(maxLength, `Keep it under ${maxLength} characters.`)
  .regex(/^(?:[^\p{Cc}\p{Cs}]|[\t\n\r])*$/u, 'Use letters, digits and ordinary signs only.');
export const noteSchema = textSchema(limits.noteLength);
export const emailSchema = z.string().trim().toLowerCase().max(limits.emailLength).pipe(z.email('Give an e-mail address such as name@example.org.'));

export const minutesOfDaySchema = z.number().int().min(0).max(1439);
/** Half-open window of minutes after local midnight [min]. */
export const minuteWindowSchema = z.object({ fromMinutes: minutesOfDaySchema, toMinutes: z.number().int().min(1).max(1440) })
  .refine((window) => window.fromMinutes < window.toMinutes, { message: 'The end must come after the start.', path: ['toMinutes'] });
export type MinuteWindow = z.infer<typeof minuteWindowSchema>;

export const emptySchema = z.object({});
/** What a route answers when there is nothing to tell but that it was done. */
export const doneSchema = z.object({ done: z.literal(true) });

export const fieldErrorSchema = z.object({ path: z.string(), message: z.string(), code: z.string() });
export const errorResponseSchema = z.object({
  error: z.object({ code: z.string(), message: z.string(), fields: z.array(fieldErrorSchema).optional(), requestId: z.string() }),
});
export type ErrorResponse = z.infer<typeof errorResponseSchema>;
export type FieldError = z.infer<typeof fieldErrorSchema>;

export const personSchema = z.object({ id: idSchema, name: z.string() });
