import type { GrassId } from '@/scheduling/grass/grass';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import { PhysicsError, requireRange } from '@/scheduling/units/physicsError';
import { DEFAULT_SCHEDULE } from './defaultSchedule';
import { ESTABLISHMENT_STAGES, type EstablishmentSchedule, type EstablishmentStage } from './establishmentSchedule';
import { dailyProgress, FIELD_FACTORS, grassesOf, type ClockPace } from './thermalClock';

/** Soil temperature taken when none is known at all [°C]: the middle of cool-season sowing. A default. */
export const DEFAULT_SOIL_TEMPERATURE_C = 15;

/** A stage that somebody saw on the ground; it overrules the clock from that day on. */
export interface SeenStage {
  stage: EstablishmentStage;
  on: string;
}

export interface StageQuestion {
  sownOn: string;
  on: string;
  grass: GrassId;
  /** Mean soil temperature at seed depth of each day from the day of sowing on [°C]; days beyond its end take its last value. */
  dailySoilTempsC: number[];
  /** For the length of stages; left out, the default schedule. */
  schedule?: EstablishmentSchedule;
  seen?: SeenStage[];
}

export interface StageAnswer {
  stage: EstablishmentStage;
  /** Days since sowing, 0 on the day of sowing; negative before it. */
  dayNumber: number;
  /** Days in this stage so far, 0 on its first. */
  dayInStage: number;
  /** Stage if everything goes slower or faster than likely. */
  range: { slow: EstablishmentStage; fast: EstablishmentStage };
  /** When the first green shows and when most is up, likely with a range; null when that lies beyond a year. */
  firstUpOn: { fast: string | null; likely: string | null; slow: string | null };
  mostlyUpOn: { fast: string | null; likely: string | null; slow: string | null };
  /** Soil temperatures not given: from which day on one was assumed, and which. Null when all were given. */
  assumed: { fromOn: string; temperatureC: number } | null;
}

const YEAR_DAYS = 366;

function lengthOf(schedule: EstablishmentSchedule, stage: EstablishmentStage): number | null {
  return schedule.stages.find((each) => each.stage === stage)?.forDays ?? null;
}

interface Pass {
  stages: { stage: EstablishmentStage; fromDay: number }[];
  firstUpDay: number | null;
  mostlyUpDay: number | null;
}

/** First days on which the first and the slowest grass of the sowing pass their shares of the laboratory heat sum. */
function emergenceDays(question: StageQuestion, pace: ClockPace, temperatureC: (day: number) => number): { firstUpDay: number | null; mostlyUpDay: number | null } {
  const grasses = grassesOf(question.grass);
  const progress = grasses.map(() => 0);
  let firstUpDay: number | null = null;
  for (let day = 0; day < YEAR_DAYS; day += 1) {
    if (firstUpDay === null && Math.max(...progress) >= FIELD_FACTORS[pace].firstUp) {
      firstUpDay = day;
    }
    if (Math.min(...progress) >= FIELD_FACTORS[pace].mostlyUp) {
      return { firstUpDay, mostlyUpDay: day };
    }
    grasses.forEach((grass, index) => {
      progress[index] = (progress[index] ?? 0) + dailyProgress(grass, temperatureC(day));
    });
  }
  return { firstUpDay, mostlyUpDay: null };
}

/** The day on which each stage begins at a pace, what was seen overruling the clock. */
function passAt(question: StageQuestion, pace: ClockPace, temperatureC: (day: number) => number): Pass {
  const schedule = question.schedule ?? DEFAULT_SCHEDULE;
  const { firstUpDay, mostlyUpDay } = emergenceDays(question, pace, temperatureC);
  const seen = (question.seen ?? [])
    .map((each) => ({ rank: ESTABLISHMENT_STAGES.indexOf(each.stage), day: daysBetween(question.sownOn, each.on) }))
    .filter((each) => each.day <= daysBetween(question.sownOn, question.on))
    .sort((a, b) => a.day - b.day || a.rank - b.rank);
  const last = seen[seen.length - 1];
  const stages: Pass['stages'] = [];
  ESTABLISHMENT_STAGES.forEach((stage, rank) => {
    if (last && rank < last.rank) {
      return;
    }
    if (last && rank === last.rank) {
      // The first of an unbroken row of sightings of this stage is when it began.
      const before = seen.map((each) => each.rank !== last.rank).lastIndexOf(true);
      stages.push({ stage, fromDay: seen[before + 1]?.day ?? last.day });
      return;
    }
    const previous = stages[stages.length - 1];
    if (!previous) {
      stages.push({ stage, fromDay: 0 });
      return;
    }
    const days = lengthOf(schedule, previous.stage);
    const byClock = previous.stage === 'sown' ? firstUpDay : previous.stage === 'coming_up' ? mostlyUpDay : null;
    const from = days !== null ? previous.fromDay + days : byClock !== null ? Math.max(byClock, previous.fromDay) : Infinity;
    // What somebody saw later than the clock's day holds the clock back: a stage cannot be over before it was last seen.
    stages.push({ stage, fromDay: last && rank > last.rank ? Math.max(from, last.day + 1) : from });
  });
  return { stages, firstUpDay, mostlyUpDay };
}

function stageAt(pass: Pass, day: number): { stage: EstablishmentStage; fromDay: number } {
  let found = pass.stages[0] ?? { stage: 'sown' as const, fromDay: 0 };
  for (const each of pass.stages) {
    if (each.fromDay <= day) {
      found = each;
    }
  }
  return found;
}

/**
 * The stage of a sowing on a day: by heat sum until most is up (first green of the fastest grass, then the slowest), by the lengths in the schedule
 * after that, and by what people saw, which overrules both. Before the day of sowing the stage is 'sown' with a negative day number.
 * @throws PhysicsError for unreal days, a temperature outside −40 to 60 °C, a day more than ten years from sowing
 * Source: thermal time (G.1: Larsen and Bibby 2005), slower in the field; lengths of rooting and taper are defaults.
 */
export function stageOn(question: StageQuestion): StageAnswer {
  question.dailySoilTempsC.forEach((value, index) => requireRange(`dailySoilTempsC[${index}]`, value, -40, 60));
  const dayNumber = daysBetween(question.sownOn, question.on);
  if (Math.abs(dayNumber) > 3660) {
    throw new PhysicsError('on', question.on, 'must lie within ten years of sowing');
  }
  const given = question.dailySoilTempsC;
  const lastC = given[given.length - 1] ?? DEFAULT_SOIL_TEMPERATURE_C;
  const temperatureC = (day: number): number => given[day] ?? lastC;
  const passes = { fast: passAt(question, 'fast', temperatureC), likely: passAt(question, 'likely', temperatureC), slow: passAt(question, 'slow', temperatureC) };
  const { stage, fromDay } = stageAt(passes.likely, dayNumber);
  const dated = (day: number | null): string | null => (day === null ? null : addDays(question.sownOn, day));
  return {
    stage,
    dayNumber,
    dayInStage: Math.max(0, dayNumber - fromDay),
    range: { slow: stageAt(passes.slow, dayNumber).stage, fast: stageAt(passes.fast, dayNumber).stage },
    firstUpOn: { fast: dated(passes.fast.firstUpDay), likely: dated(passes.likely.firstUpDay), slow: dated(passes.slow.firstUpDay) },
    mostlyUpOn: { fast: dated(passes.fast.mostlyUpDay), likely: dated(passes.likely.mostlyUpDay), slow: dated(passes.slow.mostlyUpDay) },
    assumed: given.length > dayNumber ? null : { fromOn: addDays(question.sownOn, given.length), temperatureC: lastC },
  };
}
