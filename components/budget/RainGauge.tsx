import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { keys } from '@/components/data/keys';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useRead, useWrite } from '@/components/data/useApi';
import { Card } from '@/components/ui/Card';
import { DateField } from '@/components/ui/DateField';
import { Form } from '@/components/ui/Form';
import { NumberField } from '@/components/ui/NumberField';
import { numberText } from '@/components/ui/numberText';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import { civilDaySchema } from '@/shared/contracts/common';
import type { RainListResponse } from '@/shared/contracts/water';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatDepth, fromShown, toShown, unitLabel } from '@/shared/display';
import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';

/** What a gauge in the yard has caught. It overrules the weather service for that day. */
export function RainGauge({ yard, today }: { yard: YardResponse; today: string }): ReactElement | null {
  const entries = useRead<RainListResponse>(keys.rain(yard.id), `/yards/${yard.id}/rain`);
  const unit = unitLabel('depth', yard.units);
  const schema = z.object({ on: civilDaySchema, depth: numberText({ min: 0, max: Math.floor(toShown('depth', limits.rainDepthMaxMm, yard.units)), unit }) });
  const form = useForm({ resolver: zodResolver(schema), mode: 'onTouched', defaultValues: { on: today, depth: '' } });
  const save = useWrite<{ on: string; depthMm: number }, { on: string; depthMm: number }>(
    ({ on, depthMm }) => ({ method: 'PUT', path: `/yards/${yard.id}/rain/${on}`, body: { depthMm } }), { stale: [keys.yard(yard.id)] },
  );
  const [problem, setProblem] = useState<string>();
  if (!yard.abilities['rain.record']) {
    return null;
  }
  const onSubmit = async (values: { on: string; depth: number }) => {
    setProblem(undefined);
    try {
      await save.mutateAsync({ on: values.on, depthMm: fromShown('depth', values.depth, yard.units) });
      form.reset({ on: today, depth: '' });
      void showToast({ message: 'Rain written down. The budget counts it from that day.' });
    } catch (error) {
      setProblem(showServerProblems(form, error, { depthMm: 'depth' }));
    }
  };
  const latest = (entries.data?.entries ?? []).slice(0, 5);
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Rain gauge</Text>
      <Form form={form} onSubmit={onSubmit} submitLabel="Write it down" problem={problem} label="Rain gauge">
        <DateField control={form.control} name="on" label="Day" />
        <NumberField control={form.control} name="depth" label="Rain in the gauge" unit={unit} hint="Stand the gauge twice as far from a tree or wall as that is tall." />
      </Form>
      {latest.length > 0 ? (
        <Stack gap={4}>
          {latest.map((entry) => <Text key={entry.on} variant="small">{`${formatCivilDay(entry.on, 'short')}: ${formatDepth(entry.depthMm, yard.units)}`}</Text>)}
        </Stack>
      ) : null}
    </Card>
  );
}
