import { formatCivilDay, formatClock, type DisplayUnits } from './display';
import { civilDayAt, minutesAt } from './time';

/** An instant as a person in the yard reads it: 'Sat 13 Jun, 5:50 am'. */
export function instantText(instant: string | Date, timeZone: string, units: DisplayUnits): string {
  const at = new Date(instant);
  return `${formatCivilDay(civilDayAt(at, timeZone), 'short')}, ${formatClock(minutesAt(at, timeZone), units)}`;
}
