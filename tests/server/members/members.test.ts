import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { EventRow, Membership, Reminder } from '@/server/models';
import { mayInYard } from '@/server/policies/yardPolicy';
import type { HistoryResponse, MemberListResponse } from '@/shared/contracts/yards';
import { signedIn, type SignedIn } from '../../factories/people';
import { plannedYard, type PlannedYard } from '../../factories/plannedYard';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

describe('members of a yard', () => {
  let test: TestContext;
  let yard: PlannedYard;
  let helper: SignedIn;
  let consultant: SignedIn;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(async () => {
    test.clock.set(testNow);
    yard = await plannedYard(test);
    helper = await yard.member('helper', { name: 'Hal Oster' });
    consultant = await yard.member('consultant', { name: 'Cora Lind' });
  });

  const path = (userId = '') => `/api/yards/${yard.yardId}/members${userId === '' ? '' : `/${userId}`}`;
  const list = async (who: SignedIn) => (await request(test.app).get(path()).set(who.headers).expect(200)).body as MemberListResponse;
  const rename = (who: SignedIn, userId: string, role: string) => request(test.app).patch(path(userId)).set(who.headers).send({ role });
  const remove = (who: SignedIn, userId: string) => request(test.app).delete(path(userId)).set(who.headers);
  const verbs = async () => (await EventRow.findAll({ where: { yardId: yard.yardId }, order: [['at', 'ASC']] })).map((event) => [event.verb, event.data]);

  it('are listed for owner and consultant, owners first, without invitations for the consultant', async () => {
    const invitation = await request(test.app).post(`/api/yards/${yard.yardId}/invitations`).set(yard.owner.headers).send({ email: 'new@example.org', role: 'helper' }).expect(201);
    const seen = await list(yard.owner);
    expect(seen.members.map((member) => [member.name, member.role, member.isYou])).toEqual([['Ada Larkin', 'owner', true], ['Hal Oster', 'helper', false], ['Cora Lind', 'consultant', false]]);
    expect(seen.invitations).toEqual([invitation.body]);
    expect((await list(consultant)).invitations).toEqual([]);
    await request(test.app).get(path()).set(helper.headers).expect(403);
  });

  it('get another role, and can at once what that role can', async () => {
    expect(mayInYard('helper', 'members.read')).toBe(false);
    await rename(yard.owner, helper.user.id, 'owner').expect(200);
    await list(helper);
    expect(await verbs()).toEqual([['member.role_changed', { before: 'helper', after: 'owner' }]]);
    await rename(yard.owner, helper.user.id, 'owner').expect(200);
    expect(await verbs()).toHaveLength(1);
  });

  it('do not get a role from a helper or consultant, nor an unknown one', async () => {
    await rename(helper, helper.user.id, 'owner').expect(403);
    await rename(consultant, consultant.user.id, 'owner').expect(403);
    expect((await rename(yard.owner, helper.user.id, 'gardener').expect(400)).body).toMatchObject({ error: { fields: [{ path: 'role' }] } });
    await rename(yard.owner, randomUUID(), 'helper').expect(404);
    const stranger = await signedIn(test);
    await rename(yard.owner, stranger.user.id, 'helper').expect(404);
    expect(await verbs()).toEqual([]);
  });

  it('keep one owner: the last one neither steps down, nor leaves, nor is removed', async () => {
    for (const answer of [await rename(yard.owner, yard.owner.user.id, 'helper'), await remove(yard.owner, yard.owner.user.id)]) {
      expect([answer.status, answer.body.error.code]).toEqual([409, 'last_owner']);
    }
    await rename(yard.owner, helper.user.id, 'owner').expect(200);
    await remove(yard.owner, yard.owner.user.id).expect(200);
    expect((await remove(helper, helper.user.id).expect(409)).body).toMatchObject({ error: { code: 'last_owner' } });
  });

  it('keep one owner also when two owners step down at the same moment', async () => {
    await rename(yard.owner, helper.user.id, 'owner').expect(200);
    const answers = await Promise.all([rename(yard.owner, yard.owner.user.id, 'helper'), rename(helper, helper.user.id, 'helper')]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    expect(await Membership.count({ where: { yardId: yard.yardId, role: 'owner' } })).toBe(1);
  });

  it('leave by themselves, and are removed by an owner only; the yard is then not there for them, and waiting reminders are cancelled', async () => {
    await remove(helper, consultant.user.id).expect(403);
    await remove(consultant, helper.user.id).expect(403);
    const reminder = { yardId: yard.yardId, kind: 'morning' as const, dueAt: test.clock.now(), dropAfter: test.clock.now(), createdAt: test.clock.now() };
    await Reminder.create({ ...reminder, id: randomUUID(), userId: helper.user.id, subjectKey: 'a', status: 'waiting', messageId: `<${randomUUID()}@x>` });
    await Reminder.create({ ...reminder, id: randomUUID(), userId: helper.user.id, subjectKey: 'b', status: 'sent', messageId: `<${randomUUID()}@x>` });
    await remove(helper, helper.user.id).expect(200);
    await request(test.app).get(`/api/yards/${yard.yardId}/members`).set(helper.headers).expect(404);
    expect((await Reminder.findAll({ where: { userId: helper.user.id }, order: ['subjectKey'] })).map((row) => row.status)).toEqual(['cancelled', 'sent']);
    await remove(yard.owner, consultant.user.id).expect(200);
    await remove(yard.owner, consultant.user.id).expect(404);
    expect(await verbs()).toEqual([['member.left', { role: 'helper' }], ['member.removed', { role: 'consultant' }]]);
  });

  it('choose their mails, each for themself', async () => {
    const set = (who: SignedIn, body: object) => request(test.app).patch(`/api/yards/${yard.yardId}/preferences`).set(who.headers).send(body);
    expect((await set(helper, { wantsMoveEmail: false }).expect(200)).body).toEqual({ wantsMorningEmail: true, wantsMoveEmail: false });
    expect((await set(helper, {}).expect(200)).body).toEqual({ wantsMorningEmail: true, wantsMoveEmail: false });
    expect(await Membership.findOne({ where: { yardId: yard.yardId, userId: yard.owner.user.id } })).toMatchObject({ wantsMorningEmail: true, wantsMoveEmail: true });
    await set(helper, { wantsMorningEmail: 'no' }).expect(400);
  });

  it('see the history newest first, page by page, none left out or twice though many share an instant', async () => {
    for (let number = 0; number < 23; number += 1) {
      await EventRow.create({
        id: randomUUID(), yardId: yard.yardId, userId: number % 2 === 0 ? helper.user.id : null, verb: 'rain.recorded', subjectKind: 'rain', subjectId: null, data: { number },
        at: new Date(test.clock.now().getTime() + Math.floor(number / 8) * 1000),
      });
    }
    const other = await plannedYard(test);
    await EventRow.create({ id: randomUUID(), yardId: other.yardId, userId: null, verb: 'zone.created', subjectKind: 'zone', subjectId: null, data: {}, at: test.clock.now() });
    const seen: HistoryResponse['entries'] = [];
    let before: string | null = '';
    while (before !== null) {
      const query: string = before === '' ? '' : `&before=${encodeURIComponent(before)}`;
      const page = (await request(test.app).get(`/api/yards/${yard.yardId}/history?limit=5${query}`).set(consultant.headers).expect(200)).body as HistoryResponse;
      expect(page.entries.length).toBeLessThanOrEqual(5);
      seen.push(...page.entries);
      before = page.nextBefore;
    }
    expect(seen.map((entry) => entry.data['number']).sort((a, b) => Number(a) - Number(b))).toEqual(Array.from({ length: 23 }, (_, number) => number));
    expect(seen.map((entry) => entry.at)).toEqual([...seen.map((entry) => entry.at)].sort().reverse());
    expect(seen.find((entry) => entry.data['number'] === 2)?.person).toEqual({ id: helper.user.id, name: 'Hal Oster' });
    await request(test.app).get(`/api/yards/${yard.yardId}/history?before=yesterday`).set(consultant.headers).expect(400);
    await request(test.app).get(`/api/yards/${yard.yardId}/history?limit=0`).set(consultant.headers).expect(400);
    await request(test.app).get(`/api/yards/${yard.yardId}/history?before=2026-13-45T25:61:61.000Z~${randomUUID()}`).set(consultant.headers).expect(400);
  });
});
