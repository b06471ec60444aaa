import { requireNonNegative, requireRange } from '@/scheduling/units';
import { solarDay, type SolarDay } from './extraterrestrial';

/**
 * Share of a day's solar radiation in each of equal steps of solar time, midnight to midnight.
 * The ratio of hourly to daily radiation follows Collares-Pereira and Rabl 1979 (Solar Energy 22:155), r = (π/24)(a + b cos ω)(cos ω − cos ωs)/(sin ωs − ωs cos ωs);
 * the shares are then scaled so that they add up to 1, which keeps the daily sum. In polar night all are zero.
 * @param sun - solar geometry of the day
 * @param steps - steps in the day, 24 for hours
 * @returns `steps` shares [–], none negative
 */
export function solarShares(sun: SolarDay, steps = 24): Float64Array {
  const shares = new Float64Array(steps);
  const sunset = sun.sunsetAngleRad;
  if (sunset <= 0) return shares;
  const a = 0.409 + 0.5016 * Math.sin(sunset - Math.PI / 3);
  const b = 0.6609 - 0.4767 * Math.sin(sunset - Math.PI / 3);
  const cosSunset = Math.cos(sunset);
  const width = (2 * Math.PI) / steps;
  let sum = 0;
  for (let i = 0; i < steps; i += 1) {
    const from = Math.max(-sunset, -Math.PI + i * width);
    const to = Math.min(sunset, -Math.PI + (i + 1) * width);
    if (to <= from) continue;
    // Exact integral of the formula over the lit part of the step: (a + b cos ω)(cos ω − cos ωs).
    const integral = (a - b * cosSunset) * (Math.sin(to) - Math.sin(from)) - a * cosSunset * (to - from)
      + b * ((to - from) / 2 + (Math.sin(2 * to) - Math.sin(2 * from)) / 4);
    const share = Math.max(0, integral);
    shares[i] = share;
    sum += share;
  }
  if (sum <= 0) {
    // The sun grazes the horizon: all of the little light falls around noon.
    shares[Math.floor(steps / 2)] = 1;
    return shares;
  }
  for (let i = 0; i < steps; i += 1) shares[i] = (shares[i] ?? 0) / sum;
  return shares;
}

/** Input of the hourly spread of a daily sum. */
export interface HourlySpread {
  latitudeDeg: number;
  /** J, 1-366 */
  day: number;
  /** The sum to spread, in any unit. */
  dailySum: number;
  /** Clock hour of solar noon [h]; 12 gives hours of solar time. */
  solarNoonHour?: number;
}

/**
 * Spreads a daily sum of something driven by sunlight (radiation, reference evapotranspiration) over 24 clock hours.
 * The sum of the hours equals the daily sum. In polar night the sum is spread evenly, as nothing tells the hours apart.
 * @returns 24 values in the unit of the sum
 * @throws PhysicsError for a negative or non-finite sum, with the field named
 */
export function spreadOverHours({ latitudeDeg, day, dailySum, solarNoonHour = 12 }: HourlySpread): number[] {
  requireRange('latitudeDeg', latitudeDeg, -90, 90);
  requireNonNegative('dailySum', dailySum);
  requireRange('solarNoonHour', solarNoonHour, 0, 24);
  const stepsPerHour = 12;
  const shares = solarShares(solarDay(latitudeDeg, day), 24 * stepsPerHour);
  const shift = Math.round((solarNoonHour - 12) * stepsPerHour);
  const hours = new Array<number>(24).fill(0);
  let sum = 0;
  for (let i = 0; i < shares.length; i += 1) {
    const at = (((i + shift) % shares.length) + shares.length) % shares.length;
    const hour = Math.floor(at / stepsPerHour);
    hours[hour] = (hours[hour] ?? 0) + (shares[i] ?? 0);
    sum += shares[i] ?? 0;
  }
  if (sum <= 0) return hours.map(() => dailySum / 24);
  return hours.map((share) => (share / sum) * dailySum);
}

/**
 * Air temperature at an hour between the night minimum and the afternoon maximum: a cosine between Tmin at 05:00 and Tmax at 15:00 solar time.
 * @param solarHour - 0-24 [h]
 * @returns [°C], always between both extremes
 * Source: de Wit, Goudriaan, van Laar 1978 (sine between extremes); the hours are common practice.
 */
export function temperatureAtHourC(tminC: number, tmaxC: number, solarHour: number): number {
  const coldestHour = 5;
  const warmestHour = 15;
  const sinceColdest = (((solarHour - coldestHour) % 24) + 24) % 24;
  const rise = warmestHour - coldestHour;
  const phase = sinceColdest <= rise ? sinceColdest / rise : 1 - (sinceColdest - rise) / (24 - rise);
  return tminC + ((tmaxC - tminC) * (1 - Math.cos(Math.PI * phase))) / 2;
}
