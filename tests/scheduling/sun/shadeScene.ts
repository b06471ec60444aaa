import { beamShareAt, leafSeasonOf, leafShare, solarCoordinates, sunDirection, type Obstacle, type PlanePoint } from '@/scheduling/sun';
import { addDays, dayOfYear, epochDayOf } from '@/scheduling/units';

const rectangle = (westM: number, southM: number, widthM: number, depthM: number): PlanePoint[] => [
  { eastM: westM, northM: southM }, { eastM: westM + widthM, northM: southM }, { eastM: westM + widthM, northM: southM + depthM }, { eastM: westM, northM: southM + depthM },
];

/** A house lot with twelve obstacles: house, garage, two fences, eight trees of every kind. */
export const LOT: Obstacle[] = [
  { kind: 'building', footprint: rectangle(0, 0, 14, 9), heightM: 7 },
  { kind: 'building', footprint: rectangle(20, -12, 6, 6), heightM: 4 },
  { kind: 'fence', line: [{ eastM: -15, northM: -20 }, { eastM: 30, northM: -20 }, { eastM: 30, northM: 25 }], heightM: 1.8 },
  { kind: 'fence', line: [{ eastM: -15, northM: -20 }, { eastM: -15, northM: 25 }], heightM: 1.8 },
  ...Array.from({ length: 8 }, (_, index): Obstacle => ({
    kind: 'tree', at: { eastM: -12 + 5 * index, northM: index % 2 === 0 ? -17 : 18 }, crownBaseM: 2, topM: 8 + index, crownRadiusM: 2 + index * 0.3,
    leaves: index % 3 === 0 ? 'evergreen' : 'deciduous', ...(index % 4 === 1 ? { crownShape: 'cylinder' as const } : {}),
  })),
];

/** Points of eight zones around the house, twenty-five each. */
export const LOT_ZONES = Array.from({ length: 8 }, (_, zone) => ({
  id: `zone-${zone + 1}`,
  points: Array.from({ length: 25 }, (_unused, point): PlanePoint => ({
    eastM: -14.3 + (zone % 4) * 11 + (point % 5) * 2, northM: (zone < 4 ? -19.2 : 10.3) + Math.floor(point / 5) * 2.4,
  })),
}));

/** What testing every ray gives for one point set on one day. */
export interface BruteDay {
  directSunHours: number;
  /** Sum of the beam that arrives and of the beam in the open, weighed by the sine of the sun's height. */
  seen: number;
  open: number;
}

/** Tests the ray of every point against every obstacle with the almanac's sun, in steps of the clock. */
export function bruteDay(points: readonly PlanePoint[], obstacles: readonly Obstacle[], latitudeDeg: number, longitudeDeg: number, on: string, stepMinutes: number, firstMinute = stepMinutes / 2): BruteDay {
  const shares = obstacles.map((obstacle) => (obstacle.kind === 'tree' ? leafShare(leafSeasonOf(obstacle, latitudeDeg), dayOfYear(on)) : 1));
  const solarMidnightMs = epochDayOf(on) * 86_400_000 - longitudeDeg * 240_000;
  const result: BruteDay = { directSunHours: 0, seen: 0, open: 0 };
  for (let minute = firstMinute; minute < 1440; minute += stepMinutes) {
    const ms = solarMidnightMs + minute * 60_000;
    const { declinationRad, equationOfTimeMinutes } = solarCoordinates(ms);
    const sun = sunDirection((latitudeDeg * Math.PI) / 180, declinationRad, ((minute + equationOfTimeMinutes) / 4 - 180) * (Math.PI / 180));
    if (sun.altitudeRad <= 0) continue;
    let beam = 0;
    for (const point of points) {
      beam += beamShareAt(point, sun, obstacles, shares);
    }
    result.directSunHours += (beam / points.length) * (stepMinutes / 60);
    result.seen += (beam / points.length) * Math.sin(sun.altitudeRad);
    result.open += Math.sin(sun.altitudeRad);
  }
  return result;
}

/** Days of a month, spread over it. */
export const daysOfMonth = (year: number, month: number, count: number): string[] =>
  Array.from({ length: count }, (_, index) => addDays(`${year}-${String(month).padStart(2, '0')}-01`, Math.floor(((index + 0.5) * 28) / count)));
