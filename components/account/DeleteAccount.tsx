import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { send } from '@/components/data/apiClient';
import { errorMessage } from '@/components/data/apiError';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useDeleteAccount } from '@/components/data/useAccount';
import { Button } from '@/components/ui/Button';
import { Dialog } from '@/components/ui/Dialog';
import { Form } from '@/components/ui/Form';
import { PasswordField } from '@/components/ui/PasswordField';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import { z } from '@/shared/zod';

const formSchema = z.object({ password: z.string().min(1, 'Give your password.') });

async function download(): Promise<void> {
  try {
    const data = await send<unknown>('GET', '/me/export');
    const url = URL.createObjectURL(new Blob([JSON.stringify(data, null, 2)], { type: 'application/json' }));
    const link = document.createElement('a');
    link.href = url;
    link.download = 'dapple-my-data.json';
    link.click();
    URL.revokeObjectURL(url);
  } catch (error) {
    void showToast({ message: errorMessage(error), tone: 'problem' });
  }
}

/** Taking one's data along, and leaving for good. */
export function DeleteAccount(): ReactElement {
  const [open, setOpen] = useState(false);
  const [problem, setProblem] = useState<string>();
  const form = useForm({ resolver: zodResolver(formSchema), mode: 'onTouched', defaultValues: { password: '' } });
  const remove = useDeleteAccount();
  const router = useRouter();
  const onSubmit = async (values: { password: string }) => {
    setProblem(undefined);
    try {
      await remove.mutateAsync(values);
      router.replace('/');
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  return (
    <Stack gap={12}>
      <Text variant="heading3" level={2}>Your data</Text>
      <Text color="inkSoft">Take all of it as a file, or delete the account with the yards that are yours alone.</Text>
      <Row>
        <Button label="Download my data" onPress={() => void download()} />
        <Button kind="danger" label="Delete my account" onPress={() => setOpen(true)} />
      </Row>
      <Dialog open={open} onClose={() => setOpen(false)} title="Delete your account?">
        <Form form={form} onSubmit={onSubmit} submitLabel="Delete it for good" submitKind="danger" problem={problem} label="Delete the account">
          <Text>Your yards without another member go with it: tests, water budget, rounds and all. This cannot be undone.</Text>
          <PasswordField control={form.control} name="password" label="Your password" autoComplete="current-password" />
        </Form>
      </Dialog>
    </Stack>
  );
}
