import type { TimelineHabits } from './dayTimeline';
import type { PlanDay, PlanInput, PlanPlace } from './types';

function distanceM(a: PlanPlace, b: PlanPlace): number {
  return Math.hypot(a.eastM - b.eastM, a.northM - b.northM);
}

/** How people and water go about a day: minutes to get ready, minutes from one position to another, and what the taps draw from. */
export function dayHabits(input: PlanInput, day: PlanDay): TimelineHabits {
  const pace = day.paceFactor ?? 1;
  const perM = input.moveMinutesPerM ?? 0;
  const places = new Map(perM > 0 ? input.positions.flatMap((position) => (position.place ? [[position.id, position.place] as const] : [])) : []);
  const moveBetween = (fromPositionId: string, toPositionId: string): number => {
    if (fromPositionId === toPositionId) {
      return 0;
    }
    const from = places.get(fromPositionId);
    const to = places.get(toPositionId);
    return pace * (input.moveMinutes + (from && to ? perM * distanceM(from, to) : 0));
  };
  let longest = 0;
  for (const from of places.values()) {
    for (const to of places.values()) {
      longest = Math.max(longest, distanceM(from, to));
    }
  }
  return { leadMinutes: input.leadMinutes, longestMoveMinutes: pace * (input.moveMinutes + perM * longest), moveBetween, supply: input.supply ?? null };
}

/** Metres by which a position lies beyond the end of its hose; 0 within reach, or where places and hose are not all known. */
export function beyondReachM(place: PlanPlace | undefined, tapPlace: PlanPlace | undefined, hoseLengthM: number | undefined): number {
  return place && tapPlace && hoseLengthM !== undefined ? Math.max(0, distanceM(place, tapPlace) - hoseLengthM) : 0;
}
