import type {
  HoseAndBucketRequest, MoveDistanceRequest, ReferenceEtRequest, SeedbedRequest, SoilStoreRequest, SunExposureRequest, WaterBalanceRequest,
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

/** A zone of 10 by 8 m at 45° north with a house along its south side and a maple at its west. */
export const sunExposureBody: SunExposureRequest = {
  latitudeDeg: 45, longitudeDeg: -93, outline: [{ eastM: 0, northM: 0 }, { eastM: 10, northM: 0 }, { eastM: 10, northM: 8 }, { eastM: 0, northM: 8 }],
  obstacles: [
    { kind: 'building', footprint: [{ eastM: -2, northM: -12 }, { eastM: 12, northM: -12 }, { eastM: 12, northM: -3 }, { eastM: -2, northM: -3 }], heightM: 6 },
    { kind: 'tree', at: { eastM: -5, northM: 4 }, crownBaseM: 2, topM: 11, crownRadiusM: 4, leaves: 'deciduous' },
    { kind: 'fence', line: [{ eastM: 11, northM: -3 }, { eastM: 11, northM: 9 }], heightM: 1.8 },
  ],
  temperatures: { warmest: { tminC: 16, tmaxC: 28 }, coldest: { tminC: -12, tmaxC: -4 } },
};
