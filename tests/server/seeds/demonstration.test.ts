import { Op, QueryTypes } from 'sequelize';
import { BudgetDay, DailyRun, Plan, Reminder, Round, RoundSet, User, Yard } from '@/server/models';
import { seedDemonstration, type DemonstrationAccount } from '@/server/seeds/demonstration';
import { plannedDaySets } from '@/server/readModels/plannedDay';
import { testContext, type TestContext } from '../../setup/testContext';

jest.setTimeout(120_000);

describe('the demonstration', () => {
  let test: TestContext;
  let accounts: DemonstrationAccount[];
  let yard: Yard;
  beforeAll(async () => {
    test = await testContext({ demonstration: true });
    // as if an earlier start had been killed half-way
    await User.create({ id: 'a0a0a0a0-0000-4000-8000-000000000001', name: 'Left over', email: 'mara@dapple.example', passwordHash: 'x', emailConfirmedAt: null });
    accounts = await seedDemonstration(test.context);
    yard = await Yard.findOne({ where: { name: 'Larkspur Court' }, rejectOnEmpty: true });
  });
  afterAll(() => test.close());

  it('names its accounts and begins on a Saturday morning in June', () => {
    expect(accounts.map((account) => account.role)).toEqual(['owner', 'helper', 'consultant']);
    expect(test.clock.now().toISOString()).toBe('2026-06-20T09:40:00.000Z');
  });

  it('has something to do this morning, with a reminder to come', async () => {
    const sets = await plannedDaySets(test.context.database, yard.id, '2026-06-20');
    const first = sets.filter((set) => set.roundIndex === 0 && set.kind === 'set');
    expect(first.map((set) => set.positionName)).toContain('Front by the drive');
    // Somebody is there from 6:15; the minute itself is the planner's to choose.
    expect(first[0]?.startMinutes).toBeGreaterThanOrEqual(380);
    expect(first[0]?.startMinutes).toBeLessThan(420);
    expect(await Reminder.count({ where: { yardId: yard.id, kind: 'morning', subjectKey: '2026-06-20', status: 'waiting' } })).toBe(2);
  });

  it('has three weeks of budget, rounds and runs behind it, all computed', async () => {
    const days = await BudgetDay.findAll({ where: { yardId: yard.id, isForecast: false } });
    const zones = [...new Set(days.map((day) => day.zoneId))];
    expect(zones).toHaveLength(4);
    expect(days.filter((day) => day.irrigationMm > 0).length).toBeGreaterThan(5);
    expect(await DailyRun.count({ where: { yardId: yard.id, status: 'done' } })).toBe(22);
    expect(await Round.count({ where: { yardId: yard.id, status: 'ended' } })).toBeGreaterThan(10);
    expect(await Round.count({ where: { status: 'running' } })).toBe(0);
    const doses = await RoundSet.count({ where: { yardId: yard.id, kind: 'dose', status: 'done' } });
    expect(doses).toBeGreaterThan(8);
    expect(await RoundSet.count({ where: { yardId: yard.id, status: ['cut_short', 'skipped'] } })).toBeGreaterThan(1);
  });

  it('leaves no yard behind its facts and no reminder unsent', async () => {
    expect(await Yard.count()).toBe(6);
    const plans = await test.context.database.query<{ yardId: string; facts: number; plan: number }>(
      `SELECT y.id AS "yardId", y.facts_version AS facts, (SELECT p.facts_version FROM plans p WHERE p.yard_id = y.id ORDER BY version DESC LIMIT 1) AS plan FROM yards y`, { type: QueryTypes.SELECT },
    );
    expect(plans.every((row) => row.facts === row.plan)).toBe(true);
    const overdue = await Reminder.findAll({ where: { status: ['waiting', 'claimed'], dueAt: { [Op.lt]: test.clock.now() } } });
    expect(overdue.map((row) => [row.kind, row.subjectKey, row.dueAt, row.status])).toEqual([]);
  });

  it('is left alone by another start', async () => {
    const [plans, rounds] = [await Plan.count(), await Round.count()];
    test.clock.set('2026-06-25T12:00:00Z');
    expect(await seedDemonstration(test.context)).toEqual(accounts);
    expect([await Plan.count(), await Round.count()]).toEqual([plans, rounds]);
    expect(test.clock.now().toISOString()).toBe('2026-06-25T12:00:00.000Z');
  });
});
