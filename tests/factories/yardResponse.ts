import type { YardResponse } from '@/shared/contracts/yards';
import { yardActions, type Abilities } from '@/shared/contracts/yards';

const id = (n: number): string => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;
export const frontZoneId = id(11);
export const seedZoneId = id(12);
export const positionId = id(21);
export const ruleId = id(31);

const zone = {
  areaM2: 100, sideAM: null, sideBM: null, grass: 'cool_mix' as const, grassIsDefault: false, soil: 'loam' as const, soilIsDefault: false, slopePct: 1, slopeIsDefault: true, sunHours: 8, sunHoursIsDefault: false,
  sunHoursOn: null, sunHoursOnIsDefault: false, hasSunDiary: false, compaction: 'loose' as const, compactionIsDefault: true, treeRootShare: 0, treeRootShareIsDefault: true, coverFraction: 1, coverFractionIsDefault: true,
  seededOn: null, mulch: 'none' as const, resting: false, priority: 100,
};

/** A yard as its owner reads it: a lawn and a seeded strip, one position, one rule with everything in it and one permit. */
export function exampleYard(change: Partial<YardResponse> = {}): YardResponse {
  return {
    id: id(1), name: 'Alder Street', placeName: 'Seattle', role: 'owner', timeZone: 'America/Los_Angeles', units: 'us', latitudeDeg: 47.6, longitudeDeg: -122.3, elevationM: 50, elevationIsDefault: false,
    moveMinutes: 5, moveMinutesIsDefault: true, reminderLeadMinutes: 30, addressDigit: null, waterStage: 0, waterStageIsDefault: true, supply: null,
    taps: [{ id: id(41), name: 'Front tap', flowLpm: 18, flowIsDefault: false, shutOffTimer: false, lastTestedAt: null }], hoses: [], sprinklers: [{ id: id(51), name: 'Swinging bar', kind: 'oscillating' }],
    zones: [{ ...zone, id: frontZoneId, name: 'Front lawn' }, { ...zone, id: seedZoneId, name: 'Back strip', seededOn: '2026-06-10' }],
    positions: [{
      id: positionId, name: 'By the maple', zoneId: frontZoneId, tapId: id(41), hoseId: null, sprinklerId: id(51), mark: '', wettedAreaM2: 100, wettedAreaIsDefault: true, sortOrder: 1, heightM: null, weeklyLimit: null,
      alternateSets: false, rateMmPerHour: 10, rateSource: 'flow_and_area', lowQuarterUniformity: null, runTimeMultiplier: 1, lastCatchTestId: null, lastTestedAt: null, testExpiredBecause: null,
    }],
    hours: [],
    rules: [{
      id: ruleId, name: 'Odd dates and mornings', weekdays: [1, 4], dateParity: 'odd', windows: [{ fromMinutes: 300, toMinutes: 420 }, { fromMinutes: 480, toMinutes: 540 }, { fromMinutes: 1200, toMinutes: 1320 }],
      weekdaysByDigit: [[1], [2], [3], [4], [5], [6], [1, 0], [], [], []], attended: true, devices: ['soaker', 'hand_held'], stage: 3, exemptSeeded: true, seasonFrom: '05-15', seasonTo: '09-30',
      source: 'City code 14-2', sourceOn: '2026-05-01',
    }],
    permits: [{
      id: id(61), name: 'Seed permit', zoneIds: [seedZoneId], fromOn: '2026-06-10', toOn: '2026-07-09', blackoutMonths: [7, 8], windows: [{ fromMinutes: 360, toMinutes: 540 }], liftsRuleIds: [ruleId],
      source: 'Letter of the water office', sourceOn: '2026-06-08',
    }],
    setUp: [], abilities: Object.fromEntries(yardActions.map((action) => [action, true])) as Abilities, preferences: { wantsMorningEmail: true, wantsMoveEmail: true },
    ...change,
  };
}
