import { stateAfter, stepZoneDay, type ZoneState } from '@/scheduling/budget';
import type { EstablishmentStage } from '@/scheduling/establishment';
import { believedRainChance } from '@/scheduling/planning/expectedRain';
import type { Planner, PlanLock, PlanResult } from '@/scheduling/planning/types';
import { mmFromInches } from '@/scheduling/units/conversions';
import { weekdayOf } from '@/scheduling/units/civilDay';
import type { SeasonForecast } from './seasonForecast';
import { stateInto, type Ground, type RunSet } from './seasonGround';
import { packDay, type DayOrders } from './seasonPacking';
import { planInputOf, type MorningInput, type OutlookDay } from './seasonPlanInput';
import { budgetZoneOn, type SeasonYard } from './seasonYards';
import type { SeasonWeather, TrueDay } from './seasonWeather';

/** Who decides about the water of a yard, morning by morning. */
export interface SeasonController {
  morning(index: number): DayOrders;
  /** Called when the day is over and its weather known. */
  evening?(index: number, sets: readonly RunSet[]): void;
}

/** What a controller may be made from; only a clairvoyant takes the ground and the weather to come. */
export interface SeasonPlace {
  yard: SeasonYard;
  season: SeasonWeather;
  forecast: SeasonForecast;
  ground: Ground;
}

export type ControllerMaker = (place: SeasonPlace) => SeasonController;

const NOTHING: DayOrders = { sets: [], outings: 0, moves: 0, dosesWanted: 0, dosesKept: 0 };

/** Waters never. */
export const neverWaters: ControllerMaker = () => ({ morning: () => NOTHING });

/** Works through minutes owed to each position as the hours allow, in the order of the positions. */
class Owed {
  private readonly minutes = new Map<string, number>();

  constructor(private readonly yard: SeasonYard) {}

  set(positionId: string, minutes: number): void {
    this.minutes.set(positionId, minutes);
  }

  pay(on: string): DayOrders {
    const orders = packDay(this.yard, on, this.yard.positions.map(({ id }) => ({ positionId: id, minutes: this.minutes.get(id) ?? 0 })));
    for (const set of orders.sets) this.minutes.set(set.positionId, (this.minutes.get(set.positionId) ?? 0) - set.minutes);
    return orders;
  }
}

const FIXED_MINUTES = 20;

/** Three times a week, 20 minutes on every position, whatever the weather. @param scale - more or less of it */
export const fixedRule = (scale: number): ControllerMaker => ({ yard, season }) => {
  const owed = new Owed(yard);
  return {
    morning(index) {
      const on = dayAt(season, index).on;
      if (yard.thumbWeekdays.includes(weekdayOf(on))) yard.positions.forEach(({ id }) => owed.set(id, FIXED_MINUTES * scale));
      return owed.pay(on);
    },
  };
};

/** *An inch a week less rain*, in two waterings: half of what the last seven days lacked, by the mean of the cups. @param scale - more or less of the inch */
export const inchLessRain = (scale: number): ControllerMaker => ({ yard, season }) => {
  const owed = new Owed(yard);
  const days = [yard.thumbWeekdays[0], yard.thumbWeekdays[2]];
  return {
    morning(index) {
      const on = dayAt(season, index).on;
      if (days.includes(weekdayOf(on))) {
        const rainMm = season.days.slice(index - 7, index).reduce((sum, day) => sum + (day.weather.precipitationMm ?? 0), 0);
        const wantedMm = Math.max(0, mmFromInches(1) * scale - rainMm) / 2;
        yard.positions.forEach(({ id, rateMmPerHour }) => owed.set(id, (wantedMm * 60) / rateMmPerHour));
      }
      return owed.pay(on);
    },
  };
};

function dayAt(season: SeasonWeather, index: number): TrueDay {
  const day = season.days[index];
  if (!day) throw new Error(`${season.station} ${season.year} has no day ${index}.`);
  return day;
}

/** The orders that one day of a plan gives. */
export function ordersOf(plan: PlanResult, dayIndex: number, { input }: MorningInput): DayOrders {
  const day = plan.days[dayIndex];
  if (!day) throw new Error(`The plan has no day ${dayIndex}.`);
  const sets = day.rounds.flatMap((round) => round.sets);
  let dosesWanted = 0;
  for (const zone of input.zones) {
    const leftToRain = day.zonesWithout.some((without) => without.zoneId === zone.id && without.reasons.some((reason) => reason.code === 'doses_left_to_rain'));
    const patches = input.positions.filter((position) => position.zoneId === zone.id).length;
    dosesWanted += leftToRain ? 0 : (zone.seed?.dosesByDay[dayIndex]?.length ?? 0) * patches;
  }
  return {
    sets: sets.map(({ positionId, startMinutes, minutes }) => ({ positionId, startMinutes, minutes })),
    outings: day.rounds.length, moves: day.rounds.reduce((sum, round) => sum + round.moves.length, 0),
    dosesWanted, dosesKept: sets.filter((set) => set.kind === 'dose').length,
  };
}

/** Everything that Dapple is told on a morning: yesterday's weather, the forecast, and its own balance of the sets it knows of. */
export function dapplesMorning(place: Omit<SeasonPlace, 'ground'>, index: number, states: ReadonlyMap<string, ZoneState>): MorningInput {
  const { yard, season, forecast } = place;
  const outlook = forecast.on(index).map(({ weather, rainProbabilityPct }, lead): OutlookDay => {
    const { sunriseMinutes, sunsetMinutes } = dayAt(season, index + lead);
    return { weather, rainProbabilityPct, sunriseMinutes, sunsetMinutes };
  });
  return planInputOf({ on: dayAt(season, index).on, yard, site: season.site, past: season.days.slice(0, index).map((day) => day.weather), outlook, states });
}

/** Sets of a plan on the days from one on, as the next plan is told of them. */
function setsFrom(plan: PlanResult, on: string): PlanLock[] {
  return plan.days.filter((day) => day.on >= on).flatMap((day) => day.rounds.flatMap((round) => round.sets.filter((set) => set.kind === 'set')
    .map(({ positionId, startMinutes, minutes }) => ({ positionId, on: day.on, startMinutes, minutes }))));
}

/**
 * Dapple with a planner: plans ten days every morning, told of the plan before, and does the first. Its own balance is closed every evening with the day's weather and sets, as the
 * service does; it knows nothing of what ran off.
 */
export const dapple = (planner: Planner, watch?: (input: MorningInput, index: number) => void): ControllerMaker => (place) => {
  const { yard, season, ground } = place;
  const states = new Map(ground.states);
  let stages = new Map<string, EstablishmentStage>();
  let plan: PlanResult | null = null;
  return {
    morning(index) {
      for (const position of yard.positions) {
        const zone = yard.zones.find((one) => one.id === position.zoneId);
        const state = states.get(position.id);
        if (zone && state) states.set(position.id, stateInto(zone, dayAt(season, index).on, state));
      }
      const morning = dapplesMorning({ yard, season, forecast: place.forecast }, index, states);
      if (plan !== null) morning.input.previousPlan = setsFrom(plan, morning.input.startOn);
      watch?.(morning, index);
      stages = morning.stages;
      plan = planner.plan(morning.input);
      return ordersOf(plan, 0, morning);
    },
    evening(index, sets) {
      for (const position of yard.positions) {
        const zone = yard.zones.find((one) => one.id === position.zoneId);
        const state = states.get(position.id);
        if (!zone || !state) continue;
        const { on, et0Mm, shadedEt0Mm, rainMm } = ground.demandAt(zone.id, index);
        const minutes = sets.filter((set) => set.positionId === position.id).reduce((sum, set) => sum + set.minutes, 0);
        const irrigationMm = (minutes * position.rateMmPerHour) / 60 / position.runTimeMultiplier;
        states.set(position.id, stateAfter(stepZoneDay(state, budgetZoneOn(zone, on, false), { on, et0Mm, shadedEt0Mm, rainMm, irrigationMm, stage: stages.get(zone.id) ?? null })));
      }
    },
  };
};

/**
 * The same planner with the true weather and the true state of the ground. Rain is told so that the planner's own doubt about far days leaves exactly
 * what comes.
 * @param dayCount - days it looks ahead
 * @param keptDays - days it carries out before it plans again; nothing new comes to its knowledge meanwhile
 */
export const plannerWhoKnows = (planner: Planner, dayCount: number, keptDays: number): ControllerMaker => ({ yard, season, ground }) => {
  let plan: PlanResult | null = null;
  let morning: MorningInput | null = null;
  let plannedAt = 0;
  return {
    morning(index) {
      if (plan === null || morning === null || index - plannedAt >= keptDays) {
        const outlook = season.days.slice(index, index + dayCount).map((day, lead): OutlookDay => ({
          ...day, rainProbabilityPct: 100,
          weather: { ...day.weather, precipitationMm: (day.weather.precipitationMm ?? 0) / believedRainChance({ rainProbabilityPct: 100 }, lead) },
        }));
        morning = planInputOf({ on: dayAt(season, index).on, yard, site: season.site, past: season.days.slice(0, index).map((day) => day.weather), outlook, states: ground.states });
        plan = planner.plan(morning.input);
        plannedAt = index;
      }
      return ordersOf(plan, index - plannedAt, morning);
    },
  };
};

