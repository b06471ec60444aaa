import { randomUUID } from 'node:crypto';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { invalidField, notFound } from '@/server/errors';
import { Permit, WaterRule, Zone } from '@/server/models';
import type { createPermitRequestSchema, UpdatePermitRequest } from '@/shared/contracts/waterRules';
import { limits } from '@/shared/limits';
import type { z } from '@/shared/zod';
import { changesOf, holdYard, refuseMoreThan, type FactChange } from './yardFacts';

type PermitFields = z.output<typeof createPermitRequestSchema>;

const inOrder = (permit: PermitFields): PermitFields => ({ ...permit, blackoutMonths: [...permit.blackoutMonths].sort((a, b) => a - b) });

async function tell(change: FactChange, verb: string, permit: Permit, data: Record<string, unknown>): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'permit', subjectId: permit.id, data: { name: permit.name, ...data } }, change.now);
  await factsChanged(change.database, change.yardId, null);
}

/** @throws AppError invalid_input when a zone or rule that is named is not in this yard */
async function checkNamed(yardId: string, { zoneIds, liftsRuleIds }: UpdatePermitRequest): Promise<void> {
  if (zoneIds && await Zone.count({ where: { yardId, id: zoneIds, archivedAt: null } }) < zoneIds.length) {
    throw invalidField('zoneIds', 'One of these zones is not in this yard.');
  }
  if (liftsRuleIds && await WaterRule.count({ where: { yardId, id: liftsRuleIds } }) < liftsRuleIds.length) {
    throw invalidField('liftsRuleIds', 'One of these rules is not in this yard.');
  }
}

async function permitOf(change: FactChange, permitId: string): Promise<Permit> {
  await holdYard(change);
  const permit = await Permit.findOne({ where: { yardId: change.yardId, id: permitId } });
  if (!permit) {
    throw notFound('permit');
  }
  return permit;
}

/** @throws AppError limit_reached, invalid_input */
export async function createPermit(change: FactChange, request: PermitFields): Promise<Permit> {
  await holdYard(change);
  await checkNamed(change.yardId, request);
  await refuseMoreThan(Permit, { yardId: change.yardId }, limits.permitsPerYard, 'permits for one yard');
  const permit = await Permit.create({ id: randomUUID(), yardId: change.yardId, ...inOrder(request) });
  await tell(change, 'permit.created', permit, { fromOn: permit.fromOn, toOn: permit.toOn, source: permit.source, sourceOn: permit.sourceOn });
  return permit;
}

/** Changes the fields that are given. @throws AppError not_found, invalid_input when what comes out is no permit */
export async function updatePermit(change: FactChange, permitId: string, request: UpdatePermitRequest): Promise<Permit> {
  const permit = await permitOf(change, permitId);
  await checkNamed(change.yardId, request);
  const last = request.toOn ?? permit.toOn;
  if (last < (request.fromOn ?? permit.fromOn)) {
    throw invalidField('toOn', 'The last day must not come before the first.');
  }
  const fields = request.blackoutMonths ? { ...request, blackoutMonths: [...request.blackoutMonths].sort((a, b) => a - b) } : request;
  const changes = changesOf(permit.get(), fields);
  if (Object.keys(changes).length > 0) {
    await permit.update(fields);
    await tell(change, 'permit.updated', permit, { changes });
  }
  return permit;
}

/** @throws AppError not_found */
export async function deletePermit(change: FactChange, permitId: string): Promise<void> {
  const permit = await permitOf(change, permitId);
  await permit.destroy();
  await tell(change, 'permit.deleted', permit, { source: permit.source, sourceOn: permit.sourceOn });
}
