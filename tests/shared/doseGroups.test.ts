import fc from 'fast-check';
import { gatherDoses } from '@/shared/doseGroups';

const outing = (kind: 'set' | 'dose', positionId: string, minutes = 5, depthMm = 2, more: { kind: 'set' | 'dose'; positionId: string; minutes: number; depthMm: number }[] = []) => ({ sets: [{ kind, positionId, minutes, depthMm }, ...more] });

describe('doses of a day', () => {
  it('are gathered where one repeats at one position, and everything else stands alone', () => {
    const first = outing('dose', 'strip');
    const set = outing('set', 'front', 40, 9);
    const second = outing('dose', 'strip');
    const other = outing('dose', 'corner');
    const longer = outing('dose', 'strip', 9);
    expect(gatherDoses([first, set, second, other, longer])).toEqual([[first, second], [set], [other], [longer]]);
    const both = outing('dose', 'strip', 5, 2, [{ kind: 'dose', positionId: 'corner', minutes: 5, depthMm: 2 }]);
    expect(gatherDoses([both, both])).toEqual([[both], [both]]);
    expect(gatherDoses([])).toEqual([]);
  });

  it('lose no outing and keep each group in order', () => {
    const any = fc.record({ kind: fc.constantFrom('set' as const, 'dose' as const), positionId: fc.constantFrom('a', 'b'), minutes: fc.constantFrom(4, 5), depthMm: fc.constantFrom(1, 2) });
    fc.assert(fc.property(fc.array(fc.record({ id: fc.nat(), sets: fc.array(any, { minLength: 1, maxLength: 2 }) }), { maxLength: 8 }), (rounds) => {
      const groups = gatherDoses(rounds);
      expect(new Set(groups.flat())).toEqual(new Set(rounds));
      expect(groups.flat()).toHaveLength(rounds.length);
      const places = groups.map((group) => group.map((round) => rounds.indexOf(round)));
      places.forEach((group) => expect(group).toEqual([...group].sort((x, y) => x - y)));
      expect(places.map((group) => group[0])).toEqual([...places.map((group) => group[0] ?? 0)].sort((x, y) => x - y));
      groups.filter((group) => group.length > 1).forEach((group) => expect(group.every((round) => round.sets.length === 1 && round.sets[0]?.kind === 'dose')).toBe(true));
    }));
  });
});
