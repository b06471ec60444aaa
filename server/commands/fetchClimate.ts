import { QueryTypes } from 'sequelize';
import { unknownWeather } from '@/scheduling/weather/continuousDays';
import type { DailyWeather } from '@/scheduling/weather';
import { addDays, civilDaysFrom } from '@/scheduling/units/civilDay';
import type { AppContext } from '@/server/context';
import { AppError } from '@/server/errors';
import { ClimateRecord } from '@/server/models';

/** Where and when a season is asked about. */
export interface ClimatePlace {
  id: string;
  latitudeDeg: number;
  longitudeDeg: number;
  timeZone: string;
}

/** Temperatures and rain of past whole years at a yard. */
export interface Climate {
  records: DailyWeather[];
  source: string;
  sample: boolean;
}

function recordsOf({ fromOn, tminC, tmaxC, rainMm }: ClimateRecord): DailyWeather[] {
  return civilDaysFrom(fromOn, addDays(fromOn, tminC.length)).map((on, index) => ({ ...unknownWeather(on), tminC: tminC[index] ?? null, tmaxC: tmaxC[index] ?? null, precipitationMm: rainMm[index] ?? null }));
}

/**
 * The records of a yard's place for whole years up to the last one, asked for once a year. While the service gives nothing, those of earlier years serve.
 * Not to be called inside a transaction: the service may take its time.
 * @returns null when nothing is known and the service does not answer
 */
export async function ensureClimate({ database, weather, clock }: AppContext, yard: ClimatePlace, today: string): Promise<Climate | null> {
  const lastYear = Number(today.slice(0, 4)) - 1;
  const fromOn = `${lastYear - weather.recordYears + 1}-01-01`;
  const toOn = `${lastYear}-12-31`;
  const kept = await ClimateRecord.findByPk(yard.id);
  if (kept?.fromOn === fromOn) {
    return { records: recordsOf(kept), source: kept.source, sample: kept.sample };
  }
  try {
    const { latitudeDeg, longitudeDeg, timeZone } = yard;
    const answer = await weather.fetchRecords({ latitudeDeg, longitudeDeg, timeZone, fromOn, toOn });
    const told = new Map(answer.days.map((day) => [day.on, day]));
    const days = civilDaysFrom(fromOn, addDays(toOn, 1)).map((on): DailyWeather => {
      const day = told.get(on);
      return { ...unknownWeather(on), tminC: day?.tminC ?? null, tmaxC: day?.tmaxC ?? null, precipitationMm: day?.precipitationMm ?? null };
    });
    // A yard that went away or moved meanwhile keeps nothing of the old place.
    await database.query(
      `INSERT INTO climate_records (yard_id, from_on, tmin_c, tmax_c, rain_mm, source, sample, fetched_at)
       SELECT id, $2, $3::float8[], $4::float8[], $5::float8[], $6, $7, $8 FROM yards WHERE id = $1 AND latitude_deg = $9 AND longitude_deg = $10
       ON CONFLICT (yard_id) DO UPDATE SET from_on = excluded.from_on, tmin_c = excluded.tmin_c, tmax_c = excluded.tmax_c, rain_mm = excluded.rain_mm, source = excluded.source, sample = excluded.sample,
         fetched_at = excluded.fetched_at`,
      { bind: [yard.id, fromOn, days.map((day) => day.tminC), days.map((day) => day.tmaxC), days.map((day) => day.precipitationMm), answer.source, answer.sample, clock.now(), latitudeDeg, longitudeDeg], type: QueryTypes.INSERT },
    );
    return { records: days, source: answer.source, sample: answer.sample };
  } catch (error) {
    if (!(error instanceof AppError) || error.code !== 'weather_unavailable') {
      throw error;
    }
    return kept === null ? null : { records: recordsOf(kept), source: kept.source, sample: kept.sample };
  }
}
