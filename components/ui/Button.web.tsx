import type { ReactElement, Ref } from 'react';
import { Icon, type IconComponent } from '@/components/ui/Icon';

export interface ButtonProps {
  /** What happens, as a plain verb: "Start the round". Always visible. */
  label: string;
  /** `sun` the one action of the screen, `hose` the main action of a part, `quiet` any other, `danger` ends or removes something, `plain` without a frame. */
  kind?: 'sun' | 'hose' | 'quiet' | 'danger' | 'plain';
  onPress?: () => void;
  /** Sends the form around it. */
  submit?: boolean;
  /** While the action runs: shows so, keeps the focus, ignores further presses. */
  pending?: boolean;
  disabled?: boolean;
  icon?: IconComponent;
  /** As wide as its container. */
  block?: boolean;
  size?: 'regular' | 'small';
  /** Longer name for assistive technology; begins with the visible label. */
  accessibleLabel?: string;
  'aria-expanded'?: boolean;
  'aria-controls'?: string;
  'aria-describedby'?: string;
  testID?: string;
  ref?: Ref<HTMLButtonElement>;
}

/** A button with words on it. Put cautions next to it, not in it. */
export function Button({
  label, kind = 'quiet', onPress, submit, pending = false, disabled, icon, block, size = 'regular', accessibleLabel, testID, ref, ...aria
}: ButtonProps): ReactElement {
  return (
    <button
      {...aria}
      ref={ref}
      type={submit ? 'submit' : 'button'}
      className="d-button"
      data-kind={kind}
      data-size={size}
      data-block={block ? '' : undefined}
      data-testid={testID}
      disabled={disabled}
      aria-disabled={pending || undefined}
      aria-busy={pending || undefined}
      aria-label={accessibleLabel}
      onClick={(event) => {
        if (pending) event.preventDefault();
        else onPress?.();
      }}
    >
      {pending ? <span className="d-spinner" aria-hidden="true" /> : icon && <Icon icon={icon} />}
      <span>{label}</span>
      {pending && <span className="d-hidden" role="status">Working</span>}
    </button>
  );
}
