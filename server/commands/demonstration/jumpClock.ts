import { QueryTypes } from 'sequelize';
import type { AppContext } from '@/server/context';
import { notFound } from '@/server/errors';
import { ensureFresh } from '@/server/commands/refreshYard';
import { dailyRunsDue, nextDailyRunAfter, remindersDue, timeZonesOfYards, yardsBehind } from '@/server/jobs/dueWork';
import { runDaily } from '@/server/jobs/runDaily';
import { sendReminder } from '@/server/jobs/sendReminder';

export interface Happening {
  at: Date;
  what: string;
  yardId: string | null;
}

const HOUR_MS = 3_600_000;
/** Without anything due within this, the next event is this far away [ms]. */
const LOOK_AHEAD_MS = 48 * HOUR_MS;

/**
 * Moves the demonstration's time forward. It stops at every moment at which something is due, does that as the servers would have, and goes on
 * to its end; so a day's jump leaves the same behind as a day gone by. Not to be called inside a transaction.
 * @throws AppError not_found where time is nobody's to set, conflict while another jump is on
 */
export async function jumpClock(context: AppContext, to: 'hour' | 'day' | 'next_event'): Promise<Happening[]> {
  const { settableClock: clock } = context;
  if (clock === null) {
    throw notFound('page of the API');
  }
  return clock.alone(async () => {
    const start = clock.now();
    const happened = await doWhatIsDue(context, start);
    const end = new Date(start.getTime() + (to === 'day' ? 24 * HOUR_MS : to === 'hour' ? HOUR_MS : LOOK_AHEAD_MS));
    let at = start;
    for (let next = await nextMoment(context, at, end); next !== null; next = await nextMoment(context, at, end)) {
      at = next;
      await clock.setTo(at);
      happened.push(...await whatComesByItself(context, at), ...await doWhatIsDue(context, at));
      if (to === 'next_event') {
        return happened;
      }
    }
    await clock.setTo(end);
    return happened;
  });
}

/** The first moment after an instant, and not after the end, at which something is due. */
async function nextMoment(context: AppContext, after: Date, end: Date): Promise<Date | null> {
  const daily = nextDailyRunAfter(after, await timeZonesOfYards(context));
  const [row] = await context.database.query<{ at: Date | null }>(
    `SELECT min(at) AS at FROM (
       SELECT due_at AS at FROM reminders WHERE status = 'waiting' AND due_at > $1
       UNION ALL SELECT ends_at FROM (${RUNNING_SETS}) AS running WHERE ends_at > $1
       UNION ALL SELECT starts_at FROM (${ROUNDS_TO_COME}) AS planned WHERE starts_at > $1) AS moments`,
    { bind: [after], type: QueryTypes.SELECT },
  );
  const times = [daily, row?.at ?? null].flatMap((instant) => (instant === null ? [] : [instant.getTime()]));
  const first = Math.min(...times);
  return first <= end.getTime() ? new Date(first) : null;
}

const RUNNING_SETS = `SELECT s.yard_id, s.position_id, s.started_at + (s.planned_minutes + s.added_minutes) * interval '1 minute' AS ends_at
  FROM round_sets s WHERE s.status = 'running'`;
const ROUNDS_TO_COME = `SELECT s.yard_id, min(s.start_at) AS starts_at FROM plan_sets s
  JOIN (SELECT DISTINCT ON (yard_id) yard_id, id FROM plans ORDER BY yard_id, version DESC) p ON p.yard_id = s.yard_id AND p.id = s.plan_id
  WHERE NOT EXISTS (SELECT FROM round_sets r WHERE r.yard_id = s.yard_id AND r."on" = s."on" AND r.round_index = s.round_index)
  GROUP BY s.yard_id, s."on", s.round_index`;

/** What needs no server: a set's time is over, a round's time has come. */
async function whatComesByItself(context: AppContext, at: Date): Promise<Happening[]> {
  const rows = await context.database.query<{ yardId: string; what: string }>(
    `SELECT y.id AS "yardId", y.name || ': the time of ' || p.name || ' is over.' AS what FROM (${RUNNING_SETS}) r
       JOIN yards y ON y.id = r.yard_id JOIN positions p ON p.yard_id = r.yard_id AND p.id = r.position_id WHERE r.ends_at = $1
     UNION ALL SELECT y.id, y.name || ': a round is to start.' FROM (${ROUNDS_TO_COME}) r JOIN yards y ON y.id = r.yard_id WHERE r.starts_at = $1`,
    { bind: [at], type: QueryTypes.SELECT },
  );
  return rows.map((row) => ({ at, what: row.what, yardId: row.yardId }));
}

/** Does at once what the ticks would have enqueued. */
async function doWhatIsDue(context: AppContext, at: Date): Promise<Happening[]> {
  const happened: Happening[] = [];
  for (const run of await dailyRunsDue(context)) {
    if (await runDaily(context, run) === 'done') {
      happened.push({ at, what: `${await yardName(context, run.yardId)}: the day was planned.`, yardId: run.yardId });
    }
  }
  for (const { yardId } of await yardsBehind(context)) {
    if (await ensureFresh(context, yardId)) {
      happened.push({ at, what: `${await yardName(context, yardId)}: planned anew after a change.`, yardId });
    }
  }
  for (const { reminderId, yardId } of await remindersDue(context)) {
    const sent = await sendReminder(context, reminderId);
    if (sent.outcome === 'sent') {
      happened.push({ at, what: `E-mail to ${sent.name}: ${sent.subject}`, yardId });
    }
  }
  return happened;
}

async function yardName(context: AppContext, yardId: string): Promise<string> {
  const [yard] = await context.database.query<{ name: string }>('SELECT name FROM yards WHERE id = $1', { bind: [yardId], type: QueryTypes.SELECT });
  return yard?.name ?? '';
}
