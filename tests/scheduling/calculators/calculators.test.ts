import fc from 'fast-check';
import { hoseAndBucketAnswer } from '@/scheduling/calculators/hoseAndBucketAnswer';
import { moveDistanceAnswer } from '@/scheduling/calculators/moveDistanceAnswer';
import { referenceEtAnswer } from '@/scheduling/calculators/referenceEtAnswer';
import { seedbedAnswer } from '@/scheduling/calculators/seedbedAnswer';
import { soilStoreAnswer } from '@/scheduling/calculators/soilStoreAnswer';
import { sunExposureAnswer } from '@/scheduling/calculators/sunExposureAnswer';
import { waterBalanceAnswer } from '@/scheduling/calculators/waterBalanceAnswer';
import { DROP_SIZES } from '@/scheduling/establishment';
import { GRASS_IDS } from '@/scheduling/grass';
import { SOIL_COMPACTIONS, SOIL_TEXTURES } from '@/scheduling/soil';
import { addDays, PhysicsError } from '@/scheduling/units';

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const nothing = { tdewC: null, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: null, windHeightM: null, solarMjM2: null, sunshineHours: null };
const weather = fc.record({ low: number(-20, 30), range: number(0, 20), rain: number(0, 40) }).map(({ low, range, rain }) => ({ ...nothing, tminC: low, tmaxC: low + range, precipitationMm: rain }));

/** Every number of an answer, however deep. */
function numbersOf(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  if (ArrayBuffer.isView(value)) return [...(value as unknown as Iterable<number>)];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersOf) : [];
}

/** No answer holds a number that is not one; what cannot be is refused with the field named and nothing else is thrown. */
function expectSound(answer: () => unknown): void {
  let found: unknown = null;
  try {
    found = answer();
  } catch (error) {
    expect(error).toBeInstanceOf(PhysicsError);
    expect((error as PhysicsError).field).not.toBe('');
  }
  expect(numbersOf(found).filter((each) => !Number.isFinite(each))).toEqual([]);
}

describe('the calculators give numbers or say what cannot be', () => {
  it('reference ET, anywhere and on any day', () => {
    fc.assert(fc.property(number(-90, 90), fc.integer({ min: 0, max: 1460 }), weather, fc.constantFrom('simple', 'physical'), (latitudeDeg, ahead, day, clearSky) => {
      expectSound(() => referenceEtAnswer({ latitudeDeg, elevationM: null, coastal: false, arid: false, clearSky, weather: { ...day, on: addDays('2024-01-01', ahead) } }));
    }));
  });

  it('move distance, for rows of any shape', () => {
    fc.assert(fc.property(fc.array(number(0, 60), { minLength: 3, maxLength: 10 }), number(0.3, 4), number(2, 60), number(2, 60), fc.constantFrom('line', 'square', 'triangle'), fc.constantFrom('full_circle', 'oscillating', 'travelling', 'part_circle'), (rates, spacingM, widthM, lengthM, arrangement, kind) => {
      const row = { distancesM: rates.map((_, index) => 0.5 + index * spacingM), ratesMmPerHour: rates };
      const pattern = kind === 'oscillating' ? { kind, ...row, widthM: 8 } : kind === 'travelling' ? { kind, ...row, speedMPerHour: 9 } : kind === 'part_circle' ? { kind, ...row, fromDeg: -90, toDeg: 45 } : { kind, ...row };
      expectSound(() => moveDistanceAnswer({ pattern, arrangement, zone: { widthM, lengthM }, depthMm: 12, count: 12 }));
    }), { numRuns: 40 });
  });

  it('hose and bucket: the same hose brings the same, and pressures add up', () => {
    fc.assert(fc.property(number(5, 60), number(30, 600), number(1, 90), number(9, 26), (bucketL, seconds, lengthM, boreMm) => {
      expectSound(() => {
        const hose = { lengthM, boreMm };
        const found = hoseAndBucketAnswer({ bucketL, seconds, hose, newHose: hose, tapPressureKpa: null, wettedAreaM2: 100, depthMm: 12 });
        expect(found.newHose?.flowLpm).toBeCloseTo(found.flowLpm, 6);
        expect(found.measured.lossKpa + found.measured.pressureAtSprinklerKpa).toBeCloseTo(found.tapPressureKpa, 9);
        expect(found.rateMmPerHour).toBeCloseTo((found.flowLpm * 60) / 100, 9);
        return found;
      });
    }));
  });

  it('soil store: the runs bring the water, none is longer than the limit', () => {
    fc.assert(fc.property(fc.constantFrom(...SOIL_TEXTURES), fc.constantFrom(...GRASS_IDS), fc.constantFrom(...SOIL_COMPACTIONS), number(0, 40), number(0.5, 80), number(0, 12), (texture, grass, compaction, slopePct, rateMmPerHour, demandMm) => {
      const found = soilStoreAnswer({ texture, grass, rootDepthM: null, slopePct, compaction, demandMm, rateMmPerHour, runTimeMultiplier: 1.2, depletionMm: null });
      expectSound(() => found);
      expect((found.pattern.cycles * found.pattern.minutesPerCycle * rateMmPerHour) / 60).toBeCloseTo(found.depletionMm * 1.2, 6);
      if (found.runLimitMinutes !== null) expect(found.pattern.minutesPerCycle).toBeLessThanOrEqual(Math.max(1, found.runLimitMinutes) + 1e-6);
      expect(found.refillLineMm).toBeLessThan(found.totalAvailableMm);
    }));
  });

  it('water balance: closes over any weather and water', () => {
    fc.assert(fc.property(fc.array(fc.record({ weather, irrigationMm: number(0, 30) }), { minLength: 1, maxLength: 20 }), fc.constantFrom(...SOIL_TEXTURES), (days, texture) => {
      const found = waterBalanceAnswer({
        site: { latitudeDeg: 45, elevationM: 100 }, texture, grass: 'cool_mix', rootDepthM: null, cropCoefficient: null, sunHours: null, ground: { slopePct: 9, compaction: 'firm' }, startOn: '2028-02-20', startDepletionMm: 2, days: days.map((day) => ({ ...day, et0Mm: null })),
      });
      expectSound(() => found);
      const { usedMm, effectiveRainMm, irrigationMm, drainageMm } = found.totals;
      expect(found.endDepletionMm).toBeCloseTo(2 + usedMm - effectiveRainMm - irrigationMm + drainageMm, 6);
    }), { numRuns: 60 });
  });

  it('seedbed: for any bed, doses and weather', () => {
    fc.assert(fc.property(fc.array(weather, { minLength: 1, maxLength: 5 }), fc.constantFrom(...SOIL_TEXTURES), fc.constantFrom(...DROP_SIZES), fc.array(fc.integer({ min: 0, max: 1439 }), { maxLength: 6 }), number(0.3, 8), number(1, 60), number(0, 1), (days, texture, drops, timesMinutes, depthMm, rateMmPerHour, share) => {
      expectSound(() => seedbedAnswer({
        site: { latitudeDeg: -38, elevationM: 50 }, startOn: '2026-03-28', days, solarNoonHour: 12.6, texture, slopePct: 3, mulchCover: share, radiationShare: share, skyView: share, windShare: share,
        doses: { timesMinutes, depthMm, rateMmPerHour, drops }, startDepletionMm: 0, grass: 'cool_mix',
      }));
    }), { numRuns: 60 });
  });

  it('sun exposure: the taller the house to the south, the less sun and demand', () => {
    const behind = (heightM: number) => sunExposureAnswer({
      site: { latitudeDeg: 42, elevationM: 100 }, longitudeDeg: -88, outline: [{ eastM: 0, northM: 0 }, { eastM: 10, northM: 0 }, { eastM: 10, northM: 8 }, { eastM: 0, northM: 8 }],
      obstacles: [{ kind: 'building', heightM, footprint: [{ eastM: -5, northM: -14 }, { eastM: 15, northM: -14 }, { eastM: 15, northM: -2 }, { eastM: -5, northM: -2 }] }],
      temperatures: { warmest: { tminC: 18, tmaxC: 29 }, coldest: { tminC: -8, tmaxC: 1 } },
    }).months;
    const [low, high] = [behind(2), behind(9)];
    expectSound(() => ({ low, high }));
    high.forEach((month, index) => {
      expect(month.directSunHours).toBeLessThanOrEqual((low[index]?.directSunHours ?? 0) + 1e-6);
      expect(month.radiationShare).toBeLessThanOrEqual((low[index]?.radiationShare ?? 0) + 1e-6);
      expect(month.shadedEt0Mm ?? 9).toBeLessThanOrEqual((low[index]?.shadedEt0Mm ?? 0) + 1e-6);
    });
    expect(high[11]?.directSunHours).toBeLessThan(2);
  });
});
