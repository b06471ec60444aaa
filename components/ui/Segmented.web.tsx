import { useId, type ReactElement } from 'react';
import type { Option } from '@/components/ui/SelectField';

export interface SegmentedProps<V extends string> {
  /** What is chosen here; heard, and seen when `showLabel`. */
  label: string;
  options: readonly Option<V>[];
  value: V;
  onChange: (value: V) => void;
  showLabel?: boolean;
}

/** A choice of view outside a form: two to four short words side by side. */
export function Segmented<V extends string>({ label, options, value, onChange, showLabel }: SegmentedProps<V>): ReactElement {
  const name = useId();
  return (
    <fieldset className="d-field">
      <legend className={showLabel ? 'd-field-label' : 'd-hidden'}>{label}</legend>
      <div className="d-segments">
        {options.map((option) => (
          <label key={option.value} className="d-segment">
            <input type="radio" name={name} value={option.value} checked={option.value === value} disabled={option.disabled} onChange={() => onChange(option.value)} />
            <span>{option.label}</span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
