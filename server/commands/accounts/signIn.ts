import type { CommandContext } from '@/server/commands/commandContext';
import { AppError } from '@/server/errors';
import { User } from '@/server/models';
import type { SignInRequest } from '@/shared/contracts/accounts';
import type { StartedSession } from './confirmEmail';
import { findUserByEmail } from './findUserByEmail';
import { passwordMatches } from './password';
import { forgetPasswordAttempts, takePasswordAttempt } from './passwordAttempts';
import { startSession } from './sessions';

const signInFailed = () => new AppError('sign_in_failed', 'That address and password do not belong together.');

/**
 * Begins a session for the right password. An address without an account takes as long and answers the same.
 * @throws AppError sign_in_failed, email_not_confirmed (only after the right password), too_many_requests
 */
export async function signIn({ app, now }: CommandContext, input: SignInRequest, device: string): Promise<StartedSession> {
  await takePasswordAttempt(app.database, input.email, now);
  const user = await findUserByEmail(input.email);
  if (!(await passwordMatches(input.password, user?.passwordHash ?? null, app.env.BCRYPT_COST)) || user === null) {
    throw signInFailed();
  }
  if (user.emailConfirmedAt === null) {
    throw new AppError('email_not_confirmed', 'Confirm your e-mail address first: the link is in the mail we sent you.');
  }
  return app.database.transaction(async () => {
    // A password that was changed while this one was being checked must not begin a session any more.
    const current = await User.findOne({ where: { id: user.id, passwordHash: user.passwordHash }, lock: true });
    if (current === null) {
      throw signInFailed();
    }
    await forgetPasswordAttempts(app.database, input.email);
    return { user: current, ...(await startSession(app.database, current.id, device, now)) };
  });
}
