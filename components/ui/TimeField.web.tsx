import type { ReactElement } from 'react';
import type { FieldValues } from 'react-hook-form';
import { fromClockText, toClockText } from '@/components/ui/clockText';
import { FieldFrame } from '@/components/ui/FieldFrame';
import { useField, type FieldProps } from '@/components/ui/useField';

/** A time of day. The form's value is minutes after local midnight [min], null while none is chosen. */
export function TimeField<T extends FieldValues, O = T>(props: FieldProps<T, O>): ReactElement {
  const { field, frame } = useField(props);
  const value: unknown = field.value;
  return (
    <FieldFrame {...frame}>
      {(wiring) => (
        <input
          {...wiring}
          ref={field.ref}
          className="d-input d-input-short"
          type="time"
          name={field.name}
          value={typeof value === 'number' ? toClockText(value) : ''}
          onChange={(event) => field.onChange(fromClockText(event.target.value))}
          onBlur={field.onBlur}
          disabled={props.disabled}
          data-testid={props.testID}
        />
      )}
    </FieldFrame>
  );
}
