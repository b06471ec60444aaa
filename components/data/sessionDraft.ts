import type { z } from '@/shared/zod';

/**
 * What was typed and not yet saved, kept for this tab so that a reload loses nothing.
 * @param key - names the form and what it is about
 * @returns the draft, or null when there is none that still fits the form
 */
export function readDraft<T>(key: string, schema: z.ZodType<T>): T | null {
  try {
    const text = window.sessionStorage.getItem(key);
    if (text === null) {
      return null;
    }
    const draft = schema.safeParse(JSON.parse(text));
    return draft.success ? draft.data : null;
  } catch {
    return null;
  }
}

/** Keeps a draft; null forgets it. */
export function writeDraft(key: string, draft: unknown): void {
  try {
    if (draft === null) {
      window.sessionStorage.removeItem(key);
    } else {
      window.sessionStorage.setItem(key, JSON.stringify(draft));
    }
  } catch {
    // Storage is closed in some private windows; the draft then lives as long as the page.
  }
}
