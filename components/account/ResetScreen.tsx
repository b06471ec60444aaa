import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useResetPassword } from '@/components/data/useAccount';
import { Form } from '@/components/ui/Form';
import { LinkButton } from '@/components/ui/LinkButton';
import { PasswordField } from '@/components/ui/PasswordField';
import { Screen } from '@/components/ui/Screen';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { passwordSchema } from '@/shared/contracts/accounts';
import { limits } from '@/shared/limits';
import { z } from '@/shared/zod';

const formSchema = z.object({ password: passwordSchema });

/** Where the link of the reset mail leads. */
export function ResetScreen({ token }: { token: string | undefined }): ReactElement {
  const form = useForm({ resolver: zodResolver(formSchema), mode: 'onTouched', defaultValues: { password: '' } });
  const reset = useResetPassword();
  const [problem, setProblem] = useState<string>();
  const onSubmit = async ({ password }: { password: string }) => {
    setProblem(undefined);
    try {
      await reset.mutateAsync({ token: token ?? '', password });
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  if (reset.isSuccess) {
    return (
      <Screen title="New password set" headline="The new password counts" width="form">
        <Stack gap={16}>
          <Text>All devices that were signed in have been signed out. Sign in with the new password.</Text>
          <LinkButton kind="sun" label="Sign in" href="/sign-in" />
        </Stack>
      </Screen>
    );
  }
  return (
    <Screen title="Set a new password" width="form">
      <Form form={form} onSubmit={onSubmit} submitLabel="Set the new password" submitKind="sun" problem={problem}
        actions={<LinkButton kind="plain" label="Ask for a new link" href="/forgot" />}>
        <PasswordField control={form.control} name="password" label="New password" autoComplete="new-password" hint={`At least ${limits.passwordMin} characters.`} />
      </Form>
    </Screen>
  );
}
