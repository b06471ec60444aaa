import { createContext, useContext, useId } from 'react';
import { useController, type Control, type ControllerRenderProps, type FieldPath, type FieldValues } from 'react-hook-form';

/** What every field of a form takes. Validation stands in the form's zod schema, not here. */
export interface FieldProps<T extends FieldValues, O = T> {
  /** `form.control` of react-hook-form. */
  control: Control<T, unknown, O>;
  name: FieldPath<T>;
  label: string;
  hint?: string;
  /** Where the starting value comes from when it is a default and not the person's own: shown until they change it. */
  defaultSource?: string;
  optional?: boolean;
  disabled?: boolean;
  testID?: string;
}

/** Prefix of field ids inside one form, so that its error summary can point at them. */
export const FormIdContext = createContext<string | null>(null);

/** DOM id of a field in a form. */
export function fieldId(formId: string, name: string): string {
  return `${formId}-${name.replace(/[^A-Za-z0-9_-]/g, '-')}`;
}

interface FieldState<T extends FieldValues> {
  field: ControllerRenderProps<T, FieldPath<T>>;
  /** Ready for `FieldFrame`. */
  frame: { id: string; label: string; hint?: string; defaultSource?: string; optional?: boolean; error?: string };
}

/** Connects a control to react-hook-form and to its frame. The default mark goes as soon as the value is the person's own. */
export function useField<T extends FieldValues, O>({ control, name, label, hint, defaultSource, optional }: FieldProps<T, O>): FieldState<T> {
  const ownId = useId();
  const formId = useContext(FormIdContext) ?? ownId;
  const { field, fieldState } = useController<T, FieldPath<T>, O>({ control, name });
  return {
    field,
    frame: {
      id: fieldId(formId, name),
      label,
      hint,
      optional,
      defaultSource: fieldState.isDirty ? undefined : defaultSource,
      error: fieldState.error ? fieldState.error.message || 'This needs another look.' : undefined,
    },
  };
}
