import { lazy, Suspense, useEffect, useState, type ReactElement } from 'react';

export interface ToastMessage {
  /** One sentence: "Saved. The plan is new from Tuesday." */
  message: string;
  /** `done` went well, `problem` did not. */
  tone?: 'done' | 'problem';
  action?: { label: string; onPress: () => void };
  /** How long it stays [ms]. Default 6 s, with an action 12 s. */
  durationMs?: number;
}

// One way in: a package that two chunks import would be moved to the code that every page loads first.
const loadToaster = () => import('@/components/ui/SonnerToaster');
const SonnerToaster = lazy(loadToaster);

let markReady: () => void = () => undefined;
const ready = new Promise<void>((resolve) => {
  markReady = resolve;
});

/** Says briefly what happened without stopping anybody. What must be read, or acted on, belongs on the screen instead. */
export async function showToast({ message, tone = 'done', action, durationMs = action ? 12_000 : 6_000 }: ToastMessage): Promise<void> {
  // Without a connection its code may not come: what happened has happened, and only the word of it is lost.
  const parts = await Promise.all([loadToaster(), ready]).catch(() => null);
  if (parts === null) {
    return;
  }
  const [{ toast }] = parts;
  const show = tone === 'problem' ? toast.error : toast.success;
  show(message, { duration: durationMs, action: action && { label: action.label, onClick: action.onPress } });
}

/** Shows toasts. Stands once, in the root layout; its code comes when the first screen has had time to appear. */
export function ToastHost(): ReactElement | null {
  const [wanted, setWanted] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setWanted(true), 1500);
    return () => clearTimeout(timer);
  }, []);
  return wanted ? <Suspense fallback={null}><SonnerToaster onReady={markReady} /></Suspense> : null;
}
