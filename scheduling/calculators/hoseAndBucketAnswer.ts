import { bucketTest } from '@/scheduling/sprinkler/bucketTest';
import { minutesForDepth, rateFromFlow } from '@/scheduling/sprinkler/depthAndTime';
import { DEFAULT_TAP_PRESSURE_KPA, flowThroughHose, HOSE_SMOOTHNESS, hoseLoss, SOLD_BORES_MM, type Hose } from '@/scheduling/sprinkler/hoseLoss';
import type { Assumption } from '@/scheduling/weather';

export interface HoseAndBucketQuestion {
  bucketL: number;
  seconds: number;
  /** How far the bucket's volume may be off [%]; 3 when left out. */
  bucketTolerancePct?: number;
  /** Hose through which the bucket was filled, its sprinkler or nozzle on. */
  hose: Hose;
  /** Hose to compare with. */
  newHose: Hose | null;
  /** [kPa]; 345 (50 psi) when null. */
  tapPressureKpa: number | null;
  /** Ground that the sprinkler wets [m²]; null when not known. */
  wettedAreaM2: number | null;
  depthMm: number;
}

/** What a hose brings to the sprinkler. */
export interface HoseFlow {
  lengthM: number;
  boreMm: number;
  flowLpm: number;
  lossKpa: number;
  pressureAtSprinklerKpa: number;
  /** Speed of the water in the hose [m/s]. */
  speedMps: number;
}

export interface HoseAndBucketFound {
  flowLpm: number;
  flowRange: { low: number; high: number };
  isTooFast: boolean;
  tapPressureKpa: number;
  measured: HoseFlow;
  newHose: (HoseFlow & { changePct: number }) | null;
  /** Flow to expect by length and sold bore, the same sprinkler at the end. */
  byHose: HoseFlow[];
  /** Rate and minutes where the wetted ground is known. */
  rateMmPerHour: number | null;
  setMinutes: number | null;
  newSetMinutes: number | null;
  assumptions: Assumption[];
}

const LENGTHS_M = [7.62, 15.24, 22.86, 30.48, 45.72, 60.96] as const;
const PRESSURE_TAKEN: Assumption = { field: 'tapPressureKpa', method: 'pressure at the tap taken as 50 psi (345 kPa)', source: 'default, common practice' };
const SMOOTH: Assumption = { field: 'smoothness', method: `smoothness of the hose taken as ${HOSE_SMOOTHNESS}`, source: 'Hazen–Williams, plastic and rubber' };
const OPENING: Assumption = { field: 'flowLpm', method: 'the sprinkler is an opening whose flow goes with the root of its pressure; the tap holds its pressure', source: 'hydraulics of an orifice' };
const BUCKET: Assumption = { field: 'bucketTolerancePct', method: 'buckets are off by up to 3 in 100, a hand on the watch by half a second', source: 'ATTRA 2006' };

function flowOf(flowLpm: number, hose: Hose, tapKpa: number): HoseFlow {
  const { lossKpa, speedMps } = hoseLoss(flowLpm, hose);
  return { lengthM: hose.lengthM, boreMm: hose.boreMm, flowLpm, lossKpa, pressureAtSprinklerKpa: tapKpa - lossKpa, speedMps };
}

/**
 * A bucket test with the hose it was made through, and what another hose would bring to the same sprinkler.
 * @throws PhysicsError for impossible numbers, or a flow that cannot come through that hose at that pressure
 * Sources: volume over time; Hazen–Williams.
 */
export function hoseAndBucketAnswer(question: HoseAndBucketQuestion): HoseAndBucketFound {
  const { bucketL, seconds, bucketTolerancePct, hose, wettedAreaM2, depthMm } = question;
  const bucket = bucketTest({ volumeL: bucketL, seconds, ...(bucketTolerancePct === undefined ? {} : { bucketTolerancePct }) });
  const tapPressureKpa = question.tapPressureKpa ?? DEFAULT_TAP_PRESSURE_KPA;
  const through = (newHose: Hose): HoseFlow => flowOf(flowThroughHose({ measuredLpm: bucket.flowLpm, measuredHose: hose, newHose, tapPressureKpa }).flowLpm, newHose, tapPressureKpa);
  // Also refuses a flow that cannot be.
  through(hose);
  const measured = flowOf(bucket.flowLpm, hose, tapPressureKpa);
  const newHose = question.newHose === null ? null : through(question.newHose);
  const rateMmPerHour = wettedAreaM2 === null ? null : rateFromFlow(bucket.flowLpm, wettedAreaM2);
  const minutes = (flowLpm: number): number | null => (wettedAreaM2 === null ? null : minutesForDepth({ depthMm, rateMmPerHour: rateFromFlow(flowLpm, wettedAreaM2) }));
  return {
    flowLpm: bucket.flowLpm, flowRange: bucket.range, isTooFast: bucket.isTooFast, tapPressureKpa, measured,
    newHose: newHose === null ? null : { ...newHose, changePct: 100 * (newHose.flowLpm / bucket.flowLpm - 1) },
    byHose: SOLD_BORES_MM.flatMap((boreMm) => LENGTHS_M.map((lengthM) => through({ lengthM, boreMm }))),
    rateMmPerHour, setMinutes: minutes(bucket.flowLpm), newSetMinutes: newHose === null ? null : minutes(newHose.flowLpm),
    assumptions: [BUCKET, ...(question.tapPressureKpa === null ? [PRESSURE_TAKEN] : []), ...(hose.smoothness === undefined ? [SMOOTH] : []), OPENING],
  };
}
