import { zodResolver } from '@hookform/resolvers/zod';
import { useState, type ReactElement } from 'react';
import { useForm } from 'react-hook-form';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { Form } from '@/components/ui/Form';
import { NumberField } from '@/components/ui/NumberField';
import { Text } from '@/components/ui/Text';
import { TextField } from '@/components/ui/TextField';
import { showToast } from '@/components/ui/Toast';
import type { CreateProposalRequest, EstablishmentResponse, ProposalResponse } from '@/shared/contracts/proposals';
import type { YardResponse } from '@/shared/contracts/yards';
import { unitLabel } from '@/shared/display';
import { limits } from '@/shared/limits';
import { proposeSchema, proposeText, type ProposeText } from './proposeForm';
import { stageNames } from './stageNames';

/** The consultant's change of doses, with its reason. Nothing changes in the yard until the owner accepts. */
export function ProposeForm({ yard, seed, onDone }: { yard: YardResponse; seed: EstablishmentResponse; onDone: () => void }): ReactElement {
  const form = useForm<ProposeText, unknown, CreateProposalRequest>({
    resolver: zodResolver(proposeSchema(seed.zoneId, yard.units)), mode: 'onTouched', defaultValues: proposeText(seed.schedule, yard.units),
  });
  const propose = useWrite<ProposalResponse, CreateProposalRequest>((body) => ({ method: 'POST', path: `/yards/${yard.id}/proposals`, body }), { stale: [keys.yard(yard.id), keys.portfolio] });
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (request: CreateProposalRequest) => {
    setProblem(undefined);
    try {
      await propose.mutateAsync(request);
      void showToast({ message: 'Sent. The owner gets a mail and answers.' });
      onDone();
    } catch (error) {
      setProblem(errorMessage(error));
    }
  };
  return (
    <>
      <Text variant="heading3" level={2}>Propose other doses</Text>
      <Form form={form} onSubmit={onSubmit} submitLabel="Send this change to the owner" submitKind="sun" problem={problem} label="Proposal"
        actions={<Button label="Leave it as it is" onPress={onDone} />}>
        {seed.schedule.stages.map((stage, index) => (
          <fieldset key={stage.stage} className="e-fieldset">
            <legend>{stageNames[stage.stage]}</legend>
            <div className="e-fields">
              <NumberField control={form.control} name={`stages.${index}.dosesPerDay`} label="Doses a day" whole />
              <NumberField control={form.control} name={`stages.${index}.everyDays`} label="Every" unit="days" whole />
              <NumberField control={form.control} name={`stages.${index}.depth`} label="Depth of a dose" unit={unitLabel('depth', yard.units)} />
              <NumberField control={form.control} name={`stages.${index}.forDays`} label="For at most" unit="days" whole optional />
            </div>
            <TextField control={form.control} name={`stages.${index}.times`} label="Times" hint="24-hour clock, such as 9:30, 12:00, 14:00. Empty spreads them over daylight." optional />
          </fieldset>
        ))}
        <TextField control={form.control} name="reason" label="Why" lines={3} maxLength={limits.reasonLength} hint="What you saw, and what the change should do." />
      </Form>
    </>
  );
}
