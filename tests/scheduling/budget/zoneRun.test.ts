import fc from 'fast-check';
import { morningDepletionMm, runBudget, type BudgetZone } from '@/scheduling/budget';
import { runZoneWithPatches, stateAtStart, zoneWaterMm, type RunDay } from '@/scheduling/budget/zoneRun';
import { zoneDemand } from '@/scheduling/budget/runBudget';
import { addDays, PhysicsError } from '@/scheduling/units';
import { unknownWeather } from '@/scheduling/weather/continuousDays';

const site = { latitudeDeg: 41, elevationM: 20 };
const lawn: BudgetZone = { grass: 'cool_mix', texture: 'loam', sunHours: null, sownOn: null };
const weather = (rains: readonly number[]) => rains.map((precipitationMm, index) => ({
  ...unknownWeather(addDays('2026-06-01', index)), tminC: 14, tmaxC: 27, windMps: 2, windHeightM: 2, precipitationMm,
}));
const runDays = (rains: readonly number[], water: (index: number) => RunDay['water']): RunDay[] =>
  zoneDemand({ zone: lawn, site, weather: weather(rains) }).map((demand, index) => ({ demand, water: water(index), stage: null }));

describe('water credited to a zone', () => {
  it('is applied over multiplier, by the share of each patch', () => {
    const { netMm, grossMm } = zoneWaterMm([{ positionId: 'a', grossMm: 12, netMm: 10, zoneShare: 0.5 }, { positionId: 'b', grossMm: 6, netMm: 6, zoneShare: 0.25 }]);
    expect(netMm).toBeCloseTo(6.5, 12);
    expect(grossMm).toBeCloseTo(7.5, 12);
  });

  it('is never more than was laid down, nor spread over more than the zone', () => {
    expect(() => zoneWaterMm([{ positionId: 'a', grossMm: 5, netMm: 6, zoneShare: 0.5 }])).toThrow(PhysicsError);
    expect(() => zoneWaterMm([{ positionId: 'a', grossMm: 5, netMm: 5, zoneShare: 1.5 }])).toThrow(PhysicsError);
  });
});

describe('a zone with its patches', () => {
  it('runs the zone as the plain budget does', () => {
    const rains = [0, 0, 9, 0, 0, 0, 22, 0];
    const days = runZoneWithPatches(lawn, { depletionMm: 6, patchDepletionMm: {} }, ['a'], runDays(rains, (index) => (index === 4 ? [{ positionId: 'a', grossMm: 8, netMm: 8, zoneShare: 1 }] : [])));
    const plain = runBudget({ zone: lawn, site, start: { depletionMm: 6 }, days: weather(rains).map((day, index) => ({ weather: day, irrigationMm: index === 4 ? 8 : 0 })) });
    expect(days.map((day) => day.depletionEndMm)).toEqual(plain.map((day) => day.depletionEndMm));
    // one patch that is the whole zone stands where the zone stands
    expect(days.map((day) => day.patchDepletionMm['a'])).toEqual(plain.map((day) => day.depletionEndMm));
  });

  it('closes every day and keeps its patches between full and empty, whatever falls and is applied', () => {
    fc.assert(fc.property(
      fc.array(fc.record({ rain: fc.double({ min: 0, max: 60, noNaN: true }), a: fc.double({ min: 0, max: 40, noNaN: true }), b: fc.double({ min: 0, max: 40, noNaN: true }), multiplier: fc.double({ min: 1, max: 2, noNaN: true }) }), { minLength: 1, maxLength: 40 }),
      (given) => {
        const days = runZoneWithPatches(lawn, { depletionMm: 3, patchDepletionMm: { b: 20 } }, ['a', 'b'], runDays(given.map((one) => one.rain), (index) => {
          const one = given[index];
          return one ? [
            { positionId: 'a', grossMm: one.a * one.multiplier, netMm: one.a, zoneShare: 0.6 }, { positionId: 'b', grossMm: one.b * one.multiplier, netMm: one.b, zoneShare: 0.4 },
          ] : [];
        }));
        let depletionMm = 3;
        for (const day of days) {
          expect(day.depletionStartMm).toBeCloseTo(depletionMm, 9);
          expect(Math.abs(day.depletionStartMm + day.etcMm + day.rootGrowthMm - day.effectiveRainMm - day.irrigationMm + day.drainageMm - day.depletionEndMm)).toBeLessThan(1e-6);
          expect(day.grossIrrigationMm - day.unevenLossMm).toBeCloseTo(day.irrigationMm, 9);
          expect(day.unevenLossMm).toBeGreaterThanOrEqual(-1e-9);
          for (const patch of Object.values(day.patchDepletionMm)) {
            expect(patch).toBeGreaterThanOrEqual(0);
            expect(patch).toBeLessThanOrEqual(day.totalAvailableMm + 1e-9);
          }
          depletionMm = day.depletionEndMm;
        }
      },
    ), { numRuns: 60 });
  });

  it('forgets a difference between patches when rain fills them all', () => {
    const days = runZoneWithPatches(lawn, { depletionMm: 10, patchDepletionMm: { a: 2, b: 18 } }, ['a', 'b'], runDays([0, 80, 0], () => []));
    expect(days[0]?.patchDepletionMm['b']).toBeGreaterThan((days[0]?.patchDepletionMm['a'] ?? 0) + 10);
    expect(days[1]?.patchDepletionMm['a']).toBeCloseTo(0, 9);
    expect(days[1]?.patchDepletionMm['b']).toBeCloseTo(0, 9);
    expect(days[2]?.patchDepletionMm['a']).toBeCloseTo(days[2]?.patchDepletionMm['b'] ?? NaN, 9);
  });

  it('starts half-way to its refill line', () => {
    const [first] = zoneDemand({ zone: lawn, site, weather: weather([0]) });
    if (!first) throw new Error('no day');
    const { state, assumption } = stateAtStart(lawn, first, null);
    const [day] = runZoneWithPatches(lawn, state, [], [{ demand: first, water: [], stage: null }]);
    expect(day?.depletionStartMm).toBeCloseTo((day?.refillLineMm ?? 0) / 2, 9);
    expect(assumption.field).toBe('depletionStartMm');
  });
});

describe('patches that differ', () => {
  const thin: BudgetZone = { ...lawn, surfaceLayer: true, coverFraction: 0.5 };
  const days = zoneDemand({ zone: thin, site, weather: weather([0, 0, 6, 0, 0, 0, 3, 0]) }).map((demand, index): RunDay => ({
    demand, water: index === 3 ? [{ positionId: 'a', grossMm: 8, netMm: 8, zoneShare: 0.5 }] : [], stage: null,
    observation: index === 5 ? { kind: 'screwdriver', feel: 'hard' } : null,
  }));

  it('run on from a stored day as if they had never been stored', () => {
    const whole = runZoneWithPatches(thin, { depletionMm: 6, patchDepletionMm: {} }, ['a', 'b'], days);
    const stored = whole[3];
    if (!stored) throw new Error('no such day');
    const { depletionEndMm, rootDepthM, surfaceDepletionMm, patchDepletionMm, patchSurfaceMm } = stored;
    const rest = runZoneWithPatches(thin, { depletionMm: depletionEndMm, rootDepthM, surfaceDepletionMm, patchDepletionMm, patchSurfaceMm }, ['a', 'b'], days.slice(4));
    expect(rest).toEqual(whole.slice(4));
    expect(patchSurfaceMm['a']).not.toBe(patchSurfaceMm['b']);
  });

  it('move in the morning with what was found, each from where it stood', () => {
    // Under full cover every patch has the refill line of its zone.
    const whole = runZoneWithPatches(lawn, { depletionMm: 6, patchDepletionMm: {} }, ['a', 'b'], days);
    const [before, seen] = [whole[4], whole[5]];
    if (!before || !seen) throw new Error('no such day');
    expect(seen.observationMm).toBeGreaterThan(0);
    expect(morningDepletionMm(seen)).toBeCloseTo(seen.depletionStartMm + seen.observationMm, 9);
    const found = (seen.refillLineMm + seen.totalAvailableMm) / 2;
    for (const id of ['a', 'b']) {
      // Screwdriver weight 0.4, default, common practice.
      const stood = before.patchDepletionMm[id] ?? Number.NaN;
      expect(seen.patchMorningMm[id]).toBeCloseTo(stood + 0.4 * (found - stood), 9);
    }
  });
});
