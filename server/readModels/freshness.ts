import { QueryTypes, type Sequelize } from 'sequelize';
import { civilDayAt } from '@/shared/time';

/** What tells whether a yard's plan still holds. */
export interface Freshness {
  timeZone: string;
  factsVersion: number;
  budgetStaleFrom: string | null;
  planFactsVersion: number | null;
  planFromOn: string | null;
  weatherAskedAt: Date | null;
  weatherAnsweredAt: Date | null;
}

/** A yard without weather is not asked for at every read while the service is out [min]. */
const ASK_AGAIN_AFTER_MINUTES = 15;

/** Columns of a Freshness, for a query that names the yard `y`, its newest plan `p` and its row of weather_fetches `f`, so that a fresh yard costs no query of its own. */
export const freshnessColumns = `y.time_zone AS "timeZone", y.facts_version AS "factsVersion", y.budget_stale_from::text AS "budgetStaleFrom",
  p.facts_version AS "planFactsVersion", p.from_on::text AS "planFromOn", f.asked_at AS "weatherAskedAt", f.answered_at AS "weatherAnsweredAt"`;

/** Null when the yard is gone. */
export async function readFreshness(database: Sequelize, yardId: string): Promise<Freshness | null> {
  const [row] = await database.query<Freshness>(
    `SELECT ${freshnessColumns} FROM yards y LEFT JOIN weather_fetches f ON f.yard_id = y.id
     LEFT JOIN LATERAL (SELECT l.facts_version, l.from_on FROM plans l WHERE l.yard_id = y.id ORDER BY l.version DESC LIMIT 1) p ON true
     WHERE y.id = $1`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  return row ?? null;
}

/** True when the weather service never answered for the yard and was not asked just now. */
export function lacksWeather(found: Freshness, now: Date): boolean {
  return found.weatherAnsweredAt === null
    && (found.weatherAskedAt === null || now.getTime() - found.weatherAskedAt.getTime() >= ASK_AGAIN_AFTER_MINUTES * 60_000);
}

/** Whether plan or budget are behind the day, the facts or the weather, and something can be done about it. */
export function isBehind(found: Freshness, now: Date): boolean {
  if (found.weatherAnsweredAt === null) {
    return lacksWeather(found, now);
  }
  return found.planFactsVersion === null || found.planFromOn === null || found.planFactsVersion < found.factsVersion
    || found.planFromOn < civilDayAt(now, found.timeZone) || found.budgetStaleFrom !== null;
}
