import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { Section } from '@/components/gallery/Section';
import { CheckboxField } from '@/components/ui/CheckboxField';
import { CheckboxGroupField } from '@/components/ui/CheckboxGroupField';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { DateField } from '@/components/ui/DateField';
import { Form } from '@/components/ui/Form';
import { NumberField } from '@/components/ui/NumberField';
import { numberText } from '@/components/ui/numberText';
import { PasswordField } from '@/components/ui/PasswordField';
import { SelectField } from '@/components/ui/SelectField';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { TimeField } from '@/components/ui/TimeField';
import { z } from '@/shared/zod';

const weekdays = [
  { value: 'mon', label: 'Mon' }, { value: 'tue', label: 'Tue' }, { value: 'wed', label: 'Wed' }, { value: 'thu', label: 'Thu' },
  { value: 'fri', label: 'Fri' }, { value: 'sat', label: 'Sat' }, { value: 'sun', label: 'Sun' },
];

const specimen = z.object({
  name: z.string().trim().min(1, 'Give the zone a name.'),
  email: z.email('Write an address such as ana@example.org.'),
  password: z.string().min(10, 'Use at least ten characters.'),
  area: numberText({ min: 10, max: 50_000, unit: 'sq ft', missing: 'Write the size of the zone.' }),
  flow: numberText({ min: 0.5, max: 30, unit: 'gpm' }),
  texture: z.string().min(1, 'Choose the soil, or “not sure”.'),
  state: z.enum(['established', 'seeded']),
  slope: z.enum(['flat', 'gentle', 'steep']),
  days: z.array(z.string()).min(1, 'Choose at least one day.'),
  sownOn: z.string(),
  leaveAt: z.number({ error: 'Write a time.' }),
  remind: z.boolean(),
  note: z.string().max(500),
});

/** Every field, with hints, defaults and errors. Sending it empty shows what is said. */
export function FormSpecimens(): ReactElement {
  const [sent, setSent] = useState('');
  const form = useForm<z.input<typeof specimen>, unknown, z.output<typeof specimen>>({
    resolver: zodResolver(specimen),
    mode: 'onTouched',
    defaultValues: { name: '', email: '', password: '', area: '', flow: '5', texture: '', state: 'established', slope: 'flat', days: ['sat', 'sun'], sownOn: '', leaveAt: 450, remind: true, note: '' },
  });
  const { control } = form;
  return (
    <Section title="Fields">
      <Form
        form={form}
        label="Specimen"
        submitLabel="Save the zone"
        caution="Call before you dig: the positions of sprinklers are safe, stakes for cups may not be."
        onSubmit={(values) => setSent(`Would be sent: ${values.area} sq ft, ${values.flow} gpm, leaves at minute ${values.leaveAt}.`)}
      >
        <TextField control={control} name="name" label="Name of the zone" hint="As you call it at home: South lawn." />
        <TextField control={control} name="email" label="E-mail" type="email" autoComplete="email" />
        <PasswordField control={control} name="password" label="Password" autoComplete="new-password" hint="At least ten characters." />
        <NumberField control={control} name="area" label="Size" unit="sq ft" whole />
        <NumberField control={control} name="flow" label="Flow of the tap" unit="gpm" defaultSource="common for an outside tap; time a bucket to know yours." />
        <SelectField control={control} name="texture" label="Soil" placeholder="Choose the soil" options={[{ value: 'loam', label: 'Loam' }, { value: 'clay', label: 'Clay' }, { value: 'unsure', label: 'Not sure' }]} />
        <ChoiceField control={control} name="state" label="Grass" options={[{ value: 'established', label: 'Established', hint: 'Mown at least four times.' }, { value: 'seeded', label: 'Seeded', hint: 'Gets light doses until it is up.' }]} />
        <ChoiceField control={control} name="slope" label="Slope" look="segments" options={[{ value: 'flat', label: 'Flat' }, { value: 'gentle', label: 'Gentle' }, { value: 'steep', label: 'Steep' }]} />
        <CheckboxGroupField control={control} name="days" label="Days you are at home" look="segments" options={weekdays} />
        <DateField control={control} name="sownOn" label="Sown on" optional />
        <TimeField control={control} name="leaveAt" label="You leave at" />
        <CheckboxField control={control} name="remind" label="Send a reminder in the morning" />
        <TextField control={control} name="note" label="Note" lines={3} optional />
      </Form>
      <Text role="status">{sent}</Text>
    </Section>
  );
}
