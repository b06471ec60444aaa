import { randomUUID } from 'node:crypto';
import { notFound } from '@/server/errors';
import { Hose } from '@/server/models';
import type { CreateHoseRequest, UpdateHoseRequest } from '@/shared/contracts/equipment';
import { limits } from '@/shared/limits';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { refuseInUse } from './refuseInUse';
import { changesOf, holdYard, refuseMoreThan, type FactChange } from '@/server/commands/yards/yardFacts';

async function hoseOf(change: FactChange, hoseId: string): Promise<Hose> {
  await holdYard(change);
  const hose = await Hose.findOne({ where: { yardId: change.yardId, id: hoseId, archivedAt: null } });
  if (!hose) {
    throw notFound('hose');
  }
  return hose;
}

async function tell(change: FactChange, verb: string, hose: Hose, data: Record<string, unknown>): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'hose', subjectId: hose.id, data: { name: hose.name, ...data } }, change.now);
  await factsChanged(change.database, change.yardId, null);
}

/** @throws AppError limit_reached */
export async function createHose(change: FactChange, request: CreateHoseRequest): Promise<Hose> {
  const { yardId } = change;
  await holdYard(change);
  await refuseMoreThan(Hose, { yardId, archivedAt: null }, limits.equipmentPerYard, 'hoses for one yard');
  const hose = await Hose.create({ id: randomUUID(), yardId, ...request });
  await tell(change, 'hose.created', hose, { lengthM: hose.lengthM, boreMm: hose.boreMm });
  return hose;
}

/** Another length or bore ends the catch-cup tests made through the hose. @throws AppError not_found */
export async function updateHose(change: FactChange, hoseId: string, request: UpdateHoseRequest): Promise<Hose> {
  const hose = await hoseOf(change, hoseId);
  const changes = changesOf(hose.get(), request);
  if (Object.keys(changes).length > 0) {
    await hose.update({ ...request, ...('lengthM' in changes || 'boreMm' in changes ? { changedAt: change.now } : {}) });
    await tell(change, 'hose.updated', hose, { changes });
  }
  return hose;
}

/** @throws AppError not_found, in_use */
export async function archiveHose(change: FactChange, hoseId: string): Promise<void> {
  const hose = await hoseOf(change, hoseId);
  await refuseInUse(change, { hoseId }, hose.name, 'Give them another hose first.');
  await hose.update({ archivedAt: change.now });
  await tell(change, 'hose.archived', hose, {});
}
