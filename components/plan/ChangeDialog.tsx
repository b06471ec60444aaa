import { zodResolver } from '@hookform/resolvers/zod';
import type { ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { Dialog } from '@/components/ui/Dialog';
import { Form } from '@/components/ui/Form';
import { NumberField } from '@/components/ui/NumberField';
import { optionalNumberText } from '@/components/ui/numberText';
import { Row } from '@/components/ui/Row';
import { SelectField } from '@/components/ui/SelectField';
import { TimeField } from '@/components/ui/TimeField';
import { addDays } from '@/scheduling/units/civilDay';
import { planPriorities, type PlanChange } from '@/shared/contracts/wishes';
import type { YardResponse } from '@/shared/contracts/yards';
import { dayWord, formatCivilDay, fromShown, unitLabel } from '@/shared/display';
import { capital } from '@/shared/roundWords';
import { z } from '@/shared/zod';
import { priorityWords } from './wishWords';

const kinds = ['day_off', 'more_hours', 'let_rest', 'month_cap', 'priority'] as const;
const kindLabels: Readonly<Record<(typeof kinds)[number], string>> = {
  day_off: 'Nobody waters on a day', more_hours: 'Somebody is there for longer', let_rest: 'A zone rests', month_cap: 'A cap on a month’s water', priority: 'Something else counts most',
};
const DAYS_OFFERED = 10;

/** Asks what would be otherwise, one thing at a time. */
export function ChangeDialog({ yard, todayOn, onAdd, onClose }: { yard: YardResponse; todayOn: string; onAdd: (change: PlanChange) => void; onClose: () => void }): ReactElement {
  const unit = unitLabel('volume', yard.units);
  const grown = yard.zones.filter((zone) => !zone.resting);
  const schema = z.object({
    kind: z.enum(kinds), on: z.string(), fromMinutes: z.number().nullable(), toMinutes: z.number().nullable(), zoneId: z.string(), cap: optionalNumberText({ min: yard.units === 'us' ? 10 : 40, max: 1_000_000, unit }), priority: z.enum(planPriorities),
  }).superRefine((values, issue) => {
    if (values.kind === 'more_hours' && (values.fromMinutes === null || values.toMinutes === null || values.toMinutes <= values.fromMinutes)) {
      issue.addIssue({ code: 'custom', path: ['toMinutes'], message: 'Give a start and a later end.' });
    }
    if (values.kind === 'let_rest' && values.zoneId === '') {
      issue.addIssue({ code: 'custom', path: ['zoneId'], message: 'Choose a zone.' });
    }
  });
  const form = useForm<z.input<typeof schema>, unknown, z.output<typeof schema>>({
    resolver: zodResolver(schema), mode: 'onTouched',
    defaultValues: { kind: 'day_off', on: todayOn, fromMinutes: 18 * 60, toMinutes: 20 * 60, zoneId: '', cap: '', priority: 'spare_water' },
  });
  const kind = useWatch({ control: form.control, name: 'kind' });
  const onSubmit = (values: z.output<typeof schema>) => {
    switch (values.kind) {
      case 'day_off': return onAdd({ kind: 'day_off', on: values.on });
      case 'more_hours': return onAdd({ kind: 'more_hours', on: values.on, fromMinutes: values.fromMinutes ?? 0, toMinutes: values.toMinutes ?? 0 });
      case 'let_rest': return onAdd({ kind: 'let_rest', zoneId: values.zoneId });
      case 'month_cap': return onAdd({ kind: 'month_cap', litres: values.cap === null ? null : fromShown('volume', values.cap, yard.units) });
      case 'priority': return onAdd({ kind: 'priority', priority: values.priority });
    }
  };
  const days = Array.from({ length: DAYS_OFFERED }, (_, index) => addDays(todayOn, index));
  return (
    <Dialog open onClose={onClose} title="What if">
      <Form form={form} onSubmit={onSubmit} submitLabel="Show the difference" label="What if">
        <ChoiceField control={form.control} name="kind" label="What would be otherwise" options={kinds.filter((one) => one !== 'let_rest' || grown.length > 0).map((value) => ({ value, label: kindLabels[value] }))} />
        {kind === 'day_off' || kind === 'more_hours' ? (
          <SelectField control={form.control} name="on" label="Day" options={days.map((on, index) => ({ value: on, label: index < 2 ? `${capital(dayWord(on, todayOn))}, ${formatCivilDay(on, 'long')}` : formatCivilDay(on, 'long') }))} />
        ) : null}
        {kind === 'more_hours' ? (
          <Row gap={12} align="flex-start">
            <TimeField control={form.control} name="fromMinutes" label="There from" />
            <TimeField control={form.control} name="toMinutes" label="to" />
          </Row>
        ) : null}
        {kind === 'let_rest' ? <SelectField control={form.control} name="zoneId" label="Zone" placeholder="Choose a zone" options={grown.map((zone) => ({ value: zone.id, label: zone.name }))} hint="A resting lawn may turn brown and comes back with cooler weather." /> : null}
        {kind === 'month_cap' ? <NumberField control={form.control} name="cap" label="Most water in a month" unit={unit} hint="Empty: no cap." /> : null}
        {kind === 'priority' ? <ChoiceField control={form.control} name="priority" label="Counts most" options={planPriorities.map((value) => ({ value, ...priorityWords[value] }))} /> : null}
      </Form>
    </Dialog>
  );
}
