/** What doses are gathered by. */
interface Outing {
  sets: readonly { kind: 'set' | 'dose'; positionId: string; minutes: number; depthMm: number }[];
}

/**
 * Outings of one day in their order, with those that repeat one dose at one position gathered where the first of them stands: three light waterings
 * of a seedbed read as one line with three times. Everything else stands alone.
 * @param rounds - outings of one day, in the order of time
 * @returns groups of at least one outing; only groups of doses have more
 */
export function gatherDoses<R extends Outing>(rounds: readonly R[]): R[][] {
  const groups: R[][] = [];
  const byDose = new Map<string, R[]>();
  for (const round of rounds) {
    const [only, ...others] = round.sets;
    const key = only?.kind === 'dose' && others.length === 0 ? `${only.positionId} ${only.minutes.toFixed(1)} ${only.depthMm.toFixed(2)}` : null;
    const known = key === null ? undefined : byDose.get(key);
    if (known) {
      known.push(round);
      continue;
    }
    const group = [round];
    groups.push(group);
    if (key !== null) {
      byDose.set(key, group);
    }
  }
  return groups;
}
