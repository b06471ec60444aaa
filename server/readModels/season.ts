import { QueryTypes } from 'sequelize';
import type { GrassId } from '@/scheduling/grass';
import { seasonOutlook, type SeasonOutlook } from '@/scheduling/season';
import { addDays } from '@/scheduling/units/civilDay';
import { loadWeather } from '@/server/commands/budgetFacts';
import { ensureClimate, type ClimatePlace } from '@/server/commands/fetchClimate';
import { defaultGrass } from '@/server/commands/yards/yardDefaults';
import type { AppContext } from '@/server/context';
import { AppError, notFound } from '@/server/errors';
import { civilDayAt } from '@/shared/time';

/** A yard's season with the zones that each of its grasses grows in. */
export interface YardSeason {
  outlook: SeasonOutlook;
  zonesByGrass: ReadonlyMap<GrassId, string[]>;
  source: string;
  sample: boolean;
  years: number;
}

/** Weather of this year that is stored: as far back as it is fetched, and what a sowing needs beyond. */
const KNOWN_DAYS = 200;

/**
 * What the season holds for a yard. Asks the weather service for past years the first time.
 * @throws AppError not_found for a yard that is gone, weather_unavailable while no past year is known
 */
export async function readSeason(app: AppContext, yardId: string, now: Date): Promise<YardSeason> {
  const [yard] = await app.database.query<ClimatePlace & { zones: { name: string; grass: GrassId }[] }>(
    `SELECT y.id, y.latitude_deg AS "latitudeDeg", y.longitude_deg AS "longitudeDeg", y.time_zone AS "timeZone",
       COALESCE((SELECT json_agg(json_build_object('name', z.name, 'grass', z.grass) ORDER BY z.priority, z.created_at, z.id) FROM zones z
         WHERE z.yard_id = y.id AND z.archived_at IS NULL), '[]'::json) AS zones
     FROM yards y WHERE y.id = $1`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  if (!yard) {
    throw notFound('yard');
  }
  const today = civilDayAt(now, yard.timeZone);
  const climate = await ensureClimate(app, yard, today);
  const zonesByGrass = new Map<GrassId, string[]>(yard.zones.length === 0 ? [[defaultGrass(yard.latitudeDeg), []]] : []);
  for (const { name, grass } of yard.zones) {
    zonesByGrass.set(grass, [...(zonesByGrass.get(grass) ?? []), name]);
  }
  const known = await loadWeather(app.database, yardId, addDays(today, -KNOWN_DAYS));
  const outlook = climate === null ? null : seasonOutlook({ latitudeDeg: yard.latitudeDeg, today, records: climate.records, known, grasses: [...zonesByGrass.keys()] });
  if (climate === null || outlook === null) {
    throw new AppError('weather_unavailable', 'The past years of this place are not known yet, so the season cannot be told. Look again later: Dapple asks anew each time.');
  }
  return { outlook, zonesByGrass, source: climate.source, sample: climate.sample, years: new Set(climate.records.map((day) => day.on.slice(0, 4))).size };
}
