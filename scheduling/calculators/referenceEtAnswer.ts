import { dayOfYear } from '@/scheduling/units';
import { dailyReferenceEt, spreadOverHours, type Assumption, type DailyReferenceEt, type DailyWeather } from '@/scheduling/weather';
import { PhysicsError } from '@/scheduling/units/physicsError';

/** Height taken where nobody told one [m]. */
export const DEFAULT_ELEVATION_M = 100;
const ELEVATION_TAKEN: Assumption = { field: 'elevationM', method: `height above the sea taken as ${DEFAULT_ELEVATION_M} m`, source: 'default; 500 m change ET by about 1 in 100' };

export interface ReferenceEtQuestion {
  latitudeDeg: number;
  elevationM: number | null;
  weather: DailyWeather;
  coastal: boolean;
  arid: boolean;
  clearSky: 'simple' | 'physical';
}

export interface ReferenceEtAnswer extends DailyReferenceEt {
  /** The sum of the day spread over 24 hours of solar time [mm]. */
  byHourMm: number[];
}

/**
 * Reference ET of one day for a visitor, with every intermediate value and what was assumed.
 * @throws PhysicsError for impossible weather or a missing temperature extreme, with the field named
 */
export function referenceEtAnswer({ latitudeDeg, elevationM, weather, coastal, arid, clearSky }: ReferenceEtQuestion): ReferenceEtAnswer {
  const found = dailyReferenceEt({ site: { latitudeDeg, elevationM: elevationM ?? DEFAULT_ELEVATION_M, coastal, arid }, weather, clearSky });
  if (found.method === null) throw new PhysicsError(found.missing[0] ?? 'tminC', null, 'must be given');
  return {
    ...found,
    assumptions: elevationM === null ? [ELEVATION_TAKEN, ...found.assumptions] : found.assumptions,
    byHourMm: spreadOverHours({ latitudeDeg, day: dayOfYear(weather.on), dailySum: found.et0Mm }),
  };
}
