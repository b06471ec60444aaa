import { useState, type ReactElement, type ReactNode } from 'react';
import type { FieldPath, FieldValues, UseFormReturn } from 'react-hook-form';
import { errorMessage } from '@/components/data/apiError';
import { showServerProblems } from '@/components/data/showServerProblems';
import { Button } from '@/components/ui/Button';
import { confirm } from '@/components/ui/confirm';
import { Dialog } from '@/components/ui/Dialog';
import { Form } from '@/components/ui/Form';
import { showToast } from '@/components/ui/Toast';
import { useRemoveFact, useSaveFact } from './useFact';

interface FactDialogProps<T extends FieldValues, O> {
  yardId: string;
  /** Part of the address: 'zones', 'taps'. */
  path: string;
  /** Null adds a new one. */
  id: string | null;
  title: string;
  saveLabel: string;
  form: UseFormReturn<T, unknown, O>;
  /** The request for the checked values. */
  toBody: (values: O) => unknown;
  /** Form fields by the server's names, where they differ. */
  names?: Record<string, FieldPath<T>>;
  /** What follows from removing it; without it nothing can be removed here. */
  removal?: { label: string; body: string };
  onClose: () => void;
  children: ReactNode;
}

/** A dialog that adds or changes one fact, and may take it out of use. */
export function FactDialog<T extends FieldValues, O>({ yardId, path, id, title, saveLabel, form, toBody, names, removal, onClose, children }: FactDialogProps<T, O>): ReactElement {
  const save = useSaveFact(yardId);
  const remove = useRemoveFact(yardId);
  const [problem, setProblem] = useState<string>();
  const onSubmit = async (values: O) => {
    setProblem(undefined);
    try {
      await save.mutateAsync({ path, id, body: toBody(values) });
      onClose();
      void showToast({ message: 'Saved. Budget and plan follow.' });
    } catch (error) {
      setProblem(showServerProblems(form, error, names));
    }
  };
  const onRemove = async () => {
    if (id === null || !removal || !(await confirm({ title: `${removal.label}?`, body: removal.body, confirmLabel: removal.label, tone: 'danger' }))) {
      return;
    }
    try {
      await remove.mutateAsync({ path, id });
      onClose();
    } catch (error) {
      setProblem(errorMessage(error));
    }
  };
  return (
    <Dialog open onClose={onClose} title={title}>
      <Form form={form} onSubmit={onSubmit} submitLabel={saveLabel} problem={problem} label={title}
        actions={removal && id !== null ? <Button kind="danger" label={removal.label} pending={remove.isPending} onPress={() => void onRemove()} /> : undefined}>
        {children}
      </Form>
    </Dialog>
  );
}
