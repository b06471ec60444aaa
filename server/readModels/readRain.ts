import { QueryTypes, type Sequelize } from 'sequelize';
import type { RainEntryResponse } from '@/shared/contracts/water';

/** Rain gauge readings of a yard, newest day first. */
export async function readRain(database: Sequelize, yardId: string): Promise<RainEntryResponse[]> {
  return database.query<RainEntryResponse>(
    'SELECT "on"::text AS "on", depth_mm AS "depthMm" FROM rain_entries WHERE yard_id = $1 ORDER BY rain_entries."on" DESC LIMIT 400',
    { bind: [yardId], type: QueryTypes.SELECT },
  );
}
