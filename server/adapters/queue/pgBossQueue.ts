import { Client } from 'pg';
import PgBoss from 'pg-boss';
import type { Logger } from 'pino';
import { jobNames, type JobPayloads, type Queue } from './queue';

const LOCK_KEY = 727_002;
/** A worker that was killed gives its job back after this long [s]. Longer than any job may take. */
const EXPIRE_SECONDS = 120;
const RETRY = { retryLimit: 3, retryDelay: 5, retryBackoff: true, expireInSeconds: EXPIRE_SECONDS, retentionHours: 24 };
const BATCH = 20;
/** Jobs of one name that one process does at the same time; below the size of its database pool. */
const AT_ONCE = 4;

/** The queue on pg-boss, in a schema of its own beside the tables. */
export function createPgBossQueue(options: { databaseUrl: string; log: Logger; pollingSeconds: number }): Queue {
  const { databaseUrl, log } = options;
  const boss = new PgBoss({
    connectionString: databaseUrl, application_name: 'dapple jobs', schema: 'jobs', max: 4, schedule: false,
    maintenanceIntervalSeconds: 30, archiveCompletedAfterSeconds: 3_600, deleteAfterDays: 7,
  });
  boss.on('error', (error) => log.error({ err: error }, 'job queue'));
  let starting: Promise<void> | null = null;
  const start = (): Promise<void> => {
    starting ??= startUnderLock(databaseUrl, boss);
    return starting;
  };
  return {
    start,
    async enqueue(name, payload, key) {
      await start();
      await boss.send(name, payload, { ...RETRY, singletonKey: key });
    },
    async work(name, handler) {
      await start();
      await boss.work<JobPayloads[typeof name]>(name, { batchSize: BATCH, pollingIntervalSeconds: options.pollingSeconds }, async (jobs) => {
        await eachAtOnce(jobs, AT_ONCE, async (job) => {
          try {
            await handler(job.data);
          } catch (error) {
            // Only this job is tried again: the rest of the batch is done.
            log.warn({ err: error, job: name }, 'a job failed and will be tried again');
            await boss.fail(name, job.id, { message: error instanceof Error ? error.message : String(error) });
          }
        });
      });
    },
    async stop() {
      if (starting !== null) {
        await starting.catch(() => undefined);
        await boss.stop({ graceful: true, timeout: 3_000, close: true, wait: true });
      }
    },
  };
}

/** Two servers that make the queues at the same moment would deadlock in the database; they take turns instead. */
async function startUnderLock(databaseUrl: string, boss: PgBoss): Promise<void> {
  const client = new Client({ connectionString: databaseUrl, application_name: 'dapple jobs lock' });
  await client.connect();
  try {
    await client.query('SELECT pg_advisory_lock($1)', [LOCK_KEY]);
    await boss.start();
    const existing = new Set((await boss.getQueues()).map((queue) => queue.name));
    for (const name of jobNames) {
      if (!existing.has(name)) {
        // short: at most one waiting job for a key
        await boss.createQueue(name, { name, policy: 'short', ...RETRY });
      }
    }
  } finally {
    await client.end();
  }
}

async function eachAtOnce<T>(items: readonly T[], width: number, work: (item: T) => Promise<void>): Promise<void> {
  let next = 0;
  const lane = async () => {
    for (let item = items[next++]; item !== undefined; item = items[next++]) {
      await work(item);
    }
  };
  await Promise.all(Array.from({ length: Math.min(width, items.length) }, lane));
}
