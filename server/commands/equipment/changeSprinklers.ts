import { randomUUID } from 'node:crypto';
import { notFound } from '@/server/errors';
import { Sprinkler } from '@/server/models';
import type { CreateSprinklerRequest, UpdateSprinklerRequest } from '@/shared/contracts/equipment';
import { limits } from '@/shared/limits';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { refuseInUse } from './refuseInUse';
import { changesOf, holdYard, refuseMoreThan, type FactChange } from '@/server/commands/yards/yardFacts';

async function sprinklerOf(change: FactChange, sprinklerId: string): Promise<Sprinkler> {
  await holdYard(change);
  const sprinkler = await Sprinkler.findOne({ where: { yardId: change.yardId, id: sprinklerId, archivedAt: null } });
  if (!sprinkler) {
    throw notFound('sprinkler');
  }
  return sprinkler;
}

async function tell(change: FactChange, verb: string, sprinkler: Sprinkler, data: Record<string, unknown>): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'sprinkler', subjectId: sprinkler.id, data: { name: sprinkler.name, ...data } }, change.now);
  await factsChanged(change.database, change.yardId, null);
}

/** @throws AppError limit_reached */
export async function createSprinkler(change: FactChange, request: CreateSprinklerRequest): Promise<Sprinkler> {
  const { yardId } = change;
  await holdYard(change);
  await refuseMoreThan(Sprinkler, { yardId, archivedAt: null }, limits.equipmentPerYard, 'sprinklers for one yard');
  const sprinkler = await Sprinkler.create({ id: randomUUID(), yardId, ...request });
  await tell(change, 'sprinkler.created', sprinkler, { kind: sprinkler.kind });
  return sprinkler;
}

/** Another kind ends the catch-cup tests made with the sprinkler. @throws AppError not_found */
export async function updateSprinkler(change: FactChange, sprinklerId: string, request: UpdateSprinklerRequest): Promise<Sprinkler> {
  const sprinkler = await sprinklerOf(change, sprinklerId);
  const changes = changesOf(sprinkler.get(), request);
  if (Object.keys(changes).length > 0) {
    await sprinkler.update({ ...request, ...('kind' in changes ? { changedAt: change.now } : {}) });
    await tell(change, 'sprinkler.updated', sprinkler, { changes });
  }
  return sprinkler;
}

/** @throws AppError not_found, in_use */
export async function archiveSprinkler(change: FactChange, sprinklerId: string): Promise<void> {
  const sprinkler = await sprinklerOf(change, sprinklerId);
  await refuseInUse(change, { sprinklerId }, sprinkler.name, 'Give them another sprinkler first.');
  await sprinkler.update({ archivedAt: change.now });
  await tell(change, 'sprinkler.archived', sprinkler, {});
}
