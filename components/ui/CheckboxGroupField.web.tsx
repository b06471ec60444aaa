import type { ReactElement } from 'react';
import type { FieldValues } from 'react-hook-form';
import { FieldFrame } from '@/components/ui/FieldFrame';
import type { Option } from '@/components/ui/SelectField';
import { useField, type FieldProps } from '@/components/ui/useField';

export interface CheckboxGroupFieldProps<T extends FieldValues, O = T> extends FieldProps<T, O> {
  options: readonly Option[];
  /** `segments` side by side for short words such as weekdays. */
  look?: 'list' | 'segments';
  /** Segments of one width, so many in a row; left out, as many as fit. */
  perRow?: number;
}

/** Any of a few, such as weekdays. The form's value is an array of the options' strings, in the order of the options. */
export function CheckboxGroupField<T extends FieldValues, O = T>(props: CheckboxGroupFieldProps<T, O>): ReactElement {
  const { field, frame } = useField(props);
  const { options, look = 'list', perRow, disabled, testID } = props;
  const value: unknown = field.value;
  const chosen = new Set<unknown>(Array.isArray(value) ? value : []);
  return (
    <FieldFrame {...frame} kind="group">
      {(wiring) => (
        <div className={look === 'segments' ? 'd-segments' : 'd-choices'} data-testid={testID} style={perRow === undefined ? undefined : { display: 'grid', gridTemplateColumns: `repeat(${perRow}, minmax(0, 1fr))` }}>
          {options.map((option, index) => (
            <label key={option.value} className={look === 'segments' ? 'd-segment' : 'd-check'}>
              <input
                ref={index === 0 ? field.ref : undefined}
                id={index === 0 ? wiring.id : undefined}
                type="checkbox"
                name={field.name}
                value={option.value}
                checked={chosen.has(option.value)}
                onChange={(event) => field.onChange(options.map((one) => one.value).filter((one) => (one === option.value ? event.target.checked : chosen.has(one))))}
                onBlur={field.onBlur}
                disabled={disabled || option.disabled}
              />
              <span>{option.label}</span>
            </label>
          ))}
        </div>
      )}
    </FieldFrame>
  );
}
