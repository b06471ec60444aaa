import { QueryTypes, type Sequelize } from 'sequelize';
import type { Role } from '@/shared/contracts/common';

export interface PortfolioYard {
  yardId: string;
  name: string;
  placeName: string;
  role: Role;
  timeZone: string;
  owners: string[];
  taps: number;
  zones: number;
  positions: number;
  untestedPositions: number;
  homeWindows: number;
  openProposals: number;
  /** When the water of the running round should have been moved or turned off; null when none runs. */
  waterDueAt: Date | null;
}

/** The yards of a person with what can be counted about each. */
export function readPortfolioYards(database: Sequelize, userId: string): Promise<PortfolioYard[]> {
  return database.query<PortfolioYard>(
    `WITH mine AS (
       SELECT y.id, y.name, y.place_name, y.time_zone, m.role FROM memberships m JOIN yards y ON y.id = m.yard_id WHERE m.user_id = $1
     ), owners AS (
       SELECT m.yard_id, array_agg(u.name ORDER BY u.name) AS names FROM mine JOIN memberships m ON m.yard_id = mine.id JOIN users u ON u.id = m.user_id
       WHERE m.role = 'owner' GROUP BY m.yard_id
     ), taps AS (
       SELECT t.yard_id, count(*)::int AS n FROM mine JOIN taps t ON t.yard_id = mine.id WHERE t.archived_at IS NULL GROUP BY t.yard_id
     ), zones AS (
       SELECT z.yard_id, count(*)::int AS n FROM mine JOIN zones z ON z.yard_id = mine.id WHERE z.archived_at IS NULL GROUP BY z.yard_id
     ), positions AS (
       SELECT p.yard_id, count(*)::int AS n,
         -- a test with another hose, sprinkler or tap no longer speaks for the position
         (count(*) FILTER (WHERE NOT EXISTS (
           SELECT FROM catch_tests c WHERE c.yard_id = p.yard_id AND c.position_id = p.id AND c.sprinkler_id = p.sprinkler_id
             AND c.tap_id IS NOT DISTINCT FROM p.tap_id AND c.hose_id IS NOT DISTINCT FROM p.hose_id
         )))::int AS untested
       FROM mine JOIN positions p ON p.yard_id = mine.id WHERE p.archived_at IS NULL GROUP BY p.yard_id
     ), windows AS (
       SELECT h.yard_id, count(*)::int AS n FROM mine JOIN home_windows h ON h.yard_id = mine.id GROUP BY h.yard_id
     ), open AS (
       SELECT p.yard_id, count(*)::int AS n FROM mine JOIN proposals p ON p.yard_id = mine.id WHERE p.status = 'open' GROUP BY p.yard_id
     ), running AS (
       -- a running set's end, or when the last one was cut short: since then the hose should have been moved or the tap closed
       SELECT r.yard_id, max(CASE WHEN s.status = 'running' THEN s.started_at + make_interval(secs => (s.planned_minutes + s.added_minutes) * 60) ELSE s.ended_at END) AS due_at
       FROM mine JOIN rounds r ON r.yard_id = mine.id JOIN round_sets s ON s.yard_id = r.yard_id AND s.round_id = r.id WHERE r.status = 'running' GROUP BY r.yard_id
     )
     SELECT mine.id AS "yardId", mine.name, mine.place_name AS "placeName", mine.role, mine.time_zone AS "timeZone", COALESCE(owners.names, '{}') AS owners,
       COALESCE(taps.n, 0) AS taps, COALESCE(zones.n, 0) AS zones, COALESCE(positions.n, 0) AS positions, COALESCE(positions.untested, 0) AS "untestedPositions",
       COALESCE(windows.n, 0) AS "homeWindows", COALESCE(open.n, 0) AS "openProposals", running.due_at AS "waterDueAt"
     FROM mine LEFT JOIN owners ON owners.yard_id = mine.id LEFT JOIN taps ON taps.yard_id = mine.id LEFT JOIN zones ON zones.yard_id = mine.id
     LEFT JOIN positions ON positions.yard_id = mine.id LEFT JOIN windows ON windows.yard_id = mine.id LEFT JOIN open ON open.yard_id = mine.id
     LEFT JOIN running ON running.yard_id = mine.id`,
    { bind: [userId], type: QueryTypes.SELECT },
  );
}

export interface PortfolioZone {
  yardId: string;
  zoneId: string;
  name: string;
  seededOn: string | null;
  resting: boolean;
}

export function readPortfolioZones(database: Sequelize, yardIds: readonly string[]): Promise<PortfolioZone[]> {
  return database.query<PortfolioZone>(
    `SELECT yard_id AS "yardId", id AS "zoneId", name, seeded_on::text AS "seededOn", resting FROM zones
     WHERE yard_id = ANY($1::uuid[]) AND archived_at IS NULL ORDER BY yard_id, priority, name, id`,
    { bind: [yardIds], type: QueryTypes.SELECT },
  );
}

export interface PortfolioBudgetDay {
  yardId: string;
  zoneId: string;
  on: string;
  /** In the morning, new roots and what somebody found in the ground counted [mm]. */
  depletionStartMm: number;
  depletionEndMm: number;
  irrigationMm: number;
  effectiveRainMm: number;
  refillLineMm: number;
  totalAvailableMm: number;
}

/** Stored balance of all zones between two civil days, both included. */
export function readPortfolioBudget(database: Sequelize, yardIds: readonly string[], fromOn: string, toOn: string): Promise<PortfolioBudgetDay[]> {
  return database.query<PortfolioBudgetDay>(
    `SELECT yard_id AS "yardId", zone_id AS "zoneId", "on"::text AS "on", LEAST(total_available_mm, GREATEST(0, depletion_start_mm + root_growth_mm + observation_mm)) AS "depletionStartMm", depletion_end_mm AS "depletionEndMm",
       irrigation_mm AS "irrigationMm", effective_rain_mm AS "effectiveRainMm", refill_line_mm AS "refillLineMm", total_available_mm AS "totalAvailableMm"
     FROM budget_days WHERE yard_id = ANY($1::uuid[]) AND "on" BETWEEN $2::date AND $3::date ORDER BY yard_id, zone_id, "on"`,
    { bind: [yardIds, fromOn, toOn], type: QueryTypes.SELECT },
  );
}

export interface PortfolioPlan {
  yardId: string;
  /** Zones for which the newest plan found too little time, and by how much in all [min]. */
  shortZones: number;
  shortMinutes: number;
  /** Zones without a set by civil day, with the reasons, as the planner gave them. */
  zonesWithout: { on: string; zonesWithout: { zoneId: string; reasons: { code: string; values: Record<string, number | string> }[] }[] }[];
  /** Zones that have a set or dose from now on, with the first day of one. */
  nextSets: { zoneId: string; on: string }[];
}

/** What the newest plan of each yard says of shortages, of zones it does not water today, and of the next set of each zone. */
export function readPortfolioPlans(database: Sequelize, yardIds: readonly string[], fromOn: string, toOn: string, now: Date): Promise<PortfolioPlan[]> {
  return database.query<PortfolioPlan>(
    `WITH newest AS (SELECT DISTINCT ON (yard_id) yard_id, id, result FROM plans WHERE yard_id = ANY($1::uuid[]) ORDER BY yard_id, version DESC)
     SELECT n.yard_id AS "yardId", short.zones AS "shortZones", short.minutes AS "shortMinutes", COALESCE(days.zones, '[]') AS "zonesWithout", COALESCE(next.sets, '[]') AS "nextSets"
     FROM newest n
     -- a shortage tells how far a zone is behind at the end of a day, so its days are not added up: the worst day of each zone counts
     CROSS JOIN LATERAL (
       SELECT count(*)::int AS zones, COALESCE(sum(worst.minutes), 0) AS minutes
       FROM (SELECT max((s->>'shortMinutes')::float8) AS minutes FROM jsonb_array_elements(n.result->'shortages') s GROUP BY s->>'zoneId') worst
     ) short
     CROSS JOIN LATERAL (
       SELECT jsonb_agg(jsonb_build_object('on', d->>'on', 'zonesWithout', d->'zonesWithout')) AS zones FROM jsonb_array_elements(n.result->'days') d
       WHERE d->>'on' BETWEEN $2 AND $3
     ) days
     CROSS JOIN LATERAL (
       SELECT jsonb_agg(jsonb_build_object('zoneId', f.zone_id, 'on', f."on")) AS sets FROM (
         SELECT s.zone_id, min(s."on") AS "on" FROM plan_sets s WHERE s.yard_id = n.yard_id AND s.plan_id = n.id AND s.end_at > $4 GROUP BY s.zone_id
       ) f
     ) next`,
    { bind: [yardIds, fromOn, toOn, now], type: QueryTypes.SELECT },
  );
}
