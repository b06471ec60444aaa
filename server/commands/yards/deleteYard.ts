import { invalidField } from '@/server/errors';
import { recordEvent } from '@/server/commands/recordEvent';
import { holdYard, type FactChange } from './yardFacts';

/**
 * Deletes a yard with all that belongs to it. That it was there stays in the trail, outside the yard.
 * @param name - the yard's name, written out by the person
 * @throws AppError invalid_input when the name is another
 */
export async function deleteYard(change: FactChange, name: string): Promise<void> {
  const yard = await holdYard(change);
  if (yard.name !== name) {
    throw invalidField('name', 'That is not the name of this yard. Nothing was deleted.');
  }
  await yard.destroy();
  await recordEvent({ yardId: null, userId: change.userId, verb: 'yard.deleted', subjectKind: 'yard', subjectId: yard.id, data: {} }, change.now);
}
