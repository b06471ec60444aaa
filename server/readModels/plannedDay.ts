import { QueryTypes, type Sequelize } from 'sequelize';
import type { Reason } from '@/scheduling/planning/types';
import type { SetKind } from '@/shared/contracts/plans';

/** One set of the newest plan, with the names that people know it by. */
export interface PlannedDaySet {
  id: string;
  planId: string;
  zoneId: string;
  zoneName: string;
  positionId: string;
  positionName: string;
  /** Where the position is, in the words of the yard. */
  mark: string;
  tapId: string;
  kind: SetKind;
  roundIndex: number;
  sortOrder: number;
  startMinutes: number;
  minutes: number;
  startAt: Date;
  endAt: Date;
  depthMm: number;
  grossMm: number;
  halfWay: boolean;
  reasons: Reason[];
  /** True when the round was started already, or left out by somebody. */
  begun: boolean;
}

/** Moves within the rounds of a day: the hose of a tap goes to another position between two sets of one round. */
export function movesIn(sets: readonly PlannedDaySet[]): number {
  const last = new Map<string, string>();
  let moves = 0;
  for (const set of sets) {
    const place = `${set.roundIndex} ${set.tapId}`;
    const before = last.get(place);
    moves += before !== undefined && before !== set.positionId ? 1 : 0;
    last.set(place, set.positionId);
  }
  return moves;
}

/** The sets that the newest plan of a yard has for a civil day, in the order in which they are done. */
export function plannedDaySets(database: Sequelize, yardId: string, on: string): Promise<PlannedDaySet[]> {
  return database.query<PlannedDaySet>(
    `SELECT s.id, s.plan_id AS "planId", s.zone_id AS "zoneId", z.name AS "zoneName", s.position_id AS "positionId", p.name AS "positionName", p.mark, s.tap_id AS "tapId",
       s.kind, s.round_index AS "roundIndex", s.sort_order AS "sortOrder", s.start_minutes AS "startMinutes", s.minutes, s.start_at AS "startAt", s.end_at AS "endAt",
       s.depth_mm AS "depthMm", s.gross_mm AS "grossMm", s.half_way AS "halfWay", s.reasons,
       EXISTS (SELECT FROM round_sets r WHERE r.yard_id = s.yard_id AND r."on" = s."on" AND r.round_index = s.round_index) AS begun
     FROM plan_sets s
     JOIN zones z ON z.yard_id = s.yard_id AND z.id = s.zone_id
     JOIN positions p ON p.yard_id = s.yard_id AND p.id = s.position_id
     WHERE s.yard_id = $1 AND s."on" = $2::date AND s.plan_id = (SELECT id FROM plans WHERE yard_id = $1 ORDER BY version DESC LIMIT 1)
     ORDER BY s.start_at, s.sort_order`,
    { bind: [yardId, on], type: QueryTypes.SELECT },
  );
}
