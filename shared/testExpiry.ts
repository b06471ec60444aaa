import type { TestExpiryCause } from './contracts/equipment';

/** Why a catch-cup test no longer describes its position, in a few words behind 'Expired:'. */
export const testExpiryWords: Record<TestExpiryCause, string> = {
  tap_changed: 'the tap is another one since',
  hose_changed: 'the hose changed since',
  sprinkler_changed: 'the sprinkler changed since',
  season_changed: 'it is half a year old, and pressure and wind change with the season',
};
