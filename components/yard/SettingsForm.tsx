import { useState, type ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { keys } from '@/components/data/keys';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useWrite } from '@/components/data/useApi';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { Form } from '@/components/ui/Form';
import { Notice } from '@/components/ui/Notice';
import { NumberField } from '@/components/ui/NumberField';
import { SelectField } from '@/components/ui/SelectField';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { showToast } from '@/components/ui/Toast';
import type { YardResponse } from '@/shared/contracts/yards';
import { unitLabel } from '@/shared/display';
import { settingsBody, settingsResolver, settingsText, stageChoices, type SettingsText, type SettingsValues } from './settingsFields';

const digitChoices = [{ value: '', label: 'Not told' }, ...Array.from({ length: 10 }, (_, digit) => ({ value: String(digit), label: String(digit) }))];
const supplyChoices = [{ value: 'none', label: 'Only by the taps' }, { value: 'house', label: 'By the pipe of the house' }, { value: 'well', label: 'By a well' }];

/** Name, units, reminder, move time and place of a yard, and what its water rules and its supply ask for. */
export function SettingsForm({ yard }: { yard: YardResponse }): ReactElement {
  const { units } = yard;
  const form = useForm<SettingsText, unknown, SettingsValues>({ resolver: settingsResolver(units), mode: 'onTouched', defaultValues: settingsText(yard) });
  const { control } = form;
  const supply = useWatch({ control, name: 'supply' });
  const save = useWrite<unknown, unknown>((body) => ({ method: 'PATCH', path: `/yards/${yard.id}`, body }), { stale: [keys.yard(yard.id), keys.yards, keys.portfolio] });
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (values: SettingsValues) => {
    setProblem(undefined);
    try {
      await save.mutateAsync(settingsBody(values, yard, form.formState.dirtyFields));
      void showToast({ message: 'Saved. The plan follows.' });
    } catch (error) {
      setProblem(showServerProblems(form, error, {
        reminderLeadMinutes: 'lead', elevationM: 'elevation', 'supply.flowLpm': 'supplyFlow', 'supply.restMinutes': 'supplyRest', 'supply.drawMinutesAtMost': 'supplyDraw',
      }));
    }
  };
  return (
    <Form form={form} onSubmit={onSubmit} submitLabel="Save the settings" problem={problem} label="Settings">
      <TextField control={control} name="name" label="Name" />
      <ChoiceField control={control} name="units" label="Units" look="segments" options={[{ value: 'us', label: 'Inches, feet, gallons' }, { value: 'metric', label: 'Millimetres, metres, litres' }]} />
      <NumberField control={control} name="moveMinutes" label="A move takes" unit="min" whole optional hint={`Walk, drag, aim, check. Empty takes the default of ${yard.moveMinutesIsDefault ? yard.moveMinutes : 5} min, common practice.`} />
      <NumberField control={control} name="lead" label="Morning reminder before the first set" unit="min" whole />
      <NumberField control={control} name="elevation" label="Elevation" unit={unitLabel('length', units)} optional hint="Empty takes what the weather service says of the place." />
      <Text variant="heading3" level={2}>Water rules and supply</Text>
      <SelectField control={control} name="addressDigit" label="Last digit of the house number" options={digitChoices} hint="For rules that give each digit its days." />
      <SelectField control={control} name="waterStage" label="Stage of water shortage" options={stageChoices} hint="Your water company or town calls it out. Rules with a stage hold from it on."
        defaultSource={yard.waterStageIsDefault ? 'none, until somebody hears of one.' : undefined} />
      <SelectField control={control} name="supply" label="What limits the flow" options={supplyChoices} hint="Taps that together pass this limit are not run at once." />
      {supply === 'none' ? null : (
        <>
          <NumberField control={control} name="supplyFlow" label="Most at once" unit={unitLabel('flow', units)} />
          <NumberField control={control} name="supplyRest" label="Rest between two draws" unit="min" whole optional hint="Empty: none." />
          <NumberField control={control} name="supplyDraw" label="Longest draw without a rest" unit="min" whole optional hint="Empty: no limit." />
        </>
      )}
      {supply === 'well' ? <Notice tone="caution">Close the tap when the water sputters or brings sand: a pump that draws air can be ruined. What the well gives, its contractor knows.</Notice> : null}
    </Form>
  );
}
