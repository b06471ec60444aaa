import {
  bareSoilCoefficient, coverFraction, effectiveRain, effectiveRainByRuleMm, evaporableAfterHeavyWetting, evaporableAfterLightWetting, evaporationCoefficient, evaporationReduction,
  exposedWettedFraction, seedbedCoefficient, stepRootZoneStore, stepSurfaceLayer, upperLimitCoefficient, wettedFractionAfter,
} from '@/scheduling/budget';
import { totalEvaporableWaterMm } from '@/scheduling/soil';
import { mmFromInches } from '@/scheduling/units';
import { EFFECTIVE_RAIN_RULE, FAO56_WATER } from '../../fixtures/fao56Water';
import { toleranceOf } from '../../fixtures/published';
import { TOLERANCES } from '../../fixtures/tolerances';

const near = (value: number, printed: number, tolerance: number) => expect(Math.abs(value - printed)).toBeLessThanOrEqual(tolerance + 1e-9);

describe('stress in a drying root zone (A37, FAO-56 example 37)', () => {
  it('gives every printed cell', () => {
    const { taw, raw, startMm, etcMm, depletionEnd, ks, etcAdjusted } = FAO56_WATER.example37;
    let depletionStartMm: number = startMm;
    const rows = depletionEnd.map(() => {
      const day = stepRootZoneStore({ depletionStartMm, potentialEtMm: etcMm, effectiveRainMm: 0, irrigationMm: 0, totalAvailableMm: taw, readilyAvailableMm: raw });
      depletionStartMm = day.depletionEndMm;
      return day;
    });
    expect(rows).toHaveLength(10);
    const rounded = (value: number, printed: string) => expect(value.toFixed(printed.includes('.') ? printed.split('.')[1]?.length ?? 0 : 0)).toBe(printed);
    rows.forEach((row, index) => {
      rounded(row.depletionEndMm, depletionEnd[index] ?? '');
      rounded(row.stressCoefficient, ks[index] ?? '');
      rounded(row.etcMm, etcAdjusted[index] ?? '');
      expect(row.drainageMm).toBe(0);
    });
  });
});

describe('evaporation from a drying surface (A31, FAO-56 example 31)', () => {
  it('gives every printed cell', () => {
    let depletionStartMm = 0;
    const tolerances = ['0.01', '0.01', '0.01', '0.01', '0.01', '0.1'].map(toleranceOf);
    for (const printed of FAO56_WATER.example31) {
      const day = stepSurfaceLayer({
        depletionStartMm, rainMm: 0, irrigationMm: 0, wettedFraction: 1, coverFraction: 0, basalCoefficient: 0.15, upperLimit: 1.2, et0Mm: 4.5, tewMm: 20, rewMm: 9,
      });
      [depletionStartMm, day.reduction, day.evaporationCoefficient, day.evaporationMm, day.depletionEndMm, day.etcMm].forEach((value, column) => {
        near(value, printed[column] ?? Number.NaN, tolerances[column] ?? 0);
      });
      depletionStartMm = day.depletionEndMm;
    }
  });
});

describe('evaporation between half-grown plants (A32, FAO-56 example 32)', () => {
  it('gives every printed step', () => {
    const { et0Mm, windMps, rhMinPct, heightM, kcb, ...printed } = FAO56_WATER.example32;
    const kcMax = upperLimitCoefficient({ basalCoefficient: kcb, windAtTwoMetresMps: windMps, rhMinPct, heightM });
    const cover = coverFraction(kcb, kcMax, heightM);
    const few = exposedWettedFraction(cover, 1);
    const ke = evaporationCoefficient(1, kcMax, kcb, few);
    near(kcMax, printed.kcMax, 0.01);
    near(cover, printed.fc, 0.01);
    near(few, printed.few, 0.01);
    near(few * kcMax, printed.limit, 0.01);
    near(ke, printed.ke, 0.01);
    near(kcb + ke, printed.kc, 0.01);
    near((kcb + ke) * et0Mm, printed.etcMm, 0.1);
  });
});

describe('ten days with the dual coefficient (A35, FAO-56 example 35)', () => {
  const example = FAO56_WATER.example35;

  it('gives the full-precision column within 0.01 and the printed one within its own slips', () => {
    const upperLimit = upperLimitCoefficient({ basalCoefficient: 0.3, windAtTwoMetresMps: example.windMps, rhMinPct: example.rhMinPct, heightM: example.heightM });
    near(upperLimit, example.kcMax, 0.005);
    near(totalEvaporableWaterMm(example.fieldCapacity, example.wiltingPoint, example.layerM), example.tewMm, 1e-9);
    let depletionStartMm: number = example.startMm;
    let wettedFraction: number = example.irrigation.wettedFraction;
    example.days.forEach(([et0Mm, bare, basalCoefficient, few, kr, ke, end, kc, etc], index) => {
      const rainMm = index + 1 === example.rain.day ? example.rain.depthMm : 0;
      const irrigationMm = index + 1 === example.irrigation.day ? example.irrigation.depthMm : 0;
      wettedFraction = wettedFractionAfter(wettedFraction, rainMm, irrigationMm, example.irrigation.wettedFraction);
      const day = stepSurfaceLayer({
        depletionStartMm, rainMm, irrigationMm, wettedFraction, coverFraction: 1 - bare, basalCoefficient, upperLimit, et0Mm, tewMm: example.tewMm, rewMm: example.rewMm,
      });
      near(day.exposedWetted, few, 1e-9);
      const { recomputed, printedInWholeMm } = TOLERANCES;
      near(day.reduction, kr[1], recomputed);
      near(day.evaporationCoefficient, ke[1], recomputed);
      near(day.depletionEndMm, end[1], recomputed);
      near(day.cropCoefficient, kc[1], recomputed);
      near(day.etcMm, etc[1], recomputed);
      near(day.reduction, kr[0], printedInWholeMm.coefficient);
      near(day.evaporationCoefficient, ke[0], printedInWholeMm.coefficient);
      near(day.cropCoefficient, kc[0], printedInWholeMm.coefficient);
      near(day.depletionEndMm, end[0], printedInWholeMm.depletionMm);
      near(day.etcMm, etc[0], printedInWholeMm.etcMm);
      if (index === 0) near(day.drainageMm, example.drainageDay1Mm, 1e-9);
      depletionStartMm = day.depletionEndMm;
    });
  });
});

describe('bare soil (A-K1, FAO-56 annex 7)', () => {
  it.each(FAO56_WATER.bareSoilLight)('light wettings at ET0 $et0Mm', ({ et0Mm, kc }) => {
    FAO56_WATER.bareSoilIntervals.forEach((intervalDays, index) => {
      near(bareSoilCoefficient(et0Mm, intervalDays, evaporableAfterLightWetting(et0Mm)), kc[index] ?? Number.NaN, 0.0006);
    });
  });

  it('lies near what example 24 reads off the graph', () => {
    const { et0Mm, intervalDays, kcFromGraph, etcMm } = FAO56_WATER.example24;
    const kc = bareSoilCoefficient(et0Mm, intervalDays, evaporableAfterLightWetting(et0Mm));
    near(kc, kcFromGraph, 0.05);
    near(kc * et0Mm, etcMm, 0.2);
  });

  it('goes in a straight line from light to heavy wettings', () => {
    const at = (depthMm: number) => seedbedCoefficient({ et0Mm: 5, intervalDays: 4, depthMm, soilClass: 'medium_or_fine' });
    const heavy = bareSoilCoefficient(5, 4, evaporableAfterHeavyWetting(5, 'medium_or_fine'));
    expect(at(5)).toBe(at(10));
    expect(at(25)).toBeCloseTo((at(10) + heavy) / 2, 12);
    expect(at(60)).toBeCloseTo(heavy, 12);
    expect(seedbedCoefficient({ et0Mm: 0, intervalDays: 1, depthMm: 5, soilClass: 'coarse' })).toBe(1.15);
    // Next to no demand: the printed forms divide by it.
    expect(seedbedCoefficient({ et0Mm: 5e-324, intervalDays: 2, depthMm: 50, soilClass: 'coarse' })).toBe(1.15);
    expect(evaporableAfterHeavyWetting(1, 'coarse')).toEqual({ tewMm: 7, rewMm: 6 });
  });
});

describe('effective rain', () => {
  it('ignores a day below a fifth of ET0 and counts the rest whole (FAO-56 chapter 8)', () => {
    expect(effectiveRain(0.9, 5)).toEqual({ effectiveRainMm: 0, rainLossMm: 0.9 });
    expect(effectiveRain(1, 5)).toEqual({ effectiveRainMm: 1, rainLossMm: 0 });
    expect(effectiveRain(60, 5)).toEqual({ effectiveRainMm: 60, rainLossMm: 0 });
    expect(() => effectiveRain(-1, 5)).toThrow(expect.objectContaining({ field: 'rainMm' }));
  });

  it('offers the rule of thumb of Texas A&M beside it (E02)', () => {
    for (const [rain, credit] of EFFECTIVE_RAIN_RULE.inches) expect(effectiveRainByRuleMm(mmFromInches(rain))).toBeCloseTo(mmFromInches(credit), 9);
  });
});

describe('the dual coefficient at its edges', () => {
  it('keeps its factors within bounds', () => {
    expect(evaporationReduction(0, 18, 8)).toBe(1);
    expect(evaporationReduction(18, 18, 8)).toBe(0);
    expect(exposedWettedFraction(1, 1)).toBe(0.01);
    expect(upperLimitCoefficient({ basalCoefficient: 1.4, windAtTwoMetresMps: 2, rhMinPct: 45, heightM: 0.1 })).toBeCloseTo(1.45, 12);
    expect(upperLimitCoefficient({ basalCoefficient: 0.2, windAtTwoMetresMps: 2, rhMinPct: 45, heightM: 0.1, wettedOften: true })).toBeCloseTo(1.1, 12);
    expect(() => coverFraction(0.5, 0.1, 0.1)).toThrow(expect.objectContaining({ field: 'upperLimit' }));
    expect(() => stepSurfaceLayer({ depletionStartMm: 30, rainMm: 0, irrigationMm: 0, wettedFraction: 1, coverFraction: 0, basalCoefficient: 0.15, upperLimit: 1.2, et0Mm: 4, tewMm: 20, rewMm: 9 }))
      .toThrow(expect.objectContaining({ field: 'depletionStartMm' }));
  });
});
