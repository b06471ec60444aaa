import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { emailSchema, idSchema, instantSchema, nameSchema, roleSchema } from './common';

export const passwordSchema = z.string()
  .min(limits.passwordMin, `Use at least ${limits.passwordMin} characters.`)
  .refine((text) => new TextEncoder().encode(text).length <= limits.passwordMaxBytes, `Use at most ${limits.passwordMaxBytes} characters.`);

export const signUpRequestSchema = z.object({ name: nameSchema, email: emailSchema, password: passwordSchema });
export type SignUpRequest = z.infer<typeof signUpRequestSchema>;
export const signInRequestSchema = z.object({ email: emailSchema, password: z.string().min(1, 'Give your password.').max(200) });
export type SignInRequest = z.infer<typeof signInRequestSchema>;
export const tokenRequestSchema = z.object({ token: z.string().min(20).max(200) });
export const forgotPasswordRequestSchema = z.object({ email: emailSchema });
export type ForgotPasswordRequest = z.infer<typeof forgotPasswordRequestSchema>;
export const resetPasswordRequestSchema = z.object({ token: z.string().min(20).max(200), password: passwordSchema });
export type ResetPasswordRequest = z.infer<typeof resetPasswordRequestSchema>;
export const changePasswordRequestSchema = z.object({ currentPassword: z.string().min(1, 'Give your present password.').max(200), password: passwordSchema });
export type ChangePasswordRequest = z.infer<typeof changePasswordRequestSchema>;
export const updateMeRequestSchema = z.object({ name: nameSchema.optional() });
export type UpdateMeRequest = z.infer<typeof updateMeRequestSchema>;
/** Deleting an account asks for the password again. */
export const deleteMeRequestSchema = z.object({ password: z.string().min(1, 'Give your password.').max(200) });
export type DeleteMeRequest = z.infer<typeof deleteMeRequestSchema>;

export const meResponseSchema = z.object({
  id: idSchema, name: z.string(), email: z.string(), emailConfirmed: z.boolean(), createdAt: instantSchema,
});
export type MeResponse = z.infer<typeof meResponseSchema>;

/** The access token is kept in memory only; the refresh token travels in an httpOnly cookie and is never in a body. */
export const signedInResponseSchema = z.object({ accessToken: z.string(), expiresAt: instantSchema, me: meResponseSchema });
export type SignedInResponse = z.infer<typeof signedInResponseSchema>;

export const sessionSchema = z.object({
  id: idSchema, device: z.string(), createdAt: instantSchema, lastUsedAt: instantSchema, expiresAt: instantSchema, isThisOne: z.boolean(),
});
export const sessionListResponseSchema = z.object({ sessions: z.array(sessionSchema) });
export type SessionListResponse = z.infer<typeof sessionListResponseSchema>;

const exportedRowsSchema = z.array(z.record(z.string(), z.unknown()));
/** Everything the service keeps about one person: the account, what they did, and in full the yards they own. Column names are those of the database. */
export const exportResponseSchema = z.object({
  exportedAt: instantSchema, account: meResponseSchema, sessions: z.array(sessionSchema.omit({ isThisOne: true })),
  memberships: z.array(z.object({ yardId: idSchema, yardName: z.string(), role: roleSchema, since: instantSchema, wantsMorningEmail: z.boolean(), wantsMoveEmail: z.boolean() })),
  ownedYards: z.array(z.object({ id: idSchema, name: z.string(), tables: z.record(z.string(), exportedRowsSchema) })),
  doneElsewhere: z.record(z.string(), exportedRowsSchema),
});
export type ExportResponse = z.infer<typeof exportResponseSchema>;
