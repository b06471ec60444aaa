import { QueryTypes } from 'sequelize';
import { refreshYard } from '@/server/commands/refreshYard';
import type { AppContext } from '@/server/context';

/** How long one run may take before another server takes it over [s]. */
const LEASE_SECONDS = 180;
/** Tries of one day's run before it is given up until the next day. */
export const DAILY_TRIES = 5;
/** Wait after the first failed try [s]; three times as long after each further one. */
const RETRY_SECONDS = 30;

/** done: planned. failed: tried in vain, to be tried again while tries are left. not_mine: done before, or in the hands of another server. */
export type DailyOutcome = 'done' | 'failed' | 'not_mine';

/**
 * The daily run of a yard for a civil day: weather, water budget, plan and reminders. However many servers ask, it is done once; a run whose
 * server went silent is taken over. Not to be called inside a transaction.
 */
export async function runDaily(context: AppContext, { yardId, on }: { yardId: string; on: string }): Promise<DailyOutcome> {
  const [claim] = await context.database.query<{ attempts: number }>(
    `INSERT INTO daily_runs AS d (yard_id, "on", status, claimed_by, lease_until, attempts) VALUES ($1, $2, 'claimed', $3, clock_timestamp() + $4 * interval '1 second', 1)
     ON CONFLICT (yard_id, "on") DO UPDATE SET status = 'claimed', claimed_by = excluded.claimed_by, lease_until = excluded.lease_until, attempts = d.attempts + 1
       WHERE d.status <> 'done' AND d.attempts < $5 AND d.lease_until <= clock_timestamp()
     RETURNING attempts`,
    { bind: [yardId, on, context.serverId, LEASE_SECONDS, DAILY_TRIES], type: QueryTypes.SELECT },
  );
  if (claim === undefined) {
    return 'not_mine';
  }
  try {
    const { weatherAnswered } = await refreshYard(context, yardId, { cause: 'morning', fetchWeather: true });
    if (weatherAnswered) {
      await settle(context, yardId, on, 'done', null, 0);
      return 'done';
    }
    // The plan stands on the weather known so far; the service is asked again later.
    await settle(context, yardId, on, 'failed', 'The weather service gave nothing usable.', waitAfter(claim.attempts));
  } catch (error) {
    context.log.error({ err: error, yardId, on, attempts: claim.attempts }, 'a daily run failed');
    await settle(context, yardId, on, 'failed', error instanceof Error ? error.message : String(error), waitAfter(claim.attempts));
  }
  return 'failed';
}

const waitAfter = (attempts: number): number => RETRY_SECONDS * 3 ** (attempts - 1);

async function settle(context: AppContext, yardId: string, on: string, status: 'done' | 'failed', message: string | null, waitSeconds: number): Promise<void> {
  await context.database.query(
    `UPDATE daily_runs SET status = $4, last_error = $5, lease_until = clock_timestamp() + $6 * interval '1 second', finished_at = $7
     WHERE yard_id = $1 AND "on" = $2 AND claimed_by = $3 AND status = 'claimed'`,
    { bind: [yardId, on, context.serverId, status, message?.slice(0, 500) ?? null, waitSeconds, context.clock.now()], type: QueryTypes.UPDATE },
  );
}
