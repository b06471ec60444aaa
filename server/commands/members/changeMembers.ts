import { QueryTypes } from 'sequelize';
import type { CommandContext } from '@/server/commands/commandContext';
import { recordEvent } from '@/server/commands/recordEvent';
import { holdYard } from '@/server/commands/yards/yardFacts';
import { AppError, notFound } from '@/server/errors';
import { Membership } from '@/server/models';
import type { Role } from '@/shared/contracts/common';
import type { UpdatePreferencesRequest } from '@/shared/contracts/yards';

interface MemberChange extends CommandContext {
  yardId: string;
  user: { id: string };
}

/** The membership, with the yard held so that two owners cannot both stop being the other one's co-owner. */
async function heldMember({ app, yardId }: MemberChange, userId: string): Promise<Membership> {
  await holdYard({ database: app.database, yardId });
  const member = await Membership.findOne({ where: { yardId, userId } });
  if (member === null) {
    throw notFound('member');
  }
  return member;
}

async function refuseWithoutOwner(yardId: string, leaving: Membership): Promise<void> {
  if (leaving.role === 'owner' && await Membership.count({ where: { yardId, role: 'owner' } }) === 1) {
    throw new AppError('last_owner', 'A yard needs an owner. Make somebody else an owner first, or delete the yard.');
  }
}

/**
 * Gives a member another role.
 * @throws AppError not_found, last_owner
 */
export async function changeRole(change: MemberChange, userId: string, role: Role): Promise<void> {
  const member = await heldMember(change, userId);
  if (member.role === role) {
    return;
  }
  await refuseWithoutOwner(change.yardId, member);
  const before = member.role;
  await member.update({ role });
  await recordEvent({ yardId: change.yardId, userId: change.user.id, verb: 'member.role_changed', subjectKind: 'member', subjectId: userId, data: { before, after: role } }, change.now);
}

/**
 * Ends a membership: an owner removes somebody, or a member leaves. Reminders that wait for the person are cancelled.
 * @throws AppError not_found, last_owner
 */
export async function removeMember(change: MemberChange, userId: string): Promise<void> {
  const { app, yardId, now } = change;
  const member = await heldMember(change, userId);
  await refuseWithoutOwner(yardId, member);
  await member.destroy();
  await app.database.query(
    `UPDATE reminders SET status = 'cancelled', updated_at = $3 WHERE yard_id = $1 AND user_id = $2 AND status = 'waiting'`,
    { bind: [yardId, userId, now], type: QueryTypes.UPDATE },
  );
  const verb = userId === change.user.id ? 'member.left' : 'member.removed';
  await recordEvent({ yardId, userId: change.user.id, verb, subjectKind: 'member', subjectId: userId, data: { role: member.role } }, now);
}

/** Sets which mails the person wants from this yard. @throws AppError not_found */
export async function updatePreferences(change: MemberChange, input: UpdatePreferencesRequest): Promise<Membership> {
  const member = await Membership.findOne({ where: { yardId: change.yardId, userId: change.user.id }, lock: true });
  if (member === null) {
    throw notFound('yard');
  }
  return member.update({
    wantsMorningEmail: input.wantsMorningEmail ?? member.wantsMorningEmail, wantsMoveEmail: input.wantsMoveEmail ?? member.wantsMoveEmail,
  });
}
