import type { YardFit } from '@/server/readModels/monthFit';
import type { MonthFitResponse } from '@/shared/contracts/fit';

/** Does the year fit, as the screens read it. */
export function presentMonthFit({ fit, climate, defaults, unservedZoneIds }: YardFit): MonthFitResponse {
  return {
    months: fit.months.map(({ month, neededHours, leastHours, mostHours, moveHours, doseHours, hadHours, shortHours, litres, et0Mm, rainMm, isEstimated, taps }) => ({
      month, neededHours, leastHours, mostHours, moveHours, doseHours, hadHours, shortHours, litres, et0Mm, rainMm, isEstimated,
      taps: taps.map((tap) => ({ tapId: tap.tapId, neededHours: tap.neededHours, hadHours: tap.hadHours })),
    })),
    tightestMonth: fit.tightestMonth, fits: fit.fits, remedies: fit.remedies,
    climate: { years: fit.years, source: climate.source, sample: climate.sample, isEstimated: climate.isEstimated, asOfYear: climate.asOfYear },
    defaults, leftOut: { zoneIds: unservedZoneIds },
  };
}
