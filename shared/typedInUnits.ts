import { fromShown, toShown, type DisplayUnits, type Quantity } from './display';
import { parseNumber } from './parseQuantity';

/**
 * What stands in a field when the units change: a start value becomes the start value of the other units, a typed number is converted to three
 * figures, and what is no number stays as it was typed.
 * @param start - the field's start value in each unit
 */
export function typedInUnits(quantity: Quantity, typed: string, start: Record<DisplayUnits, string>, from: DisplayUnits, to: DisplayUnits): string {
  const value = parseNumber(typed);
  if (from === to || value === null) {
    return typed;
  }
  return typed === start[from] ? start[to] : String(Number(toShown(quantity, fromShown(quantity, value, from), to).toPrecision(3)));
}
