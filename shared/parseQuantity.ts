import { fromShown, toShown, unitLabel, type DisplayUnits, type Quantity } from './display';

const FRACTION = /^(?:(\d+)\s+)?(\d+)\s*\/\s*(\d+)$/;
const PLAIN = /^\d*\.?\d+$|^\d+\.$/;

/**
 * Reads a number as people type it: comma or point for decimals, '1,200' and '1 200' for thousands, '3/8' and '1 1/2' as on a ruler.
 * A lone comma before exactly three digits separates thousands unless only a zero stands before it.
 * @returns the number, or null when the text is none
 */
export function parseNumber(text: string): number | null {
  const trimmed = text.trim().replace(/[\u2212\u2013]/g, '-').replace(/[\u00a0\u202f]/g, ' ');
  const sign = trimmed.startsWith('-') ? -1 : 1;
  let body = trimmed.replace(/^[+-]\s*/, '');
  const fraction = FRACTION.exec(body);
  if (fraction) {
    const below = Number(fraction[3]);
    return below === 0 ? null : sign * (Number(fraction[1] ?? 0) + Number(fraction[2]) / below);
  }
  body = body.replace(/(\d) (?=\d{3}(\D|$))/g, '$1');
  const lastComma = body.lastIndexOf(',');
  const lastPoint = body.lastIndexOf('.');
  if (lastComma >= 0 && lastPoint >= 0) {
    const isCommaDecimal = lastComma > lastPoint;
    const groups = isCommaDecimal ? '.' : ',';
    const [whole = '', ...others] = body.split(isCommaDecimal ? ',' : '.');
    if (others.length !== 1 || !isGrouped(whole, groups)) {
      return null;
    }
    body = `${whole.split(groups).join('')}.${others[0] ?? ''}`;
  } else if (lastComma >= 0) {
    const isThousands = isGrouped(body, ',') && !body.startsWith('0');
    if (!isThousands && body.indexOf(',') !== lastComma) {
      return null;
    }
    body = isThousands ? body.split(',').join('') : body.replace(',', '.');
  }
  if (!PLAIN.test(body)) {
    return null;
  }
  const value = sign * Number(body);
  return Number.isFinite(value) ? value : null;
}

function isGrouped(whole: string, separator: string): boolean {
  const [first = '', ...groups] = whole.split(separator);
  return /^\d{1,3}$/.test(first) && groups.every((group) => /^\d{3}$/.test(group)) || (groups.length === 0 && /^\d*$/.test(first));
}

/**
 * Reads a quantity typed in the yard's units; the unit may be typed behind it.
 * @returns the value in SI, or null when the text is no number or carries another unit
 */
export function parseQuantity(quantity: Quantity, text: string, units: DisplayUnits): number | null {
  const label = unitLabel(quantity, units);
  const trimmed = text.trim();
  const bare = trimmed.toLowerCase().endsWith(label.toLowerCase()) ? trimmed.slice(0, trimmed.length - label.length) : trimmed;
  const value = parseNumber(bare);
  return value === null ? null : fromShown(quantity, value, units);
}

/**
 * An SI value as text for a form field in the yard's units: up to four significant figures, without grouping or unit, so that it can be typed over.
 */
export function fieldText(quantity: Quantity, si: number | null | undefined, units: DisplayUnits): string {
  if (si === null || si === undefined || !Number.isFinite(si)) {
    return '';
  }
  return String(Number(toShown(quantity, si, units).toPrecision(4)));
}

const CLOCK = /^(\d{1,2})(?:[:.h ](\d{2}))?\s*(am|pm|a\.m\.|p\.m\.|a|p)?$/;

/**
 * Reads a time of day: '5:50 am', '5.50', '17:50', '6pm', '1730'.
 * @returns minutes after local midnight, 1440 for 24:00, or null when it is no time
 */
export function parseClock(text: string): number | null {
  const tidy = text.trim().toLowerCase().replace(/^(\d{1,2})(\d{2})(?=$|\s*[ap])/, '$1:$2');
  const match = CLOCK.exec(tidy);
  if (!match) {
    return null;
  }
  const half = match[3]?.[0];
  let hour = Number(match[1]);
  const minute = Number(match[2] ?? 0);
  if (minute > 59 || (half && (hour < 1 || hour > 12))) {
    return null;
  }
  if (half) {
    hour = (hour % 12) + (half === 'p' ? 12 : 0);
  }
  const minutes = hour * 60 + minute;
  return minutes <= 1440 ? minutes : null;
}
