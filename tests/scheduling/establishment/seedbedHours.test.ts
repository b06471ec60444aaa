import fc from 'fast-check';
import { dosesByHour, keepMoist, MOST_DEW_MM_PER_NIGHT, seedbedForecast, seedbedHours, washingLimitMmPerHour, DROP_SIZES, type SeedbedWeather } from '@/scheduling/establishment';
import { addDays } from '@/scheduling/units';
import { CLEAR_SKY, dailyReferenceEt, shadedReferenceEtMm, type DailyWeather } from '@/scheduling/weather';
import { unknownWeather } from '@/scheduling/weather/continuousDays';
import { seattleWeather } from '../../fixtures/vegaWeather';

const site = { latitudeDeg: 45, elevationM: 100 };
const day = (change: Partial<DailyWeather> = {}): DailyWeather => ({ ...unknownWeather('2026-06-13'), tminC: 12, tmaxC: 27, tdewC: 10, windMps: 2, windHeightM: 2, solarMjM2: 26, precipitationMm: 0, ...change });
const tenDays = (change: Partial<DailyWeather> = {}): DailyWeather[] => Array.from({ length: 10 }, (_, index) => day({ ...change, on: addDays('2026-06-13', index) }));
const total = (values: number[]) => values.reduce((sum, each) => sum + each, 0);

describe('the hours above a seedbed', () => {
  it('add up to the reference ET of the day, in the open and in the shade', () => {
    fc.assert(fc.property(fc.double({ min: -60, max: 60, noNaN: true }), fc.integer({ min: 0, max: 364 }), fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }), (latitudeDeg, ahead, radiationShare, skyView) => {
      const weather = day({ on: addDays('2026-01-01', ahead), solarMjM2: null });
      const { hours, et0MmByDay } = seedbedHours({ site: { latitudeDeg, elevationM: 100 }, days: [weather], radiationShare, skyView });
      const open = dailyReferenceEt({ site: { latitudeDeg, elevationM: 100 }, weather, clearSky: CLEAR_SKY });
      const wanted = open.method === null ? Number.NaN : shadedReferenceEtMm(open, { radiationShare, skyView });
      expect(total(hours.map((hour) => hour.et0Mm))).toBeCloseTo(wanted, 9);
      expect(et0MmByDay[0]).toBeCloseTo(wanted, 9);
      hours.forEach((hour) => expect(Math.min(hour.et0Mm, hour.dewMm, hour.rainMm)).toBeGreaterThanOrEqual(0));
    }));
  });

  it('draw most in the early afternoon, hardly by night, and follow the clock of the place', () => {
    const { hours } = seedbedHours({ site, days: [day()] });
    const most = hours.findIndex((hour) => hour.et0Mm === Math.max(...hours.map((each) => each.et0Mm)));
    expect(most).toBeGreaterThanOrEqual(12);
    expect(most).toBeLessThanOrEqual(14);
    expect(total(hours.slice(0, 4).map((hour) => hour.et0Mm))).toBeLessThan(0.1 * total(hours.map((hour) => hour.et0Mm)));
    const late = seedbedHours({ site, days: [day()], solarNoonHour: 13 }).hours;
    expect(late[most + 1]?.et0Mm).toBeCloseTo(hours[most]?.et0Mm ?? 0, 9);
  });

  it('leave dew on a clear moist night, none on a dry one, less under trees, and never more than a night can', () => {
    const dew = (weather: Partial<SeedbedWeather> & { days: DailyWeather[] }) => total(seedbedHours({ site, ...weather }).hours.map((hour) => hour.dewMm));
    const moist = dew({ days: [day({ tdewC: 12 })] });
    expect(moist).toBeGreaterThan(0.02);
    expect(moist).toBeLessThanOrEqual(MOST_DEW_MM_PER_NIGHT);
    expect(dew({ days: [day({ tdewC: -5, windMps: 5 })] })).toBe(0);
    expect(dew({ days: [day({ tdewC: 12 })], skyView: 0.4, radiationShare: 0.5 })).toBeLessThan(moist);
  });

  it('keep rain, by the hour where it is known and in the night where it is not', () => {
    const byDay = seedbedHours({ site, days: [day({ precipitationMm: 9 })] });
    expect(total(byDay.hours.map((hour) => hour.rainMm))).toBeCloseTo(9, 9);
    expect(byDay.hours[12]?.rainMm).toBe(0);
    expect(byDay.assumptions.map((each) => each.field)).toContain('precipitationMm');
    const shower = Array.from({ length: 24 }, (_, hour) => (hour === 15 ? 9 : 0));
    expect(seedbedHours({ site, days: [day({ precipitationMm: 9 })], hourlyRainMm: [shower] }).hours[15]?.rainMm).toBe(9);
  });

  it('draw less behind a wind break', () => {
    const days = [day({ windMps: 5 })];
    expect(seedbedHours({ site, days, windShare: 0.3 }).et0MmByDay[0]).toBeLessThan((seedbedHours({ site, days }).et0MmByDay[0] ?? 0) - 0.3);
  });

  it('run through a recorded year without a gap or a number that is not one (vega-datasets, Seattle)', () => {
    const year = seattleWeather().slice(0, 366);
    const { hours } = seedbedHours({ site: { latitudeDeg: 47.45, elevationM: 130, coastal: true }, days: year });
    expect(hours).toHaveLength(366 * 24);
    expect(total(hours.map((hour) => hour.rainMm))).toBeCloseTo(total(year.map((each) => each.precipitationMm ?? 0)), 6);
    expect(hours.every((hour) => Number.isFinite(hour.et0Mm) && Number.isFinite(hour.dewMm) && hour.et0Mm >= 0 && hour.dewMm >= 0)).toBe(true);
  });

  it.each<[string, Partial<SeedbedWeather>]>([
    ['skyView', { skyView: 1.2 }], ['windShare', { windShare: -0.1 }], ['radiationShare', { radiationShare: Number.NaN }], ['days', { days: [] }],
    ['days', { days: [unknownWeather('2026-06-13')] }], ['tminC', { days: [day({ tminC: 30 })] }], ['hourlyRainMm[0]', { hourlyRainMm: [[1, 2]] }],
  ])('refuse impossible %s', (field, change) => {
    expect(() => seedbedHours({ site, days: [day()], ...change })).toThrow(expect.objectContaining({ field }));
  });
});

describe('doses in the hours of a forecast', () => {
  it('keep their water and go on into the next hour when they are slow', () => {
    const doses = dosesByHour([[{ atMinutes: 8 * 60 + 30, depthMm: 6 }], [{ atMinutes: 0, depthMm: 1 }]], 4);
    expect(doses).toEqual([
      { hour: 8, depthMm: 2, rateMmPerHour: 4 }, { hour: 9, depthMm: 4, rateMmPerHour: 4 }, { hour: 24, depthMm: 1, rateMmPerHour: 4 },
    ]);
    expect(dosesByHour([[{ atMinutes: 23 * 60 + 30, depthMm: 6 }]], 4)).toHaveLength(1);
  });
});

describe('a seedbed under real weather', () => {
  const bed = (change: Partial<Parameters<typeof seedbedForecast>[0]> = {}, weather: DailyWeather[] = tenDays()) => ({
    hours: seedbedHours({ site, days: weather }).hours, doses: [], fieldCapacity: 0.25, wiltingPoint: 0.1, intakeMmPerHour: 15, ...change,
  });

  it('needs about the doses that the trade names: two to four light ones on a drying day (Purdue, Maryland)', () => {
    const { added, isKept, forecast } = keepMoist(bed(), { depthMm: 1.6, rateMmPerHour: 12 });
    expect(isKept).toBe(true);
    expect(forecast.dryHours).toBe(0);
    const perDay = added.length / 10;
    expect(perDay).toBeGreaterThanOrEqual(2);
    expect(perDay).toBeLessThanOrEqual(4);
  });

  it('needs fewer doses under straw, in shade, and on a dull day', () => {
    const count = (input: Parameters<typeof seedbedForecast>[0]) => keepMoist(input, { depthMm: 1.6, rateMmPerHour: 12 }).added.length;
    const open = count(bed());
    expect(count(bed({ mulchCover: 0.75 }))).toBeLessThan(open);
    expect(count({ ...bed(), hours: seedbedHours({ site, days: tenDays(), radiationShare: 0.4, skyView: 0.6 }).hours })).toBeLessThan(open);
    expect(count(bed({}, tenDays({ tmaxC: 18, solarMjM2: 10 })))).toBeLessThan(open);
  });

  it('says when it cannot be kept moist, and gives no dose to a bed that is moist', () => {
    expect(keepMoist(bed(), { depthMm: 0.2, rateMmPerHour: 12 }, 1).isKept).toBe(false);
    expect(keepMoist(bed({}, tenDays({ tmaxC: 14, solarMjM2: 3, tdewC: 11, precipitationMm: 8 })), { depthMm: 1.6, rateMmPerHour: 12 }).added).toEqual([]);
  });

  it('never gives more doses a day than allowed, and never one too many', () => {
    fc.assert(fc.property(fc.double({ min: 0.5, max: 5, noNaN: true }), fc.integer({ min: 1, max: 8 }), (depthMm, mostADay) => {
      const { added, forecast, isKept } = keepMoist(bed(), { depthMm, rateMmPerHour: 12 }, mostADay);
      for (let index = 0; index < 10; index += 1) {
        expect(added.filter((each) => Math.floor(each.hour / 24) === index).length).toBeLessThanOrEqual(mostADay);
      }
      expect(isKept).toBe(forecast.dryHours === 0);
      (isKept ? added : []).forEach((one) => {
        const without = seedbedForecast(bed({ doses: added.filter((each) => each !== one) }));
        expect(without.dryHours).toBeGreaterThan(forecast.dryHours);
      });
    }), { numRuns: 15 });
  });
});

describe('the limit at which seed washes', () => {
  it('is the intake for fine drops and under a full cover, less for harder drops on bare ground', () => {
    let before = Infinity;
    for (const drops of DROP_SIZES) {
      const bare = washingLimitMmPerHour({ intakeMmPerHour: 20, drops, mulchCover: 0 });
      expect(bare).toBeLessThan(before);
      before = bare;
      expect(washingLimitMmPerHour({ intakeMmPerHour: 20, drops, mulchCover: 1 })).toBeCloseTo(20, 9);
      expect(washingLimitMmPerHour({ intakeMmPerHour: 20, drops, mulchCover: 0.5 })).toBeGreaterThanOrEqual(bare);
    }
    expect(washingLimitMmPerHour({ intakeMmPerHour: 20, drops: 'fine', mulchCover: 0 })).toBe(20);
  });

  it('names drops where the ground would take the water but a hard stream moves the seed', () => {
    const hours = Array.from({ length: 3 }, () => ({ et0Mm: 0.1, rainMm: 0, dewMm: 0, isDaylight: true }));
    const given = (drops: 'fine' | 'stream', mulchCover = 0) => seedbedForecast({
      hours, doses: [{ hour: 1, depthMm: 2, rateMmPerHour: 10, drops }], fieldCapacity: 0.25, wiltingPoint: 0.1, intakeMmPerHour: 15, mulchCover,
    }).washing;
    expect(given('fine')).toEqual([]);
    expect(given('stream')).toEqual([{ hour: 1, because: 'drops' }]);
    expect(given('stream', 0.9)).toEqual([]);
  });
});
