import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState, type ReactElement } from 'react';
import { fromClockText, toClockText } from '@/components/ui/clockText';
import { DataTable } from '@/components/ui/DataTable';
import { Notice } from '@/components/ui/Notice';
import { optionalNumberText, numberText } from '@/components/ui/numberText';
import { ProgressBar } from '@/components/ui/ProgressBar';
import { readNumber } from '@/components/ui/readNumber';
import { Tabs } from '@/components/ui/Tabs';
import { Text } from '@/components/ui/Text';

describe('numbers as people write them', () => {
  test.each([
    ['12', 12], ['12.5', 12.5], ['12,5', 12.5], ['0,125', 0.125], [' 1 250 ', 1250], ['1,234,567', 1234567], ['1,234.5', 1234.5], ['.5', 0.5], ['12.', 12], ['-3', -3], ['\u22123', -3], ['12,', 12],
  ])('%j is %d', (text, value) => {
    expect(readNumber(text)).toEqual({ kind: 'number', value });
  });

  test('nothing written is empty, not zero', () => {
    expect(readNumber('  ')).toEqual({ kind: 'empty' });
  });

  test('one comma before three digits is asked about, not guessed', () => {
    expect(readNumber('5,000')).toEqual({ kind: 'wrong', message: 'Write 5000 without the comma, or 5.000 with a point.' });
  });

  test.each(['twelve', '1.2.3', '1,2,3', '1e3', '0x10', 'Infinity', '-', ',', '12 gpm', '9'.repeat(400)])('%j is refused', (text) => {
    expect(readNumber(text).kind).toBe('wrong');
  });

  test('the form schema keeps to its range and says it with the unit', () => {
    const flow = numberText({ min: 0.5, max: 30, unit: 'gpm' });
    expect(flow.parse('4,5')).toBe(4.5);
    expect(flow.safeParse('31').error?.issues[0]?.message).toBe('Write something from 0.5 gpm to 30 gpm.');
    expect(flow.safeParse('').success).toBe(false);
    expect(numberText({ whole: true }).safeParse('2.5').error?.issues[0]?.message).toBe('Write a whole number.');
    expect(optionalNumberText().parse('')).toBeNull();
  });
});

test('times of day go to minutes after midnight and back, every minute of the day', () => {
  for (let minutes = 0; minutes < 1440; minutes += 1) expect(fromClockText(toClockText(minutes))).toBe(minutes);
  expect(fromClockText('')).toBeNull();
  expect(fromClockText('24:00')).toBeNull();
});

test('headings are real headings of their level; text that only looks like one is not', () => {
  render(<><Text variant="heading1">Two sets</Text><Text variant="heading2" level={3}>Next</Text><Text variant="heading2" level="none">12:40</Text></>);
  expect(screen.getByRole('heading', { level: 1, name: 'Two sets' }).tagName).toBe('H1');
  expect(screen.getByRole('heading', { level: 3, name: 'Next' }).tagName).toBe('H3');
  expect(screen.getAllByRole('heading')).toHaveLength(2);
});

test('a caution says that it is one; a problem is read out', () => {
  render(<><Notice tone="caution">Mark the hose.</Notice><Notice tone="problem">Not saved.</Notice></>);
  expect(screen.getByRole('img', { name: 'Caution' })).toBeTruthy();
  expect(screen.getByRole('alert').textContent).toContain('Not saved.');
});

test('progress is told as a value and in words', () => {
  render(<ProgressBar label="Days planned" value={3} max={10} valueText="3 of 10 days" />);
  const bar = screen.getByRole('progressbar', { name: 'Days planned' });
  expect(bar.getAttribute('aria-valuenow')).toBe('3');
  expect(bar.getAttribute('aria-valuetext')).toBe('3 of 10 days');
});

describe('tables', () => {
  interface Row { id: string; yard: string; donePct: number | null }
  const rows: Row[] = [{ id: '1', yard: 'Mill', donePct: 71 }, { id: '2', yard: 'Birch', donePct: null }, { id: '3', yard: 'Court', donePct: 100 }];
  const columns = [
    { header: 'Yard', cell: (row: Row) => row.yard },
    { header: 'Sets done', align: 'right' as const, cell: (row: Row) => (row.donePct === null ? 'none yet' : `${row.donePct}%`), sortBy: (row: Row) => row.donePct },
  ];
  const names = (): (string | null)[] => screen.getAllByRole('rowheader').map((cell) => cell.textContent);

  test('a table has a caption, column and row headers', () => {
    render(<DataTable caption="Yards" columns={columns} rows={rows} rowKey={(row) => row.id} empty={null} />);
    expect(screen.getByRole('table', { name: 'Yards' }).tagName).toBe('TABLE');
    expect(screen.getAllByRole('columnheader').map((header) => header.getAttribute('scope'))).toEqual(['col', 'col']);
    expect(names()).toEqual(['Mill', 'Birch', 'Court']);
  });

  test('pressing a header sorts, pressing again turns it round, empty values stay last', async () => {
    render(<DataTable caption="Yards" columns={columns} rows={rows} rowKey={(row) => row.id} empty={null} />);
    await userEvent.click(screen.getByRole('button', { name: 'Sets done' }));
    expect(names()).toEqual(['Mill', 'Court', 'Birch']);
    expect(screen.getByRole('columnheader', { name: 'Sets done' }).getAttribute('aria-sort')).toBe('ascending');
    await userEvent.click(screen.getByRole('button', { name: 'Sets done' }));
    expect(names()).toEqual(['Court', 'Mill', 'Birch']);
    expect(screen.getByRole('columnheader', { name: 'Sets done' }).getAttribute('aria-sort')).toBe('descending');
  });

  test('without rows it shows what to do instead', () => {
    render(<DataTable caption="Yards" columns={columns} rows={[]} rowKey={(row) => row.id} empty={<p>Invite a client.</p>} />);
    expect(screen.queryByRole('table')).toBeNull();
    expect(screen.getByText('Invite a client.')).toBeTruthy();
  });
});

test('arrow keys, Home and End move between tabs and show their part', async () => {
  function Parts(): ReactElement {
    const [part, setPart] = useState<'a' | 'b' | 'c'>('a');
    return <Tabs label="Parts" tabs={[{ id: 'a', label: 'One' }, { id: 'b', label: 'Two' }, { id: 'c', label: 'Three' }]} value={part} onChange={setPart}>{`Part ${part}`}</Tabs>;
  }
  render(<Parts />);
  const list = screen.getByRole('tablist', { name: 'Parts' });
  within(list).getByRole('tab', { name: 'One' }).focus();
  await userEvent.keyboard('{ArrowLeft}');
  expect(document.activeElement?.textContent).toBe('Three');
  await userEvent.keyboard('{ArrowRight}{ArrowRight}');
  expect(screen.getByRole('tabpanel', { name: 'Two' }).textContent).toBe('Part b');
  await userEvent.keyboard('{End}');
  expect(screen.getByRole('tabpanel').textContent).toBe('Part c');
  await userEvent.keyboard('{Home}');
  expect(within(list).getByRole('tab', { selected: true }).textContent).toBe('One');
});
