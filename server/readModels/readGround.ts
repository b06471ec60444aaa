import { QueryTypes, type Sequelize } from 'sequelize';
import { OBSERVATION_WEIGHT } from '@/scheduling/budget';
import type { ScrewdriverFeelId } from '@/shared/contracts/ground';
import type { EstablishmentStageId } from '@/shared/contracts/proposals';

interface Told {
  on: string;
  personId: string | null;
  personName: string | null;
}

export interface ObservationRow extends Told {
  zoneId: string;
  kind: 'screwdriver' | 'probe';
  feel: ScrewdriverFeelId | null;
  waterContent: number | null;
  /** How much of the difference to the reckoning is believed, 0 to 1. */
  weight: number;
}

/** What was found in the ground of a yard's zones in use, newest day first. */
export async function readObservations(database: Sequelize, yardId: string, limit: number): Promise<ObservationRow[]> {
  const rows = await database.query<Omit<ObservationRow, 'weight'>>(
    `SELECT o.zone_id AS "zoneId", o."on"::text AS "on", o.kind, o.feel, o.water_content AS "waterContent", u.id AS "personId", u.name AS "personName"
     FROM observations o JOIN zones z ON z.yard_id = o.yard_id AND z.id = o.zone_id AND z.archived_at IS NULL LEFT JOIN users u ON u.id = o.seen_by
     WHERE o.yard_id = $1 ORDER BY o."on" DESC, z.priority, z.created_at, z.id LIMIT $2`,
    { bind: [yardId, limit], type: QueryTypes.SELECT },
  );
  return rows.map((row) => ({ ...row, weight: OBSERVATION_WEIGHT[row.kind] }));
}

export interface SeenStageTold extends Told {
  stage: EstablishmentStageId;
}

/** Stages that people reported of the sowing of a zone from its day on, newest first. */
export function readSeenStages(database: Sequelize, yardId: string, zoneId: string, seededOn: string): Promise<SeenStageTold[]> {
  return database.query<SeenStageTold>(
    `SELECT s."on"::text AS "on", s.stage, u.id AS "personId", u.name AS "personName" FROM seen_stages s LEFT JOIN users u ON u.id = s.seen_by
     WHERE s.yard_id = $1 AND s.zone_id = $2 AND s."on" >= $3::date ORDER BY s."on" DESC`,
    { bind: [yardId, zoneId, seededOn], type: QueryTypes.SELECT },
  );
}

export interface SunDiaryRow extends Told {
  sunnyHours: number[];
}

export interface ZoneSunRow {
  zoneId: string;
  zoneName: string;
  latitudeDeg: number;
  longitudeDeg: number;
  timeZone: string;
  sunHours: number;
  sunHoursOn: string | null;
  horizonDeg: number[] | null;
  pages: SunDiaryRow[];
}

/** Sun of a zone as people told it. Null when the yard has no such zone in use. */
export async function readZoneSun(database: Sequelize, yardId: string, zoneId: string): Promise<ZoneSunRow | null> {
  const [row] = await database.query<ZoneSunRow>(
    `SELECT z.id AS "zoneId", z.name AS "zoneName", y.latitude_deg AS "latitudeDeg", y.longitude_deg AS "longitudeDeg", y.time_zone AS "timeZone", z.sun_hours AS "sunHours",
       z.sun_hours_on::text AS "sunHoursOn", z.horizon_deg AS "horizonDeg",
       COALESCE((SELECT json_agg(json_build_object('on', p."on", 'sunnyHours', p.sunny_hours, 'personId', u.id, 'personName', u.name) ORDER BY p."on" DESC)
         FROM sun_diary_pages p LEFT JOIN users u ON u.id = p.noted_by WHERE p.yard_id = z.yard_id AND p.zone_id = z.id), '[]'::json) AS pages
     FROM zones z JOIN yards y ON y.id = z.yard_id WHERE z.yard_id = $1 AND z.id = $2 AND z.archived_at IS NULL`,
    { bind: [yardId, zoneId], type: QueryTypes.SELECT },
  );
  return row ?? null;
}
