import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { startRound } from '@/server/commands/rounds/startRound';
import { DailyRun, Plan } from '@/server/models';
import type { JumpClockResponse } from '@/shared/contracts/demonstration';
import type { MailListResponse, MailResponse } from '@/shared/contracts/messages';
import { plannedYard } from '../../factories/plannedYard';
import { wateredYard } from '../../factories/wateredYard';
import { dryWeather } from '../../setup/switchableWeather';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

describe('jumping the demonstration clock', () => {
  let test: TestContext;
  const weather = dryWeather();
  beforeAll(async () => { test = await testContext({ demonstration: true, weather }); });
  afterAll(async () => {
    await test.close();
    await weather.close();
  });
  beforeEach(async () => {
    await test.context.database.query('DELETE FROM yards');
    await test.context.database.query('DELETE FROM archived_mails');
    test.clock.set(testNow);
  });
  const jump = async (to: 'hour' | 'day' | 'next_event'): Promise<JumpClockResponse> => {
    const answer = await request(test.app).post('/api/demo/clock/jump').send({ to });
    expect(answer.status).toBe(200);
    return answer.body as JumpClockResponse;
  };

  it('lands an hour later when nothing is due', async () => {
    expect(await jump('hour')).toEqual({ now: '2026-06-13T10:40:00.000Z', isDemonstration: true, timeZone: 'America/New_York', happened: [] });
    expect((await request(test.app).get('/api/clock')).body).toMatchObject({ now: '2026-06-13T10:40:00.000Z', isDemonstration: true });
  });

  it('stops at each event on the way of a day, in order of time, and does what the servers would have done', async () => {
    test.clock.set('2026-06-13T05:00:00.000Z');
    const yard = await wateredYard(test, { zones: [{ soil: 'sand', createdAt: '2026-05-20T12:00:00Z' }] });
    const answer = await jump('day');
    expect(answer.now).toBe('2026-06-14T05:00:00.000Z');
    const what = answer.happened.map((happening) => happening.what);
    expect(what[0]).toBe('Fern Hollow: the day was planned.');
    expect(answer.happened[0]?.at).toBe('2026-06-13T07:00:00.000Z');
    expect(what.some((line) => line.startsWith('E-mail to Robin Ashgrove: Fern Hollow: '))).toBe(true);
    expect(what).toContain('Fern Hollow: a round is to start.');
    expect(answer.happened.map((happening) => happening.at)).toEqual([...answer.happened.map((happening) => happening.at)].sort());
    expect(await DailyRun.findAll({ where: { yardId: yard.id } })).toMatchObject([{ on: '2026-06-13', status: 'done' }]);
    expect(await Plan.count({ where: { yardId: yard.id } })).toBe(1);
    const [mail] = await test.mails();
    // received at the reminder's own time, not at the end of the jump
    expect(mail?.receivedAt.toISOString()).toBe(answer.happened.find((happening) => happening.what.startsWith('E-mail'))?.at);
  });

  it('goes from event to event: the end of a set, its mail, the alarm, the next day’s plan', async () => {
    const yard = await plannedYard(test);
    await yard.plan('2026-06-13', [{ position: 0, startMinutes: 360, minutes: 45 }]);
    await DailyRun.create({ yardId: yard.yardId, on: '2026-06-13', status: 'done', claimedBy: 'x', leaseUntil: test.clock.now(), attempts: 1 });
    expect(await jump('next_event')).toMatchObject({ now: '2026-06-13T10:00:00.000Z', happened: [{ what: 'Hazel Row: a round is to start.', yardId: yard.yardId }] });
    await test.context.database.transaction(() => startRound({ app: test.context, yardId: yard.yardId, userId: yard.owner.user.id, now: test.clock.now() }, { id: randomUUID(), on: '2026-06-13', roundIndex: 0 }));
    const ended = await jump('next_event');
    expect(ended.now).toBe('2026-06-13T10:45:00.000Z');
    expect(ended.happened.map((happening) => happening.what)).toEqual(['Hazel Row: the time of Spot 1 is over.', 'E-mail to Ada Larkin: Hazel Row: turn the water off']);
    const alarm = await jump('next_event');
    expect(alarm).toMatchObject({ now: '2026-06-13T11:00:00.000Z', happened: [{ what: 'E-mail to Ada Larkin: Hazel Row: is the water still on?' }] });
    expect((await jump('next_event')).now).toBe('2026-06-14T07:00:00.000Z');
  });

  it('lets one of two jumps through', async () => {
    await wateredYard(test);
    const answers = await Promise.all(Array.from({ length: 2 }, () => request(test.app).post('/api/demo/clock/jump').send({ to: 'day' })));
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    expect(test.clock.now().toISOString()).toBe('2026-06-14T09:40:00.000Z');
  });

  it.each([[{}], [{ to: 'year' }], [{ to: 3 }]])('refuses %j', async (body) => {
    expect((await request(test.app).post('/api/demo/clock/jump').send(body)).status).toBe(400);
    expect(test.clock.now().toISOString()).toBe(testNow);
  });

  it('shows the mail that the local server received', async () => {
    await test.context.mailer.send({ to: 'wren@example.org', subject: 'One', text: 'first', html: '<p>first</p>', messageId: '<a@dapple.example>' });
    const { mails } = (await request(test.app).get('/api/demo/mails')).body as MailListResponse;
    expect(mails).toMatchObject([{ to: 'wren@example.org', subject: 'One' }]);
    const mail = (await request(test.app).get(`/api/demo/mails/${mails[0]!.id}`)).body as MailResponse;
    expect(mail).toMatchObject({ messageId: '<a@dapple.example>', html: '<p>first</p>' });
    expect((await request(test.app).get(`/api/demo/mails/${randomUUID()}`)).status).toBe(404);
    expect((await request(test.app).get('/api/demo/mails/none')).status).toBe(400);
  });
});

describe('outside the demonstration', () => {
  let test: TestContext;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());

  it('nobody moves the time or reads mail', async () => {
    expect((await request(test.app).post('/api/demo/clock/jump').send({ to: 'day' })).status).toBe(404);
    expect((await request(test.app).get('/api/demo/mails')).status).toBe(404);
    expect((await request(test.app).get('/api/clock')).body).toEqual({ now: testNow, isDemonstration: false, timeZone: 'UTC' });
  });
});
