import {
  dosesByHour, keepMoist, seedbedForecast, seedbedHours, stageOn, washingLimitMmPerHour, type DropSize, type SeedbedDose, type SeedbedForecast, type StageAnswer,
} from '@/scheduling/establishment';
import type { GrassId } from '@/scheduling/grass';
import { slopeIntakeFactor, SLOPE_REDUCTION_SOURCE, soilIntake, soilWater, type SoilTexture } from '@/scheduling/soil';
import { addDays, PhysicsError, type CivilDay } from '@/scheduling/units';
import { soilTemperaturesC, type Assumption, type DailyWeather, type WeatherSite } from '@/scheduling/weather';
import { temperaturesOfDays } from '@/scheduling/weather/continuousDays';

export interface SeedbedQuestion {
  site: WeatherSite;
  startOn: CivilDay;
  days: Omit<DailyWeather, 'on'>[];
  /** Clock hour of solar noon [h]. */
  solarNoonHour: number;
  texture: SoilTexture;
  slopePct: number;
  /** Share of the ground under straw or the like, 0-1. */
  mulchCover: number;
  /** Part of the open light, sky and wind that reaches the bed, 0-1. */
  radiationShare: number;
  skyView: number;
  windShare: number;
  /** The same doses every day: when they start [minutes after midnight], how deep [mm], how fast [mm/h]. */
  doses: { timesMinutes: number[]; depthMm: number; rateMmPerHour: number; drops: DropSize };
  /** Water gone from the surface at the start [mm]. */
  startDepletionMm: number;
  /** What was sown, for the day it comes up; null for no answer to that. */
  grass: GrassId | null;
}

export interface SeedbedFound {
  forecast: SeedbedForecast;
  hours: { on: CivilDay; hour: number; et0Mm: number; rainMm: number; dewMm: number; isDaylight: boolean }[];
  et0MmByDay: number[];
  doses: SeedbedDose[];
  washingLimitMmPerHour: number;
  intakeMmPerHour: number;
  /** The same bed with the fewest further doses that keep it moist by day. */
  kept: { added: SeedbedDose[]; dryHours: number; isKept: boolean };
  soilTemperaturesC: number[];
  /** When it is likely to come up, sown on the first day; beyond the days given the last soil temperature is taken to hold. */
  emergence: Pick<StageAnswer, 'firstUpOn' | 'mostlyUpOn' | 'assumed'> | null;
  assumptions: Assumption[];
}

const LAYER: Assumption = { field: 'layerM', method: 'the top inch (25 mm) is what must stay moist', source: 'Iowa State extension' };
const DRY: Assumption = { field: 'dryShare', method: 'seed begins to suffer when three fifths of the surface water are gone', source: 'common practice' };
const DROPS: Assumption = { field: 'drops', method: 'harder drops may come only at a share of the intake while nothing covers the ground', source: 'order after Iowa State 1996 and extension.org; shares common practice' };

/**
 * A seedbed's surface water by the hour under the same doses every day, what keeps it moist, at which rate it washes, and when it comes up.
 * @throws PhysicsError for impossible weather, soil or doses, with the field named
 */
export function seedbedAnswer(question: SeedbedQuestion): SeedbedFound {
  const { site, startOn, texture, slopePct, mulchCover, doses: wanted, grass } = question;
  if (question.days.length === 0) throw new PhysicsError('days', 0, 'must hold a day');
  const days = question.days.map((day, index): DailyWeather => ({ ...day, on: addDays(startOn, index) }));
  const { solarNoonHour, radiationShare, skyView, windShare } = question;
  const above = seedbedHours({ site, days, solarNoonHour, radiationShare, skyView, windShare });
  const soil = soilWater(texture);
  const intakeMmPerHour = soilIntake(texture).steadyMmPerHour * slopeIntakeFactor(slopePct);
  const doses = dosesByHour(days.map(() => wanted.timesMinutes.map((atMinutes) => ({ atMinutes, depthMm: wanted.depthMm }))), wanted.rateMmPerHour, wanted.drops);
  const bed = { hours: above.hours, fieldCapacity: soil.fieldCapacity, wiltingPoint: soil.wiltingPoint, mulchCover, intakeMmPerHour, startDepletionMm: question.startDepletionMm };
  const forecast = seedbedForecast({ ...bed, doses });
  const kept = keepMoist({ ...bed, doses }, { depthMm: wanted.depthMm, rateMmPerHour: wanted.rateMmPerHour, drops: wanted.drops });
  const temperatures = temperaturesOfDays(days) ?? [];
  const soilTemps = soilTemperaturesC({ airMeansC: temperatures.map((each) => (each.tminC + each.tmaxC) / 2) });
  const stage = grass === null ? null : stageOn({ sownOn: startOn, on: startOn, grass, dailySoilTempsC: soilTemps });
  const lastOn = addDays(startOn, days.length);
  return {
    forecast,
    hours: above.hours.map((hour, index) => ({ on: addDays(startOn, Math.floor(index / 24)), hour: index % 24, ...hour })),
    et0MmByDay: above.et0MmByDay, doses, intakeMmPerHour,
    washingLimitMmPerHour: washingLimitMmPerHour({ intakeMmPerHour, drops: wanted.drops, mulchCover }),
    kept: { added: kept.added, dryHours: kept.forecast.dryHours, isKept: kept.isKept },
    soilTemperaturesC: soilTemps,
    emergence: stage === null ? null : {
      firstUpOn: stage.firstUpOn, mostlyUpOn: stage.mostlyUpOn,
      assumed: (stage.mostlyUpOn.slow ?? '9999-12-31') < lastOn ? null : { fromOn: lastOn, temperatureC: soilTemps.at(-1) ?? 0 },
    },
    assumptions: [LAYER, DRY, DROPS, ...above.assumptions, ...(slopeIntakeFactor(slopePct) < 1 ? [{ field: 'slopePct', method: 'intake lowered on the slope', source: SLOPE_REDUCTION_SOURCE }] : [])],
  };
}
