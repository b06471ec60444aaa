import { exposureDayIndex, gridInOutline, yearOfExposure, zoneLight, zoneReferenceEtMm, type Obstacle, type PlanePoint } from '@/scheduling/sun';
import { civilDayOf, dayOfYear, PhysicsError, requireRange } from '@/scheduling/units';
import { CLEAR_SKY, dailyReferenceEt, type Assumption, type WeatherSite } from '@/scheduling/weather';
import { unknownWeather } from '@/scheduling/weather/continuousDays';

export interface MonthTemperatures {
  tminC: number;
  tmaxC: number;
}

export interface SunExposureQuestion {
  site: WeatherSite;
  /** East positive [°]. */
  longitudeDeg: number;
  obstacles: Obstacle[];
  /** Corners of the zone, at least three. */
  outline: PlanePoint[];
  /** Temperatures of the warmest and of the coldest month, for the ET; null for light alone. */
  temperatures: { warmest: MonthTemperatures; coldest: MonthTemperatures } | null;
}

export interface SunExposureMonth {
  /** 1-12 */
  month: number;
  /** Mean of the month [h/d]. */
  directSunHours: number;
  openSunHours: number;
  /** Light in the zone over light in the open [–]. */
  radiationShare: number;
  /** Part of the diffuse light that arrives [–]. */
  skyView: number;
  /** Part of the straight light that arrives in each hour of solar time in the middle of the month [–]. */
  beamByHour: number[];
  /** Reference ET in the open and in the zone's light, mean of the month [mm/d]; null without temperatures. */
  et0Mm: number | null;
  shadedEt0Mm: number | null;
}

export interface SunExposureFound {
  months: SunExposureMonth[];
  /** Places in the zone whose light was averaged. */
  points: PlanePoint[];
  assumptions: Assumption[];
}

const YEAR = 2026;
const SAMPLE_DAYS = [5, 15, 25] as const;
/** Coldest day of the year in the north, half a year later in the south: three weeks after midwinter. Common practice. */
const COLDEST_DAY = 15;
/** Radiation of a usual day for the months' light where no temperatures tell it: Rs = 0.55 Ra, three fifths of the possible sunshine in FAO-56 (35). */
const USUAL_CLEARNESS = 0.55;

const WAVE: Assumption = { field: 'temperatures', method: 'months between the warmest and the coldest follow a wave', source: 'common practice' };
const USUAL_SKY: Assumption = { field: 'solarMjM2', method: 'a usual sky: 55 in 100 of the light above the air', source: 'FAO-56 (35) with three fifths of the possible sunshine; common practice' };

/** Temperature of a day on the wave between the coldest and the warmest month. */
function onWave(question: NonNullable<SunExposureQuestion['temperatures']>, latitudeDeg: number, day: number): MonthTemperatures {
  const coldestDay = latitudeDeg >= 0 ? COLDEST_DAY : COLDEST_DAY + 182.6;
  const warmth = (1 - Math.cos((2 * Math.PI * (day - coldestDay)) / 365.25)) / 2;
  const between = (field: keyof MonthTemperatures): number => question.coldest[field] + (question.warmest[field] - question.coldest[field]) * warmth;
  return { tminC: between('tminC'), tmaxC: between('tmaxC') };
}

/**
 * Hours of sun, light and reference ET of a zone through the months, behind what stands around it.
 * @throws PhysicsError for impossible obstacles, places or temperatures, with the field named
 * Source: geometry of `yearOfExposure`; shaded radiation in Penman–Monteith (Feldhake, Butler, Danielson 1985).
 */
export function sunExposureAnswer(question: SunExposureQuestion): SunExposureFound {
  const { site, longitudeDeg, obstacles, outline, temperatures } = question;
  const { latitudeDeg } = site;
  if (outline.length < 3) throw new PhysicsError('outline', outline.length, 'must have at least 3 corners');
  if (temperatures !== null) {
    for (const name of ['warmest', 'coldest'] as const) {
      requireRange(`temperatures.${name}.tmaxC`, temperatures[name].tmaxC, -95, 65);
      requireRange(`temperatures.${name}.tminC`, temperatures[name].tminC, -95, temperatures[name].tmaxC);
    }
  }
  const points = gridInOutline(outline);
  const [exposure] = yearOfExposure({ latitudeDeg, longitudeDeg, obstacles, zones: [{ id: 'zone', points }], year: YEAR });
  if (!exposure) throw new PhysicsError('outline', outline.length, 'must hold a point');
  const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
  const assumptions = new Map([...exposure.assumptions, temperatures === null ? USUAL_SKY : WAVE].map((each) => [each.method, each]));
  const months = Array.from({ length: 12 }, (_, at): SunExposureMonth => {
    const month = at + 1;
    const days = SAMPLE_DAYS.map((dayOfMonth) => {
      const on = civilDayOf({ year: YEAR, month, day: dayOfMonth });
      const day = dayOfYear(on);
      const index = exposureDayIndex(exposure, month, dayOfMonth);
      const felt = temperatures === null ? null : onWave(temperatures, latitudeDeg, day);
      // Without temperatures only the radiation of a usual sky is wanted of this day.
      const open = dailyReferenceEt({ site, weather: { ...unknownWeather(on), tminC: felt?.tminC ?? 10, tmaxC: felt?.tmaxC ?? 20 }, temperatureOnly: 'penman-monteith', clearSky: CLEAR_SKY });
      if (open.method === null) throw new PhysicsError('temperatures', null, 'must be given');
      if (felt !== null) open.assumptions.forEach((each) => assumptions.set(each.method, each));
      const solarMjM2 = felt === null ? USUAL_CLEARNESS * open.terms.extraterrestrialMjM2 : open.radiationMjM2;
      return {
        light: zoneLight({ exposure, latitudeDeg, on, solarMjM2 }), solarMjM2, openSunHours: exposure.openSunHours[index] ?? 0,
        et0Mm: open.et0Mm, shadedEt0Mm: zoneReferenceEtMm(open, exposure, latitudeDeg, on),
      };
    });
    const solar = mean(days.map((day) => day.solarMjM2));
    const middle = exposureDayIndex(exposure, month, 15) * 24;
    return {
      month,
      directSunHours: mean(days.map((day) => day.light.sunHours)),
      openSunHours: mean(days.map((day) => day.openSunHours)),
      radiationShare: solar > 0 ? mean(days.map((day) => day.light.shadedMjM2)) / solar : mean(days.map((day) => day.light.radiationShare)),
      skyView: mean(days.map((day) => day.light.skyView)),
      beamByHour: Array.from(exposure.beamByHour.slice(middle, middle + 24)),
      et0Mm: temperatures === null ? null : mean(days.map((day) => day.et0Mm)),
      shadedEt0Mm: temperatures === null ? null : mean(days.map((day) => day.shadedEt0Mm)),
    };
  });
  return { months, points, assumptions: [...assumptions.values()] };
}
