import { randomUUID } from 'node:crypto';
import type { CommandContext } from '@/server/commands/commandContext';
import { recordEvent } from '@/server/commands/recordEvent';
import { holdYard } from '@/server/commands/yards/yardFacts';
import { AppError, signInRequired } from '@/server/errors';
import { Membership, User } from '@/server/models';
import { readOpenInvitation } from '@/server/readModels/invitation';
import type { AcceptInvitationResponse } from '@/shared/contracts/yards';
import { limits } from '@/shared/limits';

/**
 * Makes the signed-in person a member of the yard that invited their address.
 * @throws AppError token_invalid, token_used, token_expired, forbidden for another address, already_member, limit_reached
 */
export async function acceptInvitation({ app, now }: CommandContext, userId: string, token: string): Promise<AcceptInvitationResponse> {
  const { yardId } = await readOpenInvitation(token, now);
  // The yard first and then the invitation, as everywhere, so that nobody waits in a circle.
  const yard = await holdYard({ database: app.database, yardId });
  const invitation = await readOpenInvitation(token, now, true);
  const user = await User.findByPk(userId);
  if (user === null) {
    throw signInRequired();
  }
  if (user.email.toLowerCase() !== invitation.email.toLowerCase()) {
    throw new AppError('forbidden', `This invitation is for ${invitation.email}, and you are signed in as ${user.email}. Sign in with the invited address, or ask for an invitation to yours.`);
  }
  if (await Membership.count({ where: { yardId, userId } }) > 0) {
    throw new AppError('already_member', 'You belong to this yard already.');
  }
  if (await Membership.count({ where: { userId } }) >= limits.yardsPerPerson) {
    throw new AppError('limit_reached', `One person can belong to ${limits.yardsPerPerson} yards.`);
  }
  // A consultant of many yards is not woken by each of them; the mails can be turned on yard by yard.
  const wantsMails = invitation.role !== 'consultant';
  await Membership.create({ id: randomUUID(), yardId, userId, role: invitation.role, wantsMorningEmail: wantsMails, wantsMoveEmail: wantsMails });
  await invitation.update({ acceptedAt: now, acceptedBy: userId });
  await recordEvent({ yardId, userId, verb: 'member.joined', subjectKind: 'member', subjectId: userId, data: { role: invitation.role } }, now);
  return { yardId, yardName: yard.name, role: invitation.role };
}

/**
 * Declines an invitation; whoever has the link may, also without an account.
 * @throws AppError token_invalid, token_used, token_expired
 */
export async function declineInvitation({ now }: CommandContext, token: string): Promise<void> {
  const invitation = await readOpenInvitation(token, now, true);
  await invitation.update({ withdrawnAt: now });
  await recordEvent({ yardId: invitation.yardId, userId: null, verb: 'invitation.declined', subjectKind: 'invitation', subjectId: invitation.id, data: { role: invitation.role } }, now);
}
