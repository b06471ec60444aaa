import type { Href } from 'expo-router';

/** A page of our own to go on to; anything that could lead elsewhere is dropped. */
export function safeNext(next: string | undefined): Href {
  return next !== undefined && /^\/(?![/\\])[\w\-/?=&.%~]*$/.test(next) ? (next as Href) : '/home';
}

/** The address of a page that, when it is done, goes on to `next`. */
export function withNext(path: '/sign-in' | '/sign-up', next: string | undefined): Href {
  return next === undefined ? path : `${path}?next=${encodeURIComponent(next)}`;
}
