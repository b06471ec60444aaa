import type { PlanRule, RuleSeason } from '@/scheduling/planning/types';
import type { WaterRule } from '@/server/models';

type RuleRow = Pick<
  WaterRule,
  'id' | 'name' | 'weekdays' | 'dateParity' | 'windows' | 'weekdaysByDigit' | 'attended' | 'devices' | 'stage' | 'exemptSeeded' | 'seasonFrom' | 'seasonTo' | 'source' | 'sourceOn'
>;

function seasonOf(rule: RuleRow): RuleSeason | null {
  const [fromMonth, fromDay] = (rule.seasonFrom ?? '').split('-').map(Number);
  const [toMonth, toDay] = (rule.seasonTo ?? '').split('-').map(Number);
  return fromMonth && fromDay && toMonth && toDay ? { fromMonth, fromDay, toMonth, toDay } : null;
}

const digitPart = (ruleId: string): string => `${ruleId}/digit`;
const attendedPart = (ruleId: string): string => `${ruleId}/attended`;

/** The planner's ids of all that one stored rule may become. */
export function partsOfRule(ruleId: string): string[] {
  return [ruleId, digitPart(ruleId), attendedPart(ruleId)];
}

/**
 * Stored water rules as the planner reads them. Water may run only when every rule in force allows it; what a rule leaves out does not limit.
 * A stored rule that limits days and hours, goes by the house number and forbids unattended hoses becomes one rule of the planner for each of the three.
 */
export function toPlanRules(rules: readonly RuleRow[]): PlanRule[] {
  return rules.flatMap((rule): PlanRule[] => {
    const base = {
      name: rule.name, source: rule.source, sourceOn: rule.sourceOn, season: seasonOf(rule), exemptSeeded: rule.exemptSeeded,
      ...(rule.devices === null ? {} : { devices: rule.devices }), ...(rule.stage === null ? {} : { stage: rule.stage }),
    };
    const days = daysAndHours(rule);
    return [
      ...(days === null ? [] : [{ ...base, id: rule.id, ...days }]),
      ...(rule.weekdaysByDigit === null ? [] : [{ ...base, id: digitPart(rule.id), kind: 'address_digit' as const, weekdaysByDigit: rule.weekdaysByDigit }]),
      ...(rule.attended ? [{ ...base, id: attendedPart(rule.id), kind: 'attended' as const }] : []),
    ];
  });
}

type DaysAndHours = Pick<PlanRule & { kind: 'weekdays' }, 'kind' | 'weekdays'> | Pick<PlanRule & { kind: 'date_parity' }, 'kind' | 'parity'>
  | Pick<PlanRule & { kind: 'hours' }, 'kind' | 'allowed'> | Pick<PlanRule & { kind: 'combination' }, 'kind' | 'weekdays' | 'parity' | 'allowed'>;

/** Null when the rule says nothing of weekdays, dates or hours. */
function daysAndHours({ weekdays, dateParity, windows }: RuleRow): DaysAndHours | null {
  if (weekdays !== null && dateParity === null && windows === null) {
    return { kind: 'weekdays', weekdays };
  }
  if (dateParity !== null && weekdays === null && windows === null) {
    return { kind: 'date_parity', parity: dateParity };
  }
  if (windows !== null && weekdays === null && dateParity === null) {
    return { kind: 'hours', allowed: windows };
  }
  return weekdays === null && dateParity === null && windows === null ? null : { kind: 'combination', weekdays, parity: dateParity, allowed: windows };
}
