import type { ZoneSunResponse } from '@/shared/contracts/ground';
import { formatNumber } from '@/shared/display';

export const monthNames = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'] as const;

/** The screen's answer: how much sun in the brightest and the darkest month. */
export function sunHeadline({ zoneName, months }: ZoneSunResponse): string {
  const most = months.reduce((best, month) => (month.directSunHours > best.directSunHours ? month : best), months[0] ?? { month: 6, directSunHours: 0 });
  const least = months.reduce((best, month) => (month.directSunHours < best.directSunHours ? month : best), months[0] ?? { month: 12, directSunHours: 0 });
  const hours = (value: number) => (value < 0.25 ? 'none' : `${formatNumber(value, value < 9.95 ? 1 : 0).replace(/\.0$/, '')} h`);
  return `${zoneName}: ${hours(most.directSunHours)} of sun a day in ${monthNames[most.month - 1] ?? ''}, ${hours(least.directSunHours)} in ${monthNames[least.month - 1] ?? ''}.`;
}

/** Hours of the clock that have any daylight, from the minutes of sunrise and sunset; all of them where the sun does not set. */
export function daylightHoursOf(sunriseMinutes: number | null, sunsetMinutes: number | null): number[] {
  if (sunriseMinutes === null || sunsetMinutes === null) {
    return Array.from({ length: 24 }, (_, hour) => hour);
  }
  return Array.from({ length: 24 }, (_, hour) => hour).filter((hour) => (hour + 1) * 60 > sunriseMinutes && hour * 60 < sunsetMinutes);
}
