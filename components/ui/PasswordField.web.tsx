import { useState, type ReactElement } from 'react';
import type { FieldValues } from 'react-hook-form';
import { FieldFrame } from '@/components/ui/FieldFrame';
import { useField, type FieldProps } from '@/components/ui/useField';

export interface PasswordFieldProps<T extends FieldValues, O = T> extends FieldProps<T, O> {
  /** Tells password managers whether to fill or to make one. */
  autoComplete: 'current-password' | 'new-password';
}

/** A password that can be shown while it is typed. */
export function PasswordField<T extends FieldValues, O = T>(props: PasswordFieldProps<T, O>): ReactElement {
  const { field, frame } = useField(props);
  const [shown, setShown] = useState(false);
  const value: unknown = field.value;
  return (
    <FieldFrame {...frame}>
      {(wiring) => (
        <div className="d-input-group">
          <input
            {...wiring}
            ref={field.ref}
            className="d-input"
            type={shown ? 'text' : 'password'}
            autoComplete={props.autoComplete}
            autoCapitalize="none"
            spellCheck={false}
            name={field.name}
            value={typeof value === 'string' ? value : ''}
            onChange={field.onChange}
            onBlur={field.onBlur}
            disabled={props.disabled}
            data-testid={props.testID}
          />
          <button type="button" className="d-input-action" aria-pressed={shown} aria-controls={wiring.id} aria-label={`Show ${props.label.toLowerCase()}`} onClick={() => setShown(!shown)}>
            {shown ? 'Hide' : 'Show'}
          </button>
        </div>
      )}
    </FieldFrame>
  );
}
