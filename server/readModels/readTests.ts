import { QueryTypes, type Sequelize } from 'sequelize';
import type { BucketTestResponse } from '@/shared/contracts/equipment';
import type { CatchTestResponse } from '@/shared/contracts/catchTests';
import { expiredBecauseSql } from './positionRates';

type Tested<T extends { testedAt: string }> = Omit<T, 'testedAt'> & { testedAt: Date };
export type BucketTestRow = Tested<BucketTestResponse>;
export type CatchTestRow = Tested<CatchTestResponse>;

const tester = `CASE WHEN u.id IS NULL THEN NULL ELSE json_build_object('id', u.id, 'name', u.name) END AS "testedBy"`;

/** Bucket tests of a tap, newest first. @param testId - only this one */
export async function readBucketTests(database: Sequelize, yardId: string, tapId: string, testId: string | null = null): Promise<BucketTestRow[]> {
  return database.query<BucketTestRow>(
    `SELECT t.id, t.tap_id AS "tapId", t.hose_id AS "hoseId", t.sprinkler_id AS "sprinklerId", t.volume_l AS "volumeL", t.seconds, t.flow_lpm AS "flowLpm",
       t.flow_low_lpm AS "flowLowLpm", t.flow_high_lpm AS "flowHighLpm", t.tested_at AS "testedAt", ${tester}
     FROM bucket_tests t LEFT JOIN users u ON u.id = t.tested_by
     WHERE t.yard_id = $1 AND t.tap_id = $2 AND ($3::uuid IS NULL OR t.id = $3) ORDER BY t.tested_at DESC, t.created_at DESC, t.id`,
    { bind: [yardId, tapId, testId], type: QueryTypes.SELECT },
  );
}

/**
 * Catch-cup tests of a position, newest first, each with why it no longer holds.
 * @param now - instant of asking: tests grow old
 * @param testId - only this one
 */
export async function readCatchTests(database: Sequelize, yardId: string, positionId: string, now: Date, testId: string | null = null): Promise<CatchTestRow[]> {
  return database.query<CatchTestRow>(
    `SELECT t.id, t.position_id AS "positionId", t.layout, t.reading, t.readings, t.minutes, t.wind, t.note, t.result, t.tested_at AS "testedAt",
       ${expiredBecauseSql('$4')} AS "expiredBecause", ${tester}
     FROM catch_tests t
     JOIN positions p ON p.yard_id = t.yard_id AND p.id = t.position_id
     JOIN sprinklers s ON s.yard_id = p.yard_id AND s.id = p.sprinkler_id
     LEFT JOIN hoses h ON h.yard_id = p.yard_id AND h.id = p.hose_id
     LEFT JOIN users u ON u.id = t.tested_by
     WHERE t.yard_id = $1 AND t.position_id = $2 AND ($3::uuid IS NULL OR t.id = $3) ORDER BY t.tested_at DESC, t.created_at DESC, t.id`,
    { bind: [yardId, positionId, testId, now], type: QueryTypes.SELECT },
  );
}

/** Whether a thing belongs to a yard, in use or not: history stays readable. */
export async function isInYard(database: Sequelize, table: 'taps' | 'positions', yardId: string, id: string): Promise<boolean> {
  const rows = await database.query(`SELECT 1 FROM ${table} WHERE yard_id = $1 AND id = $2`, { bind: [yardId, id], type: QueryTypes.SELECT });
  return rows.length > 0;
}
