import type { PlanDifference, SetLine } from '@/shared/contracts/wishes';

/** Lines of one position, day and kind, in the order of the day: doses of a seedbed come several times a day. */
function byPlace(lines: readonly SetLine[]): Map<string, SetLine[]> {
  const places = new Map<string, SetLine[]>();
  for (const line of [...lines].sort((a, b) => a.startMinutes - b.startMinutes)) {
    const place = `${line.on} ${line.positionId} ${line.kind}`;
    places.set(place, [...(places.get(place) ?? []), line]);
  }
  return places;
}

/**
 * What two plans say differently of the days that both have. The same set at another minute or length counts as changed, one that only the one plan has
 * as added or dropped.
 */
export function planDifference(before: readonly SetLine[], after: readonly SetLine[]): PlanDifference {
  const difference: PlanDifference = { added: [], dropped: [], changed: [] };
  const old = byPlace(before);
  const fresh = byPlace(after);
  for (const place of new Set([...old.keys(), ...fresh.keys()])) {
    const was = old.get(place) ?? [];
    const is = fresh.get(place) ?? [];
    difference.dropped.push(...was.slice(is.length));
    difference.added.push(...is.slice(was.length));
    was.slice(0, is.length).forEach((line, index) => {
      const now = is[index];
      if (now !== undefined && (now.startMinutes !== line.startMinutes || now.minutes !== line.minutes)) {
        difference.changed.push({ before: line, after: now });
      }
    });
  }
  const inTime = (a: SetLine, b: SetLine) => (a.on < b.on ? -1 : a.on > b.on ? 1 : a.startMinutes - b.startMinutes);
  difference.added.sort(inTime);
  difference.dropped.sort(inTime);
  difference.changed.sort((a, b) => inTime(a.after, b.after));
  return difference;
}
