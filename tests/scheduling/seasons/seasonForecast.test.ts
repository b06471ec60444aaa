import { cumulativeStdNormalProbability, sampleCorrelation } from 'simple-statistics';
import { FORECAST_DAYS, seasonForecast, stationClimate } from '@/tests/bench/seasonForecast';
import { normalCdf, normalQuantile } from '@/tests/bench/seasonNormal';
import { seasonWeather, stationRecord, STATIONS, YEARS } from '@/tests/bench/seasonWeather';

/** Every forecast of the eight seasons, several times over with other errors, beside what came. */
const told = STATIONS.flatMap((station) => {
  const record = stationRecord(station);
  const climate = stationClimate(record);
  return YEARS.flatMap((year) => {
    const season = seasonWeather(station, year, record);
    return [1, 2].flatMap((seed) => {
      const forecast = seasonForecast(season, climate, seed);
      return Array.from({ length: 214 }, (_, day) => forecast.on(season.fromIndex + day).map((said, lead) => {
        const came = season.days[season.fromIndex + day + lead]?.weather;
        return { station, lead, chance: said.rainProbabilityPct / 100, rainMm: said.weather.precipitationMm ?? 0, tmaxC: said.weather.tmaxC ?? 0, cameMm: came?.precipitationMm ?? 0, cameC: came?.tmaxC ?? 0 };
      })).flat();
    });
  });
});
const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;

describe('normal numbers', () => {
  it('agree with an independent table (simple-statistics, two figures of the argument)', () => {
    for (let value = -3; value <= 3; value += 0.05) expect(normalCdf(value)).toBeCloseTo(cumulativeStdNormalProbability(value), 4);
  });

  it('lead back to where they came from, and to the published 97.5 % point 1.95996', () => {
    for (const share of [0.001, 0.1, 0.5, 0.84, 0.999]) expect(normalCdf(normalQuantile(share))).toBeCloseTo(share, 7);
    expect(normalQuantile(0.975)).toBeCloseTo(1.95996, 4);
  });
});

describe('forecasts made from what came later', () => {
  it('mean what their chances say: of days with a chance, that share is wet', () => {
    for (const [low, high] of [[0.05, 0.2], [0.2, 0.4], [0.4, 0.6], [0.6, 0.8], [0.8, 1.01]] as const) {
      const own = told.filter(({ chance }) => chance >= low && chance < high);
      expect(own.length).toBeGreaterThan(400);
      expect(Math.abs(mean(own.map(({ cameMm }) => (cameMm > 0 ? 1 : 0))) - mean(own.map(({ chance }) => chance)))).toBeLessThan(0.05);
    }
  });

  it('promise as much rain as falls, at every distance', () => {
    for (let lead = 0; lead < FORECAST_DAYS; lead += 1) {
      const own = told.filter((one) => one.lead === lead);
      expect(mean(own.map(({ chance, rainMm }) => chance * rainMm)) / mean(own.map(({ cameMm }) => cameMm))).toBeGreaterThan(0.85);
      expect(mean(own.map(({ chance, rainMm }) => chance * rainMm)) / mean(own.map(({ cameMm }) => cameMm))).toBeLessThan(1.15);
    }
  });

  it('are worth less the further ahead they look', () => {
    const skill = (pick: (one: (typeof told)[number]) => [number, number]) => Array.from({ length: FORECAST_DAYS }, (_, lead) => {
      const pairs = told.filter((one) => one.lead === lead && one.station === 'Seattle').map(pick);
      return sampleCorrelation(pairs.map(([said]) => said), pairs.map(([, came]) => came));
    });
    const rain = skill(({ chance, rainMm, cameMm }) => [chance * rainMm, cameMm]);
    expect(rain[0]).toBeGreaterThan(0.8);
    expect(rain[4]).toBeLessThan(rain[0] ?? 0);
    expect(rain[9]).toBeLessThan(0.6 * (rain[0] ?? 0));
    const errorC = Array.from({ length: FORECAST_DAYS }, (_, lead) => Math.sqrt(mean(told.filter((one) => one.lead === lead).map(({ tmaxC, cameC }) => (tmaxC - cameC) ** 2))));
    errorC.slice(1).forEach((error, index) => expect(error).toBeGreaterThan(errorC[index] ?? 0));
    expect(errorC[1]).toBeLessThan(2);
  });
});
