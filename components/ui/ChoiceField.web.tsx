import type { ReactElement } from 'react';
import type { FieldValues } from 'react-hook-form';
import { FieldFrame } from '@/components/ui/FieldFrame';
import type { Option } from '@/components/ui/SelectField';
import { useField, type FieldProps } from '@/components/ui/useField';

export interface ChoiceFieldProps<T extends FieldValues, O = T> extends FieldProps<T, O> {
  options: readonly (Option & { hint?: string })[];
  /** `list` one below the other, with room for a hint each; `segments` side by side for two to four short words. */
  look?: 'list' | 'segments';
}

/** One of a few, all visible (radio buttons). The form's value is the option's string. */
export function ChoiceField<T extends FieldValues, O = T>(props: ChoiceFieldProps<T, O>): ReactElement {
  const { field, frame } = useField(props);
  const { options, look = 'list', disabled, testID } = props;
  return (
    <FieldFrame {...frame} kind="group">
      {(wiring) => (
        <div className={look === 'segments' ? 'd-segments' : 'd-choices'} data-testid={testID}>
          {options.map((option, index) => {
            const hintId = `${wiring.id}-${index}-hint`;
            return (
              <label key={option.value} className={look === 'segments' ? 'd-segment' : 'd-check'}>
                <input
                  ref={index === 0 ? field.ref : undefined}
                  id={index === 0 ? wiring.id : undefined}
                  type="radio"
                  name={wiring.id}
                  value={option.value}
                  checked={field.value === option.value}
                  onChange={() => field.onChange(option.value)}
                  onBlur={field.onBlur}
                  disabled={disabled || option.disabled}
                  aria-describedby={option.hint ? hintId : undefined}
                />
                <span>
                  {option.label}
                  {option.hint && <span className="d-choice-hint" id={hintId}>{option.hint}</span>}
                </span>
              </label>
            );
          })}
        </div>
      )}
    </FieldFrame>
  );
}
