import type { CommandContext } from '@/server/commands/commandContext';
import { queueMail } from '@/server/commands/outbox';
import { AppError } from '@/server/errors';
import { User } from '@/server/models';
import { passwordChangedMail, resetPasswordMail } from '@/server/presenters/mail/accountMails';
import type { ResetPasswordRequest } from '@/shared/contracts/accounts';
import { findEmailToken, issueEmailToken, useEmailToken } from './emailTokens';
import { findUserByEmail } from './findUserByEmail';
import { hashPassword } from './password';
import { forgetPasswordAttempts } from './passwordAttempts';
import { endSessions } from './sessions';

/** Sends a link for a new password to an address that has an account; every other address gets nothing, and the caller cannot tell. */
export async function requestPasswordReset(context: CommandContext, email: string): Promise<void> {
  const { app, now } = context;
  const user = await findUserByEmail(email);
  if (user === null) {
    return;
  }
  const token = await issueEmailToken(app.database, user.id, 'reset_password', now);
  if (token !== null) {
    const { name } = user;
    await queueMail(context, user.email, resetPasswordMail({ name, url: `${app.publicUrl}/reset?token=${token}` }));
  }
}

/**
 * Sets a new password with the link from the mail, and ends every session. The link also shows that the address is the person's.
 * @throws AppError token_invalid, token_used, token_expired
 */
export async function resetPassword(context: CommandContext, input: ResetPasswordRequest): Promise<void> {
  const { app, now } = context;
  await findEmailToken('reset_password', input.token, now, false);
  const passwordHash = await hashPassword(input.password, app.env.BCRYPT_COST);
  await app.database.transaction(async () => {
    const { userId } = await useEmailToken('reset_password', input.token, now);
    const user = await User.findByPk(userId, { lock: true });
    if (user === null) {
      throw new AppError('token_invalid', 'That link is not one of ours.');
    }
    await user.update({ passwordHash, emailConfirmedAt: user.emailConfirmedAt ?? now });
    await endSessions(userId, 'password_changed', now);
    await forgetPasswordAttempts(app.database, user.email);
    const { name, email } = user;
    await queueMail(context, email, passwordChangedMail({ name, forgotUrl: `${app.publicUrl}/forgot` }));
  });
}
