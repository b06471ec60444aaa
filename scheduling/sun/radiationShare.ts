import { dayOfYear, requireNonNegative, requireRange, type CivilDay } from '@/scheduling/units';
import { extraterrestrialRadiationOfPeriodMjM2, sineOfSolarAltitude, solarDay, solarShares, type Assumption, type SolarDay } from '@/scheduling/weather';
import { erbsDiffuseFraction } from './diffuseFraction';

const STEPS_PER_DAY = 96;

/** Input of `radiationShare`. */
export interface RadiationShareInput {
  /** North positive [°]. */
  latitudeDeg: number;
  on: CivilDay;
  /** Hours of direct sun that somebody saw or entered for the zone [h]; null where nothing shades it. */
  sunHours: number | null;
  /** Day for which `sunHours` holds. The hidden horizon found for it then serves on every other day. Left out, the hours hold on `on` itself. */
  sunHoursOn?: CivilDay | null;
  /** Radiation in the open, Rs [MJ m⁻² d⁻¹]. */
  solarMjM2: number;
  /** Part of the sky that the zone sees, 0-1; null or left out takes the default below. */
  skyView?: number | null;
}

/** How much of the open radiation reaches a zone. */
export interface RadiationShare {
  /** Radiation in the zone over radiation in the open, 0-1 [–]. */
  radiationShare: number;
  /** Radiation in the zone [MJ m⁻² d⁻¹]. */
  shadedMjM2: number;
  /** Part of the direct light that arrives, 0-1 [–]. */
  beamShare: number;
  /** Diffuse part of the open radiation, 0-1 [–]. */
  diffuseFraction: number;
  /** Part of the sky seen, 0-1 [–]. */
  skyView: number;
  /** N [h] */
  daylightHours: number;
  /** Hours of direct sun on the day [h]. */
  sunHours: number;
  /** Height of the horizon that hides the sun [°]. */
  horizonDeg: number;
  assumptions: Assumption[];
}

/**
 * Sine of the height of an even horizon that leaves a number of hours of direct sun around noon.
 * Buildings, fences and trees hide the low sun first, so the hours left lie around noon.
 * @param sun - solar geometry of the day on which the hours were seen
 * @param sunHours - hours of direct sun [h]
 * @returns 0 for a sun that is never hidden, otherwise the sine of the height at the first and last sunny minute
 */
export function horizonSineFromSunHours(sun: SolarDay, sunHours: number): number {
  const halfAngle = Math.min(sun.sunsetAngleRad, (Math.max(0, sunHours) * Math.PI) / 24);
  return Math.min(1, Math.max(0, sineOfSolarAltitude(sun.latitudeRad, sun.declinationRad, halfAngle)));
}

/** Hours for which the sun stands above an even horizon. @returns [h], 0 to N */
export function sunHoursAboveHorizon(sun: SolarDay, horizonSine: number): number {
  const alongside = Math.cos(sun.latitudeRad) * Math.cos(sun.declinationRad);
  const constant = Math.sin(sun.latitudeRad) * Math.sin(sun.declinationRad);
  if (alongside < 1e-9) return constant > horizonSine ? sun.sunsetAngleRad * (24 / Math.PI) : 0;
  const cosine = (horizonSine - constant) / alongside;
  const halfAngle = Math.min(sun.sunsetAngleRad, Math.acos(Math.min(1, Math.max(-1, cosine))));
  return (halfAngle * 24) / Math.PI;
}

/**
 * Sky view taken where nobody gave one: the sun's half of the sky is hidden up to the horizon found from the sun hours, the other half is open.
 * An even horizon of height h all round leaves cos²h of the light of an even sky.
 * @returns 0.5 to 1 [–]
 */
export function defaultSkyView(horizonSine: number): number {
  return 1 - (horizonSine * horizonSine) / 2;
}

/**
 * Share of the open solar radiation that a zone with limited hours of sun receives on a day.
 * The day's radiation is spread over quarter hours, each is split into beam and diffuse light by Erbs; the beam counts while the sun stands
 * above the zone's horizon, the diffuse light by the sky view. The result goes into Penman–Monteith as radiation, never as a factor on ET.
 * @throws PhysicsError for impossible input, with the field named
 * Sources: Erbs, Klein, Duffie 1982; Collares-Pereira and Rabl 1979 for the spread; Feldhake et al. 1985 for the use of radiation.
 */
export function radiationShare({ latitudeDeg, on, sunHours, sunHoursOn, solarMjM2, skyView }: RadiationShareInput): RadiationShare {
  requireRange('latitudeDeg', latitudeDeg, -90, 90);
  requireNonNegative('solarMjM2', solarMjM2);
  if (sunHours !== null) requireRange('sunHours', sunHours, 0, 24);
  if (skyView !== null && skyView !== undefined) requireRange('skyView', skyView, 0, 1);
  const day = dayOfYear(on);
  const sun = solarDay(latitudeDeg, day);
  const assumptions: Assumption[] = [];

  let horizonSine = 0;
  let hoursToday = sun.daylightHours;
  if (sunHours !== null) {
    const seenSun = sunHoursOn ? solarDay(latitudeDeg, dayOfYear(sunHoursOn)) : sun;
    if (sunHours < seenSun.daylightHours) {
      horizonSine = horizonSineFromSunHours(seenSun, sunHours);
      hoursToday = sunHoursAboveHorizon(sun, horizonSine);
      assumptions.push({ field: 'sunHours', method: 'the hours of sun lie around noon, behind a horizon of even height', source: 'geometry; obstacles hide the low sun first' });
    }
  }
  const sky = skyView ?? defaultSkyView(horizonSine);
  if ((skyView === null || skyView === undefined) && horizonSine > 0) {
    assumptions.push({ field: 'skyView', method: 'half of the sky open, half hidden up to the horizon', source: 'view factor of an even sky' });
  }

  let direct = 0;
  let directSeen = 0;
  let diffuse = 0;
  if (solarMjM2 > 0 && sun.extraterrestrialMjM2 > 0) {
    const shares = solarShares(sun, STEPS_PER_DAY);
    const halfSeen = (hoursToday * Math.PI) / 24;
    const stepAngle = (2 * Math.PI) / STEPS_PER_DAY;
    for (let i = 0; i < STEPS_PER_DAY; i += 1) {
      const share = shares[i] ?? 0;
      if (share <= 0) continue;
      const angle = -Math.PI + (i + 0.5) * stepAngle;
      const extraterrestrial = extraterrestrialRadiationOfPeriodMjM2(sun, angle - stepAngle / 2, angle + stepAngle / 2);
      const radiation = share * solarMjM2;
      const diffuseNow = radiation * erbsDiffuseFraction(extraterrestrial > 0 ? radiation / extraterrestrial : 0);
      const seen = hoursToday <= 0 ? 0 : Math.min(1, Math.max(0, (halfSeen - Math.abs(angle)) / stepAngle + 0.5));
      diffuse += diffuseNow;
      direct += radiation - diffuseNow;
      directSeen += (radiation - diffuseNow) * seen;
    }
  }
  const total = direct + diffuse;
  const beamShare = horizonSine === 0 ? 1 : direct > 0 ? directSeen / direct : 0;
  const share = total > 0 ? Math.min(1, (beamShare * direct + sky * diffuse) / total) : sky;
  return {
    radiationShare: share,
    shadedMjM2: share * solarMjM2,
    beamShare,
    diffuseFraction: total > 0 ? diffuse / total : 1,
    skyView: sky,
    daylightHours: sun.daylightHours,
    sunHours: hoursToday,
    horizonDeg: (Math.asin(horizonSine) * 180) / Math.PI,
    assumptions,
  };
}
