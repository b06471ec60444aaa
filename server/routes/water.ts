import { ensureFresh, refreshYard } from '@/server/commands/refreshYard';
import type { AppContext } from '@/server/context';
import { AppError, notFound } from '@/server/errors';
import { presentPlan } from '@/server/presenters/plan';
import { presentSeason } from '@/server/presenters/season';
import { presentToday } from '@/server/presenters/today';
import { presentBudget, presentWeather } from '@/server/presenters/water';
import { dayWindow } from '@/server/readModels/dayWindow';
import { isBehind } from '@/server/readModels/freshness';
import { readBudget } from '@/server/readModels/readBudget';
import { readPlan } from '@/server/readModels/readPlan';
import { readToday } from '@/server/readModels/readToday';
import { readSeason } from '@/server/readModels/season';
import { readWeather } from '@/server/readModels/readWeather';
import { planResponseSchema, type PlanResponse } from '@/shared/contracts/plans';
import { todayResponseSchema } from '@/shared/contracts/rounds';
import { seasonResponseSchema } from '@/shared/contracts/season';
import { budgetQuerySchema, budgetResponseSchema, weatherResponseSchema } from '@/shared/contracts/water';
import { defineRoute } from './route';
import { yardPath } from './yardPaths';

const tag = 'Water';
const mayRead = { yard: 'plan.read' } as const;

/** @throws AppError weather_unavailable when no plan can be made because no weather is known */
async function newestPlan(app: AppContext, yardId: string): Promise<PlanResponse> {
  const plan = await readPlan(app.database, yardId);
  if (plan === null) {
    throw new AppError('weather_unavailable', 'No weather is known for this place yet, so there is no plan. Dapple asks again by itself.');
  }
  return presentPlan(plan);
}

export const waterRoutes = [
  defineRoute({
    method: 'get', path: '/yards/:yardId/today', tag, summary: 'What to do today: rounds, zones without water and why, weather, how dry each zone is.',
    access: mayRead, params: yardPath, response: todayResponseSchema,
    handler: async ({ app, yardId, now }) => {
      const row = await readToday(app.database, yardId, now);
      if (row === null) {
        throw notFound('yard');
      }
      if (!isBehind(row, now)) {
        return presentToday(row, now);
      }
      await ensureFresh(app, yardId);
      return presentToday(await readToday(app.database, yardId, now) ?? row, now);
    },
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/plan', tag, summary: 'The ten days of the newest plan, with a reason for every set and every zone without one.',
    access: mayRead, params: yardPath, response: planResponseSchema,
    handler: async ({ app, yardId }) => {
      await ensureFresh(app, yardId);
      return newestPlan(app, yardId);
    },
  }),
  defineRoute({
    method: 'post', path: '/yards/:yardId/plan', tag, summary: 'Asks for the weather and plans anew, now.',
    access: { yard: 'plan.recompute' }, params: yardPath, response: planResponseSchema, transaction: false,
    handler: async ({ app, yardId }) => {
      await refreshYard(app, yardId, { cause: 'asked for', fetchWeather: true });
      return newestPlan(app, yardId);
    },
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/budget', tag, summary: 'The water budget of every zone by day; forecast days show what happens if nobody waters.',
    access: mayRead, params: yardPath, query: budgetQuerySchema, response: budgetResponseSchema,
    handler: async ({ app, yardId, now, query }) => {
      await ensureFresh(app, yardId);
      const { today, fromOn, toOn } = await dayWindow(app.database, yardId, now, query);
      return presentBudget(await readBudget(app.database, yardId, fromOn, toOn), today);
    },
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/season', tag, summary: 'When to sow, when a weed preventer has its time, when the first freeze is to be expected.',
    access: mayRead, params: yardPath, response: seasonResponseSchema,
    handler: async ({ app, yardId, now }) => presentSeason(await readSeason(app, yardId, now)),
  }),
  defineRoute({
    method: 'get', path: '/yards/:yardId/weather', tag, summary: 'Recent and forecast weather of the yard, where it comes from and from when it is.',
    access: mayRead, params: yardPath, response: weatherResponseSchema,
    handler: async ({ app, yardId, now }) => {
      await ensureFresh(app, yardId);
      const { fromOn } = await dayWindow(app.database, yardId, now);
      const row = await readWeather(app.database, yardId, fromOn);
      if (row === null) {
        throw notFound('yard');
      }
      return presentWeather(row, now);
    },
  }),
];
