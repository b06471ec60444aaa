import type { CommandContext } from '@/server/commands/commandContext';
import { queueMail } from '@/server/commands/outbox';
import { invalidField, signInRequired } from '@/server/errors';
import { User } from '@/server/models';
import { passwordChangedMail } from '@/server/presenters/mail/accountMails';
import type { ChangePasswordRequest } from '@/shared/contracts/accounts';
import { hashPassword, passwordMatches } from './password';
import { forgetPasswordAttempts, takePasswordAttempt } from './passwordAttempts';
import { endSessions } from './sessions';

/**
 * Makes sure that the signed-in person knows the password. Attempts count as those of signing in.
 * @throws AppError invalid_input with the given field, too_many_requests
 */
export async function confirmPassword({ app, now }: CommandContext, userId: string, password: string, field: string): Promise<User> {
  const user = await User.findByPk(userId);
  if (user === null) {
    throw signInRequired();
  }
  await takePasswordAttempt(app.database, user.email, now);
  if (!(await passwordMatches(password, user.passwordHash, app.env.BCRYPT_COST))) {
    throw invalidField(field, 'That is not your present password.');
  }
  await forgetPasswordAttempts(app.database, user.email);
  return user;
}

/**
 * Changes the password of a signed-in person and ends the other sessions. Runs its own transaction, so that failed attempts stay counted.
 * @throws AppError invalid_input when the present password is wrong, too_many_requests
 */
export async function changePassword(context: CommandContext, user: { id: string; sessionId: string }, input: ChangePasswordRequest): Promise<void> {
  const { app, now } = context;
  const known = await confirmPassword(context, user.id, input.currentPassword, 'currentPassword');
  const passwordHash = await hashPassword(input.password, app.env.BCRYPT_COST);
  await app.database.transaction(async () => {
    // Two changes at once: the second one no longer knows the present password.
    const [changed] = await User.update({ passwordHash, updatedAt: now }, { where: { id: user.id, passwordHash: known.passwordHash } });
    if (changed === 0) {
      throw invalidField('currentPassword', 'That is not your present password.');
    }
    await endSessions(user.id, 'password_changed', now, user.sessionId);
  });
  await queueMail(context, known.email, passwordChangedMail({ name: known.name, forgotUrl: `${app.publicUrl}/forgot` }));
}
