import { addDays } from '@/scheduling/units/civilDay';
import type { PlanDay, PlanDose, PlanInput, PlanPosition, PlanRule, PlanZone } from '@/scheduling/planning/types';

const dayCount = 10;
const startOn = '2026-06-13';

/** Even pseudo-random numbers in [0, 1): the yard varies, and is the same in every run. */
function numbersFrom(seed: number): () => number {
  let state = seed * 2_654_435_761 % 4_294_967_296;
  return () => {
    state = (state * 1_664_525 + 1_013_904_223) % 4_294_967_296;
    return state / 4_294_967_296;
  };
}

const doses = (count: number): PlanDose[] => Array.from({ length: count }, (_, index) => ({ atMinutes: 480 + Math.round((600 * index) / count), depthMm: 1.6 }));

/**
 * The yard by which planning is timed: 8 zones (two of them newly sown), 14 positions, 2 taps, 3 water rules, 10 days.
 * @param variant changes weather, depletion and hours at home, so that the time of one lucky case is not taken for all
 */
export function referenceYard(variant: number): PlanInput {
  const next = numbersFrom(variant + 1);
  const between = (low: number, high: number): number => low + (high - low) * next();
  const days = Array.from({ length: dayCount }, (_, index): PlanDay => {
    const rains = next() < 0.25;
    const tminC = between(9, 16);
    return {
      on: addDays(startOn, index), et0Mm: between(3, 7), rainMm: rains ? between(1, 14) : 0, rainProbabilityPct: rains ? Math.round(between(30, 95)) : Math.round(between(0, 20)),
      tminC, tmaxC: tminC + between(8, 16), windMps: between(0.5, 6), sunriseMinutes: 312, sunsetMinutes: 1269,
      homeWindows: index % 7 < 2
        ? [{ fromMinutes: 360, toMinutes: 660 }, { fromMinutes: 960, toMinutes: 1290 }]
        : [{ fromMinutes: 330, toMinutes: 475 }, { fromMinutes: 1050, toMinutes: 1275 }],
    };
  });
  const zones = Array.from({ length: 8 }, (_, index): PlanZone => {
    const totalAvailableMm = between(22, 45);
    const sown = index >= 6;
    return {
      id: `zone-${index}`, name: `Zone ${index + 1}`, areaM2: between(35, 180), priority: sown ? 0 : 1 + (index % 3),
      depletionMm: between(0, 0.6) * totalAvailableMm, totalAvailableMm, refillLineMm: 0.45 * totalAvailableMm,
      demandMmByDay: days.map((day) => day.et0Mm * between(0.6, 0.95)), intakeMmPerHour: between(6, 20), resting: false,
      seed: sown ? { dayNumber: 3 + 4 * (index - 6), stage: index === 6 ? 'sown' : 'rooting', dosesByDay: days.map(() => doses(index === 6 ? 4 : 2)) } : null,
    };
  });
  // Zones 0 to 5 have two positions each, the sown ones a single one: 14 in all.
  const positions = zones.flatMap((zone, zoneIndex): PlanPosition[] => {
    const count = zoneIndex < 6 ? 2 : 1;
    return Array.from({ length: count }, (_, index) => ({
      id: `${zone.id}-position-${index}`, name: `${zone.name}, ${index === 0 ? 'near' : 'far'}`, zoneId: zone.id, tapId: zoneIndex % 2 === 0 ? 'front' : 'back',
      hoseId: `hose-${zoneIndex % 2}`, sprinklerId: `sprinkler-${zoneIndex % 3}`, sprinklerName: ['Oscillating', 'Impact', 'Fixed'][zoneIndex % 3] ?? 'Fixed',
      rateMmPerHour: between(7, 24), rateIsDefault: index === 1, runTimeMultiplier: between(1, 1.5), lowQuarterUniformity: between(0.55, 0.85),
      zoneShare: 1 / count, sortOrder: zoneIndex * 2 + index, depletionMm: null,
    }));
  });
  const unbound = { source: 'Town code', sourceOn: '2026-05-01', season: { fromMonth: 5, fromDay: 1, toMonth: 9, toDay: 30 }, exemptSeeded: true };
  const rules: PlanRule[] = [
    { id: 'hours', name: 'Not at noon', ...unbound, kind: 'hours', allowed: [{ fromMinutes: 0, toMinutes: 600 }, { fromMinutes: 960, toMinutes: 1440 }] },
    { id: 'weekdays', name: 'Not on Mondays', ...unbound, kind: 'weekdays', weekdays: [0, 2, 3, 4, 5, 6] },
    { id: 'evenings', name: 'Street agreement', ...unbound, kind: 'combination', weekdays: null, parity: null, allowed: [{ fromMinutes: 300, toMinutes: 1290 }] },
  ];
  return {
    startOn, dayCount, notBeforeMinutes: null, alreadyApplied: [], days,
    taps: [
      { id: 'front', name: 'Front tap', flowLpm: 17, flowIsDefault: false, shutOffTimer: true },
      { id: 'back', name: 'Back tap', flowLpm: 14, flowIsDefault: false, shutOffTimer: false },
    ],
    zones, positions, rules, moveMinutes: 5, leadMinutes: 5, maxWindMps: 5,
  };
}

/** Four reference yards under one roof: 32 zones, 56 positions, 8 taps, the weather and the hours of the first. */
export function fourfoldYard(variant: number): PlanInput {
  const parts = [0, 1, 2, 3].map((part) => ({ prefix: `part-${part}-`, yard: referenceYard(4 * variant + part) }));
  const [first] = parts;
  return {
    ...(first?.yard ?? referenceYard(variant)),
    taps: parts.flatMap(({ prefix, yard }) => yard.taps.map((tap) => ({ ...tap, id: prefix + tap.id }))),
    zones: parts.flatMap(({ prefix, yard }) => yard.zones.map((zone) => ({ ...zone, id: prefix + zone.id }))),
    positions: parts.flatMap(({ prefix, yard }) => yard.positions.map((position) => ({
      ...position, id: prefix + position.id, zoneId: prefix + position.zoneId, tapId: position.tapId === null ? null : prefix + position.tapId,
    }))),
  };
}
