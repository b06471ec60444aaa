import { Client } from 'pg';
import { QueryTypes, type Sequelize } from 'sequelize';
import { AppError } from '@/server/errors';
import { demonstrationStart, demonstrationTimeZone } from '@/shared/contracts/demonstration';
import { instantAt } from '@/shared/time';
import type { SettableClock } from './clock';

/** Without a beat for this long no server is taken to run, and the time is taken to have stood still [ms]. */
const PAUSED_AFTER_MS = 15_000;
const LOCK_KEY = 727_003;

/**
 * The demonstration's time: real time plus an offset that every server reads from one row. While nothing runs it stands
 * still, so that after a weekend one finds the yard as one left it.
 * @param databaseUrl - for the connection that holds the lock of a jump, apart from the pool
 */
export async function openDemonstrationClock(database: Sequelize, databaseUrl: string): Promise<SettableClock> {
  let offsetMs = await resume(database);
  let standing: Date | null = null;
  const offsetFor = (instant: Date) => instant.getTime() - Date.now();
  return {
    isDemonstration: true,
    now: () => (standing === null ? new Date(Date.now() + offsetMs) : new Date(standing)),
    standAt(instant) {
      standing = instant;
    },
    async setTo(instant) {
      standing = null;
      offsetMs = offsetFor(instant);
      await database.query('UPDATE demonstration_clock SET offset_ms = $1, last_seen_at = clock_timestamp()', { bind: [offsetMs], type: QueryTypes.UPDATE });
    },
    async beat() {
      const rows = await database.query<{ offsetMs: number }>(
        'UPDATE demonstration_clock SET last_seen_at = clock_timestamp() RETURNING offset_ms AS "offsetMs"', { type: QueryTypes.SELECT },
      );
      offsetMs = rows[0]?.offsetMs ?? offsetMs;
    },
    alone: (work) => withLock(databaseUrl, work),
    isBeingSet: () => isLocked(database),
  };
}

/** Reads the offset, after adding the time in which nothing ran; makes the row at the first start. */
async function resume(database: Sequelize): Promise<number> {
  const startMs = instantAt(demonstrationStart.on, demonstrationStart.minutes, demonstrationTimeZone).getTime();
  return database.transaction(async () => {
    await database.query(
      'INSERT INTO demonstration_clock (offset_ms, last_seen_at) VALUES ($1, clock_timestamp()) ON CONFLICT (only_row) DO NOTHING',
      { bind: [startMs - Date.now()], type: QueryTypes.INSERT },
    );
    const rows = await database.query<{ offsetMs: number }>(
      `UPDATE demonstration_clock SET last_seen_at = clock_timestamp(), offset_ms = offset_ms - CASE
         WHEN clock_timestamp() - last_seen_at > $1 * interval '1 millisecond' THEN 1000 * extract(epoch FROM clock_timestamp() - last_seen_at) ELSE 0 END
       RETURNING offset_ms AS "offsetMs"`,
      { bind: [PAUSED_AFTER_MS], type: QueryTypes.SELECT },
    );
    return rows[0]?.offsetMs ?? startMs - Date.now();
  });
}

/** The lock belongs to a connection of its own, so that it ends with this process however that ends. */
async function withLock<T>(databaseUrl: string, work: () => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: databaseUrl, application_name: 'dapple clock' });
  await client.connect();
  try {
    const { rows } = await client.query<{ mine: boolean }>('SELECT pg_try_advisory_lock($1) AS mine', [LOCK_KEY]);
    if (rows[0]?.mine !== true) {
      throw new AppError('conflict', 'The clock is being moved already. Wait until that has ended.');
    }
    return await work();
  } finally {
    await client.end();
  }
}

async function isLocked(database: Sequelize): Promise<boolean> {
  const rows = await database.query<{ locked: boolean }>(
    `SELECT EXISTS (SELECT FROM pg_locks WHERE locktype = 'advisory' AND objid = $1 AND classid = 0 AND granted
       AND database = (SELECT oid FROM pg_database WHERE datname = current_database())) AS locked`,
    { bind: [LOCK_KEY], type: QueryTypes.SELECT },
  );
  return rows[0]?.locked ?? false;
}
