import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { earliestFactOn, holdYard, todayAt, type FactChange } from '@/server/commands/yards/yardFacts';
import { invalidField, notFound } from '@/server/errors';
import { Observation, type Zone } from '@/server/models';
import type { PutObservationRequest } from '@/shared/contracts/ground';
import { limits } from '@/shared/limits';
import { zoneInUse } from './zoneDays';

async function zoneOn(change: FactChange, zoneId: string, on: string): Promise<Zone> {
  const yard = await holdYard(change);
  const zone = await zoneInUse(change, zoneId);
  if (on > todayAt(yard, change.now)) {
    throw invalidField('on', 'That day has not come yet.');
  }
  if (on < earliestFactOn(yard, change.now)) {
    throw invalidField('on', `What was found is taken for the last ${limits.factDaysBack} days.`);
  }
  return zone;
}

async function tell(change: FactChange, verb: string, zone: Zone, on: string, data: Record<string, unknown>): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'zone', subjectId: zone.id, data: { name: zone.name, on, ...data } }, change.now);
  await factsChanged(change.database, change.yardId, on);
}

/** Keeps what somebody found in the ground on the morning of a day, in the place of what was told before. @throws AppError not_found, invalid_input */
export async function putObservation(change: FactChange, zoneId: string, on: string, found: PutObservationRequest): Promise<void> {
  const zone = await zoneOn(change, zoneId, on);
  const { yardId, userId, now } = change;
  const values = { kind: found.kind, feel: found.kind === 'screwdriver' ? found.feel : null, waterContent: found.kind === 'probe' ? found.waterContent : null };
  const before = await Observation.findOne({ where: { yardId, zoneId, on } });
  if (before && before.kind === values.kind && (before.feel ?? null) === values.feel && (before.waterContent ?? null) === values.waterContent) {
    return;
  }
  await Observation.upsert({ yardId, zoneId, on, ...values, seenBy: userId, updatedAt: now });
  await tell(change, 'observation.recorded', zone, on, values);
}

/** Takes an observation back. @throws AppError not_found, invalid_input */
export async function deleteObservation(change: FactChange, zoneId: string, on: string): Promise<void> {
  const zone = await zoneOn(change, zoneId, on);
  const entry = await Observation.findOne({ where: { yardId: change.yardId, zoneId, on } });
  if (!entry) {
    throw notFound('observation');
  }
  await entry.destroy();
  await tell(change, 'observation.deleted', zone, on, { kind: entry.kind, feel: entry.feel ?? null, waterContent: entry.waterContent ?? null });
}
