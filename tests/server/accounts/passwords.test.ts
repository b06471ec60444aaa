import request from 'supertest';
import { User } from '@/server/models';
import { cookieOf, goodPassword, newAccount, signedInAgain, signedUp, type SignedInAccount } from '../../factories/accounts';
import { mailsTo, tokenIn } from '../../factories/mailbox';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

const nextPassword = 'another good password';

describe('passwords', () => {
  let test: TestContext;
  let account: SignedInAccount;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(async () => {
    test.clock.set(testNow);
    account = await signedUp(test);
  });

  const post = (path: string, body: object) => request(test.app).post(`/api${path}`).send(body);
  const signInWith = (password: string) => post('/auth/sign-in', { email: account.email, password });
  const resetToken = async (count: number) => {
    await post('/auth/forgot', { email: account.email }).expect(202);
    return tokenIn((await mailsTo(test, account.email, count))[count - 1]);
  };

  it('are set anew with the link from the mail, which ends every session and works once', async () => {
    const token = await resetToken(2);
    expect((await mailsTo(test, account.email, 2))[1]?.text).toContain('https://dapple.example/reset?token=');
    await post('/auth/reset', { token, password: nextPassword }).expect(200);
    await request(test.app).get('/api/me').set(account.headers).expect(401);
    await request(test.app).post('/api/auth/refresh').set('cookie', account.cookie).set('x-requested-with', 'dapple').expect(401);
    await signInWith(goodPassword).expect(401);
    await signInWith(nextPassword).expect(200);
    expect((await post('/auth/reset', { token, password: 'third good password' }).expect(410)).body).toMatchObject({ error: { code: 'token_used' } });
    expect((await mailsTo(test, account.email, 3))[2]?.subject).toBe('Your password was changed');
  });

  it('are not set with a link that is an hour old, replaced, unknown, or meant for something else', async () => {
    const first = await resetToken(2);
    const second = await resetToken(3);
    expect((await post('/auth/reset', { token: first, password: nextPassword }).expect(410)).body).toMatchObject({ error: { code: 'token_expired' } });
    test.clock.advance(60);
    expect((await post('/auth/reset', { token: second, password: nextPassword }).expect(410)).body).toMatchObject({ error: { code: 'token_expired' } });
    expect((await post('/auth/reset', { token: 'y'.repeat(43), password: nextPassword }).expect(400)).body).toMatchObject({ error: { code: 'token_invalid' } });
    const waiting = newAccount();
    await post('/auth/sign-up', waiting);
    const confirmation = tokenIn((await mailsTo(test, waiting.email))[0]);
    expect((await post('/auth/reset', { token: confirmation, password: nextPassword }).expect(400)).body).toMatchObject({ error: { code: 'token_invalid' } });
    await signInWith(goodPassword).expect(200);
  });

  it('are set by one of two uses of a link at the same moment', async () => {
    const token = await resetToken(2);
    const answers = await Promise.all([post('/auth/reset', { token, password: nextPassword }), post('/auth/reset', { token, password: 'third good password' })]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 410]);
  });

  it('set with the link from the mail also confirm the address', async () => {
    const waiting = newAccount();
    await post('/auth/sign-up', waiting).expect(202);
    await post('/auth/forgot', { email: waiting.email }).expect(202);
    await post('/auth/reset', { token: tokenIn((await mailsTo(test, waiting.email, 2))[1]), password: nextPassword }).expect(200);
    await post('/auth/sign-in', { email: waiting.email, password: nextPassword }).expect(200);
  });

  it('set anew lift the wait after many failures', async () => {
    for (let attempt = 0; attempt < 11; attempt += 1) {
      await signInWith('wrong password');
    }
    await signInWith(goodPassword).expect(429);
    await post('/auth/reset', { token: await resetToken(2), password: nextPassword }).expect(200);
    await signInWith(nextPassword).expect(200);
  });

  it('answer the same for an address without an account, which gets no mail', async () => {
    const unknown = await post('/auth/forgot', { email: 'unknown-to-us@example.org' });
    const known = await post('/auth/forgot', { email: account.email });
    expect([unknown.status, unknown.body]).toEqual([known.status, known.body]);
    await mailsTo(test, account.email, 2);
    expect((await test.mails()).filter((mail) => mail.to.includes('unknown-to-us'))).toEqual([]);
  });

  it('change with the present one; this session stays and the others end', async () => {
    const other = await signedInAgain(test, account);
    await post('/me/password', { currentPassword: goodPassword, password: nextPassword }).set(account.headers).expect(200);
    await request(test.app).get('/api/me').set(account.headers).expect(200);
    await request(test.app).get('/api/me').set(other.headers).expect(401);
    await signInWith(goodPassword).expect(401);
    await signInWith(nextPassword).expect(200);
    expect((await mailsTo(test, account.email, 2))[1]?.subject).toBe('Your password was changed');
  });

  it('do not change with a wrong present one, and guessing at it slows down too', async () => {
    const change = (currentPassword: string) => post('/me/password', { currentPassword, password: nextPassword }).set(account.headers);
    expect((await change('wrong password').expect(400)).body).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: 'currentPassword' }] } });
    for (let attempt = 0; attempt < 9; attempt += 1) {
      await change('wrong password').expect(400);
    }
    await change(goodPassword).expect(429);
    await signInWith(goodPassword).expect(429);
  });

  it('change once when two changes come at the same moment', async () => {
    const change = (password: string) => post('/me/password', { currentPassword: goodPassword, password }).set(account.headers);
    const answers = await Promise.all([change(nextPassword), change('third good password')]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 400]);
  });

  it('are checked for an unknown address at the same cost: the stand-in hash has the cost of real ones and fits nothing', async () => {
    const bcrypt = await import('bcryptjs');
    const { passwordMatches } = await import('@/server/commands/accounts/password');
    const user = await User.findByPk(account.id, { rejectOnEmpty: true });
    const standIn = `$2b$04$${'.'.repeat(53)}`;
    expect(bcrypt.getRounds(standIn)).toBe(bcrypt.getRounds(user.passwordHash));
    expect(await passwordMatches(goodPassword, null, 4)).toBe(false);
    expect(await passwordMatches(goodPassword, user.passwordHash, 4)).toBe(true);
  });

  it('are never in an answer', async () => {
    const answer = await signInWith(goodPassword).expect(200);
    expect(cookieOf(answer)).toMatch(/^dapple_refresh=/);
    expect(JSON.stringify([answer.body, (await request(test.app).get('/api/me/export').set(account.headers)).body])).not.toMatch(/\$2[aby]\$|passwordHash|password_hash|tokenHash|token_hash/);
  });
});
