import type { PlaceListResponse } from '@/shared/contracts/places';
import { keys } from './keys';
import { useRead } from './useApi';

/** Places whose name begins with the text, largest first. Nothing is asked below two letters. */
export function usePlaces(text: string) {
  const q = text.trim();
  return useRead<PlaceListResponse>(keys.places(q), `/places?q=${encodeURIComponent(q)}`, { enabled: q.length >= 2, anonymous: true });
}
