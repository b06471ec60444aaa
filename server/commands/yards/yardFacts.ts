import { QueryTypes, type Model, type ModelStatic, type Sequelize, type WhereOptions } from 'sequelize';
import { addDays } from '@/scheduling/units/civilDay';
import { AppError, notFound } from '@/server/errors';
import { Yard } from '@/server/models';
import { limits } from '@/shared/limits';
import { civilDayAt } from '@/shared/time';

/** What every change of a yard's facts is told. */
export interface FactChange {
  database: Sequelize;
  yardId: string;
  userId: string;
  now: Date;
}

/**
 * Holds the yard until the end of the transaction, so that changes of its facts come one after the other: limits hold, no change is lost
 * to one made at the same moment, and none waits for another in a circle.
 */
export async function holdYard({ database, yardId }: Pick<FactChange, 'database' | 'yardId'>): Promise<Yard> {
  await database.query('SELECT 1 FROM yards WHERE id = $1 FOR NO KEY UPDATE', { bind: [yardId], type: QueryTypes.SELECT });
  const yard = await Yard.findByPk(yardId);
  if (!yard) {
    throw notFound('yard');
  }
  return yard;
}

/** Civil day at the yard. */
export function todayAt(yard: Pick<Yard, 'timeZone'>, now: Date): string {
  return civilDayAt(now, yard.timeZone);
}

/** The earliest day whose fact is still told to the budget. */
export function earliestFactOn(yard: Pick<Yard, 'timeZone'>, now: Date): string {
  return addDays(todayAt(yard, now), -limits.factDaysBack);
}

/** @throws AppError limit_reached when the yard has as many as it may have */
export async function refuseMoreThan<M extends Model>(model: ModelStatic<M>, where: WhereOptions, limit: number, things: string): Promise<void> {
  if (await model.count({ where }) >= limit) {
    throw new AppError('limit_reached', `That would be more than ${limit} ${things}.`);
  }
}

/** "A", "A and B", "A, B and C". */
export function listOf(names: readonly string[]): string {
  return names.length < 2 ? (names[0] ?? '') : `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;
}

/** Fields of the change that differ from the row, with what they were and are: what the trail tells. */
export function changesOf(before: Record<string, unknown>, change: Record<string, unknown>): Record<string, { before: unknown; after: unknown }> {
  return Object.fromEntries(Object.entries(change)
    .filter(([field, after]) => after !== undefined && JSON.stringify(before[field]) !== JSON.stringify(after))
    .map(([field, after]) => [field, { before: before[field] ?? null, after }]));
}
