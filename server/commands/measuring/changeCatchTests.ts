import { randomUUID } from 'node:crypto';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { holdYard, refuseMoreThan, type FactChange } from '@/server/commands/yards/yardFacts';
import { AppError, notFound } from '@/server/errors';
import { CatchTest, Position } from '@/server/models';
import type { createCatchTestRequestSchema } from '@/shared/contracts/catchTests';
import { limits } from '@/shared/limits';
import type { z } from '@/shared/zod';
import { reckonCupTest, stopsOf } from './reckonCupTest';

async function positionOf(change: FactChange, positionId: string): Promise<Position> {
  await holdYard(change);
  const position = await Position.findOne({ where: { yardId: change.yardId, id: positionId, archivedAt: null } });
  if (!position) {
    throw notFound('position');
  }
  return position;
}

async function tell(change: FactChange, verb: string, test: CatchTest, position: Position): Promise<void> {
  const data = { positionName: position.name, rateMmPerHour: test.rateMmPerHour, lowQuarterUniformity: test.lowQuarterUniformity };
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'catch_test', subjectId: test.id, data }, change.now);
  await factsChanged(change.database, change.yardId, null);
}

/**
 * Keeps a catch-cup test with its result and its doubts. It sets the position's rate until the tap, hose, sprinkler or season changes.
 * @returns the id of the test
 * @throws AppError not_found, limit_reached, invalid_input with the code of each problem that leaves no result
 */
export async function recordCatchTest(change: FactChange, positionId: string, request: z.output<typeof createCatchTestRequestSchema>): Promise<string> {
  const { yardId, userId, now } = change;
  const position = await positionOf(change, positionId);
  await refuseMoreThan(CatchTest, { yardId, positionId }, limits.testsPerThing, 'catch-cup tests of one position');
  const { wind, note, ...input } = request;
  const result = reckonCupTest(input);
  const stops = stopsOf(result);
  const { lowQuarterUniformity } = result;
  if (stops.length > 0 || lowQuarterUniformity === null) {
    const message = 'Every cup is empty: nothing can be reckoned from that. Was the water on, and did the cups stand where it falls?';
    throw new AppError('invalid_input', message, stops.map((problem) => ({ path: 'readings', message, code: problem.code })));
  }
  const test = await CatchTest.create({
    id: randomUUID(), yardId, positionId, ...input, wind, note, rateMmPerHour: result.rateMmPerHour, lowQuarterUniformity, runTimeMultiplier: result.runTimeMultiplier, result,
    tapId: position.tapId, hoseId: position.hoseId ?? null, sprinklerId: position.sprinklerId, testedAt: now, testedBy: userId, createdAt: now,
  });
  await tell(change, 'catch_test.recorded', test, position);
  return test.id;
}

/** Takes a test back. @throws AppError not_found */
export async function deleteCatchTest(change: FactChange, positionId: string, testId: string): Promise<void> {
  const position = await positionOf(change, positionId);
  const test = await CatchTest.findOne({ where: { yardId: change.yardId, positionId, id: testId } });
  if (!test) {
    throw notFound('catch-cup test');
  }
  await test.destroy();
  await tell(change, 'catch_test.deleted', test, position);
}
