import { randomUUID } from 'node:crypto';
import { invalidField } from '@/server/errors';
import { HomeWindow } from '@/server/models';
import type { PutHoursRequest } from '@/shared/contracts/yards';
import { limits } from '@/shared/limits';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { holdYard, type FactChange } from './yardFacts';

/** Puts these hours at home in the place of all that were there. None at all is allowed: the plan then says that nobody is at home. */
export async function putHours(change: FactChange, { windows }: PutHoursRequest): Promise<void> {
  const { yardId } = change;
  await holdYard(change);
  for (let weekday = 0; weekday < 7; weekday += 1) {
    if (windows.filter((window) => window.weekday === weekday).length > limits.windowsPerDay) {
      throw invalidField('windows', `Give at most ${limits.windowsPerDay} spans for one day.`);
    }
  }
  await HomeWindow.destroy({ where: { yardId } });
  await HomeWindow.bulkCreate(windows.map((window) => ({ id: randomUUID(), yardId, ...window, isDefault: false })));
  await recordEvent({ yardId, userId: change.userId, verb: 'hours.changed', subjectKind: 'yard', subjectId: yardId, data: { windows } }, change.now);
  await factsChanged(change.database, yardId, null);
}
