import { dapple, fixedRule, inchLessRain, plannerWhoKnows, type ControllerMaker } from './seasonControllers';
import { seasonForecast, stationClimate, type SeasonForecast } from './seasonForecast';
import { patchwise } from './seasonPatchwise';
import { seasonPlanner } from './seasonPlanner';
import { replaySeason, type SeasonSum } from './seasonReplay';
import { seasonWeather, stationRecord, STATIONS, YEARS, type SeasonWeather } from './seasonWeather';
import { SEASON_YARDS, type SeasonYard } from './seasonYards';

/** Rules of thumb whose curves are drawn. */
export const THUMBS = { fixed: fixedRule, inch: inchLessRain } as const;
export type Thumb = keyof typeof THUMBS;

/** Scales at which a rule of thumb draws its curve, and those by which it is carried on to more water. */
export const CURVE_SCALES: readonly number[] = [0.5, 0.75, 1, 1.25, 1.5];
export const FURTHER_SCALES: readonly number[] = [2, 3, 4];

const FORECAST_SEED = 1;

/** One season of one yard under one controller. */
export interface SeasonRow extends SeasonSum {
  yard: string;
  station: string;
  year: number;
  controller: string;
}

export const DAPPLE = 'dapple';
/** Controllers that know the weather to come; the best of them is the clairvoyant. */
export const CLAIRVOYANTS = ['planner-who-knows', 'patchwise-last-day', 'patchwise-day-before'] as const;

export const thumbName = (thumb: Thumb, scale: number): string => `${thumb}-${scale}`;

/** Everybody who waters a yard in the replay, by name. Where hours do not do, patches cannot be thought of one by one: there only the planner knows the weather. */
export function controllersOf(yard: SeasonYard): [string, ControllerMaker][] {
  const thumbs = (Object.keys(THUMBS) as Thumb[]).flatMap((thumb) => [...CURVE_SCALES, ...FURTHER_SCALES].map((scale): [string, ControllerMaker] => [thumbName(thumb, scale), THUMBS[thumb](scale)]));
  const knowing: [string, ControllerMaker][] = yard.fits
    ? [[CLAIRVOYANTS[0], plannerWhoKnows(seasonPlanner, 20, 5)], [CLAIRVOYANTS[1], patchwise(0)], [CLAIRVOYANTS[2], patchwise(1)]]
    : [[CLAIRVOYANTS[0], plannerWhoKnows(seasonPlanner, 10, 5)]];
  return [[DAPPLE, dapple(seasonPlanner)], ...knowing, ...thumbs];
}

/** Seasons that one of several processes replays: every station and year, dealt out by turns. */
export function replayPart(part: number, parts: number, folder?: string): SeasonRow[] {
  const rows: SeasonRow[] = [];
  STATIONS.forEach((station) => {
    const record = stationRecord(station, folder);
    const climate = stationClimate(record);
    YEARS.filter((year) => year % parts === part).forEach((year) => {
      const season: SeasonWeather = seasonWeather(station, year, record);
      const forecast: SeasonForecast = seasonForecast(season, climate, FORECAST_SEED);
      for (const yard of SEASON_YARDS) {
        for (const [controller, maker] of controllersOf(yard)) {
          rows.push({ yard: yard.id, station, year, controller, ...replaySeason(yard, season, forecast, maker) });
        }
      }
    });
  });
  return rows;
}
