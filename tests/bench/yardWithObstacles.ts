import type { Obstacle, YearOfExposureInput } from '@/scheduling/sun';

const rectangle = (westM: number, southM: number, widthM: number, depthM: number) => [
  { eastM: westM, northM: southM }, { eastM: westM + widthM, northM: southM }, { eastM: westM + widthM, northM: southM + depthM }, { eastM: westM, northM: southM + depthM },
];

/** The lot by which a year of exposure is timed: 8 zones of 25 points among 12 obstacles, two buildings, two fences and eight trees of every kind. */
export function yardWithObstacles(): YearOfExposureInput {
  const obstacles: Obstacle[] = [
    { kind: 'building', footprint: rectangle(0, 0, 14, 9), heightM: 7 },
    { kind: 'building', footprint: rectangle(20, -12, 6, 6), heightM: 4 },
    { kind: 'fence', line: [{ eastM: -15, northM: -20 }, { eastM: 30, northM: -20 }, { eastM: 30, northM: 25 }], heightM: 1.8 },
    { kind: 'fence', line: [{ eastM: -15, northM: -20 }, { eastM: -15, northM: 25 }], heightM: 1.8 },
    ...Array.from({ length: 8 }, (_, index): Obstacle => ({
      kind: 'tree', at: { eastM: -12 + 5 * index, northM: index % 2 === 0 ? -17 : 18 }, crownBaseM: 2, topM: 8 + index, crownRadiusM: 2 + index * 0.3,
      leaves: index % 3 === 0 ? 'evergreen' : 'deciduous',
    })),
  ];
  const zones = Array.from({ length: 8 }, (_, zone) => ({
    id: `zone-${zone}`,
    points: Array.from({ length: 25 }, (_unused, point) => ({ eastM: -14.3 + (zone % 4) * 11 + (point % 5) * 2, northM: (zone < 4 ? -19.2 : 10.3) + Math.floor(point / 5) * 2.4 })),
  }));
  return { latitudeDeg: 42.36, longitudeDeg: -71.06, obstacles, zones, stepMinutes: 10 };
}
