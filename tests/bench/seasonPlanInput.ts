import { stepZoneDay, zoneDemand, type ZoneDemand, type ZoneState } from '@/scheduling/budget';
import { DEFAULT_SCHEDULE, sowingOutlook, type EstablishmentStage } from '@/scheduling/establishment';
import { planDefaults } from '@/scheduling/planning/planDefaults';
import type { PlanInput, PlanZone } from '@/scheduling/planning/types';
import { steadyIntakeMmPerHour } from '@/scheduling/soil';
import { addDays, weekdayOf } from '@/scheduling/units/civilDay';
import { dailyReferenceEts, soilTemperaturesC, windAtTwoMetresMps, type DailyWeather, type WeatherSite } from '@/scheduling/weather';
import { budgetZoneOn, sowingDay, type SeasonYard, type SeasonZone } from './seasonYards';

/** A day ahead as somebody expects it. */
export interface OutlookDay {
  weather: DailyWeather;
  rainProbabilityPct: number;
  sunriseMinutes: number | null;
  sunsetMinutes: number | null;
}

/** All that is known on a morning. */
export interface Morning {
  on: string;
  yard: SeasonYard;
  site: WeatherSite;
  /** Weather of the days before, oldest first. */
  past: readonly DailyWeather[];
  outlook: readonly OutlookDay[];
  /** How each patch stands before anything happens on this day. */
  states: ReadonlyMap<string, ZoneState>;
}

/** A morning's plan input with the stage of every sowing on that day. */
export interface MorningInput {
  input: PlanInput;
  stages: Map<string, EstablishmentStage>;
}

function expectedDemand(morning: Morning, zone: SeasonZone, reference: ReturnType<typeof dailyReferenceEts>): ZoneDemand[] {
  return zoneDemand({ zone: budgetZoneOn(zone, morning.on, false), site: morning.site, weather: morning.outlook.map((day) => day.weather), reference });
}

/** Stage and doses of a zone's sowing over the outlook; null where no sowing runs. */
function sowingOf(morning: Morning, zone: SeasonZone): ReturnType<typeof sowingOutlook> | null {
  const sownOn = sowingDay(zone, Number(morning.on.slice(0, 4)));
  if (sownOn === null || morning.on < sownOn) return null;
  const known = [...morning.past, ...morning.outlook.map((day) => day.weather)];
  const soil = soilTemperaturesC({ airMeansC: known.map((day) => ((day.tminC ?? 0) + (day.tmaxC ?? 0)) / 2) });
  return sowingOutlook({
    sownOn, grass: zone.grass, schedule: DEFAULT_SCHEDULE, startOn: morning.on,
    dailySoilTempsC: soil.filter((_, index) => (known[index]?.on ?? '') >= sownOn), days: morning.outlook.map(({ sunriseMinutes, sunsetMinutes }) => ({ sunriseMinutes, sunsetMinutes })),
  });
}

/** Puts a morning into the words of the planner, as the server does from its tables. */
export function planInputOf(morning: Morning): MorningInput {
  const { yard, on, outlook, states } = morning;
  const reference = dailyReferenceEts(morning.site, outlook.map((day) => day.weather));
  const stages = new Map<string, EstablishmentStage>();
  const zones = yard.zones.map((zone): PlanZone => {
    const sowing = sowingOf(morning, zone);
    if (sowing) stages.set(zone.id, sowing.stage);
    const days = expectedDemand(morning, zone, reference).map((felt, index) => stepZoneDay({ depletionMm: 0 }, budgetZoneOn(zone, on, false), {
      on: felt.on, et0Mm: felt.et0Mm, shadedEt0Mm: felt.shadedEt0Mm, rainMm: felt.rainMm, irrigationMm: 0, stage: sowing?.stageByDay[index] ?? null,
    }));
    const totalAvailableMm = days[0]?.totalAvailableMm ?? 0;
    const own = yard.positions.filter((position) => position.zoneId === zone.id);
    const mean = own.reduce((sum, position) => sum + position.zoneShare * (states.get(position.id)?.depletionMm ?? 0), 0);
    return {
      id: zone.id, name: zone.name, areaM2: zone.areaM2, priority: zone.priority, resting: budgetZoneOn(zone, on, false).resting === true,
      depletionMm: Math.min(totalAvailableMm, mean), totalAvailableMm, refillLineMm: days[0]?.refillLineMm ?? 0, demandMmByDay: days.map((day) => day.potentialEtMm),
      intakeMmPerHour: steadyIntakeMmPerHour(zone.texture, zone.slopePct),
      seed: sowing && { dayNumber: sowing.dayNumber, stage: sowing.stage, dosesByDay: sowing.dosesByDay },
    };
  });
  const input: PlanInput = {
    startOn: on, dayCount: outlook.length, notBeforeMinutes: null, alreadyApplied: [],
    days: outlook.map(({ weather, rainProbabilityPct, sunriseMinutes, sunsetMinutes }, index) => {
      const et0 = reference[index];
      const day = addDays(on, index);
      return {
        on: day, et0Mm: et0?.et0Mm ?? 0, rainMm: weather.precipitationMm ?? 0, rainProbabilityPct, tminC: weather.tminC ?? 0, tmaxC: weather.tmaxC ?? 0,
        windMps: weather.windMps === null ? null : windAtTwoMetresMps(weather.windMps, weather.windHeightM ?? 2), sunriseMinutes, sunsetMinutes,
        homeWindows: yard.homeByWeekday[weekdayOf(day)] ?? [],
      };
    }),
    taps: yard.taps, zones, rules: yard.rules,
    positions: yard.positions.map((position) => ({
      id: position.id, name: position.name, zoneId: position.zoneId, tapId: position.tapId, hoseId: null, sprinklerId: null, sprinklerName: 'Sprinkler',
      rateMmPerHour: position.rateMmPerHour, rateIsDefault: false, runTimeMultiplier: position.runTimeMultiplier, lowQuarterUniformity: position.lowQuarterUniformity,
      zoneShare: position.zoneShare, sortOrder: position.sortOrder, depletionMm: states.get(position.id)?.depletionMm ?? 0,
    })),
    moveMinutes: planDefaults.moveMinutes, leadMinutes: planDefaults.leadMinutes, maxWindMps: planDefaults.maxWindMps,
  };
  return { input, stages };
}
