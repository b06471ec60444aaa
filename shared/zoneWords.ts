import type { SprinklerKind } from './contracts/equipment';
import type { GrassId, SoilCompaction, SoilTexture } from './contracts/zones';

/** How grasses, soils and sprinklers are called on screens. */
export const grassWords: Record<GrassId, string> = {
  kentucky_bluegrass: 'Kentucky bluegrass', perennial_ryegrass: 'Perennial ryegrass', tall_fescue: 'Tall fescue', fine_fescue: 'Fine fescue', cool_mix: 'Cool-season mix',
  bermuda: 'Bermuda grass', zoysia: 'Zoysia', st_augustine: 'St. Augustine grass', buffalo: 'Buffalo grass', warm_mix: 'Warm-season mix',
};
export const soilWords: Record<SoilTexture, string> = {
  sand: 'Sand', loamy_sand: 'Loamy sand', sandy_loam: 'Sandy loam', loam: 'Loam', silt_loam: 'Silt loam', silt: 'Silt', silty_clay_loam: 'Silty clay loam', silty_clay: 'Silty clay', clay: 'Clay',
};
export const compactionWords: Record<SoilCompaction, string> = { loose: 'Loose', firm: 'Firm, walked on a lot', hard: 'Hard, driven on or built over' };
export const sprinklerKindWords: Record<SprinklerKind, string> = {
  oscillating: 'Oscillating (swinging bar)', impact: 'Impact (pulsating)', fixed: 'Fixed pattern', rotary: 'Rotary (whirling arms)', travelling: 'Travelling', soaker: 'Soaker hose', hand_wand: 'Hand wand',
};
