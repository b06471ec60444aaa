import { planRoundReminders } from '@/server/commands/reminders/planRoundReminders';
import { factsChanged } from '@/server/commands/factsChanged';
import { recordEvent } from '@/server/commands/recordEvent';
import { holdYard } from '@/server/commands/yards/yardFacts';
import { notFound } from '@/server/errors';
import type { RoundChange } from './roundChange';
import { fillSet, loadRound } from './roundRows';
import { afterAction, type RoundAction } from './roundStates';

const verbs: Record<RoundAction['action'], string> = {
  moved: 'round.moved', add_minutes: 'round.minutes_added', cut_short: 'round.cut_short', skip: 'round.set_skipped', water_off: 'round.ended',
};

/**
 * Takes over what somebody says about a running round. When the water is off, budget and plan are behind and will be made anew.
 * @throws AppError not_found, round_not_running, set_not_in_state
 */
export async function changeRound(change: RoundChange, roundId: string, action: RoundAction): Promise<void> {
  const { app: { database }, yardId, userId, now } = change;
  await holdYard({ database, yardId });
  const stored = await loadRound(database, yardId, roundId);
  if (stored === null) {
    throw notFound('round');
  }
  const after = afterAction(stored.state, action, now);
  if (after === stored.state) {
    return;
  }
  for (const row of stored.setRows) {
    const set = after.sets.find((candidate) => candidate.id === row.id);
    if (set !== undefined) {
      await fillSet(row, set).save();
    }
  }
  const { action: _verb, ...details } = action;
  await recordEvent({ yardId, userId, verb: verbs[action.action], subjectKind: 'round', subjectId: roundId, data: details }, now);
  if (after.status === 'ended') {
    await stored.row.update({ status: 'ended', endedAt: now, waterOffAt: now, waterOffBy: userId });
    await factsChanged(database, yardId, stored.row.on);
  }
  await planRoundReminders(change, roundId);
}
