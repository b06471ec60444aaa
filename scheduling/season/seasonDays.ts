import { addDays, civilDayOf, civilDayParts, civilDaysFrom, dayOfYear, daysInMonth, PhysicsError, requireRange, type CivilDay } from '@/scheduling/units';
import { soilTemperaturesC, type DailyWeather } from '@/scheduling/weather';
import { temperaturesOfDays } from '@/scheduling/weather/continuousDays';

/** One day as the season sees it. */
export interface SeasonDay {
  on: CivilDay;
  tminC: number;
  tmaxC: number;
  /** Daily mean of the soil at 10 cm [°C]. */
  soilC: number;
}

/** First day of the half-year in which it grows colder: July 1 in the north, January 1 in the south. */
export function coolingSeasonStartOn(latitudeDeg: number, year: number): CivilDay {
  requireRange('latitudeDeg', latitudeDeg, -90, 90);
  return civilDayOf({ year, month: latitudeDeg >= 0 ? 7 : 1, day: 1 });
}

/** First day of the half-year in which it grows warmer: January 1 in the north, July 1 in the south. */
export function warmingSeasonStartOn(latitudeDeg: number, year: number): CivilDay {
  return coolingSeasonStartOn(-latitudeDeg || -1e-9, year);
}

/**
 * Days of weather with the temperature of the soil; days without temperatures take those of the days near them.
 * @param leafAreaIndex - 0 for bare ground and thin lawn, 2 to 3 for dense grass, which warms later
 * @throws PhysicsError when days do not follow each other, or no day has temperatures
 * Source: soil temperature after Zheng, Hunt, Running 1993, with a standard error of 1.5 to 2.9 °C.
 */
export function seasonDays(days: readonly DailyWeather[], leafAreaIndex = 0): SeasonDay[] {
  const temperatures = temperaturesOfDays(days);
  if (temperatures === null) throw new PhysicsError('days', days.length, 'must hold the temperatures of at least one day');
  days.forEach((day, index) => {
    const before = days[index - 1];
    if (before && day.on !== addDays(before.on, 1)) throw new PhysicsError(`days[${index}].on`, day.on, 'must follow the day before');
  });
  const soil = soilTemperaturesC({ airMeansC: temperatures.map((each) => (each.tminC + each.tmaxC) / 2), leafAreaIndex });
  return days.map((day, index) => ({ on: day.on, tminC: temperatures[index]?.tminC ?? 0, tmaxC: temperatures[index]?.tmaxC ?? 0, soilC: soil[index] ?? 0 }));
}

/** Days to each side that a day of the calendar is averaged over, so that a few years give a smooth course. */
const AROUND_DAYS = 3;

/** Place in a year of 366 days, so that March 1 is the same place in every year. */
function calendarPlace(on: CivilDay): number {
  const { year, month } = civilDayParts(on);
  return dayOfYear(on) + (month > 2 && daysInMonth(year, 2) === 28 ? 1 : 0) - 1;
}

/**
 * A year as it usually is, from the records of past years: each day of the calendar is the mean of the same days and three to each side.
 * @param records - daily records of at least one whole year, in any order
 * @param from - first day wanted
 * @param until - the day after the last
 * @returns unbroken days; null when some part of the calendar has no record
 */
export function typicalDays(records: readonly DailyWeather[], from: CivilDay, until: CivilDay): SeasonDay[] | null {
  const places = 366;
  const sums = Array.from({ length: places }, () => ({ tminC: 0, tmaxC: 0, count: 0 }));
  for (const { on, tminC, tmaxC } of records) {
    const sum = sums[calendarPlace(on)];
    if (sum && tminC !== null && tmaxC !== null) {
      sum.tminC += tminC;
      sum.tmaxC += tmaxC;
      sum.count += 1;
    }
  }
  const means = sums.map((_, place) => {
    const mean = { tminC: 0, tmaxC: 0, count: 0 };
    for (let away = -AROUND_DAYS; away <= AROUND_DAYS; away += 1) {
      const near = sums[(place + away + places) % places];
      mean.tminC += near?.tminC ?? 0;
      mean.tmaxC += near?.tmaxC ?? 0;
      mean.count += near?.count ?? 0;
    }
    return mean.count === 0 ? null : { tminC: mean.tminC / mean.count, tmaxC: mean.tmaxC / mean.count };
  });
  // A running start gives the soil the days it looks back on.
  const lead = 30;
  const wanted = civilDaysFrom(addDays(from, -lead), until).map((on) => ({ on, mean: means[calendarPlace(on)] ?? null }));
  if (wanted.some((day) => day.mean === null)) return null;
  const soil = soilTemperaturesC({ airMeansC: wanted.map(({ mean }) => ((mean?.tminC ?? 0) + (mean?.tmaxC ?? 0)) / 2) });
  return wanted.map(({ on, mean }, index) => ({ on, tminC: mean?.tminC ?? 0, tmaxC: mean?.tmaxC ?? 0, soilC: soil[index] ?? 0 })).slice(lead);
}
