/** How the reader came to the page that is now shown. */
type Arrival = 'first' | 'forward' | 'back' | 'same';

let shownPath: string | null = null;
let wentBack = false;

if (typeof window !== 'undefined') {
  window.addEventListener('popstate', () => {
    wentBack = true;
  });
}

/** Notes that `path` is shown now and says how the reader got there. A screen that is drawn again at the same path is not an arrival. */
export function arriveAt(path: string): Arrival {
  if (path === shownPath) return 'same';
  const arrival: Arrival = shownPath === null ? 'first' : wentBack ? 'back' : 'forward';
  shownPath = path;
  wentBack = false;
  return arrival;
}
