import { parseNumber } from '@/shared/parseQuantity';
import type { UnitSystem } from '@/shared/contracts/common';
import { createCatchTestRequestSchema, windWords, type CreateCatchTestRequest, type CupLayout, type CupReading } from '@/shared/contracts/catchTests';
import { fromShown, toShown, unitLabel, type Quantity } from '@/shared/display';
import { limits } from '@/shared/limits';
import { typedInUnits } from '@/shared/typedInUnits';
import { z } from '@/shared/zod';

const text = z.string().max(200);

/** What stands in the fields of a catch-cup test, as typed, in the units shown. */
export const cupDraftSchema = z.object({
  kind: z.enum(['grid', 'row']),
  rows: text, columns: text, spacing: text,
  cups: text, rowSpacing: text, firstDistance: text, pattern: z.enum(['full_circle', 'strip']),
  reading: z.enum(['depth', 'volume', 'weight']), ruler: z.enum(['eighths', 'inches', 'mm']), mouth: text,
  minutes: text, wantedDepth: text, moveNow: text,
  /** For the run length where no position tells the expected rate. */
  flow: text, area: text,
  /** By place, see `cellKey`; places outside the present layout are kept in case it grows again. */
  cells: z.record(z.string(), text),
  wind: z.enum(windWords), note: z.string().max(5_000),
});
export type CupDraft = z.infer<typeof cupDraftSchema>;

/** A new test: five rows of six cups, as auditors set out about as many. */
export function emptyDraft(units: UnitSystem): CupDraft {
  const us = units === 'us';
  return {
    kind: 'grid', rows: '5', columns: '6', spacing: us ? '5' : '1.5', cups: '8', rowSpacing: us ? '3' : '1', firstDistance: us ? '1.5' : '0.5', pattern: 'full_circle',
    reading: 'depth', ruler: us ? 'eighths' : 'mm', mouth: us ? '3' : '75', minutes: '', wantedDepth: us ? '0.5' : '12', moveNow: '', flow: '', area: '', cells: {}, wind: 'calm', note: '',
  };
}

type MeasuredField = 'spacing' | 'rowSpacing' | 'firstDistance' | 'mouth' | 'wantedDepth' | 'moveNow' | 'flow' | 'area';
const measured: Record<MeasuredField, Quantity> = { spacing: 'length', rowSpacing: 'length', firstDistance: 'length', mouth: 'bore', wantedDepth: 'depth', moveNow: 'length', flow: 'flow', area: 'area' };

/** The same test in other units: what was a start value stays one, what was typed is converted. Readings keep their own unit. */
export function draftInUnits(draft: CupDraft, from: UnitSystem, to: UnitSystem): CupDraft {
  const us = emptyDraft('us');
  const metric = emptyDraft('metric');
  const next = { ...draft };
  for (const field of Object.keys(measured) as MeasuredField[]) {
    next[field] = typedInUnits(measured[field], draft[field], { us: us[field], metric: metric[field] }, from, to);
  }
  const isRead = Object.values(draft.cells).some((cell) => cell.trim() !== '');
  return isRead || from === to ? next : { ...next, ruler: emptyDraft(to).ruler };
}

/** Where a cup stands in a draft: by row and column in a grid, by count in a row, so that a wider grid keeps what was read. */
export function cellKey(draft: Pick<CupDraft, 'kind'>, columns: number, index: number): string {
  return draft.kind === 'row' ? `n${index}` : `r${Math.floor(index / columns)}c${index % columns}`;
}

/** A field of a draft in SI; null when it is empty, no number, or not above zero. */
export function draftQuantity(draft: CupDraft, field: MeasuredField, units: UnitSystem): number | null {
  const value = parseNumber(draft[field]);
  return value === null || value <= 0 ? null : fromShown(measured[field], value, units);
}

/** How many cups there are; null while the layout is not a layout. */
export interface CupShape { rows: number; columns: number; count: number }

function countOf(typed: string, max: number): number | null {
  const value = parseNumber(typed);
  return value !== null && Number.isInteger(value) && value >= 1 && value <= max ? value : null;
}

export function shapeOf(draft: Pick<CupDraft, 'kind' | 'rows' | 'columns' | 'cups'>): CupShape | null {
  if (draft.kind === 'row') {
    const count = countOf(draft.cups, 40);
    return count === null ? null : { rows: 1, columns: count, count };
  }
  const rows = countOf(draft.rows, 40);
  const columns = countOf(draft.columns, 40);
  return rows === null || columns === null || rows * columns > limits.cupsMax ? null : { rows, columns, count: rows * columns };
}

/** Millimetres of one unit that the ruler is read in [mm]. */
const rulerMm = { eighths: 25.4 / 8, inches: 25.4, mm: 1 } as const;

/** What one reading is told in: '1/8 in', 'mL' … */
export function readingUnit(draft: Pick<CupDraft, 'reading' | 'ruler'>): string {
  if (draft.reading !== 'depth') {
    return draft.reading === 'volume' ? 'mL' : 'g';
  }
  return draft.ruler === 'eighths' ? 'eighths of an inch' : draft.ruler === 'inches' ? 'inches' : 'mm';
}

/** A cup's reading as text, given in mm, mL or g. */
export function shownReading(value: number, draft: Pick<CupDraft, 'reading' | 'ruler'>): string {
  return String(Number((draft.reading === 'depth' ? value / rulerMm[draft.ruler] : value).toPrecision(4)));
}

export interface CupProblemAt { field: string; message: string }

export interface ReadCups {
  shape: CupShape | null;
  layout: CupLayout | null;
  reading: CupReading | null;
  /** [min] */
  minutes: number | null;
  /** One a cup in row order [mm, mL or g]; null where nothing readable stands. */
  values: (number | null)[];
  /** What is wrong, by field of the draft; cells as `cells.<key>`. */
  problems: CupProblemAt[];
  /** Ready to send; null while something is wrong. */
  request: CreateCatchTestRequest | null;
}

/** What a draft means in SI and what is wrong with it, by the same contract as the server's. */
export function readDraftCups(draft: CupDraft, units: UnitSystem): ReadCups {
  const problems: CupProblemAt[] = [];
  const wrong = (field: string, message: string): null => {
    problems.push({ field, message });
    return null;
  };
  const quantity = (field: MeasuredField, minSi: number, maxSi: number): number | null => {
    const value = parseNumber(draft[field]);
    const kind = measured[field];
    if (value === null) {
      return wrong(field, 'Write a number, such as 3 or 2.5.');
    }
    const si = fromShown(kind, value, units);
    if (si < minSi || si > maxSi * (1 + 1e-9)) {
      const [low, high] = [minSi, maxSi].map((limit) => String(Number(toShown(kind, limit, units).toPrecision(3))));
      return wrong(field, `Write something from ${low} to ${high} ${unitLabel(kind, units)}.`);
    }
    return Math.min(maxSi, si);
  };

  const shape = shapeOf(draft);
  if (shape === null) {
    const whole = 'Write a whole number from 1 to 40.';
    if (draft.kind === 'row') {
      wrong('cups', whole);
    } else {
      const before = problems.length;
      if (countOf(draft.rows, 40) === null) wrong('rows', whole);
      if (countOf(draft.columns, 40) === null) wrong('columns', whole);
      if (problems.length === before) wrong('columns', `A test takes ${limits.cupsMax} cups at most.`);
    }
  }
  const spacingM = quantity(draft.kind === 'row' ? 'rowSpacing' : 'spacing', 0.05, 30);
  const firstDistanceM = draft.kind === 'row' ? quantity('firstDistance', 0, 30) : 0;
  const mouthDiameterMm = draft.reading === 'depth' ? 0 : quantity('mouth', limits.cupMouthMinMm, limits.cupMouthMaxMm);
  const typedMinutes = parseNumber(draft.minutes);
  const minutes = typedMinutes !== null && typedMinutes > 0 && typedMinutes <= limits.testMinutesMax ? typedMinutes : null;
  if (minutes === null) {
    wrong('minutes', draft.minutes.trim() === '' ? 'Give the minutes it ran.' : `Write the minutes it ran, up to ${limits.testMinutesMax}.`);
  }

  const layout: CupLayout | null = shape === null || spacingM === null || firstDistanceM === null ? null
    : draft.kind === 'row' ? { kind: 'row', spacingM, firstDistanceM, pattern: draft.pattern } : { kind: 'grid', rows: shape.rows, columns: shape.columns, spacingM };
  const reading: CupReading | null = draft.reading === 'depth' ? { kind: 'depth' } : mouthDiameterMm === null ? null : { kind: draft.reading, mouthDiameterMm };

  const factor = draft.reading === 'depth' ? rulerMm[draft.ruler] : 1;
  const values = Array.from({ length: shape?.count ?? 0 }, (_, index) => {
    const key = cellKey(draft, shape?.columns ?? 1, index);
    const typed = (draft.cells[key] ?? '').trim();
    if (typed === '') {
      return null;
    }
    const value = parseNumber(typed);
    if (value === null || value < 0) {
      return wrong(`cells.${key}`, `${cupName(draft.kind, shape?.columns ?? 1, index)}: write a number, or leave it empty.`);
    }
    if (draft.reading === 'depth' && value * factor > limits.cupDepthMaxMm) {
      return wrong(`cells.${key}`, `${cupName(draft.kind, shape?.columns ?? 1, index)}: that would stand deeper than a cup.`);
    }
    return value * factor;
  });
  const draftKnown = layout !== null && reading !== null && minutes !== null && problems.length === 0;
  if (!draftKnown) {
    return { shape, layout, reading, minutes, values, problems, request: null };
  }
  const request: CreateCatchTestRequest = { layout, reading, minutes, readings: values, wind: draft.wind, note: draft.note };
  const checked = createCatchTestRequestSchema.safeParse(request);
  if (!checked.success) {
    for (const issue of checked.error.issues) {
      problems.push(problemAt(issue.path, issue.message, draft, shape));
    }
  }
  return { shape, layout, reading, minutes, values, problems, request: checked.success ? request : null };
}

/** The field of the draft that an objection of the contract belongs to. */
export function problemAt(path: readonly PropertyKey[], message: string, draft: CupDraft, shape: CupShape | null): CupProblemAt {
  const [head, next] = path;
  const columns = shape?.columns ?? 1;
  if (head === 'readings') {
    const index = typeof next === 'number' ? next : 0;
    const said = typeof next === 'number' ? `${cupName(draft.kind, columns, next)}: ${message.charAt(0).toLowerCase()}${message.slice(1)}` : message;
    return { field: `cells.${cellKey(draft, columns, index)}`, message: said };
  }
  if (head === 'reading') return { field: 'mouth', message };
  if (head === 'layout') return { field: draft.kind === 'row' ? (next === 'firstDistanceM' ? 'firstDistance' : 'rowSpacing') : next === 'rows' || next === 'columns' ? next : 'spacing', message };
  return { field: head === 'note' || head === 'wind' ? head : 'minutes', message };
}

/** How a cup is called: 'Row 2, cup 3', or 'Cup 3' in a single row from the sprinkler. */
export function cupName(kind: CupDraft['kind'], columns: number, index: number): string {
  return kind === 'row' ? `Cup ${index + 1}` : `Row ${Math.floor(index / columns) + 1}, cup ${(index % columns) + 1}`;
}
