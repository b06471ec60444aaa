import { useRouter, type Href } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { useFieldArray, useForm } from 'react-hook-form';
import { zodResolver } from '@hookform/resolvers/zod';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useWrite } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { ErrorState } from '@/components/ui/ErrorState';
import { Form } from '@/components/ui/Form';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TimeField } from '@/components/ui/TimeField';
import { putHoursRequestSchema, type PutHoursRequest, type YardResponse } from '@/shared/contracts/yards';
import { weekdays } from './weekdays';

/** Hours in which somebody can start, move and end a set. */
export function HoursScreen({ yardId }: { yardId: string }): ReactElement {
  const yard = useYard(yardId);
  if (yard.error) {
    return <Screen title="Hours at home"><ErrorState title="The hours could not be loaded" detail={errorMessage(yard.error)} onRetry={() => void yard.refetch()} /></Screen>;
  }
  return yard.data ? <Hours yard={yard.data} /> : <Screen title="Hours at home" width="form"><Skeleton label="Loading the hours" lines={7} /></Screen>;
}

function Hours({ yard }: { yard: YardResponse }): ReactElement {
  const router = useRouter();
  const form = useForm<PutHoursRequest, unknown, PutHoursRequest>({
    resolver: zodResolver(putHoursRequestSchema), mode: 'onTouched',
    defaultValues: { windows: yard.hours.map(({ weekday, fromMinutes, toMinutes }) => ({ weekday, fromMinutes, toMinutes })) },
  });
  const windows = useFieldArray({ control: form.control, name: 'windows' });
  const save = useWrite<unknown, PutHoursRequest>((body) => ({ method: 'PUT', path: `/yards/${yard.id}/hours`, body }), { stale: [keys.yard(yard.id)] });
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (values: PutHoursRequest) => {
    setProblem(undefined);
    try {
      await save.mutateAsync(values);
      router.replace(`/yards/${yard.id}/yard` as Href);
    } catch (error) {
      setProblem(errorMessage(error));
    }
  };
  return (
    <Screen title="Hours at home" headline="When can somebody see to the hose?" kicker={yard.name} width="form">
      <Form form={form} onSubmit={onSubmit} submitLabel="Save the hours" submitKind="sun" problem={problem}>
        <Text color="inkSoft">Early morning is best: calm air, good pressure, and leaves that dry by day. New seed wants hours in the daytime.</Text>
        {weekdays.map(({ day, name }) => (
          <Card key={day} padding={16} gap={8}>
            <Row justify="space-between">
              <Text variant="heading3" level={2}>{name}</Text>
              <Button size="small" label="Add a time" accessibleLabel={`Add a time on ${name}`} onPress={() => windows.append({ weekday: day, fromMinutes: 360, toMinutes: 480 })} />
            </Row>
            {windows.fields.every((field) => field.weekday !== day) ? <Text color="inkSoft">Nobody at home.</Text> : null}
            <Stack gap={12}>
              {windows.fields.map((field, index) => (field.weekday === day ? (
                <Row key={field.id} gap={12} align="flex-end">
                  <TimeField control={form.control} name={`windows.${index}.fromMinutes`} label="From" />
                  <TimeField control={form.control} name={`windows.${index}.toMinutes`} label="To" />
                  <Button size="small" label="Remove" accessibleLabel={`Remove this time on ${name}`} onPress={() => windows.remove(index)} />
                </Row>
              ) : null))}
            </Stack>
          </Card>
        ))}
      </Form>
    </Screen>
  );
}
