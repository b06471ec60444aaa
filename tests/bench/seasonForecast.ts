import { seededRandom } from '@/scheduling/sprinkler/seededRandom';
import type { DailyWeather } from '@/scheduling/weather';
import { normalCdf, normalQuantile } from './seasonNormal';
import { monthIndex, type SeasonWeather } from './seasonWeather';

/**
 * Correlation of the forecast's reading with what comes, by days ahead, 0 being the day itself. From memory: public forecasts of daily rain are worth
 * little more than the month's average after ten days, those of temperature after two weeks.
 */
const RAIN_SKILL: readonly number[] = [0.93, 0.89, 0.84, 0.78, 0.71, 0.63, 0.55, 0.47, 0.4, 0.34];
/** Error of the reading of a day's extremes [°C], by days ahead. From memory: 1 to 2 °C for tomorrow, near the spread of the month after ten days. */
const TEMPERATURE_ERROR_C: readonly number[] = [1, 1.4, 1.8, 2.2, 2.7, 3.2, 3.7, 4.2, 4.7, 5.2];
/** The same for mean wind [m/s]. */
const WIND_ERROR_MPS: readonly number[] = [0.6, 0.7, 0.85, 1, 1.15, 1.3, 1.5, 1.7, 1.9, 2.1];
/** Chances below this are told as none, with no rain [%]. */
const LEAST_CHANCE_PCT = 5;
const STEPS = 16;

/** Days ahead that a forecast covers, the day itself included. */
export const FORECAST_DAYS = RAIN_SKILL.length;

/** What the forecast says of one day. */
export interface ForecastDay {
  weather: DailyWeather;
  /** Chance of any rain [%], whole. */
  rainProbabilityPct: number;
}

interface Spread {
  mean: number;
  deviation: number;
}

interface MonthClimate {
  /** Share of days with rain. */
  wetShare: number;
  /** Amounts of those days, least first [mm]. */
  wetMm: number[];
  tminC: Spread;
  tmaxC: Spread;
  windMps: Spread;
}

/** What is usual in each month at a station. */
export type StationClimate = readonly MonthClimate[];

function spreadOf(values: readonly number[]): Spread {
  const mean = values.reduce((sum, value) => sum + value, 0) / Math.max(1, values.length);
  const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / Math.max(1, values.length - 1);
  return { mean, deviation: Math.sqrt(variance) };
}

/** Reckons the months of a station from its whole record. */
export function stationClimate(record: readonly DailyWeather[]): StationClimate {
  return Array.from({ length: 12 }, (_, month): MonthClimate => {
    const days = record.filter((day) => monthIndex(day.on) === month);
    const wetMm = days.map((day) => day.precipitationMm ?? 0).filter((rainMm) => rainMm > 0).sort((a, b) => a - b);
    return {
      wetShare: wetMm.length / days.length, wetMm,
      tminC: spreadOf(days.map((day) => day.tminC ?? 0)), tmaxC: spreadOf(days.map((day) => day.tmaxC ?? 0)), windMps: spreadOf(days.map((day) => day.windMps ?? 0)),
    };
  });
}

/** Rain at a point of the standard normal scale: none below the dry share, above it the month's amounts in order [mm]. */
function rainAt(climate: MonthClimate, normal: number): number {
  const above = (normalCdf(normal) - (1 - climate.wetShare)) / climate.wetShare;
  if (above <= 0 || climate.wetMm.length === 0) return 0;
  const place = Math.min(climate.wetMm.length - 1, Math.max(0, above * climate.wetMm.length - 0.5));
  const low = climate.wetMm[Math.floor(place)] ?? 0;
  const high = climate.wetMm[Math.ceil(place)] ?? low;
  return low + (high - low) * (place - Math.floor(place));
}

/** Where a day's rain lies on the standard normal scale of its month; equal amounts and dry days are spread at random. */
function normalOfRain(climate: MonthClimate, rainMm: number, random: number): number {
  const dryShare = 1 - climate.wetShare;
  if (rainMm <= 0) return normalQuantile(dryShare * random);
  const below = climate.wetMm.filter((one) => one < rainMm).length;
  const equal = climate.wetMm.filter((one) => one === rainMm).length;
  return normalQuantile(dryShare + (climate.wetShare * (below + equal * random)) / climate.wetMm.length);
}

/** Chance of rain and its mean amount when it rains, for rain known up to a normal error on the standard normal scale. */
function rainOutlook(climate: MonthClimate, mean: number, deviation: number): { chance: number; amountMm: number } {
  const dryBelow = climate.wetShare >= 1 ? -Infinity : normalQuantile(1 - climate.wetShare);
  const dryChance = climate.wetShare <= 0 ? 1 : normalCdf((dryBelow - mean) / deviation);
  if (dryChance >= 1) return { chance: 0, amountMm: 0 };
  let sum = 0;
  for (let step = 0; step < STEPS; step += 1) {
    sum += rainAt(climate, mean + deviation * normalQuantile(dryChance + (1 - dryChance) * ((step + 0.5) / STEPS)));
  }
  return { chance: 1 - dryChance, amountMm: sum / STEPS };
}

/** Variance of the error of a reading that correlates so with a standard normal truth. */
const noiseOf = (skill: number): number => 1 / skill ** 2 - 1;

/** Errors for each number of days ahead; each is the one a day nearer with something on top, so that a forecast draws nearer as its day comes. */
function errorsByLead(variances: readonly number[], normals: () => number): number[] {
  let error = 0;
  let before = 0;
  return variances.map((variance) => {
    error += Math.sqrt(Math.max(0, variance - before)) * normals();
    before = variance;
    return error;
  });
}

/** What is believed of a value after a reading with an error: pulled towards what is usual. */
function believed(usual: Spread, reading: number, error: number): number {
  const weight = usual.deviation ** 2 / (usual.deviation ** 2 + error ** 2);
  return usual.mean + weight * (reading - usual.mean);
}

const RAIN_NOISE = RAIN_SKILL.map(noiseOf);
const squares = (values: readonly number[]): number[] => values.map((value) => value ** 2);

/** All that is ever forecast of one day, by days ahead. */
function forecastsOfDay(truth: DailyWeather, climate: MonthClimate, seed: number): ForecastDay[] {
  const random = seededRandom(seed);
  // Even numbers of exactly 0 have no place on the normal scale.
  const even = (): number => (random() * 4_294_967_296 + 0.5) / 4_294_967_297;
  const normals = (): number => normalQuantile(even());
  const rainNormal = normalOfRain(climate, truth.precipitationMm ?? 0, even());
  const rain = errorsByLead(RAIN_NOISE, normals);
  const tmin = errorsByLead(squares(TEMPERATURE_ERROR_C), normals);
  const tmax = errorsByLead(squares(TEMPERATURE_ERROR_C), normals);
  const wind = errorsByLead(squares(WIND_ERROR_MPS), normals);
  return RAIN_NOISE.map((noise, lead): ForecastDay => {
    const outlook = rainOutlook(climate, (rainNormal + (rain[lead] ?? 0)) / (1 + noise), Math.sqrt(noise / (1 + noise)));
    const chancePct = Math.round(100 * outlook.chance);
    const isTold = chancePct >= LEAST_CHANCE_PCT;
    const temperatureError = TEMPERATURE_ERROR_C[lead] ?? 0;
    const tmaxC = believed(climate.tmaxC, (truth.tmaxC ?? 0) + (tmax[lead] ?? 0), temperatureError);
    return {
      rainProbabilityPct: isTold ? chancePct : 0,
      weather: {
        ...truth, tmaxC,
        tminC: Math.min(tmaxC - 0.5, believed(climate.tminC, (truth.tminC ?? 0) + (tmin[lead] ?? 0), temperatureError)),
        windMps: Math.max(0.3, believed(climate.windMps, (truth.windMps ?? 0) + (wind[lead] ?? 0), WIND_ERROR_MPS[lead] ?? 0)),
        precipitationMm: isTold ? outlook.amountMm : 0,
      },
    };
  });
}

/** Forecasts for a season: what was foretold on a morning for the day itself and the days after it. */
export interface SeasonForecast {
  /** @param issueIndex - index of the morning in the season's `days` @returns `FORECAST_DAYS` days, the first being the morning's own */
  on(issueIndex: number): ForecastDay[];
}

/**
 * Makes the forecasts of a season from what came later. Rain goes by a reading of the day on the normal scale of its month whose error grows with the
 * days ahead; its chance and amount are what that reading leaves possible, so that of the days with a chance of 30 %, 30 % are wet. Temperatures and
 * wind are pulled towards what is usual by as much as their reading is worth. Errors of different days are independent, those of one day grow step by
 * step from its own morning back.
 * @param seed - another seed, other errors
 */
export function seasonForecast(season: SeasonWeather, climate: StationClimate, seed: number): SeasonForecast {
  const byDay = season.days.map(({ on, weather }, index) => {
    const month = climate[monthIndex(on)];
    if (!month) throw new Error(`${on} has no month.`);
    return forecastsOfDay(weather, month, (seed * 7_919 + season.year * 613 + season.station.length * 104_729 + index) >>> 0);
  });
  return {
    on: (issueIndex) => Array.from({ length: FORECAST_DAYS }, (_, lead) => {
      const told = byDay[issueIndex + lead]?.[lead];
      if (!told) throw new Error(`No forecast ${lead} days ahead of day ${issueIndex}.`);
      return told;
    }),
  };
}
