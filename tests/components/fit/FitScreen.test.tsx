import { configure, render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { FitScreen } from '@/components/fit/FitScreen';

jest.setTimeout(60_000);
configure({ asyncUtilTimeout: 15_000 });

beforeEach(() => {
  window.sessionStorage.clear();
  window.localStorage.setItem('dapple.units', 'us');
});

async function write(label: string, text: string): Promise<void> {
  await userEvent.clear(screen.getByLabelText(label));
  await userEvent.type(screen.getByLabelText(label), text);
}

test('the example does not fit, says by how much, and each help tells its gain', () => {
  render(<FitScreen />);
  expect(screen.getByText('An example')).toBeTruthy();
  expect(screen.getByRole('heading', { name: 'It does not fit: 10.4 hours needed, 6 had.' })).toBeTruthy();
  expect(screen.getByRole('img', { name: 'Hours a week: 10.4 needed; 6 had.' })).toBeTruthy();
  const helps = within(screen.getByRole('list'));
  expect(helps.getAllByRole('heading').map((heading) => heading.textContent)).toEqual([
    'A fatter hose: 3/4 in instead of 5/8 in', 'A second tap at the same time', expect.stringMatching(/^Less area: 2,8\d\d sq ft/), 'Less depth: 0.58 in a week instead of 1.00 in', expect.stringMatching(/^Let 2,8\d\d sq ft rest \(56 %\)$/),
  ]);
  expect(helps.getByText(/^At best 5\.2 hours needed, saves 5\.2 hours\. It fits then\./)).toBeTruthy();
});

test('the answer follows the typing, and moves count', async () => {
  render(<FitScreen />);
  await write('Hours a week', '12');
  expect(screen.getByRole('heading', { name: 'It fits: 10.4 hours needed, 12 had.' })).toBeTruthy();
  expect(screen.queryByText('An example')).toBeNull();
  expect(screen.queryByRole('heading', { name: /What would help/ })).toBeNull();
  await write('Moves a week', '24');
  expect(screen.getByRole('heading', { name: 'It does not fit: 12.4 hours needed, 12 had.' })).toBeTruthy();
});

test('nonsense is refused at its field and the answer waits', async () => {
  render(<FitScreen />);
  await write('Flow at the sprinkler', '0');
  await userEvent.tab();
  expect(await screen.findByText(/^Write something from 0\.\d+ gpm to 52 gpm\.$/)).toBeTruthy();
  expect(screen.queryByRole('heading', { name: /fit:/ })).toBeNull();
});

test('other units are remembered and turn the example into a round one', async () => {
  render(<FitScreen />);
  await userEvent.click(screen.getByRole('radio', { name: 'Metric' }));
  expect(screen.getByLabelText<HTMLInputElement>('Area to water').value).toBe('465');
  expect(screen.getByRole('heading', { name: 'It does not fit: 10.4 hours needed, 6 had.' })).toBeTruthy();
  expect(window.localStorage.getItem('dapple.units')).toBe('metric');
});

test('what was typed survives a reload', async () => {
  const { unmount } = render(<FitScreen />);
  await write('Area to water', '1200');
  unmount();
  render(<FitScreen />);
  expect(screen.getByLabelText<HTMLInputElement>('Area to water').value).toBe('1200');
});
