import { isMissingChunk, mayReload } from '@/components/shell/RootErrorBoundary';
import { isWithin, yardNavigation } from '@/components/shell/navigation';

function storage(): Pick<Storage, 'getItem' | 'setItem'> {
  const kept = new Map<string, string>();
  return { getItem: (key) => kept.get(key) ?? null, setItem: (key, value) => void kept.set(key, value) };
}

test('code that is gone from the server is told from other errors', () => {
  const missing = new Error('Loading module /_expo/static/js/web/today-1.js failed.\n(error: …)');
  missing.name = 'AsyncRequireError';
  expect(isMissingChunk(missing)).toBe(true);
  expect(isMissingChunk(new TypeError('x is undefined'))).toBe(false);
  expect(isMissingChunk('Loading module')).toBe(false);
});

test('the page is loaded anew once, and again only when that is long past', () => {
  const kept = storage();
  const nowMs = 1_750_000_000_000;
  expect(mayReload(kept, nowMs)).toBe(true);
  expect(mayReload(kept, nowMs + 1_000)).toBe(false);
  expect(mayReload(kept, nowMs + 31_000)).toBe(true);
});

test('the navigation of a yard marks the place and what lies inside it', () => {
  const [today] = yardNavigation('7');
  expect(today?.label).toBe('Today');
  expect(isWithin('/yards/7/today', today?.href ?? '/')).toBe(true);
  expect(isWithin('/yards/7/today/1', today?.href ?? '/')).toBe(true);
  expect(isWithin('/yards/7/today-and-more', today?.href ?? '/')).toBe(false);
});
