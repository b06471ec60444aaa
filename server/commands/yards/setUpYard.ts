import { createHose } from '@/server/commands/equipment/changeHoses';
import { createPosition } from '@/server/commands/equipment/changePositions';
import { createSprinkler } from '@/server/commands/equipment/changeSprinklers';
import { createTap } from '@/server/commands/equipment/changeTaps';
import { recordBucketTest } from '@/server/commands/measuring/changeBucketTests';
import { AppError } from '@/server/errors';
import { Position } from '@/server/models';
import type { setUpYardRequestSchema } from '@/shared/contracts/yards';
import type { z } from '@/shared/zod';
import { createZone } from './changeZones';
import { putHours } from './putHours';
import { holdYard, type FactChange } from './yardFacts';

/** Runs a step and, when it refuses a field, names the field as it stands in the whole request. */
async function within<T>(path: string, step: Promise<T>): Promise<T> {
  try {
    return await step;
  } catch (error) {
    if (error instanceof AppError && error.fields.length > 0) {
      throw new AppError(error.code, error.message, error.fields.map((field) => ({ ...field, path: `${path}.${field.path}` })));
    }
    throw error;
  }
}

/**
 * Saves all that a first plan needs: a tap with its bucket test, a hose, a sprinkler, zones with a position in each, and the hours at home.
 * The caller's transaction makes it all or nothing.
 * @throws AppError conflict when the yard has positions already, invalid_input with the field, limit_reached
 */
export async function setUpYard(change: FactChange, request: z.output<typeof setUpYardRequestSchema>): Promise<void> {
  const { yardId } = change;
  await holdYard(change);
  if (await Position.count({ where: { yardId, archivedAt: null } }) > 0) {
    throw new AppError('conflict', 'This yard is set up already. Add to it on its own pages.');
  }
  const { bucketTest, ...tapFields } = request.tap;
  const tap = await within('tap', createTap(change, tapFields));
  const hose = request.hose === null ? null : await within('hose', createHose(change, request.hose));
  const sprinkler = await within('sprinkler', createSprinkler(change, request.sprinkler));
  if (bucketTest !== null) {
    await within('tap.bucketTest', recordBucketTest(change, tap.id, { ...bucketTest, hoseId: hose?.id ?? null, sprinklerId: null }));
  }
  for (const [index, { position, ...zoneFields }] of request.zones.entries()) {
    // A moment apart each, so that they keep the order in which the person wrote them.
    const inTurn = { ...change, now: new Date(change.now.getTime() + index) };
    const zone = await within(`zones.${index}`, createZone(inTurn, zoneFields));
    await within(`zones.${index}.position`, createPosition(change, {
      ...position, name: position.name ?? zone.name, zoneId: zone.id, tapId: tap.id, hoseId: hose?.id ?? null, sprinklerId: sprinkler.id,
    }));
  }
  if (request.hours !== null) {
    await within('hours', putHours(change, request.hours));
  }
}
