import { intersectWindows, normalizeWindows } from '@/scheduling/planning/minuteWindows';
import { planDefaults } from '@/scheduling/planning/planDefaults';
import type { MinuteWindow } from '@/scheduling/planning/types';
import { openingByRules } from '@/scheduling/planning/waterRules';
import { weekdayOf } from '@/scheduling/units/civilDay';
import type { RunSet } from './seasonGround';
import type { SeasonYard } from './seasonYards';

/** What somebody does on one day. */
export interface DayOrders {
  sets: RunSet[];
  outings: number;
  moves: number;
  /** Doses that seedbeds wanted, and those that were kept, each counted once for every patch. */
  dosesWanted: number;
  dosesKept: number;
}

/** Minutes of a day when the rules allow water on established grass and somebody is home. */
export function openWindows(yard: SeasonYard, on: string): MinuteWindow[] {
  return intersectWindows(openingByRules(yard.rules, on, false).windows, normalizeWindows(yard.homeByWeekday[weekdayOf(on)] ?? []));
}

/** Minutes of water that one tap can give on a day, in single sets of an hour with their moves. */
export function dayCapacityMinutes(yard: SeasonYard, on: string): number {
  return openWindows(yard, on).reduce((sum, { fromMinutes, toMinutes }) => sum + ((toMinutes - fromMinutes) * 60) / (60 + planDefaults.moveMinutes), 0);
}

/**
 * Lays wishes into a day one after the other, tap by tap, with the minutes to get ready and to move; what does not fit is cut, a rest under the least set
 * time is left. Two taps run side by side as if a person could be at both, which favours whoever is laid out so.
 * @param wishes - minutes of water, the first one first
 */
export function packDay(yard: SeasonYard, on: string, wishes: readonly { positionId: string; minutes: number }[]): DayOrders {
  const windows = openWindows(yard, on);
  const sets: RunSet[] = [];
  const outings = new Set<number>();
  let moves = 0;
  for (const tap of yard.taps) {
    const own = wishes
      .filter(({ positionId }) => yard.positions.some((position) => position.id === positionId && position.tapId === tap.id))
      .map((wish) => ({ ...wish, minutes: Math.round(wish.minutes) }));
    windows.forEach((window, windowIndex) => {
      let cursor = window.fromMinutes + planDefaults.leadMinutes;
      let isFirst = true;
      for (const wish of own) {
        const start = isFirst ? cursor : cursor + planDefaults.moveMinutes;
        const minutes = Math.min(wish.minutes, window.toMinutes - start);
        if (minutes < planDefaults.leastSetMinutes) continue;
        sets.push({ positionId: wish.positionId, startMinutes: start, minutes });
        wish.minutes -= minutes;
        moves += isFirst ? 0 : 1;
        outings.add(windowIndex);
        isFirst = false;
        cursor = start + minutes;
      }
    });
  }
  return { sets, outings: outings.size, moves, dosesWanted: 0, dosesKept: 0 };
}
