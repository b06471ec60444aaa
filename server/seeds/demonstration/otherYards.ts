import type { YardScript } from './yardScript';

const boreMm = 15.9;
const volumeL = 18.9;
const afterWork = { weekdays: [[330, 465], [1080, 1230]] as [number, number][], weekend: [[360, 660]] as [number, number][] };
const cups = (readings: number[]) => ({ layout: { kind: 'grid' as const, rows: 3, columns: 3, spacingM: 2.5 }, reading: { kind: 'depth' as const }, minutes: 60, wind: 'calm' as const, readings });

/** The other yards on the consultant's list, each in another state. */
export const otherYards: YardScript[] = [
  {
    yard: { name: 'Quarry Lane', placeName: 'Montclair', latitudeDeg: 40.826, longitudeDeg: -74.209, timeZone: 'America/New_York', elevationM: 103, units: 'us' },
    owner: 'odell', fromOn: '2026-06-07',
    taps: [{ name: 'Side tap', bucket: { volumeL, seconds: 64 } }],
    hoses: [{ name: 'Long hose', lengthM: 30.5, boreMm }],
    sprinklers: [{ name: 'Rotary', kind: 'rotary' }],
    zones: [{
      name: 'Whole lawn', areaM2: 120, grass: 'kentucky_bluegrass', soil: 'silt_loam', sunHours: 8,
      positions: [
        { name: 'Near half', tap: 'Side tap', hose: 'Long hose', sprinkler: 'Rotary', wettedAreaM2: 60, catchTest: { on: '2026-06-08', ...cups([15, 17, 16, 18, 20, 19, 15, 17, 16]) } },
        { name: 'Far half', tap: 'Side tap', hose: 'Long hose', sprinkler: 'Rotary', wettedAreaM2: 60, catchTest: { on: '2026-06-08', ...cups([14, 16, 15, 17, 19, 18, 14, 16, 15]) } },
      ],
    }],
    hours: afterWork,
    fateOf: () => ({ by: 'odell' }),
  },
  {
    yard: { name: 'Tidewater Walk', placeName: 'Stamford', latitudeDeg: 41.053, longitudeDeg: -73.539, timeZone: 'America/New_York', elevationM: 11, units: 'us' },
    owner: 'priya', fromOn: '2026-06-09',
    taps: [{ name: 'Patio tap' }],
    hoses: [{ name: 'Patio hose', lengthM: 15.2, boreMm }],
    sprinklers: [{ name: 'Oscillating', kind: 'oscillating' }],
    zones: [{
      name: 'Back lawn', areaM2: 90, sunHours: 7,
      positions: [{ name: 'Middle', tap: 'Patio tap', hose: 'Patio hose', sprinkler: 'Oscillating' }],
    }],
    hours: afterWork,
    fateOf: () => ({ by: 'priya' }),
  },
  {
    yard: { name: 'Madrone Close', placeName: 'Bellevue', latitudeDeg: 47.61, longitudeDeg: -122.201, timeZone: 'America/Los_Angeles', elevationM: 26, units: 'us' },
    owner: 'jonas', fromOn: '2026-06-09',
    taps: [{ name: 'Garage tap', bucket: { volumeL, seconds: 58 } }],
    hoses: [{ name: 'Garage hose', lengthM: 22.9, boreMm }],
    sprinklers: [{ name: 'Fixed square', kind: 'fixed' }],
    zones: [{
      name: 'New front', areaM2: 55, grass: 'perennial_ryegrass', soil: 'sandy_loam', sunHours: 7, seededOn: '2026-06-09', mulch: 'peat',
      positions: [{ name: 'Front middle', tap: 'Garage tap', hose: 'Garage hose', sprinkler: 'Fixed square', wettedAreaM2: 55, catchTest: { on: '2026-06-09', ...cups([17, 19, 18, 20, 22, 21, 17, 19, 18]) } }],
    }],
    hours: { weekdays: [[360, 510], [1020, 1230]], weekend: [[420, 1200]] },
    proposals: [{
      on: '2026-06-18', zone: 'New front', depthsMm: [2, 2.5, 3, 10], dosesPerDay: [3, 3, 2, 1],
      reason: 'Nobody is there at noon on workdays, and those doses are missed. Fewer and a little deeper can be kept.',
    }],
    fateOf: (on, roundIndex) => (on >= '2026-06-17' && roundIndex > 0 ? 'forgotten' : { by: 'jonas' }),
  },
  {
    yard: { name: 'Alder Steps', placeName: 'Tacoma', latitudeDeg: 47.253, longitudeDeg: -122.444, timeZone: 'America/Los_Angeles', elevationM: 74, units: 'us' },
    owner: 'carmen', fromOn: '2026-06-11',
    taps: [{ name: 'Porch tap', bucket: { volumeL, seconds: 75 } }],
    hoses: [{ name: 'Porch hose', lengthM: 15.2, boreMm }],
    sprinklers: [{ name: 'Oscillating', kind: 'oscillating' }],
    zones: [{
      name: 'Slope', areaM2: 110, grass: 'fine_fescue', soil: 'loam', slopePct: 9, sunHours: 6, resting: true,
      positions: [{ name: 'Top', tap: 'Porch tap', hose: 'Porch hose', sprinkler: 'Oscillating', wettedAreaM2: 75,
        weeklyLimit: { over: 'drain_field', depthMm: 12, source: 'Invented for this demonstration. Ask your health office and septic installer.' },
        catchTest: { on: '2026-06-11', ...cups([9, 11, 10, 12, 13, 12, 9, 11, 10]) } }],
    }],
    hours: afterWork,
    fateOf: () => ({ by: 'carmen' }),
  },
  {
    yard: { name: 'Foundry Row', placeName: 'New Rochelle', latitudeDeg: 40.911, longitudeDeg: -73.782, timeZone: 'America/New_York', elevationM: 30, units: 'us' },
    owner: 'tove', fromOn: '2026-06-08',
    taps: [{ name: 'Yard tap', bucket: { volumeL, seconds: 150 } }],
    hoses: [{ name: 'Old hose', lengthM: 30.5, boreMm: 12.7 }],
    sprinklers: [{ name: 'Impact', kind: 'impact' }],
    zones: [{
      name: 'Long meadow', areaM2: 420, grass: 'perennial_ryegrass', soil: 'sandy_loam', sunHours: 10,
      positions: ['West', 'Middle', 'East'].map((name) => ({ name, tap: 'Yard tap', hose: 'Old hose', sprinkler: 'Impact', wettedAreaM2: 140 })),
    }],
    hours: { weekdays: [[360, 450]], weekend: [[420, 540]] },
    fateOf: (on) => (on === '2026-06-15' ? { by: 'tove', skip: 'not_at_home' } : { by: 'tove' }),
  },
];
