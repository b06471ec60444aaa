import { PhysicsError, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units/physicsError';

/** Application rate along a line from the sprinkler outwards. */
export interface RowProfile {
  /** Distance of each cup from the sprinkler, rising [m]. */
  distancesM: number[];
  ratesMmPerHour: number[];
}

/** How a sprinkler wets the ground around it. */
export interface WettingPattern {
  /** Rate at a point, the sprinkler being at (0, 0) [mm/h]. */
  rateAt: (xM: number, yM: number) => number;
  /** No water falls farther away than this, in x and in y [m]. */
  reachXM: number;
  reachYM: number;
  /** The same all along y, as beside a long track: `rateAt` does not look at y. */
  isStrip?: boolean;
}

/**
 * Refuses a profile that cannot be.
 * @throws PhysicsError naming the field
 */
export function checkProfile(profile: RowProfile): void {
  if (profile.distancesM.length === 0 || profile.distancesM.length !== profile.ratesMmPerHour.length) {
    throw new PhysicsError('ratesMmPerHour', profile.ratesMmPerHour.length, `must hold one rate for each of ${profile.distancesM.length} distances, at least one`);
  }
  profile.distancesM.forEach((distance, index) => {
    requireNonNegative(`distancesM[${index}]`, distance);
    if (index > 0 && distance <= (profile.distancesM[index - 1] ?? 0)) {
      throw new PhysicsError(`distancesM[${index}]`, distance, 'must be farther out than the one before');
    }
  });
  profile.ratesMmPerHour.forEach((rate, index) => requireNonNegative(`ratesMmPerHour[${index}]`, rate));
}

/** Where a profile ends: one cup spacing beyond the last cup that caught water. */
export function profileReachM(profile: RowProfile): number {
  const { distancesM, ratesMmPerHour } = profile;
  let last = 0;
  ratesMmPerHour.forEach((rate, index) => {
    if (rate > 0) last = index;
  });
  const at = distancesM[last] ?? 0;
  const next = distancesM[last + 1];
  return next ?? at + (last > 0 ? at - (distancesM[last - 1] ?? 0) : Math.max(at, 0.5));
}

/**
 * Rate at a distance: straight between cups, level from the sprinkler to the first cup, falling to nothing one spacing beyond the last wet one.
 * @param reachM - where the profile ends, given when it is known already [m]
 * @returns rate [mm/h]
 */
export function profileRate(profile: RowProfile, distanceM: number, reachM = profileReachM(profile)): number {
  if (distanceM >= reachM) {
    return 0;
  }
  const { distancesM, ratesMmPerHour } = profile;
  const last = distancesM.length - 1;
  if (distanceM <= (distancesM[0] ?? 0)) {
    return ratesMmPerHour[0] ?? 0;
  }
  for (let index = 1; index <= last; index += 1) {
    const far = distancesM[index] ?? 0;
    if (distanceM <= far) {
      const near = distancesM[index - 1] ?? 0;
      const part = (distanceM - near) / (far - near);
      return (ratesMmPerHour[index - 1] ?? 0) * (1 - part) + (ratesMmPerHour[index] ?? 0) * part;
    }
  }
  const edge = distancesM[last] ?? 0;
  return reachM <= edge ? 0 : (ratesMmPerHour[last] ?? 0) * (1 - (distanceM - edge) / (reachM - edge));
}

/** Turns a direction into 0 to 360 degrees. */
const turned = (degrees: number): number => ((degrees % 360) + 360) % 360;

/**
 * A profile revolved round the sprinkler: a full circle, or the part from one direction to another.
 * @param sector - directions clockwise from +y [degrees]; left out for a full circle. The profile is the rate within the sector.
 * @throws PhysicsError for an impossible profile or sector
 */
export function revolvedPattern(profile: RowProfile, sector?: { fromDeg: number; toDeg: number }): WettingPattern {
  checkProfile(profile);
  const reach = profileReachM(profile);
  if (!sector) {
    return { rateAt: (x, y) => profileRate(profile, Math.sqrt(x * x + y * y), reach), reachXM: reach, reachYM: reach };
  }
  requireRange('fromDeg', sector.fromDeg, -360, 360);
  requireRange('toDeg', sector.toDeg, -360, 720);
  const width = sector.toDeg - sector.fromDeg >= 360 ? 360 : turned(sector.toDeg - sector.fromDeg);
  return {
    rateAt: (x, y) => (turned((Math.atan2(x, y) * 180) / Math.PI - sector.fromDeg) <= width ? profileRate(profile, Math.sqrt(x * x + y * y), reach) : 0),
    reachXM: reach, reachYM: reach,
  };
}

/**
 * An oscillating bar: its profile along the sweep (y), the same on both sides, and its spray width across (x) with edges that fade over one tenth of it.
 * @param sweepProfile - rate from the sprinkler outwards along the sweep
 * @param widthM - wetted width across the sweep [m]
 * @throws PhysicsError for an impossible profile or width
 * Source: the fading edge is a default, common practice.
 */
export function sweptPattern(sweepProfile: RowProfile, widthM: number): WettingPattern {
  checkProfile(sweepProfile);
  const half = requirePositive('widthM', widthM) / 2;
  const fade = widthM / 10;
  const reach = profileReachM(sweepProfile);
  return {
    rateAt: (x, y) => {
      const inside = half - Math.abs(x);
      return inside <= 0 ? 0 : Math.min(1, inside / fade) * profileRate(sweepProfile, Math.abs(y), reach);
    },
    reachXM: half, reachYM: reach,
  };
}

/**
 * Depth that a travelling sprinkler leaves beside its track: the revolved profile summed along the way.
 * @param offsetM - distance from the track [m]
 * @param speedMPerHour - speed along the track [m/h]
 * @returns depth of one pass [mm]
 * @throws PhysicsError when the speed is not above zero
 */
export function travelledDepthMm(profile: RowProfile, offsetM: number, speedMPerHour: number): number {
  checkProfile(profile);
  requirePositive('speedMPerHour', speedMPerHour);
  const reach = profileReachM(profile);
  const half = Math.sqrt(Math.max(0, reach * reach - offsetM * offsetM));
  const steps = 200;
  const stepM = (2 * half) / steps;
  let sum = 0;
  for (let step = 0; step < steps; step += 1) {
    sum += profileRate(profile, Math.hypot(offsetM, -half + (step + 0.5) * stepM), reach);
  }
  return (sum * stepM) / speedMPerHour;
}

const TRACK_STEPS = 80;

/**
 * A travelling sprinkler as a strip: the depth of one pass at each distance from its track, the same all along it. Laid over itself it shows how far
 * apart two tracks should lie. Depths [mm per pass] take the place of rates.
 * @param speedMPerHour - speed along the track [m/h]
 * @throws PhysicsError when the profile is impossible or the speed not above zero
 */
export function travelledPattern(profile: RowProfile, speedMPerHour: number): WettingPattern {
  checkProfile(profile);
  const reach = profileReachM(profile);
  const depths = Array.from({ length: TRACK_STEPS + 1 }, (_, index) => travelledDepthMm(profile, (index / TRACK_STEPS) * reach, speedMPerHour));
  return {
    rateAt: (x) => {
      const place = (Math.abs(x) / reach) * TRACK_STEPS;
      const before = Math.floor(place);
      const near = depths[before] ?? 0;
      return before >= TRACK_STEPS ? 0 : near + (place - before) * ((depths[before + 1] ?? 0) - near);
    },
    reachXM: reach, reachYM: 1, isStrip: true,
  };
}

/**
 * A pattern from a grid of cups around the sprinkler, straight between cups, nothing outside the grid.
 * @param rates - rows of rates [mm/h], first row at the greatest y
 * @param spacingM - between cups [m]
 * @param sprinkler - place of the sprinkler in the grid, in cups from the first column and the first row; may lie between cups
 */
export function griddedPattern(rates: number[][], spacingM: number, sprinkler: { column: number; row: number }): WettingPattern {
  requirePositive('spacingM', spacingM);
  const rows = rates.length;
  const columns = rates[0]?.length ?? 0;
  if (rows === 0 || columns === 0 || rates.some((row) => row.length !== columns)) {
    throw new PhysicsError('rates', rows, 'must be rows of equal length, at least one cup');
  }
  rates.forEach((row, at) => row.forEach((rate, column) => requireNonNegative(`rates[${at}][${column}]`, rate)));
  // One flat row of numbers: a search for the best distance asks for a hundred thousand of them.
  const flat = Float64Array.from(rates.flat());
  const cup = (row: number, column: number): number => (row < 0 || row >= rows || column < 0 || column >= columns ? 0 : flat[row * columns + column] ?? 0);
  return {
    rateAt: (x, y) => {
      const column = sprinkler.column + x / spacingM;
      const row = sprinkler.row - y / spacingM;
      const left = Math.floor(column);
      const top = Math.floor(row);
      const right = column - left;
      const down = row - top;
      return cup(top, left) * (1 - right) * (1 - down) + cup(top, left + 1) * right * (1 - down) + cup(top + 1, left) * (1 - right) * down + cup(top + 1, left + 1) * right * down;
    },
    reachXM: (Math.max(sprinkler.column, columns - 1 - sprinkler.column) + 1) * spacingM,
    reachYM: (Math.max(sprinkler.row, rows - 1 - sprinkler.row) + 1) * spacingM,
  };
}
