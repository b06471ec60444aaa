import request from 'supertest';
import { QueryTypes } from 'sequelize';
import { stageOn } from '@/scheduling/establishment';
import { addDays } from '@/scheduling/units/civilDay';
import { WeatherDay, Zone } from '@/server/models';
import type { EstablishmentResponse } from '@/shared/contracts/proposals';
import { plannedYard, type PlannedYard } from '../../factories/plannedYard';
import { begunSet, seededYard } from '../../factories/seededYard';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

const today = '2026-06-13';
const doseTimes = [360, 540, 720, 900];

describe('the establishment of a seeded zone', () => {
  let test: TestContext;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(() => test.clock.set(testNow));

  const read = (yard: PlannedYard, zoneId = yard.zoneId) => request(test.app).get(`/api/yards/${yard.yardId}/zones/${zoneId}/establishment`).set(yard.owner.headers);
  const doses = (position: number, times = doseTimes) => times.map((startMinutes) => ({ position, startMinutes, minutes: 8, kind: 'dose' as const }));
  const dayOf = async (yard: PlannedYard, on: string) => ((await read(yard).expect(200)).body as EstablishmentResponse).days.find((day) => day.on === on);

  it('tells day number, stage by the warmth of the soil, and when the first green may show', async () => {
    const yard = await seededYard(test, { seededOn: '2026-06-04' });
    for (let index = -15; index < 10; index += 1) {
      await WeatherDay.create({ yardId: yard.yardId, on: addDays(today, index), isForecast: index >= 0, tminC: 14, tmaxC: 26, source: 'test', fetchedAt: test.clock.now() });
    }
    const answer = (await read(yard).expect(200)).body as EstablishmentResponse;
    // twenty degrees every day: as the clock of the sowing says for constant soil warmth
    const expected = stageOn({ sownOn: '2026-06-04', on: today, grass: 'cool_mix', dailySoilTempsC: Array.from({ length: 40 }, () => 20) });
    expect(answer).toMatchObject({
      zoneName: 'Seeded strip', seededOn: '2026-06-04', grass: 'cool_mix', dayNumber: 9, stage: expected.stage, scheduleIsDefault: true, openProposal: null,
      stageRange: { emergenceFromOn: expected.firstUpOn.fast, emergenceToOn: expected.firstUpOn.slow },
    });
    expect(expected.stage).not.toBe('sown');
    expect(answer.days.map((day) => day.on)).toEqual(Array.from({ length: 19 }, (_, index) => addDays('2026-06-04', index)));
    for (const day of answer.days) {
      expect(day.stage).toBe(stageOn({ sownOn: '2026-06-04', on: day.on, grass: 'cool_mix', dailySoilTempsC: Array.from({ length: 40 }, () => 20) }).stage);
    }
  });

  it('answers without any weather, with the warmth that is taken by default', async () => {
    const yard = await seededYard(test, { seededOn: '2026-06-12' });
    expect((await read(yard).expect(200)).body).toMatchObject({ dayNumber: 1, stage: 'sown' });
  });

  it('shows three weeks back and ten days ahead at most', async () => {
    const yard = await seededYard(test, { seededOn: '2026-03-01' });
    const { days } = (await read(yard).expect(200)).body as EstablishmentResponse;
    expect([days[0]?.on, days[days.length - 1]?.on]).toEqual(['2026-05-23', '2026-06-22']);
    const ahead = await seededYard(test, { seededOn: '2026-06-20' });
    expect(((await read(ahead).expect(200)).body as EstablishmentResponse)).toMatchObject({ dayNumber: -7, stage: 'sown' });
  });

  it('is not there for a lawn, a zone of another yard, or one in no use', async () => {
    const lawn = await plannedYard(test);
    await read(lawn).expect(404);
    const [own, other] = [await seededYard(test, { seededOn: '2026-06-04' }), await seededYard(test, { seededOn: '2026-06-04' })];
    await read(own, other.zoneId).expect(404);
    await Zone.update({ archivedAt: test.clock.now() }, { where: { id: own.zoneId } });
    await read(own).expect(404);
  });

  it('counts doses planned, done and left out by day, and the depth that was applied', async () => {
    const yard = await seededYard(test, { seededOn: '2026-06-04' });
    test.clock.set('2026-06-12T08:00:00Z');
    await yard.plan('2026-06-12', doses(0));
    for (const startMinutes of [360, 540]) {
      await begunSet(yard, { on: '2026-06-12', startMinutes, kind: 'dose', status: 'done', appliedMm: 1.6 });
    }
    await begunSet(yard, { on: '2026-06-12', startMinutes: 720, kind: 'dose', status: 'skipped', skipCause: 'no_time' });
    test.clock.set(testNow);
    expect(await dayOf(yard, '2026-06-12')).toMatchObject({ plannedDoses: 4, doneDoses: 2, skippedDoses: 1, appliedMm: expect.closeTo(3.2, 9) });
    expect(await dayOf(yard, today)).toMatchObject({ plannedDoses: 0, doneDoses: 0 });
  });

  it('counts a dose of a zone with two positions once, and half when one of them had it', async () => {
    const yard = await seededYard(test, { seededOn: '2026-06-04', positions: 2 });
    await yard.plan(today, [...doses(0), ...doses(1)]);
    await begunSet(yard, { on: today, startMinutes: 360, kind: 'dose', status: 'done', position: 0, appliedMm: 2 });
    expect(await dayOf(yard, today)).toMatchObject({ plannedDoses: 4, doneDoses: 0.5, appliedMm: 1 });
    await begunSet(yard, { on: today, startMinutes: 360, kind: 'dose', status: 'done', position: 1, appliedMm: 2 });
    expect(await dayOf(yard, today)).toMatchObject({ plannedDoses: 4, doneDoses: 1, appliedMm: 2 });
  });

  describe('with plans that follow each other', () => {
    it('does not count doses that a newer plan took away before their time', async () => {
      const yard = await seededYard(test, { seededOn: '2026-06-04' });
      await yard.plan(today, doses(0));
      test.clock.set('2026-06-13T12:00:00Z');
      await yard.plan(today, []);
      // 6:00 was over by 8:00, the other three fell to the rain
      test.clock.set('2026-06-13T23:00:00Z');
      expect(await dayOf(yard, today)).toMatchObject({ plannedDoses: 1 });
    });

    it('counts a dose that was missed and planned again once', async () => {
      const yard = await seededYard(test, { seededOn: '2026-06-04' });
      await yard.plan(today, doses(0));
      test.clock.set('2026-06-13T10:05:00Z');
      await yard.plan(today, doses(0, [385, 540, 720, 900]));
      expect(await dayOf(yard, today)).toMatchObject({ plannedDoses: 4 });
    });

    it('counts a begun dose once although the newer plan carries it on', async () => {
      const yard = await seededYard(test, { seededOn: '2026-06-04' });
      await yard.plan(today, doses(0));
      await begunSet(yard, { on: today, startMinutes: 360, kind: 'dose', status: 'done', appliedMm: 2 });
      test.clock.set('2026-06-13T10:20:00Z');
      await yard.plan(today, doses(0));
      expect(await dayOf(yard, today)).toMatchObject({ plannedDoses: 4, doneDoses: 1 });
    });

    it('does not count doses that rain made needless', async () => {
      const yard = await seededYard(test, { seededOn: '2026-06-04' });
      await yard.plan(today, doses(0));
      await begunSet(yard, { on: today, startMinutes: 360, kind: 'dose', status: 'skipped', skipCause: 'rain' });
      expect(await dayOf(yard, today)).toMatchObject({ plannedDoses: 3, skippedDoses: 0 });
    });

    it('keeps what was done when the plans of that day are no longer kept', async () => {
      const yard = await seededYard(test, { seededOn: '2026-06-04' });
      await begunSet(yard, { on: '2026-06-05', startMinutes: 360, kind: 'dose', status: 'done', appliedMm: 2 });
      await test.context.database.query('DELETE FROM plans WHERE yard_id = $1', { bind: [yard.yardId], type: QueryTypes.DELETE });
      expect(await dayOf(yard, '2026-06-05')).toMatchObject({ plannedDoses: 1, doneDoses: 1 });
    });
  });
});
