import { addDays } from '@/scheduling/units/civilDay';
import type { PlanDay, PlanInput, PlanPosition, PlanTap, PlanZone } from '@/scheduling/planning/types';

/** A dry June day with somebody at home from 5:30 to 8:00. */
export function buildDay(on: string, overrides: Partial<PlanDay> = {}): PlanDay {
  return {
    on, et0Mm: 5, rainMm: 0, rainProbabilityPct: 0, tminC: 12, tmaxC: 26, windMps: 2, sunriseMinutes: 320, sunsetMinutes: 1240,
    homeWindows: [{ fromMinutes: 330, toMinutes: 480 }], ...overrides,
  };
}

export function buildTap(overrides: Partial<PlanTap> = {}): PlanTap {
  return { id: 'tap', name: 'Back tap', flowLpm: 16, flowIsDefault: false, shutOffTimer: false, ...overrides };
}

export function buildZone(overrides: Partial<PlanZone> = {}, dayCount = 10): PlanZone {
  return {
    id: 'south', name: 'South lawn', areaM2: 90, priority: 1, depletionMm: 8, totalAvailableMm: 30, refillLineMm: 12,
    demandMmByDay: Array.from({ length: dayCount }, () => 4), intakeMmPerHour: 15, resting: false, seed: null, ...overrides,
  };
}

export function buildPosition(overrides: Partial<PlanPosition> = {}): PlanPosition {
  return {
    id: 'south-1', name: 'By the maple', zoneId: 'south', tapId: 'tap', hoseId: 'hose', sprinklerId: 'sprinkler', sprinklerName: 'Oscillating',
    rateMmPerHour: 14, rateIsDefault: false, runTimeMultiplier: 1, lowQuarterUniformity: 0.8, zoneShare: 1, sortOrder: 1, depletionMm: null, ...overrides,
  };
}

/** One tap, one zone, one position, ten dry June days from Saturday 13 June 2026. */
export function buildPlanInput(overrides: Partial<PlanInput> = {}): PlanInput {
  const startOn = overrides.startOn ?? '2026-06-13';
  const dayCount = overrides.dayCount ?? 10;
  return {
    startOn, dayCount, notBeforeMinutes: null, alreadyApplied: [],
    days: Array.from({ length: dayCount }, (_, index) => buildDay(addDays(startOn, index))),
    taps: [buildTap()], zones: [buildZone({}, dayCount)], positions: [buildPosition()], rules: [],
    moveMinutes: 5, leadMinutes: 5, maxWindMps: 5, ...overrides,
  };
}
