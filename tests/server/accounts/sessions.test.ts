import request, { type Response } from 'supertest';
import { QueryTypes } from 'sequelize';
import { Session } from '@/server/models';
import type { SessionListResponse, SignedInResponse } from '@/shared/contracts/accounts';
import { cookieOf, goodPassword, newAccount, signedInAgain, signedUp, type SignedInAccount } from '../../factories/accounts';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

const ownPage = { 'x-requested-with': 'dapple' };

describe('sessions', () => {
  let test: TestContext;
  let account: SignedInAccount;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(async () => {
    test.clock.set(testNow);
    account = await signedUp(test);
  });

  const signIn = (body: object) => request(test.app).post('/api/auth/sign-in').send(body);
  const refresh = (cookie: string, headers: Record<string, string> = ownPage) => request(test.app).post('/api/auth/refresh').set('cookie', cookie).set(headers);
  const me = (headers: { authorization: string }) => request(test.app).get('/api/me').set(headers);
  const bearer = (answer: Response) => ({ authorization: `Bearer ${(answer.body as SignedInResponse).accessToken}` });

  it('begin with the right password, whatever the case of the address', async () => {
    const answer = await signIn({ email: `  ${account.email.toUpperCase()} `, password: goodPassword }).expect(200);
    expect((await me(bearer(answer)).expect(200)).body).toMatchObject({ id: account.id, email: account.email, emailConfirmed: true });
  });

  it('do not begin with a wrong password, and an unknown address answers the same', async () => {
    const wrong = await signIn({ email: account.email, password: 'not the password' });
    const unknown = await signIn({ email: 'nobody-here@example.org', password: 'not the password' });
    expect(wrong.status).toBe(401);
    expect(wrong.body.error).toMatchObject({ code: 'sign_in_failed' });
    const { requestId: _one, ...told } = wrong.body.error as { requestId: string };
    const { requestId: _two, ...toldUnknown } = unknown.body.error as { requestId: string };
    expect(toldUnknown).toEqual(told);
    expect(cookieOf(wrong)).toBe('');
  });

  it('tell of an unconfirmed address only after the right password', async () => {
    const waiting = newAccount();
    await request(test.app).post('/api/auth/sign-up').send(waiting).expect(202);
    expect((await signIn({ email: waiting.email, password: 'not the password' }).expect(401)).body).toMatchObject({ error: { code: 'sign_in_failed' } });
    expect((await signIn({ email: waiting.email, password: waiting.password }).expect(403)).body).toMatchObject({ error: { code: 'email_not_confirmed' } });
  });

  it('do not begin with a password that only starts with the right one beyond what bcrypt reads', async () => {
    const long = await signedUp(test, { password: 'p'.repeat(72) });
    await signIn({ email: long.email, password: `${'p'.repeat(72)}x` }).expect(401);
    await signIn({ email: long.email, password: 'p'.repeat(72) }).expect(200);
  });

  it('give an access token for ten minutes, and none that another secret signed', async () => {
    await me(account.headers).expect(200);
    test.clock.advance(11);
    expect((await me(account.headers).expect(401)).body).toMatchObject({ error: { code: 'sign_in_required' } });
    const [head, body] = account.headers.authorization.split('.');
    test.clock.set(testNow);
    await me({ authorization: `${head}.${body}.${'A'.repeat(43)}` }).expect(401);
    const none = Buffer.from(JSON.stringify({ alg: 'none', typ: 'JWT' })).toString('base64url');
    await me({ authorization: `Bearer ${none}.${body}.` }).expect(401);
  });

  it('renew with a new refresh token each time', async () => {
    test.clock.advance(9);
    const first = await refresh(account.cookie).expect(200);
    expect(cookieOf(first)).not.toBe(account.cookie);
    await me(bearer(first)).expect(200);
    test.clock.advance(9);
    const second = await refresh(cookieOf(first)).expect(200);
    expect(cookieOf(second)).not.toBe(cookieOf(first));
  });

  it('end for both hands when a replaced refresh token is used again, however old it is', async () => {
    const first = await refresh(account.cookie).expect(200);
    test.clock.advance(1);
    const second = await refresh(cookieOf(first)).expect(200);
    test.clock.advance(1);
    const stolen = await refresh(account.cookie);
    expect([stolen.status, stolen.body.error.code]).toEqual([401, 'session_ended']);
    expect(String(stolen.headers['set-cookie'])).toMatch(/^dapple_refresh=;.*Expires=Thu, 01 Jan 1970/);
    await refresh(cookieOf(second)).expect(401);
    await me(bearer(second)).expect(401);
    expect(await Session.findOne({ where: { userId: account.id } })).toMatchObject({ endedBecause: 'token_reused' });
  });

  it('survive two tabs that renew at once, and an answer that was lost: both get the same new token', async () => {
    const [one, other] = await Promise.all([refresh(account.cookie), refresh(account.cookie)]);
    expect([one.status, other.status]).toEqual([200, 200]);
    expect(cookieOf(one)).toBe(cookieOf(other));
    test.clock.advance(1);
    expect(cookieOf(await refresh(account.cookie).expect(200))).toBe(cookieOf(one));
    await refresh(cookieOf(one)).expect(200);
  });

  it('do not survive the same a minute later', async () => {
    await refresh(account.cookie).expect(200);
    test.clock.advance(61 / 60);
    expect((await refresh(account.cookie).expect(401)).body).toMatchObject({ error: { code: 'session_ended' } });
  });

  it('cannot be renewed or ended by another site, nor without a cookie', async () => {
    expect((await refresh(account.cookie, {}).expect(403)).body).toMatchObject({ error: { code: 'forbidden' } });
    await request(test.app).post('/api/auth/sign-out').set('cookie', account.cookie).expect(403);
    expect((await request(test.app).post('/api/auth/refresh').set(ownPage).expect(401)).body).toMatchObject({ error: { code: 'sign_in_required' } });
    await refresh('dapple_refresh=j%3A%7B%22a%22%3A1%7D').expect(401);
    await refresh(account.cookie).expect(200);
  });

  it('end after thirty days without use, and after a hundred and eighty in any case', async () => {
    const idle = await signedInAgain(test, account);
    let cookie = account.cookie;
    for (let month = 0; month < 8; month += 1) {
      test.clock.advance(25 * 24 * 60);
      const answer = await refresh(cookie);
      const isOver = (month + 1) * 25 > 180;
      expect(answer.status).toBe(isOver ? 401 : 200);
      if (isOver) {
        break;
      }
      cookie = cookieOf(answer);
    }
    test.clock.set(testNow);
    test.clock.advance(30 * 24 * 60);
    await refresh(idle.cookie).expect(401);
  });

  it('end with signing out: neither token works any more', async () => {
    const answer = await request(test.app).post('/api/auth/sign-out').set('cookie', account.cookie).set(ownPage).expect(200);
    expect(String(answer.headers['set-cookie'])).toMatch(/^dapple_refresh=;/);
    await me(account.headers).expect(401);
    await refresh(account.cookie).expect(401);
    await request(test.app).post('/api/auth/sign-out').set(ownPage).expect(200);
  });

  it('are listed with their devices, and end one by one or all but this one', async () => {
    const phone = await signedInAgain(test, account, 'Mozilla/5.0 (iPhone; CPU iPhone OS 17_5 like Mac OS X) AppleWebKit/605.1.15 (KHTML, like Gecko) Version/17.5 Mobile/15E148 Safari/604.1');
    const desk = await signedInAgain(test, account, 'Mozilla/5.0 (X11; Linux x86_64; rv:127.0) Gecko/20100101 Firefox/127.0');
    const list = async () => ((await request(test.app).get('/api/me/sessions').set(desk.headers).expect(200)).body as SessionListResponse).sessions;
    const sessions = await list();
    expect(sessions.map((session) => session.device).sort()).toEqual(['Firefox on Linux', 'Safari on iPhone', 'Unknown device']);
    expect(sessions.filter((session) => session.isThisOne).map((session) => session.device)).toEqual(['Firefox on Linux']);
    const phoneSession = sessions.find((session) => session.device === 'Safari on iPhone')!;
    await request(test.app).delete(`/api/me/sessions/${phoneSession.id}`).set(desk.headers).expect(200);
    await me(phone.headers).expect(401);
    await me(account.headers).expect(200);
    await request(test.app).delete('/api/me/sessions').set(desk.headers).expect(200);
    await me(account.headers).expect(401);
    expect((await list()).map((session) => session.device)).toEqual(['Firefox on Linux']);
  });

  it('of another person cannot be ended', async () => {
    const other = await signedUp(test);
    const theirs = await Session.findOne({ where: { userId: other.id }, rejectOnEmpty: true });
    await request(test.app).delete(`/api/me/sessions/${theirs.id}`).set(account.headers).expect(404);
    await me(other.headers).expect(200);
  });

  describe('and guessing', () => {
    it('slows down after ten failures, also for an address without an account, and a pause lets the right password in', async () => {
      for (const email of [account.email, 'no-such-account@example.org']) {
        for (let attempt = 0; attempt < 10; attempt += 1) {
          await signIn({ email, password: 'wrong password' }).expect(401);
        }
        expect((await signIn({ email, password: goodPassword }).expect(429)).body).toMatchObject({ error: { code: 'too_many_requests' } });
      }
      test.clock.advance(61 / 60);
      await signIn({ email: account.email, password: 'wrong password' }).expect(401);
      test.clock.advance(61 / 60);
      await signIn({ email: account.email, password: goodPassword }).expect(429);
      test.clock.advance(1);
      await signIn({ email: account.email, password: goodPassword }).expect(200);
      // the right password forgets the failures
      await signIn({ email: account.email, password: 'wrong password' }).expect(401);
      await signIn({ email: account.email, password: goodPassword }).expect(200);
    });

    it('counts every one of many attempts at the same moment', async () => {
      const answers = await Promise.all(Array.from({ length: 24 }, () => signIn({ email: account.email, password: 'wrong password' })));
      expect(answers.filter((answer) => answer.status === 401)).toHaveLength(10);
      expect(answers.filter((answer) => answer.status === 429)).toHaveLength(14);
    });

    it('never waits longer than a quarter of an hour', async () => {
      for (let attempt = 0; attempt < 30; attempt += 1) {
        await signIn({ email: account.email, password: 'wrong password' });
        test.clock.advance(15);
      }
      await signIn({ email: account.email, password: goodPassword }).expect(200);
    });

    it('keeps no address, only its hash, and forgets it after an hour', async () => {
      await signIn({ email: 'kept-nowhere@example.org', password: 'wrong password' }).expect(401);
      const rows = () => test.context.database.query<{ address_hash: string }>('SELECT * FROM sign_in_failures', { type: QueryTypes.SELECT });
      const before = await rows();
      expect(before.length).toBeGreaterThan(0);
      expect(JSON.stringify(before)).not.toContain('kept-nowhere');
      test.clock.advance(61);
      await signIn({ email: account.email, password: goodPassword }).expect(200);
      expect(await rows()).toEqual([]);
    });

    it('is limited by network address as well', async () => {
      const strict = await testContext({ env: { AUTH_RATE_LIMIT: '3' } });
      try {
        for (let attempt = 0; attempt < 3; attempt += 1) {
          await request(strict.app).post('/api/auth/forgot').send({ email: 'somebody@example.org' }).expect(202);
        }
        const answer = await request(strict.app).post('/api/auth/sign-in').send({ email: 'somebody@example.org', password: 'x' });
        expect([answer.status, answer.body.error.code]).toEqual([429, 'too_many_requests']);
        await request(strict.app).post('/api/auth/refresh').set(ownPage).expect(401);
      } finally {
        await strict.close();
      }
    });
  });
});
