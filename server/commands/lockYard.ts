import { QueryTypes, type Sequelize } from 'sequelize';

/** What a recomputation needs of the yard, as it stands while the lock is held. */
export interface LockedYard {
  id: string;
  latitudeDeg: number;
  longitudeDeg: number;
  elevationM: number;
  elevationIsDefault: boolean;
  timeZone: string;
  moveMinutes: number;
  reminderLeadMinutes: number;
  factsVersion: number;
  /** First civil day whose balance is behind the facts. */
  budgetStaleFrom: string | null;
}

/**
 * Lets one recomputation of a yard run at a time, on however many servers, until the transaction ends. The row is held too, so that a change of
 * a fact is either seen whole or marks the yard again afterwards.
 * @returns null when the yard is gone
 */
export async function lockYard(database: Sequelize, yardId: string): Promise<LockedYard | null> {
  await database.query('SELECT pg_advisory_xact_lock(hashtextextended($1, 1))', { bind: [yardId], type: QueryTypes.SELECT });
  const [yard] = await database.query<LockedYard>(
    `SELECT id, latitude_deg AS "latitudeDeg", longitude_deg AS "longitudeDeg", elevation_m AS "elevationM", elevation_is_default AS "elevationIsDefault",
       time_zone AS "timeZone", move_minutes AS "moveMinutes", reminder_lead_minutes AS "reminderLeadMinutes", facts_version AS "factsVersion", budget_stale_from::text AS "budgetStaleFrom"
     FROM yards WHERE id = $1 FOR NO KEY UPDATE`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  return yard ?? null;
}
