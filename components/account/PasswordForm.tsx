import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useChangePassword } from '@/components/data/useAccount';
import { Form } from '@/components/ui/Form';
import { PasswordField } from '@/components/ui/PasswordField';
import { showToast } from '@/components/ui/Toast';
import { changePasswordRequestSchema, type ChangePasswordRequest } from '@/shared/contracts/accounts';

const empty = { currentPassword: '', password: '' };

export function PasswordForm(): ReactElement {
  const form = useForm({ resolver: zodResolver(changePasswordRequestSchema), mode: 'onTouched', defaultValues: empty });
  const change = useChangePassword();
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (values: ChangePasswordRequest) => {
    setProblem(undefined);
    try {
      await change.mutateAsync(values);
      form.reset(empty);
      void showToast({ message: 'The new password counts. Other devices are signed out.' });
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  return (
    <Form form={form} onSubmit={onSubmit} submitLabel="Change the password" problem={problem} label="Password">
      <PasswordField control={form.control} name="currentPassword" label="Present password" autoComplete="current-password" />
      <PasswordField control={form.control} name="password" label="New password" autoComplete="new-password" hint="Other devices will be signed out." />
    </Form>
  );
}
