import { randomUUID } from 'node:crypto';
import { hashToken, newSecretToken } from '@/server/commands/accounts/secretToken';
import { defaultSchedule } from '@/server/commands/ensureSchedule';
import {
  BucketTest, CatchTest, EventRow, Hose, Invitation, Membership, Observation, Permit, Position, Proposal, RainEntry, Reminder, Round, RoundSet, SeenStageRow, Session, SetLock, Sprinkler, SunDiaryPage, WaterRule,
} from '@/server/models';
import type { TestContext } from '../setup/testContext';
import { signedIn, type SignedIn } from './people';
import { makeComplete, seededYard, storedBudget } from './seededYard';

export const fullYardToday = '2026-06-13';

/** A yard with a row of every kind, and the ids by which paths and bodies name them. */
export interface FullYard {
  yardId: string;
  people: { owner: SignedIn; helper: SignedIn; consultant: SignedIn };
  /** A further member, for what is done to somebody else. */
  other: SignedIn;
  ids: {
    zoneId: string; tapId: string; hoseId: string; sprinklerId: string; positionId: string; ruleId: string; bucketTestId: string; catchTestId: string; permitId: string; lockId: string;
    invitationId: string; proposalId: string; roundId: string; setId: string;
  };
}

/** Makes a yard with members of each role and a row of every kind: equipment, tests, rule, proposal of its consultant, a running round, balance, history. */
export async function fullYard(test: TestContext, name: string): Promise<FullYard> {
  const now = test.clock.now();
  const yard = await seededYard(test, { seededOn: '2026-06-04', name });
  const { yardId, zoneId } = yard;
  const [positionId = '', tapId = ''] = [yard.positionIds[0], yard.tapIds[0]];
  const [helper, consultant, other] = [await yard.member('helper'), await yard.member('consultant'), await yard.member('helper')];
  const ids = {
    hoseId: randomUUID(), ruleId: randomUUID(), permitId: randomUUID(), lockId: randomUUID(), bucketTestId: randomUUID(), invitationId: randomUUID(), proposalId: randomUUID(), roundId: randomUUID(), setId: randomUUID(),
  };
  await Hose.create({ id: ids.hoseId, yardId, name: 'Long hose', lengthM: 20, boreMm: 16 });
  const sprinkler = await Sprinkler.findOne({ where: { yardId }, rejectOnEmpty: true });
  await Position.update({ hoseId: ids.hoseId }, { where: { yardId } });
  await makeComplete(test, yard);
  await WaterRule.create({ id: ids.ruleId, yardId, name: 'Odd days', dateParity: 'odd', source: 'a sign', sourceOn: '2026-05-01' });
  await Permit.create({
    id: ids.permitId, yardId, name: 'Seed permit', zoneIds: [zoneId], fromOn: '2026-06-04', toOn: '2026-07-04', blackoutMonths: [], liftsRuleIds: [ids.ruleId], source: 'a letter', sourceOn: '2026-06-01',
  });
  await SetLock.create({ id: ids.lockId, yardId, positionId, on: '2026-06-14', startMinutes: 600, minutes: 30, reason: '', lockedBy: consultant.user.id });
  await BucketTest.create({ id: ids.bucketTestId, yardId, tapId, volumeL: 19, seconds: 76, flowLpm: 15, flowLowLpm: 14, flowHighLpm: 16, testedAt: now, testedBy: helper.user.id, createdAt: now });
  const catchTest = await CatchTest.findOne({ where: { yardId }, rejectOnEmpty: true });
  await RainEntry.create({ yardId, on: fullYardToday, depthMm: 3, enteredBy: helper.user.id, updatedAt: now });
  await Observation.create({ yardId, zoneId, on: fullYardToday, kind: 'screwdriver', feel: 'hard', seenBy: helper.user.id, updatedAt: now });
  await SeenStageRow.create({ yardId, zoneId, on: fullYardToday, stage: 'coming_up', seenBy: helper.user.id, updatedAt: now });
  await SunDiaryPage.create({ yardId, zoneId, on: fullYardToday, sunnyHours: [9, 10, 11], notedBy: helper.user.id, updatedAt: now });
  await Invitation.create({
    id: ids.invitationId, yardId, email: `guest-${ids.invitationId}@example.org`, role: 'helper', tokenHash: randomUUID(), invitedBy: yard.owner.user.id, createdAt: now,
    expiresAt: new Date(now.getTime() + 86_400_000),
  });
  await Proposal.create({
    id: ids.proposalId, yardId, zoneId, authorId: consultant.user.id, reason: 'It dried.', scheduleBefore: defaultSchedule, status: 'open',
    schedule: { stages: defaultSchedule.stages.map((doses) => ({ ...doses, depthMm: doses.depthMm + 1 })) },
  });
  await yard.plan(fullYardToday, [{ position: 0, startMinutes: 320, minutes: 40 }, { position: 0, startMinutes: 420, minutes: 30, roundIndex: 1 }]);
  await Round.create({ id: ids.roundId, yardId, on: fullYardToday, roundIndex: 0, status: 'running', startedBy: helper.user.id, startedAt: new Date(now.getTime() - 600_000) });
  await RoundSet.create({
    id: ids.setId, yardId, roundId: ids.roundId, zoneId, positionId, kind: 'set', on: fullYardToday, roundIndex: 0, sortOrder: 0, plannedStartAt: new Date(now.getTime() - 600_000),
    plannedMinutes: 40, rateMmPerHour: 12, runTimeMultiplier: 1.2, zoneShare: 1, status: 'running', startedAt: new Date(now.getTime() - 600_000),
  });
  await storedBudget(test, yard, fullYardToday, [2, 4, 6]);
  await Reminder.create({
    id: randomUUID(), yardId, userId: helper.user.id, kind: 'morning', subjectKey: fullYardToday, dueAt: now, dropAfter: new Date(now.getTime() + 3_600_000), status: 'waiting',
    messageId: `<${randomUUID()}@example.org>`,
  });
  await EventRow.create({ id: randomUUID(), yardId, userId: helper.user.id, verb: 'rain.recorded', subjectKind: 'rain', subjectId: null, data: { depthMm: 3 }, at: now });
  return {
    yardId, people: { owner: yard.owner, helper, consultant }, other,
    ids: { ...ids, zoneId, tapId, positionId, sprinklerId: sprinkler.id, catchTestId: catchTest.id },
  };
}

/** The link of an invitation to a new yard, for the address of a person. */
export async function invitationFor(test: TestContext, person: SignedIn, yardId: string): Promise<string> {
  const token = newSecretToken();
  const now = test.clock.now();
  await Invitation.create({ id: randomUUID(), yardId, email: person.user.email, role: 'helper', tokenHash: hashToken(token), createdAt: now, expiresAt: new Date(now.getTime() + 86_400_000) });
  return token;
}

/** A second session of a person. */
export async function otherSessionOf(test: TestContext, person: SignedIn): Promise<string> {
  const now = test.clock.now();
  const id = randomUUID();
  await Session.create({ id, userId: person.user.id, tokenHash: randomUUID(), device: 'elsewhere', createdAt: now, lastUsedAt: now, expiresAt: new Date(now.getTime() + 86_400_000) });
  return id;
}

/** Somebody who belongs to one yard only, as its owner. */
export async function ownerOfAnother(test: TestContext, yardId: string): Promise<SignedIn> {
  const person = await signedIn(test);
  await Membership.create({ id: randomUUID(), yardId, userId: person.user.id, role: 'owner' });
  return person;
}
