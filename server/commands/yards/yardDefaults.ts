import { planDefaults } from '@/scheduling/planning/planDefaults';
import type { GrassId, SoilCompaction, SoilTexture } from '@/shared/contracts/zones';
import type { MinuteWindow } from '@/shared/contracts/common';

/**
 * What a yard starts with until its people say otherwise. Each is stored with a flag that the screens show as "default".
 */
export const yardDefaults = {
  /** Sea level, until the weather service tells the height of the place [m]. FAO-56 eq. 7: 100 m change the pressure by about 1 %. */
  elevationM: 0,
  /** Minutes for one move of the hose. Source as in planDefaults. */
  moveMinutes: planDefaults.moveMinutes,
  /** Time between the morning reminder and the start of the first set [min]. Common practice. */
  reminderLeadMinutes: 30,
  /** Stage of water shortage: none, until somebody hears of one. */
  waterStage: 0,
  /** Flow of an outside tap through a half-inch hose [L/min]: 5 US gallons a minute, Penn State Extension's planning figure. A bucket test replaces it. */
  flowLpm: 18.9,
} as const;

/** Hours at home of a household that works on weekdays. Common practice. Index 0 is Sunday. */
export const defaultHours: readonly (MinuteWindow & { weekday: number })[] = [0, 1, 2, 3, 4, 5, 6].flatMap((weekday) => (
  weekday === 0 || weekday === 6
    ? [{ weekday, fromMinutes: 7 * 60, toMinutes: 11 * 60 }]
    : [{ weekday, fromMinutes: 6 * 60, toMinutes: 7 * 60 + 30 }, { weekday, fromMinutes: 18 * 60, toMinutes: 20 * 60 }]
));

/** Latitude that parts cool-season from warm-season lawns: the middle of the transition zone of the eastern United States. Common practice. */
const warmGrassBelowDeg = 36;

/** Grass taken for a place until somebody names it: a mixture of cool-season grasses away from the equator, of warm-season ones nearer to it. */
export function defaultGrass(latitudeDeg: number): GrassId {
  return Math.abs(latitudeDeg) >= warmGrassBelowDeg ? 'cool_mix' : 'warm_mix';
}

export const zoneDefaults = {
  /** The middle of the texture triangle: holds and takes in neither most nor least. Common practice. */
  soil: 'loam' as SoilTexture,
  /** Lawns laid beside houses fall 1 to 2 % so that rain runs off from the walls. Common practice. */
  slopePct: 1,
  /** Hours of direct sun: two thirds of a twelve-hour day, for a lawn that loses the low sun to houses and trees. Common practice. */
  sunHours: 8,
  /** Month and day on which the default hours hold: day and night are equal, as the two thirds of twelve hours suppose. */
  sunHoursOnMonthDay: '03-20',
  /** Neither trodden nor driven on: the ground of the published intake tables. */
  compaction: 'loose' as SoilCompaction,
  /** No tree whose roots drink here, until somebody names one. */
  treeRootShare: 0,
  /** Leaves all over: the turf of the published coefficients. */
  coverFraction: 1,
  /** Served after every zone to which somebody gave a place. */
  priority: 100,
} as const;
