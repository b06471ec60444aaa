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
import { Dialog } from '@/components/ui/Dialog';
import { ErrorState } from '@/components/ui/ErrorState';
import { Form } from '@/components/ui/Form';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import type { YardResponse } from '@/shared/contracts/yards';
import { z } from '@/shared/zod';
import { SettingsForm } from './SettingsForm';

/** Name, units, reminder, move time and water of a yard, and the way to delete it. */
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
