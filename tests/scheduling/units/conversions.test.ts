import fc from 'fast-check';
import * as units from '@/scheduling/units';

const PAIRS: [string, (x: number) => number, (x: number) => number][] = [
  ['mm and inches', units.inchesFromMm, units.mmFromInches],
  ['bore', units.boreInchesFromMm, units.boreMmFromInches],
  ['m and feet', units.feetFromM, units.mFromFeet],
  ['m² and square feet', units.squareFeetFromM2, units.m2FromSquareFeet],
  ['litres and gallons', units.gallonsFromL, units.lFromGallons],
  ['millilitres and fluid ounces', units.fluidOuncesFromMl, units.mlFromFluidOunces],
  ['L/min and gpm', units.gpmFromLpm, units.lpmFromGpm],
  ['Celsius and Fahrenheit', units.fahrenheitFromC, units.cFromFahrenheit],
  ['mm/h and in/h', units.inchesPerHourFromMmPerHour, units.mmPerHourFromInchesPerHour],
  ['m/s and mph', units.mphFromMps, units.mpsFromMph],
  ['kPa and psi', units.psiFromKpa, units.kpaFromPsi],
  ['degrees and radians', units.radFromDeg, units.degFromRad],
];

describe('unit conversions', () => {
  it.each(PAIRS)('%s come back unchanged and keep their order', (_name, there, back) => {
    fc.assert(fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), (x) => {
      expect(back(there(x))).toBeCloseTo(x, 6);
      expect(there(x + 1)).toBeGreaterThan(there(x));
    }));
  });

  it('matches defined values (NIST SP 811)', () => {
    expect(units.mmFromInches(1)).toBe(25.4);
    expect(units.m2FromSquareFeet(1000)).toBeCloseTo(92.90304, 10);
    expect(units.lFromGallons(1)).toBeCloseTo(3.785411784, 12);
    expect(units.fahrenheitFromC(100)).toBe(212);
    expect(units.cFromFahrenheit(-40)).toBe(-40);
    expect(units.mpsFromMph(10)).toBeCloseTo(4.4704, 12);
    expect(units.kpaFromPsi(50)).toBeCloseTo(344.7379, 4);
    expect(units.mlFromFluidOunces(128)).toBeCloseTo(3785.411784, 6);
  });

  it('puts 623 gallons into an inch on 1,000 square feet (H05, exact arithmetic)', () => {
    const litres = units.mmFromInches(1) * units.m2FromSquareFeet(1000);
    expect(units.gallonsFromL(litres)).toBeCloseTo(623.377, 3);
  });
});

describe('physics errors', () => {
  it('names the field and refuses what is no finite number', () => {
    for (const bad of [Number.NaN, Infinity, -Infinity, '3' as unknown as number]) {
      expect(() => units.requireFinite('depthMm', bad)).toThrow(expect.objectContaining({ field: 'depthMm', name: 'PhysicsError' }));
    }
    expect(() => units.requireNonNegative('areaM2', -1)).toThrow('areaM2 must not be negative');
    expect(() => units.requirePositive('areaM2', 0)).toThrow('areaM2 must be above zero');
    expect(() => units.requireRange('rhMaxPct', 130, 0, 100)).toThrow('rhMaxPct must lie between 0 and 100');
    expect(units.requireRange('rhMaxPct', 100, 0, 100)).toBe(100);
  });
});
