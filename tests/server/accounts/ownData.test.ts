import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { QueryTypes } from 'sequelize';
import { EventRow, Membership, User, Yard, Zone, CatchTest, BucketTest } from '@/server/models';
import type { ExportResponse } from '@/shared/contracts/accounts';
import { goodPassword, signedUp, type SignedInAccount } from '../../factories/accounts';
import { mailsTo } from '../../factories/mailbox';
import { plannedYard, type PlannedYard } from '../../factories/plannedYard';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

describe('a person\'s own data', () => {
  let test: TestContext;
  let account: SignedInAccount;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(async () => {
    test.clock.set(testNow);
    account = await signedUp(test);
  });

  const remove = (password = goodPassword, who: { headers: { authorization: string } } = account) => request(test.app).delete('/api/me').set(who.headers).send({ password });
  const join = (yardId: string, role: 'owner' | 'helper' | 'consultant') => Membership.create({ id: randomUUID(), yardId, userId: account.id, role });
  /** A yard whose only member is the account. */
  const ownYard = async (name: string): Promise<PlannedYard> => {
    const yard = await plannedYard(test, { name });
    await Membership.destroy({ where: { yardId: yard.yardId } });
    await join(yard.yardId, 'owner');
    return yard;
  };
  const measured = async (yard: PlannedYard, by: string) => {
    await BucketTest.create({
      id: randomUUID(), yardId: yard.yardId, tapId: yard.tapIds[0]!, volumeL: 19, seconds: 76, flowLpm: 15, flowLowLpm: 14, flowHighLpm: 16, testedAt: test.clock.now(), testedBy: by, createdAt: test.clock.now(),
    });
    await yard.plan('2026-06-13', [{ position: 0, startMinutes: 360, minutes: 45 }]);
    await EventRow.create({ id: randomUUID(), yardId: yard.yardId, userId: by, verb: 'bucket_test.recorded', subjectKind: 'tap', subjectId: yard.tapIds[0]!, data: {}, at: test.clock.now() });
  };

  it('takes a new name', async () => {
    const answer = await request(test.app).patch('/api/me').set(account.headers).send({ name: '  Maren Birch ' }).expect(200);
    expect(answer.body).toMatchObject({ name: 'Maren Birch', email: account.email });
    expect((await request(test.app).patch('/api/me').set(account.headers).send({}).expect(200)).body).toMatchObject({ name: 'Maren Birch' });
  });

  it('is exported: the account, owned yards in full, and in the yards of others only what they did themself', async () => {
    const own = await ownYard('Sorrel Bank');
    await measured(own, account.id);
    const other = await plannedYard(test, { name: 'Foreign Row' });
    await join(other.yardId, 'helper');
    await measured(other, account.id);
    await measured(other, other.owner.user.id);
    const answer = (await request(test.app).get('/api/me/export').set(account.headers).expect(200)).body as ExportResponse;
    expect(answer.account).toMatchObject({ email: account.email });
    expect(answer.sessions).toHaveLength(1);
    expect(answer.memberships.map((membership) => [membership.yardName, membership.role]).sort()).toEqual([['Foreign Row', 'helper'], ['Sorrel Bank', 'owner']]);
    expect(answer.ownedYards.map((yard) => yard.name)).toEqual(['Sorrel Bank']);
    const tables = answer.ownedYards[0]!.tables;
    expect(Object.fromEntries(Object.entries(tables).map(([table, rows]) => [table, rows.length]))).toMatchObject({ yards: 1, zones: 1, taps: 1, positions: 2, bucket_tests: 1, events: 1 });
    expect(tables['zones']?.[0]).toMatchObject({ id: own.zoneId, name: 'Front lawn', area_m2: 150 });
    expect(answer.doneElsewhere['bucket_tests']).toHaveLength(1);
    expect(JSON.stringify(answer)).not.toContain(other.owner.user.id);
    expect(JSON.stringify(answer)).not.toContain(other.owner.user.email);
  });

  it('names every table of a yard in the export, or says why not', async () => {
    const tables = await test.context.database.query<{ table_name: string }>(
      `SELECT DISTINCT table_name FROM information_schema.columns WHERE table_schema = 'public' AND column_name = 'yard_id'`, { type: QueryTypes.SELECT },
    );
    // plans are computed from what is exported; the climate of a place is nobody's; reminders, runs and fetches are the service's own work; members are other people
    const left = ['plans', 'plan_sets', 'reminders', 'daily_runs', 'weather_fetches', 'climate_records', 'memberships'];
    await ownYard('Sorrel Bank');
    const answer = (await request(test.app).get('/api/me/export').set(account.headers).expect(200)).body as ExportResponse;
    const named = Object.keys(answer.ownedYards[0]!.tables);
    expect(tables.map((table) => table.table_name).filter((name) => !named.includes(name)).sort()).toEqual([...left].sort());
  });

  it('goes with the account: yards of one\'s own are deleted, what was done elsewhere loses the name', async () => {
    const own = await ownYard('Sorrel Bank');
    await measured(own, account.id);
    const other = await plannedYard(test, { name: 'Foreign Row' });
    await join(other.yardId, 'helper');
    await measured(other, account.id);
    expect((await remove().expect(200)).body).toEqual({ done: true });
    expect(await User.findByPk(account.id)).toBeNull();
    expect(await Yard.findByPk(own.yardId)).toBeNull();
    expect(await Zone.count({ where: { yardId: own.yardId } })).toBe(0);
    expect(await Yard.findByPk(other.yardId)).not.toBeNull();
    expect(await BucketTest.findAll({ where: { yardId: other.yardId } })).toMatchObject([{ testedBy: null }]);
    expect(await CatchTest.count({ where: { yardId: own.yardId } })).toBe(0);
    const traces = await test.context.database.query<{ n: number }>(
      'SELECT count(*)::int AS n FROM events WHERE user_id = $1 OR subject_id = $1 OR data::text LIKE $2', { bind: [account.id, `%${account.email}%`], type: QueryTypes.SELECT },
    );
    expect(traces).toEqual([{ n: 0 }]);
    await request(test.app).get('/api/me').set(account.headers).expect(401);
    await request(test.app).post('/api/auth/sign-in').send({ email: account.email, password: goodPassword }).expect(401);
    const last = (await mailsTo(test, account.email, 2))[1];
    expect(last?.subject).toBe('Your account was deleted');
    expect(last?.text).toContain('Sorrel Bank');
    // the address is free again
    await request(test.app).post('/api/auth/sign-up').send({ name: 'Maren Oakley', email: account.email, password: goodPassword }).expect(202);
    expect(await User.count({ where: { email: account.email } })).toBe(1);
  });

  it('is not deleted with a wrong password', async () => {
    expect((await remove('wrong password').expect(400)).body).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: 'password' }] } });
    await request(test.app).get('/api/me').set(account.headers).expect(200);
  });

  it('is not deleted while others belong to a yard that would have no owner', async () => {
    const own = await ownYard('Sorrel Bank');
    const helper = await own.member('helper');
    const refused = await remove();
    expect([refused.status, refused.body.error.code]).toEqual([409, 'last_owner']);
    expect(refused.body.error.message).toContain('Sorrel Bank');
    expect(await Yard.findByPk(own.yardId)).not.toBeNull();
    await request(test.app).patch(`/api/yards/${own.yardId}/members/${helper.user.id}`).set(account.headers).send({ role: 'owner' }).expect(200);
    await remove().expect(200);
    expect(await Membership.findAll({ where: { yardId: own.yardId } })).toMatchObject([{ userId: helper.user.id, role: 'owner' }]);
  });

  it('never leaves a yard without an owner when both of them delete their accounts at the same moment', async () => {
    const yard = await ownYard('Sorrel Bank');
    const second = await signedUp(test);
    await Membership.create({ id: randomUUID(), yardId: yard.yardId, userId: second.id, role: 'owner' });
    await yard.member('helper');
    const answers = await Promise.all([remove(), remove(goodPassword, second)]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    expect(await Membership.count({ where: { yardId: yard.yardId, role: 'owner' } })).toBe(1);
  });
});
