import { randomUUID } from 'node:crypto';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { queueMail } from '@/server/commands/outbox';
import { holdYard, todayAt } from '@/server/commands/yards/yardFacts';
import { AppError, forbidden, notFound } from '@/server/errors';
import { EstablishmentScheduleRow, Membership, Proposal, User, Zone } from '@/server/models';
import { decisionMail } from '@/server/presenters/mail/proposalMails';
import { establishmentUrl, type ProposalChange } from './createProposal';

async function openProposal({ yardId }: ProposalChange, proposalId: string): Promise<Proposal> {
  const proposal = await Proposal.findOne({ where: { yardId, id: proposalId }, lock: true });
  if (proposal === null) {
    throw notFound('proposal');
  }
  if (proposal.status !== 'open') {
    throw new AppError('already_decided', `That proposal was ${proposal.status} already.`);
  }
  return proposal;
}

/**
 * Accepts or declines a proposal. Accepted, its doses are in force from now on, and budget and plan are made anew from today. The author gets a mail.
 * @throws AppError not_found, already_decided, conflict when the zone is no longer seeded
 */
export async function decideProposal(change: ProposalChange, proposalId: string, input: { decision: 'accept' | 'decline'; answer: string }): Promise<void> {
  const { app, yardId, now, user } = change;
  const yard = await holdYard({ database: app.database, yardId });
  const proposal = await openProposal(change, proposalId);
  const zone = await Zone.findOne({ where: { yardId, id: proposal.zoneId } });
  const accepted = input.decision === 'accept';
  if (accepted && (zone === null || zone.archivedAt != null || zone.seededOn == null)) {
    throw new AppError('conflict', 'That zone is no longer seeded, so there are no doses to change. Decline the proposal.');
  }
  await proposal.update({ status: accepted ? 'accepted' : 'declined', answer: input.answer, decidedBy: user.id, decidedAt: now });
  if (accepted) {
    await EstablishmentScheduleRow.create({
      id: randomUUID(), yardId, zoneId: proposal.zoneId, schedule: proposal.schedule, isDefault: false, proposalId, validFrom: now, createdAt: now,
    });
    await factsChanged(app.database, yardId, todayAt(yard, now));
  }
  const zoneName = zone?.name ?? '';
  await recordEvent({
    yardId, userId: user.id, verb: accepted ? 'proposal.accepted' : 'proposal.declined', subjectKind: 'proposal', subjectId: proposalId,
    data: { name: zoneName, zoneId: proposal.zoneId, answer: input.answer, before: proposal.scheduleBefore, after: proposal.schedule },
  }, now);
  const author = proposal.authorId == null ? null : await User.findByPk(proposal.authorId);
  if (author !== null && await Membership.count({ where: { yardId, userId: author.id } }) > 0) {
    const decider = await User.findByPk(user.id, { rejectOnEmpty: true });
    const mail = decisionMail({
      yardName: yard.name, zoneName, deciderName: decider.name, accepted, answer: input.answer, url: establishmentUrl(app.publicUrl, yardId, proposal.zoneId),
    });
    await queueMail(change, author.email, mail);
  }
}

/**
 * Takes back one's own proposal.
 * @throws AppError not_found, forbidden for another's, already_decided
 */
export async function withdrawProposal(change: ProposalChange, proposalId: string): Promise<void> {
  const { app, yardId, now, user } = change;
  await holdYard({ database: app.database, yardId });
  const proposal = await openProposal(change, proposalId);
  if (proposal.authorId !== user.id) {
    throw forbidden();
  }
  const zone = await Zone.findOne({ where: { yardId, id: proposal.zoneId } });
  await proposal.update({ status: 'withdrawn', decidedBy: user.id, decidedAt: now });
  await recordEvent({
    yardId, userId: user.id, verb: 'proposal.withdrawn', subjectKind: 'proposal', subjectId: proposalId, data: { name: zone?.name ?? '', zoneId: proposal.zoneId },
  }, now);
}
