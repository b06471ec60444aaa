import { zodResolver } from '@hookform/resolvers/zod';
import type { ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { CheckboxGroupField } from '@/components/ui/CheckboxGroupField';
import { DateField } from '@/components/ui/DateField';
import { Row } from '@/components/ui/Row';
import { SelectField } from '@/components/ui/SelectField';
import { TextField } from '@/components/ui/TextField';
import { TimeField } from '@/components/ui/TimeField';
import { civilDaySchema, nameSchema } from '@/shared/contracts/common';
import type { WaterRuleResponse } from '@/shared/contracts/waterRules';
import type { YardResponse } from '@/shared/contracts/yards';
import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { FactDialog } from './FactDialog';
import { weekdays } from './weekdays';

const time = z.number().nullable();
const ruleSchema = z.object({
  name: nameSchema, weekdays: z.array(z.string()), parity: z.enum(['any', 'odd', 'even']), from1: time, to1: time, from2: time, to2: time,
  season: z.enum(['all', 'part']), seasonFrom: z.string(), seasonTo: z.string(),
  source: z.string().trim().min(1, 'Say where the rule is written.').max(limits.noteLength), sourceOn: civilDaySchema,
}).superRefine((rule, issue) => {
  ([['from1', 'to1'], ['from2', 'to2']] as const).forEach(([from, to]) => {
    if ((rule[from] === null) !== (rule[to] === null)) {
      issue.addIssue({ code: 'custom', path: [to], message: 'Give both times, or neither.' });
    } else if (rule[from] !== null && (rule[to] ?? 0) <= rule[from]) {
      issue.addIssue({ code: 'custom', path: [to], message: 'The end must come after the start.' });
    }
  });
  if (rule.weekdays.length === 0 && rule.parity === 'any' && rule.from1 === null && rule.from2 === null) {
    issue.addIssue({ code: 'custom', path: ['weekdays'], message: 'Choose the weekdays, the dates or the hours that the rule allows.' });
  }
  if (rule.season === 'part') {
    (['seasonFrom', 'seasonTo'] as const).forEach((end) => {
      if (!civilDaySchema.safeParse(rule[end]).success) {
        issue.addIssue({ code: 'custom', path: [end], message: 'Give both ends of the season.' });
      }
    });
  }
});
type RuleText = z.input<typeof ruleSchema>;
type RuleValues = z.output<typeof ruleSchema>;

function windowsOf(values: RuleValues): { fromMinutes: number; toMinutes: number }[] | null {
  const pairs: [number | null, number | null][] = [[values.from1, values.to1], [values.from2, values.to2]];
  const windows = pairs.flatMap(([from, to]) => (from === null || to === null ? [] : [{ fromMinutes: from, toMinutes: to }]));
  return windows.length === 0 ? null : windows;
}

/** Adds a water rule or changes one. The year of a season's ends does not count. */
export function RuleDialog({ yard, rule, onClose }: { yard: YardResponse; rule: WaterRuleResponse | null; onClose: () => void }): ReactElement {
  const form = useForm<RuleText, unknown, RuleValues>({
    resolver: zodResolver(ruleSchema), mode: 'onTouched',
    defaultValues: {
      name: rule?.name ?? '', weekdays: (rule?.weekdays ?? []).map(String), parity: rule?.dateParity ?? 'any',
      from1: rule?.windows?.[0]?.fromMinutes ?? null, to1: rule?.windows?.[0]?.toMinutes ?? null, from2: rule?.windows?.[1]?.fromMinutes ?? null, to2: rule?.windows?.[1]?.toMinutes ?? null,
      season: rule?.seasonFrom ? 'part' : 'all', seasonFrom: rule?.seasonFrom ? `2024-${rule.seasonFrom}` : '2024-05-15', seasonTo: rule?.seasonTo ? `2024-${rule.seasonTo}` : '2024-10-01',
      source: rule?.source ?? '', sourceOn: rule?.sourceOn ?? '',
    },
  });
  const season = useWatch({ control: form.control, name: 'season' });
  const toBody = (values: RuleValues) => ({
    name: values.name, weekdays: values.weekdays.length === 0 ? null : values.weekdays.map(Number), dateParity: values.parity === 'any' ? null : values.parity, windows: windowsOf(values),
    seasonFrom: values.season === 'part' ? values.seasonFrom.slice(5) : null, seasonTo: values.season === 'part' ? values.seasonTo.slice(5) : null, source: values.source, sourceOn: values.sourceOn,
  });
  return (
    <FactDialog yardId={yard.id} path="rules" id={rule?.id ?? null} title={rule ? rule.name : 'A water rule'} saveLabel="Save the rule" form={form} toBody={toBody} onClose={onClose}
      names={{ dateParity: 'parity', windows: 'from1' }} removal={{ label: 'Remove this rule', body: 'The plan will not heed it any more. The local code still holds.' }}>
      <TextField control={form.control} name="name" label="Name" hint="Summer watering days." />
      <CheckboxGroupField control={form.control} name="weekdays" label="Days it allows" look="segments" hint="None chosen: every day." options={weekdays.map(({ day, short }) => ({ value: String(day), label: short }))} />
      <SelectField control={form.control} name="parity" label="Dates it allows" options={[{ value: 'any', label: 'Every date' }, { value: 'odd', label: 'Odd dates' }, { value: 'even', label: 'Even dates' }]} />
      <Row gap={12} align="flex-start">
        <TimeField control={form.control} name="from1" label="Allowed from" />
        <TimeField control={form.control} name="to1" label="to" />
      </Row>
      <Row gap={12} align="flex-start">
        <TimeField control={form.control} name="from2" label="and from" />
        <TimeField control={form.control} name="to2" label="to" />
      </Row>
      <SelectField control={form.control} name="season" label="Season" options={[{ value: 'all', label: 'All year' }, { value: 'part', label: 'Part of the year' }]} />
      {season === 'part' ? (
        <Row gap={12} align="flex-start">
          <DateField control={form.control} name="seasonFrom" label="From" hint="The year does not count." />
          <DateField control={form.control} name="seasonTo" label="To" />
        </Row>
      ) : null}
      <TextField control={form.control} name="source" label="Where it is written" hint="Ordinance, web page, letter of the water company." />
      <DateField control={form.control} name="sourceOn" label="Read on" />
    </FactDialog>
  );
}
