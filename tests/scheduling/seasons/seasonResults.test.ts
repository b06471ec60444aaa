import { priorityInversions, stressAt } from '@/tests/bench/seasonResults';
import { packDay } from '@/tests/bench/seasonPacking';
import { setRunoffMm } from '@/tests/bench/seasonGround';
import { withSeasons } from '@/tests/bench/seasonText';
import { SEASON_YARDS } from '@/tests/bench/seasonYards';

describe('the water–stress plane', () => {
  const curve = [{ scale: 1, waterM3: 200, stressDays: 10 }, { scale: 0.5, waterM3: 100, stressDays: 40 }];

  it('lies on the line between two points of a curve', () => {
    expect(stressAt(curve, 150)).toBe(25);
    expect(stressAt(curve, 100)).toBe(40);
    expect(stressAt(curve, 50)).toBe(40);
    expect(stressAt(curve, 500)).toBe(10);
  });

  it('counts every more important zone that suffers more than a less important one', () => {
    expect(priorityInversions({ 1: 0, 2: 1, 3: 9 })).toBe(0);
    expect(priorityInversions({ 1: 5, 2: 1, 3: 2 })).toBe(2);
    expect(priorityInversions({ 10: 1, 9: 2 })).toBe(1);
  });
});

describe('a day laid out by a rule of thumb', () => {
  const [yard] = SEASON_YARDS;
  const wishes = ['zone-1-1', 'zone-2-1', 'zone-2-2'].map((positionId) => ({ positionId, minutes: 100 }));

  it('keeps the hours, the moves and the getting ready, and leaves the rest', () => {
    if (!yard) throw new Error('No yard.');
    // Monday 2 June 2014: home from 5:30 to 8:00 and from 18:00 to 21:00.
    const { sets, moves, outings } = packDay(yard, '2014-06-02', wishes);
    expect(sets).toEqual([
      { positionId: 'zone-1-1', startMinutes: 335, minutes: 100 }, { positionId: 'zone-2-1', startMinutes: 440, minutes: 40 },
      { positionId: 'zone-2-1', startMinutes: 1085, minutes: 60 }, { positionId: 'zone-2-2', startMinutes: 1150, minutes: 100 },
    ]);
    expect({ moves, outings }).toEqual({ moves: 2, outings: 2 });
  });
});

describe('water that the ground cannot take', () => {
  const bank = SEASON_YARDS[1]?.zones.find((zone) => zone.name === 'Bank');

  it('is none at a rate below the steady intake, and more the longer and faster it comes', () => {
    if (!bank) throw new Error('No bank.');
    const run = (rateMmPerHour: number, minutes: number) => setRunoffMm(bank, rateMmPerHour, [{ positionId: 'p', startMinutes: 400, minutes }], 0.7);
    expect(run(4, 240)).toBe(0);
    expect(run(20, 15)).toBe(0);
    expect(run(20, 120)).toBeGreaterThan(5);
    expect(run(30, 120)).toBeGreaterThan(run(20, 120));
  });

  it('is less when the sets are broken up', () => {
    if (!bank) throw new Error('No bank.');
    const whole = setRunoffMm(bank, 20, [{ positionId: 'p', startMinutes: 400, minutes: 60 }], 0.7);
    const parts = setRunoffMm(bank, 20, [400, 460, 520].map((startMinutes) => ({ positionId: 'p', startMinutes, minutes: 20 })), 0.7);
    expect(parts).toBeLessThan(whole);
  });
});

describe('the README\'s section', () => {
  it('goes between its markers and nowhere else', () => {
    const readme = 'a\n<!-- seasons: begin -->\nold\n<!-- seasons: end -->\nz';
    expect(withSeasons(readme, 'new')).toBe('a\n<!-- seasons: begin -->\nnew\n<!-- seasons: end -->\nz');
    expect(withSeasons(withSeasons(readme, 'one'), 'two')).toBe(withSeasons(readme, 'two'));
    expect(() => withSeasons('a', 'new')).toThrow('markers');
  });
});
