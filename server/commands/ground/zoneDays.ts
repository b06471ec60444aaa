import { notFound } from '@/server/errors';
import { Zone } from '@/server/models';
import type { FactChange } from '@/server/commands/yards/yardFacts';

/** The zone of a yard that is in use. @throws AppError not_found */
export async function zoneInUse({ yardId }: Pick<FactChange, 'yardId'>, zoneId: string): Promise<Zone> {
  const zone = await Zone.findOne({ where: { yardId, id: zoneId, archivedAt: null } });
  if (!zone) {
    throw notFound('zone');
  }
  return zone;
}
