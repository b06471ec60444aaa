import { QueryTypes, type Sequelize } from 'sequelize';
import { rateFromFlow } from '@/scheduling/sprinkler';
import type { GuardedGround, RateSource, SprinklerKind, TestExpiryCause } from '@/shared/contracts/equipment';
import { limits } from '@/shared/limits';

/** Why a catch-cup test `t` no longer describes its position `p` with hose `h` and sprinkler `s` at the instant `$n`; null while it does. */
export const expiredBecauseSql = (instant: string): string => `CASE
        WHEN t.tap_id <> p.tap_id THEN 'tap_changed'
        WHEN t.hose_id IS DISTINCT FROM p.hose_id OR h.changed_at > t.tested_at THEN 'hose_changed'
        WHEN t.sprinkler_id IS DISTINCT FROM p.sprinkler_id OR s.changed_at > t.tested_at THEN 'sprinkler_changed'
        WHEN t.tested_at < ${instant}::timestamptz - interval '${limits.catchTestValidDays} days' THEN 'season_changed'
      END`;

/**
 * Positions in use with their newest catch-cup test that still holds, or, when none holds, the newest and why it ended.
 * Parameters: $1 the yard, $2 the instant of asking.
 */
export const positionSql = `
  SELECT p.id, p.name, p.zone_id AS "zoneId", p.tap_id AS "tapId", p.hose_id AS "hoseId", p.sprinkler_id AS "sprinklerId", p.mark,
    p.wetted_area_m2 AS "wettedAreaM2", p.wetted_area_is_default AS "wettedAreaIsDefault", p.sort_order AS "sortOrder",
    p.height_m AS "heightM", p.weekly_limit_over AS "weeklyLimitOver", p.weekly_limit_mm AS "weeklyLimitMm", p.weekly_limit_source AS "weeklyLimitSource",
    p.alternate_sets AS "alternateSets", h.length_m AS "hoseLengthM", s.kind AS "sprinklerKind",
    z.area_m2 AS "zoneAreaM2", a.flow_lpm AS "flowLpm", a.flow_is_default AS "flowIsDefault",
    c.id AS "testId", c.tested_at AS "testedAt", c.rate_mm_per_hour AS "testedRateMmPerHour", c.low_quarter_uniformity AS "testedLowQuarterUniformity",
    c.run_time_multiplier AS "testedRunTimeMultiplier", c.expired_because AS "testExpiredBecause"
  FROM positions p
  JOIN zones z ON z.yard_id = p.yard_id AND z.id = p.zone_id
  JOIN taps a ON a.yard_id = p.yard_id AND a.id = p.tap_id
  JOIN sprinklers s ON s.yard_id = p.yard_id AND s.id = p.sprinkler_id
  LEFT JOIN hoses h ON h.yard_id = p.yard_id AND h.id = p.hose_id
  LEFT JOIN LATERAL (
    SELECT * FROM (
      SELECT t.*, ${expiredBecauseSql('$2')} AS expired_because
      FROM catch_tests t WHERE t.yard_id = p.yard_id AND t.position_id = p.id
    ) judged
    ORDER BY judged.expired_because IS NOT NULL, judged.tested_at DESC, judged.created_at DESC LIMIT 1
  ) c ON true
  WHERE p.yard_id = $1 AND p.archived_at IS NULL ORDER BY p.sort_order, p.created_at, p.id`;

/** One row of `positionSql`. */
export interface PositionRow {
  id: string;
  name: string;
  zoneId: string;
  tapId: string;
  hoseId: string | null;
  sprinklerId: string;
  mark: string;
  wettedAreaM2: number;
  wettedAreaIsDefault: boolean;
  sortOrder: number;
  heightM: number | null;
  weeklyLimitOver: GuardedGround | null;
  weeklyLimitMm: number | null;
  weeklyLimitSource: string | null;
  alternateSets: boolean;
  /** Null without a hose. */
  hoseLengthM: number | null;
  sprinklerKind: SprinklerKind;
  zoneAreaM2: number;
  flowLpm: number;
  flowIsDefault: boolean;
  testId: string | null;
  testedAt: Date | string | null;
  testedRateMmPerHour: number | null;
  testedLowQuarterUniformity: number | null;
  testedRunTimeMultiplier: number | null;
  testExpiredBecause: TestExpiryCause | null;
}

/** What one position lays down, and on what knowledge. */
export interface PositionRate {
  positionId: string;
  zoneId: string;
  /** Mean depth per hour on the wetted area [mm/h]. */
  rateMmPerHour: number;
  /** True when no catch-cup test stands behind the rate. */
  rateIsDefault: boolean;
  rateSource: RateSource;
  /** From the lower half of the test, at least 1; 1 without a test. */
  runTimeMultiplier: number;
  /** From the test, null without one. */
  lowQuarterUniformity: number | null;
  /** Part of the zone's area that the position wets, above 0; those of one zone add up to 1 at most. */
  zoneShare: number;
}

/**
 * The rate of every position: from its newest catch-cup test that still holds; otherwise from flow and wetted area. That is called
 * 'flow_and_area' where the flow was measured or told, 'default' where nobody knows it.
 * @param rows - all positions of a yard, since shares of a zone depend on each other
 */
export function ratesOf(rows: readonly PositionRow[]): Map<string, PositionRate> {
  const wettedByZone = new Map<string, number>();
  for (const row of rows) {
    wettedByZone.set(row.zoneId, (wettedByZone.get(row.zoneId) ?? 0) + row.wettedAreaM2);
  }
  return new Map(rows.map((row) => {
    const isTested = row.testId !== null && row.testExpiredBecause === null && row.testedRateMmPerHour !== null;
    return [row.id, {
      positionId: row.id,
      zoneId: row.zoneId,
      rateMmPerHour: isTested && row.testedRateMmPerHour !== null ? row.testedRateMmPerHour : rateFromFlow(row.flowLpm, row.wettedAreaM2),
      rateIsDefault: !isTested,
      rateSource: isTested ? 'catch_test' : row.flowIsDefault ? 'default' : 'flow_and_area',
      runTimeMultiplier: isTested ? row.testedRunTimeMultiplier ?? 1 : 1,
      lowQuarterUniformity: isTested ? row.testedLowQuarterUniformity : null,
      // Wetted areas that add up to more than the zone overlap or fall outside it.
      zoneShare: row.wettedAreaM2 / Math.max(row.zoneAreaM2, wettedByZone.get(row.zoneId) ?? 0),
    }];
  }));
}

/**
 * Rates of all positions in use of a yard, by position.
 * @param now - instant for which they are asked: tests grow old
 */
export async function positionRates(database: Sequelize, yardId: string, now: Date): Promise<Map<string, PositionRate>> {
  const rows = await database.query<PositionRow>(positionSql, { bind: [yardId, now], type: QueryTypes.SELECT });
  return ratesOf(rows);
}
