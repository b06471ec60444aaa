import { QueryTypes, type Sequelize } from 'sequelize';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import { invalidField, notFound } from '@/server/errors';
import { limits } from '@/shared/limits';
import { civilDayAt } from '@/shared/time';

/** Days before today that are shown when nobody asks for others. */
const DAYS_BACK = 30;
/** Days after today that are shown when nobody asks for others: as far as any forecast goes. */
const DAYS_AHEAD = 16;

/** Civil days at a yard, both ends included. */
export interface DayWindow {
  today: string;
  fromOn: string;
  toOn: string;
}

/**
 * The days that a read of a yard shows: those asked for, otherwise the last thirty and the forecast.
 * @throws AppError not_found for a yard that is gone, invalid_input when the days run backwards or are too many
 */
export async function dayWindow(database: Sequelize, yardId: string, now: Date, asked: { from?: string | undefined; to?: string | undefined } = {}): Promise<DayWindow> {
  const [yard] = await database.query<{ timeZone: string }>('SELECT time_zone AS "timeZone" FROM yards WHERE id = $1', { bind: [yardId], type: QueryTypes.SELECT });
  if (!yard) {
    throw notFound('yard');
  }
  const today = civilDayAt(now, yard.timeZone);
  const toOn = asked.to ?? addDays(today, DAYS_AHEAD);
  const fromOn = asked.from ?? addDays(toOn < today ? toOn : today, -DAYS_BACK);
  if (toOn < fromOn) {
    throw invalidField('to', 'The last day comes after the first.');
  }
  if (daysBetween(fromOn, toOn) >= limits.budgetDaysMax) {
    throw invalidField('from', `Ask for ${limits.budgetDaysMax} days at most.`);
  }
  return { today, fromOn, toOn };
}
