import type { Href } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { WaterRuleResponse } from '@/shared/contracts/waterRules';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay } from '@/shared/display';
import { capital } from '@/shared/roundWords';
import { RuleDialog } from './RuleDialog';
import { ruleState, ruleText } from './ruleWords';

/** Local water rules, each with where it is written. */
export function RulesSection({ yard }: { yard: YardResponse }): ReactElement {
  const [open, setOpen] = useState<WaterRuleResponse | 'new' | null>(null);
  const edits = yard.abilities['facts.edit'] === true;
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Water rules</Text>
      {yard.rules.length === 0 ? <Text color="inkSoft">None given. Your town or water company may have one: days, dates or hours in which sprinklers may run.</Text> : null}
      {yard.rules.map((rule) => (
        <Stack key={rule.id} gap={4}>
          <Text variant="label">{rule.name}</Text>
          <Text>{capital(ruleText(rule, yard.units))}</Text>
          <RuleState rule={rule} yard={yard} />
          <Text variant="small">{`${rule.source.replace(/\.$/, '')}, read ${formatCivilDay(rule.sourceOn, 'dated')}`}</Text>
          {edits ? <Button size="small" label="Change" accessibleLabel={`Change ${rule.name}`} onPress={() => setOpen(rule)} /> : null}
        </Stack>
      ))}
      {edits ? <Button size="small" label="Add a rule" onPress={() => setOpen('new')} /> : null}
      <Text variant="small">Dapple plans within what you write here. The local code itself decides.</Text>
      {open !== null ? <RuleDialog yard={yard} rule={open === 'new' ? null : open} onClose={() => setOpen(null)} /> : null}
    </Card>
  );
}

/** What the yard's own number and stage make of the rule. */
function RuleState({ rule, yard }: { rule: WaterRuleResponse; yard: YardResponse }): ReactElement | null {
  const state = ruleState(rule, yard);
  if (state === null) {
    return null;
  }
  return (
    <Stack gap={4}>
      <Text color={state.isMissing ? 'dryInk' : 'inkSoft'}>{state.text}</Text>
      {state.isMissing && yard.abilities['yard.update'] ? <TextLink kind="standalone" href={`/yards/${yard.id}/settings` as Href}>Give the digit in the settings</TextLink> : null}
    </Stack>
  );
}
