import type {
  HoseAndBucketRequest, MoveDistanceRequest, ReferenceEtRequest, SeedbedRequest, SoilStoreRequest, WaterBalanceRequest,
} from '@/shared/contracts/calculators';

/** FAO-56 example 18: Uccle, 6 July, wind 10 km/h at 10 m. */
export const referenceEtBody: ReferenceEtRequest = {
  latitudeDeg: 50.8, elevationM: 100, on: '2026-07-06', tminC: 12.3, tmaxC: 21.5, rhMinPct: 63, rhMaxPct: 84, windMps: 10 / 3.6, windHeightM: 10, sunshineHours: 9.25,
};

/** A row of cups that falls off evenly, in a yard of 20 by 15 m. */
export const moveDistanceBody: MoveDistanceRequest = {
  pattern: { kind: 'full_circle', distancesM: [0.5, 2, 4, 6, 7.5], ratesMmPerHour: [15, 12, 8, 4, 1] }, arrangement: 'square', zone: { widthM: 20, lengthM: 15 },
};

/** Five gallons in 60 s through 50 ft of 5/8 in hose, and 100 ft instead. */
export const hoseAndBucketBody: HoseAndBucketRequest = {
  bucketL: 18.92705892, seconds: 60, hose: { lengthM: 15.24, boreMm: 15.875 }, newHose: { lengthM: 30.48, boreMm: 15.875 }, wettedAreaM2: 139.35456,
};

export const soilStoreBody: SoilStoreRequest = { texture: 'clay', grass: 'kentucky_bluegrass', slopePct: 6, rateMmPerHour: 10, demandMm: 5 };

/** FAO-56 example 37 in its numbers: ETc 6 mm a day, no water. */
export const waterBalanceBody: WaterBalanceRequest = {
  texture: 'loam', grass: 'tall_fescue', cropCoefficient: 1, startOn: '2026-07-01', startDepletionMm: 3, days: [{ et0Mm: 6 }, { et0Mm: 5, precipitationMm: 9 }, { et0Mm: 5, irrigationMm: 12 }],
};

const fineDay = { tminC: 12, tmaxC: 27, tdewC: 10, windMps: 2, windHeightM: 2, precipitationMm: 0 };
export const seedbedBody: SeedbedRequest = {
  latitudeDeg: 45, startOn: '2026-06-13', days: [fineDay, fineDay, fineDay], texture: 'loam', grass: 'perennial_ryegrass',
  doses: { timesMinutes: [570, 840], depthMm: 1.6, rateMmPerHour: 6 },
};
