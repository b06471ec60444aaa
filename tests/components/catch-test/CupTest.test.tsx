import { act, configure, render, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import CupTest from '@/components/catch-test/CupTest';
import { ApiError } from '@/components/data/apiError';
import { cupTest } from '@/scheduling/sprinkler/cupTest';
import type { CreateCatchTestRequest } from '@/shared/contracts/catchTests';
import { formatRate } from '@/shared/display';

// Thirty fields with all their ties take their time in jsdom.
jest.setTimeout(60_000);
configure({ asyncUtilTimeout: 15_000, defaultHidden: true });

const key = 'test.cups';
const readings = [[3, 5, 7, 8, 6, 4], [5, 9, 12, 13, 10, 6], [6, 12, 16, 17, 13, 7], [5, 10, 14, 15, 12, 6], [4, 6, 9, 9, 7, 4]];
const cup = (row: number, place: number): HTMLInputElement => screen.getByLabelText<HTMLInputElement>(`Row ${row}, cup ${place}`);
const sheet = readings.map((row) => row.join('\t')).join('\n');

beforeEach(() => {
  window.sessionStorage.clear();
});

async function fillExample(): Promise<void> {
  await userEvent.click(screen.getByRole('radio', { name: 'mm' }));
  await userEvent.type(screen.getByLabelText('Minutes it ran'), '20');
  await userEvent.click(cup(1, 1));
  await userEvent.paste(sheet);
}

const expected = { rateMmPerHour: 10.6, source: 'flow_and_area' } as const;

test('a pasted table fills the grid, and the result is the one that the server computes', async () => {
  render(<CupTest units="us" storageKey={key} expected={expected} />);
  await fillExample();
  expect(cup(3, 4).value).toBe('17');
  const result = cupTest({ layout: { kind: 'grid', rows: 5, columns: 6, spacingM: 1.524 }, reading: { kind: 'depth' }, minutes: 20, values: readings.flat() });
  const rate = formatRate(result.rateMmPerHour, 'us');
  expect(await screen.findByRole('heading', { name: new RegExp(`^${rate}, `) })).toBeTruthy();
  const figures = within(screen.getByRole('region', { name: new RegExp(`^${rate}`) }));
  expect(figures.getByText((result.lowQuarterUniformity ?? 0).toFixed(2))).toBeTruthy();
  expect(screen.getByText(/^Lowest quarter, 8 of 30 cups: row 1, cups 1, 2, 5 and 6; row 2, cup 1; row 4, cup 1; row 5, cups 1 and 6\.$/)).toBeTruthy();
  expect(cup(1, 1).getAttribute('aria-describedby')?.split(' ').map((id) => document.getElementById(id)?.textContent)).toContain('In the lowest quarter');
  expect(cup(3, 4).getAttribute('aria-describedby')?.split(' ').map((id) => document.getElementById(id)?.textContent)).not.toContain('In the lowest quarter');
});

test('Tab and Enter go from cup to cup in row order, arrows go between rows', async () => {
  render(<CupTest units="us" storageKey={key} expected={expected} />);
  await userEvent.click(cup(1, 6));
  await userEvent.keyboard('4{Enter}');
  expect(document.activeElement).toBe(cup(2, 1));
  await userEvent.tab();
  expect(document.activeElement).toBe(cup(2, 2));
  await userEvent.keyboard('{ArrowDown}');
  expect(document.activeElement).toBe(cup(3, 2));
  await userEvent.keyboard('{ArrowUp}{ArrowUp}');
  expect(document.activeElement).toBe(cup(1, 2));
});

test('a wrong reading in a pasted row is named at its cup', async () => {
  render(<CupTest units="us" storageKey={key} expected={expected} />);
  await userEvent.click(cup(2, 1));
  await userEvent.paste('4\tx\t6');
  expect(await screen.findByRole('link', { name: 'Row 2, cup 2: write a number, or leave it empty.' })).toBeTruthy();
  expect(cup(2, 3).value).toBe('6');
});

test('a fraction as on a ruler counts, nonsense is named at its cup and tied to it', async () => {
  render(<CupTest units="us" storageKey={key} expected={expected} />);
  await userEvent.type(cup(1, 1), '2 1/2');
  await userEvent.type(cup(1, 2), 'wet');
  await userEvent.tab();
  const problem = await screen.findByRole('link', { name: 'Row 1, cup 2: write a number, or leave it empty.' });
  expect(cup(1, 2).getAttribute('aria-invalid')).toBe('true');
  await userEvent.click(problem);
  expect(document.activeElement).toBe(cup(1, 2));
  expect(cup(1, 1).getAttribute('aria-invalid')).toBeNull();
});

test('what was typed survives a reload', async () => {
  const { unmount } = render(<CupTest units="us" storageKey={key} expected={expected} />);
  await fillExample();
  unmount();
  render(<CupTest units="us" storageKey={key} expected={expected} />);
  expect(cup(5, 6).value).toBe('4');
  expect(screen.getByLabelText<HTMLInputElement>('Minutes it ran').value).toBe('20');
});

test('a change of units converts distances and leaves the readings as they were read', async () => {
  const { rerender } = render(<CupTest units="us" storageKey={key} expected={null} />);
  await fillExample();
  const apart = screen.getByLabelText<HTMLInputElement>('Apart');
  await userEvent.clear(apart);
  await userEvent.type(apart, '4');
  rerender(<CupTest units="metric" storageKey={key} expected={null} />);
  await waitFor(() => expect(screen.getByLabelText<HTMLInputElement>('Apart').value).toBe('1.22'));
  expect(cup(3, 4).value).toBe('17');
});

test('saving sends SI; a failed save keeps what was typed, and a later one clears the cups', async () => {
  const sent: CreateCatchTestRequest[] = [];
  let fails = true;
  const save = (request: CreateCatchTestRequest): Promise<void> => {
    sent.push(request);
    return fails ? Promise.reject(new ApiError('network', 'No connection just now. What you typed is still here; try again.')) : Promise.resolve();
  };
  render(<CupTest units="us" storageKey={key} expected={expected} save={save} />);
  await fillExample();
  await userEvent.click(screen.getByRole('button', { name: 'Save this test' }));
  expect((await screen.findByRole('alert')).textContent).toContain('What you typed is still here');
  expect(cup(3, 4).value).toBe('17');
  fails = false;
  await userEvent.click(screen.getByRole('button', { name: 'Save this test' }));
  await waitFor(() => expect(cup(3, 4).value).toBe(''));
  expect(sent).toHaveLength(2);
  expect(sent[1]).toMatchObject({ layout: { kind: 'grid', rows: 5, columns: 6 }, reading: { kind: 'depth' }, minutes: 20, wind: 'calm' });
  expect(sent[1]?.readings).toEqual(readings.flat());
});

test('nothing is sent without minutes and without a cup, and both are named', async () => {
  const save = jest.fn(() => Promise.resolve());
  render(<CupTest units="us" storageKey={key} expected={expected} save={save} />);
  await userEvent.click(screen.getByRole('button', { name: 'Save this test' }));
  expect((await screen.findAllByText('Give the minutes it ran.')).length).toBeGreaterThan(0);
  expect(save).not.toHaveBeenCalled();
  await userEvent.type(screen.getByLabelText('Minutes it ran'), '20');
  await userEvent.click(screen.getByRole('button', { name: 'Save this test' }));
  expect((await screen.findAllByText('Give what at least one cup held.')).length).toBeGreaterThan(0);
  expect(save).not.toHaveBeenCalled();
});

test('empty cups all round are no result, and the reason is said', async () => {
  render(<CupTest units="us" storageKey={key} expected={expected} />);
  await userEvent.type(screen.getByLabelText('Minutes it ran'), '15');
  await userEvent.type(cup(1, 1), '0');
  expect(await screen.findByText(/^Every cup is empty after 15 min/)).toBeTruthy();
  expect(screen.getByRole('heading', { name: 'The result' })).toBeTruthy();
});

test('a single row grows cup by cup and tells how far to move', async () => {
  render(<CupTest units="us" storageKey={key} expected={expected} />);
  await userEvent.click(screen.getByRole('radio', { name: 'In one row' }));
  await userEvent.type(screen.getByLabelText('Minutes it ran'), '60');
  const rowCup = (place: number) => screen.getByLabelText(new RegExp(`^Cup ${place}, `));
  await userEvent.click(rowCup(1));
  await userEvent.paste('8 8 7 6 5 3 2 1');
  await userEvent.click(screen.getByRole('button', { name: 'One cup farther out' }));
  await userEvent.type(rowCup(9), '0');
  expect(await screen.findByRole('heading', { name: /^Move \d+ ft, not \d+\.$/ })).toBeTruthy();
});

test('the timer runs on over a reload and fills in the minutes', async () => {
  jest.useFakeTimers({ now: Date.parse('2026-06-13T10:00:00Z') });
  try {
    const user = userEvent.setup({ advanceTimers: jest.advanceTimersByTime });
    const { unmount } = render(<CupTest units="us" storageKey={key} expected={expected} />);
    await user.click(screen.getByRole('button', { name: 'Water on: start the timer' }));
    unmount();
    jest.setSystemTime(Date.parse('2026-06-13T10:45:30Z'));
    render(<CupTest units="us" storageKey={key} expected={expected} />);
    act(() => { jest.advanceTimersByTime(1000); });
    expect(screen.getByRole('timer').textContent).toBe('45:31');
    await user.click(screen.getByRole('button', { name: 'Water off: stop the timer' }));
    expect(screen.getByLabelText<HTMLInputElement>('Minutes it ran').value).toBe('45.5');
  } finally {
    jest.useRealTimers();
  }
});
