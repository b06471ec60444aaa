import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import type { CommandContext } from '@/server/commands/commandContext';
import { queueMail } from '@/server/commands/outbox';
import type { User } from '@/server/models';
import { addressTakenMail, confirmEmailMail } from '@/server/presenters/mail/accountMails';
import type { SignUpRequest } from '@/shared/contracts/accounts';
import { issueEmailToken } from './emailTokens';
import { findUserByEmail } from './findUserByEmail';
import { hashPassword } from './password';

/** Sends the confirmation link to a person, inside the caller's transaction; the mail follows the commit. */
async function sendConfirmation(context: CommandContext, user: { id: string; name: string; email: string }): Promise<void> {
  const { app, now } = context;
  const token = await issueEmailToken(app.database, user.id, 'confirm_email', now);
  if (token !== null) {
    await queueMail(context, user.email, confirmEmailMail({ name: user.name, url: `${app.publicUrl}/confirm?token=${token}` }));
  }
}

/**
 * Makes an account that waits for its address to be confirmed. Whether the address was free is told to its mailbox only.
 * An account that was never confirmed is taken over with the new name and password: whoever reads the mailbox decides.
 */
export async function signUp(context: CommandContext, input: SignUpRequest): Promise<void> {
  const { app, now } = context;
  const passwordHash = await hashPassword(input.password, app.env.BCRYPT_COST);
  await app.database.transaction(async () => {
    const id = randomUUID();
    const created = await app.database.query<{ id: string }>(
      `INSERT INTO users (id, name, email, password_hash, created_at, updated_at) VALUES ($1, $2, $3, $4, $5, $5)
       ON CONFLICT (lower(email)) DO NOTHING RETURNING id`,
      { bind: [id, input.name, input.email, passwordHash, now], type: QueryTypes.SELECT },
    );
    if (created.length > 0) {
      await sendConfirmation(context, { id, name: input.name, email: input.email });
      return;
    }
    const existing = await findUserByEmail(input.email, true);
    if (existing === null) {
      return;
    }
    if (existing.emailConfirmedAt !== null) {
      const { name, email } = existing;
      await queueMail(context, email, addressTakenMail({ name, signInUrl: `${app.publicUrl}/sign-in` }));
      return;
    }
    await existing.update({ name: input.name, passwordHash });
    await sendConfirmation(context, existing);
  });
}

/** Sends a new confirmation link to an address that waits for one; every other address gets nothing, and the caller cannot tell. */
export async function resendConfirmation(context: CommandContext, email: string): Promise<void> {
  const user: User | null = await findUserByEmail(email);
  if (user !== null && user.emailConfirmedAt === null) {
    await sendConfirmation(context, user);
  }
}
