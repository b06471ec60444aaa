import { randomUUID } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { AppError, invalidField, notFound } from '@/server/errors';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { changesOf, holdYard, refuseMoreThan, type FactChange } from '@/server/commands/yards/yardFacts';
import { Hose, Position, Sprinkler, Tap, Zone } from '@/server/models';
import type { createPositionRequestSchema, UpdatePositionRequest, WeeklyLimit } from '@/shared/contracts/equipment';
import { limits } from '@/shared/limits';
import type { z } from '@/shared/zod';
import { shareZoneArea } from './shareZoneArea';

interface Parts {
  zoneId?: string | undefined;
  tapId?: string | undefined;
  hoseId?: string | null | undefined;
  sprinklerId?: string | undefined;
}

/** @throws AppError invalid_input when a part that a position stands on is not in use in this yard */
export async function checkParts(yardId: string, { zoneId, tapId, hoseId, sprinklerId }: Parts): Promise<void> {
  const inUse = (id: string) => ({ where: { yardId, id, archivedAt: null } });
  if (zoneId !== undefined && await Zone.count(inUse(zoneId)) === 0) {
    throw invalidField('zoneId', 'That zone is not in this yard.');
  }
  if (tapId !== undefined && await Tap.count(inUse(tapId)) === 0) {
    throw invalidField('tapId', 'That tap is not in this yard.');
  }
  if (hoseId && await Hose.count(inUse(hoseId)) === 0) {
    throw invalidField('hoseId', 'That hose is not in this yard.');
  }
  if (sprinklerId !== undefined && await Sprinkler.count(inUse(sprinklerId)) === 0) {
    throw invalidField('sprinklerId', 'That sprinkler is not in this yard.');
  }
}

async function positionOf(change: FactChange, positionId: string): Promise<Position> {
  await holdYard(change);
  const position = await Position.findOne({ where: { yardId: change.yardId, id: positionId, archivedAt: null } });
  if (!position) {
    throw notFound('position');
  }
  return position;
}

async function shareAreaOf(position: Position): Promise<void> {
  const zone = await Zone.findOne({ where: { yardId: position.yardId, id: position.zoneId } });
  if (zone) {
    await shareZoneArea(zone);
  }
}

function limitFields(limit: WeeklyLimit | null) {
  return { weeklyLimitOver: limit?.over ?? null, weeklyLimitMm: limit?.depthMm ?? null, weeklyLimitSource: limit?.source ?? null };
}

async function tell(change: FactChange, verb: string, position: Position, data: Record<string, unknown>): Promise<void> {
  await recordEvent({ yardId: change.yardId, userId: change.userId, verb, subjectKind: 'position', subjectId: position.id, data: { name: position.name, ...data } }, change.now);
  await factsChanged(change.database, change.yardId, null);
}

/** Adds a position at the end of the order. @throws AppError invalid_input, limit_reached */
export async function createPosition(change: FactChange, request: z.output<typeof createPositionRequestSchema>): Promise<string> {
  const { yardId } = change;
  await holdYard(change);
  await checkParts(yardId, request);
  await refuseMoreThan(Position, { yardId, archivedAt: null }, limits.positionsPerYard, 'positions in one yard');
  const last: number | null = await Position.max('sortOrder', { where: { yardId, archivedAt: null } });
  const { wettedAreaM2, heightM, weeklyLimit, alternateSets, ...given } = request;
  const position = await Position.create({
    id: randomUUID(), yardId, ...given, sortOrder: (last ?? 0) + 1,
    // A default share is worked out below, when the position counts among those of its zone.
    wettedAreaM2: wettedAreaM2 ?? 1, wettedAreaIsDefault: wettedAreaM2 === undefined,
    heightM: heightM ?? null, ...limitFields(weeklyLimit ?? null), alternateSets: alternateSets ?? false,
  });
  await shareAreaOf(position);
  await tell(change, 'position.created', position, { zoneId: position.zoneId });
  return position.id;
}

/** Changes the fields that are told. Another tap, hose or sprinkler ends its catch-cup tests. @throws AppError not_found, invalid_input */
export async function updatePosition(change: FactChange, positionId: string, request: UpdatePositionRequest): Promise<void> {
  const position = await positionOf(change, positionId);
  await checkParts(change.yardId, request);
  const { wettedAreaM2, weeklyLimit, ...plain } = request;
  const fields = {
    ...plain,
    ...(wettedAreaM2 === undefined ? {} : { wettedAreaIsDefault: wettedAreaM2 === null }),
    ...(wettedAreaM2 === undefined || wettedAreaM2 === null ? {} : { wettedAreaM2 }),
    ...(weeklyLimit === undefined ? {} : limitFields(weeklyLimit)),
  };
  const changes = changesOf(position.get(), fields);
  if (Object.keys(changes).length === 0) {
    return;
  }
  await position.update(fields);
  if ('wettedAreaIsDefault' in changes) {
    await shareAreaOf(position);
  }
  await tell(change, 'position.updated', position, { changes });
}

/** Takes a position out of use; its tests and what was watered there stay. @throws AppError not_found, in_use while a round still goes there */
export async function archivePosition(change: FactChange, positionId: string): Promise<void> {
  const position = await positionOf(change, positionId);
  const running = await change.database.query(
    `SELECT 1 FROM round_sets s JOIN rounds r ON r.yard_id = s.yard_id AND r.id = s.round_id
     WHERE s.yard_id = $1 AND s.position_id = $2 AND r.status = 'running' AND s.status IN ('waiting', 'running') LIMIT 1`,
    { bind: [change.yardId, positionId], type: QueryTypes.SELECT },
  );
  if (running.length > 0) {
    throw new AppError('in_use', `${position.name} is used by the round that is running. End the round first.`);
  }
  await position.update({ archivedAt: change.now });
  await shareAreaOf(position);
  await tell(change, 'position.archived', position, {});
}

/**
 * Puts the positions in the order in which the hose is to visit them.
 * @throws AppError invalid_input unless every position in use is named once
 */
export async function putPositionOrder(change: FactChange, positionIds: readonly string[]): Promise<void> {
  const { database, yardId } = change;
  await holdYard(change);
  const positions = await Position.findAll({ where: { yardId, archivedAt: null }, attributes: ['id'] });
  const known = new Set(positions.map((position) => position.id));
  if (positionIds.length !== known.size || positionIds.some((id) => !known.has(id))) {
    throw invalidField('positionIds', 'Name every position of this yard once. Somebody may have added or removed one just now.');
  }
  await database.query(
    `UPDATE positions p SET sort_order = o.place, updated_at = $3 FROM unnest($2::uuid[]) WITH ORDINALITY AS o(id, place) WHERE p.yard_id = $1 AND p.id = o.id`,
    { bind: [yardId, positionIds, change.now], type: QueryTypes.UPDATE },
  );
  await recordEvent({ yardId, userId: change.userId, verb: 'positions.ordered', subjectKind: 'yard', subjectId: yardId, data: { positionIds } }, change.now);
  await factsChanged(database, yardId, null);
}
