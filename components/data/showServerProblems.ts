import type { FieldPath, FieldValues, UseFormReturn } from 'react-hook-form';
import { ApiError, errorMessage } from './apiError';

/**
 * Puts the server's objections at the fields they belong to.
 * @param names - form fields by the server's name, where they differ
 * @returns the sentence for the form as a whole when an objection belongs to no field; undefined otherwise
 */
export function showServerProblems<T extends FieldValues, O>(form: UseFormReturn<T, unknown, O>, error: unknown, names: Record<string, FieldPath<T>> = {}): string | undefined {
  if (!(error instanceof ApiError)) {
    return errorMessage(error);
  }
  const known = Object.keys(form.getValues());
  let placed = 0;
  for (const field of error.fields) {
    const name = names[field.path] ?? (known.includes(field.path.split('.')[0] ?? '') ? (field.path as FieldPath<T>) : undefined);
    if (name !== undefined) {
      form.setError(name, { type: 'server', message: field.message }, { shouldFocus: placed === 0 });
      placed += 1;
    }
  }
  return placed > 0 && placed === error.fields.length ? undefined : error.message;
}
