import type { PlanRule, RuleSeason } from '@/scheduling/planning/types';
import type { WaterRule } from '@/server/models';

type RuleRow = Pick<WaterRule, 'id' | 'name' | 'weekdays' | 'dateParity' | 'windows' | 'seasonFrom' | 'seasonTo' | 'source' | 'sourceOn'>;

function seasonOf(rule: RuleRow): RuleSeason | null {
  const [fromMonth, fromDay] = (rule.seasonFrom ?? '').split('-').map(Number);
  const [toMonth, toDay] = (rule.seasonTo ?? '').split('-').map(Number);
  return fromMonth && fromDay && toMonth && toDay ? { fromMonth, fromDay, toMonth, toDay } : null;
}

/**
 * Stored water rules as the planner reads them. Water may run only when every rule in force allows it; what a rule leaves out does not limit.
 * None of them exempts seeded ground.
 */
export function toPlanRules(rules: readonly RuleRow[]): PlanRule[] {
  return rules.map((rule): PlanRule => {
    const base = { id: rule.id, name: rule.name, source: rule.source, sourceOn: rule.sourceOn, season: seasonOf(rule), exemptSeeded: false };
    const { weekdays, dateParity, windows } = rule;
    if (weekdays !== null && dateParity === null && windows === null) {
      return { ...base, kind: 'weekdays', weekdays };
    }
    if (dateParity !== null && weekdays === null && windows === null) {
      return { ...base, kind: 'date_parity', parity: dateParity };
    }
    if (windows !== null && weekdays === null && dateParity === null) {
      return { ...base, kind: 'hours', allowed: windows };
    }
    return { ...base, kind: 'combination', weekdays, parity: dateParity, allowed: windows };
  });
}
