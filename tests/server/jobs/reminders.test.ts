import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { planDayReminders } from '@/server/commands/reminders/planDayReminders';
import { changeRound } from '@/server/commands/rounds/changeRound';
import { skipPlannedRound } from '@/server/commands/rounds/skipPlannedRound';
import { startRound } from '@/server/commands/rounds/startRound';
import { remindersDue } from '@/server/jobs/dueWork';
import { claimReminder, REMINDER_TRIES, sendReminder } from '@/server/jobs/sendReminder';
import { Membership, Reminder, RoundSet, Yard } from '@/server/models';
import type { ReminderKind } from '@/shared/contracts/messages';
import { plannedYard, type PlannedYard } from '../../factories/plannedYard';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

const on = '2026-06-13';
/** Clock time of that June day in New York, which is four hours behind UTC. */
const newYork = (time: string) => new Date(`${on}T${time}:00-04:00`);

let test: TestContext;
let yard: PlannedYard;
beforeAll(async () => { test = await testContext(); });
afterAll(() => test.close());
beforeEach(async () => {
  await test.context.database.query('DELETE FROM archived_mails');
  await test.context.database.query('DELETE FROM yards');
  test.clock.set(newYork('03:00'));
  yard = await plannedYard(test, { positions: 2 });
});

const twoSets = () => yard.plan(on, [{ position: 0, startMinutes: 360, minutes: 45 }, { position: 1, startMinutes: 410, minutes: 30 }]);
const planReminders = async () => {
  const row = await Yard.findByPk(yard.yardId);
  await test.context.database.transaction(() => planDayReminders({ app: test.context, yardId: yard.yardId, now: test.clock.now() }, row!, on));
};
const rows = (kind: ReminderKind) => Reminder.findAll({ where: { yardId: yard.yardId, kind }, order: [['dueAt', 'ASC'], ['createdAt', 'ASC']] });
const sendDue = async () => {
  const outcomes: string[] = [];
  for (const { reminderId } of await remindersDue(test.context)) {
    outcomes.push((await sendReminder(test.context, reminderId)).outcome);
  }
  return outcomes;
};
const letLeasesRunOut = () => test.context.database.query(`UPDATE reminders SET lease_until = clock_timestamp() - interval '1 second' WHERE lease_until IS NOT NULL`, { type: QueryTypes.UPDATE });

describe('the morning reminder', () => {
  beforeEach(async () => {
    await twoSets();
    await planReminders();
  });

  it('waits for twenty minutes before the first set, for everybody who wants it', async () => {
    await yard.member('helper');
    await yard.member('consultant');
    await planReminders();
    const planned = await rows('morning');
    expect(planned.map((row) => [row.dueAt, row.dropAfter, row.status])).toEqual(Array.from({ length: 2 }, () => [newYork('05:40'), newYork('07:20'), 'waiting']));
    test.clock.set(newYork('05:39'));
    expect(await sendDue()).toEqual([]);
    test.clock.set(newYork('05:40'));
    expect(await sendDue()).toEqual(['sent', 'sent']);
    expect(await test.mails()).toHaveLength(2);
  });

  it('says in the yard’s time and units what to do, why, and where to go', async () => {
    test.clock.set(newYork('05:40'));
    await sendDue();
    const [mail] = await test.mails();
    expect(mail).toMatchObject({ to: yard.owner.user.email, subject: 'Hazel Row: two sets from 6:00 am' });
    // 12 mm/h for 45 min at a multiplier of 1.2 are 7.5 mm, or 0.30 in; 30 min are 5 mm, or 0.20 in
    expect(mail?.text).toContain('Two sets, one move. Done by 7:20 am.');
    expect(mail?.text).toContain('6:00 am  Spot 1 (by the <maple> & gate)\n  45 min, 0.30 in for Front lawn\n  0.56 in short, past its refill line of 0.50 in.');
    expect(mail?.text).toContain('6:50 am  Spot 2\n  30 min, 0.20 in for Front lawn');
    expect(mail?.text).toContain(`https://dapple.example/yards/${yard.yardId}/today`);
    expect(mail?.html).toContain('by the &lt;maple&gt; &amp; gate');
    expect(mail?.html).not.toContain('<maple>');
  });

  it('tells sets and doses apart', async () => {
    await yard.plan(on, [{ position: 0, startMinutes: 360, minutes: 45 }, { position: 1, startMinutes: 600, minutes: 5, roundIndex: 1, kind: 'dose' }, { position: 1, startMinutes: 840, minutes: 5, roundIndex: 2, kind: 'dose' }]);
    test.clock.set(newYork('05:40'));
    await sendDue();
    const [mail] = await test.mails();
    expect(mail?.subject).toBe('Hazel Row: one set and two doses from 6:00 am');
    expect(mail?.text).toContain('One set, two doses. Done by 2:05 pm.');
  });

  it('tells a person in metric units where the yard is metric', async () => {
    await Yard.update({ units: 'metric' }, { where: { id: yard.yardId } });
    test.clock.set(newYork('05:40'));
    await sendDue();
    expect((await test.mails())[0]?.text).toContain('6:00  Spot 1 (by the <maple> & gate)\n  45 min, 7.5 mm for Front lawn');
  });

  it('tells what is not watered and why, what the weather is, and warns of the dark', async () => {
    await yard.plan(on, [{ position: 0, startMinutes: 300, minutes: 45 }]);
    const { database } = test.context;
    await database.query(
      `UPDATE plans SET result = jsonb_set(result, '{days,0,zonesWithout}', $2::jsonb) WHERE yard_id = $1`,
      { bind: [yard.yardId, JSON.stringify([{ zoneId: yard.zoneId, reasons: [{ code: 'resting', values: { depletionMm: 25.4 } }] }])] },
    );
    await database.query(
      `INSERT INTO weather_days (yard_id, "on", is_forecast, tmin_c, tmax_c, precipitation_mm, source, fetched_at) VALUES ($1, $2, true, 15, 25, 0, 'records', now())`, { bind: [yard.yardId, on] },
    );
    await database.query(`INSERT INTO weather_fetches (yard_id, asked_at, answered_at, source, sample) VALUES ($1, now(), now(), 'records', true)`, { bind: [yard.yardId] });
    await planReminders();
    test.clock.set(newYork('04:40'));
    expect(await sendDue()).toEqual(['sent']);
    const [mail] = await test.mails();
    expect(mail?.text).toContain('Today 59 °F to 77 °F, no rain expected (sample weather).');
    expect(mail?.text).toContain('Not watered today\n  Front lawn: Resting by choice, 1.00 in short: nothing is planned.');
    // sunrise in New York on 13 June: 5:24 am (timeanddate.com, from memory)
    expect(mail?.text).toMatch(/It is dark until 5:2\d am: lay the hose where nobody trips over it\./);
  });

  it('is marked late when it could not go at its time', async () => {
    test.clock.set(newYork('05:52'));
    expect(await sendDue()).toEqual(['sent']);
    const [mail] = await test.mails();
    expect(mail?.subject).toBe('Late: Hazel Row: two sets from 6:00 am');
    expect(mail?.text).toContain('This reminder is 12 min late');
    expect((await rows('morning'))[0]).toMatchObject({ status: 'sent', lateMinutes: 12 });
  });

  it('is not called late for five minutes', async () => {
    test.clock.set(newYork('05:45'));
    await sendDue();
    expect((await test.mails())[0]?.subject).toBe('Hazel Row: two sets from 6:00 am');
  });

  it('stays late when the day is planned again before it goes', async () => {
    test.clock.set(newYork('05:52'));
    await planReminders();
    await sendDue();
    expect((await rows('morning'))[0]).toMatchObject({ status: 'sent', lateMinutes: 12 });
  });

  it('is dropped once the round it tells of is over', async () => {
    test.clock.set(newYork('07:21'));
    expect(await sendDue()).toEqual(['dropped']);
    expect(await test.mails()).toEqual([]);
  });

  it('follows the plan until it is sent', async () => {
    await yard.plan(on, [{ position: 1, startMinutes: 1080, minutes: 30 }]);
    await planReminders();
    expect((await rows('morning')).map((row) => [row.dueAt, row.dropAfter])).toEqual([[newYork('17:40'), newYork('18:30')]]);
    test.clock.set(newYork('17:40'));
    await sendDue();
    expect((await test.mails())[0]?.text).toContain('One set. Done by 6:30 pm.');
  });

  it('is called off without a round, and back when there is one again', async () => {
    await yard.plan(on, []);
    await planReminders();
    expect((await rows('morning')).map((row) => row.status)).toEqual(['cancelled']);
    await twoSets();
    await planReminders();
    expect((await rows('morning')).map((row) => [row.status, row.dueAt])).toEqual([['waiting', newYork('05:40')]]);
  });

  it('is sent once for a day, whatever is planned after', async () => {
    test.clock.set(newYork('05:40'));
    await sendDue();
    await yard.plan(on, [{ position: 1, startMinutes: 1080, minutes: 30 }]);
    await planReminders();
    test.clock.set(newYork('17:45'));
    expect(await sendDue()).toEqual([]);
    expect(await test.mails()).toHaveLength(1);
  });

  it('is not needed by somebody who started already, skipped the round, left, or wants none', async () => {
    const change = () => ({ app: test.context, yardId: yard.yardId, userId: yard.owner.user.id, now: test.clock.now() });
    test.clock.set(newYork('05:30'));
    await test.context.database.transaction(() => startRound(change(), { id: randomUUID(), on, roundIndex: 0 }));
    expect((await rows('morning')).map((row) => row.status)).toEqual(['cancelled']);

    yard = await plannedYard(test);
    await twoSets();
    await planReminders();
    await test.context.database.transaction(() => skipPlannedRound(change(), { on, roundIndex: 0, cause: 'rain' }));
    expect((await rows('morning')).map((row) => row.status)).toEqual(['cancelled']);

    yard = await plannedYard(test);
    await twoSets();
    await planReminders();
    await Membership.update({ wantsMorningEmail: false }, { where: { yardId: yard.yardId } });
    test.clock.set(newYork('05:40'));
    expect(await sendDue()).toEqual(['cancelled']);
    expect(await test.mails()).toEqual([]);
  });
});

describe('sending', () => {
  let reminderId: string;
  beforeEach(async () => {
    await twoSets();
    await planReminders();
    test.clock.set(newYork('05:40'));
    reminderId = (await rows('morning'))[0]!.id;
  });

  it('happens once, however many servers try at the same moment', async () => {
    const servers = [test.context, test.secondServer(), test.secondServer()];
    const outcomes = await Promise.all(Array.from({ length: 12 }, (_, index) => sendReminder(servers[index % 3]!, reminderId)));
    expect(outcomes.map(({ outcome }) => outcome).sort()).toEqual([...Array.from({ length: 11 }, () => 'not_mine'), 'sent']);
    expect(await test.mails()).toHaveLength(1);
  });

  it('is taken over from a server that was killed between claim and mail, with the same Message-ID', async () => {
    const killed = test.secondServer();
    const claimed = await claimReminder(killed, reminderId);
    expect(claimed).not.toBeNull();
    // it is the killed one's as long as its lease holds
    expect(await sendReminder(test.context, reminderId)).toEqual({ outcome: 'not_mine' });
    expect(await sendDue()).toEqual([]);
    await letLeasesRunOut();
    expect(await sendDue()).toEqual(['sent']);
    const [mail] = await test.mails();
    expect(mail?.messageId).toBe(claimed?.messageId);
    expect((await rows('morning'))[0]).toMatchObject({ status: 'sent', attempts: 2, claimedBy: test.context.serverId });
    expect(await sendReminder(killed, reminderId)).toEqual({ outcome: 'not_mine' });
    expect(await test.mails()).toHaveLength(1);
  });

  it('is tried again when the mail server does not take it, and given up after some tries', async () => {
    const { database } = test.context;
    await database.query('ALTER TABLE archived_mails RENAME TO archived_mails_away');
    try {
      for (let attempt = 1; attempt <= REMINDER_TRIES; attempt += 1) {
        expect(await sendDue()).toEqual([attempt < REMINDER_TRIES ? 'retry' : 'failed']);
        // not at once: it waits longer after each try
        expect(await sendDue()).toEqual([]);
        await letLeasesRunOut();
      }
    } finally {
      await database.query('ALTER TABLE archived_mails_away RENAME TO archived_mails');
    }
    expect((await rows('morning'))[0]).toMatchObject({ status: 'failed', attempts: REMINDER_TRIES, lastError: expect.stringContaining('could not be kept') as string });
    expect(await sendDue()).toEqual([]);
    expect(await test.mails()).toEqual([]);
  });

  it('succeeds on a later try with the Message-ID of the first', async () => {
    const { database } = test.context;
    await database.query('ALTER TABLE archived_mails RENAME TO archived_mails_away');
    await sendDue();
    await database.query('ALTER TABLE archived_mails_away RENAME TO archived_mails');
    await letLeasesRunOut();
    expect(await sendDue()).toEqual(['sent']);
    expect((await test.mails())[0]?.messageId).toBe((await rows('morning'))[0]?.messageId);
  });
});

describe('reminders of a running round', () => {
  let roundId: string;
  let setIds: string[];
  const change = () => ({ app: test.context, yardId: yard.yardId, userId: yard.owner.user.id, now: test.clock.now() });
  const act = (action: Parameters<typeof changeRound>[2]) => test.context.database.transaction(() => changeRound(change(), roundId, action));
  const begin = async () => {
    test.clock.set(newYork('06:00'));
    roundId = await test.context.database.transaction(() => startRound(change(), { id: randomUUID(), on, roundIndex: 0 }));
    setIds = (await RoundSet.findAll({ where: { yardId: yard.yardId, roundId }, order: [['sortOrder', 'ASC']] })).map((set) => set.id);
  };
  beforeEach(async () => {
    await twoSets();
    await begin();
  });

  it('says where to move the hose at the minute the set ends', async () => {
    test.clock.set(newYork('06:44'));
    expect(await sendDue()).toEqual([]);
    test.clock.set(newYork('06:45'));
    expect(await sendDue()).toEqual(['sent']);
    const [mail] = await test.mails();
    expect(mail?.subject).toBe('Hazel Row: move the hose to Spot 2');
    expect(mail?.text).toContain('Spot 1 on Front lawn has had its 45 min. Move the hose to Spot 2');
    expect(mail?.text).toContain(`https://dapple.example/yards/${yard.yardId}/rounds/${roundId}`);
  });

  it('moves with ten more minutes, and tells the new end even if the old one was told', async () => {
    await act({ action: 'add_minutes', setId: setIds[0]!, minutes: 10 });
    test.clock.set(newYork('06:45'));
    expect(await sendDue()).toEqual([]);
    test.clock.set(newYork('06:55'));
    expect(await sendDue()).toEqual(['sent']);
    await act({ action: 'add_minutes', setId: setIds[0]!, minutes: 10 });
    test.clock.set(newYork('07:05'));
    expect(await sendDue()).toEqual(['sent']);
    expect(await test.mails()).toHaveLength(2);
  });

  it('asks for the water to be turned off after the last set, then whether it still runs, until somebody says it is off', async () => {
    test.clock.set(newYork('06:46'));
    await act({ action: 'moved', setId: setIds[1]! });
    test.clock.set(newYork('07:16'));
    expect(await sendDue()).toEqual(['sent']);
    test.clock.set(newYork('07:30'));
    expect(await sendDue()).toEqual([]);
    test.clock.set(newYork('07:31'));
    expect(await sendDue()).toEqual(['sent']);
    expect((await test.mails()).map((mail) => mail.subject)).toEqual(['Hazel Row: is the water still on?', 'Hazel Row: turn the water off']);
    expect((await test.mails())[0]?.text).toContain('Spot 2 on Front lawn was over at 7:16 am');
  });

  it('falls silent with the water off', async () => {
    test.clock.set(newYork('06:40'));
    await act({ action: 'water_off' });
    test.clock.set(newYork('08:00'));
    expect(await sendDue()).toEqual([]);
    expect((await Reminder.findAll({ where: { yardId: yard.yardId } })).map((row) => row.status)).toEqual(['cancelled', 'cancelled']);
  });

  it('is not sent by a server that claimed it before the hose was moved', async () => {
    test.clock.set(newYork('06:45'));
    const [due] = await remindersDue(test.context);
    await act({ action: 'moved', setId: setIds[1]! });
    await test.context.database.query(`UPDATE reminders SET status = 'waiting' WHERE id = $1`, { bind: [due!.reminderId] });
    expect(await sendReminder(test.context, due!.reminderId)).toEqual({ outcome: 'cancelled' });
    expect(await test.mails()).toEqual([]);
  });

  it('is dropped a quarter of an hour after the end of the set, but the alarm still goes, marked late', async () => {
    test.clock.set(newYork('07:20'));
    expect((await sendDue()).sort()).toEqual(['dropped', 'sent']);
    const [mail, ...others] = await test.mails();
    expect(others).toEqual([]);
    expect(mail?.subject).toBe('Late: Hazel Row: is the water still on?');
    expect(mail?.text).toContain('This reminder is 20 min late');
  });

  it('raises the alarm when a set was cut short and nothing was said since', async () => {
    test.clock.set(newYork('06:20'));
    await act({ action: 'cut_short', setId: setIds[0]! });
    test.clock.set(newYork('06:34'));
    expect(await sendDue()).toEqual([]);
    test.clock.set(newYork('06:35'));
    expect(await sendDue()).toEqual(['sent']);
    expect((await test.mails())[0]?.text).toContain('Spot 1 on Front lawn was over at 6:20 am');
  });

  it('raises no alarm about a tap that shuts itself off', async () => {
    yard = await plannedYard(test, { shutOffTimer: true });
    await yard.plan(on, [{ position: 0, startMinutes: 360, minutes: 45 }]);
    await begin();
    test.clock.set(newYork('09:00'));
    expect((await rows('still_on'))).toEqual([]);
    expect((await rows('water_off'))).toHaveLength(1);
  });

  it('goes to every member who wants it', async () => {
    await act({ action: 'water_off' });
    yard = await plannedYard(test);
    await yard.member('helper');
    await yard.member('consultant');
    await twoSets();
    await begin();
    test.clock.set(newYork('06:45'));
    expect(await sendDue()).toEqual(['sent', 'sent']);
  });
});

it('uses the instant the tests stand at', () => {
  expect(newYork('05:40').toISOString()).toBe(testNow);
});
