import { addDays, civilDayParts } from '@/scheduling/units/civilDay';
import { PhysicsError, requireFinite, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units/physicsError';
import { checkPlanLimits, checkWindows } from './checkPlanLimits';
import type { PlanInput, PlanRule } from './types';

function checkRule(field: string, rule: PlanRule): void {
  if (rule.season !== null) {
    requireRange(`${field}.season.fromMonth`, rule.season.fromMonth, 1, 12);
    requireRange(`${field}.season.toMonth`, rule.season.toMonth, 1, 12);
    requireRange(`${field}.season.fromDay`, rule.season.fromDay, 1, 31);
    requireRange(`${field}.season.toDay`, rule.season.toDay, 1, 31);
  }
  if ((rule.kind === 'hours' || rule.kind === 'combination') && rule.allowed !== null) {
    checkWindows(`${field}.allowed`, rule.allowed);
  }
  if ((rule.kind === 'weekdays' || rule.kind === 'combination') && rule.weekdays !== null) {
    rule.weekdays.forEach((weekday, index) => requireRange(`${field}.weekdays[${index}]`, weekday, 0, 6));
  }
}

function checkIds(field: string, things: readonly { id: string }[]): Set<string> {
  const ids = new Set<string>();
  things.forEach((thing, index) => {
    if (ids.has(thing.id)) {
      throw new PhysicsError(`${field}[${index}].id`, thing.id, 'must not repeat');
    }
    ids.add(thing.id);
  });
  return ids;
}

/**
 * Refuses a plan input whose numbers cannot exist. A yard that merely lacks something passes.
 * @throws PhysicsError with the path of the field
 */
export function checkPlanInput(input: PlanInput): void {
  civilDayParts(input.startOn, 'startOn');
  if (!Number.isInteger(input.dayCount) || input.dayCount < 1 || input.dayCount > 60) {
    throw new PhysicsError('dayCount', input.dayCount, 'must be a whole number of days from 1 to 60');
  }
  if (input.days.length !== input.dayCount) {
    throw new PhysicsError('days', input.days.length, `must hold ${input.dayCount} days`);
  }
  if (input.notBeforeMinutes !== null) {
    requireRange('notBeforeMinutes', input.notBeforeMinutes, 0, 1440);
  }
  requireRange('moveMinutes', input.moveMinutes, 0, 240);
  requireRange('leadMinutes', input.leadMinutes, 0, 240);
  requireNonNegative('maxWindMps', input.maxWindMps);
  input.days.forEach((day, index) => {
    const field = `days[${index}]`;
    if (day.on !== addDays(input.startOn, index)) {
      throw new PhysicsError(`${field}.on`, day.on, 'must follow the day before');
    }
    requireNonNegative(`${field}.et0Mm`, day.et0Mm);
    requireNonNegative(`${field}.rainMm`, day.rainMm);
    requireFinite(`${field}.tminC`, day.tminC);
    requireFinite(`${field}.tmaxC`, day.tmaxC);
    if (day.tminC > day.tmaxC) {
      throw new PhysicsError(`${field}.tminC`, day.tminC, 'must not be above tmaxC');
    }
    if (day.rainProbabilityPct !== null) {
      requireRange(`${field}.rainProbabilityPct`, day.rainProbabilityPct, 0, 100);
    }
    if (day.windMps !== null) {
      requireNonNegative(`${field}.windMps`, day.windMps);
    }
    if (day.sunriseMinutes !== null) {
      requireRange(`${field}.sunriseMinutes`, day.sunriseMinutes, 0, 1440);
    }
    if (day.sunsetMinutes !== null) {
      requireRange(`${field}.sunsetMinutes`, day.sunsetMinutes, 0, 1440);
    }
    checkWindows(`${field}.homeWindows`, day.homeWindows);
  });
  const tapIds = checkIds('taps', input.taps);
  input.taps.forEach((tap, index) => requirePositive(`taps[${index}].flowLpm`, tap.flowLpm));
  const zoneIds = checkIds('zones', input.zones);
  input.zones.forEach((zone, index) => {
    const field = `zones[${index}]`;
    requirePositive(`${field}.areaM2`, zone.areaM2);
    requireFinite(`${field}.priority`, zone.priority);
    requirePositive(`${field}.totalAvailableMm`, zone.totalAvailableMm);
    requireRange(`${field}.refillLineMm`, zone.refillLineMm, 0, zone.totalAvailableMm);
    requireRange(`${field}.depletionMm`, zone.depletionMm, 0, zone.totalAvailableMm);
    requireNonNegative(`${field}.intakeMmPerHour`, zone.intakeMmPerHour);
    if (zone.demandMmByDay.length !== input.dayCount) {
      throw new PhysicsError(`${field}.demandMmByDay`, zone.demandMmByDay.length, `must hold ${input.dayCount} days`);
    }
    zone.demandMmByDay.forEach((demand, day) => requireNonNegative(`${field}.demandMmByDay[${day}]`, demand));
    if (zone.seed !== null) {
      if (zone.seed.dosesByDay.length !== input.dayCount) {
        throw new PhysicsError(`${field}.seed.dosesByDay`, zone.seed.dosesByDay.length, `must hold ${input.dayCount} days`);
      }
      zone.seed.dosesByDay.forEach((doses, day) => doses.forEach((dose, number) => {
        requireRange(`${field}.seed.dosesByDay[${day}][${number}].atMinutes`, dose.atMinutes, 0, 1440);
        requirePositive(`${field}.seed.dosesByDay[${day}][${number}].depthMm`, dose.depthMm);
      }));
    }
  });
  const positionIds = checkIds('positions', input.positions);
  input.positions.forEach((position, index) => {
    const field = `positions[${index}]`;
    if (!zoneIds.has(position.zoneId)) {
      throw new PhysicsError(`${field}.zoneId`, position.zoneId, 'must be one of the zones');
    }
    if (position.tapId !== null && !tapIds.has(position.tapId)) {
      throw new PhysicsError(`${field}.tapId`, position.tapId, 'must be one of the taps');
    }
    if (position.rateMmPerHour !== null) {
      requirePositive(`${field}.rateMmPerHour`, position.rateMmPerHour);
    }
    requireRange(`${field}.runTimeMultiplier`, position.runTimeMultiplier, 1, 10);
    requireRange(`${field}.zoneShare`, position.zoneShare, 0, 1);
    requireFinite(`${field}.sortOrder`, position.sortOrder);
    if (position.depletionMm !== null) {
      requireNonNegative(`${field}.depletionMm`, position.depletionMm);
    }
  });
  input.alreadyApplied.forEach((applied, index) => {
    const field = `alreadyApplied[${index}]`;
    if (!positionIds.has(applied.positionId)) {
      throw new PhysicsError(`${field}.positionId`, applied.positionId, 'must be one of the positions');
    }
    requireRange(`${field}.atMinutes`, applied.atMinutes, 0, 1440);
    requireNonNegative(`${field}.depthMm`, applied.depthMm);
  });
  checkIds('rules', input.rules);
  input.rules.forEach((rule, index) => checkRule(`rules[${index}]`, rule));
  checkPlanLimits(input);
}
