import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { DateField } from '@/components/ui/DateField';
import { Form } from '@/components/ui/Form';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import { civilDaySchema } from '@/shared/contracts/common';
import { establishmentStages, type EstablishmentResponse, type EstablishmentStageId, type SeenStageResponse } from '@/shared/contracts/proposals';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay } from '@/shared/display';
import { z } from '@/shared/zod';

/** What tells each stage on the ground. */
const signs: Record<EstablishmentStageId, { label: string; hint: string }> = {
  sown: { label: 'Nothing yet', hint: 'Bare ground, or only straw.' },
  coming_up: { label: 'Coming up', hint: 'A first green shimmer, here and there.' },
  rooting: { label: 'Rooting', hint: 'Most of it is up; a blade resists when you pull it gently.' },
  taper: { label: 'Ready for the taper', hint: 'Mown once or twice, the ground is hardly seen.' },
  established: { label: 'Established', hint: 'Mown often, dense, it does not lift.' },
};

const schema = z.object({ on: civilDaySchema, stage: z.string().min(1, 'Say what you see.') });
type Values = z.infer<typeof schema>;
const SHOWN = 4;

/** What people see of a sowing: it overrules the reckoning by soil warmth. */
export function SeenStages({ yard, seed, todayOn }: { yard: YardResponse; seed: EstablishmentResponse; todayOn: string }): ReactElement | null {
  const form = useForm<Values>({ resolver: zodResolver(schema), mode: 'onTouched', defaultValues: { on: todayOn, stage: '' } });
  const path = (on: string) => `/yards/${yard.id}/zones/${seed.zoneId}/seen-stages/${on}`;
  const stale = [keys.yard(yard.id), keys.portfolio];
  const save = useWrite<unknown, Values>(({ on, stage }) => ({ method: 'PUT', path: path(on), body: { stage } }), { stale });
  const remove = useWrite<unknown, string>((on) => ({ method: 'DELETE', path: path(on) }), { stale });
  const [problem, setProblem] = useState<string>();
  if (!yard.abilities['tests.record'] || seed.dayNumber < 0) {
    return null;
  }
  const onSubmit = async (values: Values) => {
    setProblem(undefined);
    try {
      await save.mutateAsync(values);
      form.reset({ on: todayOn, stage: '' });
      void showToast({ message: 'Written down. Stage, doses and plan follow what you see.' });
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  const onRemove = async ({ on }: SeenStageResponse) => {
    setProblem(undefined);
    try {
      await remove.mutateAsync(on);
    } catch (error) {
      setProblem(errorMessage(error));
    }
  };
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>What do you see?</Text>
      <Text color="inkSoft">Soil warmth only reckons. What you see counts from its day on. Look from the edge: new grass does not bear feet.</Text>
      <Form form={form} onSubmit={onSubmit} submitLabel="Write down what I see" problem={problem} label="What do you see?">
        <ChoiceField control={form.control} name="stage" label="It is" options={establishmentStages.map((stage) => ({ value: stage, ...signs[stage] }))} />
        <DateField control={form.control} name="on" label="Seen on" min={seed.seededOn} max={todayOn} />
      </Form>
      {seed.seen.length > 0 ? (
        <Stack gap={4}>
          {seed.seen.slice(0, SHOWN).map((one) => (
            <Row key={one.on} justify="space-between" gap={8} wrap={false}>
              <Text variant="small">{`${formatCivilDay(one.on, 'short')}: ${signs[one.stage].label.toLowerCase()}${one.person === null ? '' : `, seen by ${one.person.name}`}`}</Text>
              <span className="d-nowrap"><Button size="small" kind="plain" label="Take out" accessibleLabel={`Take out what was seen on ${formatCivilDay(one.on, 'short')}`} onPress={() => void onRemove(one)} /></span>
            </Row>
          ))}
        </Stack>
      ) : null}
    </Card>
  );
}
