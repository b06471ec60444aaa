import { usePathname } from 'expo-router';
import { useEffect, useLayoutEffect, type RefObject } from 'react';
import { arriveAt } from '@/components/ui/screenArrival';

/**
 * What every page does when it appears: sets the browser's title, takes away the first paint, and, when the reader came from another page, moves
 * the focus to the headline and the page to its top. Going back leaves the scroll position to the browser.
 */
export function usePageArrival(title: string, heading: RefObject<HTMLElement | null>): void {
  const path = usePathname();

  useEffect(() => {
    document.title = title === 'Dapple' ? title : `${title} · Dapple`;
  }, [title]);

  useLayoutEffect(() => {
    document.getElementById('first-paint')?.remove();
    const arrival = arriveAt(path);
    if (arrival === 'forward') window.scrollTo(0, 0);
    if (arrival === 'forward' || arrival === 'back') heading.current?.focus({ preventScroll: true });
  }, [path, heading]);
}
