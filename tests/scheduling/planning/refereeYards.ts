import { addDays } from '@/scheduling/units/civilDay';
import type { MinuteWindow, PlanDay, PlanInput, PlanPriority } from '@/scheduling/planning/types';

/** Even pseudo-random numbers in [0, 1), the same in every run. */
export function numbersFrom(seed: number): () => number {
  let state = (seed * 2_654_435_761 + 12_345) % 4_294_967_296;
  return () => {
    state = (state * 1_664_525 + 1_013_904_223) % 4_294_967_296;
    return state / 4_294_967_296;
  };
}

const priorities: PlanPriority[] = ['keep_green', 'keep_green', 'spare_water', 'spare_me', 'let_rest'];

/**
 * A small yard for which the referee's model is exact: established grass, soil that takes water as fast as it comes, one run a set, taps without a timer.
 * Hours at home are tight in two thirds of them, rules close days, rain is uncertain, a month's water is limited in some.
 */
export function refereeYard(seed: number, size: { positions: number; days: number } | null = null): PlanInput {
  const next = numbersFrom(seed + 1);
  const between = (low: number, high: number): number => low + (high - low) * next();
  const whole = (low: number, high: number): number => Math.floor(between(low, high + 1));
  const startOn = '2026-06-13';
  const dayCount = size?.days ?? whole(5, 7);
  const positionCount = size?.positions ?? whole(3, 4);
  const tightness = next() < 0.67 ? between(0.45, 0.9) : between(1.2, 2.5);
  const windowCount = next() < 0.7 ? 2 : 1;
  const flowLpm = between(12, 20);
  const zoneCount = Math.max(2, Math.ceil(positionCount / 2));
  const zones = Array.from({ length: zoneCount }, (_, index) => {
    const totalAvailableMm = between(18, 45);
    return {
      id: `z${index}`, name: `Zone ${index + 1}`, areaM2: between(60, 220), priority: 1 + (index % 2), depletionMm: between(0.1, 0.6) * totalAvailableMm, totalAvailableMm,
      refillLineMm: between(0.4, 0.55) * totalAvailableMm, demandMmByDay: Array.from({ length: dayCount }, () => between(2.5, 5.5)), intakeMmPerHour: 40, resting: false, seed: null,
    };
  });
  const positions = Array.from({ length: positionCount }, (_, index) => {
    const zone = zones[index % zoneCount] as (typeof zones)[number];
    const share = 1 / (Math.floor((positionCount - 1 - (index % zoneCount)) / zoneCount) + 1);
    return {
      id: `p${index}`, name: `Position ${index + 1}`, zoneId: zone.id, tapId: 'tap', hoseId: null, sprinklerId: null, sprinklerName: 'Oscillating',
      // What the tap gives, less a little that falls outside.
      rateMmPerHour: ((flowLpm * 60) / (zone.areaM2 * share)) * between(0.75, 0.95), rateIsDefault: false, runTimeMultiplier: between(1, 1.3), lowQuarterUniformity: 0.7, zoneShare: share,
      sortOrder: index, depletionMm: Math.min(zone.totalAvailableMm, zone.depletionMm * between(0.8, 1.2)),
    };
  });
  // Hours at home as a multiple of what the demand needs.
  const neededMinutes = positions.reduce((sum, position) => {
    const zone = zones.find((each) => each.id === position.zoneId);
    const demand = (zone?.demandMmByDay ?? []).reduce((total, each) => total + each, 0) / dayCount;
    return sum + (demand * 60 * position.runTimeMultiplier) / position.rateMmPerHour;
  }, 0) * tightness + 20;
  const days = Array.from({ length: dayCount }, (_, index): PlanDay => {
    const rains = next() < 0.25;
    const minutes = Math.min(520, neededMinutes * between(0.7, 1.3));
    const first = windowCount === 2 ? minutes * between(0.35, 0.65) : minutes;
    const windows: MinuteWindow[] = [{ fromMinutes: 330, toMinutes: Math.round(330 + Math.max(35, first)) }];
    if (windowCount === 2) {
      windows.push({ fromMinutes: 1020, toMinutes: Math.min(1350, Math.round(1020 + Math.max(35, minutes - first))) });
    }
    return {
      on: addDays(startOn, index), et0Mm: 5, rainMm: rains ? between(2, 18) : 0, rainProbabilityPct: rains ? whole(30, 95) : 0, tminC: 12, tmaxC: 27, windMps: 2,
      sunriseMinutes: 320, sunsetMinutes: 1240, homeWindows: next() < 0.12 ? [] : windows,
    };
  });
  const isCapped = next() < 0.2;
  const litresNeeded = positions.reduce((sum, position) => sum + (flowLpm * 60 * position.runTimeMultiplier * 4 * dayCount) / position.rateMmPerHour, 0);
  return {
    startOn, dayCount, notBeforeMinutes: null, alreadyApplied: [], days, taps: [{ id: 'tap', name: 'Tap', flowLpm, flowIsDefault: false, shutOffTimer: false }], zones, positions,
    rules: next() < 0.4 ? [{ id: 'town', name: 'Town', source: null, sourceOn: null, season: null, exemptSeeded: false, kind: 'weekdays', weekdays: [0, 1, 2, 3, 4, 5, 6].filter((weekday) => weekday !== seed % 7 && weekday !== (seed + 3) % 7) }] : [],
    moveMinutes: 5, leadMinutes: 5, maxWindMps: 8, priority: priorities[seed % priorities.length] ?? 'keep_green',
    ...(isCapped ? { monthCaps: [{ month: '2026-06', capLitres: between(0.8, 1.1) * litresNeeded, usedLitres: 0.2 * litresNeeded }] } : {}),
    ...(next() < 0.3 ? { preferredWindows: [{ fromMinutes: 330, toMinutes: 600 }] } : {}),
  };
}
