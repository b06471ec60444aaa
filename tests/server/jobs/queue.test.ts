import { QueryTypes } from 'sequelize';
import { createPgBossQueue } from '@/server/adapters/queue/pgBossQueue';
import type { Queue } from '@/server/adapters/queue/queue';
import { startJobs } from '@/server/jobs/startJobs';
import { DailyRun, Plan } from '@/server/models';
import { wateredYard } from '../../factories/wateredYard';
import { dryWeather } from '../../setup/switchableWeather';
import { testContext, type TestContext } from '../../setup/testContext';

jest.setTimeout(40_000);

async function until(what: () => Promise<boolean> | boolean, patienceMs = 20_000): Promise<void> {
  for (let waited = 0; !(await what()); waited += 50) {
    if (waited > patienceMs) {
      throw new Error('It did not happen in time.');
    }
    await new Promise((resolve) => { setTimeout(resolve, 50); });
  }
}

describe('the job queue', () => {
  let test: TestContext;
  const queues: Queue[] = [];
  const open = () => {
    const queue = createPgBossQueue({ databaseUrl: test.context.env.DATABASE_URL, log: test.context.log, pollingSeconds: 0.5 });
    queues.push(queue);
    return queue;
  };
  beforeAll(async () => { test = await testContext({ demonstration: true }); });
  afterAll(async () => {
    await Promise.all(queues.map((queue) => queue.stop()));
    await test.close();
  });
  const jobs = () => test.context.database.query<{ state: string; key: string; attempts: number }>(
    `SELECT state::text AS state, singleton_key AS key, retry_count AS attempts FROM jobs.job WHERE name = 'reminder' ORDER BY created_on`, { type: QueryTypes.SELECT },
  );

  it('is made by two servers that start at the same moment, holds a key once, and shares its jobs out', async () => {
    const [one, other] = [open(), open()];
    await Promise.all([one.start(), other.start()]);
    await Promise.all([one, other, one].map((queue) => queue.enqueue('reminder', { reminderId: 'a' }, 'a')));
    await one.enqueue('reminder', { reminderId: 'b' }, 'b');
    expect((await jobs()).map((job) => job.key).sort()).toEqual(['a', 'b']);
    const done: string[] = [];
    const take = async ({ reminderId }: { reminderId: string }) => {
      await Promise.resolve();
      done.push(reminderId);
    };
    await Promise.all([one.work('reminder', take), other.work('reminder', take)]);
    await until(() => done.length === 2);
    await until(async () => (await jobs()).every((job) => job.state === 'completed'));
    expect(done.sort()).toEqual(['a', 'b']);
  });

  it('tries a failed job again without holding up the others of its batch', async () => {
    const [queue] = queues;
    const seen: string[] = [];
    await queue!.work('refresh', ({ yardId }) => {
      seen.push(yardId);
      return yardId === 'bad' ? Promise.reject(new Error('not this time')) : Promise.resolve();
    });
    await queue!.enqueue('refresh', { yardId: 'bad' }, 'bad');
    await queue!.enqueue('refresh', { yardId: 'good' }, 'good');
    const states = () => test.context.database.query<{ key: string; state: string }>(
      `SELECT singleton_key AS key, state::text AS state FROM jobs.job WHERE name = 'refresh' ORDER BY singleton_key`, { type: QueryTypes.SELECT },
    );
    await until(async () => (await states()).every((job) => job.state === 'completed' || job.state === 'retry'));
    expect(await states()).toEqual([{ key: 'bad', state: 'retry' }, { key: 'good', state: 'completed' }]);
    expect(seen.sort()).toEqual(['bad', 'good']);
  });
});

describe('a server with its ticks', () => {
  it('plans the day and sends the morning’s mail with nobody asking', async () => {
    const weather = dryWeather();
    const test = await testContext({ demonstration: true, now: '2026-06-13T07:00:00.000Z', weather });
    try {
      const yard = await wateredYard(test, { zones: [{ soil: 'sand', createdAt: '2026-05-20T12:00:00Z' }] });
      const stop = await startJobs(test.context);
      await until(async () => (await DailyRun.count({ where: { yardId: yard.id, status: 'done' } })) === 1);
      expect(await Plan.count({ where: { yardId: yard.id } })).toBe(1);
      test.clock.set('2026-06-13T09:30:00.000Z');
      await until(async () => (await test.mails()).length > 0);
      await stop();
      expect(await test.mails()).toHaveLength(1);
    } finally {
      await test.close();
      await weather.close();
    }
  });
});
