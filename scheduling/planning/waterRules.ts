import { weekdayOf } from '@/scheduling/units/civilDay';
import { intersectWindows, normalizeWindows } from './minuteWindows';
import type { MinuteWindow, PlanDevice, PlanPermit, PlanRule, RuleSeason } from './types';

const WHOLE_DAY: readonly MinuteWindow[] = [{ fromMinutes: 0, toMinutes: 1440 }];

/** Whether a civil day lies in a season; both ends belong to it, and it may run over New Year. */
export function isInSeason(season: RuleSeason, on: string): boolean {
  const key = Number(on.slice(5, 7)) * 100 + Number(on.slice(8, 10));
  const from = season.fromMonth * 100 + season.fromDay;
  const to = season.toMonth * 100 + season.toDay;
  return from <= to ? key >= from && key <= to : key >= from || key <= to;
}

/** What rules look at besides the day: whose ground it is and what waters it. Whatever is left out does not matter to any rule. */
export interface RuleFacts {
  device?: PlanDevice;
  zoneId?: string;
  permits?: readonly PlanPermit[];
  /** Stage of water shortage in force, 0 when left out. */
  waterStage?: number;
  /** Last digit of the house number. */
  addressDigit?: number;
}

/** Whether a permit covers a zone on a day. */
export function isPermitInForce(permit: PlanPermit, on: string, zoneId: string): boolean {
  return permit.zoneIds.includes(zoneId) && permit.fromOn <= on && on <= permit.toOn && !permit.blackoutMonths.includes(Number(on.slice(5, 7)));
}

function permitsFor(on: string, isSeeded: boolean, facts: RuleFacts): PlanPermit[] {
  const { zoneId, permits } = facts;
  return !isSeeded || zoneId === undefined || permits === undefined ? [] : permits.filter((permit) => isPermitInForce(permit, on, zoneId));
}

/** Whether a rule binds on that day, for ground that is or is not newly seeded. */
export function isRuleInForce(rule: PlanRule, on: string, isSeeded: boolean, facts: RuleFacts = {}): boolean {
  if (isSeeded && rule.exemptSeeded) {
    return false;
  }
  if (rule.devices !== undefined && !rule.devices.includes(facts.device ?? 'sprinkler')) {
    return false;
  }
  if (rule.stage !== undefined && (facts.waterStage ?? 0) < rule.stage) {
    return false;
  }
  if (rule.kind === 'address_digit' && facts.addressDigit === undefined) {
    return false;
  }
  if (permitsFor(on, isSeeded, facts).some((permit) => permit.liftsRuleIds === null || permit.liftsRuleIds.includes(rule.id))) {
    return false;
  }
  return rule.season === null || isInSeason(rule.season, on);
}

/** Whether somebody must stay with the hose on that day, shut-off timer or not. */
export function mustBeAttended(rules: readonly PlanRule[], on: string, isSeeded: boolean, facts: RuleFacts = {}): boolean {
  return rules.some((rule) => rule.kind === 'attended' && isRuleInForce(rule, on, isSeeded, facts));
}

function isParityOpen(parity: 'odd' | 'even', on: string): boolean {
  const isOdd = Number(on.slice(8, 10)) % 2 === 1;
  return parity === 'odd' ? isOdd : !isOdd;
}

/** The minutes that one rule in force leaves open on a day. */
export function windowsOfRule(rule: PlanRule, on: string, facts: RuleFacts = {}): MinuteWindow[] {
  const isDayOpen =
    rule.kind === 'weekdays' ? rule.weekdays.includes(weekdayOf(on))
    : rule.kind === 'date_parity' ? isParityOpen(rule.parity, on)
    : rule.kind === 'address_digit' ? facts.addressDigit === undefined || (rule.weekdaysByDigit[facts.addressDigit] ?? []).includes(weekdayOf(on))
    : rule.kind === 'combination'
      ? (rule.weekdays === null || rule.weekdays.includes(weekdayOf(on))) && (rule.parity === null || isParityOpen(rule.parity, on))
    : true;
  if (!isDayOpen) {
    return [];
  }
  if (rule.kind === 'hours') {
    return normalizeWindows(rule.allowed);
  }
  if (rule.kind === 'combination' && rule.allowed !== null) {
    return normalizeWindows(rule.allowed);
  }
  return [...WHOLE_DAY];
}

/** What the rules leave open on a day, and the rule that closed it when nothing is left. */
export interface RuleOpening {
  windows: MinuteWindow[];
  /** The first rule that by itself or together with earlier ones leaves no minute; null when some minute is open. */
  closedBy: PlanRule | null;
  /** Rules in force that narrow the day without closing it. */
  narrowedBy: PlanRule[];
}

/**
 * Minutes of a day that satisfy every rule in force.
 * @param rules - all rules of the yard
 * @param on - civil day
 * @param isSeeded - whether the ground is newly seeded, which some rules exempt
 * @param facts - device, permits, stage of shortage and house number, where a rule asks for them
 */
export function openingByRules(rules: readonly PlanRule[], on: string, isSeeded: boolean, facts: RuleFacts = {}): RuleOpening {
  let windows: MinuteWindow[] = [...WHOLE_DAY];
  for (const permit of permitsFor(on, isSeeded, facts)) {
    windows = permit.allowed === null ? windows : intersectWindows(windows, normalizeWindows(permit.allowed));
  }
  const narrowedBy: PlanRule[] = [];
  for (const rule of rules) {
    if (!isRuleInForce(rule, on, isSeeded, facts)) {
      continue;
    }
    const open = windowsOfRule(rule, on, facts);
    const left = intersectWindows(windows, open);
    if (left.length === 0) {
      return { windows: [], closedBy: rule, narrowedBy };
    }
    if (open.length !== 1 || open[0]?.fromMinutes !== 0 || open[0].toMinutes !== 1440) {
      narrowedBy.push(rule);
    }
    windows = left;
  }
  return { windows, closedBy: null, narrowedBy };
}
