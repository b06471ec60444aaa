import { dayOfYear, PhysicsError, requireNonNegative, requirePositive, requireRange } from '@/scheduling/units';
import {
  CLEAR_SKY, dailyReferenceEt, netLongwaveHourMjM2, netShortwaveMjM2, penmanMonteithHour, saturationVapourPressureKpa, shadedReferenceEtMm, soilHeatFluxOfHourMjM2, solarDay, solarShares,
  temperatureAtHourC, vapourPressureSlopeKpaPerC, type Assumption, type DailyReferenceEt, type DailyWeather, type WeatherSite,
} from '@/scheduling/weather';
import { temperaturesOfDays } from '@/scheduling/weather/continuousDays';
import type { Dose } from './dosesForDay';
import type { SeedbedDose, SeedbedHour } from './seedbed';

/** Weather above a seedbed, by days. */
export interface SeedbedWeather {
  site: WeatherSite;
  /** Consecutive days; a day without temperatures takes those of the days near it. */
  days: readonly DailyWeather[];
  /** Clock hour of solar noon [h], 12 when left out. */
  solarNoonHour?: number;
  /** Part of the open radiation that reaches the bed, 0-1; one figure or one a day; 1 when left out. */
  radiationShare?: number | readonly number[];
  /** Part of the sky that the bed sees, 0-1; 1 when left out. */
  skyView?: number;
  /** Part of the open wind that reaches the bed behind fences and houses, 0-1; 1 when left out. */
  windShare?: number;
  /** Rain by the hour where it is known, 24 figures a day; null for a day known by its sum only [mm]. */
  hourlyRainMm?: readonly (readonly number[] | null)[];
}

export interface SeedbedHours {
  /** 24 for each day, from local midnight. */
  hours: SeedbedHour[];
  /** Sum of each day in the light and wind of the bed [mm]. */
  et0MmByDay: number[];
  assumptions: Assumption[];
}

/** Most dew that a clear night can leave [mm]. From memory: dew on grass is 0.1 to 0.5 mm a night. */
export const MOST_DEW_MM_PER_NIGHT = 0.5;

/** Hours after midnight in which rain known only by its daily sum is counted. Common practice: there it helps the dry hours least. */
const RAIN_HOURS = 6;

const TEMPERATURE_CARRIED: Assumption = { field: 'tmaxC', method: 'temperatures taken from the days near it', source: 'common practice' };
const SPREAD: Assumption = { field: 'et0Mm', method: 'spread over the hours as the hourly equation draws, keeping the sum of the day', source: 'FAO-56 (53); radiation after Collares-Pereira and Rabl 1979' };
const RAIN_AT_NIGHT: Assumption = { field: 'precipitationMm', method: 'hour of the rain not known: counted in the six hours after midnight', source: 'common practice' };
const RAIN_UNKNOWN: Assumption = { field: 'precipitationMm', method: 'rain not known, counted as none', source: 'no data' };
const SHELTERED: Assumption = { field: 'windMps', method: 'wind lowered by the shelter of the bed', source: 'as given' };

interface BedLight {
  radiationShare: number;
  skyView: number;
}

/** What the hourly equation draws or condenses in each hour of a day, before it is fitted to the sum of the day [mm]. */
function hourlyDraw(open: DailyReferenceEt, site: WeatherSite, day: number, temperatures: { tminC: number; tmaxC: number }, solarNoonHour: number, light: BedLight): { drawMm: Float64Array; isDaylight: boolean[] } {
  const { terms } = open;
  // Shares of solar time, turned to the clock in steps of five minutes.
  const stepsPerHour = 12;
  const shares = solarShares(solarDay(site.latitudeDeg, day), 24 * stepsPerHour);
  const shift = Math.round((solarNoonHour - 12) * stepsPerHour);
  const drawMm = new Float64Array(24);
  const isDaylight: boolean[] = [];
  for (let hour = 0; hour < 24; hour += 1) {
    let share = 0;
    for (let step = 0; step < stepsPerHour; step += 1) {
      share += shares[(((hour * stepsPerHour + step - shift) % shares.length) + shares.length) % shares.length] ?? 0;
    }
    isDaylight.push(share > 0);
    const solarHour = (((hour + 0.5 - (solarNoonHour - 12)) % 24) + 24) % 24;
    const temperatureC = temperatureAtHourC(temperatures.tminC, temperatures.tmaxC, solarHour);
    const saturationKpa = saturationVapourPressureKpa(temperatureC);
    const vapourKpa = Math.min(terms.actualVapourKpa, saturationKpa);
    const shortwave = netShortwaveMjM2(share * terms.solarMjM2) * light.radiationShare;
    const net = shortwave - netLongwaveHourMjM2(temperatureC, vapourKpa, terms.relativeSolar) * light.skyView;
    drawMm[hour] = penmanMonteithHour({
      temperatureC, windAtTwoMetresMps: terms.windAtTwoMetresMps, availableEnergyMjM2: net - soilHeatFluxOfHourMjM2(net, share > 0),
      vapourDeficitKpa: saturationKpa - vapourKpa, slopeKpaPerC: vapourPressureSlopeKpaPerC(temperatureC), psychrometricKpaPerC: terms.psychrometricKpaPerC,
    }).et0Mm;
  }
  return { drawMm, isDaylight };
}

function rainByHour(weather: DailyWeather, hourly: readonly number[] | null, index: number): number[] {
  if (hourly) {
    if (hourly.length !== 24) throw new PhysicsError(`hourlyRainMm[${index}]`, hourly.length, 'must hold 24 hours');
    return hourly.map((rain, hour) => requireNonNegative(`hourlyRainMm[${index}][${hour}]`, rain));
  }
  const rainMm = weather.precipitationMm ?? 0;
  return Array.from({ length: 24 }, (_, hour) => (hour < RAIN_HOURS ? rainMm / RAIN_HOURS : 0));
}

/**
 * The hours above a seedbed from days of weather: what the air draws in the light, shelter and sky of the bed, rain, and dew where the hourly
 * equation turns negative in the dark. The hours of a day add up to its reference ET in that light.
 * @throws PhysicsError for impossible weather, shares outside 0 to 1, or no temperatures at all
 * Equations: FAO-56 (6), (53); shaded radiation as in `shadedReferenceEtMm`.
 */
export function seedbedHours(weather: SeedbedWeather): SeedbedHours {
  const { site, days, solarNoonHour = 12, skyView = 1, windShare = 1 } = weather;
  requireRange('skyView', skyView, 0, 1);
  requireRange('windShare', windShare, 0, 1);
  requireRange('solarNoonHour', solarNoonHour, 6, 18);
  const temperatures = temperaturesOfDays(days);
  if (days.length === 0 || temperatures === null) throw new PhysicsError('days', days.length, 'must hold the temperatures of at least one day');
  const assumptions = new Map<string, Assumption>([[SPREAD.method, SPREAD]]);
  const note = (assumption: Assumption): void => {
    assumptions.set(assumption.method, assumption);
  };
  const et0MmByDay: number[] = [];
  const hours = days.flatMap((given, index): SeedbedHour[] => {
    const found = temperatures[index] ?? { tminC: 0, tmaxC: 0, carried: true };
    if (found.carried) note(TEMPERATURE_CARRIED);
    if (windShare < 1) note(SHELTERED);
    const sheltered: DailyWeather = { ...given, tminC: found.tminC, tmaxC: found.tmaxC, windMps: given.windMps === null ? null : given.windMps * windShare };
    const open = dailyReferenceEt({ site, weather: sheltered, clearSky: CLEAR_SKY });
    if (open.method === null) throw new PhysicsError(`days[${index}]`, given.on, 'must have temperatures');
    open.assumptions.forEach(note);
    const share = typeof weather.radiationShare === 'object' ? weather.radiationShare[index] ?? 1 : weather.radiationShare ?? 1;
    const light: BedLight = { radiationShare: requireRange('radiationShare', share, 0, 1), skyView };
    const et0Mm = shadedReferenceEtMm(open, light);
    et0MmByDay.push(et0Mm);
    const { drawMm, isDaylight } = hourlyDraw(open, site, dayOfYear(given.on), found, solarNoonHour, light);
    const drawn = drawMm.reduce((sum, each) => sum + Math.max(0, each), 0);
    const condensed = drawMm.reduce((sum, each, hour) => sum + (isDaylight[hour] ? 0 : Math.max(0, -each)), 0);
    const dewScale = condensed > MOST_DEW_MM_PER_NIGHT ? MOST_DEW_MM_PER_NIGHT / condensed : 1;
    const hourlyRain = weather.hourlyRainMm?.[index] ?? null;
    if (hourlyRain === null) note(given.precipitationMm === null ? RAIN_UNKNOWN : RAIN_AT_NIGHT);
    const rain = rainByHour(given, hourlyRain, index);
    return Array.from(drawMm, (draw, hour): SeedbedHour => ({
      et0Mm: drawn > 0 ? (Math.max(0, draw) / drawn) * et0Mm : et0Mm / 24,
      rainMm: rain[hour] ?? 0,
      dewMm: isDaylight[hour] ? 0 : Math.max(0, -draw) * dewScale,
      isDaylight: isDaylight[hour] ?? false,
    }));
  });
  return { hours, et0MmByDay, assumptions: [...assumptions.values()] };
}

/**
 * The doses of a schedule as hours of a forecast. A dose that takes longer than the rest of its hour goes on into the next; what lies beyond the
 * forecast is left out.
 * @param dosesByDay - doses of each day of the forecast, as `dosesForDay` gives them
 * @param rateMmPerHour - application rate of the sprinkler [mm/h]
 * @throws PhysicsError when the rate is not above zero
 */
export function dosesByHour(dosesByDay: readonly (readonly Dose[])[], rateMmPerHour: number, drops?: SeedbedDose['drops']): SeedbedDose[] {
  requirePositive('rateMmPerHour', rateMmPerHour);
  const last = dosesByDay.length * 24;
  return dosesByDay.flatMap((doses, day) => doses.flatMap((dose): SeedbedDose[] => {
    const parts: SeedbedDose[] = [];
    let atHours = day * 24 + dose.atMinutes / 60;
    let leftMm = requireNonNegative('depthMm', dose.depthMm);
    while (leftMm > 1e-9 && Math.floor(atHours) < last) {
      const hour = Math.floor(atHours);
      const depthMm = Math.min(leftMm, (hour + 1 - atHours) * rateMmPerHour);
      if (depthMm > 0) parts.push(drops === undefined ? { hour, depthMm, rateMmPerHour } : { hour, depthMm, rateMmPerHour, drops });
      leftMm -= depthMm;
      atHours = hour + 1;
    }
    return parts;
  }));
}
