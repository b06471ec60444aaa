import { GRASS_IDS, GRASSES, isGrassId, MONTHLY_TURF_COEFFICIENTS } from '@/scheduling/grass';
import { MONTHLY_TURF } from '../../fixtures/grass';

/** FAO-56 table 12 (mid-season turf), table 22 (depletion fraction). */
const TABLE = { cool: { kc: 0.95, p: 0.4 }, warm: { kc: 0.85, p: 0.5 } } as const;

describe('grasses', () => {
  it.each(GRASS_IDS)('%s takes the table value of its family less the footnote', (id) => {
    const grass = GRASSES[id];
    expect(grass.id).toBe(id);
    expect(grass.cropCoefficient).toBeCloseTo(TABLE[grass.family].kc - 0.1, 12);
    expect(grass.depletionFraction).toBe(TABLE[grass.family].p);
    expect(grass.cropCoefficientSource).toContain('table 12');
    expect(grass.rootDepthSource.length).toBeGreaterThan(10);
  });

  it('knows five cool and five warm ones and no others', () => {
    expect(GRASS_IDS.filter((id) => GRASSES[id].family === 'cool')).toHaveLength(5);
    expect(isGrassId('tall_fescue')).toBe(true);
    expect(isGrassId('clover')).toBe(false);
    expect(isGrassId(null)).toBe(false);
  });

  it('keeps the measured months (E01, Meyer et al. 1985): means .79 and .65', () => {
    const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
    expect(MONTHLY_TURF_COEFFICIENTS).toEqual({ cool: MONTHLY_TURF.cool, warm: MONTHLY_TURF.warm });
    expect(mean(MONTHLY_TURF_COEFFICIENTS.cool)).toBeCloseTo(0.79, 2);
    expect(mean(MONTHLY_TURF_COEFFICIENTS.warm)).toBeCloseTo(0.65, 2);
  });
});
