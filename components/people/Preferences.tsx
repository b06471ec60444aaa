import type { ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useWrite } from '@/components/data/useApi';
import { Card } from '@/components/ui/Card';
import { CheckboxField } from '@/components/ui/CheckboxField';
import { Form } from '@/components/ui/Form';
import { Notice } from '@/components/ui/Notice';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import type { YardResponse } from '@/shared/contracts/yards';

type Values = YardResponse['preferences'];

/** Which reminders come to oneself. */
export function Preferences({ yard }: { yard: YardResponse }): ReactElement {
  const form = useForm<Values>({ defaultValues: yard.preferences });
  const save = useWrite<unknown, Values>((body) => ({ method: 'PATCH', path: `/yards/${yard.id}/preferences`, body }), { stale: [keys.facts(yard.id)] });
  const onSubmit = (values: Values) => {
    save.mutate(values, { onSuccess: () => void showToast({ message: 'Your reminders are set.' }) });
  };
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Your reminders</Text>
      <Form form={form} onSubmit={onSubmit} submitLabel="Save the reminders" pending={save.isPending} label="Reminders">
        <CheckboxField control={form.control} name="wantsMorningEmail" label="In the morning, what to do today" />
        <CheckboxField control={form.control} name="wantsMoveEmail" label="When to move the hose, and when a set is over" />
        {save.error ? <Notice tone="problem">{errorMessage(save.error)}</Notice> : null}
      </Form>
    </Card>
  );
}
