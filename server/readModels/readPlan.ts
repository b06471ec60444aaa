import { QueryTypes, type Sequelize } from 'sequelize';
import type { PlanResult } from '@/scheduling/planning/types';
import { plannedSetJson, type PlannedSetRow } from './readToday';

export interface PlanRow {
  version: number;
  createdAt: Date;
  cause: string;
  planner: string;
  fromOn: string;
  toOn: string;
  weatherAsOf: Date | null;
  result: PlanResult;
  sets: PlannedSetRow[] | null;
}

/** The newest plan of a yard with its sets, also those of rounds already begun. Null before there is one. */
export async function readPlan(database: Sequelize, yardId: string): Promise<PlanRow | null> {
  const [row] = await database.query<PlanRow>(
    `SELECT p.version, p.created_at AS "createdAt", p.cause, p.planner, p.from_on::text AS "fromOn", p.to_on::text AS "toOn", p.weather_as_of AS "weatherAsOf", p.result,
       (SELECT json_agg(${plannedSetJson} ORDER BY s.start_at, s.sort_order) FROM plan_sets s WHERE s.yard_id = p.yard_id AND s.plan_id = p.id) AS sets
     FROM plans p WHERE p.yard_id = $1 ORDER BY p.version DESC LIMIT 1`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
  return row ?? null;
}
