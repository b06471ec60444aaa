/** How far a sowing has come. Names and order: sown → coming up → rooting → taper → established. */
export type EstablishmentStage = 'sown' | 'coming_up' | 'rooting' | 'taper' | 'established';

/** All stages in the order in which a sowing passes through them. */
export const ESTABLISHMENT_STAGES: readonly EstablishmentStage[] = ['sown', 'coming_up', 'rooting', 'taper', 'established'];

/** The watering of one stage: what a consultant tunes. */
export interface StageDoses {
  stage: EstablishmentStage;
  /** Doses on a day with doses [count], 0 for none. */
  dosesPerDay: number;
  /** 1 = every day, 2 = every second day, … [days] */
  everyDays: number;
  /** Net depth of one dose [mm]. */
  depthMm: number;
  /** Start of each dose [minutes after local midnight]; null spreads them over the daylight. */
  timesMinutes: number[] | null;
  /** Length of the stage [days]; null lets the thermal clock and what is seen decide. */
  forDays: number | null;
}

/** A whole establishment schedule, one entry a stage, in the order of ESTABLISHMENT_STAGES. */
export interface EstablishmentSchedule {
  stages: StageDoses[];
}
