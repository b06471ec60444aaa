import { randomUUID } from 'node:crypto';
import { addDays } from '@/scheduling/units/civilDay';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { changesOf, holdYard, refuseMoreThan, todayAt, type FactChange } from '@/server/commands/yards/yardFacts';
import { AppError, invalidField, notFound } from '@/server/errors';
import { DayChange, PlanWishes, Position, SetLock, type Yard } from '@/server/models';
import type { MinuteWindow } from '@/shared/contracts/common';
import type { createLockRequestSchema, PutDayChangeRequest, PutWishesRequest } from '@/shared/contracts/wishes';
import { limits } from '@/shared/limits';
import type { z } from '@/shared/zod';

/** Windows with their fields in one order: JSON in the database has one of its own. */
const plain = (windows: readonly MinuteWindow[]): MinuteWindow[] => windows.map(({ fromMinutes, toMinutes }) => ({ fromMinutes, toMinutes }));

/** Takes over what people wish of the plan. Saying the same again changes nothing. */
export async function putWishes(change: FactChange, request: PutWishesRequest): Promise<void> {
  const { yardId, userId, now } = change;
  await holdYard(change);
  const before = await PlanWishes.findByPk(yardId);
  const changes = changesOf(before === null ? {} : { ...before.get(), preferredWindows: plain(before.preferredWindows) }, { ...request, preferredWindows: plain(request.preferredWindows) });
  if (before !== null && Object.keys(changes).length === 0) {
    return;
  }
  await PlanWishes.upsert({ yardId, ...request, updatedAt: now });
  await recordEvent({ yardId, userId, verb: 'wishes.changed', subjectKind: 'yard', subjectId: yardId, data: { ...request, changes } }, now);
  await factsChanged(change.database, yardId, null);
}

function checkAhead(yard: Yard, on: string, now: Date): void {
  const today = todayAt(yard, now);
  if (on < today) {
    throw invalidField('on', 'That day is over.');
  }
  if (on > addDays(today, limits.dayChangesAhead)) {
    throw invalidField('on', `Give a day of the next ${limits.dayChangesAhead}.`);
  }
}

/** Makes one day otherwise than its weekday, or ordinary again. @throws AppError invalid_input for a day that is over or far ahead */
export async function putDayChange(change: FactChange, on: string, { dayOff, extraWindows }: PutDayChangeRequest): Promise<void> {
  const { yardId, userId, now } = change;
  checkAhead(await holdYard(change), on, now);
  const before = await DayChange.findOne({ where: { yardId, on } });
  const isOrdinary = !dayOff && extraWindows.length === 0;
  if (isOrdinary ? before === null : before !== null && before.dayOff === dayOff && JSON.stringify(plain(before.extraWindows)) === JSON.stringify(plain(extraWindows))) {
    return;
  }
  await (isOrdinary ? DayChange.destroy({ where: { yardId, on } }) : DayChange.upsert({ yardId, on, dayOff, extraWindows }));
  await recordEvent({ yardId, userId, verb: 'day.changed', subjectKind: 'yard', subjectId: yardId, data: { on, dayOff, extraWindows } }, now);
  await factsChanged(change.database, yardId, null);
}

/**
 * Fixes a set: every plan keeps it as it is, or says that it cannot.
 * @returns id of the lock; of the one that is there when the same set is fixed already
 * @throws AppError not_found for a position of another yard, conflict when another length is fixed for the same start, limit_reached
 */
export async function lockSet(change: FactChange, request: z.output<typeof createLockRequestSchema>): Promise<string> {
  const { yardId, userId, now } = change;
  const yard = await holdYard(change);
  checkAhead(yard, request.on, now);
  const position = await Position.findOne({ where: { yardId, id: request.positionId, archivedAt: null } });
  if (position === null) {
    throw notFound('position');
  }
  if (request.startMinutes + request.minutes > 1_440) {
    throw invalidField('minutes', 'A set ends before midnight.');
  }
  const same = await SetLock.findOne({ where: { yardId, positionId: request.positionId, on: request.on, startMinutes: request.startMinutes } });
  if (same !== null) {
    if (same.minutes !== request.minutes) {
      throw new AppError('conflict', 'That set is fixed at another length already. Let it go first.');
    }
    return same.id;
  }
  await refuseMoreThan(SetLock, { yardId }, limits.locksPerYard, 'fixed sets');
  const id = randomUUID();
  await SetLock.create({ id, yardId, ...request, lockedBy: userId, createdAt: now });
  await recordEvent({ yardId, userId, verb: 'set.locked', subjectKind: 'position', subjectId: position.id, data: { name: position.name, on: request.on, startMinutes: request.startMinutes, minutes: request.minutes, reason: request.reason } }, now);
  await factsChanged(change.database, yardId, null);
  return id;
}

/** Lets a fixed set go. @throws AppError not_found */
export async function unlockSet(change: FactChange, lockId: string): Promise<void> {
  const { yardId, userId, now } = change;
  await holdYard(change);
  const lock = await SetLock.findOne({ where: { yardId, id: lockId } });
  if (lock === null) {
    throw notFound('fixed set');
  }
  const position = await Position.findOne({ where: { yardId, id: lock.positionId } });
  await lock.destroy();
  await recordEvent({ yardId, userId, verb: 'set.unlocked', subjectKind: 'position', subjectId: lock.positionId, data: { name: position?.name ?? '', on: lock.on, startMinutes: lock.startMinutes } }, now);
  await factsChanged(change.database, yardId, null);
}
