import { PhysicsError } from './physicsError';

/** A calendar day 'YYYY-MM-DD' of the yard, without hour or time zone. Years 0001 to 9999, Gregorian throughout. */
export type CivilDay = string;

const MONTH_LENGTHS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;
const DAYS_BEFORE_MONTH = [0, 31, 59, 90, 120, 151, 181, 212, 243, 273, 304, 334] as const;
const DAYS_PER_ERA = 146097;
const HYPHEN = 45;

/** The numbers inside a civil day: month 1-12, day of the month 1-31. */
export interface CivilDayParts {
  year: number;
  month: number;
  day: number;
}

/** True in a Gregorian leap year. */
export function isLeapYear(year: number): boolean {
  return (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
}

/** Number of days in a month. @param month - 1 to 12 @returns [d], 0 for a month that does not exist */
export function daysInMonth(year: number, month: number): number {
  if (month === 2 && isLeapYear(year)) return 29;
  return MONTH_LENGTHS[month - 1] ?? 0;
}

/** Number written in the digits [from, until) of a text, NaN for anything else. Ten times as fast as a pattern, and every day of weather asks. */
function digits(text: string, from: number, until: number): number {
  let value = 0;
  for (let i = from; i < until; i += 1) {
    const digit = text.charCodeAt(i) - 48;
    if (!(digit >= 0 && digit <= 9)) return Number.NaN;
    value = value * 10 + digit;
  }
  return value;
}

function partsOrNull(value: unknown): CivilDayParts | null {
  if (typeof value !== 'string' || value.length !== 10 || value[4] !== '-' || value[7] !== '-') return null;
  const year = digits(value, 0, 4);
  const month = digits(value, 5, 7);
  const day = digits(value, 8, 10);
  if (!(year >= 1 && day >= 1 && day <= daysInMonth(year, month))) return null;
  return { year, month, day };
}

/** True for a 'YYYY-MM-DD' that is a real day: February 30 is not. */
export function isCivilDay(value: unknown): value is CivilDay {
  return partsOrNull(value) !== null;
}

/**
 * Takes a civil day apart.
 * @param on - the day
 * @param field - name used in the error
 * @throws PhysicsError when it is no real day
 */
export function civilDayParts(on: CivilDay, field = 'on'): CivilDayParts {
  const parts = partsOrNull(on);
  if (!parts) throw new PhysicsError(field, on, 'must be a real day written YYYY-MM-DD');
  return parts;
}

/** Writes a civil day from its numbers. @throws PhysicsError when there is no such day */
export function civilDayOf({ year, month, day }: CivilDayParts): CivilDay {
  const text = `${String(year).padStart(4, '0')}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`;
  civilDayParts(text);
  return text;
}

/**
 * Days since 1970-01-01, by integer arithmetic on 400-year cycles of years that begin in March.
 * @returns whole days [d], negative before 1970
 * @throws PhysicsError when it is no real day
 */
export function epochDayOf(on: CivilDay): number {
  const { year, month, day } = civilDayParts(on);
  const shiftedYear = month <= 2 ? year - 1 : year;
  const era = Math.floor(shiftedYear / 400);
  const yearOfEra = shiftedYear - era * 400;
  const monthFromMarch = (month + 9) % 12;
  const dayOfShiftedYear = Math.floor((153 * monthFromMarch + 2) / 5) + day - 1;
  const dayOfEra = yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfShiftedYear;
  return era * DAYS_PER_ERA + dayOfEra - 719468;
}

/** The civil day of a count of days since 1970-01-01. @throws PhysicsError outside years 1 to 9999 or for a fraction */
export function civilDayFromEpochDay(epochDay: number): CivilDay {
  if (!Number.isInteger(epochDay)) throw new PhysicsError('epochDay', epochDay, 'must be a whole number of days');
  const shifted = epochDay + 719468;
  const era = Math.floor(shifted / DAYS_PER_ERA);
  const dayOfEra = shifted - era * DAYS_PER_ERA;
  const yearOfEra = Math.floor((dayOfEra - Math.floor(dayOfEra / 1460) + Math.floor(dayOfEra / 36524) - Math.floor(dayOfEra / 146096)) / 365);
  const dayOfShiftedYear = dayOfEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const monthFromMarch = Math.floor((5 * dayOfShiftedYear + 2) / 153);
  const day = dayOfShiftedYear - Math.floor((153 * monthFromMarch + 2) / 5) + 1;
  const month = monthFromMarch < 10 ? monthFromMarch + 3 : monthFromMarch - 9;
  return civilDayOf({ year: yearOfEra + era * 400 + (month <= 2 ? 1 : 0), month, day });
}

/** The day a whole number of days later (earlier when negative). @throws PhysicsError for an unreal day or a fraction of a day */
export function addDays(on: CivilDay, days: number): CivilDay {
  if (!Number.isInteger(days)) throw new PhysicsError('days', days, 'must be a whole number of days');
  return civilDayFromEpochDay(epochDayOf(on) + days);
}

/** Days from one civil day to another [d]: 1 from today to tomorrow, negative backwards. */
export function daysBetween(from: CivilDay, to: CivilDay): number {
  return epochDayOf(to) - epochDayOf(from);
}

/** Day number in its year J, 1 on January 1, 365 or 366 on December 31. @throws PhysicsError when it is no real day */
export function dayOfYear(on: CivilDay): number {
  // Read without taking the day apart into an object: every day of weather asks.
  if (typeof on === 'string' && on.length === 10 && on.charCodeAt(4) === HYPHEN && on.charCodeAt(7) === HYPHEN) {
    const year = digits(on, 0, 4);
    const month = digits(on, 5, 7);
    const day = digits(on, 8, 10);
    if (year >= 1 && day >= 1 && day <= daysInMonth(year, month)) return (DAYS_BEFORE_MONTH[month - 1] ?? 0) + day + (month > 2 && isLeapYear(year) ? 1 : 0);
  }
  throw new PhysicsError('on', on, 'must be a real day written YYYY-MM-DD');
}

/** Weekday, 0 for Sunday to 6 for Saturday. */
export function weekdayOf(on: CivilDay): number {
  return (((epochDayOf(on) + 4) % 7) + 7) % 7;
}

/** The days from `from` up to but not including `until`, in order. */
export function civilDaysFrom(from: CivilDay, until: CivilDay): CivilDay[] {
  const first = epochDayOf(from);
  const count = Math.max(0, epochDayOf(until) - first);
  return Array.from({ length: count }, (_, index) => civilDayFromEpochDay(first + index));
}
