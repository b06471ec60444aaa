import type { CupTestCalculatorResponse, DoesItFitResponse, RunLengthResponse } from '@/shared/contracts/catchTests';
import { call, gridTestRequest } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

const { wind: _wind, ...cups } = gridTestRequest;
const post = (path: string, body: object) => call(test, null, 'post', `/calculators/${path}`, body);

describe('a catch-cup test without an account', () => {
  it('tells rate, evenness and minutes', async () => {
    const response = await post('cup-test', { ...cups, wantedDepthsMm: [12.5] });
    expect(response.status).toBe(200);
    const { result, minutesFor } = response.body as CupTestCalculatorResponse;
    // 200 mm in 16 cups in an hour; lowest four 10, 10, 11, 11; lowest eight 10, 10, 11, 11 and 12 four times
    expect(result?.rateMmPerHour).toBeCloseTo(12.5, 9);
    expect(result?.lowQuarterUniformity).toBeCloseTo(10.5 / 12.5, 9);
    expect(result?.runTimeMultiplier).toBeCloseTo(12.5 / 11.25, 9);
    expect(minutesFor[0]?.minutes).toBeCloseTo(60, 9);
    expect(minutesFor[0]?.evenedMinutes).toBeCloseTo(60 * 12.5 / 11.25, 9);
  });

  it('takes millilitres: the auditors\' worksheet gives 3.66 × mL ÷ (minutes × square inches) in inches an hour', async () => {
    // Worksheet formula as quoted from the irrigation auditors' guide: 20 mL in 30 min in a cup of 3.5 in across.
    const mouthDiameterMm = 3.5 * 25.4;
    const squareInches = Math.PI * 3.5 ** 2 / 4;
    const response = await post('cup-test', { layout: { kind: 'grid', rows: 2, columns: 3, spacingM: 2 }, reading: { kind: 'volume', mouthDiameterMm }, minutes: 30, readings: [20, 20, 20, 20, 20, 20] });
    const inchesPerHour = ((response.body as CupTestCalculatorResponse).result?.rateMmPerHour ?? 0) / 25.4;
    // 3.66 is rounded from 3.6614
    expect(inchesPerHour / (3.66 * 20 / (30 * squareInches))).toBeCloseTo(1, 3);
  });

  it.each<[string, object, string]>([
    ['a cup three metres wide', { reading: { kind: 'volume', mouthDiameterMm: 3000 } }, 'reading.mouthDiameterMm'],
    ['a negative run', { minutes: -5 }, 'minutes'],
    ['a run of no length', { minutes: 0 }, 'minutes'],
    ['a negative reading', { readings: cups.readings.map((depth, index) => (index === 3 ? -1 : depth)) }, 'readings.3'],
    ['ten thousand cups', { readings: Array.from({ length: 10_000 }, () => 1) }, 'readings'],
    ['a count that is not the grid\'s', { readings: [1, 2, 3] }, 'readings'],
    ['no reading at all', { readings: cups.readings.map(() => null) }, 'readings'],
    ['cups with no water at all', { readings: cups.readings.map(() => 0) }, 'readings'],
    ['one cup', { readings: cups.readings.map((depth, index) => (index === 0 ? depth : null)) }, 'readings'],
    ['more water than a cup is high', { reading: { kind: 'volume', mouthDiameterMm: 50 }, readings: cups.readings.map(() => 5_000) }, 'readings.0'],
    ['a layout of another kind', { layout: { kind: 'circle' } }, 'layout.kind'],
    ['words for numbers', { minutes: 'long' }, 'minutes'],
  ])('refuses %s', async (_what, change, field) => {
    const response = await post('cup-test', { ...cups, ...change });
    expect(response.status).toBe(400);
    expect(response.body).toMatchObject({ error: { code: 'invalid_input' } });
    expect((response.body as { error: { fields: { path: string }[] } }).error.fields.map((each) => each.path)).toContain(field);
  });
});

describe('the length of a test', () => {
  it('follows from flow and area', async () => {
    const { rateSource, expectedRateMmPerHour, minutes, readableDepthMm } = (await post('run-length', { flowLpm: 15, wettedAreaM2: 100, reading: { kind: 'depth' } })).body as RunLengthResponse;
    expect(rateSource).toBe('flow_and_area');
    expect(expectedRateMmPerHour).toBeCloseTo(9, 9);
    expect(minutes).toBe(Math.ceil(readableDepthMm / 9 * 60));
  });

  it('is shorter with a scale than with a ruler', async () => {
    const ruler = (await post('run-length', { rateMmPerHour: 4.3, reading: { kind: 'depth' } })).body as RunLengthResponse;
    const scale = (await post('run-length', { rateMmPerHour: 4.3, reading: { kind: 'weight', mouthDiameterMm: 80 } })).body as RunLengthResponse;
    expect(ruler.rateSource).toBe('given');
    expect(scale.minutes).toBeLessThan(ruler.minutes);
  });

  it('rests on a default when nothing is known, and says so', async () => {
    expect((await post('run-length', { reading: { kind: 'depth' } })).body).toMatchObject({ rateSource: 'default', expectedRateMmPerHour: 4.3 });
  });

  it('wants flow and area together', async () => {
    expect((await post('run-length', { flowLpm: 15, reading: { kind: 'depth' } })).body).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: 'wettedAreaM2' }] } });
  });
});

describe('does it fit?', () => {
  it('takes 10.4 h for an inch on 5,000 sq ft at 5 gpm (arithmetic of the trade)', async () => {
    const fit = (await post('does-it-fit', { areaM2: 464.5152, depthMmPerWeek: 25.4, flowLpm: 18.92705892, hoursPerWeek: 9 })).body as DoesItFitResponse;
    expect(fit.waterHours).toBeCloseTo(10.39, 2);
    expect(fit.fits).toBe(false);
    expect(fit.affordableDepthMm).toBeCloseTo(25.4 * 9 / fit.waterHours, 6);
  });

  it.each([{ areaM2: 0 }, { areaM2: -3 }, { hoursPerWeek: 169 }, { flowLpm: 0 }, { depthMmPerWeek: 1e9 }, { movesPerWeek: 1.5 }])('refuses %p', async (change) => {
    const response = await post('does-it-fit', { areaM2: 100, depthMmPerWeek: 25, flowLpm: 15, hoursPerWeek: 10, ...change });
    expect(response.status).toBe(400);
    expect(response.body).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: Object.keys(change)[0] }] } });
  });
});
