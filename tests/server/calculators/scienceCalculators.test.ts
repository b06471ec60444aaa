import type {
  HoseAndBucketResponse, MoveDistanceResponse, ReferenceEtResponse, SeedbedResponse, SoilStoreResponse, SunExposureResponse, WaterBalanceResponse,
} from '@/shared/contracts/calculators';
import { hoseAndBucketBody, moveDistanceBody, referenceEtBody, seedbedBody, soilStoreBody, sunExposureBody, waterBalanceBody } from '../../factories/calculators';
import { call } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

const post = (path: string, body: object) => call(test, null, 'post', `/calculators/${path}`, body);
async function answer<T>(path: string, body: object): Promise<T> {
  const response = await post(path, body);
  expect([path, response.status, response.status === 200 ? '' : response.text]).toEqual([path, 200, '']);
  return response.body as T;
}
/** Every number of an answer, however deep; a NaN leaves JSON as null, which the contracts do not take. */
function numbersOf(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersOf) : [];
}

describe('reference ET', () => {
  it('is that of FAO-56 example 18 with its intermediate values', async () => {
    // The printed example takes the simple clear sky.
    const found = await answer<ReferenceEtResponse>('reference-et', { ...referenceEtBody, clearSky: 'simple' });
    // Unrounded figures of the example as quoted from a public test suite (A18).
    expect(found.et0Mm).toBeCloseTo(3.880142, 3);
    expect(found.terms.windAtTwoMetresMps).toBeCloseTo(2.079304, 2);
    expect(found.terms.actualVapourKpa).toBeCloseTo(1.408624, 5);
    expect(found.terms.extraterrestrialMjM2).toBeCloseTo(41.08838, 3);
    expect(found.terms.netRadiationMjM2 / 13.28266).toBeCloseTo(1, 4);
    expect(found.byHourMm.reduce((sum, each) => sum + each, 0)).toBeCloseTo(found.et0Mm, 9);
    expect(found.method).toBe('penman-monteith');
  });

  it('says what it assumed where little is known: example 20 gives 4.6 with 2 m/s, Hargreaves 5.0 (FAO-56)', async () => {
    const little = { latitudeDeg: 45.72, elevationM: 200, on: '2026-07-15', tminC: 14.8, tmaxC: 26.6, clearSky: 'simple' };
    const found = await answer<ReferenceEtResponse>('reference-et', little);
    expect(found.method).toBe('hargreaves');
    expect(found.et0Mm).toBeCloseTo(5.0, 1);
    expect(found.terms.penmanMonteithMm).toBeCloseTo(4.56, 1);
    expect(found.assumptions.map((each) => each.field)).toEqual(expect.arrayContaining(['et0Mm', 'tdewC', 'solarMjM2', 'windMps']));
    expect((await answer<ReferenceEtResponse>('reference-et', { ...little, elevationM: null })).assumptions[0]?.field).toBe('elevationM');
  });

  it('bears the poles and a leap day', async () => {
    for (const latitudeDeg of [-90, 90, 66.6, 0]) {
      const found = await answer<ReferenceEtResponse>('reference-et', { latitudeDeg, on: '2028-02-29', tminC: -5, tmaxC: 3 });
      expect(numbersOf(found).every(Number.isFinite)).toBe(true);
    }
  });
});

describe('move distance', () => {
  it('answers with evenness, alternate sets and a zone', async () => {
    const found = await answer<MoveDistanceResponse>('move-distance', moveDistanceBody);
    expect(found.bestM / (2 * found.reachXM)).toBeGreaterThan(0.35);
    expect(found.bestM / (2 * found.reachXM)).toBeLessThan(0.65);
    expect(found.best.lowQuarterUniformity).toBeGreaterThan(found.edgeToEdge.lowQuarterUniformity);
    expect(found.best.runTimeMultiplier).toBeCloseTo(1 / found.best.lowHalfUniformity, 9);
    expect(found.best.lowQuarterMultiplier ?? 0).toBeGreaterThanOrEqual(found.best.runTimeMultiplier);
    expect(found.inZone?.best.wastedShare).toBeGreaterThan(0);
    expect(found.inZone?.best.positions.length).toBeGreaterThan(1);
    expect(found.cell.ratesMmPerHour).toHaveLength(found.cell.columns * found.cell.rows);
    expect(found.options).toHaveLength(40);
  });

  it.each(['part_circle', 'oscillating', 'travelling', 'grid'] as const)('takes the pattern %s', async (kind) => {
    const row = { distancesM: [0.5, 2, 4, 6, 7.5], ratesMmPerHour: [15, 12, 8, 4, 1] };
    const patterns = {
      part_circle: { kind, ...row, fromDeg: -90, toDeg: 90 }, oscillating: { kind, ...row, widthM: 9 }, travelling: { kind, ...row, speedMPerHour: 9 },
      grid: { kind, rates: [[1, 2, 1], [2, 8, 2], [1, 2, 1]], spacingM: 2, sprinkler: { column: 1, row: 1 } },
    };
    const found = await answer<MoveDistanceResponse>('move-distance', { ...moveDistanceBody, pattern: patterns[kind] });
    expect(found.best.lowQuarterUniformity).toBeGreaterThan(0);
    expect(found.best.setMinutes === null).toBe(kind === 'travelling');
    expect(numbersOf(found).every(Number.isFinite)).toBe(true);
  });
});

describe('hose and bucket', () => {
  it('is 5 gpm, 4.7 psi lost in 50 ft of 5/8 in hose (H02, computed from the formula), and less through twice the length', async () => {
    const found = await answer<HoseAndBucketResponse>('hose-and-bucket', hoseAndBucketBody);
    expect(found.flowLpm).toBeCloseTo(18.92705892, 6);
    expect(found.measured.lossKpa / 6.894757293168361).toBeCloseTo(4.7, 1);
    expect(found.newHose?.flowLpm).toBeLessThan(found.flowLpm);
    expect(found.newHose?.changePct).toBeLessThan(0);
    // 96.25 × 5 gpm ÷ 1,500 sq ft = 0.32 in/h (C05).
    expect((found.rateMmPerHour ?? 0) / 25.4).toBeCloseTo(0.3208, 3);
    expect(found.newSetMinutes ?? 0).toBeGreaterThan(found.setMinutes ?? Infinity);
    expect(found.assumptions.map((each) => each.field)).toContain('tapPressureKpa');
  });

  it('falls with length and rises with bore, whatever hose is asked for', async () => {
    const { byHose } = await answer<HoseAndBucketResponse>('hose-and-bucket', hoseAndBucketBody);
    for (const one of byHose) {
      for (const other of byHose) {
        if (one.boreMm === other.boreMm && one.lengthM < other.lengthM) expect(one.flowLpm).toBeGreaterThan(other.flowLpm);
        if (one.lengthM === other.lengthM && one.boreMm < other.boreMm) expect(one.flowLpm).toBeLessThan(other.flowLpm);
      }
    }
  });
});

describe('soil store and run limit', () => {
  it('tells store, refill line and cycles for a clay slope', async () => {
    const found = await answer<SoilStoreResponse>('soil-store-and-run-limit', soilStoreBody);
    // 0.15 m of clay holding 160 mm/m (FAO-56 table 19, middle of 0.12 to 0.20).
    expect(found.totalAvailableMm).toBeCloseTo(24, 6);
    expect(found.depletionMm).toBeCloseTo(found.refillLineMm, 9);
    expect(found.runLimitMinutes).toBeGreaterThan(0);
    expect(found.pattern.cycles).toBe(Math.ceil(found.fillMinutes / (found.runLimitMinutes ?? 1) - 1e-9));
    expect(found.steadyIntakeMmPerHour).toBeCloseTo(0.12 * 25.4 * 0.8, 6);
    expect(found.rootDepthIsDefault).toBe(true);
    expect(found.pondingMinutes ?? Infinity).toBeLessThan(found.runLimitMinutes ?? 0);
    const trodden = await answer<SoilStoreResponse>('soil-store-and-run-limit', { ...soilStoreBody, compaction: 'hard' });
    expect(trodden.pattern.cycles).toBeGreaterThanOrEqual(found.pattern.cycles);
    expect(trodden.steadyIntakeMmPerHour).toBeLessThan(found.steadyIntakeMmPerHour);
  });

  it('has no limit where the ground takes it for ever', async () => {
    expect(await answer<SoilStoreResponse>('soil-store-and-run-limit', { ...soilStoreBody, texture: 'sand', rateMmPerHour: 4 })).toMatchObject({ runLimitMinutes: null, pattern: { cycles: 1 } });
  });
});

describe('sun exposure', () => {
  it('tells hours, light and ET through the months', async () => {
    const found = await answer<SunExposureResponse>('sun-exposure', sunExposureBody);
    expect(found.months.map((month) => month.month)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12]);
    const [january, july] = [found.months[0], found.months[6]];
    expect(july?.directSunHours).toBeGreaterThan(january?.directSunHours ?? Infinity);
    // Hours of day at 45° north: 9.0 in mid-January and 15.2 in mid-July (almanac, to a quarter of an hour).
    expect(january?.openSunHours).toBeCloseTo(9.1, 0);
    expect(july?.openSunHours).toBeCloseTo(15.2, 0);
    found.months.forEach((month) => {
      expect(month.directSunHours).toBeLessThanOrEqual(month.openSunHours + 0.01);
      expect(month.radiationShare).toBeGreaterThan(0);
      expect(month.radiationShare).toBeLessThan(1);
      expect(month.shadedEt0Mm ?? Infinity).toBeLessThanOrEqual(month.et0Mm ?? 0);
      expect(month.beamByHour).toHaveLength(24);
    });
  });

  it('is open without obstacles, in both hemispheres, and half a year apart', async () => {
    const open = (latitudeDeg: number) => answer<SunExposureResponse>('sun-exposure', { ...sunExposureBody, latitudeDeg, obstacles: [], temperatures: null });
    const [north, south] = [await open(40), await open(-40)];
    north.months.forEach((month, index) => {
      expect(month.radiationShare).toBeCloseTo(1, 2);
      expect(month.directSunHours).toBeCloseTo(month.openSunHours, 1);
      expect(month.et0Mm).toBeNull();
      expect(Math.abs(month.openSunHours - (south.months[(index + 6) % 12]?.openSunHours ?? 0))).toBeLessThan(0.3);
    });
  });
});

describe('water balance', () => {
  it('closes, day by day and over all days', async () => {
    const found = await answer<WaterBalanceResponse>('water-balance', waterBalanceBody);
    expect(found.days).toHaveLength(3);
    found.days.forEach((day) => {
      expect(day.depletionEndMm).toBeCloseTo(day.depletionStartMm + day.etcMm - day.effectiveRainMm - day.irrigationMm + day.drainageMm, 6);
    });
    const { usedMm, effectiveRainMm, irrigationMm, drainageMm } = found.totals;
    expect(found.endDepletionMm).toBeCloseTo(found.startDepletionMm + usedMm - effectiveRainMm - irrigationMm + drainageMm, 6);
  });

  it('says when the zone is due, by weather too', async () => {
    const dry = Array.from({ length: 20 }, () => ({ tminC: 16, tmaxC: 33, precipitationMm: 0 }));
    const found = await answer<WaterBalanceResponse>('water-balance', { ...waterBalanceBody, days: dry });
    expect(found.dueOn).not.toBeNull();
    const due = found.days.find((day) => day.on === found.dueOn);
    expect(due?.depletionEndMm).toBeGreaterThanOrEqual(due?.refillLineMm ?? Infinity);
    const shaded = await answer<WaterBalanceResponse>('water-balance', { ...waterBalanceBody, sunHours: 3, days: dry });
    expect(shaded.totals.usedMm).toBeLessThan(found.totals.usedMm);
  });
});

describe('seedbed', () => {
  it('goes by the hour, loses no water, and names the doses that keep it moist', async () => {
    const found = await answer<SeedbedResponse>('seedbed', seedbedBody);
    expect(found.hours).toHaveLength(72);
    const sum = (pick: (hour: SeedbedResponse['hours'][number]) => number) => found.hours.reduce((total, hour) => total + pick(hour), 0);
    const came = sum((hour) => hour.rainMm + hour.dewMm) + found.doses.reduce((total, dose) => total + dose.depthMm, 0);
    expect(found.hours.at(-1)?.depletionMm).toBeCloseTo(sum((hour) => hour.evaporationMm + hour.drainageMm + hour.runoffMm) - came, 6);
    expect(found.et0MmByDay).toHaveLength(3);
    expect(found.kept.isKept).toBe(true);
    expect(found.emergence?.firstUpOn.likely ?? '').toMatch(/^2026-06-/);
    expect(found.emergence?.assumed).not.toBeNull();
  });

  it('warns of a hard stream, and of a rate beyond the intake', async () => {
    const doses = { ...seedbedBody.doses, rateMmPerHour: 6, drops: 'stream' as const };
    const hard = await answer<SeedbedResponse>('seedbed', { ...seedbedBody, doses });
    expect(hard.washing.every((each) => each.because === 'drops')).toBe(true);
    expect(hard.washing.length).toBeGreaterThan(0);
    const fast = await answer<SeedbedResponse>('seedbed', { ...seedbedBody, doses: { ...doses, rateMmPerHour: 60, drops: 'fine' } });
    expect(fast.washing.some((each) => each.because === 'intake')).toBe(true);
  });
});

describe('what cannot be', () => {
  const day = { tminC: 10, tmaxC: 20 };
  const row = { kind: 'full_circle', distancesM: [1, 2, 3], ratesMmPerHour: [5, 4, 1] };
  it.each<[string, object, string]>([
    ['reference-et', { ...referenceEtBody, tminC: 25 }, 'tminC'],
    ['reference-et', { ...referenceEtBody, rhMaxPct: 130 }, 'rhMaxPct'],
    ['reference-et', { ...referenceEtBody, rhMinPct: 90 }, 'rhMinPct'],
    ['reference-et', { ...referenceEtBody, tdewC: 30 }, 'tdewC'],
    ['reference-et', { ...referenceEtBody, latitudeDeg: 91 }, 'latitudeDeg'],
    ['reference-et', { ...referenceEtBody, tmaxC: null }, 'tmaxC'],
    ['reference-et', { ...referenceEtBody, on: '2026-02-30' }, 'on'],
    ['reference-et', { ...referenceEtBody, windMps: -1 }, 'windMps'],
    ['reference-et', { ...referenceEtBody, tmaxC: Number.NaN }, 'tmaxC'],
    ['reference-et', { ...referenceEtBody, solarMjM2: Number.POSITIVE_INFINITY, tminC: 'cold' }, 'tminC'],
    ['move-distance', { pattern: { ...row, ratesMmPerHour: [0, 0, 0] } }, 'pattern.ratesMmPerHour'],
    ['move-distance', { pattern: { kind: 'full_circle', distancesM: [1], ratesMmPerHour: [5] } }, 'pattern.distancesM'],
    ['move-distance', { pattern: { ...row, distancesM: [1, 1, 3] } }, 'pattern.distancesM.1'],
    ['move-distance', { pattern: { ...row, ratesMmPerHour: [5, -4, 1] } }, 'pattern.ratesMmPerHour.1'],
    ['move-distance', { pattern: { kind: 'grid', rates: [[5]], spacingM: 1, sprinkler: { column: 0, row: 0 } } }, 'pattern.rates'],
    ['move-distance', { pattern: row, zone: { widthM: -5, lengthM: 5 } }, 'zone.widthM'],
    ['move-distance', { pattern: row, zone: { widthM: 500, lengthM: 500 } }, 'fromM'],
    ['move-distance', { pattern: row, fromM: 5, toM: 2 }, 'toM'],
    ['hose-and-bucket', { ...hoseAndBucketBody, seconds: 0 }, 'seconds'],
    ['hose-and-bucket', { ...hoseAndBucketBody, hose: { lengthM: 15, boreMm: 0 } }, 'hose.boreMm'],
    ['hose-and-bucket', { ...hoseAndBucketBody, bucketL: 400, seconds: 60 }, 'measuredLpm'],
    ['soil-store-and-run-limit', { ...soilStoreBody, rateMmPerHour: 0 }, 'rateMmPerHour'],
    ['soil-store-and-run-limit', { ...soilStoreBody, depletionMm: 300 }, 'depletionMm'],
    ['soil-store-and-run-limit', { ...soilStoreBody, texture: 'cheese' }, 'texture'],
    ['water-balance', { ...waterBalanceBody, days: [{ tminC: 20, tmaxC: 10 }] }, 'days.0.tminC'],
    ['water-balance', { ...waterBalanceBody, days: [{}] }, 'days.0.et0Mm'],
    ['water-balance', { ...waterBalanceBody, startDepletionMm: 399 }, 'startDepletionMm'],
    ['water-balance', { ...waterBalanceBody, days: [] }, 'days'],
    ['sun-exposure', { ...sunExposureBody, obstacles: [{ kind: 'tree', at: { eastM: 0, northM: 0 }, crownBaseM: 2, topM: -8, crownRadiusM: 3, leaves: 'evergreen' }] }, 'obstacles.0.topM'],
    ['sun-exposure', { ...sunExposureBody, obstacles: [{ kind: 'tree', at: { eastM: 0, northM: 0 }, crownBaseM: 9, topM: 8, crownRadiusM: 3, leaves: 'evergreen' }] }, 'obstacles.0.crownBaseM'],
    ['sun-exposure', { ...sunExposureBody, obstacles: [{ kind: 'fence', line: [{ eastM: 0, northM: 0 }], heightM: 2 }] }, 'obstacles.0.line'],
    ['sun-exposure', { ...sunExposureBody, outline: [] }, 'outline'],
    ['sun-exposure', { ...sunExposureBody, temperatures: { warmest: { tminC: 30, tmaxC: 20 }, coldest: { tminC: 0, tmaxC: 5 } } }, 'temperatures.warmest.tminC'],
    ['seedbed', { ...seedbedBody, days: [{ ...day, rhMaxPct: 130 }] }, 'days.0.rhMaxPct'],
    ['seedbed', { ...seedbedBody, days: [{}] }, 'days.0.tminC'],
    ['seedbed', { ...seedbedBody, mulchCover: 1.4 }, 'mulchCover'],
    ['seedbed', { ...seedbedBody, startDepletionMm: 49 }, 'startDepletionMm'],
  ])('is refused by %s with the field named: %j', async (path, body, field) => {
    const response = await post(path, body);
    expect(response.status).toBe(400);
    const { error } = response.body as { error: { code: string; message: string; fields: { path: string; message: string }[] } };
    expect(error.code).toBe('invalid_input');
    expect(error.fields.map((each) => each.path)).toContain(field);
    error.fields.forEach((each) => expect(each.message).toMatch(/^[A-Z].{5,}/));
  });
});

it('every calculator is described with its request and its answer', async () => {
  const description = (await call(test, null, 'get', '/openapi.json')).body as { paths: Record<string, { post?: { tags: string[]; requestBody?: object; responses: Record<string, object> } }> };
  for (const name of ['reference-et', 'cup-test', 'move-distance', 'hose-and-bucket', 'soil-store-and-run-limit', 'sun-exposure', 'water-balance', 'seedbed']) {
    const route = description.paths[`/api/calculators/${name}`]?.post;
    expect([name, route?.tags, route?.requestBody !== undefined, route?.responses['200'] !== undefined]).toEqual([name, ['Calculators'], true, true]);
  }
});
