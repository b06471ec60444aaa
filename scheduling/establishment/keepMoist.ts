import { requirePositive, requireRange } from '@/scheduling/units/physicsError';
import { seedbedForecast, type SeedbedDose, type SeedbedForecast, type SeedbedInput } from './seedbed';

export interface KeepMoist {
  /** Doses given before and those added, in order of time. */
  doses: SeedbedDose[];
  added: SeedbedDose[];
  /** The forecast with all of them. */
  forecast: SeedbedForecast;
  /** False when even the most doses a day leave daylight hours dry. */
  isKept: boolean;
}

/** Nobody walks out to a seedbed more often in a day. Common practice: 2 to 4, at most 8. */
const MOST_A_DAY = 8;

/**
 * The fewest further doses of one depth that keep a seedbed above its drying limit by day: each is given in the hour that would go dry, so that no
 * dose comes before it is needed.
 * @param input - the bed with its weather and the doses planned so far
 * @param dose - depth and rate of a further dose
 * @param mostADay - doses allowed on one day, 8 when left out
 * @throws PhysicsError as `seedbedForecast`, or for an impossible dose
 */
export function keepMoist(input: SeedbedInput, dose: Omit<SeedbedDose, 'hour'>, mostADay = MOST_A_DAY): KeepMoist {
  requirePositive('depthMm', dose.depthMm);
  requirePositive('rateMmPerHour', dose.rateMmPerHour);
  requireRange('mostADay', mostADay, 0, 24);
  const added: SeedbedDose[] = [];
  const countByDay = new Map<number, number>();
  const dayOf = (hour: number): number => Math.floor(hour / 24);
  for (const each of input.doses) countByDay.set(dayOf(each.hour), (countByDay.get(dayOf(each.hour)) ?? 0) + 1);
  let doses = [...input.doses];
  let forecast = seedbedForecast(input);
  for (;;) {
    // The first dry daylight hour of a day that still has room for a dose and has none in that hour yet.
    const dry = forecast.hours.findIndex((hour, index) => hour.isDry && input.hours[index]?.isDaylight === true
      && (countByDay.get(dayOf(index)) ?? 0) < mostADay && !added.some((each) => each.hour === index));
    if (dry < 0) break;
    const next = { ...dose, hour: dry };
    added.push(next);
    countByDay.set(dayOf(dry), (countByDay.get(dayOf(dry)) ?? 0) + 1);
    doses = [...doses, next].sort((a, b) => a.hour - b.hour);
    forecast = seedbedForecast({ ...input, doses });
  }
  return { doses, added, forecast, isKept: forecast.dryHours === 0 };
}
