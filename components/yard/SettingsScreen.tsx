import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useWrite } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { Dialog } from '@/components/ui/Dialog';
import { ErrorState } from '@/components/ui/ErrorState';
import { Form } from '@/components/ui/Form';
import { NumberField } from '@/components/ui/NumberField';
import { numberText, optionalNumberText } from '@/components/ui/numberText';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { showToast } from '@/components/ui/Toast';
import { nameSchema, unitSystemSchema } from '@/shared/contracts/common';
import type { YardResponse } from '@/shared/contracts/yards';
import { fromShown, toShown, unitLabel } from '@/shared/display';
import { fieldText } from '@/shared/parseQuantity';
import { z } from '@/shared/zod';

/** Name, units, reminder and move time of a yard, and the way to delete it. */
export function SettingsScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  if (yard.error) {
    return <Screen title="Settings"><ErrorState title="The yard could not be loaded" detail={errorMessage(yard.error)} onRetry={() => void yard.refetch()} /></Screen>;
  }
  if (!yard.data) {
    return <Screen title="Settings" width="form"><Skeleton label="Loading the settings" lines={6} /></Screen>;
  }
  return (
    <Screen title="Settings" headline="Settings of this yard" kicker={yard.data.name} width="form">
      <Stack gap={20}>
        {yard.data.abilities['yard.update'] ? <Card padding={20}><SettingsForm yard={yard.data} /></Card> : <Text>Only an owner changes these.</Text>}
        {yard.data.abilities['yard.delete'] ? <Card padding={20}><DeleteYard yard={yard.data} /></Card> : null}
      </Stack>
    </Screen>
  );
}

function SettingsForm({ yard }: { yard: YardResponse }): ReactElement {
  const unit = unitLabel('length', yard.units);
  const schema = z.object({
    name: nameSchema, units: unitSystemSchema, moveMinutes: optionalNumberText({ min: 1, max: 60, unit: 'min', whole: true }), lead: numberText({ min: 0, max: 720, unit: 'min', whole: true }),
    elevation: optionalNumberText({ min: Math.ceil(toShown('length', -430, yard.units)), max: Math.floor(toShown('length', 6000, yard.units)), unit }),
  });
  type Values = z.output<typeof schema>;
  const form = useForm<z.input<typeof schema>, unknown, Values>({
    resolver: zodResolver(schema), mode: 'onTouched',
    defaultValues: {
      name: yard.name, units: yard.units, moveMinutes: yard.moveMinutesIsDefault ? '' : String(yard.moveMinutes), lead: String(yard.reminderLeadMinutes),
      elevation: yard.elevationIsDefault ? '' : fieldText('length', yard.elevationM, yard.units),
    },
  });
  const save = useWrite<unknown, unknown>((body) => ({ method: 'PATCH', path: `/yards/${yard.id}`, body }), { stale: [keys.yard(yard.id), keys.yards, keys.portfolio] });
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (values: Values) => {
    setProblem(undefined);
    try {
      await save.mutateAsync({
        name: values.name, units: values.units, moveMinutes: values.moveMinutes, reminderLeadMinutes: values.lead,
        ...(form.formState.dirtyFields.elevation ? { elevationM: values.elevation === null ? null : fromShown('length', values.elevation, yard.units) } : {}),
      });
      void showToast({ message: 'Saved.' });
    } catch (error) {
      setProblem(showServerProblems(form, error, { reminderLeadMinutes: 'lead', elevationM: 'elevation' }));
    }
  };
  return (
    <Form form={form} onSubmit={onSubmit} submitLabel="Save the settings" problem={problem} label="Settings">
      <TextField control={form.control} name="name" label="Name" />
      <ChoiceField control={form.control} name="units" label="Units" look="segments" options={[{ value: 'us', label: 'Inches, feet, gallons' }, { value: 'metric', label: 'Millimetres, metres, litres' }]} />
      <NumberField control={form.control} name="moveMinutes" label="A move takes" unit="min" whole optional hint={`Walk, drag, aim, check. Empty takes the default of ${yard.moveMinutesIsDefault ? yard.moveMinutes : 5} min, common practice.`} />
      <NumberField control={form.control} name="lead" label="Morning reminder before the first set" unit="min" whole />
      <NumberField control={form.control} name="elevation" label="Elevation" unit={unit} optional hint="Empty takes what the weather service says of the place." />
    </Form>
  );
}

function DeleteYard({ yard }: { yard: YardResponse }): ReactElement {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [problem, setProblem] = useState<string>();
  const schema = z.object({ name: z.string().refine((text) => text.trim() === yard.name, `Write “${yard.name}” to say that you mean it.`) });
  const form = useForm({ resolver: zodResolver(schema), mode: 'onTouched', defaultValues: { name: '' } });
  const remove = useWrite<unknown, { name: string }>((body) => ({ method: 'DELETE', path: `/yards/${yard.id}`, body }), { stale: [keys.yards, keys.portfolio] });
  const onSubmit = async (values: { name: string }) => {
    setProblem(undefined);
    try {
      await remove.mutateAsync(values);
      router.replace('/yards');
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  return (
    <Stack gap={12}>
      <Text variant="heading3" level={2}>Delete the yard</Text>
      <Text color="inkSoft">Its tests, budget, plan, rounds and history go with it, for every member.</Text>
      <Button kind="danger" label="Delete this yard" onPress={() => setOpen(true)} />
      <Dialog open={open} onClose={() => setOpen(false)} title={`Delete ${yard.name}?`}>
        <Form form={form} onSubmit={onSubmit} submitLabel="Delete it for good" submitKind="danger" problem={problem} label="Delete the yard">
          <TextField control={form.control} name="name" label="Write the yard’s name" autoComplete="off" />
        </Form>
      </Dialog>
    </Stack>
  );
}
