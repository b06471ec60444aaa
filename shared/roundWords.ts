import { formatClock, type DisplayUnits } from './display';

const small = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve'];

/** A count in words up to twelve, in figures above. */
export function countWord(count: number): string {
  return small[count] ?? String(count);
}

/** A count with its noun: 'two sets', 'one move'. */
export function counted(count: number, noun: string): string {
  return `${countWord(count)} ${noun}${count === 1 ? '' : 's'}`;
}

/** Where a sprinkler of alternate sets stands every other time. */
export const HALF_WAY = 'half-way between the marks';

/** First letter large. */
export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/**
 * What a round comes to, in words: 'Two sets, one move. Done by 7:25 am.'
 * @param endMinutes - end of the last set, minutes after local midnight [min]
 */
export function roundHeadline(sets: number, moves: number, endMinutes: number, units: DisplayUnits, kind: 'set' | 'dose' = 'set'): string {
  const what = moves > 0 ? `${counted(sets, kind)}, ${counted(moves, 'move')}` : counted(sets, kind);
  return `${capital(what)}. Done by ${formatClock(endMinutes, units)}.`;
}
