import fc from 'fast-check';
import { addDays, mpsFromMph, PhysicsError } from '@/scheduling/units';
import { clearSkyPhysicalMjM2, clearSkySimpleMjM2, dailyEt0Row, dailyReferenceEt, dailyReferenceEts, shadedReferenceEtMm, solarDay, type DailyReferenceEt, type DailyReferenceEtInput, type DailyWeather } from '@/scheduling/weather';
import { toleranceOf } from '../../fixtures/published';
import { TOLERANCES } from '../../fixtures/tolerances';
import { FALLON_2015 } from '../../fixtures/refetFallon2015';
import { RECORD_SITES, recordedWeather, seattleWeather } from '../../fixtures/vegaWeather';

const BLANK: DailyWeather = {
  on: '2015-07-15', tminC: null, tmaxC: null, tdewC: null, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: null, windHeightM: null,
  solarMjM2: null, sunshineHours: null, precipitationMm: null,
};
const LYON = { latitudeDeg: 45 + 43 / 60, elevationM: 200 };
const FULL: DailyWeather = { ...BLANK, tminC: 14.8, tmaxC: 26.6, tdewC: 13, rhMaxPct: 90, rhMinPct: 45, rhMeanPct: 65, windMps: 2, windHeightM: 2, solarMjM2: 22, sunshineHours: 9 };

function found(input: DailyReferenceEtInput): DailyReferenceEt {
  const result = dailyReferenceEt(input);
  if (result.method === null) throw new Error('both temperatures are given here');
  return result;
}
const assumedFields = (weather: DailyWeather, site: DailyReferenceEtInput['site'] = LYON) => found({ site, weather }).assumptions.map(({ field }) => field);

describe('reference ET against an independent program (B-F1)', () => {
  const weatherOf = (day: (typeof FALLON_2015.days)[number], windMps: number = day.windMps): DailyWeather => ({
    ...BLANK, on: day.on, tminC: day.tminC, tmaxC: day.tmaxC, tdewC: day.tdewC, solarMjM2: day.solarMjM2, windMps, windHeightM: FALLON_2015.windHeightM,
  });
  const { site, july, julyClearSky } = FALLON_2015;
  const [julyDay, octoberDay] = FALLON_2015.days;

  it.each(FALLON_2015.days)('agrees on $on with the physical clear sky', (day) => {
    const { et0Mm } = found({ site, weather: weatherOf(day), clearSky: 'physical' });
    expect(Math.abs(et0Mm - Number(day.et0Short))).toBeLessThanOrEqual(toleranceOf(day.et0Short));
  });

  it('agrees on the steps of July 1', () => {
    const { terms } = found({ site, weather: weatherOf(julyDay, mpsFromMph(july.windMph)), clearSky: 'physical' });
    // Temperatures are converted from Fahrenheit there and rounded here: two parts in ten thousand.
    const near = (value: number, printed: string, relative: number = TOLERANCES.convertedInputsRelative) => expect(Math.abs(value / Number(printed) - 1)).toBeLessThan(relative);
    near(terms.actualVapourKpa, july.ea);
    near(terms.saturationVapourKpa, july.es);
    near(terms.slopeKpaPerC, july.delta);
    near(terms.pressureKpa, july.pressure);
    near(terms.windAtTwoMetresMps, july.u2);
    const sun = solarDay(site.latitudeDeg, julyDay.day);
    // That program prints a sunset angle that goes with its own Ra of 41.676, nine seconds later than acos(−tan φ tan δ) of its own δ.
    near(sun.sunsetAngleRad, july.sunset, TOLERANCES.otherSunConstantsRelative);
    near(sun.declinationRad, july.declination);
    expect(clearSkyPhysicalMjM2(sun, julyDay.day, terms.pressureKpa, terms.actualVapourKpa)).toBeCloseTo(julyClearSky.physical, 2);
    expect(clearSkySimpleMjM2(site.elevationM, sun.extraterrestrialMjM2)).toBeCloseTo(julyClearSky.simple, 2);
  });

  it('shows how much the simple clear sky overstates in low sun', () => {
    expect(found({ site, weather: weatherOf(octoberDay), clearSky: 'simple' }).et0Mm).toBeCloseTo(FALLON_2015.octoberWithSimple, 2);
  });
});

describe('missing data, in the published order of preference', () => {
  it('assumes nothing where everything is measured', () => {
    expect(assumedFields(FULL)).toEqual([]);
  });

  it('falls from dew point to humidity extremes to the highest to the mean to the lowest temperature', () => {
    const ea = (weather: DailyWeather) => found({ site: LYON, weather }).terms.actualVapourKpa;
    expect(ea(FULL)).toBeCloseTo(0.6108 * Math.exp((17.27 * 13) / (13 + 237.3)), 10);
    const noDew = { ...FULL, tdewC: null };
    expect(assumedFields(noDew)).toEqual([]);
    const maxOnly = { ...noDew, rhMinPct: null };
    expect(assumedFields(maxOnly)).toEqual(['rhMinPct']);
    const meanOnly = { ...maxOnly, rhMaxPct: null };
    expect(assumedFields(meanOnly)).toEqual(['rhMaxPct']);
    const none = { ...meanOnly, rhMeanPct: null };
    expect(assumedFields(none)).toEqual(['tdewC']);
    expect(ea(none)).toBeCloseTo(1.684, 3);
    expect(found({ site: { ...LYON, arid: true }, weather: none }).terms.actualVapourKpa).toBeLessThan(ea(none));
    expect(new Set([FULL, noDew, maxOnly, meanOnly, none].map(ea)).size).toBe(5);
  });

  it('falls from measured radiation to sunshine hours to the temperature range', () => {
    expect(assumedFields({ ...FULL, solarMjM2: null })).toEqual(['solarMjM2']);
    const fromRange = { ...FULL, solarMjM2: null, sunshineHours: null };
    expect(found({ site: LYON, weather: fromRange }).radiationMjM2).toBeCloseTo(22.29, 1);
    const coast = found({ site: { ...LYON, coastal: true }, weather: fromRange });
    expect(coast.radiationMjM2).toBeGreaterThan(22.29);
    expect(coast.assumptions.map(({ method }) => method).join()).toContain('coast');
  });

  it('takes the best of what is at hand in every combination of what is known, and names each estimate once', () => {
    // The published order, best first; an entry names what must be known and what is then assumed.
    const humidity: { known: (keyof DailyWeather)[]; assumed: string[] }[] = [
      { known: ['tdewC'], assumed: [] }, { known: ['rhMaxPct', 'rhMinPct'], assumed: [] }, { known: ['rhMaxPct'], assumed: ['rhMinPct'] },
      { known: ['rhMeanPct'], assumed: ['rhMaxPct'] }, { known: [], assumed: ['tdewC'] },
    ];
    const sun: typeof humidity = [{ known: ['solarMjM2'], assumed: [] }, { known: ['sunshineHours'], assumed: ['solarMjM2'] }, { known: [], assumed: ['solarMjM2'] }];
    const wind: typeof humidity = [{ known: ['windMps', 'windHeightM'], assumed: [] }, { known: ['windMps'], assumed: ['windHeightM'] }, { known: [], assumed: ['windMps'] }];
    const fields = ['tdewC', 'rhMaxPct', 'rhMinPct', 'rhMeanPct', 'solarMjM2', 'sunshineHours', 'windMps', 'windHeightM'] as const;
    const best = (order: typeof humidity, weather: DailyWeather) => order.find(({ known }) => known.every((field) => weather[field] !== null))?.assumed ?? [];
    let combinations = 0;
    for (let bits = 0; bits < 2 ** fields.length; bits += 1) {
      const weather: DailyWeather = { ...FULL };
      fields.forEach((field, index) => { if ((bits >> index) % 2 === 1) weather[field] = null; });
      const onlyTemperatures = weather.tdewC === null && weather.rhMaxPct === null && weather.rhMeanPct === null && weather.windMps === null && weather.solarMjM2 === null && weather.sunshineHours === null;
      const expected = [...(onlyTemperatures ? ['et0Mm'] : []), ...best(humidity, weather), ...best(wind, weather), ...best(sun, weather)];
      expect(assumedFields(weather).sort()).toEqual(expected.sort());
      combinations += 1;
    }
    expect(combinations).toBe(256);
  });

  it('takes 2 m/s of wind where none is known and never less than 0.5 m/s', () => {
    expect(found({ site: LYON, weather: { ...FULL, windMps: null } }).terms.windAtTwoMetresMps).toBe(2);
    expect(found({ site: LYON, weather: { ...FULL, windMps: 0.1 } }).terms.windAtTwoMetresMps).toBe(0.5);
    expect(assumedFields({ ...FULL, windMps: 0.1 })).toEqual(['windMps']);
    expect(assumedFields({ ...FULL, windHeightM: null })).toEqual(['windHeightM']);
  });

  it('turns to Hargreaves as the last resort, and to the estimated Penman–Monteith when asked (A20)', () => {
    const weather = { ...BLANK, tminC: 14.8, tmaxC: 26.6 };
    const last = found({ site: LYON, weather });
    expect(last.method).toBe('hargreaves');
    expect(last.et0Mm).toBeCloseTo(5, 1);
    expect(last.assumptions[0]?.source).toContain('Hargreaves');
    const estimated = found({ site: LYON, weather, temperatureOnly: 'penman-monteith' });
    expect(estimated.method).toBe('penman-monteith');
    expect(estimated.et0Mm).toBeCloseTo(4.56, 2);
    expect(estimated.assumptions.map(({ field }) => field).sort()).toEqual(['solarMjM2', 'tdewC', 'windMps']);
  });

  it('gives a typed null without an extreme of temperature', () => {
    expect(dailyReferenceEt({ site: LYON, weather: { ...FULL, tminC: null } })).toEqual({ et0Mm: null, method: null, radiationMjM2: null, missing: ['tminC'], assumptions: [], terms: null });
    expect(dailyReferenceEt({ site: LYON, weather: BLANK })).toMatchObject({ et0Mm: null, missing: ['tminC', 'tmaxC'] });
  });
});

describe('impossible weather', () => {
  it.each([
    ['tminC', { tminC: 30 }], ['tdewC', { tdewC: 30 }], ['rhMaxPct', { rhMaxPct: 130 }], ['rhMinPct', { rhMinPct: 95 }], ['rhMeanPct', { rhMeanPct: -1 }],
    ['windMps', { windMps: -2 }], ['windHeightM', { windHeightM: 0 }], ['solarMjM2', { solarMjM2: Number.NaN }], ['sunshineHours', { sunshineHours: 25 }],
    ['precipitationMm', { precipitationMm: -1 }], ['tmaxC', { tmaxC: Infinity }],
  ] as const)('names %s', (field, change) => {
    expect(() => dailyReferenceEt({ site: LYON, weather: { ...FULL, ...change } })).toThrow(expect.objectContaining({ name: 'PhysicsError', field }));
  });

  it('names an unreal day and a place off the globe', () => {
    expect(() => dailyReferenceEt({ site: LYON, weather: { ...FULL, on: '2015-02-30' } })).toThrow(expect.objectContaining({ field: 'on' }));
    expect(() => dailyReferenceEt({ site: { ...LYON, latitudeDeg: 91 }, weather: FULL })).toThrow(expect.objectContaining({ field: 'latitudeDeg' }));
    expect(() => dailyReferenceEt({ site: { ...LYON, elevationM: Number.NaN }, weather: FULL })).toThrow(PhysicsError);
  });
});

const anyWeather = fc.record({
  dayNumber: fc.integer({ min: 0, max: 364 }), tminC: fc.double({ min: -40, max: 35, noNaN: true }), range: fc.double({ min: 0, max: 25, noNaN: true }),
  windMps: fc.option(fc.double({ min: 0, max: 30, noNaN: true })), rhMeanPct: fc.option(fc.double({ min: 0, max: 100, noNaN: true })),
  sunshine: fc.option(fc.double({ min: 0, max: 24, noNaN: true })),
}).map(({ dayNumber, tminC, range, windMps, rhMeanPct, sunshine }): DailyWeather => ({
  ...BLANK, on: addDays('2015-01-01', dayNumber), tminC, tmaxC: tminC + range, windMps, windHeightM: 10, rhMeanPct, sunshineHours: sunshine,
}));
const anySite = fc.record({ latitudeDeg: fc.double({ min: -90, max: 90, noNaN: true }), elevationM: fc.double({ min: -400, max: 5000, noNaN: true }) });

describe('properties of reference ET', () => {
  it('is finite and never negative from pole to pole, with either clear sky', () => {
    fc.assert(fc.property(anySite, anyWeather, fc.constantFrom('simple' as const, 'physical' as const), (site, weather, clearSky) => {
      const { et0Mm, radiationMjM2, terms } = found({ site, weather, clearSky });
      expect(et0Mm).toBeGreaterThanOrEqual(0);
      expect(et0Mm).toBeLessThan(150);
      expect(radiationMjM2).toBeGreaterThanOrEqual(0);
      expect(Object.values(terms).every((value) => Number.isFinite(value))).toBe(true);
    }));
  });

  it('grows with radiation and with dryness of the air', () => {
    fc.assert(fc.property(fc.double({ min: 2, max: 25, noNaN: true }), fc.double({ min: 0.1, max: 4, noNaN: true }), fc.double({ min: 0, max: 12, noNaN: true }), (solarMjM2, more, tdewC) => {
      const at = (change: Partial<DailyWeather>) => found({ site: LYON, weather: { ...FULL, tdewC, solarMjM2, ...change } }).et0Mm;
      expect(at({ solarMjM2: solarMjM2 + more })).toBeGreaterThan(at({}));
      expect(at({ tdewC: tdewC - more })).toBeGreaterThan(at({ tdewC }) - 1e-9);
    }));
  });

  it('is the same in both hemispheres half a year apart, but for the distance of the sun', () => {
    const north = found({ site: { latitudeDeg: 40, elevationM: 0 }, weather: { ...FULL, on: '2015-06-21' } });
    const south = found({ site: { latitudeDeg: -40, elevationM: 0 }, weather: { ...FULL, on: '2015-12-21' } });
    expect(Math.abs(north.terms.daylightHours - south.terms.daylightHours)).toBeLessThan(0.05);
    expect(south.terms.extraterrestrialMjM2 / north.terms.extraterrestrialMjM2).toBeCloseTo(1.033 / 0.967, 1);
  });

  it('knows polar day and polar night', () => {
    const tromsoe = { latitudeDeg: 69.65, elevationM: 10 };
    const night = found({ site: tromsoe, weather: { ...FULL, on: '2015-12-21', tminC: -8, tmaxC: -2, tdewC: -9, solarMjM2: null, sunshineHours: null } });
    expect(night.terms.daylightHours).toBe(0);
    expect(night.radiationMjM2).toBe(0);
    expect(night.et0Mm).toBeGreaterThanOrEqual(0);
    expect(night.assumptions.map(({ field }) => field)).toContain('relativeSolar');
    expect(found({ site: tromsoe, weather: { ...FULL, on: '2015-06-21' } }).terms.daylightHours).toBe(24);
  });
});

describe('rows of days', () => {
  it('hold what each day alone gives, bare or with its terms', () => {
    const weather = [...recordedWeather('Seattle').slice(0, 400), { ...FULL, tminC: null }, FULL];
    const site = RECORD_SITES.Seattle;
    for (const choices of [{}, { clearSky: 'physical' as const }, { temperatureOnly: 'penman-monteith' as const }]) {
      const alone = weather.map((day) => dailyReferenceEt({ site, weather: day, ...choices }));
      expect(dailyReferenceEts(site, weather, choices)).toEqual(alone);
      const row = dailyEt0Row(site, weather, choices);
      expect([...row.et0Mm]).toEqual(alone.map(({ et0Mm }) => et0Mm ?? 0));
      expect(row.missing).toEqual([400]);
    }
    expect(() => dailyEt0Row(site, [{ ...FULL, rhMaxPct: 130 }])).toThrow(expect.objectContaining({ field: 'rhMaxPct' }));
    expect(() => dailyReferenceEts({ ...site, latitudeDeg: Number.NaN }, [])).toThrow(expect.objectContaining({ field: 'latitudeDeg' }));
  });
});

describe('reference ET in the shade', () => {
  it('is untouched in the open and falls with the light', () => {
    const open = found({ site: LYON, weather: FULL });
    expect(shadedReferenceEtMm(open, { radiationShare: 1, skyView: 1 })).toBe(open.et0Mm);
    fc.assert(fc.property(fc.double({ min: 0, max: 0.99, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }), (share, skyView) => {
      const shaded = shadedReferenceEtMm(open, { radiationShare: share, skyView });
      expect(shaded).toBeGreaterThanOrEqual(0);
      expect(shaded).toBeLessThanOrEqual(open.et0Mm);
      expect(shadedReferenceEtMm(open, { radiationShare: share + 0.01, skyView })).toBeGreaterThanOrEqual(shaded);
    }));
  });

  it('keeps the drying power of the air: halving the light does not halve the demand', () => {
    const open = found({ site: LYON, weather: FULL });
    const half = shadedReferenceEtMm(open, { radiationShare: 0.5, skyView: 1 });
    expect(half).toBeGreaterThan(open.terms.windTermMm);
    // The term of the radiation falls by its own share of Rns, by hand: 0.408 Δ · 0.5 Rns / (Δ + γ(1 + 0.34 u2)).
    const { slopeKpaPerC, psychrometricKpaPerC, windAtTwoMetresMps, netShortwaveMjM2 } = open.terms;
    const lost = (0.408 * slopeKpaPerC * 0.5 * netShortwaveMjM2) / (slopeKpaPerC + psychrometricKpaPerC * (1 + 0.34 * windAtTwoMetresMps));
    expect(open.et0Mm - half).toBeCloseTo(lost, 10);
  });

  it('shades a Hargreaves day by the ratio of the two equations', () => {
    const open = found({ site: LYON, weather: { ...BLANK, tminC: 14.8, tmaxC: 26.6 } });
    const shaded = shadedReferenceEtMm(open, { radiationShare: 0.4, skyView: 0.7 });
    expect(shaded).toBeGreaterThan(0);
    expect(shaded).toBeLessThan(open.et0Mm);
  });
});

describe('whole recorded years', () => {
  it.each(['Seattle', 'New York'] as const)('%s 2012-2015 has no gap and no negative day', (city) => {
    const weather = recordedWeather(city);
    expect(weather.length).toBe(1461);
    const yearly: Record<string, number> = {};
    weather.forEach((day, index) => {
      expect(day.on).toBe(addDays('2012-01-01', index));
      const { et0Mm, method } = found({ site: RECORD_SITES[city], weather: day });
      expect(method).toBe('penman-monteith');
      expect(et0Mm).toBeGreaterThanOrEqual(0);
      expect(et0Mm).toBeLessThan(12);
      const year = day.on.slice(0, 4);
      yearly[year] = (yearly[year] ?? 0) + et0Mm;
    });
    // Yearly reference ET of humid temperate places lies between 500 and 1,500 mm (common knowledge of climate atlases, from memory).
    for (const sum of Object.values(yearly)) {
      expect(sum).toBeGreaterThan(500);
      expect(sum).toBeLessThan(1500);
    }
  });

  it('the single-city file holds the same days', () => {
    const pick = ({ on, tminC, tmaxC, precipitationMm }: DailyWeather) => ({ on, tminC, tmaxC, precipitationMm });
    expect(seattleWeather().map(pick)).toEqual(recordedWeather('Seattle').map(pick));
  });
});
