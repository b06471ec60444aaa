import { useSyncExternalStore } from 'react';
import type { MeResponse, SignedInResponse } from '@/shared/contracts/accounts';

/** `unreachable`: a session is there, but the service did not answer when the page was opened. */
export type SessionState = { status: 'unknown' } | { status: 'unreachable' } | { status: 'signed_out' } | { status: 'signed_in'; me: MeResponse };

/** `ended`: the service says that the session is over. `unreachable`: it said nothing of the kind, so the session is kept. */
export type Renewal = 'renewed' | 'ended' | 'unreachable';

// The access token lives in memory only; the refresh token is in a cookie that no script can read.
let token: string | null = null;
let state: SessionState = { status: 'unknown' };
let renewing: Promise<Renewal> | null = null;
const listeners = new Set<() => void>();

// Tells a visitor who never signed in from a person whose page was reloaded, so that no request is made in vain.
const hintKey = 'dapple.signed-in';

function setState(next: SessionState): void {
  state = next;
  listeners.forEach((listener) => listener());
}

function readHint(): boolean {
  try {
    return window.localStorage.getItem(hintKey) === 'yes';
  } catch {
    return true;
  }
}

function writeHint(signedIn: boolean): void {
  try {
    if (signedIn) {
      window.localStorage.setItem(hintKey, 'yes');
    } else {
      window.localStorage.removeItem(hintKey);
    }
  } catch {
    // Storage is closed in some private windows; the session then ends with the page.
  }
}

export function accessToken(): string | null {
  return token;
}

/** Takes what sign-in, confirmation or renewal answered. */
export function sessionBegan(answer: SignedInResponse): void {
  token = answer.accessToken;
  writeHint(true);
  setState({ status: 'signed_in', me: answer.me });
}

/** Shows changed facts about the signed-in person. */
export function meChanged(me: MeResponse): void {
  if (state.status === 'signed_in') {
    setState({ status: 'signed_in', me });
  }
}

/** Forgets the session on this device. */
export function sessionEnded(): void {
  token = null;
  writeHint(false);
  setState({ status: 'signed_out' });
}

/** Asks for a new access token with the cookie. One request at a time however many callers wait. */
export function renewSession(): Promise<Renewal> {
  renewing ??= (async () => {
    try {
      const response = await fetch('/api/auth/refresh', { method: 'POST', credentials: 'same-origin', headers: { 'X-Requested-With': 'dapple' } });
      if (!response.ok) {
        return response.status === 401 || response.status === 403 ? 'ended' : 'unreachable';
      }
      sessionBegan((await response.json()) as SignedInResponse);
      return 'renewed';
    } catch {
      return 'unreachable';
    } finally {
      renewing = null;
    }
  })();
  return renewing;
}

/** At the start of the app: takes up the session that the cookie carries, if there is one. */
export async function resumeSession(): Promise<void> {
  if (state.status !== 'unknown' && state.status !== 'unreachable') {
    return;
  }
  if (!readHint()) {
    setState({ status: 'signed_out' });
    return;
  }
  const renewal = await renewSession();
  if (renewal === 'ended') {
    sessionEnded();
  } else if (renewal === 'unreachable') {
    setState({ status: 'unreachable' });
  }
}

/** Who is signed in, followed as it changes. */
export function useSession(): SessionState {
  return useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => state,
    () => state,
  );
}
