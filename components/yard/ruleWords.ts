import type { UnitSystem } from '@/shared/contracts/common';
import type { PermitResponse, RuleDevice, WaterRuleResponse } from '@/shared/contracts/waterRules';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatClock } from '@/shared/display';
import { listed } from '@/shared/permitWords';
import { months } from './months';
import { weekdays } from './weekdays';

export const deviceWords: Record<RuleDevice, string> = { sprinkler: 'Sprinklers', soaker: 'Soaker hoses', hand_held: 'A hose held in the hand' };

function daysText(days: readonly number[]): string {
  return days.length === 0 ? 'no day' : weekdays.filter(({ day }) => days.includes(day)).map(({ name }) => name).join(', ');
}

function windowsText(windows: NonNullable<WaterRuleResponse['windows']>, units: UnitSystem): string {
  return windows.length === 0 ? 'no hour' : windows.map((window) => `${formatClock(window.fromMinutes, units)} to ${formatClock(window.toMinutes, units)}`).join(' and ');
}

/** 'houses ending in 0 or 1: Monday; in 2 or 3: Tuesday', digits with the same days together. */
function digitsText(weekdaysByDigit: readonly (readonly number[])[]): string {
  const byDays = new Map<string, number[]>();
  weekdaysByDigit.forEach((days, digit) => byDays.set(daysText(days), [...(byDays.get(daysText(days)) ?? []), digit]));
  return `houses ending ${[...byDays].map(([days, digits]) => `in ${listed(digits.map(String), 'or')}: ${days}`).join('; ')}`;
}

/** What a rule allows, in words: 'Monday, Thursday; 6:00 am to 9:00 am; from 15 May to 1 October'. */
export function ruleText(rule: WaterRuleResponse, units: UnitSystem): string {
  const parts: string[] = [];
  if (rule.weekdaysByDigit !== null) {
    parts.push(digitsText(rule.weekdaysByDigit));
  }
  if (rule.weekdays !== null) {
    parts.push(daysText(rule.weekdays));
  }
  if (rule.dateParity !== null) {
    parts.push(`${rule.dateParity} dates`);
  }
  if (rule.windows !== null) {
    parts.push(windowsText(rule.windows, units));
  }
  if (rule.attended) {
    parts.push('no hose unattended');
  }
  if (rule.devices !== null) {
    parts.push(`binds only ${listed(rule.devices.map((device) => deviceWords[device].toLowerCase()))}`);
  }
  if (rule.exemptSeeded) {
    parts.push('not newly seeded ground');
  }
  if (rule.seasonFrom !== null && rule.seasonTo !== null) {
    const day = (monthDay: string) => formatCivilDay(`2024-${monthDay}`, 'dated').replace(' 2024', '');
    parts.push(`from ${day(rule.seasonFrom)} to ${day(rule.seasonTo)}`);
  }
  if (rule.stage !== null) {
    parts.push(`from shortage stage ${rule.stage} on`);
  }
  return parts.join('; ');
}

type RuleYard = Pick<YardResponse, 'addressDigit' | 'waterStage' | 'waterStageIsDefault'>;

/** What the yard's own number and stage make of a rule, and what it lacks for that; null when neither counts. */
export function ruleState(rule: WaterRuleResponse, yard: RuleYard): { text: string; isMissing: boolean } | null {
  if (rule.stage !== null && yard.waterStage < rule.stage) {
    return { text: `Not in force: the yard is at stage ${yard.waterStage}${yard.waterStageIsDefault ? ' (default)' : ''}.`, isMissing: false };
  }
  if (rule.weekdaysByDigit === null) {
    return rule.stage === null ? null : { text: `In force: the yard is at stage ${yard.waterStage}.`, isMissing: false };
  }
  return yard.addressDigit === null
    ? { text: 'The last digit of the house number is not known: the plan is made as if this rule did not hold.', isMissing: true }
    : { text: `This house ends in ${yard.addressDigit}: ${daysText(rule.weekdaysByDigit[yard.addressDigit] ?? [])}.`, isMissing: false };
}

/** What a permit allows, in words. */
export function permitText(permit: PermitResponse, yard: Pick<YardResponse, 'zones' | 'rules' | 'units'>): string {
  const zones = yard.zones.filter((zone) => permit.zoneIds.includes(zone.id)).map((zone) => zone.name);
  const lifted = permit.liftsRuleIds;
  return [
    zones.length === 0 ? 'no zone that is in use' : listed(zones),
    `from ${formatCivilDay(permit.fromOn, 'dated')}`,
    ...(permit.windows === null ? [] : [windowsText(permit.windows, yard.units)]),
    ...(permit.blackoutMonths.length === 0 ? [] : [`not in ${listed(permit.blackoutMonths.map((month) => months[month - 1]?.name ?? ''))}`]),
    lifted === null ? 'lifts every rule' : `lifts ${listed(yard.rules.filter((rule) => lifted.includes(rule.id)).map((rule) => rule.name)) || 'no rule'}`,
  ].join('; ');
}
