import fc from 'fast-check';
import { runBudget, stateAfter, stepRootZoneStore, stepZoneDay, zoneDemand, type BudgetDay, type BudgetZone, type ZoneDay } from '@/scheduling/budget';
import { GRASS_IDS } from '@/scheduling/grass';
import { SOIL_TEXTURES } from '@/scheduling/soil';
import { addDays } from '@/scheduling/units';
import { CLEAR_SKY, dailyReferenceEt, type DailyWeather } from '@/scheduling/weather';
import { RECORD_SITES, recordedWeather } from '../../fixtures/vegaWeather';

const LAWN: BudgetZone = { grass: 'cool_mix', texture: 'loam', sunHours: null, sownOn: null };
const SITE = { latitudeDeg: 42, elevationM: 200 };
const WEATHER: DailyWeather = {
  on: '2026-06-15', tminC: 14, tmaxC: 28, tdewC: 12, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: 2, windHeightM: 2, solarMjM2: 24, sunshineHours: null, precipitationMm: 0,
};

/** The identity of a zone-day, summed from its terms. */
function closingError(day: ZoneDay): number {
  return day.depletionEndMm - (day.depletionStartMm + day.rootGrowthMm + day.observationMm + day.etcMm - day.effectiveRainMm - day.irrigationMm + day.drainageMm);
}

/** What is wrong with a closed day, in words; nothing for a sound one. One expectation a day keeps four recorded years quick. */
function faultsOf(day: ZoneDay): string[] {
  const checks: [string, boolean][] = [
    ['closes', Math.abs(closingError(day)) <= 1e-6 && Math.abs(day.closingErrorMm) <= 1e-6],
    ['splits its rain', Math.abs(day.effectiveRainMm + day.rainLossMm - day.rainMm) <= 1e-9],
    ['stays in its store', day.depletionEndMm >= 0 && day.depletionEndMm <= day.totalAvailableMm + 1e-9],
    ['has a refill line inside its store', day.refillLineMm > 0 && day.refillLineMm < day.totalAvailableMm],
    ['has no negative flow', [day.etcMm, day.drainageMm, day.rainLossMm, day.potentialEtMm - day.etcMm, day.et0Mm - day.shadedEt0Mm].every((value) => value >= -1e-9)],
    ['is finite', Object.values(day).every((value) => typeof value !== 'number' || Number.isFinite(value))],
  ];
  return checks.filter(([, holds]) => !holds).map(([name]) => `${day.on}: not true that it ${name}`);
}

const expectSound = (day: ZoneDay) => expect(faultsOf(day)).toEqual([]);

describe('one day of a zone', () => {
  const day = { on: '2026-06-15', et0Mm: 5, shadedEt0Mm: 5, rainMm: 0, irrigationMm: 0 };

  it('uses the default coefficient of the grass and says so', () => {
    const closed = stepZoneDay({ depletionMm: 5 }, LAWN, day);
    expect(closed.cropCoefficient).toBe(0.85);
    expect(closed.etcMm).toBeCloseTo(4.25, 12);
    expect(closed.depletionEndMm).toBeCloseTo(9.25, 12);
    expect(closed.totalAvailableMm).toBeCloseTo(31, 10);
    expect(closed.depletionFraction).toBeCloseTo(0.4 + 0.04 * 0.75, 12);
    expect(closed.assumptions.map(({ field }) => field).sort()).toEqual(['cropCoefficient', 'depletionFraction', 'rootDepthM']);
    expectSound(closed);
  });

  it('assumes nothing where everything was tuned', () => {
    const closed = stepZoneDay({ depletionMm: 5 }, { ...LAWN, rootDepthM: 0.18, cropCoefficient: 0.7, depletionFraction: 0.5 }, day);
    expect(closed).toMatchObject({ cropCoefficient: 0.7, depletionFraction: 0.5, assumptions: [] });
    expect(closed.refillLineMm).toBeCloseTo(closed.totalAvailableMm / 2, 12);
  });

  it('lets the surplus drain and loses a sprinkle to the leaves', () => {
    const soaked = stepZoneDay({ depletionMm: 5 }, LAWN, { ...day, irrigationMm: 30 });
    expect(soaked.depletionEndMm).toBe(0);
    expect(soaked.drainageMm).toBeCloseTo(30 - 5 - 4.25, 12);
    expect(stepZoneDay({ depletionMm: 5 }, LAWN, { ...day, rainMm: 0.9 })).toMatchObject({ effectiveRainMm: 0, rainLossMm: 0.9 });
  });

  it('relieves stress on the day of the water', () => {
    const dry = stepZoneDay({ depletionMm: 28 }, LAWN, day);
    expect(dry.stressCoefficient).toBeLessThan(0.2);
    expect(stepZoneDay({ depletionMm: 28 }, LAWN, { ...day, irrigationMm: 20 }).stressCoefficient).toBe(1);
  });

  it('leaves depletion behind with roots that are gone, and keeps the identity', () => {
    const shallow = stepZoneDay({ depletionMm: 20, rootDepthM: 0.3 }, { ...LAWN, rootDepthM: 0.15 }, day);
    expect(shallow.rootGrowthMm).toBeCloseTo(-10, 10);
    expectSound(shallow);
    const changed = stepZoneDay({ depletionMm: 60 }, LAWN, day);
    expectSound(changed);
    expect(changed.rootGrowthMm).toBeCloseTo(31 - 60, 10);
  });

  it('refuses the impossible with the field named', () => {
    for (const [field, change] of [['rainMm', { rainMm: -1 }], ['irrigationMm', { irrigationMm: Number.NaN }], ['et0Mm', { et0Mm: Infinity }], ['shadedEt0Mm', { shadedEt0Mm: -0.1 }]] as const) {
      expect(() => stepZoneDay({ depletionMm: 5 }, LAWN, { ...day, ...change })).toThrow(expect.objectContaining({ field }));
    }
    expect(() => stepZoneDay({ depletionMm: -1 }, LAWN, day)).toThrow(expect.objectContaining({ field: 'depletionMm' }));
    expect(() => stepZoneDay({ depletionMm: 1 }, { ...LAWN, depletionFraction: 1.5 }, day)).toThrow(expect.objectContaining({ field: 'depletionFraction' }));
    expect(() => stepRootZoneStore({ depletionStartMm: 9, potentialEtMm: 1, effectiveRainMm: 0, irrigationMm: 0, totalAvailableMm: 8, readilyAvailableMm: 4 }))
      .toThrow(expect.objectContaining({ field: 'depletionStartMm' }));
  });
});

describe('a sowing', () => {
  const sown: BudgetZone = { ...LAWN, sownOn: '2026-09-01' };
  const days: BudgetDay[] = Array.from({ length: 120 }, (_, index) => ({ weather: { ...WEATHER, on: addDays('2026-09-01', index), tminC: 12, tmaxC: 22, tdewC: 10, solarMjM2: 16 }, irrigationMm: 3 }));
  const run = runBudget({ zone: sown, site: SITE, days, start: { depletionMm: 0 } });

  it('asks for more water than a grown lawn until it covers the ground', () => {
    expect(run[0]?.cropCoefficient).toBeGreaterThan(1);
    expect(run[0]?.stage).toBe('sown');
    expect(run[119]?.cropCoefficient).toBe(0.85);
    expect(run[119]?.stage).toBe('established');
  });

  it('roots down, adding the water already in the new soil', () => {
    const tawOf = (index: number) => run[index]?.totalAvailableMm ?? 0;
    expect(tawOf(0)).toBeCloseTo(0.025 * 155, 9);
    expect(tawOf(100)).toBeCloseTo(31, 9);
    for (let i = 1; i < run.length; i += 1) expect(tawOf(i)).toBeGreaterThanOrEqual(tawOf(i - 1));
    // New soil is moist: the store grows, the depletion does not.
    expect(run.every((day) => day.rootGrowthMm === 0)).toBe(true);
    run.forEach(expectSound);
  });

  it('follows the reported stage rather than the calendar', () => {
    const late = stepZoneDay({ depletionMm: 0 }, sown, { on: '2026-10-01', et0Mm: 4, shadedEt0Mm: 4, rainMm: 0, irrigationMm: 0, stage: 'sown' });
    expect(late.stage).toBe('sown');
    expect(late.cropCoefficient).toBeCloseTo(1.108, 3);
    const early = stepZoneDay({ depletionMm: 0 }, sown, { on: '2026-10-01', et0Mm: 4, shadedEt0Mm: 4, rainMm: 0, irrigationMm: 0, stage: 'established' });
    expect(early.cropCoefficient).toBe(0.85);
    expect(early.assumptions.map(({ field }) => field)).not.toContain('stage');
  });
});

describe('demand of a zone', () => {
  it('falls with shade through the radiation', () => {
    const weather = [WEATHER];
    const open = zoneDemand({ zone: LAWN, site: SITE, weather })[0];
    const shaded = zoneDemand({ zone: { ...LAWN, sunHours: 3 }, site: SITE, weather })[0];
    expect(open?.shadedEt0Mm).toBe(open?.et0Mm);
    expect(shaded?.et0Mm).toBe(open?.et0Mm);
    expect(shaded?.shadedEt0Mm ?? 99).toBeLessThan((open?.et0Mm ?? 0) * 0.85);
    expect(shaded?.sunHours).toBeCloseTo(3, 9);
  });

  it('fills a day without temperatures from its neighbours, says so, and never invents rain', () => {
    const weather = [WEATHER, { ...WEATHER, on: '2026-06-16', tminC: null, precipitationMm: null }, { ...WEATHER, on: '2026-06-17' }];
    const demand = zoneDemand({ zone: LAWN, site: SITE, weather });
    expect(demand[1]?.et0Mm).toBe(demand[0]?.et0Mm);
    expect(demand[1]?.rainMm).toBe(0);
    expect(demand[1]?.assumptions.map(({ field }) => field)).toEqual(['et0Mm', 'precipitationMm']);
    const ahead = zoneDemand({ zone: LAWN, site: SITE, weather: [{ ...WEATHER, tmaxC: null }, { ...WEATHER, on: '2026-06-16' }] });
    expect(ahead[0]?.et0Mm).toBe(ahead[1]?.et0Mm);
    const nothing = zoneDemand({ zone: LAWN, site: SITE, weather: [{ ...WEATHER, tmaxC: null }] });
    expect(nothing[0]).toMatchObject({ et0Mm: 0, shadedEt0Mm: 0 });
  });

  it('takes reference ET that is already known and refuses days out of order', () => {
    const reference = [dailyReferenceEt({ site: SITE, weather: WEATHER, clearSky: CLEAR_SKY })];
    expect(zoneDemand({ zone: LAWN, site: SITE, weather: [WEATHER], reference })).toEqual(zoneDemand({ zone: LAWN, site: SITE, weather: [WEATHER] }));
    expect(() => zoneDemand({ zone: LAWN, site: SITE, weather: [WEATHER], reference: [] })).toThrow(expect.objectContaining({ field: 'reference' }));
    expect(() => zoneDemand({ zone: LAWN, site: SITE, weather: [WEATHER, WEATHER] })).toThrow(expect.objectContaining({ field: 'on' }));
  });

  it('believes the gauge in the yard before the weather service', () => {
    const [day] = runBudget({ zone: LAWN, site: SITE, start: { depletionMm: 10 }, days: [{ weather: { ...WEATHER, precipitationMm: 12 }, gaugeRainMm: 4, irrigationMm: 0 }] });
    expect(day?.rainMm).toBe(4);
    const [zero] = runBudget({ zone: LAWN, site: SITE, start: { depletionMm: 10 }, days: [{ weather: { ...WEATHER, precipitationMm: 12 }, gaugeRainMm: 0, irrigationMm: 0 }] });
    expect(zero?.rainMm).toBe(0);
  });
});

describe('conservation', () => {
  it.each(['Seattle', 'New York'] as const)('%s 2012-2015: every day closes and so does the whole, watered at the refill line', (city) => {
    const weather = recordedWeather(city);
    const site = RECORD_SITES[city];
    const zone: BudgetZone = { ...LAWN, sunHours: 7, sunHoursOn: '2012-06-21' };
    const demand = zoneDemand({ zone, site, weather });
    let state = { depletionMm: 0 } as Parameters<typeof stepZoneDay>[0];
    let due = false;
    const faults: string[] = [];
    const sum = { etcMm: 0, effectiveRainMm: 0, irrigationMm: 0, drainageMm: 0 };
    for (const day of demand) {
      const irrigationMm = due ? 12 : 0;
      const closed = stepZoneDay(state, zone, { ...day, irrigationMm });
      faults.push(...faultsOf(closed));
      if (closed.depletionStartMm !== state.depletionMm) faults.push(`${closed.on}: does not start where the day before ended`);
      state = stateAfter(closed);
      due = closed.depletionEndMm > closed.refillLineMm;
      (Object.keys(sum) as (keyof typeof sum)[]).forEach((key) => { sum[key] += closed[key]; });
    }
    expect(faults).toEqual([]);
    expect(Math.abs(state.depletionMm - (sum.etcMm - sum.effectiveRainMm - sum.irrigationMm + sum.drainageMm))).toBeLessThan(1e-6);
    expect(sum.irrigationMm).toBeGreaterThan(200);
    expect(sum.drainageMm).toBeGreaterThan(500);
  });

  it('holds for any grass, soil, exposure, sowing, weather and water', () => {
    const zones = fc.record({
      grass: fc.constantFrom(...GRASS_IDS), texture: fc.constantFrom(...SOIL_TEXTURES), sunHours: fc.option(fc.double({ min: 0, max: 16, noNaN: true })),
      sownOn: fc.option(fc.integer({ min: -120, max: 40 }).map((offset) => addDays('2026-05-01', offset))), rootDepthM: fc.option(fc.double({ min: 0.03, max: 0.6, noNaN: true })),
    });
    const days = fc.array(fc.record({
      tminC: fc.double({ min: -20, max: 30, noNaN: true }), range: fc.double({ min: 0, max: 22, noNaN: true }), rain: fc.double({ min: 0, max: 80, noNaN: true }),
      irrigationMm: fc.double({ min: 0, max: 40, noNaN: true }), missing: fc.boolean(),
    }), { minLength: 1, maxLength: 25 });
    fc.assert(fc.property(zones, days, fc.double({ min: 0, max: 100, noNaN: true }), (zone, given, depletionMm) => {
      const run = runBudget({
        zone, site: SITE, start: { depletionMm },
        days: given.map(({ tminC, range, rain, irrigationMm, missing }, index) => ({
          weather: { ...WEATHER, on: addDays('2026-05-01', index), tminC: missing ? null : tminC, tmaxC: tminC + range, tdewC: null, precipitationMm: rain }, irrigationMm,
        })),
      });
      expect(run).toHaveLength(given.length);
      expect(run.flatMap(faultsOf)).toEqual([]);
      expect(run.slice(1).map((day) => day.depletionStartMm)).toEqual(run.slice(0, -1).map((day) => day.depletionEndMm));
    }));
  });

  it('more water never leaves a drier soil', () => {
    const day = { on: '2026-06-15', et0Mm: 5, shadedEt0Mm: 5, rainMm: 0 };
    fc.assert(fc.property(fc.double({ min: 0, max: 31, noNaN: true }), fc.double({ min: 0, max: 30, noNaN: true }), fc.double({ min: 0, max: 10, noNaN: true }), (depletionMm, irrigationMm, more) => {
      const end = (depthMm: number) => stepZoneDay({ depletionMm }, LAWN, { ...day, irrigationMm: depthMm }).depletionEndMm;
      expect(end(irrigationMm + more)).toBeLessThanOrEqual(end(irrigationMm) + 1e-9);
    }));
  });
});
