import fc from 'fast-check';
import { draftInUnits, same, startDraft, valuesSchema, type Rules } from '@/components/calculators/rules';

const rules = {
  depth: { kind: 'number', label: 'Depth', quantity: 'depth', start: { us: '0.5', metric: '12' }, minSi: 0.5, maxSi: 100 },
  roots: { kind: 'optional', label: 'Roots', quantity: 'bore', start: same(''), minSi: 20, maxSi: 1_500 },
  slope: { kind: 'number', label: 'Slope', quantity: null, unit: '%', start: same('5'), minSi: 0, maxSi: 60, whole: true },
  readings: { kind: 'list', label: 'Readings', quantity: 'depth', start: { us: '0.3 0.2 0.1', metric: '8 5 3' }, minSi: 0, maxSi: 300, least: 3, most: 5 },
  soil: { kind: 'choice', label: 'Soil', start: 'loam', options: () => [{ value: 'loam', label: 'Loam' }, { value: 'clay', label: 'Clay' }] },
  on: { kind: 'day', label: 'Day', start: '2026-07-06' },
} as const satisfies Rules;
const us = startDraft(rules, 'us');
const read = (change: Record<string, string>, units: 'us' | 'metric' = 'us') => valuesSchema(rules, units).safeParse({ ...startDraft(rules, units), ...change });
const faults = (change: Record<string, string>) => read(change).error?.issues.map((issue) => String(issue.path[0])) ?? [];

describe('the fields of a calculator', () => {
  it('mean SI whatever units they are written in', () => {
    const found = read({ readings: '1 0,5; 0.25' });
    expect(found.data?.depth).toBeCloseTo(12.7, 9);
    expect(found.data?.readings).toEqual([25.4, 12.7, 6.35]);
    expect(found.data?.roots).toBeNull();
    expect(found.data?.slope).toBe(5);
    expect(read({}, 'metric').data?.readings).toEqual([8, 5, 3]);
  });

  it.each<[string, Record<string, string>]>([
    ['depth', { depth: '' }], ['depth', { depth: 'deep' }], ['depth', { depth: '9' }], ['slope', { slope: '2.5' }], ['slope', { slope: '-1' }], ['roots', { roots: '0.1' }],
    ['readings', { readings: '1 2' }], ['readings', { readings: '1 2 3 4 5 6' }], ['readings', { readings: '1 two 3' }], ['readings', { readings: '1 -2 3' }], ['soil', { soil: 'cheese' }], ['on', { on: '2026-02-30' }],
  ])('say what is wrong with %s', (field, change) => {
    expect(faults(change)).toEqual([field]);
  });

  it('change units with what was typed, and the example into the other example', () => {
    expect(draftInUnits(rules, us, 'us', 'metric')).toEqual(startDraft(rules, 'metric'));
    const turned = draftInUnits(rules, { ...us, depth: '1', readings: '1 0.5 0.25', slope: '7', depthless: 'x' }, 'us', 'metric');
    expect(turned).toMatchObject({ depth: '25.4', readings: '25.4 12.7 6.35', slope: '7', soil: 'loam' });
  });

  it('keep a depth within a hundredth through both units, as each change keeps three figures', () => {
    fc.assert(fc.property(fc.double({ min: 0.6, max: 99, noNaN: true }), (mm) => {
      const metric = { ...startDraft(rules, 'metric'), depth: mm.toFixed(2) };
      const back = draftInUnits(rules, draftInUnits(rules, metric, 'metric', 'us'), 'us', 'metric');
      // Half a unit of the third figure is at most 0.5 % of the number; two changes make at most 1.0025 %.
      expect(Math.abs(Number(back.depth) / Number(metric.depth) - 1)).toBeLessThanOrEqual(0.010025 + 1e-9);
    }));
  });
});
