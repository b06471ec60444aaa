import type { ReactElement, Ref } from 'react';
import { Icon, type IconComponent } from '@/components/ui/Icon';

export interface IconButtonProps {
  icon: IconComponent;
  /** What it does; heard, and shown as a tip. */
  label: string;
  onPress: () => void;
  disabled?: boolean;
  'aria-expanded'?: boolean;
  'aria-controls'?: string;
  testID?: string;
  ref?: Ref<HTMLButtonElement>;
}

/** A button that is only an icon, for actions everybody knows: close, back, more. */
export function IconButton({ icon, label, onPress, disabled, testID, ref, ...aria }: IconButtonProps): ReactElement {
  return (
    <button {...aria} ref={ref} type="button" className="d-icon-button" aria-label={label} title={label} disabled={disabled} onClick={onPress} data-testid={testID}>
      <Icon icon={icon} />
    </button>
  );
}
