import type { ReactElement } from 'react';
import type { FieldValues } from 'react-hook-form';
import { FieldFrame } from '@/components/ui/FieldFrame';
import { useField, type FieldProps } from '@/components/ui/useField';

export interface DateFieldProps<T extends FieldValues, O = T> extends FieldProps<T, O> {
  /** First and last day offered, 'YYYY-MM-DD'. */
  min?: string;
  max?: string;
}

/** A civil day. The form's value is 'YYYY-MM-DD', empty while none is chosen. */
export function DateField<T extends FieldValues, O = T>(props: DateFieldProps<T, O>): ReactElement {
  const { field, frame } = useField(props);
  const value: unknown = field.value;
  return (
    <FieldFrame {...frame}>
      {(wiring) => (
        <input
          {...wiring}
          ref={field.ref}
          className="d-input d-input-short"
          type="date"
          name={field.name}
          min={props.min}
          max={props.max}
          value={typeof value === 'string' ? value : ''}
          onChange={field.onChange}
          onBlur={field.onBlur}
          disabled={props.disabled}
          data-testid={props.testID}
        />
      )}
    </FieldFrame>
  );
}
