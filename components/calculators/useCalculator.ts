import { zodResolver } from '@hookform/resolvers/zod';
import { useDeferredValue, useEffect, useMemo, useRef, useState } from 'react';
import { useForm, useWatch, type UseFormReturn } from 'react-hook-form';
import { readDraft, writeDraft } from '@/components/data/sessionDraft';
import { useVisitorUnits } from '@/components/data/useVisitorUnits';
import { PhysicsError } from '@/scheduling/units/physicsError';
import type { UnitSystem } from '@/shared/contracts/common';
import { z } from '@/shared/zod';
import { draftInUnits, startDraft, valuesSchema, type Draft, type Rules, type Values } from './rules';

const keptSchema = z.object({ units: z.enum(['us', 'metric']), draft: z.record(z.string(), z.string().max(400)) });

export type CalculatorForm<R extends Rules> = UseFormReturn<Draft, unknown, Values<R>>;

export interface Calculator<R extends Rules, A> {
  rules: R;
  form: CalculatorForm<R>;
  units: UnitSystem;
  setUnits: (units: UnitSystem) => void;
  values: Values<R> | null;
  /** The answer to what stands in the fields; null while something is wrong. */
  answer: A | null;
  /** The name of what is at fault when there is no answer although every field is in order. */
  impossible: string | null;
  /** True while the start values stand untouched. */
  isExample: boolean;
}

/**
 * A calculator's form, kept in this tab and converted when the units change, and its live answer.
 * @param name - names the draft
 * @param answer - stable function from SI values to the answer; may throw PhysicsError
 */
export function useCalculator<R extends Rules, A>(name: string, rules: R, answer: (values: Values<R>) => A): Calculator<R, A> {
  const storageKey = `dapple.calculator.${name}`;
  const [units, setUnits] = useVisitorUnits();
  const shownUnits = useRef(units);
  const [start] = useState((): Draft => {
    const kept = readDraft(storageKey, keptSchema);
    return { ...startDraft(rules, units), ...(kept === null ? {} : draftInUnits(rules, kept.draft, kept.units, units)) };
  });
  const schema = useMemo(() => valuesSchema(rules, units), [rules, units]);
  const form = useForm<Draft, unknown, Values<R>>({ resolver: zodResolver(schema), mode: 'onTouched', defaultValues: start });
  const draft = useWatch({ control: form.control }) as Draft;
  const { reset, getValues } = form;
  useEffect(() => {
    if (shownUnits.current !== units) {
      const next = draftInUnits(rules, getValues(), shownUnits.current, units);
      shownUnits.current = units;
      reset(next);
    }
  }, [rules, units, reset, getValues]);
  useEffect(() => writeDraft(storageKey, { units: shownUnits.current, draft }), [storageKey, draft]);
  // The answer follows a moment behind, so that typing stays quick.
  const settled = useDeferredValue(draft);
  const values = useMemo(() => {
    const checked = schema.safeParse(settled);
    return checked.success ? checked.data : null;
  }, [schema, settled]);
  const found = useMemo((): { answer: A | null; impossible: string | null } => {
    if (values === null) return { answer: null, impossible: null };
    try {
      return { answer: answer(values), impossible: null };
    } catch (error) {
      if (error instanceof PhysicsError) return { answer: null, impossible: error.field };
      throw error;
    }
  }, [values, answer]);
  const example = startDraft(rules, units);
  return { rules, form, units, setUnits, values, ...found, isExample: Object.keys(rules).every((field) => draft[field] === example[field]) };
}
