import { zoneDemand, type BudgetZone, type WinterDay, type ZoneDemand } from '@/scheduling/budget';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import { CLEAR_SKY, dailyReferenceEts, soilTemperaturesC, windAtTwoMetresMps, type DailyReferenceEt, type DailyWeather, type NoReferenceEt, type WeatherSite } from '@/scheduling/weather';
import { continuousDays, temperaturesOfDays, type DayTemperatures } from '@/scheduling/weather/continuousDays';
import type { RainSource } from '@/shared/contracts/water';
import type { StoredWeatherDay } from './budgetFacts';

/** One day of a yard's weather with its own rain gauge already in place of the service's rain. */
export interface YardWeatherDay {
  on: string;
  weather: DailyWeather;
  temperatures: DayTemperatures;
  rainProbabilityPct: number | null;
  rainSource: RainSource;
  gaugeMm: number | null;
  /** Wind at 2 m [m/s], null when not known. */
  windAtTwoMetresMps: number | null;
}

/** An unbroken row of a yard's days, with the sums that all zones share. */
export interface YardWeather {
  site: WeatherSite;
  days: YardWeatherDay[];
  reference: (DailyReferenceEt | NoReferenceEt)[];
}

/**
 * Puts stored weather and the rain gauge together for a row of days.
 * @param until - the day after the last
 * @returns null when no temperature of any of the days is known
 */
export function yardWeather(site: WeatherSite, stored: readonly StoredWeatherDay[], gauge: ReadonlyMap<string, number>, from: string, until: string): YardWeather | null {
  const weatherDays = continuousDays(stored.map(toDailyWeather), from, until);
  const temperatures = temperaturesOfDays(weatherDays);
  if (temperatures === null) {
    return null;
  }
  const byDay = new Map(stored.map((day) => [day.on, day]));
  const days = weatherDays.flatMap((weather, index): YardWeatherDay[] => {
    const own = temperatures[index];
    if (!own) {
      return [];
    }
    const told = byDay.get(weather.on);
    const gaugeMm = gauge.get(weather.on) ?? null;
    const rainSource = gaugeMm !== null ? 'gauge' : weather.precipitationMm === null ? 'none' : told?.isForecast ? 'forecast' : 'weather';
    return [{
      on: weather.on, temperatures: own, gaugeMm, rainSource,
      weather: gaugeMm === null ? weather : { ...weather, precipitationMm: gaugeMm },
      rainProbabilityPct: gaugeMm !== null ? 100 : told?.rainProbabilityPct ?? null,
      windAtTwoMetresMps: weather.windMps === null ? null : windAtTwoMetresMps(weather.windMps, weather.windHeightM ?? 2),
    }];
  });
  return { site, days, reference: dailyReferenceEts(site, days.map((day) => day.weather), { clearSky: CLEAR_SKY }) };
}

function toDailyWeather({ isForecast: _isForecast, rainProbabilityPct: _rainProbabilityPct, ...weather }: StoredWeatherDay): DailyWeather {
  return weather;
}

/** The same row from a day on, with its sums. A day before the row begins where the row does. */
export function weatherSince(weather: YardWeather, fromOn: string): YardWeather {
  const offset = Math.max(0, daysBetween(weather.days[0]?.on ?? fromOn, fromOn));
  return { site: weather.site, days: weather.days.slice(offset), reference: weather.reference.slice(offset) };
}

/** Demand of a zone for every day of the row. @param winter - state of the grass on the same days, where the zone reckons with it */
export function demandOf(weather: YardWeather, zone: BudgetZone, winter?: readonly WinterDay[]): ZoneDemand[] {
  return zoneDemand({ zone, site: weather.site, weather: weather.days.map((day) => day.weather), reference: weather.reference, ...(winter ? { winter } : {}) });
}

/** Demand of open grass, for the reference evapotranspiration and rain of the yard as a whole. */
export function openDemand(weather: YardWeather): ZoneDemand[] {
  return demandOf(weather, { grass: 'cool_mix', texture: 'loam', sunHours: null, sownOn: null });
}

/** Soil temperature at seed depth for each day from a sowing on, as far as the row goes [°C]. Days before the row take the row's first day. */
export function soilTemperaturesFrom(weather: YardWeather, sownOn: string): number[] {
  const first = weather.days[0];
  if (!first) {
    return [];
  }
  const soil = soilTemperaturesC({ airMeansC: weather.days.map(({ temperatures: { tminC, tmaxC } }) => (tminC + tmaxC) / 2) });
  const offset = daysBetween(first.on, sownOn);
  return offset >= 0 ? soil.slice(offset) : [...Array.from({ length: -offset }, () => soil[0] ?? 0), ...soil];
}

/** Earliest day of weather that the running sowings rest on, or `from` when that is earlier. Sowings older than a year are lawns. */
export function weatherNeededFrom(from: string, today: string, seededOn: readonly (string | null)[]): string {
  return seededOn.reduce<string>((earliest, on) => {
    if (on === null || !isRunningSowing(on, today)) {
      return earliest;
    }
    const needed = addDays(on, -SOIL_WARM_UP_DAYS);
    return needed < earliest ? needed : earliest;
  }, from);
}

const SOIL_WARM_UP_DAYS = 11;
const SOWING_DAYS_AT_MOST = 366;

/** Whether a sowing is young enough to have stages. */
export function isRunningSowing(seededOn: string, today: string): boolean {
  return daysBetween(seededOn, today) <= SOWING_DAYS_AT_MOST;
}
