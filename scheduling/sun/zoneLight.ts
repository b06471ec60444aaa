import { civilDayParts, dayOfYear, daysInMonth, PhysicsError, requireNonNegative, requireRange, type CivilDay } from '@/scheduling/units';
import { extraterrestrialRadiationOfPeriodMjM2, shadedReferenceEtMm, solarDay, solarShares, type DailyReferenceEt, type SolarDay } from '@/scheduling/weather';
import { erbsDiffuseFraction } from './diffuseFraction';
import { exposureDayIndex, type ZoneExposure } from './yearOfExposure';

/** Light of a day taken apart by the hours of solar time. */
export interface HourlyLight {
  /** Straight light by hour [MJ m⁻² h⁻¹]. */
  beamMjM2: Float64Array;
  /** Scattered light by hour [MJ m⁻² h⁻¹]. */
  diffuseMjM2: Float64Array;
}

const HOUR_RAD = Math.PI / 12;

/**
 * Spreads the radiation of a day over its hours and takes each hour apart into straight and scattered light.
 * The fits of the scattered part were made on hours: never on the sum of a day.
 * @param solarMjM2 - Rs [MJ m⁻² d⁻¹]
 * @returns both parts, which together add up to the day
 * Sources: Collares-Pereira and Rabl 1979 for the spread; Erbs, Klein, Duffie 1982 for the split
 */
export function hourlyLight(sun: SolarDay, solarMjM2: number): HourlyLight {
  requireNonNegative('solarMjM2', solarMjM2);
  const beamMjM2 = new Float64Array(24);
  const diffuseMjM2 = new Float64Array(24);
  const shares = solarShares(sun, 24);
  for (let hour = 0; hour < 24; hour += 1) {
    const radiation = (shares[hour] ?? 0) * solarMjM2;
    if (radiation <= 0) continue;
    const above = extraterrestrialRadiationOfPeriodMjM2(sun, -Math.PI + hour * HOUR_RAD, -Math.PI + (hour + 1) * HOUR_RAD);
    const diffuse = radiation * erbsDiffuseFraction(above > 0 ? radiation / above : 0);
    diffuseMjM2[hour] = diffuse;
    beamMjM2[hour] = radiation - diffuse;
  }
  return { beamMjM2, diffuseMjM2 };
}

/** Light of one zone on one day. */
export interface ZoneLight {
  /** Radiation in the zone over radiation in the open, 0-1 [–]. */
  radiationShare: number;
  shadedMjM2: number;
  /** Part of the straight light that arrives, 0-1 [–]. */
  beamShare: number;
  /** Scattered part of the open radiation, 0-1 [–]. */
  diffuseFraction: number;
  skyView: number;
  /** Hours of direct sun; behind a crown they count for what passes it [h]. */
  sunHours: number;
}

function lightOf(exposure: ZoneExposure, index: number, sun: SolarDay, solarMjM2: number): ZoneLight {
  const { beamMjM2, diffuseMjM2 } = hourlyLight(sun, solarMjM2);
  const skyView = exposure.skyView[index] ?? 1;
  let beam = 0;
  let seen = 0;
  let diffuse = 0;
  for (let hour = 0; hour < 24; hour += 1) {
    beam += beamMjM2[hour] ?? 0;
    seen += (beamMjM2[hour] ?? 0) * (exposure.beamByHour[index * 24 + hour] ?? 0);
    diffuse += diffuseMjM2[hour] ?? 0;
  }
  const total = beam + diffuse;
  const radiationShare = total > 0 ? Math.min(1, (seen + skyView * diffuse) / total) : skyView;
  return {
    radiationShare, shadedMjM2: radiationShare * solarMjM2, beamShare: beam > 0 ? seen / beam : 0, diffuseFraction: total > 0 ? diffuse / total : 1,
    skyView, sunHours: exposure.directSunHours[index] ?? 0,
  };
}

/** Input of `zoneLight`. */
export interface ZoneLightInput {
  exposure: ZoneExposure;
  latitudeDeg: number;
  on: CivilDay;
  /** Radiation in the open, Rs [MJ m⁻² d⁻¹]. */
  solarMjM2: number;
}

/**
 * Light that reaches a zone on a day: each hour's straight light by what the sun's way lets through, scattered light by the sky view.
 * @throws PhysicsError for impossible input, with the field named
 * Sources: Erbs, Klein, Duffie 1982 by the hour; geometry of `yearOfExposure`
 */
export function zoneLight({ exposure, latitudeDeg, on, solarMjM2 }: ZoneLightInput): ZoneLight {
  requireRange('latitudeDeg', latitudeDeg, -90, 90);
  const { month, day } = civilDayParts(on);
  return lightOf(exposure, exposureDayIndex(exposure, month, day), solarDay(latitudeDeg, dayOfYear(on)), solarMjM2);
}

/**
 * Reference evapotranspiration of a zone in its own light: the radiation that reaches it goes into Penman–Monteith. Grass follows today's light.
 * @param open - reference ET of the same day in the open
 * @returns [mm/d]
 * Source: FAO-56 (6); Feldhake, Butler, Danielson 1985
 */
export function zoneReferenceEtMm(open: DailyReferenceEt, exposure: ZoneExposure, latitudeDeg: number, on: CivilDay): number {
  return shadedReferenceEtMm(open, zoneLight({ exposure, latitudeDeg, on, solarMjM2: open.radiationMjM2 }));
}

/** Rs over Ra taken for a typical day: FAO-56 (35) with three fifths of the possible sunshine, 0.25 + 0.5 × 0.6. Common practice. */
export const TYPICAL_CLEARNESS = 0.55;

/** A month of a zone's light. */
export interface ExposureMonth {
  /** 1-12 */
  month: number;
  /** Mean of the month [h/d]. */
  directSunHours: number;
  /** Hours of sun on a flat horizon, mean of the month [h/d]. */
  openSunHours: number;
  /** Radiation in the zone over radiation in the open [–]; the sky view in polar night. */
  radiationShare: number;
  /** Mean of the month [–]. */
  skyView: number;
}

/**
 * Months of a zone's light under a typical sky.
 * @param clearness - Rs over Ra of a typical day, one figure or one a month [–]
 * @returns twelve months
 * @throws PhysicsError for a clearness outside 0-1
 */
export function exposureMonths(exposure: ZoneExposure, latitudeDeg: number, clearness: number | readonly number[] = TYPICAL_CLEARNESS): ExposureMonth[] {
  requireRange('latitudeDeg', latitudeDeg, -90, 90);
  if (typeof clearness !== 'number' && clearness.length !== 12) throw new PhysicsError('clearness', clearness.length, 'must have twelve months');
  let index = 0;
  return Array.from({ length: 12 }, (_, at): ExposureMonth => {
    const kt = requireRange('clearness', typeof clearness === 'number' ? clearness : clearness[at] ?? Number.NaN, 0, 1);
    const days = daysInMonth(exposure.year, at + 1);
    let direct = 0;
    let open = 0;
    let sky = 0;
    let shadedMjM2 = 0;
    let openMjM2 = 0;
    for (let day = 0; day < days; day += 1, index += 1) {
      const sun = solarDay(latitudeDeg, index + 1);
      const light = lightOf(exposure, index, sun, kt * sun.extraterrestrialMjM2);
      direct += light.sunHours;
      open += exposure.openSunHours[index] ?? 0;
      sky += light.skyView;
      shadedMjM2 += light.shadedMjM2;
      openMjM2 += kt * sun.extraterrestrialMjM2;
    }
    return { month: at + 1, directSunHours: direct / days, openSunHours: open / days, skyView: sky / days, radiationShare: openMjM2 > 0 ? shadedMjM2 / openMjM2 : sky / days };
  });
}
