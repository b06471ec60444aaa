import { addDays, cFromFahrenheit, PhysicsError, type CivilDay } from '@/scheduling/units';
import { warmingSeasonStartOn, type SeasonDay } from './seasonDays';

/** Soil at 4 in at which the work may begin [°C]: 53 °F, Georgia extension (53 to 58 °F). */
export const PREVENTER_OPENS_C = cFromFahrenheit(53);
/** Soil at which crabgrass comes up when it holds for three days and the window is over [°C]: about 60 °F for 3 to 5 days, Indiana. */
export const PREVENTER_CLOSES_C = cFromFahrenheit(60);
const HOLDS_DAYS = 3;
/** How long a preventer works [d]: 60 to 120, Indiana. */
export const PREVENTER_LASTS_DAYS = { least: 60, most: 120 } as const;

/** What stands beside every answer. */
export const PREVENTER_CAUTIONS = [
  'The label of the product decides on date, rate, water-in and where it may be used.',
  'Nearly all of them stop lawn seed too, for months: on one spot a spring preventer or spring seed, not both.',
] as const;

export interface PreventerWindow {
  /** The soil is warm enough to begin; earlier is safe, as a preventer lasts. Null when not reached in the days given. */
  opensOn: CivilDay | null;
  /** Crabgrass comes up about here; later work misses some of it. Null when not reached in the days given. */
  closesOn: CivilDay | null;
  /** Put down on the opening day it works until between these days. */
  lastsUntilOn: { least: CivilDay; most: CivilDay } | null;
  /** The soil never was too cold in the days given: there is no opening to find. */
  isNeverCold: boolean;
  cautions: readonly string[];
  sources: readonly string[];
}

/**
 * When the soil calls for a crabgrass preventer in the warming half of a year.
 * @param days - consecutive days with soil temperatures, beginning at or before the warming half-year
 * @param latitudeDeg - north positive; south of the equator the warming half begins on July 1
 * @param year - year of the warming half
 * @throws PhysicsError when no day of the warming half is given
 * Sources: Georgia and Indiana extension. The thresholds were given for 4 in and for 1/4 in; the prediction is for 10 cm, so the end may come sooner on bare thin ground.
 */
export function preventerWindow(days: readonly SeasonDay[], latitudeDeg: number, year: number): PreventerWindow {
  const from = warmingSeasonStartOn(latitudeDeg, year);
  const until = addDays(from, 183);
  const half = days.filter((day) => day.on >= from && day.on < until);
  if (half.length === 0) throw new PhysicsError('days', days.length, `must reach into the half-year from ${from}`);
  const heldOn = (leastC: number): CivilDay | null => {
    let held = 0;
    for (const day of half) {
      held = day.soilC >= leastC ? held + 1 : 0;
      if (held === HOLDS_DAYS) return day.on;
    }
    return null;
  };
  const isNeverCold = half.every((day) => day.soilC >= PREVENTER_OPENS_C);
  const opensOn = isNeverCold ? null : heldOn(PREVENTER_OPENS_C);
  return {
    opensOn, closesOn: isNeverCold ? null : heldOn(PREVENTER_CLOSES_C), isNeverCold,
    lastsUntilOn: opensOn === null ? null : { least: addDays(opensOn, PREVENTER_LASTS_DAYS.least), most: addDays(opensOn, PREVENTER_LASTS_DAYS.most) },
    cautions: PREVENTER_CAUTIONS,
    sources: ['Georgia extension: 53 to 58 °F at 4 in', 'Indiana extension: crabgrass at about 60 °F for 3 to 5 days; lasts 60 to 120 days', 'soil temperature after Zheng, Hunt, Running 1993'],
  };
}
