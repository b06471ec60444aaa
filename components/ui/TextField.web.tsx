import type { HTMLInputAutoCompleteAttribute, ReactElement } from 'react';
import type { FieldValues } from 'react-hook-form';
import { FieldFrame } from '@/components/ui/FieldFrame';
import { useField, type FieldProps } from '@/components/ui/useField';

export interface TextFieldProps<T extends FieldValues, O = T> extends FieldProps<T, O> {
  type?: 'text' | 'email' | 'tel' | 'url' | 'search';
  autoComplete?: HTMLInputAutoCompleteAttribute;
  /** More than one makes it a text area. */
  lines?: number;
  maxLength?: number;
  placeholder?: string;
}

/** One line of text, or several. */
export function TextField<T extends FieldValues, O = T>(props: TextFieldProps<T, O>): ReactElement {
  const { field, frame } = useField(props);
  const { type = 'text', autoComplete, lines = 1, maxLength, placeholder, disabled, testID } = props;
  const value = typeof field.value === 'string' ? field.value : '';
  return (
    <FieldFrame {...frame}>
      {(wiring) => {
        const common = { ...wiring, ref: field.ref, name: field.name, value, onChange: field.onChange, onBlur: field.onBlur, disabled, maxLength, placeholder, autoComplete, 'data-testid': testID };
        return lines > 1
          ? <textarea {...common} className="d-input" rows={lines} />
          : <input {...common} className="d-input" type={type} autoCapitalize={type === 'email' || type === 'url' ? 'none' : undefined} spellCheck={type === 'text' ? undefined : false} />;
      }}
    </FieldFrame>
  );
}
