import { setTimeout as pause } from 'node:timers/promises';
import request from 'supertest';
import { EmailToken, Session, User } from '@/server/models';
import { signedUp, newAccount, goodPassword, cookieOf } from '../../factories/accounts';
import { mailsTo, tokenIn } from '../../factories/mailbox';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

describe('signing up', () => {
  let test: TestContext;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(() => test.clock.set(testNow));

  const post = (path: string, body: object) => request(test.app).post(`/api/auth/${path}`).send(body);

  it('sends a link whose token confirms the address and signs in; passwords and tokens are kept as hashes only', async () => {
    const account = newAccount({ name: 'Maren <b>Oakley</b>' });
    const answer = await post('sign-up', account);
    expect([answer.status, answer.body]).toEqual([202, { done: true }]);
    const [mail] = await mailsTo(test, account.email);
    expect(mail?.text).toContain('https://dapple.example/confirm?token=');
    expect(mail?.html).toContain('Maren &lt;b&gt;Oakley&lt;/b&gt;');
    expect(mail?.html).not.toContain('<b>Oakley');
    const token = tokenIn(mail);
    expect(Buffer.from(token, 'base64url')).toHaveLength(32);

    const confirmed = await post('confirm', { token });
    expect(confirmed.status).toBe(200);
    expect(confirmed.body).toMatchObject({ me: { name: account.name, email: account.email, emailConfirmed: true } });
    const cookie = String(confirmed.headers['set-cookie']);
    expect(cookie).toMatch(/^dapple_refresh=[^;]+; Max-Age=2592000; Path=\/api\/auth; .*HttpOnly; Secure; SameSite=Strict$/);
    expect(JSON.stringify(confirmed.body)).not.toContain(cookieOf(confirmed).split('=')[1]);

    const user = await User.findByPk(confirmed.body.me.id as string, { rejectOnEmpty: true });
    expect(user.passwordHash).toMatch(/^\$2[aby]\$04\$.{53}$/);
    const stored = JSON.stringify([await EmailToken.findAll({ where: { userId: user.id } }), await Session.findAll({ where: { userId: user.id } })]);
    expect(stored).not.toContain(token);
    expect(stored).not.toContain(cookieOf(confirmed).split('.')[1]);
  });

  it('tells a taken address to its mailbox only, and changes nothing', async () => {
    const holder = await signedUp(test, { name: 'First Holder' });
    const answer = await post('sign-up', { name: 'Somebody Else', email: holder.email.toUpperCase(), password: 'another long password' });
    const fresh = await post('sign-up', newAccount());
    expect([answer.status, answer.body]).toEqual([fresh.status, fresh.body]);
    expect(Object.keys(answer.headers).sort()).toEqual(Object.keys(fresh.headers).sort());
    const mails = await mailsTo(test, holder.email, 2);
    expect(mails[1]?.subject).toBe('You have an account already');
    expect(mails[1]?.text).not.toContain('token=');
    expect(mails[1]?.text).not.toContain('Somebody Else');
    await post('sign-in', { email: holder.email, password: 'another long password' }).expect(401);
    expect((await post('sign-in', { email: holder.email, password: goodPassword }).expect(200)).body).toMatchObject({ me: { name: 'First Holder' } });
  });

  it('lets whoever reads the mailbox decide about an address that was never confirmed', async () => {
    const first = newAccount({ name: 'Stranger', password: 'a stranger chose this' });
    await post('sign-up', first).expect(202);
    const second = { ...first, name: 'Reader of the mailbox', password: 'the reader chose this' };
    await post('sign-up', second).expect(202);
    const [old, current] = await mailsTo(test, first.email, 2);
    expect((await post('confirm', { token: tokenIn(old) }).expect(410)).body).toMatchObject({ error: { code: 'token_expired' } });
    expect((await post('confirm', { token: tokenIn(current) }).expect(200)).body).toMatchObject({ me: { name: 'Reader of the mailbox' } });
    await post('sign-in', { email: first.email, password: first.password }).expect(401);
    await post('sign-in', { email: first.email, password: second.password }).expect(200);
  });

  it('makes one account of two sign-ups at the same moment', async () => {
    const account = newAccount();
    const answers = await Promise.all([post('sign-up', account), post('sign-up', account), post('sign-up', account)]);
    expect(answers.map((answer) => answer.status)).toEqual([202, 202, 202]);
    expect(await User.count({ where: { email: account.email } })).toBe(1);
    const mails = await mailsTo(test, account.email, 3);
    const confirmed = await Promise.all(mails.map((mail) => post('confirm', { token: tokenIn(mail) })));
    expect(confirmed.map((answer) => answer.status).sort()).toEqual([200, 410, 410]);
  });

  it('takes a confirmation link once, within 48 hours, and no other', async () => {
    const account = newAccount();
    await post('sign-up', account);
    const token = tokenIn((await mailsTo(test, account.email))[0]);
    expect((await post('confirm', { token: 'x'.repeat(43) }).expect(400)).body).toMatchObject({ error: { code: 'token_invalid' } });
    test.clock.advance(48 * 60 - 1);
    const twice = await Promise.all([post('confirm', { token }), post('confirm', { token })]);
    expect(twice.map((answer) => answer.status).sort()).toEqual([200, 410]);
    expect((await post('confirm', { token }).expect(410)).body).toMatchObject({ error: { code: 'token_used' } });
  });

  it('refuses an old link, and sends a new one for the asking', async () => {
    const account = newAccount();
    await post('sign-up', account);
    test.clock.advance(48 * 60);
    const token = tokenIn((await mailsTo(test, account.email))[0]);
    expect((await post('confirm', { token }).expect(410)).body).toMatchObject({ error: { code: 'token_expired' } });
    await post('resend-confirmation', { email: account.email }).expect(202);
    await post('confirm', { token: tokenIn((await mailsTo(test, account.email, 2))[1]) }).expect(200);
  });

  it('answers the same when there is nothing to confirm, and sends nothing', async () => {
    const holder = await signedUp(test);
    const unknown = 'nobody-has-this@example.org';
    for (const email of [holder.email, unknown]) {
      expect((await post('resend-confirmation', { email }).expect(202)).body).toEqual({ done: true });
    }
    // a mail that does arrive shows that the ones before it would have
    await post('forgot', { email: holder.email }).expect(202);
    expect((await mailsTo(test, holder.email, 2)).map((mail) => mail.subject)).toEqual(['Confirm your e-mail address', 'Set a new password']);
    expect((await test.mails()).filter((mail) => mail.to.includes(unknown))).toEqual([]);
  });

  it('does not flood a mailbox: five links an hour', async () => {
    const account = newAccount();
    await post('sign-up', account);
    for (let again = 0; again < 7; again += 1) {
      await post('resend-confirmation', { email: account.email }).expect(202);
    }
    const mails = await mailsTo(test, account.email, 5);
    test.clock.advance(61);
    await post('resend-confirmation', { email: account.email }).expect(202);
    expect(await mailsTo(test, account.email, 6)).toHaveLength(6);
    // the last of the five still worked until the new one came
    expect((await post('confirm', { token: tokenIn(mails[4]) }).expect(410)).body).toMatchObject({ error: { code: 'token_expired' } });
  });

  it('keeps the account when the mail server takes nothing, and the answer does not say so', async () => {
    const account = newAccount();
    const send = test.context.mailer.send.bind(test.context.mailer);
    const refused: string[] = [];
    test.context.mailer.send = (mail) => {
      refused.push(mail.to);
      return Promise.reject(new Error('connection refused'));
    };
    const answer = await post('sign-up', account);
    // The mail follows the answer by a moment.
    for (let waited = 0; refused.length === 0 && waited < 3_000; waited += 20) {
      await pause(20);
    }
    test.context.mailer.send = send;
    expect([answer.status, answer.body]).toEqual([202, { done: true }]);
    expect(refused).toEqual([account.email]);
    await post('resend-confirmation', { email: account.email }).expect(202);
    await post('confirm', { token: tokenIn((await mailsTo(test, account.email))[0]) }).expect(200);
  });

  it.each([
    ['a short password', { password: 'eleven char' }, 'password'],
    ['more than bcrypt reads', { password: 'ä'.repeat(37) }, 'password'],
    ['an address that is none', { email: 'maren@' }, 'email'],
    ['an empty name', { name: '   ' }, 'name'],
    ['a name with control characters', { name: 'Ma\u0000ren' }, 'name'],
  ])('refuses %s and names the field', async (_what, wrong, field) => {
    const users = await User.count();
    const answer = await post('sign-up', { ...newAccount(), ...wrong });
    expect(answer.status).toBe(400);
    expect(answer.body).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: field }] } });
    expect(await User.count()).toBe(users);
  });
});
