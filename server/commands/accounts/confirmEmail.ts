import type { CommandContext } from '@/server/commands/commandContext';
import { AppError } from '@/server/errors';
import { User } from '@/server/models';
import { useEmailToken } from './emailTokens';
import { startSession } from './sessions';

export interface StartedSession {
  user: User;
  sessionId: string;
  refreshToken: string;
}

/**
 * Confirms an address with the link that was sent to it, and signs its person in.
 * @throws AppError token_invalid, token_used, token_expired
 */
export async function confirmEmail({ app, now }: CommandContext, token: string, device: string): Promise<StartedSession> {
  const { userId } = await useEmailToken('confirm_email', token, now);
  const user = await User.findByPk(userId, { lock: true });
  if (user === null) {
    throw new AppError('token_invalid', 'That link is not one of ours.');
  }
  await user.update({ emailConfirmedAt: user.emailConfirmedAt ?? now });
  return { user, ...(await startSession(app.database, userId, device, now)) };
}
