import { randomUUID } from 'node:crypto';
import { DEFAULT_SCHEDULE, type EstablishmentSchedule } from '@/scheduling/establishment';
import { notFound } from '@/server/errors';
import { EstablishmentScheduleRow, Yard, Zone } from '@/server/models';
import { civilDayAt } from '@/shared/time';

/** The schedule of a sowing that nobody has tuned. An established stand has no doses, so its stage is left out of what is stored. */
export const defaultSchedule: EstablishmentSchedule = { stages: DEFAULT_SCHEDULE.stages.filter((doses) => doses.stage !== 'established') };

/** The schedule in force for a zone, the newest row; null when the zone never had one. */
export function currentSchedule(yardId: string, zoneId: string): Promise<EstablishmentScheduleRow | null> {
  return EstablishmentScheduleRow.findOne({ where: { yardId, zoneId }, order: [['validFrom', 'DESC'], ['createdAt', 'DESC'], ['isDefault', 'ASC']] });
}

/**
 * Sees to it that a seeded zone has a schedule, inside the caller's transaction: the default, marked as one, for a first sowing and for
 * a new sowing after the schedule was tuned for an earlier one. A tuned schedule stays when only the day of its sowing is put right.
 * @throws AppError not_found when the zone is not in the yard
 */
export async function ensureSchedule(yardId: string, zoneId: string, now: Date): Promise<EstablishmentScheduleRow> {
  const yard = await Yard.findByPk(yardId);
  const zone = await Zone.findOne({ where: { yardId, id: zoneId } });
  const current = await currentSchedule(yardId, zoneId);
  if (yard === null || zone === null) {
    throw notFound('zone');
  }
  const isForThisSowing = current !== null && (current.isDefault || zone.seededOn == null || civilDayAt(current.validFrom, yard.timeZone) >= zone.seededOn);
  if (current !== null && isForThisSowing) {
    return current;
  }
  return EstablishmentScheduleRow.create({ id: randomUUID(), yardId, zoneId, schedule: defaultSchedule, isDefault: true, proposalId: null, validFrom: now, createdAt: now });
}
