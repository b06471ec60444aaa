import type { ReactElement } from 'react';
import type { FieldValues } from 'react-hook-form';
import { FieldFrame } from '@/components/ui/FieldFrame';
import { useField, type FieldProps } from '@/components/ui/useField';

/** One thing to choose. */
export interface Option<V extends string = string> {
  value: V;
  label: string;
  disabled?: boolean;
}

export interface SelectFieldProps<T extends FieldValues, O = T> extends FieldProps<T, O> {
  options: readonly Option[];
  /** First line that is no choice: "Choose a tap". The form's value is then the empty string. */
  placeholder?: string;
}

/** One of many, from the system's own list. Under five options `ChoiceField` is quicker to use. */
export function SelectField<T extends FieldValues, O = T>(props: SelectFieldProps<T, O>): ReactElement {
  const { field, frame } = useField(props);
  const value: unknown = field.value;
  return (
    <FieldFrame {...frame}>
      {(wiring) => (
        <select
          {...wiring}
          ref={field.ref}
          className="d-input d-select"
          name={field.name}
          value={typeof value === 'string' ? value : ''}
          onChange={field.onChange}
          onBlur={field.onBlur}
          disabled={props.disabled}
          data-testid={props.testID}
        >
          {props.placeholder !== undefined && <option value="">{props.placeholder}</option>}
          {props.options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>{option.label}</option>
          ))}
        </select>
      )}
    </FieldFrame>
  );
}
