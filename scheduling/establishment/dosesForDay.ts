import { addDays } from '@/scheduling/units/civilDay';
import { PhysicsError, requirePositive, requireRange } from '@/scheduling/units/physicsError';
import type { EstablishmentSchedule, EstablishmentStage, StageDoses } from './establishmentSchedule';
import { stageOn, type StageQuestion } from './stageOn';

/** A light watering wanted at a time of day. */
export interface Dose {
  atMinutes: number;
  /** Net depth [mm]. */
  depthMm: number;
}

/** Daylight when there is no sunrise or no sunset [minutes after local midnight]: 6:00 to 18:00, a default. */
const DEFAULT_DAYLIGHT = { fromMinutes: 360, toMinutes: 1080 };

/** Daylight fractions of the first and the last of three and more doses: from when the dew has dried to early enough to dry before night. Default. */
const FIRST_OF_MANY = 0.25;
const LAST_OF_MANY = 0.72;

/**
 * When a day's doses fall as fractions of daylight, 0 at sunrise and 1 at sunset. One in the early morning; two in the morning and at midday;
 * more spread over the drying hours.
 * Source: seed dries by day and night dew holds it over; a seeding firm's two rounds at 8 to 9 am and 1 pm. Defaults.
 */
export function doseFractions(dosesPerDay: number): number[] {
  if (dosesPerDay <= 0) return [];
  if (dosesPerDay === 1) return [0.1];
  if (dosesPerDay === 2) return [0.2, 0.5];
  return Array.from({ length: dosesPerDay }, (_, index) => FIRST_OF_MANY + ((LAST_OF_MANY - FIRST_OF_MANY) * index) / (dosesPerDay - 1));
}

/**
 * Refuses a stage's doses that cannot be given.
 * @throws PhysicsError with the field named
 */
export function checkStageDoses(doses: StageDoses): void {
  if (!Number.isInteger(doses.dosesPerDay)) {
    throw new PhysicsError('dosesPerDay', doses.dosesPerDay, 'must be a whole number');
  }
  requireRange('dosesPerDay', doses.dosesPerDay, 0, 8);
  if (!Number.isInteger(doses.everyDays)) {
    throw new PhysicsError('everyDays', doses.everyDays, 'must be a whole number of days');
  }
  requireRange('everyDays', doses.everyDays, 1, 30);
  if (doses.dosesPerDay > 0) {
    requirePositive('depthMm', doses.depthMm);
    requireRange('depthMm', doses.depthMm, 0, 25);
  }
  if (doses.timesMinutes !== null) {
    if (doses.timesMinutes.length !== doses.dosesPerDay) {
      throw new PhysicsError('timesMinutes', doses.timesMinutes.length, `must name ${doses.dosesPerDay} times`);
    }
    doses.timesMinutes.forEach((time, index) => requireRange(`timesMinutes[${index}]`, time, 0, 1439));
  }
  if (doses.forDays !== null) {
    requireRange('forDays', doses.forDays, 0, 365);
  }
}

export interface DoseQuestion {
  schedule: EstablishmentSchedule;
  stage: EstablishmentStage;
  /** Days in the stage so far, 0 on its first day; decides with `everyDays` whether this day has doses. */
  dayInStage: number;
  sunriseMinutes: number | null;
  sunsetMinutes: number | null;
}

/**
 * The doses that a schedule wants on a day, in order of time.
 * @returns empty on a day without doses and for a stage the schedule does not name
 * @throws PhysicsError when the schedule is impossible
 */
export function dosesForDay(question: DoseQuestion): Dose[] {
  const doses = question.schedule.stages.find((each) => each.stage === question.stage);
  if (!doses) {
    return [];
  }
  checkStageDoses(doses);
  if (doses.dosesPerDay === 0 || question.dayInStage % doses.everyDays !== 0) {
    return [];
  }
  const { sunriseMinutes, sunsetMinutes } = question;
  const hasDaylight = sunriseMinutes !== null && sunsetMinutes !== null && sunsetMinutes > sunriseMinutes;
  const from = hasDaylight ? sunriseMinutes : DEFAULT_DAYLIGHT.fromMinutes;
  const to = hasDaylight ? sunsetMinutes : DEFAULT_DAYLIGHT.toMinutes;
  const times = doses.timesMinutes ?? doseFractions(doses.dosesPerDay).map((fraction) => Math.round(from + fraction * (to - from)));
  return [...times].sort((a, b) => a - b).map((atMinutes) => ({ atMinutes, depthMm: doses.depthMm }));
}

export interface SowingOutlook {
  /** Stage and day number on the first day. */
  dayNumber: number;
  stage: EstablishmentStage;
  stageByDay: EstablishmentStage[];
  dosesByDay: Dose[][];
}

/**
 * Stages and doses of a sowing over the days of a plan.
 * @param days - sunrise and sunset of each day from startOn on
 */
export function sowingOutlook(question: Omit<StageQuestion, 'on' | 'schedule'> & {
  schedule: EstablishmentSchedule;
  startOn: string;
  days: { sunriseMinutes: number | null; sunsetMinutes: number | null }[];
}): SowingOutlook {
  const { startOn, days, ...sowing } = question;
  const answers = days.map((_, index) => stageOn({ ...sowing, on: addDays(startOn, index) }));
  const first = stageOn({ ...sowing, on: startOn });
  return {
    dayNumber: first.dayNumber,
    stage: first.stage,
    stageByDay: answers.map((answer) => answer.stage),
    dosesByDay: answers.map((answer, index) => (answer.dayNumber < 0 ? [] : dosesForDay({
      schedule: question.schedule, stage: answer.stage, dayInStage: answer.dayInStage,
      sunriseMinutes: days[index]?.sunriseMinutes ?? null, sunsetMinutes: days[index]?.sunsetMinutes ?? null,
    }))),
  };
}
