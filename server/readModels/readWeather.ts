import { QueryTypes, type Sequelize } from 'sequelize';
import type { WeatherResponse } from '@/shared/contracts/water';

export interface WeatherRow {
  answeredAt: Date | null;
  failed: boolean | null;
  source: string | null;
  sample: boolean | null;
  days: WeatherResponse['days'] | null;
}

/** Stored weather of a yard from a civil day on, with the reference evapotranspiration that the budget reckoned from it. Null when the yard is gone. */
export async function readWeather(database: Sequelize, yardId: string, fromOn: string): Promise<WeatherRow | null> {
  const [row] = await database.query<WeatherRow>(
    `SELECT f.answered_at AS "answeredAt", f.last_error IS NOT NULL AS failed, f.source, f.sample,
       (SELECT json_agg(json_build_object('on', w."on", 'isForecast', w.is_forecast, 'tminC', w.tmin_c, 'tmaxC', w.tmax_c, 'windMps', w.wind_mps,
          'precipitationMm', w.precipitation_mm, 'rainProbabilityPct', w.rain_probability_pct, 'source', w.source,
          'et0Mm', (SELECT d.et0_mm FROM budget_days d WHERE d.yard_id = w.yard_id AND d."on" = w."on" LIMIT 1)) ORDER BY w."on")
        FROM weather_days w WHERE w.yard_id = y.id AND w."on" >= $2) AS days
     FROM yards y LEFT JOIN weather_fetches f ON f.yard_id = y.id WHERE y.id = $1`,
    { bind: [yardId, fromOn], type: QueryTypes.SELECT },
  );
  return row ?? null;
}
