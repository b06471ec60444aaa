import { factsChanged } from '@/server/commands/factsChanged';
import { planDayReminders } from '@/server/commands/reminders/planDayReminders';
import { recordEvent } from '@/server/commands/recordEvent';
import { holdYard } from '@/server/commands/yards/yardFacts';
import { AppError, invalidField } from '@/server/errors';
import { RoundSet } from '@/server/models';
import type { SkipCause } from '@/shared/contracts/rounds';
import { civilDayAt } from '@/shared/time';
import type { RoundChange } from './roundChange';
import { setsOfPlan } from './setsOfPlan';

/**
 * Leaves a planned round out before it starts, with a cause. The plan is then made anew around it.
 * @throws AppError not_found when the plan has no such round, conflict when it was started or skipped before
 */
export async function skipPlannedRound(change: RoundChange, skipped: { on: string; roundIndex: number; cause: SkipCause }): Promise<void> {
  const { app: { database }, yardId, userId, now } = change;
  const yard = await holdYard({ database, yardId });
  if (skipped.on < civilDayAt(now, yard.timeZone)) {
    throw invalidField('on', 'That day is over.');
  }
  const begun = await RoundSet.findOne({ where: { yardId, on: skipped.on, roundIndex: skipped.roundIndex } });
  if (begun !== null) {
    if (begun.roundId === null && begun.skipCause === skipped.cause) {
      return;
    }
    throw new AppError('conflict', begun.roundId === null ? 'This round was skipped already.' : 'This round was started already.');
  }
  const { sets } = await setsOfPlan(database, yardId, now, skipped, null);
  for (const set of sets) {
    await set.set({ status: 'skipped', skipCause: skipped.cause }).save();
  }
  await recordEvent({
    yardId, userId, verb: 'round.skipped', subjectKind: 'round', subjectId: null, data: { on: skipped.on, roundIndex: skipped.roundIndex, cause: skipped.cause, sets: sets.length },
  }, now);
  await factsChanged(database, yardId, null);
  await planDayReminders(change, yard, skipped.on);
}
