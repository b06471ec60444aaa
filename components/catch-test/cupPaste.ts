import type { CupShape } from './cupDraft';

/** Numbers of one pasted line: by tabs or semicolons when there are any, else by spaces, else by commas when there are two or more. */
function numbersOf(line: string): string[] {
  const trimmed = line.replace(/\r$/, '');
  if (/[\t;]/.test(trimmed)) return trimmed.split(/[\t;]/).map((part) => part.trim());
  if (/\s/.test(trimmed.trim())) return trimmed.trim().split(/\s+/).map((part) => part.replace(/,$/, ''));
  return (trimmed.match(/,/g)?.length ?? 0) >= 2 ? trimmed.split(',') : [trimmed];
}

/**
 * Where pasted readings go: one line fills the cups that follow in row order; several lines fill as many rows of the grid below each other.
 * @param start - place of the cup pasted into, in row order
 * @returns reading by place in row order; null for a single value, which the field takes as it is
 */
export function pasteReadings(text: string, start: number, shape: CupShape): Map<number, string> | null {
  const lines = text.replace(/\n+$/, '').split('\n').map(numbersOf);
  if (lines.length === 1 && (lines[0]?.length ?? 0) <= 1) {
    return null;
  }
  const found = new Map<number, string>();
  const isTable = lines.length > 1 && lines.some((line) => line.length > 1);
  if (!isTable) {
    lines.flat().forEach((value, at) => {
      if (start + at < shape.count) found.set(start + at, value);
    });
    return found;
  }
  const column = start % shape.columns;
  lines.forEach((line, down) => line.forEach((value, along) => {
    const place = start + down * shape.columns + along;
    if (column + along < shape.columns && place < shape.count) found.set(place, value);
  }));
  return found;
}
