import { believedRainChance, expectedRainMm, usefulRainMm } from './expectedRain';
import { intersectWindows, normalizeWindows, totalMinutes } from './minuteWindows';
import { planDefaults } from './planDefaults';
import { reason } from './reasonNumbers';
import { frostFreeWindows } from './temperatureCurve';
import type { MinuteWindow, PlanDay, PlanDevice, PlanHold, PlanInput, PlanRule, Reason } from './types';
import { mustBeAttended, openingByRules, type RuleFacts } from './waterRules';

/** What one day offers to one kind of ground. */
export interface GroundDay {
  /** Minutes when water may run: rules, holds, frost, rain and wind by the hour, and not before now. */
  openWindows: MinuteWindow[];
  /** Minutes when somebody is at home and water may run. */
  workMinutes: number;
  /** Somebody has to stay until the end, shut-off timer or not. */
  mustBeAttended: boolean;
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
  /** Chance of it that the plan believes, 0 where none is forecast. */
  rainChance: number;
  /** What the day offers to the ground of a zone under a device. */
  groundOf(zoneId: string, isSeeded: boolean, device: PlanDevice | undefined): GroundDay;
}

/** Rain in an hour from which nothing is watered in it [mm]. Common practice: not while it rains. */
const RAINY_HOUR_MM = 0.5;

function ruleValues(rule: PlanRule): Record<string, string> {
  return { rule: rule.name, source: rule.source ?? '' };
}

/** The parts of a day outside the spans given. */
export function withoutSpans(windows: readonly MinuteWindow[], spans: readonly MinuteWindow[]): MinuteWindow[] {
  const dry: MinuteWindow[] = [];
  let from = 0;
  for (const span of normalizeWindows(spans)) {
    if (span.fromMinutes > from) {
      dry.push({ fromMinutes: from, toMinutes: span.fromMinutes });
    }
    from = span.toMinutes;
  }
  if (from < 1440) {
    dry.push({ fromMinutes: from, toMinutes: 1440 });
  }
  return intersectWindows(windows, dry);
}

function heldSpan(hold: PlanHold, on: string): MinuteWindow | null {
  if (on < hold.fromOn || on > hold.toOn) {
    return null;
  }
  return { fromMinutes: on === hold.fromOn ? hold.fromMinutes : 0, toMinutes: on === hold.toOn ? hold.toMinutes : 1440 };
}

/** Hours in which rain, or wind that matters to this ground, keeps the hose off. */
function roughHours(input: PlanInput, day: PlanDay, isSeeded: boolean): MinuteWindow[] {
  const spans: MinuteWindow[] = [];
  for (let hour = 0; hour < 24; hour += 1) {
    const rainy = (day.hours?.rainMm?.[hour] ?? 0) >= RAINY_HOUR_MM;
    const windy = !isSeeded && (day.hours?.windMps?.[hour] ?? 0) > input.maxWindMps;
    if (rainy || windy) {
      spans.push({ fromMinutes: hour * 60, toMinutes: hour * 60 + 60 });
    }
  }
  return spans;
}

/** Whether the wind of the day as a whole keeps grass from being watered. */
function isWindyDay(input: PlanInput, day: PlanDay, isSeeded: boolean): boolean {
  return !isSeeded && day.hours?.windMps === undefined && day.windMps !== null && day.windMps > input.maxWindMps;
}

function groundDay(input: PlanInput, day: PlanDay, index: number, homeWindows: readonly MinuteWindow[], zoneId: string, isSeeded: boolean, device: PlanDevice | undefined): GroundDay {
  const facts: RuleFacts = { zoneId, permits: input.permits, waterStage: input.waterStage, addressDigit: input.addressDigit, ...(device ? { device } : {}) };
  const opening = openingByRules(input.rules, day.on, isSeeded, facts);
  const ahead = [{ fromMinutes: index === 0 ? input.notBeforeMinutes ?? 0 : 0, toMinutes: 1440 }];
  const hold = input.holds?.find((each) => each.zoneId === zoneId && heldSpan(each, day.on) !== null);
  const held = (input.holds ?? []).filter((each) => each.zoneId === zoneId).flatMap((each) => heldSpan(each, day.on) ?? []);
  const ruled = intersectWindows(opening.windows, ahead);
  const dry = withoutSpans(ruled, held);
  const calm = withoutSpans(dry, roughHours(input, day, isSeeded));
  const openWindows = intersectWindows(calm, frostFreeWindows(day));
  const work = intersectWindows(openWindows, homeWindows);
  const leastMinutes = input.leadMinutes + (isSeeded ? 1 : planDefaults.leastSetMinutes);
  const closed = ((): Reason | null => {
    if (opening.closedBy) {
      return { code: 'closed_by_rule', values: ruleValues(opening.closedBy) };
    }
    if (day.dayOff) {
      return reason('day_off');
    }
    const allHome = normalizeWindows(day.homeWindows);
    if (allHome.length === 0) {
      return reason('nobody_home');
    }
    if (intersectWindows(opening.windows, allHome).length === 0) {
      const rule = opening.narrowedBy[opening.narrowedBy.length - 1];
      return { code: 'rule_and_home_apart', values: rule ? ruleValues(rule) : { rule: '', source: '' } };
    }
    if (index === 0 && input.notBeforeMinutes !== null && totalMinutes(intersectWindows(ruled, homeWindows)) < leastMinutes) {
      return reason('past_for_today', { nowMinutes: input.notBeforeMinutes });
    }
    if (hold && intersectWindows(dry, homeWindows).length === 0) {
      return reason('on_hold', { name: hold.name, toOn: hold.toOn, toMinutes: hold.toMinutes });
    }
    if (intersectWindows(calm, homeWindows).length === 0) {
      return reason('rain_or_wind_hours');
    }
    if (work.length === 0) {
      return reason('frost', { tminC: day.tminC });
    }
    if (isWindyDay(input, day, isSeeded)) {
      return reason('windy', { windMps: day.windMps ?? 0, limitMps: input.maxWindMps });
    }
    if (Math.max(...work.map((window) => window.toMinutes - window.fromMinutes)) < leastMinutes) {
      return reason('no_time_left', { wantedMinutes: leastMinutes, hadMinutes: totalMinutes(work) });
    }
    return null;
  })();
  return { openWindows, workMinutes: totalMinutes(work), mustBeAttended: mustBeAttended(input.rules, day.on, isSeeded, facts), closed };
}

/** What each day of the plan offers. */
export function dayContexts(input: PlanInput): DayContext[] {
  // Zones differ only where a hold or a permit names them.
  const named = new Set([...(input.holds ?? []).map((hold) => hold.zoneId), ...(input.permits ?? []).flatMap((permit) => permit.zoneIds)]);
  return input.days.map((day, index) => {
    const ahead = [{ fromMinutes: index === 0 ? input.notBeforeMinutes ?? 0 : 0, toMinutes: 1440 }];
    const homeWindows = day.dayOff ? [] : intersectWindows(normalizeWindows(day.homeWindows), ahead);
    const kept = new Map<string, GroundDay>();
    const fullRainMm = usefulRainMm(day);
    return {
      index, day, homeWindows, fullRainMm,
      expectedRainMm: expectedRainMm(day, index),
      rainChance: fullRainMm > 0 ? believedRainChance(day, index) : 0,
      groundOf(zoneId: string, isSeeded: boolean, device: PlanDevice | undefined): GroundDay {
        const key = `${named.has(zoneId) ? zoneId : ''}|${isSeeded ? 1 : 0}|${device ?? 'sprinkler'}`;
        const found = kept.get(key) ?? groundDay(input, day, index, homeWindows, zoneId, isSeeded, device);
        kept.set(key, found);
        return found;
      },
    };
  });
}
