import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { DateField } from '@/components/ui/DateField';
import { Form } from '@/components/ui/Form';
import { NumberField } from '@/components/ui/NumberField';
import { readNumber } from '@/components/ui/readNumber';
import { Row } from '@/components/ui/Row';
import { SelectField } from '@/components/ui/SelectField';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import { civilDaySchema } from '@/shared/contracts/common';
import { screwdriverFeels, waterContentMax, type ObservationResponse, type PutObservationRequest, type ScrewdriverFeelId } from '@/shared/contracts/ground';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatNumber } from '@/shared/display';
import { z } from '@/shared/zod';
import { feelWords, foundWords } from './groundWords';

const percentMax = Math.round(waterContentMax * 100);

function percentOf(text: string): number | null {
  const reading = readNumber(text);
  return reading.kind === 'number' ? reading.value : null;
}

const schema = z.object({ zoneId: z.string(), on: civilDaySchema, kind: z.enum(['screwdriver', 'probe']), feel: z.string(), percent: z.string() }).superRefine((values, issue) => {
  if (values.kind === 'screwdriver' && !screwdriverFeels.some((feel) => feel === values.feel)) {
    issue.addIssue({ code: 'custom', path: ['feel'], message: 'Say how it went in.' });
  }
  const percent = percentOf(values.percent);
  if (values.kind === 'probe' && (percent === null || percent < 0 || percent > percentMax)) {
    issue.addIssue({ code: 'custom', path: ['percent'], message: `Write a number from 0 to ${percentMax}.` });
  }
});
type Values = z.infer<typeof schema>;

function requestOf(values: Values): PutObservationRequest {
  return values.kind === 'probe' ? { kind: 'probe', waterContent: (percentOf(values.percent) ?? 0) / 100 } : { kind: 'screwdriver', feel: values.feel as ScrewdriverFeelId };
}

const SHOWN = 5;

/** A look into the ground: it moves the reckoning of a zone by its weight. */
export function CheckSoil({ yard, today, observations }: { yard: YardResponse; today: string; observations: readonly ObservationResponse[] }): ReactElement | null {
  const form = useForm<Values>({ resolver: zodResolver(schema), mode: 'onTouched', defaultValues: { zoneId: yard.zones[0]?.id ?? '', on: today, kind: 'screwdriver', feel: '', percent: '' } });
  const kind = useWatch({ control: form.control, name: 'kind' });
  const save = useWrite<unknown, { zoneId: string; on: string; found: PutObservationRequest }>(
    ({ zoneId, on, found }) => ({ method: 'PUT', path: `/yards/${yard.id}/zones/${zoneId}/observations/${on}`, body: found }), { stale: [keys.yard(yard.id), keys.portfolio] },
  );
  const remove = useWrite<unknown, { zoneId: string; on: string }>(
    ({ zoneId, on }) => ({ method: 'DELETE', path: `/yards/${yard.id}/zones/${zoneId}/observations/${on}` }), { stale: [keys.yard(yard.id), keys.portfolio] },
  );
  const [problem, setProblem] = useState<string>();
  if (!yard.abilities['tests.record'] || yard.zones.length === 0) {
    return null;
  }
  const onSubmit = async (values: Values) => {
    setProblem(undefined);
    try {
      await save.mutateAsync({ zoneId: values.zoneId, on: values.on, found: requestOf(values) });
      form.reset({ zoneId: values.zoneId, kind: values.kind, on: today, feel: '', percent: '' });
      void showToast({ message: 'Written down. The budget moves toward it from that morning.' });
    } catch (error) {
      setProblem(showServerProblems(form, error, { waterContent: 'percent' }));
    }
  };
  const onRemove = async ({ zoneId, on }: ObservationResponse) => {
    setProblem(undefined);
    try {
      await remove.mutateAsync({ zoneId, on });
    } catch (error) {
      setProblem(errorMessage(error));
    }
  };
  const nameOf = (zoneId: string) => yard.zones.find((zone) => zone.id === zoneId)?.name ?? 'A zone';
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Check the soil</Text>
      <Text color="inkSoft">Push a long screwdriver into the lawn in two or three spots, before that day’s water. Keep clear of marked lines and drip pipes.</Text>
      <Form form={form} onSubmit={onSubmit} submitLabel="Write down what you found" problem={problem} label="Check the soil">
        {yard.zones.length > 1 ? <SelectField control={form.control} name="zoneId" label="Zone" options={yard.zones.map((zone) => ({ value: zone.id, label: zone.name }))} /> : null}
        <DateField control={form.control} name="on" label="Morning of" max={today} />
        <ChoiceField control={form.control} name="kind" label="With" look="segments" options={[{ value: 'screwdriver', label: 'A screwdriver' }, { value: 'probe', label: 'A probe' }]} />
        {kind === 'screwdriver' ? (
          <ChoiceField control={form.control} name="feel" label="It went in" options={screwdriverFeels.map((feel) => ({ value: feel, label: feelWords[feel] }))} />
        ) : (
          <NumberField control={form.control} name="percent" label="Water by volume" unit="%" hint="Some probes show 0 to 10 instead: use the screwdriver then." />
        )}
      </Form>
      {observations.length > 0 ? (
        <Stack gap={4}>
          {observations.slice(0, SHOWN).map((one) => (
            <Row key={`${one.zoneId} ${one.on}`} justify="space-between" gap={8} wrap={false}>
              <Text variant="small">{`${nameOf(one.zoneId)}, ${formatCivilDay(one.on, 'short')}: ${foundWords(one)}; counts for ${formatNumber(one.weight * 100, 0)} %`}</Text>
              <span className="d-nowrap"><Button size="small" kind="plain" label="Take out" accessibleLabel={`Take out the check of ${nameOf(one.zoneId)} on ${formatCivilDay(one.on, 'short')}`} onPress={() => void onRemove(one)} /></span>
            </Row>
          ))}
        </Stack>
      ) : null}
      <Text variant="small">By default a screwdriver counts for 40 % and a probe for 70 % of the difference to what was reckoned (common practice).</Text>
    </Card>
  );
}
