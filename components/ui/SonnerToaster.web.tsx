import { useEffect, type ReactElement } from 'react';
import { toast, Toaster } from 'sonner';

export { toast };

const offset = 'var(--toast-offset)';

/** The place where toasts appear; tells when it listens, because a toast sent before that would be lost. */
export default function SonnerToaster({ onReady }: { onReady: () => void }): ReactElement {
  useEffect(onReady, [onReady]);
  return (
    <Toaster
      position="bottom-center"
      visibleToasts={3}
      containerAriaLabel="Messages"
      offset={{ bottom: offset }}
      mobileOffset={{ bottom: offset, left: 16, right: 16 }}
      toastOptions={{ unstyled: true, classNames: { toast: 'd-toast', title: 'd-toast-title', content: 'd-toast-content', actionButton: 'd-toast-action' } }}
    />
  );
}
