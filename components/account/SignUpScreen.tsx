import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useSignUp } from '@/components/data/useAccount';
import { Form } from '@/components/ui/Form';
import { PasswordField } from '@/components/ui/PasswordField';
import { Screen } from '@/components/ui/Screen';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { TextLink } from '@/components/ui/TextLink';
import { signUpRequestSchema, type SignUpRequest } from '@/shared/contracts/accounts';
import { limits } from '@/shared/limits';
import { CheckYourMail } from './CheckYourMail';
import { withNext } from './nextPage';

/** Name, e-mail, password; then a link to confirm the address. */
export function SignUpScreen({ next, email }: { next?: string; email?: string }): ReactElement {
  const form = useForm({ resolver: zodResolver(signUpRequestSchema), mode: 'onTouched', defaultValues: { name: '', email: email ?? '', password: '' } });
  const signUp = useSignUp();
  const [problem, setProblem] = useState<string>();
  const [sentTo, setSentTo] = useState<string | null>(null);
  if (sentTo !== null) {
    return <CheckYourMail email={sentTo} />;
  }
  const onSubmit = async (values: SignUpRequest) => {
    setProblem(undefined);
    try {
      await signUp.mutateAsync(values);
      setSentTo(values.email);
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  return (
    <Screen title="Sign up" headline="Start with your name" width="form">
      <Form form={form} onSubmit={onSubmit} submitLabel="Make an account" submitKind="sun" problem={problem}
        actions={<TextLink kind="standalone" href={withNext('/sign-in', next)}>I have one already</TextLink>}>
        <TextField control={form.control} name="name" label="Your name" autoComplete="name" maxLength={limits.nameLength} hint="Helpers and your consultant see it." />
        <TextField control={form.control} name="email" label="E-mail" type="email" autoComplete="email" hint="Reminders go here: when to start, when to move the hose." />
        <PasswordField control={form.control} name="password" label="Password" autoComplete="new-password" hint={`At least ${limits.passwordMin} characters. A few words in a row are good.`} />
        <Text variant="small" color="inkSoft">Dapple keeps your address for reminders and for signing in, and shows it only to the owners of yards you join.</Text>
      </Form>
    </Screen>
  );
}
