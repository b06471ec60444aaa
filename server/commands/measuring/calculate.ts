import { DEFAULT_PORTABLE_RATE_MM_PER_HOUR, doesItFit, minutesForDepth, mouthAreaCm2, runLengthAdvice } from '@/scheduling/sprinkler';
import type {
  CupTestCalculatorResponse, cupTestCalculatorRequestSchema, doesItFitRequestSchema, DoesItFitResponse, RunLengthRequest, RunLengthResponse,
} from '@/shared/contracts/catchTests';
import type { z } from '@/shared/zod';
import { reckonCupTest, stopsOf } from './reckonCupTest';

/** Reads a catch-cup test that nobody keeps. @throws PhysicsError for impossible input */
export function calculateCupTest({ wantedDepthsMm, ...input }: z.output<typeof cupTestCalculatorRequestSchema>): CupTestCalculatorResponse {
  const result = reckonCupTest(input);
  if (stopsOf(result).length > 0) {
    return { result: null, problems: result.problems, minutesFor: [] };
  }
  const { rateMmPerHour, runTimeMultiplier } = result;
  return {
    result,
    problems: result.problems,
    minutesFor: wantedDepthsMm.map((depthMm) => ({
      depthMm, minutes: minutesForDepth({ depthMm, rateMmPerHour }), evenedMinutes: minutesForDepth({ depthMm, rateMmPerHour, runTimeMultiplier }),
    })),
  };
}

/** How long a catch-cup test has to run to be read. */
export function calculateRunLength({ rateMmPerHour, flowLpm, wettedAreaM2, reading }: RunLengthRequest): RunLengthResponse {
  const how = reading.kind === 'depth' ? reading : { kind: reading.kind, mouthAreaCm2: mouthAreaCm2(reading.mouthDiameterMm) };
  if (rateMmPerHour !== undefined) {
    return { ...runLengthAdvice({ expectedRateMmPerHour: rateMmPerHour, reading: how }), rateSource: 'given' };
  }
  if (flowLpm !== undefined && wettedAreaM2 !== undefined) {
    return { ...runLengthAdvice({ flowLpm, areaM2: wettedAreaM2, reading: how }), rateSource: 'flow_and_area' };
  }
  return { ...runLengthAdvice({ expectedRateMmPerHour: DEFAULT_PORTABLE_RATE_MM_PER_HOUR, reading: how }), rateSource: 'default' };
}

/** Whether a week's water fits the hours of one tap. */
export function calculateFit({ areaM2, ...question }: z.output<typeof doesItFitRequestSchema>): DoesItFitResponse {
  return doesItFit({ areasM2: [areaM2], ...question });
}
