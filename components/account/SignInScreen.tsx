import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'expo-router';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { hasCode } from '@/components/data/apiError';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useSignIn } from '@/components/data/useAccount';
import { Form } from '@/components/ui/Form';
import { PasswordField } from '@/components/ui/PasswordField';
import { Screen } from '@/components/ui/Screen';
import { TextField } from '@/components/ui/TextField';
import { TextLink } from '@/components/ui/TextLink';
import { signInRequestSchema, type SignInRequest } from '@/shared/contracts/accounts';
import { CheckYourMail } from './CheckYourMail';
import { safeNext, withNext } from './nextPage';

/** E-mail and password, then on to where the person was going. */
export function SignInScreen({ next }: { next?: string }): ReactElement {
  const router = useRouter();
  const form = useForm({ resolver: zodResolver(signInRequestSchema), mode: 'onTouched', defaultValues: { email: '', password: '' } });
  const signIn = useSignIn();
  const [problem, setProblem] = useState<string>();
  const [unconfirmed, setUnconfirmed] = useState<string | null>(null);
  if (unconfirmed !== null) {
    return <CheckYourMail email={unconfirmed} />;
  }
  const onSubmit = async (values: SignInRequest) => {
    setProblem(undefined);
    try {
      await signIn.mutateAsync(values);
      router.replace(safeNext(next));
    } catch (error) {
      if (hasCode(error, 'email_not_confirmed')) {
        setUnconfirmed(values.email);
      } else {
        setProblem(showServerProblems(form, error));
      }
    }
  };
  return (
    <Screen title="Sign in" headline="Good to see you" width="form">
      <Form form={form} onSubmit={onSubmit} submitLabel="Sign in" submitKind="sun" problem={problem}
        actions={<TextLink kind="standalone" href={withNext('/sign-up', next)}>Make an account</TextLink>}>
        <TextField control={form.control} name="email" label="E-mail" type="email" autoComplete="username" />
        <PasswordField control={form.control} name="password" label="Password" autoComplete="current-password" />
        <TextLink kind="standalone" href="/forgot">Forgot the password</TextLink>
      </Form>
    </Screen>
  );
}
