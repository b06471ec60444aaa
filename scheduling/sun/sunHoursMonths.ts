import { civilDayOf, dayOfYear, requireRange, type CivilDay } from '@/scheduling/units';
import { solarDay } from '@/scheduling/weather';
import { radiationShare } from './radiationShare';
import { TYPICAL_CLEARNESS, type ExposureMonth } from './zoneLight';

/** Day that stands for its month. */
const MID_MONTH_DAY = 15;
/** Any common year: the sun's way differs little between years. */
const YEAR = 2026;

/**
 * Months of the light of a zone of which only hours of sun are known, each by its middle day under a typical sky.
 * @param sunHours - hours of direct sun that somebody saw; null for open ground [h]
 * @param sunHoursOn - the day on which they were seen; null lets them hold on every day
 * @returns twelve months
 * @throws PhysicsError for impossible places or hours, with the field named
 * Source: as `radiationShare`
 */
export function monthsOfSunHours(latitudeDeg: number, sunHours: number | null, sunHoursOn: CivilDay | null, clearness: number = TYPICAL_CLEARNESS): ExposureMonth[] {
  requireRange('clearness', clearness, 0, 1);
  return Array.from({ length: 12 }, (_, index): ExposureMonth => {
    const on = civilDayOf({ year: YEAR, month: index + 1, day: MID_MONTH_DAY });
    const { extraterrestrialMjM2 } = solarDay(latitudeDeg, dayOfYear(on));
    const light = radiationShare({ latitudeDeg, on, sunHours, sunHoursOn, solarMjM2: clearness * extraterrestrialMjM2 });
    return { month: index + 1, directSunHours: Math.min(light.sunHours, light.daylightHours), openSunHours: light.daylightHours, radiationShare: light.radiationShare, skyView: light.skyView };
  });
}
