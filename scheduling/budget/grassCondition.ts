import type { GrassFamily } from '@/scheduling/grass';
import { requireNonNegative } from '@/scheduling/units';
import type { DailyWeather } from '@/scheduling/weather';
import { SOIL_TEMPERATURE_WINDOW_DAYS } from '@/scheduling/weather';

/** What state grass is in, as far as its use of water goes. */
export type GrassCondition = 'growing' | 'resting' | 'frosted' | 'snow';

/** Kc of a lawn that rests in summer: the low end of the figures for grass killed by frost [–]. Common practice. */
export const RESTING_COEFFICIENT = 0.3;
/** Kc of grass after a killing frost: the middle of 0.30-0.40 [–]. FAO-56 table 18 and Wright 1993. */
export const FROSTED_COEFFICIENT = 0.35;
/** Water used with half or more of the ground under snow [mm/d]. FAO-56 chapter 11. */
export const SNOW_ET_MM = 0.4;

/** Night temperature that browns grass [°C]: 28 °F for warm-season grass, harder frost for cool-season grass. Common practice. */
export const KILLING_FROST_C: Readonly<Record<GrassFamily, number>> = { cool: -6, warm: -2.2 };
/** Mean air temperature of eleven days above which grass greens up again [°C]. Common practice. */
export const GREEN_UP_C: Readonly<Record<GrassFamily, number>> = { cool: 5, warm: 13 };

/** Precipitation falls as snow at or below this mean of the day [°C]. Common practice. */
const SNOW_MEAN_C = 0.5;
/** Snow melted by each degree of the day's mean above freezing [mm/(°C·d)]: middle of the usual 2-5, from memory. */
const MELT_MM_PER_C = 3;
/** Water in snow that covers at least half of a lawn [mm]: about 5 cm of snow. Common practice. */
const COVERING_SNOW_MM = 5;

/** What winter hands on from one day to the next. */
export interface WinterState {
  /** Browned by frost and not yet green again, with or without snow on it. */
  isFrosted: boolean;
  /** Water that lies as snow [mm]. */
  snowMm: number;
}

/** State of the grass on a day; frost and snow as they are at its end. */
export interface WinterDay extends WinterState {
  condition: 'growing' | 'frosted' | 'snow';
}

/** Where a row of days begins in the middle of a winter. */
export interface WinterStart extends WinterState {
  /** Mean temperatures of the days before the row, oldest first [°C]; the last eleven count. */
  meansBeforeC?: readonly number[];
}

/**
 * Frost and snow from daily temperatures and precipitation: brown from a killing frost until eleven days are warm enough, under snow while enough of it
 * lies. Days without temperatures change nothing.
 * @param days - consecutive, oldest first
 * @param start - what the day before left; green and bare when left out
 * @returns one state for each day
 */
export function winterDays(family: GrassFamily, days: readonly Pick<DailyWeather, 'tminC' | 'tmaxC' | 'precipitationMm'>[], start: WinterStart = { isFrosted: false, snowMm: 0 }): WinterDay[] {
  let isFrosted = start.isFrosted;
  let snowMm = requireNonNegative('start.snowMm', start.snowMm);
  const means: number[] = [...(start.meansBeforeC ?? [])].slice(-SOIL_TEMPERATURE_WINDOW_DAYS);
  return days.map(({ tminC, tmaxC, precipitationMm }) => {
    if (tminC !== null && tmaxC !== null) {
      const meanC = (tminC + tmaxC) / 2;
      means.push(meanC);
      if (means.length > SOIL_TEMPERATURE_WINDOW_DAYS) means.shift();
      const smoothedC = means.reduce((sum, value) => sum + value, 0) / means.length;
      if (meanC <= SNOW_MEAN_C) snowMm += precipitationMm ?? 0;
      snowMm = Math.max(0, snowMm - MELT_MM_PER_C * Math.max(0, meanC));
      if (tminC <= KILLING_FROST_C[family]) isFrosted = true;
      else if (smoothedC >= GREEN_UP_C[family]) isFrosted = false;
    }
    return { condition: snowMm >= COVERING_SNOW_MM ? 'snow' : isFrosted ? 'frosted' : 'growing', isFrosted, snowMm };
  });
}
