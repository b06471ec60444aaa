import type { Sequelize } from 'sequelize';
import { exposureMonths, monthsOfSunHours, type ExposureMonth } from '@/scheduling/sun';
import { zoneExposures } from '@/server/commands/zoneExposures';
import { readZoneSun, type ZoneSunRow } from './readGround';

/** The sun of a zone as people told it, and the light that follows for every month. */
export interface ZoneSun {
  row: ZoneSunRow;
  months: ExposureMonth[];
}

/** Null when the yard has no such zone in use. */
export async function readSunOfZone(database: Sequelize, yardId: string, zoneId: string): Promise<ZoneSun | null> {
  const row = await readZoneSun(database, yardId, zoneId);
  if (row === null) {
    return null;
  }
  const { latitudeDeg, horizonDeg, sunHours, sunHoursOn } = row;
  const exposure = horizonDeg === null ? undefined : zoneExposures(row, [{ id: zoneId, horizonDeg }]).get(zoneId);
  return { row, months: exposure ? exposureMonths(exposure, latitudeDeg) : monthsOfSunHours(latitudeDeg, sunHours, sunHoursOn) };
}
