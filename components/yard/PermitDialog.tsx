import { zodResolver } from '@hookform/resolvers/zod';
import type { ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { CheckboxGroupField } from '@/components/ui/CheckboxGroupField';
import { DateField } from '@/components/ui/DateField';
import { Row } from '@/components/ui/Row';
import { SelectField } from '@/components/ui/SelectField';
import { TextField } from '@/components/ui/TextField';
import { civilDaySchema, nameSchema } from '@/shared/contracts/common';
import type { PermitResponse } from '@/shared/contracts/waterRules';
import type { YardResponse } from '@/shared/contracts/yards';
import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';
import { AllowedHours } from './AllowedHours';
import { FactDialog } from './FactDialog';
import { months } from './months';
import { spanFields, spanProblems, spansOf, windowsOf } from './ruleForm';

const permitSchema = z.object({
  name: nameSchema, zoneIds: z.array(z.string()).min(1, 'Choose the zones that it names.'), fromOn: civilDaySchema, toOn: civilDaySchema,
  blackoutMonths: z.array(z.string()).max(11, 'A permit holds in at least one month.'), ...spanFields,
  lifts: z.enum(['all', 'some']), liftsRuleIds: z.array(z.string()),
  source: z.string().trim().min(1, 'Say who gave the permit, or where it is written.').max(limits.noteLength), sourceOn: civilDaySchema,
}).superRefine((permit, issue) => {
  for (const { path, message } of spanProblems(permit)) {
    issue.addIssue({ code: 'custom', path: [path], message });
  }
  if (permit.toOn < permit.fromOn) {
    issue.addIssue({ code: 'custom', path: ['toOn'], message: 'The last day must not come before the first.' });
  }
  if (permit.lifts === 'some' && permit.liftsRuleIds.length === 0) {
    issue.addIssue({ code: 'custom', path: ['liftsRuleIds'], message: 'Choose the rules that it lifts.' });
  }
});
type PermitText = z.input<typeof permitSchema>;
type PermitValues = z.output<typeof permitSchema>;

function textOf(yard: YardResponse, permit: PermitResponse | null): PermitText {
  const seeded = yard.zones.filter((zone) => zone.seededOn !== null).map((zone) => zone.id);
  return {
    name: permit?.name ?? '', zoneIds: permit ? permit.zoneIds.filter((id) => yard.zones.some((zone) => zone.id === id)) : seeded,
    fromOn: permit?.fromOn ?? '', toOn: permit?.toOn ?? '', blackoutMonths: (permit?.blackoutMonths ?? []).map(String), ...spansOf(permit?.windows),
    lifts: permit?.liftsRuleIds ? 'some' : 'all', liftsRuleIds: permit?.liftsRuleIds ?? [], source: permit?.source ?? '', sourceOn: permit?.sourceOn ?? '',
  };
}

/** Adds a permit to water newly seeded ground outside the rules, or changes one. */
export function PermitDialog({ yard, permit, onClose }: { yard: YardResponse; permit: PermitResponse | null; onClose: () => void }): ReactElement {
  const form = useForm<PermitText, unknown, PermitValues>({ resolver: zodResolver(permitSchema), mode: 'onTouched', defaultValues: textOf(yard, permit) });
  const { control } = form;
  const lifts = useWatch({ control, name: 'lifts' });
  const toBody = (values: PermitValues) => ({
    name: values.name, zoneIds: values.zoneIds, fromOn: values.fromOn, toOn: values.toOn, blackoutMonths: values.blackoutMonths.map(Number),
    windows: windowsOf(values, permit?.windows), liftsRuleIds: values.lifts === 'all' ? null : values.liftsRuleIds, source: values.source, sourceOn: values.sourceOn,
  });
  return (
    <FactDialog yardId={yard.id} path="permits" id={permit?.id ?? null} title={permit ? permit.name : 'A permit for seed'} saveLabel="Save the permit" form={form} toBody={toBody} onClose={onClose}
      names={{ windows: 'from1' }} removal={{ label: 'Remove this permit', body: 'The plan will keep the rules on this ground again.' }}>
      <TextField control={control} name="name" label="Name" hint="Its number, if it has one." />
      <CheckboxGroupField control={control} name="zoneIds" label="Zones that it names" hint="It counts while the sowing there runs." options={yard.zones.map((zone) => ({ value: zone.id, label: zone.name }))} />
      <Row gap={12} align="flex-start">
        <DateField control={control} name="fromOn" label="First day" />
        <DateField control={control} name="toOn" label="Last day" />
      </Row>
      <CheckboxGroupField control={control} name="blackoutMonths" label="Months in which it does not hold" look="segments" perRow={6} hint="None chosen: it holds in all." options={months.map(({ short }, index) => ({ value: String(index + 1), label: short }))} />
      <AllowedHours control={control} />
      <SelectField control={control} name="lifts" label="It lifts" options={[{ value: 'all', label: 'Every water rule' }, { value: 'some', label: 'Some rules only', disabled: yard.rules.length === 0 }]} />
      {lifts === 'some' ? <CheckboxGroupField control={control} name="liftsRuleIds" label="Rules that it lifts" options={yard.rules.map((rule) => ({ value: rule.id, label: rule.name }))} /> : null}
      <TextField control={control} name="source" label="Who gave it" hint="Letter of the water company, town office. Keep the paper at hand: a neighbour or an inspector may ask." />
      <DateField control={control} name="sourceOn" label="Read on" />
    </FactDialog>
  );
}
