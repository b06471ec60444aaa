import {
  actualVapourPressureFromExtremesKpa, actualVapourPressureFromMaxHumidityKpa, actualVapourPressureFromMeanHumidityKpa, actualVapourPressureFromPsychrometerKpa,
  atmosphericPressureKpa, blackBodyMjM2, clearSkySimpleMjM2, dailyReferenceEt, hargreavesMm, hourlyReferenceEt, KELVIN_OFFSET, longwaveCloudFactor,
  longwaveHumidityFactor, meanSaturationVapourPressureKpa, MM_PER_MJ_M2, netLongwaveMjM2, netShortwaveMjM2, psychrometricConstantKpaPerC, saturationVapourPressureKpa,
  seasonalTimeCorrectionHours, solarDay, solarFromSunshineMjM2, solarFromTemperatureRangeMjM2, STEFAN_BOLTZMANN_HOUR, vapourPressureSlopeKpaPerC, windAtTwoMetresMps,
  windFactorToTwoMetres, type DailyReferenceEt, type DailyReferenceEtInput, type DailyWeather,
} from '@/scheduling/weather';
import { FAO56, FAO56_TABLES } from '../../fixtures/fao56';
import { disagreements, toleranceOf } from '../../fixtures/published';

const BLANK: DailyWeather = {
  on: '2015-07-06', tminC: null, tmaxC: null, tdewC: null, rhMaxPct: null, rhMinPct: null, rhMeanPct: null, windMps: null, windHeightM: null,
  solarMjM2: null, sunshineHours: null, precipitationMm: null,
};

function found(input: DailyReferenceEtInput): DailyReferenceEt {
  const result = dailyReferenceEt(input);
  if (result.method === null) throw new Error('both temperatures are given here');
  return result;
}

const uccle = () => found({
  site: { latitudeDeg: 50.8, elevationM: 100 },
  weather: { ...BLANK, on: '2015-07-06', tminC: 12.3, tmaxC: 21.5, rhMaxPct: 84, rhMinPct: 63, windMps: 10 / 3.6, windHeightM: 10, sunshineHours: 9.25 },
});
const lyonSite = { latitudeDeg: 45 + 43 / 60, elevationM: 200 };
const lyonWeather: DailyWeather = { ...BLANK, on: '2015-07-15', tminC: 14.8, tmaxC: 26.6 };
const lyon = (windMps: number) => found({ site: lyonSite, weather: { ...lyonWeather, windMps, windHeightM: 2 } });

function dayFigures({ et0Mm, terms }: DailyReferenceEt, tminC: number, tmaxC: number) {
  const denominator = terms.slopeKpaPerC + terms.psychrometricKpaPerC * (1 + 0.34 * terms.windAtTwoMetresMps);
  return {
    tmean: terms.tmeanC, delta: terms.slopeKpaPerC, gamma: terms.psychrometricKpaPerC, windDenominator: 1 + 0.34 * terms.windAtTwoMetresMps,
    radiationWeight: terms.slopeKpaPerC / denominator, windWeight: terms.psychrometricKpaPerC / denominator, windFactor: (900 * terms.windAtTwoMetresMps) / (terms.tmeanC + 273),
    eMax: saturationVapourPressureKpa(tmaxC), eMin: saturationVapourPressureKpa(tminC), es: terms.saturationVapourKpa, ea: terms.actualVapourKpa, deficit: terms.vapourDeficitKpa,
    ra: terms.extraterrestrialMjM2, rs: terms.solarMjM2, rso: terms.clearSkyMjM2, relative: terms.relativeSolar, rns: terms.netShortwaveMjM2,
    blackMax: blackBodyMjM2(tmaxC), blackMin: blackBodyMjM2(tminC), blackMean: (blackBodyMjM2(tmaxC) + blackBodyMjM2(tminC)) / 2,
    humidity: longwaveHumidityFactor(terms.actualVapourKpa), cloud: longwaveCloudFactor(terms.relativeSolar), rnl: terms.netLongwaveMjM2, rn: terms.netRadiationMjM2,
    rnMm: MM_PER_MJ_M2 * terms.netRadiationMjM2, radiationTerm: terms.radiationTermMm, windTerm: terms.windTermMm, et0: et0Mm,
  };
}

function exampleEight() {
  const sun = solarDay(-20, 246);
  return {
    latitude: sun.latitudeRad, dr: sun.inverseDistance, declination: sun.declinationRad, sunset: sun.sunsetAngleRad,
    sinSin: Math.sin(sun.latitudeRad) * Math.sin(sun.declinationRad), cosCos: Math.cos(sun.latitudeRad) * Math.cos(sun.declinationRad),
    ra: sun.extraterrestrialMjM2, raMm: MM_PER_MJ_M2 * sun.extraterrestrialMjM2,
  };
}

function exampleTen() {
  const sun = solarDay(-(22 + 54 / 60), 135);
  const sunshine = 220 / 31;
  const rs = solarFromSunshineMjM2(sunshine, sun.daylightHours, sun.extraterrestrialMjM2);
  return { ra: sun.extraterrestrialMjM2, possible: sun.daylightHours, sunshine, rs, rsMm: MM_PER_MJ_M2 * rs };
}

function exampleFifteen() {
  const sun = solarDay(45.72, 196);
  const rs = solarFromTemperatureRangeMjM2(14.8, 26.6, 0.16, sun.extraterrestrialMjM2, clearSkySimpleMjM2(200, sun.extraterrestrialMjM2));
  return { ra: sun.extraterrestrialMjM2, relative: rs / sun.extraterrestrialMjM2, rs, rsMm: MM_PER_MJ_M2 * rs };
}

function exampleNineteen() {
  const site = { latitudeDeg: 16 + 13 / 60, longitudeDeg: -16.25, standardUtcOffsetMinutes: -60, elevationM: 8 };
  const { et0Mm, terms } = hourlyReferenceEt({
    site, hour: { on: '2015-10-01', midHour: 14.5, temperatureC: 38, rhPct: 52, windMps: 3.3, windHeightM: 2, solarMjM2: 2.45, eveningRelativeSolar: null },
  });
  const sun = solarDay(site.latitudeDeg, 274);
  return {
    delta: terms.slopeKpaPerC, gamma: terms.psychrometricKpaPerC, es: terms.saturationVapourKpa, ea: terms.actualVapourKpa, deficit: terms.vapourDeficitKpa,
    latitude: sun.latitudeRad, dr: sun.inverseDistance, declination: sun.declinationRad, b: (2 * Math.PI * (274 - 81)) / 364, sc: seasonalTimeCorrectionHours(274),
    omega: terms.hourAngleRad, omegaFrom: terms.hourAngleRad - Math.PI / 24, omegaUntil: terms.hourAngleRad + Math.PI / 24, ra: terms.extraterrestrialMjM2, rso: terms.clearSkyMjM2,
    rns: terms.netShortwaveMjM2, black: STEFAN_BOLTZMANN_HOUR * (38 + KELVIN_OFFSET) ** 4, humidity: longwaveHumidityFactor(terms.actualVapourKpa), relative: terms.relativeSolar,
    cloud: longwaveCloudFactor(terms.relativeSolar), rnl: terms.netLongwaveMjM2, rn: terms.netRadiationMjM2, g: terms.soilHeatFluxMjM2,
    radiationTerm: terms.radiationTermMm, windTerm: terms.windTermMm, et0: et0Mm,
  };
}

function exampleEighteen() {
  const result = uccle();
  return {
    ...dayFigures(result, 12.3, 21.5), uAt10: 10 / 3.6, u2: result.terms.windAtTwoMetresMps, pressure: result.terms.pressureKpa, possible: result.terms.daylightHours,
    relativeSunshine: 9.25 / result.terms.daylightHours,
  };
}

function exampleEighteenFromRoundedSteps() {
  const { et0Mm, terms } = found({
    site: { latitudeDeg: 50.8, elevationM: 100 },
    weather: { ...BLANK, tminC: 12.3, tmaxC: 21.5, rhMaxPct: 84, rhMinPct: 63, windMps: 2.78, windHeightM: 10, solarMjM2: 22.07 },
  });
  return {
    u2: terms.windAtTwoMetresMps, delta: terms.slopeKpaPerC, gamma: terms.psychrometricKpaPerC, ea: terms.actualVapourKpa, deficit: terms.vapourDeficitKpa,
    ra: terms.extraterrestrialMjM2, rso: terms.clearSkyMjM2, rnl: terms.netLongwaveMjM2, rn: terms.netRadiationMjM2, et0: et0Mm,
  };
}

const COMPUTED: Record<string, () => Record<string, number>> = {
  A02: () => ({ pressure: atmosphericPressureKpa(1800), gamma: psychrometricConstantKpaPerC(atmosphericPressureKpa(1800)) }),
  A03: () => ({
    eMax: saturationVapourPressureKpa(24.5), eMin: saturationVapourPressureKpa(15), es: meanSaturationVapourPressureKpa(15, 24.5), eOfMean: saturationVapourPressureKpa(19.75),
  }),
  A04: () => ({
    pressure: atmosphericPressureKpa(1200), eWet: saturationVapourPressureKpa(19.5), ea: actualVapourPressureFromPsychrometerKpa(25.6, 19.5, atmosphericPressureKpa(1200), 'aspirated'),
  }),
  A05: () => ({
    eMin: saturationVapourPressureKpa(18), eMax: saturationVapourPressureKpa(25), ea: actualVapourPressureFromExtremesKpa({ tminC: 18, tmaxC: 25, rhMaxPct: 82, rhMinPct: 54 }),
    eaMaxOnly: actualVapourPressureFromMaxHumidityKpa(18, 82), eaMean: actualVapourPressureFromMeanHumidityKpa(18, 25, (82 + 54) / 2),
  }),
  A06: () => ({ deficit: meanSaturationVapourPressureKpa(18, 25) - actualVapourPressureFromExtremesKpa({ tminC: 18, tmaxC: 25, rhMaxPct: 82, rhMinPct: 54 }) }),
  A07: () => ({ bangkok: solarDay(13 + 44 / 60, 1).latitudeRad, rio: solarDay(-(22 + 54 / 60), 1).latitudeRad }),
  A08: exampleEight,
  A09: () => ({ n: solarDay(-20, 246).daylightHours }),
  A10: exampleTen,
  A11: () => {
    const rso = clearSkySimpleMjM2(0, 25.1);
    const relative = 14.5 / rso;
    return {
      rso, blackMax: blackBodyMjM2(25.1), blackMin: blackBodyMjM2(19.1), humidity: longwaveHumidityFactor(2.1), relative, cloud: longwaveCloudFactor(relative),
      rnl: netLongwaveMjM2(19.1, 25.1, 2.1, relative),
    };
  },
  A12: () => ({ rns: netShortwaveMjM2(14.5), rn: netShortwaveMjM2(14.5) - 3.5 }),
  A14: () => ({ factor: windFactorToTwoMetres(10), u2: windAtTwoMetresMps(3.2, 10) }),
  A15: exampleFifteen,
  A52: () => ({ hargreaves: hargreavesMm(28, 38, 35, 38.93715) }),
  A18: exampleEighteen,
  'A18-unrounded': exampleEighteenFromRoundedSteps,
  A19d: exampleNineteen,
  A20: () => ({ ...dayFigures(lyon(2), 14.8, 26.6), et0Wind1: lyon(1).et0Mm, et0Wind3: lyon(3).et0Mm, hargreaves: lyon(2).terms.hargreavesMm }),
};

describe('FAO-56 worked examples', () => {
  it.each(FAO56.cases.map((published) => [published.id, published] as const))('%s comes out as printed', (id, published) => {
    const compute = COMPUTED[id];
    expect(compute).toBeDefined();
    expect(disagreements(published, compute?.() ?? {})).toEqual([]);
  });

  it('leaves no published case out and adds none', () => {
    expect(Object.keys(COMPUTED).sort()).toEqual(FAO56.cases.map(({ id }) => id).sort());
    expect(FAO56.cases.length).toBe(18);
  });
});

describe('FAO-56 look-up tables', () => {
  const functions: Record<string, (x: number) => number> = {
    pressureKpa: atmosphericPressureKpa,
    gamma: (z) => psychrometricConstantKpaPerC(atmosphericPressureKpa(z)),
    saturationKpa: saturationVapourPressureKpa,
    slope: vapourPressureSlopeKpaPerC,
    blackBody: blackBodyMjM2,
    windFactor: windFactorToTwoMetres,
  };
  const { source: _source, readOn: _readOn, ...tables } = FAO56_TABLES;

  it.each(Object.entries(tables))('%s', (name, rows) => {
    const compute = functions[name];
    expect(compute).toBeDefined();
    for (const [x, printed] of rows) {
      expect(Math.abs((compute?.(x) ?? Number.NaN) - Number(printed))).toBeLessThanOrEqual(toleranceOf(printed));
    }
  });
});
