import { AppError } from '@/server/errors';
import { Position } from '@/server/models';
import { listOf, type FactChange } from '@/server/commands/yards/yardFacts';

/**
 * Refuses to take a thing out of use while positions stand on it.
 * @param remedy - a sentence that says what to do first
 * @throws AppError in_use with a sentence that names the positions
 */
export async function refuseInUse(
  change: Pick<FactChange, 'yardId'>, where: { tapId: string } | { hoseId: string } | { sprinklerId: string } | { zoneId: string }, name: string, remedy: string,
): Promise<void> {
  const positions = await Position.findAll({ where: { yardId: change.yardId, archivedAt: null, ...where }, order: [['sortOrder', 'ASC']], attributes: ['name'] });
  if (positions.length > 0) {
    const what = positions.length === 1 ? 'the position' : 'the positions';
    throw new AppError('in_use', `${name} is used by ${what} ${listOf(positions.map((position) => position.name))}. ${remedy}`);
  }
}
