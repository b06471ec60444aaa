import { testContext, type TestContext } from '../../setup/testContext';

describe('mail on loopback', () => {
  let test: TestContext;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());

  it('arrives whole, with the Message-ID its sender chose and the time of the clock', async () => {
    await test.context.mailer.send({ to: 'wren@example.org', subject: 'Grüße & <b>', text: 'Two sets.\nDone by 7:25.', html: '<p>Two sets.</p>', messageId: '<one@dapple.example>' });
    const [mail] = await test.mails();
    expect(mail).toMatchObject({ to: 'wren@example.org', subject: 'Grüße & <b>', messageId: '<one@dapple.example>', receivedAt: test.clock.now() });
    expect(mail?.text.trim()).toBe('Two sets.\nDone by 7:25.');
    expect(mail?.html).toContain('<p>Two sets.</p>');
  });

  it('is acknowledged only when it is kept: a mail that cannot be kept is refused', async () => {
    await test.context.database.query('ALTER TABLE archived_mails RENAME TO archived_mails_away');
    await expect(test.context.mailer.send({ to: 'wren@example.org', subject: 'x', text: 'x', html: 'x', messageId: '<two@dapple.example>' })).rejects.toThrow(/could not be kept/);
    await test.context.database.query('ALTER TABLE archived_mails_away RENAME TO archived_mails');
    expect(await test.mails()).toHaveLength(1);
  });

  it('is listed newest first', async () => {
    await test.context.mailer.send({ to: 'wren@example.org', subject: 'later', text: 'x', html: 'x', messageId: '<three@dapple.example>' });
    expect((await test.mails()).map((mail) => mail.subject)).toEqual(['later', 'Grüße & <b>']);
  });
});
