import type { FactChange } from '@/server/commands/yards/yardFacts';
import { notFound } from '@/server/errors';
import type { YardRow } from '@/server/readModels/readYard';
import { civilDaySchema, idSchema } from '@/shared/contracts/common';
import { z } from '@/shared/zod';
import type { RequestContext } from './route';

// What the paths of a yard carry.
export const yardPath = z.object({ yardId: idSchema });
export const rulePath = yardPath.extend({ ruleId: idSchema });
export const permitPath = yardPath.extend({ permitId: idSchema });
export const tapPath = yardPath.extend({ tapId: idSchema });
export const hosePath = yardPath.extend({ hoseId: idSchema });
export const sprinklerPath = yardPath.extend({ sprinklerId: idSchema });
export const zonePath = yardPath.extend({ zoneId: idSchema });
export const positionPath = yardPath.extend({ positionId: idSchema });
export const bucketTestPath = tapPath.extend({ testId: idSchema });
export const catchTestPath = positionPath.extend({ testId: idSchema });
export const zoneDayPath = zonePath.extend({ on: civilDaySchema });
export const dayPath = yardPath.extend({ on: civilDaySchema });

export const done = { done: true as const };

/** Who changes which yard when, for the commands. */
export function changeOf({ app, yardId, user, now }: Pick<RequestContext<unknown, unknown, unknown>, 'app' | 'yardId' | 'user' | 'now'>): FactChange {
  return { database: app.database, yardId, userId: user.id, now };
}

/** @throws AppError not_found when the yard went away in the meantime */
export function present<T>(yard: YardRow | null, show: (yard: YardRow) => T | undefined, what = 'yard'): T {
  const shown = yard === null ? undefined : show(yard);
  if (shown === undefined) {
    throw notFound(what);
  }
  return shown;
}
