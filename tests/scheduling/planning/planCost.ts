import { expectedRainMm, usefulRainMm, believedRainChance } from '@/scheduling/planning/expectedRain';
import { planWeights, zoneWeights } from '@/scheduling/planning/planObjective';
import type { PlanInput, PlannedSet, PlanResult } from '@/scheduling/planning/types';

/** The window of a day that holds a span, of windows given as they are. */
function holding(windows: readonly { fromMinutes: number; toMinutes: number }[], at: number): number {
  return windows.findIndex((window) => window.fromMinutes <= at && at < window.toMinutes);
}

/** Last minute at which water of a set may be off: its hours at home and the hours of the rules that hold its start. */
function lastMinute(input: PlanInput, dayIndex: number, startMinutes: number): number {
  const home = input.days[dayIndex]?.homeWindows ?? [];
  let last = home[holding(home, startMinutes)]?.toMinutes ?? 1440;
  for (const rule of input.rules) {
    if (rule.kind === 'hours') {
      last = Math.min(last, rule.allowed[holding(rule.allowed, startMinutes)]?.toMinutes ?? 1440);
    }
  }
  return last;
}

/** Hours of the night that leaves stay wet: not dry two hours before sunset, and before the dew three hours after it. */
export function wetHours(input: PlanInput, dayIndex: number, lastMinutes: number): number {
  const day = input.days[dayIndex];
  if (!day || day.sunsetMinutes === null || lastMinutes <= day.sunsetMinutes - 120 || (day.sunriseMinutes !== null && lastMinutes <= day.sunriseMinutes)) {
    return 0;
  }
  return Math.max(0, (day.sunsetMinutes + 180 - lastMinutes) / 60);
}

/** Hours outside those preferred, as a part of a stretch. */
export function outsideShare(input: PlanInput, fromMinutes: number, toMinutes: number): number {
  if (!input.preferredWindows) {
    return 0;
  }
  let outside = 0;
  for (let minute = fromMinutes; minute < toMinutes; minute += 1) {
    outside += holding(input.preferredWindows, minute) < 0 ? 1 : 0;
  }
  return outside / (toMinutes - fromMinutes);
}

/**
 * The cost of a plan in litres, reckoned from its sets alone by the formula of `planObjective.ts`, without any code of the search. For yards without doses,
 * fixed sets, shut-off timers, water-ins and plans before; positions one run a set.
 */
export function planCostL(input: PlanInput, result: PlanResult): number {
  const weights = planWeights[input.priority ?? 'keep_green'];
  const zoneWeight = zoneWeights(input.zones);
  let cost = 0;
  const sets: { on: number; set: PlannedSet }[] = result.days.flatMap((day, on) => day.rounds.flatMap((round) => round.sets.map((set) => ({ on, set }))));
  const outings = new Set(sets.map(({ on, set }) => `${on}/${holding(input.days[on]?.homeWindows ?? [], set.startMinutes)}`));
  cost += outings.size * weights.outingL;
  for (const zone of input.zones.filter((each) => !each.resting)) {
    const own = input.positions.filter((position) => position.zoneId === zone.id);
    const shares = Math.max(1, own.reduce((sum, position) => sum + position.zoneShare, 0));
    for (const position of own) {
      const areaM2 = (zone.areaM2 * position.zoneShare) / shares;
      const tap = input.taps.find((each) => each.id === position.tapId);
      const perMinute = (position.rateMmPerHour ?? 0) / 60 / position.runTimeMultiplier;
      const price = (depth: number): number => {
        const stress = Math.min(1, Math.max(0, (depth - zone.refillLineMm) / (zone.totalAvailableMm - zone.refillLineMm)));
        return areaM2 * (zoneWeight.get(zone.id) ?? 1) * (weights.stressL * stress + weights.severeL * Math.max(0, stress - weights.severeFrom));
      };
      let depth = position.depletionMm ?? zone.depletionMm;
      input.days.forEach((day, index) => {
        const mine = sets.filter(({ on, set }) => on === index && set.positionId === position.id);
        let water = 0;
        for (const { set } of mine) {
          const home = input.days[index]?.homeWindows ?? [];
          const last = lastMinute(input, index, set.startMinutes);
          const first = Math.max((home[holding(home, set.startMinutes)]?.fromMinutes ?? 0) + input.leadMinutes, 0);
          water += set.minutes * perMinute;
          cost += set.minutes * (tap?.flowLpm ?? 0) * (1 - weights.waitingPerDay * index) + set.minutes * weights.offPreferredL * outsideShare(input, first, last);
          cost += weights.setL + weights.nightWetL * wetHours(input, index, last) * areaM2;
        }
        const chance = usefulRainMm(day) > 0 ? believedRainChance(day, index) : 0;
        cost += (1 - chance) * price(depth - water) + chance * price(depth - water - usefulRainMm(day));
        const afterRain = depth - water - expectedRainMm(day, index);
        const ks = afterRain <= zone.refillLineMm ? 1 : (zone.totalAvailableMm - afterRain) / (zone.totalAvailableMm - zone.refillLineMm);
        depth = Math.max(0, afterRain + Math.min(zone.totalAvailableMm - afterRain, (zone.demandMmByDay[index] ?? 0) * ks));
      });
      cost += weights.endWater * ((tap?.flowLpm ?? 0) / perMinute) * depth + weights.endStressDays * price(depth);
    }
  }
  return cost;
}
