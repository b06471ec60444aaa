import { QueryTypes } from 'sequelize';
import { addDays } from '@/scheduling/units/civilDay';
import type { AppContext } from '@/server/context';
import { civilDayAt, instantAt, minutesAt } from '@/shared/time';
import { DAILY_TRIES } from './runDaily';

/** The yard's own hour at which its day is planned [min after midnight]: the forecast is fresh, and nobody is up yet. */
export const DAILY_RUN_MINUTES = 3 * 60;
/** More than this is left to the next tick. */
const AT_ONCE = 2_000;

export async function timeZonesOfYards(context: AppContext): Promise<string[]> {
  const rows = await context.database.query<{ timeZone: string }>('SELECT DISTINCT time_zone AS "timeZone" FROM yards ORDER BY 1', { type: QueryTypes.SELECT });
  return rows.map((row) => row.timeZone);
}

/** Yards whose day has begun by their own clocks and is not planned yet, with that day. */
export async function dailyRunsDue(context: AppContext): Promise<{ yardId: string; on: string }[]> {
  const now = context.clock.now();
  const begun = (await timeZonesOfYards(context)).filter((timeZone) => minutesAt(now, timeZone) >= DAILY_RUN_MINUTES);
  if (begun.length === 0) {
    return [];
  }
  return context.database.query<{ yardId: string; on: string }>(
    `SELECT y.id AS "yardId", z."on"::text AS "on" FROM unnest($1::text[], $2::date[]) AS z(time_zone, "on") JOIN yards y ON y.time_zone = z.time_zone
     LEFT JOIN daily_runs d ON d.yard_id = y.id AND d."on" = z."on"
     WHERE d.yard_id IS NULL OR (d.status <> 'done' AND d.attempts < $3 AND d.lease_until <= clock_timestamp())
     ORDER BY y.id LIMIT ${AT_ONCE}`,
    { bind: [begun, begun.map((timeZone) => civilDayAt(now, timeZone)), DAILY_TRIES], type: QueryTypes.SELECT },
  );
}

/** Yards whose facts are newer than their plan. */
export async function yardsBehind(context: AppContext): Promise<{ yardId: string }[]> {
  return context.database.query<{ yardId: string }>(
    `SELECT y.id AS "yardId" FROM yards y JOIN weather_fetches f ON f.yard_id = y.id AND f.answered_at IS NOT NULL
     WHERE y.budget_stale_from IS NOT NULL OR y.facts_version > COALESCE((SELECT p.facts_version FROM plans p WHERE p.yard_id = y.id ORDER BY p.version DESC LIMIT 1), -1)
     ORDER BY y.id LIMIT ${AT_ONCE}`,
    { type: QueryTypes.SELECT },
  );
}

/** Reminders whose time has come and that no server holds, the earliest first. */
export async function remindersDue(context: AppContext): Promise<{ reminderId: string; yardId: string; dueAt: Date }[]> {
  return context.database.query<{ reminderId: string; yardId: string; dueAt: Date }>(
    `SELECT id AS "reminderId", yard_id AS "yardId", due_at AS "dueAt" FROM reminders
     WHERE status IN ('waiting', 'claimed') AND due_at <= $1 AND (lease_until IS NULL OR lease_until <= clock_timestamp()) ORDER BY due_at, id LIMIT ${AT_ONCE}`,
    { bind: [context.clock.now()], type: QueryTypes.SELECT },
  );
}

/** The next daily run after an instant in any of the zones; null without zones. */
export function nextDailyRunAfter(after: Date, timeZones: readonly string[]): Date | null {
  const times = timeZones.map((timeZone) => {
    const on = civilDayAt(after, timeZone);
    const today = instantAt(on, DAILY_RUN_MINUTES, timeZone);
    return (today > after ? today : instantAt(addDays(on, 1), DAILY_RUN_MINUTES, timeZone)).getTime();
  });
  return times.length === 0 ? null : new Date(Math.min(...times));
}
