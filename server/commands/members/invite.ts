import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { hashToken, newSecretToken } from '@/server/commands/accounts/secretToken';
import { findUserByEmail } from '@/server/commands/accounts/findUserByEmail';
import type { CommandContext } from '@/server/commands/commandContext';
import { recordEvent } from '@/server/commands/recordEvent';
import { queueMail } from '@/server/commands/outbox';
import { holdYard } from '@/server/commands/yards/yardFacts';
import { AppError, notFound } from '@/server/errors';
import { Invitation, Membership, User } from '@/server/models';
import { invitationMail } from '@/server/presenters/mail/memberMails';
import type { CreateInvitationRequest } from '@/shared/contracts/yards';
import { limits } from '@/shared/limits';

/** How long an invitation can be accepted [days]. */
export const invitationDays = 14;
/** Invitations that one yard sends in a day at most, so that it cannot be used to write to strangers. */
const invitationsPerDay = 60;
const dayMs = 86_400_000;

interface YardChange extends CommandContext {
  yardId: string;
  user: { id: string };
}

/**
 * Invites an address to a yard and sends the link, which works for fourteen days. An earlier open invitation of the address is replaced.
 * @throws AppError already_member, limit_reached
 */
export async function invite(change: YardChange, input: CreateInvitationRequest): Promise<Invitation> {
  const { app, yardId, now, user } = change;
  const yard = await holdYard({ database: app.database, yardId });
  const known = await findUserByEmail(input.email);
  if (known !== null && await Membership.count({ where: { yardId, userId: known.id } }) > 0) {
    throw new AppError('already_member', 'That person belongs to this yard already.');
  }
  const open = { yardId, acceptedAt: null, withdrawnAt: null };
  await Invitation.update({ withdrawnAt: now }, { where: { ...open, email: input.email } });
  const [counted] = await app.database.query<{ places: number; sentToday: number }>(
    `SELECT (SELECT count(*) FROM memberships WHERE yard_id = $1)::int
          + (count(*) FILTER (WHERE accepted_at IS NULL AND withdrawn_at IS NULL AND expires_at > $2))::int AS places,
        (count(*) FILTER (WHERE created_at > $3))::int AS "sentToday" FROM invitations WHERE yard_id = $1`,
    { bind: [yardId, now, new Date(now.getTime() - dayMs)], type: QueryTypes.SELECT },
  );
  if ((counted?.places ?? 0) >= limits.membersPerYard) {
    throw new AppError('limit_reached', `A yard has at most ${limits.membersPerYard} members, invited ones included.`);
  }
  if ((counted?.sentToday ?? 0) >= invitationsPerDay) {
    throw new AppError('limit_reached', 'Many invitations were sent today. Send more tomorrow.');
  }
  const token = newSecretToken();
  const invitation = await Invitation.create({
    id: randomUUID(), yardId, email: input.email, role: input.role, tokenHash: hashToken(token), invitedBy: user.id,
    createdAt: now, expiresAt: new Date(now.getTime() + invitationDays * dayMs),
  });
  await recordEvent({ yardId, userId: user.id, verb: 'invitation.sent', subjectKind: 'invitation', subjectId: invitation.id, data: { role: input.role } }, now);
  const inviter = await User.findByPk(user.id);
  await queueMail(change, input.email, invitationMail({
    yardName: yard.name, role: input.role, invitedBy: inviter?.name ?? null, url: `${app.publicUrl}/invitation?token=${token}`, days: invitationDays,
  }));
  return invitation;
}

/** Takes back an open invitation. @throws AppError not_found */
export async function withdrawInvitation(change: YardChange, invitationId: string): Promise<void> {
  const [withdrawn] = await Invitation.update({ withdrawnAt: change.now }, { where: { id: invitationId, yardId: change.yardId, acceptedAt: null, withdrawnAt: null } });
  if (withdrawn === 0) {
    throw notFound('invitation');
  }
  await recordEvent({ yardId: change.yardId, userId: change.user.id, verb: 'invitation.withdrawn', subjectKind: 'invitation', subjectId: invitationId, data: {} }, change.now);
}
