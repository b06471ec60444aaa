import { ratesOf, type PositionRate, type PositionRow } from '@/server/readModels/positionRates';
import type { BucketTestRow } from '@/server/readModels/readTests';
import type { TapRow } from '@/server/readModels/readYard';
import type { BucketTestResponse, HoseResponse, PositionResponse, SprinklerResponse, TapResponse } from '@/shared/contracts/equipment';

/** An instant as answers write it; the database hands it over as a date or, inside JSON, as text. */
export function instantOf(instant: Date | string): string {
  return new Date(instant).toISOString();
}

export function presentTap(tap: TapRow): TapResponse {
  return {
    id: tap.id, name: tap.name, flowLpm: tap.flowLpm, flowIsDefault: tap.flowIsDefault, shutOffTimer: tap.shutOffTimer,
    lastTestedAt: tap.lastTestedAt === null ? null : instantOf(tap.lastTestedAt),
  };
}

export function presentHose(hose: HoseResponse): HoseResponse {
  return { id: hose.id, name: hose.name, lengthM: hose.lengthM, boreMm: hose.boreMm };
}

export function presentSprinkler(sprinkler: SprinklerResponse): SprinklerResponse {
  return { id: sprinkler.id, name: sprinkler.name, kind: sprinkler.kind };
}

function presentPosition(row: PositionRow, rate: PositionRate): PositionResponse {
  return {
    id: row.id, name: row.name, zoneId: row.zoneId, tapId: row.tapId, hoseId: row.hoseId, sprinklerId: row.sprinklerId, mark: row.mark,
    wettedAreaM2: row.wettedAreaM2, wettedAreaIsDefault: row.wettedAreaIsDefault, sortOrder: row.sortOrder,
    heightM: row.heightM, alternateSets: row.alternateSets,
    weeklyLimit: row.weeklyLimitOver === null || row.weeklyLimitMm === null ? null : { over: row.weeklyLimitOver, depthMm: row.weeklyLimitMm, source: row.weeklyLimitSource ?? '' },
    rateMmPerHour: rate.rateMmPerHour, rateSource: rate.rateSource, lowQuarterUniformity: rate.lowQuarterUniformity, runTimeMultiplier: rate.runTimeMultiplier,
    lastCatchTestId: row.testId, lastTestedAt: row.testedAt === null ? null : instantOf(row.testedAt), testExpiredBecause: row.testExpiredBecause,
  };
}

/** All positions of a yard with their rates, in the order given. */
export function presentPositions(rows: readonly PositionRow[]): PositionResponse[] {
  const rates = ratesOf(rows);
  return rows.flatMap((row) => {
    const rate = rates.get(row.id);
    return rate ? [presentPosition(row, rate)] : [];
  });
}

export function presentBucketTest(row: BucketTestRow): BucketTestResponse {
  return {
    id: row.id, tapId: row.tapId, hoseId: row.hoseId, sprinklerId: row.sprinklerId, volumeL: row.volumeL, seconds: row.seconds,
    flowLpm: row.flowLpm, flowLowLpm: row.flowLowLpm, flowHighLpm: row.flowHighLpm, testedAt: instantOf(row.testedAt), testedBy: row.testedBy,
  };
}
