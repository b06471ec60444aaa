import type { EstablishmentStage } from '@/scheduling/establishment/establishmentSchedule';

/** A span within one civil day, half-open [fromMinutes, toMinutes), minutes after local midnight, 0 to 1440. */
export interface MinuteWindow {
  fromMinutes: number;
  toMinutes: number;
}

/** What a person wants most from the plan; weights in `planObjective.ts`. */
export type PlanPriority = 'keep_green' | 'spare_water' | 'spare_me' | 'let_rest';

/** What lays the water down, for rules that bind some devices only. */
export type PlanDevice = 'sprinkler' | 'soaker' | 'hand_held';

/** Weather of a day by the hour, 24 entries each, index 0 = midnight to 1:00. */
export interface PlanDayHours {
  /** Rain to expect [mm]. */
  rainMm?: readonly number[];
  windMps?: readonly number[];
}

/** One day of the plan: weather to expect and the hours when somebody is at home. */
export interface PlanDay {
  /** Civil day, 'YYYY-MM-DD'. */
  on: string;
  et0Mm: number;
  /** Forecast rain, not yet discounted for uncertainty [mm]. */
  rainMm: number;
  /** Chance of that rain from the forecast itself [%], null when the forecast gives none. */
  rainProbabilityPct: number | null;
  tminC: number;
  tmaxC: number;
  /** Wind at 2 m to expect in the watering hours [m/s], null when unknown. */
  windMps: number | null;
  /** Null in polar day and polar night. */
  sunriseMinutes: number | null;
  sunsetMinutes: number | null;
  homeWindows: MinuteWindow[];
  /** Hours of rain and wind within the day; left out, the day counts as a whole. */
  hours?: PlanDayHours;
  /** A day off: nobody is asked to do anything. */
  dayOff?: boolean;
  /** How much longer a move takes with whoever is there on this day; 1 when left out. */
  paceFactor?: number;
}

/** A place in the local plane of the yard [m]. */
export interface PlanPlace {
  eastM: number;
  northM: number;
}

export interface PlanTap {
  id: string;
  name: string;
  flowLpm: number;
  /** True when no bucket test stands behind flowLpm. */
  flowIsDefault: boolean;
  /** A shut-off timer ends a set by itself: somebody must be at home for its start, not for its end. */
  shutOffTimer: boolean;
  place?: PlanPlace;
}

/** What taps draw from together: a narrow house pipe or a well. */
export interface PlanSupply {
  name: string;
  /** Most that may be drawn at once [L/min]: taps whose flows together pass it run one after the other. */
  flowLpm: number;
  /** Rest between the end of one draw and the start of the next [min], on whatever tap; 0 for a house pipe. */
  restMinutes: number;
  /** Longest draw without a rest [min]; null for no such limit. */
  drawMinutesAtMost: number | null;
}

/** One light watering that a seedbed wants. */
export interface PlanDose {
  atMinutes: number;
  /** Net depth [mm]. */
  depthMm: number;
}

export interface PlanSeed {
  /** Days since sowing on the first day of the plan, the day of sowing being 0. */
  dayNumber: number;
  stage: EstablishmentStage;
  /** Wanted doses for each day of the plan, index 0 = startOn. */
  dosesByDay: PlanDose[][];
}

export interface PlanZone {
  id: string;
  name: string;
  areaM2: number;
  /** Lower is served first. */
  priority: number;
  /** Root-zone depletion at the start of the first day, before anything that happens on that day [mm]. */
  depletionMm: number;
  totalAvailableMm: number;
  /** Depletion at which the zone is due [mm]. */
  refillLineMm: number;
  /** Unstressed demand of the zone for each day of the plan [mm], index 0 = startOn. */
  demandMmByDay: number[];
  /** Steady intake of the soil on its slope [mm/h]. */
  intakeMmPerHour: number;
  /** Summer dormancy by choice: nothing is planned. */
  resting: boolean;
  seed: PlanSeed | null;
}

export interface PlanPosition {
  id: string;
  name: string;
  zoneId: string;
  /** Null when the position has no tap yet. */
  tapId: string | null;
  hoseId: string | null;
  sprinklerId: string | null;
  sprinklerName: string;
  /** Mean application rate over the patch [mm/h]; null when neither a test nor a flow and an area gives one. */
  rateMmPerHour: number | null;
  /** True when no catch-cup test stands behind the rate. */
  rateIsDefault: boolean;
  /** From the lower half of a catch-cup test, 1 when unknown, never below 1. */
  runTimeMultiplier: number;
  lowQuarterUniformity: number | null;
  /** Part of the zone's area that this position serves, 0 to 1. */
  zoneShare: number;
  sortOrder: number;
  /** Depletion of the position's own patch at the start of the first day [mm]; null takes the zone's. */
  depletionMm: number | null;
  device?: PlanDevice;
  place?: PlanPlace;
  /** Height above the lowest position [m]: of the sets of one round the highest comes first. */
  heightM?: number;
  /** Length of the hose from its tap [m]; a place farther off than this is out of reach. */
  hoseLengthM?: number;
  /** Most that the ground may get in any seven days [mm], over a drain field or beside a well head. */
  weeklyLimit?: { depthMm: number; name: string; source: string | null; /** Mean depth laid down on each of the six days before the first, oldest first [mm]. */ appliedMm: readonly number[] };
  /** The sprinkler stands on its marks and half-way between them in turns. */
  alternate?: { lastWasHalfWay: boolean };
}

/** Months and days between which a rule holds, both included; may run over New Year. */
export interface RuleSeason {
  fromMonth: number;
  fromDay: number;
  toMonth: number;
  toDay: number;
}

interface PlanRuleBase {
  id: string;
  name: string;
  /** Who says so, for example 'City code 14-2, read 2026-05-01'. */
  source: string | null;
  sourceOn: string | null;
  /** Null holds all year. */
  season: RuleSeason | null;
  /** The rule does not bind zones with a running sowing (a permit, or a clause for new seed). */
  exemptSeeded: boolean;
  /** Devices that the rule binds; left out, all of them. */
  devices?: readonly PlanDevice[];
  /** The rule holds from this stage of water shortage on; left out, always. */
  stage?: number;
}

/** A water rule as data. A set must satisfy every rule in force from its first to its last minute. */
export type PlanRule = PlanRuleBase & (
  | { kind: 'weekdays'; /** 0 = Sunday */ weekdays: number[] }
  | { kind: 'date_parity'; parity: 'odd' | 'even' }
  | { kind: 'hours'; allowed: MinuteWindow[] }
  | { kind: 'combination'; weekdays: number[] | null; parity: 'odd' | 'even' | null; allowed: MinuteWindow[] | null }
  | { kind: 'address_digit'; /** Weekdays open to each last digit of the house number, index 0 to 9. */ weekdaysByDigit: readonly (readonly number[])[] }
  | { kind: 'attended'; /** No hose may run unattended, shut-off timer or not. */ }
);

/** Leave to water newly seeded ground outside the rules. */
export interface PlanPermit {
  id: string;
  name: string;
  source: string | null;
  sourceOn: string | null;
  zoneIds: readonly string[];
  fromOn: string;
  /** Last day, included. */
  toOn: string;
  /** Months in which it does not hold, 1 to 12. */
  blackoutMonths: readonly number[];
  /** Minutes in which it allows water; null for all day. */
  allowed: MinuteWindow[] | null;
  /** Rules that it lifts; null for every rule. */
  liftsRuleIds: readonly string[] | null;
}

/** Time in which a zone must stay dry, from one minute of a day to one minute of another, the end not included. */
export interface PlanHold {
  zoneId: string;
  name: string;
  fromOn: string;
  fromMinutes: number;
  toOn: string;
  toMinutes: number;
}

/** Watering that a product needs. */
export interface PlanWaterIn {
  zoneId: string;
  name: string;
  /** First day on which it counts. */
  fromOn: string;
  /** Last day on which it counts. */
  byOn: string;
  /** Net depth wanted [mm]. */
  depthMm: number;
}

/** A set that a person fixed. */
export interface PlanLock {
  positionId: string;
  on: string;
  startMinutes: number;
  minutes: number;
}

/** Water that may be drawn in a civil month. */
export interface PlanMonthCap {
  /** 'YYYY-MM' */
  month: string;
  capLitres: number;
  usedLitres: number;
}

/** A set or dose already done on the first day of the plan. */
export interface AlreadyApplied {
  positionId: string;
  atMinutes: number;
  /** Net depth on the position's patch [mm]. */
  depthMm: number;
}

/** A day on which somebody skipped a position. */
export interface LeftOut {
  positionId: string;
  on: string;
}

export interface PlanInput {
  startOn: string;
  /** Days planned [days]; 10 in the product. */
  dayCount: number;
  /** On the first day nothing starts before this minute (now); null when the whole day is ahead. */
  notBeforeMinutes: number | null;
  alreadyApplied: AlreadyApplied[];
  /** Sets of established grass that somebody skipped: nothing is planned for the position on that day. */
  leftOut?: readonly LeftOut[];
  /** One entry for each day of the plan, in order. */
  days: PlanDay[];
  taps: PlanTap[];
  zones: PlanZone[];
  positions: PlanPosition[];
  rules: PlanRule[];
  /** Minutes for one move of the hose. */
  moveMinutes: number;
  /** Minutes to get ready at the start of a round. */
  leadMinutes: number;
  /** Above this wind only seed is watered [m/s]. */
  maxWindMps: number;
  /** What counts most; `keep_green` when left out. */
  priority?: PlanPriority;
  /** Minutes that each metre between two places adds to a move [min/m]; counts only where both places are known. */
  moveMinutesPerM?: number;
  /** Stage of water shortage in force; 0 when left out. */
  waterStage?: number;
  /** Last digit of the house number, for rules by address. */
  addressDigit?: number;
  permits?: readonly PlanPermit[];
  holds?: readonly PlanHold[];
  waterIns?: readonly PlanWaterIn[];
  supply?: PlanSupply;
  monthCaps?: readonly PlanMonthCap[];
  /** Hours in which people prefer to work. */
  preferredWindows?: readonly MinuteWindow[];
  /** Sets to keep exactly as they are unless that is impossible. */
  lockedSets?: readonly PlanLock[];
  /** Sets of the plan before this one, so that plans do not jump about. */
  previousPlan?: readonly PlanLock[];
  /** Evaluations of a patch's ten days that the search may spend; a default by the size of the yard when left out. */
  workBudget?: number;
}

/** Every code a reason can carry. Its numbers are in SI; `shared/reasons.ts` turns it into a sentence. */
export type ReasonCode =
  // why a set
  | 'due' | 'past_line' | 'brought_forward' | 'no_rain_before' | 'room_for_rain' | 'cut_by_time' | 'cut_by_intake'
  | 'second_cycle' | 'uneven' | 'rate_default' | 'dose' | 'dose_moved' | 'same_outing' | 'ahead_of_dry' | 'locked' | 'half_way' | 'water_in'
  // why a zone has none on a day
  | 'above_line' | 'held_for_rain' | 'resting' | 'already_watered' | 'left_out' | 'closed_by_rule' | 'nobody_home' | 'rule_and_home_apart' | 'past_for_today'
  | 'windy' | 'frost' | 'no_time_left' | 'no_dose_today' | 'doses_left_to_rain' | 'dose_not_kept'
  | 'waits_on_priority' | 'on_hold' | 'day_off' | 'month_cap' | 'weekly_limit' | 'water_in_missed' | 'rain_or_wind_hours' | 'supply_rest'
  // what is lacking
  | 'no_zones' | 'no_taps' | 'no_positions' | 'no_home_hours' | 'rules_exclude_all' | 'zone_without_position' | 'position_without_tap'
  | 'position_without_rate' | 'zone_part_unserved' | 'flow_default' | 'no_weather' | 'out_of_reach' | 'no_address_digit' | 'lock_impossible';

export interface Reason {
  code: ReasonCode;
  /** Numbers in SI (names end in their unit), civil days in names ending in `On`, names of things otherwise. */
  values: Record<string, number | string>;
}

export interface PlannedSet {
  positionId: string;
  zoneId: string;
  tapId: string;
  kind: 'set' | 'dose';
  startMinutes: number;
  /** Whole minutes of running water. */
  minutes: number;
  /** Net depth on the position's patch [mm]. */
  depthMm: number;
  /** Mean depth that the sprinkler lays down, net × run-time multiplier [mm]. */
  grossMm: number;
  /** Water drawn [L]. */
  litres: number;
  /** Place within the day, from 1. */
  order: number;
  /** At least one. */
  reasons: Reason[];
  /** Stands half-way between the marks this time. */
  halfWay?: boolean;
  /** A person fixed it. */
  locked?: boolean;
}

/** Shifting the hose and sprinkler between two sets of one tap. */
export interface PlannedMove {
  tapId: string;
  /** The move may begin here: the end of the set before. */
  startMinutes: number;
  minutes: number;
  fromPositionId: string;
  toPositionId: string;
}

/** The sets and moves of one outing. */
export interface PlannedRound {
  on: string;
  /** When to go out: the first set less the minutes to get ready. */
  startMinutes: number;
  endMinutes: number;
  sets: PlannedSet[];
  moves: PlannedMove[];
}

export interface ZoneWithout {
  zoneId: string;
  /** At least one. */
  reasons: Reason[];
}

/** A dose of a seedbed that the plan could not place. */
export interface MissedDose {
  zoneId: string;
  atMinutes: number;
  depthMm: number;
  reasons: Reason[];
}

export interface PlannedDay {
  on: string;
  rounds: PlannedRound[];
  /** Every zone that has no set and no dose on this day. */
  zonesWithout: ZoneWithout[];
  missedDoses: MissedDose[];
  /** Expected depletion at the end of the day by zone [mm]. */
  endDepletionMm: Record<string, number>;
}

/** Water that was wanted on a day and found no time. */
export interface PlanShortage {
  zoneId: string;
  on: string;
  shortMm: number;
  shortMinutes: number;
  litres: number;
  reasons: Reason[];
}

export interface PlanResult {
  /** Name and version of the planner that made it. */
  planner: string;
  days: PlannedDay[];
  shortages: PlanShortage[];
  /** What the yard lacks before the plan can be whole; empty when nothing is missing. */
  missing: Reason[];
}

/** A planner decides what to water when. It is pure and deterministic: the same input gives the same plan. */
export interface Planner {
  readonly name: string;
  /**
   * @throws PhysicsError with the field named when a number is impossible (NaN, a negative area, days out of order).
   *   A yard that lacks something is not an error: the result says what is missing.
   */
  plan(input: PlanInput): PlanResult;
}
