import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { EventRow, Reminder, Round, RoundSet, Yard } from '@/server/models';
import type { RoundResponse } from '@/shared/contracts/rounds';
import { plannedYard, type PlannedYard } from '../../factories/plannedYard';
import { signedIn, type SignedIn } from '../../factories/people';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

const on = '2026-06-13';

describe('rounds', () => {
  let test: TestContext;
  let yard: PlannedYard;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(async () => {
    test.clock.set(testNow);
    yard = await plannedYard(test, { positions: 2 });
    // 6:00 to 6:45 and, after five minutes for the move, 6:50 to 7:20
    await yard.plan(on, [{ position: 0, startMinutes: 360, minutes: 45 }, { position: 1, startMinutes: 410, minutes: 30 }]);
    test.clock.set('2026-06-13T10:02:00Z');
  });

  const post = (path: string, body: object, person: SignedIn = yard.owner) => request(test.app).post(`/api/yards/${yard.yardId}${path}`).set(person.headers).send(body);
  const start = async (id: string = randomUUID(), person: SignedIn = yard.owner): Promise<RoundResponse> => {
    const answer = await post('/rounds', { id, on, roundIndex: 0 }, person);
    expect(answer.status).toBe(201);
    return answer.body as RoundResponse;
  };
  const act = async (roundId: string, body: object, person: SignedIn = yard.owner): Promise<RoundResponse> => {
    const answer = await post(`/rounds/${roundId}/actions`, body, person);
    expect(answer.body).not.toHaveProperty('error');
    return answer.body as RoundResponse;
  };

  it('takes over the sets of the plan, with the first one running and its end told', async () => {
    const round = await start();
    expect(round).toMatchObject({ status: 'running', on, roundIndex: 0, startedAt: '2026-06-13T10:02:00.000Z', startedBy: { name: 'Ada Larkin' } });
    expect(round.sets.map((set) => [set.status, set.plannedMinutes, set.endsAt])).toEqual([['running', 45, '2026-06-13T10:47:00.000Z'], ['waiting', 30, null]]);
    expect(round.sets[0]?.rateMmPerHour).toBeCloseTo(12, 9);
    const rows = await RoundSet.findAll({ where: { yardId: yard.yardId } });
    // two positions of 75 m² in a zone of 150 m²
    expect(rows.map((row) => [row.zoneShare, row.runTimeMultiplier])).toEqual([[0.5, expect.closeTo(1.2, 9)], [0.5, expect.closeTo(1.2, 9)]]);
  });

  it('goes through to water off; what was applied is on record, and budget and plan are behind', async () => {
    const round = await start();
    test.clock.advance(46);
    const second = await act(round.id, { action: 'moved', setId: round.sets[1]!.id });
    expect(second.sets.map((set) => set.status)).toEqual(['done', 'running']);
    test.clock.advance(20);
    await act(round.id, { action: 'add_minutes', setId: round.sets[1]!.id });
    test.clock.advance(20);
    const ended = await act(round.id, { action: 'water_off' });
    expect(ended).toMatchObject({ status: 'ended', waterOffBy: { name: 'Ada Larkin' }, waterOffAt: '2026-06-13T11:28:00.000Z' });
    expect(ended.sets.map((set) => [set.status, set.minutesRun, set.addedMinutes])).toEqual([['done', 46, 0], ['done', 40, 10]]);
    // 12 mm/h for 46 and 40 minutes, of which 1 / 1.2 counts
    expect(ended.sets.map((set) => set.gaveMm)).toEqual([expect.closeTo(9.2 / 1.2, 9), expect.closeTo(8 / 1.2, 9)]);
    expect(ended.sets.map((set) => set.wantedMm)).toEqual([expect.closeTo(7.5, 9), expect.closeTo(8 / 1.2, 9)]);
    expect(await Yard.findByPk(yard.yardId)).toMatchObject({ budgetStaleFrom: on, factsVersion: 1 });
    const events = await EventRow.findAll({ where: { yardId: yard.yardId }, order: [['at', 'ASC']] });
    expect(events.map((event) => event.verb)).toEqual(['round.started', 'round.moved', 'round.minutes_added', 'round.ended']);
  });

  it('starts once, however often the same start arrives', async () => {
    const id = randomUUID();
    const answers = await Promise.all(Array.from({ length: 5 }, () => post('/rounds', { id, on, roundIndex: 0 })));
    expect(answers.map((answer) => answer.status)).toEqual([201, 201, 201, 201, 201]);
    expect(await Round.count({ where: { yardId: yard.yardId } })).toBe(1);
    expect(await RoundSet.count({ where: { yardId: yard.yardId } })).toBe(2);
  });

  it('lets one of two people start who tap at the same moment', async () => {
    const helper = await yard.member('helper');
    const answers = await Promise.all([yard.owner, helper].map((person) => post('/rounds', { id: randomUUID(), on, roundIndex: 0 }, person)));
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409]);
    expect(answers.find((answer) => answer.status === 409)?.body).toMatchObject({ error: { code: 'round_already_running' } });
    expect(await Round.count({ where: { yardId: yard.yardId } })).toBe(1);
  });

  it('is not started a second time after it ended', async () => {
    const round = await start();
    await act(round.id, { action: 'water_off' });
    expect((await post('/rounds', { id: randomUUID(), on, roundIndex: 0 })).body).toMatchObject({ error: { code: 'conflict' } });
  });

  it('does not change under a newer plan once it runs', async () => {
    const round = await start();
    await yard.plan(on, [{ position: 1, startMinutes: 420, minutes: 5 }]);
    const answer = await request(test.app).get(`/api/yards/${yard.yardId}/rounds/${round.id}`).set(yard.owner.headers);
    expect((answer.body as RoundResponse).sets.map((set) => set.plannedMinutes)).toEqual([45, 30]);
  });

  it('leaves out a planned round with its cause, and then no one can start it', async () => {
    expect((await post('/rounds/skip', { on, roundIndex: 0, cause: 'not_at_home' })).body).toEqual({ done: true });
    const rows = await RoundSet.findAll({ where: { yardId: yard.yardId } });
    expect(rows.map((row) => [row.status, row.skipCause, row.roundId, row.appliedMm])).toEqual([['skipped', 'not_at_home', null, null], ['skipped', 'not_at_home', null, null]]);
    expect(await Yard.findByPk(yard.yardId)).toMatchObject({ factsVersion: 1, budgetStaleFrom: null });
    expect((await post('/rounds', { id: randomUUID(), on, roundIndex: 0 })).status).toBe(409);
    // the same word again changes nothing, another one is refused
    expect((await post('/rounds/skip', { on, roundIndex: 0, cause: 'not_at_home' })).status).toBe(200);
    expect((await post('/rounds/skip', { on, roundIndex: 0, cause: 'rain' })).status).toBe(409);
    expect(await RoundSet.count({ where: { yardId: yard.yardId } })).toBe(2);
  });

  it('lists rounds, newest first', async () => {
    await yard.plan(on, [{ position: 0, startMinutes: 360, minutes: 45 }, { position: 1, startMinutes: 600, minutes: 30, roundIndex: 1 }]);
    const first = await start();
    await act(first.id, { action: 'water_off' });
    test.clock.set('2026-06-13T14:00:00Z');
    await post('/rounds', { id: randomUUID(), on, roundIndex: 1 }).expect(201);
    const answer = await request(test.app).get(`/api/yards/${yard.yardId}/rounds`).set(yard.owner.headers);
    expect((answer.body as { rounds: RoundResponse[] }).rounds.map((round) => [round.roundIndex, round.status])).toEqual([[1, 'running'], [0, 'ended']]);
  });

  it.each([
    ['a day that is no day', { id: randomUUID(), on: '2026-02-30', roundIndex: 0 }, 400],
    ['a day far off', { id: randomUUID(), on: '2026-06-20', roundIndex: 0 }, 400],
    ['a round the plan does not have', { id: randomUUID(), on, roundIndex: 7 }, 404],
    ['a negative round', { id: randomUUID(), on, roundIndex: -1 }, 400],
    ['an id that is none', { id: 'one', on, roundIndex: 0 }, 400],
  ])('refuses to start %s and writes nothing', async (_name, body, status) => {
    expect((await post('/rounds', body)).status).toBe(status);
    expect(await Round.count({ where: { yardId: yard.yardId } })).toBe(0);
    expect(await Reminder.count({ where: { yardId: yard.yardId } })).toBe(0);
  });

  it('refuses sets and rounds of another yard, and people who do not belong', async () => {
    const other = await plannedYard(test);
    await other.plan(on, [{ position: 0, startMinutes: 360, minutes: 45 }]);
    const foreign = (await request(test.app).post(`/api/yards/${other.yardId}/rounds`).set(other.owner.headers).send({ id: randomUUID(), on, roundIndex: 0 })).body as RoundResponse;
    const round = await start();
    expect((await post(`/rounds/${foreign.id}/actions`, { action: 'water_off' })).status).toBe(404);
    expect((await post(`/rounds/${round.id}/actions`, { action: 'moved', setId: foreign.sets[0]!.id })).status).toBe(404);
    expect((await post('/rounds', { id: foreign.id, on, roundIndex: 0 })).body).toMatchObject({ error: { code: 'conflict' } });
    const stranger = await signedIn(test);
    expect((await post(`/rounds/${round.id}/actions`, { action: 'water_off' }, stranger)).status).toBe(404);
    expect((await post('/rounds', { id: randomUUID(), on, roundIndex: 0 }, stranger)).status).toBe(404);
    expect(await Round.findByPk(round.id)).toMatchObject({ status: 'running' });
  });
});
