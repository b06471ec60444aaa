import fc from 'fast-check';
import {
  dayWord, formatArea, formatCivilDay, formatClock, formatDepth, formatFlow, formatLength, formatMinutes, formatNumber, formatRange, formatRate, formatSpeed,
  formatTemperature, formatVolume, fromShown, toShown, unitLabel, type DisplayUnits, type Quantity,
} from '@/shared/display';
import { fieldText, parseClock, parseNumber, parseQuantity } from '@/shared/parseQuantity';

describe('quantities in the units of the yard', () => {
  it('carry their unit and no more figures than a hose can keep', () => {
    expect(formatDepth(12.192, 'us')).toBe('0.48 in');
    expect(formatDepth(12.192, 'metric')).toBe('12 mm');
    expect(formatDepth(4, 'metric')).toBe('4 mm');
    expect(formatDepth(1.5, 'metric')).toBe('1.5 mm');
    expect(formatRate(13.97, 'us')).toBe('0.55 in/h');
    expect(formatFlow(15.9, 'us')).toBe('4.2 gpm');
    expect(formatFlow(18.93, 'us')).toBe('5.0 gpm');
    expect(formatArea(464.5, 'us')).toBe('5,000 sq ft');
    expect(formatArea(464.5, 'metric')).toBe('465 m²');
    expect(formatLength(7.92, 'us')).toBe('26 ft');
    expect(formatLength(7.92, 'metric')).toBe('7.9 m');
    expect(formatVolume(2359.7, 'us')).toBe('623 gal');
    expect(formatVolume(2359.7, 'metric')).toBe('2,360 L');
    expect(formatTemperature(9, 'us')).toBe('48 °F');
    expect(formatTemperature(-3, 'metric')).toBe('−3 °C');
    expect(formatSpeed(5, 'us')).toBe('11 mph');
  });

  it('never show a negative nothing, and a dash for what is no number', () => {
    expect(formatNumber(-0.001, 2)).toBe('0.00');
    expect(formatTemperature(-0.2, 'metric')).toBe('0 °C');
    expect(formatDepth(Number.NaN, 'us')).toBe('– in');
    expect(formatMinutes(Number.POSITIVE_INFINITY)).toBe('–');
    expect(formatNumber(1234567.5, 1)).toBe('1,234,567.5');
  });

  it('show a range with one unit, or one value when both ends read the same', () => {
    expect(formatRange('rate', 11.4, 16.8, 'us')).toBe('0.45 to 0.66 in/h');
    expect(formatRange('rate', 14.01, 14.02, 'metric')).toBe('14 mm/h');
  });

  it('go there and back', () => {
    const quantities: Quantity[] = ['depth', 'rate', 'flow', 'area', 'length', 'volume', 'temperature', 'speed', 'bore'];
    fc.assert(fc.property(fc.constantFrom(...quantities), fc.constantFrom<DisplayUnits>('us', 'metric'), fc.double({ min: -50, max: 5000, noNaN: true }), (quantity, units, value) => {
      expect(fromShown(quantity, toShown(quantity, value, units), units)).toBeCloseTo(value, 6);
    }));
  });
});

describe('time in words', () => {
  it('names lengths of time', () => {
    expect([0, 46, 59.6, 60, 70, 125, 600].map(formatMinutes)).toEqual(['0 min', '46 min', '1 h', '1 h', '1 h 10 min', '2 h 5 min', '10 h']);
  });

  it('names times of day both ways', () => {
    expect([0, 350, 720, 725, 1070, 1440].map((minutes) => formatClock(minutes, 'us'))).toEqual(['12:00 am', '5:50 am', '12:00 pm', '12:05 pm', '5:50 pm', '12:00 am']);
    expect([0, 350, 1070].map((minutes) => formatClock(minutes, 'metric'))).toEqual(['0:00', '5:50', '17:50']);
  });

  it('names days', () => {
    expect(formatCivilDay('2026-06-13')).toBe('Saturday 13 June');
    expect(formatCivilDay('2026-06-13', 'short')).toBe('Sat 13 Jun');
    expect(formatCivilDay('2026-06-13', 'weekday')).toBe('Saturday');
    expect(formatCivilDay('2026-06-13', 'dated')).toBe('13 June 2026');
    expect(['2026-06-12', '2026-06-13', '2026-06-14', '2026-06-19', '2026-06-20'].map((on) => dayWord(on, '2026-06-13')))
      .toEqual(['yesterday', 'today', 'tomorrow', 'Friday', 'Saturday 20 June']);
    expect(dayWord('2026-06-14', null)).toBe('Sunday 14 June');
  });
});

describe('numbers as people type them', () => {
  it.each<[string, number | null]>([
    ['0.48', 0.48], ['0,48', 0.48], ['.5', 0.5], [',5', 0.5], ['5.', 5], [' 12 ', 12], ['1,200', 1200], ['1 200', 1200], ['12,500.5', 12500.5], ['1.200,5', 1200.5],
    ['1,234,567', 1234567], ['0,125', 0.125], ['1,25', 1.25], ['3/8', 0.375], ['1 1/2', 1.5], ['-4', -4], ['−4', -4], ['+3', 3],
    ['', null], ['abc', null], ['1/0', null], ['1,2,3', null], ['1.2.3', null], ['12e5', null], ['Infinity', null], ['--3', null], ['5 in', null], ['12,34.5', null],
  ])('reads %j as %p', (text, value) => {
    expect(parseNumber(text)).toBe(value);
  });

  it('reads back what a field shows, within its figures', () => {
    fc.assert(fc.property(fc.constantFrom<Quantity>('depth', 'area', 'flow', 'length', 'temperature'), fc.constantFrom<DisplayUnits>('us', 'metric'), fc.double({ min: 0.01, max: 5000, noNaN: true }), (quantity, units, value) => {
      const back = parseQuantity(quantity, fieldText(quantity, value, units), units);
      expect(back).not.toBeNull();
      expect(Math.abs(toShown(quantity, back ?? 0, units) - toShown(quantity, value, units))).toBeLessThanOrEqual(Math.abs(toShown(quantity, value, units)) * 6e-4);
    }));
  });

  it('takes the unit of the yard behind the number, and no other', () => {
    expect(parseQuantity('depth', '0.5 in', 'us')).toBeCloseTo(12.7, 9);
    expect(parseQuantity('depth', '1/2 in', 'us')).toBeCloseTo(12.7, 9);
    expect(parseQuantity('depth', '12 mm', 'us')).toBeNull();
    expect(parseQuantity('area', '5,000 SQ FT', 'us')).toBeCloseTo(464.5, 1);
    expect(unitLabel('flow', 'metric')).toBe('L/min');
    expect(fieldText('depth', null, 'us')).toBe('');
  });

  it.each<[string, number | null]>([
    ['5:50 am', 350], ['5.50', 350], ['17:50', 1070], ['6pm', 1080], ['12 am', 0], ['12:30 pm', 750], ['1730', 1050], ['730', 450], ['24:00', 1440], ['0:00', 0], ['6 p.m.', 1080],
    ['25:00', null], ['13 pm', null], ['5:75', null], ['', null], ['noon', null], ['24:01', null], ['0 am', null],
  ])('reads the time %j as %p', (text, minutes) => {
    expect(parseClock(text)).toBe(minutes);
  });
});
