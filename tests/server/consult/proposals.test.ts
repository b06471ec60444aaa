import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { defaultSchedule, ensureSchedule } from '@/server/commands/ensureSchedule';
import { EstablishmentScheduleRow, EventRow, Membership, Proposal, Yard, Zone } from '@/server/models';
import type { EstablishmentResponse, EstablishmentScheduleInput, ProposalResponse } from '@/shared/contracts/proposals';
import { mailsTo } from '../../factories/mailbox';
import type { SignedIn } from '../../factories/people';
import { plannedYard, type PlannedYard } from '../../factories/plannedYard';
import { seededYard } from '../../factories/seededYard';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

/** Five doses a day instead of four while sown. */
const tuned = {
  stages: defaultSchedule.stages.map((doses) => (doses.stage === 'sown' ? { ...doses, dosesPerDay: 5, timesMinutes: [570, 660, 750, 840, 915] } : doses)),
} as EstablishmentScheduleInput;

describe('proposals', () => {
  let test: TestContext;
  let yard: PlannedYard;
  let consultant: SignedIn;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(async () => {
    test.clock.set(testNow);
    yard = await seededYard(test, { seededOn: '2026-06-04' });
    consultant = await yard.member('consultant', { name: 'Cora <Lind>' });
  });

  const propose = (body: object = {}, who: SignedIn = consultant, yardId = yard.yardId) => request(test.app).post(`/api/yards/${yardId}/proposals`).set(who.headers)
    .send({ zoneId: yard.zoneId, schedule: tuned, reason: 'The surface dried on two afternoons.', ...body });
  const proposed = async () => (await propose().expect(201)).body as ProposalResponse;
  const decide = (id: string, body: object, who: SignedIn = yard.owner) => request(test.app).post(`/api/yards/${yard.yardId}/proposals/${id}/decision`).set(who.headers).send(body);
  const withdraw = (id: string, who: SignedIn = consultant) => request(test.app).post(`/api/yards/${yard.yardId}/proposals/${id}/withdraw`).set(who.headers);
  const establishment = async () => (await request(test.app).get(`/api/yards/${yard.yardId}/zones/${yard.zoneId}/establishment`).set(consultant.headers).expect(200)).body as EstablishmentResponse;
  const refuses = async (sent: request.Test, status: number, code: string) => {
    const answer = await sent;
    expect([answer.status, answer.body.error?.code]).toEqual([status, code]);
  };

  it('wait for the owner, who is told what changes and why, and change nothing until then', async () => {
    const proposal = await proposed();
    expect(proposal).toMatchObject({ status: 'open', zoneName: 'Seeded strip', author: { name: 'Cora <Lind>' }, decidedBy: null });
    const before = await establishment();
    expect(before).toMatchObject({ scheduleIsDefault: true, openProposal: { id: proposal.id } });
    expect(before.schedule.stages[0]).toMatchObject({ stage: 'sown', dosesPerDay: 4 });
    expect(await Yard.findByPk(yard.yardId)).toMatchObject({ factsVersion: 0, budgetStaleFrom: null });
    const [mail] = await mailsTo(test, yard.owner.user.email);
    expect(mail?.text).toContain('Reason: The surface dried on two afternoons.');
    expect(mail?.text).toContain('up yet: 5 × 0.06 in each day at 9:30 am, 11:00 am, 12:30 pm, 2:00 pm, 3:15 pm (now 4 × 0.06 in each day).');
    expect(mail?.text).not.toContain('While rooting');
    expect(mail?.html).toContain('Cora &lt;Lind&gt;');
    const list = await request(test.app).get(`/api/yards/${yard.yardId}/proposals`).set(yard.owner.headers).expect(200);
    expect(list.body).toEqual({ proposals: [proposal] });
  });

  it('accepted are in force from now on; budget and plan are made anew from today; both see it in the history', async () => {
    const proposal = await proposed();
    test.clock.advance(30);
    expect((await decide(proposal.id, { decision: 'accept', answer: 'Good idea.' }).expect(200)).body).toMatchObject({
      status: 'accepted', answer: 'Good idea.', decidedBy: { name: 'Ada Larkin' }, decidedAt: '2026-06-13T10:10:00.000Z',
    });
    const after = await establishment();
    expect(after).toMatchObject({ scheduleIsDefault: false, openProposal: null, schedule: tuned });
    expect(await Yard.findByPk(yard.yardId)).toMatchObject({ factsVersion: 1, budgetStaleFrom: '2026-06-13' });
    expect(await EstablishmentScheduleRow.count({ where: { yardId: yard.yardId } })).toBe(2);
    for (const who of [consultant, yard.owner]) {
      const history = await request(test.app).get(`/api/yards/${yard.yardId}/history`).set(who.headers).expect(200);
      expect(history.body.entries.map((entry: { verb: string; person: { name: string } }) => [entry.verb, entry.person.name])).toEqual([
        ['proposal.accepted', 'Ada Larkin'], ['proposal.sent', 'Cora <Lind>'],
      ]);
      expect(history.body.entries[1].data).toMatchObject({ name: 'Seeded strip', reason: 'The surface dried on two afternoons.' });
    }
    const [mail] = await mailsTo(test, consultant.user.email);
    expect(mail?.subject).toBe('Seeded strip: your proposal was accepted');
    expect(mail?.text).toContain('Answer: Good idea.');
  });

  it('declined leave everything as it was', async () => {
    const proposal = await proposed();
    await decide(proposal.id, { decision: 'decline', answer: 'We are away.' }).expect(200);
    expect(await establishment()).toMatchObject({ scheduleIsDefault: true, openProposal: null });
    expect(await Yard.findByPk(yard.yardId)).toMatchObject({ factsVersion: 0 });
    expect((await mailsTo(test, consultant.user.email))[0]?.subject).toBe('Seeded strip: your proposal was declined');
    await propose({ reason: 'Once more' }).expect(201);
  });

  it('are decided once, also when two owners answer at the same moment', async () => {
    const second = await yard.member('owner');
    const proposal = await proposed();
    const answers = await Promise.all([decide(proposal.id, { decision: 'accept' }), decide(proposal.id, { decision: 'decline' }, second)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    expect(answers.find((answer) => answer.status === 409)?.body).toMatchObject({ error: { code: 'already_decided' } });
    await refuses(decide(proposal.id, { decision: 'accept' }), 409, 'already_decided');
    await refuses(withdraw(proposal.id), 409, 'already_decided');
    expect(await EventRow.count({ where: { subjectId: proposal.id } })).toBe(2);
  });

  it('are withdrawn by their author only', async () => {
    const other = await yard.member('consultant');
    const proposal = await proposed();
    await refuses(withdraw(proposal.id, other), 403, 'forbidden');
    expect((await withdraw(proposal.id).expect(200)).body).toMatchObject({ status: 'withdrawn' });
    await refuses(decide(proposal.id, { decision: 'accept' }), 409, 'already_decided');
  });

  it('are open one at a time for a zone', async () => {
    const answers = await Promise.all([propose(), propose({ reason: 'Another one' })]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409]);
    await refuses(propose(), 409, 'conflict');
  });

  it('come from consultants and are decided by owners', async () => {
    const helper = await yard.member('helper');
    await refuses(propose({}, yard.owner), 403, 'forbidden');
    await refuses(propose({}, helper), 403, 'forbidden');
    const proposal = await proposed();
    await refuses(decide(proposal.id, { decision: 'accept' }, consultant), 403, 'forbidden');
    await refuses(decide(proposal.id, { decision: 'accept' }, helper), 403, 'forbidden');
  });

  it('need a zone of this yard that is seeded, and a change', async () => {
    const other = await seededYard(test, { seededOn: '2026-06-04' });
    const lawn = await plannedYard(test);
    await Membership.create({ id: randomUUID(), yardId: lawn.yardId, userId: consultant.user.id, role: 'consultant' });
    await refuses(propose({ zoneId: other.zoneId }), 400, 'invalid_input');
    await refuses(propose({ zoneId: randomUUID() }), 400, 'invalid_input');
    await refuses(propose({ zoneId: lawn.zoneId }, consultant, lawn.yardId), 400, 'invalid_input');
    await refuses(propose({ schedule: defaultSchedule }), 400, 'invalid_input');
    await refuses(propose({ reason: '   ' }), 400, 'invalid_input');
    expect(await Proposal.count({ where: { yardId: [yard.yardId, other.yardId, lawn.yardId] } })).toBe(0);
  });

  it.each([
    ['nine doses a day', { dosesPerDay: 9 }, 'schedule.stages.0.dosesPerDay'],
    ['a dose of a hand', { depthMm: 100 }, 'schedule.stages.0.depthMm'],
    ['a dose of nothing', { depthMm: 0 }, 'schedule.stages.0.depthMm'],
    ['times that are not in order', { dosesPerDay: 2, timesMinutes: [600, 500] }, 'schedule.stages.0.timesMinutes'],
    ['fewer times than doses', { dosesPerDay: 3, timesMinutes: [500, 600] }, 'schedule.stages.0.timesMinutes'],
  ])('refuse %s and name the field', async (_what, wrong, path) => {
    const answer = await propose({ schedule: { stages: tuned.stages.map((doses, index) => (index === 0 ? { ...doses, ...wrong } : doses)) } });
    expect(answer.status).toBe(400);
    expect(answer.body.error.fields.map((field: { path: string }) => field.path)).toContain(path);
  });

  it('cannot be accepted once the zone is no longer seeded, but declined', async () => {
    const proposal = await proposed();
    await Zone.update({ seededOn: null }, { where: { id: yard.zoneId } });
    await refuses(decide(proposal.id, { decision: 'accept' }), 409, 'conflict');
    expect(await Proposal.findByPk(proposal.id)).toMatchObject({ status: 'open' });
    await decide(proposal.id, { decision: 'decline' }).expect(200);
  });

  it('of another yard are not there', async () => {
    const proposal = await proposed();
    const other = await seededYard(test, { seededOn: '2026-06-04' });
    const answer = await request(test.app).post(`/api/yards/${other.yardId}/proposals/${proposal.id}/decision`).set(other.owner.headers).send({ decision: 'accept' });
    expect([answer.status, answer.body.error.code]).toEqual([404, 'not_found']);
    expect(await Proposal.findByPk(proposal.id)).toMatchObject({ status: 'open' });
  });

  describe('and the schedule of a zone', () => {
    it('is the default one, kept once, without a stage that has no doses', async () => {
      await ensureSchedule(yard.yardId, yard.zoneId, test.clock.now());
      const rows = await EstablishmentScheduleRow.findAll({ where: { yardId: yard.yardId } });
      expect(rows).toMatchObject([{ isDefault: true, proposalId: null }]);
      expect(rows[0]?.schedule.stages.map((doses) => doses.stage)).toEqual(['sown', 'coming_up', 'rooting', 'taper']);
    });

    it('stays tuned when the day of sowing is put right, and starts again for a new sowing', async () => {
      await decide((await proposed()).id, { decision: 'accept' }).expect(200);
      await Zone.update({ seededOn: '2026-06-03' }, { where: { id: yard.zoneId } });
      test.clock.advance(60);
      expect(await ensureSchedule(yard.yardId, yard.zoneId, test.clock.now())).toMatchObject({ isDefault: false });
      test.clock.set('2026-09-01T12:00:00Z');
      await Zone.update({ seededOn: '2026-09-01' }, { where: { id: yard.zoneId } });
      expect(await ensureSchedule(yard.yardId, yard.zoneId, test.clock.now())).toMatchObject({ isDefault: true, schedule: defaultSchedule });
    });
  });
});
