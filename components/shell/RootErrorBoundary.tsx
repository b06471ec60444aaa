import { Component, type ReactNode } from 'react';
import { ErrorState } from '@/components/ui/ErrorState';
import { Box } from '@/components/ui/Box';

const reloadedKey = 'dapple.reloadedForChunk';
const waitBetweenReloadsMs = 30_000;

/** True for the error that a page of an older version meets when its code has been replaced on the server. */
export function isMissingChunk(error: unknown): boolean {
  return error instanceof Error && (error.name === 'AsyncRequireError' || /^Loading (module|chunk) .* failed/.test(error.message));
}

/** Whether a reload for a missing chunk may be tried: once, and again only when the last one is long past. `nowMs` is milliseconds since 1970. */
export function mayReload(storage: Pick<Storage, 'getItem' | 'setItem'>, nowMs: number): boolean {
  const last = Number(storage.getItem(reloadedKey) ?? Number.NEGATIVE_INFINITY);
  if (nowMs - last < waitBetweenReloadsMs) return false;
  storage.setItem(reloadedKey, String(nowMs));
  return true;
}

interface State {
  error: unknown;
  failed: boolean;
}

/** Catches what no screen caught. After a new version was put on the server it loads the page anew, once; else it offers to. */
export class RootErrorBoundary extends Component<{ children: ReactNode }, State> {
  override state: State = { error: null, failed: false };

  static getDerivedStateFromError(error: unknown): State {
    return { error, failed: true };
  }

  override componentDidCatch(error: unknown): void {
    document.getElementById('first-paint')?.remove();
    if (isMissingChunk(error) && navigator.onLine && mayReload(window.sessionStorage, performance.timeOrigin + performance.now())) window.location.reload();
  }

  override render(): ReactNode {
    if (!this.state.failed) return this.props.children;
    const missing = isMissingChunk(this.state.error);
    return (
      <Box padding={20} style={{ maxWidth: 560, width: '100%', alignSelf: 'center' }}>
        <ErrorState
          title={missing ? 'This page could not be fetched' : 'This page stopped working'}
          detail={missing ? 'The connection may be gone, or a newer version of Dapple is there.' : 'Something in it failed that should not have.'}
          kept="What was saved before is safe. Loading the page again brings it back."
          onRetry={() => window.location.reload()}
        />
      </Box>
    );
  }
}
