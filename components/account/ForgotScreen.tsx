import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useForgotPassword } from '@/components/data/useAccount';
import { useClock } from '@/components/data/useClock';
import { Form } from '@/components/ui/Form';
import { Screen } from '@/components/ui/Screen';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { TextLink } from '@/components/ui/TextLink';
import { forgotPasswordRequestSchema, type ForgotPasswordRequest } from '@/shared/contracts/accounts';

/** Asks for a link to set a new password. The answer is the same whether the address is known. */
export function ForgotScreen(): ReactElement {
  const form = useForm({ resolver: zodResolver(forgotPasswordRequestSchema), mode: 'onTouched', defaultValues: { email: '' } });
  const forgot = useForgotPassword();
  const clock = useClock();
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (values: ForgotPasswordRequest) => {
    setProblem(undefined);
    try {
      await forgot.mutateAsync(values);
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  if (forgot.isSuccess) {
    return (
      <Screen title="Check your mail" headline="Look for a link" width="form">
        <Stack gap={16}>
          <Text>If that address has an account, a link to set a new password is on its way. It works for one hour.</Text>
          {clock.data?.isDemonstration ? <TextLink kind="standalone" href="/demo/mail">Read the demonstration’s mail</TextLink> : null}
          <TextLink kind="standalone" href="/sign-in">Back to sign in</TextLink>
        </Stack>
      </Screen>
    );
  }
  return (
    <Screen title="Forgot the password" headline="Set a new password" width="form">
      <Form form={form} onSubmit={onSubmit} submitLabel="Send me a link" submitKind="sun" problem={problem}
        actions={<TextLink kind="standalone" href="/sign-in">Back to sign in</TextLink>}>
        <TextField control={form.control} name="email" label="E-mail" type="email" autoComplete="email" />
      </Form>
    </Screen>
  );
}
