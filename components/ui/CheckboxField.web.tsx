import type { ReactElement } from 'react';
import type { FieldValues } from 'react-hook-form';
import { useField, type FieldProps } from '@/components/ui/useField';

/** Yes or no; the label stands beside the box. The form's value is a boolean. */
export function CheckboxField<T extends FieldValues, O = T>(props: FieldProps<T, O>): ReactElement {
  const { field, frame } = useField(props);
  const hintId = `${frame.id}-hint`;
  const errorId = `${frame.id}-error`;
  const described = [frame.hint && hintId, frame.error && errorId].filter(Boolean).join(' ');
  return (
    <div className="d-field" data-invalid={frame.error ? '' : undefined}>
      <label className="d-check">
        <input
          ref={field.ref}
          id={frame.id}
          type="checkbox"
          name={field.name}
          checked={field.value === true}
          onChange={(event) => field.onChange(event.target.checked)}
          onBlur={field.onBlur}
          disabled={props.disabled}
          aria-describedby={described === '' ? undefined : described}
          aria-invalid={frame.error ? true : undefined}
          data-testid={props.testID}
        />
        <span>
          {frame.label}
          {frame.defaultSource && <span className="d-field-default">default</span>}
        </span>
      </label>
      {frame.hint && <p className="d-field-hint" id={hintId}>{frame.hint}</p>}
      {frame.defaultSource && <p className="d-field-hint">Default: {frame.defaultSource}</p>}
      {frame.error && (
        <p className="d-field-error" id={errorId}>
          <span className="d-field-error-mark" aria-hidden="true">!</span>
          <span>{frame.error}</span>
        </p>
      )}
    </div>
  );
}
