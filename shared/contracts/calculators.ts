import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { civilDaySchema } from './common';
import { grassIds, soilCompactions, soilTextures } from './zones';

/** Something that was not measured: what it was taken for and who says so. */
export const assumptionSchema = z.object({ field: z.string(), method: z.string(), source: z.string() });
export type AssumptionResponse = z.infer<typeof assumptionSchema>;
const assumptions = z.array(assumptionSchema);

const numbers = z.array(z.number());
const latitudeDeg = z.number().min(-90).max(90);
const longitudeDeg = z.number().min(-180).max(180);
const elevationM = z.number().min(-450).max(6_000);
/** Records of temperature on Earth, with a little room [°C]. */
const airC = z.number().min(-95).max(65);
const share = z.number().min(0).max(1);
const rateMmPerHour = z.number().gt(0, 'A sprinkler applies something.').max(500);
const depthMm = z.number().gt(0).max(200);
const hoseSchema = z.object({ lengthM: z.number().min(0).max(limits.hoseLengthMaxM), boreMm: z.number().min(limits.hoseBoreMinMm).max(limits.hoseBoreMaxMm), smoothness: z.number().min(40).max(160).optional() });

const weatherFields = {
  tminC: airC.nullable().default(null), tmaxC: airC.nullable().default(null), tdewC: z.number().min(-110).max(45).nullable().default(null),
  rhMaxPct: z.number().min(0).max(100).nullable().default(null), rhMinPct: z.number().min(0).max(100).nullable().default(null), rhMeanPct: z.number().min(0).max(100).nullable().default(null),
  windMps: z.number().min(0).max(120).nullable().default(null), windHeightM: z.number().min(0.25).max(300).nullable().default(null),
  solarMjM2: z.number().min(0).max(50).nullable().default(null), sunshineHours: z.number().min(0).max(24).nullable().default(null),
  precipitationMm: z.number().min(0).max(2_000).nullable().default(null),
};
type WeatherValues = Record<'tminC' | 'tmaxC' | 'tdewC' | 'rhMinPct' | 'rhMaxPct', number | null>;

/** What no day of weather can be, with the field at fault. */
function impossibleWeather({ tminC, tmaxC, tdewC, rhMinPct, rhMaxPct }: WeatherValues): { path: string; message: string }[] {
  const found: { path: string; message: string }[] = [];
  if (tminC !== null && tmaxC !== null && tminC > tmaxC) found.push({ path: 'tminC', message: 'The lowest temperature cannot lie above the highest.' });
  if (tdewC !== null && tmaxC !== null && tdewC > tmaxC) found.push({ path: 'tdewC', message: 'The dew point cannot lie above the highest temperature.' });
  if (rhMinPct !== null && rhMaxPct !== null && rhMinPct > rhMaxPct) found.push({ path: 'rhMinPct', message: 'The lowest humidity cannot lie above the highest.' });
  return found;
}

/** One day of weather; null is not known. */
const weatherDaySchema = z.object(weatherFields).superRefine((day, issue) => {
  impossibleWeather(day).forEach(({ path, message }) => issue.addIssue({ code: 'custom', path: [path], message }));
});

/** Reference ET of a day. The lowest and highest temperature are wanted; whatever else is known makes it better. */
export const referenceEtRequestSchema = z.object({
  latitudeDeg, elevationM: elevationM.nullable().default(null), on: civilDaySchema, ...weatherFields, tminC: airC, tmaxC: airC,
  coastal: z.boolean().default(false), arid: z.boolean().default(false), clearSky: z.enum(['simple', 'physical']).default('physical'),
}).superRefine((day, issue) => {
  impossibleWeather(day).forEach(({ path, message }) => issue.addIssue({ code: 'custom', path: [path], message }));
});
export type ReferenceEtRequest = z.input<typeof referenceEtRequestSchema>;
export const referenceEtResponseSchema = z.object({
  et0Mm: z.number(), method: z.enum(['penman-monteith', 'hargreaves']), radiationMjM2: z.number(), byHourMm: numbers, assumptions,
  terms: z.object({
    tmeanC: z.number(), pressureKpa: z.number(), psychrometricKpaPerC: z.number(), slopeKpaPerC: z.number(), saturationVapourKpa: z.number(), actualVapourKpa: z.number(), vapourDeficitKpa: z.number(),
    windAtTwoMetresMps: z.number(), extraterrestrialMjM2: z.number(), daylightHours: z.number(), clearSkyMjM2: z.number(), solarMjM2: z.number(), relativeSolar: z.number(), netShortwaveMjM2: z.number(),
    netLongwaveMjM2: z.number(), netRadiationMjM2: z.number(), radiationTermMm: z.number(), windTermMm: z.number(), penmanMonteithMm: z.number(), hargreavesMm: z.number(),
  }),
});
export type ReferenceEtResponse = z.infer<typeof referenceEtResponseSchema>;

const profileFields = {
  /** From the sprinkler outwards [m]. */
  distancesM: z.array(z.number().min(0).max(100)).min(3, 'Three cups or more show how a pattern falls off.').max(60),
  ratesMmPerHour: z.array(z.number().min(0, 'A cup cannot hold less than nothing.').max(500)).min(3, 'Three cups or more show how a pattern falls off.').max(60),
};
export const movePatternSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('full_circle'), ...profileFields }),
  z.object({ kind: z.literal('part_circle'), fromDeg: z.number().min(-360).max(360), toDeg: z.number().min(-360).max(720), ...profileFields }),
  z.object({ kind: z.literal('oscillating'), widthM: z.number().gt(0).max(60), ...profileFields }),
  z.object({ kind: z.literal('travelling'), speedMPerHour: z.number().gt(0).max(200), ...profileFields }),
  z.object({
    kind: z.literal('grid'), rates: z.array(z.array(z.number().min(0, 'A cup cannot hold less than nothing.').max(500)).min(1).max(40)).min(1).max(40), spacingM: z.number().gt(0).max(30),
    sprinkler: z.object({ column: z.number().min(-40).max(80), row: z.number().min(-40).max(80) }),
  }),
]);
export const moveArrangements = ['line', 'square', 'triangle'] as const;

/** Pattern of one position, as its cups tell, and how positions lie. With a zone the distance is also judged by what falls outside it. */
export const moveDistanceRequestSchema = z.object({
  pattern: movePatternSchema, arrangement: z.enum(moveArrangements).default('square'), depthMm: depthMm.default(12.7),
  fromM: z.number().gt(0).max(200).optional(), toM: z.number().gt(0).max(200).optional(), count: z.number().int().min(2).max(80).optional(),
  zone: z.object({ widthM: z.number().min(1).max(limits.sideMaxM), lengthM: z.number().min(1).max(limits.sideMaxM) }).nullable().default(null),
}).superRefine(({ pattern, fromM, toM }, issue) => {
  const add = (path: (string | number)[], message: string) => issue.addIssue({ code: 'custom', path, message });
  if (fromM !== undefined && toM !== undefined && fromM > toM) add(['toM'], 'The longest distance cannot lie below the shortest.');
  if (pattern.kind === 'grid') {
    const cups = pattern.rates.flat();
    if (pattern.rates.some((row) => row.length !== (pattern.rates[0]?.length ?? 0))) add(['pattern', 'rates'], 'Every row needs as many cups.');
    else if (cups.length === 1) add(['pattern', 'rates'], 'One cup says nothing about a pattern: set out four or more.');
    else if (cups.every((rate) => rate === 0)) add(['pattern', 'rates'], 'No cup caught any water.');
    return;
  }
  if (pattern.distancesM.length !== pattern.ratesMmPerHour.length) add(['pattern', 'ratesMmPerHour'], `Give one rate for each of the ${pattern.distancesM.length} distances.`);
  else if (pattern.ratesMmPerHour.every((rate) => rate === 0)) add(['pattern', 'ratesMmPerHour'], 'No cup caught any water.');
  pattern.distancesM.forEach((distance, index) => {
    if (index > 0 && distance <= (pattern.distancesM[index - 1] ?? 0)) add(['pattern', 'distancesM', index], 'Each cup must stand farther out than the one before.');
  });
  if (pattern.kind === 'part_circle' && pattern.fromDeg === pattern.toDeg) add(['pattern', 'toDeg'], 'A sector needs a width.');
});
export type MoveDistanceRequest = z.input<typeof moveDistanceRequestSchema>;
const evennessFields = {
  meanMmPerHour: z.number(), lowQuarterUniformity: z.number(), lowHalfUniformity: z.number(), christiansenPct: z.number(), runTimeMultiplier: z.number(), lowQuarterMultiplier: z.number().nullable(), setMinutes: z.number().nullable(),
};
const zoneOptionFields = {
  moveM: z.number(), rowMoveM: z.number(), meanMmPerHour: z.number(), lowQuarterUniformity: z.number(), lowHalfUniformity: z.number(), christiansenPct: z.number(), wastedShare: z.number(), lowQuarterEfficiency: z.number(),
};
const cellSchema = z.object({ columns: z.number(), rows: z.number(), ratesMmPerHour: numbers });
export const moveDistanceResponseSchema = z.object({
  bestM: z.number(), best: z.object(evennessFields), edgeToEdge: z.object({ moveM: z.number(), ...evennessFields }), overTwoRounds: z.object({ gain: z.number(), ...evennessFields }),
  options: z.array(z.object({ moveM: z.number(), meanMmPerHour: z.number(), lowQuarterUniformity: z.number(), lowHalfUniformity: z.number(), christiansenPct: z.number() })),
  inZone: z.object({
    best: z.object({ ...zoneOptionFields, positions: z.array(z.object({ xM: z.number(), yM: z.number() })), evenness: z.object(evennessFields), cell: cellSchema }), options: z.array(z.object(zoneOptionFields)),
  }).nullable(),
  reachXM: z.number(), reachYM: z.number(), cell: cellSchema, assumptions,
});
export type MoveDistanceResponse = z.infer<typeof moveDistanceResponseSchema>;

/** A bucket test through one hose, and what another would bring to the same sprinkler. */
export const hoseAndBucketRequestSchema = z.object({
  bucketL: z.number().gt(0, 'A bucket holds something.').max(limits.bucketMaxL), seconds: z.number().min(1).max(limits.bucketMaxSeconds), bucketTolerancePct: z.number().min(0).max(50).optional(),
  hose: hoseSchema, newHose: hoseSchema.nullable().default(null), tapPressureKpa: z.number().min(50).max(1_200).nullable().default(null),
  wettedAreaM2: z.number().gt(0).max(limits.areaMaxM2).nullable().default(null), depthMm: depthMm.default(12.7),
});
export type HoseAndBucketRequest = z.input<typeof hoseAndBucketRequestSchema>;
const hoseFlowFields = { lengthM: z.number(), boreMm: z.number(), flowLpm: z.number(), lossKpa: z.number(), pressureAtSprinklerKpa: z.number(), speedMps: z.number() };
export const hoseAndBucketResponseSchema = z.object({
  flowLpm: z.number(), flowRange: z.object({ low: z.number(), high: z.number() }), isTooFast: z.boolean(), tapPressureKpa: z.number(), measured: z.object(hoseFlowFields),
  newHose: z.object({ ...hoseFlowFields, changePct: z.number() }).nullable(), byHose: z.array(z.object(hoseFlowFields)), rateMmPerHour: z.number().nullable(), setMinutes: z.number().nullable(), newSetMinutes: z.number().nullable(), assumptions,
});
export type HoseAndBucketResponse = z.infer<typeof hoseAndBucketResponseSchema>;

/** What a root zone holds and how long a set may run before water runs off. */
export const soilStoreRequestSchema = z.object({
  texture: z.enum(soilTextures), grass: z.enum(grassIds), rootDepthM: z.number().min(0.02).max(1.5).nullable().default(null), slopePct: z.number().min(0).max(60).default(0),
  compaction: z.enum(soilCompactions).default('loose'), demandMm: z.number().min(0).max(20).nullable().default(null), rateMmPerHour, runTimeMultiplier: z.number().min(1).max(2).default(1), depletionMm: z.number().min(0).max(400).nullable().default(null),
});
export type SoilStoreRequest = z.input<typeof soilStoreRequestSchema>;
export const soilStoreResponseSchema = z.object({
  fieldCapacity: z.number(), wiltingPoint: z.number(), availableMmPerM: z.number(), rootDepthM: z.number(), rootDepthIsDefault: z.boolean(), totalAvailableMm: z.number(), refillLineMm: z.number(),
  depletionFraction: z.number(), demandMm: z.number(), depletionMm: z.number(), daysToRefillLine: z.number().nullable(), fillMinutes: z.number(), steadyIntakeMmPerHour: z.number(), startIntakeMmPerHour: z.number(),
  runLimitMinutes: z.number().nullable(), pondingMinutes: z.number().nullable(), surfaceStorageMm: z.number(),
  pattern: z.object({ cycles: z.number(), minutesPerCycle: z.number(), startsApartMinutes: z.number(), startMinutes: numbers }), assumptions,
});
export type SoilStoreResponse = z.infer<typeof soilStoreResponseSchema>;

/** Water of a lawn day by day: each day by its weather, or by its reference ET when that is known. */
export const waterBalanceRequestSchema = z.object({
  latitudeDeg: latitudeDeg.default(40), elevationM: elevationM.default(100), texture: z.enum(soilTextures), grass: z.enum(grassIds), rootDepthM: z.number().min(0.02).max(1.5).nullable().default(null),
  cropCoefficient: z.number().min(0).max(2).nullable().default(null), sunHours: z.number().min(0).max(24).nullable().default(null),
  ground: z.object({ slopePct: z.number().min(0).max(60).default(0), compaction: z.enum(soilCompactions).default('loose') }).nullable().default(null),
  startOn: civilDaySchema, startDepletionMm: z.number().min(0).max(400).default(0),
  days: z.array(z.object({ ...weatherFields, et0Mm: z.number().min(0).max(20).nullable().default(null), irrigationMm: z.number().min(0).max(200).default(0) }).superRefine((day, issue) => {
    impossibleWeather(day).forEach(({ path, message }) => issue.addIssue({ code: 'custom', path: [path], message }));
    if (day.et0Mm === null && (day.tminC === null || day.tmaxC === null)) issue.addIssue({ code: 'custom', path: ['et0Mm'], message: 'Give the reference ET of the day, or its lowest and highest temperature.' });
  })).min(1).max(60),
});
export type WaterBalanceRequest = z.input<typeof waterBalanceRequestSchema>;
export const waterBalanceResponseSchema = z.object({
  days: z.array(z.object({
    on: z.string(), et0Mm: z.number(), shadedEt0Mm: z.number(), cropCoefficient: z.number(), stressCoefficient: z.number(), potentialEtMm: z.number(), etcMm: z.number(), rainMm: z.number(), effectiveRainMm: z.number(),
    rainLossMm: z.number(), runoffMm: z.number(), irrigationMm: z.number(), drainageMm: z.number(), depletionStartMm: z.number(), depletionEndMm: z.number(), totalAvailableMm: z.number(), refillLineMm: z.number(), depletionFraction: z.number(), closingErrorMm: z.number(),
  })),
  totals: z.object({ usedMm: z.number(), rainMm: z.number(), effectiveRainMm: z.number(), runoffMm: z.number(), irrigationMm: z.number(), drainageMm: z.number() }),
  startDepletionMm: z.number(), endDepletionMm: z.number(), dueOn: z.string().nullable(), assumptions,
});
export type WaterBalanceResponse = z.infer<typeof waterBalanceResponseSchema>;

export const dropSizes = ['fine', 'medium', 'coarse', 'stream'] as const;
/** A seedbed under the same doses every day. Shares are of the open light, sky and wind. */
export const seedbedRequestSchema = z.object({
  latitudeDeg, elevationM: elevationM.default(100), startOn: civilDaySchema, days: z.array(weatherDaySchema).min(1).max(16), solarNoonHour: z.number().min(6).max(18).default(12),
  texture: z.enum(soilTextures), slopePct: z.number().min(0).max(60).default(0), mulchCover: share.default(0), radiationShare: share.default(1), skyView: share.default(1), windShare: share.default(1),
  doses: z.object({
    timesMinutes: z.array(z.number().int().min(0).max(1_439)).max(limits.dosesPerDayMax), depthMm: z.number().gt(0).max(limits.doseDepthMaxMm), rateMmPerHour, drops: z.enum(dropSizes).default('medium'),
  }),
  startDepletionMm: z.number().min(0).max(50).default(0), grass: z.enum(grassIds).nullable().default(null),
}).superRefine(({ days }, issue) => {
  if (days.every((day) => day.tminC === null || day.tmaxC === null)) issue.addIssue({ code: 'custom', path: ['days', 0, 'tminC'], message: 'Give the lowest and highest temperature of at least one day.' });
});
export type SeedbedRequest = z.input<typeof seedbedRequestSchema>;
const doseSchema = z.object({ hour: z.number(), depthMm: z.number(), rateMmPerHour: z.number() });
const paceSchema = z.object({ fast: z.string().nullable(), likely: z.string().nullable(), slow: z.string().nullable() });
export const seedbedResponseSchema = z.object({
  evaporableMm: z.number(), freelyEvaporableMm: z.number(), dryLimitMm: z.number(), dryHours: z.number(), firstDryHour: z.number().nullable(),
  hours: z.array(z.object({
    on: z.string(), hour: z.number(), et0Mm: z.number(), rainMm: z.number(), dewMm: z.number(), isDaylight: z.boolean(), evaporationMm: z.number(), drainageMm: z.number(), runoffMm: z.number(), depletionMm: z.number(), isDry: z.boolean(),
  })),
  et0MmByDay: numbers, doses: z.array(doseSchema), intakeMmPerHour: z.number(), washingLimitMmPerHour: z.number(), washing: z.array(z.object({ hour: z.number(), because: z.enum(['intake', 'drops']) })),
  kept: z.object({ added: z.array(doseSchema), dryHours: z.number(), isKept: z.boolean() }), soilTemperaturesC: numbers,
  emergence: z.object({ firstUpOn: paceSchema, mostlyUpOn: paceSchema, assumed: z.object({ fromOn: z.string(), temperatureC: z.number() }).nullable() }).nullable(), assumptions,
});
export type SeedbedResponse = z.infer<typeof seedbedResponseSchema>;

const planePoint = z.object({ eastM: z.number().min(-500).max(500), northM: z.number().min(-500).max(500) });
const heightM = z.number().gt(0, 'What stands has a height.').max(120);
const monthTemperaturesSchema = z.object({ tminC: airC, tmaxC: airC }).superRefine((month, issue) => {
  if (month.tminC > month.tmaxC) issue.addIssue({ code: 'custom', path: ['tminC'], message: 'The lowest temperature cannot lie above the highest.' });
});
/** What stands around a zone, in a plane with east and north in metres from any fixed place. */
export const obstacleSchema = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('building'), footprint: z.array(planePoint).min(3, 'An outline has three corners or more.').max(40), heightM }),
  z.object({ kind: z.literal('fence'), line: z.array(planePoint).min(2, 'A fence has two ends.').max(40), heightM }),
  z.object({
    kind: z.literal('tree'), at: planePoint, crownBaseM: z.number().min(0).max(80), topM: heightM, crownRadiusM: z.number().gt(0, 'A crown has a width.').max(40), trunkDiameterM: z.number().min(0).max(10).nullable().default(null),
    crownShape: z.enum(['ellipsoid', 'cylinder']).default('ellipsoid'), leaves: z.enum(['deciduous', 'evergreen']),
    leafOutDay: z.number().min(1).max(366).nullable().default(null), leafFallDay: z.number().min(1).max(366).nullable().default(null),
  }),
]);
/** Sun of a zone through the months, and its reference ET where the temperatures of two months are given. */
export const sunExposureRequestSchema = z.object({
  latitudeDeg, longitudeDeg, elevationM: elevationM.default(100), coastal: z.boolean().default(false), obstacles: z.array(obstacleSchema).max(40),
  outline: z.array(planePoint).min(3, 'A zone has three corners or more.').max(60), temperatures: z.object({ warmest: monthTemperaturesSchema, coldest: monthTemperaturesSchema }).nullable().default(null),
}).superRefine(({ obstacles }, issue) => {
  obstacles.forEach((obstacle, index) => {
    if (obstacle.kind === 'tree' && obstacle.crownBaseM >= obstacle.topM) issue.addIssue({ code: 'custom', path: ['obstacles', index, 'crownBaseM'], message: 'A crown begins below its top.' });
  });
});
export type SunExposureRequest = z.input<typeof sunExposureRequestSchema>;
export const sunExposureResponseSchema = z.object({
  months: z.array(z.object({
    month: z.number(), directSunHours: z.number(), openSunHours: z.number(), radiationShare: z.number(), skyView: z.number(), beamByHour: numbers, et0Mm: z.number().nullable(), shadedEt0Mm: z.number().nullable(),
  })),
  points: z.array(z.object({ eastM: z.number(), northM: z.number() })), assumptions,
});
export type SunExposureResponse = z.infer<typeof sunExposureResponseSchema>;
