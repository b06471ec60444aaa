import { z } from '@/shared/zod';
import { idSchema, instantSchema } from './common';

export const reminderKinds = ['morning', 'move', 'water_off', 'still_on'] as const;
export type ReminderKind = (typeof reminderKinds)[number];
export const reminderStatuses = ['waiting', 'claimed', 'sent', 'dropped', 'cancelled', 'failed'] as const;
export type ReminderStatus = (typeof reminderStatuses)[number];

/** Mail caught by the local SMTP server of the demonstration. */
export const mailSummarySchema = z.object({ id: idSchema, to: z.string(), from: z.string(), subject: z.string(), receivedAt: instantSchema });
export const mailListResponseSchema = z.object({ mails: z.array(mailSummarySchema) });
export const mailResponseSchema = mailSummarySchema.extend({ text: z.string(), html: z.string().nullable(), messageId: z.string() });
export type MailResponse = z.infer<typeof mailResponseSchema>;
export type MailListResponse = z.infer<typeof mailListResponseSchema>;
