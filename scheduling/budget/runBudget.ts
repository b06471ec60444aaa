import type { EstablishmentStage } from '@/scheduling/establishment/establishmentSchedule';
import { GRASSES } from '@/scheduling/grass';
import { radiationShare, zoneLight } from '@/scheduling/sun';
import { addDays, dayOfYear, PhysicsError, type CivilDay } from '@/scheduling/units';
import { CLEAR_SKY, dailyReferenceEt, relativeHumidityPct, shadedReferenceEtMm, solarDay, type Assumption, type DailyReferenceEt, type DailyWeather, type NoReferenceEt, type WeatherSite } from '@/scheduling/weather';
import type { BudgetZone } from './budgetZone';
import { winterDays, type GrassCondition, type WinterDay } from './grassCondition';
import type { SoilObservation } from './soilObservation';
import { stateAfter, stepZoneDay, type ZoneDay, type ZoneState } from './zoneDay';

/** One day of weather as a zone feels it, before any irrigation. */
export interface ZoneDemand {
  on: CivilDay;
  /** ET0 in the open [mm]. */
  et0Mm: number;
  /** ET0 in the zone's own light [mm]. */
  shadedEt0Mm: number;
  rainMm: number;
  /** Radiation in the zone over radiation in the open [–]. */
  radiationShare: number;
  /** Hours of direct sun on the day [h]. */
  sunHours: number;
  /** u2 [m/s] and lowest humidity of the day [%]; null where the day itself tells neither. */
  windAtTwoMetresMps?: number | null;
  rhMinPct?: number | null;
  /** State of the grass, where the zone reckons with winter. */
  condition?: GrassCondition | null;
  assumptions: Assumption[];
}

/** Input of `zoneDemand`. */
export interface ZoneDemandInput {
  zone: BudgetZone;
  site: WeatherSite;
  /** Consecutive days, oldest first. */
  weather: readonly DailyWeather[];
  /** Reference ET of the same days where it is already known, so that many zones share one sum. */
  reference?: readonly (DailyReferenceEt | NoReferenceEt)[];
  /** State of the grass on the same days where it is already known, such as from a winter that began before them. */
  winter?: readonly WinterDay[];
}

const NO_SUN_KNOWN: Assumption = { field: 'et0Mm', method: 'no temperatures for this day or any near it, so no water use is counted', source: 'no data' };
const RAIN_UNKNOWN: Assumption = { field: 'precipitationMm', method: 'rain not known, counted as none', source: 'no data' };
const GAP_DAYS = 7;

/** Mean of the nearest known days, seven back first, else seven ahead. */
function fillGap(days: readonly (ZoneDemand | null)[], index: number): Pick<ZoneDemand, 'et0Mm' | 'shadedEt0Mm' | 'radiationShare' | 'sunHours'> & { assumption: Assumption } {
  const known = (from: number, until: number) => days.slice(Math.max(0, from), until).filter((day): day is ZoneDemand => day !== null);
  const before = known(index - GAP_DAYS, index);
  const near = before.length > 0 ? before : known(index + 1, index + 1 + GAP_DAYS);
  if (near.length === 0) return { et0Mm: 0, shadedEt0Mm: 0, radiationShare: 1, sunHours: 0, assumption: NO_SUN_KNOWN };
  const mean = (pick: (day: ZoneDemand) => number) => near.reduce((sum, day) => sum + pick(day), 0) / near.length;
  return {
    et0Mm: mean((day) => day.et0Mm), shadedEt0Mm: mean((day) => day.shadedEt0Mm), radiationShare: mean((day) => day.radiationShare), sunHours: mean((day) => day.sunHours),
    assumption: { field: 'et0Mm', method: `no temperatures: mean of ${near.length} days ${before.length > 0 ? 'before' : 'after'}`, source: 'common practice' },
  };
}

/** Light of a zone on a day: by its exposure through the year where there is one, else by its hours of sun. */
function lightOf(zone: BudgetZone, site: WeatherSite, on: CivilDay, solarMjM2: number): { radiationShare: number; skyView: number; sunHours: number; assumptions: readonly Assumption[] } {
  const exposure = zone.exposure ?? null;
  const { sunHours } = zone;
  // Open ground needs no hours taken apart: all of the light arrives.
  if (exposure === null && sunHours === null && (zone.skyView ?? null) === null) {
    return { radiationShare: 1, skyView: 1, sunHours: solarDay(site.latitudeDeg, dayOfYear(on)).daylightHours, assumptions: [] };
  }
  if (exposure !== null) return { ...zoneLight({ exposure, latitudeDeg: site.latitudeDeg, on, solarMjM2 }), assumptions: exposure.assumptions };
  return radiationShare({ latitudeDeg: site.latitudeDeg, on, sunHours, sunHoursOn: zone.sunHoursOn ?? null, solarMjM2, skyView: zone.skyView ?? null });
}

/**
 * Turns weather into the demand of a zone: reference ET, the light that reaches the zone, reference ET in that light, rain.
 * A day without temperatures takes the mean of the known days near it and says so.
 * @throws PhysicsError for impossible weather or days that do not follow each other
 */
export function zoneDemand({ zone, site, weather, reference, winter: knownWinter }: ZoneDemandInput): ZoneDemand[] {
  if (reference && reference.length !== weather.length) throw new PhysicsError('reference', reference.length, `must have as many days as weather (${weather.length})`);
  if (knownWinter && knownWinter.length !== weather.length) throw new PhysicsError('winter', knownWinter.length, `must have as many days as weather (${weather.length})`);
  const first = weather[0];
  const winter = knownWinter ?? (zone.winter === true ? winterDays(GRASSES[zone.grass].family, weather) : null);
  const found = weather.map((day, index): ZoneDemand | null => {
    if (first && index > 0 && day.on !== addDays(weather[index - 1]?.on ?? first.on, 1)) throw new PhysicsError('on', day.on, 'must follow the day before');
    const et0 = reference?.[index] ?? dailyReferenceEt({ site, weather: day, clearSky: CLEAR_SKY });
    if (et0.method === null) return null;
    const light = lightOf(zone, site, day.on, et0.radiationMjM2);
    return {
      on: day.on, et0Mm: et0.et0Mm, shadedEt0Mm: shadedReferenceEtMm(et0, light), rainMm: day.precipitationMm ?? 0,
      radiationShare: light.radiationShare, sunHours: light.sunHours,
      windAtTwoMetresMps: et0.terms.windAtTwoMetresMps, rhMinPct: day.tmaxC === null ? null : relativeHumidityPct(et0.terms.actualVapourKpa, day.tmaxC),
      condition: winter?.[index]?.condition ?? null,
      assumptions: [...et0.assumptions, ...light.assumptions, ...(day.precipitationMm === null ? [RAIN_UNKNOWN] : [])],
    };
  });
  return found.map((demand, index) => {
    if (demand) return demand;
    const day = weather[index];
    if (!day) throw new PhysicsError('weather', index, 'must have a day here');
    const { assumption, ...filled } = fillGap(found, index);
    return {
      on: day.on, ...filled, rainMm: day.precipitationMm ?? 0, condition: winter?.[index]?.condition ?? null,
      assumptions: [assumption, ...(day.precipitationMm === null ? [RAIN_UNKNOWN] : [])],
    };
  });
}

/** One day to run: weather, the yard's own rain gauge and the water that was given. */
export interface BudgetDay {
  weather: DailyWeather;
  /** Irrigation that reached the soil [mm]. */
  irrigationMm: number;
  /** Rain in the yard's own gauge; it overrules the weather. */
  gaugeRainMm?: number | null;
  /** Stage of a sowing, where known. */
  stage?: EstablishmentStage | null;
  /** State of the grass where somebody told it; it overrules winter and rest. */
  condition?: GrassCondition | null;
  /** What somebody found in the ground on the morning of the day. */
  observation?: SoilObservation | null;
  /** Rain by the hour [mm], where known. */
  hourlyRainMm?: readonly number[] | null;
}

/** Condition of a day's grass: told, else winter, else rest by choice; winter comes before rest. */
export function conditionOf(zone: BudgetZone, told: GrassCondition | null, weather: GrassCondition | null): GrassCondition {
  if (told !== null) return told;
  if (weather !== null && weather !== 'growing') return weather;
  return zone.resting === true ? 'resting' : 'growing';
}

/** Input of `runBudget`. */
export interface BudgetInput {
  zone: BudgetZone;
  site: WeatherSite;
  /** Consecutive days, oldest first. */
  days: readonly BudgetDay[];
  start: ZoneState;
  /** Reference ET of the same days where it is already known. */
  reference?: readonly (DailyReferenceEt | NoReferenceEt)[];
}

/**
 * Runs the water budget of a zone over consecutive days.
 * @returns one closed day for each day given
 * @throws PhysicsError for impossible input, with the field named
 */
export function runBudget({ zone, site, days, start, reference }: BudgetInput): ZoneDay[] {
  const weather = days.map((day) => {
    const gauge = day.gaugeRainMm ?? null;
    return gauge === null ? day.weather : { ...day.weather, precipitationMm: gauge };
  });
  const demand = zoneDemand(reference ? { zone, site, weather, reference } : { zone, site, weather });
  let state = start;
  return demand.map((felt, index) => {
    const { on, et0Mm, shadedEt0Mm, rainMm, windAtTwoMetresMps, rhMinPct, assumptions } = felt;
    const given = days[index];
    const closed = stepZoneDay(state, zone, {
      on, et0Mm, shadedEt0Mm, rainMm, windAtTwoMetresMps, rhMinPct, assumptions, irrigationMm: given?.irrigationMm ?? 0, stage: given?.stage ?? null,
      condition: conditionOf(zone, given?.condition ?? null, felt.condition ?? null), observation: given?.observation ?? null, hourlyRainMm: given?.hourlyRainMm ?? null,
    });
    state = stateAfter(closed);
    return closed;
  });
}
