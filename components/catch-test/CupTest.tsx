import { useState, type ReactElement, type ReactNode } from 'react';
import type { FieldPath } from 'react-hook-form';
import { ApiError, errorMessage } from '@/components/data/apiError';
import { writeDraft } from '@/components/data/sessionDraft';
import { Button } from '@/components/ui/Button';
import { ChoiceField } from '@/components/ui/ChoiceField';
import { Form } from '@/components/ui/Form';
import { Notice } from '@/components/ui/Notice';
import { Stack } from '@/components/ui/Stack';
import { TextField } from '@/components/ui/TextField';
import type { CreateCatchTestRequest } from '@/shared/contracts/catchTests';
import type { UnitSystem } from '@/shared/contracts/common';
import { draftQuantity, problemAt, type CupDraft } from './cupDraft';
import { CupGrid } from './CupGrid';
import { CupResult } from './CupResult';
import { CupSetUp } from './CupSetUp';
import { CupTimer } from './CupTimer';
import { expectedRate, type ExpectedRate } from './cupWords';
import { useCupForm } from './useCupForm';
import { useCupResult, useRowMove } from './useCupResult';

export interface CupTestProps {
  units: UnitSystem;
  /** Names what was typed in this tab's storage. */
  storageKey: string;
  /** What the position is thought to apply; null asks for flow and area instead. */
  expected: ExpectedRate | null;
  /** Keeps the test; left out where nothing is kept. Throws what the server objects. */
  save?: (request: CreateCatchTestRequest) => Promise<void>;
  /** Stands at the end in the place of the save button. */
  instead?: ReactNode;
}

/** A catch-cup test from setting out the cups to its result. Loaded when it is needed. */
export default function CupTest({ units, storageKey, expected, save, instead }: CupTestProps): ReactElement {
  const { form, draft, read, startAnew } = useCupForm(units, storageKey);
  const result = useCupResult(read);
  const move = useRowMove(read, result, draftQuantity(draft, 'moveNow', units));
  const [problem, setProblem] = useState<string>();
  const [savedCount, setSavedCount] = useState(0);
  const timerKey = `${storageKey}.timer`;
  const onSubmit = async (request: CreateCatchTestRequest) => {
    if (!save) {
      return;
    }
    setProblem(undefined);
    try {
      await save(request);
      startAnew();
      writeDraft(timerKey, null);
      setSavedCount((count) => count + 1);
    } catch (error) {
      const fields = error instanceof ApiError ? error.fields : [];
      fields.forEach(({ path, message }, at) => {
        const parts = path.split('.').map((part) => (/^\d+$/.test(part) ? Number(part) : part));
        form.setError(problemAt(parts, message, draft, read.shape).field as FieldPath<CupDraft>, { type: 'server', message }, { shouldFocus: at === 0 });
      });
      setProblem(errorMessage(error));
    }
  };
  return (
    <Form form={form} onSubmit={onSubmit} label="Catch-cup test">
      <div className="ct-columns">
        <Stack gap={16}>
          <CupSetUp form={form} draft={draft} read={read} units={units} asksFlow={expected === null} />
          <CupTimer key={savedCount} form={form} read={read} units={units} expected={expectedRate(expected, draft, units)} storageKey={timerKey} />
          <CupGrid form={form} draft={draft} read={read} result={result} units={units} />
        </Stack>
        <div className="ct-side">
          <Stack gap={16}>
            <CupResult form={form} draft={draft} read={read} result={result} move={move} units={units} />
            {save ? (
              <section className="ct-card" aria-label="Save">
                <Stack gap={16}>
                  <ChoiceField control={form.control} name="wind" label="Wind while it ran" look="segments" options={[
                    { value: 'calm', label: 'Calm' }, { value: 'light', label: 'Light' }, { value: 'breezy', label: 'Breezy' },
                  ]} />
                  {draft.wind === 'breezy' ? <Notice tone="caution">Wind bends the pattern: take this test as a hint and repeat it on a calm morning.</Notice> : null}
                  <TextField control={form.control} name="note" label="Note" lines={2} maxLength={500} optional />
                  {problem === undefined ? null : <Notice tone="problem">{problem}</Notice>}
                  <Button submit kind="hose" block label="Save this test" pending={form.formState.isSubmitting} />
                </Stack>
              </section>
            ) : instead}
          </Stack>
        </div>
      </div>
    </Form>
  );
}
