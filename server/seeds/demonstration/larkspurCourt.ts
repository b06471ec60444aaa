import type { YardScript } from './yardScript';

/** 5/8 in hose, and the five-gallon bucket that everybody has. */
const boreMm = 15.9;
const volumeL = 18.9;

/**
 * The main yard: two taps, four zones, one of them sown on 11 June. Some positions are measured with cups and some are not.
 */
export const larkspurCourt: YardScript = {
  yard: { name: 'Larkspur Court', placeName: 'Yonkers', latitudeDeg: 40.931, longitudeDeg: -73.899, timeZone: 'America/New_York', elevationM: 25, units: 'us' },
  owner: 'mara', helper: 'theo', fromOn: '2026-05-29',
  taps: [{ name: 'Front tap', bucket: { volumeL, seconds: 71 } }, { name: 'Back tap', bucket: { volumeL, seconds: 60 } }],
  hoses: [{ name: 'Green hose', lengthM: 22.9, boreMm }, { name: 'Black hose', lengthM: 30.5, boreMm }],
  sprinklers: [{ name: 'Oscillating bar', kind: 'oscillating' }, { name: 'Impact on a spike', kind: 'impact' }, { name: 'Small fixed ring', kind: 'fixed' }],
  zones: [
    {
      name: 'Front lawn', sideAM: 14, sideBM: 10, grass: 'cool_mix', soil: 'sandy_loam', slopePct: 1, sunHours: 8, treeRootShare: 0.25,
      positions: [
        {
          name: 'Front by the maple', tap: 'Front tap', hose: 'Green hose', sprinkler: 'Oscillating bar', mark: 'white stake, 12 ft from the walk', wettedAreaM2: 70,
          catchTest: {
            on: '2026-05-30', layout: { kind: 'grid', rows: 4, columns: 4, spacingM: 2.4 }, reading: { kind: 'depth' }, minutes: 60, wind: 'calm',
            readings: [10, 12, 13, 11, 12, 15, 16, 13, 13, 16, 15, 14, 9, 12, 13, 10],
          },
        },
        {
          name: 'Front by the drive', tap: 'Front tap', hose: 'Green hose', sprinkler: 'Oscillating bar', mark: 'white stake by the lamp', wettedAreaM2: 70, alternateSets: true,
          catchTest: {
            on: '2026-05-31', layout: { kind: 'grid', rows: 3, columns: 4, spacingM: 2.7 }, reading: { kind: 'volume', mouthDiameterMm: 85 }, minutes: 60, wind: 'light',
            readings: [58, 70, 76, 61, 66, 84, 88, 72, 55, 71, 78, 60],
          },
        },
      ],
    },
    {
      name: 'South lawn', areaM2: 165, grass: 'tall_fescue', soil: 'loam', slopePct: 1, sunHours: 7, sunHoursOn: '2026-05-24', compaction: 'firm',
      positions: [
        {
          name: 'South middle', tap: 'Back tap', hose: 'Black hose', sprinkler: 'Impact on a spike', mark: 'brass cap in the grass', wettedAreaM2: 85,
          catchTest: {
            on: '2026-05-30', layout: { kind: 'row', spacingM: 0.75, firstDistanceM: 0.5 }, reading: { kind: 'depth' }, minutes: 60, wind: 'calm',
            readings: [18, 17, 16, 15, 14, 12, 10, 7],
          },
        },
        { name: 'South by the fence', tap: 'Back tap', hose: 'Black hose', sprinkler: 'Impact on a spike', mark: 'third post', wettedAreaM2: 80 },
      ],
    },
    {
      name: 'North shade', areaM2: 85, grass: 'fine_fescue', soil: 'loam', slopePct: 1, sunHours: 3, treeRootShare: 0.5, coverFraction: 0.8,
      positions: [{ name: 'North corner', tap: 'Front tap', hose: 'Green hose', sprinkler: 'Oscillating bar', mark: 'by the downspout', wettedAreaM2: 80 }],
    },
    {
      name: 'Back strip', sideAM: 12, sideBM: 3.5, grass: 'tall_fescue', soil: 'loam', slopePct: 1, sunHours: 6, seededOn: '2026-06-11', mulch: 'straw', priority: 50,
      createdOn: '2026-06-11',
      positions: [{
        name: 'Strip', tap: 'Back tap', hose: 'Black hose', sprinkler: 'Small fixed ring', mark: 'middle of the straw', wettedAreaM2: 42,
        catchTest: {
          on: '2026-06-11', layout: { kind: 'grid', rows: 3, columns: 4, spacingM: 1 }, reading: { kind: 'weight', mouthDiameterMm: 85 }, minutes: 20, wind: 'calm',
          readings: [44, 52, 55, 46, 50, 58, 60, 51, 42, 50, 53, 45],
        },
      }],
    },
  ],
  hours: { weekdays: [[330, 480], [720, 780], [1020, 1230]], weekend: [[375, 660], [720, 780], [960, 1200]] },
  water: { addressDigit: 4, waterStage: 1 },
  rules: [{
    name: 'No sprinkling in the afternoon', windows: [{ fromMinutes: 0, toMinutes: 780 }, { fromMinutes: 1020, toMinutes: 1440 }], seasonFrom: '05-01', seasonTo: '09-30',
    source: 'Invented for this demonstration. Look up your own water supplier’s rules.', sourceOn: '2026-05-29',
  }, {
    // two digits share two days a week
    name: 'Days by house number', weekdaysByDigit: [[1, 4], [1, 4], [2, 5], [2, 5], [3, 6], [3, 6], [4, 0], [4, 0], [5, 1], [5, 1]], devices: ['sprinkler'], stage: 2,
    source: 'Invented for this demonstration. Look up your own water supplier’s rules.', sourceOn: '2026-05-29',
  }],
  permits: [{
    on: '2026-06-11', name: 'Seed permit', zones: ['Back strip'], fromOn: '2026-06-11', toOn: '2026-07-10', blackoutMonths: [8],
    source: 'Invented for this demonstration. Ask your own water supplier for one.', sourceOn: '2026-06-10',
  }],
  rainGauge: { '2026-06-05': 14, '2026-06-09': 22.5, '2026-06-13': 26, '2026-06-16': 8.5 },
  seen: [
    // the house hides the sun from the north side but for early morning and late afternoon
    { on: '2026-05-31', by: 'mara', zone: 'North shade', sunnyHours: [6, 7, 17, 18] },
    { on: '2026-06-07', by: 'theo', zone: 'South lawn', soil: { kind: 'screwdriver', feel: 'firm' } },
    { on: '2026-06-17', by: 'mara', zone: 'Front lawn', soil: { kind: 'screwdriver', feel: 'easy' } },
    { on: '2026-06-18', by: 'mara', zone: 'Back strip', stage: 'coming_up' },
  ],
  proposals: [{
    on: '2026-06-16', zone: 'Back strip', depthsMm: [1.5, 2, 3.5, 10], dosesPerDay: [3, 3, 2, 1],
    reason: 'Three doses are enough under the straw; the strip still glistens before noon. Later ones go a little deeper, because the first roots are down an inch.',
    answer: 'That fits our lunch hour better too.',
  }],
  fateOf(on, roundIndex, kind) {
    if (on === '2026-06-02' && kind === 'set') return { by: 'theo', cutShortTo: 38 };
    if (on === '2026-06-15' && roundIndex === 1) return { by: 'mara', skip: 'no_time' };
    if (on === '2026-06-17' && roundIndex === 1) return 'forgotten';
    return { by: roundIndex % 2 === 0 ? 'mara' : 'theo' };
  },
};
