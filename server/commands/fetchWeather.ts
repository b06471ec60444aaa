import { QueryTypes } from 'sequelize';
import { addDays } from '@/scheduling/units/civilDay';
import type { WeatherAnswer } from '@/server/adapters/weather/weatherService';
import type { AppContext } from '@/server/context';
import { AppError } from '@/server/errors';
import { civilDayAt } from '@/shared/time';
import { lockYard } from './lockYard';

/** Days before today that are asked for each time: services correct recent days for weeks. */
const DAYS_BACK = 60;
/** Farthest back that the forecast service answers. Source: documentation of the Open-Meteo forecast API, past_days up to 92. */
const DAYS_BACK_AT_MOST = 90;
/** Days after today that are asked for: the plan's ten and one more, so that tomorrow's plan is whole even if the service is out. */
const DAYS_AHEAD = 10;
/** Days of air temperature before a sowing that its soil temperature rests on. */
const DAYS_BEFORE_SOWING = 11;

interface WeatherPlace {
  latitudeDeg: number;
  longitudeDeg: number;
  timeZone: string;
  /** First day on which some zone of the yard needs weather. */
  neededFrom: string | null;
  storedFrom: string | null;
}

/** Whether the service answered, and the first civil day before today whose stored weather changed by the answer. */
export interface WeatherFetchOutcome {
  answered: boolean;
  changedFrom: string | null;
}

/**
 * Asks the weather service about a yard and stores what it tells. When the service gives nothing usable, the stored days stay as they are and the
 * failure is noted, so that plans can say from when their weather is. Call it outside of transactions: the service may take its time.
 * @throws AppError not_found when the yard is gone
 */
export async function fetchWeather(context: AppContext, yardId: string): Promise<WeatherFetchOutcome> {
  const askedAt = context.clock.now();
  const place = await findPlace(context, yardId);
  const today = civilDayAt(askedAt, place.timeZone);
  const fromOn = firstDayToAsk(place, today);
  let answer: WeatherAnswer;
  try {
    answer = await context.weather.fetchDays({
      latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, timeZone: place.timeZone, fromOn, toOn: addDays(today, DAYS_AHEAD),
    });
  } catch (error) {
    if (!(error instanceof AppError) || error.code !== 'weather_unavailable') {
      throw error;
    }
    await context.database.query(
      `INSERT INTO weather_fetches (yard_id, asked_at, last_error) VALUES ($1, $2, $3)
       ON CONFLICT (yard_id) DO UPDATE SET asked_at = excluded.asked_at, last_error = excluded.last_error`,
      { bind: [yardId, askedAt, error.message], type: QueryTypes.INSERT },
    );
    return { answered: false, changedFrom: null };
  }
  return context.database.transaction(() => store(context, yardId, answer, today, askedAt));
}

async function findPlace(context: AppContext, yardId: string): Promise<WeatherPlace> {
  const [place] = await context.database.query<WeatherPlace>(
    `SELECT y.latitude_deg AS "latitudeDeg", y.longitude_deg AS "longitudeDeg", y.time_zone AS "timeZone",
       (SELECT min(LEAST((z.created_at AT TIME ZONE y.time_zone)::date, z.seeded_on - ${DAYS_BEFORE_SOWING},
          (SELECT min(s."on") FROM round_sets s WHERE s.yard_id = y.id AND s.zone_id = z.id)))::text
        FROM zones z WHERE z.yard_id = y.id AND z.archived_at IS NULL) AS "neededFrom",
       (SELECT min(w."on")::text FROM weather_days w WHERE w.yard_id = y.id) AS "storedFrom"
     FROM yards y WHERE y.id = $1`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  if (!place) {
    throw new AppError('not_found', 'That yard is not here, or not yours to see.');
  }
  return place;
}

function firstDayToAsk(place: WeatherPlace, today: string): string {
  const usual = addDays(today, -DAYS_BACK);
  const needed = place.neededFrom;
  if (needed === null || needed >= usual || (place.storedFrom !== null && place.storedFrom <= needed)) {
    return usual;
  }
  const earliest = addDays(today, -DAYS_BACK_AT_MOST);
  return needed < earliest ? earliest : needed;
}

async function store(context: AppContext, yardId: string, answer: WeatherAnswer, today: string, askedAt: Date): Promise<WeatherFetchOutcome> {
  const { database } = context;
  const yard = await lockYard(database, yardId);
  if (!yard) {
    return { answered: true, changedFrom: null };
  }
  // A day without its temperatures says too little to take the place of a stored one.
  const days = answer.days.filter((day) => day.tminC !== null && day.tmaxC !== null);
  const [outcome] = await database.query<{ changedFrom: string | null }>(
    `WITH answer AS (
       SELECT * FROM jsonb_to_recordset($2::jsonb) AS d("on" date, "tminC" float8, "tmaxC" float8, "tdewC" float8, "rhMaxPct" float8, "rhMinPct" float8,
         "windMps" float8, "windHeightM" float8, "solarMjM2" float8, "precipitationMm" float8, "rainProbabilityPct" float8)
     ), changed AS (
       SELECT min(a."on") AS first_on FROM answer a LEFT JOIN weather_days w ON w.yard_id = $1 AND w."on" = a."on"
       WHERE a."on" < $3::date AND (w."on" IS NULL OR w.is_forecast OR (w.tmin_c, w.tmax_c, w.tdew_c, w.rh_max_pct, w.rh_min_pct, w.wind_mps, w.solar_mj_m2, w.precipitation_mm)
         IS DISTINCT FROM (a."tminC", a."tmaxC", a."tdewC", a."rhMaxPct", a."rhMinPct", a."windMps", a."solarMjM2", a."precipitationMm"))
     ), stored AS (
       INSERT INTO weather_days (yard_id, "on", is_forecast, tmin_c, tmax_c, tdew_c, rh_max_pct, rh_min_pct, wind_mps, wind_height_m, solar_mj_m2,
         precipitation_mm, rain_probability_pct, source, fetched_at)
       SELECT $1, a."on", a."on" >= $3::date, a."tminC", a."tmaxC", a."tdewC", a."rhMaxPct", a."rhMinPct", a."windMps", a."windHeightM", a."solarMjM2",
         a."precipitationMm", a."rainProbabilityPct", $4, $5 FROM answer a
       ON CONFLICT (yard_id, "on") DO UPDATE SET is_forecast = excluded.is_forecast, tmin_c = excluded.tmin_c, tmax_c = excluded.tmax_c, tdew_c = excluded.tdew_c,
         rh_max_pct = excluded.rh_max_pct, rh_min_pct = excluded.rh_min_pct, wind_mps = excluded.wind_mps, wind_height_m = excluded.wind_height_m,
         solar_mj_m2 = excluded.solar_mj_m2, precipitation_mm = excluded.precipitation_mm, rain_probability_pct = excluded.rain_probability_pct,
         source = excluded.source, fetched_at = excluded.fetched_at
     ), asked AS (
       INSERT INTO weather_fetches (yard_id, asked_at, answered_at, source, sample, last_error) VALUES ($1, $5, $5, $4, $6, NULL)
       ON CONFLICT (yard_id) DO UPDATE SET asked_at = excluded.asked_at, answered_at = excluded.answered_at, source = excluded.source,
         sample = excluded.sample, last_error = NULL
     )
     SELECT first_on::text AS "changedFrom" FROM changed`,
    { bind: [yardId, JSON.stringify(days), today, answer.source, askedAt, answer.sample], type: QueryTypes.SELECT },
  );
  let changedFrom = outcome?.changedFrom ?? null;
  if (yard.elevationIsDefault && answer.elevationM !== null && answer.elevationM !== yard.elevationM && answer.elevationM >= -430 && answer.elevationM <= 6000) {
    await database.query('UPDATE yards SET elevation_m = $2 WHERE id = $1', { bind: [yardId, answer.elevationM], type: QueryTypes.UPDATE });
    // Air pressure enters every day's reference evapotranspiration.
    const [first] = await database.query<{ on: string | null }>('SELECT min("on")::text AS "on" FROM weather_days WHERE yard_id = $1', { bind: [yardId], type: QueryTypes.SELECT });
    changedFrom = first?.on ?? changedFrom;
  }
  if (changedFrom !== null) {
    await database.query(
      'UPDATE yards SET budget_stale_from = LEAST(budget_stale_from, $2::date) WHERE id = $1',
      { bind: [yardId, changedFrom], type: QueryTypes.UPDATE },
    );
  }
  return { answered: true, changedFrom };
}
