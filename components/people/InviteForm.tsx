import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { keys } from '@/components/data/keys';
import { showServerProblems } from '@/components/data/showServerProblems';
import { useWrite } from '@/components/data/useApi';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { Form } from '@/components/ui/Form';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { showToast } from '@/components/ui/Toast';
import { roles } from '@/shared/contracts/common';
import { createInvitationRequestSchema, type CreateInvitationRequest, type YardResponse } from '@/shared/contracts/yards';
import { roleWords } from './roleWords';

const options = roles.map((role) => ({ value: role, label: roleWords[role].name, hint: roleWords[role].does }));
const empty: CreateInvitationRequest = { email: '', role: 'helper' };

/** Invites by e-mail; the link works for two weeks and only for that address. */
export function InviteForm({ yard }: { yard: YardResponse }): ReactElement {
  const form = useForm({ resolver: zodResolver(createInvitationRequestSchema), mode: 'onTouched', defaultValues: empty });
  const invite = useWrite<unknown, CreateInvitationRequest>((body) => ({ method: 'POST', path: `/yards/${yard.id}/invitations`, body }), { stale: [keys.members(yard.id)] });
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (values: CreateInvitationRequest) => {
    setProblem(undefined);
    try {
      await invite.mutateAsync(values);
      form.reset(empty);
      void showToast({ message: `Invitation sent to ${values.email}.` });
    } catch (error) {
      setProblem(showServerProblems(form, error));
    }
  };
  return (
    <>
      <Text variant="heading3" level={2}>Invite somebody</Text>
      <Form form={form} onSubmit={onSubmit} submitLabel="Send the invitation" problem={problem} label="Invitation">
        <TextField control={form.control} name="email" label="E-mail" type="email" autoComplete="off" />
        <ChoiceField control={form.control} name="role" label="Part in this yard" options={options} />
      </Form>
    </>
  );
}
