import { randomUUID } from 'node:crypto';
import type { Sequelize } from 'sequelize';
import { Membership, Yard, HomeWindow } from '@/server/models';
import type { CreateYardRequest } from '@/shared/contracts/yards';
import { limits } from '@/shared/limits';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { defaultHours, yardDefaults } from './yardDefaults';
import { refuseMoreThan, todayAt } from './yardFacts';

/**
 * Makes a yard with default hours at home and its creator as owner.
 * @returns the id of the yard
 * @throws AppError limit_reached
 */
export async function createYard(database: Sequelize, userId: string, request: CreateYardRequest, now: Date): Promise<string> {
  await refuseMoreThan(Membership, { userId }, limits.yardsPerPerson, 'yards for one person');
  const { elevationM, ...given } = request;
  const yard = await Yard.create({
    id: randomUUID(), ...given, elevationM: elevationM ?? yardDefaults.elevationM, elevationIsDefault: elevationM === undefined,
    moveMinutes: yardDefaults.moveMinutes, moveMinutesIsDefault: true, reminderLeadMinutes: yardDefaults.reminderLeadMinutes,
  });
  await Membership.create({ id: randomUUID(), yardId: yard.id, userId, role: 'owner' });
  await HomeWindow.bulkCreate(defaultHours.map((window) => ({ id: randomUUID(), yardId: yard.id, ...window, isDefault: true })));
  await recordEvent({
    yardId: yard.id, userId, verb: 'yard.created', subjectKind: 'yard', subjectId: yard.id, data: { name: yard.name, placeName: yard.placeName },
  }, now);
  await factsChanged(database, yard.id, todayAt(yard, now));
  return yard.id;
}
