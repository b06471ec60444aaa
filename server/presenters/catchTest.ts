import type { CatchTestRow } from '@/server/readModels/readTests';
import type { CatchTestResponse } from '@/shared/contracts/catchTests';
import { instantOf } from './equipment';

export function presentCatchTest(row: CatchTestRow): CatchTestResponse {
  return {
    id: row.id, positionId: row.positionId, layout: row.layout, reading: row.reading, readings: row.readings, minutes: row.minutes,
    wind: row.wind, note: row.note, result: row.result, testedAt: instantOf(row.testedAt), testedBy: row.testedBy,
    expiredBecause: row.expiredBecause,
  };
}
