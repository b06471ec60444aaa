import { invalidField } from '@/server/errors';
import type { Zone } from '@/server/models';
import { limits } from '@/shared/limits';
import { addDays } from '@/scheduling/units/civilDay';

type ZoneSize = Pick<Zone, 'areaM2'> & { sideAM: number | null; sideBM: number | null };

/**
 * Size of a zone from what was told: two sides of a rectangle make the area; an area without both sides stands by itself.
 * @param told - the fields of the request; a side left out stays as it was, null takes it away
 * @param before - the size so far, null for a new zone
 * @throws AppError invalid_input
 */
export function zoneSize(told: { areaM2?: number | undefined; sideAM?: number | null | undefined; sideBM?: number | null | undefined }, before: ZoneSize | null): ZoneSize {
  const toldSides = told.sideAM !== undefined || told.sideBM !== undefined;
  const sideAM = told.sideAM === undefined ? before?.sideAM ?? null : told.sideAM;
  const sideBM = told.sideBM === undefined ? before?.sideBM ?? null : told.sideBM;
  if (sideAM !== null && sideBM !== null && (toldSides || told.areaM2 === undefined)) {
    const areaM2 = sideAM * sideBM;
    if (areaM2 > limits.areaMaxM2) {
      throw invalidField('sideBM', 'That is larger than a yard.');
    }
    return { areaM2, sideAM, sideBM };
  }
  const areaM2 = told.areaM2 ?? before?.areaM2;
  if (areaM2 === undefined) {
    throw invalidField('areaM2', 'Give the area, or both sides.');
  }
  return { areaM2, sideAM: null, sideBM: null };
}

/** Longer ago than this a sowing is a lawn; further ahead it is no plan yet [days]. */
const seededDaysBack = 3 * 366;
const seededDaysAhead = 366;

/** @throws AppError invalid_input for a sowing too far from today to be meant */
export function checkSeededOn(seededOn: string | null | undefined, today: string): void {
  if (seededOn && (seededOn < addDays(today, -seededDaysBack) || seededOn > addDays(today, seededDaysAhead))) {
    throw invalidField('seededOn', 'Give a day of the last three years or of the coming one. What was sown before is established.');
  }
}

/** Longer ago than this a tree has grown or a fence is another [days]. */
const sunSeenDaysBack = 5 * 366;

/** @throws AppError invalid_input for a day on which nobody can have seen the sun, or so long ago that it tells little */
export function checkSunHoursOn(sunHoursOn: string | null | undefined, today: string, field = 'sunHoursOn'): void {
  if (sunHoursOn && (sunHoursOn > today || sunHoursOn < addDays(today, -sunSeenDaysBack))) {
    throw invalidField(field, 'Give a day of the last five years on which the sun was seen.');
  }
}
