import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { Invitation, Membership } from '@/server/models';
import type { MemberListResponse } from '@/shared/contracts/yards';
import { limits } from '@/shared/limits';
import { signedUp } from '../../factories/accounts';
import { mailsTo, tokenIn } from '../../factories/mailbox';
import { signedIn, type SignedIn } from '../../factories/people';
import { plannedYard, type PlannedYard } from '../../factories/plannedYard';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

let counter = 0;
const freshAddress = () => `guest-${(counter += 1)}@example.org`;

describe('invitations', () => {
  let test: TestContext;
  let yard: PlannedYard;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(async () => {
    test.clock.set(testNow);
    yard = await plannedYard(test, { name: 'Hazel <Row> & Co' });
  });

  const invite = (body: object, who: SignedIn = yard.owner, yardId = yard.yardId) => request(test.app).post(`/api/yards/${yardId}/invitations`).set(who.headers).send(body);
  const tokenFor = async (email: string, role = 'helper', count = 1) => {
    await invite({ email, role }).expect(201);
    return tokenIn((await mailsTo(test, email, count))[count - 1]);
  };
  const answer = (how: 'accept' | 'decline', token: string, who?: { headers: { authorization: string } }) => {
    const sent = request(test.app).post(`/api/invitations/${how}`);
    return (who ? sent.set(who.headers) : sent).send({ token });
  };

  it('go by mail to the address, show what they are before anybody signs in, and make the invited person a member', async () => {
    const guest = await signedUp(test, { name: 'Gus Alder' });
    const token = await tokenFor(guest.email, 'consultant', 2);
    const mail = (await mailsTo(test, guest.email, 2))[1]!;
    expect(mail.subject).toBe('You are invited to Hazel <Row> & Co');
    expect(mail.text).toContain(`https://dapple.example/invitation?token=${token}`);
    expect(mail.html).toContain('Ada Larkin invites you to the watering of Hazel &lt;Row&gt; &amp; Co');
    expect(mail.html).not.toContain('<Row>');
    expect((await request(test.app).get(`/api/invitations/${token}`).expect(200)).body).toEqual({
      yardName: 'Hazel <Row> & Co', role: 'consultant', invitedBy: 'Ada Larkin', email: guest.email, expiresAt: '2026-06-27T09:40:00.000Z',
    });
    expect((await answer('accept', token, guest).expect(200)).body).toEqual({ yardId: yard.yardId, yardName: 'Hazel <Row> & Co', role: 'consultant' });
    expect(await Membership.findOne({ where: { yardId: yard.yardId, userId: guest.id } })).toMatchObject({ role: 'consultant' });
    expect((await answer('accept', token, guest).expect(410)).body).toMatchObject({ error: { code: 'token_used' } });
    await request(test.app).get(`/api/invitations/${token}`).expect(410);
    expect(JSON.stringify(await Invitation.findAll({ where: { yardId: yard.yardId } }))).not.toContain(token);
  });

  it('are for their address only', async () => {
    const email = freshAddress();
    const token = await tokenFor(email);
    const other = await signedIn(test, { email: 'somebody-else@example.org' });
    const refused = await answer('accept', token, other);
    expect([refused.status, refused.body.error.code]).toEqual([403, 'forbidden']);
    expect(refused.body.error.message).toBe(`This invitation is for ${email}, and you are signed in as somebody-else@example.org. Sign in with the invited address, or ask for an invitation to yours.`);
    await answer('accept', token).expect(401);
    expect(await Membership.count({ where: { yardId: yard.yardId } })).toBe(1);
    const invited = await signedIn(test, { email });
    await answer('accept', token, invited).expect(200);
  });

  it('replace an earlier one of the same address', async () => {
    const email = freshAddress();
    const first = await tokenFor(email, 'helper');
    const second = await tokenFor(email, 'consultant', 2);
    expect((await request(test.app).get(`/api/invitations/${first}`).expect(410)).body).toMatchObject({ error: { code: 'token_expired' } });
    const list = (await request(test.app).get(`/api/yards/${yard.yardId}/members`).set(yard.owner.headers)).body as MemberListResponse;
    expect(list.invitations.map((invitation) => [invitation.email, invitation.role])).toEqual([[email, 'consultant']]);
    const guest = await signedIn(test, { email });
    await answer('accept', first, guest).expect(410);
    await answer('accept', second, guest).expect(200);
  });

  it('end after fourteen days', async () => {
    const email = freshAddress();
    const token = await tokenFor(email);
    const guest = await signedIn(test, { email });
    test.clock.advance(14 * 24 * 60);
    expect((await answer('accept', token, guest).expect(410)).body).toMatchObject({ error: { code: 'token_expired' } });
  });

  it('are taken back by an owner of their yard, and no other', async () => {
    const email = freshAddress();
    const token = await tokenFor(email);
    const invitation = await Invitation.findOne({ where: { email }, rejectOnEmpty: true });
    const other = await plannedYard(test);
    await request(test.app).delete(`/api/yards/${other.yardId}/invitations/${invitation.id}`).set(other.owner.headers).expect(404);
    const helper = await yard.member('helper');
    await request(test.app).delete(`/api/yards/${yard.yardId}/invitations/${invitation.id}`).set(helper.headers).expect(403);
    await request(test.app).get(`/api/invitations/${token}`).expect(200);
    await request(test.app).delete(`/api/yards/${yard.yardId}/invitations/${invitation.id}`).set(yard.owner.headers).expect(200);
    await request(test.app).get(`/api/invitations/${token}`).expect(410);
    await request(test.app).delete(`/api/yards/${yard.yardId}/invitations/${invitation.id}`).set(yard.owner.headers).expect(404);
  });

  it('are declined with the link alone', async () => {
    const token = await tokenFor(freshAddress());
    await answer('decline', token).expect(200);
    expect((await answer('decline', token).expect(410)).body).toMatchObject({ error: { code: 'token_expired' } });
    expect((await answer('decline', 'z'.repeat(43)).expect(400)).body).toMatchObject({ error: { code: 'token_invalid' } });
  });

  it('are not sent to members, nor by helpers and consultants', async () => {
    const helper = await yard.member('helper');
    const consultant = await yard.member('consultant');
    expect((await invite({ email: helper.user.email, role: 'owner' }).expect(409)).body).toMatchObject({ error: { code: 'already_member' } });
    await invite({ email: freshAddress(), role: 'helper' }, helper).expect(403);
    await invite({ email: freshAddress(), role: 'helper' }, consultant).expect(403);
    expect(await Invitation.count({ where: { yardId: yard.yardId } })).toBe(0);
  });

  it('make one member of two acceptances at the same moment', async () => {
    const email = freshAddress();
    const token = await tokenFor(email);
    const guest = await signedIn(test, { email });
    const answers = await Promise.all([answer('accept', token, guest), answer('accept', token, guest), answer('accept', token, guest)]);
    expect(answers.map((each) => each.status).sort()).toEqual([200, 410, 410]);
    expect(await Membership.count({ where: { yardId: yard.yardId, userId: guest.user.id } })).toBe(1);
  });

  it('stop at thirty members, invited ones included', async () => {
    const now = test.clock.now();
    // the owner, these, and one more are thirty; those that are over, taken back or accepted hold no place
    const places = Array.from({ length: limits.membersPerYard - 2 }, () => ({ expiresAt: new Date(now.getTime() + 60_000) }));
    const none = [{ expiresAt: now }, { expiresAt: new Date(now.getTime() + 60_000), withdrawnAt: now }, { expiresAt: new Date(now.getTime() + 60_000), acceptedAt: now }];
    await Invitation.bulkCreate([...places, ...none].map((each) => ({
      id: randomUUID(), yardId: yard.yardId, email: freshAddress(), role: 'helper' as const, tokenHash: randomUUID(), createdAt: new Date(now.getTime() - 2 * 86_400_000), ...each,
    })));
    await invite({ email: freshAddress(), role: 'helper' }).expect(201);
    const refused = await invite({ email: freshAddress(), role: 'helper' });
    expect([refused.status, refused.body.error.code]).toEqual([409, 'limit_reached']);
  });

  it('are sent once for a repeated request', async () => {
    const email = freshAddress();
    const send = () => invite({ email, role: 'helper' }).set('idempotency-key', 'the-same-tap-twice');
    const first = await send().expect(201);
    const second = await send().expect(201);
    expect(second.body).toEqual(first.body);
    expect(await Invitation.count({ where: { email } })).toBe(1);
    await tokenFor(email, 'helper', 2);
    expect(await mailsTo(test, email, 2)).toHaveLength(2);
  });
});
