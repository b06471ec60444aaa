import { zodResolver } from '@hookform/resolvers/zod';
import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { CheckboxField } from '@/components/ui/CheckboxField';
import { CheckboxGroupField } from '@/components/ui/CheckboxGroupField';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { DateField } from '@/components/ui/DateField';
import { Form } from '@/components/ui/Form';
import { NumberField } from '@/components/ui/NumberField';
import { numberText } from '@/components/ui/numberText';
import { PasswordField } from '@/components/ui/PasswordField';
import { SelectField } from '@/components/ui/SelectField';
import { TextField } from '@/components/ui/TextField';
import { TimeField } from '@/components/ui/TimeField';
import { z } from '@/shared/zod';

const schema = z.object({
  name: z.string().min(1, 'Give the zone a name.'),
  flow: numberText({ min: 0.5, max: 30, unit: 'gpm' }),
  password: z.string(),
  soil: z.string(),
  grass: z.string(),
  days: z.array(z.string()),
  sownOn: z.string(),
  leaveMinutes: z.number().nullable(),
  remind: z.boolean(),
});

type Sent = z.output<typeof schema>;

function Specimen({ onSubmit, problem }: { onSubmit: (values: Sent) => void | Promise<void>; problem?: string }): ReactElement {
  const form = useForm<z.input<typeof schema>, unknown, Sent>({
    resolver: zodResolver(schema),
    mode: 'onTouched',
    defaultValues: { name: '', flow: '5', password: '', soil: '', grass: 'established', days: ['sat'], sownOn: '', leaveMinutes: 450, remind: true },
  });
  const { control } = form;
  return (
    <Form form={form} onSubmit={onSubmit} submitLabel="Save the zone" problem={problem}>
      <TextField control={control} name="name" label="Name" hint="As you call it at home." />
      <NumberField control={control} name="flow" label="Flow" unit="gpm" defaultSource="common for an outside tap." />
      <PasswordField control={control} name="password" label="Password" autoComplete="new-password" />
      <SelectField control={control} name="soil" label="Soil" placeholder="Choose the soil" options={[{ value: 'loam', label: 'Loam' }]} />
      <ChoiceField control={control} name="grass" label="Grass" options={[{ value: 'established', label: 'Established' }, { value: 'seeded', label: 'Seeded' }]} />
      <CheckboxGroupField control={control} name="days" label="Days" options={[{ value: 'fri', label: 'Fri' }, { value: 'sat', label: 'Sat' }]} />
      <DateField control={control} name="sownOn" label="Sown on" />
      <TimeField control={control} name="leaveMinutes" label="You leave at" />
      <CheckboxField control={control} name="remind" label="Send a reminder" />
    </Form>
  );
}

const describedBy = (control: HTMLElement): string =>
  (control.getAttribute('aria-describedby') ?? '').split(' ').filter(Boolean).map((id) => document.getElementById(id)?.textContent ?? `missing ${id}`).join(' | ');

test('a field has a real label and its hint describes it', () => {
  render(<Specimen onSubmit={jest.fn()} />);
  const name = screen.getByLabelText<HTMLInputElement>('Name');
  expect(name.tagName).toBe('INPUT');
  expect(describedBy(name)).toBe('As you call it at home.');
  expect(name.getAttribute('aria-invalid')).toBeNull();
});

test('leaving a field that is wrong says why, tied to the field, and goes when it is right', async () => {
  render(<Specimen onSubmit={jest.fn()} />);
  const name = screen.getByLabelText('Name');
  await userEvent.click(name);
  await userEvent.tab();
  expect(await screen.findByText('Give the zone a name.')).toBeTruthy();
  expect(name.getAttribute('aria-invalid')).toBe('true');
  expect(describedBy(name)).toContain('Give the zone a name.');
  await userEvent.type(name, 'South lawn');
  expect(screen.queryByText('Give the zone a name.')).toBeNull();
  expect(describedBy(name)).toBe('As you call it at home.');
});

test('a default is marked with its source until the person writes a value of their own', async () => {
  render(<Specimen onSubmit={jest.fn()} />);
  const flow = screen.getByLabelText('Flow');
  expect(screen.getByText('default')).toBeTruthy();
  expect(describedBy(flow)).toBe('gpm | Default: common for an outside tap.');
  await userEvent.type(flow, '.5');
  expect(screen.queryByText('default')).toBeNull();
  expect(describedBy(flow)).toBe('gpm');
});

test('Enter sends the form once with checked values; a comma is a decimal mark', async () => {
  const sent = jest.fn();
  render(<Specimen onSubmit={sent} />);
  const flow = screen.getByLabelText<HTMLInputElement>('Flow');
  await userEvent.clear(flow);
  await userEvent.type(flow, '4,5');
  expect(flow.value).toBe('4,5');
  expect(flow.inputMode).toBe('decimal');
  await userEvent.selectOptions(screen.getByLabelText('Soil'), 'loam');
  await userEvent.click(screen.getByLabelText('Seeded'));
  await userEvent.click(screen.getByLabelText('Fri'));
  await userEvent.click(screen.getByLabelText('Send a reminder'));
  await userEvent.type(screen.getByLabelText('Name'), 'South lawn{Enter}');
  expect(sent).toHaveBeenCalledTimes(1);
  expect(sent).toHaveBeenCalledWith({ name: 'South lawn', flow: 4.5, password: '', soil: 'loam', grass: 'seeded', days: ['fri', 'sat'], sownOn: '', leaveMinutes: 450, remind: false });
});

test('a failed attempt lists what is wrong, goes to the first wrong field and sends nothing', async () => {
  const sent = jest.fn();
  render(<Specimen onSubmit={sent} />);
  const flow = screen.getByLabelText('Flow');
  await userEvent.clear(flow);
  await userEvent.type(flow, 'fast{Enter}');
  const summary = await screen.findByRole('region', { name: 'What needs another look' });
  expect(within(summary).getByRole('status').textContent).toBe('2 answers need another look.');
  expect(document.activeElement).toBe(screen.getByLabelText('Name'));
  await userEvent.click(within(summary).getByRole('link', { name: 'Write a number, such as 12 or 12.5.' }));
  expect(document.activeElement).toBe(flow);
  expect(sent).not.toHaveBeenCalled();
});

test('while it is being sent the button is at work and a second Enter sends nothing', async () => {
  let finish: () => void = () => undefined;
  const sent = jest.fn(() => new Promise<void>((resolve) => { finish = resolve; }));
  render(<Specimen onSubmit={sent} />);
  await userEvent.type(screen.getByLabelText('Name'), 'South lawn{Enter}{Enter}');
  expect(sent).toHaveBeenCalledTimes(1);
  expect(screen.getByRole('button', { name: /Save the zone/ }).getAttribute('aria-busy')).toBe('true');
  finish();
  expect(await screen.findByRole('button', { name: 'Save the zone', busy: false })).toBeTruthy();
});

test('what went wrong with a save is read out and nothing typed is gone', async () => {
  const { rerender } = render(<Specimen onSubmit={jest.fn()} />);
  await userEvent.type(screen.getByLabelText('Name'), 'South lawn');
  rerender(<Specimen onSubmit={jest.fn()} problem="Not saved: the server did not answer." />);
  expect(screen.getByRole('alert').textContent).toContain('Not saved: the server did not answer.');
  expect(screen.getByLabelText<HTMLInputElement>('Name').value).toBe('South lawn');
});

test('a password can be shown and hidden again', async () => {
  render(<Specimen onSubmit={jest.fn()} />);
  const password = screen.getByLabelText<HTMLInputElement>('Password');
  const toggle = screen.getByRole('button', { name: 'Show password' });
  expect(password.type).toBe('password');
  await userEvent.click(toggle);
  expect(password.type).toBe('text');
  expect(toggle.getAttribute('aria-pressed')).toBe('true');
  await userEvent.click(toggle);
  expect(password.type).toBe('password');
});

test('radio buttons and check boxes of one question stand in a group with its label', () => {
  render(<Specimen onSubmit={jest.fn()} />);
  expect(within(screen.getByRole('group', { name: 'Grass' })).getAllByRole('radio')).toHaveLength(2);
  expect(within(screen.getByRole('group', { name: 'Days' })).getAllByRole('checkbox')).toHaveLength(2);
  expect(screen.getByLabelText<HTMLInputElement>('You leave at').value).toBe('07:30');
});
