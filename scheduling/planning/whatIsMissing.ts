import { beyondReachM } from './dayHabits';
import { reason } from './reasonNumbers';
import { openingByRules } from './waterRules';
import type { PlanInput, PlanPosition, Reason } from './types';

/** That a position lies beyond the end of its hose. */
export function outOfReach(input: PlanInput, position: PlanPosition): Reason {
  const tap = input.taps.find((each) => each.id === position.tapId);
  const distanceM = position.place && tap?.place ? Math.hypot(position.place.eastM - tap.place.eastM, position.place.northM - tap.place.northM) : 0;
  return reason('out_of_reach', { position: position.name, positionId: position.id, distanceM, hoseLengthM: position.hoseLengthM ?? 0 });
}

/** What a yard lacks before its plan can be whole, in the order in which a person would mend it. */
export function whatIsMissing(input: PlanInput): Reason[] {
  const missing: Reason[] = [];
  if (input.zones.length === 0) {
    missing.push(reason('no_zones'));
  }
  if (input.taps.length === 0) {
    missing.push(reason('no_taps'));
  }
  if (input.positions.length === 0) {
    missing.push(reason('no_positions'));
  }
  if (input.days.every((day) => day.homeWindows.every((window) => window.toMinutes <= window.fromMinutes))) {
    missing.push(reason('no_home_hours'));
  }
  const isShut = input.days.every((day) => openingByRules(input.rules, day.on, false, { waterStage: input.waterStage, addressDigit: input.addressDigit }).windows.length === 0);
  if (input.rules.length > 0 && isShut) {
    // One rule as written may be several to the planner.
    const names = [...new Set(input.rules.map((rule) => rule.name))].sort().join(', ');
    missing.push(reason('rules_exclude_all', { rules: names, days: input.dayCount }));
  }
  for (const rule of input.rules) {
    if (rule.kind === 'address_digit' && input.addressDigit === undefined) {
      missing.push(reason('no_address_digit', { rule: rule.name, source: rule.source ?? '' }));
    }
  }
  for (const zone of input.zones) {
    const own = input.positions.filter((position) => position.zoneId === zone.id);
    if (own.length === 0 && input.positions.length > 0) {
      missing.push(reason('zone_without_position', { zone: zone.name, zoneId: zone.id }));
      continue;
    }
    const served = own.reduce((sum, position) => sum + position.zoneShare, 0);
    if (own.length > 0 && served < 0.95) {
      missing.push(reason('zone_part_unserved', { zone: zone.name, zoneId: zone.id, servedPct: served * 100, areaM2: zone.areaM2 * (1 - served) }));
    }
  }
  for (const position of input.positions) {
    if (position.tapId === null) {
      missing.push(reason('position_without_tap', { position: position.name, positionId: position.id }));
    }
    const tap = input.taps.find((each) => each.id === position.tapId);
    if (beyondReachM(position.place, tap?.place, position.hoseLengthM) > 0) {
      missing.push(outOfReach(input, position));
    }
    if (position.rateMmPerHour === null) {
      missing.push(reason('position_without_rate', { position: position.name, positionId: position.id }));
    } else if (position.rateIsDefault) {
      missing.push(reason('rate_default', { position: position.name, positionId: position.id, rateMmPerHour: position.rateMmPerHour }));
    }
  }
  for (const tap of input.taps) {
    if (tap.flowIsDefault) {
      missing.push(reason('flow_default', { tap: tap.name, tapId: tap.id, flowLpm: tap.flowLpm }));
    }
  }
  return missing;
}
