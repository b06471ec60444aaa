import { stateAfter, stepZoneDay, type ZoneState } from '@/scheduling/budget';
import { planDefaults } from '@/scheduling/planning/planDefaults';
import type { ControllerMaker, SeasonPlace } from './seasonControllers';
import { dayCapacityMinutes, packDay } from './seasonPacking';
import { budgetZoneOn, type SeasonPosition, type SeasonZone } from './seasonYards';

/** Days that a patch's way is followed ahead. */
const DAYS_AHEAD = 21;
const DEPTH_SHARES = [0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9] as const;

/** First day from which a patch would suffer without any more water, counted from the morning; `DAYS_AHEAD` when none of those days. */
function firstDryDay({ season, ground }: SeasonPlace, zone: SeasonZone, index: number, state: ZoneState, waterMm: number): number {
  let current = state;
  const until = Math.min(DAYS_AHEAD, season.days.length - index);
  for (let ahead = 0; ahead < until; ahead += 1) {
    const { on, et0Mm, shadedEt0Mm, rainMm } = ground.demandAt(zone.id, index + ahead);
    const day = stepZoneDay(current, budgetZoneOn(zone, on, true), { on, et0Mm, shadedEt0Mm, rainMm, irrigationMm: ahead === 0 ? waterMm : 0 });
    if (day.stressCoefficient < 1) return ahead;
    current = stateAfter(day);
  }
  return DAYS_AHEAD;
}

/**
 * Knows the weather and the ground and thinks patch by patch: each is watered on the last day with hours before it would suffer, with the least depth that
 * carries it as far as filling it would. Where many fall due on one day the later ones come first on the days before.
 * @param openDaysAhead - how many days with hours before its last day a patch may be served already when time is left
 */
export const patchwise = (openDaysAhead: number): ControllerMaker => (place) => {
  const { yard, season, ground } = place;
  const zoneOf = (position: SeasonPosition) => yard.zones.find((zone) => zone.id === position.zoneId);
  return {
    morning(index) {
      const on = season.days[index]?.on ?? '';
      const capacity = dayCapacityMinutes(yard, on);
      if (capacity === 0) return packDay(yard, on, []);
      const nextOpen: number[] = [];
      for (let ahead = 1; nextOpen.length <= openDaysAhead && ahead < 10; ahead += 1) {
        const later = season.days[index + ahead]?.on;
        if (later !== undefined && dayCapacityMinutes(yard, later) > 0) nextOpen.push(ahead);
      }
      const wishes = yard.positions.flatMap((position) => {
        const zone = zoneOf(position);
        const state = ground.states.get(position.id);
        if (!zone || !state) return [];
        const dryDay = firstDryDay(place, zone, index, state, 0);
        if (dryDay >= (nextOpen[nextOpen.length - 1] ?? 10)) return [];
        const totalMm = stepZoneDay(state, budgetZoneOn(zone, on, true), { on, et0Mm: 0, shadedEt0Mm: 0, rainMm: 0, irrigationMm: 0 }).totalAvailableMm;
        const roomMm = Math.max(0, state.depletionMm - ground.soakedRainMm(zone, index, Math.max(0, 1 - state.depletionMm / totalMm)));
        const filledUntil = firstDryDay(place, zone, index, state, roomMm);
        const share = DEPTH_SHARES.find((one) => one * roomMm >= planDefaults.leastSetDepthMm && firstDryDay(place, zone, index, state, one * roomMm) >= filledUntil) ?? 1;
        const minutes = (share * roomMm * position.runTimeMultiplier * 60) / position.rateMmPerHour;
        return minutes < planDefaults.leastSetMinutes ? [] : [{ positionId: position.id, tapId: position.tapId, minutes, dryDay, priority: zone.priority }];
      });
      wishes.sort((a, b) => a.dryDay - b.dryDay || a.priority - b.priority);
      const used = new Map<string, number>();
      const chosen = wishes.filter(({ tapId, minutes, dryDay }) => {
        const sofar = used.get(tapId) ?? 0;
        // What can wait for the next day with hours is served only where that fits today.
        if (dryDay >= (nextOpen[0] ?? 1) && sofar + minutes > capacity) return false;
        used.set(tapId, sofar + minutes);
        return true;
      });
      return packDay(yard, on, chosen);
    },
  };
};
