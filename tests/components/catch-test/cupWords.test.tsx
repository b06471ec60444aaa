import { draftInUnits, emptyDraft, readDraftCups } from '@/components/catch-test/cupDraft';
import { pasteReadings } from '@/components/catch-test/cupPaste';
import { certaintyText, placesText, runAdvice } from '@/components/catch-test/cupWords';
import { timerText } from '@/components/catch-test/useRunTimer';
import { cupTest } from '@/scheduling/sprinkler/cupTest';

describe('pasting', () => {
  const shape = { rows: 2, columns: 3, count: 6 };
  const pasted = (text: string, start = 0) => [...(pasteReadings(text, start, shape) ?? [])];

  test('a single value is left to the field', () => {
    expect(pasteReadings('3,5', 0, shape)).toBeNull();
    expect(pasteReadings('12\n', 0, shape)).toBeNull();
  });

  test('one line goes on in row order from where it is pasted and stops at the last cup', () => {
    expect(pasted('1 2 3 4', 1)).toEqual([[1, '1'], [2, '2'], [3, '3'], [4, '4']]);
    expect(pasted('1,2,3', 4)).toEqual([[4, '1'], [5, '2']]);
    expect(pasted('1\n2\n3')).toEqual([[0, '1'], [1, '2'], [2, '3']]);
  });

  test('a table goes below itself and not round the edge; decimals with a comma stay whole', () => {
    expect(pasted('1,5\t2\n3\t4', 1)).toEqual([[1, '1,5'], [2, '2'], [4, '3'], [5, '4']]);
    expect(pasted('1\t2\n3\t4', 2)).toEqual([[2, '1'], [5, '3']]);
  });
});

test('a draft tells in SI what it means, eighths of an inch as millimetres', () => {
  const read = readDraftCups({ ...emptyDraft('us'), rows: '1', columns: '2', minutes: '30', cells: { r0c0: '4', r0c1: '' } }, 'us');
  expect(read.problems).toEqual([]);
  expect(read.request).toMatchObject({ layout: { kind: 'grid', rows: 1, columns: 2, spacingM: 5 * 0.3048 }, readings: [12.7, null], minutes: 30 });
});

test.each([
  [{ rows: '0' }, 'rows'], [{ rows: '30', columns: '30' }, 'columns'], [{ columns: 'six' }, 'columns'], [{ spacing: '0' }, 'spacing'], [{ minutes: '-3' }, 'minutes'], [{ minutes: '9999' }, 'minutes'],
  [{ reading: 'volume' as const, mouth: '120' }, 'mouth'], [{ cells: { r0c0: '-1' } }, 'cells.r0c0'], [{ cells: { r0c0: '300' } }, 'cells.r0c0'], [{ note: 'x'.repeat(501) }, 'note'],
])('%j is refused at its field', (wrong, field) => {
  const read = readDraftCups({ ...emptyDraft('us'), minutes: '30', cells: { r0c1: '2' }, ...wrong }, 'us');
  expect(read.request).toBeNull();
  expect(read.problems.map((problem) => problem.field)).toContain(field);
});

test('a wider grid keeps what was read at its place', () => {
  const cells = { r0c0: '1', r1c0: '2' };
  const narrow = readDraftCups({ ...emptyDraft('metric'), rows: '2', columns: '1', cells }, 'metric');
  const wide = readDraftCups({ ...emptyDraft('metric'), rows: '2', columns: '2', cells }, 'metric');
  expect(narrow.values).toEqual([1, 2]);
  expect(wide.values).toEqual([1, null, 2, null]);
});

test('start values change with the units, typed ones are converted', () => {
  expect(draftInUnits(emptyDraft('us'), 'us', 'metric')).toEqual(emptyDraft('metric'));
  expect(draftInUnits({ ...emptyDraft('us'), spacing: '10' }, 'us', 'metric').spacing).toBe('3.05');
});

test('a ruler asks for hours where millilitres ask for a quarter of one', () => {
  // 1/8 in ruler: 1.5875 mm is a tenth of 15.9 mm; at 4.3 mm/h that is 222 min.
  const advice = runAdvice({ rateMmPerHour: 4.3, source: 'default' }, { kind: 'depth' }, 'us');
  expect(advice.headline).toBe('Let it run about 3 h 42 min.');
  expect(advice.instead).toBe('Measured in millilitres or weighed in grams, 16 min would do.');
  expect(runAdvice({ rateMmPerHour: 60, source: 'catch_test' }, { kind: 'volume', mouthDiameterMm: 75 }, 'us').instead).toBeNull();
});

test('few cups are called a guess, many a fair picture', () => {
  const test = (count: number) => cupTest({ layout: { kind: 'grid', rows: 1, columns: count, spacingM: 1 }, reading: { kind: 'depth' }, minutes: 30, values: Array.from({ length: count }, (_, at) => 10 + at % 3) });
  expect(certaintyText(test(4), 'us')).toMatch(/^With only 4 cups this is a guess: the true rate lies between .* and .* in\/h nine times in ten\.$/);
  expect(certaintyText(test(24), 'us')).toMatch(/^With 24 cups this is a fair picture/);
});

test('cups are named by row and place, or by their count in a row', () => {
  expect(placesText('grid', 3, [0, 2, 3])).toBe('row 1, cups 1 and 3; row 2, cup 1');
  expect(placesText('row', 8, [6, 7])).toBe('cups 7 and 8');
});

test('the timer reads in minutes, and in hours from one on', () => {
  expect([0, 59.9, 760, 3909].map(timerText)).toEqual(['0:00', '0:59', '12:40', '1:05:09']);
});
