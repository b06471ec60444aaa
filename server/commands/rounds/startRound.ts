import { addDays } from '@/scheduling/units/civilDay';
import { planDayReminders } from '@/server/commands/reminders/planDayReminders';
import { planRoundReminders } from '@/server/commands/reminders/planRoundReminders';
import { recordEvent } from '@/server/commands/recordEvent';
import { holdYard } from '@/server/commands/yards/yardFacts';
import { AppError, invalidField } from '@/server/errors';
import { Round, RoundSet } from '@/server/models';
import type { StartRoundRequest } from '@/shared/contracts/rounds';
import { civilDayAt } from '@/shared/time';
import type { RoundChange } from './roundChange';
import { fillSet, setStates } from './roundRows';
import { startedRound } from './roundStates';
import { setsOfPlan } from './setsOfPlan';

/**
 * Starts a planned round: its sets are taken over from the newest plan, and the first one runs from now. Starting a round that this id names already
 * changes nothing, so a second tap or a replay is harmless.
 * @returns id of the round
 * @throws AppError not_found when the plan has no such round, round_already_running, conflict when the round was started or skipped before
 */
export async function startRound(change: RoundChange, request: StartRoundRequest): Promise<string> {
  const { app: { database }, yardId, userId, now } = change;
  const yard = await holdYard({ database, yardId });
  const same = await Round.findByPk(request.id);
  if (same !== null) {
    if (same.yardId !== yardId) {
      throw new AppError('conflict', 'That id is taken. Make a new one.');
    }
    return same.id;
  }
  const today = civilDayAt(now, yard.timeZone);
  if (request.on !== today && request.on !== addDays(today, -1)) {
    throw invalidField('on', 'A round is started on its day.');
  }
  await refuseSecondStart(yardId, request);
  const { planId, sets } = await setsOfPlan(database, yardId, now, request, request.id);
  const state = startedRound(await setStates(database, yardId, sets), now);
  await Round.create({ id: request.id, yardId, on: request.on, roundIndex: request.roundIndex, planId, status: state.status, startedBy: userId, startedAt: now });
  for (const set of sets) {
    const own = state.sets.find((candidate) => candidate.id === set.id);
    await (own === undefined ? set : fillSet(set, own)).save();
  }
  await recordEvent({
    yardId, userId, verb: 'round.started', subjectKind: 'round', subjectId: request.id, data: { on: request.on, roundIndex: request.roundIndex, sets: sets.length },
  }, now);
  await planRoundReminders(change, request.id);
  await planDayReminders(change, yard, request.on);
  return request.id;
}

async function refuseSecondStart(yardId: string, { on, roundIndex }: StartRoundRequest): Promise<void> {
  if (await Round.count({ where: { yardId, status: 'running' } }) > 0) {
    throw new AppError('round_already_running', 'A round is running in this yard. Say when its water is off first.');
  }
  const begun = await RoundSet.findOne({ where: { yardId, on, roundIndex } });
  if (begun !== null) {
    throw new AppError('conflict', begun.roundId === null ? 'This round was skipped.' : 'This round was done already.');
  }
}
