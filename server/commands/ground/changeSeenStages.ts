import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { earliestFactOn, holdYard, todayAt, type FactChange } from '@/server/commands/yards/yardFacts';
import { invalidField, notFound } from '@/server/errors';
import { SeenStageRow, type Zone } from '@/server/models';
import type { EstablishmentStageId } from '@/shared/contracts/proposals';
import { zoneInUse } from './zoneDays';

interface SowingDay {
  zone: Zone;
  /** First day whose balance the report touches. */
  changedOn: string;
}

async function sowingOn(change: FactChange, zoneId: string, on: string): Promise<SowingDay> {
  const yard = await holdYard(change);
  const zone = await zoneInUse(change, zoneId);
  const seededOn = zone.seededOn ?? null;
  if (seededOn === null) {
    throw notFound('sowing');
  }
  if (on > todayAt(yard, change.now)) {
    throw invalidField('on', 'That day has not come yet.');
  }
  if (on < seededOn) {
    throw invalidField('on', 'That was before the zone was sown.');
  }
  const earliest = earliestFactOn(yard, change.now);
  return { zone, changedOn: on < earliest ? earliest : on };
}

async function tell(change: FactChange, verb: string, { zone, changedOn }: SowingDay, on: string, stage: EstablishmentStageId): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'zone', subjectId: zone.id, data: { name: zone.name, on, stage } }, change.now);
  await factsChanged(change.database, change.yardId, changedOn);
}

/** Keeps the stage that somebody saw on a day: it overrules the heat sum from then on. @throws AppError not_found for a zone without a sowing, invalid_input */
export async function putSeenStage(change: FactChange, zoneId: string, on: string, stage: EstablishmentStageId): Promise<void> {
  const sowing = await sowingOn(change, zoneId, on);
  const { yardId, userId, now } = change;
  const before = await SeenStageRow.findOne({ where: { yardId, zoneId, on } });
  if (before?.stage === stage) {
    return;
  }
  await SeenStageRow.upsert({ yardId, zoneId, on, stage, seenBy: userId, updatedAt: now });
  await tell(change, 'seen_stage.recorded', sowing, on, stage);
}

/** Takes a report back. @throws AppError not_found, invalid_input */
export async function deleteSeenStage(change: FactChange, zoneId: string, on: string): Promise<void> {
  const sowing = await sowingOn(change, zoneId, on);
  const entry = await SeenStageRow.findOne({ where: { yardId: change.yardId, zoneId, on } });
  if (!entry) {
    throw notFound('report');
  }
  await entry.destroy();
  await tell(change, 'seen_stage.deleted', sowing, on, entry.stage);
}
