import { useCallback, useEffect, useMemo, useRef } from 'react';
import { useForm, useWatch, type FieldErrors, type Resolver, type UseFormReturn } from 'react-hook-form';
import { readDraft, writeDraft } from '@/components/data/sessionDraft';
import type { CreateCatchTestRequest } from '@/shared/contracts/catchTests';
import type { UnitSystem } from '@/shared/contracts/common';
import { z } from '@/shared/zod';
import { cupDraftSchema, draftInUnits, emptyDraft, readDraftCups, type CupDraft, type ReadCups } from './cupDraft';

export type CupForm = UseFormReturn<CupDraft, unknown, CreateCatchTestRequest>;

const keptSchema = z.object({ units: z.enum(['us', 'metric']), draft: cupDraftSchema });

/** Form errors from a draft's problems; cells stand one level deeper. */
function errorsOf(problems: ReadCups['problems']): FieldErrors<CupDraft> {
  const errors: Record<string, unknown> = {};
  const cells: Record<string, unknown> = {};
  for (const { field, message } of problems) {
    const error = { type: 'draft', message };
    if (field.startsWith('cells.')) {
      cells[field.slice('cells.'.length)] ??= error;
    } else {
      errors[field] ??= error;
    }
  }
  return { ...errors, ...(Object.keys(cells).length > 0 ? { cells } : {}) } as FieldErrors<CupDraft>;
}

export interface CupFormState {
  form: CupForm;
  draft: CupDraft;
  read: ReadCups;
  /** After a save: keeps how the cups stand, forgets what they held. */
  startAnew: () => void;
}

/** The form of a catch-cup test with what it means so far; kept in this tab through reloads, and through a change of units. */
export function useCupForm(units: UnitSystem, storageKey: string): CupFormState {
  const shownUnits = useRef(units);
  const defaults = useMemo(() => {
    const kept = readDraft(storageKey, keptSchema);
    return kept === null ? emptyDraft(units) : draftInUnits(kept.draft, kept.units, units);
    // Only the first units count here; later ones convert what stands in the form.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [storageKey]);
  const resolver: Resolver<CupDraft, unknown, CreateCatchTestRequest> = useCallback((draft: CupDraft) => {
    const { request, problems } = readDraftCups(draft, units);
    return request === null ? { values: {}, errors: errorsOf(problems) } : { values: request, errors: {} };
  }, [units]);
  const form: CupForm = useForm<CupDraft, unknown, CreateCatchTestRequest>({ resolver, mode: 'onTouched', defaultValues: defaults });
  const watched = useWatch({ control: form.control });
  // Every field has a start value, so nothing of the draft is ever missing.
  const draft = watched as CupDraft;
  const read = useMemo(() => readDraftCups(draft, units), [draft, units]);
  const { reset, getValues } = form;
  useEffect(() => {
    if (shownUnits.current !== units) {
      const next = draftInUnits(getValues(), shownUnits.current, units);
      shownUnits.current = units;
      reset(next, { keepDefaultValues: false });
    }
  }, [units, reset, getValues]);
  useEffect(() => {
    writeDraft(storageKey, { units: shownUnits.current, draft });
  }, [storageKey, draft]);
  const startAnew = useCallback(() => {
    const before = getValues();
    // Named one by one: a field without a value would keep what stands in it.
    const cells = Object.fromEntries(Object.keys(before.cells).map((cell) => [cell, '']));
    reset({ ...before, minutes: '', cells, wind: 'calm', note: '' });
  }, [getValues, reset]);
  return { form, draft, read, startAnew };
}
