import { sowingOutlook, DEFAULT_SCHEDULE, type EstablishmentStage } from '@/scheduling/establishment';
import { addDays } from '@/scheduling/units/civilDay';
import { soilTemperaturesC } from '@/scheduling/weather';
import type { ControllerMaker } from './seasonControllers';
import type { SeasonForecast } from './seasonForecast';
import { Ground, type PatchDay } from './seasonGround';
import type { DayOrders } from './seasonPacking';
import { positionAreaM2, sowingDay, type SeasonYard } from './seasonYards';
import type { SeasonWeather } from './seasonWeather';

/** What a season came to. Depths and days are means over the yard's area. */
export interface SeasonSum {
  waterM3: number;
  /** Sum of 1 − Ks over the patches of established grass and the days, weighted by area [days]. */
  stressDays: number;
  /** The same for the zones of each priority [days]. */
  stressDaysByPriority: Record<string, number>;
  /** Water that passed below the roots, rain and sets, the surplus of well-watered spots included [mm]. */
  drainageMm: number;
  /** Water of rain and sets that ran off over the surface [mm]. */
  runoffMm: number;
  outings: number;
  moves: number;
  dosesWanted: number;
  dosesKept: number;
  /** Largest depth by which any patch-day failed to close [mm]. */
  closingErrorMm: number;
}

/** One day as it went, for whoever looks on. */
export interface ReplayedDay {
  index: number;
  orders: DayOrders;
  patches: PatchDay[];
}

/** Stages of every sowing through the season by the true temperatures, by zone and index of the day. */
function trueStages(yard: SeasonYard, season: SeasonWeather): Map<string, (EstablishmentStage | null)[]> {
  return new Map(yard.zones.map((zone) => {
    const sownOn = sowingDay(zone, season.year);
    if (sownOn === null) return [zone.id, []];
    const before = season.days.filter((day) => day.on < sownOn).length;
    const soil = soilTemperaturesC({ airMeansC: season.days.map(({ weather }) => ((weather.tminC ?? 0) + (weather.tmaxC ?? 0)) / 2) }).slice(before);
    const { stageByDay } = sowingOutlook({
      sownOn, grass: zone.grass, dailySoilTempsC: soil, schedule: DEFAULT_SCHEDULE, startOn: addDays(sownOn, 0), days: soil.map(() => ({ sunriseMinutes: null, sunsetMinutes: null })),
    });
    return [zone.id, [...Array.from({ length: before }, () => null), ...stageByDay]];
  }));
}

/** Lives through a season day by day with somebody deciding every morning. */
export function replaySeason(yard: SeasonYard, season: SeasonWeather, forecast: SeasonForecast, maker: ControllerMaker, watch?: (day: ReplayedDay) => void): SeasonSum {
  const ground = new Ground(yard, season);
  const controller = maker({ yard, season, forecast, ground });
  const stages = trueStages(yard, season);
  const areas = new Map(yard.positions.map((position) => [position.id, positionAreaM2(yard, position)]));
  const yardM2 = [...areas.values()].reduce((sum, area) => sum + area, 0);
  const grass = yard.positions.filter((position) => yard.zones.some((zone) => zone.id === position.zoneId && zone.sownOn === null));
  const grassM2 = grass.reduce((sum, position) => sum + (areas.get(position.id) ?? 0), 0);
  const priorityM2 = new Map<string, number>();
  for (const position of grass) {
    const priority = String(yard.zones.find((zone) => zone.id === position.zoneId)?.priority ?? 0);
    priorityM2.set(priority, (priorityM2.get(priority) ?? 0) + (areas.get(position.id) ?? 0));
  }
  const sum: SeasonSum = { waterM3: 0, stressDays: 0, stressDaysByPriority: {}, drainageMm: 0, runoffMm: 0, outings: 0, moves: 0, dosesWanted: 0, dosesKept: 0, closingErrorMm: 0 };
  for (let index = season.fromIndex; index < season.toIndex; index += 1) {
    const orders = controller.morning(index);
    const today = new Map([...stages].flatMap(([zoneId, byDay]) => {
      const stage = byDay[index] ?? null;
      return stage === null ? [] : [[zoneId, stage] as const];
    }));
    const patches = ground.live(index, orders.sets, today);
    controller.evening?.(index, orders.sets);
    for (const set of orders.sets) {
      const tapId = yard.positions.find((position) => position.id === set.positionId)?.tapId;
      sum.waterM3 += ((yard.taps.find((tap) => tap.id === tapId)?.flowLpm ?? 0) * set.minutes) / 1000;
    }
    for (const { position, zone, day, runoffMm, unevenMm } of patches) {
      const area = areas.get(position.id) ?? 0;
      sum.drainageMm += ((day.drainageMm + unevenMm) * area) / yardM2;
      sum.runoffMm += ((day.runoffMm + runoffMm) * area) / yardM2;
      sum.closingErrorMm = Math.max(sum.closingErrorMm, Math.abs(day.closingErrorMm));
      if (zone.sownOn === null) {
        const stress = (1 - day.stressCoefficient) * area;
        sum.stressDays += stress / grassM2;
        const priority = String(zone.priority);
        sum.stressDaysByPriority[priority] = (sum.stressDaysByPriority[priority] ?? 0) + stress / (priorityM2.get(priority) ?? 1);
      }
    }
    sum.outings += orders.outings;
    sum.moves += orders.moves;
    sum.dosesWanted += orders.dosesWanted;
    sum.dosesKept += orders.dosesKept;
    watch?.({ index, orders, patches });
  }
  return sum;
}
