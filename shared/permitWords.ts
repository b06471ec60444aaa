import type { PermitResponse } from './contracts/waterRules';
import { dayWord, formatCivilDay } from './display';

/** 'a', 'a and b', 'a, b and c'. */
export function listed(words: readonly string[], and = 'and'): string {
  return words.length < 2 ? words[0] ?? '' : `${words.slice(0, -1).join(', ')} ${and} ${words[words.length - 1]}`;
}

export type PermitPhase = 'coming' | 'holding' | 'ended';

/** Where a permit stands on a day: 'Ends on Saturday 11 July', 'Ended on …', 'Begins …'. */
export function permitState(permit: Pick<PermitResponse, 'fromOn' | 'toOn'>, today: string): { text: string; phase: PermitPhase } {
  const on = (day: string): string => (/^(today|tomorrow|yesterday)$/.test(dayWord(day, today)) ? dayWord(day, today) : `on ${dayWord(day, today)}`);
  if (today < permit.fromOn) {
    return { text: `Begins ${on(permit.fromOn)}, ends on ${formatCivilDay(permit.toOn, 'dated')}`, phase: 'coming' };
  }
  return today > permit.toOn ? { text: `Ended ${on(permit.toOn)}`, phase: 'ended' } : { text: `Ends ${on(permit.toOn)}`, phase: 'holding' };
}
