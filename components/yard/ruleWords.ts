import type { UnitSystem } from '@/shared/contracts/common';
import type { WaterRuleResponse } from '@/shared/contracts/waterRules';
import { formatCivilDay, formatClock } from '@/shared/display';
import { weekdays } from './weekdays';

/** What a rule allows, in words: 'Monday, Thursday; 6:00 am to 9:00 am; from 15 May to 1 October'. */
export function ruleText(rule: WaterRuleResponse, units: UnitSystem): string {
  const parts: string[] = [];
  if (rule.weekdays !== null) {
    parts.push(rule.weekdays.length === 0 ? 'no day' : weekdays.filter(({ day }) => rule.weekdays?.includes(day)).map(({ name }) => name).join(', '));
  }
  if (rule.dateParity !== null) {
    parts.push(`${rule.dateParity} dates`);
  }
  if (rule.windows !== null) {
    parts.push(rule.windows.length === 0 ? 'no hour' : rule.windows.map((window) => `${formatClock(window.fromMinutes, units)} to ${formatClock(window.toMinutes, units)}`).join(' and '));
  }
  if (rule.seasonFrom !== null && rule.seasonTo !== null) {
    const day = (monthDay: string) => formatCivilDay(`2024-${monthDay}`, 'dated').replace(' 2024', '');
    parts.push(`from ${day(rule.seasonFrom)} to ${day(rule.seasonTo)}`);
  }
  return parts.join('; ');
}
