import { QueryTypes } from 'sequelize';
import { mailsDue, MAIL_TRIES, queueMail, sendWaitingMail } from '@/server/commands/outbox';
import type { AppContext } from '@/server/context';
import { testContext, type TestContext } from '../../setup/testContext';

const mail = { subject: 'A link', text: 'Follow it.', html: '<p>Follow it.</p>' };

describe('the outbox', () => {
  let test: TestContext;
  beforeAll(async () => { test = await testContext({ demonstration: true }); });
  afterAll(() => test.close());

  const waiting = () => test.context.database.query<{ id: string; attempts: number }>('SELECT id, attempts FROM outgoing_mails ORDER BY created_at', { type: QueryTypes.SELECT });
  const laterOn = () => test.context.database.query(`UPDATE outgoing_mails SET lease_until = lease_until - interval '1 day'`);
  const subjects = async (to: string) => (await test.mails()).filter((one) => one.to === to).map((one) => one.subject);
  /** Writes a mail as a request does, in a transaction, and gives back what would follow the commit. */
  async function write(to: string, app: AppContext = test.context): Promise<() => Promise<void>> {
    const effects: (() => Promise<void>)[] = [];
    await app.database.transaction(() => queueMail({ app, now: test.clock.now(), afterCommit: (effect) => void effects.push(effect) }, to, mail));
    return async () => { for (const effect of effects) await effect(); };
  }

  it('sends a mail after the commit and keeps nothing of it', async () => {
    const send = await write('one@example.org');
    expect(await subjects('one@example.org')).toEqual([]);
    await send();
    expect(await subjects('one@example.org')).toEqual(['A link']);
    expect(await waiting()).toEqual([]);
  });

  it('sends nothing of what was rolled back', async () => {
    await expect(test.context.database.transaction(async () => {
      await queueMail({ app: test.context, now: test.clock.now(), afterCommit: () => undefined }, 'two@example.org', mail);
      throw new Error('not today');
    })).rejects.toThrow('not today');
    await laterOn();
    expect(await mailsDue(test.context)).toEqual([]);
  });

  it('leaves the mail of a killed server to any other, which sends it once', async () => {
    await write('three@example.org');
    expect(await mailsDue(test.context)).toEqual([]);
    await laterOn();
    const [due] = await mailsDue(test.context);
    const servers = [test.secondServer(), test.secondServer(), test.context];
    await Promise.all(servers.map((server) => sendWaitingMail(server, due!.mailId)));
    expect(await subjects('three@example.org')).toEqual(['A link']);
    expect(await waiting()).toEqual([]);
  });

  it('tries again with the same Message-ID when the mail server does not take it, and gives up in the end', async () => {
    const told: string[] = [];
    const failing: AppContext = { ...test.context, mailer: { send: (one) => { told.push(one.messageId); return Promise.reject(new Error('busy')); }, close: () => undefined } };
    const send = await write('four@example.org', failing);
    await send();
    expect(await mailsDue(test.context)).toEqual([]);
    for (let tries = 1; tries < MAIL_TRIES; tries += 1) {
      expect((await waiting()).map((one) => one.attempts)).toEqual([tries]);
      await laterOn();
      const [due] = await mailsDue(test.context);
      await sendWaitingMail(failing, due!.mailId);
    }
    expect(told).toHaveLength(MAIL_TRIES);
    expect(new Set(told).size).toBe(1);
    expect(await waiting()).toEqual([]);
  });
});
