import { randomUUID } from 'node:crypto';
import { notFound } from '@/server/errors';
import { Tap } from '@/server/models';
import type { createTapRequestSchema, UpdateTapRequest } from '@/shared/contracts/equipment';
import { limits } from '@/shared/limits';
import type { z } from '@/shared/zod';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { refuseInUse } from './refuseInUse';
import { yardDefaults } from '@/server/commands/yards/yardDefaults';
import { changesOf, holdYard, refuseMoreThan, type FactChange } from '@/server/commands/yards/yardFacts';

/** @throws AppError not_found for a tap that is not in the yard, or no longer */
export async function tapOf(change: FactChange, tapId: string): Promise<Tap> {
  await holdYard(change);
  const tap = await Tap.findOne({ where: { yardId: change.yardId, id: tapId, archivedAt: null } });
  if (!tap) {
    throw notFound('tap');
  }
  return tap;
}

async function tell(change: FactChange, verb: string, tap: Tap, data: Record<string, unknown>): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'tap', subjectId: tap.id, data: { name: tap.name, ...data } }, change.now);
  await factsChanged(change.database, change.yardId, null);
}

/** @throws AppError limit_reached */
export async function createTap(change: FactChange, { name, flowLpm, shutOffTimer }: z.output<typeof createTapRequestSchema>): Promise<Tap> {
  const { yardId } = change;
  await holdYard(change);
  await refuseMoreThan(Tap, { yardId, archivedAt: null }, limits.equipmentPerYard, 'taps for one yard');
  const tap = await Tap.create({ id: randomUUID(), yardId, name, flowLpm: flowLpm ?? yardDefaults.flowLpm, flowIsDefault: flowLpm === undefined, shutOffTimer });
  await tell(change, 'tap.created', tap, { flowLpm: tap.flowLpm, flowIsDefault: tap.flowIsDefault });
  return tap;
}

/** @throws AppError not_found */
export async function updateTap(change: FactChange, tapId: string, request: UpdateTapRequest): Promise<Tap> {
  const tap = await tapOf(change, tapId);
  const fields = { ...request, ...(request.flowLpm === undefined ? {} : { flowIsDefault: false }) };
  const changes = changesOf(tap.get(), fields);
  if (Object.keys(changes).length > 0) {
    await tap.update(fields);
    await tell(change, 'tap.updated', tap, { changes });
  }
  return tap;
}

/** Takes a tap out of use; what was watered from it stays. @throws AppError not_found, in_use */
export async function archiveTap(change: FactChange, tapId: string): Promise<void> {
  const tap = await tapOf(change, tapId);
  await refuseInUse(change, { tapId }, tap.name, 'Give them another tap first.');
  await tap.update({ archivedAt: change.now });
  await tell(change, 'tap.archived', tap, {});
}
