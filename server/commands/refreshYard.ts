import { QueryTypes } from 'sequelize';
import { planDayReminders } from '@/server/commands/reminders/planDayReminders';
import type { AppContext } from '@/server/context';
import { civilDayAt } from '@/shared/time';
import { fetchWeather } from './fetchWeather';
import { lockYard } from './lockYard';
import { makePlan } from './makePlan';
import { recomputeBudget } from './recomputeBudget';

export interface RefreshOptions {
  /** Why a new plan is made, in a few words: 'morning', 'facts changed', 'asked for'. Stored with the plan. */
  cause: string;
  /** Asks the weather service first. A yard that has no weather is asked for in any case. */
  fetchWeather?: boolean;
}

export interface RefreshOutcome {
  /** Version of the new plan; null when no weather is known at all, or the yard is gone. */
  planVersion: number | null;
  /** False when the weather service was asked and gave nothing usable. */
  weatherAnswered: boolean;
}

/** A yard without weather is not asked for at every read while the service is out [min]. */
const ASK_AGAIN_AFTER_MINUTES = 15;

interface Freshness {
  timeZone: string;
  factsVersion: number;
  budgetStaleFrom: string | null;
  planFactsVersion: number | null;
  planFromOn: string | null;
  weatherAskedAt: Date | null;
  weatherAnsweredAt: Date | null;
}

/**
 * Columns that tell whether a yard's plan still holds, for a query that names the yard `y`. Other read models take them along, so that a fresh
 * yard costs no query of its own.
 */
export const freshnessColumns = `y.time_zone AS "timeZone", y.facts_version AS "factsVersion", y.budget_stale_from::text AS "budgetStaleFrom",
  (SELECT p.facts_version FROM plans p WHERE p.yard_id = y.id ORDER BY p.version DESC LIMIT 1) AS "planFactsVersion",
  (SELECT p.from_on::text FROM plans p WHERE p.yard_id = y.id ORDER BY p.version DESC LIMIT 1) AS "planFromOn",
  (SELECT f.asked_at FROM weather_fetches f WHERE f.yard_id = y.id) AS "weatherAskedAt",
  (SELECT f.answered_at FROM weather_fetches f WHERE f.yard_id = y.id) AS "weatherAnsweredAt"`;

/**
 * Brings a yard up to date: weather when asked for, outside of any transaction since the service may take its time; then, one server at a time and in
 * one transaction, the water budget, the plan and today's reminders. Not to be called inside a transaction.
 */
export async function refreshYard(context: AppContext, yardId: string, options: RefreshOptions): Promise<RefreshOutcome> {
  const needsWeather = options.fetchWeather === true || lacksWeather(await readFreshness(context, yardId), context.clock.now());
  const weatherAnswered = !needsWeather || (await fetchWeather(context, yardId)).answered;
  return { planVersion: await recompute(context, yardId, options.cause, () => true), weatherAnswered };
}

/**
 * Makes sure that a yard's plan rests on today and on its newest facts. A yard that is up to date costs one small query; of two servers that find it
 * behind at the same moment, one does the work and the other waits for it.
 * @returns whether anything was done
 */
export async function ensureFresh(context: AppContext, yardId: string): Promise<boolean> {
  const found = await readFreshness(context, yardId);
  if (found === null || !isBehind(found, context.clock.now())) {
    return false;
  }
  if (lacksWeather(found, context.clock.now())) {
    await fetchWeather(context, yardId);
  }
  await recompute(context, yardId, causeOf(found, context.clock.now()), async () => {
    const again = await readFreshness(context, yardId);
    return again !== null && isBehind(again, context.clock.now());
  });
  return true;
}

async function readFreshness(context: AppContext, yardId: string): Promise<Freshness | null> {
  const [row] = await context.database.query<Freshness>(`SELECT ${freshnessColumns} FROM yards y WHERE y.id = $1`, { bind: [yardId], type: QueryTypes.SELECT });
  return row ?? null;
}

/** True when the service never answered and was not asked just now. */
function lacksWeather(found: Freshness | null, now: Date): boolean {
  return found !== null && found.weatherAnsweredAt === null
    && (found.weatherAskedAt === null || now.getTime() - found.weatherAskedAt.getTime() >= ASK_AGAIN_AFTER_MINUTES * 60_000);
}

/** Whether plan or budget are behind the day, the facts or the weather, and something can be done about it. */
export function isBehind(found: Freshness, now: Date): boolean {
  if (found.weatherAnsweredAt === null) {
    return lacksWeather(found, now);
  }
  return found.planFactsVersion === null || found.planFromOn === null || found.planFactsVersion < found.factsVersion
    || found.planFromOn < civilDayAt(now, found.timeZone) || found.budgetStaleFrom !== null;
}

function causeOf(found: Freshness, now: Date): string {
  if (found.planFromOn === null) {
    return 'first plan';
  }
  return found.planFromOn < civilDayAt(now, found.timeZone) ? 'new day' : 'facts changed';
}

async function recompute(context: AppContext, yardId: string, cause: string, isNeeded: () => boolean | Promise<boolean>): Promise<number | null> {
  return context.database.transaction(async () => {
    const yard = await lockYard(context.database, yardId);
    if (yard === null || !(await isNeeded())) {
      return null;
    }
    const now = context.clock.now();
    const today = civilDayAt(now, yard.timeZone);
    const budget = await recomputeBudget(context, yard, today);
    if (budget === null) {
      return null;
    }
    const version = await makePlan(context, yard, budget, cause);
    await context.database.query('UPDATE yards SET budget_stale_from = NULL WHERE id = $1', { bind: [yardId], type: QueryTypes.UPDATE });
    await planDayReminders({ app: context, yardId, now }, yard, today);
    return version;
  });
}
