import { frostFreeWindows } from './temperatureCurve';
import { intersectWindows, normalizeWindows, totalMinutes } from './minuteWindows';
import { expectedRainMm, usefulRainMm } from './expectedRain';
import { openingByRules } from './waterRules';
import type { MinuteWindow, PlanDay, PlanInput, PlanRule, Reason } from './types';

/** What one day offers to one kind of ground. */
export interface GroundDay {
  /** Minutes when water may run: rules, frost, and not before now. */
  openWindows: MinuteWindow[];
  /** Minutes when somebody is at home and water may run. */
  workMinutes: number;
  /** Why nothing can be watered on this day; null when something can. */
  closed: Reason | null;
}

export interface DayContext {
  index: number;
  day: PlanDay;
  homeWindows: MinuteWindow[];
  /** Rain the plan counts on [mm]. */
  expectedRainMm: number;
  /** Useful rain if the forecast comes true [mm]. */
  fullRainMm: number;
  established: GroundDay;
  seeded: GroundDay;
}

function ruleValues(rule: PlanRule): Record<string, string> {
  return { rule: rule.name, source: rule.source ?? '' };
}

function closedReason(input: PlanInput, day: PlanDay, index: number, isSeeded: boolean, openWindows: MinuteWindow[], homeWindows: MinuteWindow[], leastMinutes: number): Reason | null {
  const opening = openingByRules(input.rules, day.on, isSeeded);
  if (opening.closedBy) {
    return { code: 'closed_by_rule', values: ruleValues(opening.closedBy) };
  }
  const allHome = normalizeWindows(day.homeWindows);
  if (allHome.length === 0) {
    return { code: 'nobody_home', values: {} };
  }
  if (intersectWindows(opening.windows, allHome).length === 0) {
    const rule = opening.narrowedBy[opening.narrowedBy.length - 1];
    return { code: 'rule_and_home_apart', values: rule ? ruleValues(rule) : { rule: '', source: '' } };
  }
  if (index === 0 && input.notBeforeMinutes !== null && totalMinutes(intersectWindows(opening.windows, homeWindows)) < leastMinutes) {
    return { code: 'past_for_today', values: { nowMinutes: input.notBeforeMinutes } };
  }
  const work = intersectWindows(openWindows, homeWindows);
  if (work.length === 0) {
    return { code: 'frost', values: { tminC: day.tminC } };
  }
  if (!isSeeded && day.windMps !== null && day.windMps > input.maxWindMps) {
    return { code: 'windy', values: { windMps: day.windMps, limitMps: input.maxWindMps } };
  }
  if (Math.max(...work.map((window) => window.toMinutes - window.fromMinutes)) < leastMinutes) {
    return { code: 'no_time_left', values: { wantedMinutes: leastMinutes, hadMinutes: totalMinutes(work) } };
  }
  return null;
}

/**
 * What each day of the plan offers.
 * @param leastSetMinutes - the shortest set worth its walk [min]
 */
export function dayContexts(input: PlanInput, leastSetMinutes: number): DayContext[] {
  return input.days.map((day, index) => {
    const notBefore = index === 0 ? input.notBeforeMinutes ?? 0 : 0;
    const ahead = [{ fromMinutes: notBefore, toMinutes: 1440 }];
    const homeWindows = intersectWindows(normalizeWindows(day.homeWindows), ahead);
    const frostFree = frostFreeWindows(day);
    const ground = (isSeeded: boolean): GroundDay => {
      const openWindows = intersectWindows(intersectWindows(openingByRules(input.rules, day.on, isSeeded).windows, frostFree), ahead);
      const leastMinutes = input.leadMinutes + (isSeeded ? 1 : leastSetMinutes);
      return {
        openWindows,
        workMinutes: totalMinutes(intersectWindows(openWindows, homeWindows)),
        closed: closedReason(input, day, index, isSeeded, openWindows, homeWindows, leastMinutes),
      };
    };
    return {
      index, day, homeWindows,
      expectedRainMm: expectedRainMm(day, index),
      fullRainMm: usefulRainMm(day),
      established: ground(false),
      seeded: ground(true),
    };
  });
}
