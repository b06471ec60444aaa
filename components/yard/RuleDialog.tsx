import { zodResolver } from '@hookform/resolvers/zod';
import type { ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { CheckboxField } from '@/components/ui/CheckboxField';
import { CheckboxGroupField } from '@/components/ui/CheckboxGroupField';
import { DateField } from '@/components/ui/DateField';
import { Row } from '@/components/ui/Row';
import { SelectField } from '@/components/ui/SelectField';
import { TextField } from '@/components/ui/TextField';
import { ruleDevices, type WaterRuleResponse } from '@/shared/contracts/waterRules';
import type { YardResponse } from '@/shared/contracts/yards';
import { AllowedHours } from './AllowedHours';
import { FactDialog } from './FactDialog';
import { digitField, ruleBody, ruleSchema, ruleStart, stageOptions, type RuleText, type RuleValues } from './ruleForm';
import { deviceWords } from './ruleWords';
import { weekdays } from './weekdays';

const digitOptions = Array.from({ length: 10 }, (_, digit) => ({ value: String(digit), label: String(digit) }));

/** Adds a water rule or changes one. The year of a season's ends does not count. */
export function RuleDialog({ yard, rule, onClose }: { yard: YardResponse; rule: WaterRuleResponse | null; onClose: () => void }): ReactElement {
  const form = useForm<RuleText, unknown, RuleValues>({ resolver: zodResolver(ruleSchema), mode: 'onTouched', defaultValues: ruleStart(rule) });
  const { control } = form;
  const [season, byDigit] = useWatch({ control, name: ['season', 'byDigit'] });
  return (
    <FactDialog yardId={yard.id} path="rules" id={rule?.id ?? null} title={rule ? rule.name : 'A water rule'} saveLabel="Save the rule" form={form} toBody={(values) => ruleBody(values, rule)} onClose={onClose}
      names={{ dateParity: 'parity', windows: 'from1', weekdaysByDigit: 'digits1' }} removal={{ label: 'Remove this rule', body: 'The plan will not heed it any more. The local code still holds.' }}>
      <TextField control={control} name="name" label="Name" hint="Summer watering days." />
      <SelectField control={control} name="byDigit" label="House number" options={[{ value: 'no', label: 'Does not matter' }, { value: 'yes', label: 'Its last digit gives the days' }]} />
      {byDigit === 'yes' ? weekdays.map(({ day, name }) => (
        <CheckboxGroupField key={day} control={control} name={digitField(day)} label={`${name}: houses ending in`} look="segments" perRow={5} options={digitOptions} />
      )) : null}
      <CheckboxGroupField control={control} name="weekdays" label={byDigit === 'yes' ? 'Days it allows to all houses' : 'Days it allows'} look="segments" hint="None chosen: every day." options={weekdays.map(({ day, short }) => ({ value: String(day), label: short }))} />
      <SelectField control={control} name="parity" label="Dates it allows" options={[{ value: 'any', label: 'Every date' }, { value: 'odd', label: 'Odd dates' }, { value: 'even', label: 'Even dates' }]} />
      <AllowedHours control={control} />
      <CheckboxField control={control} name="attended" label="No hose may run unattended" hint="Then somebody has to be there for the whole set, shut-off timer or not." />
      <CheckboxGroupField control={control} name="devices" label="It binds" options={ruleDevices.map((device) => ({ value: device, label: deviceWords[device] }))} />
      <SelectField control={control} name="stage" label="It holds" options={stageOptions}
        hint={`The yard is at stage ${yard.waterStage}${yard.waterStageIsDefault ? ' (default)' : ''}. Its settings change that.`} />
      <CheckboxField control={control} name="exemptSeeded" label="Does not bind newly seeded ground" hint="Only where the rule itself says so. Leave that somebody gave you for a time is a permit." />
      <SelectField control={control} name="season" label="Season" options={[{ value: 'all', label: 'All year' }, { value: 'part', label: 'Part of the year' }]} />
      {season === 'part' ? (
        <Row gap={12} align="flex-start">
          <DateField control={control} name="seasonFrom" label="From" hint="The year does not count." />
          <DateField control={control} name="seasonTo" label="To" />
        </Row>
      ) : null}
      <TextField control={control} name="source" label="Where it is written" hint="Ordinance, web page, letter of the water company." />
      <DateField control={control} name="sourceOn" label="Read on" />
    </FactDialog>
  );
}
