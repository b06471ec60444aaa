import { QueryTypes } from 'sequelize';
import { planDayReminders } from '@/server/commands/reminders/planDayReminders';
import { PhysicsError } from '@/scheduling/units/physicsError';
import type { AppContext } from '@/server/context';
import { isBehind, lacksWeather, readFreshness, type Freshness } from '@/server/readModels/freshness';
import { civilDayAt } from '@/shared/time';
import { fetchWeather } from './fetchWeather';
import { lockYard, type LockedYard } from './lockYard';
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

/**
 * Brings a yard up to date: weather when asked for, outside of any transaction since the service may take its time; then, one server at a time and in
 * one transaction, the water budget, the plan and today's reminders. Not to be called inside a transaction.
 */
export async function refreshYard(context: AppContext, yardId: string, options: RefreshOptions): Promise<RefreshOutcome> {
  const found = await readFreshness(context.database, yardId);
  const needsWeather = options.fetchWeather === true || (found !== null && lacksWeather(found, context.clock.now()));
  const weatherAnswered = !needsWeather || (await fetchWeather(context, yardId)).answered;
  return { planVersion: await recompute(context, yardId, options.cause, () => true), weatherAnswered };
}

/**
 * Makes sure that a yard's plan rests on today and on its newest facts. A yard that is up to date costs one small query; of two servers that find it
 * behind at the same moment, one does the work and the other waits for it.
 * @returns whether anything was done
 */
export async function ensureFresh(context: AppContext, yardId: string): Promise<boolean> {
  const found = await readFreshness(context.database, yardId);
  if (found === null || !isBehind(found, context.clock.now())) {
    return false;
  }
  if (lacksWeather(found, context.clock.now())) {
    await fetchWeather(context, yardId);
  }
  await recompute(context, yardId, causeOf(found, context.clock.now()), async () => {
    const again = await readFreshness(context.database, yardId);
    return again !== null && isBehind(again, context.clock.now());
  });
  return true;
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
    const version = await budgetAndPlan(context, yard, today, cause);
    if (version === null) {
      return null;
    }
    await context.database.query('UPDATE yards SET budget_stale_from = NULL WHERE id = $1', { bind: [yardId], type: QueryTypes.UPDATE });
    await planDayReminders({ app: context, yardId, now }, yard, today);
    return version;
  });
}

async function budgetAndPlan(context: AppContext, yard: LockedYard, today: string, cause: string): Promise<number | null> {
  try {
    const budget = await recomputeBudget(context, yard, today);
    return budget === null ? null : await makePlan(context, yard, budget, cause);
  } catch (error) {
    // An impossible number here was stored by us: the reader's request is not to blame for it.
    throw error instanceof PhysicsError ? new Error(`yard ${yard.id} cannot be planned: ${error.message}`, { cause: error }) : error;
  }
}
