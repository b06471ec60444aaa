import type { ReactElement } from 'react';
import type { FieldValues } from 'react-hook-form';
import { FieldFrame } from '@/components/ui/FieldFrame';
import { useField, type FieldProps } from '@/components/ui/useField';

export interface NumberFieldProps<T extends FieldValues, O = T> extends FieldProps<T, O> {
  /** Unit as written on the screen: "in", "gpm". Heard as part of the description. */
  unit?: string;
  /** Whole numbers only: another keyboard on a phone. */
  whole?: boolean;
  placeholder?: string;
}

/**
 * A number with its unit. The form keeps exactly the text that was typed (a string); `readNumber` or `numberText` turn it into a number,
 * so that a half-typed "12," is never thrown away and a comma works as well as a point.
 */
export function NumberField<T extends FieldValues, O = T>(props: NumberFieldProps<T, O>): ReactElement {
  const { field, frame } = useField(props);
  const { unit, whole, placeholder, disabled, testID } = props;
  const unitId = `${frame.id}-unit`;
  const value: unknown = field.value;
  return (
    <FieldFrame {...frame} describedBy={unit ? unitId : undefined}>
      {(wiring) => (
        <div className="d-input-group">
          <input
            {...wiring}
            ref={field.ref}
            className="d-input d-input-short"
            type="text"
            inputMode={whole ? 'numeric' : 'decimal'}
            autoComplete="off"
            name={field.name}
            value={typeof value === 'string' ? value : typeof value === 'number' ? String(value) : ''}
            onChange={(event) => field.onChange(event.target.value)}
            onBlur={field.onBlur}
            disabled={disabled}
            placeholder={placeholder}
            data-testid={testID}
          />
          {unit && <span className="d-input-unit" id={unitId}>{unit}</span>}
        </div>
      )}
    </FieldFrame>
  );
}
