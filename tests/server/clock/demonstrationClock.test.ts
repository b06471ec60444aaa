import { QueryTypes, type Sequelize } from 'sequelize';
import { openDemonstrationClock } from '@/server/adapters/clock/demonstrationClock';
import { createDatabase } from '@/server/adapters/database/database';
import { workerDatabase, type TestDatabase } from '../../setup/testDatabase';

const HOUR_MS = 3_600_000;

describe('the demonstration clock', () => {
  let place: TestDatabase;
  let database: Sequelize;
  beforeAll(async () => {
    place = await workerDatabase();
    database = createDatabase(place.url, 4);
  });
  afterAll(async () => {
    await database.close();
    await place.done();
  });
  beforeEach(() => database.query('DELETE FROM demonstration_clock'));
  const open = () => openDemonstrationClock(database, place.url);
  const near = (instant: Date, wanted: Date | string) => expect(Math.abs(instant.getTime() - new Date(wanted).getTime())).toBeLessThan(5_000);
  /** As if the last beat had been so long ago. */
  const lastBeat = (time: string) => database.query('UPDATE demonstration_clock SET last_seen_at = last_seen_at - $1::interval', { bind: [time], type: QueryTypes.UPDATE });

  it('begins on a Saturday morning in June and runs on', async () => {
    const clock = await open();
    const first = clock.now();
    near(first, '2026-06-20T05:40:00-04:00');
    await new Promise((resolve) => { setTimeout(resolve, 30); });
    expect(clock.now().getTime()).toBeGreaterThan(first.getTime());
    clock.standAt(new Date('2026-06-01T12:00:00Z'));
    expect(clock.now()).toEqual(new Date('2026-06-01T12:00:00Z'));
    clock.standAt(null);
    near(clock.now(), first);
  });

  it('goes on over a restart, with the time in which nothing ran left out', async () => {
    const before = await open();
    await before.setTo(new Date('2026-06-20T12:00:00Z'));
    await lastBeat('3 days');
    // three real days ago it was three days earlier in the demonstration too, and it has stood there since
    near((await open()).now(), '2026-06-17T12:00:00Z');
    near((await open()).now(), '2026-06-17T12:00:00Z');
  });

  it('counts a short gap as time that went by: another server may have run', async () => {
    const before = await open();
    await before.setTo(new Date('2026-06-20T12:00:00Z'));
    await lastBeat('10 seconds');
    near((await open()).now(), before.now());
  });

  it('is one time for two servers', async () => {
    const [one, other] = [await open(), await open()];
    near(one.now(), other.now());
    await one.setTo(new Date(one.now().getTime() + 5 * HOUR_MS));
    await other.beat();
    near(other.now(), one.now());
  });

  it('is set by one server at a time, and the others can see it', async () => {
    const [one, other] = [await open(), await open()];
    expect(await other.isBeingSet()).toBe(false);
    await one.alone(async () => {
      expect(await other.isBeingSet()).toBe(true);
      await expect(other.alone(() => Promise.resolve())).rejects.toMatchObject({ code: 'conflict' });
    });
    expect(await other.isBeingSet()).toBe(false);
    await expect(other.alone(() => Promise.resolve('free'))).resolves.toBe('free');
  });

  it('is free again after work that failed', async () => {
    const clock = await open();
    await expect(clock.alone(() => Promise.reject(new Error('no')))).rejects.toThrow('no');
    await expect(clock.alone(() => Promise.resolve('free'))).resolves.toBe('free');
  });
});
