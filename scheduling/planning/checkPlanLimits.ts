import { civilDayParts } from '@/scheduling/units/civilDay';
import { PhysicsError, requireFinite, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units/physicsError';
import type { MinuteWindow, PlanInput, PlanPlace, PlanPosition } from './types';

/** Refuses windows outside of a day. @throws PhysicsError with the path of the field */
export function checkWindows(field: string, windows: readonly MinuteWindow[]): void {
  windows.forEach((window, index) => {
    requireRange(`${field}[${index}].fromMinutes`, window.fromMinutes, 0, 1440);
    requireRange(`${field}[${index}].toMinutes`, window.toMinutes, 0, 1440);
  });
}

function checkPlace(field: string, place: PlanPlace | undefined): void {
  if (place !== undefined) {
    requireFinite(`${field}.eastM`, place.eastM);
    requireFinite(`${field}.northM`, place.northM);
  }
}

function checkPosition(field: string, position: PlanPosition): void {
  checkPlace(`${field}.place`, position.place);
  if (position.heightM !== undefined) {
    requireFinite(`${field}.heightM`, position.heightM);
  }
  if (position.hoseLengthM !== undefined) {
    requireNonNegative(`${field}.hoseLengthM`, position.hoseLengthM);
  }
  if (position.weeklyLimit !== undefined) {
    requireNonNegative(`${field}.weeklyLimit.depthMm`, position.weeklyLimit.depthMm);
    position.weeklyLimit.appliedMm.forEach((depth, index) => requireNonNegative(`${field}.weeklyLimit.appliedMm[${index}]`, depth));
  }
}

function checkDays(input: PlanInput): void {
  input.days.forEach((day, index) => {
    const field = `days[${index}]`;
    if (day.paceFactor !== undefined) {
      requirePositive(`${field}.paceFactor`, day.paceFactor);
    }
    day.hours?.rainMm?.forEach((rain, hour) => requireNonNegative(`${field}.hours.rainMm[${hour}]`, rain));
    day.hours?.windMps?.forEach((wind, hour) => requireNonNegative(`${field}.hours.windMps[${hour}]`, wind));
  });
}

function checkSupply({ supply }: PlanInput): void {
  if (supply === undefined) {
    return;
  }
  requirePositive('supply.flowLpm', supply.flowLpm);
  requireNonNegative('supply.restMinutes', supply.restMinutes);
  if (supply.drawMinutesAtMost !== null) {
    requirePositive('supply.drawMinutesAtMost', supply.drawMinutesAtMost);
  }
}

/** Refuses impossible numbers in what limits a plan besides its weather, zones and positions. @throws PhysicsError with the path of the field */
export function checkPlanLimits(input: PlanInput): void {
  checkDays(input);
  input.taps.forEach((tap, index) => checkPlace(`taps[${index}].place`, tap.place));
  input.positions.forEach((position, index) => checkPosition(`positions[${index}]`, position));
  checkSupply(input);
  if (input.moveMinutesPerM !== undefined) {
    requireNonNegative('moveMinutesPerM', input.moveMinutesPerM);
  }
  if (input.waterStage !== undefined) {
    requireNonNegative('waterStage', input.waterStage);
  }
  if (input.addressDigit !== undefined && !(Number.isInteger(input.addressDigit) && input.addressDigit >= 0 && input.addressDigit <= 9)) {
    throw new PhysicsError('addressDigit', input.addressDigit, 'must be a digit from 0 to 9');
  }
  if (input.workBudget !== undefined) {
    requireNonNegative('workBudget', input.workBudget);
  }
  checkWindows('preferredWindows', input.preferredWindows ?? []);
  (input.holds ?? []).forEach((hold, index) => {
    civilDayParts(hold.fromOn, `holds[${index}].fromOn`);
    civilDayParts(hold.toOn, `holds[${index}].toOn`);
    checkWindows(`holds[${index}]`, [hold]);
  });
  (input.waterIns ?? []).forEach((waterIn, index) => {
    civilDayParts(waterIn.byOn, `waterIns[${index}].byOn`);
    requirePositive(`waterIns[${index}].depthMm`, waterIn.depthMm);
  });
  (input.permits ?? []).forEach((permit, index) => {
    civilDayParts(permit.fromOn, `permits[${index}].fromOn`);
    civilDayParts(permit.toOn, `permits[${index}].toOn`);
    checkWindows(`permits[${index}].allowed`, permit.allowed ?? []);
  });
  (input.monthCaps ?? []).forEach((cap, index) => {
    requireNonNegative(`monthCaps[${index}].capLitres`, cap.capLitres);
    requireNonNegative(`monthCaps[${index}].usedLitres`, cap.usedLitres);
  });
  [...(input.lockedSets ?? []).map((set, index) => [`lockedSets[${index}]`, set] as const), ...(input.previousPlan ?? []).map((set, index) => [`previousPlan[${index}]`, set] as const)].forEach(([field, set]) => {
    civilDayParts(set.on, `${field}.on`);
    requireRange(`${field}.startMinutes`, set.startMinutes, 0, 1440);
    requirePositive(`${field}.minutes`, set.minutes);
  });
}
