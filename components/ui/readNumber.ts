/** What a person's text means as a number. */
export type NumberReading = { kind: 'empty' } | { kind: 'number'; value: number } | { kind: 'wrong'; message: string };

/**
 * Reads a number as people write it: "12", "12.5", "12,5", " 1 250 ". One comma before exactly three digits can mean thousands or
 * a fraction, so it is asked about instead of guessed. The number is finite and has the unit of its field.
 */
export function readNumber(text: string): NumberReading {
  const compact = text.replace(/[\s\u00A0\u202F]/g, '').replace(/\u2212/g, '-');
  if (compact === '') return { kind: 'empty' };
  if (/^-?[1-9]\d{0,2},\d{3}$/.test(compact)) {
    const whole = compact.replace(',', '');
    return { kind: 'wrong', message: `Write ${whole} without the comma, or ${compact.replace(',', '.')} with a point.` };
  }
  const withThousands = /^-?[1-9]\d{0,2}(,\d{3})+(\.\d+)?$/.test(compact) ? compact.replace(/,/g, '') : compact;
  const plain = withThousands.replace(',', '.');
  if (!/^-?(\d+\.?\d*|\.\d+)$/.test(plain)) return { kind: 'wrong', message: 'Write a number, such as 12 or 12.5.' };
  const value = Number(plain);
  return Number.isFinite(value) ? { kind: 'number', value } : { kind: 'wrong', message: 'This number is too large.' };
}
