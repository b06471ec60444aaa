import { yardActions, type Abilities, type YardResponse } from '@/shared/contracts/yards';
import type { ZoneResponse } from '@/shared/contracts/zones';

/** A zone as the service answers it. */
export function screenZone(overrides: Partial<ZoneResponse> = {}): ZoneResponse {
  return {
    id: '00000000-0000-4000-8000-000000000011', name: 'Front lawn', areaM2: 120, sideAM: null, sideBM: null, grass: 'cool_mix', grassIsDefault: false, soil: 'loam', soilIsDefault: false, slopePct: 1,
    slopeIsDefault: true, sunHours: 8, sunHoursIsDefault: false, sunHoursOn: '2026-06-01', sunHoursOnIsDefault: false, hasSunDiary: false, compaction: 'loose', compactionIsDefault: true,
    treeRootShare: 0, treeRootShareIsDefault: true, coverFraction: 1, coverFractionIsDefault: true, seededOn: null, mulch: 'none', resting: false, priority: 100, ...overrides,
  };
}

/** A yard near New York as its owner gets it, with one zone. */
export function screenYard(overrides: Partial<YardResponse> = {}): YardResponse {
  return {
    id: '00000000-0000-4000-8000-000000000001', name: 'Hazel Row', placeName: 'Yonkers', role: 'owner', timeZone: 'America/New_York', units: 'us', latitudeDeg: 40.93, longitudeDeg: -73.9, elevationM: 20,
    elevationIsDefault: true, moveMinutes: 5, moveMinutesIsDefault: true, reminderLeadMinutes: 30, taps: [], hoses: [], sprinklers: [], zones: [screenZone()], positions: [], hours: [], rules: [], setUp: [],
    abilities: Object.fromEntries(yardActions.map((action) => [action, true])) as Abilities, preferences: { wantsMorningEmail: true, wantsMoveEmail: true }, ...overrides,
  } as YardResponse;
}
