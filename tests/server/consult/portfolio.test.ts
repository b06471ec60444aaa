import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { CatchTest, HomeWindow, Membership, Plan, Position, Proposal, Round, Tap, Yard, Zone } from '@/server/models';
import { defaultSchedule } from '@/server/commands/ensureSchedule';
import type { Role } from '@/shared/contracts/common';
import type { PortfolioResponse } from '@/shared/contracts/proposals';
import { signedIn, type SignedIn } from '../../factories/people';
import { plannedYard, type PlannedYard } from '../../factories/plannedYard';
import { begunSet, makeComplete, seededYard, storedBudget } from '../../factories/seededYard';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

const today = '2026-06-13';

describe('the portfolio', () => {
  let test: TestContext;
  let person: SignedIn;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(async () => {
    test.clock.set(testNow);
    person = await signedIn(test);
  });

  const read = async () => ((await request(test.app).get('/api/portfolio').set(person.headers).expect(200)).body as PortfolioResponse).yards;
  const join = (yard: PlannedYard, role: Role = 'consultant') => Membership.create({ id: randomUUID(), yardId: yard.yardId, userId: person.user.id, role });
  const readOne = async (yard: PlannedYard) => (await read()).find((each) => each.yardId === yard.yardId)!;
  /** A yard of the person's that lacks nothing. */
  const onTrack = async (name: string, role: Role = 'consultant') => {
    const yard = await plannedYard(test, { name, positions: 1 });
    await makeComplete(test, yard);
    await join(yard, role);
    return yard;
  };
  const seeded = async (name = 'Seeded') => {
    const yard = await seededYard(test, { name, seededOn: '2026-06-04' });
    await makeComplete(test, yard);
    await join(yard);
    return yard;
  };
  const running = async (yard: PlannedYard, startedAt: string, minutes = 20) => {
    const id = randomUUID();
    await Round.create({ id, yardId: yard.yardId, on: today, roundIndex: 0, status: 'running', startedAt: new Date(startedAt) });
    await begunSet(yard, { on: today, startMinutes: 300, status: 'running', roundId: id, startedAt: new Date(startedAt), minutes });
    return id;
  };
  const withResult = (yard: PlannedYard, result: object) => Plan.update({ result: { planner: 'test', days: [], shortages: [], missing: [], ...result } }, { where: { yardId: yard.yardId } });

  it('is empty for a person without yards, and shows no yard of others', async () => {
    await plannedYard(test);
    expect(await read()).toEqual([]);
  });

  it('shows a yard that needs nothing as such', async () => {
    const yard = await onTrack('Larkspur Court');
    expect(await readOne(yard)).toEqual({
      yardId: yard.yardId, name: 'Larkspur Court', placeName: 'Yonkers', role: 'consultant', owners: ['Ada Larkin'], need: null, note: null, rootZone: [], rootZoneName: null,
      setsPlanned: 0, setsDone: 0, seededZones: [], openProposals: 0,
    });
  });

  it('puts the yards one consults first, then what presses most', async () => {
    const calm = await onTrack('A calm yard');
    const untested = await onTrack('B without a test');
    await CatchTest.destroy({ where: { yardId: untested.yardId } });
    const wet = await onTrack('C with running water');
    await running(wet, '2026-06-13T09:00:00Z');
    const own = await onTrack('D own yard with running water', 'owner');
    await running(own, '2026-06-13T09:00:00Z');
    const dry = await onTrack('E dry');
    await storedBudget(test, dry, today, [10, 16, 20]);
    expect((await read()).map((yard) => [yard.name, yard.need?.code ?? null])).toEqual([
      ['C with running water', 'water_still_on'], ['E dry', 'past_refill_line'], ['B without a test', 'no_catch_test'], ['A calm yard', null], ['D own yard with running water', 'water_still_on'],
    ]);
    expect(calm.yardId).not.toBe(own.yardId);
  });

  it('needs one query more or less for no number of yards', async () => {
    let queries = 0;
    const { options } = test.context.database as unknown as { options: { logging: (() => void) | false } };
    const count = async () => {
      queries = 0;
      options.logging = () => { queries += 1; };
      await read();
      options.logging = false;
      return queries;
    };
    await seeded('One');
    const forOne = await count();
    for (const name of ['Two', 'Three', 'Four', 'Five']) {
      const yard = await seeded(name);
      await yard.plan(today, [{ position: 0, startMinutes: 400, minutes: 10, kind: 'dose' }]);
      await storedBudget(test, yard, today, [1, 2, 3]);
    }
    expect(await read()).toHaveLength(5);
    expect(await count()).toBe(forOne);
    // five for the portfolio; the session's own is prepared once per connection and not counted here
    expect(forOne).toBe(5);
  });

  describe('sees that the water is still on', () => {
    it('when the running set is over by more than a move takes', async () => {
      const yard = await onTrack('Still on');
      await running(yard, '2026-06-13T09:00:00Z', 36);
      expect((await readOne(yard)).need).toBeNull();
      test.clock.advance(1);
      expect((await readOne(yard)).need).toEqual({ code: 'water_still_on', urgent: true, values: { minutesPast: 5 } });
    });

    it('and not once the round has ended', async () => {
      const yard = await onTrack('Ended');
      const id = await running(yard, '2026-06-13T08:00:00Z');
      await Round.update({ status: 'ended', endedAt: test.clock.now() }, { where: { id } });
      expect((await readOne(yard)).need).toBeNull();
    });
  });

  describe('sees that a seedbed missed doses', () => {
    const doses = [360, 540, 720].map((startMinutes) => ({ position: 0, startMinutes, minutes: 8, kind: 'dose' as const }));

    it('half an hour after their time, and not those that were done or that rain made needless', async () => {
      const yard = await seeded();
      await yard.plan(today, doses);
      test.clock.set('2026-06-13T10:29:00Z');
      expect((await readOne(yard)).need).toBeNull();
      test.clock.set('2026-06-13T13:31:00Z');
      expect((await readOne(yard)).need).toEqual({ code: 'seed_missed_doses', urgent: true, values: { zone: 'Seeded strip', missed: 2, due: 2 } });
      await begunSet(yard, { on: today, startMinutes: 360, kind: 'dose', status: 'done' });
      expect((await readOne(yard)).need).toMatchObject({ values: { missed: 1, due: 2 } });
      await begunSet(yard, { on: today, startMinutes: 540, kind: 'dose', status: 'skipped', skipCause: 'rain' });
      expect((await readOne(yard)).need).toBeNull();
    });

    it('also those that somebody left out for want of time', async () => {
      const yard = await seeded();
      await yard.plan(today, doses);
      await begunSet(yard, { on: today, startMinutes: 360, kind: 'dose', status: 'skipped', skipCause: 'no_time' });
      test.clock.set('2026-06-13T10:31:00Z');
      expect((await readOne(yard)).need).toMatchObject({ code: 'seed_missed_doses', values: { missed: 1, due: 1 } });
    });

    it('and not a dose that a newer plan moved to later', async () => {
      const yard = await seeded();
      await yard.plan(today, doses);
      test.clock.set('2026-06-13T10:40:00Z');
      await yard.plan(today, [{ ...doses[0]!, startMinutes: 420 }, doses[1]!, doses[2]!]);
      expect((await readOne(yard)).need).toBeNull();
    });
  });

  it('sees that nobody started, and not what was left out on purpose', async () => {
    const yard = await onTrack('Late');
    await yard.plan(today, [{ position: 0, startMinutes: 360, minutes: 45 }]);
    test.clock.set('2026-06-13T10:29:00Z');
    expect((await readOne(yard)).need).toBeNull();
    test.clock.set('2026-06-13T10:30:00Z');
    expect((await readOne(yard)).need).toEqual({ code: 'not_started', urgent: false, values: { sets: 1, startMinutes: 360 } });
    await begunSet(yard, { on: today, startMinutes: 360, status: 'skipped', skipCause: 'not_at_home' });
    expect((await readOne(yard)).need).toBeNull();
  });

  describe('sees a zone past its refill line', () => {
    it('with numbers, urgent when more than half of what was left is gone', async () => {
      const yard = await onTrack('Dry');
      await storedBudget(test, yard, today, [10, 16, 20]);
      expect((await readOne(yard)).need).toEqual({ code: 'past_refill_line', urgent: false, values: { zone: 'Front lawn', depletionMm: 16, refillLineMm: 15 } });
      const drier = await onTrack('Drier');
      await storedBudget(test, drier, today, [10, 23, 24]);
      expect((await readOne(drier)).need).toMatchObject({ code: 'past_refill_line', urgent: true });
    });

    it('unless it rests, was watered today, or is planned for today or tomorrow', async () => {
      const resting = await onTrack('Resting');
      await storedBudget(test, resting, today, [10, 16, 20]);
      await Zone.update({ resting: true }, { where: { yardId: resting.yardId } });
      expect((await readOne(resting)).need).toBeNull();
      const watered = await onTrack('Watered');
      await storedBudget(test, watered, today, [10, 16, 3]);
      expect((await readOne(watered)).need).toBeNull();
      const planned = await onTrack('Planned');
      await storedBudget(test, planned, today, [10, 16, 20]);
      await planned.plan('2026-06-14', [{ position: 0, startMinutes: 360, minutes: 45 }]);
      expect((await readOne(planned)).need).toBeNull();
      await planned.plan('2026-06-15', [{ position: 0, startMinutes: 360, minutes: 45 }]);
      expect((await readOne(planned)).need).toMatchObject({ code: 'past_refill_line' });
    });
  });

  it('sees what does not fit, what is not measured, what waits and what is not set up', async () => {
    const short = await onTrack('Short');
    await short.plan(today, []);
    await withResult(short, { shortages: [{ zoneId: short.zoneId, on: today, shortMm: 4, shortMinutes: 25, litres: 300, reasons: [] }, { zoneId: short.zoneId, on: '2026-06-14', shortMm: 2, shortMinutes: 10, litres: 100, reasons: [] }] });
    expect((await readOne(short)).need).toEqual({ code: 'does_not_fit', urgent: false, values: { zones: 1, shortMinutes: 25 } });

    const waiting = await seeded('Waiting');
    await Proposal.create({ id: randomUUID(), yardId: waiting.yardId, zoneId: waiting.zoneId, authorId: person.user.id, reason: 'why', scheduleBefore: defaultSchedule, schedule: defaultSchedule, status: 'open' });
    expect(await readOne(waiting)).toMatchObject({ need: { code: 'proposal_waiting', values: { proposals: 1 } }, openProposals: 1, seededZones: [{ zoneId: waiting.zoneId, name: 'Seeded strip', dayNumber: 9 }] });

    const bare = await onTrack('Bare');
    for (const [model, step] of [[HomeWindow, 'hours'], [Position, 'position'], [Zone, 'zone'], [Tap, 'tap']] as const) {
      await (model as typeof Tap).destroy({ where: { yardId: bare.yardId } });
      expect((await readOne(bare)).need).toEqual({ code: 'set_up_unfinished', urgent: false, values: { step } });
    }
  });

  it('tells what holds a yard that needs nothing', async () => {
    const yard = await onTrack('Held');
    await yard.plan(today, []);
    await withResult(yard, { days: [{ on: today, rounds: [], missedDoses: [], endDepletionMm: {}, zonesWithout: [{ zoneId: yard.zoneId, reasons: [{ code: 'above_line', values: {} }, { code: 'held_for_rain', values: { rainMm: 8 } }] }] }] });
    expect(await readOne(yard)).toMatchObject({ need: null, note: { code: 'held_for_rain', values: { rainMm: 8, zone: 'Front lawn' } } });
  });

  it('shows fourteen days of the zone nearest to its line, and how much of the planned was done', async () => {
    const yard = await onTrack('Shown');
    const far = randomUUID();
    const front = await Zone.findByPk(yard.zoneId, { rejectOnEmpty: true });
    await Zone.create({ ...front.get(), id: far, name: 'Wet corner' });
    await storedBudget(test, { ...yard, zoneId: far }, today, [1, 1, 1]);
    await storedBudget(test, yard, today, Array.from({ length: 20 }, (_, index) => index * 0.5));
    for (const [day, status] of [['2026-05-25', 'done'], ['2026-06-10', 'done'], ['2026-06-11', 'cut_short'], ['2026-06-12', null]] as const) {
      test.clock.set(`${day}T08:00:00Z`);
      await yard.plan(day, [{ position: 0, startMinutes: 360, minutes: 45 }]);
      if (status !== null) {
        await begunSet(yard, { on: day, startMinutes: 360, status });
      }
    }
    test.clock.set(testNow);
    await yard.plan(today, [{ position: 0, startMinutes: 360, minutes: 45 }]);
    const shown = await readOne(yard);
    expect(shown).toMatchObject({ rootZoneName: 'Front lawn', setsPlanned: 3, setsDone: 2 });
    expect(shown.rootZone.map((day) => day.on)).toHaveLength(14);
    expect([shown.rootZone[0], shown.rootZone[13]]).toEqual([
      { on: '2026-05-31', depletionMm: 3, refillLineMm: 15, totalAvailableMm: 30 }, { on: today, depletionMm: 9.5, refillLineMm: 15, totalAvailableMm: 30 },
    ]);
  });

  it('takes each yard\'s own civil day', async () => {
    const east = await plannedYard(test, { name: 'Far east', positions: 1, timeZone: 'Pacific/Auckland' });
    await makeComplete(test, east);
    await join(east);
    // 13 June 23:50 UTC is 14 June, 11:50 in Auckland, and 13 June, 19:50 in New York
    test.clock.set('2026-06-13T17:00:00Z');
    await east.plan('2026-06-14', [{ position: 0, startMinutes: 360, minutes: 45 }]);
    test.clock.set('2026-06-13T23:50:00Z');
    expect((await readOne(east)).need).toMatchObject({ code: 'not_started' });
    await Yard.update({ timeZone: 'America/New_York' }, { where: { id: east.yardId } });
    expect((await readOne(east)).need).toBeNull();
  });
});
