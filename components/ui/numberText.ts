import { readNumber } from '@/components/ui/readNumber';
import { z } from '@/shared/zod';

export interface NumberTextRules {
  /** Smallest and largest value that is accepted, both included, in the unit of the field. */
  min?: number;
  max?: number;
  /** Unit for the sentence that says what is accepted. */
  unit?: string;
  whole?: boolean;
  /** Sentence for an empty field. */
  missing?: string;
}

function problemWith(value: number, { min, max, unit, whole }: NumberTextRules): string | undefined {
  const measure = (limit: number): string => (unit ? `${limit} ${unit}` : String(limit));
  if (whole && !Number.isInteger(value)) return 'Write a whole number.';
  const tooSmall = min !== undefined && value < min;
  const tooLarge = max !== undefined && value > max;
  if (!tooSmall && !tooLarge) return undefined;
  if (min !== undefined && max !== undefined) return `Write something from ${measure(min)} to ${measure(max)}.`;
  return tooSmall ? `Write at least ${measure(min ?? 0)}.` : `Write at most ${measure(max ?? 0)}.`;
}

/** A form schema for the text of a `NumberField`: gives a number in the unit of the field, or a sentence that says how to write it. */
export function numberText(rules: NumberTextRules = {}): z.ZodType<number, string> {
  return z.string().transform((text, context) => {
    const reading = readNumber(text);
    const message = reading.kind === 'empty' ? rules.missing ?? 'Write a number.' : reading.kind === 'wrong' ? reading.message : problemWith(reading.value, rules);
    if (message === undefined && reading.kind === 'number') return reading.value;
    context.addIssue({ code: 'custom', message });
    return z.NEVER;
  });
}

/** The same for a field that may stay empty: gives `null` then. */
export function optionalNumberText(rules: NumberTextRules = {}): z.ZodType<number | null, string> {
  return z.string().transform((text, context) => {
    const reading = readNumber(text);
    if (reading.kind === 'empty') return null;
    const message = reading.kind === 'wrong' ? reading.message : problemWith(reading.value, rules);
    if (message === undefined && reading.kind === 'number') return reading.value;
    context.addIssue({ code: 'custom', message });
    return z.NEVER;
  });
}
