import { winterDays, type BudgetZone, type WinterDay } from '@/scheduling/budget';
import { DEFAULT_SCHEDULE, sowingOutlook, type EstablishmentStage } from '@/scheduling/establishment';
import { GRASSES } from '@/scheduling/grass';
import type { ZoneExposure } from '@/scheduling/sun';
import { daysBetween } from '@/scheduling/units/civilDay';
import type { Assumption } from '@/scheduling/weather';
import type { BudgetZoneFacts, StoredState } from './budgetFacts';
import { isRunningSowing, soilTemperaturesFrom, weatherSince, type YardWeather } from './yardWeather';

/** A zone as the budget reckons with it: its light, its ground, its roots, winter and rest. */
export function toBudgetZone(facts: BudgetZoneFacts, latitudeDeg: number, exposure: ZoneExposure | null): BudgetZone {
  return {
    grass: facts.grass, texture: facts.soil, sunHours: facts.sunHours, sunHoursOn: facts.sunHoursOn, exposure, sownOn: facts.seededOn, surfaceLayer: true, coverFraction: facts.coverFraction,
    treeRoots: facts.treeRootShare > 0 ? { share: facts.treeRootShare } : null, rootSeasonLatitudeDeg: latitudeDeg, resting: facts.resting, winter: true,
    rainGround: { texture: facts.soil, slopePct: facts.slopePct, compaction: facts.compaction },
  };
}

/** What of a zone nobody has told, to be shown with its days. */
export function defaultsOf(facts: BudgetZoneFacts): Assumption[] {
  const taken: Assumption[] = [];
  if (facts.horizonDeg === null && facts.sunHoursOn !== null && facts.sunHoursOnIsDefault) {
    taken.push({ field: 'sunHoursOn', method: `the hours of sun taken as seen on ${facts.sunHoursOn}`, source: 'default: the day they were told, or the equinox for default hours' });
  }
  if (facts.compactionIsDefault) {
    taken.push({ field: 'compaction', method: 'ground taken as loose, neither trodden nor driven on', source: 'default: the ground of the published intake tables' });
  }
  return taken;
}

/** Stages of a running sowing by soil heat, schedule and what people saw; null where the zone is a lawn. */
export function stagesFrom(facts: BudgetZoneFacts, fromOn: string, count: number, weather: YardWeather, today: string): (EstablishmentStage | null)[] {
  if (facts.seededOn === null || !isRunningSowing(facts.seededOn, today)) {
    return Array.from({ length: count }, () => null);
  }
  return sowingOutlook({
    sownOn: facts.seededOn, grass: facts.grass, dailySoilTempsC: soilTemperaturesFrom(weather, facts.seededOn), schedule: facts.schedule ?? DEFAULT_SCHEDULE, seen: facts.seenStages,
    startOn: fromOn, days: Array.from({ length: count }, () => ({ sunriseMinutes: null, sunsetMinutes: null })),
  }).stageByDay;
}

/** Frost and snow of a zone from a day on: as the stored day before left them, else found from all the weather that is known before. */
export function winterFrom(facts: BudgetZoneFacts, weather: YardWeather, fromOn: string, stored: StoredState | null): WinterDay[] {
  const { family } = GRASSES[facts.grass];
  const offset = Math.max(0, daysBetween(weather.days[0]?.on ?? fromOn, fromOn));
  if (stored === null) {
    return winterDays(family, weather.days.map((day) => day.weather)).slice(offset);
  }
  const meansBeforeC = weather.days.slice(0, offset).map(({ temperatures: { tminC, tmaxC } }) => (tminC + tmaxC) / 2);
  return winterDays(family, weatherSince(weather, fromOn).days.map((day) => day.weather), { ...stored.winter, meansBeforeC });
}
