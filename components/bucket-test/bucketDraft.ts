import { bucketTest, type BucketTestResult } from '@/scheduling/sprinkler/bucketTest';
import { numberText } from '@/components/ui/numberText';
import type { UnitSystem } from '@/shared/contracts/common';
import type { CreateBucketTestRequest } from '@/shared/contracts/equipment';
import { formatFlow, fromShown, toShown, unitLabel } from '@/shared/display';
import { limits } from '@/shared/limits';
import { parseNumber } from '@/shared/parseQuantity';
import { z } from '@/shared/zod';

/** What stands in the fields of a bucket test, as typed. */
export const bucketDraftSchema = z.object({ volume: z.string().max(40), seconds: z.string().max(40), hoseId: z.string().max(40), sprinklerId: z.string().max(40) });
export type BucketDraft = z.infer<typeof bucketDraftSchema>;

/** Checks what was typed and turns it into the request, in SI. */
export function bucketSchema(units: UnitSystem) {
  const unit = unitLabel('volume', units);
  return z.object({
    volume: numberText({ min: 0.1, max: Math.floor(toShown('volume', limits.bucketMaxL, units)), unit, missing: 'Give what the bucket holds; it often stands on its bottom.' }),
    seconds: numberText({ min: 1, max: limits.bucketMaxSeconds, unit: 's', missing: 'Give the seconds, or use the stopwatch.' }),
    hoseId: z.string(), sprinklerId: z.string(),
  }).superRefine((values, issue) => {
    const flowLpm = (fromShown('volume', values.volume, units) / values.seconds) * 60;
    if (flowLpm > limits.flowMaxLpm || flowLpm < limits.flowMinLpm) {
      const message = flowLpm > limits.flowMaxLpm
        ? `That would be ${formatFlow(flowLpm, units)}, more than any garden tap gives. Check what the bucket holds and the time.`
        : 'That is less than a drip. Check what the bucket holds and the time.';
      issue.addIssue({ code: 'custom', path: ['seconds'], message });
    }
  }).transform((values): CreateBucketTestRequest => ({
    volumeL: fromShown('volume', values.volume, units), seconds: values.seconds,
    hoseId: values.hoseId === '' ? null : values.hoseId, sprinklerId: values.sprinklerId === '' ? null : values.sprinklerId,
  }));
}

/** The flow that stands in the fields so far; null while they give none. */
export function bucketPreview(draft: Pick<BucketDraft, 'volume' | 'seconds'>, units: UnitSystem): BucketTestResult | null {
  const volume = parseNumber(draft.volume);
  const seconds = parseNumber(draft.seconds);
  if (volume === null || seconds === null || volume <= 0 || seconds < 1 || seconds > limits.bucketMaxSeconds) {
    return null;
  }
  const volumeL = fromShown('volume', volume, units);
  const result = volumeL > limits.bucketMaxL ? null : bucketTest({ volumeL, seconds });
  return result === null || result.flowLpm > limits.flowMaxLpm || result.flowLpm < limits.flowMinLpm ? null : result;
}
