import { useSyncExternalStore } from 'react';
import { narrowPx, widePx } from '@/components/theme/tokens';

/** True while the page matches a media query; follows the window as it changes. */
export function useMediaQuery(query: string): boolean {
  return useSyncExternalStore(
    (changed) => {
      const list = window.matchMedia?.(query);
      list?.addEventListener('change', changed);
      return () => list?.removeEventListener('change', changed);
    },
    () => window.matchMedia?.(query).matches ?? false,
    () => false,
  );
}

/** True from 900 px: list and detail stand side by side. Says nothing about a mouse being there. */
export function useIsWide(): boolean {
  return useMediaQuery(`(min-width: ${widePx}px)`);
}

/** True under 500 px: tables become cards and dialogs come up from the bottom. */
export function useIsNarrow(): boolean {
  return useMediaQuery(`(max-width: ${narrowPx - 0.02}px)`);
}

/** True when the person asked their system for less motion. */
export function usePrefersStill(): boolean {
  return useMediaQuery('(prefers-reduced-motion: reduce)');
}
