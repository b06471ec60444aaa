import type { SkipCause } from './contracts/rounds';

/** Causes of a skipped set in plain words. */
export const skipWords: Record<SkipCause, string> = {
  rain: 'It rains, or has rained',
  wind: 'Too windy',
  no_time: 'No time',
  not_at_home: 'Nobody at home',
  tap_trouble: 'Trouble with tap, hose or sprinkler',
  ground_wet: 'The ground is still wet',
  other: 'Another cause',
};
