import { addDays, civilDayParts, daysBetween } from '@/scheduling/units/civilDay';
import { dailyReferenceEts, type DailyReferenceEt, type DailyWeather, type NoReferenceEt, type WeatherSite } from '@/scheduling/weather';
import { daylightMinutes } from '@/server/commands/wallClock';
import { RECORD_SITES, recordedWeather } from '../fixtures/vegaWeather';

export type Station = keyof typeof RECORD_SITES;
export const STATIONS: readonly Station[] = ['Seattle', 'New York'];
export const YEARS: readonly number[] = [2012, 2013, 2014, 2015];

/** First and last day of the watering season. */
const SEASON = { from: '04-01', to: '10-31' };
/** Days of weather kept before the season, from which a seedbed's temperature is reckoned, and after it, for outlooks from its last day. */
const DAYS_AROUND = 30;

const CLOCKS: Readonly<Record<Station, { longitudeDeg: number; timeZone: string }>> = {
  Seattle: { longitudeDeg: -122.31, timeZone: 'America/Los_Angeles' },
  'New York': { longitudeDeg: -73.97, timeZone: 'America/New_York' },
};

/** One day as it really was. */
export interface TrueDay {
  on: string;
  weather: DailyWeather;
  reference: DailyReferenceEt | NoReferenceEt;
  sunriseMinutes: number | null;
  sunsetMinutes: number | null;
}

/** One year of one station: the season and some days around it. */
export interface SeasonWeather {
  station: Station;
  year: number;
  site: WeatherSite;
  days: TrueDay[];
  /** Index of the season's first day in `days`, and of the day after its last. */
  fromIndex: number;
  toIndex: number;
}

/** All days of a station as they were recorded. @param folder - data of the package `vega-datasets`; left out, that of this clone */
export function stationRecord(station: Station, folder?: string): DailyWeather[] {
  return folder === undefined ? recordedWeather(station) : recordedWeather(station, folder);
}

/** The season of a year with its reference ET and daylight. */
export function seasonWeather(station: Station, year: number, record: readonly DailyWeather[]): SeasonWeather {
  const firstOn = addDays(`${year}-${SEASON.from}`, -DAYS_AROUND);
  const lastOn = addDays(`${year}-${SEASON.to}`, DAYS_AROUND);
  const weather = record.filter((day) => day.on >= firstOn && day.on <= lastOn);
  if (weather.length !== daysBetween(firstOn, lastOn) + 1) throw new Error(`${station} ${year} has ${weather.length} days on record.`);
  const { latitudeDeg, elevationM, coastal } = RECORD_SITES[station];
  const site = { latitudeDeg, elevationM, coastal };
  const reference = dailyReferenceEts(site, weather);
  const days = weather.map((day, index): TrueDay => {
    const et0 = reference[index];
    if (!et0) throw new Error(`${day.on} has no reference ET.`);
    return { on: day.on, weather: day, reference: et0, ...daylightMinutes({ latitudeDeg, ...CLOCKS[station] }, day.on) };
  });
  return { station, year, site, days, fromIndex: DAYS_AROUND, toIndex: daysBetween(firstOn, `${year}-${SEASON.to}`) + 1 };
}

/** Month of a civil day, 0 for January. */
export function monthIndex(on: string): number {
  return civilDayParts(on).month - 1;
}
