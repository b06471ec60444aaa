import { randomUUID } from 'node:crypto';
import { bucketTest } from '@/scheduling/sprinkler';
import { tapOf } from '@/server/commands/equipment/changeTaps';
import { checkParts } from '@/server/commands/equipment/changePositions';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { yardDefaults } from '@/server/commands/yards/yardDefaults';
import { refuseMoreThan, type FactChange } from '@/server/commands/yards/yardFacts';
import { invalidField, notFound } from '@/server/errors';
import { BucketTest, type Tap } from '@/server/models';
import type { createBucketTestRequestSchema } from '@/shared/contracts/equipment';
import { limits } from '@/shared/limits';
import type { z } from '@/shared/zod';

async function tell(change: FactChange, verb: string, test: BucketTest, tap: Tap): Promise<void> {
  const data = { tapName: tap.name, flowLpm: test.flowLpm, volumeL: test.volumeL, seconds: test.seconds };
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'bucket_test', subjectId: test.id, data }, change.now);
  await factsChanged(change.database, change.yardId, null);
}

/**
 * Keeps a timed bucket and takes its flow for the tap from now on.
 * @returns the id of the test
 * @throws AppError not_found, invalid_input for a flow that no garden tap has or equipment that is not in the yard, limit_reached
 */
export async function recordBucketTest(change: FactChange, tapId: string, request: z.output<typeof createBucketTestRequestSchema>): Promise<string> {
  const { yardId, userId, now } = change;
  const tap = await tapOf(change, tapId);
  const { volumeL, seconds, hoseId, sprinklerId } = request;
  await checkParts(yardId, { hoseId, sprinklerId: sprinklerId ?? undefined });
  await refuseMoreThan(BucketTest, { yardId, tapId }, limits.testsPerThing, 'bucket tests of one tap');
  const { flowLpm, range } = bucketTest({ volumeL, seconds });
  if (flowLpm > limits.flowMaxLpm) {
    throw invalidField('seconds', 'No garden tap gives that much. Check what the bucket holds and the time.');
  }
  if (flowLpm < limits.flowMinLpm) {
    throw invalidField('seconds', 'That is less than a drip. Check what the bucket holds and the time.');
  }
  const test = await BucketTest.create({
    id: randomUUID(), yardId, tapId, hoseId, sprinklerId, volumeL, seconds, flowLpm, flowLowLpm: range.low, flowHighLpm: range.high, testedAt: now, testedBy: userId, createdAt: now,
  });
  await tap.update({ flowLpm, flowIsDefault: false });
  await tell(change, 'bucket_test.recorded', test, tap);
  return test.id;
}

/**
 * Takes a bucket test back. A tap whose flow came from it returns to its newest other test, or to the default.
 * @throws AppError not_found
 */
export async function deleteBucketTest(change: FactChange, tapId: string, testId: string): Promise<void> {
  const tap = await tapOf(change, tapId);
  const test = await BucketTest.findOne({ where: { yardId: change.yardId, tapId, id: testId } });
  if (!test) {
    throw notFound('bucket test');
  }
  await test.destroy();
  if (!tap.flowIsDefault && tap.flowLpm === test.flowLpm) {
    const newest = await BucketTest.findOne({ where: { yardId: change.yardId, tapId }, order: [['testedAt', 'DESC'], ['createdAt', 'DESC']] });
    await tap.update({ flowLpm: newest?.flowLpm ?? yardDefaults.flowLpm, flowIsDefault: newest === null });
  }
  await tell(change, 'bucket_test.deleted', test, tap);
}
