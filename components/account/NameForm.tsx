import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useUpdateMe } from '@/components/data/useAccount';
import { Form } from '@/components/ui/Form';
import { TextField } from '@/components/ui/TextField';
import { showToast } from '@/components/ui/Toast';
import type { MeResponse } from '@/shared/contracts/accounts';
import { nameSchema } from '@/shared/contracts/common';
import { z } from '@/shared/zod';

const formSchema = z.object({ name: nameSchema });

export function NameForm({ me }: { me: MeResponse }): ReactElement {
  const form = useForm({ resolver: zodResolver(formSchema), mode: 'onTouched', defaultValues: { name: me.name } });
  const update = useUpdateMe();
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (values: { name: string }) => {
    setProblem(undefined);
    try {
      await update.mutateAsync(values);
      void showToast({ message: 'Your name is changed.' });
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  return (
    <Form form={form} onSubmit={onSubmit} submitLabel="Save the name" problem={problem} label="Name">
      <TextField control={form.control} name="name" label="Your name" autoComplete="name" />
    </Form>
  );
}
