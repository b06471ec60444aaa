import X from 'lucide-react-native/icons/x';
import { useEffect, useId, useLayoutEffect, useRef, type KeyboardEvent, type ReactElement, type ReactNode } from 'react';
import { createPortal } from 'react-dom';
import { IconButton } from '@/components/ui/IconButton';

export interface DialogProps {
  open: boolean;
  /** Asked to close: by Escape, the backdrop or the cross. Keep it open by not changing `open`. */
  onClose: () => void;
  title: string;
  children: ReactNode;
  /** Buttons, the main one first. */
  actions?: ReactNode;
  /** `alert` for a question that must be answered: no cross, the backdrop does not close it. */
  kind?: 'dialog' | 'alert';
  size?: 'regular' | 'wide';
}

const focusable = 'a[href], button:not([disabled]), input:not([disabled]), select:not([disabled]), textarea:not([disabled]), [tabindex]:not([tabindex="-1"])';

/** A question or task in front of the screen: centred, from the bottom on a phone. Keeps the focus inside and gives it back. */
export function Dialog(props: DialogProps): ReactElement | null {
  return props.open ? createPortal(<OpenDialog {...props} />, document.body) : null;
}

function OpenDialog({ onClose, title, children, actions, kind = 'dialog', size = 'regular' }: DialogProps): ReactElement {
  const panel = useRef<HTMLDialogElement>(null);
  const heading = useRef<HTMLHeadingElement>(null);
  const titleId = useId();

  useLayoutEffect(() => {
    const opener = document.activeElement;
    const dialog = panel.current;
    // The browser's own modal makes the rest of the page inert; without it the focus loop below still holds.
    if (typeof dialog?.showModal === 'function') dialog.showModal();
    else dialog?.setAttribute('open', '');
    (dialog?.querySelector<HTMLElement>('[data-first-focus], input:not([disabled]), select:not([disabled]), textarea:not([disabled])') ?? heading.current)?.focus();
    return () => {
      if (typeof dialog?.close === 'function') dialog.close();
      if (opener instanceof HTMLElement && opener.isConnected) opener.focus();
    };
  }, []);

  useEffect(() => {
    const root = document.documentElement;
    const before = root.style.overflow;
    root.style.overflow = 'hidden';
    return () => {
      root.style.overflow = before;
    };
  }, []);

  const onKeyDown = (event: KeyboardEvent<HTMLDialogElement>): void => {
    if (event.key === 'Escape') {
      event.preventDefault();
      event.stopPropagation();
      onClose();
    }
    if (event.key !== 'Tab' || !panel.current) return;
    const stops = Array.from(panel.current.querySelectorAll<HTMLElement>(focusable));
    const [first, last] = [stops[0], stops.at(-1)];
    const at = document.activeElement;
    if (!first || !last) event.preventDefault();
    else if (event.shiftKey && (at === first || at === heading.current)) {
      event.preventDefault();
      last.focus();
    } else if (!event.shiftKey && at === last) {
      event.preventDefault();
      first.focus();
    }
  };

  return (
    <dialog
      ref={panel}
      className="d-dialog"
      data-size={size}
      role={kind === 'alert' ? 'alertdialog' : 'dialog'}
      aria-modal="true"
      aria-labelledby={titleId}
      onKeyDown={onKeyDown}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      onClick={(event) => {
        if (event.target === panel.current && kind !== 'alert') onClose();
      }}
    >
      <div className="d-dialog-panel">
        <div className="d-dialog-head">
          <h2 id={titleId} ref={heading} tabIndex={-1}>{title}</h2>
          {kind !== 'alert' && <IconButton icon={X} label="Close" onPress={onClose} />}
        </div>
        <div className="d-dialog-body">{children}</div>
        {actions !== undefined && <div className="d-dialog-actions">{actions}</div>}
      </div>
    </dialog>
  );
}
