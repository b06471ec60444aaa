import {
  cFromFahrenheit, fahrenheitFromC, feetFromM, gallonsFromL, gpmFromLpm, inchesFromMm, inchesPerHourFromMmPerHour, lFromGallons, lpmFromGpm, m2FromSquareFeet,
  kpaFromPsi, mFromFeet, mmFromInches, mmPerHourFromInchesPerHour, mphFromMps, mpsFromMph, psiFromKpa, squareFeetFromM2,
} from '@/scheduling/units/conversions';
import { civilDayParts, daysBetween, weekdayOf } from '@/scheduling/units/civilDay';

/** How a yard shows its quantities: US customary or metric. Everything inside is SI. */
export type DisplayUnits = 'us' | 'metric';

/** What is shown with a unit. The SI unit behind each: depth mm, rate mm/h, flow L/min, area m², length m, volume L, temperature °C, speed m/s, bore mm, pressure kPa. */
export type Quantity = 'depth' | 'rate' | 'flow' | 'area' | 'length' | 'volume' | 'temperature' | 'speed' | 'bore' | 'pressure';

interface Scale {
  label: string;
  toShown: (si: number) => number;
  toSi: (shown: number) => number;
  /** Decimals of a shown number. */
  digits: (shown: number) => number;
}

const same = (value: number): number => value;
const fixed = (count: number) => () => count;
/** One decimal below ten, none above: three figures are more than a hose can keep. */
const oneBelowTen = (shown: number): number => (Math.abs(shown) < 9.95 ? 1 : 0);

const scales: Record<Quantity, Record<DisplayUnits, Scale>> = {
  depth: {
    us: { label: 'in', toShown: inchesFromMm, toSi: mmFromInches, digits: fixed(2) },
    metric: { label: 'mm', toShown: same, toSi: same, digits: oneBelowTen },
  },
  rate: {
    us: { label: 'in/h', toShown: inchesPerHourFromMmPerHour, toSi: mmPerHourFromInchesPerHour, digits: fixed(2) },
    metric: { label: 'mm/h', toShown: same, toSi: same, digits: oneBelowTen },
  },
  flow: {
    us: { label: 'gpm', toShown: gpmFromLpm, toSi: lpmFromGpm, digits: fixed(1) },
    metric: { label: 'L/min', toShown: same, toSi: same, digits: oneBelowTen },
  },
  area: {
    us: { label: 'sq ft', toShown: squareFeetFromM2, toSi: m2FromSquareFeet, digits: fixed(0) },
    metric: { label: 'm²', toShown: same, toSi: same, digits: oneBelowTen },
  },
  length: {
    us: { label: 'ft', toShown: feetFromM, toSi: mFromFeet, digits: oneBelowTen },
    metric: { label: 'm', toShown: same, toSi: same, digits: oneBelowTen },
  },
  volume: {
    us: { label: 'gal', toShown: gallonsFromL, toSi: lFromGallons, digits: oneBelowTen },
    metric: { label: 'L', toShown: same, toSi: same, digits: oneBelowTen },
  },
  temperature: {
    us: { label: '°F', toShown: fahrenheitFromC, toSi: cFromFahrenheit, digits: fixed(0) },
    metric: { label: '°C', toShown: same, toSi: same, digits: fixed(0) },
  },
  speed: {
    us: { label: 'mph', toShown: mphFromMps, toSi: mpsFromMph, digits: fixed(0) },
    metric: { label: 'm/s', toShown: same, toSi: same, digits: oneBelowTen },
  },
  bore: {
    us: { label: 'in', toShown: inchesFromMm, toSi: mmFromInches, digits: fixed(3) },
    metric: { label: 'mm', toShown: same, toSi: same, digits: oneBelowTen },
  },
  pressure: {
    us: { label: 'psi', toShown: psiFromKpa, toSi: kpaFromPsi, digits: oneBelowTen },
    metric: { label: 'kPa', toShown: same, toSi: same, digits: fixed(0) },
  },
};

/** The unit written behind a quantity, for example 'in/h'. */
export function unitLabel(quantity: Quantity, units: DisplayUnits): string {
  return scales[quantity][units].label;
}

/** An SI number in the yard's units, not rounded. */
export function toShown(quantity: Quantity, si: number, units: DisplayUnits): number {
  return scales[quantity][units].toShown(si);
}

/** A number in the yard's units as SI. */
export function fromShown(quantity: Quantity, shown: number, units: DisplayUnits): number {
  return scales[quantity][units].toSi(shown);
}

function grouped(digits: string): string {
  return digits.replace(/\B(?=(\d{3})+(?!\d))/g, ',');
}

/** A number for reading: thousands grouped by commas, a point for decimals, a true minus sign; a dash when it is not finite. */
export function formatNumber(value: number, digits: number): string {
  if (!Number.isFinite(value)) {
    return '–';
  }
  const [whole = '0', part] = Math.abs(value).toFixed(digits).split('.');
  const text = part === undefined ? grouped(whole) : `${grouped(whole)}.${part}`;
  return value < 0 && Number(value.toFixed(digits)) !== 0 ? `−${text}` : text;
}

/** Decimals for a shown number: fixed ones stay ('0.50 in'), a lone '.0' goes ('4 mm'). */
function shownNumber(scale: Scale, shown: number): string {
  const digits = scale.digits(shown);
  const text = formatNumber(shown, digits);
  return digits === 1 && scale.digits(1000) === 0 ? text.replace(/\.0$/, '') : text;
}

/** A quantity with its unit, for example '0.48 in' or '12 mm'. */
export function formatQuantity(quantity: Quantity, si: number, units: DisplayUnits): string {
  const scale = scales[quantity][units];
  return `${shownNumber(scale, scale.toShown(si))} ${scale.label}`;
}

/** A range with one unit, '0.45 to 0.66 in/h'; one value when both ends read the same. */
export function formatRange(quantity: Quantity, lowSi: number, highSi: number, units: DisplayUnits): string {
  const scale = scales[quantity][units];
  const low = shownNumber(scale, scale.toShown(lowSi));
  const high = shownNumber(scale, scale.toShown(highSi));
  return low === high ? `${low} ${scale.label}` : `${low} to ${high} ${scale.label}`;
}

/** Depth of water [mm]: '0.48 in' or '12 mm'. */
export const formatDepth = (depthMm: number, units: DisplayUnits): string => formatQuantity('depth', depthMm, units);
/** Application rate [mm/h]: '0.55 in/h' or '14 mm/h'. */
export const formatRate = (rateMmPerHour: number, units: DisplayUnits): string => formatQuantity('rate', rateMmPerHour, units);
/** Flow [L/min]: '4.2 gpm' or '16 L/min'. */
export const formatFlow = (flowLpm: number, units: DisplayUnits): string => formatQuantity('flow', flowLpm, units);
/** Area [m²]: '1,200 sq ft' or '111 m²'. */
export const formatArea = (areaM2: number, units: DisplayUnits): string => formatQuantity('area', areaM2, units);
/** Length or distance [m]: '26 ft' or '7.9 m'. */
export const formatLength = (lengthM: number, units: DisplayUnits): string => formatQuantity('length', lengthM, units);
/** Volume of water [L]: '623 gal' or '2,358 L'. */
export const formatVolume = (volumeL: number, units: DisplayUnits): string => formatQuantity('volume', volumeL, units);
/** Temperature [°C]: '48 °F' or '9 °C'. */
export const formatTemperature = (temperatureC: number, units: DisplayUnits): string => formatQuantity('temperature', temperatureC, units);
/** Wind [m/s]: '11 mph' or '5 m/s'. */
export const formatSpeed = (speedMps: number, units: DisplayUnits): string => formatQuantity('speed', speedMps, units);

/** A length of time [min]: '46 min', '1 h 10 min', '2 h'. Parts of a minute are rounded. */
export function formatMinutes(minutes: number): string {
  if (!Number.isFinite(minutes)) {
    return '–';
  }
  const whole = Math.round(Math.abs(minutes));
  const hours = Math.floor(whole / 60);
  const rest = whole % 60;
  const text = hours === 0 ? `${rest} min` : rest === 0 ? `${formatNumber(hours, 0)} h` : `${formatNumber(hours, 0)} h ${rest} min`;
  return minutes < 0 && whole > 0 ? `−${text}` : text;
}

/** A time of day from minutes after local midnight: '5:50 am' or '17:50'. Past midnight it starts again; 1440 at the end of a day reads as midnight. */
export function formatClock(minutes: number, units: DisplayUnits): string {
  if (!Number.isFinite(minutes)) {
    return '–';
  }
  const whole = ((Math.round(minutes) % 1440) + 1440) % 1440;
  const hour = Math.floor(whole / 60);
  const minute = String(whole % 60).padStart(2, '0');
  if (units === 'metric') {
    return `${hour}:${minute}`;
  }
  return `${hour % 12 === 0 ? 12 : hour % 12}:${minute} ${hour < 12 ? 'am' : 'pm'}`;
}

const WEEKDAYS = ['Sunday', 'Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday'];
const MONTHS = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'];

/** A civil day in words: long 'Saturday 13 June', short 'Sat 13 Jun', weekday 'Saturday', dated '13 June 2026'. */
export function formatCivilDay(on: string, style: 'long' | 'short' | 'weekday' | 'dated' = 'long'): string {
  const { year, month, day } = civilDayParts(on);
  const weekday = WEEKDAYS[weekdayOf(on)] ?? '';
  const monthName = MONTHS[month - 1] ?? '';
  switch (style) {
    case 'long':
      return `${weekday} ${day} ${monthName}`;
    case 'short':
      return `${weekday.slice(0, 3)} ${day} ${monthName.slice(0, 3)}`;
    case 'weekday':
      return weekday;
    case 'dated':
      return `${day} ${monthName} ${year}`;
  }
}

/**
 * A day as people say it: 'yesterday', 'today', 'tomorrow', a weekday within the coming six days, otherwise 'Thursday 25 June'.
 * @param todayOn - the reader's day; null when unknown, which leaves out today and tomorrow
 */
export function dayWord(on: string, todayOn: string | null): string {
  if (todayOn === null) {
    return formatCivilDay(on, 'long');
  }
  const ahead = daysBetween(todayOn, on);
  if (ahead === 0) return 'today';
  if (ahead === 1) return 'tomorrow';
  if (ahead === -1) return 'yesterday';
  return ahead > 1 && ahead <= 6 ? formatCivilDay(on, 'weekday') : formatCivilDay(on, 'long');
}
