import type { EstablishmentSchedule } from '@/scheduling/establishment/establishmentSchedule';
import type { GrassId } from '@/scheduling/grass';
import type { MinuteWindow, PlanRule } from './types';
import type { RuleFacts } from './waterRules';

/** A day of the climate by which a year is weighed. */
export interface FitDay {
  on: string;
  et0Mm: number;
  rainMm: number;
  tminC: number;
  tmaxC: number;
  /** Nobody recorded it: temperatures by the season, no rain counted. */
  isEstimated: boolean;
}

export interface FitSowing {
  sownOn: string;
  grass: GrassId;
  schedule: EstablishmentSchedule;
}

export interface FitZone {
  id: string;
  name: string;
  areaM2: number;
  /** Lower is served first. */
  priority: number;
  /** Unstressed demand over ET0 in the open, January first [–]. */
  demandShareByMonth: readonly number[];
  totalAvailableMm: number;
  refillLineMm: number;
  resting: boolean;
  /** A sowing that runs or is meant to; null for none. */
  sowing: FitSowing | null;
}

export interface FitPosition {
  id: string;
  zoneId: string;
  tapId: string;
  rateMmPerHour: number;
  runTimeMultiplier: number;
  wettedAreaM2: number;
  /** Null where the hose is not known. */
  hose: { lengthM: number; boreMm: number } | null;
}

export interface FitTap {
  id: string;
  name: string;
  flowLpm: number;
  shutOffTimer: boolean;
}

/** A yard and a climate to weigh its year by. */
export interface MonthFitInput {
  /** Today; the year begins with its month. */
  startOn: string;
  /** Whole years of days, oldest first, at least one. */
  climate: readonly FitDay[];
  zones: readonly FitZone[];
  positions: readonly FitPosition[];
  taps: readonly FitTap[];
  rules: readonly PlanRule[];
  /** Stage of water shortage and house number, as they are today: nobody knows those of next year. */
  ruleFacts?: Pick<RuleFacts, 'waterStage' | 'addressDigit'>;
  /** By weekday, 0 = Sunday. */
  homeByWeekday: readonly (readonly MinuteWindow[])[];
  moveMinutes: number;
  leadMinutes: number;
}

/** Hose-hours of one tap in one month. */
export interface TapMonth {
  tapId: string;
  neededHours: number;
  hadHours: number;
}

export interface FitMonth {
  /** 'YYYY-MM' */
  month: string;
  /** Mean of the years, moves and doses included [h]. */
  neededHours: number;
  /** The wettest and the driest of the years [h]. */
  leastHours: number;
  mostHours: number;
  /** Parts of `neededHours` [h]. */
  moveHours: number;
  doseHours: number;
  hadHours: number;
  /** What is lacking, tap by tap: time at one tap does not help the other [h]. */
  shortHours: number;
  /** Water drawn [L]. */
  litres: number;
  et0Mm: number;
  rainMm: number;
  isEstimated: boolean;
  taps: TapMonth[];
}

interface RemedyEffect {
  /** Hours that it frees in the tightest month [h]. */
  gainHours: number;
  /** What is then still lacking in that month, and over the year [h]. */
  leftHours: number;
  leftYearHours: number;
  fits: boolean;
}

/** One way to make the year fit, by itself. */
export type FitRemedy = RemedyEffect & (
  | { kind: 'fatter_hose'; tapId: string; boreMm: number; flowLpm: number }
  | { kind: 'second_hose'; tapId: string }
  | { kind: 'shut_off_timer'; tapId: string }
  | { kind: 'second_tap'; tapId: string }
  | { kind: 'helper_hour'; weekday: number; /** Hours a week that would close the tightest month [h]. */ neededHoursAWeek: number }
  | { kind: 'smaller_pattern'; zoneIds: string[] }
  | { kind: 'rest_zones'; zoneIds: string[] }
  | { kind: 'sow_another_month'; zoneId: string; month: string }
);

export interface MonthFit {
  months: FitMonth[];
  /** The month that lacks most; of a year that fits, the one that takes the greatest part of its hours. Null when nothing needs water. */
  tightestMonth: string | null;
  fits: boolean;
  /** What closes most of the gap first; empty when the year fits. */
  remedies: FitRemedy[];
  /** Whole years of climate behind it. */
  years: number;
}
