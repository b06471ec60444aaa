import type { PlanChange, PlanPriorityId, SetLine } from '@/shared/contracts/wishes';
import type { YardResponse } from '@/shared/contracts/yards';
import { dayWord, formatClock, formatMinutes, formatVolume } from '@/shared/display';
import { capital } from '@/shared/roundWords';

/** What each priority means, in the order in which they are offered. */
export const priorityWords: Readonly<Record<PlanPriorityId, { label: string; hint: string }>> = {
  keep_green: { label: 'Keep it green', hint: 'Grass stays above its refill line wherever the hours allow it.' },
  spare_water: { label: 'Spare water', hint: 'Water later and less; rain gets its chance first. Some stress is taken.' },
  spare_me: { label: 'Spare me', hint: 'Fewer outings and moves: longer sets, further apart.' },
  let_rest: { label: 'Let it rest', hint: 'Only what keeps the crowns alive. The lawn may turn brown and comes back. Seed is watered all the same.' },
};

const inText = (on: string, todayOn: string): string => dayWord(on, todayOn);

/** 'Nobody on Wednesday', 'The back lawn rests'. */
export function changeText(change: PlanChange, yard: YardResponse, todayOn: string): string {
  switch (change.kind) {
    case 'day_off': return change.on === todayOn ? 'No watering today' : `Nobody waters ${inText(change.on, todayOn)}`;
    case 'more_hours': return `Somebody is there ${inText(change.on, todayOn)} from ${formatClock(change.fromMinutes, yard.units)} to ${formatClock(change.toMinutes, yard.units)}`;
    case 'let_rest': return `${yard.zones.find((zone) => zone.id === change.zoneId)?.name ?? 'A zone'} rests`;
    case 'month_cap': return change.litres === null ? 'No cap on a month’s water' : `At most ${formatVolume(change.litres, yard.units)} in a month`;
    case 'priority': return `${priorityWords[change.priority].label} counts most`;
  }
}

/** 'Front lawn, Spot 2 on Tuesday at 6:10 am, 45 min'. */
export function lineText(line: SetLine, yard: YardResponse, todayOn: string): string {
  const zone = yard.zones.find((one) => one.id === line.zoneId)?.name ?? 'A zone';
  const position = yard.positions.find((one) => one.id === line.positionId)?.name;
  const name = position === undefined || position === zone ? zone : `${zone}, ${position}`;
  return `${name}${line.kind === 'dose' ? ' (dose)' : ''}, ${inText(line.on, todayOn)} at ${formatClock(line.startMinutes, yard.units)}, ${formatMinutes(line.minutes)}`;
}

/** The words of why a plan was made, as a sentence's beginning. */
export function causeText(cause: string): string {
  return ({ 'first plan': 'The first plan', 'new day': 'A new day', 'facts changed': 'Something changed', 'asked for': 'Asked for', morning: 'The night’s planning' } as Record<string, string>)[cause] ?? capital(cause);
}
