import { useId, type ReactElement, type ReactNode } from 'react';
import type { FieldErrors, FieldPath, FieldValues, UseFormReturn } from 'react-hook-form';
import { Button, type ButtonProps } from '@/components/ui/Button';
import { Notice } from '@/components/ui/Notice';
import { fieldId, FormIdContext } from '@/components/ui/useField';

export interface FormProps<T extends FieldValues, O = T> {
  /** What `useForm` gave; use `mode: 'onTouched'` so that words about a field come when the person leaves it. */
  form: UseFormReturn<T, unknown, O>;
  /** Gets the checked values. A promise keeps the button pending. What was typed stays when it fails. */
  onSubmit: (values: O) => void | Promise<void>;
  children: ReactNode;
  /** Says what happens: "Save this test". Without it the children bring a button with `submit`. */
  submitLabel?: string;
  submitKind?: ButtonProps['kind'];
  /** Shows the button at work; default is while `onSubmit` runs. */
  pending?: boolean;
  /** Further buttons or links beside the submit button. */
  actions?: ReactNode;
  /** What went wrong with the last save as a whole, in a sentence; shown above the button. */
  problem?: string;
  /** A caution that belongs to the button. */
  caution?: string;
  /** Name of the form for assistive technology. */
  label?: string;
}

interface FieldProblem {
  name: string;
  message: string;
}

/** Every field error of a form, nested ones by their path. */
export function listProblems(errors: FieldErrors, path = ''): FieldProblem[] {
  return Object.entries(errors).flatMap(([key, error]): FieldProblem[] => {
    if (!error || key === 'root' || key === 'ref') return [];
    const name = path === '' ? key : `${path}.${key}`;
    if (typeof error.message === 'string' && error.type !== undefined) return [{ name, message: error.message || 'Needs another look.' }];
    return typeof error === 'object' ? listProblems(error as FieldErrors, name) : [];
  });
}

/**
 * A real form: Enter sends it, password managers see it, the first wrong field gets the focus, and after a failed attempt a list of
 * what is wrong stands on top with links to the fields.
 */
export function Form<T extends FieldValues, O = T>({
  form, onSubmit, children, submitLabel, submitKind = 'hose', pending, actions, problem, caution, label,
}: FormProps<T, O>): ReactElement {
  const formId = useId();
  const { errors, isSubmitting, submitCount } = form.formState;
  const busy = pending ?? isSubmitting;
  const problems = submitCount > 0 ? listProblems(errors) : [];
  return (
    <FormIdContext value={formId}>
      <form
        className="d-form"
        noValidate
        aria-label={label}
        onSubmit={(event) => {
          event.stopPropagation(); // A form in a dialog must not also send the form the dialog was opened from.
          event.preventDefault();
          if (!busy) void form.handleSubmit((values) => onSubmit(values))(event);
        }}
      >
        {problems.length > 1 && (
          <section className="d-summary" aria-label="What needs another look">
            <p role="status">{problems.length} answers need another look.</p>
            <ul>
              {problems.map(({ name, message }) => (
                <li key={name}>
                  <a
                    className="d-link"
                    data-kind="inline"
                    href={`#${fieldId(formId, name)}`}
                    onClick={(event) => {
                      event.preventDefault();
                      form.setFocus(name as FieldPath<T>);
                    }}
                  >
                    {message}
                  </a>
                </li>
              ))}
            </ul>
          </section>
        )}
        {children}
        {caution !== undefined && <Notice tone="caution">{caution}</Notice>}
        {problem !== undefined && <Notice tone="problem">{problem}</Notice>}
        {(submitLabel !== undefined || actions !== undefined) && (
          <div className="d-form-actions">
            {submitLabel !== undefined && <Button submit kind={submitKind} label={submitLabel} pending={busy} />}
            {actions}
          </div>
        )}
      </form>
    </FormIdContext>
  );
}
