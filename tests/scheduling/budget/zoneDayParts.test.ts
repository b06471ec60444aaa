import fc from 'fast-check';
import {
  closingErrorOfTerms, effectiveRainByRuleMm, explainZoneDay, FROSTED_COEFFICIENT, FULL_COVER, observedDepletionMm, RESTING_COEFFICIENT, runBudget, SCREWDRIVER_FEELS, seededCoverFraction, SNOW_ET_MM,
  stageByCalendar, stateAfter, stepRootZoneStore, stepZoneDay, surfaceStore, thinBasalCoefficient, winterDays, zoneDemand, type BudgetDay, type BudgetZone, type ZoneDay, type ZoneDayInput,
} from '@/scheduling/budget';
import { runZoneWithPatches } from '@/scheduling/budget/zoneRun';
import { ESTABLISHMENT_STAGES, stageOn } from '@/scheduling/establishment';
import { GRASS_IDS } from '@/scheduling/grass';
import { endOfDayDepletionMm } from '@/scheduling/planning/patchBalance';
import { SOIL_COMPACTIONS, SOIL_TEXTURES, soilWater } from '@/scheduling/soil';
import { yearOfExposure } from '@/scheduling/sun';
import { addDays } from '@/scheduling/units';
import type { DailyWeather } from '@/scheduling/weather';
import { TOLERANCES } from '../../fixtures/tolerances';

const LAWN: BudgetZone = { grass: 'cool_mix', texture: 'loam', sunHours: null, sownOn: null };
const DAY: ZoneDayInput = { on: '2026-06-15', et0Mm: 5, shadedEt0Mm: 5, rainMm: 0, irrigationMm: 0 };
const SITE = { latitudeDeg: 42, elevationM: 100 };
const WEATHER: DailyWeather = {
  on: '2026-06-15', tminC: 14, tmaxC: 28, tdewC: 12, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: 2, windHeightM: 2, solarMjM2: 24, sunshineHours: null, precipitationMm: 0,
};

const unit = fc.double({ min: 0, max: 1, noNaN: true });
const zones: fc.Arbitrary<BudgetZone> = fc.record({
  grass: fc.constantFrom(...GRASS_IDS), texture: fc.constantFrom(...SOIL_TEXTURES), sunHours: fc.constant(null),
  sownOn: fc.option(fc.integer({ min: -420, max: 20 }).map((offset) => addDays('2026-06-15', offset))),
  surfaceLayer: fc.boolean(), coverFraction: fc.option(unit), treeRoots: fc.option(fc.record({ share: unit })), rootSeasonLatitudeDeg: fc.option(fc.constantFrom(42, -42)),
  rainGround: fc.option(fc.record({ texture: fc.constantFrom(...SOIL_TEXTURES), slopePct: fc.double({ min: 0, max: 20, noNaN: true }), compaction: fc.constantFrom(...SOIL_COMPACTIONS) })),
  resting: fc.boolean(),
});
const inputs: fc.Arbitrary<ZoneDayInput> = fc.record({
  on: fc.constant('2026-06-15'), et0Mm: fc.double({ min: 0, max: 11, noNaN: true }), shade: unit, rainMm: fc.double({ min: 0, max: 90, noNaN: true }), irrigationMm: fc.double({ min: 0, max: 40, noNaN: true }),
  condition: fc.option(fc.constantFrom('growing' as const, 'resting' as const, 'frosted' as const, 'snow' as const)), stage: fc.option(fc.constantFrom(...ESTABLISHMENT_STAGES)),
  windAtTwoMetresMps: fc.option(fc.double({ min: 0, max: 12, noNaN: true })), rhMinPct: fc.option(fc.double({ min: 0, max: 100, noNaN: true })),
  observation: fc.option(fc.oneof(
    fc.record({ kind: fc.constant('probe' as const), waterContent: fc.double({ min: 0, max: 0.6, noNaN: true }) }),
    fc.record({ kind: fc.constant('screwdriver' as const), feel: fc.constantFrom(...SCREWDRIVER_FEELS) }),
    fc.record({ kind: fc.constant('depletion' as const), depletionMm: fc.double({ min: 0, max: 90, noNaN: true }), weight: unit }),
  )),
}).map(({ shade, ...rest }) => ({ ...rest, shadedEt0Mm: rest.et0Mm * shade }));

/** What is wrong with a closed day. */
function faultsOf(day: ZoneDay): string[] {
  const identity = day.depletionStartMm + day.rootGrowthMm + day.observationMm + day.etcMm - day.effectiveRainMm - day.irrigationMm + day.drainageMm - day.depletionEndMm;
  const checks: [string, boolean][] = [
    ['closes', Math.abs(identity) <= TOLERANCES.closesMm],
    ['closes in words', Math.abs(closingErrorOfTerms(explainZoneDay(day))) <= TOLERANCES.closesMm],
    ['stays in its store', day.depletionEndMm >= 0 && day.depletionEndMm <= day.totalAvailableMm + 1e-9],
    ['splits its rain', Math.abs(day.effectiveRainMm + day.rainLossMm - day.rainMm) <= 1e-9 && day.runoffMm <= day.rainLossMm + 1e-9],
    ['has parts of its use that fit in it', day.evaporationMm >= 0 && day.treeUptakeMm >= 0 && day.evaporationMm + day.treeUptakeMm <= day.etcMm + 1e-9],
    ['uses no more than it would', day.etcMm <= day.potentialEtMm + 1e-9 && day.drainageMm >= 0],
    ['keeps its surface in its store', day.surfaceDepletionMm === null || day.surfaceDepletionMm >= 0],
    ['is finite', Object.values(day).every((value) => typeof value !== 'number' || Number.isFinite(value))],
  ];
  return checks.filter(([, holds]) => !holds).map(([name]) => name);
}

describe('every day of every kind of zone', () => {
  it('closes, term by term, and stays within its store', () => {
    fc.assert(fc.property(zones, fc.array(inputs, { minLength: 1, maxLength: 12 }), fc.double({ min: 0, max: 60, noNaN: true }), (zone, days, depletionMm) => {
      let state: Parameters<typeof stepZoneDay>[0] = { depletionMm };
      days.forEach((day, index) => {
        const closed = stepZoneDay(state, zone, { ...day, on: addDays(day.on, index) });
        expect(faultsOf(closed)).toEqual([]);
        state = stateAfter(closed);
      });
    }), { numRuns: 300 });
  });
});

describe('a day explains itself', () => {
  it('names what happened in order and leaves out what did not', () => {
    const quiet = explainZoneDay(stepZoneDay({ depletionMm: 8 }, LAWN, DAY));
    expect(quiet.map(({ key }) => key)).toEqual(['start', 'grass', 'end']);
    expect(quiet[1]?.numbers).toMatchObject({ et0Mm: 5, cropCoefficient: 0.85, stressCoefficient: 1 });
    expect(quiet[1]?.assumptions.map(({ field }) => field)).toEqual(['cropCoefficient', 'depletionFraction']);
    const busy = explainZoneDay(stepZoneDay({ depletionMm: 8 }, { ...LAWN, treeRoots: { share: 0.5 }, surfaceLayer: true, coverFraction: 0.5 }, {
      ...DAY, rainMm: 4, irrigationMm: 12, observation: { kind: 'screwdriver', feel: 'firm' },
    }));
    expect(busy.map(({ key }) => key)).toEqual(['start', 'observation', 'rain', 'irrigation', 'grass', 'surface', 'trees', 'drainage', 'end']);
    expect(busy.find(({ key }) => key === 'trees')?.assumptions.map(({ field }) => field)).toEqual(['treeRoots']);
    const growth = explainZoneDay(stepZoneDay({ depletionMm: 20, rootDepthM: 0.3 }, { ...LAWN, rootDepthM: 0.15 }, DAY));
    expect(growth[1]).toMatchObject({ key: 'root_growth' });
    expect(growth[1]?.depletionMm).toBeCloseTo(-10, 9);
  });

  it('names a dark day and a sprinkle that did nothing', () => {
    const terms = explainZoneDay(stepZoneDay({ depletionMm: 8 }, LAWN, { ...DAY, rainMm: 0.5, et0Mm: 3, shadedEt0Mm: 0 }));
    expect(terms.map(({ key }) => key)).toEqual(['start', 'rain', 'grass', 'end']);
    expect(terms[1]?.numbers).toMatchObject({ rainMm: 0.5, rainLossMm: 0.5 });
  });
});

describe('what is found in the soil', () => {
  const zone = { texture: 'loam' as const, rootDepthM: 0.2, totalAvailableMm: 31, refillLineMm: 12 };

  it('tells a depletion: from full at field capacity to all of the store at the wilting point', () => {
    const { fieldCapacity, wiltingPoint } = soilWater('loam');
    expect(observedDepletionMm({ kind: 'probe', waterContent: fieldCapacity }, zone)).toBe(0);
    expect(observedDepletionMm({ kind: 'probe', waterContent: 0.5 }, zone)).toBe(0);
    expect(observedDepletionMm({ kind: 'probe', waterContent: wiltingPoint }, zone)).toBeCloseTo(31, 9);
    expect(observedDepletionMm({ kind: 'probe', waterContent: 0.01 }, zone)).toBe(31);
    expect(SCREWDRIVER_FEELS.map((feel) => observedDepletionMm({ kind: 'screwdriver', feel }, zone))).toEqual([3, 12, 21.5]);
    expect(observedDepletionMm({ kind: 'depletion', depletionMm: 90 }, zone)).toBe(31);
  });

  it('moves the reckoning by its weight, as a term of its own', () => {
    const closed = stepZoneDay({ depletionMm: 4 }, LAWN, { ...DAY, observation: { kind: 'depletion', depletionMm: 12 } });
    expect(closed.observationMm).toBeCloseTo(5.6, 9);
    expect(closed.depletionEndMm).toBeCloseTo(4 + 5.6 + 4.25, 9);
    expect(closed.assumptions.map(({ field }) => field)).toContain('observation');
    expect(stepZoneDay({ depletionMm: 4 }, LAWN, { ...DAY, observation: { kind: 'depletion', depletionMm: 12, weight: 1 } }).depletionEndMm).toBeCloseTo(16.25, 9);
    expect(stepZoneDay({ depletionMm: 4 }, LAWN, { ...DAY, observation: { kind: 'depletion', depletionMm: 12, weight: 0 } }).observationMm).toBe(0);
    expect(stepZoneDay({ depletionMm: 4 }, LAWN, DAY).observationMm).toBe(0);
  });

  it('leaves the reckoning between what it was and what was found', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 31, noNaN: true }), fc.double({ min: 0, max: 31, noNaN: true }), unit, (reckoned, found, weight) => {
      const { observationMm } = stepZoneDay({ depletionMm: reckoned }, LAWN, { ...DAY, et0Mm: 0, shadedEt0Mm: 0, observation: { kind: 'depletion', depletionMm: found, weight } });
      expect(reckoned + observationMm).toBeGreaterThanOrEqual(Math.min(reckoned, found) - 1e-9);
      expect(reckoned + observationMm).toBeLessThanOrEqual(Math.max(reckoned, found) + 1e-9);
    }));
  });

  it('refuses readings that cannot be', () => {
    for (const [field, observation] of [
      ['observation.waterContent', { kind: 'probe', waterContent: 1.2 }], ['observation.waterContent', { kind: 'probe', waterContent: Number.NaN }],
      ['observation.depletionMm', { kind: 'depletion', depletionMm: -2 }], ['observation.weight', { kind: 'screwdriver', feel: 'easy', weight: 2 }],
    ] as const) expect(() => stepZoneDay({ depletionMm: 4 }, LAWN, { ...DAY, observation })).toThrow(expect.objectContaining({ field }));
  });

  it('reaches the patches of a zone', () => {
    const [demand] = zoneDemand({ zone: LAWN, site: SITE, weather: [WEATHER] });
    if (!demand) throw new Error('one day is given here');
    const run = (observation: ZoneDayInput['observation']) => runZoneWithPatches(LAWN, { depletionMm: 2, patchDepletionMm: { a: 2 } }, ['a'], [{ demand, water: [], stage: null, observation }])[0];
    expect((run({ kind: 'screwdriver', feel: 'hard' })?.patchDepletionMm.a ?? 0) - (run(null)?.patchDepletionMm.a ?? 0)).toBeGreaterThan(5);
  });
});

describe('thin ground', () => {
  const thin: BudgetZone = { ...LAWN, surfaceLayer: true, coverFraction: 0.4 };

  it('leaves an established lawn of full cover as the single coefficient has it', () => {
    for (const coverFraction of [null, FULL_COVER, 1]) {
      expect(stepZoneDay({ depletionMm: 5 }, { ...LAWN, surfaceLayer: true, coverFraction }, { ...DAY, irrigationMm: 10 }))
        .toEqual(stepZoneDay({ depletionMm: 5 }, LAWN, { ...DAY, irrigationMm: 10 }));
    }
  });

  it('evaporates freely after water, then less and less', () => {
    let state: Parameters<typeof stepZoneDay>[0] = { depletionMm: 0, surfaceDepletionMm: 0 };
    const evaporation: number[] = [];
    for (let day = 0; day < 8; day += 1) {
      const closed = stepZoneDay(state, thin, { ...DAY, on: addDays(DAY.on, day) });
      evaporation.push(closed.evaporationMm);
      state = stateAfter(closed);
    }
    const [first = 0] = evaporation;
    const kcb = thinBasalCoefficient(0.8, 0.4);
    expect(first).toBeCloseTo(5 * Math.min(1.2 - kcb, 0.6 * 1.2), 9);
    for (let day = 1; day < 8; day += 1) expect(evaporation[day] ?? 9).toBeLessThanOrEqual((evaporation[day - 1] ?? 0) + 1e-9);
    expect(evaporation[7] ?? 9).toBeLessThan(first / 4);
    const watered = stepZoneDay(state, thin, { ...DAY, on: addDays(DAY.on, 8), irrigationMm: 15 });
    expect(watered.evaporationMm).toBeGreaterThan(first * 0.9);
  });

  it('uses more than a full lawn when wet and less when dry, and its basal part grows with cover', () => {
    const at = (zone: BudgetZone, surfaceDepletionMm: number) => stepZoneDay({ depletionMm: 5, surfaceDepletionMm }, zone, DAY).etcMm;
    expect(at(thin, 0)).toBeGreaterThan(at(LAWN, 0));
    expect(at(thin, 24)).toBeLessThan(at(LAWN, 0));
    for (let cover = 0; cover < 1; cover += 0.05) expect(thinBasalCoefficient(0.8, Math.min(1, cover + 0.05))).toBeGreaterThanOrEqual(thinBasalCoefficient(0.8, cover));
    expect(thinBasalCoefficient(0.8, 1)).toBeCloseTo(0.8, 12);
    expect(thinBasalCoefficient(0.8, 0)).toBeCloseTo(0.15, 12);
    expect(surfaceStore('loam', 0.3)).toEqual(surfaceStore('loam', 0.1));
    expect(surfaceStore('loam', 0.05).tewMm).toBeCloseTo(surfaceStore('loam', 0.1).tewMm / 2, 9);
  });

  it('in dry wind evaporates more than in moist still air', () => {
    const at = (windAtTwoMetresMps: number, rhMinPct: number) => stepZoneDay({ depletionMm: 0, surfaceDepletionMm: 0 }, { ...thin, coverFraction: 0.1 }, { ...DAY, windAtTwoMetresMps, rhMinPct }).etcMm;
    expect(at(5, 20)).toBeGreaterThan(at(1, 70));
  });

  it('carries a sowing through from bare ground to a lawn', () => {
    const days: BudgetDay[] = Array.from({ length: 130 }, (_, index) => ({ weather: { ...WEATHER, on: addDays('2026-09-01', index), tminC: 8, tmaxC: 20, tdewC: 7, solarMjM2: 14 }, irrigationMm: 3 }));
    const run = runBudget({ zone: { ...LAWN, sownOn: '2026-09-01', surfaceLayer: true }, site: SITE, days, start: { depletionMm: 0 } });
    expect(run.flatMap(faultsOf)).toEqual([]);
    expect(run[2]?.evaporationMm ?? 0).toBeGreaterThan((run[2]?.etcMm ?? 9) / 2);
    expect(run[129]).toMatchObject({ evaporationMm: 0, surfaceDepletionMm: null, cropCoefficient: 0.85, stage: 'established' });
  });
});

describe('tree roots', () => {
  it('drink beside the grass, by their share, and are told apart from it', () => {
    const uptake = (share: number) => stepZoneDay({ depletionMm: 5 }, { ...LAWN, treeRoots: { share } }, DAY);
    expect(uptake(0)).toEqual(stepZoneDay({ depletionMm: 5 }, LAWN, DAY));
    expect(uptake(0.4).treeUptakeMm).toBeCloseTo(0.4 * 0.25 * 5, 9);
    expect(uptake(0.4).etcMm).toBeCloseTo(4.25 + 0.5, 9);
    expect(stepZoneDay({ depletionMm: 5 }, { ...LAWN, treeRoots: { share: 1, coefficient: 0.4 } }, DAY).treeUptakeMm).toBeCloseTo(2, 9);
  });

  it('take from shaded ground by the sun on their crowns, so that shade does not make the ground moist for ever', () => {
    const shaded = { ...DAY, shadedEt0Mm: 1.5 };
    const grass = stepZoneDay({ depletionMm: 5 }, LAWN, shaded);
    const both = stepZoneDay({ depletionMm: 5 }, { ...LAWN, treeRoots: { share: 1 } }, shaded);
    expect(both.etcMm - grass.etcMm).toBeCloseTo(1.25, 9);
    expect(() => stepZoneDay({ depletionMm: 5 }, { ...LAWN, treeRoots: { share: 1.2 } }, DAY)).toThrow(expect.objectContaining({ field: 'treeRoots.share' }));
    expect(() => stepZoneDay({ depletionMm: 5 }, { ...LAWN, treeRoots: { share: 1, coefficient: -1 } }, DAY)).toThrow(expect.objectContaining({ field: 'treeRoots.coefficient' }));
  });
});

describe('rest, frost and snow', () => {
  it('use the published coefficients (FAO-56 table 18, chapter 11)', () => {
    expect(FROSTED_COEFFICIENT).toBeGreaterThanOrEqual(0.3);
    expect(FROSTED_COEFFICIENT).toBeLessThanOrEqual(0.4);
    expect(SNOW_ET_MM).toBe(0.4);
    const at = (condition: ZoneDayInput['condition'], zone = LAWN) => stepZoneDay({ depletionMm: 5 }, zone, { ...DAY, condition });
    expect(at('frosted').etcMm).toBeCloseTo(FROSTED_COEFFICIENT * 5, 9);
    expect(at('resting').etcMm).toBeCloseTo(RESTING_COEFFICIENT * 5, 9);
    expect(at('snow').etcMm).toBeCloseTo(0.4, 9);
    expect(at(null, { ...LAWN, resting: true }).condition).toBe('resting');
    expect(at('growing').condition).toBe('growing');
    expect(at('frosted').assumptions.map(({ field }) => field)).toContain('condition');
  });

  it('brown warm grass at the first killing frost until spring, cool grass later, and lie with the snow', () => {
    const days = Array.from({ length: 200 }, (_, index) => {
      // From 15 °C in October through −8 °C in January to 16 °C in May.
      const meanC = 4 + 12 * Math.cos((2 * Math.PI * index) / 200) + (index > 150 ? 3 : 0);
      return { tminC: meanC - 5, tmaxC: meanC + 5, precipitationMm: index % 4 === 0 ? 8 : 0 };
    });
    const warm = winterDays('warm', days);
    const cool = winterDays('cool', days);
    const first = (states: typeof warm) => states.findIndex(({ condition }) => condition !== 'growing');
    expect(first(warm)).toBeGreaterThan(10);
    expect(first(warm)).toBeLessThan(first(cool));
    expect(warm[100]?.condition).toBe('snow');
    expect(warm.every(({ snowMm }) => snowMm >= 0)).toBe(true);
    expect(cool[199]?.condition).toBe('growing');
    expect(winterDays('cool', [{ tminC: null, tmaxC: 3, precipitationMm: 4 }])).toEqual([{ condition: 'growing', isFrosted: false, snowMm: 0 }]);
    // A row that begins in the middle of a winter goes on where the winter was left.
    const cut = 90;
    const before = cool[cut - 1];
    const meansBeforeC = days.slice(0, cut).map(({ tminC, tmaxC }) => (tminC + tmaxC) / 2);
    if (!before) throw new Error('no such day');
    expect(winterDays('cool', days.slice(cut), { ...before, meansBeforeC })).toEqual(cool.slice(cut));
    expect(winterDays('cool', days.slice(cut))).not.toEqual(cool.slice(cut));
    expect(() => winterDays('cool', days, { isFrosted: false, snowMm: -1 })).toThrow(expect.objectContaining({ field: 'start.snowMm' }));
  });

  it('reach the balance through the demand of a zone, winter before rest', () => {
    const weather = Array.from({ length: 20 }, (_, index) => ({ ...WEATHER, on: addDays('2026-12-01', index), tminC: -9, tmaxC: -2, tdewC: -10, solarMjM2: 5, precipitationMm: index < 3 ? 6 : 0 }));
    const zone: BudgetZone = { ...LAWN, winter: true, resting: true };
    const run = runBudget({ zone, site: SITE, start: { depletionMm: 4 }, days: weather.map((day) => ({ weather: day, irrigationMm: 0 })) });
    expect(run[5]).toMatchObject({ condition: 'snow' });
    expect(run[5]?.etcMm).toBeCloseTo(0.4, 9);
    expect(run.flatMap(faultsOf)).toEqual([]);
    const open = runBudget({ zone: { ...LAWN, resting: true }, site: SITE, start: { depletionMm: 4 }, days: weather.map((day) => ({ weather: day, irrigationMm: 0 })) });
    expect(open[5]?.condition).toBe('resting');
  });
});

describe('light through the year in the balance', () => {
  it('takes the place of the hours of sun', () => {
    const [exposure] = yearOfExposure({
      latitudeDeg: 42, longitudeDeg: -71, zones: [{ id: 'a', points: [{ eastM: 0, northM: 0 }] }],
      obstacles: [{ kind: 'building', heightM: 8, footprint: [{ eastM: -30, northM: -20 }, { eastM: 30, northM: -20 }, { eastM: 30, northM: -3 }, { eastM: -30, northM: -3 }] }],
    });
    if (!exposure) throw new Error('one zone is given here');
    const june = zoneDemand({ zone: { ...LAWN, exposure }, site: SITE, weather: [WEATHER] })[0];
    const april = zoneDemand({ zone: { ...LAWN, exposure }, site: SITE, weather: [{ ...WEATHER, on: '2026-04-05' }] })[0];
    expect(june?.shadedEt0Mm ?? 99).toBeLessThan(june?.et0Mm ?? 0);
    expect((april?.shadedEt0Mm ?? 0) / (april?.et0Mm ?? 1)).toBeLessThan((june?.shadedEt0Mm ?? 0) / (june?.et0Mm ?? 1));
    expect(june?.sunHours).toBeCloseTo(exposure.directSunHours[165] ?? 0, 5);
    expect(june?.windAtTwoMetresMps).toBe(2);
    expect(june?.rhMinPct ?? 0).toBeCloseTo(37.1, 0);
  });
});

describe('one store and one clock', () => {
  it('ends a day of the plan where it ends a day of the budget', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 40, noNaN: true }), fc.double({ min: 0, max: 60, noNaN: true }), fc.double({ min: 0, max: 60, noNaN: true }), fc.double({ min: 0, max: 12, noNaN: true }), fc.double({ min: 1, max: 39, noNaN: true }), (depletionMm, irrigationMm, rainMm, demandMm, refillLineMm) => {
      const planned = endOfDayDepletionMm({ depletionMm, irrigationMm, rainMm, demandMm, totalAvailableMm: 40, refillLineMm });
      const { depletionEndMm } = stepRootZoneStore({ depletionStartMm: depletionMm, potentialEtMm: demandMm, effectiveRainMm: rainMm, irrigationMm, totalAvailableMm: 40, readilyAvailableMm: refillLineMm });
      expect(planned).toBe(Math.min(40, depletionEndMm));
    }));
  });

  it('takes evaporation before the roots and never more than there is', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 30, noNaN: true }), fc.double({ min: 0, max: 15, noNaN: true }), fc.double({ min: 0, max: 15, noNaN: true }), fc.double({ min: 0, max: 50, noNaN: true }), (depletionStartMm, potentialEtMm, evaporationMm, irrigationMm) => {
      const step = stepRootZoneStore({ depletionStartMm, potentialEtMm, evaporationMm, effectiveRainMm: 0, irrigationMm, totalAvailableMm: 30, readilyAvailableMm: 12 });
      expect(step.evaporationMm).toBeLessThanOrEqual(evaporationMm);
      expect(step.etcMm).toBeLessThanOrEqual(30 - depletionStartMm + irrigationMm + 1e-9);
      expect(step.depletionEndMm).toBeLessThanOrEqual(30 + 1e-9);
      expect(depletionStartMm + step.etcMm - irrigationMm + step.drainageMm).toBeCloseTo(step.depletionEndMm, 9);
    }));
  });

  it('tells the stage of a sowing by the thermal clock where nobody measured', () => {
    for (const grass of GRASS_IDS) {
      let before = -1;
      for (let day = 0; day <= 366; day += 3) {
        const stage = stageByCalendar(day, grass);
        expect(stage).toBe(stageOn({ sownOn: '2026-04-01', on: addDays('2026-04-01', day), grass, dailySoilTempsC: [] }).stage);
        expect(ESTABLISHMENT_STAGES.indexOf(stage)).toBeGreaterThanOrEqual(before);
        before = ESTABLISHMENT_STAGES.indexOf(stage);
        expect(seededCoverFraction(day, stage)).toBeLessThanOrEqual(1);
      }
      expect(stageByCalendar(5000, grass)).toBe('established');
      expect(stageByCalendar(-5000, grass)).toBe('sown');
    }
  });

  it('still offers the rule of thumb for rain (E02), which the balance does not use', () => {
    expect(effectiveRainByRuleMm(25.4)).toBeCloseTo(0.9 * 25.4, 9);
    expect(stepZoneDay({ depletionMm: 30 }, LAWN, { ...DAY, rainMm: 25.4 }).effectiveRainMm).toBe(25.4);
    const steep = stepZoneDay({ depletionMm: 30 }, { ...LAWN, rainGround: { texture: 'clay', slopePct: 15, compaction: 'hard' } }, { ...DAY, rainMm: 40 });
    expect(steep.runoffMm).toBeGreaterThan(5);
    expect(steep.effectiveRainMm + steep.rainLossMm).toBeCloseTo(40, 9);
    expect(steep.assumptions.map(({ field }) => field)).toContain('hourlyMm');
  });
});
