import type { ObservationResponse, ScrewdriverFeelId } from '@/shared/contracts/ground';
import type { RainSource } from '@/shared/contracts/water';
import { formatNumber } from '@/shared/display';

/** How far a screwdriver was pushed in. */
export const feelWords: Record<ScrewdriverFeelId, string> = { easy: 'Easily', firm: 'Hard, with force', hard: 'Not at all, or hardly' };

/** What was found, in a few words. */
export function foundWords({ kind, feel, waterContent }: Pick<ObservationResponse, 'kind' | 'feel' | 'waterContent'>): string {
  if (kind === 'probe') return `probe read ${formatNumber((waterContent ?? 0) * 100, 0)} % water`;
  return feel === 'easy' ? 'screwdriver went in easily' : feel === 'firm' ? 'screwdriver went in hard' : 'screwdriver hardly went in';
}

export const rainWords: Record<RainSource, string> = { gauge: 'your gauge', weather: 'weather service', forecast: 'forecast', none: 'none known' };
