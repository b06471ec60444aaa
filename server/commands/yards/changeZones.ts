import { randomUUID } from 'node:crypto';
import { AppError, notFound } from '@/server/errors';
import { ensureSchedule } from '@/server/commands/ensureSchedule';
import { shareZoneArea } from '@/server/commands/equipment/shareZoneArea';
import { refuseInUse } from '@/server/commands/equipment/refuseInUse';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { Proposal, Zone, type Yard } from '@/server/models';
import type { createZoneRequestSchema, UpdateZoneRequest } from '@/shared/contracts/zones';
import { limits } from '@/shared/limits';
import type { z } from '@/shared/zod';
import { defaultGrass, zoneDefaults } from './yardDefaults';
import { changesOf, earliestFactOn, holdYard, refuseMoreThan, todayAt, type FactChange } from './yardFacts';
import { checkSeededOn, checkSunHoursOn, zoneSize } from './zoneFields';

/** Fields whose change alters what the ground holds or uses, and so the budget from today on. */
const budgetFields = ['grass', 'soil', 'slopePct', 'sunHours', 'sunHoursOn', 'compaction', 'treeRootShare', 'coverFraction', 'mulch', 'resting'];

/** Fields with a default, as they stand when told (null: back to the default). */
function defaultedFields(told: Pick<UpdateZoneRequest, 'grass' | 'soil' | 'slopePct' | 'compaction' | 'treeRootShare' | 'coverFraction'>, yard: Yard) {
  return {
    ...(told.grass === undefined ? {} : { grass: told.grass ?? defaultGrass(yard.latitudeDeg), grassIsDefault: told.grass === null }),
    ...(told.soil === undefined ? {} : { soil: told.soil ?? zoneDefaults.soil, soilIsDefault: told.soil === null }),
    ...(told.slopePct === undefined ? {} : { slopePct: told.slopePct ?? zoneDefaults.slopePct, slopeIsDefault: told.slopePct === null }),
    ...(told.compaction === undefined ? {} : { compaction: told.compaction ?? zoneDefaults.compaction, compactionIsDefault: told.compaction === null }),
    ...(told.treeRootShare === undefined ? {} : { treeRootShare: told.treeRootShare ?? zoneDefaults.treeRootShare, treeRootShareIsDefault: told.treeRootShare === null }),
    ...(told.coverFraction === undefined ? {} : { coverFraction: told.coverFraction ?? zoneDefaults.coverFraction, coverFractionIsDefault: told.coverFraction === null }),
  };
}

/**
 * Hours of sun with the day on which they were seen. Hours that somebody tells hold for the day of telling unless another is given; the default hours hold
 * for the equinox. A day by itself moves only the day.
 */
function sunFields({ sunHours, sunHoursOn }: Pick<UpdateZoneRequest, 'sunHours' | 'sunHoursOn'>, before: Pick<Zone, 'sunHours' | 'sunHoursIsDefault'> | null, today: string) {
  const equinoxOn = `${today.slice(0, 4)}-${zoneDefaults.sunHoursOnMonthDay}`;
  const hours = sunHours === undefined ? before?.sunHours ?? zoneDefaults.sunHours : sunHours ?? zoneDefaults.sunHours;
  const isDefault = sunHours === undefined ? before?.sunHoursIsDefault ?? true : sunHours === null;
  // Sending the same hours again does not say that they were seen today.
  const isNew = before === null || hours !== before.sunHours || isDefault !== before.sunHoursIsDefault;
  const day = sunHoursOn ?? (sunHoursOn === null || isNew ? (isDefault ? equinoxOn : today) : undefined);
  return { sunHours: hours, sunHoursIsDefault: isDefault, ...(day === undefined ? {} : { sunHoursOn: day, sunHoursOnIsDefault: sunHoursOn === undefined || sunHoursOn === null }) };
}

async function zoneOf(change: FactChange, zoneId: string): Promise<Zone> {
  const zone = await Zone.findOne({ where: { yardId: change.yardId, id: zoneId, archivedAt: null } });
  if (!zone) {
    throw notFound('zone');
  }
  return zone;
}

async function tell(change: FactChange, verb: string, zone: Zone, data: Record<string, unknown>): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'zone', subjectId: zone.id, data: { name: zone.name, ...data } }, change.now);
}

/**
 * Adds a zone; what is not told gets a default marked as one. A seeded zone gets its establishment schedule.
 * @throws AppError limit_reached, invalid_input
 */
export async function createZone(change: FactChange, request: z.output<typeof createZoneRequestSchema>): Promise<Zone> {
  const { yardId, now } = change;
  const yard = await holdYard(change);
  const today = todayAt(yard, now);
  checkSeededOn(request.seededOn, today);
  checkSunHoursOn(request.sunHoursOn, today);
  await refuseMoreThan(Zone, { yardId, archivedAt: null }, limits.zonesPerYard, 'zones in one yard');
  const { grass = null, soil = null, slopePct = null, compaction = null, treeRootShare = null, coverFraction = null } = request;
  const zone = await Zone.create({
    id: randomUUID(), yardId, name: request.name, ...zoneSize(request, null),
    grass: grass ?? defaultGrass(yard.latitudeDeg), grassIsDefault: grass === null, soil: soil ?? zoneDefaults.soil, soilIsDefault: soil === null,
    slopePct: slopePct ?? zoneDefaults.slopePct, slopeIsDefault: slopePct === null, ...sunFields(request, null, today),
    compaction: compaction ?? zoneDefaults.compaction, compactionIsDefault: compaction === null,
    treeRootShare: treeRootShare ?? zoneDefaults.treeRootShare, treeRootShareIsDefault: treeRootShare === null,
    coverFraction: coverFraction ?? zoneDefaults.coverFraction, coverFractionIsDefault: coverFraction === null,
    seededOn: request.seededOn, mulch: request.mulch, resting: request.resting, priority: request.priority ?? zoneDefaults.priority,
    createdAt: now,
  });
  if (zone.seededOn) {
    await ensureSchedule(yardId, zone.id, now);
  }
  await tell(change, 'zone.created', zone, { areaM2: zone.areaM2, grass: zone.grass, seededOn: zone.seededOn ?? null });
  await factsChanged(change.database, yardId, firstChangedOn(today, earliestFactOn(yard, now), [zone.seededOn ?? null]));
  return zone;
}

/** The earliest of today and the days told, no earlier than facts are taken for. */
function firstChangedOn(today: string, earliestOn: string, days: readonly (string | null)[]): string {
  const first = days.reduce<string>((earlier, on) => (on !== null && on < earlier ? on : earlier), today);
  return first < earliestOn ? earliestOn : first;
}

/** Changes the fields that are told. @throws AppError not_found, invalid_input */
export async function updateZone(change: FactChange, zoneId: string, request: UpdateZoneRequest): Promise<Zone> {
  const { yardId, now } = change;
  const yard = await holdYard(change);
  const zone = await zoneOf(change, zoneId);
  const today = todayAt(yard, now);
  checkSeededOn(request.seededOn, today);
  checkSunHoursOn(request.sunHoursOn, today);
  const { name, areaM2, sideAM, sideBM, grass, soil, slopePct, compaction, treeRootShare, coverFraction, seededOn, mulch, resting, priority } = request;
  const isResized = areaM2 !== undefined || sideAM !== undefined || sideBM !== undefined;
  const size = { areaM2: zone.areaM2, sideAM: zone.sideAM ?? null, sideBM: zone.sideBM ?? null };
  const fields = {
    name, seededOn, mulch, resting, priority, ...defaultedFields({ grass, soil, slopePct, compaction, treeRootShare, coverFraction }, yard), ...sunFields(request, zone, today), ...(isResized ? zoneSize({ areaM2, sideAM, sideBM }, size) : {}),
  };
  const seededBefore = zone.seededOn ?? null;
  const changes = changesOf(zone.get(), fields);
  if (Object.keys(changes).length === 0) {
    return zone;
  }
  await zone.update(Object.fromEntries(Object.keys(changes).map((field) => [field, changes[field]?.after])));
  if ('areaM2' in changes) {
    await shareZoneArea(zone);
  }
  if ('seededOn' in changes && zone.seededOn) {
    await ensureSchedule(yardId, zone.id, now);
  }
  await tell(change, 'zone.updated', zone, { changes });
  const touchesBudget = 'seededOn' in changes || budgetFields.some((field) => field in changes);
  await factsChanged(change.database, yardId, touchesBudget
    ? firstChangedOn(today, earliestFactOn(yard, now), 'seededOn' in changes ? [seededBefore, zone.seededOn ?? null] : [])
    : null);
  return zone;
}

/** Takes a zone out of use; its history stays. @throws AppError not_found, in_use */
export async function archiveZone(change: FactChange, zoneId: string): Promise<void> {
  await holdYard(change);
  const zone = await zoneOf(change, zoneId);
  await refuseInUse(change, { zoneId }, zone.name, 'Remove them first.');
  if (await Proposal.count({ where: { yardId: change.yardId, zoneId, status: 'open' } }) > 0) {
    throw new AppError('in_use', `A proposal for the doses of ${zone.name} is still open. Decide on it first.`);
  }
  await zone.update({ archivedAt: change.now });
  await tell(change, 'zone.archived', zone, {});
  await factsChanged(change.database, change.yardId, null);
}
