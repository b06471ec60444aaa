import { daysInMonth, epochDayOf, civilDayOf, isLeapYear, PhysicsError, requireRange } from '@/scheduling/units';
import type { Assumption } from '@/scheduling/weather';
import { heightAtDeg, requireHorizon, type Horizon } from './horizon';
import { leafSeasonOf, leafShare, type LeafSeason } from './leafSeason';
import { crownTransmissivity, requireObstacles, requirePoint, TRANSMISSIVITY_SOURCE, type Obstacle, type PlanePoint } from './obstacles';
import { binAzimuthRad, binOfAzimuth, COARSE_SKY, SKYLINE_BINS, skylineOf, skyViewsOf, type Skyline } from './skyline';
import { apparentSunsetAngleRad, solarCoordinates, sunDirection } from './solarCoordinates';

/** A zone by the points for which its light is reckoned, or by a horizon that somebody's diary told. */
export type ExposureZone =
  | { id: string; points: readonly PlanePoint[]; horizon?: undefined }
  | { id: string; horizon: Horizon; points?: undefined };

/** Input of `yearOfExposure`. */
export interface YearOfExposureInput {
  /** North positive [°]. */
  latitudeDeg: number;
  /** East positive [°]. */
  longitudeDeg: number;
  obstacles: readonly Obstacle[];
  zones: readonly ExposureZone[];
  /** Step of the sun's way [min]: a divisor of 60. */
  stepMinutes?: number;
  /** Year whose sun is taken; leap years have 366 days. */
  year?: number;
}

/** Direct light and sky of one zone through a year. Indexed by day, 0 on 1 January. */
export interface ZoneExposure {
  zoneId: string;
  year: number;
  /** Hours of direct sun, mean over the zone's points; an hour behind a crown counts for the part of the sunlight that passes it [h]. */
  directSunHours: Float32Array;
  /** Hours of sun on a flat horizon [h]. */
  openSunHours: Float32Array;
  /** Part of the straight sunlight that arrives, by day and hour of solar time, [day × 24 + hour], mean over the points [–]. */
  beamByHour: Float32Array;
  /** Part of the diffuse light that arrives [–]. */
  skyView: Float32Array;
  assumptions: Assumption[];
}

/** Year taken where none is given; the sun's way differs by less than a quarter of a degree between years. */
const DEFAULT_YEAR = 2026;
/** Declinations for which the light is traced [°]: from −23.5 to 23.5 in steps of a half; days between are interpolated. */
const FIRST_DECLINATION_DEG = -23.5;
const DECLINATION_STEP_DEG = 0.5;
const DECLINATION_ROWS = 95;
/** Steps into which the share of the leaves is rounded, so that days share their rows. */
const LEAF_STEPS = 8;
/** The same for the sky view, which changes little with it. */
const SKY_LEAF_STEPS = 2;
const DEGREE = Math.PI / 180;
const DAY_MS = 86_400_000;

/** Part of the beam that reaches each zone along one declination with one state of the leaves, [zone × steps + step]. */
type Row = Float32Array;

/** Least and greatest tangent of a table over the points of each zone. */
interface Bounds {
  least: Float32Array;
  greatest: Float32Array;
}

interface Scene {
  skyline: Skyline;
  /** First point of each zone, and one behind the last. */
  zoneStarts: Int32Array;
  /** Bounds of the opaque outline, [bin × zones + zone]: most of the time they tell without looking at the points. */
  opaqueBounds: Bounds;
  /** Lowest foot and highest top of a crown, [(tree × bins + bin) × zones + zone]; a top of 0 where the crown is not. */
  crownBounds: Bounds;
  latitudeRad: number;
  steps: number;
}

/** Bounds of a table of points, zone by zone. */
function boundsOf(lows: Float32Array, highs: Float32Array, slots: number, pointCount: number, zoneStarts: Int32Array, isUsed: (slot: number) => boolean): Bounds {
  const zoneCount = zoneStarts.length - 1;
  const bounds: Bounds = { least: new Float32Array(slots * zoneCount), greatest: new Float32Array(slots * zoneCount) };
  for (let slot = 0; slot < slots; slot += 1) {
    if (!isUsed(slot)) continue;
    for (let zone = 0; zone < zoneCount; zone += 1) {
      let least = Infinity;
      let greatest = 0;
      for (let point = zoneStarts[zone] ?? 0; point < (zoneStarts[zone + 1] ?? 0); point += 1) {
        const low = lows[slot * pointCount + point] ?? 0;
        const high = highs[slot * pointCount + point] ?? 0;
        if (low < least) least = low;
        if (high > greatest) greatest = high;
      }
      bounds.least[slot * zoneCount + zone] = least;
      bounds.greatest[slot * zoneCount + zone] = greatest;
    }
  }
  return bounds;
}

/** Traces the sun's way along one declination: every step for every point. Steps with the sun down take the light at its rise or set. */
function traceRow(scene: Scene, declinationRad: number, transmissivities: readonly number[]): Row {
  const { skyline, zoneStarts, opaqueBounds, crownBounds, latitudeRad, steps } = scene;
  const { pointCount, opaque, crownLow, crownHigh, crownSeen, trees } = skyline;
  const zoneCount = zoneStarts.length - 1;
  const row: Row = new Float32Array(zoneCount * steps);
  const sunset = apparentSunsetAngleRad(latitudeRad, declinationRad);
  const width = (2 * Math.PI) / steps;
  const light = new Float32Array(pointCount);
  let before = Number.NaN;
  for (let step = 0; step < steps; step += 1) {
    const from = Math.min(sunset, Math.max(-sunset, -Math.PI + step * width));
    const until = Math.min(sunset, Math.max(-sunset, -Math.PI + (step + 1) * width));
    const hourAngle = (from + until) / 2;
    if (hourAngle === before) {
      for (let at = step; at < row.length; at += steps) row[at] = row[at - 1] ?? 0;
      continue;
    }
    before = hourAngle;
    const { azimuthRad, altitudeRad } = sunDirection(latitudeRad, declinationRad, hourAngle);
    const tangent = Math.tan(Math.min(Math.PI / 2 - 1e-9, Math.max(1e-6, altitudeRad)));
    const bin = binOfAzimuth(azimuthRad);
    const base = bin * pointCount;
    for (let zone = 0; zone < zoneCount; zone += 1) {
      const first = zoneStarts[zone] ?? 0;
      const end = zoneStarts[zone + 1] ?? first;
      if ((opaqueBounds.least[bin * zoneCount + zone] ?? 0) > tangent) continue;
      const walled = (opaqueBounds.greatest[bin * zoneCount + zone] ?? 0) > tangent;
      let touched = walled;
      for (let point = first; point < end; point += 1) light[point] = walled && (opaque[base + point] ?? 0) > tangent ? 0 : 1;
      for (let tree = 0; tree < trees.length; tree += 1) {
        const slot = tree * SKYLINE_BINS + bin;
        if (crownSeen[slot] !== 1) continue;
        const bound = slot * zoneCount + zone;
        if (tangent <= (crownBounds.least[bound] ?? 0) || tangent >= (crownBounds.greatest[bound] ?? 0)) continue;
        touched = true;
        const through = transmissivities[tree] ?? 1;
        const at = slot * pointCount;
        for (let point = first; point < end; point += 1) {
          if (tangent > (crownLow[at + point] ?? 0) && tangent < (crownHigh[at + point] ?? 0)) light[point] = (light[point] ?? 0) * through;
        }
      }
      let sum = end - first;
      if (touched) {
        sum = 0;
        for (let point = first; point < end; point += 1) sum += light[point] ?? 0;
      }
      row[zone * steps + step] = sum / (end - first);
    }
  }
  return row;
}

function sceneOf(input: YearOfExposureInput, steps: number): Scene {
  const points: PlanePoint[] = [];
  const starts: number[] = [0];
  input.zones.forEach((zone, index) => {
    if (zone.points) {
      if (zone.points.length === 0) throw new PhysicsError(`zones[${index}].points`, 0, 'must have a point');
      zone.points.forEach((point, at) => requirePoint(`zones[${index}].points[${at}]`, point));
      points.push(...zone.points);
    } else {
      requireHorizon(`zones[${index}].horizon`, zone.horizon);
      points.push({ eastM: 0, northM: 0 });
    }
    starts.push(points.length);
  });
  const skyline = skylineOf(points, input.obstacles);
  const { pointCount, opaque, trees, crownLow, crownHigh } = skyline;
  // A horizon from a diary holds everything that was seen: obstacles of the drawing do not come on top of it.
  input.zones.forEach((zone, index) => {
    if (!zone.horizon) return;
    const at = starts[index] ?? 0;
    for (let bin = 0; bin < SKYLINE_BINS; bin += 1) {
      opaque[bin * pointCount + at] = Math.tan(Math.min(89.9, heightAtDeg(zone.horizon, binAzimuthRad(bin) / DEGREE)) * DEGREE);
      for (let tree = 0; tree < trees.length; tree += 1) {
        crownLow[(tree * SKYLINE_BINS + bin) * pointCount + at] = 0;
        crownHigh[(tree * SKYLINE_BINS + bin) * pointCount + at] = 0;
      }
    }
  });
  const zoneStarts = Int32Array.from(starts);
  return {
    skyline, zoneStarts, latitudeRad: input.latitudeDeg * DEGREE, steps,
    opaqueBounds: boundsOf(opaque, opaque, SKYLINE_BINS, pointCount, zoneStarts, () => true),
    crownBounds: boundsOf(crownLow, crownHigh, trees.length * SKYLINE_BINS, pointCount, zoneStarts, (slot) => skyline.crownSeen[slot] === 1),
  };
}

function assumptionsOf(input: YearOfExposureInput, zone: ExposureZone): Assumption[] {
  const found: Assumption[] = [];
  if (zone.horizon) return [...zone.horizon.assumptions];
  const trees = input.obstacles.flatMap((obstacle) => (obstacle.kind === 'tree' ? [obstacle] : []));
  if (trees.some((tree) => !tree.transmissivity)) {
    found.push({ field: 'transmissivity', method: 'crowns let a fifth of the light through in leaf, three fifths bare', source: TRANSMISSIVITY_SOURCE });
  }
  const guessed = trees.find((tree) => tree.leaves === 'deciduous' && !(tree.leafOutDay && tree.leafFallDay));
  if (guessed) found.push({ field: 'leafOutDay', method: 'time in leaf taken by latitude', source: leafSeasonOf(guessed, input.latitudeDeg).source });
  return found;
}

/** Rows of light, traced when first asked for. */
class Rows {
  private readonly rows = new Map<string, (Row | undefined)[]>();
  private readonly skies = new Map<string, Float32Array>();

  constructor(private readonly scene: Scene) {}

  of(key: string, transmissivities: readonly number[]): (index: number) => Row {
    const known = this.rows.get(key) ?? new Array<Row | undefined>(DECLINATION_ROWS);
    this.rows.set(key, known);
    return (index) => {
      const row = known[index] ?? traceRow(this.scene, (FIRST_DECLINATION_DEG + index * DECLINATION_STEP_DEG) * DEGREE, transmissivities);
      known[index] = row;
      return row;
    };
  }

  /** Sky view of every zone. */
  skyOf(key: string, transmissivities: readonly number[]): Float32Array {
    const known = this.skies.get(key);
    if (known) return known;
    const { skyline, zoneStarts } = this.scene;
    const views = skyViewsOf(skyline, transmissivities, COARSE_SKY);
    const sky = new Float32Array(zoneStarts.length - 1);
    for (let zone = 0; zone < sky.length; zone += 1) {
      const first = zoneStarts[zone] ?? 0;
      const end = zoneStarts[zone + 1] ?? first;
      let sum = 0;
      for (let point = first; point < end; point += 1) sum += views[point] ?? 0;
      sky[zone] = sum / (end - first);
    }
    this.skies.set(key, sky);
    return sky;
  }
}

/**
 * Direct light and sky of every zone of a yard through a whole year.
 * The outline of what hides the sky is found once for each point in one-degree directions; the sun's way is traced for 95 declinations half a
 * degree apart and for nine states of the leaves, and every day is interpolated between. Against testing each ray with the sun of the almanac, the hours of a
 * zone's day differ by less than a quarter of an hour and the beam of a month by less than 0.015 (tests/scheduling/sun/yearOfExposure.test.ts).
 * @returns one exposure for each zone, in order
 * @throws PhysicsError for impossible places, obstacles, points or steps, with the field named
 * Sources: Meeus chapters 25 and 28 for the sun; obstacles as in `requireObstacles`, crowns as in `DEFAULT_TRANSMISSIVITY`
 */
export function yearOfExposure(input: YearOfExposureInput): ZoneExposure[] {
  const latitudeDeg = requireRange('latitudeDeg', input.latitudeDeg, -90, 90);
  requireRange('longitudeDeg', input.longitudeDeg, -180, 180);
  const year = requireRange('year', input.year ?? DEFAULT_YEAR, 1900, 2100);
  const stepMinutes = input.stepMinutes ?? 10;
  if (!Number.isInteger(stepMinutes) || stepMinutes < 1 || 60 % stepMinutes !== 0) throw new PhysicsError('stepMinutes', stepMinutes, 'must divide an hour');
  requireObstacles(input.obstacles);
  const steps = 1440 / stepMinutes;
  const stepsPerHour = 60 / stepMinutes;
  const scene = sceneOf(input, steps);
  const rows = new Rows(scene);
  const { skyline, latitudeRad } = scene;
  const seasons: LeafSeason[] = skyline.trees.map((tree) => leafSeasonOf(tree, latitudeDeg));
  const crowns = skyline.trees.map(crownTransmissivity);
  const dayCount = isLeapYear(year) ? 366 : 365;
  const firstDay = epochDayOf(civilDayOf({ year, month: 1, day: 1 }));
  const zoneCount = input.zones.length;
  const exposures = input.zones.map((zone): ZoneExposure => ({
    zoneId: zone.id, year, directSunHours: new Float32Array(dayCount), openSunHours: new Float32Array(dayCount),
    beamByHour: new Float32Array(dayCount * 24), skyView: new Float32Array(dayCount), assumptions: assumptionsOf(input, zone),
  }));

  const width = (2 * Math.PI) / steps;
  const noonMs = (day: number) => (firstDay + day) * DAY_MS + DAY_MS / 2 - input.longitudeDeg * (DAY_MS / 360);
  const lit = new Float64Array(steps);
  const weight = new Float64Array(steps);
  const lowerRow = new Int32Array(steps);
  const upperPart = new Float64Array(steps);
  for (let day = 0; day < dayCount; day += 1) {
    const shares = seasons.map((season) => leafShare(season, day + 1));
    const inSteps = (count: number) => shares.map((share) => Math.round(share * count) / count);
    const throughAt = (rounded: readonly number[]) => crowns.map(({ inLeaf, bare }, tree) => bare + (inLeaf - bare) * (rounded[tree] ?? 1));
    const beamLeaves = inSteps(LEAF_STEPS);
    const skyLeaves = inSteps(SKY_LEAF_STEPS);
    const rowAt = rows.of(beamLeaves.join(' '), throughAt(beamLeaves));
    const declination = solarCoordinates(noonMs(day)).declinationRad;
    const perTurn = solarCoordinates(noonMs(day + 1)).declinationRad - declination;
    const sunset = apparentSunsetAngleRad(latitudeRad, declination);
    let openHours = 0;
    for (let step = 0; step < steps; step += 1) {
      const from = -Math.PI + step * width;
      const middle = from + width / 2;
      const share = Math.max(0, Math.min(sunset, from + width) - Math.max(-sunset, from)) / width;
      lit[step] = share;
      openHours += share / stepsPerHour;
      const now = declination + (perTurn * middle) / (2 * Math.PI);
      weight[step] = share * Math.max(0.001, Math.sin(latitudeRad) * Math.sin(now) + Math.cos(latitudeRad) * Math.cos(now) * Math.cos(middle));
      const place = Math.min(DECLINATION_ROWS - 1.000001, Math.max(0, (now / DEGREE - FIRST_DECLINATION_DEG) / DECLINATION_STEP_DEG));
      lowerRow[step] = Math.floor(place);
      upperPart[step] = place - Math.floor(place);
    }
    const sky = rows.skyOf(skyLeaves.join(' '), throughAt(skyLeaves));
    for (let zone = 0; zone < zoneCount; zone += 1) {
      const exposure = exposures[zone];
      if (!exposure) continue;
      let direct = 0;
      for (let hour = 0; hour < 24; hour += 1) {
        let weighted = 0;
        let weights = 0;
        let plain = 0;
        for (let step = hour * stepsPerHour; step < (hour + 1) * stepsPerHour; step += 1) {
          const lower = rowAt(lowerRow[step] ?? 0);
          const upper = rowAt((lowerRow[step] ?? 0) + 1);
          const part = upperPart[step] ?? 0;
          const at = zone * steps + step;
          const beam = (lower[at] ?? 0) * (1 - part) + (upper[at] ?? 0) * part;
          plain += beam;
          if ((lit[step] ?? 0) > 0) {
            weighted += beam * (weight[step] ?? 0);
            weights += weight[step] ?? 0;
            direct += (beam * (lit[step] ?? 0)) / stepsPerHour;
          }
        }
        exposure.beamByHour[day * 24 + hour] = weights > 0 ? weighted / weights : plain / stepsPerHour;
      }
      exposure.directSunHours[day] = direct;
      exposure.openSunHours[day] = openHours;
      exposure.skyView[day] = sky[zone] ?? 1;
    }
  }
  return exposures;
}

/** Day index of an exposure for a month and a day of the month; 29 February of a common year takes the 28th. */
export function exposureDayIndex(exposure: Pick<ZoneExposure, 'year'>, month: number, day: number): number {
  let index = Math.min(day, daysInMonth(exposure.year, month)) - 1;
  for (let before = 1; before < month; before += 1) index += daysInMonth(exposure.year, before);
  return index;
}
