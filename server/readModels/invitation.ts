import { hashToken } from '@/server/commands/accounts/secretToken';
import { AppError } from '@/server/errors';
import { Invitation } from '@/server/models';

/**
 * The open invitation of a link, locked when asked inside a transaction.
 * @throws AppError token_invalid, token_used, token_expired (also when it was withdrawn or replaced)
 */
export async function readOpenInvitation(token: string, now: Date, lock = false): Promise<Invitation> {
  const invitation = await Invitation.findOne({ where: { tokenHash: hashToken(token) }, lock });
  if (invitation === null) {
    throw new AppError('token_invalid', 'That is not an invitation of ours. Take the whole link from the mail.');
  }
  if (invitation.acceptedAt !== null) {
    throw new AppError('token_used', 'That invitation was accepted already. Sign in to see the yard.');
  }
  if (invitation.withdrawnAt !== null || invitation.expiresAt <= now) {
    throw new AppError('token_expired', 'That invitation is no longer open. Ask for a new one.');
  }
  return invitation;
}
