import { randomUUID } from 'node:crypto';
import { isDeepStrictEqual } from 'node:util';
import { QueryTypes } from 'sequelize';
import type { CommandContext } from '@/server/commands/commandContext';
import { ensureSchedule } from '@/server/commands/ensureSchedule';
import { recordEvent } from '@/server/commands/recordEvent';
import { queueMail } from '@/server/commands/outbox';
import { holdYard } from '@/server/commands/yards/yardFacts';
import { AppError, invalidField } from '@/server/errors';
import { Proposal, User, Zone } from '@/server/models';
import { proposalMail } from '@/server/presenters/mail/proposalMails';
import { presentSchedule } from '@/server/presenters/proposals';
import type { CreateProposalRequest } from '@/shared/contracts/proposals';

export interface ProposalChange extends CommandContext {
  yardId: string;
  user: { id: string };
}

/** Where a zone's doses are seen and decided on. */
export const establishmentUrl = (publicUrl: string, yardId: string, zoneId: string) => `${publicUrl}/yards/${yardId}/zones/${zoneId}/establishment`;

/**
 * Proposes other doses for a seeded zone, with a reason. Nothing changes until an owner accepts; the owners get a mail.
 * @throws AppError invalid_input for a zone that is not there, not seeded, or watered so already; conflict while another proposal for it is open
 */
export async function createProposal(change: ProposalChange, input: CreateProposalRequest): Promise<string> {
  const { app, yardId, now, user } = change;
  const yard = await holdYard({ database: app.database, yardId });
  const zone = await Zone.findOne({ where: { yardId, id: input.zoneId, archivedAt: null } });
  if (zone === null) {
    throw invalidField('zoneId', 'That zone is not in this yard.');
  }
  if (zone.seededOn == null) {
    throw invalidField('zoneId', `${zone.name} is not seeded, so it has no doses to change.`);
  }
  if (await Proposal.count({ where: { yardId, zoneId: zone.id, status: 'open' } }) > 0) {
    throw new AppError('conflict', `A proposal for ${zone.name} waits for its answer already. Withdraw it to propose something else.`);
  }
  const current = (await ensureSchedule(yardId, zone.id, now)).schedule;
  if (isDeepStrictEqual(presentSchedule(current), presentSchedule(input.schedule))) {
    throw invalidField('schedule', `${zone.name} is watered so already.`);
  }
  const id = randomUUID();
  await Proposal.create({ id, yardId, zoneId: zone.id, authorId: user.id, reason: input.reason, scheduleBefore: current, schedule: input.schedule, status: 'open' });
  await recordEvent({
    yardId, userId: user.id, verb: 'proposal.sent', subjectKind: 'proposal', subjectId: id, data: { name: zone.name, zoneId: zone.id, reason: input.reason },
  }, now);
  const author = await User.findByPk(user.id, { rejectOnEmpty: true });
  const owners = await app.database.query<{ email: string }>(
    `SELECT u.email FROM memberships m JOIN users u ON u.id = m.user_id WHERE m.yard_id = $1 AND m.role = 'owner' AND u.id <> $2 ORDER BY u.email`,
    { bind: [yardId, user.id], type: QueryTypes.SELECT },
  );
  const mail = proposalMail({
    yardName: yard.name, zoneName: zone.name, authorName: author.name, reason: input.reason, units: yard.units, before: current, after: input.schedule,
    url: establishmentUrl(app.publicUrl, yardId, zone.id),
  });
  for (const { email } of owners) {
    await queueMail(change, email, mail);
  }
  return id;
}
