import type { GrassId, Mulch, SoilTexture, ZoneResponse } from '@/shared/contracts/zones';
import type { SprinklerKind, PositionResponse } from '@/shared/contracts/equipment';

export const grassWords: Record<GrassId, string> = {
  kentucky_bluegrass: 'Kentucky bluegrass', perennial_ryegrass: 'Perennial ryegrass', tall_fescue: 'Tall fescue', fine_fescue: 'Fine fescue', cool_mix: 'Cool-season mix',
  bermuda: 'Bermuda grass', zoysia: 'Zoysia', st_augustine: 'St. Augustine grass', buffalo: 'Buffalo grass', warm_mix: 'Warm-season mix',
};
export const soilWords: Record<SoilTexture, string> = {
  sand: 'Sand', loamy_sand: 'Loamy sand', sandy_loam: 'Sandy loam', loam: 'Loam', silt_loam: 'Silt loam', silt: 'Silt', silty_clay_loam: 'Silty clay loam', silty_clay: 'Silty clay', clay: 'Clay',
};
export const mulchWords: Record<Mulch, string> = { none: 'No cover', straw: 'Straw', peat: 'Peat', compost: 'Compost' };
export const sprinklerWords: Record<SprinklerKind, string> = {
  oscillating: 'Oscillating (swinging bar)', impact: 'Impact (pulsating)', fixed: 'Fixed pattern', rotary: 'Rotary (whirling arms)', travelling: 'Travelling', soaker: 'Soaker hose', hand_wand: 'Hand wand',
};
export const rateSourceWords: Record<PositionResponse['rateSource'], string> = { catch_test: 'from a catch-cup test', flow_and_area: 'from flow and wetted area', default: 'a default' };
export const expiryWords: Record<NonNullable<PositionResponse['testExpiredBecause']>, string> = {
  tap_changed: 'its test was made at another tap', hose_changed: 'its test was made with another hose', sprinkler_changed: 'its test was made with another sprinkler', season_changed: 'its test is from another season',
};

/** Words for the facts of a zone, each with its mark when it is a default. */
export function zoneFacts(zone: ZoneResponse): string[] {
  const mark = (isDefault: boolean) => (isDefault ? ' (default)' : '');
  return [
    `${grassWords[zone.grass]}${mark(zone.grassIsDefault)}`, `${soilWords[zone.soil].toLowerCase()}${mark(zone.soilIsDefault)}`,
    `${zone.sunHours.toFixed(zone.sunHours % 1 === 0 ? 0 : 1)} h of sun${mark(zone.sunHoursIsDefault)}`, `slope ${zone.slopePct.toFixed(0)} %${mark(zone.slopeIsDefault)}`,
  ];
}
