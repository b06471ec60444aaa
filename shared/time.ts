import { TZDateMini as TZDate } from '@date-fns/tz/date/mini';

/** Civil day 'YYYY-MM-DD' of an instant in an IANA time zone. */
export function civilDayAt(instant: Date, timeZone: string): string {
  const local = new TZDate(instant.getTime(), timeZone);
  const pad = (value: number, width: number) => String(value).padStart(width, '0');
  return `${pad(local.getFullYear(), 4)}-${pad(local.getMonth() + 1, 2)}-${pad(local.getDate(), 2)}`;
}

/** Wall-clock minutes after local midnight [min] of an instant in an IANA time zone, 0 to 1439. */
export function minutesAt(instant: Date, timeZone: string): number {
  const local = new TZDate(instant.getTime(), timeZone);
  return local.getHours() * 60 + local.getMinutes();
}

/**
 * The instant at which clocks in the time zone show the given civil day and minutes after midnight.
 * A wall time skipped in spring resolves to the moment after the gap; a repeated one in autumn to its first passing.
 */
export function instantAt(on: string, minutes: number, timeZone: string): Date {
  const [year = 0, month = 1, day = 1] = on.split('-').map(Number);
  const local = new TZDate(year, month - 1, day, Math.floor(minutes / 60), Math.round(minutes % 60), 0, 0, timeZone);
  return new Date(local.getTime());
}

/** True when the runtime knows the IANA time zone. */
export function isTimeZone(timeZone: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone });
    return true;
  } catch {
    return false;
  }
}
