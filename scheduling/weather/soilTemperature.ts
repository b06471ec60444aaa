import { requireFinite, requireNonNegative } from '@/scheduling/units';

/** Days in the running mean of air temperature that predicts the soil at 10 cm. Zheng, Hunt, Running 1993. */
export const SOIL_TEMPERATURE_WINDOW_DAYS = 11;

/** Standard error of the prediction across the tested sites [°C]. Zheng, Hunt, Running 1993, abstract. */
export const SOIL_TEMPERATURE_ERROR_C = { least: 1.5, greatest: 2.9 } as const;

const RESPONSE_PER_DAY = 0.25;
const SNOW_RESPONSE_PER_DAY = 0.1;
const CANOPY_EXTINCTION = 0.5;

/** Input of `soilTemperaturesC`. */
export interface SoilTemperatureInput {
  /** Daily mean air temperatures, oldest first, without gaps [°C]. */
  airMeansC: readonly number[];
  /** Leaf area over the ground [m²/m²]: 0 for a seedbed, about 2-3 for mown grass. */
  leafAreaIndex?: number;
  /** Days with snow on the ground, same order; none when left out. */
  snow?: readonly boolean[];
}

/**
 * Trailing running means: each day with the days before it, up to the window.
 * @param values - oldest first
 * @param window - days
 * @returns as many means as values; the first ones use what there is
 */
export function trailingMeans(values: readonly number[], window: number): number[] {
  const means: number[] = [];
  for (let i = 0; i < values.length; i += 1) {
    const from = Math.max(0, i - window + 1);
    let sum = 0;
    for (let j = from; j <= i; j += 1) sum += values[j] ?? 0;
    means.push(sum / (i - from + 1));
  }
  return means;
}

/**
 * Daily mean soil temperature at 10 cm, near enough to seed depth for a daily mean.
 * Bare ground follows the 11-day running mean of the air. Under leaves the soil answers each day by a quarter of its distance from that
 * mean, damped by the leaves while it warms. Under snow the answer falls to a tenth, and soil that was not frozen stays at 0 °C or above.
 * The first ten days use a shorter mean and are less sure.
 * @returns one temperature for each day of air [°C]
 * @throws PhysicsError when a value is not finite
 * Source: Zheng, Hunt, Running 1993, Climate Research 2:183-191: running mean from its abstract, the coefficients 0.25, 0.10 and
 *   exp(−0.5 LAI) as coded in public ecosystem models; damping only while warming is common practice.
 */
export function soilTemperaturesC({ airMeansC, leafAreaIndex = 0, snow = [] }: SoilTemperatureInput): number[] {
  requireNonNegative('leafAreaIndex', leafAreaIndex);
  airMeansC.forEach((value, index) => requireFinite(`airMeansC[${index}]`, value));
  const smoothed = trailingMeans(airMeansC, SOIL_TEMPERATURE_WINDOW_DAYS);
  const damping = Math.exp(-CANOPY_EXTINCTION * leafAreaIndex);
  const soil: number[] = [];
  let before: number | null = null;
  for (let i = 0; i < smoothed.length; i += 1) {
    const target = smoothed[i] ?? 0;
    let today: number;
    if (before === null) today = target;
    else if (snow[i] === true) {
      const moved: number = before + (target - before) * SNOW_RESPONSE_PER_DAY;
      today = before >= 0 ? Math.max(0, moved) : moved;
    } else if (leafAreaIndex === 0) today = target;
    else today = before + (target - before) * RESPONSE_PER_DAY * (target > before ? damping : 1);
    soil.push(today);
    before = today;
  }
  return soil;
}

/**
 * Degree days of one day above a base temperature, from the mean of the extremes.
 * @returns [°C·d], never negative
 * Source: common practice (simple averaging).
 */
export function degreeDaysC(tminC: number, tmaxC: number, baseC: number): number {
  return Math.max(0, (requireFinite('tminC', tminC) + requireFinite('tmaxC', tmaxC)) / 2 - requireFinite('baseC', baseC));
}

/** Running sum of degree days of a series of daily mean temperatures (air or soil). @returns one running sum for each day [°C·d] */
export function degreeDaySumsC(meansC: readonly number[], baseC: number): number[] {
  let sum = 0;
  return meansC.map((mean, index) => {
    sum += Math.max(0, requireFinite(`meansC[${index}]`, mean) - baseC);
    return sum;
  });
}
