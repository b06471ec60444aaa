import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { errorMessage } from '@/components/data/apiError';
import { showServerProblems } from '@/components/data/showServerProblems';
import { usePutDayChange, usePutWishes } from '@/components/data/useWishes';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { Dialog } from '@/components/ui/Dialog';
import { Form } from '@/components/ui/Form';
import { NumberField } from '@/components/ui/NumberField';
import { optionalNumberText } from '@/components/ui/numberText';
import { Row } from '@/components/ui/Row';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { TimeField } from '@/components/ui/TimeField';
import { showToast } from '@/components/ui/Toast';
import { planPriorities, type WishesResponse } from '@/shared/contracts/wishes';
import type { YardResponse } from '@/shared/contracts/yards';
import { dayWord, formatClock, formatVolume, fromShown, toShown, unitLabel } from '@/shared/display';
import { z } from '@/shared/zod';
import { priorityWords } from './wishWords';

interface Props {
  yard: YardResponse;
  wishes: WishesResponse;
  todayOn: string;
}

/** What counts most in the plan, and the days that are otherwise. */
export function WishesCard({ yard, wishes, todayOn }: Props): ReactElement {
  const [open, setOpen] = useState(false);
  const change = usePutDayChange(yard.id);
  const edits = yard.abilities['facts.edit'] === true;
  const clock = (minutes: number) => formatClock(minutes, yard.units);
  const hours = wishes.preferredWindows.map(({ fromMinutes, toMinutes }) => `${clock(fromMinutes)} to ${clock(toMinutes)}`).join(', ');
  const takeBack = (on: string) => {
    change.mutate({ on, dayOff: false, extraWindows: [] }, { onError: (error) => void showToast({ message: errorMessage(error), tone: 'problem' }) });
  };
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>What counts most</Text>
      <Row gap={8}>
        <Text variant="label">{priorityWords[wishes.priority].label}</Text>
        {wishes.isDefault ? <Tag label="Default" /> : null}
      </Row>
      <Text>{priorityWords[wishes.priority].hint}</Text>
      {hours === '' ? null : <Text>{`Best between ${hours}.`}</Text>}
      {wishes.monthCapLitres === null ? null : <Text>{`At most ${formatVolume(wishes.monthCapLitres, yard.units)} in a month; ${formatVolume(wishes.usedThisMonthLitres, yard.units)} used in this one.`}</Text>}
      {wishes.dayChanges.map((day) => (
        <Row key={day.on} gap={8} justify="space-between">
          <Text>{day.dayOff ? `Nobody waters ${dayWord(day.on, todayOn)}.` : `Also ${dayWord(day.on, todayOn)}: ${day.extraWindows.map(({ fromMinutes, toMinutes }) => `${clock(fromMinutes)} to ${clock(toMinutes)}`).join(', ')}.`}</Text>
          {edits ? <Button size="small" kind="plain" label="Take back" accessibleLabel={`Take back what is said of ${dayWord(day.on, todayOn)}`} pending={change.isPending && change.variables.on === day.on} onPress={() => takeBack(day.on)} /> : null}
        </Row>
      ))}
      {edits ? <Row><Button size="small" label="Change" accessibleLabel="Change what counts most" onPress={() => setOpen(true)} /></Row> : null}
      {open ? <WishesDialog yard={yard} wishes={wishes} onClose={() => setOpen(false)} /> : null}
    </Card>
  );
}

function WishesDialog({ yard, wishes, onClose }: { yard: YardResponse; wishes: WishesResponse; onClose: () => void }): ReactElement {
  const { units } = yard;
  const unit = unitLabel('volume', units);
  const schema = z.object({
    priority: z.enum(planPriorities), fromMinutes: z.number().nullable(), toMinutes: z.number().nullable(), cap: optionalNumberText({ min: units === 'us' ? 10 : 40, max: 1_000_000, unit }),
  }).superRefine((values, issue) => {
    if ((values.fromMinutes === null) !== (values.toMinutes === null)) {
      issue.addIssue({ code: 'custom', path: ['toMinutes'], message: 'Give both times, or neither.' });
    } else if (values.fromMinutes !== null && (values.toMinutes ?? 0) <= values.fromMinutes) {
      issue.addIssue({ code: 'custom', path: ['toMinutes'], message: 'The end must come after the start.' });
    }
  });
  const [first, ...more] = wishes.preferredWindows;
  const form = useForm<z.input<typeof schema>, unknown, z.output<typeof schema>>({
    resolver: zodResolver(schema), mode: 'onTouched',
    defaultValues: {
      priority: wishes.priority, fromMinutes: first?.fromMinutes ?? null, toMinutes: first?.toMinutes ?? null,
      cap: wishes.monthCapLitres === null ? '' : String(Number(toShown('volume', wishes.monthCapLitres, units).toPrecision(4))),
    },
  });
  const save = usePutWishes(yard.id);
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (values: z.output<typeof schema>) => {
    setProblem(undefined);
    const windows = values.fromMinutes === null || values.toMinutes === null ? [] : [{ fromMinutes: values.fromMinutes, toMinutes: values.toMinutes }, ...more];
    try {
      await save.mutateAsync({ priority: values.priority, preferredWindows: windows, monthCapLitres: values.cap === null ? null : fromShown('volume', values.cap, units) });
      onClose();
      void showToast({ message: 'Saved. The plan follows.' });
    } catch (error) {
      setProblem(showServerProblems(form, error, { monthCapLitres: 'cap', preferredWindows: 'fromMinutes' }));
    }
  };
  return (
    <Dialog open onClose={onClose} title="What counts most">
      <Form form={form} onSubmit={onSubmit} submitLabel="Save" problem={problem} label="What counts most">
        <ChoiceField control={form.control} name="priority" label="In this yard" options={planPriorities.map((value) => ({ value, ...priorityWords[value] }))} />
        <Row gap={12} align="flex-start">
          <TimeField control={form.control} name="fromMinutes" label="Best from" hint="A wish within your hours at home. Both empty: any of them." />
          <TimeField control={form.control} name="toMinutes" label="to" />
        </Row>
        <NumberField control={form.control} name="cap" label="Most water in a month" unit={unit} hint="Empty: no cap. Seed is watered first, then the zones by their order." />
      </Form>
    </Dialog>
  );
}
