import type { EstablishmentSchedule } from './establishmentSchedule';

/** Where the default doses come from. They are defaults to tune, in depth, never in minutes. */
export const DEFAULT_SCHEDULE_SOURCE =
  'Maryland: several doses of 1/16 to 1/4 in on drying days; Purdue: 2 to 4 light ones a day; Iowa: fewer and deeper from 1 to 2 in of height; California: every other day, then 1 to 2 deep a week to 8 weeks';

/** The schedule of a new sowing until somebody tunes it: light doses by daylight, then fewer and deeper. */
export const DEFAULT_SCHEDULE: EstablishmentSchedule = {
  stages: [
    { stage: 'sown', dosesPerDay: 4, everyDays: 1, depthMm: 1.5, timesMinutes: null, forDays: null },
    { stage: 'coming_up', dosesPerDay: 3, everyDays: 1, depthMm: 2, timesMinutes: null, forDays: null },
    { stage: 'rooting', dosesPerDay: 2, everyDays: 1, depthMm: 3, timesMinutes: null, forDays: 14 },
    { stage: 'taper', dosesPerDay: 1, everyDays: 3, depthMm: 10, timesMinutes: null, forDays: 28 },
    { stage: 'established', dosesPerDay: 0, everyDays: 1, depthMm: 0, timesMinutes: null, forDays: null },
  ],
};
